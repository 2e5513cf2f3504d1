package optimize

import (
	"math"

	"gonum.org/v1/gonum/optimize"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
)

const (
	roomVT       = 0.025693 // kT/q at 25 °C [V]
	kelvin       = 273.15
	junctionVJ   = 0.6  // built-in voltage of one silicon junction [V], common practice, no source
	junctionM    = 0.33 // grading exponent of a linearly graded junction (textbook value)
	bandGapVolts = 1.11 // of silicon [V]
)

// DiodeFit is an exponential diode with series resistance through points of a
// forward curve.
type DiodeFit struct {
	IS, N, RS float64
	WorstV    float64 // greatest deviation at a point [V]
}

// FitDiode fits V = N·VT·ln(I/IS) + I·RS. Two points give IS and N, three are
// met exactly (the system is linear in ln IS, N and RS); of more the relative
// deviations are made least by Nelder and Mead's method. N is held at 1 or
// more and RS at 0 or more, which physics wants.
func FitDiode(points []catalog.ForwardPoint) DiodeFit {
	switch len(points) {
	case 0:
		return DiodeFit{IS: 1e-9, N: 1.8}
	case 1:
		n := 1.8
		return measured(DiodeFit{IS: float64(points[0].Current) * math.Exp(-float64(points[0].Voltage)/(n*roomVT)), N: n}, points)
	}
	f := fitThree(points[0], points[len(points)/2], points[len(points)-1])
	if len(points) > 3 {
		f = refine(f, points)
	}
	return measured(f, points)
}

// fitThree solves the linear system of three points, or of the outer two when
// the middle one would want a negative resistance.
func fitThree(a, b, c catalog.ForwardPoint) DiodeFit {
	x := func(p catalog.ForwardPoint) (lnI, i, v float64) {
		return math.Log(float64(p.Current)), float64(p.Current), float64(p.Voltage)
	}
	la, ia, va := x(a)
	lb, ib, vb := x(b)
	lc, ic, vc := x(c)
	slope, rs := (vc-va)/(lc-la), 0.0
	if det := (lb-la)*(ic-ia) - (lc-la)*(ib-ia); lb > la && lc > lb && det != 0 {
		s := ((vb-va)*(ic-ia) - (vc-va)*(ib-ia)) / det
		r := ((lb-la)*(vc-va) - (lc-la)*(vb-va)) / det
		if r >= 0 && s > 0 {
			slope, rs = s, r
		}
	}
	if slope < roomVT { // an ideality below 1: the resistance takes the rest
		slope = roomVT
		rs = max(0, ((vc-va)-slope*(lc-la))/(ic-ia))
	}
	return DiodeFit{IS: math.Exp(la - (va-ia*rs)/slope), N: slope / roomVT, RS: rs}
}

// refine improves the fit over all points.
func refine(f DiodeFit, points []catalog.ForwardPoint) DiodeFit {
	from := func(x []float64) DiodeFit {
		return DiodeFit{IS: math.Exp(x[0]), N: 1 + math.Exp(x[1]), RS: math.Exp(x[2])}
	}
	last := points[len(points)-1]
	start := []float64{math.Log(f.IS), math.Log(max(f.N-1, 1e-3)), math.Log(max(f.RS, 1e-4*float64(last.Voltage/quantity.Volts(last.Current))))}
	problem := optimize.Problem{Func: func(x []float64) float64 {
		sum, g := 0.0, from(x)
		for _, p := range points {
			d := g.volts(float64(p.Current))/float64(p.Voltage) - 1
			sum += d * d
		}
		return sum
	}}
	best, err := optimize.Minimize(problem, start, &optimize.Settings{FuncEvaluations: 600}, &optimize.NelderMead{})
	if best == nil || (err != nil && best.F != best.F) || best.F > problem.Func(start) {
		return f
	}
	return from(best.X)
}

// volts is the forward voltage at a current.
func (f DiodeFit) volts(i float64) float64 { return f.N*roomVT*math.Log1p(i/f.IS) + i*f.RS }

func measured(f DiodeFit, points []catalog.ForwardPoint) DiodeFit {
	for _, p := range points {
		f.WorstV = max(f.WorstV, math.Abs(f.volts(float64(p.Current))-float64(p.Voltage)))
	}
	return f
}

// diodeModel is a diode part as the circuit sees it at a junction temperature.
// The number of junctions in the body, which sets its built-in voltage, is
// read from its ideality.
func diodeModel(d *catalog.Diode, fit DiodeFit, junction quantity.Celsius) ladder.Diode {
	junctions := max(1, math.Round(fit.N/1.8))
	out := ladder.Diode{IS: fit.IS, N: fit.N, RS: fit.RS, VJ: junctionVJ * junctions, M: junctionM}
	// A reverse bias of At leaves Value: back to zero bias by the same law.
	out.CJ0 = float64(d.Capacitance.Value) * math.Pow(1+float64(d.Capacitance.At)/out.VJ, out.M)
	if out.CJ0 == 0 {
		out.VJ, out.M = 0, 0
	}
	if d.Recovery.Time > 0 {
		// Storage time of the recovery test, trr = τ·ln(1 + IF/IR): textbook
		// relation, from memory.
		ratio := 1.0
		if d.Recovery.Reverse > 0 {
			ratio = float64(d.Recovery.Forward / d.Recovery.Reverse)
		}
		out.Transit = float64(d.Recovery.Time) / math.Log1p(ratio)
	}
	hot := kelvin + float64(junction)
	room := kelvin + 25.0
	out.VT = roomVT * hot / room
	// IS ∝ T^(3/N)·exp(−Eg/(N·VT)) per junction (textbook law, from memory).
	each := fit.N / junctions
	out.IS *= math.Pow(hot/room, 3/each) * math.Exp(bandGapVolts/(each*roomVT)*(1-room/hot))
	out.Leakage = leakage(d, junction)
	return out
}

// leakage is the reverse conductance at a temperature: the hot point of the
// sheet where it has one, else doubled every 10 K (common practice, no
// source).
func leakage(d *catalog.Diode, junction quantity.Celsius) float64 {
	cold := point(d.Leakage)
	if cold == 0 {
		return 0
	}
	hot := point(d.LeakageHot)
	if hot > cold && d.LeakageHot.Temperature > 25 {
		share := float64(junction-25) / float64(d.LeakageHot.Temperature-25)
		return cold * math.Pow(hot/cold, share)
	}
	return cold * math.Pow(2, float64(junction-25)/10)
}

func point(p catalog.LeakagePoint) float64 {
	if p.At == 0 {
		return 0
	}
	return float64(p.Value) / float64(p.At)
}

// capacitorModel is a group of series × parallel equal parts as the circuit
// sees it, at a factor on the marked value and a frequency.
func capacitorModel(c *catalog.Capacitor, series, parallel int, factor, frequency float64) ladder.Capacitor {
	s, p := float64(series), float64(parallel)
	out := ladder.Capacitor{C: float64(c.Capacitance) * factor * p / s}
	for _, b := range c.Bias {
		out.Bias = append(out.Bias, ladder.BiasPoint{V: float64(b.Voltage) * s, Share: float64(b.Share)})
	}
	out.ESR = seriesResistance(c, frequency) * s / p
	if out.ESR < 1e-3/(2*math.Pi*frequency*out.C) { // too small to show: saves a node
		out.ESR = 0
	}
	if c.Leakage > 0 && c.Voltage > 0 {
		out.Conductance = float64(c.Leakage) / float64(c.Voltage) * p / s
	}
	return out
}

// seriesResistance is the part's at a frequency: as stated, or from its loss
// factor, ESR = tan δ/(2πfC), not below what it is at the frequency where the
// loss factor was measured times one tenth (the metal's part).
func seriesResistance(c *catalog.Capacitor, frequency float64) float64 {
	if c.ESR > 0 {
		return float64(c.ESR)
	}
	return float64(c.LossFactor) / (2 * math.Pi * frequency * float64(c.Capacitance))
}

// drift is the share of a capacitor's value left by temperature and ageing at
// its worst within the surroundings, by the characteristic codes of EIA-198
// (makers' tables); one where the code says nothing.
func drift(c *catalog.Capacitor) float64 {
	share := 1.0
	if len(c.Characteristic) == 3 {
		if change, ok := codeChange[c.Characteristic[2]]; ok && c.Technology == catalog.CeramicClass2 {
			share *= 1 - change
		}
	}
	if c.Ageing > 0 { // from 1 000 h, when the value is marked, to 100 000 h
		share *= 1 - 2*float64(c.Ageing)
	}
	return share
}

// codeChange is the greatest fall over the temperature range by the third
// letter of a class 2 code (EIA-198, makers' tables).
var codeChange = map[byte]float64{'A': 0.010, 'B': 0.015, 'C': 0.022, 'D': 0.033, 'E': 0.047, 'F': 0.075,
	'P': 0.10, 'R': 0.15, 'S': 0.22, 'T': 0.33, 'U': 0.56, 'V': 0.82}
