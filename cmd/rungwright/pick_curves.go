package main

import (
	"context"
	"math"

	"rungwright/cmd/rungwright/workbook"
	"rungwright/optimize"
)

// curves are what the workbook draws of a design beside what it carries: the
// regulation with its ripple, and one period of the output. What does not
// come out is left away; the parts and their order do not hang on it.
func curves(ctx context.Context, d *optimize.Design) *workbook.Curves {
	out := &workbook.Curves{}
	if r, err := d.Regulation(ctx); err == nil && len(r.Points) > 1 {
		var x, mean, ripple []float64
		for _, p := range r.Points {
			x, mean, ripple = append(x, p.LoadA), append(mean, p.MeanV), append(ripple, p.RippleV)
		}
		note := "nominal parts, nominal line, bleeder included"
		out.Regulation = workbook.Curve{X: x, Series: []workbook.Series{{Name: "output", Y: mean}}, Note: note}
		out.Ripple = workbook.Curve{X: x, Series: []workbook.Series{{Name: "ripple, peak to peak", Y: ripple}}, Note: note}
	}
	if s, err := d.Period(ctx); err == nil && s.Waves != nil {
		y := make([]float64, len(s.Waves.Output))
		for i, v := range s.Waves.Output {
			y[i] = math.Abs(v)
		}
		out.Waveform = workbook.Curve{X: s.Waves.Time, Series: []workbook.Series{{Name: "output", Y: y}}, Note: "full load, nominal line"}
	}
	return out
}
