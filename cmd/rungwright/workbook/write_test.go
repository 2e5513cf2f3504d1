package workbook

import (
	"archive/zip"
	"bytes"
	"encoding/xml"
	"errors"
	"io"
	"runtime"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"

	"rungwright/catalog"
	"rungwright/optimize"
	"rungwright/optimize/order"
)

func mustWrite(t *testing.T, d *optimize.Design, o Options) []byte {
	t.Helper()
	b, err := Write(d, o)
	if err != nil {
		t.Fatal(err)
	}
	return b
}

func mustOpen(t *testing.T, book []byte) *excelize.File {
	t.Helper()
	f, err := excelize.OpenReader(bytes.NewReader(book))
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { f.Close() })
	return f
}

// planned adds the order over all suppliers to the options.
func planned(t *testing.T, d *optimize.Design, o Options) Options {
	t.Helper()
	p, err := order.Make(Needs(d, o, 0), o.Suppliers, o.Terms)
	if err != nil {
		t.Fatal(err)
	}
	o.Plan = p
	return o
}

func TestSameInputSameBytes(t *testing.T) {
	first := mustWrite(t, testDesign(), planned(t, testDesign(), testOptions()))
	defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(0))
	for i := range 10 {
		runtime.GOMAXPROCS(1 + i%4)
		if again := mustWrite(t, testDesign(), planned(t, testDesign(), testOptions())); !bytes.Equal(first, again) {
			t.Fatalf("write %d gave other bytes", i)
		}
	}
}

// Every part of the package must be well-formed XML, read here by the standard
// library rather than by the one that wrote it.
func TestPartsAreWellFormed(t *testing.T) {
	book := mustWrite(t, testDesign(), testOptions())
	z, err := zip.NewReader(bytes.NewReader(book), int64(len(book)))
	if err != nil {
		t.Fatal(err)
	}
	sheets := 0
	for _, part := range z.File {
		if strings.HasPrefix(part.Name, "xl/worksheets/sheet") {
			sheets++
		}
		r, err := part.Open()
		if err != nil {
			t.Fatal(err)
		}
		for d := xml.NewDecoder(r); ; {
			if _, err := d.Token(); errors.Is(err, io.EOF) {
				break
			} else if err != nil {
				t.Fatalf("%s: %v", part.Name, err)
			}
		}
		r.Close()
	}
	if sheets != 8 {
		t.Errorf("got %d sheets, want 8", sheets)
	}
}

// The plan's own total stands in the workbook at the planned quantity, where
// it departs from each part's cheapest offer too.
func TestTotalIsThePlans(t *testing.T) {
	d := testDesign()
	for name, change := range map[string]func(o *Options){
		"as it is":        func(o *Options) {},
		"in a hurry":      func(o *Options) { o.Terms.NeedBy = 3 },
		"one excluded":    func(o *Options) { o.Terms.Excluded = []string{"Brackenlow Parts"} },
		"preferred":       func(o *Options) { o.Terms.Preferred, o.Terms.Premium = []string{"Fellmarket"}, 0.2 },
		"dear deliveries": func(o *Options) { dearDelivery(o.Suppliers) },
	} {
		t.Run(name, func(t *testing.T) {
			o := testOptions()
			change(&o)
			o = planned(t, d, o)
			l := newLedger(d, o, d.Supply.Build.Units)
			goods, charges, open := l.sums()
			if got := l.market.Amount(goods + charges); !got.Equal(o.Plan.Total) || open != len(o.Plan.Unserved) {
				t.Errorf("got %s with %d open, the plan says %s with %d", got, open, o.Plan.Total, len(o.Plan.Unserved))
			}
		})
	}
}

func dearDelivery(suppliers []catalog.Supplier) {
	for i := range suppliers {
		suppliers[i].Delivery, suppliers[i].FreeAbove = sum("60", suppliers[i].Currency), sum("400", suppliers[i].Currency)
	}
}

// Without a plan each part costs what order.Cheapest says, at any quantity.
func TestLedgerIsCheapest(t *testing.T) {
	d, o := testDesign(), testOptions()
	for _, units := range []int{1, 2, 3, 9, 25, 26, 60, 120, 480, 999, 5000} {
		l := newLedger(d, o, units)
		for _, it := range l.items {
			want, ok := order.Cheapest(it.part, it.need, o.Terms)
			minor, full := it.cost()
			if ok != full || ok && !l.market.Amount(minor).Equal(want.Cost) {
				t.Errorf("%d units, %s: got %s %v, want %s %v", units, it.part.Number, l.market.Amount(minor), full, want.Cost, ok)
			}
		}
	}
}

// hostile is text that a careless writer would let act.
var hostile = []string{"=1+1", "+1+1", "-2+3", "@SUM(A1)", "\t=1", "\r\n=HYPERLINK(\"http://x\")", "＝1", "'quoted", "a\x00b\x1bc", "\u202Egnp.exe",
	"_x0041_", "&L&P", "]]>", "<b>", strings.Repeat("long ", 9000), string([]byte{0xff, 0xfe, 'x'}), "[Sheet]:*?/\\", "0012", "1E5", "=cmd|' /C calc'!A0"}

func hostileDesign() (*optimize.Design, Options) {
	d, o := testDesign(), testOptions()
	for i, bad := range hostile {
		line := &d.Lines[i%len(d.Lines)]
		p := *line.Part
		p.Offers = append([]catalog.Offer(nil), p.Offers...)
		p.Number, p.Maker, p.Description = p.Number+bad, bad, bad
		p.Offers[0].Supplier, p.Offers[0].OrderCode = bad, bad
		line.Part = &p
		o.Suppliers = append(o.Suppliers, catalog.Supplier{Name: bad, Currency: "EUR", Delivery: sum("1", "EUR")})
		d.Cautions = append(d.Cautions, d.Cautions[0])
		d.Cautions[len(d.Cautions)-1].Title = bad
		o.Notes = append(o.Notes, bad)
	}
	d.Supply.Name, o.RatesNote, o.Program = hostile[11]+hostile[0], hostile[3], hostile[8]
	return d, o
}

// Nothing that came from a catalog may become a formula. (That our own
// formulas survive such texts is shown where they are recalculated.)
func TestHostileTexts(t *testing.T) {
	d, o := hostileDesign()
	f := mustOpen(t, mustWrite(t, d, o))
	for _, sheet := range f.GetSheetList() {
		rows, err := f.GetRows(sheet)
		if err != nil {
			t.Fatal(err)
		}
		for r, row := range rows {
			for c, v := range row {
				formula, _ := f.GetCellFormula(sheet, at(c, r+1))
				if strings.Contains(formula, "calc") || strings.Contains(formula, "1+1") || strings.Contains(formula, "HYPERLINK") {
					t.Errorf("%s!%s: a text became the formula %s", sheet, at(c, r+1), formula)
				}
				if strings.ContainsAny(v, "\x00\x1b\u202E") || len(v) > 3*mostText {
					t.Errorf("%s!%s: unclean text %q", sheet, at(c, r+1), cut(v, 40))
				}
			}
		}
	}
}

func TestNoPartsNoBook(t *testing.T) {
	if _, err := Write(&optimize.Design{}, Options{}); err == nil {
		t.Error("a workbook without parts was written")
	}
}

func TestFooterStaysShort(t *testing.T) {
	d, o := testDesign(), testOptions()
	d.Supply.Name = strings.Repeat("& ", 300)
	for range 40 {
		d.Inputs = append(d.Inputs, d.Inputs[0])
	}
	b := &book{design: d, options: o}
	if n := len([]rune(b.foot())); n > 255 {
		t.Errorf("the footer has %d characters, 255 are allowed", n)
	}
}
