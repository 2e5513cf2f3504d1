// Package order decides how many pieces to buy of what from whom. Money is
// exact decimal throughout.
package order

import (
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
// multiple. ok is false when no offer can serve.
func Cheapest(part *catalog.Part, quantity int, terms Terms) (p Purchase, ok bool) {
	return Purchase{}, false
}

// WithSpares is need plus its share of spares, rounded up, in exact integer
// arithmetic on hundredths of a percent.
func WithSpares(need int, spares float64) int { return need }
