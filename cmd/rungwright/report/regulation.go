package report

import (
	"html/template"

	"rungwright/catalog/quantity"
	"rungwright/optimize"
	"rungwright/optimize/ladder"
)

func (s *subject) regulation() (template.HTML, error) {
	output := s.outputChart()
	if output == nil {
		return "", nil
	}
	r := s.e.Regulation
	t := &table{Caption: "Output against load", Heads: numbers(words("Load", "Output", "Ripple", "Power to the load", "Power from the source"), 0, 1, 2, 3, 4)}
	for _, p := range r.Points {
		i := s.loadOf(p)
		t.Rows = append(t.Rows, cells(amps(i), volts(s.signed(p.MeanV)), volts(p.RippleV), watts(i*p.MeanV), watts(p.InputW)))
	}
	a, err := shown(output, s.kneeWords(), t)
	if err != nil {
		return "", err
	}
	b, err := shown(s.rippleChart(), "Ripple is peak to peak.", nil)
	if err != nil {
		return "", err
	}
	return figures(a, b)
}

// loadOf is the current of the load alone: the curve's own counts the bleeder.
func (s *subject) loadOf(p ladder.RegulationPoint) float64 {
	i := p.LoadA
	for _, l := range s.d.Lines {
		if l.Role == optimize.RoleBleeder && l.Part != nil && groupOhms(l) > 0 {
			i -= p.MeanV / groupOhms(l)
		}
	}
	if i < 1e-3*p.LoadA { // no load: what is left is the simulation's error
		return 0
	}
	return i
}

// knee is the point of greatest power, when the curve goes on past it.
func (s *subject) knee() (ladder.RegulationPoint, bool) {
	r := s.e.Regulation
	if r.Knee > 0 && r.Knee < len(r.Points)-1 {
		return r.Points[r.Knee], true
	}
	return ladder.RegulationPoint{}, false
}

func (s *subject) kneeWords() string {
	out := "The knee lies beyond the loads shown."
	if k, ok := s.knee(); ok {
		out = "The knee is near " + amps(s.loadOf(k)) + ": past it, more current means less power."
	}
	if e := s.e.Regulation.Ended; e != "" {
		out += " The curve ends where it does for: " + e + "."
	}
	return out
}

func (s *subject) outputChart() *Chart {
	r := s.e.Regulation
	if r == nil || len(r.Points) < 2 {
		return nil
	}
	c := &Chart{Name: "regulation", Title: "Output against load current", X: Scale{Name: "load", Unit: quantity.Current, Zero: true},
		Y: Scale{Name: s.outputName(), Unit: quantity.Voltage}, Lines: []Trace{{}}}
	for _, p := range r.Points {
		c.Lines[0].add(s.loadOf(p), p.MeanV)
	}
	first, last := r.Points[0], r.Points[len(r.Points)-1]
	c.Summary = "The output is " + volts(s.signed(first.MeanV)) + " at " + amps(s.loadOf(first)) + " and " + volts(s.signed(last.MeanV)) + " at " + amps(s.loadOf(last)) + ". " + s.kneeWords()
	c.Limits = s.window(false)
	if full := float64(s.d.Supply.Output.Load.Most); full > 0 {
		c.Limits = append(c.Limits, Limit{"full load", full, true})
	}
	if k, ok := s.knee(); ok {
		c.Limits = append(c.Limits, Limit{"knee", s.loadOf(k), true})
	}
	return c
}

// window is the wanted output's edges.
func (s *subject) window(upright bool) []Limit {
	o := s.d.Supply.Output
	v, w := float64(o.Voltage), float64(o.Window)
	if v == 0 {
		return nil
	}
	if w == 0 {
		return []Limit{{"wanted", v, upright}}
	}
	return []Limit{{"least wanted", v * (1 - w), upright}, {"most wanted", v * (1 + w), upright}}
}

func (s *subject) rippleChart() *Chart {
	if s.outputChart() == nil {
		return nil
	}
	c := &Chart{Name: "ripple", Title: "Ripple against load current", X: Scale{Name: "load", Unit: quantity.Current, Zero: true},
		Y: Scale{Name: "ripple, peak to peak", Unit: quantity.Voltage, Zero: true}, Lines: []Trace{{}}}
	for _, p := range s.e.Regulation.Points {
		c.Lines[0].add(s.loadOf(p), p.RippleV)
	}
	last := s.e.Regulation.Points[len(s.e.Regulation.Points)-1]
	c.Summary = "The ripple reaches " + volts(last.RippleV) + " at " + amps(s.loadOf(last)) + "."
	if want := float64(s.d.Supply.Output.Ripple); want > 0 {
		c.Limits = []Limit{{"most wanted", want, false}}
	}
	return c
}

// outputName names the axis of the output, which is drawn as a magnitude: a
// curve that falls is a voltage that is lost, of either sign.
func (s *subject) outputName() string {
	if s.d.Supply.Output.Negative {
		return "output below ground"
	}
	return "output"
}
