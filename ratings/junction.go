package ratings

import (
	"math"

	"rungwright/catalog"
)

// roomC is the temperature of a datasheet figure that names none [°C].
const roomC = 25

// readLoss judges the heat by the power that takes the junction from 25 °C to
// its highest, when the policy derates it; otherwise the junction says all.
func readLoss(t *trial, u *Use) (reading, bool) {
	d := t.part.Diode
	if t.diode.Power == 0 || u.LossW == 0 {
		return reading{}, false
	}
	rating := 0.0
	if d.ThermalResistance > 0 && d.Junction > roomC {
		rating = (float64(d.Junction) - roomC) / float64(d.ThermalResistance)
	}
	return shareOf(float64(u.LossW), rating, t.diode.Power), true
}

func readJunction(t *trial, u *Use) (reading, bool) {
	d := t.part.Diode
	if d.ThermalResistance == 0 {
		return reading{value: float64(u.Ambient), outcome: notStated}, true
	}
	celsius, why := junctionCelsius(d, u)
	r := hotOf(celsius, d.Junction, t.diode.Junction)
	r.notes |= why
	return r, true
}

// junctionCelsius is ambient + heat × thermal resistance, the heat being the
// forward loss and the leakage at half the inverse voltage (the mean across a
// ladder's diode). Leakage grows with the temperature that it makes: the
// lowest balance is found from below, and where there is none, the answer is
// far beyond any junction.
func junctionCelsius(d *catalog.Diode, u *Use) (float64, notes) {
	const farBeyond = 1000 // °C
	perWatt := float64(d.ThermalResistance)
	forward := float64(u.Ambient) + math.Abs(float64(u.LossW))*perWatt
	leak, why := leakageOf(d)
	if leak == (leakage{}) {
		return forward, why
	}
	meanV := math.Abs(float64(u.InverseV)) / 2
	celsius := forward
	for range 500 {
		next := forward + meanV*leak.at(celsius)*perWatt
		if next > farBeyond {
			break
		}
		if next-celsius < 1e-6 {
			return next, why
		}
		celsius = next
	}
	return farBeyond, why | runaway
}

// leakage is a reverse current that grows with temperature as
// amps·2^((T−celsius)/doubling).
type leakage struct{ amps, celsius, doubling float64 }

func (l leakage) at(celsius float64) float64 {
	return l.amps * math.Exp2((celsius-l.celsius)/l.doubling)
}

// leakageOf fits the sheet's leakage: through two temperatures, or through
// one with a doubling every 10 K. It counts in full below the voltage at
// which it was measured.
func leakageOf(d *catalog.Diode) (leakage, notes) {
	cold, hot := d.Leakage, d.LeakageHot
	coldC, hotC := leakageCelsius(cold), leakageCelsius(hot)
	switch {
	case cold.Value > 0 && hot.Value > cold.Value && hotC > coldC:
		doubling := (hotC - coldC) / math.Log2(float64(hot.Value)/float64(cold.Value))
		return leakage{float64(hot.Value), hotC, doubling}, 0
	case hot.Value > 0 && hotC > roomC:
		return leakage{float64(hot.Value), hotC, 10}, leakageDoubles
	case cold.Value > 0:
		return leakage{float64(cold.Value), coldC, 10}, leakageDoubles
	}
	return leakage{}, noLeakage
}

func leakageCelsius(p catalog.LeakagePoint) float64 {
	if p.Temperature == 0 {
		return roomC
	}
	return float64(p.Temperature)
}
