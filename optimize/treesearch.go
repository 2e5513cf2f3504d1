package optimize

import (
	"cmp"
	"context"
	"math"
	"math/big"
	"slices"

	"golang.org/x/sync/errgroup"

	"rungwright/optimize/ladder"
)

// treeWalk is one search under way: best first over the frames' trees, the
// first design that passes being the lightest.
type treeWalk struct {
	e       *evaluator
	workers int
	frames  []*frame
	q       *frontier
	lessons lessons
	memo    map[string]*outcome // of what was simulated, over restarts
	claims  []claim
	best    *found
	tell    func(*treeWalk)

	lowest, highest, ripple     float64
	current, charge, frequency  float64
	room                        [][]balance // by frame and depth: what later capacitors add at the least
	strongest                   []float64   // by frame: the least bleeder resistance [Ω]
	simulated, broken, restarts int
	audited                     int
	rejected                    *found // the lightest that was simulated and failed
}

// found is a combination with its trial.
type found struct {
	n *node
	t *trial
}

// outcome is a simulation kept for a restart.
type outcome struct{ t *trial }

// claim is a cut that a simulation can check.
type claim struct {
	plan *Plan
	kind claimKind
	over float64 // how far beyond the guard
}

type claimKind int

const (
	tooLow claimKind = iota
	tooRippled
	tooHigh
	claimKinds
)

// auditEach is how many cuts of each kind are simulated after all: those that
// came nearest to the guard.
const auditEach = 3

func newTreeWalk(ctx context.Context, e *evaluator, workers int) (*treeWalk, error) {
	w := &treeWalk{e: e, workers: workers, memo: map[string]*outcome{}, lowest: e.supply.lowest(), highest: e.supply.highest(),
		ripple: float64(e.supply.Output.Ripple), current: e.supply.fullCurrent(), frequency: float64(e.supply.Source.Frequency)}
	w.charge = w.current * lowShare(e.supply) / w.frequency
	w.lessons.widened = 1
	var err error
	if w.frames, err = e.frames(ctx); err != nil {
		return nil, err
	}
	for _, f := range w.frames {
		w.room = append(w.room, f.room())
		w.strongest = append(w.strongest, f.strongest())
	}
	w.start()
	return w, nil
}

// room is, for each depth, what the capacitor slots beyond it add at the
// least.
func (f *frame) room() []balance {
	out := make([]balance, len(f.slots))
	for d := len(f.slots) - 2; d >= 0; d-- {
		out[d] = out[d+1]
		next := &f.slots[d+1]
		if next.kind != capacitorSlot || len(next.candidates) == 0 {
			continue
		}
		least := balance{drop: [2]float64{math.Inf(1), math.Inf(1)}, ripple: [2]float64{math.Inf(1), math.Inf(1)}}
		for i := range next.candidates {
			c := &next.candidates[i]
			for k := range 2 {
				least.drop[k], least.ripple[k] = min(least.drop[k], c.drop[k]), min(least.ripple[k], c.ripple[k])
			}
			least.column = max(least.column, c.column)
		}
		for k := range 2 {
			out[d].drop[k] += least.drop[k]
			out[d].ripple[k] += least.ripple[k]
		}
		out[d].column += least.column
	}
	return out
}

// strongest is the least resistance among the frame's bleeders.
func (f *frame) strongest() float64 {
	least := math.Inf(1)
	for i := range f.slots[f.bleederAt()].candidates {
		least = min(least, f.slots[f.bleederAt()].candidates[i].ohms)
	}
	return least
}

// start puts every frame on the frontier, with nothing counted.
func (w *treeWalk) start() {
	w.q, w.claims, w.best, w.rejected = &frontier{}, nil, nil, nil
	for _, f := range w.frames {
		for c := range f.cut {
			clear(f.cut[c])
		}
		w.q.add(f.root())
	}
}

// run finds the lightest design that passes, or that none does. When a
// simulation breaks the guard by which others were cut, the guard is widened
// and the walk starts again with what it has learned.
func (w *treeWalk) run(ctx context.Context) error {
	for {
		if err := w.descend(ctx); err != nil {
			return err
		}
		sound, err := w.audit(ctx)
		if err != nil || sound {
			return err
		}
		w.restart()
	}
}

func (w *treeWalk) restart() {
	w.restarts++
	w.lessons.widened *= 1.6
	w.start()
}

// descend walks until nothing on the frontier is lighter than the best.
func (w *treeWalk) descend(ctx context.Context) error {
	for {
		some := w.gather(ctx)
		if err := ctx.Err(); err != nil {
			return err
		}
		if len(some) == 0 {
			return nil
		}
		if err := w.simulate(ctx, some); err != nil {
			return err
		}
	}
}

// over tells whether what is left cannot be lighter than the best.
func (w *treeWalk) over() bool {
	return w.q.Len() == 0 || w.best != nil && !(*w.q)[0].before(w.best.n)
}

// gather takes leaves in the order of weight until a batch has survived every
// cheap test. Two leaves with the same capacitors and diode are not taken
// together: the first teaches what the second needs.
func (w *treeWalk) gather(ctx context.Context) []*node {
	var some []*node
	for steps := 0; len(some) < batch && !w.over(); steps++ {
		if steps%1024 == 0 {
			if ctx.Err() != nil {
				return nil
			}
			if w.tell != nil {
				w.tell(w)
			}
		}
		n := w.q.take()
		before := n.least
		if !n.skip(w.judge) {
			continue
		}
		if n.weigh(); n.least > before {
			w.q.add(n)
			continue
		}
		if n.depth == n.f.diodeAt() && !w.pairServes(n) {
			n.f.cut[cutEstimate][n.depth]++
			s := n.sibling()
			if s != nil {
				s.pair = nil
			}
			w.q.add(s)
			continue
		}
		if n.leaf() {
			if !w.pairServes(n) { // by what was learned since
				n.f.cut[cutEstimate][n.depth] += int64(len(n.f.slots[n.depth].candidates)) - int64(n.at[n.depth])
				continue
			}
			if slices.ContainsFunc(some, func(m *node) bool { return m.pair == n.pair }) {
				w.q.add(n)
				break
			}
			some = w.takeLeaf(n, some)
			continue
		}
		s := n.sibling()
		if s != nil && n.depth == n.f.diodeAt() {
			s.pair = nil
		}
		w.q.add(s)
		w.q.add(n.child())
	}
	return some
}

// takeLeaf passes on its siblings and keeps the leaf when its own estimate
// allows it.
func (w *treeWalk) takeLeaf(n *node, some []*node) []*node {
	w.q.add(n.sibling())
	p := n.plan()
	if known := w.memo[p.key()]; known != nil {
		w.settle(n, known.t)
		return some
	}
	if !w.planServes(n, p) {
		n.f.cut[cutEstimate][n.depth]++
		return some
	}
	return append(some, n)
}

func (n *node) plan() *Plan { return n.f.plan(n.at[:len(n.f.slots)]) }

// simulate judges a batch, each in its own slot, and takes in the outcomes in
// the batch's order.
func (w *treeWalk) simulate(ctx context.Context, some []*node) error {
	trials := make([]*trial, len(some))
	g, within := errgroup.WithContext(ctx)
	g.SetLimit(w.workers)
	for i, n := range some {
		g.Go(func() error {
			trials[i] = &trial{plan: n.plan()}
			return w.examine(within, n, trials[i])
		})
	}
	if err := g.Wait(); err != nil {
		return err
	}
	for i, n := range some {
		w.simulated++
		w.memo[trials[i].plan.key()] = &outcome{trials[i]}
		if dbgSim != nil {
			dbgSim(w, n, trials[i])
		}
		w.check(n, trials[i])
		w.lessons.learn(n.f.survey, w.positionOf(n, trials[i].plan), trials[i])
		w.settle(n, trials[i])
	}
	return nil
}

// bleeds is what a bleeder draws at the wanted output [A].
func (w *treeWalk) bleeds(p *Plan) float64 {
	if p.Bleeder.Part == nil {
		return 0
	}
	return float64(w.e.supply.Output.Voltage) / bleederOhms(p.Bleeder)
}

// settle takes in a simulated leaf.
func (w *treeWalk) settle(n *node, t *trial) {
	if len(t.failed) > 0 {
		n.f.cut[cutSimulated][n.depth]++
		if w.rejected == nil || n.before(w.rejected.n) {
			w.rejected = &found{n, t}
		}
		return
	}
	if w.best != nil && w.best.n.before(n) {
		w.giveBack(n)
		return
	}
	if w.best != nil {
		w.giveBack(w.best.n)
	}
	w.best = &found{n, t}
}

// giveBack returns a leaf that passed but is dearer to the frontier, where it
// is counted with the rest.
func (w *treeWalk) giveBack(n *node) {
	n.settled = true
	w.q.add(n)
}

// check counts a simulation whose figures lie beyond the guard that would have
// cut it.
func (w *treeWalk) check(n *node, t *trial) {
	x := w.forecast(n.f, t.plan, n.pair.sums)
	low, high := w.lessons.guard(trustLow, x.low), w.lessons.guard(trustHigh, x.high)
	beyond := func(k int, guard float64) bool {
		return k < len(t.corners) && math.Abs(math.Abs(t.corners[k].Steady.MeanV)/x.mean[k]-1) > guard
	}
	rippled := len(t.corners) > 0 && t.corners[0].Steady.RippleV < x.ripple*(1-w.lessons.guard(trustRipple, x.low))
	if beyond(0, low) || beyond(1, high) || rippled {
		w.broken++
	}
}

// claim keeps the cuts that came nearest to the guard, a few of each kind. It
// is always true: what is claimed is cut.
func (w *treeWalk) claim(c claim) bool {
	var same []int
	for i := range w.claims {
		if w.claims[i].kind == c.kind {
			same = append(same, i)
		}
	}
	if len(same) < auditEach {
		w.claims = append(w.claims, c)
		return true
	}
	worst := slices.MaxFunc(same, func(a, b int) int { return cmp.Compare(w.claims[a].over, w.claims[b].over) })
	if c.over < w.claims[worst].over {
		w.claims[worst] = c
	}
	return true
}

// audit simulates the cuts that came nearest to their guard. It is sound when
// all of them break what they were cut for.
func (w *treeWalk) audit(ctx context.Context) (bool, error) {
	wrong := make([]bool, len(w.claims))
	g, within := errgroup.WithContext(ctx)
	g.SetLimit(w.workers)
	for i, c := range w.claims {
		g.Go(func() (err error) {
			wrong[i], err = w.refuted(within, c)
			return err
		})
	}
	if err := g.Wait(); err != nil {
		return false, err
	}
	w.audited += len(w.claims)
	return !slices.Contains(wrong, true), nil
}

// refuted simulates a claim and tells whether it does not hold.
func (w *treeWalk) refuted(ctx context.Context, c claim) (bool, error) {
	corner := 0
	if c.kind == tooHigh {
		corner = 1
	}
	s, err := ladder.Solve(ctx, w.e.circuit(c.plan, w.e.conditions[corner]), settings(true))
	if err != nil {
		return false, ctx.Err() // no steady state: it would not pass
	}
	v := math.Abs(s.MeanV)
	switch c.kind {
	case tooLow:
		return v >= w.lowest, nil
	case tooRippled:
		return s.RippleV <= w.ripple, nil
	}
	return v <= w.highest, nil
}

// counts are the combinations by what became of them.
type counts struct {
	all, ratings, repeated, balance, estimate, simulated, dearer, answer *big.Int
}

// count adds up the space. Everything is counted once: what is left on the
// frontier is dearer.
func (w *treeWalk) count() counts {
	zero := func() *big.Int { return new(big.Int) }
	c := counts{zero(), zero(), zero(), zero(), zero(), zero(), zero(), zero()}
	byClass := [classes]*big.Int{c.repeated, c.balance, c.estimate, c.simulated}
	for _, f := range w.frames {
		all, kept := big.NewInt(1), big.NewInt(1)
		for i := range f.slots {
			all.Mul(all, big.NewInt(f.slots[i].all))
			kept.Mul(kept, big.NewInt(int64(len(f.slots[i].candidates))))
		}
		c.all.Add(c.all, all)
		c.ratings.Add(c.ratings, all.Sub(all, kept))
		for k := range f.cut {
			for d, n := range f.cut[k] {
				byClass[k].Add(byClass[k], f.below(d, n))
			}
		}
	}
	for _, n := range *w.q {
		c.dearer.Add(c.dearer, n.f.below(n.depth, n.size()))
	}
	if w.best != nil {
		c.answer.SetInt64(1)
	}
	return c
}

// below is how many combinations so many candidates of a depth stand for.
func (f *frame) below(depth int, n int64) *big.Int {
	out := big.NewInt(n)
	for d := depth + 1; d < len(f.slots); d++ {
		out.Mul(out, big.NewInt(int64(len(f.slots[d].candidates))))
	}
	return out
}

// size is how many candidates of its depth a node stands for. A settled leaf
// that went back is one.
func (n *node) size() int64 {
	if n.settled {
		return 1
	}
	return int64(len(n.f.slots[n.depth].candidates)) - int64(n.at[n.depth])
}

var dbgSim func(*treeWalk, *node, *trial)
