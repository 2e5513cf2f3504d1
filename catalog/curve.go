package catalog

import (
	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// point is a point of a curve with where its values stand.
type point[X, Y quantity.Quantity] struct {
	x     X
	y     Y
	xItem form.Item
	yItem form.Item
}

// curve reads a list of pairs whose first values rise, such as
// [[0 V, 100 %], [1 kV, 80 %]]. Points that cannot be read are reported and
// left out; ok tells that there were none.
func curve[X, Y quantity.Quantity](m *form.Map, key, example string, xRule, yRule form.Rule) (points []point[X, Y], ok bool) {
	ok = true
	for _, i := range m.List(key) {
		p, right := readPoint[X, Y](i, example, xRule, yRule)
		if !right {
			ok = false
			continue
		}
		if n := len(points); n > 0 && p.x <= points[n-1].x {
			p.xItem.Problem("%v does not come after %v; put the points in rising order, each once", p.x, points[n-1].x)
			ok = false
		}
		points = append(points, p)
	}
	return points, ok
}

func readPoint[X, Y quantity.Quantity](i form.Item, example string, xRule, yRule form.Rule) (point[X, Y], bool) {
	pair := i.Items()
	if len(pair) != 2 {
		i.Problem("a point must be a pair, such as %s", example)
		return point[X, Y]{}, false
	}
	x, okX := form.TryItem[X](pair[0], xRule)
	y, okY := form.TryItem[Y](pair[1], yRule)
	return point[X, Y]{x, y, pair[0], pair[1]}, okX && okY
}
