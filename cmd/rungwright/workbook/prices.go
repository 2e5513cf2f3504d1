package workbook

import (
	"fmt"
	"strings"

	"rungwright/optimize/order"
)

// priceColumns are where things stand on the price sheet: inputs, then
// results, then the working behind them.
type priceColumns struct {
	part, supplier, code, use, stock, lead, can, least, multiple int
	currency, rate                                               int
	breaks, prices                                               int // first of each
	need, quantity, unit, native, cost, check                    int
	pinNeed, pinCount                                            int
	seller, item, tries, costs, best, count, weighed, tied, own  int
	converted, key, rank                                         int
	width                                                        int
}

func columnsFor(breaks int) priceColumns {
	next := 0
	take := func(n int) int { next += n; return next - n }
	c := priceColumns{part: take(1), supplier: take(1), code: take(1), use: take(1), stock: take(1), lead: take(1), can: take(1),
		least: take(1), multiple: take(1), currency: take(1), rate: take(1)}
	c.breaks, c.prices = take(breaks), take(breaks)
	c.need, c.quantity, c.unit, c.native, c.cost, c.check = take(1), take(1), take(1), take(1), take(1), take(1)
	c.pinNeed, c.pinCount = take(1), take(1)
	c.seller, c.item = take(1), take(1)
	c.tries, c.costs = take(breaks), take(breaks)
	c.best, c.count, c.weighed, c.tied, c.own = take(1), take(1), take(1), take(1), take(1)
	c.converted, c.key, c.rank = take(1), take(1), take(1)
	c.width = next
	return c
}

const pricesHead = 4 // the header's row; offers follow

// offerRow is the row of the n-th offer.
func offerRow(n int) int { return pricesHead + 1 + n }

// pricesSheet is the data behind the formulas: one row an offer.
func (b *book) pricesSheet() *sheet {
	l, c := b.ledger, b.columns
	s := &sheet{name: sheetPrices, tab: "7F6000", locked: true, frozen: pricesHead, beside: 3, widths: map[int]float64{c.currency: 11}, repeat: fmt.Sprintf("$%d:$%d", pricesHead, pricesHead)}
	s.row(saying(title, "Price breaks"))
	s.spread(soft, "One row an offer. Yellow cells are inputs: a new break goes into the next empty pair, quantities rising from left to right. "+
		"“Can deliver” empty means any number. To the right of the prices stands what follows from them, then the working.", c.breaks)
	s.row()
	s.heads(b.priceHeads()...)
	for i, o := range l.offers {
		s.row(b.offerCells(o, offerRow(i))...)
	}
	last := offerRow(len(l.offers) - 1)
	s.filter = "A" + fmt.Sprint(pricesHead) + ":" + at(c.check, last)
	s.area = fixed(0, 1) + ":" + fixed(c.check, last)
	s.checks = append(s.checks,
		whole(at(c.can, offerRow(0))+":"+at(c.can, last), 0, 1_000_000_000, "Pieces that this offer can deliver in time; empty for any number."),
		whole(at(c.least, offerRow(0))+":"+at(c.multiple, last), 1, 100_000_000, "A whole number of pieces, 1 or more."),
		whole(at(c.breaks, offerRow(0))+":"+at(c.breaks+l.breaks-1, last), 1, 100_000_000, "The quantity from which the price holds; quantities rise from left to right."),
		amountFrom(at(c.prices, offerRow(0))+":"+at(c.prices+l.breaks-1, last), "The price of one piece in the offer's currency, above zero."),
		whole(at(c.pinNeed, offerRow(0))+":"+at(c.pinCount, last), 0, 1_000_000_000, "A quantity fixed for one need; empty: the cheapest offer."))
	s.marks = append(s.marks,
		mark{at(c.check, offerRow(0)) + ":" + at(c.check, last), at(c.check, offerRow(0)) + `<>"ok"`, markOver},
		mark{at(0, offerRow(0)) + ":" + at(c.check, last), fmt.Sprintf("$%s%d=0", letters(c.quantity), offerRow(0)), markDim})
	return s
}

func (b *book) priceHeads() []string {
	l := b.ledger
	heads := []string{"Part", "Supplier", "Order code", "In use", ">In stock", ">Lead time (days)", ">Can deliver", ">Least", ">Multiple", "Currency",
		">Rate to " + l.market.Currency}
	numbered := func(format string) {
		for i := range l.breaks {
			heads = append(heads, fmt.Sprintf(format, i+1))
		}
	}
	numbered(">From %d")
	numbered(">Price %d")
	money := " (" + l.market.Currency + ")"
	heads = append(heads, ">Needed", ">Buy", ">Unit price", ">Goods", ">Cost"+money, "Check", ">Planned for need", ">Planned pieces", ">Supplier no.", ">Part no.")
	numbered(">Try %d")
	numbered(">Try %d cost" + strings.ReplaceAll(money, "%", "%%"))
	return append(heads, ">Least cost"+money, ">Pieces then", ">Weighed", ">Pieces if tied", ">By itself", ">Unit price"+money, ">Order key", ">Order line")
}

// offerCells is one row of the price sheet.
func (b *book) offerCells(o *offering, row int) []cell {
	l, c := b.ledger, b.columns
	cells := make([]cell, c.width)
	cells[c.part], cells[c.supplier], cells[c.code] = say(o.item.part.Number), say(o.offer.Supplier), say(o.offer.OrderCode)
	cells[c.use] = live(note, `"yes"`, "yes")
	if o.seller != nil {
		cells[c.use] = live(note, b.sellerCell(o.seller, sellerUse), yes(o.seller.use))
		cells[c.seller] = count(o.seller.number)
	} else {
		cells[c.seller] = count(0)
	}
	cells[c.item] = count(b.itemRow(o.item) - partsHead)
	cells[c.stock], cells[c.lead] = stated(o.offer.Stock), stated(o.offer.LeadDays)
	cells[c.can] = cell{style: inWhole}
	if most, endless := l.terms.Available(o.offer); !endless && most < 1_000_000_000 {
		cells[c.can].value = most
	}
	cells[c.least], cells[c.multiple] = cell{style: inWhole, value: max(1, o.offer.Least)}, cell{style: inWhole, value: max(1, o.offer.Multiple)}
	currency := l.currencyOf(o)
	cells[c.currency] = say(currency)
	cells[c.rate] = b.rateCell(currency)
	for i := range l.breaks {
		cells[c.breaks+i], cells[c.prices+i] = cell{style: inWhole}, cell{style: inMoney}
		if i < len(o.offer.Prices) {
			cells[c.breaks+i].value = o.offer.Prices[i].Quantity
			cells[c.prices+i].value = o.offer.Prices[i].Price.Amount.InexactFloat64()
		}
	}
	b.tryCells(cells, o, row)
	b.chooseCells(cells, o, row)
	b.buyCells(cells, o, row)
	return cells
}

// stated shows a number that may not be stated.
func stated(n int) cell {
	if n < 0 {
		return cell{style: number}
	}
	return count(n)
}

func yes(b bool) string {
	if b {
		return "yes"
	}
	return "no"
}

// tryCells price the offer at the need and at each break above it.
func (b *book) tryCells(cells []cell, o *offering, row int) {
	l, c := b.ledger, b.columns
	ref := func(column int) string { return fmt.Sprintf("$%s%d", letters(column), row) }
	breaks, prices := across(c.breaks, c.breaks+l.breaks-1, row), across(c.prices, c.prices+l.breaks-1, row)
	digits := order.Digits(l.currencyOf(o))
	for i := range l.breaks {
		from, try := ref(c.breaks+i), ref(c.tries+i)
		cells[c.tries+i] = live(number, fmt.Sprintf(`IF(ISNUMBER(%s),INT((MAX(%s,%s,%s)+%s-1)/%s)*%s,"")`,
			from, ref(c.need), ref(c.least), from, ref(c.multiple), ref(c.multiple), ref(c.multiple)), "")
		price := fmt.Sprintf(`INDEX(%s,1,COUNTIF(%s,"<="&%s))`, prices, breaks, try)
		cells[c.costs+i] = live(money, fmt.Sprintf(
			`IF(ISNUMBER(%s),IF(%s="yes",IF(%s<=IF(ISNUMBER(%s),%s,1E+12),IF(%s*%s>0,ROUND(ROUND(%s*%s,%d)*%s,%d),""),""),""),"")`,
			try, ref(c.use), try, ref(c.can), ref(c.can), price, ref(c.rate), try, price, digits, ref(c.rate), l.market.Digits), "")
		if i < len(o.tries) {
			cells[c.tries+i].value = o.tries[i]
			if o.costs[i] >= 0 {
				cells[c.costs+i].value = b.money(o.costs[i])
			}
		}
	}
	tries, costs := across(c.tries, c.tries+l.breaks-1, row), across(c.costs, c.costs+l.breaks-1, row)
	cells[c.best] = live(money, fmt.Sprintf(`IF(COUNT(%s)=0,"",MIN(%s))`, costs, costs), "")
	cells[c.count] = live(number, fmt.Sprintf(`IF(COUNT(%s)=0,"",INDEX(%s,1,MATCH(MIN(%s),%s,0)))`, costs, tries, costs, costs), "")
	if o.best >= 0 {
		cells[c.best].value, cells[c.count].value = b.money(o.best), o.count
	}
}

// chooseCells pick among the offers of one part.
func (b *book) chooseCells(cells []cell, o *offering, row int) {
	l, c := b.ledger, b.columns
	ref := func(column int) string { return fmt.Sprintf("$%s%d", letters(column), row) }
	all := func(column int) string { return b.offersOf(o.item, column) }
	weight := "10000"
	if o.seller != nil {
		weight = b.sellerCell(o.seller, sellerWeight)
	}
	cells[c.weighed] = live(number, fmt.Sprintf(`IF(ISNUMBER(%s),ROUND(%s*1E+%d,0)*%s,"")`, ref(c.best), ref(c.best), l.market.Digits, weight), "")
	cells[c.tied] = live(number, fmt.Sprintf(`IF(ISNUMBER(%s),IF(%s=MIN(%s),%s,""),"")`, ref(c.weighed), ref(c.weighed), all(c.weighed), ref(c.count)), "")
	place := row - offerRow(o.item.first) + 1
	cells[c.own] = live(number, fmt.Sprintf(`IF(COUNT(%s)=0,0,IF(MATCH(MIN(%s),%s,0)=%d,%s,0))`, all(c.tied), all(c.tied), all(c.tied), place, ref(c.count)), 0)
	if w := o.weighed(); w >= 0 {
		cells[c.weighed].value = int(w)
		if w == o.item.least() {
			cells[c.tied].value = o.count
		}
	}
	if o == o.item.chosen() {
		cells[c.own].value = o.count
	}
}

// buyCells say what is bought and what it costs.
func (b *book) buyCells(cells []cell, o *offering, row int) {
	l, c := b.ledger, b.columns
	ref := func(column int) string { return fmt.Sprintf("$%s%d", letters(column), row) }
	breaks, prices := across(c.breaks, c.breaks+l.breaks-1, row), across(c.prices, c.prices+l.breaks-1, row)
	cells[c.need] = live(number, of(sheetParts, fixed(partsNeed, b.itemRow(o.item))), o.item.need)
	cells[c.pinNeed], cells[c.pinCount] = cell{style: inWhole}, cell{style: inWhole}
	if o.pinned {
		cells[c.pinNeed].value, cells[c.pinCount].value = o.pinNeed, o.pinCount
	}
	cells[c.quantity] = live(number, fmt.Sprintf(
		`IF(%s=0,0,IF(ISNUMBER(%s),IF(%s=%s,IF(SUMIF(%s,"yes",%s)>=%s,IF(%s="yes",%s,0),%s),%s),%s))`,
		ref(c.need), ref(c.pinNeed), ref(c.pinNeed), ref(c.need), b.offersOf(o.item, c.use), b.offersOf(o.item, c.pinCount), ref(c.need),
		ref(c.use), ref(c.pinCount), ref(c.own), ref(c.own), ref(c.own)), o.quantity)
	cells[c.unit] = live(unitPrice, fmt.Sprintf(`IF(%s=0,"",INDEX(%s,1,COUNTIF(%s,"<="&%s)))`, ref(c.quantity), prices, breaks, ref(c.quantity)), "")
	digits := order.Digits(l.currencyOf(o))
	cells[c.native] = live(money, fmt.Sprintf(`IF(%s=0,0,ROUND(%s*%s,%d))`, ref(c.quantity), ref(c.quantity), ref(c.unit), digits), b.amountIn(o.native, digits))
	cells[c.cost] = live(money, fmt.Sprintf(`ROUND(%s*%s,%d)`, ref(c.native), ref(c.rate), l.market.Digits), b.money(o.cost))
	cells[c.converted] = live(unitPrice, fmt.Sprintf(`IF(%s=0,"",ROUND(%s*%s,6))`, ref(c.quantity), ref(c.unit), ref(c.rate)), "")
	keys := span(c.key, offerRow(0), offerRow(len(l.offers)-1))
	cells[c.key] = live(number, fmt.Sprintf(`IF(%s>0,%s*100000+%d,"")`, ref(c.quantity), ref(c.seller), row), "")
	cells[c.rank] = live(number, fmt.Sprintf(`IF(ISNUMBER(%s),COUNTIF(%s,"<="&%s),"")`, ref(c.key), keys, ref(c.key)), "")
	if o.quantity > 0 {
		price := order.PriceFor(o.offer, o.quantity).Price
		cells[c.unit].value = price.Amount.InexactFloat64()
		cells[c.converted].value = l.unitPrice(o)
		cells[c.key].value, cells[c.rank].value = o.seller.number*100000+row, o.rank
	}
	cells[c.check] = live(note, b.checkFormula(row), b.checkOf(o))
}

// checkFormula finds breaks that do not rise, or a price that is missing.
func (b *book) checkFormula(row int) string {
	l, c := b.ledger, b.columns
	ref := func(column int) string { return fmt.Sprintf("$%s%d", letters(column), row) }
	var wrong []string
	for i := 1; i < l.breaks; i++ {
		wrong = append(wrong, fmt.Sprintf("IF(ISNUMBER(%s),IF(ISNUMBER(%s),IF(%s>%s,0,1),1),0)",
			ref(c.breaks+i), ref(c.breaks+i-1), ref(c.breaks+i), ref(c.breaks+i-1)))
	}
	breaks, prices := across(c.breaks, c.breaks+l.breaks-1, row), across(c.prices, c.prices+l.breaks-1, row)
	return fmt.Sprintf(`IF(COUNT(%s)=0,"NO PRICE",IF(%s>0,"BREAKS NOT RISING",IF(COUNT(%s)<>COUNTIF(%s,">0"),"PRICE MISSING",IF(%s>0,"ok","NO RATE"))))`,
		breaks, strings.Join(wrong, "+"), breaks, prices, ref(c.rate))
}

func (b *book) checkOf(o *offering) string {
	for _, step := range o.offer.Prices {
		if step.Price.Amount.Sign() <= 0 {
			return "PRICE MISSING"
		}
	}
	if len(o.offer.Prices) == 0 {
		return "NO PRICE"
	}
	if _, ok := b.ledger.market.Rate(b.ledger.currencyOf(o)); !ok {
		return "NO RATE"
	}
	return "ok"
}

// offersOf is the range of one column over an item's offers.
func (b *book) offersOf(it *item, column int) string {
	return span(column, offerRow(it.first), offerRow(it.first+len(it.offers)-1))
}
