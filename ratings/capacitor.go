package ratings

import (
	"math"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// capacitorChecks are the ratings of a capacitor, in the order reported.
var capacitorChecks = []check{
	{quantity: "peak voltage", unit: quantity.Voltage, subject: "voltage",
		missing: "the sheet gives no voltage", read: readPeakVoltage},
	{quantity: "AC voltage, RMS", unit: quantity.Voltage, subject: "AC voltage",
		missing: "the sheet gives no alternating voltage", read: readACVoltage},
	{quantity: "ripple current, RMS", unit: quantity.Current, subject: "ripple current",
		missing: "the sheet gives no ripple current", read: readRipple, explain: explainRipple},
	{quantity: "rate of voltage change", unit: quantity.SlewRate, subject: "rate of voltage change",
		missing: "the sheet gives no rate of voltage change", read: readSlew},
	{quantity: "body temperature", unit: quantity.Temperature, subject: "temperature",
		missing: "the sheet gives no highest temperature", read: readBodyTemperature},
	{quantity: "lowest ambient", unit: quantity.Temperature, subject: "lowest ambient",
		missing: "the sheet gives no lowest temperature", read: readCold},
	{quantity: "expected life", unit: quantity.Time, subject: "life",
		missing: "the sheet gives no life", read: readLife},
}

func readPeakVoltage(t *trial, u *Use) (reading, bool) {
	c := t.part.Capacitor
	share := t.capacitor.Voltage.At(u.Ambient)
	r := firstShare(float64(u.PeakV), float64(c.Voltage), share, t.capacitor.Forbidden)
	r.notes |= filmNote(c, u)
	return r, true
}

// filmNote warns of film above its knee, of which catalogs give no figure.
func filmNote(c *catalog.Capacitor, u *Use) notes {
	const knee = 85 // °C, physics of film: from memory
	if c.Technology == catalog.Film && u.Ambient > knee {
		return hotFilm
	}
	return 0
}

// readACVoltage leaves polarised capacitors out: their alternating part is
// judged as ripple current.
func readACVoltage(t *trial, u *Use) (reading, bool) {
	c := t.part.Capacitor
	if u.ACV == 0 || polarised(c) {
		return reading{}, false
	}
	r := shareOf(float64(u.ACV), float64(c.ACVoltage), t.capacitor.ACVoltage)
	r.notes |= filmNote(c, u)
	return r, true
}

func polarised(c *catalog.Capacitor) bool {
	return c.Technology == catalog.AluminiumElectrolytic || c.Technology == catalog.Tantalum
}

// readSlew leaves polarised capacitors out: nobody rates them by it.
func readSlew(t *trial, u *Use) (reading, bool) {
	c := t.part.Capacitor
	if u.SlewVps == 0 || polarised(c) {
		return reading{}, false
	}
	return shareOf(float64(u.SlewVps), float64(c.Slew), t.capacitor.Slew), true
}

// readBodyTemperature judges the ambient plus self-heating.
func readBodyTemperature(t *trial, u *Use) (reading, bool) {
	rise, why := selfHeating(t.part, u)
	r := hotOf(float64(u.Ambient)+rise, t.part.Temperature.Most, t.capacitor.Temperature)
	r.notes |= why
	return r, true
}

// hotOf judges a temperature by a rule and the maker's highest.
func hotOf(value float64, most quantity.Celsius, rule TemperatureRule) reading {
	limit, known := rule.limit(most)
	if !known {
		return reading{value: value, outcome: notStated}
	}
	r := atMostCelsius(value, float64(most), limit)
	if !rule.given() {
		r.outcome = byMaker
	}
	if most == 0 {
		r.notes |= noHighest
	}
	return r
}

// readCold judges every kind by the maker's lowest temperature, which no
// policy derates. A sheet that gives none matters in the cold alone: every
// part of the trade works from 10 °C up (the highest of the low limits of
// EIA-198).
func readCold(t *trial, u *Use) (reading, bool) {
	const anyWorks = 10 // °C
	within := t.part.Temperature
	if within == (catalog.Range{}) {
		if u.Ambient >= anyWorks {
			return reading{}, false
		}
		return reading{value: float64(u.Ambient), outcome: notStated}, true
	}
	r := atLeastCelsius(float64(u.Ambient), float64(within.Least), float64(within.Least))
	r.outcome = bySheet
	return r, true
}

// readLife judges electrolytics alone: others are not rated by wear.
func readLife(t *trial, u *Use) (reading, bool) {
	c := t.part.Capacitor
	if c.Technology != catalog.AluminiumElectrolytic {
		return reading{}, false
	}
	if c.Life.Time == 0 {
		return reading{outcome: notStated, atLeast: true}, true
	}
	hours, why := lifeOf(c, u)
	r := reading{value: hours * hour, rating: float64(c.Life.Time), outcome: noLimit, atLeast: true, notes: why}
	if t.capacitor.Life > 0 {
		r = atLeast(hours*hour, float64(c.Life.Time), float64(t.capacitor.Life))
		r.notes = why
	}
	return r, true
}

// hour in seconds.
const hour = 3600.0

// lifeOf is the expected life of an electrolytic in a use, in hours.
func lifeOf(c *catalog.Capacitor, u *Use) (float64, notes) {
	var why notes
	if u.Ambient < 60 {
		why |= coolLife
	}
	base := Endurance{Hours: float64(c.Life.Time) / hour, At: float64(c.Life.Temperature)}
	if c.Ripple.Current == 0 {
		return base.Hours * math.Exp2((base.At-float64(u.Ambient))/10), why | noRippleForLife
	}
	rise, risen := ratedRise(c)
	base.CoreRise = rise
	share, shared := rippleShare(c, u)
	return ElectrolyticLife(base, float64(u.Ambient), share), why | risen | shared
}
