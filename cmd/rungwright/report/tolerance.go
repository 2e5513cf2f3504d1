package report

import (
	"fmt"
	"html/template"
	"strconv"

	"rungwright/catalog/quantity"
)

func (s *subject) tolerance() (template.HTML, error) {
	c := s.toleranceChart()
	if c == nil {
		return "", nil
	}
	h := s.e.Tolerance
	t := &table{Caption: "How often", Heads: numbers(words("From", "To", "Trials"), 0, 1, 2)}
	for k, n := range h.Counts {
		t.Rows = append(t.Rows, cells(minus(quantity.Format(h.Edges[k], h.Unit, 4)), minus(quantity.Format(h.Edges[k+1], h.Unit, 4)), strconv.Itoa(n)))
	}
	f, err := shown(c, c.Summary, t)
	if err != nil {
		return "", err
	}
	return figures(f)
}

func (s *subject) toleranceChart() *Chart {
	h := s.e.Tolerance
	if h == nil || len(h.Counts) == 0 || len(h.Edges) != len(h.Counts)+1 {
		return nil
	}
	c := &Chart{Name: "tolerance", Title: "Spread of " + h.Of, X: Scale{Name: h.Of, Unit: h.Unit}, Y: Scale{Name: "trials", Unit: quantity.None, Zero: true}}
	trials := 0
	for k, n := range h.Counts {
		c.Bars = append(c.Bars, Bin{h.Edges[k], h.Edges[k+1], float64(n)})
		trials += n
	}
	for _, l := range []Limit{{"least wanted", h.Least, true}, {"most wanted", h.Most, true}} {
		if l.At != 0 {
			c.Limits = append(c.Limits, l)
		}
	}
	c.Summary = fmt.Sprintf("%s with parts drawn within their tolerances (seed %d); %d outside the window.", plural(trials, "trial"), h.Seed, h.Outside)
	if h.Note != "" {
		c.Summary += " " + h.Note
	}
	return c
}
