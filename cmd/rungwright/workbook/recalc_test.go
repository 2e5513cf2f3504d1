package workbook

import (
	"archive/zip"
	"bytes"
	"fmt"
	"io"
	"math"
	"strconv"
	"testing"

	"github.com/xuri/excelize/v2"

	"rungwright/optimize"
)

// typeIn opens a workbook, types a number into a cell and saves it: what a
// buyer does. Every cached value elsewhere then belongs to the old number.
func typeIn(t *testing.T, book []byte, sheet, cell string, v any) []byte {
	t.Helper()
	f, err := excelize.OpenReader(bytes.NewReader(book))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	if err := f.SetCellValue(sheet, cell, v); err != nil {
		t.Fatal(err)
	}
	out, err := f.WriteToBuffer()
	if err != nil {
		t.Fatal(err)
	}
	return out.Bytes()
}

// buildCell is where the build quantity stands.
func buildCell(t *testing.T, book []byte) string {
	t.Helper()
	f, err := excelize.OpenReader(bytes.NewReader(book))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	for _, n := range f.GetDefinedName() {
		if n.Name == "BuildQty" {
			var column, row = "", 0
			if _, err := fmt.Sscanf(n.RefersTo, "'Overview'!$%1s$%d", &column, &row); err != nil {
				t.Fatal(n.RefersTo, err)
			}
			return column + strconv.Itoa(row)
		}
	}
	t.Fatal("the name BuildQty is missing")
	return ""
}

// agree compares every cell of two workbooks, numbers to a tenth of a
// millionth, and wants formulas to have errors nowhere. It returns how many
// formula cells were compared.
func agree(t *testing.T, got, want []byte) (formulas int) {
	t.Helper()
	g, err := excelize.OpenReader(bytes.NewReader(got))
	if err != nil {
		t.Fatal(err)
	}
	defer g.Close()
	w, err := excelize.OpenReader(bytes.NewReader(want))
	if err != nil {
		t.Fatal(err)
	}
	defer w.Close()
	raw := excelize.Options{RawCellValue: true}
	for _, sheet := range w.GetSheetList() {
		rows, err := w.GetRows(sheet, raw)
		if err != nil {
			t.Fatal(err)
		}
		for r, row := range rows {
			for c := range row {
				name := at(c, r+1)
				formula, _ := w.GetCellFormula(sheet, name)
				if formula != "" {
					formulas++
				}
				have, _ := g.GetCellValue(sheet, name, raw)
				if kind, _ := g.GetCellType(sheet, name); kind == excelize.CellTypeError {
					t.Errorf("%s!%s: error %s in %s", sheet, name, have, formula)
				} else if !alike(have, row[c]) {
					t.Errorf("%s!%s: got %q, want %q from %s", sheet, name, have, row[c], formula)
				}
			}
		}
	}
	return formulas
}

func alike(a, b string) bool {
	x, errX := strconv.ParseFloat(a, 64)
	y, errY := strconv.ParseFloat(b, 64)
	if errX == nil && errY == nil {
		return math.Abs(x-y) <= 1e-7*max(1, math.Abs(y))
	}
	return a == b
}

// repricing is a workbook whose build quantity is typed over.
type repricing struct {
	name       string
	design     *optimize.Design
	options    Options
	quantities []int
}

func repricings(t *testing.T) []repricing {
	free := repricing{"each at its cheapest", testDesign(), testOptions(), []int{1, 7, 25, 120, 131, 480, 5000}}
	joint := repricing{"an order over all suppliers", testDesign(), testOptions(), []int{1, 60, 249, 250, 1200}}
	dearDelivery(joint.options.Suppliers)
	joint.design.Supply.Build.Units = 250 // more than one shelf holds of a part
	joint.options.Terms.NeedBy = 30
	offer := &joint.design.Lines[0].Part.Offers[0]
	offer.LeadDays, offer.Stock = -1, 300
	joint.options = planned(t, joint.design, joint.options)
	incomplete := repricing{"nothing for some parts", testDesign(), testOptions(), []int{120, 480}}
	_, _, _, _, _, board := testParts()
	incomplete.design.Lines = append(incomplete.design.Lines, optimize.Line{Part: board, Refs: []string{"PCB1"}, Role: optimize.RoleExtra})
	incomplete.design.Lines[3].Part.Offers[0].Prices = prices("EUR", 1, "0")
	incomplete.options.Terms.Rates = nil
	bad, options := hostileDesign()
	return []repricing{free, joint, incomplete, {"hostile texts", bad, options, []int{120, 25}}}
}

func (r repricing) file(n int) string { return fmt.Sprintf("%s %d", r.name, n) }

// officeFiles are all files that the office suite recalculates.
func officeFiles(t *testing.T) map[string][]byte {
	files := map[string][]byte{"parts.csv": hostileCSV()}
	for _, r := range repricings(t) {
		book := mustWrite(t, r.design, r.options)
		cell := buildCell(t, book)
		for _, n := range r.quantities {
			files[r.file(n)+".xlsx"] = typeIn(t, book, sheetOverview, cell, n)
		}
	}
	files["stale.xlsx"], files["broken.xlsx"] = spoilt(t)
	return files
}

// At each build quantity the office suite's own arithmetic, starting from a
// workbook whose cached values are of another quantity, must give every cell
// that the exact model gives.
func TestRepricesLikeTheModel(t *testing.T) {
	for _, r := range repricings(t) {
		for _, n := range r.quantities {
			t.Run(r.file(n), func(t *testing.T) {
				want, err := write(r.design, r.options, n)
				if err != nil {
					t.Fatal(err)
				}
				if formulas := agree(t, recalculatedFile(t, r.file(n)), want); formulas < 300 {
					t.Errorf("only %d formula cells were compared", formulas)
				}
			})
		}
	}
}

// The cases must not be tame: the joint order departs from each part's
// cheapest offer, and where something cannot be bought the sums say so.
func TestRepricingCases(t *testing.T) {
	cases := repricings(t)
	pinned := 0
	for _, offer := range newLedger(cases[1].design, cases[1].options, 250).offers {
		if offer.pinned {
			pinned++
		}
	}
	if pinned == 0 {
		t.Error("the order over all suppliers is each part's cheapest offer")
	}
	// the board has no offer, the bleeder no price, the winding no rate
	if _, _, open := newLedger(cases[2].design, cases[2].options, 120).sums(); open != 3 {
		t.Errorf("got %d open parts, want 3", open)
	}
}

// The check must have teeth: wrong cached values are put right by the office
// suite, and a wrong formula is found.
func TestRecalculationHasTeeth(t *testing.T) {
	right := mustWrite(t, testDesign(), testOptions())
	stale, _ := spoilt(t)
	if n := differences(t, recalculatedFile(t, "stale"), right); n != 0 {
		t.Errorf("%d wrong cached values were believed", n)
	}
	if n := differences(t, stale, right); n == 0 {
		t.Error("the cached values were not spoilt, so nothing was shown")
	}
	if n := differences(t, recalculatedFile(t, "broken"), right); n == 0 {
		t.Error("a wrong formula was not found")
	}
}

// spoilt are a workbook with wrong cached values and one with a wrong formula.
func spoilt(t *testing.T) (stale, broken []byte) {
	right := mustWrite(t, testDesign(), testOptions())
	return edit(t, right, "xl/worksheets/sheet2.xml", "</f><v>", "</f><v>7"), edit(t, right, "xl/worksheets/sheet2.xml", "BuildQty*", "1+BuildQty*")
}

// differences counts cells of the parts sheet that differ.
func differences(t *testing.T, got, want []byte) (n int) {
	t.Helper()
	raw := excelize.Options{RawCellValue: true}
	a, err := mustOpen(t, got).GetRows(sheetParts, raw)
	if err != nil {
		t.Fatal(err)
	}
	b, err := mustOpen(t, want).GetRows(sheetParts, raw)
	if err != nil {
		t.Fatal(err)
	}
	for r := range b {
		for c := range b[r] {
			if r >= len(a) || c >= len(a[r]) || !alike(a[r][c], b[r][c]) {
				n++
			}
		}
	}
	return n
}

// edit replaces text in one part of a workbook.
func edit(t *testing.T, book []byte, part, from, to string) []byte {
	t.Helper()
	z, err := zip.NewReader(bytes.NewReader(book), int64(len(book)))
	if err != nil {
		t.Fatal(err)
	}
	var out bytes.Buffer
	w := zip.NewWriter(&out)
	for _, f := range z.File {
		r, err := f.Open()
		if err != nil {
			t.Fatal(err)
		}
		data, err := io.ReadAll(r)
		if err != nil {
			t.Fatal(err)
		}
		if f.Name == part {
			if !bytes.Contains(data, []byte(from)) {
				t.Fatalf("%s holds no %q", part, from)
			}
			data = bytes.ReplaceAll(data, []byte(from), []byte(to))
		}
		p, err := w.Create(f.Name)
		if err != nil {
			t.Fatal(err)
		}
		p.Write(data)
	}
	if err := w.Close(); err != nil {
		t.Fatal(err)
	}
	return out.Bytes()
}
