package optimize

import (
	"context"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"rungwright/catalog"
	"rungwright/optimize/ladder"
)

// frame is a part of the space in which every choice is independent of the
// others: a topology, a stage count and a way to share the capacitor positions
// among parts, with one slot for each choice. Its combinations are the product
// of its slots.
type frame struct {
	id       int
	topology ladder.Topology
	stages   int
	sharing  string
	survey   *surveyor
	slots    []slot // capacitors, then diodes, then the bleeder
	beyond   []int64
	cut      [classes][]int64 // by class and depth, in candidates of that depth
}

// The depths of a frame, from the end.
func (f *frame) diodeAt() int   { return len(f.slots) - 2 }
func (f *frame) bleederAt() int { return len(f.slots) - 1 }

// sharing is a way to share capacitor positions among parts: sets of
// positions, joined in slots. Two sets in one slot take the same part in
// different groups.
type sharing struct {
	name  string
	slots [][][]int
}

// sharings lists those of a topology at a stage count; what comes to the same
// is listed once.
func sharings(t ladder.Topology, stages int) []sharing {
	count := t.CapacitorCount(stages)
	split := func(first func(i int) bool) (a, b []int) {
		for i := range count {
			if first(i) {
				a = append(a, i)
			} else {
				b = append(b, i)
			}
		}
		return a, b
	}
	every, _ := split(func(int) bool { return true })
	out := []sharing{{"one capacitor for all", [][][]int{{every}}}}
	seen := map[string]bool{}
	add := func(name string, a, b []int) {
		if key := fmt.Sprint(a, b); len(a) > 0 && len(b) > 0 && !seen[key] && !seen[fmt.Sprint(b, a)] {
			seen[key] = true
			out = append(out, sharing{name, [][][]int{{a}, {b}}}, sharing{name + ", one part in two groups", [][][]int{{a, b}}})
		}
	}
	firsts, smoothing := t.FirstCoupling(stages), t.SmoothingColumn(stages)
	a, b := split(func(i int) bool { return firsts[i] })
	add("the first coupling capacitor apart", a, b)
	a, b = split(func(i int) bool { return !smoothing[i] })
	add("coupling and smoothing apart", a, b)
	for k := 1; k < stages; k++ {
		a, b = split(func(i int) bool { return stageOf(t, stages, i) < k })
		add("tapered above stage "+strconv.Itoa(k), a, b)
	}
	return out
}

// stageOf is the stage of a capacitor position, from 0 at the source.
func stageOf(t ladder.Topology, stages, position int) int {
	switch t {
	case ladder.FullWave:
		return position / 3
	case ladder.OddMultiple:
		return max(0, position-1) / 2
	case ladder.Bipolar:
		return position % (2 * stages) / 2
	case ladder.BridgeDoubler:
		return 0
	}
	return position / 2
}

// frames builds the whole space that the supply leaves open.
func (e *evaluator) frames(ctx context.Context) ([]*frame, error) {
	p := e.pools()
	b := frameBuilder{e: e, capacitors: p.capacitorGroups(), diodes: p.diodeGroups(), resistors: p.resistors}
	for _, t := range e.topologies() {
		for n := max(1, e.supply.Choose.StagesMin); n <= e.mostStages(t); n++ {
			if ctx.Err() != nil {
				return nil, ctx.Err()
			}
			b.build(t, n)
		}
	}
	return b.frames, nil
}

type frameBuilder struct {
	e          *evaluator
	capacitors []Group
	diodes     []Group
	resistors  []*catalog.Part
	frames     []*frame
}

// build adds the frames of one topology and stage count.
func (b *frameBuilder) build(t ladder.Topology, n int) {
	s := b.e.surveyor(t, n)
	hopeless := s.factor*s.crest[0]*reachAbove < b.e.supply.lowest()
	var diodes, bleeders slot
	if hopeless {
		diodes, bleeders = slot{kind: diodeSlot, all: int64(len(b.diodes))}, slot{kind: bleederSlot, all: b.bleederCount()}
	} else {
		diodes, bleeders = s.diodes(b.diodes), s.bleeders(b.resistors)
	}
	for _, sh := range sharings(t, n) {
		f := &frame{id: len(b.frames), topology: t, stages: n, sharing: sh.name, survey: s}
		for _, sets := range sh.slots {
			if hopeless {
				f.slots = append(f.slots, slot{kind: capacitorSlot, sets: sets, all: b.capacitorCount(len(sets))})
				continue
			}
			f.slots = append(f.slots, s.capacitors(b.capacitors, sets...))
		}
		f.slots = append(f.slots, diodes, bleeders)
		f.close()
		b.frames = append(b.frames, f)
	}
}

// bleederCount and capacitorCount are how many candidates a slot has before
// any is left out.
func (b *frameBuilder) bleederCount() int64 {
	if b.e.supply.Output.Discharge.Below == 0 {
		return 1
	}
	return int64(len(b.resistors)) * mostBleeder
}

func (b *frameBuilder) capacitorCount(sets int) int64 {
	if sets == 1 {
		return int64(len(b.capacitors))
	}
	return int64(len(b.capacitors)) * (mostParallel - 1)
}

// close prepares what the walk needs.
func (f *frame) close() {
	f.beyond = make([]int64, len(f.slots))
	for d := len(f.slots) - 2; d >= 0; d-- {
		if f.empty() {
			break
		}
		f.beyond[d] = f.beyond[d+1] + f.slots[d+1].least()
	}
	for c := range f.cut {
		f.cut[c] = make([]int64, len(f.slots))
	}
}

// empty tells whether a slot has no candidate.
func (f *frame) empty() bool {
	return slices.ContainsFunc(f.slots, func(s slot) bool { return len(s.candidates) == 0 })
}

// plan is the parts that a full row of choices stands for.
func (f *frame) plan(at []int32) *Plan {
	p := &Plan{Topology: f.topology, Stages: f.stages, Capacitors: make([]Group, f.topology.CapacitorCount(f.stages)),
		Diodes: make([]Group, f.topology.DiodeCount(f.stages))}
	for d, s := range f.slots {
		c := &s.candidates[at[d]]
		switch s.kind {
		case capacitorSlot:
			for k, set := range s.sets {
				for _, i := range set {
					p.Capacitors[i] = c.groups[k]
				}
			}
		case diodeSlot:
			for i := range p.Diodes {
				p.Diodes[i] = c.groups[0]
			}
		case bleederSlot:
			p.Bleeder = c.groups[0]
		}
	}
	return p
}

// key tells plans apart.
func (p *Plan) key() string {
	var b strings.Builder
	fmt.Fprintf(&b, "%s %d", p.Topology, p.Stages)
	for _, list := range [][]Group{p.Capacitors, p.Diodes, {p.Bleeder, p.Surge}} {
		for _, g := range list {
			if g.Part == nil {
				b.WriteString(" -")
				continue
			}
			fmt.Fprintf(&b, " %s/%d/%d", g.Part.Number, g.Series, g.Parallel)
		}
	}
	return b.String()
}
