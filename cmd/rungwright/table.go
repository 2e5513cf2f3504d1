package main

import (
	"fmt"
	"slices"
	"strconv"
	"strings"
	"unicode/utf8"

	"rungwright/catalog/quantity"
)

// column is one column of a table.
type column struct {
	title string // for the eye
	key   string // in a pipe: the unit is in it
	unit  quantity.Dimension
	right bool // numbers stand to the right
	extra int  // above zero: left out when the screen is too narrow, the greatest first
}

// words makes a column of text and measure one of quantities.
func words(title, key string) column { return column{title: title, key: key} }

func measure(title, key string, unit quantity.Dimension) column {
	return column{title: title, key: key, unit: unit, right: true}
}

// optional marks a column as one that narrow screens leave out.
func (c column) optional(rank int) column { c.extra = rank; return c }

// table is rows of cells: string, int, float64 in the column's unit, or bar.
type table struct {
	columns []column
	rows    [][]any
}

func (t *table) add(cells ...any) { t.rows = append(t.rows, cells) }

// drop takes a column out by its key.
func (t *table) drop(key string) {
	i := slices.IndexFunc(t.columns, func(c column) bool { return c.key == key })
	t.columns = slices.Delete(t.columns, i, i+1)
	for r, row := range t.rows {
		t.rows[r] = slices.Delete(row, i, i+1)
	}
}

// printTable shows a table as the terminal rules say.
func (s *streams) printTable(t table) {
	if !s.outTerminal {
		t.printPlain(s)
		return
	}
	t.printScreen(s)
}

// printTables shows those tables that have rows, each after a blank line.
func printTables(s *streams, tables ...table) {
	for _, t := range tables {
		if len(t.rows) > 0 {
			fmt.Fprintln(s.out)
			s.printTable(t)
		}
	}
}

// printPlain writes tab-separated lines in base units under a line of keys.
func (t table) printPlain(s *streams) {
	var keys []string
	for _, c := range t.columns {
		keys = append(keys, c.key)
	}
	fmt.Fprintln(s.out, strings.Join(keys, "\t"))
	for _, row := range t.rows {
		var cells []string
		for _, cell := range row {
			cells = append(cells, plainCell(cell))
		}
		fmt.Fprintln(s.out, strings.Join(cells, "\t"))
	}
}

func plainCell(cell any) string {
	switch v := cell.(type) {
	case float64:
		return plainNumber(v)
	case bar:
		return plainNumber(float64(v))
	}
	return strings.NewReplacer("\t", " ", "\n", " ").Replace(fmt.Sprint(cell))
}

// plainNumber keeps nine significant digits: far more than the models
// promise, and few enough to read the same on every machine.
func plainNumber(v float64) string { return strconv.FormatFloat(v, 'g', 9, 64) }

// printScreen writes a table for the eye.
func (t table) printScreen(s *streams) {
	cells := make([][]string, len(t.rows))
	for i, row := range t.rows {
		cells[i] = t.screenRow(row)
	}
	widths := t.widths(cells)
	shown := fit(t.columns, widths, s.width)
	squeeze(t.columns, widths, shown, s.width)
	var titles []string
	for _, c := range t.columns {
		titles = append(titles, c.title)
	}
	s.printRow(t.columns, titles, nil, widths, shown, faint)
	for i, row := range cells {
		s.printRow(t.columns, row, t.rows[i], widths, shown, "")
	}
}

func (t table) screenRow(row []any) []string {
	out := make([]string, len(row))
	for i, cell := range row {
		switch v := cell.(type) {
		case float64:
			out[i] = quantity.Format(v, t.columns[i].unit, 4)
		case bar:
			out[i] = v.String()
		default:
			out[i] = fmt.Sprint(v)
		}
	}
	return out
}

func (t table) widths(cells [][]string) []int {
	w := make([]int, len(t.columns))
	for i, c := range t.columns {
		w[i] = utf8.RuneCountInString(c.title)
		for _, row := range cells {
			w[i] = max(w[i], utf8.RuneCountInString(row[i]))
		}
	}
	return w
}

// gap separates columns on a screen.
const gap = 2

// fit says which columns are shown: optional ones go, the greatest rank
// first, until the rest fits.
func fit(columns []column, widths []int, most int) []bool {
	shown := make([]bool, len(columns))
	total := -gap
	for i := range columns {
		shown[i] = true
		total += widths[i] + gap
	}
	for total > most {
		worst := -1
		for i, c := range columns {
			if shown[i] && c.extra > 0 && (worst < 0 || c.extra > columns[worst].extra) {
				worst = i
			}
		}
		if worst < 0 {
			return shown
		}
		shown[worst] = false
		total -= widths[worst] + gap
	}
	return shown
}

// leastText is how far a column of text is squeezed.
const leastText = 16

// squeeze makes the widest column of text so narrow that a row fits.
func squeeze(columns []column, widths []int, shown []bool, most int) {
	total, widest := -gap, -1
	for i := range columns {
		if shown[i] {
			total += widths[i] + gap
			if !columns[i].right && (widest < 0 || widths[i] > widths[widest]) {
				widest = i
			}
		}
	}
	if total > most && widest >= 0 {
		widths[widest] = max(leastText, widths[widest]-(total-most))
	}
}

// cut shortens text to so many characters, and shows that it did.
func cut(text string, most int) string {
	runes := []rune(text)
	if len(runes) <= most {
		return text
	}
	return string(runes[:most-1]) + "…"
}

// printRow writes one line; values are the cells before formatting, for the
// colour of bars, and nil for the line of titles.
func (s *streams) printRow(columns []column, cells []string, values []any, widths []int, shown []bool, how style) {
	var b strings.Builder
	for i, cell := range cells {
		if !shown[i] {
			continue
		}
		cell = cut(cell, widths[i])
		pad := strings.Repeat(" ", widths[i]-utf8.RuneCountInString(cell))
		painted := cell
		if how != "" {
			painted = s.paint(how, cell)
		} else if v, ok := values[i].(bar); ok {
			painted = s.paint(v.style(), cell)
		}
		if columns[i].right {
			b.WriteString(pad + painted)
		} else {
			b.WriteString(painted + pad)
		}
		b.WriteString(strings.Repeat(" ", gap))
	}
	fmt.Fprintln(s.out, strings.TrimRight(b.String(), " "))
}
