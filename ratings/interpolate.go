package ratings

// xy is a row of a published table.
type xy struct{ x, y float64 }

// interpolate reads a table of rising x on straight lines between its rows:
// the first y below it, the last line carried on above it. within is false
// above the last row.
func interpolate(table []xy, x float64) (y float64, within bool) {
	last := len(table) - 1
	if x <= table[0].x {
		return table[0].y, true
	}
	i := 1
	for i < last && x > table[i].x {
		i++
	}
	a, b := table[i-1], table[i]
	return a.y + (x-a.x)/(b.x-a.x)*(b.y-a.y), x <= table[last].x
}
