package report

import (
	"math"
	"strconv"
	"strings"

	"github.com/shopspring/decimal"

	"rungwright/catalog/quantity"
	"rungwright/optimize/order"
)

// percent is a share in whole per cent; what is over never reads as 100 %, nor
// what is within as more.
func percent(share float64) string {
	p := math.Round(100 * share)
	switch {
	case math.IsNaN(share):
		return "not known"
	case share > 10:
		return "more than 1000 %"
	case share < 1 && p >= 100:
		return strconv.FormatFloat(math.Floor(1000*share)/10, 'f', 1, 64) + " %"
	case share > 1 && p <= 100:
		return strconv.FormatFloat(math.Ceil(1000*share)/10, 'f', 1, 64) + " %"
	case share > 0 && p == 0:
		return "below 1 %"
	}
	return strconv.FormatFloat(p, 'f', 0, 64) + " %"
}

// volts, amps, watts and seconds print a value with as many digits as are
// honest for a simulated one.
func volts(v float64) string   { return minus(quantity.Format(v, quantity.Voltage, 4)) }
func amps(v float64) string    { return quantity.Format(v, quantity.Current, 3) }
func watts(v float64) string   { return quantity.Format(v, quantity.Power, 3) }
func seconds(v float64) string { return quantity.Format(v, quantity.Time, 3) }

// minus writes a negative number with the proper sign; quantity's own can be
// read again by machines.
func minus(s string) string {
	if strings.HasPrefix(s, "-") {
		return "−" + s[1:]
	}
	return s
}

// money is an amount to the currency's minor unit, thousands apart by a thin
// space.
func money(v decimal.Decimal, currency string) string {
	digits := int32(order.Digits(currency))
	s := v.Abs().StringFixed(digits)
	whole, rest := s, ""
	if digits > 0 {
		whole, rest = s[:len(s)-int(digits)-1], s[len(s)-int(digits)-1:]
	}
	for k := len(whole) - 3; k > 0; k -= 3 {
		whole = whole[:k] + "\u202F" + whole[k:]
	}
	if v.IsNegative() {
		whole = "−" + whole
	}
	return whole + rest + "\u00A0" + currency
}
