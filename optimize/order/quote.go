package order

import (
	"math"

	"rungwright/catalog"
)

// unlimited is the capacity of an offer that can deliver any number.
const unlimited = math.MaxInt32

// Market is the terms made ready for many questions in one currency.
type Market struct {
	Currency string
	Digits   int // decimals of the currency
	terms    Terms
}

// NewMarket makes a market that counts in the currency, whatever the terms say.
func NewMarket(terms Terms, currency string) *Market {
	return &Market{Currency: currency, Digits: Digits(currency), terms: terms}
}

// quote is one possible purchase from one offer.
type quote struct {
	offer    *catalog.Offer
	quantity int
	minor    int64 // cost in the market's minor units
}

// before is the total order of quotes: cost, pieces, supplier, order code.
func (q quote) before(r quote) bool {
	switch {
	case q.minor != r.minor:
		return q.minor < r.minor
	case q.quantity != r.quantity:
		return q.quantity < r.quantity
	case q.offer.Supplier != r.offer.Supplier:
		return q.offer.Supplier < r.offer.Supplier
	}
	return q.offer.OrderCode < r.offer.OrderCode
}

// Available is how many pieces an offer can deliver under the terms: what is
// on the shelf, and any number where a stated lead time keeps the date (or
// where no date is set and the stock is not stated). Neither stated with a
// date set counts as none: nobody has promised it.
func (t Terms) Available(o *catalog.Offer) (pieces int, endless bool) {
	switch inTime := o.LeadDays >= 0 && (t.NeedBy == 0 || o.LeadDays <= t.NeedBy); {
	case t.IgnoreStock || inTime:
		return unlimited, true
	case o.Stock >= 0:
		return o.Stock, false
	case t.NeedBy == 0:
		return unlimited, true
	}
	return 0, false
}

// Orderable rounds a number of pieces up to what the offer sells: its minimum
// and first break, then its multiple.
func Orderable(o *catalog.Offer, pieces int) int {
	pieces = max(pieces, o.Least)
	if len(o.Prices) > 0 {
		pieces = max(pieces, o.Prices[0].Quantity)
	}
	multiple := max(1, o.Multiple)
	return (pieces + multiple - 1) / multiple * multiple
}

// PriceFor is the break whose price holds at a quantity; nil below the first.
func PriceFor(o *catalog.Offer, quantity int) *catalog.Break {
	var b *catalog.Break
	for i := range o.Prices {
		if o.Prices[i].Quantity > quantity {
			break
		}
		b = &o.Prices[i]
	}
	return b
}

// exactly is the quote for a quantity that the offer sells.
func (m *Market) exactly(o *catalog.Offer, quantity int) (quote, bool) {
	b := PriceFor(o, quantity)
	if b == nil {
		return quote{}, false
	}
	_, minor, ok := m.Line(b.Price, quantity)
	return quote{o, quantity, minor}, ok
}

// least is the cheapest quote for at least quantity pieces: at the need, or
// bought up to any break above it.
func (m *Market) least(o *catalog.Offer, quantity int) (best quote, ok bool) {
	most, _ := m.terms.Available(o)
	for i := range o.Prices {
		if i+1 < len(o.Prices) && o.Prices[i+1].Quantity <= quantity {
			continue // the next break asks for no more pieces
		}
		tried := Orderable(o, max(quantity, o.Prices[i].Quantity))
		if tried > most {
			break
		}
		if q, priced := m.exactly(o, tried); priced && (!ok || q.before(best)) {
			best, ok = q, true
		}
	}
	return best, ok
}

// purchase is a quote with its prices in the market's currency.
func (m *Market) purchase(part *catalog.Part, q quote) Purchase {
	price := PriceFor(q.offer, q.quantity).Price
	p := Purchase{Part: part, Offer: q.offer, Quantity: q.quantity, UnitPrice: price.Amount,
		Cost: m.Amount(q.minor)}
	if price.Currency != m.Currency {
		rate, _ := m.Rate(price.Currency)
		p.UnitPrice = price.Amount.Mul(rate)
	}
	return p
}
