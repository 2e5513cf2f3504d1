package optimize

import (
	"bytes"
	"context"
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/catalog/demo"
	"rungwright/catalog/form"
	"rungwright/optimize/ladder"
)

// sampleDesign is a design of two stages from the demo catalog.
func sampleDesign(t *testing.T) *Design {
	t.Helper()
	s, err := ReadSupply("bias.yaml", []byte(sampleSupply))
	if err != nil {
		t.Fatal(err)
	}
	c := catalog.Demo()
	group := func(number string, series, parallel int) Group {
		p := c.Find(number)
		if p == nil {
			t.Fatalf("the demo catalog has no %s", number)
		}
		return Group{p, series, parallel}
	}
	first, rest, diode := group("QLF-HV-10N-2K", 1, 2), group("QLF-HV-4N7-2K", 1, 1), group("WRSD-F-1K-1L", 2, 1)
	plan := Plan{Topology: ladder.HalfWave, Stages: 2, Capacitors: []Group{first, rest, rest, rest},
		Diodes: []Group{diode, diode, diode, diode}, Bleeder: group("MSKT-GA-47M", 2, 1)}
	d, err := Evaluate(context.Background(), s, plan, c, nil)
	if err != nil {
		t.Fatal(err)
	}
	d.Certificate = Certificate{Proved: true, Text: []string{"12 combinations", "nothing cheaper: proved"}}
	d.RunnersUp = []RunnerUp{{Summary: "half-wave, 3 stages", UnitCost: decimal.RequireFromString("2.5031"), Note: "less ripple"}}
	return d
}

const sampleSupply = `
supply: "Bias: two stages, 2 kV"
output:
  voltage: 2.1234567 kV
  window: 12.5 %
  polarity: negative
  load: {least: 0 A, most: 33.333333 uA}
  ripple: 40 V
  discharge: {below: 60 V, within: 10 s}
source: {rms: 400 V, line: 3 %, frequency: 35 kHz, resistance: 180 ohm, power: 6 VA}
build: {units: 120, spares: 2 %, currency: EUR}
choose: {least: cost, then: volume, topologies: [half-wave, full-wave], stages: {most: 8}, avoid: [Nobody & Sons]}
limits: {cost: 8.005 EUR, height: 20 mm}
`

// TestDesignFileRoundTrip: what is written reads back as the same design, and
// is written again as the same bytes.
func TestDesignFileRoundTrip(t *testing.T) {
	d := sampleDesign(t)
	data, err := d.Encode()
	if err != nil {
		t.Fatal(err)
	}
	back, err := ReadDesign("design.yaml", data, catalog.Demo())
	if err != nil {
		t.Fatalf("%v\n%s", err, data)
	}
	if len(back.Notes) > 0 {
		t.Errorf("notes on an unchanged design: %q", back.Notes)
	}
	again, err := back.Encode()
	if err != nil {
		t.Fatal(err)
	}
	if diff := cmp.Diff(string(data), string(again)); diff != "" {
		t.Error(diff)
	}
	if !back.Certificate.Proved || len(back.RunnersUp) != 1 {
		t.Error("the proof of an unchanged design is lost")
	}
}

// TestSupplyFormRoundTrip: every example supply survives being written into a
// design file, to the last bit.
func TestSupplyFormRoundTrip(t *testing.T) {
	files, err := filepath.Glob("../testdata/supplies/*.yaml")
	if err != nil || len(files) < 5 {
		t.Fatalf("%d supplies, %v", len(files), err)
	}
	texts := map[string][]byte{"sample": []byte(sampleSupply), "demo": demo.Supply}
	for _, f := range files {
		if texts[f], err = os.ReadFile(f); err != nil {
			t.Fatal(err)
		}
	}
	for name, text := range texts {
		s, err := ReadSupply(name, text)
		if err != nil {
			t.Fatal(err)
		}
		back, err := ReadSupply(name, s.form().Bytes())
		if err != nil {
			t.Errorf("%s: %v\n%s", name, err, s.form().Bytes())
			continue
		}
		s.Input, back.Input = catalog.Input{}, catalog.Input{}
		if diff := cmp.Diff(s, back); diff != "" {
			t.Errorf("%s: %s", name, diff)
		}
	}
}

// TestChangedDesignLosesItsProof: a file edited by hand still reads, but the
// certificate does not cover it any more, and what is different now is told.
func TestChangedDesignLosesItsProof(t *testing.T) {
	data, err := sampleDesign(t).Encode()
	if err != nil {
		t.Fatal(err)
	}
	for name, change := range map[string][2]string{
		"another part": {"QLF-HV-4N7-2K", "QLF-HV-2N2-2K"},
		"another wish": {"ripple: 40 V", "ripple: 39 V"},
		"other inputs": {"sha256: ", "sha256: 00"},
	} {
		changed := bytes.ReplaceAll(data, []byte(change[0]), []byte(change[1]))
		if bytes.Equal(changed, data) {
			t.Fatalf("%s: nothing to change in\n%s", name, data)
		}
		d, err := ReadDesign("design.yaml", changed, catalog.Demo())
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		if d.Certificate.Proved || len(d.Notes) == 0 {
			t.Errorf("%s: proved %v, notes %q", name, d.Certificate.Proved, d.Notes)
		}
	}
}

// TestDesignFileMistakes: each mistake is told with its place and a mend.
func TestDesignFileMistakes(t *testing.T) {
	data, err := sampleDesign(t).Encode()
	if err != nil {
		t.Fatal(err)
	}
	for name, c := range map[string]struct{ old, new, want string }{
		"unknown part":     {"part: QLF-HV-4N7-2K", "part: QLF-HV-4N7-2KK", `"QLF-HV-4N7-2KK" is not in the catalog; did you mean "QLF-HV-4N7-2K"?`},
		"wrong kind":       {"for: coupling\n", "for: rectifier\n", "but a rectifier takes a diode"},
		"no such position": {"C2, C3, C4]", "C2, C3, C5]", "C5 is no position"},
		"twice":            {"C2, C3, C4]", "C2, C3, C3]", "the position C3 is filled twice"},
		"missing":          {"C2, C3, C4]", "C2, C3]", "no part is given for C4"},
		"other maker":      {"maker: Quillfen", "maker: Tarnvale", "not by Tarnvale"},
		"stages":           {"stages: 2\n", "stages: -2\n", "out of range"},
		"no design":        {"design: ", "supply: ", "it looks like a supply file"},
		"a slip":           {"topology:", "topologie:", `did you mean "topology"`},
	} {
		changed := strings.Replace(string(data), c.old, c.new, 1)
		if changed == string(data) {
			t.Fatalf("%s: nothing to change in\n%s", name, data)
		}
		_, err := ReadDesign("design.yaml", []byte(changed), catalog.Demo())
		problems, ok := errors.AsType[form.Problems](err)
		if !ok || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: got %v, want %q", name, err, c.want)
		}
		for _, p := range problems {
			if p.Place.Line == 0 {
				t.Errorf("%s: no line: %v", name, p)
			}
		}
	}
}

// FuzzReadDesign reads anything without a panic: a plan that is a circuit, or
// problems with their lines.
func FuzzReadDesign(f *testing.F) {
	f.Add([]byte("design: x\nform: 1\nwanted: {supply: a, output: {voltage: 1 V}}\nchoice: {topology: half-wave, stages: 1, parts: [{part: A, for: coupling, at: [C1]}]}\n"))
	f.Add([]byte("design: x\nform: 1\nwanted: {}\nchoice: {topology: bipolar, stages: 9, parts: [{part: QLF-HV-4N7-2K, for: smoothing, at: [C01, C1, R1, '']}]}\ninputs: [{}]\nresults: {targets: {a: {got: 1}}}\n"))
	f.Fuzz(func(t *testing.T, data []byte) {
		var r form.Report
		top := form.ParseWithin("f.yaml", data, designLimits, &r)
		w := readDesignForm(top, catalog.Demo())
		if r.Err() == nil {
			if err := w.plan.complete(); err != nil {
				t.Fatalf("accepted, but %v", err)
			}
		}
	})
}
