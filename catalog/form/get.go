package form

import (
	"rungwright/catalog/quantity"
)

// Rule narrows what a quantity may be.
type Rule int

// The rules that Get and GetItem take; none allows any sign.
const (
	Any         Rule = iota
	Positive         // above zero
	NotNegative      // zero or above
	Fraction         // 0 % to 100 %
)

// Get reads the key as a quantity; zero when absent or wrong (reported).
func Get[Q quantity.Quantity](m *Map, key string, rule Rule) Q {
	item, ok := m.get(key)
	if !ok {
		return 0
	}
	return GetItem[Q](item, rule)
}

// GetItem reads a list entry as a quantity; zero when wrong (reported).
func GetItem[Q quantity.Quantity](i Item, rule Rule) Q {
	q, _ := TryItem[Q](i, rule)
	return q
}

// TryItem is GetItem that also tells whether the entry was right.
func TryItem[Q quantity.Quantity](i Item, rule Rule) (Q, bool) {
	text, ok := i.scalar()
	if !ok {
		return 0, false
	}
	q, err := quantity.Read[Q](text)
	if err != nil {
		i.Problem("%v", err)
		return 0, false
	}
	if broken := rule.broken(float64(q), q.Dimension()); broken != "" {
		i.Problem("%q is %s", text, broken)
		return 0, false
	}
	return q, true
}

// absoluteZero in °C.
const absoluteZero = -273.15

// broken says what is wrong with a value by the rule, "" when nothing.
func (rule Rule) broken(v float64, d quantity.Dimension) string {
	switch {
	case d == quantity.Temperature && v < absoluteZero:
		return "below absolute zero; write a temperature in degrees Celsius"
	case rule == Positive && v == 0:
		return "zero; write a value above zero"
	case rule == Positive && v < 0:
		return "negative; write a value above zero"
	case rule == NotNegative && v < 0:
		return "negative; write zero or more"
	case rule == Fraction && (v < 0 || v > 1):
		return "out of range; write 0 % to 100 %"
	}
	return ""
}
