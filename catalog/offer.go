package catalog

import (
	"math"

	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

const secondsPerDay = 24 * 60 * 60

// mostLead bounds a lead time; ten years is a slip.
const mostLead quantity.Seconds = 3650 * secondsPerDay

func readOffer(m *form.Map) Offer {
	m.Require("supplier", "prices")
	o := Offer{
		Supplier:  text(m, "supplier", mostName),
		OrderCode: text(m, "order_code", mostName),
		Stock:     m.Int("stock", 0, mostPieces, -1),
		LeadDays:  readLead(m),
		Least:     m.Int("least", 1, mostPieces, 1),
		Multiple:  m.Int("multiple", 1, mostPieces, 1),
		Prices:    readPrices(m),
		Place:     m.Place,
	}
	if len(o.Prices) > 0 && o.Prices[0].Quantity > o.Least {
		m.Problem("prices", "no price is given below %d, yet the least order is %d; write least: %d, or add the price",
			o.Prices[0].Quantity, o.Least, o.Prices[0].Quantity)
	}
	m.Done()
	return o
}

// readLead reads a lead time as whole days, rounded up; -1 when absent.
func readLead(m *form.Map) int {
	written := m.Text("lead")
	if written == "" {
		return -1
	}
	lead, err := quantity.Read[quantity.Seconds](written)
	if err != nil || lead < 0 || lead > mostLead {
		m.Problem("lead", "%q is not a lead time; write days or weeks, such as 14 d or 3 wk", written)
		return -1
	}
	return int(math.Ceil(float64(lead) / secondsPerDay))
}

// readPrices reads [[1, 0.62 EUR], [100, 0.41 EUR]]: rising quantities, unit
// prices above zero that do not rise, in one currency.
func readPrices(m *form.Map) []Break {
	var breaks []Break
	list := m.List("prices")
	if m.Has("prices") && len(list) == 0 {
		m.Problem("prices", "there is no price; write one such as [[1, 0.62 EUR]]")
	}
	for _, i := range list {
		pair := i.Items()
		if len(pair) != 2 {
			i.Problem("a price must be a pair of a quantity and a unit price, such as [1, 0.62 EUR]")
			continue
		}
		b := Break{pair[0].Int(1, mostPieces, 0), pair[1].Money()}
		if b.Quantity == 0 || b.Price.Currency == "" {
			continue // reported
		}
		if !b.Price.Amount.IsPositive() {
			pair[1].Problem("the price is zero; write what one piece costs, or leave the offer out")
			continue
		}
		if n := len(breaks); n > 0 {
			checkBreak(breaks[n-1], b, pair)
		}
		breaks = append(breaks, b)
	}
	return breaks
}

// checkBreak compares a price break with the one before it.
func checkBreak(before, b Break, pair []form.Item) {
	switch {
	case b.Quantity <= before.Quantity:
		pair[0].Problem("the price break at %d does not come after the one at %d; put the breaks in rising order, each once",
			b.Quantity, before.Quantity)
	case b.Price.Currency != before.Price.Currency:
		pair[1].Problem("the price is in %s, the one before in %s; give an offer's prices in one currency",
			b.Price.Currency, before.Price.Currency)
	case b.Price.Amount.GreaterThan(before.Price.Amount):
		pair[1].Problem("the unit price rises from %v to %v as the quantity rises; check both", before.Price, b.Price)
	}
}

func readSupplier(m *form.Map) Supplier {
	m.Require("name", "currency")
	s := Supplier{
		Name:          text(m, "name", mostName),
		Currency:      m.Text("currency"),
		Delivery:      m.Money("delivery"),
		FreeAbove:     m.Money("free_above"),
		SmallOrderFee: m.Money("small_order_fee"),
		SmallOrder:    m.Money("small_order"),
		Place:         m.PlaceOf("name"),
	}
	if s.Currency != "" {
		if err := quantity.CheckCurrency(s.Currency); err != nil {
			m.Problem("currency", "%v", err)
			s.Currency = ""
		}
	}
	s.checkCharges(m)
	m.Done()
	return s
}

func (s Supplier) checkCharges(m *form.Map) {
	for _, charge := range []struct {
		key   string
		money quantity.Money
	}{{"delivery", s.Delivery}, {"free_above", s.FreeAbove}, {"small_order_fee", s.SmallOrderFee}, {"small_order", s.SmallOrder}} {
		if c := charge.money.Currency; c != "" && s.Currency != "" && c != s.Currency {
			m.Problem(charge.key, "the amount is in %s, but the supplier's currency is %s; use one", c, s.Currency)
		}
	}
	if m.Has("small_order") != m.Has("small_order_fee") {
		m.Problem("small_order", "small_order and small_order_fee belong together; give both or neither")
	}
	if m.Has("free_above") && !m.Has("delivery") {
		m.Problem("free_above", "delivery is free above this, but no charge for delivery is given; add delivery")
	}
}
