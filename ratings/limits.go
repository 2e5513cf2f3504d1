package ratings

import (
	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// VoltageLimit is the highest peak voltage [V] that Judge lets a capacitor
// see at an ambient; zero when the policy forbids it or has no rule for it,
// and for other kinds. A search may drop what it excludes before it simulates.
func VoltageLimit(p *Policy, part *catalog.Part, ambient quantity.Celsius) float64 {
	if part.Kind != catalog.KindCapacitor {
		return 0
	}
	rules := p.capacitorRules(part.Capacitor)
	return firstShare(0, float64(part.Capacitor.Voltage), rules.Voltage.At(ambient), rules.Forbidden).limit
}

// ReverseLimit is the highest inverse voltage [V] that Judge lets a diode
// see; zero as in VoltageLimit.
func ReverseLimit(p *Policy, part *catalog.Part) float64 {
	if part.Kind != catalog.KindDiode {
		return 0
	}
	rules := p.diodeRules(part.Diode)
	return firstShare(0, float64(part.Diode.ReverseVoltage), rules.reverseShare(part.Diode), rules.Forbidden).limit
}

// AverageLimit is the highest average current [A] that Judge lets a diode
// carry at an ambient; zero for other kinds.
func AverageLimit(p *Policy, part *catalog.Part, ambient quantity.Celsius) float64 {
	if part.Kind != catalog.KindDiode {
		return 0
	}
	rating, _ := averageRating(part.Diode, ambient)
	if rating == 0 {
		return 0
	}
	return shareOr(0, rating, p.diodeRules(part.Diode).Average, intoCapacitors).limit
}
