package ladder

import "math"

// TR-BDF2 (Bank et al., IEEE Trans. Electron Devices 32 (1985) 1992, from
// memory) with γ = 2 − √2, for which both stages share one matrix form
// C + α·h·G.
var (
	gamma     = 2 - math.Sqrt2
	alpha     = gamma / 2
	pastGamma = 1 / (gamma * (2 - gamma))
	pastStart = (1 - gamma) * (1 - gamma) / (gamma * (2 - gamma))
	errorK    = (-3*gamma*gamma + 4*gamma - 2) / (12 * (2 - gamma))
	// Weights of the quadrature through the three instants of a step.
	weightGamma = 1 / (6 * gamma * (1 - gamma))
	weightStart = 0.5 - 1/(6*gamma)
	weightEnd   = 0.5 - 1/(6*(1-gamma))
)

// stepper advances a system by single steps and, when asked, the sensitivity
// of the state to the state at the start of the period.
type stepper struct {
	s           *system
	start, mid  *point
	end         *point
	past        []float64 // what the stage's charges start from, per element
	r           []float64 // residual, then Newton step
	values      []float64 // matrix, then its factors
	rate        []float64 // last slope of the unknowns, for prediction
	limit       float64   // Newton steps below this are good enough [V]
	sens        *sensitivity
	evaluations int
}

func newStepper(s *system) *stepper {
	st := &stepper{s: s, start: s.newPoint(), mid: s.newPoint(), end: s.newPoint(),
		past: make([]float64, s.elements()), r: make([]float64, s.n+1),
		values: make([]float64, s.m.size()+1), rate: make([]float64, s.n+1)}
	st.limit = 1e-7 * s.peak
	for i := range s.diodes {
		st.limit = min(st.limit, 0.02*s.diodes[i].nvt)
	}
	return st
}

// step goes from start by h to end. It returns the local error relative to
// the source peak, or false when Newton does not settle.
func (st *stepper) step(h float64) (float64, bool) {
	s, ah := st.s, alpha*h
	for e := range st.past {
		st.past[e] = st.start.q[e] - ah*st.start.i[e]
	}
	st.predict(st.mid, st.start, gamma*h)
	if !st.newton(st.mid, ah) {
		return 0, false
	}
	if st.sens != nil {
		st.sens.middle(st, ah)
	}
	for e := range st.past {
		st.past[e] = pastGamma*st.mid.q[e] - pastStart*st.start.q[e]
	}
	for i := range st.rate {
		st.rate[i] = (st.mid.x[i] - st.start.x[i]) / (gamma * h)
	}
	st.predict(st.end, st.mid, (1-gamma)*h)
	if !st.newton(st.end, ah) {
		return 0, false
	}
	if st.sens != nil {
		st.sens.finish(st)
	}
	for i := range st.rate {
		st.rate[i] = (st.end.x[i] - st.mid.x[i]) / ((1 - gamma) * h)
	}
	return st.localError(h) / s.peak, true
}

func (st *stepper) predict(to, from *point, h float64) {
	to.t = from.t + h
	for i, x := range from.x {
		to.x[i] = x + h*st.rate[i]
	}
}

// newton solves q(x) − past + ah·i(x) = 0 at a point. The last correction is
// applied to charges and currents in a line, so that charge is conserved to
// rounding.
func (st *stepper) newton(p *point, ah float64) bool {
	s := st.s
	last := math.Inf(1)
	for round := range 25 {
		s.evaluate(p)
		st.evaluations++
		st.assemble(p, ah)
		if !s.m.factor(st.values) {
			return false
		}
		s.m.solve(st.values, st.r)
		size := 0.0
		for i := range s.n {
			if s.volts[i] {
				size = max(size, math.Abs(st.r[i]))
			}
		}
		if !(size <= 1e4*s.peak) || round > 12 && size > last {
			return false
		}
		st.correct(p)
		if size <= st.limit {
			return true
		}
		last = size
	}
	return false
}

// assemble builds residual and matrix.
func (st *stepper) assemble(p *point, ah float64) {
	s, r, v := st.s, st.r, st.values
	clear(r)
	clear(v)
	for e := range p.q {
		y := p.q[e] - st.past[e] + ah*p.i[e]
		m := p.c[e] + ah*p.g[e]
		a, b := s.a[e], s.b[e]
		r[a] += y
		r[b] -= y
		v[s.aa[e]] += m
		v[s.bb[e]] += m
		v[s.ab[e]] -= m
	}
	for k := range s.ends {
		if w := &s.ends[k]; w.unknown >= 0 {
			v[w.cross] -= ah
		}
	}
}

// correct applies the Newton step.
func (st *stepper) correct(p *point) {
	s, dx := st.s, st.r
	dx[s.n] = 0
	for i := range s.n {
		p.x[i] -= dx[i]
	}
	for e := range p.q {
		dv := dx[s.a[e]] - dx[s.b[e]]
		p.q[e] -= p.c[e] * dv
		p.i[e] -= p.g[e] * dv
	}
	for k := range s.ends {
		if w := &s.ends[k]; w.unknown >= 0 {
			s.evaluateEnd(p, s.endAt()+2*k, w)
		}
	}
}

// localError is the greatest third-order error of a node voltage, filtered
// through the factors of the last stage [V].
func (st *stepper) localError(h float64) float64 {
	s, r := st.s, st.r
	clear(r)
	k := 2 * errorK * h
	for e := range st.end.i {
		y := k * (st.start.i[e]/gamma - st.mid.i[e]/(gamma*(1-gamma)) + st.end.i[e]/(1-gamma))
		r[s.a[e]] += y
		r[s.b[e]] -= y
	}
	s.m.solve(st.values, r)
	worst := 0.0
	for i := range s.n {
		if s.volts[i] {
			worst = max(worst, math.Abs(r[i]))
		}
	}
	return worst
}

// advance makes the end of the step the start of the next.
func (st *stepper) advance() { st.start, st.end = st.end, st.start }

// sensitivity carries d x(t) / d x(0) through the steps with their own
// factors; rows are unknowns, ground last.
type sensitivity struct {
	w               int
	start, mid, end []float64
}

func newSensitivity(s *system) *sensitivity {
	size := (s.n + 1) * s.n
	m := &sensitivity{w: s.n, start: make([]float64, size), mid: make([]float64, size), end: make([]float64, size)}
	for i := range s.n {
		m.start[i*s.n+i] = 1
	}
	return m
}

// middle solves M·Xγ = (C − αh·G)·X0.
func (m *sensitivity) middle(st *stepper, ah float64) {
	s, p := st.s, st.start
	clear(m.mid)
	for e := range p.c {
		m.spread(m.mid, m.start, s.a[e], s.b[e], p.c[e]-ah*p.g[e])
	}
	for k := range s.ends {
		if w := &s.ends[k]; w.unknown >= 0 {
			m.add(m.mid, w.node, m.start, w.unknown, ah)
			m.add(m.mid, w.unknown, m.start, w.node, ah)
		}
	}
	s.m.solveMany(st.values, m.mid[:s.n*m.w], m.w)
	clear(m.mid[s.n*m.w:])
}

// finish solves M·X1 = Cγ·Xγ/(γ(2−γ)) − C0·X0·(1−γ)²/(γ(2−γ)).
func (m *sensitivity) finish(st *stepper) {
	s := st.s
	clear(m.end)
	for e, c := range st.mid.c {
		if c != 0 {
			m.spread(m.end, m.mid, s.a[e], s.b[e], pastGamma*c)
		}
		if c = st.start.c[e]; c != 0 {
			m.spread(m.end, m.start, s.a[e], s.b[e], -pastStart*c)
		}
	}
	s.m.solveMany(st.values, m.end[:s.n*m.w], m.w)
	clear(m.end[s.n*m.w:])
}

func (m *sensitivity) advance() { m.start, m.end = m.end, m.start }

// spread adds f times the difference of rows a and b to row a and takes it
// from row b.
func (m *sensitivity) spread(to, from []float64, a, b int32, f float64) {
	w := m.w
	fa, fb := from[int(a)*w:int(a)*w+w], from[int(b)*w:int(b)*w+w]
	ta, tb := to[int(a)*w:int(a)*w+w], to[int(b)*w:int(b)*w+w]
	fb, ta, tb = fb[:len(fa)], ta[:len(fa)], tb[:len(fa)]
	for j, x := range fa {
		d := f * (x - fb[j])
		ta[j] += d
		tb[j] -= d
	}
}

func (m *sensitivity) add(to []float64, row int32, from []float64, of int32, f float64) {
	subtractRow(to[int(row)*m.w:], from[int(of)*m.w:int(of)*m.w+m.w], -f)
}
