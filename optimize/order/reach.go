package order

import "math"

// mostWork bounds the steps for one plan, so that it takes a second or so at
// worst; beyond, the plan tells how far below it the least could lie.
const mostWork = 2_000_000

// reacher looks for answers that reach suppliers' thresholds on purpose:
// lines moved to a dearer offer, or more pieces bought than needed, because
// the charge saved is worth more.
type reacher struct {
	*solver
	candidate
	base      []*way
	goods     []int64 // of the base
	best      *answer
	unsettled int64
	columns   [][]way // by line: covers that prices have brought up
}

// aim is a threshold that the goods of a supplier must reach.
type aim struct {
	bidder int
	raise  int64 // above the base; negative where the base has it already
}

// choose picks a charge level for each supplier of the set, the furthest
// first; cost is that of the lines and of the charges chosen so far. Branches
// that a bound on reaching the aims shows to be hopeless are cut.
func (r *reacher) choose(i int, cost int64, aims []aim, values []float64) {
	if cost >= r.best.cost {
		return
	}
	if r.wantsMore(aims) {
		if r.work > mostWork {
			r.unsettled = min(r.unsettled, cost)
			return
		}
		p := r.priceOf(aims, values)
		values = p.values
		if float64(cost)+p.bound > float64(r.best.cost)-0.5 {
			return
		}
		if i == len(r.bidders) {
			r.reach(cost, aims, p)
			return
		}
	}
	if i == len(r.bidders) {
		return // the base meets every aim, and it was counted
	}
	b := &r.bidders[i]
	if r.set&(1<<i) == 0 {
		r.choose(i+1, cost, aims, values)
		return
	}
	for k := len(b.levels) - 1; k >= 0; k-- {
		next := aims[:len(aims):len(aims)]
		if b.levels[k].from > 0 {
			next = append(next, aim{i, b.levels[k].from - max(0, r.goods[i])})
		}
		r.choose(i+1, cost+b.levels[k].charge*b.weight, next, values)
	}
}

func (r *reacher) wantsMore(aims []aim) bool {
	for _, a := range aims {
		if a.raise > 0 {
			return true
		}
	}
	return false
}

// reach finds the cheapest change of ways that meets all aims, by building
// partial answers line after line. A change loses something against the bound;
// the loss allowed starts small and grows until an answer is found within it,
// or none can beat the best.
func (r *reacher) reach(cost int64, aims []aim, p price) {
	sure := p.bound // nothing below this is left unseen
	for room := 4 * float64(r.lines[0].unit); ; room *= 3 {
		left := float64(r.best.cost-cost) - 0.5 - p.bound
		if left < 0 || p.bound+left < sure {
			return
		}
		room = min(room, left)
		lists, complete := r.lists(aims, p, room, r.best.cost-cost)
		r.tryMenus(aims, lists, p.values)
		if all := r.combine(aims, lists, r.best.cost-cost, room); !all || !complete {
			r.unsettled = min(r.unsettled, cost+int64(math.Floor(sure)))
			return
		}
		if sure = p.bound + room; room >= left {
			return
		}
	}
}

// tryMenus looks for an answer among the options of the lists.
func (r *reacher) tryMenus(aims []aim, lists [][]option, values []float64) {
	menus := make([]menu, len(lists))
	for i, list := range lists {
		menus[i] = append(menu{r.option(r.base[i], r.base[i], aims)}, list...)
	}
	_, missed, chosen := r.relaxed(aims, menus, values)
	r.tryOut(menus, chosen, missed)
}

// option is a way for a line in place of its base: what it adds in cost,
// raises for each aim, and loses against the line's best at the aims' prices.
type option struct {
	way    *way
	extra  int64
	raises []int64
	loss   float64
}

func (r *reacher) option(w, base *way, aims []aim) option {
	o := option{way: w, extra: w.cost - base.cost, raises: make([]int64, len(aims))}
	for j, a := range aims {
		o.raises[j] = w.goodsAt(a.bidder) - base.goodsAt(a.bidder)
	}
	return o
}

// lists gathers for each line the options that an answer could use.
func (r *reacher) lists(aims []aim, p price, room float64, window int64) (lists [][]option, complete bool) {
	complete = true
	for i, l := range r.lines {
		var list []option
		h := newHunt(l, r.market, r.set, p.values)
		h.limit = p.least[i] + room + 1e-6
		h.ceiling = float64(r.base[i].cost + window)
		for _, a := range aims {
			h.padding |= 1 << a.bidder
		}
		h.found = func(cost float64, picks []pick) {
			w := newWay(picks, l.unit)
			o := r.option(&w, r.base[i], aims)
			o.loss = cost - p.least[i]
			list = append(list, o)
		}
		h.run()
		r.work += h.tried
		complete = complete && h.tried <= h.budget
		lists = append(lists, efficient(list))
	}
	return lists, complete
}
