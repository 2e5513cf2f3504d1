package workbook

import (
	"fmt"
	"strings"

	"rungwright/catalog"
)

// The columns of the parts sheet that formulas name.
const (
	partsPerUnit = 3
	partsInHand  = 11
	partsNeed    = 12
	partsBuy     = 14
	partsCost    = 16
	partsNote    = 17
)

// partsSheet lists every part once, with all positions that it fills.
func (b *book) partsSheet() *sheet {
	l := b.ledger
	s := &sheet{name: sheetParts, tab: headFill, locked: true, frozen: partsHead, beside: 2, repeat: fmt.Sprintf("$%d:$%d", partsHead, partsHead),
		widths: map[int]float64{0: 5, 1: 16, 2: 12, 3: 6, 4: 14, 5: 19, 6: 25, 7: 27, 8: 13, 9: 13, 10: 16, 11: 8, 12: 9, 13: 18, 14: 9, 15: 10, 16: 12, 17: 15}}
	s.row(saying(title, "Parts list"))
	s.spread(soft, "Quantities and prices follow from the build quantity on the overview. “Needed” holds spares and leaves out what is in the drawer; “Buy” adds "+
		"minimum, multiple and what a cheaper price break gains.", 8)
	s.row()
	money := " (" + l.market.Currency + ")"
	s.heads("No.", "References", "Use", ">Per unit", "Maker", "Part", "What it is", "Key ratings", "Status", "Sources", "Alternates", ">In the drawer",
		">Needed", "Supplier", ">Buy", ">Unit price"+money, ">Cost"+money, "Note")
	for i, it := range l.items {
		s.row(b.partCells(i, it)...)
	}
	first, last := partsHead+1, partsHead+len(l.items)
	goods, _, _ := l.sums()
	total := make([]cell, partsNote)
	total[partsBuy] = saying(label, "Goods")
	total[partsCost] = live(totalMoney, fmt.Sprintf("SUM(%s)", span(partsCost, first, last)), b.money(goods))
	s.row(total...)
	s.filter = at(0, partsHead) + ":" + at(partsNote, last)
	s.checks = append(s.checks, whole(at(partsInHand, first)+":"+at(partsInHand, last), 0, 100_000_000, "Pieces of this part that you have already; they are not bought."))
	notes := at(partsNote, first) + ":" + at(partsNote, last)
	s.marks = append(s.marks,
		mark{notes, fmt.Sprintf(`COUNTIF(%s,"✖*")>0`, at(partsNote, first)), markOver},
		mark{notes, fmt.Sprintf(`COUNTIF(%s,"▲*")>0`, at(partsNote, first)), markNear},
		mark{at(9, first) + ":" + at(9, last), fmt.Sprintf(`COUNTIF(%s,"▲*")>0`, at(9, first)), markNear},
		mark{at(8, first) + ":" + at(8, last), fmt.Sprintf(`COUNTIF(%s,"▲*")>0`, at(8, first)), markNear})
	return s
}

// partCells is one row of the parts sheet.
func (b *book) partCells(index int, it *item) []cell {
	p := it.part
	row := partsHead + 1 + index
	return append([]cell{
		count(index + 1), saying(wrapped, strings.Join(it.refs, " ")), saying(wrapped, strings.Join(it.roles, ", ")), count(it.perUnit),
		say(p.Maker), say(p.Number), saying(wrapped, p.Title()), saying(wrapped, keyRatings(p)), saying(wrapped, statusOf(p)), saying(wrapped, sourcesOf(p)),
		saying(wrapped, b.alternatesOf(p)), {style: inWhole, value: it.inHand},
	}, b.liveCells(it, row)...)
}

// liveCells are the columns that re-price.
func (b *book) liveCells(it *item, row int) []cell {
	c := b.columns
	in := func(column int) string { return of(sheetPrices, b.offersOf(it, column)) }
	share, least := b.spareCells(it.part.Kind)
	perUnit, need, buy := at(partsPerUnit, row), at(partsNeed, row), at(partsBuy, row)
	units := "BuildQty*" + perUnit
	needed := live(number, fmt.Sprintf("MAX(0,%s+MAX(%s,INT((%s*ROUND(%s*10000,0)+9999)/10000))-%s)", units, least, units, share, at(partsInHand, row)), it.need)
	supplier := live(note, fmt.Sprintf(`IF(%s=0,"in the drawer",IF(COUNT(%s)=0,"nobody",IF(COUNT(%s)>1,"several, see Order",INDEX(%s,MATCH(MIN(%s),%s,0),1))))`,
		need, in(c.key), in(c.key), in(c.supplier), in(c.key), in(c.key)), "")
	bought := live(number, fmt.Sprintf("SUM(%s)", in(c.quantity)), it.bought())
	unit := live(unitPrice, fmt.Sprintf(`IF(%s=0,"",IF(COUNT(%s)=1,SUM(%s),ROUND(SUM(%s)/%s,6)))`, buy, in(c.key), in(c.converted), in(c.cost), buy), "")
	cost := live(money, fmt.Sprintf(`IF(%s<%s,"",SUM(%s))`, buy, need, in(c.cost)), "")
	remark := live(note, fmt.Sprintf(`IF(%s=0,"● in the drawer",IF(COUNT(%s)=0,"✖ NO OFFER",IF(%s<%s,"✖ SHORT "&(%s-%s),IF(%s>%s,"▲ "&(%s-%s)&" more","● ok"))))`,
		need, in(c.key), buy, need, need, buy, buy, need, buy, need), "")
	supplier.value, unit.value, cost.value, remark.value = b.supplierOf(it), b.unitOf(it), b.costCell(it), noteOf(it)
	return []cell{needed, supplier, bought, unit, cost, remark}
}

// buying lists an item's offers that are bought from.
func (it *item) buying() []*offering {
	var buying []*offering
	for _, o := range it.offers {
		if o.quantity > 0 {
			buying = append(buying, o)
		}
	}
	return buying
}

func (b *book) supplierOf(it *item) string {
	switch from := it.buying(); {
	case it.need == 0:
		return "in the drawer"
	case len(from) == 0:
		return "nobody"
	case len(from) > 1:
		return "several, see Order"
	default:
		return clean(from[0].offer.Supplier)
	}
}

func (b *book) unitOf(it *item) any {
	from := it.buying()
	if len(from) == 0 {
		return ""
	}
	if len(from) == 1 {
		return b.ledger.unitPrice(from[0])
	}
	cost, _ := it.cost()
	return b.ledger.market.Amount(cost).DivRound(decimalOf(it.bought()), 6).InexactFloat64()
}

func (b *book) costCell(it *item) any {
	if cost, ok := it.cost(); ok {
		return b.money(cost)
	}
	return ""
}

func noteOf(it *item) string {
	switch n := it.bought(); {
	case it.need == 0:
		return "● in the drawer"
	case n == 0:
		return "✖ NO OFFER"
	case n < it.need:
		return fmt.Sprintf("✖ SHORT %d", it.need-n)
	case n > it.need:
		return fmt.Sprintf("▲ %d more", n-it.need)
	}
	return "● ok"
}

func statusOf(p *catalog.Part) string {
	switch p.Status {
	case "", catalog.Active:
		return "active"
	}
	return "▲ " + string(p.Status)
}

// sourcesOf marks a part that one supplier alone sells.
func sourcesOf(p *catalog.Part) string {
	sellers := map[string]bool{}
	for i := range p.Offers {
		sellers[p.Offers[i].Supplier] = true
	}
	switch len(sellers) {
	case 0:
		return "▲ no offer"
	case 1:
		return "▲ single source"
	}
	return fmt.Sprintf("%d suppliers", len(sellers))
}

func (b *book) alternatesOf(p *catalog.Part) string {
	var names []string
	for _, a := range b.options.Alternates {
		if a.For == p.Number && a.Part != nil {
			names = append(names, a.Part.Number)
		}
	}
	return strings.Join(names, ", ")
}
