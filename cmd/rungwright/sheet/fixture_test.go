package sheet

import (
	"fmt"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/xuri/excelize/v2"
)

// sheetOf makes a workbook of one sheet, "Parts", from rows of values; nil is
// a blank cell.
func sheetOf(t testing.TB, rows [][]any, more ...func(*excelize.File)) []byte {
	t.Helper()
	f := excelize.NewFile()
	defer f.Close()
	must(t, f.SetSheetName("Sheet1", "Parts"))
	fill(t, f, "Parts", rows)
	for _, change := range more {
		change(f)
	}
	return saved(t, f)
}

func fill(t testing.TB, f *excelize.File, sheet string, rows [][]any) {
	t.Helper()
	for i, row := range rows {
		for c, v := range row {
			if v != nil {
				must(t, f.SetCellValue(sheet, address(i+1, c), v))
			}
		}
	}
}

func saved(t testing.TB, f *excelize.File) []byte {
	t.Helper()
	out, err := f.WriteToBuffer()
	must(t, err)
	return out.Bytes()
}

func must(t testing.TB, err error) {
	t.Helper()
	if err != nil {
		t.Fatal(err)
	}
}

// short writes rows as "C1 C2|2|PART|", with "off" at the end when not
// fitted: enough to compare.
func shortRows(b *BOM) []string {
	var out []string
	for _, r := range b.Rows {
		line := fmt.Sprintf("%s|%d|%s", strings.Join(r.Refs, " "), r.Quantity, r.Part)
		if !r.Fitted {
			line += "|off"
		}
		out = append(out, line)
	}
	return out
}

// linesOf are the doubts with their grade in front.
func linesOf(list []Doubt) []string {
	var out []string
	for _, d := range list {
		out = append(out, d.Grade.String()+": "+d.String())
	}
	return out
}

func sameLines(t *testing.T, what string, got, want []string) {
	t.Helper()
	if diff := cmp.Diff(want, got); diff != "" {
		t.Errorf("%s differ (-want +got):\n%s", what, diff)
	}
}

// csvOf joins lines.
func csvOf(lines ...string) []byte { return []byte(strings.Join(lines, "\r\n") + "\r\n") }
