package optimize

import (
	"context"
	"math"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
	"rungwright/ratings"
)

// transients runs switch-on and switch-off for a plan whose steady corners
// pass.
func (e *evaluator) transients(ctx context.Context, t *trial) error {
	if err := e.switchOn(ctx, t); err != nil {
		return err
	}
	return e.switchOff(ctx, t)
}

// switchOn takes the surges at the crest of a high line, and the rise from
// the zero of a low line at full load.
func (e *evaluator) switchOn(ctx context.Context, t *trial) error {
	c := t.circuits[1]
	crest := 0.25
	if c.Source.Waveform == ladder.Square {
		crest = 0.1
	}
	up, err := ladder.SwitchOn(ctx, c, crest, 0, 0)
	if err != nil {
		return err
	}
	t.startUp = up
	want := float64(e.supply.Output.Rise)
	if want == 0 {
		return nil
	}
	rise, err := ladder.SwitchOn(ctx, t.circuits[0], 0, e.supply.lowest(), min(1.5*want, 6000/c.Source.Frequency))
	if err != nil {
		return err
	}
	t.startUp.RiseS, t.startUp.Curve = rise.RiseS, rise.Curve
	t.target(Target{Name: "rise time", Unit: "s", Wanted: quantity.Seconds(want).String() + " or less",
		Got: rise.RiseS, Limit: want, Met: rise.RiseS <= want, Corner: "switch-on, full load, low line"})
	return nil
}

// switchOff discharges the output from its highest through the bleeder alone.
func (e *evaluator) switchOff(ctx context.Context, t *trial) error {
	want := e.supply.Output.Discharge
	below, within := float64(want.Below), float64(want.Within)
	if below == 0 {
		below, within = touchVolts, 60
	}
	t.drainedS = math.Inf(1)
	c := t.circuits[1]
	c.Load = ladder.Load{}
	if t.plan.Bleeder.Part != nil {
		c.Load.Resistance = bleederOhms(t.plan.Bleeder) * (1 + float64(t.plan.Bleeder.Part.Resistor.ToleranceHigh))
	}
	if math.Abs(t.corners[1].Steady.MaxV) <= below && math.Abs(t.corners[1].Steady.MinV) <= below {
		t.drainedS = 0
	} else if c.Load.Resistance > 0 {
		off, err := ladder.SwitchOff(ctx, c, t.corners[1].Steady, below, 3*within)
		if err != nil {
			return err
		}
		t.drainedS = off.Seconds
	}
	if want.Below > 0 {
		t.target(Target{Name: "discharge time", Unit: "s", Wanted: "below " + want.Below.String() + " within " + want.Within.String(),
			Got: t.drainedS, Limit: within, Met: t.drainedS <= within, Corner: "switch-off, high line, least load"})
	}
	return nil
}

// touchVolts is the direct voltage that is not hazardous live in normal
// condition (IEC 61010-1 clause 6.3, from memory).
const touchVolts = 60

// target adds a target and notes it when it is not met.
func (t *trial) target(x Target) {
	t.targets = append(t.targets, x)
	if !x.Met {
		t.fails("%s: %s wanted, not met (%s)", x.Name, x.Wanted, x.Corner)
	}
}

// judge gives every stress of the trial's parts and winding.
func (e *evaluator) judge(t *trial) {
	for _, p := range t.plan.placings() {
		uses := e.uses(t, &p)
		if p.group.Part.Kind == catalog.KindDiode {
			uses = append(uses, e.surges(t, &p)...)
		}
		t.stresses = append(t.stresses, ratings.Judge(e.policy, p.group.Part, uses)...)
	}
	if e.winding != nil {
		var uses []ratings.Use
		for k := range t.corners {
			uses = append(uses, sourceUse(t, k, e.supply.Surroundings.Ambient, e.supply.Source.Frequency))
		}
		t.stresses = append(t.stresses, ratings.Judge(e.policy, e.winding, uses)...)
	}
	for _, s := range t.stresses {
		if s.Over {
			t.fails("%s (%s): %s at %.0f %% of its limit, %s", s.Ref, s.Part, s.Quantity, 100*s.Ratio, s.Corner)
		}
	}
}

// surges are what the diodes stand at switch-on.
func (e *evaluator) surges(t *trial, p *placing) []ratings.Use {
	var out []ratings.Use
	for _, ref := range p.refs {
		x := t.startUp.Diodes[index(ref)]
		out = append(out, ratings.Use{Ref: ref, Corner: "switch-on at the crest, high line", Ambient: e.supply.Surroundings.Ambient,
			Frequency: e.supply.Source.Frequency, SurgeA: quantity.Amps(x.PeakA), SurgeTime: quantity.Seconds(x.HalfSine())})
	}
	return out
}
