package ladder

import (
	"context"
	"errors"
	"fmt"
)

// errMesh says that a remembered mesh no longer suits the state.
var errMesh = errors.New("ladder: the mesh does not suit the state")

// stuckError says that the integrator cannot go on.
type stuckError struct{ at, period float64 }

func (e *stuckError) Error() string {
	return fmt.Sprintf("the integration cannot go on at %.4g of the period: the circuit is too stiff there", e.at/e.period)
}

// Bounds of the work of one period. Past manySteps the tolerance is doubled
// again and again: what needs so many steps is the ringing of leakage
// inductance with junction capacitance, which the integrator then damps, as
// the losses of a real winding do.
const (
	manySteps = 2400
	maxSteps  = 12000
)

// runner integrates whole periods.
type runner struct {
	s         *system
	st        *stepper
	tolerance float64 // local error relative to the source peak
	stops     []float64
	mesh      []float64 // ends of the steps of the last period, in seconds
	each      func(st *stepper, h float64)
	periods   int
}

func newRunner(s *system, tolerance float64) *runner {
	r := &runner{s: s, st: newStepper(s), tolerance: tolerance}
	for _, phase := range s.wave.corners() {
		r.stops = append(r.stops, phase*s.period)
	}
	r.stops = append(r.stops, s.period)
	return r
}

// begin sets the state at the start of a period.
func (r *runner) begin(x []float64) {
	p := r.st.start
	copy(p.x, x)
	p.x[r.s.n] = 0
	p.t = 0
	clear(r.st.rate)
	r.s.evaluate(p)
	r.periods++
}

// adaptive runs one period from x, choosing its steps, and leaves the state
// in st.start. It remembers the mesh.
func (r *runner) adaptive(ctx context.Context, x []float64, tolerance float64) error {
	r.begin(x)
	period := r.s.period
	r.mesh = r.mesh[:0]
	h, next := period/400, 0
	for count := 0; next < len(r.stops); count++ {
		if count%256 == 0 && ctx.Err() != nil {
			return ctx.Err()
		}
		left := r.stops[next] - r.st.start.t
		last := h >= left*(1-1e-9)
		if last {
			h = left
		} else if h > left/2 {
			h = left / 2
		}
		if count > manySteps && count%(manySteps/8) == 0 {
			tolerance *= 2
		}
		err, ok := r.st.step(h)
		if count > maxSteps || h < 1e-13*period {
			return &stuckError{r.st.start.t, period}
		}
		if !ok {
			r.retry()
			h /= 4
			continue
		}
		if err > 2*tolerance {
			r.retry()
			h *= max(0.2, 0.8*cubeRoot(tolerance/err))
			continue
		}
		if last {
			r.st.end.t = r.stops[next]
			next++
		}
		r.accept(h)
		r.mesh = append(r.mesh, r.st.start.t)
		h = min(h*min(2.5, max(0.3, 0.85*cubeRoot(tolerance/max(err, 1e-300)))), period/100)
	}
	return nil
}

// retry forgets a failed step.
func (r *runner) retry() { clear(r.st.rate) }

func (r *runner) accept(h float64) {
	if r.each != nil {
		r.each(r.st, h)
	}
	r.st.advance()
	if r.st.sens != nil {
		r.st.sens.advance()
	}
}

// repeat runs one period from x over the remembered mesh, so that the map
// from start to end of the period is smooth.
func (r *runner) repeat(ctx context.Context, x []float64) error {
	if err := ctx.Err(); err != nil {
		return err
	}
	r.begin(x)
	for _, t := range r.mesh {
		h := t - r.st.start.t
		if _, ok := r.st.step(h); !ok {
			return errMesh
		}
		r.st.end.t = t
		r.accept(h)
	}
	return nil
}
