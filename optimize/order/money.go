package order

import (
	"math/bits"

	"github.com/shopspring/decimal"
	"golang.org/x/text/currency"

	"rungwright/catalog/quantity"
)

// mostMinor bounds every amount, so that sums over lines stay far inside an
// int64: ten thousand million million minor units.
const mostMinor = 1e13

// Digits is how many decimals an ISO 4217 currency has (2 for EUR, 0 for JPY,
// 3 for KWD), from the CLDR data of golang.org/x/text; 2 for an unknown code.
func Digits(code string) int {
	switch code { // spares the table look-up where it is hot
	case "EUR", "USD", "GBP", "CHF":
		return 2
	}
	unit, err := currency.ParseISO(code)
	if err != nil {
		return 2
	}
	scale, _ := currency.Standard.Rounding(unit)
	return scale
}

var pow10 = [...]uint64{1, 10, 100, 1000, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10,
	1e11, 1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18}

// times is price × n in minor units of 10^-digits, rounded half up. ok is
// false for a price that is not above zero and for an absurd amount. Prices of
// up to 18 digits take integer arithmetic, any other the decimals; both give
// the same.
func times(price decimal.Decimal, n, digits int) (minor int64, ok bool) {
	if price.Sign() <= 0 || n <= 0 {
		return 0, false
	}
	if price.NumDigits() <= 18 {
		hi, lo := bits.Mul64(uint64(price.CoefficientInt64()), uint64(n))
		if shift := int(price.Exponent()) + digits; hi == 0 && shift <= 0 && -shift < len(pow10) {
			whole, rest := lo/pow10[-shift], lo%pow10[-shift]
			if shift < 0 && rest >= pow10[-shift]-rest {
				whole++
			}
			return int64(whole), whole <= mostMinor
		}
	}
	return toMinor(price.Mul(decimal.NewFromInt(int64(n))), digits)
}

// toMinor rounds an amount half up to minor units.
func toMinor(amount decimal.Decimal, digits int) (int64, bool) {
	if amount.Exponent() > 18 { // 10^18 and more: not money
		return 0, amount.Sign() == 0
	}
	d := amount.Shift(int32(digits)).Round(0)
	if d.NumDigits() > 18 || d.IntPart() > mostMinor {
		return 0, false
	}
	return d.IntPart(), true
}

// fromMinor is the amount that minor units stand for.
func fromMinor(minor int64, digits int) decimal.Decimal { return decimal.New(minor, int32(-digits)) }

var one = decimal.NewFromInt(1)

// Rate is the units of the market's currency for one unit of code.
func (m *Market) Rate(code string) (decimal.Decimal, bool) {
	if code == m.Currency {
		return one, true
	}
	r, ok := m.terms.Rates[code]
	return r, ok && r.Sign() > 0
}

// Line is what n pieces cost at a unit price: native in minor units of the
// price's currency, minor in those of the market's.
func (m *Market) Line(price quantity.Money, n int) (native, minor int64, ok bool) {
	if price.Currency == m.Currency {
		native, ok = times(price.Amount, n, m.Digits)
		return native, native, ok
	}
	digits := Digits(price.Currency)
	if native, ok = times(price.Amount, n, digits); !ok {
		return 0, 0, false
	}
	minor, ok = m.Convert(fromMinor(native, digits), price.Currency)
	return native, minor, ok
}

// Convert is an amount of any currency in the market's minor units.
func (m *Market) Convert(amount decimal.Decimal, code string) (int64, bool) {
	rate, ok := m.Rate(code)
	if !ok {
		return 0, false
	}
	return toMinor(amount.Mul(rate), m.Digits)
}

// Amount is what minor units of the market's currency stand for.
func (m *Market) Amount(minor int64) decimal.Decimal { return fromMinor(minor, m.Digits) }
