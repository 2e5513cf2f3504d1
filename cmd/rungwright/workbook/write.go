package workbook

import (
	"cmp"
	"fmt"
	"strings"
	"time"

	"github.com/xuri/excelize/v2"

	"rungwright/optimize"
	"rungwright/optimize/order"
)

// The sheets, in their order.
const (
	sheetOverview   = "Overview"
	sheetParts      = "Parts"
	sheetOrder      = "Order"
	sheetStresses   = "Stresses"
	sheetCurves     = "Curves"
	sheetAlternates = "Alternates"
	sheetPrices     = "Prices"
	sheetCautions   = "Cautions"
)

// book is a workbook being written.
type book struct {
	design  *optimize.Design
	options Options
	ledger  *ledger
	columns priceColumns
	places  places
	sums    [][]cell // of the order, beside the spares table
}

// Write returns the workbook's bytes. It needs a design with at least one
// line; errors come from the spreadsheet library alone.
func Write(d *optimize.Design, o Options) ([]byte, error) {
	return write(d, o, cmp.Or(d.Supply.Build.Units, 1))
}

// write shows the book as it stands once somebody types units as the build
// quantity.
func write(d *optimize.Design, o Options, units int) ([]byte, error) {
	if len(d.Lines) == 0 {
		return nil, fmt.Errorf("the design has no parts, so there is nothing to write")
	}
	b := &book{design: d, options: o, ledger: newLedger(d, o, units)}
	b.columns = columnsFor(b.ledger.breaks)
	b.place()
	f := excelize.NewFile()
	defer f.Close()
	if err := b.fill(f); err != nil {
		return nil, err
	}
	return save(f)
}

func (b *book) fill(f *excelize.File) error {
	if err := f.SetDefaultFont(face); err != nil {
		return err
	}
	ids, err := register(f, b.ledger.market.Digits)
	if err != nil {
		return err
	}
	sheets := b.sheets()
	if err := f.SetSheetName("Sheet1", sheets[0].name); err != nil {
		return err
	}
	for _, s := range sheets[1:] {
		if _, err := f.NewSheet(s.name); err != nil {
			return err
		}
	}
	if err := b.defineNames(f); err != nil {
		return err
	}
	for _, s := range sheets {
		if err := s.flush(f, ids, b.foot()); err != nil {
			return err
		}
	}
	return b.properties(f)
}

// sheets builds all that have something to show.
func (b *book) sheets() []*sheet {
	all := []*sheet{b.overviewSheet(), b.partsSheet(), b.orderSheet(), b.stressesSheet(), b.curvesSheet(), b.alternatesSheet(), b.pricesSheet(), b.cautionsSheet()}
	shown := all[:0]
	for _, s := range all {
		if s != nil {
			shown = append(shown, s)
		}
	}
	return shown
}

func (b *book) defineNames(f *excelize.File) error {
	return f.SetDefinedName(&excelize.DefinedName{Name: "BuildQty", RefersTo: of(sheetOverview, fixed(1, b.places.build)),
		Comment: "how many units are built"})
}

// foot is the footer: what it is, the inputs' hashes, page numbers, the date.
// A footer may have 255 characters in all.
func (b *book) foot() string {
	hashes := ""
	for _, in := range b.inputs() {
		if len(hashes) < 60 {
			hashes += " " + cut(in.SHA256, 13)
		}
	}
	if hashes != "" {
		hashes = "inputs" + hashes
	}
	left := footer(cmp.Or(b.design.Supply.Name, "design"), 60)
	return fmt.Sprintf("&L&8%s\n%s&C&8page &P of &N&R&8&A\n%s", left, footer(hashes, 80), b.made())
}

func (b *book) made() string {
	if b.options.Made.IsZero() {
		return ""
	}
	return b.options.Made.UTC().Format("2 January 2006")
}

func (b *book) properties(f *excelize.File) error {
	program := cmp.Or(clean(b.options.Program), "rungwright")
	stamp := ""
	if !b.options.Made.IsZero() {
		stamp = b.options.Made.UTC().Format(time.RFC3339)
	}
	var hashes []string
	for _, in := range b.inputs() {
		hashes = append(hashes, clean(in.Name)+" "+in.SHA256)
	}
	err := f.SetDocProps(&excelize.DocProperties{Title: clean(b.design.Supply.Name), Subject: "Design and purchase workbook",
		Creator: program, LastModifiedBy: program, Created: stamp, Modified: stamp, Language: "en",
		Description: cut("Inputs (SHA-256): "+strings.Join(hashes, "; "), mostText)})
	if err != nil {
		return err
	}
	if err := f.SetAppProps(&excelize.AppProperties{Application: program}); err != nil {
		return err
	}
	anew := true
	return f.SetCalcProps(&excelize.CalcPropsOptions{FullCalcOnLoad: &anew})
}

// money is minor units of the book's currency as a cell's number.
func (b *book) money(minor int64) float64 { return b.amountIn(minor, b.ledger.market.Digits) }

func (b *book) amountIn(minor int64, digits int) float64 {
	m := order.Market{Digits: digits}
	return m.Amount(minor).InexactFloat64()
}
