package sheet

import (
	"bytes"

	"github.com/xuri/excelize/v2"
)

// readWorkbook reads all sheets of an xlsx file that passes the gate.
func readWorkbook(name string, data []byte) (t *Table, err error) {
	scan, err := passGate(name, data)
	if err != nil {
		return nil, err
	}
	unreadable := func(why any) error {
		return refusal(Place{File: name}, "the workbook cannot be read (%v); open it and save a copy", why)
	}
	defer func() { // the library has had faults of its own
		if fault := recover(); fault != nil {
			t, err = nil, unreadable(fault)
		}
	}()
	book, err := excelize.OpenReader(bytes.NewReader(data), excelize.Options{UnzipSizeLimit: maxUnpack, UnzipXMLSizeLimit: maxOther})
	if err != nil {
		return nil, unreadable(err)
	}
	defer book.Close()
	t = &Table{File: name}
	for i := range scan.sheets {
		s, err := readSheet(name, book, &scan.sheets[i])
		if err != nil {
			return nil, unreadable(err)
		}
		t.Sheets = append(t.Sheets, *s)
	}
	return t, nil
}

// readSheet reads twice: once as people see the cells, which keeps "0603" of
// a number with that format, and once bare, which keeps all digits.
func readSheet(file string, book *excelize.File, scan *sheetScan) (*Sheet, error) {
	s := &Sheet{Name: scan.name, Hidden: scan.hidden, Typed: true, Merges: scan.merges, file: file, hiddenColumns: scan.hiddenColumns}
	s.Lines = make([]Line, len(scan.rows))
	for i, row := range scan.rows {
		s.Lines[i] = Line{Number: row.number, Hidden: row.hidden, Cells: make([]Cell, len(row.kinds))}
		for column, kind := range row.kinds {
			s.Lines[i].Cells[column].Kind = kind
		}
	}
	err := eachCell(book, s, false, func(c *Cell, text string) { c.Text, c.Raw = text, text })
	if err != nil {
		return nil, err
	}
	return s, eachCell(book, s, true, func(c *Cell, text string) {
		if c.Text != text {
			c.Raw = text
		}
	})
}

// eachCell walks the rows that the gate found; the two agree on where they
// are.
func eachCell(book *excelize.File, s *Sheet, raw bool, set func(*Cell, string)) error {
	rows, err := book.Rows(s.Name)
	if err != nil {
		return err
	}
	defer rows.Close()
	next := 0
	for number := 1; next < len(s.Lines) && rows.Next(); number++ {
		texts, err := rows.Columns(excelize.Options{RawCellValue: raw})
		if err != nil {
			return err
		}
		if number < s.Lines[next].Number {
			continue
		}
		cells := s.Lines[next].Cells
		for i := range min(len(cells), len(texts)) {
			set(&cells[i], texts[i])
		}
		next++
	}
	return rows.Error()
}
