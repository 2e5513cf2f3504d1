package order

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
// partial answers line after line and keeping those that nothing beats.
func (r *reacher) reach(cost int64, aims []aim, p price) {
	room := float64(r.best.cost-cost) - 0.5 - p.bound // what a change may lose against the bound
	lists, complete := r.lists(aims, p, room, r.best.cost-cost)
	if all := r.combine(aims, lists, r.best.cost-cost, room); !all || !complete || !p.complete {
		r.unsettled = min(r.unsettled, cost+int64(p.bound))
	}
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
			w := newWay(picks)
			o := r.option(&w, r.base[i], aims)
			o.loss = cost - p.least[i]
			list = append(list, o)
		}
		h.run()
		complete = complete && h.tried <= mostTries
		lists = append(lists, efficient(list))
	}
	return lists, complete
}
