package optimize

import "rungwright/optimize/ladder"

// curve is the estimate of one frame with one diode as a function of the
// charge balance alone: the parts of the output that fall with it, and the
// ripple for each unit of it. It makes a test of a capacitor choice as cheap
// as two interpolations; the estimate of the real circuit comes after.
type curve struct {
	drop   [2][]float64 // charge-balance drop per charge, rising [1/F]
	mean   [2][]float64 // output there, at the low and the high corner [V]
	ripple []float64    // ripple there at the low corner, for each unit of its charge balance [V·F]
}

// curvePoints are how many estimates a curve is made of.
const curvePoints = 8

// curveOf makes or finds the curve of a diode.
func (s *surveyor) curveOf(diode Group) *curve {
	c, ok := s.curves[diode]
	if !ok {
		c = s.newCurve(diode)
		s.curves[diode] = c
	}
	return c
}

// newCurve estimates ladders of equal capacitors, from such as hardly drop to
// such as drop far more than the window allows.
func (s *surveyor) newCurve(diode Group) *curve {
	c := &curve{}
	total, ripples := 0.0, 0.0
	for i := range s.weights.Drop {
		total += s.weights.Drop[i]
		ripples += s.weights.Ripple[i]
	}
	most := s.mostDrop()
	for k := range 2 {
		circuit := s.equal(diode, k)
		for i := range curvePoints {
			x := float64(i) / (curvePoints - 1)
			drop := most * (0.001 + 0.999*x*x)
			for j := range circuit.Capacitors {
				circuit.Capacitors[j].C = total / drop
			}
			said := ladder.Estimate(circuit)
			c.drop[k] = append(c.drop[k], drop)
			c.mean[k] = append(c.mean[k], said.MeanV)
			if k == 0 {
				c.ripple = append(c.ripple, said.RippleV/(ripples*drop/total))
			}
		}
	}
	return c
}

// mostDrop is the charge-balance drop, per charge, beyond which no design
// passes [1/F].
func (s *surveyor) mostDrop() float64 {
	q := s.e.supply.fullCurrent() * lowShare(s.e.supply) / float64(s.e.supply.Source.Frequency)
	return max(s.factor*s.crest[0]*reachAbove-s.e.supply.lowest(), 0.01*s.e.supply.lowest()) / (sureDrop * q)
}

// equal is a circuit at a corner with ideal capacitors.
func (s *surveyor) equal(diode Group, corner int) ladder.Circuit {
	p := &Plan{Topology: s.t, Stages: s.stages}
	for range s.t.DiodeCount(s.stages) {
		p.Diodes = append(p.Diodes, diode)
	}
	c := s.e.circuit(p, s.e.conditions[corner])
	c.Capacitors = make([]ladder.Capacitor, s.t.CapacitorCount(s.stages))
	return c
}

// at interpolates a table over the drop at a corner.
func (c *curve) at(corner int, table []float64, drop float64) float64 {
	x := c.drop[corner]
	k := 1
	for k < len(x)-1 && drop > x[k] {
		k++
	}
	share := (drop - x[k-1]) / (x[k] - x[k-1])
	return table[k-1] + share*(table[k]-table[k-1])
}
