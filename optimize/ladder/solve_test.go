package ladder

import (
	"context"
	"testing"
)

// equal makes a circuit of equal parts.
func equal(t Topology, n int, capacitance float64, d Diode, src Source, load Load) Circuit {
	c := Circuit{Topology: t, Stages: n, Source: src, Load: load}
	for range t.CapacitorCount(n) {
		c.Capacitors = append(c.Capacitors, Capacitor{C: capacitance})
	}
	for range t.DiodeCount(n) {
		c.Diodes = append(c.Diodes, d)
	}
	return c
}

var plainDiode = Diode{IS: 10e-9, N: 1.9, RS: 0.12, CJ0: 12e-12}

func TestTrial(t *testing.T) {
	for _, top := range Topologies() {
		for _, n := range []int{1, 2, 3, 5, 8} {
			if n > top.MaxStages() {
				continue
			}
			c := equal(top, n, 22e-9, plainDiode, Source{Peak: 240, Frequency: 25e3, Resistance: 12}, Load{Current: 1.2e-3})
			s, err := Solve(context.Background(), c, nil)
			if err != nil {
				t.Errorf("%s %d: %v", top, n, err)
				continue
			}
			e := Estimate(c)
			t.Logf("%s %d: mean %.3f (est %.3f, no load %.2f) ripple %.4f (est %.4f) periods %d residual %.2g in %.4f out %.4f loss %.4f gap %.2e iavg %.5g", top, n, s.MeanV, e.MeanV, e.NoLoadV, s.RippleV, e.RippleV, s.Periods, s.ResidualV, s.InputW, s.LoadW, s.LossW, (s.InputW-s.LoadW-s.LossW)/s.InputW, s.Diodes[len(s.Diodes)-1].AverageA)
		}
	}
}

func BenchmarkSolve(b *testing.B) {
	for _, n := range []int{1, 2, 5, 10, 20} {
		b.Run(string(rune('0'+n/10))+string(rune('0'+n%10)), func(b *testing.B) {
			c := equal(HalfWave, n, 22e-9, plainDiode, Source{Peak: 240, Frequency: 25e3, Resistance: 12}, Load{Current: 1.2e-3 / float64(n)})
			for b.Loop() {
				s, err := Solve(context.Background(), c, nil)
				if err != nil {
					b.Fatal(err)
				}
				b.ReportMetric(float64(s.Periods), "periods")
			}
		})
	}
}
