package ladder

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"
)

// TestConservation demands of random circuits that every diode passes the
// load's charge (to 0.1 %; half of it in a full-wave ladder), less what leaks
// past it, and that power in is power out and losses (to 0.5 %).
func TestConservation(t *testing.T) {
	for i := range heavy(150, 3000) {
		r := rand.New(rand.NewPCG(5, uint64(i)))
		c := realistic(r)
		s, err := Solve(context.Background(), c, nil)
		if err != nil {
			t.Errorf("trial %d: %v", i, err)
			continue
		}
		if gap := s.InputW - s.LoadW - s.LossW; math.Abs(gap) > 0.005*s.InputW {
			t.Errorf("trial %d: %s of %d: %.4g W in, %.4g W out, %.4g W lost", i, c.Topology, c.Stages, s.InputW, s.LoadW, s.LossW)
		}
		share := forms[c.Topology].build(c.Stages).share
		for _, d := range s.Diodes {
			if share == 0.5 { // the two sides of a full-wave ladder need not be equal
				continue
			}
			if math.Abs(d.AverageA-s.LoadA) > 0.001*s.LoadA {
				t.Errorf("trial %d: %s of %d: %s passes %.6g A of %.6g A", i, c.Topology, c.Stages, d.Ref, d.AverageA, s.LoadA)
			}
		}
		if share == 0.5 {
			sides(t, i, c, s)
		}
	}
}

// sides checks that the two diodes of a full-wave ladder that share a step
// pass the load's charge together.
func sides(t *testing.T, trial int, c Circuit, s Steady) {
	for k := 0; k < len(s.Diodes); k += 2 {
		if sum := s.Diodes[k].AverageA + s.Diodes[k+1].AverageA; math.Abs(sum-s.LoadA) > 0.001*s.LoadA {
			t.Errorf("trial %d: %s of %d: %s and %s pass %.6g A of %.6g A", trial, c.Topology, c.Stages, s.Diodes[k].Ref, s.Diodes[k+1].Ref, sum, s.LoadA)
		}
	}
}

// TestScaling: twice the voltages (source and diode alike) at twice the
// current is the same circuit.
func TestScaling(t *testing.T) {
	a := equal(HalfWave, 3, 22e-9, Diode{IS: 1e-9, N: 2, RS: 1, CJ0: 5e-12}, Source{Peak: 200, Frequency: 30e3, Resistance: 20}, Load{Current: 1e-3})
	b := a
	b.Diodes = append([]Diode(nil), a.Diodes...)
	for i := range b.Diodes {
		b.Diodes[i].IS *= 2
		b.Diodes[i].N *= 2
	}
	b.Source.Peak *= 2
	b.Load.Current *= 2
	near(t, "output of the doubled circuit", solved(t, b).MeanV, 2*solved(t, a).MeanV, 1e-5)
}

// TestNegativeMirrors: turning every diode round turns the output round.
func TestNegativeMirrors(t *testing.T) {
	for _, top := range Topologies() {
		c := equal(top, 1, 22e-9, plainDiode, Source{Peak: 240, Frequency: 25e3, Resistance: 12}, Load{Current: 1e-3})
		up := solved(t, c)
		c.Negative = true
		down := solved(t, c)
		near(t, string(top)+" mean", down.MeanV, -up.MeanV, 1e-5)
		near(t, string(top)+" ripple", down.RippleV, up.RippleV, 1e-3)
	}
}

// TestSolveTwice demands equal bits.
func TestSolveTwice(t *testing.T) {
	c := equal(FullWave, 4, 22e-9, plainDiode, Source{Peak: 240, Frequency: 25e3, Resistance: 12}, Load{Current: 1e-3})
	a, b := solved(t, c), solved(t, c)
	if a.MeanV != b.MeanV || a.RippleV != b.RippleV || a.Diodes[3].PeakA != b.Diodes[3].PeakA {
		t.Errorf("two solves differ: %v and %v", a.MeanV, b.MeanV)
	}
}
