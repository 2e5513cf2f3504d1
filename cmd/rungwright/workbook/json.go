package workbook

import (
	"encoding/json"

	"github.com/shopspring/decimal"

	"rungwright/catalog/quantity"
	"rungwright/optimize/order"
)

// The JSON form of an order: amounts are decimal strings, keys carry units.
type jsonOrder struct {
	Currency string         `json:"currency"`
	Goods    string         `json:"goods"`
	Charges  string         `json:"charges"`
	Total    string         `json:"total"`
	Proved   bool           `json:"proved"`
	Slack    string         `json:"slack,omitempty"`
	Orders   []jsonSupplier `json:"orders"`
	Unserved []jsonUnserved `json:"unserved"`
	LeftOut  []string       `json:"suppliers_left_out,omitempty"`
}

type jsonSupplier struct {
	Supplier string     `json:"supplier"`
	Goods    string     `json:"goods"`
	Delivery string     `json:"delivery"`
	Fee      string     `json:"small_order_fee"`
	Total    string     `json:"total"`
	Days     *int       `json:"days"`
	Lines    []jsonLine `json:"lines"`
}

type jsonLine struct {
	OrderCode string `json:"order_code"`
	Part      string `json:"part"`
	Maker     string `json:"maker"`
	Quantity  int    `json:"quantity"`
	Price     string `json:"unit_price"`
	Currency  string `json:"price_currency"`
	Cost      string `json:"cost"`
}

type jsonUnserved struct {
	Part   string `json:"part"`
	Pieces int    `json:"pieces"`
	Why    string `json:"why"`
}

// OrderJSON is a plan as JSON, the same bytes for the same plan.
func OrderJSON(p *order.Plan) ([]byte, error) {
	digits := int32(order.Digits(p.Currency))
	fixed := func(d decimal.Decimal) string { return d.StringFixed(digits) }
	out := jsonOrder{Currency: p.Currency, Goods: fixed(p.Goods), Charges: fixed(p.Charges), Total: fixed(p.Total), Proved: p.Proved,
		Orders: []jsonSupplier{}, Unserved: []jsonUnserved{}, LeftOut: p.LeftOut}
	if !p.Slack.IsZero() {
		out.Slack = fixed(p.Slack)
	}
	for _, o := range p.Orders {
		s := jsonSupplier{Supplier: o.Supplier.Name, Goods: fixed(o.Goods), Delivery: fixed(o.Delivery), Fee: fixed(o.SmallOrderFee), Total: fixed(o.Total)}
		if o.Days >= 0 {
			s.Days = &o.Days
		}
		for _, b := range o.Purchases {
			s.Lines = append(s.Lines, lineOf(b, fixed))
		}
		out.Orders = append(out.Orders, s)
	}
	for _, u := range p.Unserved {
		out.Unserved = append(out.Unserved, jsonUnserved{u.Need.Part.Number, u.Need.Net(), u.Why})
	}
	data, err := json.MarshalIndent(out, "", "  ")
	return append(data, '\n'), err
}

func lineOf(b order.Purchase, fixed func(decimal.Decimal) string) jsonLine {
	var price quantity.Money
	if at := order.PriceFor(b.Offer, b.Quantity); at != nil {
		price = at.Price
	}
	return jsonLine{OrderCode: b.Offer.OrderCode, Part: b.Part.Number, Maker: b.Part.Maker, Quantity: b.Quantity,
		Price: price.Amount.String(), Currency: price.Currency, Cost: fixed(b.Cost)}
}
