package ladder

import (
	"context"
	"encoding/json"
	"math"
	"os"
	"os/exec"
	"testing"
	"time"
)

// reference is one circuit solved by SciPy's implicit BDF integrator with
// Newton on the period map (testdata/reference/steady.py, re-run by the
// project's checks): a program that shares nothing with this package.
type reference struct {
	Case struct {
		Name     string
		Topology Topology
		Stages   int
		Source   struct {
			Waveform                                   Waveform
			Peak, Frequency, Resistance, Leakage, Edge float64
		}
		Capacitors []struct {
			C, ESR float64
			Bias   [][2]float64
		}
		Diode struct {
			IS, N, RS, CJ0, VJ, M, Transit, VT float64
		}
		Load  struct{ Current, Resistance float64 }
		Stray float64
	}
	Result struct {
		Output struct {
			MeanV   float64 `json:"mean_v"`
			RippleV float64 `json:"ripple_v"`
		}
		InputW     float64 `json:"input_w"`
		Capacitors []struct {
			MeanV float64 `json:"mean_v"`
			MaxV  float64 `json:"max_v"`
			RMSA  float64 `json:"rms_a"`
		}
		Diodes []struct {
			InverseV float64 `json:"inverse_v"`
			AverageA float64 `json:"average_a"`
			PeakA    float64 `json:"peak_a"`
			RMSA     float64 `json:"rms_a"`
		}
		Source []struct {
			RMSA float64 `json:"rms_a"`
		}
	}
}

func (r *reference) circuit() Circuit {
	k := r.Case
	c := Circuit{Topology: k.Topology, Stages: k.Stages, Stray: k.Stray, Load: Load{Current: k.Load.Current, Resistance: k.Load.Resistance},
		Source: Source{Waveform: k.Source.Waveform, Peak: k.Source.Peak, Frequency: k.Source.Frequency,
			Resistance: k.Source.Resistance, Leakage: k.Source.Leakage, Edge: k.Source.Edge}}
	for _, x := range k.Capacitors {
		part := Capacitor{C: x.C, ESR: x.ESR}
		for _, p := range x.Bias {
			part.Bias = append(part.Bias, BiasPoint{p[0], p[1]})
		}
		c.Capacitors = append(c.Capacitors, part)
	}
	for range c.Topology.DiodeCount(c.Stages) {
		c.Diodes = append(c.Diodes, Diode(struct {
			IS, N, RS, CJ0, VJ, M, Transit, Leakage, VT float64
		}{k.Diode.IS, k.Diode.N, k.Diode.RS, k.Diode.CJ0, k.Diode.VJ, k.Diode.M, k.Diode.Transit, 0, k.Diode.VT}))
	}
	return c
}

func references(t testing.TB) []reference {
	data, err := os.ReadFile("../../testdata/reference/steady.json")
	if err != nil {
		t.Fatal(err)
	}
	var all []reference
	if err := json.Unmarshal(data, &all); err != nil {
		t.Fatal(err)
	}
	return all
}

// TestAgainstSciPy demands 0.1 % on the mean, 1 % on ripple and inverse
// voltage, 2 % on currents.
func TestAgainstSciPy(t *testing.T) {
	for _, ref := range references(t) {
		t.Run(ref.Case.Name, func(t *testing.T) {
			got, err := Solve(context.Background(), ref.circuit(), nil)
			if err != nil {
				t.Fatal(err)
			}
			want := ref.Result
			near(t, "mean output", got.MeanV, want.Output.MeanV, 0.001)
			near(t, "ripple", got.RippleV, want.Output.RippleV, 0.01)
			near(t, "input power", got.InputW, want.InputW, 0.01)
			for i, w := range want.Capacitors {
				near(t, got.Capacitors[i].Ref+" mean voltage", got.Capacitors[i].MeanV, w.MeanV, 0.002)
				near(t, got.Capacitors[i].Ref+" greatest voltage", got.Capacitors[i].MaxV, w.MaxV, 0.002)
				near(t, got.Capacitors[i].Ref+" RMS current", got.Capacitors[i].RMSA, w.RMSA, 0.02)
			}
			for i, w := range want.Diodes {
				near(t, got.Diodes[i].Ref+" inverse voltage", got.Diodes[i].InverseV, w.InverseV, 0.01)
				near(t, got.Diodes[i].Ref+" average current", got.Diodes[i].AverageA, w.AverageA, 0.02)
				near(t, got.Diodes[i].Ref+" peak current", got.Diodes[i].PeakA, w.PeakA, 0.02)
				near(t, got.Diodes[i].Ref+" RMS current", got.Diodes[i].RMSA, w.RMSA, 0.02)
			}
			for i, w := range want.Source {
				near(t, "source RMS current", got.Source[i].RMSA, w.RMSA, 0.02)
			}
		})
	}
}

// near demands agreement within a part of the wanted value.
func near(t *testing.T, what string, got, want, part float64) {
	t.Helper()
	if !(math.Abs(got-want) <= part*math.Abs(want)) {
		t.Errorf("%s: got %.6g want %.6g, off by %.3g %% where %.3g %% is allowed", what, got, want, 100*(got/want-1), 100*part)
	}
}

// BenchmarkAgainstSciPy measures in one run how many times faster a steady
// state is here than in the reference script, on the same circuit; the
// script's time includes starting Python, about half a second.
func BenchmarkAgainstSciPy(b *testing.B) {
	const python, name = "/usr/bin/python3", "hw5-100kHz"
	began := time.Now()
	if out, err := exec.Command(python, "../../testdata/reference/steady.py", "--check", "--jobs", "1", name).CombinedOutput(); err != nil {
		b.Skipf("SKIPPED: the reference script does not run here: %v\n%s", err, out)
	}
	theirs := time.Since(began)
	for _, ref := range references(b) {
		if ref.Case.Name != name {
			continue
		}
		c := ref.circuit()
		for b.Loop() {
			if _, err := Solve(context.Background(), c, nil); err != nil {
				b.Fatal(err)
			}
		}
		b.ReportMetric(theirs.Seconds()/(b.Elapsed().Seconds()/float64(b.N)), "times_faster")
	}
}
