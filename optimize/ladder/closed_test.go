package ladder

import (
	"encoding/json"
	"math"
	"os"
	"testing"
)

// closedForms are limits and tables recomputed by testdata/reference/closed.py
// from first principles: the circuits of O. H. Schade, Proc. IRE 31 (1943) 341,
// as doublers, and the conduction angle of large capacitors.
type closedForms struct {
	Greinacher, Bridge []struct {
		OmegaRC *float64 `json:"omega_rc"` // null: large capacitors
		Output  float64  `json:"output_over_peak"`
		Source  float64  `json:"source_over_load"`
	}
	Conduction []struct {
		Output   float64 `json:"output_over_peak"`
		Source   float64 `json:"source_over_load"`
		Stages   int
		Topology Topology
	}
}

func readClosedForms(t *testing.T) closedForms {
	data, err := os.ReadFile("../../testdata/reference/closed.json")
	if err != nil {
		t.Fatal(err)
	}
	var c closedForms
	if err := json.Unmarshal(data, &c); err != nil {
		t.Fatal(err)
	}
	return c
}

// nearlyIdeal is a diode whose drop does not show beside a kilovolt.
var nearlyIdeal = Diode{IS: 1e-6, N: 0.05, RS: 1e-3}

// resistive is a circuit on a 1 kV, 50 Hz source with a load of 100 kΩ.
func resistive(top Topology, stages int, omegaRC, sourceShare float64) Circuit {
	const load, omega = 100e3, 2 * math.Pi * 50
	return equal(top, stages, omegaRC/(omega*load), nearlyIdeal,
		Source{Peak: 1000, Frequency: 50, Resistance: sourceShare * load}, Load{Resistance: load})
}

// TestPeakRectifierTables: the steady state against the doubler tables.
func TestPeakRectifierTables(t *testing.T) {
	tables, rows := readClosedForms(t), 0
	for top, table := range map[Topology][]struct {
		OmegaRC *float64 `json:"omega_rc"`
		Output  float64  `json:"output_over_peak"`
		Source  float64  `json:"source_over_load"`
	}{HalfWave: tables.Greinacher, BridgeDoubler: tables.Bridge} {
		for _, r := range table {
			if r.OmegaRC == nil || *r.OmegaRC > 200 {
				continue
			}
			rows++
			near(t, string(top), solved(t, resistive(top, 1, *r.OmegaRC, r.Source)).MeanV/1000, r.Output, 0.003)
		}
	}
	if rows < 30 {
		t.Errorf("only %d rows", rows)
	}
}

// TestLargeCapacitors: the output tends to 2nV·cos θ with
// tan θ − θ = 2πn²Rs/R (half-wave) or πn²Rs/R (full-wave).
func TestLargeCapacitors(t *testing.T) {
	for _, r := range readClosedForms(t).Conduction {
		got := solved(t, resistive(r.Topology, r.Stages, 30000, r.Source)).MeanV / 1000
		near(t, string(r.Topology), got, r.Output, 0.001)
	}
}

// TestMeasuredDoubler: measurements by J. Eoff (2019) on a Greinacher doubler
// at 50 Hz, two equal capacitors, 462 kΩ beside a 10 MΩ meter, the source less
// one diode drop fitted once as 19.8 V. His parts have tolerances of their
// own: 3 %.
func TestMeasuredDoubler(t *testing.T) {
	for _, r := range []struct{ farads, ohms, want float64 }{
		{100e-9, 462e3 * 10e6 / 10.462e6, 24.0}, {1e-6, 462e3 * 10e6 / 10.462e6, 37.2},
		{100e-9, 10e6, 38.1}, {1e-6, 10e6, 39.7},
	} {
		c := equal(HalfWave, 1, r.farads, Diode{IS: 1e-6, N: 0.02, RS: 0.01}, Source{Peak: 19.8, Frequency: 50, Resistance: 1}, Load{Resistance: r.ohms})
		near(t, "output", solved(t, c).MeanV, r.want, 0.03)
	}
}

// TestOptimumStages: the estimate's output, with the books' drop, is greatest
// near n = √(VfC/I) (Naidu and Kamaraju; Abdel-Salam and others): 14 in Naidu
// and Kamaraju's example 6.1, 20 in Abdel-Salam's example 3, and 10 in a
// nuclear-physics text's example 11.1 (author uncertain), whose ripple of
// 27.5 kV is half of the peak to peak.
func TestOptimumStages(t *testing.T) {
	for _, r := range []struct {
		peak, frequency, current, farads float64
		want                             int
	}{{125e3, 150, 5e-3, 0.05e-6, 14}, {200e3 * math.Sqrt2, 50, 5e-3, 0.15e-6, 20}, {100e3, 200, 4e-3, 0.02e-6, 10}} {
		best, most := 0, 0.0
		for n := 1; n <= MaxStages; n++ {
			c := ladderOf(HalfWave, n, r.peak, r.frequency, r.current, r.farads)
			if v := 2*float64(n)*r.peak - textbookDrop(c); v > most {
				best, most = n, v
			}
		}
		if best < r.want-1 || best > r.want {
			t.Errorf("greatest output at %d stages, the books say %d", best, r.want)
		}
	}
	c := ladderOf(HalfWave, 10, 100e3, 200, 4e-3, 0.02e-6)
	near(t, "ripple, peak to peak", Estimate(c).RippleV, 2*27.5e3, 0.001)
}
