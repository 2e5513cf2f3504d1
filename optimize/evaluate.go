package optimize

import (
	"cmp"
	"context"
	"math"
	"slices"

	"github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/optimize/ladder"
	"rungwright/optimize/order"
	"rungwright/ratings"
)

// Evaluate judges a given choice of parts: it simulates every corner and
// returns the design with its targets, stresses and cautions, met or not.
func Evaluate(ctx context.Context, s Supply, plan Plan, c *catalog.Catalog, policy *ratings.Policy) (*Design, error) {
	e, err := newEvaluator(s, c, policy)
	if err != nil {
		return nil, err
	}
	t := &trial{plan: &plan}
	if err := e.whole(ctx, t); err != nil {
		return nil, err
	}
	return e.design(t), nil
}

// whole does everything that a design needs to be judged.
func (e *evaluator) whole(ctx context.Context, t *trial) error {
	if err := e.simulate(ctx, t, false); err != nil {
		return err
	}
	if len(t.corners) < len(e.conditions) {
		return nil // no steady state: said in failed
	}
	if err := e.transients(ctx, t); err != nil {
		return err
	}
	e.judge(t)
	e.limits(t)
	return nil
}

// limits checks what the supply's limits and targets say beside the corners.
func (e *evaluator) limits(t *trial) {
	t.targets = append(e.cornerTargets(t), t.targets...)
	l, units := e.supply.Limits, decimal.NewFromInt(int64(e.supply.Build.Units))
	if cost, _, ok := e.purchases(t.plan); !l.Cost.Amount.IsZero() {
		each := cost.Div(units)
		t.target(Target{Name: "cost per unit", Unit: e.supply.Build.Currency, Wanted: l.Cost.String() + " or less",
			Got: each.InexactFloat64(), Limit: l.Cost.Amount.InexactFloat64(), Met: ok && each.LessThanOrEqual(l.Cost.Amount)})
	}
	atMost := func(name, unit string, got, limit float64, text string) {
		if limit > 0 {
			t.target(Target{Name: name, Unit: unit, Wanted: text + " or less", Got: got, Limit: limit, Met: got <= limit})
		}
	}
	atMost("height", "m", t.plan.height(), float64(l.Height), l.Height.String())
	atMost("volume of the parts", "m³", t.plan.sum(func(p *catalog.Part) float64 { return float64(p.Size.Volume()) }), float64(l.Volume), l.Volume.String())
	atMost("area of the parts", "m²", t.plan.sum(func(p *catalog.Part) float64 { return float64(p.Size.Area()) }), float64(l.Area), l.Area.String())
	atMost("stored energy", "J", t.storedJ, float64(l.StoredEnergy), l.StoredEnergy.String())
	if l.Efficiency > 0 {
		got, corner := e.efficiency(t)
		t.target(Target{Name: "efficiency", Unit: "1", Wanted: l.Efficiency.String() + " or more", Got: got, Limit: float64(l.Efficiency),
			Met: got >= float64(l.Efficiency), Corner: corner})
	}
}

// efficiency is the worst at full load: what the load itself takes over what
// the source gives.
func (e *evaluator) efficiency(t *trial) (float64, string) {
	worst, at := math.Inf(1), ""
	for k, c := range e.conditions {
		s := &t.corners[k].Steady
		useful := math.Abs(s.MeanV) * float64(e.supply.Output.Load.Most)
		if r := float64(e.supply.Output.Load.Resistance); r > 0 {
			useful = s.MeanV * s.MeanV / r
		}
		if c.fullLoad && useful/s.InputW < worst {
			worst, at = useful/s.InputW, c.name
		}
	}
	return worst, at
}

// cornerTargets are the window and the ripple at their worst corners.
func (e *evaluator) cornerTargets(t *trial) []Target {
	low, high, ripple := 0, 0, 0
	mean := func(k int) float64 { return math.Abs(t.corners[k].Steady.MeanV) }
	for k := range t.corners {
		if mean(k) < mean(low) {
			low = k
		}
		if mean(k) > mean(high) {
			high = k
		}
		if t.corners[k].Steady.RippleV > t.corners[ripple].Steady.RippleV {
			ripple = k
		}
	}
	out := []Target{
		{Name: "output, least", Unit: "V", Wanted: volts(e.supply.lowest()) + " or more", Got: mean(low), Limit: e.supply.lowest(),
			Met: mean(low) >= e.supply.lowest(), Corner: t.corners[low].Name},
		{Name: "output, most", Unit: "V", Wanted: volts(e.supply.highest()) + " or less", Got: mean(high), Limit: e.supply.highest(),
			Met: mean(high) <= e.supply.highest(), Corner: t.corners[high].Name},
	}
	if want := float64(e.supply.Output.Ripple); want > 0 {
		got := t.corners[ripple].Steady.RippleV
		out = append(out, Target{Name: "ripple, peak to peak", Unit: "V", Wanted: volts(want) + " or less", Got: got, Limit: want,
			Met: got <= want, Corner: t.corners[ripple].Name})
	}
	return out
}

// height is that of the tallest part [m].
func (p *Plan) height() float64 {
	tallest := 0.0
	for _, x := range p.placings() {
		tallest = max(tallest, float64(x.group.Part.Size.Height))
	}
	return tallest
}

// sum adds a property over every piece.
func (p *Plan) sum(of func(*catalog.Part) float64) float64 {
	total := 0.0
	for _, x := range p.placings() {
		total += of(x.group.Part) * float64(x.times()*x.group.Pieces())
	}
	return total
}

// purchases buys a plan's parts for the whole build. ok is false when a part
// has no offer.
func (e *evaluator) purchases(p *Plan) (total decimal.Decimal, each []order.Purchase, ok bool) {
	ok = true
	buy := func(part *catalog.Part, pieces int) {
		one, has := order.Cheapest(part, e.pieces(pieces), e.terms)
		ok = ok && has
		one.Part = part
		total = total.Add(one.Cost)
		each = append(each, one)
	}
	for _, x := range p.placings() {
		buy(x.group.Part, x.times()*x.group.Pieces())
	}
	for _, x := range e.fixed() {
		buy(x.Part, x.PerUnit())
	}
	return total, each, ok
}

// pieces is how many to buy for the build of a part with so many in a unit.
func (e *evaluator) pieces(perUnit int) int {
	return order.WithSpares(e.supply.Build.Units*perUnit, float64(e.supply.Build.Spares))
}

// fixed are the lines that the supply asks for: the winding that it names and
// its extras.
func (e *evaluator) fixed() []Line {
	var out []Line
	if e.wanted.Source.Part != "" {
		out = append(out, Line{Part: e.winding, Refs: []string{"T1"}, Role: RoleSource, Series: 1, Parallel: 1})
	}
	for i, x := range e.supply.Extras {
		ref := x.Ref
		if ref == "" {
			ref = "X" + letters(i)
		}
		out = append(out, Line{Part: e.catalog.Find(x.Part), Refs: refsOf(ref, x.Quantity), Role: RoleExtra, Series: 1, Parallel: 1})
	}
	return out
}

// design writes the trial up.
func (e *evaluator) design(t *trial) *Design {
	d := &Design{Supply: e.wanted, Topology: t.plan.Topology, Stages: t.plan.Stages, Plan: *t.plan,
		Circuit: e.circuit(t.plan, condition{line: 1, fullLoad: true, junction: e.supply.Surroundings.Ambient + junctionRise}),
		Corners: t.corners, Targets: t.targets, Stresses: t.stresses, StoredJ: t.storedJ, Currency: e.supply.Build.Currency,
		Failed: t.failed, StartUp: t.startUp, DischargeS: t.drainedS}
	total, each, _ := e.purchases(t.plan)
	for i, p := range t.plan.placings() {
		d.Lines = append(d.Lines, Line{Part: p.group.Part, Refs: p.refs, Role: p.role, Series: p.group.Series, Parallel: p.group.Parallel, Purchase: each[i]})
	}
	for i, l := range e.fixed() {
		l.Purchase = each[len(t.plan.placings())+i]
		d.Lines = append(d.Lines, l)
	}
	d.BuildCost = total
	d.UnitCost = total.DivRound(decimal.NewFromInt(int64(e.supply.Build.Units)), 4)
	slices.SortStableFunc(d.Stresses, func(a, b ratings.Stress) int { return cmp.Compare(b.Ratio, a.Ratio) })
	if len(t.corners) == len(e.conditions) {
		d.Cautions = ratings.Cautions(e.hazard(t))
	}
	d.Inputs = append([]catalog.Input{e.wanted.Input}, e.catalog.Inputs...)
	d.Inputs = append(d.Inputs, catalog.Input{Name: "policy " + e.policy.Name, SHA256: e.policy.SHA256})
	return d
}

// hazard is what the design could do to people, at high line without load.
func (e *evaluator) hazard(t *trial) ratings.Hazard {
	s, c := &t.corners[1].Steady, &t.circuits[1]
	h := ratings.Hazard{OutputV: max(math.Abs(s.MaxV), math.Abs(s.MinV)), SourcePeakV: c.Source.Peak, StoredJ: t.storedJ,
		OutputC: columnCapacitance(c), DischargeS: t.drainedS, HasBleeder: t.plan.Bleeder.Part != nil,
		MainsFed: e.supply.Source.Frequency < 500, Isolated: e.supply.Source.Isolated,
		AltitudeM: float64(e.supply.Surroundings.Altitude), Pollution: e.supply.Surroundings.PollutionDegree}
	if h.HasBleeder {
		h.BleederParts, h.BleederStrings = t.plan.Bleeder.Series, t.plan.Bleeder.Parallel
	}
	sum := 0.0
	for k, smoothing := range c.Topology.SmoothingColumn(c.Stages) {
		if !smoothing {
			continue
		}
		v := max(s.Capacitors[k].MaxV, -s.Capacitors[k].MinV)
		sum += v
		if c.Topology == ladder.ParallelFed {
			sum = v
		}
		h.NodeV = append(h.NodeV, ratings.NodeVoltage{Node: "top of " + s.Capacitors[k].Ref, V: sum})
	}
	return h
}

// Met tells whether the design meets every target and keeps every limit.
func (d *Design) Met() bool { return len(d.Failed) == 0 }
