package ratings

import (
	"fmt"
	"math"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// diodeChecks are the ratings of a diode, in the order reported.
var diodeChecks = []check{
	{quantity: "reverse voltage", unit: quantity.Voltage, subject: "reverse voltage",
		missing: "the sheet gives no reverse voltage", read: readInverse},
	{quantity: "average current", unit: quantity.Current, subject: "average current",
		missing: "the sheet gives no average current", read: readAverage},
	{quantity: "repetitive peak current", unit: quantity.Current, subject: "repetitive peak",
		missing: "the sheet gives no repetitive peak", read: readPeak},
	{quantity: "start-up surge", unit: quantity.Current, subject: "surge",
		missing: "the sheet gives no surge current", read: readSurge, explain: explainSurge},
	{quantity: "power", unit: quantity.Power, subject: "power",
		missing: "the sheet gives no thermal resistance or no highest junction temperature", read: readLoss},
	{quantity: "junction temperature", unit: quantity.Temperature, subject: "junction temperature",
		missing: "the sheet gives no thermal resistance or no highest junction temperature", read: readJunction},
	{quantity: "recovery time", unit: quantity.Time, subject: "recovery time",
		missing: "the sheet gives no recovery time", read: readRecovery},
	{quantity: "lowest ambient", unit: quantity.Temperature, subject: "lowest ambient",
		missing: "the sheet gives no lowest temperature", read: readCold},
}

// defaultSurgeTime is the half-sine of the trade's surge rating [s].
const defaultSurgeTime = 8.3e-3

func (r *DiodeRules) reverseShare(d *catalog.Diode) quantity.Ratio {
	if d.Avalanche && r.ReverseAvalanche > 0 {
		return r.ReverseAvalanche
	}
	return r.Reverse
}

func readInverse(t *trial, u *Use) (reading, bool) {
	d := t.part.Diode
	return firstShare(float64(u.InverseV), float64(d.ReverseVoltage), t.diode.reverseShare(d), t.diode.Forbidden), true
}

// intoCapacitors is the share of the average current that makers' sheets of
// general rectifiers allow into capacitors (from memory).
const intoCapacitors quantity.Ratio = 0.8

func readAverage(t *trial, u *Use) (reading, bool) {
	if u.AverageA == 0 {
		return reading{}, false
	}
	rating, why := averageRating(t.part.Diode, u.Ambient)
	r := shareOr(float64(u.AverageA), rating, t.diode.Average, intoCapacitors)
	if rating == 0 && t.part.Diode.AverageCurrent > 0 { // too hot for any current
		r.outcome, r.ratio = bySheet, MaxRatio
	}
	if r.outcome == byMaker || t.diode.Average > intoCapacitors {
		why |= capacitiveLoad
	}
	r.notes |= why
	return r, true
}

// averageRating is the maker's average current at an ambient: in full up to
// the knee, then in a line to nothing at the highest junction temperature.
func averageRating(d *catalog.Diode, ambient quantity.Celsius) (float64, notes) {
	full := float64(d.AverageCurrent)
	switch {
	case d.AverageAt == 0:
		return full, noKnee
	case ambient <= d.AverageAt:
		return full, 0
	case ambient >= d.Junction:
		return 0, aboveKnee
	}
	return full * float64(d.Junction-ambient) / float64(d.Junction-d.AverageAt), aboveKnee
}

// readPeak judges by the maker's figure, or by a multiple of the average
// where the sheet gives none and the policy says which.
func readPeak(t *trial, u *Use) (reading, bool) {
	d := t.part.Diode
	if u.PeakA == 0 {
		return reading{}, false
	}
	if d.RepetitivePeak == 0 && t.diode.PeakTimesAverage > 0 {
		r := shareOf(float64(u.PeakA), float64(d.AverageCurrent)*float64(t.diode.PeakTimesAverage), 1)
		r.notes |= peakFromAverage
		return r, true
	}
	return shareOf(float64(u.PeakA), float64(d.RepetitivePeak), t.diode.RepetitivePeak), true
}

// readSurge turns the start-up pulse into a half-sine of the maker's length
// with the same I²t, which for a half-sine is I²t/2.
func readSurge(t *trial, u *Use) (reading, bool) {
	d := t.part.Diode
	if u.SurgeA == 0 {
		return reading{}, false
	}
	var why notes
	rated := float64(d.SurgeTime)
	if rated == 0 {
		rated, why = defaultSurgeTime, surgeTimeAssumed
	}
	lasts := float64(u.SurgeTime)
	switch {
	case lasts == 0:
		lasts, why = rated, why|pulseTimeAssumed
	case lasts < 1e-3:
		why |= shortSurge
	}
	r := shareOf(float64(u.SurgeA)*math.Sqrt(lasts/rated), float64(d.SurgeCurrent), t.diode.Surge)
	r.notes |= why
	return r, true
}

func explainSurge(_ *trial, u *Use, _ reading) string {
	if u.SurgeTime == 0 {
		return ""
	}
	return fmt.Sprintf("a pulse of %v for %v as a half-sine of the rated length with the same I²t", u.SurgeA, u.SurgeTime)
}

// readRecovery judges the recovery time by the stricter of the shares of the
// period and of the conduction time.
func readRecovery(t *trial, u *Use) (reading, bool) {
	d := t.part.Diode
	value := float64(d.Recovery.Time)
	if u.Frequency == 0 {
		return reading{}, false
	}
	rating, limit := t.diode.recoveryLimit(u)
	switch {
	case value == 0 && d.Type == catalog.Schottky:
		return reading{rating: rating, limit: limit, outcome: bySheet, notes: noStoredCharge}, true
	case value == 0:
		return reading{outcome: notStated}, true
	case limit == 0:
		return reading{value: value, outcome: noLimit}, true
	}
	return reading{value: value, rating: rating, limit: limit, ratio: ratioOf(value, limit)}, true
}

// recoveryLimit is the time that the limit is a share of, and the limit; zero
// when the policy has no rule for it.
func (r *DiodeRules) recoveryLimit(u *Use) (of, limit float64) {
	if r.RecoveryPeriod > 0 {
		of = 1 / float64(u.Frequency)
		limit = of * float64(r.RecoveryPeriod)
	}
	if most := float64(u.ConductFor) * float64(r.RecoveryConduct); most > 0 && (limit == 0 || most < limit) {
		return float64(u.ConductFor), most
	}
	return of, limit
}
