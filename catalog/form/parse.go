package form

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"strings"

	"gopkg.in/yaml.v3"
)

// The limits of a file.
const (
	MaxBytes = 64 << 20
	MaxNodes = 3_000_000
	MaxDepth = 32
)

// Limits narrow what a file may be; a zero takes the package's limit.
type Limits struct{ Bytes, Nodes, Depth int }

func (l Limits) filled() Limits {
	fill := func(v *int, limit int) {
		if *v <= 0 || *v > limit {
			*v = limit
		}
	}
	fill(&l.Bytes, MaxBytes)
	fill(&l.Nodes, MaxNodes)
	fill(&l.Depth, MaxDepth)
	return l
}

// Parse reads the first YAML document of data, whose top must be a mapping.
// It returns nil when that cannot be (the report says why). It refuses files
// over MaxBytes, nesting over MaxDepth, anchors and aliases, duplicate keys,
// custom tags, several documents.
func Parse(file string, data []byte, r *Report) *Map {
	return ParseWithin(file, data, Limits{}, r)
}

// ParseWithin is Parse with narrower limits.
func ParseWithin(file string, data []byte, limits Limits, r *Report) *Map {
	limits = limits.filled()
	data = bytes.TrimPrefix(data, []byte("\ufeff"))
	if !checkText(file, data, limits, r) {
		return nil
	}
	top, err := decode(data)
	if err != nil {
		line, text := explainSyntax(data, err)
		r.Add(Place{file, line, 1}, "%s", text)
		return nil
	}
	if top == nil || len(top.Content) == 0 {
		r.Add(Place{file, 1, 1}, "nothing is written but comments or blank lines")
		return nil
	}
	root := top.Content[0]
	checker{file: file, depth: limits.Depth, report: r}.node(root, 1)
	if root.Kind != yaml.MappingNode {
		r.Add(placeOf(file, root), "the file must hold keys with values; this is %s", kindName(root))
		return nil
	}
	return newMap(root, reading{file, r}, "")
}

// lead is a comment line put before every document: the library leaves the
// line out of messages about the first one. Places are shifted back.
const lead = "#\n"

// decode gives the document node, nil when there is no document.
func decode(data []byte) (top *yaml.Node, err error) {
	defer func() { // the library has had faults of its own
		if fault := recover(); fault != nil {
			top, err = nil, fmt.Errorf("yaml: %v", fault)
		}
	}()
	decoder := yaml.NewDecoder(io.MultiReader(strings.NewReader(lead), bytes.NewReader(data)))
	var first, second yaml.Node
	switch err := decoder.Decode(&first); {
	case errors.Is(err, io.EOF):
		return nil, nil
	case err != nil:
		return nil, err
	}
	switch err := decoder.Decode(&second); {
	case errors.Is(err, io.EOF):
		return &first, nil
	case err != nil:
		return nil, err
	}
	return nil, secondDocument(second.Line - 1)
}

// secondDocument is the line at which a second document starts.
type secondDocument int

func (line secondDocument) Error() string {
	return fmt.Sprintf("second document at line %d", int(line))
}

func placeOf(file string, n *yaml.Node) Place { return Place{file, n.Line - 1, n.Column} }
