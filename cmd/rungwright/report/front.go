package report

import (
	"html/template"
	"slices"

	"rungwright/catalog/quantity"
)

func (s *subject) front() (template.HTML, error) {
	c := s.frontChart()
	if c == nil {
		return "", nil
	}
	t := &table{Caption: "The designs of the plot, the cheapest first", Heads: numbers(words("Design", "Cost of a unit", s.e.FrontOf, "Note"), 1, 2)}
	for _, p := range s.frontOrder() {
		name := cell{Text: p.Name}
		if p.Chosen {
			name.State, name.Below = "met", "chosen"
		}
		t.Rows = append(t.Rows, []cell{name, {Text: money(p.Cost, s.d.Currency)}, {Text: quantity.Format(p.Other, s.e.FrontUnit, 3)}, {Text: p.Note}})
	}
	f, err := shown(c, "No design is better in both than any of these. The triangle is the chosen one. Point at a design, or reach it with the Tab and arrow keys, to read it.", nil)
	if err != nil {
		return "", err
	}
	f.Wide = true
	return fill("front", struct {
		Figures []figure
		Table   *table
	}{[]figure{f}, t})
}

func (s *subject) frontOrder() []FrontPoint {
	list := slices.Clone(s.e.Front)
	slices.SortStableFunc(list, func(a, b FrontPoint) int { return a.Cost.Cmp(b.Cost) })
	return list
}

func (s *subject) frontChart() *Chart {
	if len(s.e.Front) == 0 {
		return nil
	}
	c := &Chart{Name: "front", Title: "Cost against " + s.e.FrontOf, X: Scale{Name: "cost of a unit", Symbol: s.d.Currency}, Y: Scale{Name: s.e.FrontOf, Unit: s.e.FrontUnit}}
	for _, p := range s.frontOrder() {
		text := p.Name + ": " + money(p.Cost, s.d.Currency) + ", " + s.e.FrontOf + " " + quantity.Format(p.Other, s.e.FrontUnit, 3)
		if p.Chosen {
			text = "Chosen: " + text
		}
		c.Marks = append(c.Marks, Mark{p.Cost.InexactFloat64(), p.Other, text, p.Chosen})
	}
	c.Summary = plural(len(s.e.Front), "design") + " that none beats in both measures; the table below lists them."
	return c
}
