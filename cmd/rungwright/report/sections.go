package report

import (
	"html/template"
	"strings"
	"unicode"
	"unicode/utf8"

	"rungwright/ratings"
)

func (s *subject) cautions() (template.HTML, error) {
	if len(s.d.Cautions) == 0 {
		return "", nil
	}
	type caution struct {
		ratings.Caution
		Heading string
	}
	var list []caution
	for _, c := range s.d.Cautions {
		list = append(list, caution{c, capital(c.Title)})
	}
	return fill("cautions", list)
}

// capital is a sentence with its first letter large.
func capital(s string) string {
	first, size := utf8.DecodeRuneInString(s)
	return string(unicode.ToUpper(first)) + s[size:]
}

func (s *subject) targets() (template.HTML, error) {
	if len(s.d.Targets) == 0 {
		return "", nil
	}
	t := table{Caption: "Each target at the corner where it is hardest to meet", Heads: numbers(words("Target", "Wanted", "Reached", "", "Corner"), 2)}
	for _, x := range s.d.Targets {
		state := cell{Text: "met", State: "met"}
		if !x.Met {
			state = cell{Text: "not met", State: "over"}
		}
		t.Rows = append(t.Rows, []cell{{Text: x.Name}, {Text: x.Wanted}, {Text: measured(x.Got, x.Unit)}, state, {Text: x.Corner}})
	}
	return fill("table", t)
}

// schematic draws each row apart, so that a page may break between rows.
func (s *subject) schematic() (template.HTML, error) {
	sheet, err := draft(s.d.Circuit, DesignLabels(s.d, s.e.Nominal))
	if err != nil {
		return "", err
	}
	var rows []template.HTML
	for _, drawing := range sheet.rowDocuments() {
		rows = append(rows, template.HTML(drawing))
	}
	return fill("schematic", struct {
		Rows []template.HTML
		Note string
	}{rows, s.voltageNote()})
}

// voltageNote says at what condition the node voltages are.
func (s *subject) voltageNote() string {
	const symbols = " Symbols after IEC 60617."
	if s.e.Nominal != nil {
		return "Node voltages to earth are means at full load and nominal line." + symbols
	}
	if c := nominal(s.d); c != nil {
		return "Node voltages to earth are means at " + c.Name + "." + symbols
	}
	return strings.TrimSpace(symbols)
}

func (s *subject) alternates() (template.HTML, error) {
	if len(s.e.Alternates) == 0 {
		return "", nil
	}
	t := table{Caption: "Parts that could stand in", Heads: words("Instead of", "Part", "Maker", "What changes", "Note")}
	for _, a := range s.e.Alternates {
		if a.Part == nil {
			continue
		}
		t.Rows = append(t.Rows, []cell{{Text: a.For}, {Text: a.Part.Number, Below: a.Part.Title()}, {Text: a.Part.Maker}, {Text: a.Effect}, {Text: a.Note}})
	}
	return fill("table", t)
}
