package quantity

import (
	"errors"
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"

	"github.com/shopspring/decimal"
	"golang.org/x/text/currency"
)

// Money is an exact amount in one currency, by ISO 4217 code ("EUR").
type Money struct {
	Amount   decimal.Decimal
	Currency string
}

// The digits that an amount may have.
const (
	maxWhole   = 12
	maxDecimal = 9
)

// ParseMoney reads "0.62 EUR" or "EUR 0.62".
func ParseMoney(text string) (Money, error) {
	if utf8.RuneCountInString(text) > maxText {
		return Money{}, fmt.Errorf("%q… is too long for an amount; write it such as 0.62 EUR", string([]rune(text)[:20]))
	}
	trimmed := strings.TrimFunc(text, unicode.IsSpace)
	amount, code := cutCode(trimmed)
	n, rest := scanNumber(amount)
	if code == "" || !n.ok() || rest != "" || n.exponent != "" {
		return Money{}, explainMoney(trimmed, rest)
	}
	if err := CheckCurrency(code); err != nil {
		return Money{}, fmt.Errorf("%q: %w", trimmed, err)
	}
	if len(n.whole) > maxWhole || len(n.decimal) > maxDecimal {
		return Money{}, fmt.Errorf("%q has more digits than an amount may have; write %d before and %d after the point at most",
			trimmed, maxWhole, maxDecimal)
	}
	value, err := decimal.NewFromString("0" + n.whole + "." + n.decimal + "0")
	if err != nil {
		panic("quantity: " + err.Error()) // the parts are digits by construction
	}
	if n.negative {
		value = value.Neg()
	}
	return Money{value, code}, nil
}

// cutCode takes the currency code from the end or the start.
func cutCode(text string) (amount, code string) {
	isCode := func(r rune) bool { return unicode.IsLetter(r) }
	if end := strings.TrimRightFunc(text, isCode); end != text {
		return strings.TrimRightFunc(end, unicode.IsSpace), text[len(end):]
	}
	start := strings.TrimLeftFunc(text, isCode)
	return strings.TrimLeftFunc(start, unicode.IsSpace), text[:len(text)-len(start)]
}

// CheckCurrency says whether code is an ISO 4217 code in capitals.
func CheckCurrency(code string) error {
	if len(code) == 3 {
		unit, err := currency.ParseISO(code)
		switch {
		case err == nil && unit.String() == code:
			return nil
		case err == nil:
			return fmt.Errorf("write the currency code in capitals, %s", unit)
		}
	}
	if len(code) > 12 {
		code = strings.ToValidUTF8(code[:12], "") + "…"
	}
	return fmt.Errorf("%q is not a currency; write an ISO 4217 code, such as EUR, USD or GBP", code)
}

func explainMoney(text, rest string) error {
	if text == "" {
		return errors.New("nothing is written; write an amount and a currency code, such as 0.62 EUR")
	}
	if n, after := scanNumber(text); n.ok() && after != "" {
		rest = after
	}
	if err := explainDigits(text, rest); err != nil {
		return err
	}
	if strings.ContainsFunc(text, func(r rune) bool { return unicode.Is(unicode.Sc, r) }) {
		return fmt.Errorf("%q: write the currency as its ISO 4217 code instead of a sign, such as 0.62 EUR", text)
	}
	if n, after := scanNumber(text); n.ok() && after == "" {
		return fmt.Errorf("%q has no currency; write an amount and a currency code, such as 0.62 EUR", text)
	}
	return fmt.Errorf("%q is not an amount of money; write an amount and a currency code, such as 0.62 EUR", text)
}

// String prints the exact amount with its currency, "0.62 EUR", with no fewer
// decimals than the currency has.
func (m Money) String() string {
	if m.Currency == "" {
		return m.Amount.String()
	}
	places := 2
	if unit, err := currency.ParseISO(m.Currency); err == nil {
		places, _ = currency.Standard.Rounding(unit)
	}
	text := m.Amount.String()
	if _, decimals, _ := strings.Cut(text, "."); len(decimals) < places {
		text = m.Amount.StringFixed(int32(places))
	}
	return text + " " + m.Currency
}
