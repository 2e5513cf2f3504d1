package report

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"gonum.org/v1/plot/vg"
)

// brush draws one row on a canvas, y turned downward.
type brush struct {
	vg.Canvas
	bottom float64 // the canvas height less the row's own top
}

// titled is a canvas that can give a group of marks a title.
type titled interface {
	open(title string)
	shut()
}

// paint draws all rows, one under the other.
func (s *sheet) paint(c vg.Canvas) {
	w, h := s.size()
	if _, themed := c.(titled); !themed { // SVG has its own ground
		c.SetColor(paper)
		c.Fill(vg.Rectangle{Max: vg.Point{X: vg.Length(w), Y: vg.Length(h)}}.Path())
	}
	for _, row := range s.rows {
		row.paint(brush{c, h}, s)
		h -= row.height
	}
}

// rowDocuments are the rows as elements of a page, each by itself, so that a
// printed page may end between two.
func (s *sheet) rowDocuments() [][]byte {
	w, _ := s.size()
	var out [][]byte
	for k, row := range s.rows {
		canvas := newSVG(w, row.height, true)
		row.paint(brush{canvas, row.height}, s)
		title := s.title()
		if len(s.rows) > 1 {
			title += fmt.Sprintf(", row %d of %d", k+1, len(s.rows))
		}
		out = append(out, canvas.document("schematic-"+strconv.Itoa(k+1), title, row.describe()))
	}
	return out
}

// describe lists a row's parts for who cannot see it.
func (r *row) describe() string {
	var words []string
	for _, p := range r.parts {
		words = append(words, p.spoken())
	}
	if len(words) == 0 {
		return "What the shades mean."
	}
	return strings.Join(words, "; ") + "."
}

func (r *row) paint(b brush, s *sheet) {
	for _, p := range r.parts {
		b.shade(p)
	}
	b.ink(line, 1.1)
	for _, w := range r.wires {
		b.lines(w.a, w.b)
	}
	for _, j := range r.joints() {
		b.disc(j, 2.3)
	}
	for _, e := range r.earths {
		b.earth(e)
	}
	for _, f := range r.flags {
		b.flag(f)
	}
	for _, p := range r.rings {
		b.ring(p, 3)
	}
	for _, p := range r.parts {
		b.part(p, s.circuit.Source.Waveform)
	}
	for _, w := range r.swatches {
		b.swatch(w)
	}
	for _, w := range r.texts {
		b.write(w)
	}
}

// joints are the points where three or more conductors meet.
func (r *row) joints() []point {
	var order []point
	met := map[point]int{}
	end := func(p point) {
		if met[p]++; met[p] == 3 {
			order = append(order, p)
		}
	}
	for _, w := range r.wires {
		end(w.a)
		end(w.b)
	}
	for _, p := range r.parts {
		end(p.a)
		end(p.b)
	}
	for _, e := range r.earths {
		end(e)
	}
	return order
}

func (b brush) at(p point) vg.Point {
	return vg.Point{X: vg.Length(p.x), Y: vg.Length(b.bottom - p.y)}
}

func (b brush) ink(i ink, width float64) {
	b.SetColor(i)
	b.SetLineWidth(vg.Length(width))
	b.SetLineDash(nil, 0)
}

func (b brush) path(points ...point) vg.Path {
	var p vg.Path
	for k, q := range points {
		if k == 0 {
			p.Move(b.at(q))
		} else {
			p.Line(b.at(q))
		}
	}
	return p
}

func (b brush) lines(points ...point) { b.Stroke(b.path(points...)) }

func (b brush) closed(points ...point) vg.Path {
	p := b.path(points...)
	p.Close()
	return p
}

func (b brush) circle(p point, radius float64) vg.Path {
	var c vg.Path
	c.Move(b.at(point{p.x + radius, p.y}))
	c.Arc(b.at(p), vg.Length(radius), 0, 2*math.Pi)
	c.Close()
	return c
}

func (b brush) disc(p point, radius float64) { b.Fill(b.circle(p, radius)) }

// ring is a circle that hides what is behind it.
func (b brush) ring(p point, radius float64) {
	b.SetColor(paper)
	b.disc(p, radius)
	b.ink(line, 1.1)
	b.Stroke(b.circle(p, radius))
}

func box(low, high point) []point {
	return []point{low, {high.x, low.y}, high, {low.x, high.y}}
}

func (b brush) write(w written) {
	low, _ := w.box()
	b.SetColor(w.ink)
	b.FillString(face(w.size, w.bold), b.at(point{low.x, w.at.y}), w.s)
}

// flag is a pennant with the rail's name; it points the way the rail goes.
func (b brush) flag(f flag) {
	x, y := f.at.x, f.at.y
	const long, high = 44, 9
	start := x
	if f.enter {
		start = x - long
	}
	outline := b.closed(point{start, y - high}, point{start + long - 7, y - high}, point{start + long, y},
		point{start + long - 7, y + high}, point{start, y + high})
	b.SetColor(panel)
	b.Fill(outline)
	b.ink(line, 0.8)
	b.Stroke(outline)
	b.write(f.words())
	b.ink(line, 1.1)
}

// words is the name on the flag.
func (f flag) words() written {
	x := f.at.x + 19
	if f.enter {
		x = f.at.x - 25
	}
	return written{s: f.name, at: point{x, f.at.y + 3.6}, anchor: 0.5, size: letters - 0.5, ink: textInk}
}

// shade tints the ground behind a symbol.
func (b brush) shade(p placed) {
	s, ok := p.label.shade()
	if !ok {
		return
	}
	reach := p.reach()
	b.tint(point{p.middle.x - reach.x - 2, p.middle.y - reach.y - 2}, point{p.middle.x + reach.x + 2, p.middle.y + reach.y + 2}, s)
}

func (b brush) tint(low, high point, s shade) {
	outline := b.closed(box(low, high)...)
	b.SetColor(s.tint)
	b.Fill(outline)
	b.ink(s.edge, 1.2)
	var dashes []vg.Length
	for _, d := range s.dashes {
		dashes = append(dashes, vg.Length(d))
	}
	b.SetLineDash(dashes, 0)
	b.Stroke(outline)
	b.ink(line, 1.1)
}

func (b brush) swatch(w swatch) {
	b.tint(w.at, point{w.at.x + 16, w.at.y + 11}, w.shade)
}
