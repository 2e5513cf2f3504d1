package ladder

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"
)

// broad draws designs from the sensible to the hopeless: drops to beyond two
// thirds, windings that sag by half, every shape of source, leakage
// inductance, capacitors that fall with bias, diodes that store charge.
func broad(r *rand.Rand) Circuit {
	c := realistic(r)
	c.Source.Waveform = []Waveform{Sine, Sine, Square, Triangle}[r.IntN(4)]
	if c.Source.Waveform == Square {
		c.Source.Edge = logUniform(r, 1e-3, 0.4)
	}
	c.Source.Resistance *= logUniform(r, 1e-3, 300)
	scale, sag := logUniform(r, 0.05, 20), r.IntN(3) == 0
	for k := range c.Capacitors {
		c.Capacitors[k].C *= scale
		if v := c.Source.Peak; sag {
			c.Capacitors[k].Bias = []BiasPoint{{0, 1}, {v, 0.3 + 0.6*r.Float64()}, {2 * v, 0.3}}
		}
	}
	if r.IntN(4) == 0 {
		c.Source.Leakage = c.Source.Resistance / c.Source.Frequency * logUniform(r, 1e-3, 0.3)
	}
	if r.IntN(4) == 0 {
		tau := logUniform(r, 1e-4, 3e-2) / c.Source.Frequency
		for k := range c.Diodes {
			c.Diodes[k].Transit = tau
		}
	}
	return c
}

// TestBoundIsOptimistic solves random circuits and demands that the bound is
// never broken. It also shows the sharpest cases, so that a bound grown too
// slack is noticed.
func TestBoundIsOptimistic(t *testing.T) {
	trials := heavy(60, 1200)
	nearestMean, nearestRipple := math.Inf(1), math.Inf(1)
	for i := range trials {
		r := rand.New(rand.NewPCG(3, uint64(i)))
		c := broad(r)
		s, err := Solve(context.Background(), c, &Settings{Tolerance: 1e-5})
		if err != nil {
			continue
		}
		m := math.Abs(s.MeanV)
		most, least := Bound(c, m)
		if m > most*(1+1e-6) {
			t.Errorf("trial %d: %s %s of %d: mean %.6g V above the bound %.6g V", i, c.Source.Waveform, c.Topology, c.Stages, m, most)
			t.Logf("%v load %+v slow %.4g noload %.4g L %.3g tau %.3g", len(c.Capacitors[0].Bias), c.Load, s.LoadA/c.Source.Frequency*newEstimator(c).unit, newEstimator(c).noLoad, c.Source.Leakage, c.Diodes[0].Transit)
		}
		if s.RippleV < least*(1-1e-6) {
			t.Errorf("trial %d: %s %s of %d: ripple %.6g V below the bound %.6g V", i, c.Source.Waveform, c.Topology, c.Stages, s.RippleV, least)
		}
		e := newEstimator(c)
		if sure := e.noLoad - most; sure > 0 {
			nearestMean = min(nearestMean, (e.noLoad-m)/sure)
		}
		if least > 0 {
			nearestRipple = min(nearestRipple, s.RippleV/least)
		}
	}
	t.Logf("%d trials; true drop at least %.3f times the sure one, true ripple %.3f times", trials, nearestMean, nearestRipple)
}
