package report

import "strconv"

// cascade draws half-wave stages between two rails. Rungs stand upright: of
// stage k, the first leads up from the smoothing rail to the coupling rail and
// the second back. Capacitors lie in the rails, above and below by turns, so
// that every symbol has its own place for its label.
type cascade struct {
	prefix              string  // of the nodes' names: "+", "−" or none
	coupling, smoothing float64 // heights of the rails
	couplingSide        side    // where the coupling rail's labels stand
	smoothingSide       side
	c, d                int  // numbers of the stage-1 capacitor and diode before the first
	down                bool // a ladder below ground: every part turned round
}

// stage draws stage k from x and returns where the next begins.
func (l cascade) stage(s *sheet, k int, x float64) float64 {
	x1, x2 := x+pitch, x+2*pitch
	c := func(x float64) point { return point{x, l.coupling} }
	m := func(x float64) point { return point{x, l.smoothing} }
	first, second := 2*k-2, 2*k-1

	l.capacitor(s, l.c+first, c(x1), c(x), l.couplingSide)
	s.wire(m(x), m(x1))
	l.diode(s, l.d+first, m(x1), c(x1))
	s.wire(c(x1), c(x2))
	l.name(s, "c"+strconv.Itoa(k), c(x2), x1+pitch/2, l.couplingSide)
	l.capacitor(s, l.c+second, m(x2), m(x1), l.smoothingSide)
	l.diode(s, l.d+second, c(x2), m(x2))
	return x2
}

// smoothed names the smoothing node below stage k, over the wire from x on.
func (l cascade) smoothed(s *sheet, k int, x float64) {
	if k >= 1 {
		l.name(s, "s"+strconv.Itoa(k), point{x, l.smoothing}, x+pitch/2, l.smoothingSide)
	}
}

func (l cascade) name(s *sheet, name string, n point, middle float64, where side) {
	s.node(l.prefix+name, n, point{middle, n.y}, where)
}

func (l cascade) capacitor(s *sheet, i int, plus, minus point, where side) {
	if l.down {
		plus, minus = minus, plus
	}
	s.capacitor(i, plus, minus, where)
}

func (l cascade) diode(s *sheet, i int, anode, cathode point) {
	if l.down {
		anode, cathode = cathode, anode
	}
	s.diode(i, anode, cathode, 0.5, right)
}

// leave ends both rails after stage k; enter takes them up.
func (l cascade) leave(s *sheet, k int, x float64) {
	for _, r := range l.rails(k) {
		s.wire(point{x, r.y}, point{x + 14, r.y})
		s.leave(r.name, point{x + 14, r.y}, r.tell)
	}
}

func (l cascade) enter(s *sheet, k int, x float64) {
	for _, r := range l.rails(k) {
		s.enter(r.name, point{x, r.y})
	}
}

// rail is a rail's name at a place.
type rail struct {
	name string
	y    float64
	tell bool // its voltage stands at the row's end alone
}

func (l cascade) rails(k int) []rail {
	n := strconv.Itoa(k)
	return []rail{{l.prefix + "c" + n, l.coupling, false}, {l.prefix + "s" + n, l.smoothing, true}}
}
