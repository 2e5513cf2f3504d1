package ladder

import "math"

// wave gives the source voltage in units of its peak at a phase in [0, 1).
type wave struct {
	shape  Waveform
	edge   float64
	points []float64
}

func (s Source) wave() wave {
	w := wave{shape: s.Waveform, edge: s.Edge, points: s.Points}
	if w.shape == "" {
		w.shape = Sine
	}
	if w.edge <= 0 {
		w.edge = 1.0 / 50
	}
	return w
}

// at is the value at a phase; every shape starts at zero, rising.
func (w wave) at(phase float64) float64 {
	phase -= math.Floor(phase)
	switch w.shape {
	case Square:
		return trapezium(phase, w.edge)
	case Triangle:
		return trapezium(phase, 0.5)
	case Table:
		x := phase * float64(len(w.points))
		i := int(x)
		a, b := w.points[i%len(w.points)], w.points[(i+1)%len(w.points)]
		return a + (b-a)*(x-float64(i))
	}
	return math.Sin(2 * math.Pi * phase)
}

// trapezium rises through zero at phase 0 and falls through it at 1/2, each
// edge lasting the given part of a period.
func trapezium(phase, edge float64) float64 {
	if phase > 0.5 {
		return -trapezium(phase-0.5, edge)
	}
	return min(1, 2*phase/edge, 2*(0.5-phase)/edge)
}

// corners lists the phases in (0, 1) where the slope jumps, so that no
// integration step straddles one.
func (w wave) corners() []float64 {
	switch w.shape {
	case Square:
		e := w.edge / 2
		return []float64{e, 0.5 - e, 0.5 + e, 1 - e}
	case Triangle:
		return []float64{0.25, 0.75}
	case Table:
		if len(w.points) > 64 {
			return nil
		}
		var at []float64
		for i := 1; i < len(w.points); i++ {
			at = append(at, float64(i)/float64(len(w.points)))
		}
		return at
	}
	return nil
}

// crests gives the highest and lowest value of the shape.
func (w wave) crests() (high, low float64) {
	if w.shape != Table {
		return 1, -1
	}
	for _, p := range w.points {
		high, low = max(high, p), min(low, p)
	}
	return high, low
}
