package workbook

import (
	"strconv"

	"github.com/xuri/excelize/v2"
)

// cell is one value with its look. A formula carries the value that our own
// model gives it, so that a reader that does not calculate sees right numbers.
type cell struct {
	style   style
	value   any // string, int or float64; nil: empty
	formula string
}

func say(s string) cell              { return cell{style: text, value: clean(s)} }
func saying(st style, s string) cell { return cell{style: st, value: clean(s)} }
func count(n int) cell               { return cell{style: number, value: n} }
func live(st style, formula string, value any) cell {
	return cell{style: st, value: value, formula: formula}
}

// sheet gathers rows until flush: column widths must stand before the first
// row of a streamed sheet is written.
type sheet struct {
	name     string
	tab      string // colour
	rows     []sheetRow
	widths   map[int]float64 // fixed ones by column, from 0; others fit their text
	frozen   int             // rows that stay in view
	beside   int             // columns that stay in view
	filter   string          // range with filter buttons
	repeat   string          // rows repeated on every printed page, "$4:$4"
	area     string          // printed range; empty: everything
	portrait bool
	locked   bool // protected, without a password, but for the inputs
	marks    []mark
	checks   []*excelize.DataValidation
	merges   [][2]string
	charts   []placedChart
}

type sheetRow struct {
	cells  []cell
	height float64 // points; 0: as the text needs
}

// mark colours cells for which a formula holds.
type mark struct {
	cells, formula string
	kind           markKind
}

type markKind int

const (
	markNear markKind = iota
	markOver
	markLine // a rule above, where a new group begins
	markDim
)

type placedChart struct {
	at    string
	chart *excelize.Chart
}

// row appends cells and returns its number, counted from 1.
func (s *sheet) row(cells ...cell) int {
	s.rows = append(s.rows, sheetRow{cells: cells})
	return len(s.rows)
}

// spread writes one text across columns: it wraps within them.
func (s *sheet) spread(st style, textual string, columns int) int {
	cells := make([]cell, columns)
	for i := range cells {
		cells[i].style = st
	}
	cells[0] = saying(st, textual)
	n := s.row(cells...)
	s.merges = append(s.merges, [2]string{at(0, n), at(columns-1, n)})
	return n
}

// head appends a heading with a rule under it across the columns.
func (s *sheet) head(textual string, columns int) int {
	cells := make([]cell, columns)
	for i := range cells {
		cells[i].style = heading
	}
	cells[0].value = textual
	return s.row(cells...)
}

// heads appends a header row; columns whose name starts with > lean right.
func (s *sheet) heads(names ...string) int {
	cells := make([]cell, len(names))
	for i, name := range names {
		cells[i] = cell{style: header, value: name}
		if name != "" && name[0] == '>' {
			cells[i] = cell{style: headerRight, value: name[1:]}
		}
	}
	return s.row(cells...)
}

// letters is the name of a column, counted from 0.
func letters(column int) string {
	name, err := excelize.ColumnNumberToName(column + 1)
	if err != nil {
		panic("workbook: " + err.Error())
	}
	return name
}

// at is a cell's name: column from 0, row from 1.
func at(column, row int) string { return letters(column) + strconv.Itoa(row) }

// fixed is a cell's name that does not move: $C$5.
func fixed(column, row int) string { return "$" + letters(column) + "$" + strconv.Itoa(row) }

// span is a range within one column: $C$5:$C$9.
func span(column, first, last int) string { return fixed(column, first) + ":" + fixed(column, last) }

// across is a range within one row: $C5:$H5.
func across(from, to, row int) string {
	n := strconv.Itoa(row)
	return "$" + letters(from) + n + ":$" + letters(to) + n
}

// of puts a sheet's name before a reference.
func of(sheet, reference string) string { return "'" + sheet + "'!" + reference }
