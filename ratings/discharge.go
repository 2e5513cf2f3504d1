package ratings

import "math"

// DischargeTime is how long [s] a capacitance [F] at a voltage [V] takes
// through a resistance [Ω] to fall to another, t = RC·ln(V/limit): zero when
// it is there already, infinite without a resistance (zero) or a limit.
func DischargeTime(volts, limit, ohms, farads float64) float64 {
	volts, limit = math.Abs(volts), math.Abs(limit)
	switch {
	case volts <= limit || farads == 0:
		return 0
	case ohms <= 0:
		return math.Inf(1)
	}
	return ohms * farads * math.Log(volts/limit)
}

// BleederFor is the highest resistance [Ω] that brings a capacitance from a
// voltage to a limit within a time; infinite when it is there already.
func BleederFor(volts, limit, farads, seconds float64) float64 {
	volts, limit = math.Abs(volts), math.Abs(limit)
	if volts <= limit {
		return math.Inf(1)
	}
	return seconds / (farads * math.Log(volts/limit))
}
