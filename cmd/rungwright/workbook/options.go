// Package workbook writes a design as a purchase workbook and as CSV and JSON.
//
// The workbook stays alive: build quantity, spares, stock, price breaks and
// the suppliers to use are input cells, and need, chosen offer, bought-up
// quantity, line prices, supplier charges and totals follow by formulas that
// old and new office programs know. Every formula also carries the value that
// the program's own exact model gives it. The same input gives the same bytes.
package workbook

import (
	"time"

	"rungwright/catalog"
	"rungwright/optimize/order"
)

// Options are what the workbook needs beside the design; the zero value
// writes the design at its own build quantity.
type Options struct {
	Made       time.Time              // printed in the footer and kept as the book's date; zero: left out
	Program    string                 // name and version, for the document properties; empty: rungwright
	Terms      order.Terms            // as the order was made; Currency empty: the design's
	RatesNote  string                 // where the rates are from and of what day
	Suppliers  []catalog.Supplier     // for their charges
	Plan       *order.Plan            // the order over all suppliers; nil: each part where it is cheapest
	Spares     map[catalog.Kind]Spare // by kind of part; absent: the design's share
	InHand     map[string]int         // pieces in the drawer by part number
	Curves     *Curves                // what to draw beside what the design carries
	Alternates []Alternate
	Notes      []string // assumptions to add to the design's own
}

// Spare is what is bought beyond the need.
type Spare struct {
	Share float64 // of the need, rounded up to whole pieces
	Least int     // pieces at least
}

// Over is need with its spares.
func (s Spare) Over(need int) int {
	return need + max(s.Least, order.WithSpares(need, s.Share)-need)
}

// Alternate is another part that could stand in a line.
type Alternate struct {
	For    string // part number in the design
	Part   *catalog.Part
	Effect string // what changes: "output 12 V lower, 4 % dearer"
	Note   string
}

// Curves are measured-by-simulation curves to draw; empty ones are left out.
type Curves struct {
	Regulation Curve // output against load current
	Ripple     Curve // ripple against load current
	Waveform   Curve // output over a period
	StartUp    Curve // output from switch-on
	Quantities []int // build quantities for the cost curve; nil: a usual series
}

// Curve is points of one or several named series; x rises.
type Curve struct {
	X      []float64
	Series []Series
	Note   string // at what line, load and temperature
}

// Series is one line of a curve, as long as its X.
type Series struct {
	Name string
	Y    []float64
}
