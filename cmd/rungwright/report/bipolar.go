package report

// drawBipolar draws two half-wave cascades that share the source: the one
// above ground in the upper half, its mirror image in the lower.
func drawBipolar(s *sheet) {
	n := s.circuit.Stages
	const between = 2*band + 6
	high, low := "+", "−"
	if s.circuit.Negative {
		high, low = low, high
	}
	plus := cascade{prefix: high, coupling: band + bay, smoothing: band, couplingSide: below, smoothingSide: above}
	minus := cascade{prefix: low, coupling: plus.coupling + between, smoothing: plus.coupling + between + bay,
		couplingSide: above, smoothingSide: below, c: 2 * n, d: 2 * n, down: true}
	for _, run := range runs(n, perRow) {
		s.newRow(minus.smoothing + band + 12)
		x := s.begin(run[0], plus, minus)
		if run[0] == 1 {
			x = s.shared(plus, minus)
		}
		for k := run[0]; k <= run[1]; k++ {
			if k > run[0] {
				plus.smoothed(s, k-1, x)
				minus.smoothed(s, k-1, x)
			}
			plus.stage(s, k, x)
			x = minus.stage(s, k, x)
		}
		if run[1] < n {
			plus.leave(s, run[1], x)
			minus.leave(s, run[1], x)
			continue
		}
		s.outlets(point{x, plus.smoothing}, point{x, minus.smoothing})
	}
}

// shared draws the source that feeds both cascades.
func (s *sheet) shared(plus, minus cascade) float64 {
	feed := point{margin + 20, plus.coupling}
	foot := point{feed.x, minus.coupling}
	x := feed.x + 100 + s.surgeRoom()
	s.source(feed, foot, right)
	s.earth(foot)
	s.lead(0, feed, point{x, plus.coupling})
	s.wire(point{x, plus.coupling}, point{x, minus.coupling})
	s.earth(point{x, plus.smoothing})
	s.earth(point{x, minus.smoothing})
	return x
}
