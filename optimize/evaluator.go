package optimize

import (
	"context"
	"errors"
	"fmt"
	"math"
	"strings"
	"sync"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
	"rungwright/optimize/order"
	"rungwright/ratings"
)

// evaluator judges plans for one supply.
type evaluator struct {
	supply     *Supply // its source resolved
	wanted     Supply  // as written
	winding    *catalog.Part
	catalog    *catalog.Catalog
	policy     *ratings.Policy
	terms      order.Terms
	conditions []condition

	mu     sync.Mutex
	fits   map[string]DiodeFit
	diodes map[diodeKeyAt]ladder.Diode
	prices map[priceKey]priced
}

// newEvaluator resolves the source and the policy. Its error is the person's:
// a part or policy that does not exist.
func newEvaluator(s Supply, c *catalog.Catalog, policy *ratings.Policy) (*evaluator, error) {
	resolved := s
	source, winding, err := resolveSource(s.Source, c)
	if err == nil && policy == nil {
		policy, err = ratings.ReadPolicy(s.Derating)
	}
	for _, x := range s.Extras {
		if c.Find(x.Part) == nil {
			err = errors.Join(err, fmt.Errorf("extras: %q is not in the catalog%s", x.Part, nearText(c, x.Part)))
		}
	}
	if err != nil {
		return nil, err
	}
	resolved.Source = source
	if winding == nil && source.Power > 0 {
		winding = anonymousWinding(source)
	}
	e := &evaluator{supply: &resolved, wanted: s, winding: winding, catalog: c, policy: policy,
		terms: order.Terms{Currency: s.Build.Currency, IgnoreStock: true},
		fits:  map[string]DiodeFit{}, diodes: map[diodeKeyAt]ladder.Diode{}, prices: map[priceKey]priced{}}
	e.conditions = conditionsFor(e.supply)
	return e, nil
}

// anonymousWinding is a source given by values, for the policy to judge.
func anonymousWinding(s Source) *catalog.Part {
	return &catalog.Part{Number: "source", Kind: catalog.KindWinding,
		Winding: &catalog.Winding{Peak: s.Peak, Power: s.Power, CentreTap: s.CentreTap}}
}

// trial is a plan with what was found of it.
type trial struct {
	plan         *Plan
	circuits     []ladder.Circuit // by condition
	corners      []Corner
	targets      []Target
	stresses     []ratings.Stress
	startUp      ladder.StartUp
	winding      float64  // worst ratio of the winding so far
	ofCapacitors bool     // what is broken depends on the capacitors alone
	side         side     // which way it misses, where that is clear
	failed       []string // what it breaks, in words; empty: nothing so far
	storedJ      float64
	drainedS     float64 // discharge time; infinite without a bleeder
}

// side is the way a trial misses its targets.
type side int

const (
	unclear   side = iota
	shortfall      // too little output or too much ripple: a heavier bleeder makes it worse
	excess         // too much voltage: a lighter bleeder makes it worse
)

// fails notes a broken target.
func (t *trial) fails(format string, args ...any) {
	t.failed = append(t.failed, fmt.Sprintf(format, args...))
}

// simulate solves the conditions in order. With quick it stops at the first
// broken target.
func (e *evaluator) simulate(ctx context.Context, t *trial, quick bool) error {
	for k, at := range e.conditions {
		c := e.circuit(t.plan, at)
		s, err := ladder.Solve(ctx, c, settings(quick))
		if ctx.Err() != nil {
			return ctx.Err()
		}
		if err != nil {
			t.fails("%s: %s", at.name, err)
			return nil
		}
		t.circuits = append(t.circuits, c)
		t.corners = append(t.corners, Corner{Name: at.name, LoadA: s.LoadA, Line: at.line, Ambient: float64(e.supply.Surroundings.Ambient), Steady: s})
		e.checkCorner(t, k)
		if quick {
			e.checkParts(t)
		}
		if quick && len(t.failed) > 0 {
			return nil
		}
	}
	t.storedJ = storedEnergy(&t.circuits[1], &t.corners[1].Steady)
	return nil
}

// settings are coarser while the search only looks whether a plan passes: the
// answer itself is simulated again at the solver's own accuracy.
func settings(quick bool) *ladder.Settings {
	if quick {
		return &ladder.Settings{Tolerance: 1e-5}
	}
	return nil
}

// checkCorner notes what a corner breaks of window and ripple.
func (e *evaluator) checkCorner(t *trial, k int) {
	c := &t.corners[k]
	v := math.Abs(c.Steady.MeanV)
	if v < e.supply.lowest() {
		t.side = shortfall
		t.fails("%s: output %s is below %s", c.Name, volts(v), volts(e.supply.lowest()))
	}
	if v > e.supply.highest() {
		t.side = excess
		t.fails("%s: output %s is above %s", c.Name, volts(v), volts(e.supply.highest()))
	}
	if want := float64(e.supply.Output.Ripple); want > 0 && c.Steady.RippleV > want {
		t.side = shortfall
		t.fails("%s: ripple %s is above %s", c.Name, volts(c.Steady.RippleV), volts(want))
	}
}

func volts(v float64) string { return quantity.Volts(v).String() }

// uses lists how the trial's circuits use each placing.
func (e *evaluator) uses(t *trial, p *placing) []ratings.Use {
	var out []ratings.Use
	for k := range t.corners {
		for _, ref := range p.refs {
			out = append(out, e.use(t, k, p, ref))
		}
	}
	return out
}

// use is one position at one corner.
func (e *evaluator) use(t *trial, k int, p *placing, ref string) ratings.Use {
	c, s := &t.corners[k], &t.corners[k].Steady
	u := ratings.Use{Ref: ref, Corner: c.Name, Ambient: e.supply.Surroundings.Ambient, Frequency: e.supply.Source.Frequency}
	series, side := float64(p.group.Series), float64(p.group.Parallel)
	switch p.group.Part.Kind {
	case catalog.KindCapacitor:
		x := &s.Capacitors[index(ref)]
		share := worstShare(p.group)
		u.PeakV = quantity.Volts(max(x.MaxV, -x.MinV) * share)
		u.ACV = quantity.Volts((x.MaxV - x.MinV) / (2 * math.Sqrt2) * share)
		u.RippleA = quantity.Amps(x.RMSA / side)
		u.SlewVps = quantity.VoltPerSecond(s.Source[0].PeakA / t.circuits[k].Capacitors[index(ref)].C * share)
	case catalog.KindDiode:
		x := &s.Diodes[index(ref)]
		u.InverseV = quantity.Volts(x.InverseV * diodeShare(p.group.Series))
		u.AverageA, u.PeakA, u.RMSA = quantity.Amps(math.Abs(x.AverageA)), quantity.Amps(x.PeakA), quantity.Amps(x.RMSA)
		u.LossW = quantity.Watts(x.LossW / series)
	case catalog.KindResistor:
		e.resistorUse(t, k, p, &u)
	}
	return u
}

// resistorUse is a piece of the bleeder or of a surge resistor.
func (e *evaluator) resistorUse(t *trial, k int, p *placing, u *ratings.Use) {
	s := &t.corners[k].Steady
	n, r := float64(p.group.Series), float64(p.group.Part.Resistor.Resistance)
	if p.role == RoleBleeder {
		v := max(math.Abs(s.MaxV), math.Abs(s.MinV)) * resistorShare(p.group)
		u.WorkingV = quantity.Volts(v)
		u.PowerW = quantity.Watts(v * v / r)
		return
	}
	i := s.Source[0].RMSA / float64(p.group.Parallel)
	u.PowerW = quantity.Watts(i * i * r)
	u.WorkingV = quantity.Volts(s.Source[0].PeakA * r)
	if len(t.startUp.Source) > 0 {
		u.PulseJ = quantity.Joules(t.startUp.Source[0].Squared * r)
		u.WorkingV = max(u.WorkingV, quantity.Volts(t.startUp.Source[0].PeakA*r/n))
	}
}

// worstShare is the part of the group's voltage that its worst capacitor
// bears: the smallest of the string, by tolerance.
func worstShare(g Group) float64 {
	if g.Series == 1 {
		return 1
	}
	k := g.Part.Capacitor
	return ratings.WorstShare(g.Series, 1+float64(k.ToleranceHigh), 1-float64(k.ToleranceLow))
}

// diodeShare is the part of a string's voltage that its worst diode bears:
// general practice allows 0.8 of the sum (common practice, no source).
func diodeShare(series int) float64 {
	if series == 1 {
		return 1
	}
	return 1 / (0.8 * float64(series))
}

// resistorShare is the part of the voltage that the largest of a string
// bears, by tolerance.
func resistorShare(g Group) float64 {
	if g.Series == 1 {
		return 1
	}
	r := g.Part.Resistor
	high, low := 1+float64(r.ToleranceHigh), 1-float64(r.ToleranceLow)
	return high / (high + float64(g.Series-1)*low)
}

// index is the position of a reference such as C12, counted from 0.
func index(ref string) int {
	n := 0
	for _, r := range ref {
		if r >= '0' && r <= '9' {
			n = 10*n + int(r-'0')
		}
	}
	return n - 1
}

// partsPass tells whether every part keeps the policy at the corners, and
// else names the first that does not.
func (e *evaluator) partsPass(t *trial) (string, bool) {
	for _, p := range t.plan.placings() {
		uses := e.uses(t, &p)
		if !ratings.Passes(e.policy, p.group.Part, uses) {
			for _, s := range ratings.Judge(e.policy, p.group.Part, uses) {
				if s.Over {
					return fmt.Sprintf("%s (%s): %s at %.0f %% of its limit, %s", s.Ref, s.Part, s.Quantity, 100*s.Ratio, s.Corner), false
				}
			}
		}
	}
	return "", true
}

// checkParts notes the first part that breaks the policy at the corners so
// far.
func (e *evaluator) checkParts(t *trial) {
	if e.winding != nil {
		uses := []ratings.Use{sourceUse(t, len(t.corners)-1, e.supply.Surroundings.Ambient, e.supply.Source.Frequency)}
		for _, s := range ratings.Judge(e.policy, e.winding, uses) {
			t.winding = max(t.winding, s.Ratio)
			if s.Over {
				t.fails("%s (%s): %s at %.0f %% of its limit, %s", s.Ref, s.Part, s.Quantity, 100*s.Ratio, s.Corner)
			}
		}
		if len(t.failed) > 0 {
			return
		}
	}
	if why, ok := e.partsPass(t); !ok {
		t.fails("%s", why)
		if strings.Contains(why, "voltage") {
			t.side = excess
			t.ofCapacitors = strings.HasPrefix(why, "C") && strings.Contains(why, "full load")
		}
	}
}

// sourceUse is what the winding bears at a corner.
func sourceUse(t *trial, k int, ambient quantity.Celsius, frequency quantity.Hertz) ratings.Use {
	u := ratings.Use{Ref: "T1", Corner: t.corners[k].Name, Ambient: ambient, Frequency: frequency}
	for _, end := range t.corners[k].Steady.Source {
		u.ApparentVA += quantity.VoltAmps(end.ApparentVA)
		u.RMSA = max(u.RMSA, quantity.Amps(end.RMSA))
	}
	return u
}
