package workbook

import (
	"rungwright/optimize"
	"rungwright/optimize/order"
)

// Needs is what a build wants of each part, spares included, lines that share
// a part joined: the question that the workbook and the order must answer
// alike. units is the build quantity; zero takes the design's.
func Needs(d *optimize.Design, o Options, units int) []order.Need {
	if units == 0 {
		units = max(1, d.Supply.Build.Units)
	}
	l := &ledger{}
	l.addItems(d, o)
	var needs []order.Need
	for _, it := range l.items {
		needs = append(needs, order.Need{Part: it.part, Pieces: l.spares[it.part.Kind].Over(units * it.perUnit), InHand: it.inHand})
	}
	return needs
}
