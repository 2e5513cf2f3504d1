package optimize

import (
	"cmp"
	"math"
	"slices"
	"strings"

	"rungwright/catalog"
	"rungwright/ratings"
)

// option is one way to fill a kind of position, with what it weighs in the
// objective for a number of positions.
type option struct {
	group  Group
	second Group // of the same part, where one option fills both kinds of a spread
	weight int64 // in the objective's units, for all positions of its kind
}

// allowed tells whether the supply lets a part be used at all.
func (e *evaluator) allowed(p *catalog.Part) bool {
	s := e.supply
	if p.Status != catalog.Active && p.Status != "" && p.Status != catalog.NotForNew {
		return false
	}
	if s.Choose.Mounting != "" && p.Mounting != s.Choose.Mounting {
		return false
	}
	if h := s.Limits.Height; h > 0 && p.Size.Height > h {
		return false
	}
	if t := s.Surroundings.Ambient; p.Temperature.Most != 0 && (t > p.Temperature.Most || t < p.Temperature.Least) {
		return false
	}
	for _, word := range s.Choose.Avoid {
		if strings.EqualFold(word, p.Number) || strings.EqualFold(word, p.Maker) {
			return false
		}
	}
	return len(e.offers(p)) > 0
}

// offers are those that the supply's choice of suppliers leaves.
func (e *evaluator) offers(p *catalog.Part) []catalog.Offer {
	only := e.supply.Choose.Suppliers
	if len(only) == 0 {
		return p.Offers
	}
	var out []catalog.Offer
	for _, o := range p.Offers {
		if slices.ContainsFunc(only, func(name string) bool { return strings.EqualFold(name, o.Supplier) }) {
			out = append(out, o)
		}
	}
	return out
}

// pools are the parts that the search may use, by kind, in the catalog's
// order.
type pools struct {
	capacitors, diodes, resistors []*catalog.Part
}

func (e *evaluator) pools() pools {
	var out pools
	for _, p := range e.catalog.Parts {
		if !e.allowed(p) {
			continue
		}
		switch p.Kind {
		case catalog.KindCapacitor:
			out.capacitors = append(out.capacitors, p)
		case catalog.KindDiode:
			out.diodes = append(out.diodes, p)
		case catalog.KindResistor:
			out.resistors = append(out.resistors, p)
		}
	}
	return out
}

// Most pieces that the search puts in a group.
const (
	mostParallel = 3 // capacitors side by side
	mostDiodes   = 3 // diodes in a string
	mostBleeder  = 24
)

// capacitorGroups are the capacitor groups tried: each part alone and side by
// side.
func (p *pools) capacitorGroups() []Group {
	var out []Group
	for _, c := range p.capacitors {
		for n := 1; n <= mostParallel; n++ {
			out = append(out, Group{c, 1, n})
		}
	}
	return out
}

// diodeGroups are single diodes and strings.
func (p *pools) diodeGroups() []Group {
	var out []Group
	for _, d := range p.diodes {
		for n := 1; n <= mostDiodes; n++ {
			out = append(out, Group{d, n, 1})
		}
	}
	return out
}

// bleeders are the strings that can stand across the highest output for ever:
// of each resistor the shortest string that keeps working voltage and power.
// Of strings within a few percent of the same resistance the lightest is kept.
func (e *evaluator) bleeders(p *pools) []option {
	if e.supply.Output.Discharge.Below == 0 {
		return []option{{}}
	}
	var all []option
	for _, r := range p.resistors {
		if n := e.bleederLength(r); n > 0 {
			g := Group{r, n, 1}
			if w, ok := e.weigh(r, n); ok {
				all = append(all, option{group: g, weight: w})
			}
		}
	}
	slices.SortStableFunc(all, func(a, b option) int { return cmp.Compare(a.weight, b.weight) })
	var kept []option
	for _, o := range all {
		ohms := bleederOhms(o.group)
		alike := func(k option) bool { return math.Abs(math.Log(bleederOhms(k.group)/ohms)) < 0.05 }
		if !slices.ContainsFunc(kept, alike) {
			kept = append(kept, o)
		}
	}
	return kept
}

// bleederLength is the shortest string that bears the highest output; 0 when
// none up to mostBleeder does, or when it would take more than a third of the
// full load.
func (e *evaluator) bleederLength(r *catalog.Part) int {
	top := e.supply.highest()
	for n := 1; n <= mostBleeder; n++ {
		g := Group{r, n, 1}
		if top/bleederOhms(g) > e.supply.fullCurrent()/3 {
			continue
		}
		if ratings.Passes(e.policy, r, []ratings.Use{e.bleederUse(g, top)}) {
			return n
		}
	}
	return 0
}

// bleederUse is the worst piece of a bleeder string at an output voltage.
func (e *evaluator) bleederUse(g Group, output float64) ratings.Use {
	s := trialOutput(output)
	u := ratings.Use{Ref: "R1", Corner: "highest output", Ambient: e.supply.Surroundings.Ambient, Frequency: e.supply.Source.Frequency}
	e.resistorUse(s, 0, &placing{group: g, role: RoleBleeder}, &u)
	return u
}

// trialOutput is a trial that knows nothing but an output voltage.
func trialOutput(v float64) *trial {
	t := &trial{corners: make([]Corner, 1)}
	t.corners[0].Steady.MaxV, t.corners[0].Steady.MinV = v, v
	return t
}
