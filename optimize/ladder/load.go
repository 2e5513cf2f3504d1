package ladder

import "sort"

// at gives the load current at an output voltage and its slope, v ≥ 0 in the
// normal direction. A constant current is drawn in full above knee and falls
// in a line to zero below, for no load can draw from nothing; constant power
// becomes a resistance below knee.
func (l Load) at(v, knee float64) (i, slope float64) {
	if l.Current > 0 {
		if v >= knee {
			i = l.Current
		} else {
			i, slope = l.Current*v/knee, l.Current/knee
		}
	}
	if l.Resistance > 0 {
		i += v / l.Resistance
		slope += 1 / l.Resistance
	}
	if l.Power > 0 {
		if v >= knee {
			i += l.Power / v
			slope -= l.Power / (v * v)
		} else {
			i += l.Power * v / (knee * knee)
			slope += l.Power / (knee * knee)
		}
	}
	if len(l.Table) > 0 {
		a, s := tableAt(l.Table, v)
		i += a
		slope += s
	}
	return i, slope
}

// tableAt interpolates in a line between points, through the origin below the
// first and flat above the last.
func tableAt(t []LoadPoint, v float64) (i, slope float64) {
	k := sort.Search(len(t), func(k int) bool { return t[k].V > v })
	lo := LoadPoint{}
	switch {
	case k == len(t):
		return t[k-1].A, 0
	case k > 0:
		lo = t[k-1]
	case t[0].V == 0 || v < 0: // flat below a first point at zero volts
		return t[0].A, 0
	}
	slope = (t[k].A - lo.A) / (t[k].V - lo.V)
	return lo.A + slope*(v-lo.V), slope
}

// none tells whether nothing is drawn at any voltage.
func (l Load) none() bool {
	return l.Current == 0 && l.Resistance == 0 && l.Power == 0 && len(l.Table) == 0
}
