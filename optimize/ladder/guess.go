package ladder

// state is the charge balance turned into node voltages as the source rises
// through zero: where the integrator starts. Between the crests every
// capacitor changes by a known charge, and at its own crest every diode joins
// its two nodes; that fixes each node at both crests.
func (e *estimator) state(load float64) []float64 {
	n := e.net
	share := max(0.05, 1-e.conduction(load)/e.noLoad) * e.crest // what the diodes and resistances leave
	q := min(e.charge(load), 0.4*share/e.crest*e.noLoad/e.unit) // beyond, the balance says too little
	still := map[int]float64{}
	for _, w := range n.ends {
		still[w.node] = 0
	}
	moves := func(part func(k int) float64) []float64 {
		var links []link
		for k, b := range n.capacitors {
			links = append(links, link{b.b, b.a, q / e.values[k] * part(k)})
		}
		return n.spread(links, still)
	}
	delta := moves(func(k int) float64 { return n.pulses[0][k] + n.drain[k]/2 }) // from the negative crest to the positive
	for i := range delta {
		delta[i] += 2 * share * e.swing[i]
	}
	known := map[int]float64{}
	for _, w := range n.ends {
		known[w.node] = -share * w.phase
	}
	var links []link
	for _, d := range n.diodes { // a diode whose swing is forward conducts at the positive crest
		links = append(links, link{d.a, d.b, max(0, across(delta, d))})
	}
	x := n.spread(links, known)
	for i, v := range moves(func(k int) float64 { return n.drain[k] / 4 }) {
		x[i] += share*e.swing[i] + v
	}
	return x
}

// link says how far node to stands above node from.
type link struct {
	from, to int
	rise     float64
}

// spread finds node voltages from known ones along links; nodes that no link
// reaches stay at zero.
func (n *netlist) spread(links []link, known map[int]float64) []float64 {
	v := make([]float64, len(n.names))
	done := make([]bool, len(n.names))
	for node, x := range known {
		v[node], done[node] = x, true
	}
	seen := func(node int) bool { return node == ground || done[node] }
	for changed := true; changed; {
		changed = false
		for _, l := range links {
			switch {
			case seen(l.from) && !seen(l.to):
				v[l.to] = across(v, branch{l.from, ground}) + l.rise
				done[l.to], changed = true, true
			case seen(l.to) && !seen(l.from):
				v[l.from] = across(v, branch{l.to, ground}) - l.rise
				done[l.from], changed = true, true
			}
		}
	}
	return v
}

// across is the voltage of a branch.
func across(v []float64, b branch) float64 {
	at := func(node int) float64 {
		if node == ground {
			return 0
		}
		return v[node]
	}
	return at(b.a) - at(b.b)
}
