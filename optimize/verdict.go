package optimize

import (
	"math"

	"rungwright/optimize/ladder"
	"rungwright/ratings"
)

// match is what is known of a frame's capacitors and diode before a bleeder is
// chosen.
type match struct {
	version int // of the lessons that it was judged by
	dead    bool
	sums    balance
	low     float64 // corrected estimate of the output at the low corner without a bleeder [V]
	high    float64 // at the high corner [V]
}

// balance is the charge balance of a choice of capacitors.
type balance struct {
	drop, ripple [2]float64 // per charge, at the low and the high corner [1/F]
	elastance    float64    // of the output column at its smallest [1/F]
	crest        float64    // mean crest that every capacitor may bear [V]
	column       float64    // output that the column may bear [V]
}

// sum adds up the capacitors chosen before a depth and the candidate there.
func (n *node) sum(last int) balance {
	b := balance{crest: math.Inf(1)}
	for d := 0; d <= last; d++ {
		c := n.chosen(d)
		for k := range 2 {
			b.drop[k] += c.drop[k]
			b.ripple[k] += c.ripple[k]
		}
		b.elastance += c.elastance
		b.crest = min(b.crest, c.crest)
		b.column += c.column
	}
	return b
}

// judge is the cheap test of the candidate at a node's depth.
func (w *treeWalk) judge(n *node) (class, bool) {
	switch n.f.slots[n.depth].kind {
	case capacitorSlot:
		return w.judgeCapacitors(n)
	case diodeSlot:
		return cutEstimate, !w.curveServes(n)
	}
	return cutEstimate, !w.bleederServes(n)
}

// judgeCapacitors tests capacitors whatever diode and bleeder come.
func (w *treeWalk) judgeCapacitors(n *node) (class, bool) {
	for d := range n.depth {
		if n.chosen(d).groups[0].Part == n.here().groups[0].Part {
			return cutRepeated, true
		}
	}
	b := n.sum(n.depth)
	room := w.room[n.f.id][n.depth]
	b.drop[0] += room.drop[0]
	b.ripple[0] += room.ripple[0]
	top := n.f.survey.factor * n.f.survey.crest[0] * reachAbove
	switch {
	case top-sureDrop*w.charge*b.drop[0] < w.lowest:
		return cutBalance, true
	case w.ripple > 0 && n.f.survey.weights.Sum && sureRipple*w.charge*b.ripple[0] > w.ripple:
		return cutBalance, true
	}
	return cutBalance, b.column+room.column < n.f.survey.needV
}

// position is where a node's capacitors and diode lie among the anchors, with
// a current that is drawn beside the load's.
func (w *treeWalk) position(f *frame, b balance, diode Group, extra float64) position {
	ripple := b.ripple[0]
	if ripple == 0 {
		ripple = b.drop[0]
	}
	return position{f.topology, f.stages, diode, [3]float64{math.Log(b.drop[0]), math.Log(ripple), math.Log(w.current + extra)}}
}

// interpolation is how much further a curve may err than the estimate that it
// stands for: it takes all capacitors for equal and ideal.
const interpolation = 0.03

// curveServes tests a diode with the capacitors by the curve of the estimate.
func (w *treeWalk) curveServes(n *node) bool {
	f, b := n.f, n.sum(n.depth-1)
	c := f.survey.curveOf(n.here().groups[0])
	p := w.position(f, b, n.here().groups[0], 0)
	mean := w.lessons.nearest(&p, hasMean(0))
	factor, ripple := 1.0, 1.0
	if mean.anchor != nil {
		factor, ripple = mean.mean[0], mean.ripple
	}
	said := c.at(0, c.mean[0], b.drop[0]) * factor
	if said*(1+w.lessons.guard(trustLow, mean)+interpolation) < w.lowest {
		return false
	}
	if w.ripple > 0 && f.survey.weights.Sum {
		said := c.at(0, c.ripple, b.drop[0]) * b.ripple[0] * ripple
		if said*(1-min(0.9, w.lessons.guard(trustRipple, mean)+2*interpolation)) > w.ripple {
			return false
		}
	}
	high := w.sagged(f, b, c.at(1, c.mean[1], b.drop[1])) * (1 - trustHigh.far*w.lessons.widened - interpolation)
	crest := high / f.survey.factor * (1 - trustStress.far*w.lessons.widened)
	return high <= w.highest && crest <= min(b.crest, n.here().crest)
}

// sagged is the lowest that the strongest bleeder can pull an output at the
// high corner.
func (w *treeWalk) sagged(f *frame, b balance, output float64) float64 {
	strongest := w.strongest[f.id]
	return output - mostSag*output/strongest/w.frequency*b.drop[1]
}

// mostSag is how much more than the charge balance a bleeder may pull the
// output down.
const mostSag = 1.25

// pairServes judges capacitors and diode by the corrected estimate of the real
// circuit: at the low corner without a bleeder, at the high one with the
// strongest. What it learns it leaves in the pair.
func (w *treeWalk) pairServes(n *node) bool {
	f := n.f
	if n.pair == nil {
		n.pair = &match{version: -1, sums: n.sum(f.diodeAt() - 1)}
	}
	p := n.pair
	if p.version == len(w.lessons.anchors) {
		return !p.dead
	}
	p.version = len(w.lessons.anchors)
	bare := f.plan(n.at[:len(f.slots)])
	bare.Bleeder = Group{}
	x := w.forecast(f, bare, p.sums)
	p.low, p.high = x.mean[0], x.mean[1]
	x.mean[1] = w.sagged(f, p.sums, x.mean[1])
	p.dead = w.misses(f, bare, x, true)
	return !p.dead
}

// forecast is the corrected estimate of a plan.
type forecast struct {
	mean   [2]float64
	ripple float64
	low    correction
	high   correction
	use    correction
}

func (w *treeWalk) forecast(f *frame, p *Plan, b balance) forecast {
	extra := 0.0
	if p.Bleeder.Part != nil {
		extra = float64(w.e.supply.Output.Voltage) / bleederOhms(p.Bleeder)
	}
	at := w.position(f, b, p.Diodes[0], extra)
	x := forecast{low: w.lessons.nearest(&at, hasMean(0)), high: w.lessons.nearest(&at, hasMean(1))}
	x.use = w.lessons.nearest(&at, func(a *anchor) bool { return len(a.used) > 0 })
	said := ladder.Estimate(w.e.circuit(p, w.e.conditions[0]))
	x.mean[0], x.ripple = said.MeanV, said.RippleV
	x.mean[1] = ladder.Estimate(w.e.circuit(p, w.e.conditions[1])).MeanV
	if x.low.anchor != nil {
		x.mean[0] *= x.low.mean[0]
		x.ripple *= x.low.ripple
	}
	if x.high.anchor != nil {
		x.mean[1] *= x.high.mean[1]
	}
	return x
}

// misses tells whether a forecast lies beyond its guard, and keeps the claims
// that came nearest for the audit. A bare plan has no bleeder yet.
func (w *treeWalk) misses(f *frame, p *Plan, x forecast, bare bool) bool {
	low, ripple, high := w.lessons.guard(trustLow, x.low), w.lessons.guard(trustRipple, x.low), w.lessons.guard(trustHigh, x.high)
	if over := w.lowest/(x.mean[0]*(1+low)) - 1; over > 0 {
		return w.claim(claim{p, tooLow, over})
	}
	if over := x.ripple*(1-ripple)/w.ripple - 1; w.ripple > 0 && over > 0 {
		return w.claim(claim{p, tooRippled, over})
	}
	if over := x.mean[1]*(1-high)/w.highest - 1; over > 0 {
		if bare {
			return true
		}
		return w.claim(claim{p, tooHigh, over})
	}
	return w.overstressed(f, p, x, high)
}

// overstressed tells whether a part would be: by voltage at the high corner,
// or in another rating that an anchor near by broke with the same part.
func (w *treeWalk) overstressed(f *frame, p *Plan, x forecast, high float64) bool {
	stress := w.lessons.guard(trustStress, x.high) + high
	crest := x.mean[1] / f.survey.factor * (1 - min(0.9, stress))
	for i, g := range p.Capacitors {
		share := 1.0
		if x.high.anchor != nil {
			share = x.high.stress[i]
		}
		if f.survey.bearing(g) < f.survey.levels[i]*crest*share {
			return true
		}
	}
	share := 1.0
	if x.high.anchor != nil {
		share = x.high.inverse
	}
	if w.reverse(p.Diodes[0]) < 2*crest*share {
		return true
	}
	if x.use.anchor == nil {
		return false
	}
	margin := w.lessons.guard(trustUse, x.use)
	over := func(u use) bool { return x.use.used[u]*(1-margin) > 1 }
	for _, q := range p.placings() {
		if over(use{q.group, q.role}) {
			return true
		}
	}
	return over(use{Group{Part: w.e.winding}, RoleSource})
}

// bleederServes tests a bleeder for a pair: it must bear the output, empty the
// column in time, and leave the output in the window.
func (w *treeWalk) bleederServes(n *node) bool {
	c, p := n.here(), n.pair
	if c.groups[0].Part == nil {
		return true
	}
	draws := p.high / c.ohms / w.frequency
	high := (p.high - mostSag*draws*p.sums.drop[1]) * (1 - 2*trustHigh.far*w.lessons.widened)
	if c.most < high {
		return false
	}
	if d := w.e.supply.Output.Discharge; c.ohms/p.sums.elastance*math.Log(high/float64(d.Below)) > float64(d.Within) {
		return false
	}
	low := p.low - leastSag*p.low/c.ohms/w.frequency*p.sums.drop[0]
	return low*(1+trustLow.far*w.lessons.widened) >= w.lowest
}

// leastSag is the share of the charge balance by which a bleeder surely pulls
// the output down.
const leastSag = 0.6

// planServes judges a whole plan by its own corrected estimate.
func (w *treeWalk) planServes(n *node, p *Plan) bool {
	x := w.forecast(n.f, p, n.pair.sums)
	return !w.misses(n.f, p, x, false) && w.drains(n, x)
}

// drains tells whether the bleeder empties the output in time, by what the
// discharge took near by.
func (w *treeWalk) drains(n *node, x forecast) bool {
	d, c := w.e.supply.Output.Discharge, n.here()
	if d.Below == 0 || x.high.anchor == nil || math.IsNaN(x.high.drain) {
		return true
	}
	column := c.ohms / n.pair.sums.elastance * math.Log(x.mean[1]/float64(d.Below))
	return column*x.high.drain*(1-w.lessons.guard(trustDrain, x.high)) <= float64(d.Within)
}

// reverse is the inverse voltage that a string of diodes may bear [V].
func (w *treeWalk) reverse(g Group) float64 {
	return ratings.ReverseLimit(w.e.policy, g.Part) / diodeShare(g.Series)
}
