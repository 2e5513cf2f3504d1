package report

import (
	"html/template"
	"strconv"

	"github.com/shopspring/decimal"

	"rungwright/catalog/quantity"
)

func (s *subject) costs() (template.HTML, error) {
	lines := s.costTable()
	chart := s.quantityChart()
	if lines == nil && chart == nil {
		return "", nil
	}
	view := struct {
		Table   *table
		Figures []figure
	}{Table: lines}
	if chart != nil {
		t := &table{Caption: "Cost of a unit against the build", Heads: numbers(words("Units", "Cost of a unit"), 0, 1)}
		for _, p := range s.e.CostCurve {
			t.Rows = append(t.Rows, cells(grouping(int64(p.Units)), money(p.UnitCost, s.d.Currency)))
		}
		f, err := shown(chart, chart.Summary, t)
		if err != nil {
			return "", err
		}
		view.Figures = []figure{f}
	}
	return fill("costs", view)
}

// costTable is what each line costs, for a unit.
func (s *subject) costTable() *table {
	units := decimal.NewFromInt(int64(max(1, s.d.Supply.Build.Units)))
	total := decimal.Zero
	for _, l := range s.d.Lines {
		total = total.Add(l.Purchase.Cost)
	}
	if total.IsZero() {
		return nil
	}
	t := &table{Caption: "Parts for " + plural(int(units.IntPart()), "unit") + ", spares and minimum quantities included", Heads: numbers(words("Part", "Bought", "Unit price", "For the build", "Per unit", "Share"), 1, 2, 3, 4)}
	whole := total.InexactFloat64()
	for _, l := range s.d.Lines {
		if l.Part == nil {
			continue
		}
		name := cell{Text: l.Part.Number, Below: ranges(l.Refs)}
		p := l.Purchase
		if p.Offer == nil {
			t.Rows = append(t.Rows, []cell{name, {Text: "no price"}, {}, {}, {}, {}})
			continue
		}
		part := p.Cost.InexactFloat64() / whole
		t.Rows = append(t.Rows, []cell{name, {Text: strconv.Itoa(p.Quantity)}, {Text: quantity.Money{Amount: p.UnitPrice, Currency: s.d.Currency}.String()}, {Text: money(p.Cost, s.d.Currency)},
			{Text: money(p.Cost.DivRound(units, 4), s.d.Currency)}, {Text: percent(part), Bar: share(part, 1)}})
	}
	t.Rows = append(t.Rows, []cell{{Text: "all"}, {}, {}, {Text: money(total, s.d.Currency)}, {Text: money(total.DivRound(units, 4), s.d.Currency)}, {}})
	return t
}

func (s *subject) quantityChart() *Chart {
	if len(s.e.CostCurve) < 2 {
		return nil
	}
	c := &Chart{Name: "cost-curve", Title: "Cost of a unit against the build quantity", X: Scale{Name: "units built", Unit: quantity.None, Log: true},
		Y: Scale{Name: "cost of a unit", Symbol: s.d.Currency, Zero: true}, Lines: []Trace{{}}}
	for _, p := range s.e.CostCurve {
		c.Lines[0].add(float64(p.Units), p.UnitCost.InexactFloat64())
	}
	first, last := s.e.CostCurve[0], s.e.CostCurve[len(s.e.CostCurve)-1]
	c.Summary = "A unit costs " + money(first.UnitCost, s.d.Currency) + " at " + grouping(int64(first.Units)) + " and " + money(last.UnitCost, s.d.Currency) + " at " + grouping(int64(last.Units)) + "."
	if n := s.d.Supply.Build.Units; n > 0 {
		c.Limits = []Limit{{"this build", float64(n), true}}
	}
	return c
}
