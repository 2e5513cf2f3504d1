package ladder

import "math"

// swings is the alternating amplitude of every node when no diode conducts, for
// a source of amplitude 1: the capacitive divider of coupling, smoothing,
// junction and stray capacitance. A diode that rectifies the swing across it holds
// its amplitude as direct voltage, so the no-load output is the sum along the
// climb. For equal capacitors and a large ladder it tends to the factor
// tanh(x)/x of Everhart and Lorrain (Rev. Sci. Instrum. 24 (1953) 221, from
// memory).
func (n *netlist) swings(c *Circuit, dc []float64) []float64 {
	size := len(n.names)
	fixed := make([]float64, size+1)
	driven := make([]bool, size+1)
	driven[size] = true
	for _, e := range n.ends {
		driven[e.node], fixed[e.node] = true, e.phase
	}
	at := func(node int) int {
		if node == ground {
			return size
		}
		return node
	}
	var joints []joint
	for i, b := range n.capacitors {
		k := newStore(c.Capacitors[i])
		_, value := k.charge(dc[i])
		joints = append(joints, joint{at(b.a), at(b.b), value})
	}
	for i, b := range n.diodes {
		joints = append(joints, joint{at(b.a), at(b.b), c.Diodes[i].reverseCapacitance(c.Source.Peak)})
	}
	if c.Stray > 0 {
		for i := range size {
			joints = append(joints, joint{i, size, c.Stray})
		}
	}
	return divide(joints, fixed, driven)[:size]
}

// joint is a capacitance between two nodes of the divider.
type joint struct {
	a, b int
	c    float64
}

// divide finds the node voltages of a capacitive network in which some nodes
// are driven.
func divide(joints []joint, fixed []float64, driven []bool) []float64 {
	size := len(fixed) - 1
	free := make([]int, size+1)
	count := 0
	for i := range free {
		free[i] = -1
		if !driven[i] {
			free[i] = count
			count++
		}
	}
	pairs := make([]branch, 0, len(joints))
	for _, j := range joints {
		pairs = append(pairs, branch{free[j.a], free[j.b]})
	}
	m := newSparse(count, pairs)
	values := make([]float64, m.size())
	right := make([]float64, count)
	for k, j := range joints {
		p := pairs[k]
		if p.a >= 0 {
			values[m.at(p.a, p.a)] += j.c
			if p.b < 0 {
				right[m.place[p.a]] += j.c * fixed[j.b]
			}
		}
		if p.b >= 0 {
			values[m.at(p.b, p.b)] += j.c
			if p.a < 0 {
				right[m.place[p.b]] += j.c * fixed[j.a]
			}
		}
		if p.a >= 0 && p.b >= 0 {
			values[m.at(p.a, p.b)] -= j.c
		}
	}
	v := append([]float64(nil), fixed...)
	if !m.factor(values) {
		return v
	}
	m.solve(values, right)
	for i, f := range free {
		if f >= 0 {
			v[i] = right[m.place[f]]
		}
	}
	return v
}

// reverseCapacitance is the mean junction capacitance over a swing from zero
// to twice the peak in reverse: charge over voltage.
func (d Diode) reverseCapacitance(peak float64) float64 {
	if d.VJ == 0 || d.CJ0 == 0 || peak == 0 {
		return d.CJ0
	}
	v := 2 * peak
	return d.CJ0 * d.VJ / (1 - d.M) * (math.Pow(1+v/d.VJ, 1-d.M) - 1) / v
}
