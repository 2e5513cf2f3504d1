package quantity

import (
	"math"
	"strconv"
	"strings"
)

// rounded is a value cut to some significant digits: the digits without
// trailing zeros, and the power of ten of the first of them.
type rounded struct {
	negative bool
	digits   string
	exponent int
}

// round needs a finite v other than zero.
func round(v float64, digits int) rounded {
	text := strconv.FormatFloat(math.Abs(v), 'e', digits-1, 64)
	mantissa, after, _ := strings.Cut(text, "e")
	exponent, err := strconv.Atoi(after)
	if err != nil {
		panic("quantity: cannot read the exponent of " + text)
	}
	mantissa = strings.TrimRight(strings.Replace(mantissa, ".", "", 1), "0")
	return rounded{v < 0, mantissa, exponent}
}

// value is the magnitude.
func (r rounded) value() float64 {
	v, err := strconv.ParseFloat(r.digits[:1]+"."+r.digits[1:]+"e"+strconv.Itoa(r.exponent), 64)
	if err != nil && !math.IsInf(v, 0) {
		panic("quantity: " + err.Error())
	}
	return v
}

// write prints the value over 10^ten, in plain digits unless that takes a
// long row of zeros.
func (r rounded) write(ten int) string {
	lead := r.exponent - ten
	text := r.positional(lead)
	if lead < -5 || lead > 8 {
		text = r.digits[:1] + strings.TrimSuffix("."+r.digits[1:], ".") + "e" + strconv.Itoa(lead)
	}
	if r.negative {
		return "-" + text
	}
	return text
}

// positional writes the digits with the first of them at 10^lead.
func (r rounded) positional(lead int) string {
	point := lead + 1 // digits before the point
	switch {
	case point <= 0:
		return "0." + strings.Repeat("0", min(-point, 9)) + r.digits
	case point >= len(r.digits):
		return r.digits + strings.Repeat("0", min(point-len(r.digits), 9))
	}
	return r.digits[:point] + "." + r.digits[point:]
}
