package report

// drawBridgeDoubler draws two diodes and two capacitors: the source feeds the
// joint of the diodes, and its far end, earthed, the joint of the capacitors.
func drawBridgeDoubler(s *sheet) {
	const top, mid, bottom = band, band + bay, band + 2*bay
	s.newRow(bottom + band)
	x := margin + 30.0
	x1 := x + s.surgeRoom()
	x2 := x1 + 2*pitch
	feed := point{x, mid}
	s.wire(point{x, mid}, point{x, top})
	s.wire(point{x, mid}, point{x, bottom})
	if x1 > x {
		s.lead(0, feed, point{x1, mid})
		feed = point{x1, mid}
	}
	s.source(feed, point{x2, mid}, above)
	s.diode(0, point{x, top}, point{x2, top}, 0.5, above)
	s.diode(1, point{x2, bottom}, point{x, bottom}, 0.5, below)
	s.capacitor(0, point{x2, top}, point{x2, mid}, right)
	s.capacitor(1, point{x2, mid}, point{x2, bottom}, right)
	foot := point{x2 + pitch, mid}
	s.wire(point{x2, mid}, foot)
	s.earth(foot)
	s.outlets(point{x2, top}, point{x2, bottom})
}
