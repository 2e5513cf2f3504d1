package report

// drawOddMultiple draws the half-wave cascade on a foot that D1 charges: C1
// lies in the smoothing rail, D1 leads down from the source.
func drawOddMultiple(s *sheet) {
	l := cascade{coupling: band, smoothing: band + bay, couplingSide: above, smoothingSide: below, c: 1, d: 1}
	for _, run := range runs(s.circuit.Stages, perRow) {
		s.newRow(l.smoothing + band + 16)
		x := s.begin(run[0], l)
		if run[0] == 1 {
			x = s.foot(l, x)
		}
		s.stages(run, l, x)
	}
}

// foot draws the source and the half stage that it charges.
func (s *sheet) foot(l cascade, x float64) float64 {
	feed, earth := point{margin + 20, l.coupling}, point{margin + 20, l.smoothing}
	x1 := x + pitch
	s.source(feed, earth, right)
	s.wire(earth, point{x, l.smoothing})
	s.earth(earth)
	s.lead(0, feed, point{x, l.coupling})
	s.wire(point{x, l.coupling}, point{x1, l.coupling})
	s.capacitor(0, point{x1, l.smoothing}, point{x, l.smoothing}, below)
	s.diode(0, point{x1, l.coupling}, point{x1, l.smoothing}, 0.5, right)
	s.node("s0", point{x1, l.smoothing}, point{x1 + pitch/2, l.smoothing}, below)
	return x1
}
