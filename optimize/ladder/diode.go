package ladder

import "math"

// thermalVoltage is kT/q at 25 °C [V].
const thermalVoltage = 0.025693

// junction is a Diode made ready for the integrator.
type junction struct {
	is, nvt, rs  float64
	shift        float64 // ln(IS·RS/(N·VT)) + IS·RS/(N·VT)
	leak, own    float64 // conductance in reverse, with and without what the search adds [S]
	cj0, vj, m   float64
	transit      float64
	cHalf, qHalf float64 // at half the built-in voltage, where the law turns into a line
	slopeHalf    float64
}

// newJunction prepares d. The closed form needs some series resistance; where
// the sheet gives none, least is put in, so small that it does not show.
func newJunction(d Diode, least, leak float64) junction {
	vt := d.VT
	if vt == 0 {
		vt = thermalVoltage
	}
	j := junction{is: d.IS, nvt: d.N * vt, rs: max(d.RS, least), leak: d.Leakage + leak, own: d.Leakage + leak,
		cj0: d.CJ0, vj: d.VJ, m: d.M, transit: d.Transit}
	j.shift = math.Log(j.is*j.rs/j.nvt) + j.is*j.rs/j.nvt
	if j.vj > 0 && j.cj0 > 0 {
		p := math.Pow(0.5, 1-j.m)
		j.cHalf = j.cj0 * p / 0.5
		j.qHalf = j.cj0 * j.vj / (1 - j.m) * (1 - p)
		j.slopeHalf = j.cHalf * j.m / (j.vj * 0.5)
	}
	return j
}

// current is i(v) and its slope: the exponential diode with series resistance
// in closed form, i = (N·VT/RS)·w − IS with w the Wright omega function of
// ln(IS·RS/(N·VT)) + (v + IS·RS)/(N·VT), and the leakage conductance.
func (j *junction) current(v float64) (i, g float64) {
	u := j.shift + v/j.nvt
	if u < -60 {
		return j.leak*v - j.is, j.leak
	}
	w := wrightOmega(u)
	return j.nvt/j.rs*w - j.is + j.leak*v, w/(j.rs*(1+w)) + j.leak
}

// charge is the junction's charge and capacitance at v: depletion by
// CJ0/(1 − v/VJ)^M, in a line above half of VJ, and what the forward current
// stores, transit·i.
func (j *junction) charge(v, i, g float64) (q, c float64) {
	switch {
	case j.cj0 == 0:
	case j.vj == 0:
		q, c = j.cj0*v, j.cj0
	case v < j.vj/2:
		x := 1 - v/j.vj
		p := math.Exp((1 - j.m) * math.Log(x))
		q, c = j.cj0*j.vj/(1-j.m)*(1-p), j.cj0*p/x
	default:
		d := v - j.vj/2
		q, c = j.qHalf+d*(j.cHalf+d*j.slopeHalf/2), j.cHalf+d*j.slopeHalf
	}
	if j.transit > 0 {
		q += j.transit * (i - j.leak*v + j.is)
		c += j.transit * (g - j.leak)
	}
	return q, c
}

// drop is the forward voltage at a current.
func (j *junction) drop(i float64) float64 {
	return j.nvt*math.Log1p(math.Max(i, 0)/j.is) + math.Max(i, 0)*j.rs
}
