package ladder

import (
	"context"
	"math"
	"math/rand/v2"
	"os"
	"sort"
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

func TestRealistic(t *testing.T) {
	trials := 1500
	type row struct {
		mean, ripple, dropShare, rippleShare float64
		top                                  Topology
		n                                    int
	}
	var rows []row
	for i := range trials {
		r := rand.New(rand.NewPCG(2, uint64(i)))
		c := realistic(r)
		s, err := Solve(context.Background(), c, &Settings{Tolerance: 1e-5})
		if err != nil {
			t.Errorf("%d: %v", i, err)
			continue
		}
		e := Estimate(c)
		m := math.Abs(s.MeanV)
		ideal := c.Source.Peak * float64(c.Topology.OutputFactor(c.Stages))
		if m < 0.8*ideal {
			continue
		}
		rows = append(rows, row{e.MeanV/m - 1, e.RippleV/s.RippleV - 1, (e.NoLoadV - m) / e.DropV, s.RippleV / e.RippleV, c.Topology, c.Stages})
		if os.Getenv("DUMP") != "" {
			ev := newEstimator(c)
			t.Logf("ROW %s %d %.5g %.5g %.5g %.5g %.5g %.5g %.5g %.5g", c.Topology, c.Stages, ideal, m, e.NoLoadV, e.MeanV, e.DropV/ideal, ev.conduction(e.LoadA)/ideal, s.RippleV, e.RippleV)
		}
	}
	quant := func(f func(row) float64, p float64) float64 {
		var x []float64
		for _, r := range rows {
			x = append(x, f(r))
		}
		sort.Float64s(x)
		return x[int(p*float64(len(x)-1))]
	}
	t.Logf("%d rows", len(rows))
	for _, p := range []float64{0, 0.025, 0.25, 0.5, 0.75, 0.975, 1} {
		t.Logf("p %.3f mean err %+.4f ripple err %+.4f dropshare %.3f rippleshare %.3f", p, quant(func(r row) float64 { return r.mean }, p), quant(func(r row) float64 { return r.ripple }, p), quant(func(r row) float64 { return r.dropShare }, p), quant(func(r row) float64 { return r.rippleShare }, p))
	}
	for _, top := range Topologies() {
		var a, b []float64
		for _, r := range rows {
			if r.top == top {
				a, b = append(a, math.Abs(r.mean)), append(b, r.ripple)
			}
		}
		sort.Float64s(a)
		sort.Float64s(b)
		t.Logf("%s %d: |mean| p50 %.4f p95 %.4f; ripple p5 %+.3f p50 %+.3f p95 %+.3f", top, len(a), a[len(a)/2], a[len(a)*95/100], b[len(b)*5/100], b[len(b)/2], b[len(b)*95/100])
	}
}
