// Package order decides how many pieces to buy of what from whom. Money is
// exact: prices and rates are decimals, sums are whole minor units (cents) of
// the currency that the answer is counted in. A line is rounded half up to the
// minor unit of the price's currency, as an invoice is, and once more when a
// rate converts it.
package order

import (
	"math"
	"slices"

	"github.com/shopspring/decimal"

	"rungwright/catalog"
)

// Terms are the buyer's conditions; the zero value accepts every offer.
type Terms struct {
	Currency    string                     // what the answer is counted in; empty: offers' own when all agree
	Rates       map[string]decimal.Decimal // units of Currency for one unit of the key's currency
	Excluded    []string                   // suppliers not to buy from
	NeedBy      int                        // days until the parts must be there; zero: no date
	IgnoreStock bool                       // treat every offer as able to deliver any number
	Preferred   []string                   // suppliers that may be dearer by Premium and still win
	Premium     float64                    // share of the price, 0.03 for 3 %; counted in hundredths of a percent
}

// Purchase is one order line.
type Purchase struct {
	Part      *catalog.Part
	Offer     *catalog.Offer
	Quantity  int             // ordered, from minimum, multiple and buying up to a cheaper break
	UnitPrice decimal.Decimal // in the terms' currency
	Cost      decimal.Decimal // rounded to the currency's minor unit
}

// Cheapest is the least-cost single purchase of at least quantity pieces of a
// part: over offers, price breaks, buying up to a cheaper break, minimum and
// multiple. Equal costs go to fewer pieces, then to the supplier and order
// code that come first. ok is false when no offer can serve. It knows nothing
// of supplier charges or preferences, which need the whole order: see Make.
func Cheapest(part *catalog.Part, quantity int, terms Terms) (p Purchase, ok bool) {
	if quantity <= 0 {
		return Purchase{Part: part}, true
	}
	currency := terms.Currency
	if currency == "" {
		if currency = commonCurrency(part); currency == "" {
			return Purchase{}, false
		}
	}
	m := NewMarket(terms, currency)
	var best quote
	for i := range part.Offers {
		offer := &part.Offers[i]
		if slices.Contains(terms.Excluded, offer.Supplier) {
			continue
		}
		if q, found := m.least(offer, quantity); found && (best.offer == nil || q.before(best)) {
			best = q
		}
	}
	if best.offer == nil {
		return Purchase{}, false
	}
	return m.purchase(part, best), true
}

// WithSpares is need plus its share of spares, rounded up, in exact integer
// arithmetic on hundredths of a percent.
func WithSpares(need int, spares float64) int {
	return need + (need*hundredths(spares)+9999)/10000
}

// hundredths is a share in hundredths of a percent.
func hundredths(share float64) int { return int(math.Round(share * 10000)) }

// commonCurrency is the currency that all prices of a part share, or "".
func commonCurrency(part *catalog.Part) string {
	currency := ""
	for i := range part.Offers {
		for _, b := range part.Offers[i].Prices {
			if currency == "" {
				currency = b.Price.Currency
			}
			if b.Price.Currency != currency {
				return ""
			}
		}
	}
	return currency
}
