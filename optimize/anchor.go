package optimize

import (
	"math"

	"rungwright/catalog"
	"rungwright/optimize/ladder"
	"rungwright/ratings"
)

// anchor is what one simulation taught: how the actual figures compare with
// the estimated ones. Designs of the same topology and stage count that lie
// near it are estimated with its corrections and a narrower guard.
type anchor struct {
	topology ladder.Topology
	stages   int
	diode    Group
	where    [3]float64 // logarithms of the drop, the ripple and the load current
	// actual over estimated; NaN where the simulation did not come so far
	mean    [2]float64
	ripple  float64
	stress  []float64 // of each capacitor's greatest voltage, to its level of the actual output
	inverse float64   // of the diodes' inverse voltage, likewise
	drain   float64   // of the discharge time, to the column's alone
	used    map[use]float64
	trial   *trial
}

// use is a group in a place, for what else its rating may hold against it.
type use struct {
	group Group
	role  Role
}

// lessons are the anchors so far.
type lessons struct {
	anchors []anchor
	widened float64 // factor on the guards, raised when one is broken
}

// correction is what the nearest anchor says of a design, and how far it is.
type correction struct {
	*anchor
	distance float64 // infinite without an anchor
	other    bool    // the anchor has another diode
}

// trust is how far an estimate may err: far from any anchor, and near one by a
// fixed part, a part for each unit of distance and a part for another diode.
// The figures are stated in the certificate, checked on every simulation, and
// widened when one is broken.
type trust struct{ far, near, slope, other float64 }

var (
	trustLow    = trust{0.05, 0.002, 0.010, 0.03}  // of the output at the low corner
	trustHigh   = trust{0.05, 0.002, 0.006, 0.015} // of the output at the high corner
	trustRipple = trust{0.35, 0.008, 0.22, 0.12}
	trustStress = trust{0.10, 0.002, 0.008, 0.005} // of the shares of the output that parts bear
	trustUse    = trust{1e9, 0.01, 0.10, 0.50}     // of other ratings
	trustDrain  = trust{1e9, 0.02, 0.05, 0.01}     // of the discharge time
)

// guard is the share by which a corrected estimate may err.
func (l *lessons) guard(t trust, c correction) float64 {
	g := t.far
	if c.anchor != nil {
		g = t.near + t.slope*c.distance
		if c.other {
			g += t.other
		}
		g = min(g, t.far)
	}
	return min(0.9, g*l.widened)
}

// nearest finds the anchor that is nearest and has a figure.
func (l *lessons) nearest(p *position, has func(*anchor) bool) correction {
	best, least := correction{distance: infinite}, infinite
	for i := range l.anchors {
		a := &l.anchors[i]
		if a.topology != p.topology || a.stages != p.stages || !has(a) {
			continue
		}
		d, other := p.distance(a), differs(p, a)
		if d+other < least {
			best, least = correction{a, d, other > 0}, d+other
		}
	}
	return best
}

// position is where a design lies among the anchors.
type position struct {
	topology ladder.Topology
	stages   int
	diode    Group
	where    [3]float64
}

// distance counts e-folds of charge balance and current.
func (p *position) distance(a *anchor) float64 {
	d := 0.0
	for i := range p.where {
		d += math.Abs(p.where[i] - a.where[i])
	}
	return d
}

func hasMean(corner int) func(*anchor) bool {
	return func(a *anchor) bool { return !math.IsNaN(a.mean[corner]) }
}

// learn takes in a simulated trial.
func (l *lessons) learn(s *surveyor, p position, t *trial) {
	a := anchor{topology: p.topology, stages: p.stages, diode: p.diode, where: p.where,
		mean: [2]float64{math.NaN(), math.NaN()}, ripple: math.NaN(), inverse: math.NaN(), drain: math.NaN(), used: map[use]float64{}, trial: t}
	for k := range min(2, len(t.corners)) {
		is, said := &t.corners[k].Steady, ladder.Estimate(t.circuits[k])
		a.mean[k] = math.Abs(is.MeanV) / said.MeanV
		if k == 0 {
			a.ripple = is.RippleV / said.RippleV
		} else {
			a.takeStress(s, t, math.Abs(is.MeanV))
		}
	}
	a.takeUses(s.e, t)
	a.takeDrain(s, t)
	l.anchors = append(l.anchors, a)
}

// takeStress notes voltages at the high corner in units of what the ideal
// ladder would share.
func (a *anchor) takeStress(s *surveyor, t *trial, mean float64) {
	crest := mean / s.factor
	for i, level := range s.levels {
		x := &t.corners[1].Steady.Capacitors[i]
		a.stress = append(a.stress, max(x.MaxV, -x.MinV)/(level*crest))
	}
	a.inverse = 0
	for i := range t.corners[1].Steady.Diodes {
		a.inverse = max(a.inverse, t.corners[1].Steady.Diodes[i].InverseV/(2*crest))
	}
}

// takeUses notes how far each group is used in ratings other than voltage.
func (a *anchor) takeUses(e *evaluator, t *trial) {
	for _, p := range t.plan.placings() {
		if p.role == RoleBleeder {
			continue
		}
		uses := e.uses(t, &p)
		if p.group.Part.Kind == catalog.KindDiode && len(t.startUp.Diodes) > 0 {
			uses = append(uses, e.surges(t, &p)...)
		}
		for i := range uses {
			uses[i].PeakV, uses[i].InverseV = 0, 0
		}
		a.used[use{p.group, p.role}] = worstRatio(e, p.group.Part, uses)
	}
	if e.winding != nil {
		var uses []ratings.Use
		for k := range t.corners {
			uses = append(uses, sourceUse(t, k, e.supply.Surroundings.Ambient, e.supply.Source.Frequency))
		}
		a.used[use{Group{Part: e.winding}, RoleSource}] = worstRatio(e, e.winding, uses)
	}
}

// worstRatio is how far a part's worst use goes.
func worstRatio(e *evaluator, part *catalog.Part, uses []ratings.Use) float64 {
	worst := 0.0
	for _, s := range ratings.Judge(e.policy, part, uses) {
		worst = max(worst, s.Ratio)
	}
	return worst
}

// takeDrain notes the discharge time against that of the column alone.
func (a *anchor) takeDrain(s *surveyor, t *trial) {
	below := float64(s.e.supply.Output.Discharge.Below)
	if below == 0 || t.drainedS == 0 || math.IsInf(t.drainedS, 1) || t.plan.Bleeder.Part == nil {
		return
	}
	ohms := bleederOhms(t.plan.Bleeder) * (1 + float64(t.plan.Bleeder.Part.Resistor.ToleranceHigh))
	a.drain = t.drainedS / (ohms / s.elastance(t.plan) * math.Log(math.Abs(t.corners[1].Steady.MeanV)/below))
}

// elastance is the output column's, with every capacitor at its smallest under
// bias [1/F].
func (s *surveyor) elastance(p *Plan) float64 {
	sum := 0.0
	for i, g := range p.Capacitors {
		if s.column[i] {
			sum += float64(g.Series) / float64(g.Parallel) / (float64(smallest(g.Part.Capacitor)) * valueFactor(g, 1))
		}
	}
	return sum
}
