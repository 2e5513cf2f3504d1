package report

import (
	"html/template"
	"math"

	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
)

func (s *subject) startUp() *ladder.StartUp {
	if s.e.StartUp != nil {
		return s.e.StartUp
	}
	return &s.d.StartUp
}

func (s *subject) switching() (template.HTML, error) {
	var list []figure
	for _, c := range []*Chart{s.riseChart(), s.fallChart()} {
		if c == nil {
			continue
		}
		f, err := shown(c, c.Summary, nil)
		if err != nil {
			return "", err
		}
		list = append(list, f)
	}
	return figures(list...)
}

func (s *subject) riseChart() *Chart {
	u := s.startUp()
	if len(u.Curve.Time) < 2 {
		return nil
	}
	c := &Chart{Name: "switch-on", Title: "Output from switch-on", X: Scale{Name: "time", Unit: quantity.Time, Zero: true, Tight: true}, Y: Scale{Name: s.outputName(), Unit: quantity.Voltage, Zero: true},
		Lines: []Trace{{Name: "highest of each period"}, {Name: "lowest of each period"}}}
	for k, t := range u.Curve.Time {
		c.Lines[0].add(t, u.Curve.High[k])
		c.Lines[1].add(t, u.Curve.Low[k])
	}
	c.Summary = "The output reaches " + volts(s.signed(u.HighestV)) + "."
	if !math.IsInf(u.RiseS, 0) && u.RiseS > 0 {
		c.Summary = "The output reaches its window after " + seconds(u.RiseS) + "."
		c.Limits = append(c.Limits, Limit{"in the window", u.RiseS, true})
	}
	if worst := worstSurge(u); worst.PeakA > 0 {
		c.Summary += " The hardest-hit diode, " + worst.Ref + ", takes " + amps(worst.PeakA) + " at its peak."
	}
	return c
}

func worstSurge(u *ladder.StartUp) ladder.Surge {
	var worst ladder.Surge
	for _, d := range u.Diodes {
		if d.PeakA > worst.PeakA {
			worst = d
		}
	}
	return worst
}

func (s *subject) fallChart() *Chart {
	off := s.e.Discharge
	if off == nil || len(off.Curve.Time) < 2 {
		return nil
	}
	c := &Chart{Name: "switch-off", Title: "Output after switch-off", X: Scale{Name: "time", Unit: quantity.Time, Zero: true, Tight: true}, Y: Scale{Name: s.outputName(), Unit: quantity.Voltage, Log: true},
		Lines: []Trace{{}}}
	for k, t := range off.Curve.Time {
		c.Lines[0].add(t, off.Curve.High[k])
	}
	below := float64(s.d.Supply.Output.Discharge.Below)
	if below > 0 {
		c.Limits = append(c.Limits, Limit{"wanted below", below, false})
	}
	if within := float64(s.d.Supply.Output.Discharge.Within); within > 0 {
		c.Limits = append(c.Limits, Limit{"wanted by", within, true})
	}
	if math.IsInf(off.Seconds, 0) {
		c.Summary = "The output does not fall below the wanted voltage in the time that was run; " + volts(off.EndV) + " stand at its end."
	} else {
		c.Summary = "The output is below the wanted voltage after " + seconds(off.Seconds) + "."
	}
	return c
}
