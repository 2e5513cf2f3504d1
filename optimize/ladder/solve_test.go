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

// loaded is a ladder with every effect switched on.
func loaded(n int) Circuit {
	d := Diode{IS: 10e-9, N: 1.9, RS: 0.12, CJ0: 12e-12, VJ: 0.6, M: 0.33, Transit: 30e-9, Leakage: 1e-9}
	c := equal(HalfWave, n, 22e-9, d, Source{Peak: 240, Frequency: 25e3, Resistance: 12, Leakage: 20e-6, RingQ: 3}, Load{Current: 1.2e-3 / float64(n)})
	for i := range c.Capacitors {
		c.Capacitors[i].Bias = []BiasPoint{{0, 1}, {240, 0.8}, {500, 0.5}}
		c.Capacitors[i].ESR, c.Capacitors[i].Conductance = 2, 1e-10
	}
	c.Stray = 1e-12
	return c
}

// BenchmarkSolveEverything times a steady state with every effect switched on:
// bias, series resistance, leakage, stray, stored charge, leakage inductance.
func BenchmarkSolveEverything(b *testing.B) {
	for _, n := range []int{1, 2, 5, 10, 20} {
		b.Run(fmt.Sprintf("n=%d", n), func(b *testing.B) {
			c := loaded(n)
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

// BenchmarkSolveFromNeighbour times a corner that starts from the solution of
// the same ladder at another load.
func BenchmarkSolveFromNeighbour(b *testing.B) {
	c := loaded(5)
	first, err := Solve(context.Background(), c, nil)
	if err != nil {
		b.Fatal(err)
	}
	c.Load.Current *= 1.1
	for name, start := range map[string]*Steady{"cold": nil, "neighbour": &first} {
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				if _, err := Solve(context.Background(), c, &Settings{Start: start}); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
