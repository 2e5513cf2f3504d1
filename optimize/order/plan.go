package order

import (
	"github.com/shopspring/decimal"

	"rungwright/catalog"
)

// Need is a part with the pieces wanted, spares included.
type Need struct {
	Part   *catalog.Part
	Pieces int
	InHand int // in the drawer already, taken first
}

// Net is what is left to buy.
func (n Need) Net() int { return max(0, n.Pieces-n.InHand) }

// Plan is an order over suppliers.
type Plan struct {
	Currency string
	Lines    []PlannedLine // in the order of the needs
	Orders   []SupplierOrder
	Goods    decimal.Decimal
	Charges  decimal.Decimal
	Total    decimal.Decimal
	Unserved []Unserved      // needs that nobody can deliver; the sums leave them out
	LeftOut  []string        // suppliers that were not weighed, being too many
	Proved   bool            // nothing cheaper exists, whatever the quantities
	Slack    decimal.Decimal // when not proved: how far below Total the least could lie
}

// PlannedLine is one need with what is bought for it; several purchases when
// the line is split.
type PlannedLine struct {
	Need      Need
	Purchases []Purchase
	Cost      decimal.Decimal
}

// SupplierOrder is what goes to one supplier.
type SupplierOrder struct {
	Supplier      catalog.Supplier
	Purchases     []Purchase
	Goods         decimal.Decimal
	Delivery      decimal.Decimal
	SmallOrderFee decimal.Decimal
	Total         decimal.Decimal
	Days          int // until all has come: the longest lead time of what is not on the shelf; -1 where not stated
}

// Unserved is a need without enough offers, and why.
type Unserved struct {
	Need Need
	Why  string
}
