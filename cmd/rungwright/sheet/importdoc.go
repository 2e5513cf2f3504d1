package sheet

import (
	"slices"
	"strings"

	"github.com/shopspring/decimal"

	"rungwright/catalog/form"
)

// doc is the part as a catalog writes it.
func (r *record) doc() *form.Doc {
	doc := nest(r.part)
	var offers form.List
	for _, o := range r.offers {
		offers = append(offers, o.doc())
	}
	if len(offers) > 0 {
		doc.Set("offers", offers)
	}
	return doc
}

func (o *offerRecord) doc() *form.Doc { return nest(o.fields).Set("prices", o.priceList()) }

// sorted are the price breaks in rising order.
func (o *offerRecord) sorted() []pricePoint {
	prices := slices.Clone(o.prices)
	slices.SortStableFunc(prices, func(a, b pricePoint) int { return a.quantity - b.quantity })
	return prices
}

func (o *offerRecord) priceList() form.List {
	var list form.List
	for _, p := range o.sorted() {
		list = append(list, form.List{p.quantity, p.price})
	}
	return list
}

// nest turns dotted keys into mappings, each written on one line.
func nest(fields []keyed) *form.Doc {
	doc := form.NewMap()
	inner := map[string]*form.Doc{}
	for _, f := range fields {
		outer, rest, dotted := strings.Cut(f.key, ".")
		if !dotted {
			doc.Set(f.key, f.value)
			continue
		}
		if inner[outer] == nil {
			inner[outer] = form.NewMap().Flow()
			doc.Set(outer, inner[outer])
		}
		inner[outer].Set(rest, f.value)
	}
	return doc
}

// samePrice compares two unit prices as amounts: 0.60 EUR is 0.6 EUR.
func samePrice(a, b string) bool {
	amountA, codeA, _ := strings.Cut(a, " ")
	amountB, codeB, _ := strings.Cut(b, " ")
	x, err1 := decimal.NewFromString(amountA)
	y, err2 := decimal.NewFromString(amountB)
	return codeA == codeB && err1 == nil && err2 == nil && x.Equal(y)
}
