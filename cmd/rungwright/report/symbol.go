package report

import (
	"math"

	"gonum.org/v1/plot/vg"

	"rungwright/optimize/ladder"
)

// Symbols after IEC 60617 (from memory): capacitor two plates, polarised with
// a plus sign; diode triangle and bar; resistor a rectangle; source a circle
// with its waveform; winding a row of arcs; earth three bars.

// half is what a symbol's body reaches from its middle along and across its
// axis.
func (k kind) half() (along, across float64) {
	switch k {
	case capacitor, filterCapacitor:
		return 5, 12
	case diode:
		return 9, 8
	case source:
		return 15, 15
	}
	return 15, 6
}

// reach is half in the drawing's directions.
func (p placed) reach() point {
	along, across := p.kind.half()
	if p.label.Polarised {
		along = 13 // its plus sign stands outside the plates
	}
	if p.a.x == p.b.x {
		return point{across, along}
	}
	return point{along, across}
}

// frame turns a symbol's own directions into the drawing's: along from a to b,
// across to its left hand.
type frame struct {
	middle, unit point
}

func (p placed) frame() frame {
	long := math.Hypot(p.b.x-p.a.x, p.b.y-p.a.y)
	return frame{p.middle, point{(p.b.x - p.a.x) / long, (p.b.y - p.a.y) / long}}
}

func (f frame) at(along, across float64) point {
	return point{f.middle.x + along*f.unit.x - across*f.unit.y, f.middle.y + along*f.unit.y + across*f.unit.x}
}

// part draws a symbol with its leads.
func (b brush) part(p placed, w ladder.Waveform) {
	group, ok := b.Canvas.(titled)
	if ok {
		group.open(p.spoken())
		defer group.shut()
	}
	f := p.frame()
	along, _ := p.kind.half()
	if p.kind == capacitor || p.kind == filterCapacitor {
		along = 3
	}
	b.ink(line, 1.1)
	b.lines(p.a, f.at(-along, 0))
	b.lines(f.at(along, 0), p.b)
	switch p.kind {
	case capacitor, filterCapacitor:
		b.capacitor(f, p.label.Polarised)
	case diode:
		b.diode(f)
	case source:
		b.source(p, f, w)
	default:
		b.Stroke(b.closed(f.at(-15, -6), f.at(15, -6), f.at(15, 6), f.at(-15, 6)))
	}
}

// spoken is the symbol's label in one line.
func (p placed) spoken() string {
	out := ""
	for k, l := range p.label.lines() {
		if k > 0 {
			out += ", "
		}
		out += l
	}
	return out
}

func (b brush) capacitor(f frame, polarised bool) {
	b.ink(line, 2)
	b.lines(f.at(-3, -11), f.at(-3, 11))
	b.lines(f.at(3, -11), f.at(3, 11))
	if polarised {
		b.ink(line, 1)
		b.lines(f.at(-11, -7.5), f.at(-6, -7.5))
		b.lines(f.at(-8.5, -10), f.at(-8.5, -5))
	}
}

func (b brush) diode(f frame) {
	b.ink(line, 1.4)
	b.Fill(b.closed(f.at(-8, -7), f.at(8, 0), f.at(-8, 7)))
	b.lines(f.at(8, -7.5), f.at(8, 7.5))
}

// source draws the winding's arcs, or a circle with the waveform.
func (b brush) source(p placed, f frame, w ladder.Waveform) {
	b.ink(line, 1.3)
	if p.label.Winding {
		var arcs vg.Path
		arcs.Move(b.at(f.at(-15, 0)))
		for k := range 3 {
			from, to := -15+10*float64(k), -5+10*float64(k)
			arcs.CubeTo(b.at(f.at(from, -8)), b.at(f.at(to, -8)), b.at(f.at(to, 0)))
		}
		b.Stroke(arcs)
		b.disc(f.at(-15, 6), 1.8) // the end that rises first
		return
	}
	b.Stroke(b.circle(p.middle, 15))
	b.Stroke(b.wave(p.middle, w))
}

// wave is one period inside the source's circle.
func (b brush) wave(m point, w ladder.Waveform) vg.Path {
	at := func(x, y float64) point { return point{m.x + x, m.y - y} }
	switch w {
	case ladder.Square:
		return b.path(at(-9, 0), at(-9, 6), at(0, 6), at(0, -6), at(9, -6), at(9, 0))
	case ladder.Triangle:
		return b.path(at(-9, 0), at(-4.5, 6), at(4.5, -6), at(9, 0))
	case ladder.Table:
		return b.path(at(-9, 0), at(-6, 6), at(-2, 2), at(2, 4), at(4, -6), at(9, 0))
	}
	var p vg.Path
	p.Move(b.at(at(-9, 0)))
	p.CubeTo(b.at(at(-6, 9)), b.at(at(-3, 9)), b.at(at(0, 0)))
	p.CubeTo(b.at(at(3, -9)), b.at(at(6, -9)), b.at(at(9, 0)))
	return p
}

func (b brush) earth(p point) {
	b.ink(line, 1.1)
	b.lines(p, point{p.x, p.y + 9})
	b.ink(line, 1.6)
	for k, half := range []float64{9, 6, 3} {
		y := p.y + 9 + 3.5*float64(k)
		b.lines(point{p.x - half, y}, point{p.x + half, y})
	}
	b.ink(line, 1.1)
}
