package ladder

import "math"

// store is a Capacitor made ready for the integrator: its charge is the
// integral of the share that the bias leaves, so that charge is conserved.
type store struct {
	c, leak float64
	knots   []knot
}

// knot is a point of the charge curve; slope is of the share from here on.
type knot struct{ v, share, slope, q float64 }

func newStore(k Capacitor) store {
	s := store{c: k.C, leak: k.Conductance}
	if len(k.Bias) == 0 {
		return s
	}
	last := knot{share: k.Bias[0].Share}
	if k.Bias[0].V > 0 {
		s.knots = append(s.knots, last)
	}
	for _, p := range k.Bias {
		if p.V > last.v {
			s.knots[len(s.knots)-1].slope = (p.Share - last.share) / (p.V - last.v)
		}
		last = knot{v: p.V, share: p.Share, q: last.q + (p.V-last.v)*(p.Share+last.share)/2*k.C}
		s.knots = append(s.knots, last)
	}
	return s
}

// charge is q(v), odd in v, and the capacitance dq/dv.
func (s *store) charge(v float64) (q, c float64) {
	if len(s.knots) == 0 {
		return s.c * v, s.c
	}
	size := math.Abs(v)
	k := len(s.knots) - 1
	for k > 0 && s.knots[k].v > size {
		k--
	}
	at := s.knots[k]
	d := size - at.v
	share := at.share + d*at.slope
	return math.Copysign(at.q+s.c*d*(at.share+share)/2, v), s.c * share
}
