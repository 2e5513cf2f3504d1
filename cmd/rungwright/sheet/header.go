package sheet

import (
	"slices"
	"strings"
)

// header is where a sheet's columns are named, and what they mean.
type header struct {
	line    int // index of its last line within the sheet; -1: none was found
	score   int
	columns map[Field]int // from 0
	names   []string      // the headings, by column
	rivals  []rival
}

// rival is a column that could mean the same as a chosen one.
type rival struct {
	field  Field
	column int
	equal  bool // as well as the chosen one, so that it must be settled
}

func (h *header) has(f Field) bool { _, ok := h.columns[f]; return ok }

// column of a field, -1 when there is none.
func (h *header) column(f Field) int {
	if c, ok := h.columns[f]; ok {
		return c
	}
	return -1
}

// searched is how many lines may stand above the header and with it.
const searched = 30

// findHeader takes the line, or the two lines read as one, whose words tell
// most; the first among equals.
func findHeader(s *Sheet, o *Options) header {
	best := header{line: -1}
	for i := range s.Lines[:min(len(s.Lines), searched)] {
		if o.HeaderRow > 0 && s.Lines[i].Number != o.HeaderRow {
			continue
		}
		single := readHeader(s, i, headingsOf(&s.Lines[i]), o)
		if single.score > best.score {
			best = single
		}
		if i == 0 {
			continue
		}
		above := readHeader(s, i-1, headingsOf(&s.Lines[i-1]), o)
		if double := readHeader(s, i, twoLines(s, i), o); double.score > max(single.score, above.score) && double.score > best.score {
			best = double
		}
	}
	return best
}

func headingsOf(l *Line) []string {
	names := make([]string, len(l.Cells))
	for i, c := range l.Cells {
		if c.Kind == Text {
			names[i] = clean(c.Text)
		}
	}
	return names
}

// twoLines joins the headings of a line with those above it: "Part" over
// "number". A heading merged across columns heads each of them.
func twoLines(s *Sheet, i int) []string {
	upper, lower := headingsOf(&s.Lines[i-1]), headingsOf(&s.Lines[i])
	for _, m := range s.Merges {
		if m.FirstRow <= s.Lines[i-1].Number && m.LastRow >= s.Lines[i-1].Number && m.FirstColumn < len(upper) {
			for len(upper) <= min(m.LastColumn, maxColumns) {
				upper = append(upper, "")
			}
			for c := m.FirstColumn + 1; c <= min(m.LastColumn, maxColumns); c++ {
				upper[c] = upper[m.FirstColumn]
			}
		}
	}
	names := make([]string, max(len(upper), len(lower)))
	for c := range names {
		names[c] = joinHeadings(at(upper, c), at(lower, c))
	}
	return names
}

// joinHeadings reads two headings as one where that means something, else
// takes the one that does, the lower first.
func joinHeadings(upper, lower string) string {
	joined := strings.TrimSpace(upper + " " + lower)
	for _, name := range []string{joined, lower, upper} {
		if _, ok := meaningOf(name); ok {
			return name
		}
	}
	return joined
}

func at(list []string, i int) string {
	if i >= 0 && i < len(list) {
		return list[i]
	}
	return ""
}

// readHeader gives every field its column: as the user says, else by the
// heading. A strong heading wins over a weak one.
func readHeader(s *Sheet, line int, names []string, o *Options) header {
	h := header{line: line, columns: map[Field]int{}, names: names}
	strong := map[Field]bool{}
	taken := userColumns(&h, o)
	for c, name := range names {
		m, ok := meaningOf(name)
		if !ok || slices.Contains(taken, c) {
			continue
		}
		if _, settled := o.Columns[m.field]; settled {
			continue
		}
		first, twice := h.columns[m.field]
		switch {
		case !twice:
			h.columns[m.field], strong[m.field] = c, m.strong
		case m.strong && !strong[m.field]:
			h.rivals = append(h.rivals, rival{m.field, first, false})
			h.columns[m.field], strong[m.field] = c, true
		default:
			h.rivals = append(h.rivals, rival{m.field, c, m.strong == strong[m.field]})
		}
	}
	h.keepRivals(strong)
	h.rate(s, o)
	return h
}

// rate scores the header by the headings that it really has: a column named
// by its letters is one of every line.
func (h *header) rate(s *Sheet, o *Options) {
	for f, c := range h.columns {
		if name, byUser := o.Columns[f]; !byUser || headingIs(at(h.names, c), name) {
			h.score += f.weight()
		}
	}
	if !h.has(Designators) && !h.has(Part) || len(h.columns) < 2 {
		h.score = 0
	}
	if o.HeaderRow > 0 && s.Lines[h.line].Number == o.HeaderRow {
		h.score++ // the user's word, even where no heading is known
	}
}

// keepRivals forgets equality between weak headings when a strong one came
// later.
func (h *header) keepRivals(strong map[Field]bool) {
	for i, r := range h.rivals {
		if m, _ := meaningOf(h.names[r.column]); strong[r.field] && !m.strong {
			h.rivals[i].equal = false
		}
	}
}

// userColumns places the fields whose column the user named.
func userColumns(h *header, o *Options) []int {
	var taken []int
	for _, f := range Fields() {
		name, named := o.Columns[f]
		if !named {
			continue
		}
		if c := matchColumn(h.names, name); c >= 0 {
			h.columns[f] = c
			taken = append(taken, c)
		}
	}
	return taken
}

// matchColumn finds a column by its heading, else by its letters; -1 for
// none.
func matchColumn(names []string, name string) int {
	for c, n := range names {
		if headingIs(n, name) {
			return c
		}
	}
	if c := columnIndex(strings.TrimSpace(name)); c >= 0 && c < maxColumns {
		return c
	}
	return -1
}

func headingIs(heading, name string) bool {
	return heading != "" && (heading == clean(name) || key(heading) == key(name) && key(name) != "")
}

// heading is the text above a field's column.
func (h *header) heading(f Field) string { return at(h.names, h.column(f)) }
