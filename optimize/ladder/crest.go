package ladder

import "math"

// crestPoints is the number of steps over one period of the scalar model.
const crestPoints = 56

// crestGrid clusters the phases of one period around the crest, where a
// rectifier conducts.
var crestGrid = func() []float64 {
	g := make([]float64, crestPoints+1)
	for k := range g {
		s := 2*float64(k)/crestPoints - 1
		g[k] = math.Pi * s * math.Abs(s)
	}
	return g
}()

// rectified is one rectifier with its capacitor, which stands for every diode
// of a ladder: the source's crest, all resistance that its current meets, and
// a capacitor that one pulse lifts by as much as the ladder's loop is lifted.
type rectified struct {
	diode   junction // rs is the whole series resistance
	crest   float64  // [V]
	jump    float64  // charge per period over capacitance [V]
	charge  float64  // per period [C]
	period  float64
	pointed bool // a triangle instead of a sine
}

// source is the voltage at a phase from the crest.
func (r *rectified) source(phase float64) float64 {
	if r.pointed {
		return r.crest * (1 - 2*math.Abs(phase)/math.Pi)
	}
	return r.crest * math.Cos(phase)
}

// solve returns the capacitor's voltage after the crest, in the periodic
// steady state in which it is found one jump lower before the next, and the
// part of the period in which the rectifier carries more than its mean
// current; ok is false where Newton does not settle.
func (r *rectified) solve() (after, conducting float64, ok bool) {
	v := r.crest - r.diode.drop(3*r.charge/r.period)
	for range 12 {
		end, slope, part := r.run(v - r.jump)
		if math.IsNaN(end) {
			return 0, 0, false
		}
		step := (end - v) / max(1-slope, 1e-9)
		v += max(-r.crest/2, min(r.crest/2, step))
		if math.Abs(step) < 1e-4*r.crest {
			return v, part, true
		}
	}
	return 0, 0, false
}

// run charges the capacitor over one period by the trapezoidal rule, from
// half a period before the crest.
func (r *rectified) run(v float64) (end, slope, conducting float64) {
	slope = 1
	perCharge, mean := r.jump/r.charge, r.charge/r.period
	i, g := r.diode.current(r.source(-math.Pi) - v)
	for k := 1; k <= crestPoints; k++ {
		turn := (crestGrid[k] - crestGrid[k-1]) / (2 * math.Pi)
		h := turn * r.period * perCharge / 2 // half a step over the capacitance
		known, before := v+h*i, i
		slope *= 1 - h*g
		src := r.source(crestGrid[k])
		for range 12 {
			i, g = r.diode.current(src - v)
			d := (v - known - h*i) / (1 + h*g)
			v -= d
			if math.Abs(d) < 1e-6*r.crest {
				i += g * d
				break
			}
		}
		slope /= 1 + h*g
		conducting += turn * above(before, i, mean)
	}
	return v, slope, conducting
}

// above is the part of a straight line from a to b that lies above level.
func above(a, b, level float64) float64 {
	high, low := max(a, b), min(a, b)
	switch {
	case low >= level:
		return 1
	case high <= level:
		return 0
	}
	return (high - level) / (high - low)
}
