package order

import (
	"cmp"
	"slices"
)

// mostLabels bounds the partial answers kept.
const mostLabels = 50000

// label is a partial answer: the lines so far, what they add and raise.
type label struct {
	extra  int64
	raises []int64
	loss   float64
	from   *label
	way    *way
}

// combine goes through the lines and keeps the labels that can still meet the
// aims and that no other label beats. It updates the best answer; all is false
// when there were too many.
func (r *reacher) combine(aims []aim, lists [][]option, window int64, room float64) (all bool) {
	if slices.ContainsFunc(lists, func(list []option) bool { return len(list) == 0 }) {
		return true // a line has nothing that could do better
	}
	ups, downs := outlook(aims, lists)
	labels := []*label{{raises: make([]int64, len(aims))}}
	for i, list := range lists {
		if r.work += len(labels) * len(list); r.work > mostWork || len(labels) > mostLabels {
			return false
		}
		var next []*label
		for _, from := range labels {
			for k := range list {
				if l := step(from, &list[k]); l.extra < window && l.loss <= room && hopeful(l.raises, aims, ups[i+1]) {
					next = append(next, l.capped(aims, downs[i+1]))
				}
			}
		}
		labels = unbeaten(next)
	}
	if len(labels) > 0 {
		r.take(labels[0])
	}
	return true
}

func step(from *label, o *option) *label {
	l := &label{extra: from.extra + o.extra, raises: make([]int64, len(from.raises)), loss: from.loss + o.loss, from: from, way: o.way}
	for j := range l.raises {
		l.raises[j] = from.raises[j] + o.raises[j]
	}
	return l
}

// outlook is, from each line on, how far every aim can still be raised or
// lowered by the lines to come.
func outlook(aims []aim, lists [][]option) (ups, downs [][]int64) {
	ups, downs = make([][]int64, len(lists)+1), make([][]int64, len(lists)+1)
	ups[len(lists)], downs[len(lists)] = make([]int64, len(aims)), make([]int64, len(aims))
	for i := len(lists) - 1; i >= 0; i-- {
		ups[i], downs[i] = slices.Clone(ups[i+1]), slices.Clone(downs[i+1])
		for j := range aims {
			most, least := lists[i][0].raises[j], lists[i][0].raises[j]
			for _, o := range lists[i] {
				most, least = max(most, o.raises[j]), min(least, o.raises[j])
			}
			ups[i][j] += most
			downs[i][j] += least
		}
	}
	return ups, downs
}

// hopeful tells whether the aims can still be met.
func hopeful(raises []int64, aims []aim, up []int64) bool {
	for j, a := range aims {
		if raises[j]+up[j] < a.raise {
			return false
		}
	}
	return true
}

// capped counts no raise beyond what can matter, so that more labels meet.
func (l *label) capped(aims []aim, down []int64) *label {
	for j, a := range aims {
		l.raises[j] = min(l.raises[j], a.raise-down[j])
	}
	return l
}

// unbeaten sorts labels by cost and drops those that a cheaper or equal one
// covers. With one aim a single pass does it; with more, labels of equal
// raises are joined first, and the rest compared while they are few.
func unbeaten(labels []*label) []*label {
	slices.SortStableFunc(labels, func(a, b *label) int {
		return cmp.Or(cmp.Compare(a.extra, b.extra), slices.Compare(b.raises, a.raises))
	})
	kept := labels[:0:0]
	for _, l := range labels {
		recent := kept
		if len(l.raises) == 1 {
			recent = kept[max(0, len(kept)-1):] // raises rise along the kept ones
		} else if len(kept) > 500 {
			recent = kept[:500]
		}
		if !slices.ContainsFunc(recent, func(k *label) bool { return covers(k.raises, l.raises) }) {
			kept = append(kept, l)
		}
	}
	return kept
}

// take reads an answer back from its last label.
func (r *reacher) take(l *label) {
	ways := make([]*way, len(r.lines))
	for i := len(ways) - 1; i >= 0; i-- {
		ways[i], l = l.way, l.from
	}
	r.keep(ways)
}

// efficient drops options that another beats or equals in cost and every aim,
// and sorts by cost.
func efficient(list []option) []option {
	slices.SortStableFunc(list, func(a, b option) int {
		return cmp.Or(cmp.Compare(a.extra, b.extra), slices.Compare(b.raises, a.raises))
	})
	kept := list[:0:0]
	for _, o := range list {
		if !slices.ContainsFunc(kept, func(k option) bool { return covers(k.raises, o.raises) }) {
			kept = append(kept, o)
		}
	}
	return kept
}

// covers tells whether a is at least b everywhere.
func covers(a, b []int64) bool {
	for i := range a {
		if a[i] < b[i] {
			return false
		}
	}
	return true
}
