package sheet

import (
	"testing"

	"github.com/xuri/excelize/v2"
)

// The parts and makers are invented.
func TestAccepted(t *testing.T) {
	plain := []string{"C1 C2 C3 C4|4|QLF-103", "D1 D2|2|TVD-2K2"}
	body := [][]any{{"C1-C4", "QLF-103", 4}, {"D1, D2", "TVD-2K2", 2}}
	head := []any{"Designator", "Part number", "Qty"}
	cases := []struct {
		name   string
		data   []byte
		o      *Options
		rows   []string
		doubts []string
	}{
		{name: "header in row 1", data: sheetOf(t, [][]any{head, body[0], body[1]}), rows: plain},
		{name: "columns in another order, odd words", rows: plain,
			data: sheetOf(t, [][]any{{"QTY.", "No.", " Mfr.\nPart No. ", "Ref. Des."}, {4, 1, "QLF-103", "C1-C4"}, {2, 2, "TVD-2K2", "D1, D2"}})},
		{name: "German", rows: plain, data: sheetOf(t, [][]any{{"Pos.", "Menge", "Referenzbezeichner", "Hersteller-Nr."}, {1, 4, "C1-C4", "QLF-103"}, {2, 2, "D1 D2", "TVD-2K2"}})},
		{name: "French", rows: plain, data: sheetOf(t, [][]any{{"Repère", "Quantité", "Référence fabricant"}, {"C1-C4", 4, "QLF-103"}, {"D1;D2", 2, "TVD-2K2"}})},
		{name: "title block, blank lines, totals, remarks", rows: plain,
			data: sheetOf(t, [][]any{{"Harbour ioniser"}, {"Rev", "B", nil}, nil, head, body[0], nil, body[1], {nil, "Total", 6}, nil, {"checked by hand"}}),
			doubts: []string{
				`note: f.xlsx:Parts!A8: left out: a line of totals ("6")`,
				`note: f.xlsx:Parts!A10: left out: a heading or a remark ("checked by hand")`}},
		{name: "two-line header with a merged heading", rows: plain,
			data: sheetOf(t, [][]any{{"Reference", "Manufacturer", nil, "Per"}, {"designator", "name", "part number", "unit"}, {"C1-C4", "Quillfen", "QLF-103", 4}, {"D1, D2", "Tarnvale", "TVD-2K2", 2}},
				func(f *excelize.File) { must(t, f.MergeCell("Parts", "B1", "C1")) })},
		{name: "header repeated on each page", rows: plain, data: sheetOf(t, [][]any{head, body[0], head, body[1]}),
			doubts: []string{`note: f.xlsx:Parts!A3: left out: the headings once more`}},
		{name: "group headings", rows: plain, data: sheetOf(t, [][]any{head, {"Capacitors"}, body[0], {"Diodes:"}, body[1]}),
			doubts: []string{`note: f.xlsx:Parts!A2: left out: a heading or a remark ("Capacitors")`, `note: f.xlsx:Parts!A4: left out: a heading or a remark ("Diodes:")`}},
		{name: "numbers as text, and pieces", rows: plain, data: sheetOf(t, [][]any{head, {"C1-C4", "QLF-103", "4"}, {"D1, D2", "TVD-2K2", "2 pcs"}}),
			doubts: []string{`note: f.xlsx:Parts!C3: "2 pcs" was read as 2 pieces`}},
		{name: "no quantity column", rows: plain, data: sheetOf(t, [][]any{{"References", "Part"}, {"C1-C4", "QLF-103"}, {"D1, D2", "TVD-2K2"}})},
		{name: "stray blanks and signs without width", rows: plain, data: sheetOf(t, [][]any{head, {"c1\u00a0\u2013 c4", " QLF\u2011103\u200b", 4}, body[1]}),
			doubts: []string{`note: f.xlsx:Parts!B2: "QLF‑103" was read as "QLF-103"`}},
		{name: "vertical merge", rows: []string{"C1|1|QLF-103", "C2|1|QLF-103"},
			data:   sheetOf(t, [][]any{head, {"C1", "QLF-103", 1}, {"C2", nil, 1}}, func(f *excelize.File) { must(t, f.MergeCell("Parts", "B2", "B3")) }),
			doubts: []string{`note: f.xlsx:Parts!B3: taken from the merged cell B2: "QLF-103"`}},
		{name: "hidden rows and columns", rows: plain, data: sheetOf(t, [][]any{head, body[0], body[1]}, func(f *excelize.File) {
			must(t, f.SetRowVisible("Parts", 3, false))
			must(t, f.SetColVisible("Parts", "C", false))
		}), doubts: []string{`note: f.xlsx:Parts: rows that are hidden in the sheet were read too: 3`, `note: f.xlsx:Parts!C1: the column "Qty" is hidden in the sheet and was read`}},
		{name: "several sheets", rows: plain, data: sheetOf(t, [][]any{{"Order code", "Part"}, {"F-1", "QLF-103"}}, func(f *excelize.File) {
			_, err := f.NewSheet("My list")
			must(t, err)
			fill(t, f, "My list", [][]any{head, body[0], body[1]})
		}), doubts: []string{`note: f.xlsx:'My list': read the sheet "My list"; not read: "Parts"`}},
		{name: "the sheet that is named", o: &Options{Sheet: "second"}, rows: []string{"C9|1|QLF-9"}, data: sheetOf(t, [][]any{head, body[0]}, func(f *excelize.File) {
			_, err := f.NewSheet("Second")
			must(t, err)
			fill(t, f, "Second", [][]any{head, {"C9", "QLF-9", 1}})
		})},
		{name: "not fitted by a column for it", rows: []string{"C1|1|QLF-103", "C2|1|QLF-103|off", "C3|1|QLF-103|off"},
			data: sheetOf(t, [][]any{{"Designator", "Part number", "Fitted"}, {"C1", "QLF-103", "yes"}, {"C2", "QLF-103", "no"}, {"C3", "QLF-103", "DNP"}})},
		{name: "not fitted by a column of the contrary", rows: []string{"C1|1|QLF-103", "C2|1|QLF-103|off"},
			data: sheetOf(t, [][]any{{"Designator", "Part number", "DNP"}, {"C1", "QLF-103", nil}, {"C2", "QLF-103", "x"}})},
		{name: "not fitted by a marker", rows: []string{"C1|0||off", "C2|1|QLF-103|off", "C3|1|QLF-104|off"},
			data:   sheetOf(t, [][]any{{"Designator", "Part number", "Value", "Qty"}, {"C1", "DNP", nil, 0}, {"C2", "QLF-103", "do not fit", 1}, {"C3", "QLF-104", "10n", "not fitted"}}),
			doubts: []string{`note: f.xlsx:Parts!B2: "DNP": taken as not fitted`, `note: f.xlsx:Parts!C3: "do not fit": taken as not fitted`, `note: f.xlsx:Parts!D4: "not fitted": taken as not fitted`}},
		{name: "quantity and designators settled by designators", o: &Options{Quantity: ByDesignators}, rows: []string{"C1 C2 C3|3|QLF-103", "D1|1|TVD-1"},
			data:   sheetOf(t, [][]any{head, {"C1-C3", "QLF-103", 4}, {"D1", "TVD-1", nil}}),
			doubts: []string{`note: f.xlsx:Parts!C2: the quantity is 4, but there are 3 designators (C1, C2, C3); the designators count, as asked`}},
		{name: "quantity and designators settled by the column", o: &Options{Quantity: ByColumn}, rows: []string{"C1 C2 C3|4|QLF-103"},
			data:   sheetOf(t, [][]any{head, {"C1-C3", "QLF-103", 4}}),
			doubts: []string{`note: f.xlsx:Parts!C2: the quantity is 4, but there are 3 designators (C1, C2, C3); the quantity counts, as asked`}},
		{name: "columns that the user names", o: &Options{Columns: map[Field]string{Designators: "where", Part: "c"}}, rows: plain,
			data: sheetOf(t, [][]any{{"Where", "n", "what"}, {"C1-C4", 4, "QLF-103"}, {"D1, D2", 2, "TVD-2K2"}})},
		{name: "columns and row that the user names", o: &Options{HeaderRow: 2, Columns: map[Field]string{Designators: "A", Part: "C"}}, rows: plain,
			data: sheetOf(t, [][]any{{"list"}, {"a1", "n", "what"}, {"C1-C4", 4, "QLF-103"}, {"D1, D2", 2, "TVD-2K2"}})},
		{name: "a part without a place", rows: []string{"|2|BOX-7"}, data: sheetOf(t, [][]any{head, {nil, "BOX-7", 2}}),
			doubts: []string{`note: f.xlsx:Parts!A2: no designator is given, so the part has no place in the circuit`}},
		{name: "weak heading beside a strong one", rows: plain, data: sheetOf(t, [][]any{{"Type", "Designator", "MPN", "Qty"}, {"cap", "C1-C4", "QLF-103", 4}, {"diode", "D1,D2", "TVD-2K2", 2}}),
			doubts: []string{`note: f.xlsx:Parts!A1: the part numbers were taken from "MPN" (column C), not from "Type"`}},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			b, err := ReadBOM("f.xlsx", c.data, c.o)
			if err != nil {
				t.Fatal(err)
			}
			sameLines(t, "rows", shortRows(b), c.rows)
			sameLines(t, "doubts", linesOf(b.Doubts), c.doubts)
		})
	}
}

func TestRefused(t *testing.T) {
	head := []any{"Designator", "Part number", "Qty"}
	cases := []struct {
		name string
		rows [][]any
		o    *Options
		err  string
	}{
		{"no header", [][]any{{"a list"}, {"C1", "QLF-103", 1}}, nil,
			`f.xlsx:Parts: no row of headings was found among the first 30 rows; it needs a column of designators and one of part numbers; seen: "C1", "QLF-103", "1"; ` +
				`write usual headings, such as designator, part number and quantity, or name the row of the header and the columns`},
		{"two columns for one meaning", [][]any{{"Designator", "Part number", "MPN"}, {"C1", "a", "b"}}, nil,
			`f.xlsx:Parts!C1: "Part number" and "MPN" (column C) may both hold the part numbers; name the column that does`},
		{"no part numbers", [][]any{{"Designator", "Qty", "Notes"}, {"C1", 1}}, nil,
			`f.xlsx:Parts!A1: no column of part numbers was found; the headings are "Designator", "Qty", "Notes"; rename one, or name it`},
		{"a named column that is not there", [][]any{head, {"C1", "QLF", 1}}, &Options{Columns: map[Field]string{Part: "Order code"}},
			`f.xlsx:Parts!A1: there is no column "Order code" for part; the headings are "Designator", "Part number", "Qty"`},
		{"a named sheet that is not there", [][]any{head, {"C1", "QLF", 1}}, &Options{Sheet: "Teile"}, `f.xlsx: there is no sheet "Teile"; there are "Parts"`},
		{"quantity and designators", [][]any{head, {"C1-C3", "QLF", 4}}, nil,
			`f.xlsx:Parts!C2: the quantity is 4, but there are 3 designators (C1, C2, C3); mend one of the two, or say which counts`},
		{"a designator in two rows", [][]any{head, {"C1-C3", "QLF", 3}, {"C03", "QLG", 1}}, nil, `f.xlsx:Parts!A3: C03 stands in cell A2 too; keep it in one row`},
		{"a designator twice in a row", [][]any{head, {"C1, c1", "QLF", 2}}, nil, `f.xlsx:Parts!A2: C1 stands twice in this row; keep it once`},
		{"quantity zero", [][]any{head, {"C1", "QLF", 0}}, nil,
			`f.xlsx:Parts!C2: the quantity is zero; if the part is not fitted, say so in a column headed fitted, else write how many one unit needs`},
		{"quantity blank", [][]any{head, {"C1", "QLF", nil}}, nil, `f.xlsx:Parts!C2: the quantity is blank; write it, or let the designators be counted`},
		{"quantity negative", [][]any{head, {"C1", "QLF", -1}}, nil, `f.xlsx:Parts!C2: quantity: "-1" is negative; write how many pieces one unit needs`},
		{"quantity a fraction", [][]any{head, {"C1", "QLF", 1.5}}, nil, `f.xlsx:Parts!C2: quantity: "1.5" is not a whole number; write pieces`},
		{"quantity in words", [][]any{head, {"C1", "QLF", "a few"}}, nil, `f.xlsx:Parts!C2: quantity: "a few" is not a number; write digits alone`},
		{"quantity of either meaning", [][]any{head, {"C1", "QLF", "1,200"}}, nil,
			`f.xlsx:Parts!C2: quantity: "1,200" may be a number with thousands or with decimals; write it without the mark of thousands, or say which sign stands before the decimals`},
		{"no part number", [][]any{head, {"C1", nil, 1}}, nil, `f.xlsx:Parts!B2: the part number is missing; write it, or say in a column headed fitted that nothing is`},
		{"an error cell", [][]any{head, {"C1", "#N/A", 1}}, nil, `f.xlsx:Parts!B2: "#N/A" is an error of the spreadsheet; mend the formula or write the value`},
		{"not fitted within a value", [][]any{{"Designator", "Part number", "Value"}, {"C1", "QLF", "10 nF (DNP)"}}, nil,
			`f.xlsx:Parts!C2: "10 nF (DNP)" may mean that the part is not fitted; say so in a column headed fitted, or leave the words out`},
		{"fitted, or not, is unclear", [][]any{{"Designator", "Part number", "Fitted"}, {"C1", "QLF", "perhaps"}, {"C2", "QLF", "yes"}, {"C3", "QLF", nil}}, nil,
			"f.xlsx:Parts!C2: \"perhaps\" does not say whether the part is fitted; write yes or no\n" +
				"f.xlsx:Parts!C4: the column \"Fitted\" is blank here but says yes elsewhere; write yes or no"},
		{"nothing below the header", [][]any{head}, nil, `f.xlsx:Parts: no part stands below the header`},
		{"an empty sheet", nil, nil, `f.xlsx:Parts: the sheet is empty`},
		{"designators of all kinds of wrong", [][]any{head, {"C1-R4", "QLF", 4}, {"C9-C2", "QLF", 8}, {"C1-C9999", "QLF", 1}, {"R?", "QLF", 1}, {"J1-1", "QLF", 1}, {"C1 (DNP)", "QLF", 1}, {"12", "QLF", 1}}, nil,
			"f.xlsx:Parts!A2: \"C1-R4\" runs from C1 to R4; write a range of one kind, such as C1-C4\n" +
				"f.xlsx:Parts!A3: \"C9-C2\" runs backwards; write C2-C9\n" +
				"f.xlsx:Parts!A4: \"C1-C9999\" stands for 9999 designators; 5000 are the most; check the numbers\n" +
				"f.xlsx:Parts!A5: \"R?\" has no number yet; number the parts\n" +
				"f.xlsx:Parts!A6: \"J1-1\" may be a range or the name of a pin; write J1 alone, or the range in full, such as J1-J4\n" +
				"f.xlsx:Parts!A7: \"C1(DNP)\" says that it is not fitted within the list of designators; put it in a row of its own, with \"no\" in a column headed fitted\n" +
				"f.xlsx:Parts!A8: \"12\" is not a designator; write letters and a number, such as C12, or a range such as C1-C4"},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			_, err := ReadBOM("f.xlsx", sheetOf(t, c.rows), c.o)
			if err == nil {
				t.Fatal("got no error")
			}
			if err.Error() != c.err {
				t.Errorf("got\n%s\nwant\n%s", err, c.err)
			}
		})
	}
}

// A formula counts by its stored result; without one it must not pass for
// nothing.
func TestFormulas(t *testing.T) {
	rows := [][]any{{"Designator", "Part number", "Qty"}, {"C1", "QLF", nil}}
	data := sheetOf(t, rows, func(f *excelize.File) { must(t, f.SetCellFormula("Parts", "C2", "1+0")) })
	_, err := ReadBOM("f.xlsx", data, nil)
	want := "f.xlsx:Parts!C2: the formula has no stored result; open the workbook in a spreadsheet program and save it once"
	if err == nil || err.Error() != want {
		t.Errorf("got %v, want %s", err, want)
	}

	f := excelize.NewFile()
	w, err := f.NewStreamWriter("Sheet1")
	must(t, err)
	must(t, w.SetRow("A1", []any{"Designator", "Part number", "Qty"}))
	must(t, w.SetRow("A2", []any{"C1", excelize.Cell{Formula: `"QLF"`, Value: "QLF"}, excelize.Cell{Formula: "1+0", Value: 1}}))
	must(t, w.Flush())
	b, err := ReadBOM("f.xlsx", saved(t, f), nil)
	must(t, err)
	sameLines(t, "rows", shortRows(b), []string{"C1|1|QLF"})
}

// Two sheets that are equally good cannot be chosen between.
func TestRivalSheets(t *testing.T) {
	rows := [][]any{{"Designator", "Part number"}, {"C1", "QLF"}}
	data := sheetOf(t, rows, func(f *excelize.File) {
		_, err := f.NewSheet("Old")
		must(t, err)
		fill(t, f, "Old", rows)
	})
	_, err := ReadBOM("f.xlsx", data, nil)
	if want := `f.xlsx: the sheets "Parts" and "Old" look like a list of parts alike; name the one to read`; err == nil || err.Error() != want {
		t.Errorf("got %v, want %s", err, want)
	}
	hide := func(f *excelize.File) { must(t, f.SetSheetVisible("Old", false)) }
	data = sheetOf(t, rows, func(f *excelize.File) {
		_, err := f.NewSheet("Old")
		must(t, err)
		fill(t, f, "Old", rows)
		hide(f)
	})
	b, err := ReadBOM("f.xlsx", data, nil)
	must(t, err)
	if b.Sheet != "Parts" || len(b.OtherSheets) != 1 || b.OtherSheets[0] != "Old" {
		t.Errorf("got sheet %q and others %q", b.Sheet, b.OtherSheets)
	}
}

// What a spreadsheet program has rewritten is warned of; a part number of
// digits alone among such is none.
func TestDamage(t *testing.T) {
	head := []any{"Designator", "Part number"}
	warned := func(rows ...[]any) []string {
		b, err := ReadBOM("f.xlsx", sheetOf(t, append([][]any{head}, rows...), func(f *excelize.File) {
			style, err := f.NewStyle(&excelize.Style{NumFmt: 14})
			must(t, err)
			if len(rows) == 4 {
				must(t, f.SetCellStyle("Parts", "B5", "B5", style))
			}
		}), nil)
		must(t, err)
		return linesOf(b.Doubts)
	}
	text := []any{"C1", "QLF-103"}
	sameLines(t, "doubts", warned(text, []any{"C2", "1E+05"}, []any{"C3", 603}, []any{"C4", 46054}), []string{
		`warning: f.xlsx:Parts!B3: "1E+05" looks like a number that a spreadsheet program has rewritten; compare it with the maker's part number`,
		`warning: f.xlsx:Parts!B5: "02-01-26" looks like a date that a spreadsheet program has made of it; compare it with the maker's part number`,
	})
	sameLines(t, "doubts", warned(text, []any{"C2", "QLF-104"}, []any{"C3", 603}), []string{
		`warning: f.xlsx:Parts!B4: "603" is stored as a number, where other part numbers are text, so that zeros in front or an exponent may be lost; compare it with the maker's part number`,
	})
	sameLines(t, "doubts", warned([]any{"C1", 4711}, []any{"C2", 4712}), nil)
}

// A number with a format is read as it looks where it is a name, and bare
// where it is a number.
func TestNumberFormats(t *testing.T) {
	data := sheetOf(t, [][]any{{"Designator", "Part number", "Qty"}, {nil, 603, 1234}}, func(f *excelize.File) {
		padded, grouped := "0000", "#,##0.00"
		for cell, format := range map[string]*string{"B2": &padded, "C2": &grouped} {
			style, err := f.NewStyle(&excelize.Style{CustomNumFmt: format})
			must(t, err)
			must(t, f.SetCellStyle("Parts", cell, cell, style))
		}
	})
	b, err := ReadBOM("f.xlsx", data, nil)
	must(t, err)
	sameLines(t, "rows", shortRows(b), []string{"|1234|0603"})
}

func TestPositions(t *testing.T) {
	b, err := ReadBOM("f.csv", csvOf("Designator;Part number;Circuit position", "C10, C11;QLF;C1 C2", "C12;QLF;"), nil)
	must(t, err)
	if got := b.Rows[0].Positions; len(got) != 2 || got[0] != "C1" || got[1] != "C2" || b.Rows[1].Positions != nil {
		t.Errorf("got %q and %q", got, b.Rows[1].Positions)
	}
	_, err = ReadBOM("f.csv", csvOf("Designator;Part number;Circuit position", "C10, C11;QLF;C1"), nil)
	if want := `f.csv:2:14: 1 circuit positions are given for 2 designators; give one for each`; err == nil || err.Error() != want {
		t.Errorf("got %v, want %s", err, want)
	}
}

func TestSameValue(t *testing.T) {
	b, err := ReadBOM("f.csv", csvOf("Ref;Part number;Value", "C1;QLF;10 nF", "C2;qlf;10n", "C3;QLF;22nF"), nil)
	must(t, err)
	sameLines(t, "doubts", linesOf(b.Doubts), []string{`warning: f.csv:4:8: the part "QLF" has the value "22nF" here, but "10 nF" in line 2; check both`})
}

// The parts list among several sheets that name parts, with its own kind of
// headings, title rows and a line of the sum, as purchase workbooks have.
func TestPurchaseWorkbook(t *testing.T) {
	parts := [][]any{{"Parts list"}, {"Quantities follow from the build quantity."}, nil,
		{"No.", "References", "Use", "Per unit", "Maker", "Part", "What it is", "Status", "Alternates", "Needed", "Supplier", "Buy", "Cost (EUR)"},
		{1, "C1 C2 C3", "coupling", 3, "Quillfen", "QLF-103", "10 nF 3 kV", "active", "", 360, "Fellmarket", 400, 12.5},
		{nil, nil, nil, nil, nil, nil, nil, nil, nil, nil, nil, "Goods", 12.5}}
	data := sheetOf(t, parts, func(f *excelize.File) {
		for name, rows := range map[string][][]any{
			"Stresses": {{"References", "Part", "Stress", "Value"}, {"C1", "QLF-103", "voltage", 0.7}},
			"Order":    {{"Line", "Supplier", "Order code", "Part", "Maker", "Quantity"}, {1, "Fellmarket", "F-1", "QLF-103", "Quillfen", 400}},
		} {
			_, err := f.NewSheet(name)
			must(t, err)
			fill(t, f, name, rows)
		}
	})
	b, err := ReadBOM("f.xlsx", data, nil)
	must(t, err)
	sameLines(t, "rows", shortRows(b), []string{"C1 C2 C3|3|QLF-103"})
	if b.Sheet != "Parts" || b.Rows[0].Maker != "Quillfen" || b.Rows[0].Description != "10 nF 3 kV" {
		t.Errorf("got %q %+v", b.Sheet, b.Rows[0])
	}
}
