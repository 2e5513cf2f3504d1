package order

import (
	"cmp"
	"math"
	"slices"
)

// mostTries bounds the work of one hunt.
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

	padding uint32  // suppliers from which more than needed may be bought
	ceiling float64 // then: the weighed cost must stay below this
	tried   int
	picks   []pick
}

// newHunt takes the sources of a set, the dearest first, so that the bound
// rises early. discounts are by supplier; nil for none.
func newHunt(l *line, m *Market, set uint32, discounts []float64) *hunt {
	h := &hunt{line: l, market: m, ceiling: math.Inf(1)}
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
	for _, s := range h.sources {
		h.factors = append(h.factors, factor(s))
	}
	return h
}

func (h *hunt) run() { h.from(0, h.line.pieces, 0, 0) }

// from covers what remains with the sources i and later; weighed is the cost
// without discounts.
func (h *hunt) from(i, remain int, cost, weighed float64) {
	if h.tried++; h.tried > mostTries {
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
	if remain > 0 && cost+h.rest(i, remain).cover(remain) >= h.limit {
		return
	}
	h.from(i+1, remain, cost, weighed)
	rest := h.rest(i+1, max(1, remain))
	for t := range h.sources[i].tiers {
		h.tier(i, t, remain, cost, weighed, rest)
	}
}

// tier tries the quantities of one price break that can stay below the limit.
func (h *hunt) tier(i, t, remain int, cost, weighed float64, rest filling) {
	s := h.sources[i]
	first, last := h.span(i, t, remain)
	step := max(1, s.offer.Multiple)
	if short := remain - rest.most; short > first { // the others cannot do more
		first += (short - first + step - 1) / step * step
	}
	if first > last {
		return
	}
	bound := func(k int) float64 {
		q := first + k*step
		return cost + h.factors[i]*(s.tiers[t].unit*float64(q)-s.slack) + rest.cover(remain-q)
	}
	low, high := below(bound, (last-first)/step, func() float64 { return h.limit })
	for k := low; k <= high && h.tried <= mostTries; k++ {
		q := first + k*step
		quoted, ok := h.market.exactly(s.offer, q)
		minor := float64(quoted.minor)
		if !ok || weighed+minor*float64(s.weight) >= h.ceiling {
			return
		}
		if bound(k) >= h.limit { // it may have fallen meanwhile
			continue
		}
		h.picks = append(h.picks, pick{s, q, quoted.minor})
		h.from(i+1, remain-q, cost+minor*h.factors[i], weighed+minor*float64(s.weight))
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

func (h *hunt) rest(i, remain int) filling {
	var f filling
	for ; i < len(h.sources); i++ {
		s := h.sources[i]
		unit := s.floor(remain) * h.factors[i]
		k := len(f.units)
		f.units, f.caps = append(f.units, unit), append(f.caps, s.most)
		for ; k > 0 && f.units[k-1] > unit; k-- {
			f.units[k], f.caps[k], f.units[k-1], f.caps[k-1] = f.units[k-1], f.caps[k-1], unit, s.most
		}
		f.most = min(unlimited/2, f.most+s.most)
		f.slack += s.slack * h.factors[i]
	}
	return f
}

// cover is the least that so many pieces can cost; infinite beyond what there
// is.
func (f filling) cover(pieces int) float64 {
	if pieces <= 0 {
		return 0
	}
	sum := -f.slack
	for k, unit := range f.units {
		n := min(pieces, f.caps[k])
		sum += unit * float64(n)
		if pieces -= n; pieces == 0 {
			return sum
		}
	}
	return math.Inf(1)
}

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
