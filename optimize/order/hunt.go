package order

import (
	"cmp"
	"math"
	"slices"
)

// mostTries bounds the work of one hunt; a hundred times that where a line's
// own best covers are sought.
const mostTries = 20000

// hunt goes through the covers of a line by a set of suppliers, over all
// whole quantities, and reports those whose cost stays below a limit. Costs
// are counted with a factor for each supplier: its weight, less what its goods
// are worth towards a threshold. A branch is cut where filling the rest at the
// others' lowest unit prices already meets the limit.
type hunt struct {
	line    *line
	market  *Market
	sources []*source
	factors []float64 // beside sources: cost counted per minor unit
	limit   float64
	found   func(cost float64, picks []pick)
	further float64 // what a second purchase for the line counts, and any more

	padding uint32  // suppliers from which more than needed may be bought
	ceiling float64 // then: the weighed cost must stay below this
	most    int     // purchases at most
	all     bool    // every supplier of the set must be used
	budget  int     // tries at most
	tried   int
	picks   []pick
	last    []bool    // beside sources: no later source is of the same supplier
	fills   []filling // scratch, two for each depth
}

// newHunt takes the sources of a set, the dearest first, so that the bound
// rises early. discounts are by supplier; nil for none.
func newHunt(l *line, m *Market, set uint32, discounts []float64) *hunt {
	h := &hunt{line: l, market: m, ceiling: math.Inf(1), budget: mostTries, most: l.most, further: splitCost * float64(l.unit)}
	for i := range l.offers {
		if s := &l.offers[i]; set&(1<<s.bidder) != 0 {
			h.sources = append(h.sources, s)
		}
	}
	factor := func(s *source) float64 {
		if discounts == nil {
			return float64(s.weight)
		}
		return float64(s.weight) - discounts[s.bidder]
	}
	slices.SortStableFunc(h.sources, func(a, b *source) int {
		return cmp.Compare(b.floor(l.pieces)*factor(b), a.floor(l.pieces)*factor(a))
	})
	for i, s := range h.sources {
		h.factors = append(h.factors, factor(s))
		h.last = append(h.last, !slices.ContainsFunc(h.sources[i+1:], func(t *source) bool { return t.bidder == s.bidder }))
	}
	h.fills = make([]filling, 2*len(h.sources)+3)
	return h
}

func (h *hunt) run() { h.from(0, h.line.pieces, 0, 0) }

// from covers what remains with the sources i and later; weighed is the cost
// without discounts.
func (h *hunt) from(i, remain int, cost, weighed float64) {
	if h.tried++; h.tried > h.budget {
		return
	}
	for remain <= 0 && i < len(h.sources) && h.padding&(1<<h.sources[i].bidder) == 0 {
		i++
	}
	if i == len(h.sources) {
		if remain <= 0 && cost < h.limit {
			h.found(cost, h.picks)
		}
		return
	}
	if len(h.picks) == h.most && remain > 0 {
		return
	}
	if remain > 0 {
		bound := h.rest(&h.fills[2*i], i, remain)
		low := cost + bound.cover(remain)
		if len(h.picks) == 0 { // later, a further purchase's cost outweighs what rounding takes off
			low -= bound.slack
		}
		if low+h.due(i)*h.further >= h.limit {
			return
		}
	}
	if !h.all || !h.last[i] || h.used(h.sources[i].bidder) {
		h.from(i+1, remain, cost, weighed)
	}
	if len(h.picks) == h.most {
		return
	}
	rest := h.rest(&h.fills[2*i+1], i+1, max(1, remain))
	if len(h.picks) == h.most-1 {
		rest.close()
	}
	for t := range h.sources[i].tiers {
		h.tier(i, t, remain, cost, weighed, rest)
	}
}

// due is how many purchases beyond one must still come because every supplier
// of the set is to be used.
func (h *hunt) due(i int) float64 {
	if !h.all {
		return 0
	}
	n := -1
	for k := i; k < len(h.sources); k++ {
		if h.last[k] && !h.used(h.sources[k].bidder) {
			n++
		}
	}
	if len(h.picks) > 0 {
		n++
	}
	return float64(max(0, n))
}

func (h *hunt) used(bidder int) bool {
	for _, p := range h.picks {
		if p.source.bidder == bidder {
			return true
		}
	}
	return false
}

// tier tries the quantities of one price break that can stay below the limit.
func (h *hunt) tier(i, t, remain int, cost, weighed float64, rest *filling) {
	s := h.sources[i]
	first, last := h.span(i, t, remain)
	step := max(1, s.offer.Multiple)
	if short := remain - rest.most; short > first { // the others cannot do more
		first += (short - first + step - 1) / step * step
	}
	if first > last {
		return
	}
	further := 0.0
	if len(h.picks) > 0 {
		further = h.further
	}
	bound := func(k int) float64 {
		q := first + k*step
		return cost + further + h.factors[i]*(s.tiers[t].unit*float64(q)-s.slack) + rest.cover(remain-q)
	}
	low, high := below(bound, (last-first)/step, func() float64 { return h.limit })
	for k := low; k <= high && h.tried <= h.budget; k++ {
		q := first + k*step
		quoted, ok := h.market.exactly(s.offer, q)
		minor := float64(quoted.minor)
		if !ok || weighed+further+minor*float64(s.weight) >= h.ceiling {
			return
		}
		if bound(k) >= h.limit { // it may have fallen meanwhile
			continue
		}
		h.picks = append(h.picks, pick{s, q, quoted.minor})
		h.from(i+1, remain-q, cost+further+minor*h.factors[i], weighed+further+minor*float64(s.weight))
		h.picks = h.picks[:len(h.picks)-1]
	}
}

// span is the quantities of a price break that can be useful: orderable,
// available, and not beyond the first that covers what remains unless padding
// is wanted.
func (h *hunt) span(i, t, remain int) (first, last int) {
	s := h.sources[i]
	first, last = Orderable(s.offer, s.tiers[t].first), s.most
	if h.padding&(1<<s.bidder) == 0 {
		last = min(last, max(first, Orderable(s.offer, remain)))
	} else {
		last = min(last, first+h.affordable(s, t))
	}
	if t+1 < len(s.tiers) {
		last = min(last, s.tiers[t+1].first-1)
	}
	return first, last
}

// affordable is how many pieces at a break's price the ceiling allows.
func (h *hunt) affordable(s *source, t int) int {
	return int(min(unlimited/2, h.ceiling/(s.tiers[t].unit*float64(s.weight))+1))
}

// below finds the first and last of 0 … most where a convex function lies
// below a limit; first > last when it does nowhere.
func below(f func(int) float64, most int, limit func() float64) (first, last int) {
	lowest, high := 0, most
	for lowest < high {
		if mid := (lowest + high) / 2; f(mid) <= f(mid+1) {
			high = mid
		} else {
			lowest = mid + 1
		}
	}
	if f(lowest) >= limit() {
		return 1, 0
	}
	first, last = 0, most
	for l, h := 0, lowest; l <= h; { // the first below
		mid := (l + h) / 2
		if f(mid) < limit() {
			first, h = mid, mid-1
		} else {
			l = mid + 1
		}
	}
	for l, h := lowest, most; l <= h; { // the last below
		mid := (l + h) / 2
		if f(mid) < limit() {
			last, l = mid, mid+1
		} else {
			h = mid - 1
		}
	}
	return first, last
}

// filling is the others' lowest prices, cheapest first, with what they can
// deliver: a convex lower bound on covering a number of pieces.
type filling struct {
	units []float64
	caps  []int
	most  int
	slack float64
}

// rest fills in f for the sources i and later.
func (h *hunt) rest(f *filling, i, remain int) *filling {
	f.units, f.caps, f.most, f.slack = f.units[:0], f.caps[:0], 0, 0
	for ; i < len(h.sources); i++ {
		s := h.sources[i]
		unit := s.floor(remain) * h.factors[i]
		k := len(f.units)
		f.units, f.caps = append(f.units, unit), append(f.caps, s.most)
		for ; k > 0 && f.units[k-1] > unit; k-- {
			f.units[k], f.caps[k], f.units[k-1], f.caps[k-1] = f.units[k-1], f.caps[k-1], unit, s.most
		}
		f.most = min(unlimited/2, f.most+s.most)
		f.slack = max(f.slack, s.slack*h.factors[i])
	}
	return f
}

// cover is the least that so many pieces can cost; infinite beyond what there
// is.
func (f *filling) cover(pieces int) float64 {
	if pieces <= 0 {
		return 0
	}
	sum := 0.0
	for k, unit := range f.units {
		n := min(pieces, f.caps[k])
		sum += unit * float64(n)
		if pieces -= n; pieces == 0 {
			return sum
		}
	}
	return math.Inf(1)
}

// close leaves nothing to the others: this purchase is the last.
func (f *filling) close() { f.units, f.caps, f.most = f.units[:0], f.caps[:0], 0 }

// floor is the lowest price in minor units at which the offer covers each of
// at most so many pieces: a tier that starts above them is paid in full.
func (s *source) floor(pieces int) float64 {
	unit := math.Inf(1)
	for _, t := range s.tiers {
		if t.first <= s.most {
			unit = min(unit, t.unit*max(1, float64(t.first)/float64(pieces)))
		}
	}
	return unit
}
