package sheet

import (
	"strings"
	"unicode"

	"rungwright/catalog/form"
)

// Place is where something stands in a sheet. Lines and columns start at 1.
type Place struct {
	File   string
	Sheet  string // of a workbook; empty in a text file
	Cell   string // "C7"; empty when the sheet or file as a whole is meant
	Line   int    // of a text file; 0 in a workbook
	Column int    // of a text file, in characters; 0 for the line as a whole
}

// String is "bom.xlsx:Parts!C7" in a workbook, and file:line:column, which
// editors make clickable, in a text file.
func (p Place) String() string {
	switch {
	case p.Sheet == "":
		return form.Place{File: p.File, Line: p.Line, Column: p.Column}.String()
	case p.Cell == "":
		return p.File + ":" + quoteSheet(p.Sheet)
	}
	return p.File + ":" + quoteSheet(p.Sheet) + "!" + p.Cell
}

// form is the place for a form.Problem, whose file then holds the cell.
func (p Place) form() form.Place {
	if p.Sheet == "" {
		return form.Place{File: p.File, Line: p.Line, Column: p.Column}
	}
	return form.Place{File: p.String()}
}

// fromForm is the place of something in a YAML file.
func fromForm(p form.Place) Place { return Place{File: p.File, Line: p.Line, Column: p.Column} }

// quoteSheet writes a sheet's name as references in formulas do.
func quoteSheet(name string) string {
	plain := strings.IndexFunc(name, func(r rune) bool {
		return r != '_' && !unicode.IsLetter(r) && !unicode.IsDigit(r)
	}) < 0
	if plain {
		return name
	}
	return "'" + strings.ReplaceAll(visible(name), "'", "''") + "'"
}

// address is a cell's name: row from 1, column from 0, "C7".
func address(row, column int) string { return letters(column) + itoa(row) }

// letters is the name of a column counted from 0: A, B, … Z, AA.
func letters(column int) string {
	var name []byte
	for n := column + 1; n > 0; n = (n - 1) / 26 {
		name = append([]byte{byte('A' + (n-1)%26)}, name...)
	}
	return string(name)
}

// columnIndex reads a column's letters, in either case; -1 when it is none.
func columnIndex(name string) int {
	if name == "" || len(name) > 3 {
		return -1
	}
	n := 0
	for _, r := range strings.ToUpper(name) {
		if r < 'A' || r > 'Z' {
			return -1
		}
		n = n*26 + int(r-'A') + 1
	}
	return n - 1
}
