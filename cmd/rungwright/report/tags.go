package report

import (
	"rungwright/catalog/quantity"
)

// writeTags writes the name and voltage of every node that was asked for.
func (s *sheet) writeTags() {
	n := netsOf(s.rows)
	volts := s.voltages(n)
	for r, row := range s.rows {
		for _, t := range row.tags {
			var lines []string
			if t.name != "" {
				lines = append(lines, t.name)
			}
			if v, known := volts[n.at(r, t.node)]; known {
				lines = append(lines, minus(quantity.Format(v, quantity.Voltage, 3)))
			}
			row.texts = append(row.texts, t.write(lines)...)
		}
	}
}

// write sets the lines of a tag at its place.
func (t tag) write(lines []string) []written {
	var out []written
	for k, l := range lines {
		w := written{s: l, at: point{t.at.x, 0}, anchor: 0.5, size: letters - 0.5, ink: link}
		if t.side == leftBelow {
			w.anchor = 1
		}
		if t.side == above {
			w.at.y = t.at.y - 6 - leading*float64(len(lines)-1-k)
		} else {
			w.at.y = t.at.y + 4 + letters + leading*float64(k)
		}
		out = append(out, w)
	}
	return out
}

// legend explains the shades, when there is one, and the flags.
func (s *sheet) legend() {
	shaded, grouped, flagged := false, false, len(s.rows) > 1
	for _, row := range s.rows {
		for _, p := range row.parts {
			shaded = shaded || p.label.Stress > 0
			grouped = grouped || p.label.AtMost
		}
	}
	if !shaded && !flagged {
		return
	}
	s.newRow(8)
	if shaded {
		s.shadeLegend()
	}
	if grouped {
		s.remark("≤ stands beside a part that works no harder than the hardest-worked of its group.")
	}
	if flagged {
		s.remark("A flag carries its rail on to the next row, to the flag of the same name.")
	}
}

// remark adds a line of explanation.
func (s *sheet) remark(words string) {
	s.height += 18
	s.texts = append(s.texts, written{s: words, at: point{margin, s.height - 6}, size: letters, ink: faint})
}

func (s *sheet) shadeLegend() {
	s.height += 18
	y := s.height - 6
	put := func(x float64, words string) float64 {
		s.texts = append(s.texts, written{s: words, at: point{x, y}, size: letters, ink: faint})
		return x + width(words, letters, false)
	}
	x := put(margin, "Per cent and shade: a part's worst stress as a share of its limit.")
	x += 14
	for _, sh := range shades {
		s.swatches = append(s.swatches, swatch{point{x, y - 10}, sh})
		x = put(x+22, sh.word) + 18
	}
	s.width = max(s.width, x)
}

// swatch is a sample of a shade.
type swatch struct {
	at    point // its upper left corner
	shade shade
}

// measure makes every row as wide as what it holds.
func (s *sheet) measure() {
	for _, row := range s.rows {
		for _, t := range row.texts {
			_, high := t.box()
			row.width = max(row.width, high.x+margin)
		}
	}
}

// size is that of all rows together.
func (s *sheet) size() (w, h float64) {
	for _, row := range s.rows {
		w = max(w, row.width)
		h += row.height
	}
	return w, h
}

// box is what the text covers, from its upper left to its lower right corner.
func (w written) box() (low, high point) {
	long := width(w.s, w.size, w.bold)
	x := w.at.x - w.anchor*long
	return point{x, w.at.y - 0.75*w.size}, point{x + long, w.at.y + 0.22*w.size}
}
