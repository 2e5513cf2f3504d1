package ratings

import (
	"fmt"
	"strings"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// Judge gives every stress of a part over all its uses, the worst use of each
// kept, in an order that depends on the part's kind alone. Other lines have
// no stress.
func Judge(p *Policy, part *catalog.Part, uses []Use) []Stress {
	t := newTrial(p, part)
	var out []Stress
	for i := range t.checks {
		if worst, r, ok := t.worst(&t.checks[i], uses); ok {
			out = append(out, t.stress(&t.checks[i], worst, r))
		}
	}
	return out
}

// Passes tells whether Judge would find nothing over. It stops at the first
// that is and makes no text: it is the one for a search.
func Passes(p *Policy, part *catalog.Part, uses []Use) bool {
	t := newTrial(p, part)
	for i := range t.checks {
		for j := range uses {
			if r, ok := t.checks[i].read(&t, &uses[j]); ok && r.over() {
				return false
			}
		}
	}
	return true
}

// trial is a part before a policy: the family of rules that judges it.
type trial struct {
	policy *Policy
	part   *catalog.Part
	checks []check
	family *Family

	capacitor *CapacitorRules
	diode     *DiodeRules
	resistor  *ResistorRules
	winding   *WindingRules
}

func newTrial(p *Policy, part *catalog.Part) trial {
	t := trial{policy: p, part: part}
	switch part.Kind {
	case catalog.KindCapacitor:
		t.checks, t.capacitor = capacitorChecks, p.capacitorRules(part.Capacitor)
		t.family = &t.capacitor.Family
	case catalog.KindDiode:
		t.checks, t.diode = diodeChecks, p.diodeRules(part.Diode)
		t.family = &t.diode.Family
	case catalog.KindResistor:
		t.checks, t.resistor = resistorChecks, p.resistorRules(part.Resistor)
		t.family = &t.resistor.Family
	case catalog.KindWinding:
		t.checks, t.winding = windingChecks, p.windingRules()
		t.family = &t.winding.Family
	}
	return t
}

// partName is what rules and notes call the part.
func (t *trial) partName() string {
	switch t.part.Kind {
	case catalog.KindCapacitor:
		return string(t.part.Capacitor.Technology)
	case catalog.KindDiode:
		return strings.TrimSpace(string(t.part.Diode.Type) + " diode")
	case catalog.KindResistor:
		return strings.TrimSpace(t.part.Resistor.Technology + " resistor")
	}
	return string(t.part.Kind)
}

// check is one rating of a part kind.
type check struct {
	quantity string // as Stress names it
	unit     quantity.Dimension
	subject  string // as a rule names it: "voltage"
	missing  string // what is wanting when the reading is notStated
	// read judges one use; false when the use has nothing of the sort.
	read func(t *trial, u *Use) (reading, bool)
	// explain adds figures to the note; nil: nothing to add.
	explain func(t *trial, u *Use, r reading) string
}

// worst is the use with the highest ratio, the first among equals.
func (t *trial) worst(c *check, uses []Use) (worst *Use, most reading, ok bool) {
	for i := range uses {
		r, applies := c.read(t, &uses[i])
		if applies && (!ok || r.worse(most)) {
			worst, most, ok = &uses[i], r, true
		}
	}
	return worst, most, ok
}

// stress puts a reading into words.
func (t *trial) stress(c *check, u *Use, r reading) Stress {
	s := Stress{
		Ref: u.Ref, Part: t.part.Number, Quantity: c.quantity,
		Value: r.value, Rating: r.rating, Limit: r.limit, Unit: c.unit, Ratio: r.ratio, AtLeast: r.atLeast,
		Corner: u.Corner, Over: r.over(), Unjudged: r.outcome == notStated || r.outcome == noLimit,
	}
	what := t.partName() + " " + c.subject
	without := fmt.Sprintf("no rule in policy %s for %s", t.policy.Name, what)
	var said []string
	switch r.outcome {
	case byRule:
		s.Rule = Rule{t.policy.Name, what, t.family.Source}
		said = append(said, t.family.Remark)
	case byMaker:
		s.Rule = Rule{t.policy.Name, "maker's rating (no rule in the policy)", without}
	case bySheet:
		s.Rule = Rule{t.policy.Name, "maker's rating", "the part's sheet"}
	case noRule:
		said = append(said, "NO RULE: "+without+", so that the part counts as over")
	case banned:
		s.Rule = Rule{t.policy.Name, t.partName() + " not to be used", t.family.Source}
		said = append(said, "the policy forbids this part", t.family.Remark)
	case notStated:
		said = append(said, "NOT JUDGED: "+c.missing)
	case noLimit:
		said = append(said, "NOT JUDGED: "+without)
	}
	said = append(said, r.notes.texts()...)
	if c.explain != nil {
		said = append(said, c.explain(t, u, r))
	}
	s.Note = joinNotes(said)
	return s
}

// joinNotes puts the notes that say something in a row.
func joinNotes(said []string) string {
	var kept []string
	for _, text := range said {
		if text != "" {
			kept = append(kept, text)
		}
	}
	return strings.Join(kept, "; ")
}
