package order

import (
	"cmp"
	"slices"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// Charges are what a supplier adds to an order whose goods come to so many
// minor units of the market's currency: delivery unless the goods reach
// FreeAbove, and a fee when they stay below SmallOrder. Amounts in another
// currency are converted at the market's rate first, thresholds too.
func (m *Market) Charges(s catalog.Supplier, goods int64) (delivery, fee int64) {
	if free := m.charge(s, s.FreeAbove); free == 0 || goods < free {
		delivery = m.charge(s, s.Delivery)
	}
	if goods < m.charge(s, s.SmallOrder) {
		fee = m.charge(s, s.SmallOrderFee)
	}
	return delivery, fee
}

// charge is one of a supplier's amounts in the market's minor units; zero
// when not set.
func (m *Market) charge(s catalog.Supplier, amount quantity.Money) int64 {
	minor, _ := m.Convert(amount.Amount, cmp.Or(amount.Currency, s.Currency, m.Currency))
	return minor
}

// Weight is what the plan multiplies a supplier's costs with when it compares:
// 10000 for a preferred one, or for all when none is preferred, and more by
// the premium for any other. Whole numbers keep comparisons exact.
func (t Terms) Weight(supplier string) int {
	if len(t.Preferred) == 0 || slices.Contains(t.Preferred, supplier) {
		return 10000
	}
	return 10000 + hundredths(t.Premium)
}
