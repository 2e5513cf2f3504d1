package ladder

import "strconv"

// halfWave is the half-wave cascade. Stage k has C(2k−1) coupling and C(2k)
// smoothing, D(2k−1) from the smoothing column up to the coupling column and
// D(2k) back.
var halfWave = form{
	capacitors: func(n int) int { return 2 * n },
	diodes:     func(n int) int { return 2 * n },
	ends:       1,
	maxStages:  MaxStages,
	build: func(stages int) netlist {
		n := netlist{minus: ground, share: 1, feed: float64(stages)}
		src := n.node("source")
		n.ends = []end{{src, 1}}
		n.plus = n.cascade(src, ground, stages, "")
		return n
	},
}

// cascade stacks half-wave stages on the foot node and returns the top of the
// smoothing column. With m stages above, a coupling capacitor moves (m+1)q at
// each crest; a smoothing capacitor gains (m+1)q at the positive crest, gives
// m·q at the negative one and q to the load.
func (n *netlist) cascade(src, foot, stages int, prefix string) int {
	coupling, smoothing := src, foot
	for k := 1; k <= stages; k++ {
		m := float64(stages - k)
		c := n.node(prefix + "c" + strconv.Itoa(k))
		s := n.node(prefix + "s" + strconv.Itoa(k))
		n.capacitor(c, coupling, false, -(m + 1), m+1, 0)
		top := n.capacitor(s, smoothing, true, m+1, -m, -1)
		n.column = append(n.column, top)
		n.climb = append(n.climb, n.diode(smoothing, c), n.diode(c, s))
		coupling, smoothing = c, s
	}
	return smoothing
}
