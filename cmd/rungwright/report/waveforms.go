package report

import (
	"html/template"
	"math"
	"strconv"

	"rungwright/catalog/quantity"
)

func (s *subject) waveforms() (template.HTML, error) {
	output := s.waveChart()
	if output == nil {
		return "", nil
	}
	a, err := shown(output, output.Summary, nil)
	if err != nil {
		return "", err
	}
	list := []figure{a}
	if currents := s.currentChart(); currents != nil {
		b, err := shown(currents, currents.Summary, nil)
		if err != nil {
			return "", err
		}
		list = append(list, b)
	}
	return figures(list...)
}

func (s *subject) waveChart() *Chart {
	w := s.waves()
	if w == nil || len(w.Time) < 2 || len(w.Output) != len(w.Time) {
		return nil
	}
	c := &Chart{Name: "waveform", Title: "Output over one period", X: Scale{Name: "time", Unit: quantity.Time, Zero: true, Tight: true}, Y: Scale{Name: s.outputName(), Unit: quantity.Voltage},
		Lines: []Trace{{X: w.Time}}}
	low, high := math.Inf(1), 0.0
	for _, v := range w.Output {
		v = math.Abs(v)
		low, high = min(low, v), max(high, v)
		c.Lines[0].Y = append(c.Lines[0].Y, v)
	}
	c.Summary = "Over one period the output moves by " + quantity.Format(high-low, quantity.Voltage, 3) + "."
	return c
}

// currentChart shows the source's current and those of the first and last
// diode.
func (s *subject) currentChart() *Chart {
	w := s.waves()
	if w == nil || len(w.Source) == 0 || len(w.Source[0]) != len(w.Time) || len(w.Time) < 2 {
		return nil
	}
	c := &Chart{Name: "currents", Title: "Currents over one period", X: Scale{Name: "time", Unit: quantity.Time, Zero: true, Tight: true}, Y: Scale{Name: "current", Unit: quantity.Current, Zero: true}}
	for k := range w.Source {
		name := "source"
		if len(w.Source) > 1 {
			name = "winding end " + strconv.Itoa(k+1)
		}
		c.Lines = append(c.Lines, Trace{name, w.Time, w.Source[k]})
	}
	if n := len(w.Diode); n > 0 {
		c.Lines = append(c.Lines, Trace{"D1", w.Time, w.Diode[0]})
		if n > 1 && len(c.Lines) < len(lineInks) {
			c.Lines = append(c.Lines, Trace{"D" + strconv.Itoa(n), w.Time, w.Diode[n-1]})
		}
	}
	peak := 0.0
	for _, i := range w.Source[0] {
		peak = max(peak, math.Abs(i))
	}
	c.Summary = "The source's current peaks at " + amps(peak) + "."
	return c
}
