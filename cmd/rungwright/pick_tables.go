package main

import (
	"fmt"
	"slices"
	"strings"

	"github.com/shopspring/decimal"

	"rungwright/catalog/quantity"
	"rungwright/optimize"
	"rungwright/ratings"
)

// lineTable is the parts, a row for each line of the list.
func lineTable(s *streams, d *optimize.Design) table {
	t := table{columns: []column{
		words("for", "role"), words("positions", "refs"), words("part", "part"), words("what", "title").optional(2),
		{title: "each", key: "per_unit", right: true}, {title: "buy", key: "buy", right: true, extra: 1},
		words("from", "supplier").optional(3), words("order code", "order_code").optional(4),
		{title: d.Currency + " each", key: "unit_price", right: true}, {title: "for all", key: "cost", right: true, extra: 1},
	}}
	for _, l := range d.Lines {
		refs := strings.Join(l.Refs, " ")
		if s.outTerminal {
			refs = span(l.Refs)
		}
		p := l.Purchase
		supplier, code := "", ""
		if p.Offer != nil {
			supplier, code = p.Offer.Supplier, p.Offer.OrderCode
		}
		t.add(string(l.Role), refs, l.Part.Number, l.Part.Title(), l.PerUnit(), p.Quantity, supplier, code, s.money(p.UnitPrice), s.money(p.Cost))
	}
	return t
}

// money has two decimals or more on a screen, and what it has in a pipe.
func (s *streams) money(d decimal.Decimal) string {
	text := d.String()
	if _, decimals, _ := strings.Cut(text, "."); s.outTerminal && len(decimals) < 2 {
		return d.StringFixed(2)
	}
	return text
}

// span shortens a run of references: "C1–C6", "C1 C3 C5" or "C1 C3 … (8)".
func span(refs []string) string {
	n := len(refs)
	switch {
	case n > 2 && consecutive(refs):
		return refs[0] + "–" + refs[n-1]
	case n > 4:
		return fmt.Sprintf("%s %s … %s", refs[0], refs[1], refs[n-1])
	}
	return strings.Join(refs, " ")
}

// consecutive tells whether the references count up by one.
func consecutive(refs []string) bool {
	letters := strings.TrimRight(refs[0], "0123456789")
	first := 0
	if _, err := fmt.Sscanf(refs[0][len(letters):], "%d", &first); err != nil {
		return false
	}
	for i, r := range refs {
		if r != fmt.Sprintf("%s%d", letters, first+i) {
			return false
		}
	}
	return true
}

// targetTable is every wish against the answer.
func targetTable(s *streams, d *optimize.Design) table {
	t := table{columns: []column{words("target", "target"), words("wanted", "wanted"), {title: "got", key: "got", right: true},
		words("unit", "unit"), words("used", "used_ratio"), words("at", "corner").optional(1)}}
	for _, g := range d.Targets {
		if s.outTerminal {
			t.add(g.Name, g.Wanted, engineering(g.Got, g.Unit), "", bar(used(d, g)), g.Corner)
			continue
		}
		t.add(g.Name, g.Wanted, g.Got, g.Unit, used(d, g), g.Corner)
	}
	if s.outTerminal {
		t.drop("unit")
	}
	return t
}

// used is the share of a target that is used up: of the output's window what
// lies between the wanted voltage and the edge, for an upper limit what was
// got over the limit, for a lower one the limit over what was got.
func used(d *optimize.Design, t optimize.Target) float64 {
	lower := (t.Got > t.Limit) == t.Met
	if wanted := float64(d.Supply.Output.Voltage); strings.HasPrefix(t.Name, "output") {
		return max(0, (t.Got-wanted)/(t.Limit-wanted))
	}
	switch {
	case t.Got == t.Limit:
		return 1
	case lower && t.Got != 0:
		return t.Limit / t.Got
	}
	return t.Got / t.Limit
}

// mostStresses is how many stresses a screen shows, the nearest to their
// limits; a pipe and the files have all.
const mostStresses = 4

// stressTable is the parts that are nearest to their limits.
func stressTable(s *streams, d *optimize.Design) table {
	t := table{columns: []column{words("stress", "ref"), words("part", "part").optional(2), words("of", "quantity"),
		{title: "value", key: "value", right: true}, {title: "limit", key: "limit", right: true}, words("unit", "unit"),
		words("used", "used_ratio"), words("at", "corner").optional(1), words("rule", "rule").optional(3), words("note", "note")}}
	shown := d.Stresses
	if s.outTerminal {
		judged := slices.DeleteFunc(slices.Clone(shown), func(x ratings.Stress) bool { return x.Unjudged })
		shown = judged[:min(len(judged), mostStresses)]
	}
	for _, x := range shown {
		if s.outTerminal {
			t.add(x.Ref, x.Part, x.Quantity, quantity.Format(x.Value, x.Unit, 3), quantity.Format(x.Limit, x.Unit, 3), "", bar(x.Ratio), x.Corner, x.Rule.Name, "")
			continue
		}
		t.add(x.Ref, x.Part, x.Quantity, x.Value, x.Limit, baseUnit(x.Unit), x.Ratio, x.Corner, x.Rule.Name, x.Note)
	}
	if s.outTerminal {
		t.drop("unit")
		t.drop("note")
	}
	return t
}

// runnerUpTable is the next best, on a screen by what differs from the answer.
func runnerUpTable(s *streams, d *optimize.Design) table {
	t := table{columns: []column{{title: d.Currency + " each", key: "unit_cost", right: true}, words("next best", "runner_up"),
		words("", "note").optional(1)}}
	own := strings.Split(d.Plan.Summary(), ", ")
	for i, r := range d.RunnersUp {
		summary := r.Summary
		if s.outTerminal {
			if i == mostRunnersUp {
				break
			}
			summary = difference(summary, own)
		}
		t.add(s.money(r.UnitCost), summary, r.Note)
	}
	return t
}

// mostRunnersUp is how many runners-up a screen shows.
const mostRunnersUp = 3

// difference is what a runner-up has that the answer has not.
func difference(summary string, own []string) string {
	others := slices.DeleteFunc(strings.Split(summary, ", "), func(part string) bool { return slices.Contains(own, part) })
	if len(others) == 0 {
		return summary
	}
	return "with " + strings.Join(others, ", ")
}
