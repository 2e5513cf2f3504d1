package ladder

// oddMultiple is a half-wave cascade on a foot that D1 charges to the peak:
// 2n+1 times the peak. C1 is the foot's smoothing capacitor; stage k then has
// C(2k) coupling, C(2k+1) smoothing, D(2k) up and D(2k+1) back.
var oddMultiple = form{
	capacitors: func(n int) int { return 2*n + 1 },
	diodes:     func(n int) int { return 2*n + 1 },
	ends:       1,
	maxStages:  MaxStages,
	build: func(stages int) netlist {
		m := float64(stages)
		n := netlist{minus: ground, share: 1, feed: m + 1}
		src, foot := n.node("source"), n.node("s0")
		n.ends = []end{{src, 1}}
		n.column = []int{n.capacitor(foot, ground, true, m+1, -m, -1)}
		n.climb = []int{n.diode(src, foot)}
		n.plus = n.cascade(src, foot, stages, "")
		return n
	},
}
