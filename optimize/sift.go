package optimize

import (
	"math"
	"slices"

	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
	"rungwright/ratings"
)

// verdict is what a cheap argument says of a combination.
type verdict int

const (
	survives   verdict = iota
	outOfBound         // no design with it can pass: proved
	outOfGuard         // the estimate excludes it by more than its guard
)

// guards are how far the truth may lie from the estimate before the search
// would go wrong, as factors on the estimate on its hopeful side. They are
// wider than what the estimate errs on realistic designs (stated by the tests
// of package ladder); the certificate counts every simulated design that errs
// further.
type guards struct{ meanLeast, meanMost, rippleLeast, stressLeast float64 }

func (e *evaluator) guard() guards { return guards{0.95, 1.025, 0.88, 0.97} }

// facts are what was learned of a ladder, or of its capacitors alone: with
// every bleeder of tooLow ohms or less the output falls short, with every one
// of tooHigh ohms or more the voltages are too high or the discharge too slow.
// dead are capacitors that fail whatever the diode and the bleeder.
type facts struct {
	tooLow, tooHigh float64
	dead            bool
}

// factsOf are those of the capacitors and the diode of a combination, or of
// the capacitors alone.
func (c *combination) factsOf(withDiode bool) *facts {
	key := [3]int{c.at[ofFirst], c.at[ofSecond], -1}
	if withDiode {
		key[2] = c.at[ofDiode]
	}
	f := c.in.facts[key]
	if f == nil {
		f = &facts{tooHigh: math.Inf(1)}
		c.in.facts[key] = f
	}
	return f
}

// excludes tells whether a bleeder is known not to serve.
func (f *facts) excludes(g Group) bool {
	return g.Part != nil && (bleederOhms(g) <= f.tooLow || bleederOhms(g) >= f.tooHigh)
}

// stressSeen is how the capacitors' greatest voltages compared with the
// estimate in the simulations of one topology and stage count: they depend on
// little else, so that a few narrow the guard.
type stressSeen struct {
	count    int
	least    []float64 // by position
	means    int
	windings int
	winding  float64 // least of the winding's worst ratios at full load
	meanMost float64 // of the mean at low line, likewise
}

// takeWinding adds the winding's worst ratio.
func (s *stressSeen) takeWinding(ratio float64) {
	if s.windings == 0 || ratio < s.winding {
		s.winding = ratio
	}
	s.windings++
}

// overloads tells whether the winding is overloaded whatever the parts: the
// current depends on the load and the stages, and little on the capacitors.
func (s *stressSeen) overloads() bool { return s.windings >= 6 && s.winding > 1.15 }

// takeMean adds a mean at low line and full load.
func (s *stressSeen) takeMean(ratio float64) {
	s.means++
	s.meanMost = max(s.meanMost, ratio)
}

// mean is the narrower guard of the mean, once six were seen.
func (s *stressSeen) mean(g float64) float64 {
	if s.means < 6 {
		return g
	}
	return min(g, 1.018*s.meanMost)
}

// take adds the ratios of one simulation.
func (s *stressSeen) take(ratios []float64) {
	s.count++
	if s.least == nil {
		s.least = ratios
	}
	for i, r := range ratios {
		s.least[i] = min(s.least[i], r)
	}
}

// guard is 1.2 % below the least that was seen at a position, zero before
// three were.
func (s *stressSeen) guard(position int) float64 {
	if s.count < 3 {
		return 0
	}
	return 0.988 * s.least[position]
}

// compare tells whether the estimate erred beyond the guard in a simulated
// trial.
func (e *evaluator) compare(c *combination, t *trial) (broken bool) {
	if len(t.corners) == 0 {
		return false
	}
	g := e.guard()
	o := guards{meanLeast: math.Inf(1), rippleLeast: math.Inf(1), stressLeast: math.Inf(1)}
	for k := range min(2, len(t.corners)) {
		s := &t.corners[k].Steady
		said := ladder.Estimate(t.circuits[k])
		mean := math.Abs(s.MeanV) / said.MeanV
		if k == 0 {
			o.meanMost, o.rippleLeast = mean, s.RippleV/said.RippleV
			c.in.stress.takeMean(mean)
			if t.winding > 0 {
				c.in.stress.takeWinding(t.winding)
			}
		} else {
			ratios := e.stressRatios(t, said.MeanV)
			o.meanLeast, o.stressLeast = mean, slices.Min(ratios)
			c.in.stress.take(ratios)
		}
	}
	return o.meanMost > g.meanMost || o.rippleLeast < g.rippleLeast || o.meanLeast < g.meanLeast || o.stressLeast < g.stressLeast
}

// stressRatios are the capacitors' greatest voltages over what the estimated
// output implies.
func (e *evaluator) stressRatios(t *trial, mean float64) []float64 {
	var out []float64
	crest := mean / float64(t.plan.Topology.OutputFactor(t.plan.Stages))
	for i, level := range t.plan.Topology.CapacitorLevels(t.plan.Stages) {
		x := &t.corners[1].Steady.Capacitors[i]
		out = append(out, max(x.MaxV, -x.MinV)/(level*crest))
	}
	return out
}

// sift tries the cheap arguments on a combination, those that hold for a
// whole block first. It returns the last index whose successors are still
// worth following.
func (e *evaluator) sift(c *combination) (upTo int, v verdict) {
	first, second := c.groups()
	if c.in.spread.second != nil && !c.in.samePart && first.Part == second.Part {
		return ofSecond, elsewhere // counted with the pairs of one part
	}
	if c.in.stress.overloads() {
		return c.last() - 1, outOfGuard
	}
	if c.last() <= ofSecond && !e.pairServes(c) {
		return ofSecond, outOfBound
	}
	p := c.plan()
	if c.last() <= ofSecond && c.weak(e, anyDiode, func() bool { return !e.pairMayReach(p) }) {
		return ofSecond, outOfGuard
	}
	if c.last() <= ofSecond && !e.pairMayBear(c, p) {
		return ofSecond, outOfGuard
	}
	if c.last() <= ofDiode {
		bare := *p
		bare.Bleeder = Group{}
		if c.weak(e, c.at[ofDiode], func() bool { return !e.mayReach(c, &bare) }) || !e.mayBear(c, &bare, bleederSag) {
			return ofDiode, outOfGuard
		}
	}
	if pair := c.factsOf(false); pair.dead {
		return ofBleeder, outOfGuard
	} else if pair.excludes(p.Bleeder) {
		return ofBleeder, outOfBound
	}
	if c.weakerThanFailed(e) {
		return ofBleeder, outOfGuard
	}
	f := c.factsOf(true)
	if f.excludes(p.Bleeder) {
		return ofBleeder, outOfGuard
	}
	if p.Bleeder.Part != nil && !e.mayReach(c, p) {
		f.tooLow = max(f.tooLow, bleederOhms(p.Bleeder))
		return ofBleeder, outOfGuard
	}
	if p.Bleeder.Part != nil && !e.mayBear(c, p, 0) {
		f.tooHigh = min(f.tooHigh, bleederOhms(p.Bleeder))
		return ofBleeder, outOfGuard
	}
	return ofBleeder, survives
}

// elsewhere is a combination that is counted in another region.
const elsewhere verdict = -1

// pairServes tells whether the capacitors of a combination can serve at all,
// whatever the diode and the bleeder.
func (e *evaluator) pairServes(c *combination) bool {
	first, second := c.groups()
	a, b := lowValue(first), endless
	if second.Part != nil {
		b = lowValue(second)
	}
	for _, s := range c.in.short { // what fell short falls short with less
		if a <= s[0] && b <= s[1] {
			return false
		}
	}
	if !e.reaches(c.in, a, b) {
		c.in.short = append(c.in.short, [2]float64{a, b})
		return false
	}
	p := c.plan()
	if !e.columnBears(p) {
		return false
	}
	c.factsOf(false).tooHigh = e.slowestBleeder(p)
	return true
}

// reaches tells whether a ladder with the capacitances [F], ideal diodes and
// no bleeder can be in the window within the ripple, by the optimistic bound.
func (e *evaluator) reaches(r *region, first, second float64) bool {
	s := &e.supply.Source
	c := ladder.Circuit{Topology: r.topology, Stages: r.stages, Load: e.load(true), Source: ladder.Source{
		Waveform: s.Waveform, Peak: float64(s.Peak) * (1 - float64(s.Line)), Frequency: float64(s.Frequency), Leakage: float64(s.Leakage)}}
	for _, other := range r.spread.isSecond(r.topology, r.stages) {
		k := ladder.Capacitor{C: first}
		if other {
			k.C = second
		}
		c.Capacitors = append(c.Capacitors, k)
	}
	for range r.topology.DiodeCount(r.stages) {
		c.Diodes = append(c.Diodes, ladder.Diode{IS: 1e-6, N: 1})
	}
	most, ripple := ladder.Bound(c, e.supply.lowest())
	want := float64(e.supply.Output.Ripple)
	return most >= e.supply.lowest() && (want == 0 || ripple <= want)
}

// columnBears tells whether the smoothing column's voltage limits add up to
// the output at high line, which is at least what the window asks at low line
// times the ratio of the lines.
func (e *evaluator) columnBears(p *Plan) bool {
	line := float64(e.supply.Source.Line)
	need := e.supply.lowest() * (1 + line) / (1 - line)
	sum, top := 0.0, 0.0
	for i, smoothing := range p.Topology.SmoothingColumn(p.Stages) {
		if smoothing {
			g := p.Capacitors[i]
			top = ratings.VoltageLimit(e.policy, g.Part, e.supply.Surroundings.Ambient) / worstShare(g)
			sum += top
		}
	}
	if p.Topology == ladder.ParallelFed {
		sum = top
	}
	return sum >= need
}

// pairMayReach is the estimate at low line and full load with diodes better
// than any and no bleeder.
func (e *evaluator) pairMayReach(p *Plan) bool {
	bare := *p
	bare.Bleeder = Group{}
	c := e.circuit(&bare, e.conditions[0])
	for i := range c.Diodes {
		c.Diodes[i] = ladder.Diode{IS: 1e-3, N: 1, RS: 0}
	}
	return e.inReach(ladder.Estimate(c), e.guard())
}

// mayReach is the estimate at low line and full load.
func (e *evaluator) mayReach(c *combination, p *Plan) bool {
	g := e.guard()
	g.meanMost = c.in.stress.mean(g.meanMost)
	return e.inReach(ladder.Estimate(e.circuit(p, e.conditions[0])), g)
}

// inReach compares an estimate with window and ripple, the guard allowed for.
func (e *evaluator) inReach(said ladder.Estimated, g guards) bool {
	want := float64(e.supply.Output.Ripple)
	return said.MeanV*g.meanMost >= e.supply.lowest() && (want == 0 || said.RippleV*g.rippleLeast <= want)
}

// slowestBleeder is the resistance from which on a bleeder cannot empty even
// the smoothing column in time; the coupling capacitors only add to it.
func (e *evaluator) slowestBleeder(p *Plan) float64 {
	want := e.supply.Output.Discharge
	if want.Below == 0 {
		return math.Inf(1)
	}
	c := e.circuit(p, condition{line: 1, values: 0, junction: e.supply.Surroundings.Ambient})
	for i := range c.Capacitors { // the least that the column can hold
		c.Capacitors[i].C = smallestUnderBias(c.Capacitors[i])
	}
	falls := math.Log(e.supply.lowest() / float64(want.Below))
	if falls <= 0 {
		return math.Inf(1)
	}
	return float64(want.Within) / (falls * columnCapacitance(&c)) * (1 + 1e-9)
}

// smallestUnderBias is the least capacitance at any voltage [F].
func smallestUnderBias(k ladder.Capacitor) float64 {
	if n := len(k.Bias); n > 0 {
		return k.C * k.Bias[n-1].Share
	}
	return k.C
}

// mayBear is the estimate at high line and least load, less what a bleeder not
// yet chosen may draw, for the window's top and the voltage limits.
func (e *evaluator) mayBear(c *combination, p *Plan, sag float64) bool {
	g := e.guard()
	mean := ladder.Estimate(e.circuit(p, e.conditions[1])).MeanV
	if e.supply.Output.Discharge.Below > 0 {
		mean *= 1 - sag
	}
	if mean*g.meanLeast > e.supply.highest() {
		return false
	}
	if !e.capacitorsBear(c, p, mean) {
		return false
	}
	crest := mean / float64(p.Topology.OutputFactor(p.Stages))
	d := p.Diodes[0]
	return ratings.ReverseLimit(e.policy, d.Part) >= 2*crest*g.stressLeast*diodeShare(d.Series)
}

// pairMayBear is the same for capacitors alone: diodes better than any, less
// the drop of the worst that the search has.
func (e *evaluator) pairMayBear(c *combination, p *Plan) bool {
	bare := *p
	bare.Bleeder = Group{}
	circuit := e.circuit(&bare, e.conditions[1])
	for i := range circuit.Diodes {
		circuit.Diodes[i] = ladder.Diode{IS: 1e-3, N: 1, RS: 0, CJ0: c.in.worstCJ0, VJ: 0}
	}
	mean := ladder.Estimate(circuit).MeanV - c.in.worstDrop*float64(p.Topology.OutputFactor(p.Stages))
	if e.supply.Output.Discharge.Below > 0 {
		mean *= 1 - bleederSag
	}
	return mean*e.guard().meanLeast <= e.supply.highest() && e.capacitorsBear(c, p, mean)
}

// capacitorsBear tells whether every capacitor may bear what a mean output
// implies, the guard allowed for.
func (e *evaluator) capacitorsBear(c *combination, p *Plan, mean float64) bool {
	crest := mean / float64(p.Topology.OutputFactor(p.Stages))
	for i, level := range p.Topology.CapacitorLevels(p.Stages) {
		k := p.Capacitors[i]
		share := max(e.guard().stressLeast, c.in.stress.guard(i))
		if ratings.VoltageLimit(e.policy, k.Part, e.supply.Surroundings.Ambient) < level*crest*share*worstShare(k) {
			return false
		}
	}
	return true
}

// bleederSag is what a bleeder of a third of the full load, the most that the
// search allows, takes from the no-load output of a ladder that stays in its
// window at full load, at most.
const bleederSag = 0.06

// strength is what decides whether an output suffices, beside the diode: the
// capacitances and the bleeder.
type strength struct {
	diode               int
	first, second, ohms float64
}

func (c *combination) strength(e *evaluator) strength {
	s := c.capacitances(e)
	s.diode, s.ohms = c.at[ofDiode], math.Inf(1)
	if g := c.in.lists[ofBleeder][c.at[ofBleeder]].group; g.Part != nil {
		s.ohms = bleederOhms(g)
	}
	return s
}

// capacitances are the lowest values at the bias that the groups work at.
func (c *combination) capacitances(e *evaluator) strength {
	first, second := c.groups()
	one, two := c.in.levels()
	crest := float64(e.supply.Source.Peak)
	s := strength{first: workingValue(first, one*crest), second: endless}
	if second.Part != nil {
		s.second = workingValue(second, two*crest)
	}
	return s
}

// workingValue is a group's lowest capacitance at a bias [F].
func workingValue(g Group, bias float64) float64 {
	k := g.Part.Capacitor
	return lowValue(g) * float64(k.CapacitanceAt(quantity.Volts(bias/float64(g.Series)))/k.Capacitance)
}

// anyDiode stands for diodes better than any.
const anyDiode = -1

// weak tells whether the capacitors fall short by the estimate with a diode:
// at once where no more capacitance fell short before, else by asking.
func (c *combination) weak(e *evaluator, diode int, short func() bool) bool {
	s := c.capacitances(e)
	for _, f := range c.in.weak[diode] {
		if s.first <= f.first && s.second <= f.second {
			return true
		}
	}
	if !short() {
		return false
	}
	kept := slices.DeleteFunc(c.in.weak[diode], func(f strength) bool { return f.first <= s.first && f.second <= s.second })
	c.in.weak[diode] = append(kept, s)
	return true
}

// weakerThanFailed tells whether a simulated combination of the region fell
// short with the same diode, no less capacitance and no heavier bleeder.
func (c *combination) weakerThanFailed(e *evaluator) bool {
	s := c.strength(e)
	for _, f := range c.in.failed {
		if f.diode == s.diode && s.first <= f.first && s.second <= f.second && s.ohms <= f.ohms {
			return true
		}
	}
	return false
}

// learn takes the facts of a simulated trial: what fell short with a bleeder
// falls short with every heavier one, what stood too high with every lighter.
func (e *evaluator) learn(c *combination, t *trial) {
	if t.ofCapacitors {
		c.factsOf(false).dead = true
	}
	if t.side == shortfall {
		c.in.failed = append(c.in.failed, c.strength(e))
	}
	if t.plan.Bleeder.Part == nil || len(t.failed) == 0 {
		return
	}
	f, r := c.factsOf(true), bleederOhms(t.plan.Bleeder)
	switch t.side {
	case shortfall:
		f.tooLow = max(f.tooLow, r)
	case excess:
		f.tooHigh = min(f.tooHigh, r)
	}
}
