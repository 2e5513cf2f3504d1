package ladder

import (
	"math"
	"strconv"
)

// gauge measures one period while it is integrated. Integrals use the
// quadrature through the three instants of each step, exact for parabolas.
type gauge struct {
	s       *system
	c       *Circuit
	out     track
	load    float64 // ∫ i dt
	loadJ   float64
	resistJ float64
	leakJ   float64 // leakage of the capacitors
	caps    []track
	flow    []float64 // capacitor currents at the start of the step
	diodes  []track
	passed  []float64 // charge through each diode
	diodeA  []float64 // diode current at the start of the step
	ends    []track
	endJ    []float64
	endVV   []float64
	first   bool
	waves   *Waves
}

// track follows one wave: integrals of value and square, extremes.
type track struct{ sum, squares, min, max, loss float64 }

func (t *track) add(h, y0, y1, y2 float64) {
	t.sum += sum3(h, y0, y1, y2)
	t.squares += h * (weightStart*y0*y0 + weightGamma*y1*y1 + weightEnd*y2*y2)
	t.min = min(t.min, y0, y1, y2)
	t.max = max(t.max, y0, y1, y2)
}

func newTracks(n int) []track {
	t := make([]track, n)
	for i := range t {
		t[i] = track{min: math.Inf(1), max: math.Inf(-1)}
	}
	return t
}

func newGauge(s *system, c *Circuit, waves bool) *gauge {
	g := &gauge{s: s, c: c, out: newTracks(1)[0], caps: newTracks(2 * len(s.caps)), diodes: newTracks(2 * len(s.diodes)),
		flow: make([]float64, len(s.caps)), diodeA: make([]float64, len(s.diodes)), passed: make([]float64, len(s.diodes)), ends: newTracks(len(s.ends)),
		endJ: make([]float64, len(s.ends)), endVV: make([]float64, len(s.ends))}
	if waves {
		g.waves = &Waves{Source: make([][]float64, len(s.ends)), Capacitor: make([][]float64, len(s.caps)), Diode: make([][]float64, len(s.diodes))}
	}
	return g
}

// begin readies the gauge for a period.
func (g *gauge) begin(*runner) { g.first = true }

// volts is the voltage between two nodes at a point.
func volts(p *point, b branch) float64 { return p.x[b.a] - p.x[b.b] }

// step takes in one step of the integrator.
func (g *gauge) step(st *stepper, h float64) {
	p0, p1, p2 := st.start, st.mid, st.end
	if g.waves != nil && g.first {
		g.note(p0)
	}
	g.output(h, p0, p1, p2)
	g.capacitors(h, p0, p1, p2)
	g.rectifiers(h, p0, p1, p2)
	g.source(h, p0, p1, p2)
	g.first = false
	if g.waves != nil {
		g.note(p2)
	}
}

// moved is the charge that a current moves in a step by the integrator's own
// weights, so that what the answer says of charge agrees to rounding with what
// the capacitors received.
func moved(h, i0, i1, i2 float64) float64 {
	return h * alpha * (pastGamma*(i0+i1) + i2)
}

// sum3 is ∫ over the step of a value known at its three instants.
func sum3(h, y0, y1, y2 float64) float64 {
	return h * (weightStart*y0 + weightGamma*y1 + weightEnd*y2)
}

func (g *gauge) output(h float64, p0, p1, p2 *point) {
	s := g.s
	v0, v1, v2 := volts(p0, s.final), volts(p1, s.final), volts(p2, s.final)
	g.out.add(h, v0, v1, v2)
	e := s.loadAt()
	g.load += moved(h, p0.i[e], p1.i[e], p2.i[e])
	g.loadJ += sum3(h, v0*p0.i[e], v1*p1.i[e], v2*p2.i[e])
	for e := s.resistAt(); e < s.loadAt(); e++ {
		r := 1 / s.resists[e-s.resistAt()]
		g.resistJ += r * sum3(h, p0.i[e]*p0.i[e], p1.i[e]*p1.i[e], p2.i[e]*p2.i[e])
	}
}

// flows are an element's charging currents at the middle and the end of a
// step as the integrator's own formulas give them, so that they agree with
// the charges that it moved.
func flows(h, start, q0, q1, q2 float64) (mid, end float64) {
	mid = (q1-q0)/(alpha*h) - start
	end = (q2 - pastGamma*q1 + pastStart*q0) / (alpha * h)
	return mid, end
}

func (g *gauge) capacitors(h float64, p0, p1, p2 *point) {
	for k, b := range g.s.caps {
		q0, q1, q2 := p0.q[k], p1.q[k], p2.q[k]
		if g.first {
			g.flow[k] = (q1 - q0) / (gamma * h)
		}
		mid, end := flows(h, g.flow[k], q0, q1, q2)
		g.caps[2*k].add(h, volts(p0, b), volts(p1, b), volts(p2, b))
		g.caps[2*k+1].add(h, g.flow[k]+p0.i[k], mid+p1.i[k], end+p2.i[k])
		g.leakJ += sum3(h, volts(p0, b)*p0.i[k], volts(p1, b)*p1.i[k], volts(p2, b)*p2.i[k])
		g.flow[k] = end
	}
}

// rectifiers measures the diode currents: conduction and, with stored charge,
// what fills and empties it; the current of the junction capacitance is left
// out, as it passes through no rating.
func (g *gauge) rectifiers(h float64, p0, p1, p2 *point) {
	s := g.s
	for k := range s.diodes {
		e := s.diodeAt() + k
		b := branch{int(s.a[e]), int(s.b[e])}
		tau := s.diodes[k].transit
		i0, i1, i2 := p0.i[e], p1.i[e], p2.i[e]
		v0, v1, v2 := volts(p0, b), volts(p1, b), volts(p2, b)
		t := &g.diodes[2*k]
		t.loss += sum3(h, v0*i0, v1*i1, v2*i2)
		if tau > 0 {
			stored := g.diodeA[k]
			if g.first {
				stored = tau * (i1 - i0) / (gamma * h)
			}
			mid, end := flows(h, stored, tau*i0, tau*i1, tau*i2)
			g.diodeA[k] = end
			t.add(h, i0+stored, i1+mid, i2+end)
		} else {
			t.add(h, i0, i1, i2)
		}
		g.passed[k] += moved(h, i0, i1, i2)
		g.diodes[2*k+1].add(h, v0, v1, v2)
	}
}

func (g *gauge) source(h float64, p0, p1, p2 *point) {
	for k := range g.s.ends {
		w := &g.s.ends[k]
		i0, i1, i2 := g.s.endCurrent(p0, k), g.s.endCurrent(p1, k), g.s.endCurrent(p2, k)
		v0, v1, v2 := g.s.sourceAt(p0.t, w.phase), g.s.sourceAt(p1.t, w.phase), g.s.sourceAt(p2.t, w.phase)
		g.ends[k].add(h, i0, i1, i2)
		g.endJ[k] += sum3(h, v0*i0, v1*i1, v2*i2)
		g.endVV[k] += sum3(h, v0*v0, v1*v1, v2*v2)
		if w.damp > 0 { // what the damping takes, less what is counted for the resistance below
			d0, d1, d2 := p0.x[w.node]-v0, p1.x[w.node]-v1, p2.x[w.node]-v2
			g.resistJ += sum3(h, g.s.endLoss(p0, w, d0, i0), g.s.endLoss(p1, w, d1, i1), g.s.endLoss(p2, w, d2, i2))
		}
	}
}

// endLoss is the power in a damped winding end beyond r·i² of its whole
// current [W].
func (s *system) endLoss(p *point, w *winding, drop, current float64) float64 {
	inner := p.x[w.unknown]
	return w.damp*drop*drop + w.r*(inner*inner-current*current)
}

// note keeps the waves at a point, in the sign of the circuit.
func (g *gauge) note(p *point) {
	s, w := g.s, g.waves
	w.Time = append(w.Time, p.t)
	w.Output = append(w.Output, s.polar*volts(p, s.final))
	for k := range s.ends {
		w.Source[k] = append(w.Source[k], s.polar*g.s.endCurrent(p, k))
	}
	for k, b := range s.caps {
		w.Capacitor[k] = append(w.Capacitor[k], volts(p, b))
	}
	for k := range s.diodes {
		w.Diode[k] = append(w.Diode[k], p.i[s.diodeAt()+k])
	}
}

// finish turns the sums into the answer.
func (g *gauge) finish(sh *shooter) Steady {
	s, f := g.s, 1/g.s.period
	out := Steady{RippleV: g.out.max - g.out.min, LoadA: g.load * f, LoadW: g.loadJ * f,
		ResidualV: sh.size(sh.gap) * s.peak, Periods: sh.r.periods, Waves: g.waves, Note: sh.note,
		start: append([]float64(nil), sh.x...)}
	out.MeanV, out.MinV, out.MaxV = g.out.sum*f, g.out.min, g.out.max
	if g.c.Negative {
		out.MeanV, out.MinV, out.MaxV = -out.MeanV, -g.out.max, -g.out.min
	}
	out.LossW = (g.resistJ + g.leakJ) * f
	for k := range s.caps {
		v, i := &g.caps[2*k], &g.caps[2*k+1]
		state := CapacitorState{Ref: "C" + strconv.Itoa(k+1), MeanV: v.sum * f, MaxV: v.max, MinV: v.min,
			RMSA: math.Sqrt(i.squares * f), LossW: i.squares * f * g.c.Capacitors[k].ESR}
		out.Capacitors = append(out.Capacitors, state)
	}
	conducting := 0
	for k := range s.diodes {
		i, v := &g.diodes[2*k], &g.diodes[2*k+1]
		out.Diodes = append(out.Diodes, DiodeState{Ref: "D" + strconv.Itoa(k+1), InverseV: max(0, -v.min),
			AverageA: g.passed[k] * f, PeakA: max(0, i.max), RMSA: math.Sqrt(i.squares * f), LossW: i.loss * f})
		out.LossW += i.loss * f
		if i.max > 1e-3*out.LoadA {
			conducting++
		}
	}
	for k := range s.ends {
		i := &g.ends[k]
		rms := math.Sqrt(i.squares * f)
		out.Source = append(out.Source, SourceState{RMSA: rms, PeakA: max(i.max, -i.min), PowerW: g.endJ[k] * f,
			ApparentVA: rms * math.Sqrt(g.endVV[k]*f), LossW: i.squares * f * s.ends[k].r})
		out.InputW += g.endJ[k] * f
		out.LossW += i.squares * f * s.ends[k].r
	}
	if conducting < len(s.diodes) && !g.c.Load.none() {
		out.Note = strconv.Itoa(len(s.diodes)-conducting) + " of the diodes never conduct"
	}
	return out
}
