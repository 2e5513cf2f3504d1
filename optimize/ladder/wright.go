package ladder

import "math"

// wrightOmega solves w + ln w = u for real u (the Wright omega function). The
// update is the fourth-order one of Fritsch, Shafer and Crowley (Comm. ACM 16
// (1973) 123, from memory), which reaches double precision in two rounds from
// the starts below.
func wrightOmega(u float64) float64 {
	if u < -38 { // w = exp(u)(1 − exp(u) …): exact to the last bit
		return math.Exp(u)
	}
	var w float64
	switch {
	case u < -2:
		e := math.Exp(u)
		w = e * (1 - e*(1-1.5*e))
	case u < 1:
		w = math.Exp(2 * (u - 1) / 3)
	default:
		l := math.Log(u)
		w = u - l + l/u
	}
	for range 2 {
		r := u - w - math.Log(w)
		if math.Abs(r) < 1e-14*(1+w) {
			break
		}
		a := (1 + w) * (1 + w + 2*r/3)
		w *= 1 + r/(1+w)*(a-r/2)/(a-r)
	}
	return w
}
