package sheet

import (
	"fmt"
	"slices"
	"strings"
)

// BOM is a bill of materials as a sheet gives it.
type BOM struct {
	File        string
	Sheet       string   // that was read; empty in a text file
	OtherSheets []string // that were not, in the workbook's order
	Rows        []Row    // in the order of the sheet
	Doubts      []Doubt  // all of them, in the order of the sheet
}

// Row is one line of a bill of materials.
type Row struct {
	Refs        []string // designators in capitals, ranges written out; none for a part without a place
	Positions   []string // where in the circuit, one for each of Refs; nil unless the sheet says so
	Quantity    int      // for one unit
	Part        string   // part number, without stray blanks; letter case as written; may be empty when not fitted
	Maker       string
	Value       string
	Description string
	Fitted      bool
	Place       Place // of the part number, else of the row
}

// ReadBOM reads a bill of materials from a workbook, a text table or a YAML
// file. The error is form.Problems with everything Wrong; the BOM comes with
// it, unless the file as a whole is unreadable, so that the other doubts can
// be shown too.
func ReadBOM(name string, data []byte, o *Options) (*BOM, error) {
	o = o.filled()
	if isYAML(name, data) {
		return readYAML(name, data, o)
	}
	t, err := Open(name, data, o)
	if err != nil {
		return nil, err
	}
	var d doubts
	d.list = append(d.list, t.Doubts...)
	b := &BOM{File: name}
	s, h := choose(t, o, &d)
	if s != nil {
		b.Sheet = s.Name
		b.OtherSheets = otherSheets(t, s)
		if checkHeader(s, &h, o, &d) {
			r := newRowReader(s, h, o, &d)
			b.finish(r.rows(), o, &d)
		}
	}
	b.Doubts = d.sorted()
	return b, problems(b.Doubts)
}

// finish checks the rows against each other and takes them over.
func (b *BOM) finish(drafts []draft, o *Options, d *doubts) {
	checkQuantities(drafts, o, d)
	checkTwice(drafts, d)
	checkValues(drafts, d)
	for _, row := range drafts {
		b.Rows = append(b.Rows, row.Row)
	}
	if len(drafts) == 0 && problems(d.list) == nil {
		d.wrong(Place{File: b.File, Sheet: b.Sheet}, "", "no part stands below the header")
	}
}

func otherSheets(t *Table, chosen *Sheet) []string {
	var names []string
	for i := range t.Sheets {
		if s := &t.Sheets[i]; s != chosen {
			names = append(names, s.Name)
		}
	}
	return names
}

// choose takes the sheet that the user names, else the visible one with the
// best header; two that are equally good must be settled.
func choose(t *Table, o *Options, d *doubts) (*Sheet, header) {
	if o.Sheet != "" {
		return chooseNamed(t, o, d)
	}
	var best *Sheet
	var rivals []string
	found := header{line: -1}
	for i := range t.Sheets {
		s := &t.Sheets[i]
		h := findHeader(s, o)
		switch {
		case s.Hidden && h.score > 0:
			d.note(s.Whole(), "", "the sheet %q is hidden and was left out; name it to read it", s.Name)
		case s.Hidden:
		case h.score > found.score:
			best, found, rivals = s, h, nil
		case h.score == found.score && h.score > 0:
			rivals = append(rivals, fmt.Sprintf("%q", s.Name))
		}
	}
	switch {
	case best == nil:
		noHeader(t, o, d)
		return nil, found
	case len(rivals) > 0:
		d.wrong(Place{File: t.File}, "", "the sheets %q and %s look like a list of parts alike; name the one to read", best.Name, strings.Join(rivals, ", "))
		return nil, found
	case len(t.Sheets) > 1:
		d.note(best.Whole(), "", "read the sheet %q; not read: %s", best.Name, quoteAll(otherSheets(t, best)))
	}
	return best, found
}

func chooseNamed(t *Table, o *Options, d *doubts) (*Sheet, header) {
	for i := range t.Sheets {
		s := &t.Sheets[i]
		if !strings.EqualFold(clean(s.Name), clean(o.Sheet)) {
			continue
		}
		h := findHeader(s, o)
		if h.line < 0 {
			noHeader(&Table{File: t.File, Sheets: t.Sheets[i : i+1]}, o, d)
			return nil, h
		}
		return s, h
	}
	names := otherSheets(t, nil)
	if len(names) == 1 && names[0] == "" {
		d.wrong(Place{File: t.File}, "", "a text file has no sheets; leave out the sheet %q", o.Sheet)
		return nil, header{}
	}
	d.wrong(Place{File: t.File}, "", "there is no sheet %q; there are %s", o.Sheet, quoteAll(names))
	return nil, header{}
}

func quoteAll(names []string) string {
	const most = 20
	var quoted []string
	for i, n := range names {
		if i == most {
			quoted = append(quoted, "…")
			break
		}
		quoted = append(quoted, fmt.Sprintf("%q", cut(n)))
	}
	return strings.Join(quoted, ", ")
}

// noHeader says what was seen instead of a header, sheet by sheet.
func noHeader(t *Table, o *Options, d *doubts) {
	if o.HeaderRow > 0 {
		d.wrong(Place{File: t.File}, "", "row %d is empty or not among the first %d rows that hold anything; name the row of the header", o.HeaderRow, searched)
		return
	}
	for i := range t.Sheets {
		s := &t.Sheets[i]
		if len(s.Lines) == 0 {
			d.wrong(s.Whole(), "", "the sheet is empty")
			continue
		}
		d.wrong(s.Whole(), "", "no row of headings was found among the first %d rows; it needs a column of designators and one of part numbers; seen: %s; "+
			"write usual headings, such as designator, part number and quantity, or name the row of the header and the columns", searched, seenIn(s))
	}
}

// seenIn shows the fullest of the first rows.
func seenIn(s *Sheet) string {
	const most = 8
	var fullest []string
	for i := range s.Lines[:min(len(s.Lines), searched)] {
		var texts []string
		for _, c := range s.Lines[i].Cells {
			if text := clean(c.Text); text != "" {
				texts = append(texts, text)
			}
		}
		if len(texts) > len(fullest) {
			fullest = texts
		}
	}
	return quoteAll(fullest[:min(len(fullest), most)])
}

// checkHeader reports columns that are missing or rival each other.
func checkHeader(s *Sheet, h *header, o *Options, d *doubts) bool {
	line := &s.Lines[h.line]
	fine := true
	for _, f := range Fields() {
		if name, named := o.Columns[f]; named && !h.has(f) {
			d.wrong(s.Place(line, -1), name, "there is no column %q for %s; the headings are %s", name, f, quoteAll(filledOnly(h.names)))
			fine = false
		}
	}
	for _, r := range h.rivals {
		chosen := h.column(r.field)
		seen := h.names[r.column]
		if r.equal {
			d.wrong(s.Place(line, r.column), seen, "%q and %q (column %s) may both hold the %s; name the column that does",
				cut(h.names[chosen]), cut(seen), letters(r.column), describe(r.field))
			fine = false
			continue
		}
		d.note(s.Place(line, r.column), seen, "the %s were taken from %q (column %s), not from %q", describe(r.field), cut(h.names[chosen]), letters(chosen), cut(seen))
	}
	for _, f := range []Field{Designators, Part} {
		if !h.has(f) && o.Columns[f] == "" {
			d.wrong(s.Place(line, -1), "", "no column of %s was found; the headings are %s; rename one, or name it", describe(f), quoteAll(filledOnly(h.names)))
			fine = false
		}
	}
	return fine
}

func filledOnly(names []string) []string {
	return slices.DeleteFunc(slices.Clone(names), func(n string) bool { return n == "" })
}

// describe names a field's contents in the plural.
func describe(f Field) string {
	switch f {
	case Part:
		return "part numbers"
	case Quantity:
		return "quantities"
	case Fitted:
		return "marks of what is fitted"
	case NotFitted:
		return "marks of what is not fitted"
	case Designators:
		return "designators"
	}
	return string(f) + "s"
}
