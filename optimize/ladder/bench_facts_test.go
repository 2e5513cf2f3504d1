package ladder

import (
	"context"
	"math"
	"testing"
)

// solved is Solve for a circuit that must have an answer.
func solved(t *testing.T, c Circuit) Steady {
	t.Helper()
	s, err := Solve(context.Background(), c, nil)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// rectifier is a general 1 A silicon rectifier: 0.57 V at 1 mA, 0.91 V at 1 A.
var rectifier = Diode{IS: 3.872e-9, N: 1.776, RS: 16.6e-3, CJ0: 15.19e-12, VJ: 0.5928, M: 0.3554}

// TestBenchFacts holds what people see on the bench: common practice, no
// source. The winding is one half of a small 12 V centre-tapped transformer
// that reads 6.2 V AC while loaded; assumed are 1.2 Ω of winding resistance,
// referred, and a no-load voltage of 7.4 V RMS, 19 % above the loaded reading,
// as is usual for a few VA. Tolerance 5 % on the readings.
func TestBenchFacts(t *testing.T) {
	winding := Source{Peak: 7.4 * math.Sqrt2, Frequency: 50, Resistance: 1.2}
	doubler := func(farads float64, load Load) Circuit {
		return equal(HalfWave, 1, farads, rectifier, winding, load)
	}
	loaded := solved(t, doubler(2200e-6, Load{Resistance: 27}))
	t.Logf("into 27 Ω: %.2f V, winding %.2f V RMS", loaded.MeanV, windingRMS(loaded, winding))
	near(t, "output into 27 Ω", loaded.MeanV, 11.4, 0.05)
	near(t, "winding reading under load", windingRMS(loaded, winding), 6.2, 0.05)

	empty := solved(t, doubler(2200e-6, Load{Resistance: 10e6})) // a meter
	if empty.MeanV < 19 || empty.MeanV > 2*winding.Peak {
		t.Errorf("unloaded: %.2f V where over 19 V is seen", empty.MeanV)
	}

	// A 12 V, 0.8 A lamp, whose resistance rises with its voltage by the usual
	// I ∝ V^0.55 of tungsten (from memory).
	var lamp Load
	for v := 0.25; v <= 16; v += 0.25 {
		lamp.Table = append(lamp.Table, LoadPoint{V: v, A: 0.8 * math.Pow(v/12, 0.55)})
	}
	small, large := solved(t, doubler(2200e-6, lamp)), solved(t, doubler(4700e-6, lamp))
	t.Logf("lamp: %.2f V with 2200 µF, %.2f V with 4700 µF", small.MeanV, large.MeanV)
	near(t, "lamp, 2200 µF", small.MeanV, 8, 0.05)
	near(t, "lamp, 4700 µF", large.MeanV, 9.5, 0.05)
}

// windingRMS is the voltage at the winding's terminals: the source less the
// drop of its resistance, by the power that each takes.
func windingRMS(s Steady, w Source) float64 {
	open := w.Peak * w.Peak / 2
	i := s.Source[0]
	return math.Sqrt(open - 2*w.Resistance*i.PowerW + w.Resistance*w.Resistance*i.RMSA*i.RMSA)
}

// TestFullWaveHalvesRipple: common practice, no source; for a cascade of n
// stages the charge balance says n/2 against n(n+1)/2, so
// one stage is where a half is meant.
func TestFullWaveHalvesRipple(t *testing.T) {
	src, load := Source{Peak: 100, Frequency: 1e3, Resistance: 1}, Load{Current: 1e-3}
	half := solved(t, equal(HalfWave, 1, 1e-6, rectifier, src, load))
	full := solved(t, equal(FullWave, 1, 1e-6, rectifier, src, load))
	near(t, "ripple, full-wave over half-wave", full.RippleV/half.RippleV, 0.5, 0.05)
}

// TestOutputNeverExceedsInput holds over heavy and light loads.
func TestOutputNeverExceedsInput(t *testing.T) {
	for _, ohms := range []float64{1, 10, 100, 1e3, 1e5} {
		s := solved(t, equal(HalfWave, 2, 1e-3, rectifier, Source{Peak: 10, Frequency: 50, Resistance: 1}, Load{Resistance: ohms}))
		if s.LoadW > s.InputW {
			t.Errorf("%g Ω: %g W out of %g W in", ohms, s.LoadW, s.InputW)
		}
	}
}
