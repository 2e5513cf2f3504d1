package report

import "rungwright/catalog/quantity"

// outlet draws what hangs on the output: filter, bleeder, load and the
// terminal, each to earth.
func (s *sheet) outlet(from point) {
	x := from.x
	if s.circuit.Filter.R > 0 {
		start, to := point{x + 44, from.y}, point{x + 44 + pitch, from.y}
		r, c := s.filterLabels()
		s.wire(from, start)
		s.resistor(filter, start, to, r, above)
		s.hang(to, filterCapacitor, c)
		x = to.x
	}
	for k, l := range s.hung() {
		to := point{x + pitch, from.y}
		if k == 0 && x == from.x {
			to.x -= 28
		}
		s.wire(point{x, from.y}, to)
		s.hang(to, across, l)
		x = to.x
	}
	s.terminal(point{x, from.y}, s.labels.Output, "output")
}

// hang places a part between a point and earth below it.
func (s *sheet) hang(from point, k kind, l Label) {
	foot := point{from.x, from.y + 74}
	s.resistor(k, from, foot, l, right)
	s.earth(foot)
}

// hung are the resistors across the output.
func (s *sheet) hung() []Label {
	var out []Label
	if s.labels.Bleeder.Ref != "" {
		out = append(out, s.labels.Bleeder)
	}
	if s.labels.Load.Ref != "" {
		out = append(out, s.labels.Load)
	}
	return out
}

// terminal ends a wire in a ring with the output's name and voltage above.
func (s *sheet) terminal(from point, volts, name string) {
	end := point{from.x + 58, from.y}
	s.wire(from, end)
	s.rings = append(s.rings, end)
	y := from.y - 9
	if volts != "" {
		s.texts = append(s.texts, written{s: fit(neutral(volts), 12, true, 96), at: point{end.x + 4, y}, anchor: 1, size: 12, bold: true, ink: textInk})
		y -= leading + 1
	}
	s.texts = append(s.texts, written{s: name, at: point{end.x + 4, y}, anchor: 1, size: letters, ink: faint})
	s.width = max(s.width, end.x+16)
}

// outlets draws what stands between two outputs.
func (s *sheet) outlets(plus, minus point) {
	if s.circuit.Filter.R > 0 {
		plus, minus = s.filterBetween(plus, minus)
	}
	x := plus.x + pitch - 12
	for _, l := range s.hung() {
		x += pitch
		s.resistor(across, point{x, plus.y}, point{x, minus.y}, l, right)
		s.wire(plus, point{x, plus.y})
		s.wire(minus, point{x, minus.y})
		plus.x, minus.x = x, x
	}
	s.terminal(plus, "", sign("+", "−", s.circuit.Negative))
	s.terminal(minus, "", sign("−", "+", s.circuit.Negative))
	s.node("", plus, point{plus.x + 32, plus.y + 2}, below)
	s.node("", minus, point{minus.x + 32, minus.y + 2}, below)
}

// filterBetween draws the filter between two outputs, its resistor in the
// upper rail.
func (s *sheet) filterBetween(plus, minus point) (point, point) {
	r, c := s.filterLabels()
	start, x := point{plus.x + pitch, plus.y}, plus.x+2*pitch
	s.wire(plus, start)
	s.resistor(filter, start, point{x, plus.y}, r, above)
	s.wire(minus, point{x, minus.y})
	s.resistor(filterCapacitor, point{x, plus.y}, point{x, minus.y}, c, right)
	return point{x, plus.y}, point{x, minus.y}
}

func (s *sheet) filterLabels() (r, c Label) {
	f := s.circuit.Filter
	return Label{Ref: "RF", Value: quantity.Ohms(f.R).String()}, Label{Ref: "CF", Value: quantity.Farads(f.C).String()}
}

// sign names one of two outputs.
func sign(as, turned string, negative bool) string {
	if negative {
		as = turned
	}
	return "output " + as
}
