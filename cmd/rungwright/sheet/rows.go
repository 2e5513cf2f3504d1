package sheet

import (
	"fmt"
	"slices"
	"strings"
)

// draft is a row with the places of its cells, for the checks of the whole.
type draft struct {
	Row
	refsAt, partAt, quantityAt, valueAt Place

	hasQuantity bool // a usable one was written
	doubtful    bool // its designators or quantity are wrong already
}

// rowReader turns the lines below a header into rows.
type rowReader struct {
	s *Sheet
	h header
	o *Options
	d *doubts

	mark      rune // before decimals of the quantities
	saysYes   bool // the column of what is fitted has a yes somewhere
	partTexts bool // most part numbers are text rather than numbers
	hidden    []int
	out       []draft
}

func newRowReader(s *Sheet, h header, o *Options, d *doubts) *rowReader {
	r := &rowReader{s: s, h: h, o: o, d: d, mark: o.Decimal}
	var quantities []string
	texts, numbers := 0, 0
	for i := range r.lines() {
		l := &r.lines()[i]
		if c := l.At(h.column(Quantity)); c.Kind == Text {
			quantities = append(quantities, c.Text)
		}
		r.saysYes = r.saysYes || isYes(clean(l.At(h.column(Fitted)).Text))
		if c := l.At(h.column(Part)); looksNumeric(c) {
			numbers++
		} else if c.Kind != Blank {
			texts++
		}
	}
	if r.mark == undecided {
		r.mark = decideMark(quantities)
	}
	r.partTexts = texts > numbers
	return r
}

// lines are those below the header.
func (r *rowReader) lines() []Line { return r.s.Lines[r.h.line+1:] }

func (r *rowReader) rows() []draft {
	r.noteHiddenColumns()
	for i := range r.lines() {
		r.line(&r.lines()[i])
	}
	if len(r.hidden) > 0 {
		r.d.note(r.s.Whole(), "", "rows that are hidden in the sheet were read too: %s", runs(r.hidden))
	}
	return r.out
}

func (r *rowReader) noteHiddenColumns() {
	for _, f := range Fields() {
		if c := r.h.column(f); c >= 0 && r.s.columnHidden(c) {
			r.d.note(r.s.Place(&r.s.Lines[r.h.line], c), r.h.names[c], "the column %q is hidden in the sheet and was read", cut(at(r.h.names, c)))
		}
	}
}

// line reads one line, unless it is no part's.
func (r *rowReader) line(l *Line) {
	cells := map[Field]Cell{}
	filled := 0
	for f, c := range r.h.columns {
		cell := r.merged(l, f, c)
		cell.Text = clean(cell.Text)
		cells[f] = cell
		if cell.Kind == NoValue || cell.Text != "" {
			filled++
		}
	}
	if why := r.leaveOut(l, cells, filled); why != "" {
		r.d.note(r.s.Place(l, -1), "", "left out: %s", why)
		return
	}
	if filled == 0 {
		return // blank
	}
	if l.Hidden {
		r.hidden = append(r.hidden, l.Number)
	}
	if r.unusable(l, cells) {
		return
	}
	r.out = append(r.out, r.draft(l, cells))
}

// merged is a cell, or, for designators and part numbers, the value of the
// merged range that it is part of, down its column.
func (r *rowReader) merged(l *Line, f Field, column int) Cell {
	cell := l.At(column)
	if cell.Kind != Blank || f != Designators && f != Part {
		return cell
	}
	for _, m := range r.s.Merges {
		if column != m.FirstColumn || l.Number <= m.FirstRow || l.Number > m.LastRow {
			continue
		}
		first, ok := slices.BinarySearchFunc(r.s.Lines, m.FirstRow, func(l Line, n int) int { return l.Number - n })
		if !ok || first <= r.h.line {
			continue
		}
		cell = r.s.Lines[first].At(column)
		r.d.note(r.s.Place(l, column), cell.Text, "taken from the merged cell %s: %q", address(m.FirstRow, column), cut(cell.Text))
	}
	return cell
}

// leaveOut says why a line is no part's; "" when it is one, or blank.
func (r *rowReader) leaveOut(l *Line, cells map[Field]Cell, filled int) string {
	written, last := 0, ""
	total := false
	repeats := filled > 1
	for c := range l.Cells {
		text := clean(l.Cells[c].Text)
		if text == "" {
			continue
		}
		written, last = written+1, text
		total = total || isTotal(text)
	}
	for f, c := range r.h.columns {
		if key(cells[f].Text) != key(at(r.h.names, c)) {
			repeats = false
		}
	}
	refs, part, quantity := cells[Designators].Text, cells[Part].Text, cells[Quantity]
	switch {
	case repeats:
		return "the headings once more"
	case written == 0:
		return ""
	case total && (refs == "" || isTotal(refs)):
		return fmt.Sprintf("a line of totals (%q)", cut(last))
	case filled == 0:
		return fmt.Sprintf("nothing stands in the columns of the parts (%q)", cut(last))
	case written == 1 && refs != "" && !hasDesignator(refs):
		return fmt.Sprintf("a heading or a remark (%q)", cut(refs))
	case refs == "" && quantity.Text == "" && quantity.Kind != NoValue && filled <= 1 && cells[Part].Kind != NoValue:
		return fmt.Sprintf("a remark, with no designator and no quantity (%q)", cut(last))
	case refs == "" && part == "" && cells[Part].Kind != NoValue && cells[Designators].Kind != NoValue:
		return fmt.Sprintf("neither a designator nor a part number (%q)", cut(last))
	}
	return ""
}

// hasDesignator tells whether a text may be meant as a list of designators.
func hasDesignator(text string) bool {
	if strings.ContainsAny(text, "?") {
		return true
	}
	for _, w := range designatorWords(text) {
		if _, err := parseWord(w); err == nil || strings.ContainsAny(w, "0123456789") && !strings.ContainsAny(w, ".:") {
			return true
		}
	}
	return false
}

// unusable reports cells that a spreadsheet program has failed to calculate.
func (r *rowReader) unusable(l *Line, cells map[Field]Cell) bool {
	found := false
	for _, f := range Fields() {
		cell, column := cells[f], r.h.column(f)
		switch {
		case column < 0:
		case cell.Kind == NoValue:
			r.d.wrong(r.s.Place(l, column), "", "the formula has no stored result; open the workbook in a spreadsheet program and save it once")
			found = true
		case cell.Kind == Error || isErrorText(cell.Text):
			r.d.wrong(r.s.Place(l, column), cell.Text, "%q is an error of the spreadsheet; mend the formula or write the value", cut(cell.Text))
			found = true
		}
	}
	return found
}

// errorTexts are what spreadsheet programs show for a failed formula.
var errorTexts = []string{"#N/A", "#NAME?", "#VALUE!", "#REF!", "#DIV/0!", "#NUM!", "#NULL!", "#SPILL!", "#CALC!", "#NV", "#BEZUG!", "#WERT!", "#NOM?", "#VALEUR!"}

func isErrorText(text string) bool {
	return slices.Contains(errorTexts, text) || strings.HasPrefix(text, "Err:5")
}

func (r *rowReader) draft(l *Line, cells map[Field]Cell) draft {
	place := func(f Field) Place { return r.s.Place(l, r.h.column(f)) }
	w := draft{refsAt: place(Designators), partAt: place(Part), quantityAt: place(Quantity), valueAt: place(Value)}
	w.Place = w.partAt
	w.Maker, w.Value, w.Description = cells[Maker].Text, cells[Value].Text, cells[Description].Text
	r.fitted(&w, cells, place)
	r.designators(&w, cells[Designators].Text)
	r.part(&w, l, cells[Part])
	r.quantity(&w, cells[Quantity])
	r.positions(&w, cells[Position].Text, place(Position))
	return w
}

func (r *rowReader) designators(w *draft, text string) {
	var errs []error
	w.Refs, errs = ParseDesignators(text)
	for _, err := range errs {
		r.d.wrong(w.refsAt, text, "%v", err)
		w.doubtful = true
	}
	if text == "" {
		r.d.note(w.refsAt, "", "no designator is given, so the part has no place in the circuit")
	}
}

func (r *rowReader) positions(w *draft, text string, at Place) {
	if text == "" {
		return
	}
	positions, errs := ParseDesignators(text)
	for _, err := range errs {
		r.d.wrong(at, text, "circuit position: %v", err)
	}
	if len(errs) == 0 && len(positions) != len(w.Refs) && !w.doubtful {
		r.d.wrong(at, text, "%d circuit positions are given for %d designators; give one for each", len(positions), len(w.Refs))
		return
	}
	w.Positions = positions
}

// quantity takes the number of pieces; without a column or a number it is
// that of the designators.
func (r *rowReader) quantity(w *draft, cell Cell) {
	w.Quantity = len(w.Refs)
	if !r.h.has(Quantity) || isMarker(cell.Text) {
		return
	}
	if cell.Text == "" {
		r.noQuantity(w)
		return
	}
	text, mark := cell.Text, r.mark
	if cell.Kind == Number {
		text, mark = cell.Raw, '.'
	}
	n, words, err := parseQuantity(text, mark)
	switch {
	case err != nil:
		r.d.wrong(w.quantityAt, cell.Text, "%v", err)
		w.doubtful = true
	case n == 0 && w.Fitted:
		r.d.wrong(w.quantityAt, cell.Text, "the quantity is zero; if the part is not fitted, say so in a column headed fitted, else write how many one unit needs")
		w.doubtful = true
	default:
		w.Quantity, w.hasQuantity = n, true
		if words {
			r.d.note(w.quantityAt, cell.Text, "%q was read as %d pieces", cut(cell.Text), n)
		}
	}
}

func (r *rowReader) noQuantity(w *draft) {
	if w.Fitted && (r.o.Quantity != ByDesignators || len(w.Refs) == 0) {
		r.d.wrong(w.quantityAt, "", "the quantity is blank; write it, or let the designators be counted")
		w.doubtful = true
	}
}

// runs writes row numbers shortly: 4-6, 9.
func runs(numbers []int) string {
	var out []string
	for i := 0; i < len(numbers); {
		j := i
		for j+1 < len(numbers) && numbers[j+1] == numbers[j]+1 {
			j++
		}
		if i == j {
			out = append(out, itoa(numbers[i]))
		} else {
			out = append(out, itoa(numbers[i])+"-"+itoa(numbers[j]))
		}
		i = j + 1
	}
	const most = 12
	if len(out) > most {
		out = append(out[:most], fmt.Sprintf("and more, %d in all", len(numbers)))
	}
	return strings.Join(out, ", ")
}
