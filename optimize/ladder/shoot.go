package ladder

import (
	"context"
	"errors"
	"fmt"
	"math"

	"gonum.org/v1/gonum/mat"
)

// Settings tunes a solve; the zero value is right.
type Settings struct {
	Tolerance float64 // local error relative to the source peak; zero: 1e-6
	Waves     bool    // keep the waveforms
	Start     *Steady // a neighbour's solution to start from; nil: the estimate
}

// NoSteadyError says that no periodic steady state was found, and why.
type NoSteadyError struct{ Why string }

func (e *NoSteadyError) Error() string { return "no steady state: " + e.Why }

// Solve finds the periodic steady state: the state that one period of the
// source returns to itself. It shoots (after Aprille and Trick, Proc. IEEE 60
// (1972) 108, from memory): Newton on x(T) − x(0) = 0 with the sensitivity
// carried through the integrator's own steps, on a mesh that is held fixed
// once the answer is near. The error is that of Check, of the context, or a
// *NoSteadyError.
func Solve(ctx context.Context, c Circuit, set *Settings) (Steady, error) {
	if bad := c.Check(); len(bad) > 0 {
		return Steady{}, errors.Join(bad...)
	}
	if set == nil {
		set = &Settings{}
	}
	sh := newShooter(c, set)
	err := sh.approach(ctx, roundsDirect)
	var none *NoSteadyError
	if errors.As(err, &none) {
		err = sh.descend(ctx)
	}
	if errors.As(err, &none) {
		err = sh.fromRest(ctx)
	}
	out := Steady{}
	if err == nil {
		out, err = sh.settle(ctx)
	}
	if errors.As(err, &none) {
		return traced(ctx, c, set, err)
	}
	return out, err
}

// traced answers for a circuit that is as good as unloaded, whose voltages
// leakage alone decides, with a trace of load that does not show: up to a
// ten-thousandth of the charge that its capacitors hold per period. Other
// circuits keep their error.
func traced(ctx context.Context, c Circuit, set *Settings, failed error) (Steady, error) {
	e := newEstimator(c)
	unit := math.Inf(1)
	for _, k := range c.Capacitors {
		unit = min(unit, k.C*c.Source.Frequency*c.Source.Peak)
	}
	for _, share := range []float64{1e-5, 1e-4} {
		if e.loadAt(e.noLoad) > share*unit {
			continue
		}
		more := c
		more.Load.Resistance = sideBySide(c.Load.Resistance, e.noLoad/(share*unit))
		sh := newShooter(more, set)
		if err := sh.approach(ctx, roundsDirect); err != nil {
			continue
		}
		if out, err := sh.settle(ctx); err == nil {
			out.Note = fmt.Sprintf("nearly unloaded, where leakage alone sets the voltage: solved with a trace of load, %.2g A", share*unit)
			return out, nil
		}
	}
	return Steady{}, failed
}

// sideBySide is two resistances in parallel; zero means none.
func sideBySide(a, b float64) float64 {
	if a == 0 {
		return b
	}
	return a * b / (a + b)
}

// descend comes to a circuit that resists, such as one without load, whose
// diodes hardly conduct, through a row of circuits in which every diode leaks
// less and less: from each to the next the voltages rise a little, so that
// the diodes conduct and Newton has something to hold.
func (sh *shooter) descend(ctx context.Context) error {
	sh.x = sh.guess()
	unit := 1e9 * sh.s.whisper
	for leak := 0.3; leak > 1e-9; leak /= 8 {
		sh.s.leakMore(leak * unit)
		if err := sh.approach(ctx, roundsEach); err != nil {
			var none *NoSteadyError
			if errors.As(err, &none) && leak > 1e-8 {
				continue
			}
			return err
		}
	}
	sh.s.leakMore(0)
	return sh.approach(ctx, roundsDirect)
}

// fromRest switches the circuit on and lets it run before Newton tries again:
// the way to what a hopeless overload ends in.
func (sh *shooter) fromRest(ctx context.Context) error {
	sh.s.leakMore(0)
	clear(sh.x)
	for range plainRest {
		if err := sh.plain(ctx); err != nil {
			return sh.explain(err)
		}
	}
	return sh.approach(ctx, roundsDirect)
}

// Limits of the shooting.
const (
	roundsDirect = 24   // periods for the first approach, and for the last
	roundsEach   = 12   // periods for each circuit on the way down
	maxRounds    = 60   // periods to close the last digits
	nearEnough   = 5e-4 // Newton step, in source peaks, below which the mesh is held
	closed       = 1e-5 // Newton step, in source peaks, that ends the search
	closedCharge = 1e-4 // charge, in the load's, that the period may leave in a capacitor
	plainRest    = 40   // periods run plainly from rest
	adrift       = 1e-7 // gap, in source peaks, at which a circuit that nothing loads is left
	roughly      = 2e-4 // Newton step that is accepted when the last digits do not settle
	plainStart   = 2    // periods run plainly before the first Newton step
)

// shooter is one solve.
type shooter struct {
	c     Circuit
	set   *Settings
	s     *system
	r     *runner
	x     []float64 // state at the start of the period
	gap   []float64 // x(T) − x(0)
	lu    mat.LU
	ready bool // lu holds a usable I − Φ
	delta []float64
	round int
	note  string
}

func newShooter(c Circuit, set *Settings) *shooter {
	s := newSystem(c)
	tolerance := set.Tolerance
	if tolerance <= 0 {
		tolerance = 1e-6
	}
	sh := &shooter{c: c, set: set, s: s, r: newRunner(s, tolerance),
		gap: make([]float64, s.n), delta: make([]float64, s.n)}
	sh.x = sh.guess()
	return sh
}

// guess is a neighbour's state, or the charge balance.
func (sh *shooter) guess() []float64 {
	s := sh.s
	x := make([]float64, s.n+1)
	if n := sh.set.Start; n != nil && len(n.start) == s.n+1 {
		copy(x, n.start)
		return x
	}
	e := newEstimator(sh.c)
	for i, v := range e.state(e.solve().LoadA) {
		x[s.m.place[i]] = v
	}
	sh.fillInner(x)
	return x
}

// fillInner sets the nodes inside capacitors and after a filter to the
// voltage of the node beside them, where no current flows.
func (sh *shooter) fillInner(x []float64) {
	s := sh.s
	for e := s.resistAt(); e < s.loadAt(); e++ {
		x[s.b[e]] = x[s.a[e]]
	}
	x[s.n] = 0
}

// run integrates one period from sh.x and notes the gap. With fresh it
// carries the sensitivity and factors I − Φ.
func (sh *shooter) run(ctx context.Context, held, fresh bool, tolerance float64) error {
	sh.round++
	st := sh.r.st
	st.sens = nil
	if fresh {
		st.sens = newSensitivity(sh.s)
	}
	var err error
	if held {
		err = sh.r.repeat(ctx, sh.x)
	} else {
		err = sh.r.adaptive(ctx, sh.x, tolerance)
	}
	if err != nil {
		return err
	}
	for i := range sh.gap {
		sh.gap[i] = st.start.x[i] - sh.x[i]
	}
	if fresh {
		sh.factor()
	}
	return nil
}

// factor decomposes I − Φ.
func (sh *shooter) factor() {
	n := sh.s.n
	m := mat.NewDense(n, n, nil)
	for i := range n {
		for j := range n {
			v := -sh.r.st.sens.start[i*n+j]
			if i == j {
				v++
			}
			m.Set(i, j, v)
		}
	}
	sh.lu.Factorize(m)
	sh.ready = sh.lu.Cond() < 1e15
}

// newton solves (I − Φ)·delta = gap and returns the largest change of a node
// voltage in source peaks, infinite when there is none.
func (sh *shooter) newton() float64 {
	if !sh.ready {
		return math.Inf(1)
	}
	v := mat.NewVecDense(sh.s.n, sh.delta)
	if err := sh.lu.SolveVecTo(v, false, mat.NewVecDense(sh.s.n, sh.gap)); err != nil {
		var badly mat.Condition
		if !errors.As(err, &badly) {
			return math.Inf(1)
		}
	}
	return sh.size(sh.delta)
}

// size is the largest node voltage of a vector in source peaks.
func (sh *shooter) size(v []float64) float64 {
	worst := 0.0
	for i, x := range v {
		if sh.s.volts[i] {
			worst = max(worst, math.Abs(x))
		}
		if x != x {
			return math.Inf(1)
		}
	}
	return worst / sh.s.peak
}

// moderate scales a Newton step so that no capacitor's voltage moves by more
// than a third of the source peak.
func (sh *shooter) moderate() {
	worst := 0.0
	at := func(i int) float64 {
		if i == sh.s.n {
			return 0
		}
		return sh.delta[i]
	}
	for _, b := range sh.s.caps {
		worst = max(worst, math.Abs(at(b.a)-at(b.b)))
	}
	if most := sh.s.peak / 3; worst > most {
		for i := range sh.delta {
			sh.delta[i] *= most / worst
		}
	}
}

// shift moves the state by f times the Newton step.
func (sh *shooter) shift(f float64) {
	for i, d := range sh.delta {
		sh.x[i] += f * d
	}
}

// plain runs one period and takes its end as the next start.
func (sh *shooter) plain(ctx context.Context) error {
	if err := sh.run(ctx, false, false, 30*sh.r.tolerance); err != nil {
		return err
	}
	copy(sh.x, sh.r.st.start.x)
	return nil
}

// approach brings the state near the answer with adaptive periods.
func (sh *shooter) approach(ctx context.Context, rounds int) error {
	rounds += sh.round
	plain := plainStart
	if sh.set.Start != nil {
		plain = 0
	}
	for k := range plain {
		err := sh.plain(ctx)
		var stuck *stuckError
		if k == 0 && errors.As(err, &stuck) { // an impossible guess: start from rest instead
			clear(sh.x)
			err = sh.plain(ctx)
		}
		if err != nil {
			return sh.explain(err)
		}
	}
	if err := sh.run(ctx, false, true, sh.r.tolerance); err != nil {
		return sh.explain(err)
	}
	for sh.round < rounds {
		size := sh.newton()
		if size <= nearEnough {
			sh.shift(1)
			return nil
		}
		if err := sh.improve(ctx, size); err != nil {
			return sh.explain(err)
		}
	}
	if sh.c.Load.none() && sh.size(sh.gap) <= adrift {
		sh.note = "nothing draws on the output: its voltage is set by leakage alone and known to a few diode drops"
		return nil
	}
	return &NoSteadyError{fmt.Sprintf("the period still does not close to %.2g V after %d periods",
		sh.size(sh.gap)*sh.s.peak, sh.round)}
}

// improve takes one Newton step if it brings the period nearer to closing,
// shorter if need be, and plain periods where it does not.
func (sh *shooter) improve(ctx context.Context, size float64) error {
	before := sh.size(sh.gap)
	if !math.IsInf(size, 1) {
		sh.moderate()
		old := append([]float64(nil), sh.x...)
		for f := 1.0; f > 0.1; f /= 3 {
			copy(sh.x, old)
			sh.shift(f)
			err := sh.run(ctx, false, true, sh.r.tolerance)
			if ctx.Err() != nil {
				return err
			}
			if err == nil && sh.size(sh.gap) < before {
				return nil
			}
		}
		copy(sh.x, old)
	}
	for range 3 {
		if err := sh.plain(ctx); err != nil {
			return err
		}
	}
	return sh.run(ctx, false, true, sh.r.tolerance)
}

// settle holds the mesh and closes the period, measuring as it goes.
func (sh *shooter) settle(ctx context.Context) (Steady, error) {
	fresh := false
	last := nearEnough
	for most := sh.round + maxRounds; ; {
		g := newGauge(sh.s, &sh.c, sh.set.Waves)
		sh.r.each = g.step
		g.begin(sh.r)
		err := sh.run(ctx, true, fresh, 0)
		sh.r.each = nil
		if errors.Is(err, errMesh) {
			err = sh.run(ctx, false, true, sh.r.tolerance)
			sh.newton()
			sh.moderate()
			sh.shift(1)
			last = 1
			if err != nil {
				return Steady{}, sh.explain(err)
			}
			continue
		}
		if err != nil {
			return Steady{}, sh.explain(err)
		}
		size := sh.newton()
		if size <= closed && (sh.astray() <= closedCharge*g.load || size <= closed/1000) {
			return g.finish(sh), nil
		}
		if sh.note != "" && sh.size(sh.gap) <= adrift || sh.round > most-maxRounds/2 && size <= roughly {
			return g.finish(sh), nil
		}
		if sh.round >= most {
			return Steady{}, &NoSteadyError{"the last digits do not settle"}
		}
		fresh = size > 0.1*last
		last = size
		sh.moderate()
		sh.shift(1)
	}
}

// astray is the most charge that any capacitor gains over the period [C].
func (sh *shooter) astray() float64 {
	worst, at := 0.0, sh.r.st.start
	for k := range sh.s.stores {
		worst = max(worst, math.Abs(at.c[k]*across(sh.gap, sh.s.branch(k))))
	}
	return worst
}

// explain turns an integrator's complaint into an answer.
func (sh *shooter) explain(err error) error {
	var stuck *stuckError
	if errors.As(err, &stuck) {
		return &NoSteadyError{stuck.Error()}
	}
	return err
}

func cubeRoot(x float64) float64 { return math.Cbrt(x) }
