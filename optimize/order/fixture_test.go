package order

import (
	"fmt"
	"math/rand/v2"

	"github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

func amount(text string) decimal.Decimal { return decimal.RequireFromString(text) }

func euros(text string) quantity.Money { return quantity.Money{Amount: amount(text), Currency: "EUR"} }

// offer is one with unknown stock: least, multiple, then quantity and price in turn.
func offer(supplier string, least, multiple int, prices ...any) catalog.Offer {
	o := catalog.Offer{Supplier: supplier, OrderCode: supplier + "-1", Stock: -1, LeadDays: -1, Least: least, Multiple: multiple}
	for i := 0; i < len(prices); i += 2 {
		o.Prices = append(o.Prices, catalog.Break{Quantity: prices[i].(int), Price: euros(prices[i+1].(string))})
	}
	return o
}

func part(number string, offers ...catalog.Offer) *catalog.Part {
	return &catalog.Part{Number: number, Kind: catalog.KindOther, Offers: offers}
}

// randomPart has offers of small whole quantities, so that everything can be
// tried; prices fall or rise with the breaks, and have three decimals.
func randomPart(r *rand.Rand, number string, suppliers, breaks, pieces int) *catalog.Part {
	p := part(number)
	for s := range suppliers {
		if r.IntN(4) == 0 && s > 0 {
			continue
		}
		o := catalog.Offer{Supplier: fmt.Sprintf("S%d", s), OrderCode: number, Stock: r.IntN(pieces+2) - 1,
			LeadDays: r.IntN(4) - 1, Least: 1 + r.IntN(3), Multiple: 1 + r.IntN(3)}
		price, at := 200+r.IntN(800), 1
		for range 1 + r.IntN(breaks) {
			o.Prices = append(o.Prices, catalog.Break{Quantity: at, Price: quantity.Money{Amount: decimal.New(int64(price), -3), Currency: "EUR"}})
			at += 1 + r.IntN(4)
			price = max(60, price-r.IntN(300)+40)
		}
		p.Offers = append(p.Offers, o)
	}
	return p
}
