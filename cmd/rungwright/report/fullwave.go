package report

import "strconv"

// tall is between the rails of a full-wave ladder: room for two labels.
const tall = 168.0

// near is how far from the outer rail, as a share of the bay, the diodes of a
// full-wave ladder stand: the middle rail's labels have the rest.
const near = 0.27

// drawFullWave draws the full-wave ladder: a coupling rail above and below,
// the smoothing rail between, the two halves of the source at the left.
func drawFullWave(s *sheet) {
	const a, m, b = band, band + tall, band + 2*tall
	for _, run := range runs(s.circuit.Stages, perRow) {
		s.newRow(b + band + 12)
		x := margin + 44.0
		if run[0] == 1 {
			x = s.centreTapped(a, m, b)
		} else {
			s.enterFull(run[0]-1, x, a, m, b)
		}
		for k := run[0]; k <= run[1]; k++ {
			if k > run[0] {
				s.node("s"+strconv.Itoa(k-1), point{x, m}, point{x + pitch/2, m}, below)
			}
			x = s.fullStage(k, x, a, m, b)
		}
		if run[1] == s.circuit.Stages {
			s.outlet(point{x, m})
			continue
		}
		for _, r := range fullRails(run[1], a, m, b) {
			s.wire(point{x, r.y}, point{x + 14, r.y})
			s.leave(r.name, point{x + 14, r.y}, r.tell)
		}
	}
}

// centreTapped draws the source's halves and its earthed tap.
func (s *sheet) centreTapped(a, m, b float64) float64 {
	x := margin + 44 + s.surgeRoom()
	const feed = margin + 20
	s.source(point{feed, a}, point{feed, m}, right)
	s.source(point{feed, m}, point{feed, b}, right)
	s.wire(point{feed, m}, point{x, m})
	s.earth(point{feed, m})
	s.lead(0, point{feed, a}, point{x, a})
	s.lead(1, point{feed, b}, point{x, b})
	return x
}

func (s *sheet) enterFull(k int, x, a, m, b float64) {
	for _, r := range fullRails(k, a, m, b) {
		s.enter(r.name, point{x, r.y})
	}
}

func fullRails(k int, a, m, b float64) []rail {
	n := strconv.Itoa(k)
	return []rail{{"a" + n, a, false}, {"s" + n, m, true}, {"b" + n, b, false}}
}

// fullStage draws stage k from x and returns where the next begins.
func (s *sheet) fullStage(k int, x, a, m, b float64) float64 {
	x1, x2 := x+pitch, x+2*pitch
	n := strconv.Itoa(k)
	c, d := 3*k-3, 4*k-4
	s.capacitor(c, point{x1, a}, point{x, a}, above)
	s.capacitor(c+1, point{x1, b}, point{x, b}, below)
	s.wire(point{x, m}, point{x1, m})
	s.diode(d, point{x1, m}, point{x1, a}, 1-near, right)
	s.diode(d+1, point{x1, m}, point{x1, b}, 1-near, right)
	s.wire(point{x1, a}, point{x2, a})
	s.wire(point{x1, b}, point{x2, b})
	s.node("a"+n, point{x1, a}, point{x1 + pitch/2, a}, above)
	s.node("b"+n, point{x1, b}, point{x1 + pitch/2, b}, below)
	s.capacitor(c+2, point{x2, m}, point{x1, m}, above)
	s.diode(d+2, point{x2, a}, point{x2, m}, near, right)
	s.diode(d+3, point{x2, b}, point{x2, m}, near, right)
	return x2
}
