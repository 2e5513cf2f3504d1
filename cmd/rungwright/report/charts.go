package report

import (
	"rungwright/optimize"
	"rungwright/optimize/ladder"
)

// Charts are all plots of a design and its studies, for files.
func Charts(d *optimize.Design, e Extras) []*Chart {
	s := &subject{d: d, e: e}
	var out []*Chart
	for _, make := range []func() *Chart{s.frontChart, s.outputChart, s.rippleChart, s.waveChart, s.currentChart, s.riseChart, s.fallChart, s.quantityChart, s.toleranceChart} {
		if c := make(); c != nil {
			out = append(out, c)
		}
	}
	return out
}

func (l *Trace) add(x, y float64) { l.X, l.Y = append(l.X, x), append(l.Y, y) }

// waves are those of a period at full load, from where they are.
func (s *subject) waves() *ladder.Waves {
	switch {
	case s.e.Waves != nil:
		return s.e.Waves
	case s.e.Nominal != nil && s.e.Nominal.Waves != nil:
		return s.e.Nominal.Waves
	}
	for k := range s.d.Corners {
		if w := s.d.Corners[k].Steady.Waves; w != nil {
			return w
		}
	}
	return nil
}
