package order

import (
	"cmp"
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"

	"rungwright/catalog"
)

// MostBidders is how many suppliers a plan weighs against each other in every
// combination; beyond, those that serve least are left out and the plan says
// that it is not proved.
const MostBidders = 12

// Make finds the order of least total cost: goods, delivery and small-order
// fees together. It weighs every set of suppliers; within a set each line
// takes its cheapest cover over all quantities and splits, and lines are moved
// or padded where that reaches a supplier's threshold and pays. Suppliers that
// offers name and the list lacks charge nothing. It fails on a currency that
// cannot be settled; needs that nobody can deliver come back as Unserved.
func Make(needs []Need, suppliers []catalog.Supplier, terms Terms) (*Plan, error) {
	s, err := newSolver(needs, suppliers, terms)
	if err != nil {
		return nil, err
	}
	return s.plan(s.search(func(set uint32) bool { return true })), nil
}

// bidder is a supplier made ready.
type bidder struct {
	catalog.Supplier
	weight int64
	levels []level // by rising goods, falling charge; the first is from zero
}

// level is what an order costs extra from an amount of goods on, minor units.
type level struct{ from, charge int64 }

// solver holds one question.
type solver struct {
	market   *Market
	bidders  []bidder
	lines    []*line
	unserved []Unserved
	needs    []Need
	leftOut  []string // suppliers beyond MostBidders
	work     int
}

func newSolver(needs []Need, suppliers []catalog.Supplier, terms Terms) (*solver, error) {
	currency := terms.Currency
	if currency == "" {
		var err error
		if currency, err = onlyCurrency(needs); err != nil {
			return nil, err
		}
	}
	if terms.Premium < 0 || terms.Premium > 10 {
		return nil, fmt.Errorf("a premium of %g for preferred suppliers is out of range; it lies between 0 and 10 (1000 %%)", terms.Premium)
	}
	s := &solver{market: NewMarket(terms, currency), needs: needs}
	s.addBidders(suppliers)
	for _, n := range needs {
		if n.Net() > 0 {
			s.addLine(n)
		}
	}
	return s, nil
}

// onlyCurrency is the one currency of all prices.
func onlyCurrency(needs []Need) (string, error) {
	currency := ""
	for _, n := range needs {
		own := commonCurrency(n.Part)
		if own == "" && len(n.Part.Offers) == 0 {
			continue
		}
		if own == "" || currency != "" && own != currency {
			return "", errors.New("offers are in several currencies; say in which one to count, and give the rates")
		}
		currency = own
	}
	return currency, nil
}

// addBidders lists the suppliers that offers name, most offers first where
// there are too many.
func (s *solver) addBidders(suppliers []catalog.Supplier) {
	known := map[string]catalog.Supplier{}
	for _, v := range suppliers {
		known[v.Name] = v
	}
	serves := map[string]int{}
	for _, n := range s.needs {
		for i := range n.Part.Offers {
			if name := n.Part.Offers[i].Supplier; n.Net() > 0 && !slices.Contains(s.market.terms.Excluded, name) {
				serves[name]++
			}
		}
	}
	var names []string
	for name := range serves {
		names = append(names, name)
	}
	slices.SortFunc(names, func(a, b string) int { return cmp.Or(serves[b]-serves[a], strings.Compare(a, b)) })
	if len(names) > MostBidders {
		names, s.leftOut = names[:MostBidders], slices.Sorted(slices.Values(names[MostBidders:]))
	}
	slices.Sort(names)
	for _, name := range names {
		v := known[name]
		v.Name = name
		s.bidders = append(s.bidders, bidder{Supplier: v, weight: s.weight(name), levels: s.levels(v)})
	}
}

// unit is the weight that leaves a cost as it is.
func (s *solver) unit() int64 {
	if len(s.market.terms.Preferred) == 0 {
		return 1
	}
	return 10000
}

// weight is 1 for all while no supplier is preferred, which keeps sums small.
func (s *solver) weight(name string) int64 {
	if len(s.market.terms.Preferred) == 0 {
		return 1
	}
	return int64(s.market.terms.Weight(name))
}

// levels are the steps in which a supplier's charges fall as the goods rise.
func (s *solver) levels(v catalog.Supplier) []level {
	var all []level
	for _, from := range []int64{0, s.market.charge(v, v.FreeAbove), s.market.charge(v, v.SmallOrder)} {
		delivery, fee := s.market.Charges(v, from)
		all = append(all, level{from, delivery + fee})
	}
	slices.SortFunc(all, func(a, b level) int { return cmp.Compare(a.from, b.from) })
	steps := all[:1]
	for _, l := range all[1:] {
		if l.charge < steps[len(steps)-1].charge {
			steps = append(steps, l)
		}
	}
	return steps
}

// addLine makes a need ready, or notes why it cannot be served.
func (s *solver) addLine(n Need) {
	l := &line{need: n, pieces: n.Net(), unit: s.unit()}
	for i := range n.Part.Offers {
		offer := &n.Part.Offers[i]
		place := slices.IndexFunc(s.bidders, func(b bidder) bool { return b.Name == offer.Supplier })
		if place < 0 {
			continue
		}
		most, _ := s.market.terms.Available(offer)
		if src := (source{offer: offer, bidder: place, weight: s.bidders[place].weight, most: most}); s.ready(&src) {
			l.offers = append(l.offers, src)
		}
	}
	l.findWays(s.market, len(s.bidders))
	if l.least[len(l.least)-1] >= never {
		s.unserved = append(s.unserved, Unserved{n, s.why(l)})
		return
	}
	s.lines = append(s.lines, l)
}

// ready fills in the price tiers; false when the offer cannot be used.
func (s *solver) ready(src *source) bool {
	for _, b := range src.offer.Prices {
		rate, ok := s.market.Rate(b.Price.Currency)
		if !ok || b.Price.Amount.Sign() <= 0 {
			return false
		}
		scale := math.Pow10(s.market.Digits)
		src.tiers = append(src.tiers, tier{max(1, b.Quantity), b.Price.Amount.Mul(rate).InexactFloat64() * scale})
		if b.Price.Currency == s.market.Currency {
			src.slack = 0.51
		} else {
			src.slack = 0.51 + 0.5*rate.InexactFloat64()*math.Pow10(s.market.Digits-Digits(b.Price.Currency))
		}
	}
	return len(src.tiers) > 0 && Orderable(src.offer, 1) <= src.most
}

// why says in words what keeps a need from being served.
func (s *solver) why(l *line) string {
	p := l.need.Part
	if len(p.Offers) == 0 {
		return "no offer in the catalog"
	}
	var reasons []string
	for i := range p.Offers {
		if reason := s.obstacle(&p.Offers[i], l.pieces); !slices.Contains(reasons, reason) {
			reasons = append(reasons, reason)
		}
	}
	return strings.Join(reasons, "; ")
}

func (s *solver) obstacle(o *catalog.Offer, pieces int) string {
	terms := s.market.terms
	most, _ := terms.Available(o)
	switch {
	case slices.Contains(terms.Excluded, o.Supplier):
		return o.Supplier + " is excluded"
	case len(o.Prices) == 0:
		return o.Supplier + " gives no price"
	case most < Orderable(o, pieces) && terms.NeedBy > 0:
		return fmt.Sprintf("%s can deliver %d of %d within %d days", o.Supplier, most, pieces, terms.NeedBy)
	case most < Orderable(o, pieces):
		return fmt.Sprintf("%s has %d of %d in stock and states no lead time", o.Supplier, most, pieces)
	}
	for _, b := range o.Prices {
		if b.Price.Amount.Sign() <= 0 {
			return fmt.Sprintf("%s gives a price of %s, which must be a mistake", o.Supplier, b.Price)
		}
		if _, ok := s.market.Rate(b.Price.Currency); !ok {
			return fmt.Sprintf("no rate is given for %s, in which %s sells", b.Price.Currency, o.Supplier)
		}
	}
	return o.Supplier + " is not among the suppliers weighed"
}

// answer is the best set of ways found.
type answer struct {
	cost  int64 // weighed; never when there is none
	ways  []*way
	bound int64 // nothing can cost less
}

// plan turns an answer into orders.
func (s *solver) plan(a answer) *Plan {
	gap := a.cost - a.bound
	for _, l := range s.lines {
		gap += l.doubt
	}
	p := &Plan{Currency: s.market.Currency, Unserved: s.unserved, LeftOut: s.leftOut, Proved: gap == 0 && len(s.leftOut) == 0,
		Slack: s.market.Amount((gap + s.unit() - 1) / s.unit())}
	orders := make([]SupplierOrder, len(s.bidders))
	goods := make([]int64, len(s.bidders))
	served := 0
	for _, n := range s.needs {
		planned := PlannedLine{Need: n}
		if served < len(s.lines) && served < len(a.ways) && n.Net() > 0 && s.lines[served].need == n {
			var minor int64
			for _, pick := range a.ways[served].picks {
				b := s.market.purchase(n.Part, quote{pick.source.offer, pick.quantity, pick.minor})
				planned.Purchases = append(planned.Purchases, b)
				o := pick.source.bidder
				orders[o].Purchases = append(orders[o].Purchases, b)
				goods[o] += pick.minor
				minor += pick.minor
			}
			planned.Cost = s.market.Amount(minor)
			served++
		}
		p.Lines = append(p.Lines, planned)
	}
	s.total(p, orders, goods)
	return p
}

// total adds the charges and the sums.
func (s *solver) total(p *Plan, orders []SupplierOrder, goods []int64) {
	var all, charges int64
	for i, o := range orders {
		if len(o.Purchases) == 0 {
			continue
		}
		delivery, fee := s.market.Charges(s.bidders[i].Supplier, goods[i])
		o.Supplier, o.Goods, o.Delivery, o.SmallOrderFee = s.bidders[i].Supplier, s.market.Amount(goods[i]), s.market.Amount(delivery), s.market.Amount(fee)
		o.Total, o.Days = s.market.Amount(goods[i]+delivery+fee), days(o.Purchases)
		p.Orders = append(p.Orders, o)
		all += goods[i]
		charges += delivery + fee
	}
	p.Goods, p.Charges, p.Total = s.market.Amount(all), s.market.Amount(charges), s.market.Amount(all+charges)
}

// days is when the last piece comes; -1 when a lead time is not stated.
func days(purchases []Purchase) int {
	longest := 0
	for _, p := range purchases {
		switch o := p.Offer; {
		case o.Stock >= p.Quantity:
		case o.LeadDays < 0:
			return -1
		default:
			longest = max(longest, o.LeadDays)
		}
	}
	return longest
}
