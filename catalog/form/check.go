package form

import (
	"gopkg.in/yaml.v3"
)

// checker finds, over the whole document, what no form allows.
type checker struct {
	file   string
	depth  int
	report *Report
}

func (c checker) add(n *yaml.Node, format string, args ...any) {
	c.report.Add(placeOf(c.file, n), format, args...)
}

func (c checker) node(n *yaml.Node, level int) {
	if n.Anchor != "" {
		c.add(n, "the anchor %q is not used here; write the value out wherever it is needed", "&"+n.Anchor)
	}
	if n.Style&yaml.TaggedStyle != 0 {
		c.add(n, "the tag %q is not used here; leave it out", n.Tag)
	}
	switch n.Kind {
	case yaml.AliasNode:
		c.add(n, "the alias %q is not used here; write the value out", "*"+n.Value)
		return // what it points to is checked where it stands
	case yaml.MappingNode:
		c.keys(n)
	}
	if level > c.depth && len(n.Content) > 0 {
		c.add(n, "the values are nested more than %d deep", c.depth)
		return
	}
	for _, child := range n.Content {
		c.node(child, level+1)
	}
}

// keys reports keys that are not text or are written twice, at both places.
func (c checker) keys(n *yaml.Node) {
	first := make(map[string]*yaml.Node, len(n.Content)/2)
	for i := 0; i < len(n.Content); i += 2 {
		key := n.Content[i]
		if key.Kind != yaml.ScalarNode {
			c.add(key, "a key must be a word; this is %s", kindName(key))
			continue
		}
		before, twice := first[key.Value]
		if !twice {
			first[key.Value] = key
			continue
		}
		c.add(key, "the key %q is written already at line %d; keep one", short(key.Value), before.Line-1)
		c.add(before, "the key %q is written again further down; keep one", short(key.Value))
	}
}

// kindName tells a person what a node is.
func kindName(n *yaml.Node) string {
	switch n.Kind {
	case yaml.MappingNode:
		return "a mapping"
	case yaml.SequenceNode:
		return "a list"
	case yaml.AliasNode:
		return "an alias"
	}
	return "a single value"
}

// short cuts a long text for a message.
func short(text string) string {
	const most = 60
	runes := []rune(text)
	if len(runes) <= most {
		return text
	}
	return string(runes[:most]) + "…"
}
