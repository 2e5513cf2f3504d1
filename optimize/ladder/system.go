package ladder

import "math"

// system is a circuit as equations d/dt q(x) + i(x, t) = 0 over elements that
// join two nodes each. Unknowns are node voltages and, where the source has
// leakage inductance, the current of each winding end; they are numbered in
// elimination order. Index n stands for ground everywhere.
type system struct {
	n       int
	volts   []bool // which unknowns are node voltages
	m       *sparse
	period  float64
	peak    float64
	wave    wave
	polar   float64 // −1 turns the source round, for a negative circuit
	a, b    []int32 // terminals of each element
	aa      []int32 // matrix slots of each element
	bb, ab  []int32
	stores  []store    // elements 0 …
	diodes  []junction // then these
	resists []float64  // then conductances
	load    Load       // then one load element
	knee    float64
	ends    []winding // then two elements per winding end
	caps    []branch  // terminals of each capacitor, series resistance included
	out     branch    // across the ladder's output
	final   branch    // across the load, after the filter
	names   []string
	whisper float64 // conductance too small to show [S]
	drive   float64 // 1, or 0 when the source is switched off
	lead    float64 // phase at t = 0, in periods
}

// winding is one end of the source. Without inductance its first element is
// a conductance behind the source voltage and the second is idle.
type winding struct {
	phase, g, r, l float64
	damp           float64 // conductance across resistance and inductance [S]
	node, unknown  int32   // unknown is −1 without inductance
	cross          int32   // matrix slot that joins the two
}

// element ranges.
func (s *system) diodeAt() int  { return len(s.stores) }
func (s *system) resistAt() int { return s.diodeAt() + len(s.diodes) }
func (s *system) loadAt() int   { return s.resistAt() + len(s.resists) }
func (s *system) endAt() int    { return s.loadAt() + 1 }
func (s *system) elements() int { return s.endAt() + 2*len(s.ends) }

// newSystem writes the circuit's equations.
func newSystem(c Circuit) *system {
	net := forms[c.Topology].build(c.Stages)
	s := &system{period: 1 / c.Source.Frequency, peak: c.Source.Peak, wave: c.Source.wave(), polar: 1, drive: 1,
		load: c.Load, knee: 0.01 * c.Source.Peak}
	if c.Negative {
		s.polar = -1
	}
	b := builder{s: s, net: &net, c: &c}
	b.addStores()
	b.addDiodes()
	b.addResists()
	b.addLoadAndEnds()
	b.number()
	return s
}

// builder gathers the elements of one system.
type builder struct {
	s        *system
	net      *netlist
	c        *Circuit
	branches []branch
	inner    []branch // the series resistances
}

func (b *builder) element(at branch) { b.branches = append(b.branches, at) }

// least is the smallest resistance that matters in the circuit: a millionth
// of the reactance of its largest capacitor.
func (b *builder) least() float64 {
	largest := 0.0
	for _, k := range b.c.Capacitors {
		largest = max(largest, k.C)
	}
	return 1e-6 / (2 * math.Pi * b.c.Source.Frequency * largest)
}

// whisper is a conductance too small to show, a thousand-millionth of what
// the smallest capacitor moves, that ties down charges which nothing else
// does.
func (b *builder) whisper() float64 {
	smallest := math.Inf(1)
	for _, k := range b.c.Capacitors {
		smallest = min(smallest, k.C)
	}
	return 1e-9 * b.c.Source.Frequency * smallest
}

func (b *builder) addStores() {
	b.s.caps = append(b.s.caps, b.net.capacitors...)
	for i, k := range b.c.Capacitors {
		at := b.net.capacitors[i]
		if k.ESR > 0 {
			inside := b.net.node("inside")
			b.inner = append(b.inner, branch{at.a, inside})
			b.s.resists = append(b.s.resists, 1/k.ESR)
			at.a = inside
		}
		b.s.stores = append(b.s.stores, newStore(k))
		b.element(at)
	}
	if b.c.Stray > 0 {
		b.addStrays()
	}
	b.s.out = branch{b.net.plus, b.net.minus}
	b.s.final = b.s.out
	if b.c.Filter.R > 0 {
		after := b.net.node("after filter")
		b.inner = append(b.inner, branch{b.net.plus, after})
		b.s.resists = append(b.s.resists, 1/b.c.Filter.R)
		b.s.stores = append(b.s.stores, newStore(Capacitor{C: b.c.Filter.C}))
		b.element(branch{after, b.net.minus})
		b.s.final.a = after
	}
}

// addStrays puts the stray capacitance from every ladder node to ground.
func (b *builder) addStrays() {
	driven := map[int]bool{}
	for _, e := range b.net.ends {
		driven[e.node] = true
	}
	for i, name := range b.net.names {
		if !driven[i] && name != "inside" {
			b.s.stores = append(b.s.stores, newStore(Capacitor{C: b.c.Stray}))
			b.element(branch{i, ground})
		}
	}
}

func (b *builder) addDiodes() {
	least, leak := b.least(), b.whisper()
	b.s.whisper = leak
	for i, d := range b.c.Diodes {
		if d.CJ0 == 0 { // keeps every node's equation a differential one
			d.CJ0, d.VJ = 100*leak/b.c.Source.Frequency, 0
		}
		b.s.diodes = append(b.s.diodes, newJunction(d, least, leak))
		b.element(b.net.diodes[i])
	}
}

func (b *builder) addResists() {
	for _, at := range b.inner {
		b.element(at)
	}
}

func (b *builder) addLoadAndEnds() {
	b.element(b.s.final)
	r, damp := max(b.c.Source.Resistance, b.least()), 0.0
	if q, l := b.c.Source.RingQ, b.c.Source.Leakage; q > 0 && l > 0 {
		damp = math.Sqrt(newEstimator(*b.c).inputCapacitance()/l) / q
	}
	for _, e := range b.net.ends {
		w := winding{phase: e.phase, g: 1 / r, r: r, l: b.c.Source.Leakage, damp: damp, node: int32(e.node), unknown: -1}
		if w.l > 0 {
			w.unknown = int32(b.net.node("winding current"))
			b.element(branch{e.node, ground})
			b.element(branch{int(w.unknown), ground})
		} else {
			b.element(branch{e.node, ground})
			b.element(branch{ground, ground})
		}
		b.s.ends = append(b.s.ends, w)
	}
}

// number orders the unknowns and translates every node.
func (b *builder) number() {
	s := b.s
	s.n = len(b.net.names)
	pairs := append([]branch(nil), b.branches...)
	for _, w := range s.ends {
		if w.unknown >= 0 {
			pairs = append(pairs, branch{int(w.node), int(w.unknown)})
		}
	}
	s.m = newSparse(s.n, pairs)
	place := func(node int) int {
		if node == ground {
			return s.n
		}
		return s.m.place[node]
	}
	at := func(x branch) branch { return branch{place(x.a), place(x.b)} }
	for _, e := range b.branches {
		e = at(e)
		s.a, s.b = append(s.a, int32(e.a)), append(s.b, int32(e.b))
		s.aa, s.bb, s.ab = append(s.aa, s.slot(e.a, e.a)), append(s.bb, s.slot(e.b, e.b)), append(s.ab, s.slot(e.a, e.b))
	}
	s.volts = make([]bool, s.n)
	s.names = make([]string, s.n)
	for i, name := range b.net.names {
		s.volts[place(i)] = name != "winding current"
		s.names[place(i)] = name
	}
	for i := range s.caps {
		s.caps[i] = at(s.caps[i])
	}
	s.out, s.final = at(s.out), at(s.final)
	for i := range s.ends {
		w := &s.ends[i]
		w.node = int32(place(int(w.node)))
		if w.unknown >= 0 {
			w.unknown = int32(place(int(w.unknown)))
			w.cross = s.slot(int(w.node), int(w.unknown))
		}
	}
}

// leakMore gives every diode a leakage conductance beyond its own.
func (s *system) leakMore(g float64) {
	for i := range s.diodes {
		s.diodes[i].leak = s.diodes[i].own + g
	}
}

// slot is where an entry of the matrix is held; entries that touch ground go
// to a spare place behind the matrix.
func (s *system) slot(i, j int) int32 {
	if i == s.n || j == s.n {
		return int32(s.m.size())
	}
	return s.m.slot(i, j)
}

// branch is the pair of nodes that an element joins, ground as such.
func (s *system) branch(e int) branch {
	b := branch{int(s.a[e]), int(s.b[e])}
	if b.a == s.n {
		b.a = ground
	}
	if b.b == s.n {
		b.b = ground
	}
	return b
}

// sourceAt is the open-circuit voltage of a winding end.
func (s *system) sourceAt(t, phase float64) float64 {
	return s.drive * s.polar * phase * s.peak * s.wave.at(t/s.period+s.lead)
}
