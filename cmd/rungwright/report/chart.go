package report

import (
	"bytes"
	"fmt"
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/vgimg"
)

// The size of a plot and of its text, in points.
const (
	chartWidth  = 440.0
	chartHeight = 270.0
	chartText   = 10.5
	strip       = 18.0 // above the plot, for the names of its lines
)

// Chart is one plot: lines, bars or marks, with limits to set them against.
type Chart struct {
	Name    string // of its file and in the page, "regulation"
	Title   string
	Summary string // what it shows, for who cannot see it
	X, Y    Scale
	Lines   []Trace
	Bars    []Bin
	Marks   []Mark
	Limits  []Limit
}

// Trace is a named line of points.
type Trace struct {
	Name string
	X, Y []float64
}

// Bin is a bar of a histogram.
type Bin struct{ From, To, Height float64 }

// Mark is a single point; a chosen one is drawn apart.
type Mark struct {
	X, Y   float64
	Text   string // what a reader is told at the point
	Chosen bool
}

// Limit is a straight line across the plot with its name.
type Limit struct {
	Name    string
	At      float64
	Upright bool
}

// SVG is the chart as a file.
func (c *Chart) SVG() ([]byte, error) { return c.svg(false) }

// svg is the chart as a file or as an element of the page.
func (c *Chart) svg(themed bool) ([]byte, error) {
	canvas := newSVG(chartWidth, chartHeight, themed)
	spots, err := c.draw(canvas)
	if err != nil {
		return nil, err
	}
	if themed {
		c.hotSpots(canvas, spots)
	}
	out := canvas.document(c.Name, c.Title, c.Summary)
	if themed && len(c.Marks) > 0 { // a picture's children are hidden from readers; a group's are not
		out = bytes.Replace(out, []byte(`role="img"`), []byte(`role="group"`), 1)
	}
	return out, nil
}

// PNG is the chart as a picture, dots being the pixels for each point of its
// size; zero: 2.
func (c *Chart) PNG(dots float64) ([]byte, error) {
	if dots <= 0 {
		dots = 2
	}
	canvas := vgimg.NewWith(vgimg.UseWH(chartWidth, chartHeight), vgimg.UseDPI(int(72*dots)))
	if _, err := c.draw(canvas); err != nil {
		return nil, err
	}
	var b bytes.Buffer
	if _, err := (vgimg.PngCanvas{Canvas: canvas}).WriteTo(&b); err != nil {
		return nil, fmt.Errorf("writing plot %s: %w", c.Name, err)
	}
	return b.Bytes(), nil
}

// draw puts the chart on a canvas and tells where its marks came to stand.
func (c *Chart) draw(on vg.CanvasSizer) ([]vg.Point, error) {
	p := plot.New()
	x, y := c.X.over(c.reach(false)), c.Y.over(c.reach(true))
	x.dress(&p.X, "x")
	y.dress(&p.Y, "y")
	p.BackgroundColor = paper
	lines := plotter.NewGrid()
	lines.Horizontal.Color, lines.Vertical.Color = grid, grid
	p.Add(lines)
	if err := c.add(p, x, y); err != nil {
		return nil, fmt.Errorf("plot %s: %w", c.Name, err)
	}
	p.X.Min, p.X.Max, p.Y.Min, p.Y.Max = x.low, x.high, y.low, y.high
	all := draw.New(on)
	inner := draw.Crop(all, 4, -12, 4, -strip-4)
	all.SetColor(paper)
	all.Fill(all.Rectangle.Path())
	p.Draw(inner)
	data := p.DataCanvas(inner)
	c.writeLimits(data, p, x, y)
	c.writeNames(all)
	tx, ty := p.Transforms(&data)
	var spots []vg.Point
	for _, m := range c.Marks {
		spots = append(spots, vg.Point{X: tx(m.X / x.unit), Y: ty(m.Y / y.unit)})
	}
	return spots, nil
}

// reach is the range of all that is drawn, along x or y.
func (c *Chart) reach(upright bool) (low, high float64) {
	low, high = math.Inf(1), math.Inf(-1)
	take := func(x, y float64) {
		if upright {
			x = y
		}
		if !math.IsNaN(x) && !math.IsInf(x, 0) {
			low, high = min(low, x), max(high, x)
		}
	}
	for _, l := range c.Lines {
		for k := range l.X {
			take(l.X[k], l.Y[k])
		}
	}
	for _, b := range c.Bars {
		take(b.From, 0)
		take(b.To, b.Height)
	}
	for _, m := range c.Marks {
		take(m.X, m.Y)
	}
	for _, l := range c.Limits {
		if l.Upright != upright {
			low, high = min(low, l.At), max(high, l.At)
		}
	}
	return low, high
}

// add puts lines, bars and marks on the plot.
func (c *Chart) add(p *plot.Plot, x, y fitted) error {
	for _, b := range c.Bars {
		area, err := plotter.NewPolygon(plotter.XYs{{X: b.From / x.unit, Y: 0}, {X: b.From / x.unit, Y: b.Height / y.unit},
			{X: b.To / x.unit, Y: b.Height / y.unit}, {X: b.To / x.unit, Y: 0}})
		if err != nil {
			return err
		}
		area.Color, area.LineStyle = bluish, draw.LineStyle{Color: blue, Width: 0.8}
		p.Add(area)
	}
	for _, l := range c.Limits {
		ends := plotter.XYs{{X: x.low, Y: l.At / y.unit}, {X: x.high, Y: l.At / y.unit}}
		if l.Upright {
			ends = plotter.XYs{{X: l.At / x.unit, Y: y.low}, {X: l.At / x.unit, Y: y.high}}
		}
		if err := addLine(p, ends, draw.LineStyle{Color: alarm, Width: 1, Dashes: []vg.Length{1.5, 2.5}}); err != nil {
			return err
		}
	}
	for k, l := range c.Lines {
		if err := addLine(p, l.scaled(x, y), lineStyle(k)); err != nil {
			return err
		}
	}
	return c.addMarks(p, x, y)
}

// scaled is the trace in the scales' units, without points that have no
// place.
func (l Trace) scaled(x, y fitted) plotter.XYs {
	var out plotter.XYs
	for k := range l.X {
		px, py := l.X[k]/x.unit, l.Y[k]/y.unit
		if math.IsNaN(px+py) || math.IsInf(px+py, 0) || x.log && px <= 0 || y.log && py <= 0 {
			continue
		}
		out = append(out, plotter.XY{X: px, Y: max(py, y.low)})
	}
	return out
}

func addLine(p *plot.Plot, points plotter.XYs, style draw.LineStyle) error {
	if len(points) == 0 {
		return nil
	}
	l, err := plotter.NewLine(points)
	if err != nil {
		return err
	}
	l.LineStyle = style
	p.Add(l)
	return nil
}

// lineStyle is the ink and the dashes of line k: two lines differ in both.
func lineStyle(k int) draw.LineStyle {
	dashes := [][]vg.Length{nil, {6, 3}, {2, 2}, {8, 2, 2, 2}}
	return draw.LineStyle{Color: lineInks[k%len(lineInks)], Width: 1.6, Dashes: dashes[k%len(dashes)]}
}

func (c *Chart) addMarks(p *plot.Plot, x, y fitted) error {
	for _, m := range c.Marks {
		s, err := plotter.NewScatter(plotter.XYs{{X: m.X / x.unit, Y: m.Y / y.unit}})
		if err != nil {
			return err
		}
		s.GlyphStyle = draw.GlyphStyle{Color: blue, Radius: 3.5, Shape: draw.CircleGlyph{}}
		if m.Chosen {
			s.GlyphStyle = draw.GlyphStyle{Color: red, Radius: 5, Shape: draw.PyramidGlyph{}}
		}
		p.Add(s)
	}
	return nil
}

// writeLimits names the limits at their lines, inside the plot. A name that
// would meet another steps down.
func (c *Chart) writeLimits(data draw.Canvas, p *plot.Plot, x, y fitted) {
	tx, ty := p.Transforms(&data)
	var taken []vg.Rectangle
	for _, l := range c.Limits {
		const size = chartText - 1
		name := fit(neutral(l.Name), size, false, 150)
		long := vg.Length(width(name, size, false))
		at := vg.Point{X: data.Max.X - long - 3, Y: min(ty(l.At/y.unit)+3, data.Max.Y-11)}
		if l.Upright {
			at = vg.Point{X: tx(l.At/x.unit) + 4, Y: data.Max.Y - 11}
			if at.X+long > data.Max.X {
				at.X = tx(l.At/x.unit) - long - 4
			}
		}
		at = clearOf(taken, at, long, size)
		taken = append(taken, nameBox(at, long, size))
		data.SetColor(alarm)
		data.FillString(face(size, false), at, name)
	}
}

// nameBox is what a name covers.
func nameBox(at vg.Point, long, size vg.Length) vg.Rectangle {
	return vg.Rectangle{Min: vg.Point{X: at.X - 4, Y: at.Y - 3}, Max: vg.Point{X: at.X + long + 4, Y: at.Y + size}}
}

// clearOf moves a name down until it meets none of those that stand.
func clearOf(taken []vg.Rectangle, at vg.Point, long, size vg.Length) vg.Point {
	for k := 0; k < len(taken); k++ {
		b, t := nameBox(at, long, size), taken[k]
		if b.Min.X < t.Max.X && t.Min.X < b.Max.X && b.Min.Y < t.Max.Y && t.Min.Y < b.Max.Y {
			at.Y = t.Min.Y - size
			k = -1
		}
	}
	return at
}

// writeNames writes the names of the lines in the strip above the plot, each
// behind a piece of its line.
func (c *Chart) writeNames(all draw.Canvas) {
	x, y := all.Min.X+10, all.Max.Y-13
	for k, l := range c.Lines {
		if l.Name == "" {
			continue
		}
		all.StrokeLine2(lineStyle(k), x, y+3, x+22, y+3)
		all.SetColor(textInk)
		name := fit(neutral(l.Name), chartText, false, 150)
		all.FillString(face(chartText, false), vg.Point{X: x + 27, Y: y}, name)
		x += vg.Length(27 + width(name, chartText, false) + 16)
	}
}

// hotSpots lays points that can be hovered over and reached by keys over the
// marks.
func (c *Chart) hotSpots(canvas *svgCanvas, spots []vg.Point) {
	for k, at := range spots {
		x, y := canvas.place(at)
		words := escaped(c.Marks[k].Text)
		fmt.Fprintf(&canvas.buf, `<g class="spot" tabindex="0" role="img" aria-label="%s" data-words="%s"><title>%s</title><circle cx="%s" cy="%s" r="11"/></g>`+"\n",
			words, words, words, number(x), number(y))
	}
}
