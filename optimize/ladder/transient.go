package ladder

import (
	"context"
	"math"
	"strconv"
)

// transientTolerance is the local error of a transient, in source peaks: its
// answers are ratings and times, not digits.
const transientTolerance = 1e-4

// Surge is what one part must stand in a transient.
type Surge struct {
	Ref     string
	PeakA   float64 // greatest forward current
	Squared float64 // greatest ∫i²dt over one period [A²s]
}

// HalfSine is the length of the half sine wave that has the surge's peak and
// its ∫i²dt [s]: the form in which surge ratings are given.
func (s Surge) HalfSine() float64 {
	if s.PeakA == 0 {
		return 0
	}
	return 2 * s.Squared / (s.PeakA * s.PeakA)
}

// Envelope is the output over a transient, a point per period or longer.
type Envelope struct{ Time, Low, High []float64 }

func (e *Envelope) add(t, low, high float64) {
	e.Time, e.Low, e.High = append(e.Time, t), append(e.Low, low), append(e.High, high)
}

// StartUp is what happens from switch-on with every capacitor empty.
type StartUp struct {
	Diodes   []Surge
	Source   []Surge
	RiseS    float64 // until the output stays above the wanted voltage; infinite if not within the time
	HighestV float64 // greatest output
	Curve    Envelope
}

// SwitchOn runs the circuit from rest, the source starting at a phase (0: its
// rising zero, 0.25: the crest of a sine), until the output's least value
// over a period has passed wantedV, at most for the given time. It runs at
// least four periods, for the surges.
func SwitchOn(ctx context.Context, c Circuit, phase, wantedV, most float64) (StartUp, error) {
	s := newSystem(c)
	s.lead = phase
	r := newRunner(s, transientTolerance)
	r.stand(make([]float64, s.n+1))
	w := newWatch(s)
	out := StartUp{RiseS: math.Inf(1)}
	for period := 1; float64(period-1)*s.period < max(most, 4*s.period); period++ {
		w.next()
		err := r.span(ctx, float64(period)*s.period, s.period/50, transientTolerance, w.step)
		if err != nil {
			return out, err
		}
		w.close()
		out.HighestV = max(out.HighestV, w.high)
		out.Curve.add(r.st.start.t, w.low, w.high)
		if w.low >= wantedV && math.IsInf(out.RiseS, 1) {
			out.RiseS = r.st.start.t
		}
		if period >= 4 && out.RiseS < r.st.start.t {
			break
		}
	}
	out.Diodes, out.Source = w.diodes, w.ends
	return out, nil
}

// watch gathers surges and the output's extremes, period by period.
type watch struct {
	s            *system
	low, high    float64
	diodes, ends []Surge
	sumD, sumE   []float64
}

func newWatch(s *system) *watch {
	w := &watch{s: s, sumD: make([]float64, len(s.diodes)), sumE: make([]float64, len(s.ends))}
	for k := range s.diodes {
		w.diodes = append(w.diodes, Surge{Ref: "D" + strconv.Itoa(k+1)})
	}
	for k := range s.ends {
		w.ends = append(w.ends, Surge{Ref: "source " + strconv.Itoa(k+1)})
	}
	return w
}

func (w *watch) next() {
	w.low, w.high = math.Inf(1), math.Inf(-1)
	clear(w.sumD)
	clear(w.sumE)
}

func (w *watch) close() {
	for k := range w.diodes {
		w.diodes[k].Squared = max(w.diodes[k].Squared, w.sumD[k])
	}
	for k := range w.ends {
		w.ends[k].Squared = max(w.ends[k].Squared, w.sumE[k])
	}
}

func (w *watch) step(st *stepper, h float64) bool {
	s, p0, p1, p2 := w.s, st.start, st.mid, st.end
	v := volts(p2, s.final)
	w.low, w.high = min(w.low, v), max(w.high, v)
	for k := range w.diodes {
		e := s.diodeAt() + k
		i0, i1, i2 := max(0, p0.i[e]), max(0, p1.i[e]), max(0, p2.i[e])
		w.diodes[k].PeakA = max(w.diodes[k].PeakA, i1, i2)
		w.sumD[k] += sum3(h, i0*i0, i1*i1, i2*i2)
	}
	for k := range w.ends {
		i0, i1, i2 := s.endCurrent(p0, k), s.endCurrent(p1, k), s.endCurrent(p2, k)
		w.ends[k].PeakA = max(w.ends[k].PeakA, math.Abs(i1), math.Abs(i2))
		w.sumE[k] += sum3(h, i0*i0, i1*i1, i2*i2)
	}
	return true
}

// Discharged is the output after the source is switched off.
type Discharged struct {
	Seconds float64 // until the output is below the wanted voltage; infinite if not within the time
	EndV    float64 // at the end of the run
	Curve   Envelope
}

// SwitchOff starts from a steady state, takes the source voltage away (the
// winding stays) and runs into the circuit's own load, which is normally the
// bleeder alone, until the output is below belowV, at most for the given time.
func SwitchOff(ctx context.Context, c Circuit, from Steady, belowV, most float64) (Discharged, error) {
	s := newSystem(c)
	s.drive = 0
	s.load.Current, s.load.Power = 0, 0
	r := newRunner(s, transientTolerance)
	r.stand(from.start)
	out := Discharged{Seconds: math.Inf(1)}
	next := 0.0
	err := r.span(ctx, most, most/200, transientTolerance, func(st *stepper, h float64) bool {
		v := volts(st.end, s.final)
		out.EndV = v
		if st.end.t >= next {
			out.Curve.add(st.end.t, v, v)
			next = st.end.t + most/400
		}
		if v <= belowV {
			out.Seconds = st.end.t
			return false
		}
		return true
	})
	return out, err
}

// Shorted is what an output short circuit from the steady state does.
type Shorted struct {
	Diodes  []Surge
	PeakA   float64 // in the short
	EnergyJ float64 // let go into the short in the first period
}

// Short closes the output through a resistance, at the start of a period of
// the steady state, and runs two periods.
func Short(ctx context.Context, c Circuit, from Steady, ohms float64) (Shorted, error) {
	c.Load = Load{Resistance: ohms}
	s := newSystem(c)
	r := newRunner(s, transientTolerance)
	r.stand(from.start)
	w, e := newWatch(s), s.loadAt()
	var out Shorted
	for period := 1; period <= 2; period++ {
		w.next()
		err := r.span(ctx, float64(period)*s.period, s.period/50, transientTolerance, func(st *stepper, h float64) bool {
			i0, i1, i2 := st.start.i[e], st.mid.i[e], st.end.i[e]
			out.PeakA = max(out.PeakA, i0, i1, i2)
			if period == 1 {
				out.EnergyJ += ohms * sum3(h, i0*i0, i1*i1, i2*i2)
			}
			return w.step(st, h)
		})
		if err != nil {
			return out, err
		}
		w.close()
	}
	out.Diodes = w.diodes
	return out, nil
}

// Stepped is the output after the load changes.
type Stepped struct {
	LowestV, HighestV float64
	SettledS          float64 // until a whole period lies within 1 % of the new mean; infinite if not within the time
	Curve             Envelope
}

// LoadStep starts from a steady state and runs into the circuit's own load,
// toward the new mean that the caller has solved, at most for the given time.
func LoadStep(ctx context.Context, c Circuit, from Steady, newMeanV, most float64) (Stepped, error) {
	s := newSystem(c)
	r := newRunner(s, transientTolerance)
	r.stand(from.start)
	w := newWatch(s)
	out := Stepped{LowestV: math.Inf(1), SettledS: math.Inf(1)}
	for period := 1; float64(period-1)*s.period < most; period++ {
		w.next()
		if err := r.span(ctx, float64(period)*s.period, s.period/50, transientTolerance, w.step); err != nil {
			return out, err
		}
		out.LowestV, out.HighestV = min(out.LowestV, w.low), max(out.HighestV, w.high)
		out.Curve.add(r.st.start.t, w.low, w.high)
		if middle := (w.low + w.high) / 2; math.Abs(middle-math.Abs(newMeanV)) < 0.01*math.Abs(newMeanV) {
			out.SettledS = r.st.start.t
			break
		}
	}
	return out, nil
}
