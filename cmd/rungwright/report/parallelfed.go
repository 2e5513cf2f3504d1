package report

import "strconv"

// drawParallelFed draws the ladder whose capacitors all stand upright: the
// coupling ones up to the source's bus, the smoothing ones down to earth, the
// diodes in one line between.
func drawParallelFed(s *sheet) {
	const top, mid, bottom = 20.0, 20 + 152, 20 + 152 + 110
	for _, run := range runs(s.circuit.Stages, perRow) {
		s.newRow(bottom + 40)
		x := margin + 60.0
		if run[0] == 1 {
			x = s.parallelSource(top, mid, bottom)
		} else {
			s.enter("source", point{x, top})
			s.enter("s"+strconv.Itoa(run[0]-1), point{x, mid})
			s.earth(point{x, bottom})
		}
		for k := run[0]; k <= run[1]; k++ {
			x = s.parallelStage(k, k < run[1] || k < s.circuit.Stages, x, top, mid, bottom)
		}
		if run[1] == s.circuit.Stages {
			s.outlet(point{x + 40, mid})
			s.wire(point{x, mid}, point{x + 40, mid})
			continue
		}
		end := x + pitch
		s.wire(point{x, top}, point{end, top})
		s.wire(point{x, mid}, point{end, mid})
		s.leave("source", point{end, top}, false)
		s.leave("s"+strconv.Itoa(run[1]), point{end, mid}, false)
	}
}

// parallelSource draws the source between its bus and earth.
func (s *sheet) parallelSource(top, mid, bottom float64) float64 {
	const feed = margin + 20
	x := feed + 96 + s.surgeRoom()
	s.source(point{feed, top}, point{feed, bottom}, right)
	s.earth(point{feed, bottom})
	s.wire(point{feed, bottom}, point{x, bottom})
	s.wire(point{x, mid}, point{x, bottom})
	s.leadBelow(point{feed, top}, point{x, top})
	return x
}

// leadBelow is lead with the surge resistor's label below, for a rail at the
// top of the row.
func (s *sheet) leadBelow(from, to point) {
	if len(s.labels.Surge) == 0 {
		s.wire(from, to)
		return
	}
	mid := point{from.x + pitch, from.y}
	s.resistor(series, from, mid, s.labels.Surge[0], below)
	s.wire(mid, to)
}

// parallelStage draws stage k from x and returns where the next begins; the
// bus goes on when more is to be fed.
func (s *sheet) parallelStage(k int, more bool, x, top, mid, bottom float64) float64 {
	x1, x2 := x+pitch, x+2*pitch
	n := strconv.Itoa(k)
	s.wire(point{x, top}, point{x1, top})
	s.capacitorAt(2*k-2, point{x1, mid}, point{x1, top}, 0.7, right)
	s.diode(2*k-2, point{x, mid}, point{x1, mid}, 0.5, above)
	s.node("c"+n, point{x1, mid}, point{x1, mid}, below)
	if more {
		s.wire(point{x1, top}, point{x2, top})
	}
	s.diode(2*k-1, point{x1, mid}, point{x2, mid}, 0.5, above)
	s.capacitorAt(2*k-1, point{x2, mid}, point{x2, bottom}, 0.62, right)
	s.node("s"+n, point{x2, mid}, point{x2 - 4, mid}, leftBelow)
	s.wire(point{x, bottom}, point{x1, bottom})
	s.wire(point{x1, bottom}, point{x2, bottom})
	return x2
}
