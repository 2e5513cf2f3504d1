package order

import (
	"cmp"
	"slices"
)

// candidate is a set of suppliers with what its lines cost at least, charges
// at their lowest included.
type candidate struct {
	set   uint32
	goods int64 // every line at its cheapest within the set
	bound int64
}

// search weighs every allowed set of suppliers. For each the lines' cheapest
// covers plus the lowest charges are a bound; sets are taken by rising bound
// until none can beat the best answer.
func (s *solver) search(allowed func(set uint32) bool) answer {
	best := answer{cost: never, bound: never}
	if len(s.lines) == 0 {
		return answer{}
	}
	open := int64(never) // the least bound that was left unsettled
	for _, c := range s.candidates(allowed) {
		if c.bound >= best.cost {
			break
		}
		if left := s.settle(c, &best); left < open {
			open = left
		}
	}
	best.bound = min(best.cost, open)
	return best
}

// candidates are the allowed sets that can serve every line, cheapest bound
// first.
func (s *solver) candidates(allowed func(set uint32) bool) []candidate {
	all := make([]candidate, 0, 1<<len(s.bidders))
	for set := uint32(0); set < 1<<len(s.bidders); set++ {
		if !allowed(set) {
			continue
		}
		c := candidate{set: set}
		for _, l := range s.lines {
			if c.goods += l.least[set]; c.goods >= never {
				break
			}
		}
		if c.goods >= never {
			continue
		}
		c.bound = c.goods
		for i := range s.bidders {
			if set&(1<<i) != 0 {
				b := &s.bidders[i]
				c.bound += b.levels[len(b.levels)-1].charge * b.weight
			}
		}
		all = append(all, c)
	}
	slices.SortFunc(all, func(a, b candidate) int { return cmp.Or(cmp.Compare(a.bound, b.bound), cmp.Compare(a.set, b.set)) })
	return all
}

// settle finds the best answer within a set of suppliers. It returns a bound
// below which something could be left unseen, or never.
func (s *solver) settle(c candidate, best *answer) (unsettled int64) {
	ways := make([]*way, len(s.lines))
	for i, l := range s.lines {
		ways[i] = &l.ways[l.best[c.set]]
	}
	goods := s.goodsOf(ways)
	if cost := c.goods + s.chargesOf(goods); cost < best.cost {
		*best = answer{cost: cost, ways: ways}
	}
	if best.cost <= c.bound {
		return never
	}
	r := reacher{solver: s, candidate: c, base: ways, goods: goods, best: best, unsettled: never, columns: make([][]way, len(s.lines))}
	r.choose(0, c.goods, nil, nil)
	return r.unsettled
}

// goodsOf sums what each supplier's order comes to; none has no order.
func (s *solver) goodsOf(ways []*way) []int64 {
	goods := make([]int64, len(s.bidders))
	for i := range goods {
		goods[i] = none
	}
	for _, w := range ways {
		for _, p := range w.picks {
			goods[p.source.bidder] = max(0, goods[p.source.bidder]) + p.minor
		}
	}
	return goods
}

// chargesOf are the weighed charges on orders of such goods; a supplier
// without an order charges nothing.
func (s *solver) chargesOf(goods []int64) int64 {
	var sum int64
	for i, b := range s.bidders {
		if goods[i] != none {
			sum += b.at(goods[i]) * b.weight
		}
	}
	return sum
}

// none marks a supplier without an order; an order may come to zero cents.
const none = -1

// at is the charge on an order of such goods.
func (b *bidder) at(goods int64) int64 {
	charge := b.levels[0].charge
	for _, l := range b.levels[1:] {
		if goods >= l.from {
			charge = l.charge
		}
	}
	return charge
}
