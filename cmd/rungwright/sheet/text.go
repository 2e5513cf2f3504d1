package sheet

import (
	"encoding/csv"
	"errors"
	"io"
	"strings"
	"unicode/utf8"
)

// readText reads a text table: csv, tsv and their kin.
func readText(name string, data []byte, o *Options) (*Table, error) {
	var d doubts
	text, err := decode(name, data, &d)
	if err != nil {
		return nil, err
	}
	r := textReader{file: name, doubts: &d, firstLine: 1}
	r.delimiter, text = r.cutSeparator(text)
	if o.Delimiter != 0 {
		r.delimiter = o.Delimiter
	}
	if r.delimiter == 0 {
		r.delimiter = r.findDelimiter(text)
	}
	s, err := r.read(text, false)
	if bare, ok := errors.AsType[*csv.ParseError](err); ok {
		d.warn(Place{File: name, Line: bare.Line + r.firstLine - 1}, "",
			"a quotation mark stands where none may (first on this line); the marks were read as plain text, so check this row and those after it")
		s, err = r.read(text, true)
	}
	if err != nil {
		return nil, err
	}
	return &Table{File: name, Sheets: []Sheet{*s}, Doubts: d.sorted()}, nil
}

type textReader struct {
	file      string
	doubts    *doubts
	delimiter rune
	firstLine int // of the text that is read, within the file
}

// cutSeparator takes off a first line such as "sep=;", which some spreadsheet
// programs write and obey. They do not count it as a row.
func (r *textReader) cutSeparator(text string) (rune, string) {
	line, rest, _ := strings.Cut(text, "\n")
	mark, ok := strings.CutPrefix(strings.ToLower(strings.Trim(line, `" `)), "sep=")
	if !ok || utf8.RuneCountInString(mark) != 1 || !validDelimiter([]rune(mark)[0]) {
		return 0, text
	}
	r.firstLine = 2
	return []rune(mark)[0], rest
}

func validDelimiter(c rune) bool {
	return c != 0 && c != '"' && c != '\r' && c != '\n' && c != utf8.RuneError && utf8.ValidRune(c)
}

// delimiters are the ones that are tried, the likelier first.
var delimiters = []rune{';', '\t', ',', '|'}

// findDelimiter takes the delimiter by which most of the first records have
// the same number of fields, more than one.
func (r *textReader) findDelimiter(text string) rune {
	best, most, wide, equal := ',', 0, 0, false
	for _, c := range delimiters {
		n, fields := agreement(text, c)
		switch {
		case n > most || n == most && fields > wide:
			best, most, wide, equal = c, n, fields, false
		case n == most && fields == wide && n > 0:
			equal = true
		}
	}
	if equal {
		r.doubts.warn(Place{File: r.file, Line: r.firstLine}, "",
			"the columns could be divided by several signs; %s was taken; if that is wrong, name the delimiter", delimiterName(best))
	}
	return best
}

func delimiterName(c rune) string {
	switch c {
	case '\t':
		return "the tab"
	case ';':
		return "the semicolon"
	case ',':
		return "the comma"
	}
	return "the sign " + string(c)
}

// agreement counts, among the first records, those that have the commonest
// number of fields.
func agreement(text string, delimiter rune) (records, fields int) {
	const sample = 50
	c := newCSV(text, delimiter, true)
	counts := map[int]int{}
	for range sample {
		record, err := c.Read()
		if err != nil {
			break
		}
		counts[len(record)]++
	}
	for n, times := range counts {
		if n > 1 && (times > records || times == records && n > fields) {
			records, fields = times, n
		}
	}
	return records, fields
}

func newCSV(text string, delimiter rune, lazy bool) *csv.Reader {
	c := csv.NewReader(strings.NewReader(text))
	c.Comma, c.LazyQuotes, c.FieldsPerRecord = delimiter, lazy, -1
	return c
}

// read turns the records into lines. Lazily, quotation marks within a field
// are plain text.
func (r *textReader) read(text string, lazy bool) (*Sheet, error) {
	if !validDelimiter(r.delimiter) {
		return nil, refusal(Place{File: r.file}, "%q cannot divide columns; name a single sign such as ; or ,", r.delimiter)
	}
	s := &Sheet{file: r.file, source: append(make([]string, r.firstLine-1), strings.Split(text, "\n")...)}
	c := newCSV(text, r.delimiter, lazy)
	cells, number, ended := 0, 0, 0
	for {
		record, err := c.Read()
		if errors.Is(err, io.EOF) {
			return s, nil
		}
		if err != nil {
			return nil, err
		}
		started, _ := c.FieldPos(0)
		number += started - ended // blank lines are rows too
		line := r.line(number, record, c)
		last := len(record) - 1
		ended, _ = c.FieldPos(last)
		ended += strings.Count(record[last], "\n")
		if len(line.Cells) == 0 {
			continue
		}
		if cells += len(line.Cells); cells > maxCells || len(s.Lines) >= maxRows || len(line.Cells) > maxColumns {
			return nil, refusal(s.Place(&line, -1), "the table is larger than %d rows, %d columns or %d cells; split it", maxRows, maxColumns, maxCells)
		}
		r.checkBreaks(s, &line)
		s.Lines = append(s.Lines, line)
	}
}

// line makes a record a line, without the blank cells at its end.
func (r *textReader) line(number int, record []string, c *csv.Reader) Line {
	used := len(record)
	for used > 0 && strings.TrimSpace(record[used-1]) == "" {
		used--
	}
	l := Line{Number: number}
	if used == 0 {
		return l
	}
	l.Cells = make([]Cell, used)
	l.lines, l.offsets = make([]int, used), make([]int, used)
	for i, text := range record[:used] {
		if text = unguarded(text); strings.TrimSpace(text) != "" {
			l.Cells[i] = Cell{Text: text, Raw: text, Kind: Text}
		}
		at, column := c.FieldPos(i)
		l.lines[i], l.offsets[i] = at+r.firstLine-1, column-1
	}
	return l
}

// unguarded drops the apostrophe that careful writers of such files put before
// what a spreadsheet program would take for a formula.
func unguarded(text string) string {
	if rest, ok := strings.CutPrefix(text, "'"); ok && rest != "" && strings.ContainsRune("=+-@", rune(rest[0])) {
		return rest
	}
	return text
}

// checkBreaks warns of a field that has swallowed rows because a quotation
// mark is not closed.
func (r *textReader) checkBreaks(s *Sheet, l *Line) {
	const most = 20
	for i := range l.Cells {
		if n := strings.Count(l.Cells[i].Text, "\n"); n > most {
			r.doubts.wrong(s.Place(l, i), cut(l.Cells[i].Text), "one field runs over %d lines, which looks like a quotation mark that is not closed; close it or remove it", n+1)
		}
	}
}
