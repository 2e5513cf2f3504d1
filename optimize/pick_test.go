package optimize

import (
	"context"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"rungwright/catalog"
	"rungwright/catalog/demo"
	"rungwright/optimize/ladder"
)

// examples are the shipped supplies, the embedded demo among them.
func examples(t *testing.T) map[string]Supply {
	t.Helper()
	texts := map[string][]byte{"demo": demo.Supply}
	files, err := filepath.Glob("../testdata/supplies/*.yaml")
	if err != nil || len(files) < 5 {
		t.Fatalf("%d example supplies: %v", len(files), err)
	}
	for _, f := range files {
		data, err := os.ReadFile(f)
		if err != nil {
			t.Fatal(err)
		}
		texts[strings.TrimSuffix(filepath.Base(f), ".yaml")] = data
	}
	out := map[string]Supply{}
	for name, data := range texts {
		s, err := ReadSupply(name+".yaml", data)
		if err != nil {
			t.Fatal(err)
		}
		out[name] = s
	}
	return out
}

// TestEveryExampleIsPicked picks each example supply and confirms the answer's
// output and stresses by simulating the written parts afresh.
func TestEveryExampleIsPicked(t *testing.T) {
	for name, s := range examples(t) {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			if testing.Short() && name != "bench-rail-24v" && name != "amplifier-rail-250v" && name != "valve-bias-400v" {
				t.Skip("short: only the quick ones")
			}
			a, err := Pick(context.Background(), s, catalog.Demo(), &Options{RunnersUp: -1})
			if err != nil {
				t.Fatal(err)
			}
			if a.Design == nil {
				t.Fatalf("nothing fits: %s", strings.Join(a.Why.Text, "\n"))
			}
			if !a.Certificate.Proved {
				t.Error("not proved")
			}
			confirm(t, s, a.Design)
			addsUp(t, &a.Certificate)
		})
	}
}

// confirm judges the design's parts once more, without the search.
func confirm(t *testing.T, s Supply, d *Design) {
	t.Helper()
	again, err := Evaluate(context.Background(), s, d.Plan, catalog.Demo(), nil)
	if err != nil {
		t.Fatal(err)
	}
	for _, f := range again.Failed {
		t.Errorf("simulated afresh it breaks %s", f)
	}
	e, err := newEvaluator(s, catalog.Demo(), nil)
	if err != nil {
		t.Fatal(err)
	}
	for _, at := range e.conditions {
		got, err := ladder.Solve(context.Background(), e.circuit(&d.Plan, at), &ladder.Settings{Tolerance: 1e-7})
		if err != nil {
			t.Fatalf("%s: %v", at.name, err)
		}
		v := math.Abs(got.MeanV)
		if low, high := e.supply.lowest(), e.supply.highest(); v < low*(1-1e-3) || v > high*(1+1e-3) {
			t.Errorf("%s: %g V is outside %g to %g V", at.name, v, low, high)
		}
		if want := float64(s.Output.Ripple); want > 0 && got.RippleV > want*1.005 {
			t.Errorf("%s: ripple %g V is above %g V", at.name, got.RippleV, want)
		}
	}
}

// addsUp: every combination of the space is in one class.
func addsUp(t *testing.T, c *Certificate) {
	t.Helper()
	sum := c.Dominated + c.Bounded + c.Estimated + int64(c.Simulated) + c.Dearer
	if sum != c.Combinations || c.Dearer < 0 {
		t.Errorf("the classes hold %d of %d combinations, %d of them dearer", sum, c.Combinations, c.Dearer)
	}
}

// TestAnswerDoesNotDependOnWorkers demands the same design file from one and
// from several simulations at once.
func TestAnswerDoesNotDependOnWorkers(t *testing.T) {
	s := examples(t)["valve-bias-400v"]
	var first string
	for _, workers := range []int{1, 2, 8} {
		a, err := Pick(context.Background(), s, catalog.Demo(), &Options{Workers: workers})
		if err != nil {
			t.Fatal(err)
		}
		data, err := a.Design.Encode()
		if err != nil {
			t.Fatal(err)
		}
		if first == "" {
			first = string(data)
		} else if string(data) != first {
			t.Errorf("%d workers write another design file", workers)
		}
	}
}

// TestStoppedSearch says what it has proved: nothing, here, but that it was
// stopped.
func TestStoppedSearch(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	a, err := Pick(ctx, examples(t)["valve-bias-400v"], catalog.Demo(), nil)
	if err != nil {
		t.Fatal(err)
	}
	if a.Certificate.Proved || a.Design != nil || a.Why == nil {
		t.Errorf("a search that was stopped at once claims %+v", a.Certificate)
	}
}

// TestNothingFits: an impossible wish is answered with reasons.
func TestNothingFits(t *testing.T) {
	s := examples(t)["bench-rail-24v"]
	s.Output.Voltage = 4000
	a, err := Pick(context.Background(), s, catalog.Demo(), nil)
	if err != nil {
		t.Fatal(err)
	}
	if a.Design != nil || a.Why == nil || !strings.Contains(strings.Join(a.Why.Text, " "), "even a ") {
		t.Errorf("got design %v, why %+v", a.Design != nil, a.Why)
	}
	addsUp(t, &a.Certificate)
}

// TestUnknownWinding is the person's mistake.
func TestUnknownWinding(t *testing.T) {
	s := examples(t)["valve-bias-400v"]
	s.Source.Part = "no such winding"
	_, err := Pick(context.Background(), s, catalog.Demo(), nil)
	if _, ok := err.(*InputError); !ok {
		t.Errorf("got %v", err)
	}
}
