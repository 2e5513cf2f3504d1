package ladder

import "strconv"

// fullWave is the full-wave symmetrical cascade on a centre-tapped source.
// Stage k has C(3k−2) and C(3k−1) coupling on the two winding ends and C(3k)
// smoothing; D(4k−3), D(4k−2) lead from the column up to the two sides and
// D(4k−1), D(4k) back. Each diode passes q/2 per period.
var fullWave = form{
	capacitors: func(n int) int { return 3 * n },
	diodes:     func(n int) int { return 4 * n },
	ends:       2,
	maxStages:  MaxStages,
	build: func(stages int) netlist {
		n := netlist{minus: ground, share: 0.5, feed: float64(stages)}
		a, b, s := n.node("source a"), n.node("source b"), ground
		n.ends = []end{{a, 1}, {b, -1}}
		for k := 1; k <= stages; k++ {
			m := float64(stages - k)
			id := strconv.Itoa(k)
			ak, bk, sk := n.node("a"+id), n.node("b"+id), n.node("s"+id)
			n.capacitor(ak, a, false, -(m+1)/2, (m+1)/2, 0)
			n.capacitor(bk, b, false, (m+1)/2, -(m+1)/2, 0)
			n.column = append(n.column, n.capacitor(sk, s, true, 0.5, 0.5, -1))
			up := n.diode(s, ak)
			n.diode(s, bk)
			n.climb = append(n.climb, up, n.diode(ak, sk))
			n.diode(bk, sk)
			a, b, s = ak, bk, sk
		}
		n.plus = s
		return n
	},
}
