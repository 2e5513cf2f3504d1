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
	pieces  int // to buy
	offers  []source
	ways    []way
	least   []int64 // by set of suppliers: the cost of the cheapest way within it
	best    []int32 // that way's place, -1 for none
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

func newWay(picks []pick) way {
	w := way{picks: slices.Clone(picks)}
	for _, p := range picks {
		w.set |= 1 << p.source.bidder
		w.cost += p.minor * p.source.weight
	}
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

// findWays fills in the cheapest cover within every set of suppliers, over
// all whole quantities, single purchases and splits alike. It is false when
// the work for some set ran over.
func (l *line) findWays(m *Market, bidders int) (complete bool) {
	l.findCorners(m)
	mine := l.bidders()
	least, best := make([]int64, 1<<len(mine)), make([]int32, 1<<len(mine))
	complete = true
	for local := range least { // every set after those within it
		least[local], best[local] = never, -1
		for rest := uint(local); rest != 0; rest &= rest - 1 {
			if sub := uint(local) &^ (rest & -rest); least[sub] < least[local] {
				least[local], best[local] = least[sub], best[sub]
			}
		}
		set := global(uint32(local), mine)
		found, all := l.better(m, set, least[local])
		complete = complete && all
		if found != nil {
			l.ways = append(l.ways, *found)
			least[local], best[local] = found.cost, int32(len(l.ways)-1)
		}
	}
	l.spread(least, best, mine, bidders)
	return complete
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
				l.corners = append(l.corners, newWay([]pick{{s, q, quoted.minor}}))
			}
		}
	}
}

// better is a cover by a set of suppliers that costs less than beat, the
// cheapest there is; nil when there is none.
func (l *line) better(m *Market, set uint32, beat int64) (found *way, complete bool) {
	for i := range l.corners {
		if w := &l.corners[i]; w.set&^set == 0 && w.cost < beat {
			found, beat = w, w.cost
		}
	}
	h := newHunt(l, m, set, nil)
	h.limit = float64(beat) - 0.5 // whole numbers: less by one at least
	h.found = func(_ float64, picks []pick) {
		w := newWay(picks)
		found, h.limit = &w, float64(w.cost)-0.5
	}
	h.run()
	return found, h.tried <= mostTries
}
