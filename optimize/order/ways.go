package order

import (
	"math"
	"math/bits"
	"slices"

	"rungwright/catalog"
)

// line is one need with the offers that may serve it.
type line struct {
	need    Need
	pieces  int   // to buy
	most    int   // purchases that it may be split into
	unit    int64 // weighed cost of one minor unit: 1, or 10000 when suppliers are preferred
	offers  []source
	ways    []way
	least   []int64 // by set of suppliers: the cost of the cheapest way within it
	best    []int32 // that way's place, -1 for none
	doubt   int64   // how far below least a cover could lie where the work ran over
	corners []way   // single purchases at the need and at every break above
}

// source is an offer made ready.
type source struct {
	offer  *catalog.Offer
	bidder int // its supplier's place
	weight int64
	most   int // pieces it can deliver
	tiers  []tier
	slack  float64 // minor units that rounding can take off
}

// tier is a price break: quantities from first on, at a unit price in minor
// units.
type tier struct {
	first int
	unit  float64
}

// pick is a quantity from one source; way is a full cover of a line.
type pick struct {
	source   *source
	quantity int
	minor    int64
}

type way struct {
	set   uint32 // of suppliers
	cost  int64  // weighed
	picks []pick
}

// never is the cost of what cannot be had.
const never = math.MaxInt64 / 4

// splitCost is what each further purchase for a line must save, in minor
// units: nobody splits an order for less, and it outweighs what luck in
// rounding could gain, which keeps the search small.
const splitCost = 2

func newWay(picks []pick, unit int64) way {
	w := way{picks: slices.Clone(picks)}
	for _, p := range picks {
		w.set |= 1 << p.source.bidder
		w.cost += p.minor * p.source.weight
	}
	w.cost += splitCost * unit * int64(len(picks)-1)
	return w
}

func (w *way) goodsAt(bidder int) int64 {
	var sum int64
	for _, p := range w.picks {
		if p.source.bidder == bidder {
			sum += p.minor
		}
	}
	return sum
}

// mostPurchases is how many offers a line is split over, unless nothing less
// covers it: nobody wants to count in five bags for a cent.
const mostPurchases = 3

// findWays fills in the cheapest cover within every set of suppliers, over
// all whole quantities, single purchases and splits alike.
func (l *line) findWays(m *Market, bidders int) {
	l.findCorners(m)
	l.most = mostPurchases
	if l.tabulate(m, bidders); l.least[len(l.least)-1] >= never && len(l.offers) > l.most {
		l.most = len(l.offers)
		l.tabulate(m, bidders)
	}
}

func (l *line) tabulate(m *Market, bidders int) {
	mine := l.bidders()
	least, best := make([]int64, 1<<len(mine)), make([]int32, 1<<len(mine))
	for local := range least { // every set after those within it
		least[local], best[local] = never, -1
		for rest := uint(local); rest != 0; rest &= rest - 1 {
			if sub := uint(local) &^ (rest & -rest); least[sub] < least[local] {
				least[local], best[local] = least[sub], best[sub]
			}
		}
		if found := l.better(m, global(uint32(local), mine), least[local]); found != nil {
			l.ways = append(l.ways, *found)
			least[local], best[local] = found.cost, int32(len(l.ways)-1)
		}
	}
	l.spread(least, best, mine, bidders)
}

// bidders lists the suppliers of a line's offers.
func (l *line) bidders() []int {
	var mine []int
	for _, s := range l.offers {
		if !slices.Contains(mine, s.bidder) {
			mine = append(mine, s.bidder)
		}
	}
	slices.Sort(mine)
	return mine
}

func global(local uint32, mine []int) uint32 {
	var set uint32
	for ; local != 0; local &= local - 1 {
		set |= 1 << mine[bits.TrailingZeros32(local)]
	}
	return set
}

// spread copies the results to every set of all suppliers.
func (l *line) spread(least []int64, best []int32, mine []int, bidders int) {
	l.least, l.best = make([]int64, 1<<bidders), make([]int32, 1<<bidders)
	for set := range l.least {
		local := 0
		for i, b := range mine {
			local |= set >> b & 1 << i
		}
		l.least[set], l.best[set] = least[local], best[local]
	}
}

// findCorners lists the single purchases that round up to the need or to a
// break above it.
func (l *line) findCorners(m *Market) {
	for i := range l.offers {
		s := &l.offers[i]
		for _, t := range s.tiers {
			q := Orderable(s.offer, max(l.pieces, t.first))
			if quoted, ok := m.exactly(s.offer, q); ok && q <= s.most {
				l.corners = append(l.corners, newWay([]pick{{s, q, quoted.minor}}, l.unit))
			}
		}
	}
}

// better is a cover by all of a set of suppliers, or one of them alone, that
// costs less than beat, the cheapest there is; nil when there is none.
func (l *line) better(m *Market, set uint32, beat int64) (found *way) {
	for i := range l.corners {
		if w := &l.corners[i]; w.set&^set == 0 && w.cost < beat {
			found, beat = w, w.cost
		}
	}
	suppliers := bits.OnesCount32(set)
	if suppliers > l.most || suppliers == 1 && len(l.offers) == len(l.bidders()) {
		return found // nothing to split over
	}
	h := newHunt(l, m, set, nil)
	h.all, h.budget = true, 100*mostTries
	h.limit = float64(beat) - 0.5 // whole numbers: less by one at least
	h.found = func(_ float64, picks []pick) {
		w := newWay(picks, l.unit)
		found, h.limit = &w, float64(w.cost)-0.5
	}
	if h.run(); h.tried > h.budget && h.limit < never/2 {
		f := h.rest(&h.fills[0], 0, l.pieces)
		l.doubt = max(l.doubt, int64(h.limit+1.5-f.cover(l.pieces)+f.slack))
	}
	return found
}
