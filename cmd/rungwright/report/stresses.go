package report

import (
	"html/template"
	"strings"

	"rungwright/catalog/quantity"
	"rungwright/ratings"
)

// stresses lists every stress that was judged, the worst first.
func (s *subject) stresses() (template.HTML, error) {
	var rows [][]cell
	var open []string
	for _, x := range s.d.Stresses {
		if x.Unjudged {
			open = append(open, x.Quantity+" of "+x.Part+" ("+x.Ref+"): "+strings.TrimPrefix(x.Note, "NOT JUDGED: "))
			continue
		}
		rows = append(rows, stressRow(x))
	}
	if len(rows)+len(open) == 0 {
		return "", nil
	}
	heads := numbers(words("Part", "What", "Used", "Allowed", "Share of the limit", "Corner and rule"), 2, 3)
	view := struct {
		Table, Rest *table
		Open        []string
	}{Open: open}
	const most = 14
	view.Table = &table{Caption: "The worst use of each rating against what the policy allows; the line on the bar is the limit", Heads: heads, Rows: rows[:min(most, len(rows))]}
	if len(rows) > most {
		view.Rest = &table{Caption: "The others", Heads: heads, Rows: rows[most:]}
	}
	return fill("stresses", view)
}

func stressRow(x ratings.Stress) []cell {
	state := cell{Text: percent(x.Ratio), Bar: stressBar(x), State: "met"}
	if x.Over {
		state.State = "over"
		state.Text += " over"
	}
	limit := cell{Text: allowed(x)}
	if x.Rating > 0 && x.Rating != x.Limit {
		limit.Below = "rated " + quantity.Format(x.Rating, x.Unit, 4)
	}
	rule := x.Rule.Policy
	for _, more := range []string{x.Rule.Name, x.Rule.Source, x.Note} {
		if more != "" {
			rule = strings.TrimPrefix(rule+"; "+more, "; ")
		}
	}
	return []cell{{Text: x.Ref, Below: x.Part}, {Text: x.Quantity}, {Text: minus(quantity.Format(x.Value, x.Unit, 4))}, limit, state, {Text: x.Corner, Below: rule}}
}

// stressBar puts the limit at four fifths of the bar's width.
func stressBar(x ratings.Stress) *bar {
	ink := "blue"
	if s, _ := shadeOf(x.Ratio); x.Ratio > 0.8 {
		ink = s.edge.name
	}
	if x.Over {
		ink = "red"
	}
	return &bar{Ink: ink, Long: number(80 * min(1.25, max(0, x.Ratio))), Limit: "80"}
}
