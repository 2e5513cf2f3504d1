package optimize

import (
	"container/heap"
	"context"
	"errors"
	"math"
	"runtime"
	"strings"

	"github.com/shopspring/decimal"
	"golang.org/x/sync/errgroup"

	"rungwright/catalog"
	"rungwright/optimize/order"
	"rungwright/ratings"
)

// Options tunes a search; the zero value, or nil, is right.
type Options struct {
	Progress  func(Progress)  // called now and then from the calling goroutine
	Policy    *ratings.Policy // nil: the supply's
	Workers   int             // simulations at once; zero: all cores. The answer does not depend on it
	RunnersUp int             // how many to look for beyond the answer; zero: 3, negative: none
}

// Progress is how far a search is.
type Progress struct {
	Phase    string
	Done     int64 // combinations settled
	Total    int64
	BestCost decimal.Decimal // of the best design so far, the whole build
	HasBest  bool
	Bound    decimal.Decimal // nothing that is left costs less, for the whole build
}

// Answer is what a search found. Design is nil when nothing meets the
// targets; then Why says so. A search that was stopped early has a
// Certificate that is not Proved.
type Answer struct {
	Design      *Design
	Why         *WhyNot
	Certificate Certificate
}

// Pick finds the design of least weight (cost, unless the supply asks for
// another objective) that meets every target and keeps every limit, and
// proves it: combinations are taken in the order of their weight, so that the
// first that passes is the answer. What is passed over before is counted in
// the certificate by the argument that excluded it. When ctx ends the search
// stops and says what it has proved so far; the error is then nil.
func Pick(ctx context.Context, s Supply, c *catalog.Catalog, o *Options) (Answer, error) {
	if o == nil {
		o = &Options{}
	}
	e, err := newEvaluator(s, c, o.Policy)
	if err != nil {
		return Answer{}, &InputError{err}
	}
	w := newWalk(ctx, e, o)
	if err := w.run(ctx); err != nil && !errors.Is(err, context.Canceled) && !errors.Is(err, context.DeadlineExceeded) {
		return Answer{}, err
	}
	return w.answer(), nil
}

// InputError is the person's mistake that only shows when supply and catalog
// meet: a part or policy that does not exist.
type InputError struct{ Err error }

func (e *InputError) Error() string { return e.Err.Error() }
func (e *InputError) Unwrap() error { return e.Err }

// batch is how many combinations are simulated together. It is fixed, so that
// the count of simulations does not depend on the number of cores.
const batch = 4

// furthest is how many more simulations the search for runners-up may take.
const furthest = 12

// walk is one search under way.
type walk struct {
	e         *evaluator
	o         *Options
	regions   []*region
	q         *queue
	cert      Certificate
	best      *Design
	seen      map[string]bool // ladders already accepted, bleeder aside
	runners   []RunnerUp
	nearest   *trial
	after     int // simulations since the answer
	shortfall float64
	causes    map[string]int
	bound     int64
	cheapest  string // the cheapest rejected by simulation and why
}

func newWalk(ctx context.Context, e *evaluator, o *Options) *walk {
	w := &walk{e: e, o: o, seen: map[string]bool{}, shortfall: math.Inf(1), causes: map[string]int{}}
	w.regions = e.regions(ctx)
	for _, r := range w.regions {
		w.cert.Combinations += r.total
		w.cert.Dominated += r.dropped
		w.cert.Bounded += r.bounded
		w.cert.Estimated += r.guarded
	}
	w.q = start(w.regions)
	w.cert.Guard = e.guard().meanMost - 1
	return w
}

// run walks until the answer and its runners-up are found, or nothing is left.
func (w *walk) run(ctx context.Context) error {
	for {
		w.report()
		some := w.gather(ctx)
		if err := ctx.Err(); err != nil {
			return err
		}
		if len(some) == 0 {
			w.cert.Proved = true
			return nil
		}
		trials, err := w.simulate(ctx, some)
		if err != nil {
			return err
		}
		for i, t := range trials {
			w.settle(some[i], t)
		}
		if w.best != nil && (len(w.runners) >= w.wantedRunners() || w.after >= furthest) {
			return nil
		}
	}
}

func (w *walk) wantedRunners() int {
	switch {
	case w.o.RunnersUp < 0:
		return 0
	case w.o.RunnersUp == 0:
		return 3
	}
	return w.o.RunnersUp
}

// gather takes combinations in the order of weight until a batch of them has
// survived every cheap argument.
func (w *walk) gather(ctx context.Context) []*combination {
	var some []*combination
	for count := 0; len(some) < batch && w.q.Len() > 0; count++ {
		if count%256 == 0 {
			if ctx.Err() != nil {
				return nil
			}
			w.report()
		}
		c := heap.Pop(w.q).(*combination)
		w.bound = c.weight
		upTo, verdict := w.e.sift(c)
		w.q.follow(c, upTo)
		block := c.block(upTo)
		switch verdict {
		case survives:
			if w.best != nil && w.seen[c.ladderKey()] {
				w.count(&w.cert.Dearer, 1)
				continue
			}
			some = append(some, c)
		case outOfBound:
			w.count(&w.cert.Bounded, block)
		case outOfGuard:
			w.count(&w.cert.Estimated, block)
		}
	}
	return some
}

// count adds to a class of the certificate until the answer is found; the
// rest is dearer than the answer anyway.
func (w *walk) count(class *int64, n int64) {
	if w.best == nil {
		*class += n
	}
}

// block is how many combinations leave with one whose successors are followed
// up to an index only. Below the last raised index none is followed, and what
// lies behind in its own direction leaves with it.
func (c *combination) block(upTo int) int64 {
	n, last := int64(1), c.last()
	if upTo < last {
		n, upTo = int64(len(c.in.lists[last])-c.at[last]), last
	}
	for k := upTo + 1; k < len(c.at); k++ {
		n *= int64(len(c.in.lists[k]))
	}
	return n
}

// ladderKey is the combination without its bleeder.
func (c *combination) ladderKey() string {
	p := *c.plan()
	p.Bleeder = Group{}
	return p.Summary()
}

// simulate judges a batch, each in its own slot.
func (w *walk) simulate(ctx context.Context, some []*combination) ([]*trial, error) {
	trials := make([]*trial, len(some))
	g, ctx := errgroup.WithContext(ctx)
	g.SetLimit(max(1, w.workers()))
	for i, c := range some {
		g.Go(func() error {
			t := &trial{plan: c.plan()}
			trials[i] = t
			return w.e.prove(ctx, t)
		})
	}
	err := g.Wait()
	return trials, err
}

func (w *walk) workers() int {
	if w.o.Workers > 0 {
		return w.o.Workers
	}
	return runtime.GOMAXPROCS(0)
}

// prove judges a plan by simulation and stops at the first thing it breaks.
func (e *evaluator) prove(ctx context.Context, t *trial) error {
	if err := e.simulate(ctx, t, true); err != nil || len(t.failed) > 0 {
		return err
	}
	fine := &trial{plan: t.plan}
	if err := e.whole(ctx, fine); err != nil {
		return err
	}
	*t = *fine
	return nil
}

// settle takes in what a simulation found.
func (w *walk) settle(c *combination, t *trial) {
	if w.e.compare(c, t) {
		w.cert.GuardBroken++
	}
	w.e.learn(c, t)
	if len(t.failed) > 0 {
		if w.best == nil {
			w.cert.Simulated++
			w.reject(c, t)
		} else {
			w.after++
		}
		return
	}
	if w.best == nil {
		w.cert.Simulated++
		w.best = w.e.design(t)
		w.seen[c.ladderKey()] = true
		return
	}
	if key := c.ladderKey(); !w.seen[key] && len(w.runners) < w.wantedRunners() {
		w.seen[key] = true
		d := w.e.design(t)
		w.runners = append(w.runners, RunnerUp{Summary: t.plan.Summary(), UnitCost: d.UnitCost, Note: w.difference(d)})
	}
	w.after++
}

// difference says what a runner-up gives for its price.
func (w *walk) difference(d *Design) string {
	var said []string
	for i, t := range d.Targets {
		if i < len(w.best.Targets) && t.Name == "ripple, peak to peak" {
			said = append(said, "ripple "+volts(t.Got))
		}
	}
	return strings.Join(said, ", ")
}

// reject remembers the cheapest rejected, the nearest, and what is broken how
// often.
func (w *walk) reject(c *combination, t *trial) {
	if w.cheapest == "" {
		w.cheapest = t.plan.Summary() + ": " + t.failed[0]
	}
	if gap := w.e.gap(t); gap < w.shortfall {
		w.shortfall, w.nearest = gap, t
	}
	w.causes[cause(t.failed[0])]++
}

// report tells the caller how far it is.
func (w *walk) report() {
	if w.o.Progress == nil {
		return
	}
	p := Progress{Phase: "searching", Total: w.cert.Combinations,
		Done:  w.cert.Dominated + w.cert.Bounded + w.cert.Estimated + int64(w.cert.Simulated),
		Bound: w.money(w.bound)}
	if w.best != nil {
		p.Phase, p.HasBest, p.BestCost = "looking for runners-up", true, w.best.BuildCost
	}
	w.o.Progress(p)
}

// money turns minor units into an amount.
func (w *walk) money(minor int64) decimal.Decimal {
	return decimal.New(minor, -int32(order.Digits(w.e.terms.Currency)))
}
