package ladder

import (
	"context"
	"errors"
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

// TestEveryCircuitIsAnswered solves circuits that no bench would build and
// demands a finite steady state or a reason, in bounded work, for each.
func TestEveryCircuitIsAnswered(t *testing.T) {
	trials, unanswered := heavy(12, 200), 0
	for i := range trials {
		c := wild(rand.New(rand.NewPCG(1, uint64(i))))
		s, err := Solve(context.Background(), c, nil)
		var none *NoSteadyError
		switch {
		case errors.As(err, &none):
			unanswered++
		case err != nil:
			t.Errorf("trial %d: %v", i, err)
		default:
			for _, x := range []float64{s.MeanV, s.RippleV, s.InputW, s.LossW, s.Source[0].RMSA, s.Diodes[0].PeakA, s.Capacitors[0].MaxV} {
				if math.IsNaN(x) || math.IsInf(x, 0) {
					t.Errorf("trial %d: not finite: %+v", i, s)
				}
			}
		}
	}
	t.Logf("%d of %d circuits have no steady state that was found", unanswered, trials)
	if unanswered > trials/8 {
		t.Errorf("%d of %d circuits have no steady state that was found", unanswered, trials)
	}
}

// TestCancel: a cancelled context ends a solve at once.
func TestCancel(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	c := equal(HalfWave, 20, 22e-9, plainDiode, Source{Peak: 240, Frequency: 25e3, Resistance: 12}, Load{Current: 1e-4})
	if _, err := Solve(ctx, c, nil); !errors.Is(err, context.Canceled) {
		t.Errorf("got %v", err)
	}
}
