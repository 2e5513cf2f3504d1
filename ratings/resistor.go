package ratings

import (
	"math"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// resistorChecks are the ratings of a resistor, in the order reported.
var resistorChecks = []check{
	{quantity: "power", unit: quantity.Power, subject: "power", read: readPower},
	{quantity: "working voltage", unit: quantity.Voltage, subject: "working voltage", read: readWorkingVoltage},
	{quantity: "pulse energy", unit: quantity.Energy, subject: "pulse energy",
		missing: "the sheet gives no pulse energy", read: readPulse},
	{quantity: "lowest ambient", unit: quantity.Temperature, subject: "lowest ambient",
		missing: "the sheet gives no lowest temperature", read: readCold},
}

const (
	// ratedPowerAt is where a resistor's power is rated when its sheet is
	// silent [°C], as the catalog says.
	ratedPowerAt quantity.Celsius = 70
	// assumedHighest is the highest temperature assumed of one [°C].
	assumedHighest quantity.Celsius = 125
	// assumedWorking is the working voltage assumed of one: that of the
	// smallest chips (from memory).
	assumedWorking quantity.Volts = 25
)

func readPower(t *trial, u *Use) (reading, bool) {
	line := t.resistor.Power
	share, why := line.at(t.part, u.Ambient)
	r := reading{value: math.Abs(float64(u.PowerW)), rating: float64(t.part.Resistor.Power), notes: why}
	r.limit = r.rating * float64(share)
	r.ratio = ratioOf(r.value, r.limit)
	return r.first(line.Share != 0, t.resistor.Forbidden), true
}

// at is the share of the rated power allowed at an ambient.
func (l PowerLine) at(p *catalog.Part, ambient quantity.Celsius) (quantity.Ratio, notes) {
	highest, why := p.Temperature.Most, notes(0)
	if highest == 0 {
		highest, why = assumedHighest, resistorMaxAssumed
	}
	from := p.Resistor.PowerAt
	if from == 0 {
		from = ratedPowerAt
	}
	maker := falling(1, from, highest, ambient)
	switch {
	case l.To == 0:
		return l.Share * maker, why
	case l.Zero != 0:
		highest = l.Zero
	}
	return min(maker, falling(l.Share, l.To, highest, ambient)), why
}

// falling is a share that holds up to a temperature and falls in a line to
// nothing at another.
func falling(share quantity.Ratio, from, zero, t quantity.Celsius) quantity.Ratio {
	switch {
	case t >= zero:
		return 0
	case t <= from:
		return share
	}
	return share * quantity.Ratio(float64(zero-t)/float64(zero-from))
}

// readWorkingVoltage counts a resistor without the figure as the smallest
// there is: at high voltage it is what fails first.
func readWorkingVoltage(t *trial, u *Use) (reading, bool) {
	if u.WorkingV == 0 {
		return reading{}, false
	}
	rating, why := t.part.Resistor.WorkingVoltage, notes(0)
	if rating == 0 {
		rating, why = assumedWorking, workingVoltageAssumed
	}
	r := shareOf(float64(u.WorkingV), float64(rating), t.resistor.WorkingVoltage)
	r.notes = why
	return r, true
}

func readPulse(t *trial, u *Use) (reading, bool) {
	if u.PulseJ == 0 {
		return reading{}, false
	}
	return shareOf(float64(u.PulseJ), float64(t.part.Resistor.PulseEnergy), t.resistor.PulseEnergy), true
}
