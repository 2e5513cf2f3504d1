package order

import (
	"math"
	"slices"
)

// price is what a minor unit of goods at each supplier is worth towards the
// aims, with the bound that follows: no change of ways meets the aims and adds
// less. (Lagrangian relaxation of the thresholds.)
type price struct {
	values []float64 // by supplier, 0 … its weight
	least  []float64 // by line: the least cost at these values
	bound  float64
}

// rounds of adjusting the values; more would sharpen the bound little.
const rounds = 100

// priceOf tunes the values on the ways at hand and takes the bound over all
// covers, which brings up further ways, until none is new.
func (r *reacher) priceOf(aims []aim, start []float64) price {
	values := make([]float64, len(r.bidders))
	copy(values, start)
	var best price
	for turn := range 8 {
		values = r.tune(aims, r.menus(aims), values)
		p, news := r.boundAt(aims, values)
		r.work += len(r.lines) * rounds
		if turn == 0 || p.bound > best.bound {
			best = p
		}
		if !news {
			break
		}
	}
	return best
}

// tune moves the values towards the highest bound over the menus.
func (r *reacher) tune(aims []aim, menus []menu, start []float64) []float64 {
	values, best, bound, step := slices.Clone(start), make([]float64, len(start)), 0.0, 0.25 // no values, no bound
	for range rounds {
		sum, missed, chosen := r.relaxed(aims, menus, values)
		norm := 0.0
		for _, m := range missed {
			norm = max(norm, math.Abs(m))
		}
		if sum > bound {
			bound, best = sum, slices.Clone(values)
		} else {
			step *= 0.9
			copy(values, best)
		}
		if norm == 0 {
			break
		}
		for j, a := range aims {
			weight := float64(r.bidders[a.bidder].weight)
			values[a.bidder] = min(0.999*weight, max(0, values[a.bidder]+step*weight*missed[j]/norm))
		}
		if sum == bound {
			r.tryOut(menus, chosen, missed)
		}
	}
	return best
}

// menu is one line's ways at hand, as what they add and raise.
type menu []option

func (r *reacher) menus(aims []aim) []menu {
	menus := make([]menu, len(r.lines))
	for i, l := range r.lines {
		menus[i] = menu{r.option(r.base[i], r.base[i], aims)}
		for _, ways := range [][]way{l.corners, l.ways, r.columns[i]} {
			for k := range ways {
				if ways[k].set&^r.set == 0 {
					menus[i] = append(menus[i], r.option(&ways[k], r.base[i], aims))
				}
			}
		}
	}
	return menus
}

// relaxed is the relaxed optimum over the menus, and how far each aim is
// missed there (the direction in which its value should move).
func (r *reacher) relaxed(aims []aim, menus []menu, values []float64) (sum float64, missed []float64, chosen []int) {
	missed = make([]float64, len(aims))
	for j, a := range aims {
		missed[j] = float64(a.raise)
		sum += values[a.bidder] * float64(a.raise)
	}
	for _, m := range menus {
		best, least := 0, math.Inf(1)
		for k, o := range m {
			cost := float64(o.extra)
			for j, a := range aims {
				cost -= values[a.bidder] * float64(o.raises[j])
			}
			if cost < least {
				best, least = k, cost
			}
		}
		sum += least
		chosen = append(chosen, best)
		for j := range aims {
			missed[j] -= float64(m[best].raises[j])
		}
	}
	return sum, missed, chosen
}

// boundAt takes the bound over every cover of every line; news tells whether
// it came upon ways that were not at hand.
func (r *reacher) boundAt(aims []aim, values []float64) (p price, news bool) {
	p = price{values: values, least: make([]float64, len(r.lines))}
	for _, a := range aims {
		p.bound += values[a.bidder] * float64(a.raise)
	}
	for i, l := range r.lines {
		base := r.discounted(r.base[i], values)
		least := base
		for _, ways := range [][]way{l.corners, l.ways, r.columns[i]} {
			for k := range ways {
				if ways[k].set&^r.set == 0 {
					least = min(least, r.discounted(&ways[k], values))
				}
			}
		}
		h := newHunt(l, r.market, r.set, values)
		h.limit = least - 1e-6
		var found []pick
		h.found = func(cost float64, picks []pick) {
			least, h.limit, found = cost, cost-1e-6, slices.Clone(picks)
		}
		h.run()
		r.work += h.tried
		if found != nil {
			r.columns[i], news = append(r.columns[i], newWay(found, l.unit)), true
		}
		if h.tried > h.budget { // fall back on what is certain
			f := h.rest(&h.fills[0], 0, l.pieces)
			least = min(least, f.cover(l.pieces)-f.slack)
		}
		p.least[i] = least
		p.bound += least - base - 1e-6
	}
	return p, news
}

// discounted is a way's cost less the value of its goods.
func (r *reacher) discounted(w *way, values []float64) float64 {
	cost := float64(w.cost)
	for _, p := range w.picks {
		cost -= values[p.source.bidder] * float64(p.minor)
	}
	return cost
}
