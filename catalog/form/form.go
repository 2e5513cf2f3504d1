// Package form reads the YAML files of the program: it walks nodes, converts
// values, and gathers every problem with its file, line and column and a mend,
// instead of stopping at the first. It is the only package that imports a
// YAML library.
package form

import (
	"fmt"

	"rungwright/catalog/quantity"
)

// Place is where something was written; lines and columns start at 1.
type Place struct {
	File         string
	Line, Column int
}

// String prints file:line:column, which editors make clickable.
func (p Place) String() string { return fmt.Sprintf("%s:%d:%d", p.File, p.Line, p.Column) }

// Problem is one mistake in a file: its place, then what was read and how to
// mend it.
type Problem struct {
	Place Place
	Text  string
}

// Problems is every mistake found, sorted by place and free of repeats. It is
// an error that the command line turns into exit status 2.
type Problems []Problem

// Error lists the problems, a line each.
func (p Problems) Error() string { return "" }

// Report gathers problems while files are read. Its zero value is ready; it
// is not safe for concurrent use: give each goroutine one and Merge them.
type Report struct{ problems Problems }

// Add notes a problem at a place.
func (r *Report) Add(at Place, format string, args ...any) {}

// Merge takes over the problems of another report.
func (r *Report) Merge(other *Report) {}

// Err returns nil or the sorted Problems.
func (r *Report) Err() error { return nil }

// Parse reads the first YAML document of data, whose top must be a mapping.
// It returns nil when that cannot be (the report says why). It refuses files
// over MaxBytes, nesting over MaxDepth, anchors and aliases, duplicate keys,
// custom tags, several documents.
func Parse(file string, data []byte, r *Report) *Map { return nil }

// Map is a mapping being read. Every getter marks its key as known; Done
// reports those never asked for, with the nearest known name. All getters may
// be called on a nil Map and then return zero values.
type Map struct{ Place Place }

// Path is the dotted path of the map within its file, such as "output.load".
func (m *Map) Path() string { return "" }

// Keys lists the keys as written, in order.
func (m *Map) Keys() []string { return nil }

// Has tells whether the key is written (and marks it known).
func (m *Map) Has(key string) bool { return false }

// PlaceOf is the place of the key's value, or of the map when it is absent.
func (m *Map) PlaceOf(key string) Place { return Place{} }

// Problem adds a problem at the key's value (or the map's place when absent),
// with the dotted path in front.
func (m *Map) Problem(key, format string, args ...any) {}

// Require reports the key as missing unless it is written.
func (m *Map) Require(keys ...string) {}

// Text reads a scalar as text; "" when absent.
func (m *Map) Text(key string) string { return "" }

// Choice reads one of the listed words; "" when absent or not among them
// (which is reported with the list and the nearest).
func (m *Map) Choice(key string, words ...string) string { return "" }

// Int reads a whole number within least and most; absent gives otherwise.
func (m *Map) Int(key string, least, most, otherwise int) int { return otherwise }

// Bool reads true or false; false when absent.
func (m *Map) Bool(key string) bool { return false }

// Money reads an amount with its currency.
func (m *Map) Money(key string) quantity.Money { return quantity.Money{} }

// Map reads a nested mapping; nil when absent.
func (m *Map) Map(key string) *Map { return nil }

// Maps reads a list of mappings.
func (m *Map) Maps(key string) []*Map { return nil }

// List reads a list of any values; a single scalar counts as a list of one.
func (m *Map) List(key string) []Item { return nil }

// Done reports the keys that nothing asked for.
func (m *Map) Done() {}

// Item is one entry of a list: a scalar, a list (of pairs, say) or a mapping.
type Item struct{ Place Place }

// Text is the scalar as written.
func (i Item) Text() string { return "" }

// Items are the entries when it is a list itself.
func (i Item) Items() []Item { return nil }

// Map is the mapping, or nil with a problem reported.
func (i Item) Map() *Map { return nil }

// Problem adds a problem at the item.
func (i Item) Problem(format string, args ...any) {}

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
func Get[Q quantity.Quantity](m *Map, key string, rule Rule) Q { return 0 }

// GetItem reads a list entry as a quantity.
func GetItem[Q quantity.Quantity](i Item, rule Rule) Q { return 0 }
