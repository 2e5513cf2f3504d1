package optimize

import (
	"cmp"
	"math"
	"slices"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
	"rungwright/ratings"
)

// candidate is one way to fill the positions of a slot.
type candidate struct {
	groups [2]Group // one for each set of positions of the slot
	weight int64    // in the objective, for all positions of the slot

	// capacitors: their shares of the charge balance, 1/C at the bias of an
	// ideal ladder times the position's weight, at the low and the high corner
	drop, ripple [2]float64
	elastance    float64 // of the slot's part of the output column, 1/C at its smallest [1/F]
	column       float64 // voltage that the slot's part of the output column may bear [V]
	// capacitors and diodes
	crest float64 // mean crest that every position may bear, the ideal ladder's shares given [V]
	// bleeders
	ohms, most float64 // resistance when it is at its highest [Ω], the output that it bears [V]
}

// slotKind is what a slot of the space is for.
type slotKind int

const (
	capacitorSlot slotKind = iota
	diodeSlot
	bleederSlot
)

// slot is one independent choice of a frame.
type slot struct {
	kind       slotKind
	sets       [][]int     // capacitor positions that each group fills
	candidates []candidate // in the order of weight
	all        int64       // candidates before any was left out
}

// least is the weight that the slot costs at the least.
func (s *slot) least() int64 { return s.candidates[0].weight }

// order sorts candidates by weight; equal ones by part number and grouping, so
// that the order does not depend on how they were found.
func (s *slot) order() {
	slices.SortFunc(s.candidates, func(a, b candidate) int {
		if c := cmp.Compare(a.weight, b.weight); c != 0 {
			return c
		}
		for k := range a.groups {
			if c := a.groups[k].compare(b.groups[k]); c != 0 {
				return c
			}
		}
		return 0
	})
}

// compare orders groups by part number, then series, then parallel pieces.
func (g Group) compare(h Group) int {
	number := func(g Group) string {
		if g.Part == nil {
			return ""
		}
		return g.Part.Number
	}
	return cmp.Or(cmp.Compare(number(g), number(h)), cmp.Compare(g.Series, h.Series), cmp.Compare(g.Parallel, h.Parallel))
}

// surveyor makes the candidates of one frame.
type surveyor struct {
	e       *evaluator
	t       ladder.Topology
	stages  int
	levels  []float64
	weights ladder.Weights
	column  []bool // capacitors that the output stands across in series
	crest   [2]float64
	factor  float64 // ideal output in crests
	needV   float64 // least output at the high corner of a design that passes [V]
	curves  map[Group]*curve
}

func (e *evaluator) surveyor(t ladder.Topology, stages int) *surveyor {
	s := &surveyor{e: e, t: t, stages: stages, weights: t.Weights(stages), column: t.SmoothingColumn(stages),
		factor: float64(t.OutputFactor(stages)), curves: map[Group]*curve{}}
	s.levels = s.weights.Levels
	if t == ladder.ParallelFed { // each smoothing capacitor stands to ground: the output is the top one
		clear(s.column)
		s.column[len(s.column)-1] = true
	}
	for k := range 2 {
		s.crest[k] = float64(e.supply.Source.Peak) * e.conditions[k].line
	}
	line := float64(e.supply.Source.Line)
	s.needV = e.supply.lowest() * (1 + line) / (1 - line)
	return s
}

// bearing is the voltage that a group of capacitors may stand [V].
func (s *surveyor) bearing(g Group) float64 {
	return ratings.VoltageLimit(s.e.policy, g.Part, s.e.supply.Surroundings.Ambient) / worstShare(g)
}

// add puts a group's figures for a set of positions into a candidate.
func (s *surveyor) add(c *candidate, g Group, set []int) {
	limit := s.bearing(g)
	for _, i := range set {
		c.crest = min(c.crest, limit/s.levels[i])
	}
	series, parallel := float64(g.Series), float64(g.Parallel)
	for _, i := range set {
		for k := range 2 {
			bias := s.levels[i] * s.crest[k] / series
			value := float64(g.Part.Capacitor.CapacitanceAt(quantity.Volts(bias))) * valueFactor(g, s.e.conditions[k].values) * parallel / series
			c.drop[k] += s.weights.Drop[i] / value
			c.ripple[k] += s.weights.Ripple[i] / value
		}
		if s.column[i] {
			c.column += limit
			c.elastance += series / parallel / (float64(smallest(g.Part.Capacitor)) * valueFactor(g, 1))
		}
	}
}

// smallest is the least capacitance under bias.
func smallest(k *catalog.Capacitor) quantity.Farads {
	if n := len(k.Bias); n > 0 {
		return k.Capacitance * quantity.Farads(k.Bias[n-1].Share)
	}
	return k.Capacitance
}

// bears tells whether a group can stand in a set of positions of a design that
// passes: the crest that such a design needs, less what one position may fall
// below the mean.
func (s *surveyor) bears(g Group, set []int) bool {
	level := 0.0
	for _, i := range set {
		level = max(level, s.levels[i])
	}
	crest := s.needV / s.factor
	return s.bearing(g) >= gentleShare*level*crest
}

// pieces is what a group adds to a unit at a set of positions.
func pieces(g Group, positions int) int { return g.Pieces() * positions }

// diodes are the diodes and strings of diodes that any design asks for.
func (s *surveyor) diodes(groups []Group) slot {
	out := slot{kind: diodeSlot, all: int64(len(groups))}
	for _, g := range groups {
		if !s.e.diodeServes(s.t, s.stages, g) {
			continue
		}
		if w, ok := s.e.weigh(g.Part, pieces(g, s.t.DiodeCount(s.stages))); ok {
			out.candidates = append(out.candidates, candidate{groups: [2]Group{g}, weight: w,
				crest: ratings.ReverseLimit(s.e.policy, g.Part) / diodeShare(g.Series) / 2})
		}
	}
	out.order()
	return out
}

// capacitors are candidates for one part in one or two sets of positions. With
// two sets the groups differ, and the part is priced on their sum.
func (s *surveyor) capacitors(groups []Group, sets ...[]int) slot {
	out := slot{kind: capacitorSlot, sets: sets}
	for first := 0; first < len(groups); {
		last := first
		for last < len(groups) && groups[last].Part == groups[first].Part {
			last++
		}
		s.ofPart(&out, groups[first:last])
		first = last
	}
	out.order()
	return out
}

// ofPart adds the candidates of one part.
func (s *surveyor) ofPart(out *slot, groups []Group) {
	for _, g := range groups {
		if len(out.sets) == 1 {
			out.all++
			if s.bears(g, out.sets[0]) {
				s.append(out, g)
			}
			continue
		}
		for _, h := range groups {
			if g == h {
				continue
			}
			out.all++
			if s.bears(g, out.sets[0]) && s.bears(h, out.sets[1]) {
				s.append(out, g, h)
			}
		}
	}
}

func (s *surveyor) append(out *slot, groups ...Group) {
	c := candidate{crest: math.Inf(1)}
	perUnit := 0
	for k, g := range groups {
		c.groups[k] = g
		perUnit += pieces(g, len(out.sets[k]))
		s.add(&c, g, out.sets[k])
	}
	w, ok := s.e.weigh(groups[0].Part, perUnit)
	if !ok || !s.hopeful(&c) {
		return
	}
	c.weight = w
	out.candidates = append(out.candidates, c)
}

// hopeful tells whether a capacitor alone leaves room for the output and the
// ripple, with the shares of the charge balance that are sure.
func (s *surveyor) hopeful(c *candidate) bool {
	q := s.e.supply.fullCurrent() * lowShare(s.e.supply) / float64(s.e.supply.Source.Frequency)
	top := s.factor * s.crest[0] * reachAbove
	if top-sureDrop*q*c.drop[0] < s.e.supply.lowest() {
		return false
	}
	want := float64(s.e.supply.Output.Ripple)
	return want == 0 || !s.weights.Sum || sureRipple*q*c.ripple[0] <= want
}

// Shares of the charge balance that are taken for sure before any simulation
// corrects the estimate, and how far leakage inductance may lift the output
// above the crests. At the loads that a window allows, random trials of
// package ladder never came near them.
const (
	sureDrop   = 0.7
	sureRipple = 0.5
	reachAbove = 1.06
)

// bleeders are strings of resistors across the output, from the shortest that
// bears the least output to the longest that still discharges in time.
func (s *surveyor) bleeders(resistors []*catalog.Part) slot {
	out := slot{kind: bleederSlot}
	if s.e.supply.Output.Discharge.Below == 0 {
		out.all, out.candidates = 1, []candidate{{most: math.Inf(1), ohms: math.Inf(1)}}
		return out
	}
	for _, r := range resistors {
		for n := 1; n <= mostBleeder; n++ {
			g := Group{r, n, 1}
			out.all++
			if s.needV/bleederOhms(g) > mostBled*s.e.supply.fullCurrent() {
				continue
			}
			most := s.e.bleederBears(g)
			if most < s.needV {
				continue
			}
			if w, ok := s.e.weigh(r, n); ok {
				out.candidates = append(out.candidates, candidate{groups: [2]Group{g}, weight: w, most: most,
					ohms: bleederOhms(g) * (1 + float64(r.Resistor.ToleranceHigh))})
			}
		}
	}
	out.order()
	return out
}

// mostBled is the most that a bleeder may draw, of the full load.
const mostBled = 0.5

// bleederBears is the highest output that a bleeder string stands for ever [V].
func (e *evaluator) bleederBears(g Group) float64 {
	passes := func(v float64) bool { return ratings.Passes(e.policy, g.Part, []ratings.Use{e.bleederUse(g, v)}) }
	lo, hi := 0.0, 2*e.supply.highest()
	if passes(hi) {
		return hi
	}
	for range 30 {
		if mid := (lo + hi) / 2; passes(mid) {
			lo = mid
		} else {
			hi = mid
		}
	}
	return lo
}
