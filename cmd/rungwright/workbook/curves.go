package workbook

import (
	"math"
	"slices"

	"rungwright/optimize"
)

// plot is one chart with the data that it draws.
type plot struct {
	title, xName, yName string
	xScale, yScale      float64 // what the data are multiplied with for the sheet
	logX                bool
	curve               Curve
	about               string // for those who cannot see it
}

// plots gathers what there is to draw: what was handed in, else what the
// design's corners hold.
func (b *book) plots() []plot {
	var given Curves
	if b.options.Curves != nil {
		given = *b.options.Curves
	}
	d := b.design
	fallBack(&given.Regulation, func() Curve {
		return regulation(d, func(c optimize.Corner) float64 { return math.Abs(c.Steady.MeanV) })
	})
	fallBack(&given.Ripple, func() Curve { return regulation(d, func(c optimize.Corner) float64 { return c.Steady.RippleV }) })
	fallBack(&given.Waveform, func() Curve { return waveform(d) })
	fallBack(&given.StartUp, func() Curve { return startUp(d) })
	ampere, a := scale(given.Regulation.X)
	rippleAmpere, ra := scale(given.Ripple.X)
	second, t := scale(given.Waveform.X)
	rise, rt := scale(given.StartUp.X)
	all := []plot{
		{title: "Regulation", xName: "load (" + a + "A)", yName: "output (V)", xScale: ampere, yScale: 1, curve: given.Regulation, about: "output voltage against load current"},
		{title: "Ripple", xName: "load (" + ra + "A)", yName: "ripple, peak to peak (V)", xScale: rippleAmpere, yScale: 1, curve: given.Ripple, about: "ripple against load current"},
		{title: "Output over one period", xName: "time (" + t + "s)", yName: "output (V)", xScale: second, yScale: 1, curve: given.Waveform, about: "the output's waveform over one period of the source"},
		{title: "Start-up", xName: "time (" + rt + "s)", yName: "output (V)", xScale: rise, yScale: 1, curve: given.StartUp, about: "the output from switch-on"},
		{title: "Cost against quantity", xName: "units to build", yName: "cost for one unit (" + b.ledger.market.Currency + ")", xScale: 1, yScale: 1, logX: true,
			curve: b.costCurve(given.Quantities), about: "cost for one unit against the number of units, parts, delivery and fees included"},
	}
	return slices.DeleteFunc(all, func(p plot) bool { return len(p.curve.X) < 2 })
}

func fallBack(c *Curve, otherwise func() Curve) {
	if len(c.X) == 0 {
		*c = otherwise()
	}
}

// regulation draws a figure of the corners against their load, one series for
// each source level that was simulated at several loads.
func regulation(d *optimize.Design, figure func(optimize.Corner) float64) Curve {
	byLine := map[float64][]optimize.Corner{}
	for _, c := range d.Corners {
		byLine[c.Line] = append(byLine[c.Line], c)
	}
	var best []optimize.Corner
	for _, line := range sortedKeys(byLine) {
		if group := byLine[line]; len(group) > len(best) {
			best = group
		}
	}
	slices.SortStableFunc(best, func(a, b optimize.Corner) int { return compare(a.LoadA, b.LoadA) })
	best = slices.CompactFunc(best, func(a, b optimize.Corner) bool { return a.LoadA == b.LoadA })
	var curve Curve
	var y []float64
	for _, c := range best {
		curve.X, y = append(curve.X, c.LoadA), append(y, figure(c))
		curve.Note = "source at " + inUnit(c.Line, "%") + " of nominal"
	}
	curve.Series = []Series{{Name: curve.Note, Y: y}}
	return curve
}

// waveform is the first corner that kept its period.
func waveform(d *optimize.Design) Curve {
	for _, c := range d.Corners {
		if w := c.Steady.Waves; w != nil && len(w.Time) == len(w.Output) && len(w.Time) > 1 {
			return thin(Curve{X: w.Time, Series: []Series{{Name: c.Name, Y: w.Output}}, Note: c.Name}, 400)
		}
	}
	return Curve{}
}

// startUp is the output from switch-on, its highest and lowest value in every
// period.
func startUp(d *optimize.Design) Curve {
	e := d.StartUp.Curve
	if len(e.Time) < 2 {
		return Curve{}
	}
	return thin(Curve{X: e.Time, Series: []Series{{"highest", e.High}, {"lowest", e.Low}}}, 400)
}

// thin keeps at most n points of a curve, the last included.
func thin(c Curve, n int) Curve {
	if len(c.X) <= n {
		return c
	}
	pick := func(from []float64) []float64 {
		out := make([]float64, n)
		for i := range out {
			out[i] = from[i*(len(from)-1)/(n-1)]
		}
		return out
	}
	c.X = pick(c.X)
	c.Series = slices.Clone(c.Series)
	for i := range c.Series {
		c.Series[i].Y = pick(c.Series[i].Y)
	}
	return c
}

// costCurve re-prices the build at many quantities by the sheets' own rule.
func (b *book) costCurve(quantities []int) Curve {
	l := b.ledger
	shown := l.units
	defer func() { l.units = shown; l.reckon() }()
	if quantities == nil {
		quantities = usualQuantities(b.planned())
	}
	var c Curve
	var y []float64
	for _, n := range quantities {
		l.units = n
		l.reckon()
		if goods, charges, open := l.sums(); open == 0 {
			c.X = append(c.X, float64(n))
			y = append(y, l.market.Amount(goods+charges).DivRound(decimalOf(n), 4).InexactFloat64())
		}
	}
	c.Series = []Series{{Name: "cost for one unit", Y: y}}
	return c
}

// usualQuantities are some twelve a decade from 1 to 10,000, and the planned one.
func usualQuantities(planned int) []int {
	var all []int
	for _, decade := range []int{1, 10, 100, 1000} {
		for _, n := range []int{10, 12, 15, 18, 20, 25, 30, 40, 50, 60, 70, 80, 90} {
			if decade > 1 || n%10 == 0 {
				all = append(all, n*decade/10)
			}
		}
	}
	all = append(all, 10000, planned)
	slices.Sort(all)
	return slices.Compact(all)
}

// scale finds the prefix in which the largest value reads well.
func scale(values []float64) (factor float64, prefix string) {
	most := 0.0
	for _, v := range values {
		most = max(most, math.Abs(v))
	}
	switch {
	case most == 0 || most >= 1:
		return 1, ""
	case most >= 1e-3:
		return 1e3, "m"
	case most >= 1e-6:
		return 1e6, "µ"
	}
	return 1e9, "n"
}
