package order

import "math"

// tryOut makes an answer of a relaxed optimum: lines change until every aim is
// met, the cheapest gain first, then go back as far as the aims allow. It is
// kept when it is the best yet.
func (r *reacher) tryOut(menus []menu, chosen []int, missed []float64) {
	for missing(missed) > 0 {
		if !r.gain(menus, chosen, missed) {
			return
		}
	}
	for range 2 {
		r.giveBack(menus, chosen, missed)
	}
	ways := make([]*way, len(menus))
	for i, m := range menus {
		ways[i] = m[chosen[i]].way
	}
	r.keep(ways)
}

// missing is how much all aims together are short of.
func missing(missed []float64) (sum float64) {
	for _, m := range missed {
		sum += max(0, m)
	}
	return sum
}

// gain makes the one change that brings the aims nearer at the least cost for
// each unit gained; false when none does.
func (r *reacher) gain(menus []menu, chosen []int, missed []float64) bool {
	short, line, option, cheapest := missing(missed), -1, -1, math.Inf(1)
	for i, m := range menus {
		from := &m[chosen[i]]
		for k := range m {
			after := 0.0
			for j, v := range missed {
				after += max(0, v+float64(from.raises[j]-m[k].raises[j]))
			}
			if after >= short-0.5 {
				continue
			}
			if cost := float64(m[k].extra-from.extra) / (short - after); cost < cheapest {
				line, option, cheapest = i, k, cost
			}
		}
	}
	if line < 0 {
		return false
	}
	change(menus[line], chosen, line, option, missed)
	return true
}

// giveBack lets each line take a cheaper way where the aims stay met.
func (r *reacher) giveBack(menus []menu, chosen []int, missed []float64) {
	for i, m := range menus {
		for k := range m {
			if m[k].extra < m[chosen[i]].extra && spare(m[chosen[i]].raises, m[k].raises, missed) {
				change(m, chosen, i, k, missed)
			}
		}
	}
}

func change(m menu, chosen []int, line, option int, missed []float64) {
	for j := range missed {
		missed[j] += float64(m[chosen[line]].raises[j] - m[option].raises[j])
	}
	chosen[line] = option
}

// spare tells whether the aims stay met when raises change from one to another.
func spare(from, to []int64, missed []float64) bool {
	for j := range missed {
		if missed[j]+float64(from[j]-to[j]) > 0 {
			return false
		}
	}
	return true
}

// keep notes an answer when it is the best yet.
func (r *reacher) keep(ways []*way) {
	cost := r.chargesOf(r.goodsOf(ways))
	for _, w := range ways {
		cost += w.cost
	}
	if cost < r.best.cost {
		*r.best = answer{cost: cost, ways: ways}
	}
}
