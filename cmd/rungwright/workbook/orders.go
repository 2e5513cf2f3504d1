package workbook

import (
	"fmt"
	"slices"

	"rungwright/optimize/order"
)

// The order list's columns, and the supplier table's below it.
const (
	orderHead   = 4
	orderFinish = 14 // the last printed column
	orderPlace  = 15 // working: the place among the offers

	sellerUse     = 2
	sellerRate    = 4
	sellerLines   = 6
	sellerGoods   = 7
	sellerCharge  = 8
	sellerFee     = 9
	sellerTotal   = 10
	sellerInputs  = 11 // delivery, free from, fee, below
	sellerWeight  = 15
	sellersOffset = 4 // blank, heading, head
)

func (b *book) sellerRow(s *seller) int {
	return orderHead + b.ledger.rows + sellersOffset + s.number - 1
}

// sellerCell is a cell of a supplier's row, as other sheets name it.
func (b *book) sellerCell(s *seller, column int) string {
	return of(sheetOrder, fixed(column, b.sellerRow(s)))
}

// orderSheet lists the purchases by supplier, then the suppliers with their
// charges.
func (b *book) orderSheet() *sheet {
	l := b.ledger
	s := &sheet{name: sheetOrder, tab: "009E73", locked: true, frozen: orderHead, beside: 2, repeat: fmt.Sprintf("$%d:$%d", orderHead, orderHead),
		widths: map[int]float64{0: 6, 5: 34, 1: 22, 2: 15, 3: 19, 4: 17, 6: 11, 13: 16, 14: 9, orderPlace: 9}}
	s.row(saying(title, "Order by supplier"))
	s.spread(soft, b.orderNote(), 7)
	s.row()
	money := " (" + l.market.Currency + ")"
	s.heads("Line", "Supplier", "Order code", "Part", "Maker", "What it is", ">Quantity", "Currency", ">Unit price", ">Amount", ">Amount"+money, ">In stock", ">Lead time (days)", "Your note", "", ">Place")
	for k := 1; k <= l.rows; k++ {
		s.row(b.orderCells(k)...)
	}
	last := orderHead + l.rows
	s.filter = at(0, orderHead) + ":" + at(13, last)
	list := at(0, orderHead+1) + ":" + at(13, last)
	s.marks = append(s.marks, mark{list, fmt.Sprintf(`$B%d<>$B%d`, orderHead+1, orderHead), markLine})
	if len(l.sellers) > 0 {
		b.addSellers(s)
	}
	s.area = fixed(0, 1) + ":" + fixed(orderFinish, len(s.rows))
	return s
}

func (b *book) orderNote() string {
	if p := b.options.Plan; p != nil {
		text := fmt.Sprintf("At the planned %d units this is the least total over all suppliers, charges included", b.planned())
		if !p.Proved {
			text = fmt.Sprintf("At the planned %d units this is the best order found, charges included; the least could be up to %s %s lower",
				b.planned(), p.Slack.StringFixed(int32(b.ledger.market.Digits)), p.Currency)
		}
		return text + ". At any other quantity each part comes from its cheapest offer among the suppliers in use, and their charges are added."
	}
	return "Each part comes from its cheapest offer among the suppliers in use; their charges are added below."
}

// orderCells is the k-th line of the order.
func (b *book) orderCells(k int) []cell {
	l, c := b.ledger, b.columns
	row := orderHead + k
	all := func(column int) string {
		return of(sheetPrices, span(column, offerRow(0), offerRow(len(l.offers)-1)))
	}
	place := fmt.Sprintf("$%s%d", letters(orderPlace), row)
	var o *offering
	for _, other := range l.offers {
		if other.rank == k {
			o = other
		}
	}
	words := func(column int) cell {
		return live(note, fmt.Sprintf(`IF(ISNUMBER(%s),INDEX(%s,%s,1)&"","")`, place, all(column), place), "")
	}
	pick := func(st style, column int) cell {
		return live(st, fmt.Sprintf(`IF(ISNUMBER(%s),INDEX(%s,%s,1),"")`, place, all(column), place), "")
	}
	optional := func(column int) cell {
		v := fmt.Sprintf("INDEX(%s,%s,1)", all(column), place)
		return live(number, fmt.Sprintf(`IF(ISNUMBER(%s),IF(ISNUMBER(%s),%s,""),"")`, place, v, v), "")
	}
	fromPart := func(column int) cell {
		values := of(sheetParts, span(column, partsHead+1, partsHead+len(l.items)))
		return live(note, fmt.Sprintf(`IF(ISNUMBER(%s),INDEX(%s,INDEX(%s,%s,1),1)&"","")`, place, values, all(c.item), place), "")
	}
	cells := []cell{
		live(number, fmt.Sprintf(`IF(ISNUMBER(%s),%d,"")`, place, k), ""),
		words(c.supplier), words(c.code), words(c.part), fromPart(4), fromPart(6),
		pick(number, c.quantity), words(c.currency), pick(unitPrice, c.unit), pick(money, c.native), pick(money, c.cost),
		optional(c.stock), optional(c.lead), {style: inText}, {},
		live(number, fmt.Sprintf(`IF(COUNTIF(%s,%d)=0,"",MATCH(%d,%s,0))`, all(c.rank), k, k, all(c.rank)), ""),
	}
	if o != nil {
		b.fillOrder(cells, o, k)
	}
	return cells
}

// fillOrder gives the cells their values.
func (b *book) fillOrder(cells []cell, o *offering, k int) {
	l := b.ledger
	digits := order.Digits(l.currencyOf(o))
	values := []any{k, clean(o.offer.Supplier), clean(o.offer.OrderCode), clean(o.item.part.Number), clean(o.item.part.Maker), clean(o.item.part.Title()),
		o.quantity, clean(l.currencyOf(o)), order.PriceFor(o.offer, o.quantity).Price.Amount.InexactFloat64(), b.amountIn(o.native, digits), b.money(o.cost)}
	for i, v := range values {
		cells[i].value = v
	}
	if o.offer.Stock >= 0 {
		cells[11].value = o.offer.Stock
	}
	if o.offer.LeadDays >= 0 {
		cells[12].value = o.offer.LeadDays
	}
	for i, other := range l.offers {
		if other == o {
			cells[orderPlace].value = i + 1
		}
	}
}

// addSellers appends the supplier table with the sums of the order.
func (b *book) addSellers(s *sheet) {
	l := b.ledger
	s.row()
	s.head("Suppliers and their charges", orderFinish+1)
	money := " (" + l.market.Currency + ")"
	s.heads("No.", "Supplier", "In use", "Currency", ">Rate", "Remark", ">Lines", ">Goods"+money, ">Delivery"+money, ">Small-order fee"+money, ">Total"+money,
		">Delivery costs", ">Free from", ">Fee for small orders", ">Below", ">Weight")
	first := len(s.rows) + 1
	for _, v := range l.sellers {
		if row := s.row(b.sellerCells(v)...); row != b.sellerRow(v) {
			panic("workbook: the supplier table has moved")
		}
	}
	last := len(s.rows)
	total := make([]cell, sellerTotal+1)
	total[5] = saying(label, "Total order")
	goods, charges, _ := l.sums()
	values := map[int]float64{sellerGoods: b.money(goods), sellerTotal: b.money(goods + charges)}
	for column, v := range values {
		total[column] = live(totalMoney, fmt.Sprintf("SUM(%s)", span(column, first, last)), v)
	}
	s.row(total...)
	s.checks = append(s.checks,
		yesNo(at(sellerUse, first)+":"+at(sellerUse, last), "yes or no: may this supplier be ordered from?"),
		amountFrom(at(sellerInputs, first)+":"+at(sellerInputs+3, last), "An amount in the supplier's currency; zero or empty where there is none."))
}

// sellerCells is one row of the supplier table.
func (b *book) sellerCells(v *seller) []cell {
	l, c := b.ledger, b.columns
	row := b.sellerRow(v)
	ref := func(column int) string { return fmt.Sprintf("$%s%d", letters(column), row) }
	all := func(column int) string {
		return of(sheetPrices, span(column, offerRow(0), offerRow(len(l.offers)-1)))
	}
	digits := l.market.Digits
	lines := fmt.Sprintf(`COUNTIF(%s,">="&%d)-COUNTIF(%s,">="&%d)`, all(c.key), v.number*100000, all(c.key), (v.number+1)*100000)
	goods := fmt.Sprintf("ROUND(SUMIF(%s,%d,%s),%d)", all(c.seller), v.number, all(c.cost), digits)
	converted := func(column int) string { return fmt.Sprintf("ROUND(%s*%s,%d)", ref(column), ref(sellerRate), digits) }
	delivery := fmt.Sprintf("IF(%s=0,0,IF(%s>0,IF(%s>=%s,0,%s),%s))", ref(sellerLines), ref(sellerInputs+1), ref(sellerGoods),
		converted(sellerInputs+1), converted(sellerInputs), converted(sellerInputs))
	fee := fmt.Sprintf("IF(%s=0,0,IF(%s<%s,%s,0))", ref(sellerLines), ref(sellerGoods), converted(sellerInputs+3), converted(sellerInputs+2))
	total := fmt.Sprintf("%s+%s+%s", ref(sellerGoods), ref(sellerCharge), ref(sellerFee))
	return []cell{count(v.number), say(v.Name), {style: inText, value: yes(v.use)}, say(v.Currency), b.rateCell(v.Currency), saying(wrapped, b.remark(v)),
		live(number, lines, v.lines), live(money, goods, b.money(v.goods)), live(money, delivery, b.money(v.charged)), live(money, fee, b.money(v.fee)),
		live(money, total, b.money(v.goods+v.charged+v.fee)),
		{style: inMoney, value: v.Delivery.Amount.InexactFloat64()}, {style: inMoney, value: v.FreeAbove.Amount.InexactFloat64()},
		{style: inMoney, value: v.SmallOrderFee.Amount.InexactFloat64()}, {style: inMoney, value: v.SmallOrder.Amount.InexactFloat64()}, count(v.weight)}
}

// remark says why a supplier stands as it does.
func (b *book) remark(v *seller) string {
	terms := b.ledger.terms
	switch {
	case slices.Contains(terms.Excluded, v.Name):
		return "excluded by the buyer"
	case !v.use:
		return "not in the plan: its charges would not pay"
	case len(terms.Preferred) > 0 && slices.Contains(terms.Preferred, v.Name):
		return "preferred"
	}
	return ""
}
