package ladder

import "strconv"

// parallelFed feeds every coupling capacitor C(2k−1) straight from the source
// and holds every smoothing capacitor C(2k) to ground: little drop, but C(2k−1)
// stands (2k−1)V and C(2k) stands 2kV.
var parallelFed = form{
	capacitors: func(n int) int { return 2 * n },
	diodes:     func(n int) int { return 2 * n },
	ends:       1,
	maxStages:  MaxStages,
	build: func(stages int) netlist {
		n := netlist{minus: ground, share: 1, feed: float64(stages)}
		src := n.node("source")
		n.ends = []end{{src, 1}}
		below := ground
		for k := 1; k <= stages; k++ {
			id := strconv.Itoa(k)
			c, s := n.node("c"+id), n.node("s"+id)
			given, drain := -1.0, 0.0 // to the next stage, or to the load
			if k == stages {
				given, drain = 0, -1
			}
			n.capacitor(c, src, false, -1, 1, 0)
			top := n.capacitor(s, ground, true, 1, given, drain)
			n.climb = append(n.climb, n.diode(below, c), n.diode(c, s))
			n.column = []int{top}
			below = s
		}
		n.plus = below
		return n
	},
}
