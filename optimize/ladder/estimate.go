package ladder

import "math"

// Estimated is what formulas can say of a circuit.
type Estimated struct {
	NoLoadV float64 // at no load, diode floor and stray factor included
	MeanV   float64 // at the load
	RippleV float64 // peak to peak, at the load
	DropV   float64 // charge-balance part of the drop
	LoadA   float64 // load current at MeanV, stored charge not included
}

// Estimate is the charge-balance estimate: each capacitor carries a whole
// multiple of q = I/f per crest, the output's mean falls by
// (1/q)·Σ Δq²/(2C) and its ripple is what the column loses between crests.
// Source and diode resistance widen the conduction angle θ of
// sin θ − θ·cos θ = π·I_d·R/V, after which a crest is worth cos θ.
func Estimate(c Circuit) Estimated {
	e := newEstimator(c)
	return e.solve()
}

// estimator holds what does not depend on the load current.
type estimator struct {
	c       Circuit
	net     *netlist
	crest   float64   // half of the source's swing [V]
	swing   []float64 // alternating amplitude of each node, for a source of 1
	noLoad  float64
	unit    float64 // charge-balance drop for q = 1 [V/C]
	ripple  float64 // ripple for q = 1 [V/C]
	drained float64 // what the load takes from the column per period, for q = 1 [V/C]
	nd      float64 // diodes in the climb
	diodes  []junction
	values  []float64 // capacitance of each capacitor at its bias [F]
}

func newEstimator(c Circuit) *estimator {
	e := &estimator{c: c, net: netlistOf(c.Topology, c.Stages)}
	high, low := c.Source.wave().crests()
	crest := c.Source.Peak * (high - low) / 2
	bias := e.net.capacitorLevels(crest)
	e.crest = crest
	e.swing = e.net.swings(&c, bias)
	for _, d := range e.net.climb {
		e.noLoad += crest * math.Abs(across(e.swing, e.net.diodes[d]))
	}
	e.nd = float64(len(e.net.climb))
	for _, d := range c.Diodes {
		e.diodes = append(e.diodes, newJunction(d, 1e-9, 0))
	}
	for i, k := range c.Capacitors {
		s := newStore(k)
		_, value := s.charge(bias[i])
		e.values = append(e.values, value)
	}
	e.unit, e.ripple = e.net.chargeBalance(e.values)
	for _, k := range e.net.column {
		e.drained -= e.net.drain[k] / e.values[k]
	}
	return e
}

// chargeBalance gives mean drop and ripple per unit of q for the values of
// the capacitors.
func (n *netlist) chargeBalance(value []float64) (drop, ripple float64) {
	for _, p := range n.pulses {
		for i, dq := range p {
			drop += dq * dq / (2 * value[i])
		}
	}
	return drop, n.sawtooth(value)
}

// sawtooth is the peak-to-peak of the column's voltage for q = 1: a jump at
// each crest and the load's steady drain between.
func (n *netlist) sawtooth(value []float64) float64 {
	var jump [2]float64
	drain := 0.0
	for _, i := range n.column {
		jump[0] += n.pulses[0][i] / value[i]
		jump[1] += n.pulses[1][i] / value[i]
		drain += n.drain[i] / value[i]
	}
	v, high, low := 0.0, 0.0, 0.0
	for _, j := range jump {
		v += j
		high, low = max(high, v), min(low, v)
		v += drain / 2
		high, low = max(high, v), min(low, v)
	}
	return high - low
}

// capacitorLevels is the ideal no-load direct voltage of each capacitor.
func (n *netlist) capacitorLevels(crest float64) []float64 {
	level := n.levels(crest)
	out := make([]float64, len(n.capacitors))
	for i, b := range n.capacitors {
		out[i] = across(level, b)
	}
	return out
}

// levels is the ideal no-load direct voltage of each node: every diode lifts
// its cathode by one crest above its anode.
func (n *netlist) levels(crest float64) []float64 {
	known := map[int]float64{}
	for _, e := range n.ends {
		known[e.node] = 0
	}
	var links []link
	for _, d := range n.diodes {
		links = append(links, link{d.a, d.b, crest})
	}
	return n.spread(links, known)
}

// solve finds the output at which load and ladder agree, by the secant kept
// within a bracket: the ladder's output falls as its current rises.
func (e *estimator) solve() Estimated {
	knee := 0.01 * e.c.Source.Peak
	mean, ripple, i := 0.0, 0.0, 0.0
	excess := func(v float64) float64 {
		i, _ = e.c.Load.at(v, knee)
		mean, ripple = e.rectify(i)
		return mean - v
	}
	lo, hi := 0.0, e.noLoad
	v, f := hi, excess(hi)
	for range 40 {
		if math.Abs(f) <= 1e-6*e.noLoad {
			break
		}
		if f < 0 {
			hi = v
		} else {
			lo = v
		}
		next := mean // exact for a constant current
		if e.c.Load.Current == 0 || next <= lo || next >= hi {
			next = (lo + hi) / 2
		}
		was, fWas := v, f
		v = next
		f = excess(v)
		if slope := (f - fWas) / (v - was); slope < 0 && math.Abs(f) > 1e-6*e.noLoad {
			if s := v - f/slope; s > lo && s < hi {
				if f < 0 {
					hi = min(hi, v)
				} else {
					lo = max(lo, v)
				}
				v = s
				f = excess(v)
			}
		}
	}
	return Estimated{NoLoadV: e.noLoad, MeanV: mean, RippleV: ripple, LoadA: i, DropV: e.charge(i) * e.unit}
}

// charge is what every diode of the ladder must pass per period: the load's
// and what recovery returns.
func (e *estimator) charge(i float64) float64 { return i / e.c.Source.Frequency }

// rectify gives mean output and ripple at a load current. Every diode of the
// ladder is taken for the same rectifier, whose own excess over the charge
// balance is added to the ladder's once per diode of the climb.
func (e *estimator) rectify(i float64) (mean, ripple float64) {
	q := e.charge(i)
	slow := q * e.unit
	plain := max(e.noLoad-e.conduction(i)-slow, 0)
	ideal := e.diodes[0].nvt < 1e-6*e.noLoad/e.nd // the books' diode, which conducts in no time
	if i <= 0 || ideal || slow > 0.8*e.noLoad || e.c.Source.Waveform == Square || e.c.Source.Waveform == Table {
		return plain, q * e.ripple
	}
	r := rectified{diode: e.diodes[e.net.climb[0]], crest: e.noLoad / e.nd, jump: 2 * slow / e.nd,
		charge: q * e.net.share, period: 1 / e.c.Source.Frequency, pointed: e.c.Source.Waveform == Triangle}
	r.diode.rs += e.net.feed * e.c.Source.Resistance
	r.diode.shift = math.Log(r.diode.is*r.diode.rs/r.diode.nvt) + r.diode.is*r.diode.rs/r.diode.nvt
	after, busy, ok := r.solve()
	if !ok || after <= 0 {
		return plain, q * e.ripple
	}
	drain := q * e.drained / 2 // the part of the slow drop that the load's steady drain makes
	mean = after*e.nd - slow + drain*(1-(1-busy)*(1-busy))
	return max(0, mean), e.wave(q, busy)
}

// wave is the peak-to-peak ripple: the sawtooth of the charge balance, whose
// fall pauses while the diodes carry the load, and what the junction and
// stray capacitances couple into the column.
func (e *estimator) wave(q, busy float64) float64 {
	coupled := e.crest * across(e.swing, branch{e.net.plus, e.net.minus})
	jump := [2]float64{}
	for _, k := range e.net.column {
		jump[0] += q * e.net.pulses[0][k] / e.values[k]
		jump[1] += q * e.net.pulses[1][k] / e.values[k]
	}
	drain := q * e.drained
	low, high := math.Inf(1), math.Inf(-1)
	const parts = 24
	for k := range 2*parts + 1 {
		turn := float64(k) / (2 * parts)
		level := jump[0] - drain*turn + coupled*math.Cos(2*math.Pi*turn)
		if k > parts {
			level += jump[1]
		}
		low, high = min(low, level), max(high, level)
		if k == parts {
			level += jump[1]
			low, high = min(low, level), max(high, level)
		}
	}
	if e.net.twice() && e.c.Stages > 1 {
		busy *= twiceBusy
	}
	return max(0, high-low-drain*busy)
}

// twiceBusy is how much longer than a single rectifier the two sides of an
// output that is refreshed at both crests hold it up where stages stand above each other, fitted once to steady
// states of full-wave ladders.
const twiceBusy = 1.3

// conduction is what the diodes and the resistances take from the crests.
func (e *estimator) conduction(i float64) float64 {
	drop, resistance := 0.0, 0.0
	for _, d := range e.net.climb {
		drop += e.diodes[d].nvt * math.Log1p(8*i*e.net.share/e.diodes[d].is)
		resistance += e.diodes[d].rs
	}
	resistance = resistance/e.nd + e.net.feed*e.c.Source.Resistance
	crest := max(e.noLoad-drop, 0) / e.nd
	return min(e.noLoad, drop+e.nd*crest*(1-conductionCos(i*e.net.share*resistance, crest)))
}

// conductionCos solves sin θ − θ·cos θ = π·ir/v and returns cos θ, 0 where
// the resistance takes all.
func conductionCos(ir, v float64) float64 {
	if ir <= 0 {
		return 1
	}
	want := math.Pi * ir / max(v, 1e-300)
	if want >= 1 {
		return 0
	}
	theta := math.Cbrt(3 * want)
	for range 8 {
		f := math.Sin(theta) - theta*math.Cos(theta) - want
		theta -= f / (theta * math.Sin(theta))
		theta = min(max(theta, 1e-9), math.Pi/2)
	}
	return math.Cos(theta)
}
