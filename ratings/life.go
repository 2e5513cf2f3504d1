package ratings

import "math"

// Endurance is a maker's life test of an electrolytic: so many hours at an
// ambient, under the rated ripple that heats the inside by CoreRise.
type Endurance struct {
	Hours    float64
	At       float64 // ambient [°C]
	CoreRise float64 // inner rise at rated ripple [K]
}

// ElectrolyticLife is the expected life in hours at an ambient [°C] under a
// share of the rated ripple current at its frequency, by a maker's formula
// (from memory):
//
//	L = Lb · 2^((Tb−Ta)/10) · 2^(ΔT0/(10−0.25·ΔT0) − ΔT/(10−0.25·ΔT)), ΔT = ΔT0·share²
//
// A rise of 40 K or more is beyond the formula: no life is expected. Such
// figures compare capacitors and show which one wears out first; the date on
// which one fails is not in them.
func ElectrolyticLife(e Endurance, ambient, share float64) float64 {
	const beyond = 40
	rise := e.CoreRise * share * share
	if rise >= beyond || e.CoreRise >= beyond {
		return 0
	}
	wear := func(k float64) float64 { return k / (10 - 0.25*k) }
	return e.Hours * math.Exp2((e.At-ambient)/10) * math.Exp2(wear(e.CoreRise)-wear(rise))
}

// CombinedRipple is the share of the rated ripple current that several
// currents make together: the root of the sum of squares of each over its
// rating at its own frequency (maker's formula, from memory).
func CombinedRipple(shares ...float64) float64 {
	sum := 0.0
	for _, s := range shares {
		sum += s * s
	}
	return math.Sqrt(sum)
}
