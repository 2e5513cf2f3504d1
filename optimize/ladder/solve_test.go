package ladder

import (
	"context"
	"fmt"
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

// BenchmarkSolve times a steady state by stage count.
func BenchmarkSolve(b *testing.B) {
	for _, n := range []int{1, 2, 5, 10, 20} {
		b.Run(fmt.Sprintf("n=%d", n), func(b *testing.B) {
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
