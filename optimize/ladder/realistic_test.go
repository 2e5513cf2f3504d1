package ladder

import (
	"context"
	"math"
	"math/rand/v2"
	"slices"
	"testing"
)

// realistic draws a design that a bench could meet: a rectifier that suits
// voltage, current and frequency, a winding that suits the power.
func realistic(r *rand.Rand) Circuit {
	tops := Topologies()
	c := Circuit{Topology: tops[r.IntN(len(tops))], Negative: r.IntN(4) == 0}
	c.Stages = 1 + r.IntN(min(10, c.Topology.MaxStages()))
	f := logUniform(r, 50, 100e3)
	v := logUniform(r, 6, 10e3)
	watts := logUniform(r, 0.05, 50)
	vout := v * float64(c.Topology.OutputFactor(c.Stages))
	current := watts / vout
	wave := Sine
	c.Source = Source{Peak: v, Frequency: f, Waveform: wave}
	c.Source.Resistance = v * v / watts * logUniform(r, 2e-4, 2e-2) / 2
	q := current / f
	net := forms[c.Topology].build(c.Stages)
	ones := make([]float64, len(net.capacitors))
	shape := r.IntN(3)
	for k := range ones {
		ones[k] = 1
		if shape == 1 {
			ones[k] = logUniform(r, 0.5, 2)
			if c.Topology == FullWave && k%3 == 1 { // both sides alike
				ones[k] = ones[k-1]
			}
			if half := 2 * c.Stages; c.Topology == Bipolar && k >= half {
				ones[k] = ones[k-half]
			}
		}
		if shape == 2 { // a larger first coupling capacitor
			if k < c.Topology.WindingEnds() {
				ones[k] = 2
			}
		}
	}
	drop, _ := net.chargeBalance(ones)
	unit := q * drop / (vout * logUniform(r, 0.005, 0.22))
	for _, x := range ones {
		c.Capacitors = append(c.Capacitors, Capacitor{C: unit * x})
	}
	junctions := math.Ceil(2 * v / 1000)
	d := Diode{IS: logUniform(r, 1e-12, 1e-7), N: junctions * (1.2 + 0.8*r.Float64()), RS: 0.02 * junctions * 0.7 / (10 * current) * logUniform(r, 0.3, 3)}
	d.CJ0 = unit * logUniform(r, 1e-5, 3e-3) / float64(c.Stages)
	if r.IntN(2) == 0 {
		d.VJ, d.M = 0.6*junctions, 0.33
	}
	for range c.Topology.DiodeCount(c.Stages) {
		c.Diodes = append(c.Diodes, d)
	}
	if r.IntN(2) == 0 {
		c.Load.Current = current
	} else {
		c.Load.Resistance = vout / current
	}
	return c
}

// TestEstimateError states how far the estimate errs over random realistic
// designs whose drop is below a fifth.
func TestEstimateError(t *testing.T) {
	var mean, ripple []float64
	for i := range heavy(200, 10000) {
		c := realistic(rand.New(rand.NewPCG(2, uint64(i))))
		s, err := Solve(context.Background(), c, &Settings{Tolerance: 1e-5})
		if err != nil {
			t.Errorf("trial %d: %v", i, err)
			continue
		}
		m := math.Abs(s.MeanV)
		if m < 0.8*c.Source.Peak*float64(c.Topology.OutputFactor(c.Stages)) {
			continue
		}
		if most, least := Bound(c, m); m > most*(1+1e-6) || s.RippleV < least*(1-1e-6) {
			t.Errorf("trial %d: %g V and ripple %g V break the bound, %g V and %g V", i, m, s.RippleV, most, least)
		}
		e := Estimate(c)
		mean = append(mean, math.Abs(e.MeanV/m-1))
		ripple = append(ripple, math.Abs(e.RippleV/s.RippleV-1))
	}
	slices.Sort(mean)
	slices.Sort(ripple)
	at := func(x []float64, part float64) float64 { return 100 * x[int(part*float64(len(x)-1))] }
	t.Logf("%d designs: mean within %.2f %% (half) and %.2f %% (95 %%), ripple within %.1f %% and %.1f %%",
		len(mean), at(mean, 0.5), at(mean, 0.95), at(ripple, 0.5), at(ripple, 0.95))
	if at(mean, 0.95) > estimateMean95 || at(ripple, 0.95) > estimateRipple95 {
		t.Errorf("the estimate is worse than stated")
	}
}

// What the estimate is stated to keep for 95 % of realistic designs [%].
const (
	estimateMean95   = 2
	estimateRipple95 = 5
)
