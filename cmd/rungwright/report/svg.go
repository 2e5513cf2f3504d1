package report

import (
	"bytes"
	"fmt"
	"html"
	"image"
	"image/color"
	"math"
	"strconv"
	"strings"

	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/vg"
)

// svgCanvas writes SVG. The library's own writer puts colours into style
// attributes, which the page's policy forbids and which a dark page could not
// change; this one writes classes (themed) or plain attributes.
type svgCanvas struct {
	width, height float64
	themed        bool
	buf           bytes.Buffer
	now           pen
	stack         []pen
}

// pen is the state that Push saves.
type pen struct {
	width float64
	dash  []vg.Length
	ink   color.Color
	to    matrix
}

// matrix maps x, y to a·x+c·y+e, b·x+d·y+f.
type matrix struct{ a, b, c, d, e, f float64 }

var _ vg.CanvasSizer = (*svgCanvas)(nil)

func newSVG(width, height float64, themed bool) *svgCanvas {
	c := &svgCanvas{width: width, height: height, themed: themed, now: pen{to: matrix{a: 1, d: 1}}}
	vg.Initialize(c)
	return c
}

// Size is the size in points.
func (c *svgCanvas) Size() (x, y vg.Length) { return vg.Length(c.width), vg.Length(c.height) }

// SetLineWidth sets the width of strokes.
func (c *svgCanvas) SetLineWidth(w vg.Length) { c.now.width = w.Points() }

// SetLineDash sets the dashes of strokes.
func (c *svgCanvas) SetLineDash(pattern []vg.Length, _ vg.Length) { c.now.dash = pattern }

// SetColor sets the ink.
func (c *svgCanvas) SetColor(k color.Color) {
	if k == nil {
		k = color.Black
	}
	c.now.ink = k
}

// Rotate turns what follows, anticlockwise.
func (c *svgCanvas) Rotate(rad float64) {
	sin, cos := math.Sincos(rad)
	c.join(matrix{cos, sin, -sin, cos, 0, 0})
}

// Translate moves what follows.
func (c *svgCanvas) Translate(p vg.Point) { c.join(matrix{1, 0, 0, 1, p.X.Points(), p.Y.Points()}) }

// Scale stretches what follows.
func (c *svgCanvas) Scale(x, y float64) { c.join(matrix{x, 0, 0, y, 0, 0}) }

func (c *svgCanvas) join(m matrix) {
	t := c.now.to
	c.now.to = matrix{t.a*m.a + t.c*m.b, t.b*m.a + t.d*m.b, t.a*m.c + t.c*m.d, t.b*m.c + t.d*m.d,
		t.a*m.e + t.c*m.f + t.e, t.b*m.e + t.d*m.f + t.f}
}

// Push keeps the state for Pop.
func (c *svgCanvas) Push() { c.stack = append(c.stack, c.now) }

// Pop restores it.
func (c *svgCanvas) Pop() {
	c.now = c.stack[len(c.stack)-1]
	c.stack = c.stack[:len(c.stack)-1]
}

// Stroke draws along a path.
func (c *svgCanvas) Stroke(p vg.Path) {
	if c.now.width <= 0 {
		return
	}
	dash := ""
	if len(c.now.dash) > 0 {
		var parts []string
		for _, d := range c.now.dash {
			parts = append(parts, number(d.Points()))
		}
		dash = ` stroke-dasharray="` + strings.Join(parts, " ") + `"`
	}
	fmt.Fprintf(&c.buf, `<path d="%s" fill="none" %s stroke-width="%s"%s/>`+"\n", c.trace(p), c.paint("stroke", "k-"), number(c.now.width), dash)
}

// Fill fills a path.
func (c *svgCanvas) Fill(p vg.Path) {
	fmt.Fprintf(&c.buf, `<path d="%s" %s/>`+"\n", c.trace(p), c.paint("fill", "f-"))
}

// FillString writes text from a point on its base line.
func (c *svgCanvas) FillString(f font.Face, at vg.Point, s string) {
	if f.Font.Size == 0 || s == "" {
		return
	}
	x, y := c.place(at)
	more := ""
	if turn := math.Atan2(c.now.to.b, c.now.to.a); math.Abs(turn) > 1e-9 {
		more = fmt.Sprintf(` transform="rotate(%s %s %s)"`, number(-turn*180/math.Pi), number(x), number(y))
	}
	if f.Font.Weight > 0 {
		more += ` font-weight="bold"`
	}
	fmt.Fprintf(&c.buf, `<text x="%s" y="%s" font-size="%s" %s%s>%s</text>`+"\n", number(x), number(y),
		number(f.Font.Size.Points()), c.paint("fill", "f-"), more, escaped(s))
}

// DrawImage is not needed: nothing here draws pictures.
func (c *svgCanvas) DrawImage(vg.Rectangle, image.Image) { panic("report: no pictures in drawings") }

// paint is the ink as a class or, in a file, as an attribute.
func (c *svgCanvas) paint(attribute, prefix string) string {
	if i, ok := c.now.ink.(ink); ok && c.themed {
		return `class="` + prefix + i.name + `"`
	}
	k := color.NRGBAModel.Convert(c.now.ink).(color.NRGBA)
	return fmt.Sprintf(`%s="%s"`, attribute, hex(uint32(k.R)<<16|uint32(k.G)<<8|uint32(k.B)))
}

// place is a point in the file's coordinates, y downward.
func (c *svgCanvas) place(p vg.Point) (x, y float64) {
	px, py, t := p.X.Points(), p.Y.Points(), c.now.to
	return t.a*px + t.c*py + t.e, c.height - (t.b*px + t.d*py + t.f)
}

// trace writes a path's data.
func (c *svgCanvas) trace(p vg.Path) string {
	var b strings.Builder
	to := func(letter string, points ...vg.Point) {
		b.WriteString(letter)
		for k, q := range points {
			if k > 0 {
				b.WriteByte(' ')
			}
			x, y := c.place(q)
			b.WriteString(number(x) + " " + number(y))
		}
	}
	for _, s := range p {
		switch s.Type {
		case vg.MoveComp:
			to("M", s.Pos)
		case vg.LineComp:
			to("L", s.Pos)
		case vg.CurveComp:
			letter := "Q"
			if len(s.Control) == 2 {
				letter = "C"
			}
			to(letter, append(append([]vg.Point(nil), s.Control...), s.Pos)...)
		case vg.ArcComp:
			// Two halves, for one arc command cannot close a circle.
			c.arc(&b, s, to)
		case vg.CloseComp:
			b.WriteString("Z")
		}
	}
	return b.String()
}

// arc writes an arc in two halves.
func (c *svgCanvas) arc(b *strings.Builder, s vg.PathComp, to func(string, ...vg.Point)) {
	at := func(angle float64) vg.Point {
		sin, cos := math.Sincos(angle)
		return vg.Point{X: s.Pos.X + s.Radius*vg.Length(cos), Y: s.Pos.Y + s.Radius*vg.Length(sin)}
	}
	start := "L"
	if b.Len() == 0 {
		start = "M"
	}
	to(start, at(s.Start))
	sweep := "0" // anticlockwise is against SVG's sense, for y turns over
	if s.Angle < 0 {
		sweep = "1"
	}
	r := number(s.Radius.Points() * math.Hypot(c.now.to.a, c.now.to.b))
	for _, part := range []float64{0.5, 1} {
		to("A"+r+" "+r+" 0 0 "+sweep+" ", at(s.Start+part*s.Angle))
	}
}

// number writes a coordinate to a hundredth of a point.
func number(x float64) string {
	s := strconv.FormatFloat(x, 'f', 2, 64)
	s = strings.TrimSuffix(strings.TrimRight(s, "0"), ".")
	if s == "-0" {
		return "0"
	}
	return s
}

// open starts a group with a title, which browsers show on hover and readers
// speak.
func (c *svgCanvas) open(title string) {
	fmt.Fprintf(&c.buf, "<g><title>%s</title>\n", escaped(title))
}

func (c *svgCanvas) shut() { c.buf.WriteString("</g>\n") }

// document is the whole: an SVG file, or an element of the page. The
// description is what someone who cannot see it is told; id must be unique in
// the page.
func (c *svgCanvas) document(id, title, description string) []byte {
	var b bytes.Buffer
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 %s %s" width="%s" height="%s" font-family="%s" role="img" aria-labelledby="%s-t %s-d">`+"\n",
		number(c.width), number(c.height), number(c.width), number(c.height), families, id, id)
	fmt.Fprintf(&b, "<title id=\"%s-t\">%s</title>\n<desc id=\"%s-d\">%s</desc>\n", id, escaped(title), id, escaped(description))
	if !c.themed {
		fmt.Fprintf(&b, `<rect width="%s" height="%s" fill="%s"/>`+"\n", number(c.width), number(c.height), hex(paper.light))
	}
	b.Write(c.buf.Bytes())
	b.WriteString("</svg>\n")
	return b.Bytes()
}

// escaped is text from outside as an SVG file may carry it.
func escaped(s string) string { return html.EscapeString(neutral(s)) }
