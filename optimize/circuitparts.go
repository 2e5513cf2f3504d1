package optimize

import (
	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
)

// readCapacitors reads one capacitor for all positions or a list of them, in
// the order C1, C2 …; each is a value or a mapping with what else is known.
func readCapacitors(m *form.Map) []ladder.Capacitor {
	var out []ladder.Capacitor
	for _, i := range m.List("capacitors") {
		if i.IsText() {
			out = append(out, ladder.Capacitor{C: float64(form.GetItem[quantity.Farads](i, form.Positive))})
			continue
		}
		out = append(out, readCapacitor(i.Map()))
	}
	return out
}

func readCapacitor(m *form.Map) ladder.Capacitor {
	m.Require("capacitance")
	c := ladder.Capacitor{
		C:   float64(form.Get[quantity.Farads](m, "capacitance", form.Positive)),
		ESR: float64(form.Get[quantity.Ohms](m, "series_resistance", form.NotNegative)),
	}
	if r := form.Get[quantity.Ohms](m, "insulation_resistance", form.Positive); r > 0 {
		c.Conductance = 1 / float64(r)
	}
	for _, i := range m.List("bias") {
		v, share := pair[quantity.Volts, quantity.Ratio](i, "[1.5 kV, 74 %]")
		c.Bias = append(c.Bias, ladder.BiasPoint{V: v, Share: share})
	}
	m.Done()
	return c
}

// diodeKey is diode, one for all, or diodes, one for each position.
func diodeKey(m *form.Map) string {
	if m.Has("diodes") {
		return "diodes"
	}
	return "diode"
}

func readDiodes(m *form.Map) []ladder.Diode {
	if diodeKey(m) == "diode" {
		m.Require("diode")
		if d := m.Map("diode"); d != nil {
			return []ladder.Diode{readDiode(d)}
		}
		return nil
	}
	if m.Has("diode") {
		m.Problem("diode", "diodes are given one by one as well; keep one of the two")
	}
	var out []ladder.Diode
	for _, d := range m.Maps("diodes") {
		out = append(out, readDiode(d))
	}
	return out
}

func readDiode(m *form.Map) ladder.Diode {
	m.Require("saturation_current", "ideality")
	d := ladder.Diode{
		IS:      float64(form.Get[quantity.Amps](m, "saturation_current", form.Positive)),
		N:       number(m, "ideality", form.Positive),
		RS:      float64(form.Get[quantity.Ohms](m, "series_resistance", form.NotNegative)),
		CJ0:     float64(form.Get[quantity.Farads](m, "junction_capacitance", form.NotNegative)),
		VJ:      float64(form.Get[quantity.Volts](m, "built_in_voltage", form.NotNegative)),
		M:       number(m, "grading", form.NotNegative),
		Transit: float64(form.Get[quantity.Seconds](m, "transit_time", form.NotNegative)),
	}
	if r := form.Get[quantity.Ohms](m, "leakage_resistance", form.Positive); r > 0 {
		d.Leakage = 1 / float64(r)
	}
	m.Done()
	return d
}
