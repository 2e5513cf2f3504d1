package sheet

import (
	"errors"
	"fmt"
	"regexp"
	"strconv"
	"strings"

	"github.com/shopspring/decimal"
)

// value is what a rule makes of a line: a text or a constant; nil when the
// cell is blank. The error says what to do, without the place.
func (c *columnSet) value(r rule, l *Line) (any, error) {
	if r.column == "" {
		return r.constant, nil
	}
	text, err := c.text(r, l)
	if text == "" || err != nil {
		return nil, err
	}
	return text, nil
}

// text is a cell after its rule; "" when blank.
func (c *columnSet) text(r rule, l *Line) (string, error) {
	if r.column == "" {
		return strings.TrimSpace(fmt.Sprint(r.constant)), nil
	}
	at := c.index[r.column]
	cell := l.At(at)
	text := clean(cell.Text)
	switch {
	case cell.Kind == NoValue:
		return "", errors.New("the formula has no stored result; open the workbook in a spreadsheet program and save it once")
	case cell.Kind == Error || isErrorText(text):
		return "", fmt.Errorf("%q is an error of the spreadsheet", cut(text))
	case text == "":
		return "", nil
	}
	if r.find != nil {
		found := r.find.FindStringSubmatch(text)
		if found == nil {
			return "", fmt.Errorf("%q does not match %q", cut(text), r.find)
		}
		if text = strings.TrimSpace(found[0]); len(found) > 1 {
			text = strings.TrimSpace(found[1])
		}
	}
	if r.words != nil {
		word, known := r.words[key(text)]
		if !known {
			return "", fmt.Errorf("%q is not among the words of the mapping; add it there", cut(text))
		}
		return word, nil
	}
	if r.unit != "" {
		number, err := c.number(r, cell, text)
		return number + " " + r.unit, err
	}
	return pointed(text, c.marks[at]), nil
}

// number is a bare number as plain decimals. A cell that is a number in the
// file is read with all its digits, unless a part of its text was asked for.
func (c *columnSet) number(r rule, cell Cell, text string) (string, error) {
	mark := c.marks[c.index[r.column]]
	if cell.Kind == Number && r.find == nil {
		text, mark = cell.Raw, '.'
	}
	plain, err := readNumber(text, mark)
	if err != nil {
		return "", err
	}
	return tidy(plain), nil
}

// tidy rounds away what binary storage adds to a decimal number beyond 15
// digits, and writes it without an exponent where that is short.
func tidy(plain string) string {
	const digits, most = 15, 24
	d, err := decimal.NewFromString(plain)
	if err != nil {
		return plain
	}
	if n := d.NumDigits(); n > digits {
		d = d.Round(int32(digits) - int32(n) - d.Exponent())
	}
	if text := d.String(); len(text) <= most {
		return text
	}
	return plain
}

// valued is a number with decimals after a comma, then a unit.
var valued = regexp.MustCompile(`^([-+]?[0-9][0-9.']*,[0-9]+)( ?[\pL%°µΩ/]{0,6})$`)

// pointed writes the decimals of a value with its unit after a point: "4,7
// µF" becomes "4.7 µF". Other text stays.
func pointed(text string, mark rune) string {
	m := valued.FindStringSubmatch(text)
	if m == nil || strings.TrimSpace(m[2]) == "" {
		return text
	}
	if plain, err := readNumber(m[1], mark); err == nil {
		return plain + m[2]
	}
	return text
}

// count is a whole number of pieces; -1 when the cell is blank.
func (c *columnSet) count(r rule, l *Line) (int, error) {
	text, err := c.text(r, l)
	if err != nil || text == "" {
		return -1, err
	}
	if r.column != "" {
		text, err = c.number(r, l.At(c.index[r.column]), text)
	}
	if err != nil {
		return -1, err
	}
	n, err := strconv.Atoi(text)
	if err != nil || n < 0 {
		return -1, fmt.Errorf("%q is not a number of pieces", cut(text))
	}
	return n, nil
}

// columnSet is where the columns of a mapping stand in a sheet.
type columnSet struct {
	sheet  *Sheet
	header int // index of its line
	index  map[string]int
	marks  map[int]rune // before decimals, by column
}

// locate finds the sheet and the line that hold most of the columns.
func (m *Mapping) locate(t *Table) (*columnSet, error) {
	var best *columnSet
	rules := m.columns()
	for i := range t.Sheets {
		s := &t.Sheets[i]
		if m.options.Sheet != "" && !strings.EqualFold(clean(s.Name), clean(m.options.Sheet)) {
			continue
		}
		for line := range s.Lines[:min(len(s.Lines), searched)] {
			if m.options.HeaderRow > 0 && s.Lines[line].Number != m.options.HeaderRow {
				continue
			}
			if c := columnsOf(s, line, rules); best == nil || len(c.index) > len(best.index) {
				best = c
			}
		}
	}
	if best == nil {
		return nil, refusal(Place{File: t.File}, "nothing stands where the mapping looks for the headings; check its sheet and header row")
	}
	var d doubts
	names := headingsOf(&best.sheet.Lines[best.header])
	for _, r := range rules {
		if _, found := best.index[r.column]; !found {
			d.wrong(fromForm(r.place), r.column, "there is no column %q in %s; the headings are %s", r.column,
				best.sheet.Place(&best.sheet.Lines[best.header], -1), quoteAll(filledOnly(names)))
		}
	}
	if err := problems(d.sorted()); err != nil {
		return nil, err
	}
	best.decide(m.options.Decimal)
	return best, nil
}

func columnsOf(s *Sheet, line int, rules []rule) *columnSet {
	c := &columnSet{sheet: s, header: line, index: map[string]int{}, marks: map[int]rune{}}
	names := headingsOf(&s.Lines[line])
	for _, r := range rules {
		for i, name := range names {
			if _, found := c.index[r.column]; !found && headingIs(name, r.column) {
				c.index[r.column] = i
			}
		}
	}
	return c
}

// decide settles each column's decimal sign.
func (c *columnSet) decide(given rune) {
	for _, at := range c.index {
		if c.marks[at] = given; given != undecided {
			continue
		}
		var texts []string
		for i := range c.lines() {
			if cell := c.lines()[i].At(at); cell.Kind == Text {
				texts = append(texts, cell.Text)
			}
		}
		c.marks[at] = decideMark(texts)
	}
}

func (c *columnSet) lines() []Line { return c.sheet.Lines[c.header+1:] }
