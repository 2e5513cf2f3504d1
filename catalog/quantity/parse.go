package quantity

import (
	"errors"
	"math"
	"strconv"
	"strings"
	"unicode"
	"unicode/utf8"
)

// maxText is the longest text, in characters, that is looked at.
const maxText = 64

// Parse reads text as a value of the dimension, in its SI base unit. For None
// it reads a plain number. See the package comment for what it refuses.
func Parse(text string, d Dimension) (float64, error) {
	if utf8.RuneCountInString(text) > maxText {
		return 0, tooLong(text, d)
	}
	trimmed := strings.TrimFunc(text, unicode.IsSpace)
	n, rest := scanNumber(trimmed)
	if v, ok, err := parseRKM(n, rest, d); ok {
		return v, err
	}
	if !n.ok() {
		return 0, explainNumber(trimmed, d)
	}
	if rest == "" {
		return parseBare(trimmed, n, d)
	}
	spelled := plainUnit(strings.TrimLeftFunc(rest, unicode.IsSpace))
	s, ok := spellings[d][spelled]
	if !ok {
		return 0, explainUnit(trimmed, rest, d)
	}
	return n.value(s, trimmed)
}

// parseBare reads a number without a unit: any where none is due, otherwise
// zero alone.
func parseBare(text string, n number, d Dimension) (float64, error) {
	if d == None {
		return n.value(scale{}, text)
	}
	if n.zero() && d != Temperature {
		return 0, nil
	}
	return 0, noUnit(text, d)
}

// number is a decimal number as written, cut into its parts.
type number struct {
	negative       bool
	whole, decimal string // the digits before and after the point
	point          bool
	exponent       string // with its sign, without the e
}

func (n number) ok() bool { return n.whole != "" || n.decimal != "" }

func (n number) zero() bool { return n.ok() && strings.Trim(n.whole+n.decimal, "0") == "" }

// scanNumber cuts a leading number from the text.
func scanNumber(text string) (n number, rest string) {
	rest = text
	for _, sign := range []string{"+", "-", "−"} {
		if after, ok := strings.CutPrefix(rest, sign); ok {
			n.negative, rest = sign != "+", after
			break
		}
	}
	n.whole, rest = cutDigits(rest)
	if after, ok := strings.CutPrefix(rest, "."); ok {
		n.point = true
		n.decimal, rest = cutDigits(after)
	}
	if n.ok() && len(rest) > 1 && (rest[0] == 'e' || rest[0] == 'E') {
		sign, after := "", rest[1:]
		if after[0] == '+' || after[0] == '-' {
			sign, after = after[:1], after[1:]
		}
		if digits, after := cutDigits(after); digits != "" {
			n.exponent, rest = sign+digits, after
		}
	}
	return n, rest
}

func cutDigits(text string) (digits, rest string) {
	i := 0
	for i < len(text) && text[i] >= '0' && text[i] <= '9' {
		i++
	}
	return text[:i], text[i:]
}

// value is the number in the base unit. Powers of ten go through the text,
// which rounds once.
func (n number) value(s scale, text string) (float64, error) {
	if n.zero() {
		return 0, nil
	}
	exponent := 0
	if n.exponent != "" {
		var err error
		if exponent, err = strconv.Atoi(n.exponent); err != nil || exponent > 400 || exponent < -400 {
			return 0, outOfRange(text)
		}
	}
	written := n.whole + "." + n.decimal + "e" + strconv.Itoa(exponent+s.ten)
	v, err := strconv.ParseFloat(written, 64)
	if s.times != 0 {
		v *= s.times
	}
	if err != nil && !errors.Is(err, strconv.ErrRange) {
		panic("quantity: " + err.Error()) // the parts are digits by construction
	}
	if v == 0 || math.IsInf(v, 0) {
		return 0, outOfRange(text)
	}
	if n.negative {
		v = -v
	}
	return v, nil
}
