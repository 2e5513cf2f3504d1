package ladder

import (
	"math"
	"sync"
)

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
	return divide(patternKey{c.Topology, c.Stages, c.Stray > 0}, joints, fixed, driven)[:size]
}

// patternKey is what the structure of a divider depends on.
type patternKey struct {
	topology Topology
	stages   int
	stray    bool
}

// The structures of dividers and netlists, found once: a search asks for the
// same ones again and again. What they hold is never changed.
var dividers, netlists sync.Map

// netlistOf is the topology at a number of stages, to be read only.
func netlistOf(t Topology, stages int) *netlist {
	key := patternKey{t, stages, false}
	if n, ok := netlists.Load(key); ok {
		return n.(*netlist)
	}
	n := forms[t].build(stages)
	netlists.Store(key, &n)
	return &n
}

// joint is a capacitance between two nodes of the divider.
type joint struct {
	a, b int
	c    float64
}

// divide finds the node voltages of a capacitive network in which some nodes
// are driven.
func divide(key patternKey, joints []joint, fixed []float64, driven []bool) []float64 {
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
	found, ok := dividers.Load(key)
	if !ok {
		found, _ = dividers.LoadOrStore(key, newSparse(count, pairs))
	}
	m := found.(*sparse)
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
