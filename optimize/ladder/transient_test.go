package ladder

import (
	"context"
	"math"
	"testing"
)

// TestPumpFromRest: a doubler of equal capacitors on a square wave between ±V
// without load stands at V, 3V/2, 7V/4, 15V/8 … after each positive half: a
// published olympiad handout on capacitor pumps; two stages at 1, 1.5, 1.875,
// 2.1875, 2.453125 of V, derived by the same charge sharing.
func TestPumpFromRest(t *testing.T) {
	ideal := Diode{IS: 1e-6, N: 0.02, RS: 1e-3}
	pump := func(stages int) []float64 {
		c := equal(HalfWave, stages, 1e-6, ideal, Source{Waveform: Square, Edge: 1e-3, Peak: 100, Frequency: 100, Resistance: 1}, Load{})
		up, err := SwitchOn(context.Background(), c, 0.5, 1e9, 5.5/100)
		if err != nil {
			t.Fatal(err)
		}
		return up.Curve.High
	}
	for k, want := range []float64{1, 1.5, 1.75, 1.875} {
		near(t, "doubler after a positive half", pump(1)[k]/100, want, 0.01)
	}
	for k, want := range []float64{1, 1.5, 1.875, 2.1875, 2.453125} {
		near(t, "two stages after a positive half", pump(2)[k]/100, want, 0.01)
	}
}

// TestStartUpSurge: at the crest the first diode of an odd multiple's foot
// charges its capacitor from rest: a peak of nearly V/R and, while the crest
// lasts, I²t of nearly V²C/(2R) (closed form of an RC charge).
func TestStartUpSurge(t *testing.T) {
	c := equal(OddMultiple, 1, 1e-9, Diode{IS: 1e-9, N: 1, RS: 1e-3}, Source{Peak: 100, Frequency: 50, Resistance: 10}, Load{})
	c.Capacitors[0].C = 1e-6
	up, err := SwitchOn(context.Background(), c, 0.25, 0, 0)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "peak", up.Diodes[0].PeakA, 100.0/10, 0.03)
	near(t, "I²t", up.Diodes[0].Squared, 100*100*1e-6/(2*10), 0.03)
	near(t, "half-sine length", up.Diodes[0].HalfSine(), 1e-6*10, 0.06)
}

// TestRise: the output must pass the wanted voltage and not overshoot a
// source without inductance.
func TestRise(t *testing.T) {
	c := equal(HalfWave, 3, 10e-9, plainDiode, Source{Peak: 200, Frequency: 20e3, Resistance: 20}, Load{Current: 0.5e-3})
	end := solved(t, c)
	up, err := SwitchOn(context.Background(), c, 0, 0.98*end.MeanV, 1)
	if err != nil {
		t.Fatal(err)
	}
	if math.IsInf(up.RiseS, 1) || up.RiseS < 3/20e3 || up.HighestV > 1.01*end.MaxV {
		t.Errorf("rise %g s, highest %g V of %g V", up.RiseS, up.HighestV, end.MaxV)
	}
}

// TestDischarge: the smoothing column in series, C/n, empties into the bleeder
// by exp(−t/RC) (closed form); the coupling capacitors add what they give
// through the diodes, so the time is a little longer but never shorter.
func TestDischarge(t *testing.T) {
	c := equal(HalfWave, 3, 10e-9, plainDiode, Source{Peak: 200, Frequency: 20e3, Resistance: 20}, Load{Resistance: 100e6})
	from := solved(t, c)
	off, err := SwitchOff(context.Background(), c, from, 60, 10)
	if err != nil {
		t.Fatal(err)
	}
	tau := 100e6 * 10e-9 / 3
	column := tau * math.Log(from.MeanV/60)
	if off.Seconds < 0.98*column || off.Seconds > 3*column {
		t.Errorf("below 60 V after %g s where the column alone takes %g s", off.Seconds, column)
	}
	c.Load.Resistance = 0
	slow, err := SwitchOff(context.Background(), c, from, 60, 10)
	if err != nil || slow.Seconds < 10 {
		t.Errorf("without a bleeder below 60 V after %g s (%v)", slow.Seconds, err)
	}
}

// TestShort: the energy let go is what the column held, and no less than the
// greatest diode surge is noticed.
func TestShort(t *testing.T) {
	c := equal(HalfWave, 2, 10e-9, plainDiode, Source{Peak: 500, Frequency: 20e3, Resistance: 50}, Load{Resistance: 10e6})
	from := solved(t, c)
	got, err := Short(context.Background(), c, from, 10)
	if err != nil {
		t.Fatal(err)
	}
	column := from.MeanV * from.MeanV * 10e-9 / 2 / 2
	if got.EnergyJ < column || got.EnergyJ > 3*column {
		t.Errorf("energy %g J where the column held %g J", got.EnergyJ, column)
	}
	near(t, "peak in the short", got.PeakA, from.MeanV/10, 0.02)
	if got.Diodes[3].PeakA < 1 {
		t.Errorf("top diode sees %g A", got.Diodes[3].PeakA)
	}
}

// TestLoadStep: from light to full load the output falls to the new mean and
// no further than its ripple.
func TestLoadStep(t *testing.T) {
	c := equal(HalfWave, 2, 10e-9, plainDiode, Source{Peak: 500, Frequency: 20e3, Resistance: 50}, Load{Current: 1e-5})
	from := solved(t, c)
	c.Load.Current = 2e-3
	to := solved(t, c)
	got, err := LoadStep(context.Background(), c, from, to.MeanV, 0.1)
	if err != nil {
		t.Fatal(err)
	}
	if math.IsInf(got.SettledS, 1) || got.LowestV < 0.95*to.MinV || got.HighestV > 1.01*from.MaxV {
		t.Errorf("settled %g s, lowest %g V of %g V", got.SettledS, got.LowestV, to.MinV)
	}
}
