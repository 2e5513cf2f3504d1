package form

import (
	"testing"

	"gopkg.in/yaml.v3"
)

// The count that bounds memory is at most a few below the number of values,
// whatever the style; otherwise a small file could fill the memory.
func TestCountBoundsValues(t *testing.T) {
	for _, data := range []string{
		"a: b", "a:\n  - b\n  - c", "a:\r\n-\r\n-\tx\r\n- b", "{a, b, c: {d}}", "? a\n? b", `{"a":1,"b":[[],[]]}`, "a: [[1, 2], [3, 4]]",
		"- - - a", "-\n -\n  -", "[,a]", "{? a}",
	} {
		var n yaml.Node
		if err := yaml.Unmarshal([]byte(data), &n); err != nil {
			continue // refused is bounded
		}
		if bound, values := countValues([]byte(data)), nodes(&n); bound+2 < values {
			t.Errorf("%q has %d values, counted %d", data, values, bound)
		}
	}
}

func nodes(n *yaml.Node) int {
	sum := 1
	for _, c := range n.Content {
		sum += nodes(c)
	}
	return sum
}
