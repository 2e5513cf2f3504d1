package workbook

import (
	"cmp"
	"maps"
	"slices"

	exact "github.com/shopspring/decimal"
	"github.com/xuri/excelize/v2"
)

// Where the charts stand, two abreast, and where their data begin.
const (
	chartsFirst  = 4
	chartRows    = 19
	chartColumns = 7
	dataColumn   = 16
	dataHead     = 4
)

// The series' colours, dashes and markers: told apart without colour too.
var (
	seriesInk  = []string{"0072B2", "D55E00", "009E73", "E69F00"}
	seriesDash = []excelize.LineDashType{excelize.LineDashSolid, excelize.LineDashDash, excelize.LineDashDot, excelize.LineDashLgDash}
	seriesSign = []string{"circle", "square", "triangle", "diamond"}
)

// curvesSheet draws what there is; nil when there is nothing.
func (b *book) curvesSheet() *sheet {
	plots := b.plots()
	if len(plots) == 0 {
		return nil
	}
	s := &sheet{name: sheetCurves, tab: "0072B2", portrait: true, widths: map[int]float64{}}
	for i := range dataColumn {
		s.widths[i] = 10
	}
	s.area = fixed(0, 1) + ":" + fixed(2*chartColumns-1, chartsFirst+(len(plots)+1)/2*chartRows)
	s.row(saying(title, "Curves"))
	s.row(saying(plain, "The numbers behind the charts stand to the right."))
	columns, heights := b.layOut(s, plots)
	for i, p := range plots {
		corner := at(i%2*chartColumns, chartsFirst+i/2*chartRows)
		s.charts = append(s.charts, placedChart{corner, p.chart(columns[i], heights[i])})
	}
	return s
}

// layOut writes the data of the plots beside each other and returns each
// one's first column and last row.
func (b *book) layOut(s *sheet, plots []plot) (columns, lasts []int) {
	next, longest := dataColumn, 0
	for _, p := range plots {
		columns, lasts = append(columns, next), append(lasts, dataHead+len(p.curve.X))
		next += 2 + len(p.curve.Series)
		longest = max(longest, len(p.curve.X))
	}
	names, heads := make([]cell, next), make([]cell, next)
	for i, p := range plots {
		names[columns[i]] = saying(label, p.title)
		heads[columns[i]] = saying(headerRight, p.xName)
		for j, series := range p.curve.Series {
			heads[columns[i]+1+j] = saying(headerRight, cmp.Or(series.Name, p.yName))
		}
	}
	s.row(names...)
	s.row(heads...)
	for r := range longest {
		cells := make([]cell, next)
		for i, p := range plots {
			if r < len(p.curve.X) {
				cells[columns[i]] = cell{style: measure, value: p.curve.X[r] * p.xScale}
				for j, series := range p.curve.Series {
					cells[columns[i]+1+j] = cell{style: measure, value: series.Y[r] * p.yScale}
				}
			}
		}
		s.row(cells...)
	}
	return columns, lasts
}

// chart is a scatter chart with lines over the plot's columns.
func (p plot) chart(column, last int) *excelize.Chart {
	font := excelize.Font{Family: face, Size: 9, Color: "404040"}
	words := func(text string, size float64, bold bool) []excelize.RichTextRun {
		return []excelize.RichTextRun{{Text: text, Font: &excelize.Font{Family: face, Size: size, Bold: bold, Color: "404040"}}}
	}
	axis := func(name string) excelize.ChartAxis {
		return excelize.ChartAxis{MajorGridLines: true, Font: font, Title: excelize.ChartTitle{Paragraph: words(name, 9, false)}}
	}
	c := &excelize.Chart{Type: excelize.Scatter, Title: excelize.ChartTitle{Paragraph: words(p.title, 12, true)},
		XAxis: axis(p.xName), YAxis: axis(p.yName), Legend: excelize.ChartLegend{Position: "none"},
		Dimension: excelize.ChartDimension{Width: 520, Height: 340}, Format: excelize.GraphicOptions{AltText: p.title + ": " + p.about, Name: p.title}}
	if len(p.curve.Series) > 1 {
		c.Legend = excelize.ChartLegend{Position: "bottom", Font: &font}
	}
	if p.logX {
		c.XAxis.Title.Paragraph = words(p.xName+logarithmic, 9, false)
	}
	if !p.logX { // no tick with a dozen decimals
		c.XAxis.NumFmt = excelize.ChartNumFmt{CustomNumFmt: "0.###"}
	}
	c.XAxis.TickLabelPosition = excelize.ChartTickLabelLow
	c.XAxis.Minimum = bound(p.curve.X, p.xScale, p.logX)
	for j := range p.curve.Series {
		c.Series = append(c.Series, p.series(j, column, last))
	}
	return c
}

// bound starts an axis at zero, or below where the values do, so that its ticks
// fall on round numbers.
func bound(x []float64, scale float64, log bool) *float64 {
	least := min(0, slices.Min(x)*scale)
	if log {
		least = 1
	}
	return &least
}

func (p plot) series(j, column, last int) excelize.ChartSeries {
	k := j % len(seriesInk)
	ink := excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{seriesInk[k]}}
	marker := excelize.ChartMarker{Symbol: "none"}
	if len(p.curve.X) <= 30 {
		marker = excelize.ChartMarker{Symbol: seriesSign[k], Size: 5, Fill: ink, Border: excelize.LineOptions{Type: excelize.LineSolid, Fill: ink}}
	}
	return excelize.ChartSeries{Name: of(sheetCurves, fixed(column+1+j, dataHead)),
		Categories: of(sheetCurves, span(column, dataHead+1, last)), Values: of(sheetCurves, span(column+1+j, dataHead+1, last)),
		Fill: ink, Marker: marker, Line: excelize.LineOptions{Type: excelize.LineSolid, Dash: seriesDash[k], Width: 1.75}}
}

func sortedKeys[K cmp.Ordered, V any](m map[K]V) []K { return slices.Sorted(maps.Keys(m)) }

func compare(a, b float64) int { return cmp.Compare(a, b) }

func decimalOf(n int) exact.Decimal { return exact.NewFromInt(int64(n)) }
