package form

import (
	"strings"
	"unicode"

	"gopkg.in/yaml.v3"
)

// Item is one entry of a list: a scalar, a list (of pairs, say) or a mapping.
type Item struct {
	Place Place

	reading
	path string
	node *yaml.Node
}

// Problem adds a problem at the item.
func (i Item) Problem(format string, args ...any) {
	if i.report != nil {
		addUnder(i.report, i.Place, i.path, format, args...)
	}
}

// Text is the scalar as written, without the blanks around it; "" when it is
// none. Characters that cannot be seen are reported.
func (i Item) Text() string {
	if !i.IsText() {
		return ""
	}
	text := strings.TrimSpace(i.node.Value)
	if at := strings.IndexFunc(text, unseen); at >= 0 {
		c := []rune(text[at:])[0]
		if c == '\n' {
			i.Problem("the text has several lines; write it on one")
			return ""
		}
		i.Problem("the text holds the invisible character %U, which can hide what it says; remove it", c)
		return ""
	}
	return text
}

// IsText tells whether the item is a scalar with a value.
func (i Item) IsText() bool {
	return i.node != nil && i.node.Kind == yaml.ScalarNode && !isNull(i.node)
}

// unseen tells control characters and those that steer the direction of
// writing or take no room (soft hyphens, joiners, tags).
func unseen(r rune) bool {
	return unicode.IsControl(r) || unicode.Is(unicode.Cf, r) || r == '\u2028' || r == '\u2029'
}

// scalar is the text of an item that must be a single value.
func (i Item) scalar() (string, bool) {
	switch {
	case i.node == nil || i.node.Kind == yaml.AliasNode:
		return "", false
	case isNull(i.node):
		i.Problem("an entry has no value; write one, or remove the entry")
		return "", false
	case i.node.Kind != yaml.ScalarNode:
		i.Problem("this is %s; write a single value", kindName(i.node))
		return "", false
	}
	before := i.report.Len()
	text := i.Text()
	return text, i.report.Len() == before
}

// Items are the entries when it is a list itself.
func (i Item) Items() []Item {
	if i.node == nil || i.node.Kind != yaml.SequenceNode {
		return nil
	}
	items := make([]Item, 0, len(i.node.Content))
	for _, n := range i.node.Content {
		items = append(items, Item{Place: placeOf(i.file, n), reading: i.reading, path: i.path, node: n})
	}
	return items
}

// Map is the mapping, or nil with a problem reported.
func (i Item) Map() *Map {
	switch {
	case i.node == nil, i.node.Kind == yaml.AliasNode:
		return nil
	case i.node.Kind != yaml.MappingNode:
		i.Problem("this is %s; write keys with values", kindName(i.node))
		return nil
	}
	return newMap(i.node, i.reading, i.path)
}
