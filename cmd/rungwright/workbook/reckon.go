package workbook

import (
	"slices"

	"rungwright/optimize/order"
)

// reckon works out needs, choices, costs and charges at the quantity shown.
func (l *ledger) reckon() {
	for _, it := range l.items {
		it.need = l.needAt(it, l.units)
		for _, o := range it.offers {
			l.try(o)
		}
		it.choose()
		for _, o := range it.offers {
			l.buy(o)
		}
	}
	l.rank()
	for _, s := range l.sellers {
		l.charge(s)
	}
}

// needAt is what has to be bought of an item for so many units.
func (l *ledger) needAt(it *item, units int) int {
	return max(0, l.spares[it.part.Kind].Over(units*it.perUnit)-it.inHand)
}

// try prices an offer at the need and at each break above it.
func (l *ledger) try(o *offering) {
	o.tries, o.costs, o.best, o.count = nil, nil, -1, 0
	for i := range o.offer.Prices {
		pieces := order.Orderable(o.offer, max(o.item.need, o.offer.Prices[i].Quantity))
		cost := l.costOf(o, pieces)
		o.tries, o.costs = append(o.tries, pieces), append(o.costs, cost)
		if cost >= 0 && (o.best < 0 || cost < o.best) {
			o.best, o.count = cost, pieces
		}
	}
}

// costOf is what so many pieces cost, or -1 where they cannot be had.
func (l *ledger) costOf(o *offering, pieces int) int64 {
	most, _ := l.terms.Available(o.offer)
	if o.seller == nil || !o.seller.use || pieces > most {
		return -1
	}
	if _, minor, ok := l.market.Line(order.PriceFor(o.offer, pieces).Price, pieces); ok {
		return minor
	}
	return -1
}

// weighed is the cost that choices compare: a preferred supplier's counts for
// less. -1 where there is none.
func (o *offering) weighed() int64 {
	if o.best < 0 {
		return -1
	}
	return o.best * int64(o.seller.weight)
}

// least is the smallest weighed cost among the offers, or -1.
func (it *item) least() int64 {
	least := int64(-1)
	for _, o := range it.offers {
		if w := o.weighed(); w >= 0 && (least < 0 || w < least) {
			least = w
		}
	}
	return least
}

// chosen is the offer that serves the item best by itself, or nil: least
// weighed cost, then fewest pieces, then the first.
func (it *item) chosen() *offering {
	var chosen *offering
	least := it.least()
	for _, o := range it.offers {
		if least >= 0 && o.weighed() == least && (chosen == nil || o.count < chosen.count) {
			chosen = o
		}
	}
	return chosen
}

// choose sets the quantities bought.
func (it *item) choose() {
	chosen, pinned := it.chosen(), it.pinHolds()
	for _, o := range it.offers {
		o.quantity = 0
		switch {
		case it.need == 0:
		case pinned && o.seller != nil && o.seller.use:
			o.quantity = o.pinCount
		case !pinned && o == chosen:
			o.quantity = o.count
		}
	}
}

// pinHolds tells whether the plan's quantities stand: at the planned need
// only, and only while the suppliers in use cover it.
func (it *item) pinHolds() bool {
	covered := 0
	for _, o := range it.offers {
		if o.seller != nil && o.seller.use {
			covered += o.pinCount
		}
	}
	return it.offers[0].pinned && it.offers[0].pinNeed == it.need && covered >= it.need
}

func (l *ledger) buy(o *offering) {
	o.native, o.cost = 0, 0
	if o.quantity > 0 {
		o.native, o.cost, _ = l.market.Line(order.PriceFor(o.offer, o.quantity).Price, o.quantity)
	}
}

// rank numbers the purchases by supplier, then as the parts stand.
func (l *ledger) rank() {
	bought := slices.DeleteFunc(slices.Clone(l.offers), func(o *offering) bool { o.rank = 0; return o.quantity == 0 })
	slices.SortStableFunc(bought, func(a, b *offering) int { return a.seller.number - b.seller.number })
	for i, o := range bought {
		o.rank = i + 1
	}
}

// charge sums one supplier's order.
func (l *ledger) charge(s *seller) {
	s.lines, s.goods, s.charged, s.fee = 0, 0, 0, 0
	for _, o := range l.offers {
		if o.seller == s && o.quantity > 0 {
			s.lines++
			s.goods += o.cost
		}
	}
	if s.lines > 0 {
		s.charged, s.fee = l.market.Charges(s.Supplier, s.goods)
	}
}

// bought is how many pieces of an item are bought.
func (it *item) bought() int {
	n := 0
	for _, o := range it.offers {
		n += o.quantity
	}
	return n
}

// cost is what an item costs; ok is false when it cannot be had in full.
func (it *item) cost() (minor int64, ok bool) {
	for _, o := range it.offers {
		minor += o.cost
	}
	return minor, it.bought() >= it.need
}

// goods and charges are the order's sums; open counts the parts left out.
func (l *ledger) sums() (goods, charges int64, open int) {
	for _, it := range l.items {
		if cost, ok := it.cost(); ok {
			goods += cost
		} else {
			open++
		}
	}
	for _, s := range l.sellers {
		charges += s.charged + s.fee
	}
	return goods, charges, open
}

// unitPrice is what one piece costs in the book's currency, to six places.
func (l *ledger) unitPrice(o *offering) float64 {
	price := order.PriceFor(o.offer, o.quantity).Price
	rate, _ := l.market.Rate(price.Currency)
	return price.Amount.Mul(rate).Round(6).InexactFloat64()
}
