package ladder

import "math"

// Bound is truly optimistic: no steady state of the circuit has a mean output
// above mostMeanV, and none whose mean is at least leastMeanV has a ripple
// below leastRippleV (magnitudes, peak to peak). At heavy load the classical
// formulas overstate both drop and ripple, so they are no bounds themselves;
// how much of them is sure falls with the output's share of the no-load
// voltage, by lines that the package's random trials never found broken.
func Bound(c Circuit, leastMeanV float64) (mostMeanV, leastRippleV float64) {
	e := newEstimator(c.unbiased())
	top := e.noLoad * e.resonance()
	if c.Source.Leakage > 0 { // resonant charging can carry past the crest
		q := e.charge(e.loadAt(top))
		return top + q*e.unit, 0
	}
	return e.mostMean(top), e.leastRipple(leastMeanV)
}

// unbiased is the circuit with every capacitor at its full value, which no
// bias exceeds.
func (c Circuit) unbiased() Circuit {
	full := append([]Capacitor(nil), c.Capacitors...)
	for i := range full {
		full[i].Bias = nil
	}
	c.Capacitors = full
	return c
}

// loadAt is the load current at an output voltage.
func (e *estimator) loadAt(v float64) float64 {
	i, _ := e.c.Load.at(v, 0.01*e.c.Source.Peak)
	return i
}

// twice tells whether the output is refreshed at both crests.
func (n *netlist) twice() bool {
	first, second := 0.0, 0.0
	for _, k := range n.column {
		first += n.pulses[0][k]
		second += n.pulses[1][k]
	}
	return first > 0 && second > 0
}

// sureDrop is the part of the charge-balance drop that every steady state
// shows whose output is the share rho of its no-load voltage.
func (e *estimator) sureDrop(rho float64) float64 {
	switch {
	case e.c.Source.Waveform == Table:
		return 0
	case e.c.Source.Waveform == Square && e.net.twice():
		return 0.18
	case e.c.Source.Waveform == Square:
		return 0.18 + 0.42*rho
	}
	return 0.12 + 0.6*rho
}

// mostMean is the highest output at which the sure drop still fits under the
// no-load voltage.
func (e *estimator) mostMean(top float64) float64 {
	excess := func(v float64) float64 {
		return top - e.sureDrop(v/e.noLoad)*e.charge(e.loadAt(v))*e.unit - v
	}
	lo, hi := 0.0, top
	for k := 1; k <= 64; k++ { // the highest root, found from above
		if v := top * float64(64-k) / 64; excess(v) >= 0 {
			lo = v
			break
		}
		hi = top * float64(64-k) / 64
	}
	for range 40 {
		if mid := (lo + hi) / 2; excess(mid) >= 0 {
			lo = mid
		} else {
			hi = mid
		}
	}
	return hi
}

// leastRipple is the part of the charge-balance ripple that is sure where the
// mean is at least leastMean: the load drains the column for as long as no
// crest reaches above it.
func (e *estimator) leastRipple(leastMean float64) float64 {
	rho := leastMean / e.noLoad
	if rho < 0.4 || rho > 1 {
		return 0
	}
	away, sure := math.Acos(rho)/math.Pi, 0.65 // part of the period that a crest stands above the output
	switch e.c.Source.Waveform {
	case Square:
		if e.net.twice() || rho < 0.5 {
			return 0
		}
		sure = 0.35
	case Triangle:
		away, sure = (1-rho)/2, 0.4
	case Table:
		return 0
	}
	if e.net.twice() {
		away *= 2
	}
	return sure * (1 - away) * e.charge(e.loadAt(leastMean)) * e.ripple
}

// resonance is how far leakage inductance and the ladder's input capacitance
// can raise the swing: 1/(1 − ω²LC) for a sine, twice that for shapes with
// harmonics; endless at resonance.
func (e *estimator) resonance() float64 {
	l := e.c.Source.Leakage
	if l == 0 {
		return 1
	}
	w := 2 * math.Pi * e.c.Source.Frequency
	rise := 1 - w*w*l*e.inputCapacitance()
	if rise <= 0 {
		return math.Inf(1)
	}
	if e.c.Source.Waveform == Sine || e.c.Source.Waveform == "" {
		return 1 / rise
	}
	return 2 / rise
}

// inputCapacitance is what one winding end charges while no diode conducts.
func (e *estimator) inputCapacitance() float64 {
	n, node := e.net, e.net.ends[0].node
	sum := 0.0
	add := func(b branch, c float64) {
		if b.a == node || b.b == node {
			sum += c * math.Abs(across(e.swing, b))
		}
	}
	for k, b := range n.capacitors {
		add(b, e.values[k])
	}
	for k, b := range n.diodes {
		add(b, e.c.Diodes[k].reverseCapacitance(e.c.Source.Peak))
	}
	return sum
}
