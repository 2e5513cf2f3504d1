package form

import (
	"fmt"
	"slices"

	"gopkg.in/yaml.v3"
)

// reading is what everything read from one file shares.
type reading struct {
	file   string
	report *Report
}

// Map is a mapping being read. Every getter marks its key as known; Done
// reports those never asked for, with the nearest known name. All getters may
// be called on a nil Map and then return zero values.
type Map struct {
	Place Place

	reading
	path  string
	node  *yaml.Node
	known []string
}

func newMap(n *yaml.Node, r reading, path string) *Map {
	return &Map{Place: placeOf(r.file, n), reading: r, path: path, node: n}
}

// Path is the dotted path of the map within its file, such as "output.load";
// list entries have the path of their list.
func (m *Map) Path() string {
	if m == nil {
		return ""
	}
	return m.path
}

// Keys lists the keys as written, in order.
func (m *Map) Keys() []string {
	if m == nil {
		return nil
	}
	var keys []string
	for i := 0; i < len(m.node.Content); i += 2 {
		keys = append(keys, m.node.Content[i].Value)
	}
	return keys
}

// Has tells whether the key is written (and marks it known).
func (m *Map) Has(key string) bool {
	_, value := m.lookup(key)
	return value != nil
}

// lookup marks the key as known and gives its nodes, nil when absent.
func (m *Map) lookup(key string) (name, value *yaml.Node) {
	if m == nil {
		return nil, nil
	}
	if !slices.Contains(m.known, key) {
		m.known = append(m.known, key)
	}
	for i := 0; i < len(m.node.Content); i += 2 {
		if name := m.node.Content[i]; name.Kind == yaml.ScalarNode && name.Value == key {
			return name, m.node.Content[i+1]
		}
	}
	return nil, nil
}

// get is lookup of a value that says something: an alias was reported
// already, and a key without a value is reported here.
func (m *Map) get(key string) (Item, bool) {
	name, value := m.lookup(key)
	switch {
	case value == nil, value.Kind == yaml.AliasNode:
		return Item{}, false
	case isNull(value):
		m.report.Add(placeOf(m.file, name), "%s: has no value; write one, or leave the key out", m.under(key))
		return Item{}, false
	}
	return m.item(value, key), true
}

func isNull(n *yaml.Node) bool { return n.Kind == yaml.ScalarNode && n.Tag == "!!null" }

func (m *Map) item(n *yaml.Node, key string) Item {
	return Item{Place: placeOf(m.file, n), reading: m.reading, path: m.under(key), node: n}
}

// under is the path of a key.
func (m *Map) under(key string) string {
	switch {
	case m.path == "":
		return key
	case key == "":
		return m.path
	}
	return m.path + "." + key
}

// PlaceOf is the place of the key's value, or of the map when it is absent.
func (m *Map) PlaceOf(key string) Place {
	if m == nil {
		return Place{}
	}
	if _, value := m.lookup(key); value != nil {
		return placeOf(m.file, value)
	}
	return m.Place
}

// Problem adds a problem at the key's value (or the map's place when absent),
// with the dotted path in front. An empty key means the map itself.
func (m *Map) Problem(key, format string, args ...any) {
	if m == nil {
		return
	}
	at := m.Place
	if key != "" {
		at = m.PlaceOf(key)
	}
	addUnder(m.report, at, m.under(key), format, args...)
}

func addUnder(r *Report, at Place, path, format string, args ...any) {
	text := fmt.Sprintf(format, args...)
	if path != "" {
		text = path + ": " + text
	}
	r.Add(at, "%s", text)
}

// Require reports the key as missing unless it is written.
func (m *Map) Require(keys ...string) {
	if m == nil {
		return
	}
	for _, key := range keys {
		if !m.Has(key) {
			m.report.Add(m.Place, "the key %q is missing", m.under(key))
		}
	}
}

// Done reports the keys that nothing asked for.
func (m *Map) Done() {
	if m == nil {
		return
	}
	for i := 0; i < len(m.node.Content); i += 2 {
		name := m.node.Content[i]
		if m.report.dropped {
			return
		}
		if name.Kind == yaml.ScalarNode && !slices.Contains(m.known, name.Value) {
			m.report.Add(placeOf(m.file, name), "%s", Unknown("key", name.Value, m.known))
		}
	}
}
