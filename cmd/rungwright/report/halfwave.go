package report

// drawHalfWave draws the half-wave cascade: coupling rail above, smoothing
// rail below, the source between them at the left.
func drawHalfWave(s *sheet) {
	l := cascade{coupling: band, smoothing: band + bay, couplingSide: above, smoothingSide: below}
	for _, run := range runs(s.circuit.Stages, perRow) {
		s.newRow(l.smoothing + band + 16)
		x := s.begin(run[0], l)
		if run[0] == 1 {
			feed, foot := point{margin + 20, l.coupling}, point{margin + 20, l.smoothing}
			s.source(feed, foot, right)
			s.wire(foot, point{x, l.smoothing})
			s.earth(foot)
			s.lead(0, feed, point{x, l.coupling})
		}
		s.stages(run, l, x)
	}
}

// begin starts a row at stage k: room for the source, or the rails coming in.
func (s *sheet) begin(k int, ladders ...cascade) float64 {
	if k == 1 {
		return margin + 44 + s.surgeRoom()
	}
	x := margin + 44
	for _, l := range ladders {
		l.enter(s, k-1, x)
	}
	return x
}

// stages draws a run of stages and what ends the row.
func (s *sheet) stages(run [2]int, l cascade, x float64) {
	for k := run[0]; k <= run[1]; k++ {
		if k > run[0] {
			l.smoothed(s, k-1, x)
		}
		x = l.stage(s, k, x)
	}
	if run[1] < s.circuit.Stages {
		l.leave(s, run[1], x)
		return
	}
	s.outlet(point{x, l.smoothing})
}

// lead joins a winding end to the ladder, through its surge resistor if there
// is one.
func (s *sheet) lead(end int, from, to point) {
	if len(s.labels.Surge) == 0 {
		s.wire(from, to)
		return
	}
	mid := point{from.x + s.surgeRoom(), from.y}
	s.resistor(series, from, mid, s.labels.Surge[min(end, len(s.labels.Surge)-1)], above)
	if mid != to {
		s.wire(mid, to)
	}
}

// surgeRoom is what a surge resistor takes of the first row.
func (s *sheet) surgeRoom() float64 {
	if len(s.labels.Surge) == 0 {
		return 0
	}
	return pitch
}
