package workbook

import "rungwright/optimize/order"

// alternatesSheet lists parts that could stand in for others; nil when none
// is known.
func (b *book) alternatesSheet() *sheet {
	if len(b.options.Alternates) == 0 {
		return nil
	}
	s := &sheet{name: sheetAlternates, tab: "0072B2", frozen: 4, beside: 1, repeat: "$4:$4", widths: map[int]float64{3: 36, 4: 36, 7: 40, 8: 40}}
	s.row(saying(title, "Alternates"))
	s.spread(soft, "Parts that could stand in. Costs are of the need at the planned build quantity, from the cheapest offer.", 6)
	s.row()
	money := " (" + b.ledger.market.Currency + ")"
	s.heads("In place of", "Maker", "Part", "What it is", "Key ratings", "Status", ">Cost at the planned quantity"+money, "What changes", "Remark")
	for _, a := range b.options.Alternates {
		if a.Part != nil {
			s.row(b.alternateCells(a)...)
		}
	}
	s.filter = "A4:" + at(8, len(s.rows))
	return s
}

func (b *book) alternateCells(a Alternate) []cell {
	cost := cell{style: money}
	terms := b.ledger.terms
	terms.Currency = b.ledger.market.Currency
	for _, it := range b.ledger.items {
		if it.part.Number != a.For {
			continue
		}
		if p, ok := order.Cheapest(a.Part, b.ledger.needAt(it, b.planned()), terms); ok {
			cost.value = p.Cost.InexactFloat64()
		}
	}
	return []cell{say(a.For), say(a.Part.Maker), say(a.Part.Number), saying(wrapped, a.Part.Title()), saying(wrapped, keyRatings(a.Part)), say(statusOf(a.Part)),
		cost, saying(wrapped, a.Effect), saying(wrapped, a.Note)}
}
