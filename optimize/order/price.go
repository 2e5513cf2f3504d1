package order

import "math"

// price is what a minor unit of goods at each supplier is worth towards the
// aims, with the bound that follows: no change of ways meets the aims and adds
// less. (Lagrangian relaxation of the thresholds.)
type price struct {
	values   []float64 // by supplier, 0 … its weight
	least    []float64 // by line: the least cost at these values
	bound    float64
	complete bool
}

// rounds of adjusting the values; more would sharpen the bound little.
const rounds = 40

// priceOf tunes the values on the ways at hand, then takes the bound over all
// covers.
func (r *reacher) priceOf(aims []aim, start []float64) price {
	values := make([]float64, len(r.bidders))
	copy(values, start)
	best, bound := append([]float64(nil), values...), math.Inf(-1)
	menus := r.menus(aims)
	step := 0.25
	for range rounds {
		sum, excess := r.relaxed(aims, menus, values)
		if sum > bound {
			bound = sum
			copy(best, values)
		} else {
			step *= 0.8
			copy(values, best)
		}
		norm := 0.0
		for _, e := range excess {
			norm = max(norm, math.Abs(e))
		}
		if norm == 0 {
			break
		}
		for j, a := range aims {
			weight := float64(r.bidders[a.bidder].weight)
			values[a.bidder] = min(0.999*weight, max(0, values[a.bidder]+step*weight*excess[j]/norm))
		}
	}
	return r.boundAt(aims, best)
}

// menu is one line's ways at hand, as what they add and raise.
type menu []option

func (r *reacher) menus(aims []aim) []menu {
	menus := make([]menu, len(r.lines))
	for i, l := range r.lines {
		menus[i] = menu{r.option(r.base[i], r.base[i], aims)}
		for _, ways := range [][]way{l.corners, l.ways} {
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
func (r *reacher) relaxed(aims []aim, menus []menu, values []float64) (sum float64, missed []float64) {
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
		for j := range aims {
			missed[j] -= float64(m[best].raises[j])
		}
	}
	return sum, missed
}

// boundAt takes the bound over every cover of every line.
func (r *reacher) boundAt(aims []aim, values []float64) price {
	p := price{values: values, least: make([]float64, len(r.lines)), complete: true}
	for _, a := range aims {
		p.bound += values[a.bidder] * float64(a.raise)
	}
	for i, l := range r.lines {
		base := discounted(r.base[i], values)
		least := base
		for _, ways := range [][]way{l.corners, l.ways} {
			for k := range ways {
				if ways[k].set&^r.set == 0 {
					least = min(least, discounted(&ways[k], values))
				}
			}
		}
		h := newHunt(l, r.market, r.set, values)
		h.limit = least - 1e-6
		h.found = func(cost float64, _ []pick) { least, h.limit = cost, cost-1e-6 }
		h.run()
		if h.tried > mostTries { // fall back on what is certain
			p.complete = false
			least = min(least, h.rest(0, l.pieces).cover(l.pieces))
		}
		p.least[i] = least
		p.bound += least - base - 1e-6
	}
	return p
}

// discounted is a way's cost less the value of its goods.
func discounted(w *way, values []float64) float64 {
	cost := float64(w.cost)
	for _, p := range w.picks {
		cost -= values[p.source.bidder] * float64(p.minor)
	}
	return cost
}
