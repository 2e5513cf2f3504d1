package ladder

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"
)

// logUniform draws between a and b, evenly in the logarithm.
func logUniform(r *rand.Rand, a, b float64) float64 {
	return a * math.Exp(r.Float64()*math.Log(b/a))
}

// wild draws a circuit in and beyond the realistic range.
func wild(r *rand.Rand) Circuit {
	tops := Topologies()
	c := Circuit{Topology: tops[r.IntN(len(tops))], Negative: r.IntN(2) == 0}
	c.Stages = 1 + r.IntN(c.Topology.MaxStages())
	f, v := logUniform(r, 10, 1e6), logUniform(r, 1, 50e3)
	c.Source = Source{Peak: v, Frequency: f, Waveform: []Waveform{Sine, Sine, Square, Triangle}[r.IntN(4)]}
	full := logUniform(r, 1e-6, 1) // load current scale
	unit := full / (f * v) * logUniform(r, 0.5, 1e4)
	c.Source.Resistance = v / full * logUniform(r, 1e-7, 0.3)
	if r.IntN(3) == 0 {
		c.Source.Leakage = c.Source.Resistance / f * logUniform(r, 1e-3, 0.3)
	}
	biased := r.IntN(4) == 0
	for range c.Topology.CapacitorCount(c.Stages) {
		k := Capacitor{C: unit * logUniform(r, 0.3, 3)}
		if biased {
			k.Bias = []BiasPoint{{0, 1}, {v, 0.7}, {2 * v, 0.3 + 0.4*r.Float64()}}
		}
		if r.IntN(6) == 0 {
			k.ESR = 0.1 / (2 * math.Pi * f * k.C)
		}
		c.Capacitors = append(c.Capacitors, k)
	}
	d := Diode{IS: logUniform(r, 1e-15, 1e-5), N: 1 + 30*r.Float64()*r.Float64(), RS: logUniform(r, 1e-3, 1) * 0.1 * v / full / 10}
	if r.IntN(2) == 0 {
		d.CJ0 = unit * logUniform(r, 1e-6, 0.05)
		if r.IntN(2) == 0 {
			d.VJ, d.M = 0.6, 0.33
		}
	}
	if r.IntN(4) == 0 {
		d.Transit = logUniform(r, 1e-4, 0.1) / f
	}
	for range c.Topology.DiodeCount(c.Stages) {
		c.Diodes = append(c.Diodes, d)
	}
	vout := v * float64(c.Topology.OutputFactor(c.Stages))
	switch r.IntN(6) {
	case 0: // no load
	case 1: // near short
		c.Load.Resistance = 1e-4 * v / full
	case 2:
		c.Load.Resistance = vout / full
	case 3:
		c.Load.Power = 0.2 * vout * full
	default:
		c.Load.Current = full
	}
	return c
}

func TestWild(t *testing.T) {
	trials := 200
	fails := map[string]int{}
	worst, total := 0, 0
	for i := range trials {
		r := rand.New(rand.NewPCG(1, uint64(i)))
		c := wild(r)
		s, err := Solve(context.Background(), c, nil)
		if err != nil {
			fails[err.Error()[:40]]++
			if len(fails) < 100 {
				t.Logf("p%d %d: %s %d %s f %.3g V %.3g load %+v rs %.3g L %.3g C %.3g bias %v d %+v: %v", s.Periods, i, c.Topology, c.Stages, c.Source.Waveform, c.Source.Frequency, c.Source.Peak, c.Load, c.Source.Resistance, c.Source.Leakage, c.Capacitors[0].C, len(c.Capacitors[0].Bias), c.Diodes[0], err)
			}
			continue
		}
		worst = max(worst, s.Periods)
		total += s.Periods
	}
	t.Logf("%v worst %d mean %.1f", fails, worst, float64(total)/float64(trials))
}
