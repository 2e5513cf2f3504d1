package workbook

import (
	"fmt"

	"rungwright/catalog"
)

// places are rows that formulas on other sheets point to. They are settled
// before any sheet is built, for the sheets refer to each other.
type places struct {
	build  int // of the build quantity on the overview
	spares int // first row of the spares table there
	rates  int // first row of the rates table there
}

// partsHead is the header row of the parts sheet.
const partsHead = 4

// place settles where things stand on the overview: title, subtitle and hint,
// the hazards, then the build.
func (b *book) place() {
	row := 4                                                             // title, subtitle, hint, blank
	row += 1 + len(b.design.Failed) + max(1, len(b.design.Cautions)) + 2 // heading, hazards, a pointer
	b.places.build = row + 2                                             // heading
	b.places.spares = b.places.build + 3                                 // blank, head of the table
	b.places.rates = b.places.spares + b.kinds() + 2                     // blank, head of the table
}

// kinds is how many rows the spares table has; two at least leave room for
// the sums beside it.
func (b *book) kinds() int { return max(2, len(b.ledger.kinds)) }

// itemRow is the row of an item on the parts sheet.
func (b *book) itemRow(it *item) int {
	for i, other := range b.ledger.items {
		if other == it {
			return partsHead + 1 + i
		}
	}
	panic("workbook: a part that is not in the ledger")
}

// spareCells are the input cells of a kind's spares: share, least pieces.
func (b *book) spareCells(kind catalog.Kind) (share, least string) {
	for i, k := range b.ledger.kinds {
		if k == kind {
			row := b.places.spares + i
			return of(sheetOverview, fixed(1, row)), of(sheetOverview, fixed(2, row))
		}
	}
	panic("workbook: a kind that is not in the ledger")
}

// rateCell shows the rate of a currency to the book's.
func (b *book) rateCell(currency string) cell {
	if currency == b.ledger.market.Currency {
		return cell{style: measure, value: 1}
	}
	for i, code := range b.ledger.foreign {
		if code == currency {
			rate, _ := b.ledger.market.Rate(code)
			return live(measure, of(sheetOverview, fixed(1, b.places.rates+i)), rate.InexactFloat64())
		}
	}
	panic(fmt.Sprintf("workbook: currency %q is not in the ledger", currency))
}
