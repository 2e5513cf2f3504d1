package form

import (
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"

	"rungwright/catalog/quantity"
)

// Text reads a scalar as text; "" when absent.
func (m *Map) Text(key string) string {
	item, ok := m.get(key)
	if !ok {
		return ""
	}
	text, _ := item.scalar()
	return text
}

// Choice reads one of the listed words; "" when absent or not among them
// (which is reported with the list and the nearest).
func (m *Map) Choice(key string, words ...string) string {
	item, ok := m.get(key)
	if !ok {
		return ""
	}
	text, ok := item.scalar()
	if !ok {
		return ""
	}
	for _, w := range words {
		if text == w {
			return w
		}
	}
	list := strings.Join(words, ", ")
	if near := Nearest(text, words); near != "" {
		item.Problem("%q is not one of %s; did you mean %q?", short(text), list, near)
	} else {
		item.Problem("%q is not one of %s", short(text), list)
	}
	return ""
}

// Int reads a whole number within least and most; absent gives otherwise.
func (m *Map) Int(key string, least, most, otherwise int) int {
	item, ok := m.get(key)
	if !ok {
		return otherwise
	}
	return item.Int(least, most, otherwise)
}

// Int is the item as a whole number within least and most, otherwise when it
// is none (reported).
func (i Item) Int(least, most, otherwise int) int {
	text, ok := i.scalar()
	if !ok {
		return otherwise
	}
	n, err := strconv.Atoi(text)
	switch {
	case err != nil:
		i.Problem("%q is not a whole number; write digits alone, from %d to %d", short(text), least, most)
	case n < least || n > most:
		i.Problem("%d is out of range; write %d to %d", n, least, most)
	default:
		return n
	}
	return otherwise
}

// Bool reads true or false; false when absent.
func (m *Map) Bool(key string) bool {
	item, ok := m.get(key)
	if !ok {
		return false
	}
	text, ok := item.scalar()
	if ok && text != "true" && text != "false" {
		item.Problem("%q is neither true nor false; write one of the two", short(text))
	}
	return text == "true"
}

// Money reads an amount, zero or above, with its currency.
func (m *Map) Money(key string) quantity.Money {
	item, ok := m.get(key)
	if !ok {
		return quantity.Money{}
	}
	return item.Money()
}

// Money is the item as an amount, zero or above, with its currency.
func (i Item) Money() quantity.Money {
	text, ok := i.scalar()
	if !ok {
		return quantity.Money{}
	}
	money, err := quantity.ParseMoney(text)
	switch {
	case err != nil:
		i.Problem("%v", err)
		return quantity.Money{}
	case money.Amount.IsNegative():
		i.Problem("%q is negative; write zero or more", text)
		return quantity.Money{}
	}
	return money
}

// Map reads a nested mapping; nil when absent.
func (m *Map) Map(key string) *Map {
	item, ok := m.get(key)
	if !ok {
		return nil
	}
	return item.Map()
}

// Maps reads a list of mappings.
func (m *Map) Maps(key string) []*Map {
	item, ok := m.get(key)
	if !ok {
		return nil
	}
	if item.node.Kind != yaml.SequenceNode {
		item.Problem("this is %s; write a list, each entry with a dash in front", kindName(item.node))
		return nil
	}
	var maps []*Map
	for _, entry := range item.Items() {
		if e := entry.Map(); e != nil {
			maps = append(maps, e)
		}
	}
	return maps
}

// List reads a list of any values; a single scalar counts as a list of one.
func (m *Map) List(key string) []Item {
	item, ok := m.get(key)
	switch {
	case !ok:
		return nil
	case item.node.Kind == yaml.SequenceNode:
		return item.Items()
	case item.node.Kind == yaml.ScalarNode:
		return []Item{item}
	}
	item.Problem("this is %s; write a list such as [one, two]", kindName(item.node))
	return nil
}

// IsText tells whether the key holds a single value rather than a list or a
// mapping, for keys that take either.
func (m *Map) IsText(key string) bool {
	_, value := m.lookup(key)
	return value != nil && value.Kind == yaml.ScalarNode
}

// IsList tells whether the key holds a list.
func (m *Map) IsList(key string) bool {
	_, value := m.lookup(key)
	return value != nil && value.Kind == yaml.SequenceNode
}
