package ladder

import (
	"context"
	"fmt"
)

// span integrates from the state in st.start to a later time, with steps of
// at most longest, calling each after every step; each returns false to stop
// early. It is the transient counterpart of a period.
func (r *runner) span(ctx context.Context, until, longest, tolerance float64, each func(st *stepper, h float64) bool) error {
	st := r.st
	h := min(longest/16, (until-st.start.t)/64)
	for count := 0; st.start.t < until*(1-1e-12); count++ {
		if count%256 == 0 && ctx.Err() != nil {
			return ctx.Err()
		}
		h = min(h, longest, until-st.start.t)
		err, ok := st.step(h)
		switch {
		case h < 1e-15*until || count > 500*maxSteps:
			return fmt.Errorf("the transient cannot go on after %.4g s", st.start.t)
		case !ok:
			r.retry()
			h /= 4
			continue
		case err > 2*tolerance:
			r.retry()
			h *= max(0.2, 0.8*cubeRoot(tolerance/err))
			continue
		}
		if !each(st, h) {
			st.advance()
			return nil
		}
		st.advance()
		h *= min(2.5, max(0.3, 0.85*cubeRoot(tolerance/max(err, 1e-300))))
	}
	return nil
}

// stand puts the integrator on a state at t = 0, which a switch may have made
// inconsistent: a vanishing step of the implicit Euler rule moves no charge
// that counts and lets what follows at once, such as a node behind resistances
// alone, jump to where it belongs.
func (r *runner) stand(x []float64) {
	copy(r.st.start.x, x)
	r.st.start.x[r.s.n] = 0
	r.st.start.t = 0
	clear(r.st.rate)
	r.s.evaluate(r.st.start)
	st := r.st
	copy(st.past, st.start.q)
	st.mid.copyFrom(st.start)
	if st.newton(st.mid, 1e-9*r.s.period) {
		st.start, st.mid = st.mid, st.start
	}
}
