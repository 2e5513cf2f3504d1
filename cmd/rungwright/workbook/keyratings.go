package workbook

import (
	"fmt"
	"strings"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// keyRatings are the figures that a substitute must match, in a line.
func keyRatings(p *catalog.Part) string {
	var r ratingsLine
	switch {
	case p.Capacitor != nil:
		r.capacitor(p.Capacitor)
	case p.Diode != nil:
		r.diode(p.Diode)
	case p.Resistor != nil:
		r.resistor(p.Resistor)
	case p.Winding != nil:
		r.winding(p.Winding)
	}
	if p.Temperature.Most > p.Temperature.Least {
		r.add("%s to %s", p.Temperature.Least, p.Temperature.Most)
	}
	if s := p.Size; s.Length > 0 && s.Width > 0 && s.Height > 0 {
		r.add("%s × %s × %s mm", millimetres(s.Length), millimetres(s.Width), millimetres(s.Height))
	}
	if p.Mounting != "" {
		r.add("%s", p.Mounting)
	}
	return strings.Join(r, ", ")
}

type ratingsLine []string

func (r *ratingsLine) add(format string, args ...any) { *r = append(*r, fmt.Sprintf(format, args...)) }

// given adds a figure that the sheet states.
func given[Q quantity.Quantity](r *ratingsLine, format string, v Q) {
	if v != 0 {
		r.add(format, v)
	}
}

func (r *ratingsLine) capacitor(c *catalog.Capacitor) {
	given(r, "%s", c.Capacitance)
	given(r, "%s DC", c.Voltage)
	given(r, "%s AC", c.ACVoltage)
	given(r, "ripple %s", c.Ripple.Current)
	given(r, "ESR %s", c.ESR)
	if c.Life.Time > 0 {
		r.add("%.0f h at %s", float64(c.Life.Time)/3600, c.Life.Temperature)
	}
}

func (r *ratingsLine) diode(d *catalog.Diode) {
	given(r, "%s reverse", d.ReverseVoltage)
	given(r, "%s average", d.AverageCurrent)
	given(r, "%s surge", d.SurgeCurrent)
	given(r, "recovery %s", d.Recovery.Time)
	given(r, "junction %s", d.Junction)
}

func (r *ratingsLine) resistor(e *catalog.Resistor) {
	given(r, "%s", e.Resistance)
	given(r, "%s", e.Power)
	given(r, "%s working", e.WorkingVoltage)
	given(r, "pulse %s", e.PulseEnergy)
}

func (r *ratingsLine) winding(w *catalog.Winding) {
	given(r, "%s peak", w.Peak)
	given(r, "%s", w.Power)
	given(r, "%s", w.Resistance)
	if w.FrequencyMax > 0 {
		r.add("%s to %s", w.FrequencyMin, w.FrequencyMax)
	}
	if w.CentreTap {
		r.add("centre tap")
	}
	if w.Isolated {
		r.add("isolated")
	}
}

func millimetres(m quantity.Meters) string { return fmt.Sprintf("%.4g", float64(m)*1000) }
