package sheet

import (
	"cmp"
	"fmt"
	"slices"
	"strconv"
	"strings"
	"unicode"

	"rungwright/catalog/form"
)

// Grade says how bad a doubt is.
type Grade int

// The grades, rising.
const (
	Note    Grade = iota // what was done, in case it was not meant so
	Warning              // most likely a slip; the reading goes on
	Wrong                // must be settled before anything can be trusted
)

var gradeNames = [...]string{"note", "warning", "wrong"}

func (g Grade) String() string { return gradeNames[g] }

// Doubt is one thing in a file that can be read in more than one way, or not
// at all.
type Doubt struct {
	Place Place
	Grade Grade
	Seen  string // the text in the cell, may be empty
	Text  string // what is in doubt and what to do; it quotes what was seen
}

// String is the doubt's line, its place in front.
func (d Doubt) String() string { return d.Place.String() + ": " + d.Text }

// maxDoubts bounds what one reading keeps.
const maxDoubts = 5000

// doubts gathers what is found while reading.
type doubts struct {
	list    []Doubt
	dropped bool
}

func (d *doubts) add(at Place, grade Grade, seen, format string, args ...any) {
	if len(d.list) >= maxDoubts {
		d.dropped = true
		return
	}
	d.list = append(d.list, Doubt{at, grade, seen, fmt.Sprintf(format, args...)})
}

func (d *doubts) note(at Place, seen, format string, args ...any) {
	d.add(at, Note, seen, format, args...)
}

func (d *doubts) warn(at Place, seen, format string, args ...any) {
	d.add(at, Warning, seen, format, args...)
}

func (d *doubts) wrong(at Place, seen, format string, args ...any) {
	d.add(at, Wrong, seen, format, args...)
}

// sorted gives the doubts in the order of the file, and one more when some
// were left out.
func (d *doubts) sorted() []Doubt {
	slices.SortStableFunc(d.list, func(a, b Doubt) int { return comparePlaces(a.Place, b.Place) })
	if !d.dropped {
		return d.list
	}
	text := fmt.Sprintf("there are more than %d doubts; settle these first", maxDoubts)
	return append(d.list, Doubt{Place{File: d.list[0].Place.File}, Wrong, "", text})
}

// problems is nil, or everything Wrong as form.Problems.
func problems(list []Doubt) error {
	var out form.Problems
	for _, d := range list {
		if d.Grade == Wrong {
			out = append(out, form.Problem{Place: d.Place.form(), Text: d.Text})
		}
	}
	if len(out) == 0 {
		return nil
	}
	return out
}

// comparePlaces orders by file, sheet, row and column.
func comparePlaces(a, b Place) int {
	aRow, aColumn := splitAddress(a.Cell)
	bRow, bColumn := splitAddress(b.Cell)
	return cmp.Or(cmp.Compare(a.File, b.File), cmp.Compare(a.Sheet, b.Sheet), cmp.Compare(a.Line, b.Line),
		cmp.Compare(aRow, bRow), cmp.Compare(a.Column, b.Column), cmp.Compare(aColumn, bColumn))
}

// splitAddress reads "C7" as row 7, column 2; zeros for none.
func splitAddress(cell string) (row, column int) {
	digits := strings.IndexFunc(cell, unicode.IsDigit)
	if digits < 0 {
		return 0, 0
	}
	row, _ = strconv.Atoi(cell[digits:])
	return row, columnIndex(cell[:digits])
}

// refusal is an error about a file as a whole.
func refusal(at Place, format string, args ...any) error {
	return form.Problems{{Place: at.form(), Text: fmt.Sprintf(format, args...)}}
}

func itoa(n int) string { return strconv.Itoa(n) }
