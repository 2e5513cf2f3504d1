package ladder

// point is the state at one instant: the unknowns x (ground last, always
// zero), and per element its charge q, current i and their slopes c and g.
type point struct {
	t          float64
	x          []float64
	q, i, c, g []float64
}

func (s *system) newPoint() *point {
	e := s.elements()
	return &point{x: make([]float64, s.n+1), q: make([]float64, e), i: make([]float64, e),
		c: make([]float64, e), g: make([]float64, e)}
}

func (p *point) copyFrom(o *point) {
	p.t = o.t
	copy(p.x, o.x)
	copy(p.q, o.q)
	copy(p.i, o.i)
	copy(p.c, o.c)
	copy(p.g, o.g)
}

// evaluate fills the elements from x and t.
func (s *system) evaluate(p *point) {
	x := p.x
	e := 0
	for k := range s.stores {
		v := x[s.a[e]] - x[s.b[e]]
		st := &s.stores[k]
		p.q[e], p.c[e] = st.charge(v)
		p.i[e], p.g[e] = st.leak*v, st.leak
		e++
	}
	for k := range s.diodes {
		v := x[s.a[e]] - x[s.b[e]]
		d := &s.diodes[k]
		p.i[e], p.g[e] = d.current(v)
		p.q[e], p.c[e] = d.charge(v, p.i[e], p.g[e])
		e++
	}
	for _, g := range s.resists {
		p.i[e], p.g[e] = g*(x[s.a[e]]-x[s.b[e]]), g
		e++
	}
	p.i[e], p.g[e] = s.load.at(x[s.a[e]]-x[s.b[e]], s.knee)
	e++
	for k := range s.ends {
		s.evaluateEnd(p, e, &s.ends[k])
		e += 2
	}
}

// evaluateEnd fills the two elements of a winding end. With inductance the
// first carries the current out of the node and the second, negated so that
// the matrix stays symmetric, is L·di/dt + R·i + v − source = 0.
func (s *system) evaluateEnd(p *point, e int, w *winding) {
	open := s.sourceAt(p.t, w.phase)
	if w.unknown < 0 {
		p.i[e], p.g[e] = w.g*(p.x[w.node]-open), w.g
		return
	}
	current := p.x[w.unknown]
	p.i[e], p.g[e] = w.damp*(p.x[w.node]-open)-current, w.damp
	p.q[e+1], p.c[e+1] = -w.l*current, -w.l
	p.i[e+1], p.g[e+1] = -(w.r*current + p.x[w.node] - open), -w.r
}

// endCurrent is what a winding end delivers.
func (s *system) endCurrent(p *point, k int) float64 { return -p.i[s.endAt()+2*k] }
