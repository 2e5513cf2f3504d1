package ladder

// Weights are what a topology asks of each capacitor, by position: the terms
// of the charge balance, each linear in 1/C.
type Weights struct {
	Drop   []float64 // of the mean output, per charge and 1/C
	Ripple []float64 // of the output, peak to peak, per charge and 1/C
	Sum    bool      // the ripples add up; otherwise each is only its capacitor's own
	Levels []float64 // ideal no-load direct voltage, in units of half the source's swing
}

// Weights gives the charge balance of the topology at a number of stages, for
// a constant load that draws the charge 1 per period.
func (t Topology) Weights(stages int) Weights {
	n := forms[t].build(stages)
	count := len(n.capacitors)
	w := Weights{Drop: make([]float64, count), Ripple: make([]float64, count), Levels: n.capacitorLevels(1)}
	ones := make([]float64, count)
	for i := range ones {
		ones[i] = 1
		for _, p := range n.pulses {
			w.Drop[i] += p[i] * p[i] / 2
		}
	}
	total := 0.0
	for _, k := range n.column {
		alone := n
		alone.column = []int{k}
		w.Ripple[k] = alone.sawtooth(ones)
		total += w.Ripple[k]
	}
	w.Sum = n.sawtooth(ones) > total*(1-1e-9)
	return w
}
