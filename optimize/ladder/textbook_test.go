package ladder

import (
	"math"
	"testing"
)

// ladderOf is a circuit of ideal parts for the estimate: diodes without drop,
// a winding without resistance.
func ladderOf(t Topology, stages int, peak, frequency, current float64, values ...float64) Circuit {
	ideal := Diode{IS: 1e3, N: 1e-9}
	c := equal(t, stages, 1, ideal, Source{Peak: peak, Frequency: frequency}, Load{Current: current})
	for i := range c.Capacitors {
		c.Capacitors[i].C = values[i%len(values)]
	}
	return c
}

// textbookDrop is the drop that books print for a half-wave cascade. They
// weigh q/C of a smoothing capacitor with m stages above by m(m+1), where its
// mean falls by [m² + (m+1)²]/2 = m(m+1) + ½: the load's own slow drain is
// left out.
func textbookDrop(c Circuit) float64 {
	drop := Estimate(c).DropV
	for k, smoothing := range c.Topology.SmoothingColumn(c.Stages) {
		if smoothing {
			drop -= c.Load.Current / c.Source.Frequency / c.Capacitors[k].C / 2
		}
	}
	return drop
}

func TestTextbookExamples(t *testing.T) {
	rms := math.Sqrt2
	t.Run("Naidu and Kamaraju, High Voltage Engineering, example 6.1", func(t *testing.T) {
		c := ladderOf(HalfWave, 8, 125e3, 150, 5e-3, 0.05e-6)
		e := Estimate(c)
		near(t, "drop [V]", textbookDrop(c), 248.0e3, 0.001)
		near(t, "drop of 2000 kV", textbookDrop(c)/2000e3, 0.124, 0.005)
		// The book prints a ripple of 4.53 %, which comes of n = 16 in its
		// formula: a misprint. Charge balance gives 24 kV, 1.2 %.
		near(t, "ripple [V]", e.RippleV, 24e3, 0.001)
	})
	t.Run("Abdel-Salam and others, High Voltage Engineering, chapter 16 example 1", func(t *testing.T) {
		e := Estimate(ladderOf(HalfWave, 1, 100e3*rms, 50, 5e-3, 0.01e-6, 0.05e-6))
		near(t, "ripple [V]", e.RippleV, 2e3, 0.001)
		near(t, "mean drop [V]", e.DropV, 11e3, 0.001)
		near(t, "mean output [V]", e.MeanV, 271.84e3, 0.0001)
	})
	t.Run("Abdel-Salam and others, chapter 16 example 2", func(t *testing.T) {
		// Coupling, foot and smoothing capacitor of a tripler. The printed drop
		// of 12.5 kV is not charge-balanced (27.5 kV is): only the ripple serves.
		c := ladderOf(OddMultiple, 1, 100e3*rms, 50, 5e-3, 0.1e-6, 0.01e-6, 0.1e-6)
		c.Capacitors[0].C, c.Capacitors[1].C, c.Capacitors[2].C = 0.01e-6, 0.05e-6, 0.10e-6
		near(t, "ripple [V]", Estimate(c).RippleV, 21e3, 0.001)
	})
	t.Run("Abdel-Salam and others, chapter 16 example 3", func(t *testing.T) {
		e := Estimate(ladderOf(HalfWave, 12, 200e3*rms, 50, 5e-3, 0.15e-6))
		near(t, "ripple [V]", e.RippleV, 52e3, 0.001)
		// The book adds half of the ripple to the crest's drop: 840.67 kV less
		// the mean's 818.67 kV is 22 kV of its own counting.
		near(t, "mean drop [V]", e.DropV, 818.67e3, 0.0001)
	})
	t.Run("Wadhwa, High Voltage Engineering, chapter 2, from memory", func(t *testing.T) {
		c := ladderOf(HalfWave, 10, 100e3*2, 150, 1e-3, 0.06e-6)
		e := Estimate(c)
		near(t, "drop [V]", textbookDrop(c), 79.44e3, 0.001)
		near(t, "drop of the no-load output", textbookDrop(c)/4000e3, 0.0199, 0.01)
		near(t, "ripple [V]", e.RippleV, 6.11e3, 0.001)
	})
}

// TestCoefficients checks the charge-balance coefficients of equal
// capacitors, in units of I/(fC), derived by hand from the charges that each
// pulse moves and, for the half-wave cascade, as the books print them:
// 2n³/3 + n²/2 − n/6 for the crest and n(n+1)/2 for the ripple.
func TestCoefficients(t *testing.T) {
	rows := []struct {
		t            Topology
		n            int
		drop, ripple float64
	}{
		{HalfWave, 1, 1.5, 1}, {HalfWave, 2, 8, 3}, {HalfWave, 3, 23.5, 6}, {HalfWave, 4, 52, 10}, {HalfWave, 5, 97.5, 15},
		{HalfWave, 6, 164, 21}, {HalfWave, 8, 376, 36}, {HalfWave, 10, 720, 55}, {HalfWave, 12, 1228, 78},
		{FullWave, 1, 0.75, 0.5}, {FullWave, 2, 3, 1}, {FullWave, 3, 7.75, 1.5}, {FullWave, 4, 16, 2}, {FullWave, 5, 28.75, 2.5}, {FullWave, 6, 47, 3},
		{BridgeDoubler, 1, 1, 1},
		{ParallelFed, 1, 1.5, 1}, {ParallelFed, 2, 3.5, 1}, {ParallelFed, 5, 9.5, 1},
		{OddMultiple, 1, 4, 3}, {OddMultiple, 2, 14.5, 6},
		{Bipolar, 1, 3, 1}, {Bipolar, 2, 16, 2}, {Bipolar, 3, 47, 3},
	}
	for _, r := range rows {
		e := Estimate(ladderOf(r.t, r.n, 1e6, 1, 1, 1))
		near(t, string(r.t)+" drop", e.DropV, r.drop, 1e-9)
		near(t, string(r.t)+" ripple", e.RippleV, r.ripple, 1e-9)
	}
}

// TestUnequalCoefficients holds values worked by hand for unequal
// capacitors, three stages, q = 1 C.
func TestUnequalCoefficients(t *testing.T) {
	c := ladderOf(HalfWave, 3, 1e6, 1, 1, 2.0, 1.3, 3.0, 0.5, 0.7, 2.2)
	half := Estimate(c)
	near(t, "half-wave crest drop", textbookDrop(c), 15.8773, 1e-5)
	near(t, "half-wave mean drop", half.DropV, 17.4892, 1e-5)
	near(t, "half-wave ripple", half.RippleV, 6.7622, 1e-5)
	full := Estimate(ladderOf(FullWave, 3, 1e6, 1, 1, 2, 2, 1.3, 3, 3, 0.5, 0.7, 0.7, 2.2))
	near(t, "full-wave mean drop", full.DropV, 4.4369, 1e-4)
	near(t, "full-wave ripple", full.RippleV, 1.6119, 1e-4)
}

// TestBottomCapacitorDoubled holds the gain of a first coupling capacitor of
// twice the value.
func TestBottomCapacitorDoubled(t *testing.T) {
	for n, want := range map[int]float64{1: 1, 2: 6, 3: 19, 4: 44, 5: 85, 8: 344, 10: 670} {
		c := ladderOf(HalfWave, n, 1e6, 1, 1, 1)
		c.Capacitors[0].C = 2
		near(t, "drop", Estimate(c).DropV, want, 1e-9)
	}
}

// TestStrayFactor holds the no-load output of ladders with capacitance across
// every diode, from an independent linear-algebra solution of the discrete
// ladder (testdata/reference/closed.py), which tends to the tanh(x)/x of
// Everhart and Lorrain, Rev. Sci. Instrum. 24 (1953) 221, formula from memory.
func TestStrayFactor(t *testing.T) {
	rows := []struct {
		share float64
		n     int
		want  float64
	}{
		{0.001, 2, .9926}, {0.001, 4, .9752}, {0.001, 8, .9157}, {0.001, 10, .8771},
		{0.005, 2, .9640}, {0.005, 4, .8886}, {0.005, 8, .6968}, {0.005, 10, .6086},
		{0.01, 2, .9307}, {0.01, 4, .8022}, {0.01, 8, .5500}, {0.01, 10, .4593},
		{0.05, 2, .7337}, {0.05, 4, .4752}, {0.05, 8, .2496}, {0.05, 10, .2000},
	}
	for _, r := range rows {
		c := ladderOf(HalfWave, r.n, 1000, 1e3, 0, 1e-6)
		for i := range c.Diodes {
			c.Diodes[i].CJ0 = r.share * 1e-6
		}
		near(t, "factor", Estimate(c).NoLoadV/(2000*float64(r.n)), r.want, 3e-4)
	}
	c := ladderOf(HalfWave, 20, 1000, 1e3, 0, 1e-6)
	for i := range c.Diodes {
		c.Diodes[i].CJ0 = 1e-9
	}
	x := 2 * 20 * math.Sqrt(1e-9/1e-6)
	near(t, "twenty stages against tanh(x)/x", Estimate(c).NoLoadV/40e3, math.Tanh(x)/x, 0.04)
}
