package quantity

import (
	"math"
	"strings"
	"unicode"
)

// codeLetters are the letters of IEC 60062 (from memory) that stand in place
// of the decimal point, with their power of ten. Inductance follows the same
// pattern by common practice. Milliohms have none here: 4m7 beside 4M7 is a
// mistake waiting to happen.
var codeLetters = map[Dimension]map[string]int{
	Resistance:  {"R": 0, "k": 3, "K": 3, "M": 6, "G": 9, "T": 12},
	Capacitance: {"p": -12, "n": -9, "u": -6, "m": -3, "F": 0},
	Inductance:  {"n": -9, "u": -6, "m": -3, "H": 0},
}

// codeLetter is a letter as printed.
type codeLetter struct {
	sign string
	ten  int
}

// printedLetters are ascending.
var printedLetters = map[Dimension][]codeLetter{
	Resistance:  {{"R", 0}, {"K", 3}, {"M", 6}, {"G", 9}, {"T", 12}},
	Capacitance: {{"p", -12}, {"n", -9}, {"µ", -6}, {"m", -3}, {"F", 0}},
	Inductance:  {{"n", -9}, {"µ", -6}, {"m", -3}, {"H", 0}},
}

// parseRKM reads a code such as 4k7, R47, 100n or 4n7F. The number is what
// was scanned in front of the letter. It tells ok false when the text is not
// such a code.
func parseRKM(n number, rest string, d Dimension) (v float64, ok bool, err error) {
	letters := codeLetters[d]
	if letters == nil || n.point || n.exponent != "" {
		return 0, false, nil
	}
	plain := plainUnit(rest)
	if plain == "" {
		return 0, false, nil
	}
	ten, known := letters[plain[:1]]
	if !known {
		return 0, false, nil
	}
	digits, after := cutDigits(plain[1:])
	if n.whole == "" && digits == "" || !endsCode(after, digits, d) {
		return 0, false, nil
	}
	n.decimal = digits
	v, err = n.value(scale{ten: ten}, rest)
	return v, true, err
}

// endsCode tells whether what follows the code is nothing or, after decimals,
// the unit itself.
func endsCode(after, digits string, d Dimension) bool {
	after = strings.TrimLeftFunc(after, unicode.IsSpace)
	if after == "" {
		return true
	}
	s, ok := spellings[d][after]
	return ok && s == scale{} && digits != ""
}

// RKM prints a resistance, capacitance or inductance in the code of IEC
// 60062, such as 4K7, R47, 1n0 or 100p, with at most the given significant
// digits. It is empty for other dimensions, for what is not above zero, and
// where no letter reaches.
func RKM(v float64, d Dimension, digits int) string {
	letters := printedLetters[d]
	if letters == nil || !(v > 0) || math.IsInf(v, 0) {
		return ""
	}
	r := round(v, min(max(digits, 1), 17))
	letter := letters[0]
	for _, l := range letters {
		if l.ten <= r.exponent {
			letter = l
		}
	}
	lead := r.exponent - letter.ten
	if lead < -3 || lead > 2 {
		return ""
	}
	return placeLetter(r.digits, lead, letter.sign)
}

// placeLetter writes the digits, the first at 10^lead, with the letter for
// the point. At least two digits show, so that 1K0 is not taken for a slip.
func placeLetter(digits string, lead int, sign string) string {
	if lead < 0 {
		digits = strings.Repeat("0", -1-lead) + digits
		return sign + digits + strings.Repeat("0", max(0, 2-len(digits)))
	}
	if short := max(lead+1, 2) - len(digits); short > 0 {
		digits += strings.Repeat("0", short)
	}
	return digits[:lead+1] + sign + digits[lead+1:]
}
