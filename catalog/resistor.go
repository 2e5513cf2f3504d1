package catalog

import (
	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// Resistor is what a resistor's sheet says. Zero means not stated.
type Resistor struct {
	Technology     string // metal film, thick film, metal oxide, wirewound, carbon composition
	Resistance     quantity.Ohms
	ToleranceLow   quantity.Ratio
	ToleranceHigh  quantity.Ratio
	Power          quantity.Watts   // at PowerAt
	PowerAt        quantity.Celsius // zero: 70 °C; falls in a line to zero at Temperature.Most
	WorkingVoltage quantity.Volts   // the limiting element voltage
	PulseEnergy    quantity.Joules  // one pulse
}

func readResistor(p *Part, m *form.Map) {
	m.Require("resistance", "power")
	r := &Resistor{
		Technology:     text(m, "technology", mostName),
		Resistance:     get(m, "resistance", form.Positive, mostResistance),
		Power:          get(m, "power", form.Positive, mostPower),
		PowerAt:        get(m, "power_at", form.Any, mostCelsius),
		WorkingVoltage: get(m, "working_voltage", form.Positive, mostVoltage),
		PulseEnergy:    form.Get[quantity.Joules](m, "pulse_energy", form.Positive),
	}
	r.ToleranceLow, r.ToleranceHigh = readTolerance(m, 0)
	if p.Temperature.Most != 0 && r.PowerAt >= p.Temperature.Most {
		m.Problem("power_at", "%v is not below the highest temperature, %v; the power falls to zero between the two",
			r.PowerAt, p.Temperature.Most)
	}
	p.Resistor = r
}

func resistorTitle(p *Part) string {
	r := p.Resistor
	volts := ""
	if r.WorkingVoltage > 0 {
		volts = r.WorkingVoltage.String()
	}
	return join(r.Resistance.String(), quantity.Tolerance{Low: r.ToleranceLow, High: r.ToleranceHigh}.String(),
		r.Power.String(), volts, r.Technology, "resistor")
}
