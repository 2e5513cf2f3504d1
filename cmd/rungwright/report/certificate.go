package report

import (
	"fmt"
	"html/template"
	"strconv"
)

func (s *subject) certificate() (template.HTML, error) {
	c := s.d.Certificate
	if len(c.Text) == 0 && c.Combinations == 0 {
		return "", nil
	}
	t := table{Caption: "What became of every combination", Heads: numbers(words("Class", "Combinations"), 1)}
	for _, r := range []struct {
		name string
		n    int64
	}{{"in the whole space", c.Combinations}, {"another is as good in everything and no dearer", c.Dominated}, {"ruled out by the optimistic bound", c.Bounded},
		{"ruled out by the estimate with its guard", c.Estimated}, {"not better than the answer", c.Dearer}, {"simulated", int64(c.Simulated)}} {
		t.Rows = append(t.Rows, cells(r.name, grouping(r.n)))
	}
	view := struct {
		Proved   bool
		Text     []string
		Rejected string
		Guard    string
		Table    *table
		Others   *table
	}{c.Proved, c.Text, c.Rejected, "", nil, s.runnersUp()}
	if c.Combinations > 0 {
		view.Table = &t
	}
	if c.Guard > 0 {
		view.Guard = fmt.Sprintf("The estimate was allowed an error of %s; %d simulated designs exceeded it.", percent(c.Guard), c.GuardBroken)
	}
	return fill("certificate", view)
}

// grouping is a whole number with its thousands apart.
func grouping(n int64) string {
	s := strconv.FormatInt(n, 10)
	for k := len(s) - 3; k > 0; k -= 3 {
		s = s[:k] + "\u202F" + s[k:]
	}
	return s
}

func (s *subject) runnersUp() *table {
	if len(s.d.RunnersUp) == 0 {
		return nil
	}
	t := &table{Caption: "Other designs that pass", Heads: numbers(words("Design", "Cost of a unit", "Note"), 1)}
	for _, r := range s.d.RunnersUp {
		t.Rows = append(t.Rows, cells(r.Summary, money(r.UnitCost, s.d.Currency), r.Note))
	}
	return t
}
