package sheet

import (
	"encoding/xml"
	"errors"
	"fmt"
	"strconv"
	"strings"
)

// sheetReader checks one sheet's rows and cells, and notes what each cell is,
// which the library does not tell.
type sheetReader struct {
	scan   *sheetScan
	budget *budget

	inData, pastData bool
	row              rowScan
	lastRow, column  int // the latest, rows from 1, columns from 0
	cell             cellScan
}

// cellScan is the cell being read.
type cellScan struct {
	kind                      string // the attribute t
	formula, valued, anything bool
	index                     []byte // text of <v>, cut
	inValue, inInline         bool
}

func newSheetReader(scan *sheetScan, b *budget) *sheetReader {
	return &sheetReader{scan: scan, budget: b, column: -1}
}

func (r *sheetReader) start(stack []xml.Name, e xml.StartElement) error {
	parent := ""
	if len(stack) > 1 {
		parent = stack[len(stack)-2].Local
	}
	switch e.Name.Local {
	case "sheetData":
		if r.inData || r.pastData || len(stack) != 2 {
			return errors.New("its cells are listed twice")
		}
		r.inData = true
	case "row":
		return r.startRow(parent, e)
	case "c":
		return r.startCell(parent, e)
	case "f", "v", "is":
		if parent == "c" {
			r.startValue(e.Name.Local)
		}
	case "col":
		r.hideColumns(e)
	case "mergeCell":
		return r.merge(e)
	}
	return nil
}

// startRow takes the row's number, which must rise.
func (r *sheetReader) startRow(parent string, e xml.StartElement) error {
	if r.pastData {
		return nil // another list that happens to have rows
	}
	if !r.inData || parent != "sheetData" {
		return errors.New("a row stands outside of the cells")
	}
	number := r.lastRow + 1
	if written := attribute(e, "r"); written != "" {
		n, err := strconv.Atoi(written)
		if err != nil || n < number {
			return fmt.Errorf("the row number %.20q does not rise", written)
		}
		number = n
	}
	if number > maxRow {
		return overLimit("the sheet %q goes beyond row %d", r.scan.name, maxRow)
	}
	r.lastRow, r.column = number, -1
	r.row = rowScan{number: number, hidden: isTrue(attribute(e, "hidden"))}
	return nil
}

// startCell takes the cell's address, which must fit its row and rise.
func (r *sheetReader) startCell(parent string, e xml.StartElement) error {
	if r.pastData {
		return nil
	}
	if !r.inData || parent != "row" {
		return errors.New("a cell stands outside of the rows")
	}
	r.column++
	if written := attribute(e, "r"); written != "" {
		column, ok := columnOf(written, r.row.number)
		if !ok || column < r.column {
			return fmt.Errorf("the cell %.20q is out of order in row %d", written, r.row.number)
		}
		r.column = column
	}
	if r.column >= maxColumns {
		return overLimit("the sheet %q goes beyond column %s (in row %d); delete the cells to the right of the table",
			r.scan.name, letters(maxColumns-1), r.row.number)
	}
	r.cell = cellScan{kind: attribute(e, "t")}
	return nil
}

// columnOf is the column of an address in a row, counted from 0.
func columnOf(cell string, row int) (int, bool) {
	column, ok := strings.CutSuffix(cell, itoa(row))
	n := columnIndex(column)
	return n, ok && n >= 0 && column == strings.ToUpper(column)
}

func (r *sheetReader) startValue(local string) {
	switch local {
	case "f":
		r.cell.formula = true
	case "v":
		r.cell.valued, r.cell.inValue = true, true
	case "is":
		r.cell.valued, r.cell.inInline = true, true
	}
}

// text gathers as much of a value as an index needs.
func (r *sheetReader) text(_ []xml.Name, data []byte) {
	c := &r.cell
	if (!c.inValue && !c.inInline) || len(data) == 0 {
		return
	}
	c.anything = true
	if c.inValue && len(c.index) < 32 {
		c.index = append(c.index, data[:min(len(data), 32)]...)
	}
}

func (r *sheetReader) end(stack []xml.Name) error {
	switch stack[len(stack)-1].Local {
	case "sheetData":
		r.inData, r.pastData = false, true
	case "v":
		r.cell.inValue = false
	case "is":
		r.cell.inInline = false
	case "c":
		if r.inData {
			return r.endCell()
		}
	case "row":
		if r.inData {
			return r.endRow()
		}
	}
	return nil
}

func (r *sheetReader) endCell() error {
	kind := r.cell.what()
	if kind == Blank {
		return nil
	}
	if r.cell.kind == "s" {
		n, err := strconv.Atoi(strings.TrimSpace(string(r.cell.index)))
		if err != nil || n < 0 || n >= r.budget.strings {
			return fmt.Errorf("the cell %s names the text %.20q, which is missing", address(r.row.number, r.column), r.cell.index)
		}
	}
	if r.budget.cells++; r.budget.cells > maxCells {
		return overLimit("the workbook has more than %d cells with something in them; keep the sheet that matters, or split it", maxCells)
	}
	for len(r.row.kinds) < r.column {
		r.row.kinds = append(r.row.kinds, Blank)
	}
	r.row.kinds = append(r.row.kinds, kind)
	return nil
}

// what a cell is. A formula with an empty value has the result ""; without
// any it was never calculated.
func (c *cellScan) what() Kind {
	switch {
	case c.formula && !c.valued:
		return NoValue
	case !c.anything:
		return Blank
	case c.kind == "e":
		return Error
	case c.kind == "b":
		return Bool
	case c.kind == "d":
		return Date
	case c.kind == "s", c.kind == "str", c.kind == "inlineStr":
		return Text
	}
	return Number
}

func (r *sheetReader) endRow() error {
	if len(r.row.kinds) == 0 {
		return nil // blank, formatted at most
	}
	r.budget.rows++
	r.budget.span += len(r.row.kinds)
	switch {
	case r.budget.rows > maxRows:
		return overLimit("the workbook has more than %d rows with something in them; keep the sheet that matters, or split it", maxRows)
	case r.budget.span > maxSpan:
		return overLimit("the sheet %q is too wide for its many rows; delete the cells to the right of the table", r.scan.name)
	}
	r.scan.rows = append(r.scan.rows, r.row)
	return nil
}

func (r *sheetReader) hideColumns(e xml.StartElement) {
	first, err1 := strconv.Atoi(attribute(e, "min"))
	last, err2 := strconv.Atoi(attribute(e, "max"))
	if isTrue(attribute(e, "hidden")) && err1 == nil && err2 == nil && len(r.scan.hiddenColumns) < maxColumns {
		r.scan.hiddenColumns = append(r.scan.hiddenColumns, span{first - 1, last - 1})
	}
}

func (r *sheetReader) merge(e xml.StartElement) error {
	if r.budget.merges++; r.budget.merges > maxMerges {
		return overLimit("the workbook has more than %d merged ranges; undo the merging", maxMerges)
	}
	from, to, ok := strings.Cut(attribute(e, "ref"), ":")
	firstRow, firstColumn := splitAddress(from)
	lastRow, lastColumn := splitAddress(to)
	if !ok || firstRow < 1 || firstColumn < 0 || lastRow < firstRow || lastColumn < firstColumn {
		return fmt.Errorf("the merged range %.40q is none", attribute(e, "ref"))
	}
	r.scan.merges = append(r.scan.merges, Merge{firstRow, firstColumn, lastRow, lastColumn})
	return nil
}

func (r *sheetReader) done() error {
	if !r.pastData {
		return errors.New("it has no cells")
	}
	return nil
}
