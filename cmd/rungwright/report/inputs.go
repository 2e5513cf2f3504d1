package report

import (
	"html/template"

	"rungwright/catalog/quantity"
)

func (s *subject) inputs() (template.HTML, error) {
	t := table{Caption: "The files that this follows from; the same files give the same answer", Heads: words("File", "SHA-256 of its bytes")}
	seen := map[string]bool{}
	inputs := s.d.Inputs
	if s.d.Supply.Input.SHA256 != "" {
		inputs = append(inputs[:len(inputs):len(inputs)], s.d.Supply.Input)
	}
	for _, in := range inputs {
		if in.Name == "" || seen[in.Name+in.SHA256] {
			continue
		}
		seen[in.Name+in.SHA256] = true
		t.Rows = append(t.Rows, cells(in.Name, in.SHA256))
	}
	view := struct {
		Wishes, Files *table
		Notes         []string
	}{s.wishes(), &t, s.d.Notes}
	if len(t.Rows) == 0 {
		view.Files = nil
	}
	return fill("inputs", view)
}

// wishes are the supply's own words, for who has the report alone.
func (s *subject) wishes() *table {
	u := s.d.Supply
	load := quantity.Format(float64(u.Output.Load.Least), quantity.Current, 4) + " to " + quantity.Format(float64(u.Output.Load.Most), quantity.Current, 4)
	if u.Output.Load.Resistance > 0 {
		load = u.Output.Load.Resistance.String()
	}
	t := &table{Caption: "What was asked for", Heads: words("", "")}
	add := func(name, text string, given bool) {
		if given {
			t.Rows = append(t.Rows, cells(name, text))
		}
	}
	add("output", volts(s.signed(float64(u.Output.Voltage)))+" ± "+u.Output.Window.String(), u.Output.Voltage > 0)
	add("load", load, u.Output.Load.Most > 0 || u.Output.Load.Resistance > 0)
	add("source", sourceWords(s), s.d.Circuit.Source.Peak > 0)
	add("line", "± "+u.Source.Line.String(), u.Source.Line > 0)
	add("ambient", u.Surroundings.Ambient.String(), u.Surroundings.Ambient != 0)
	add("altitude", u.Surroundings.Altitude.String(), u.Surroundings.Altitude > 0)
	add("derating", u.Derating, u.Derating != "")
	add("build", plural(u.Build.Units, "unit")+", spares "+u.Build.Spares.String(), u.Build.Units > 0)
	add("least of", string(u.Choose.Least), u.Choose.Least != "")
	if len(t.Rows) == 0 {
		return nil
	}
	return t
}

func sourceWords(s *subject) string {
	c := s.d.Circuit.Source
	w := string(c.Waveform)
	if w == "" {
		w = "sine"
	}
	return quantity.Format(c.Peak, quantity.Voltage, 4) + " peak " + w + ", " + quantity.Format(c.Frequency, quantity.Frequency, 4) + ", " +
		quantity.Format(c.Resistance, quantity.Resistance, 3) + " in each end"
}
