package ratings

import (
	"rungwright/catalog/quantity"
)

// windingChecks are the ratings of a source, in the order reported.
var windingChecks = []check{
	{quantity: "apparent power", unit: quantity.ApparentPower, subject: "apparent power",
		missing: "the sheet gives no power", read: readApparent},
	{quantity: "current, RMS", unit: quantity.Current, subject: "current",
		missing: "the sheet gives no power to take the current from", read: readWindingCurrent},
	{quantity: "insulation", unit: quantity.Voltage, subject: "insulation",
		missing: "the sheet gives no test voltage", read: readInsulation},
	{quantity: "hot spot", unit: quantity.Temperature, subject: "hot spot",
		missing: "the sheet gives no highest temperature", read: readHotSpot},
	{quantity: "lowest ambient", unit: quantity.Temperature, subject: "lowest ambient",
		missing: "the sheet gives no lowest temperature", read: readCold},
}

// readApparent is the winding's first rating, but no policy is refused for
// want of a rule: most documents leave windings to the maker.
func readApparent(t *trial, u *Use) (reading, bool) {
	r := shareOf(float64(u.ApparentVA), float64(t.part.Winding.Power), t.winding.ApparentPower)
	if t.winding.Forbidden {
		r = r.first(true, true)
	}
	return r, true
}

// readWindingCurrent judges each winding end by the rated power over the
// rated voltage, shared between the halves of a centre tap.
func readWindingCurrent(t *trial, u *Use) (reading, bool) {
	if u.RMSA == 0 {
		return reading{}, false
	}
	w := t.part.Winding
	volts := float64(w.RMS())
	if w.CentreTap {
		volts *= 2
	}
	return shareOf(float64(u.RMSA), float64(w.Power)/volts, t.winding.ApparentPower), true
}

// readInsulation has no fallback: a test voltage in full is no working
// voltage.
func readInsulation(t *trial, u *Use) (reading, bool) {
	if u.InsulationV == 0 {
		return reading{}, false
	}
	r := shareOf(float64(u.InsulationV), float64(t.part.Winding.TestVoltage), t.winding.Insulation)
	if r.outcome == byMaker {
		return reading{value: r.value, rating: r.rating, outcome: noLimit}, true
	}
	return r, true
}

func readHotSpot(t *trial, u *Use) (reading, bool) {
	r := hotOf(float64(u.Ambient), t.part.Temperature.Most, t.winding.HotSpot)
	r.notes |= hotSpotIsAmbient
	return r, true
}
