package report

import (
	"html/template"
	"slices"
	"strings"
)

// table is a table of the page.
type table struct {
	Caption string
	Heads   []head
	Rows    [][]cell
}

// Headed tells whether any column has a name.
func (t table) Headed() bool {
	return slices.ContainsFunc(t.Heads, func(h head) bool { return h.Text != "" })
}

// head is the head of a column; numbers stand to the right.
type head struct {
	Text  string
	Right bool
}

// cell is one entry.
type cell struct {
	Text  string
	Below string // a second, smaller line
	Bar   *bar
	State string // "met", "over", "open" or empty: a mark and a word
}

// Long tells whether the text is one word so long that it must be broken.
func (c cell) Long() bool {
	for _, w := range strings.Fields(c.Text + " " + c.Below) {
		if len(w) > 30 {
			return true
		}
	}
	return false
}

// bar is a horizontal bar: lengths in per cent of the full width.
type bar struct {
	Ink   string
	Long  string
	Limit string // where a limit stands; empty: none
}

func words(heads ...string) []head {
	var out []head
	for _, h := range heads {
		out = append(out, head{Text: h})
	}
	return out
}

// numbers marks columns, counted from 0, as numbers.
func numbers(heads []head, columns ...int) []head {
	for _, k := range columns {
		heads[k].Right = true
	}
	return heads
}

func cells(texts ...string) []cell {
	var out []cell
	for _, t := range texts {
		out = append(out, cell{Text: t})
	}
	return out
}

// share is a bar of a part of the whole, scaled so that most fills it.
func share(part, most float64) *bar {
	if !(most > 0) {
		return nil
	}
	return &bar{Ink: "blue", Long: number(100 * min(1, max(0, part/most)))}
}

// figure is a drawing with its caption and, folded away, its numbers.
type figure struct {
	Drawing template.HTML
	Caption string
	Table   *table
	Readout bool // points are read out below it
	Wide    bool
}

// figures writes charts side by side.
func figures(list ...figure) (template.HTML, error) {
	if len(list) == 0 {
		return "", nil
	}
	return fill("figures", list)
}

// shown is a chart as a figure, with its numbers.
func shown(c *Chart, caption string, t *table) (figure, error) {
	drawing, err := c.svg(true)
	return figure{Drawing: template.HTML(drawing), Caption: caption, Table: t, Readout: len(c.Marks) > 0}, err
}
