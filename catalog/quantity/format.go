package quantity

import "math"

// Format prints v with its unit and at most digits significant digits, in
// engineering notation (%, °C and mm³ where the trade uses those). Digits
// outside 1 to 17 count as the nearest of these. What it prints, Parse reads
// as exactly the printed value (minutes and hours are rounded once more). A
// value that is not finite prints as NaN or ∞ and is not read again.
func Format(v float64, d Dimension, digits int) string {
	digits = min(max(digits, 1), 17)
	switch {
	case math.IsNaN(v):
		return join("NaN", d.Unit())
	case math.IsInf(v, 1):
		return join("∞", d.Unit())
	case math.IsInf(v, -1):
		return join("-∞", d.Unit())
	case v == 0:
		return join("0", d.Unit())
	}
	r := round(v, digits)
	s := style(d, r)
	if s.times != 0 {
		r = round(v/s.times, digits)
	}
	return join(r.write(s.ten), s.symbol)
}

func join(number, unit string) string {
	if unit == "" {
		return number
	}
	return number + " " + unit
}

// Unit is the symbol in which the dimension is printed when nothing calls for
// a prefix.
func (d Dimension) Unit() string { return printed[d].symbol }

// notation is a unit as printed: the number is divided by 10^ten × times.
type notation struct {
	symbol string
	ten    int
	times  float64 // zero: 1
}

// printing says how a dimension is printed: its prefixes, or its own choice.
type printing struct {
	symbol   string
	prefixes []int // powers of ten that may be written, ascending; nil: as it is
	choose   func(r rounded) notation
}

var (
	tiny   = []int{-15, -12, -9, -6, -3, 0}
	middle = []int{-12, -9, -6, -3, 0, 3, 6, 9}
	coarse = []int{-9, -6, -3, 0, 3, 6, 9, 12}
)

var printed = map[Dimension]printing{
	None:              {},
	Voltage:           {symbol: "V", prefixes: middle},
	Current:           {symbol: "A", prefixes: middle},
	Resistance:        {symbol: "Ω", prefixes: coarse},
	Capacitance:       {symbol: "F", prefixes: tiny},
	Inductance:        {symbol: "H", prefixes: tiny},
	Frequency:         {symbol: "Hz", prefixes: coarse},
	Time:              {symbol: "s", choose: timeNotation},
	Power:             {symbol: "W", prefixes: middle},
	ApparentPower:     {symbol: "VA", prefixes: middle},
	Energy:            {symbol: "J", prefixes: middle},
	Charge:            {symbol: "C", prefixes: tiny},
	Temperature:       {symbol: "°C"},
	TemperatureRise:   {symbol: "K"},
	ThermalResistance: {symbol: "K/W"},
	Length:            {symbol: "m", choose: lengthNotation},
	Volume:            {symbol: "mm³", choose: volumeNotation},
	Area:              {symbol: "mm²", choose: areaNotation},
	Proportion:        {symbol: "%", choose: func(rounded) notation { return notation{symbol: "%", ten: -2} }},
	SlewRate:          {symbol: "V/µs", choose: slewNotation},
}

// prefixSigns are the signs as printed.
var prefixSigns = map[int]string{-15: "f", -12: "p", -9: "n", -6: "µ", -3: "m", 0: "", 3: "k", 6: "M", 9: "G", 12: "T"}

// style picks the notation of a rounded value, so that rounding up to the
// next thousand takes the next prefix.
func style(d Dimension, r rounded) notation {
	p := printed[d]
	switch {
	case p.choose != nil:
		return p.choose(r)
	case p.prefixes != nil:
		return prefixed(p.symbol, p.prefixes, r.exponent)
	}
	return notation{symbol: p.symbol}
}

// prefixed takes the prefix that puts one to three digits before the point,
// or the nearest there is.
func prefixed(symbol string, prefixes []int, exponent int) notation {
	ten := prefixes[0]
	for _, p := range prefixes {
		if p <= exponent {
			ten = p
		}
	}
	return notation{symbol: prefixSigns[ten] + symbol, ten: ten}
}

// timeNotation prints parts of a second with prefixes, then seconds to two
// minutes, minutes to two hours, and hours, in which the trade gives lives.
func timeNotation(r rounded) notation {
	switch v := r.value(); {
	case v < 1:
		return prefixed("s", tiny, r.exponent)
	case v < 2*minute:
		return notation{symbol: "s"}
	case v < 2*hour:
		return notation{symbol: "min", times: minute}
	}
	return notation{symbol: "h", times: hour}
}

func lengthNotation(r rounded) notation {
	if r.exponent < 0 {
		return notation{symbol: "mm", ten: -3}
	}
	return notation{symbol: "m"}
}

func volumeNotation(r rounded) notation {
	switch {
	case r.exponent < -6:
		return notation{symbol: "mm³", ten: -9}
	case r.exponent < 0:
		return notation{symbol: "cm³", ten: -6}
	}
	return notation{symbol: "m³"}
}

func areaNotation(r rounded) notation {
	switch {
	case r.exponent < -2:
		return notation{symbol: "mm²", ten: -6}
	case r.exponent < 0:
		return notation{symbol: "cm²", ten: -4}
	}
	return notation{symbol: "m²"}
}

// slewNotation prints V/µs, kV/µs … from one volt per microsecond up, V/s
// and kV/s below.
func slewNotation(r rounded) notation {
	if r.exponent < 6 {
		return prefixed("V/s", []int{-9, -6, -3, 0, 3}, r.exponent)
	}
	n := prefixed("V/µs", []int{0, 3, 6}, r.exponent-6)
	n.ten += 6
	return n
}
