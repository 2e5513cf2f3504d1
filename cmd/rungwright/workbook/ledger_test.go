package workbook

import (
	"fmt"
	"math/rand/v2"
	"testing"

	exact "github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize"
	"rungwright/optimize/order"
)

// randomDesign has a few parts at suppliers with charges, small stocks and two
// currencies, so that plans split lines and reach for thresholds.
func randomDesign(r *rand.Rand) (*optimize.Design, Options) {
	d := &optimize.Design{Currency: "EUR"}
	d.Supply.Build = optimize.Build{Units: 1 + r.IntN(40), Spares: quantity.Ratio(r.IntN(6)) / 100}
	o := Options{InHand: map[string]int{}, Terms: order.Terms{Currency: "EUR", NeedBy: r.IntN(3) * 7,
		Rates: map[string]exact.Decimal{"USD": exact.RequireFromString("0.9137")}}}
	codes := []string{"EUR", "USD", "EUR"}
	for s, code := range codes {
		o.Suppliers = append(o.Suppliers, catalog.Supplier{Name: fmt.Sprint("S", s), Currency: code, Delivery: sum(fmt.Sprint(r.IntN(12)), code),
			FreeAbove: sum(fmt.Sprint(r.IntN(80)), code), SmallOrder: sum(fmt.Sprint(r.IntN(30)), code), SmallOrderFee: sum(fmt.Sprint(r.IntN(6)), code)})
	}
	for i := range 1 + r.IntN(5) {
		p := &catalog.Part{Number: fmt.Sprint("P", i), Kind: catalog.KindOther, Other: &catalog.Other{}}
		for s, code := range codes {
			if r.IntN(3) > 0 {
				offer := catalog.Offer{Supplier: fmt.Sprint("S", s), Stock: r.IntN(150) - 1, LeadDays: r.IntN(20) - 1, Least: 1 + r.IntN(10), Multiple: 1 + r.IntN(5)}
				at, price := 1, 300+r.IntN(5000)
				for range 1 + r.IntN(4) {
					offer.Prices = append(offer.Prices, catalog.Break{Quantity: at, Price: quantity.Money{Amount: exact.New(int64(price), -4), Currency: code}})
					at, price = at*2+r.IntN(50), price*(70+r.IntN(35))/100
				}
				p.Offers = append(p.Offers, offer)
			}
		}
		o.InHand[p.Number] = max(0, r.IntN(20)-14)
		d.Lines = append(d.Lines, optimize.Line{Part: p, Refs: names(fmt.Sprint("X", i, "."), 1, 1+r.IntN(6)), Role: optimize.RoleExtra})
	}
	return d, o
}

// Whatever the plan, the sheets' arithmetic at the planned quantity gives its
// total, and buys what it buys.
func TestLedgerFollowsAnyPlan(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 8))
	pinned, split := 0, 0
	for trial := range 300 {
		d, o := randomDesign(r)
		o = planned(t, d, o)
		l := newLedger(d, o, d.Supply.Build.Units)
		goods, charges, open := l.sums()
		if got := l.market.Amount(goods + charges); !got.Equal(o.Plan.Total) || open != len(o.Plan.Unserved) {
			t.Fatalf("trial %d: got %s with %d open, the plan says %s with %d", trial, got, open, o.Plan.Total, len(o.Plan.Unserved))
		}
		for i, line := range o.Plan.Lines {
			if len(line.Purchases) > 1 {
				split++
			}
			if l.items[i].offers[0].pinned {
				pinned++
			}
		}
	}
	if pinned < 30 || split < 10 {
		t.Errorf("the trials are too tame: %d pinned, %d split", pinned, split)
	}
}
