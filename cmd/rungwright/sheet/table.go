package sheet

import "unicode/utf8"

// Table is what a file holds: one sheet of a text file, all of a workbook's.
type Table struct {
	File   string
	Sheets []Sheet
	Doubts []Doubt // of the file as a whole, such as its encoding
}

// Sheet is one table of cells.
type Sheet struct {
	Name   string // empty in a text file
	Hidden bool
	Typed  bool   // the file says what is a number; a text file does not
	Lines  []Line // those with anything in them, in rising order of Number
	Merges []Merge

	file          string
	hiddenColumns []span
	source        []string // the lines of a text file
}

// Line is one row of a sheet.
type Line struct {
	Number int // as a spreadsheet counts, from 1
	Hidden bool
	Cells  []Cell // from column A

	lines, offsets []int // of a text file: the line, from 1, and the byte of it where each cell starts
}

// Cell is one value. Text is what a person sees, by the cell's number format;
// Raw is the bare number or text behind it.
type Cell struct {
	Text string
	Raw  string
	Kind Kind
}

// Kind says what a cell holds. In a text file every cell is Text.
type Kind uint8

// The kinds of cell.
const (
	Blank Kind = iota
	Text
	Number
	Bool
	Date    // written as one, not a number that looks like one
	Error   // such as #N/A
	NoValue // a formula whose result the file does not hold
)

// Merge is a merged range: rows from 1, columns from 0, ends included. Its
// value stands in the first row and column.
type Merge struct{ FirstRow, FirstColumn, LastRow, LastColumn int }

type span struct{ first, last int }

// At is the cell in a column, counted from 0; blank beyond the line's end.
func (l *Line) At(column int) Cell {
	if column < 0 || column >= len(l.Cells) {
		return Cell{}
	}
	return l.Cells[column]
}

// Place is where a cell of the line stands. A negative column means the line
// as a whole, which in a workbook is its first cell.
func (s *Sheet) Place(l *Line, column int) Place {
	p := Place{File: s.file, Sheet: s.Name, Cell: address(l.Number, max(column, 0))}
	if len(l.lines) == 0 {
		return p
	}
	p.Line = l.lines[0]
	if column >= 0 && column < len(l.lines) {
		p.Line = l.lines[column]
		before := s.source[p.Line-1][:l.offsets[column]]
		p.Column = utf8.RuneCountInString(before) + 1
	}
	return p
}

// Whole is the place of the sheet as a whole.
func (s *Sheet) Whole() Place { return Place{File: s.file, Sheet: s.Name} }

// columnHidden tells whether a column, counted from 0, is hidden.
func (s *Sheet) columnHidden(column int) bool {
	for _, h := range s.hiddenColumns {
		if column >= h.first && column <= h.last {
			return true
		}
	}
	return false
}
