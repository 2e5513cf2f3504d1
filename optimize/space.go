package optimize

import (
	"cmp"
	"container/heap"
	"context"
	"math"
	"slices"

	"rungwright/optimize/ladder"
	"rungwright/ratings"
)

// region is one topology, stage count and spread of capacitors: a product of
// option lists, each in the order of weight.
type region struct {
	topology  ladder.Topology
	stages    int
	spread    pattern
	samePart  bool         // one part fills both kinds of the spread, in different numbers
	lists     [4][]option  // first capacitor group, second one, diodes, bleeders
	total     int64        // combinations before any were dropped
	dropped   int64        // because a part cannot bear its place, by its ratings
	bounded   int64        // because the ladder cannot reach the output with it
	guarded   int64        // by the estimate with its guard
	short     [][2]float64 // capacitances with which the ladder cannot reach the output
	facts     map[[3]int]*facts
	worstDrop float64            // of the diodes at the full load, more than at the least [V]
	worstCJ0  float64            // largest junction capacitance of the diodes [F]
	weak      map[int][]strength // fallen short by the estimate, by diode
	failed    []strength         // simulated and fallen short
	stress    *stressSeen        // of the topology and the stages, shared by their regions
}

// kinds of option in a region's lists.
const (
	ofFirst = iota
	ofSecond
	ofDiode
	ofBleeder
)

// combination is a place in a region's product.
type combination struct {
	in     *region
	at     [4]int
	weight int64
	order  int // of the region, to break ties
}

// plan is the parts that a combination stands for.
func (c *combination) plan() *Plan {
	r := c.in
	p := &Plan{Topology: r.topology, Stages: r.stages, Bleeder: r.lists[ofBleeder][c.at[ofBleeder]].group}
	first, second := c.groups()
	p.Capacitors = r.spread.spread(r.topology, r.stages, first, second)
	d := r.lists[ofDiode][c.at[ofDiode]].group
	for range r.topology.DiodeCount(r.stages) {
		p.Diodes = append(p.Diodes, d)
	}
	return p
}

// groups are the capacitor groups of a combination.
func (c *combination) groups() (first, second Group) {
	o := c.in.lists[ofFirst][c.at[ofFirst]]
	if c.in.samePart {
		return o.group, o.second
	}
	return o.group, c.in.lists[ofSecond][c.at[ofSecond]].group
}

// regions builds the whole space that the supply leaves open.
func (e *evaluator) regions(ctx context.Context) []*region {
	p := e.pools()
	bleeders := e.bleeders(&p)
	capacitors, diodes := p.capacitorGroups(), p.diodeGroups()
	var out []*region
	for _, t := range e.topologies() {
		for n := max(1, e.supply.Choose.StagesMin); n <= e.mostStages(t); n++ {
			if ctx.Err() != nil {
				return out
			}
			out = append(out, e.regionsOf(t, n, capacitors, diodes, bleeders)...)
		}
	}
	return out
}

// topologies are those asked for, or all that the source can feed.
func (e *evaluator) topologies() []ladder.Topology {
	asked := e.supply.Choose.Topologies
	if len(asked) == 0 {
		asked = []ladder.Topology{ladder.HalfWave, ladder.FullWave, ladder.BridgeDoubler}
	}
	var out []ladder.Topology
	for _, t := range asked {
		if t.WindingEnds() == 1 || e.supply.Source.CentreTap {
			out = append(out, t)
		}
	}
	return out
}

// mostStages leaves out stage counts whose no-load output cannot lie in the
// window even with a quarter lost.
func (e *evaluator) mostStages(t ladder.Topology) int {
	most := t.MaxStages()
	if asked := e.supply.Choose.StagesMax; asked > 0 {
		most = min(most, asked)
	}
	return most
}

// regionsOf builds the regions of one topology and stage count.
func (e *evaluator) regionsOf(t ladder.Topology, n int, capacitors, diodes []Group, bleeders []option) []*region {
	reach := float64(t.OutputFactor(n)) * float64(e.supply.Source.Peak)
	var usable []option
	for _, d := range diodes {
		if w, ok := e.weigh(d.Part, d.Pieces()*t.DiodeCount(n)); ok && e.diodeServes(t, n, d) {
			usable = append(usable, option{group: d, weight: w})
		}
	}
	var fit []Group
	for _, c := range capacitors {
		if e.capacitorServes(t, n, c) {
			fit = append(fit, c)
		}
	}
	parts := region{topology: t, stages: n, stress: &stressSeen{}}
	parts.lists[ofDiode], parts.lists[ofBleeder] = sorted(usable), bleeders
	var out []*region
	for _, s := range patterns {
		r := parts
		r.spread = s
		first, second := s.counts(t, n)
		rest := int64(len(diodes)) * int64(len(bleeders))
		all := int64(len(capacitors))
		switch {
		case s.second == nil:
			r.lists[ofFirst], r.lists[ofSecond] = e.weighAll(fit, first), []option{{}}
			r.total = all * rest
		case first == 0 || second == 0:
			continue
		default:
			same := r
			same.samePart = true
			same.lists[ofFirst], same.lists[ofSecond] = e.weighPairs(fit, first, second), []option{{}}
			same.total = all * (mostParallel - 1) * rest
			out = append(out, same.closed(reach*(1-float64(e.supply.Source.Line)) < e.supply.lowest()))
			alone := slices.DeleteFunc(slices.Clone(fit), func(g Group) bool { return g.Pieces() > 1 })
			r.lists[ofFirst], r.lists[ofSecond] = e.weighAll(alone, first), e.weighAll(alone, second)
			all /= mostParallel
			r.total = all * (all - 1) * rest
		}
		out = append(out, r.closed(reach*(1-float64(e.supply.Source.Line)) < e.supply.lowest()))
	}
	for _, r := range out {
		e.boundLists(r)
		e.guardLists(r)
	}
	return out
}

// boundLists drops the capacitors with which the ladder cannot reach the
// window within the ripple even if those of the other kind were endless.
func (e *evaluator) boundLists(r *region) {
	if len(r.lists[ofFirst]) == 0 {
		return
	}
	before := r.size()
	r.lists[ofFirst] = slices.DeleteFunc(slices.Clone(r.lists[ofFirst]), func(o option) bool {
		second := endless
		if r.samePart {
			second = lowValue(o.second)
		}
		return !e.reaches(r, lowValue(o.group), second)
	})
	if !r.samePart && r.spread.second != nil {
		r.lists[ofSecond] = slices.DeleteFunc(slices.Clone(r.lists[ofSecond]), func(o option) bool {
			return !e.reaches(r, endless, lowValue(o.group))
		})
	}
	r.bounded = before - r.size()
}

// endless is a capacitance that no drop can be blamed on [F].
const endless = 1e3

// lowValue is a group's lowest capacitance without bias [F].
func lowValue(g Group) float64 {
	return float64(g.Part.Capacitor.Capacitance) * float64(g.Parallel) / float64(g.Series) * valueFactor(g, -1)
}

// closed counts what was dropped; hopeless empties the region.
func (r region) closed(hopeless bool) *region {
	if hopeless {
		r.lists = [4][]option{}
	}
	r.facts, r.weak = map[[3]int]*facts{}, map[int][]strength{}
	r.dropped = r.total - r.size()
	return &r
}

// guardLists drops what the expected crest overloads by more than the guard.
func (e *evaluator) guardLists(r *region) {
	before := r.size()
	crest := e.expectedCrest(r.topology, r.stages)
	first, second := r.levels()
	bears := func(g Group, level float64) bool {
		limit := ratings.VoltageLimit(e.policy, g.Part, e.supply.Surroundings.Ambient)
		return limit >= level*crest*worstShare(g)
	}
	r.lists[ofFirst] = slices.DeleteFunc(slices.Clone(r.lists[ofFirst]), func(o option) bool {
		return !bears(o.group, first) || r.samePart && !bears(o.second, second)
	})
	if !r.samePart && r.spread.second != nil {
		r.lists[ofSecond] = slices.DeleteFunc(slices.Clone(r.lists[ofSecond]), func(o option) bool { return !bears(o.group, second) })
	}
	r.lists[ofDiode] = slices.DeleteFunc(slices.Clone(r.lists[ofDiode]), func(o option) bool {
		return ratings.ReverseLimit(e.policy, o.group.Part) < 2*crest*diodeShare(o.group.Series)
	})
	r.guarded = before - r.size()
	for _, o := range r.lists[ofDiode] {
		d := e.diode(o.group, e.supply.Surroundings.Ambient)
		r.worstDrop = max(r.worstDrop, d.N*d.VT*math.Log1p(e.supply.fullCurrent()/d.IS)+e.supply.fullCurrent()*d.RS)
		r.worstCJ0 = max(r.worstCJ0, d.CJ0)
	}
}

// levels are the highest ideal voltages that the two groups of the spread
// meet, in crests.
func (r *region) levels() (first, second float64) {
	other := r.spread.isSecond(r.topology, r.stages)
	for i, level := range r.topology.CapacitorLevels(r.stages) {
		if other[i] {
			second = max(second, level)
		} else {
			first = max(first, level)
		}
	}
	return first, second
}

// expectedCrest is what every stage is expected to stand at least at high
// line in a design whose output is in the window at low line, less the guard.
func (e *evaluator) expectedCrest(t ladder.Topology, stages int) float64 {
	line := float64(e.supply.Source.Line)
	return e.supply.lowest() / float64(t.OutputFactor(stages)) * (1 + line) / (1 - line) * e.guard().stressLeast
}

// weighPairs are one part in different numbers on the two kinds of a spread,
// priced on their sum.
func (e *evaluator) weighPairs(groups []Group, first, second int) []option {
	var out []option
	for _, a := range groups {
		for _, b := range groups {
			if a.Part != b.Part || a == b {
				continue
			}
			if w, ok := e.weigh(a.Part, first*a.Pieces()+second*b.Pieces()); ok {
				out = append(out, option{a, b, w})
			}
		}
	}
	return sorted(out)
}

// size is the number of combinations left, one part in both places of a
// two-part spread not counted.
func (r *region) size() int64 {
	n := int64(len(r.lists[ofFirst])) * int64(len(r.lists[ofSecond]))
	if r.spread.second != nil && !r.samePart {
		for _, a := range r.lists[ofFirst] {
			for _, b := range r.lists[ofSecond] {
				if a.group.Part == b.group.Part {
					n--
				}
			}
		}
	}
	return n * r.rest()
}

// rest is how many diode and bleeder choices each choice of capacitors has.
func (r *region) rest() int64 { return int64(len(r.lists[ofDiode])) * int64(len(r.lists[ofBleeder])) }

func (e *evaluator) weighAll(groups []Group, positions int) []option {
	var out []option
	for _, g := range groups {
		if w, ok := e.weigh(g.Part, positions*g.Pieces()); ok {
			out = append(out, option{group: g, weight: w})
		}
	}
	return sorted(out)
}

// sorted orders options by weight, then part number, then pieces.
func sorted(o []option) []option {
	slices.SortStableFunc(o, func(a, b option) int {
		return cmp.Or(cmp.Compare(a.weight, b.weight), cmp.Compare(a.group.Part.Number, b.group.Part.Number), cmp.Compare(a.group.Pieces(), b.group.Pieces()))
	})
	return o
}

// diodeServes is what any design that passes asks of a diode: the mean
// inverse voltage that the output implies, and its average current.
func (e *evaluator) diodeServes(t ladder.Topology, n int, d Group) bool {
	share := diodeShare(d.Series)
	mean := e.supply.lowest() / float64(t.OutputFactor(n)) * share
	if ratings.ReverseLimit(e.policy, d.Part) < mean {
		return false
	}
	if most := ratings.AverageLimit(e.policy, d.Part, e.supply.Surroundings.Ambient); most < t.Charge()*e.supply.fullCurrent()*lowShare(e.supply) {
		return false
	}
	u := ratings.Use{Ref: "D1", Ambient: e.supply.Surroundings.Ambient, Frequency: e.supply.Source.Frequency}
	return ratings.Passes(e.policy, d.Part, []ratings.Use{u})
}

// lowShare is the least part of the full current that flows at full load: a
// resistance draws less where the output is low.
func lowShare(s *Supply) float64 {
	if s.Output.Load.Resistance > 0 {
		return 1 - float64(s.Output.Window)
	}
	return 1
}

// capacitorServes is what any design that passes asks of every capacitor in
// it. The gentlest position stands one crest, half of what the smoothing
// capacitors share; that the output is in the window at low line means that
// the mean crest is at least the output's share of it.
func (e *evaluator) capacitorServes(t ladder.Topology, n int, g Group) bool {
	gentlest := math.Inf(1)
	for _, l := range t.CapacitorLevels(n) {
		gentlest = min(gentlest, l)
	}
	crest := e.supply.lowest() / float64(t.OutputFactor(n))
	limit := ratings.VoltageLimit(e.policy, g.Part, e.supply.Surroundings.Ambient)
	return limit >= gentleShare*gentlest*crest*worstShare(g)
}

// gentleShare allows that the crest of one position falls below the mean.
const gentleShare = 0.8

// queue is a heap of combinations by weight, then region, then place.
type queue []*combination

func (q queue) Len() int      { return len(q) }
func (q queue) Swap(i, j int) { q[i], q[j] = q[j], q[i] }
func (q *queue) Push(x any)   { *q = append(*q, x.(*combination)) }
func (q *queue) Pop() any {
	old := *q
	x := old[len(old)-1]
	*q = old[:len(old)-1]
	return x
}

func (q queue) Less(i, j int) bool {
	a, b := q[i], q[j]
	if a.weight != b.weight {
		return a.weight < b.weight
	}
	if a.order != b.order {
		return a.order < b.order
	}
	return slices.Compare(a.at[:], b.at[:]) < 0
}

// start puts the lightest combination of every region in the queue.
func start(regions []*region) *queue {
	q := &queue{}
	for i, r := range regions {
		if r.size() == 0 {
			continue
		}
		c := &combination{in: r, order: i}
		c.weight = c.weigh()
		heap.Push(q, c)
	}
	return q
}

func (c *combination) weigh() int64 {
	sum := int64(0)
	for k, i := range c.at {
		sum += c.in.lists[k][i].weight
	}
	return sum
}

// last is the last index that was raised; 0 at the start.
func (c *combination) last() int {
	for k := len(c.at) - 1; k > 0; k-- {
		if c.at[k] > 0 {
			return k
		}
	}
	return 0
}

// follow puts the successors of a combination in the queue: each raises one
// index, and only from the last raised one up to the given one, so that every
// combination is reached once; what lies beyond is left out with it.
func (q *queue) follow(c *combination, upTo int) {
	for k := c.last(); k <= upTo; k++ {
		if c.at[k]+1 < len(c.in.lists[k]) {
			n := &combination{in: c.in, at: c.at, order: c.order}
			n.at[k]++
			n.weight = c.weight - c.in.lists[k][c.at[k]].weight + c.in.lists[k][n.at[k]].weight
			heap.Push(q, n)
		}
	}
}
