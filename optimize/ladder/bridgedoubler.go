package ladder

// bridgeDoubler has two diodes and two capacitors, the load across both
// capacitors: C1 and D1 serve the positive crest, C2 and D2 the negative one.
// The far end of the winding, between the capacitors, is the reference node.
var bridgeDoubler = form{
	capacitors: func(int) int { return 2 },
	diodes:     func(int) int { return 2 },
	ends:       1,
	maxStages:  1,
	build: func(int) netlist {
		n := netlist{share: 1, feed: 1}
		src := n.node("source")
		n.plus, n.minus = n.node("plus"), n.node("minus")
		n.ends = []end{{src, 1}}
		n.column = []int{
			n.capacitor(n.plus, ground, true, 1, 0, -1),
			n.capacitor(ground, n.minus, true, 0, 1, -1),
		}
		up := n.diode(src, n.plus)
		n.climb = []int{n.diode(n.minus, src), up}
		return n
	},
}
