package sheet

import (
	"regexp"
	"strings"
)

// part takes the part number, without stray blanks and odd signs, which is
// said; it warns of what a spreadsheet program seems to have rewritten.
func (r *rowReader) part(w *draft, l *Line, cell Cell) {
	w.Part = cell.Text
	if isMarker(w.Part) {
		w.Part = ""
	}
	if w.Part == "" {
		if w.Fitted {
			r.d.wrong(w.partAt, "", "the part number is missing; write it, or say in a column headed fitted that nothing is")
		}
		return
	}
	asWritten := l.At(r.h.column(Part)).Text // empty when merged
	if asWritten != "" && asWritten != w.Part {
		r.d.note(w.partAt, asWritten, "%q was read as %q", cut(asWritten), w.Part)
	}
	if why := r.damage(cell); why != "" {
		r.d.warn(w.partAt, cell.Text, "%q %s; compare it with the maker's part number", cut(cell.Text), why)
	}
	if strings.ContainsRune(w.Part, '\uFFFD') {
		r.d.warn(w.partAt, cell.Text, "%q holds a sign that was lost in another program's encoding; write it afresh", cut(cell.Text))
	}
}

var (
	exponential = regexp.MustCompile(`^[0-9](?:[.,][0-9]+)?[eE]\+?[0-9]+$`)
	dated       = regexp.MustCompile(`(?i)^(?:[0-9]{1,2}[-. /](?:jan|feb|mar|apr|may|mai|jun|jul|aug|sep|oct|okt|nov|dec|dez)[a-z]*\.?(?:[-. /][0-9]{2,4})?|` +
		`(?:jan|feb|mar|apr|may|mai|jun|jul|aug|sep|oct|okt|nov|dec|dez)[-. /][0-9]{2,4}|` +
		`[0-9]{4}-[0-9]{2}-[0-9]{2}(?: .*)?|[0-9]{1,2}[-/.][0-9]{1,2}[-/.][0-9]{2,4}(?: .*)?)$`)
	roundNumber = regexp.MustCompile(`^[1-9][0-9]?0{4,}$`)
)

// damage says what makes a part number look rewritten by a spreadsheet
// program; "" when nothing does.
func (r *rowReader) damage(cell Cell) string {
	text := cell.Text
	switch {
	case exponential.MatchString(text):
		return "looks like a number that a spreadsheet program has rewritten"
	case dated.MatchString(text), cell.Kind == Date:
		return "looks like a date that a spreadsheet program has made of it"
	case cell.Kind == Number && r.partTexts:
		return "is stored as a number, where other part numbers are text, so that zeros in front or an exponent may be lost"
	case roundNumber.MatchString(text) && r.partTexts:
		return "looks like a number that a spreadsheet program has written out"
	}
	return ""
}

// looksNumeric tells a cell that is a number or digits alone.
func looksNumeric(c Cell) bool {
	return c.Kind == Number || c.Kind == Text && plainNumber.MatchString(clean(c.Text))
}
