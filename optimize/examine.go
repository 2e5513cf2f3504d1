package optimize

import (
	"context"
	"errors"
	"math"

	"rungwright/optimize/ladder"
	"rungwright/ratings"
)

// examine simulates a plan corner by corner and stops at the first thing that
// it breaks; what passes is then judged in full. The first of its kind runs
// the high corner in any case, for what it teaches.
func (w *treeWalk) examine(ctx context.Context, n *node, t *trial) error {
	at := w.positionOf(n, t.plan)
	first := w.lessons.nearest(&at, hasMean(1)).anchor == nil
	for k, c := range w.e.conditions {
		circuit := w.e.circuit(t.plan, c)
		s, err := solveNear(ctx, circuit, w.neighbour(&at, k, &circuit))
		if ctx.Err() != nil {
			return ctx.Err()
		}
		if err != nil {
			t.fails("%s: %s", c.name, err)
			return nil
		}
		t.circuits = append(t.circuits, circuit)
		t.corners = append(t.corners, Corner{Name: c.name, LoadA: s.LoadA, Line: c.line, Ambient: float64(w.e.supply.Surroundings.Ambient), Steady: s})
		w.e.checkCorner(t, k)
		w.e.checkParts(t)
		w.checkWinding(t, k)
		if len(t.failed) > 0 && (k > 0 || !first) {
			return nil
		}
	}
	if len(t.failed) > 0 {
		return nil
	}
	whole := &trial{plan: t.plan}
	if err := w.e.whole(ctx, whole); err != nil {
		return err
	}
	*t = *whole
	return nil
}

// solveNear starts from a neighbour's solution, or afresh where that leads
// nowhere.
func solveNear(ctx context.Context, c ladder.Circuit, near *ladder.Steady) (ladder.Steady, error) {
	s, err := ladder.Solve(ctx, c, &ladder.Settings{Tolerance: quickTolerance, Start: near})
	var none *ladder.NoSteadyError
	if near != nil && errors.As(err, &none) {
		s, err = ladder.Solve(ctx, c, &ladder.Settings{Tolerance: quickTolerance})
	}
	return s, err
}

// checkWinding notes what a corner asks too much of the source.
func (w *treeWalk) checkWinding(t *trial, corner int) {
	if w.e.winding == nil {
		return
	}
	u := sourceUse(t, corner, w.e.supply.Surroundings.Ambient, w.e.supply.Source.Frequency)
	for _, s := range ratings.Judge(w.e.policy, w.e.winding, []ratings.Use{u}) {
		if s.Over {
			t.fails("%s (%s): %s at %.0f %% of its limit, %s", s.Ref, s.Part, s.Quantity, 100*s.Ratio, s.Corner)
		}
	}
}

// quickTolerance is the local error, in source peaks, that is enough to see
// whether a plan passes; what passes is simulated again at the solver's own.
const quickTolerance = 1e-5

// neighbour is the solution at a corner of the nearest design whose circuit
// has the same nodes, to start from; nil when there is none near.
func (w *treeWalk) neighbour(at *position, corner int, c *ladder.Circuit) *ladder.Steady {
	best, nearest := 1.0, (*trial)(nil)
	for i := range w.lessons.anchors {
		a := &w.lessons.anchors[i]
		if a.topology != at.topology || a.stages != at.stages || len(a.trial.corners) <= corner {
			continue
		}
		if d := at.distance(a) + differs(at, a); d < best && sameNodes(&a.trial.circuits[corner], c) {
			best, nearest = d, a.trial
		}
	}
	if nearest == nil {
		return nil
	}
	return &nearest.corners[corner].Steady
}

// sameNodes tells whether two circuits of one topology have their inner nodes
// at the same capacitors.
func sameNodes(a, b *ladder.Circuit) bool {
	if len(a.Capacitors) != len(b.Capacitors) || (a.Filter.R > 0) != (b.Filter.R > 0) {
		return false
	}
	for i := range a.Capacitors {
		if (a.Capacitors[i].ESR > 0) != (b.Capacitors[i].ESR > 0) {
			return false
		}
	}
	return (a.Source.Resistance > 0) == (b.Source.Resistance > 0) && (a.Source.Leakage > 0) == (b.Source.Leakage > 0)
}

// positionOf is where a leaf lies among the anchors.
func (w *treeWalk) positionOf(n *node, p *Plan) position {
	return w.position(n.f, n.pair.sums, p.Diodes[0], w.bleeds(p))
}

// differs is 1 for another diode.
func differs(p *position, a *anchor) float64 {
	if p.diode != a.diode {
		return 1
	}
	return 0
}

// infinite is the distance to an anchor that does not exist.
var infinite = math.Inf(1)
