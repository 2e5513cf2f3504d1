package ladder

import "strconv"

// bipolar is two half-wave cascades of opposite polarity on one source, the
// load between their outputs: C1…C2n and D1…D2n are the positive side,
// C(2n+1)…C(4n) and D(2n+1)…D(4n) the negative one in the same order.
var bipolar = form{
	capacitors: func(n int) int { return 4 * n },
	diodes:     func(n int) int { return 4 * n },
	ends:       1,
	maxStages:  MaxStages / 2,
	build: func(stages int) netlist {
		n := netlist{share: 1, feed: float64(stages)}
		src := n.node("source")
		n.ends = []end{{src, 1}}
		n.plus = n.cascade(src, ground, stages, "+")
		n.minus = n.mirrored(src, stages)
		return n
	},
}

// mirrored stacks half-wave stages downward: every diode and every capacitor
// turned round, the crests exchanged.
func (n *netlist) mirrored(src, stages int) int {
	coupling, smoothing := src, ground
	for k := 1; k <= stages; k++ {
		m := float64(stages - k)
		id := strconv.Itoa(k)
		c, s := n.node("-c"+id), n.node("-s"+id)
		n.capacitor(coupling, c, false, m+1, -(m + 1), 0)
		n.column = append(n.column, n.capacitor(smoothing, s, true, -m, m+1, -1))
		n.climb = append(n.climb, n.diode(c, smoothing), n.diode(s, c))
		coupling, smoothing = c, s
	}
	return smoothing
}
