package report

import (
	"strconv"

	"rungwright/optimize/ladder"
)

// The drawing is made on sheets of rows, in points, y downward.
const (
	pitch   = 80.0  // between two rungs
	bay     = 104.0 // between the rails of a half-wave ladder
	band    = 84.0  // outside the rails, for labels
	margin  = 8.0
	letters = 10.5 // size of the text
	leading = 12.5 // from line to line
	room    = 57.0 // for a label beside an upright symbol
	perRow  = 4    // stages in a row
)

// point is a place on a row.
type point struct{ x, y float64 }

// wire is a straight conductor.
type wire struct{ a, b point }

// kind is what a symbol stands for.
type kind int

const (
	capacitor       kind = iota // a: positive plate
	diode                       // a: anode
	source                      // a: the end that rises first
	series                      // a resistor in a winding end
	filter                      // a resistor between ladder and load
	filterCapacitor             // from there to earth
	across                      // a resistor or load across the output
)

// placed is a symbol between two terminals.
type placed struct {
	kind   kind
	index  int // of the capacitor or diode, from 0
	a, b   point
	middle point // of the body
	label  Label
}

// side is where a label stands.
type side int

const (
	above side = iota
	below
	right
	leftBelow // ends left of the point, below a rail
)

// written is a line of text; its anchor is the left, middle or right of the
// base line.
type written struct {
	s      string
	at     point
	anchor float64 // 0 left, 0.5 middle, 1 right
	size   float64
	bold   bool
	ink    ink
}

// flag is a rail that goes on in the next row under the same name.
type flag struct {
	name  string
	at    point
	enter bool // at the start of a row
}

// tag asks for the name and voltage of the node at a place.
type tag struct {
	name string
	node point
	at   point // of the first base line
	side side
}

// row is one line of the drawing.
type row struct {
	width, height float64
	wires         []wire
	parts         []placed
	earths        []point
	flags         []flag
	tags          []tag
	texts         []written
	rings         []point // output terminals
	swatches      []swatch
}

// sheet is a drawing under way.
type sheet struct {
	circuit ladder.Circuit
	labels  Labels
	rows    []*row
	*row    // the one under way
}

// newRow starts a row.
func (s *sheet) newRow(height float64) {
	s.row = &row{height: height}
	s.rows = append(s.rows, s.row)
}

func (s *sheet) wire(a, b point) { s.wires = append(s.wires, wire{a, b}) }

// capacitor places capacitor i, from 0, its positive plate at plus; for a
// negative circuit the plates change places.
func (s *sheet) capacitor(i int, plus, minus point, where side) {
	s.capacitorAt(i, plus, minus, 0.5, where)
}

// capacitorAt is capacitor with its body a share of the way from plus.
func (s *sheet) capacitorAt(i int, plus, minus point, share float64, where side) {
	middle := between(plus, minus, share)
	if s.circuit.Negative {
		plus, minus = minus, plus
	}
	s.place(placed{kind: capacitor, index: i, a: plus, b: minus, middle: middle,
		label: at(s.labels.Capacitors, i, "C"+strconv.Itoa(i+1))}, where)
}

// diode places diode i, from 0, its body a share of the way from anode to
// cathode.
func (s *sheet) diode(i int, anode, cathode point, share float64, where side) {
	middle := between(anode, cathode, share)
	if s.circuit.Negative {
		anode, cathode = cathode, anode
	}
	s.place(placed{kind: diode, index: i, a: anode, b: cathode, middle: middle,
		label: at(s.labels.Diodes, i, "D"+strconv.Itoa(i+1))}, where)
}

// resistor places a box.
func (s *sheet) resistor(k kind, a, b point, l Label, where side) {
	s.place(placed{kind: k, a: a, b: b, middle: between(a, b, 0.5), label: l}, where)
}

// source places the source, a being the end that rises first.
func (s *sheet) source(a, b point, where side) {
	s.place(placed{kind: source, a: a, b: b, middle: between(a, b, 0.5), label: s.labels.Source}, where)
}

func (s *sheet) place(p placed, where side) {
	s.parts = append(s.parts, p)
	s.caption(p, where)
}

// caption writes a symbol's label at its side.
func (s *sheet) caption(p placed, where side) {
	lines, reach := p.label.lines(), p.reach()
	most := pitch - 6
	if where == right {
		most = room
	}
	if p.kind == source {
		most = pitch + 10
	}
	for k, l := range lines {
		w := written{s: l, size: letters, ink: textInk, bold: k == 0}
		over := p.label.Stress > 1 && !p.label.AtMost && k == len(lines)-1
		if over {
			w.bold, w.ink = true, alarm
		}
		w.s = fit(w.s, w.size, w.bold, most)
		switch where {
		case above:
			w.anchor, w.at = 0.5, point{p.middle.x, p.middle.y - reach.y - 5 - leading*float64(len(lines)-1-k)}
		case below:
			w.anchor, w.at = 0.5, point{p.middle.x, p.middle.y + reach.y + 4 + letters + leading*float64(k)}
		default:
			w.at = point{p.middle.x + reach.x + 5, p.middle.y + leading*(float64(k)-float64(len(lines)-1)/2) + 0.36*letters}
		}
		s.texts = append(s.texts, w)
	}
}

// node asks for the name and voltage of the node at a place: written above or
// below a rail, in the middle.
func (s *sheet) node(name string, n, at point, where side) {
	s.tags = append(s.tags, tag{name: name, node: n, at: at, side: where})
}

// earth hangs an earth on a point.
func (s *sheet) earth(at point) { s.earths = append(s.earths, at) }

// leave ends a rail at the row's right edge, with its voltage where no other
// place tells it; enter takes it up in the next row.
func (s *sheet) leave(name string, at point, tell bool) {
	s.flags = append(s.flags, flag{name: name, at: at})
	if tell {
		s.node("", at, point{at.x + 22, at.y - 6}, above)
	}
	s.width = max(s.width, at.x+48)
}

func (s *sheet) enter(name string, at point) {
	s.flags = append(s.flags, flag{name: name, at: at, enter: true})
}

// runs splits the stages into rows of nearly equal length.
func runs(stages, most int) [][2]int {
	rows := (stages + most - 1) / most
	var out [][2]int
	from := 1
	for r := range rows {
		n := (stages - from + 1 + rows - r - 1) / (rows - r)
		out = append(out, [2]int{from, from + n - 1})
		from += n
	}
	return out
}

func between(a, b point, share float64) point {
	return point{a.x + (b.x-a.x)*share, a.y + (b.y-a.y)*share}
}
