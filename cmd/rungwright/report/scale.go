package report

import (
	"math"
	"strconv"
	"strings"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"rungwright/catalog/quantity"
)

// Scale says what an axis measures.
type Scale struct {
	Name   string
	Unit   quantity.Dimension // prefixed to suit the values
	Symbol string             // instead of a dimension's: "EUR"
	Zero   bool               // begins at zero
	Tight  bool               // ends where the values end
	Log    bool
}

// fitted is a scale over the values that it must hold, in its printed unit.
type fitted struct {
	Scale
	unit      float64 // SI units in one printed unit
	symbol    string
	low, high float64
	step      float64
	log       bool
}

// over fits the scale to a range of values.
func (s Scale) over(low, high float64) fitted {
	if !(low <= high) {
		low, high = 0, 1
	}
	if s.Zero {
		low, high = min(0, low), max(0, high)
		if -low < 0.08*high { // a trace of the other sign does not ask for room
			low = 0
		}
	}
	f := fitted{Scale: s, unit: 1, symbol: s.Symbol, log: s.Log && low > 0}
	if s.Symbol == "" {
		f.unit, f.symbol = prefix(max(math.Abs(low), math.Abs(high)), s.Unit)
	}
	f.low, f.high = low/f.unit, high/f.unit
	if f.log {
		f.low, f.high = f.low/1.15, f.high*1.15
		return f
	}
	if f.high-f.low < 1e-9*max(math.Abs(f.low), math.Abs(f.high), 1e-12) { // one value alone
		wide := max(0.05*math.Abs(f.low), 1e-9)
		f.low, f.high = f.low-wide, f.high+wide
	}
	f.step = niceStep(f.high - f.low)
	if f.low != 0 || !s.Zero {
		f.low = math.Floor(f.low/f.step+1e-9) * f.step
	}
	if !s.Tight {
		f.high = math.Ceil(f.high/f.step-1e-9) * f.step
	}
	return f
}

// niceStep divides a range into four to eight steps of 1, 2, 2.5 or 5 times a
// power of ten.
func niceStep(span float64) float64 {
	ten := math.Pow(10, math.Floor(math.Log10(span/5)))
	for _, k := range []float64{1, 2, 2.5, 5} {
		if span/(k*ten) <= 6.5 {
			return k * ten
		}
	}
	return 10 * ten
}

// prefix is the SI prefix that suits a magnitude, with the unit it makes.
func prefix(most float64, d quantity.Dimension) (float64, string) {
	if d == quantity.Proportion {
		return 0.01, "%"
	}
	symbol := d.Unit()
	if d == quantity.None || d == quantity.Temperature || most == 0 {
		return 1, symbol
	}
	for _, p := range []struct {
		ten    float64
		letter string
	}{{1e6, "M"}, {1e3, "k"}, {1, ""}, {1e-3, "m"}, {1e-6, "µ"}, {1e-9, "n"}} {
		if most >= p.ten {
			return p.ten, p.letter + symbol
		}
	}
	return 1, symbol
}

// label is the axis's name with its unit.
func (f fitted) label() string {
	if f.symbol == "" {
		return f.Name
	}
	return f.Name + " [" + f.symbol + "]"
}

// dress gives an axis of the plotting library its style and ticks.
func (f fitted) dress(a *plot.Axis, which string) {
	a.Label.Text = fit(strings.Join(strings.Fields(neutral(f.label())), " "), chartText, false, 220)
	a.Padding = 0
	a.LineStyle = draw.LineStyle{Color: line, Width: 0.8}
	a.Tick.LineStyle = a.LineStyle
	a.Tick.Length = 4
	a.Tick.Marker = f
	for _, s := range []*text.Style{&a.Label.TextStyle, &a.Tick.Label} {
		s.Font = sans(chartText, false)
		s.Color = faint
	}
	a.Tick.Label.Color = textInk
	if which == "x" {
		a.Label.Padding = 2
	} else {
		a.Label.Padding = vg.Length(3)
	}
	if f.log {
		a.Scale = plot.LogScale{}
	}
}

// Ticks are the axis's marks, for the plotting library.
func (f fitted) Ticks(low, high float64) []plot.Tick {
	var out []plot.Tick
	if f.log {
		return logTicks(low, high)
	}
	for k := math.Ceil(low/f.step - 1e-9); k*f.step <= high*(1+1e-12)+1e-9*f.step; k++ {
		out = append(out, plot.Tick{Value: k * f.step, Label: tickText(k*f.step, f.step)})
	}
	return out
}

// tickText writes a tick with as many decimals as the step has.
func tickText(v, step float64) string {
	decimals := 0
	for s := step; decimals < 9 && math.Abs(s-math.Round(s)) > 1e-6; s *= 10 {
		decimals++
	}
	if math.Abs(v) < step/2 {
		v = 0
	}
	return minus(strconv.FormatFloat(v, 'f', decimals, 64))
}

// logTicks are 1, 2 and 5 of each decade, or the decades alone when they are
// many.
func logTicks(low, high float64) []plot.Tick {
	var out []plot.Tick
	marks := []float64{1, 2, 5}
	if high/low > 1e3 {
		marks = marks[:1]
	}
	for ten := math.Pow(10, math.Floor(math.Log10(low))); ten <= high; ten *= 10 {
		for _, m := range marks {
			if v := m * ten; v >= low && v <= high {
				out = append(out, plot.Tick{Value: v, Label: strconv.FormatFloat(v, 'g', 6, 64)})
			}
		}
	}
	return out
}
