package catalog

import (
	"strings"

	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// Technology is a capacitor's dielectric family.
type Technology string

// The capacitor technologies.
const (
	CeramicClass1         Technology = "ceramic class 1"
	CeramicClass2         Technology = "ceramic class 2"
	Film                  Technology = "film"
	AluminiumElectrolytic Technology = "aluminium electrolytic"
	Mica                  Technology = "mica"
	Tantalum              Technology = "tantalum"
)

var technologies = []Technology{CeramicClass1, CeramicClass2, Film, AluminiumElectrolytic, Mica, Tantalum}

// Capacitor is what a capacitor's sheet says. Zero means not stated;
// nothing is filled in for it.
type Capacitor struct {
	Technology     Technology
	Characteristic string // X7R, C0G, polypropylene …
	Capacitance    quantity.Farads
	ToleranceLow   quantity.Ratio // 0.2 for −20 %
	ToleranceHigh  quantity.Ratio // 0.8 for +80 %
	Voltage        quantity.Volts // rated DC
	ACVoltage      quantity.Volts // rated AC, RMS
	Bias           []BiasPoint    // rising voltage from 0 V, share of Capacitance that never rises from 100 %
	LossFactor     quantity.Ratio // tan δ at LossAt
	LossAt         quantity.Hertz
	ESR            quantity.Ohms
	Leakage        quantity.Amps // at rated voltage
	Slew           quantity.VoltPerSecond
	Ageing         quantity.Ratio // loss per decade of hours
	Ripple         RippleRating
	Life           LifeRating
}

// BiasPoint is the share of the marked capacitance left at a DC voltage.
type BiasPoint struct {
	Voltage quantity.Volts
	Share   quantity.Ratio
}

// RippleRating is the maker's RMS ripple current, with multipliers for other
// frequencies (rising frequency).
type RippleRating struct {
	Current     quantity.Amps
	Frequency   quantity.Hertz
	Temperature quantity.Celsius
	CoreRise    quantity.Kelvins // inner temperature rise at rated ripple; zero: 5 K assumed
	Multipliers []FrequencyFactor
}

// FrequencyFactor multiplies the rated ripple current at a frequency.
type FrequencyFactor struct {
	Frequency quantity.Hertz
	Factor    quantity.Ratio
}

// LifeRating is the maker's endurance: hours at a temperature.
type LifeRating struct {
	Time        quantity.Seconds
	Temperature quantity.Celsius
}

func readCapacitor(p *Part, m *form.Map) {
	m.Require("technology", "capacitance", "voltage")
	c := &Capacitor{
		Technology:     Technology(m.Choice("technology", words(technologies)...)),
		Characteristic: text(m, "characteristic", mostName),
		Capacitance:    get(m, "capacitance", form.Positive, mostCapacitance),
		Voltage:        get(m, "voltage", form.Positive, mostVoltage),
		ACVoltage:      get(m, "ac_voltage", form.Positive, mostVoltage),
		Bias:           readBias(m),
		LossFactor:     form.Get[quantity.Ratio](m, "loss_factor", form.Fraction),
		LossAt:         form.Get[quantity.Hertz](m, "loss_at", form.Positive),
		ESR:            get(m, "esr", form.Positive, mostResistance),
		Leakage:        get(m, "leakage", form.NotNegative, mostCurrent),
		Slew:           form.Get[quantity.VoltPerSecond](m, "slew", form.Positive),
		Ageing:         form.Get[quantity.Ratio](m, "ageing", form.Fraction),
		Ripple:         readRipple(m.Map("ripple")),
		Life:           readLife(m.Map("life")),
	}
	c.ToleranceLow, c.ToleranceHigh = readTolerance(m, c.Capacitance)
	p.Capacitor = c
}

// readBias reads a curve that starts at 0 V and 100 % and never rises.
func readBias(m *form.Map) []BiasPoint {
	points, ok := curve[quantity.Volts, quantity.Ratio](m, "bias", "[1.5 kV, 74 %]", form.NotNegative, form.Positive)
	var bias []BiasPoint
	for i, p := range points {
		switch {
		case i == 0 && ok && (p.x != 0 || p.y != 1):
			p.xItem.Problem("the curve starts at %v and %v; start it at [0 V, 100 %%]", p.x, p.y)
		case p.y > 1:
			p.yItem.Problem("%v is more than 100 %%; write the share of the capacitance without bias", p.y)
		case i > 0 && p.y > points[i-1].y:
			p.yItem.Problem("the share rises from %v to %v as the voltage rises; bias never adds capacitance", points[i-1].y, p.y)
		}
		bias = append(bias, BiasPoint{p.x, p.y})
	}
	return bias
}

func readRipple(m *form.Map) RippleRating {
	m.Require("current", "frequency")
	r := RippleRating{
		Current:     get(m, "current", form.Positive, mostCurrent),
		Frequency:   form.Get[quantity.Hertz](m, "frequency", form.Positive),
		Temperature: get(m, "temperature", form.Any, mostCelsius),
		CoreRise:    form.Get[quantity.Kelvins](m, "core_rise", form.Positive),
	}
	factors, _ := curve[quantity.Hertz, quantity.Ratio](m, "multipliers", "[120 Hz, 100 %]", form.Positive, form.Positive)
	for _, f := range factors {
		r.Multipliers = append(r.Multipliers, FrequencyFactor{f.x, f.y})
	}
	m.Done()
	return r
}

func readLife(m *form.Map) LifeRating {
	m.Require("time", "temperature")
	l := LifeRating{
		Time:        form.Get[quantity.Seconds](m, "time", form.Positive),
		Temperature: get(m, "temperature", form.Any, mostCelsius),
	}
	m.Done()
	return l
}

// CapacitanceAt is the capacitance at a DC bias of either sign, the marked
// value times the bias curve (linear between points, flat beyond the last).
func (c *Capacitor) CapacitanceAt(bias quantity.Volts) quantity.Farads {
	bias = max(bias, -bias)
	share := quantity.Ratio(1)
	for i, p := range c.Bias {
		if bias <= p.Voltage {
			if i > 0 {
				q := c.Bias[i-1]
				t := float64(bias-q.Voltage) / float64(p.Voltage-q.Voltage)
				return quantity.Farads(float64(c.Capacitance) * (float64(q.Share) + t*float64(p.Share-q.Share)))
			}
			break
		}
		share = p.Share
	}
	return quantity.Farads(float64(c.Capacitance) * float64(share))
}

func capacitorTitle(p *Part) string {
	c := p.Capacitor
	return join(c.Capacitance.String(), quantity.Tolerance{Low: c.ToleranceLow, High: c.ToleranceHigh}.String(),
		c.Voltage.String(), c.Characteristic, string(c.Technology))
}

// join puts the words that are not empty in a row.
func join(parts ...string) string {
	return strings.Join(strings.Fields(strings.Join(parts, " ")), " ")
}
