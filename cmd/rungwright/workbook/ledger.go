package workbook

import (
	"cmp"
	"slices"
	"strings"

	"rungwright/catalog"
	"rungwright/optimize"
	"rungwright/optimize/order"
)

// ledger is what the sheets show of the purchase, by the rules that their
// formulas follow, worked out with the order package's exact money.
type ledger struct {
	units   int
	market  *order.Market
	terms   order.Terms
	kinds   []catalog.Kind
	spares  map[catalog.Kind]Spare
	items   []*item
	offers  []*offering
	sellers []*seller
	foreign []string // currencies other than the market's, sorted
	breaks  int      // columns for price breaks
	rows    int      // of the order list
}

// item is one part with all positions that it fills.
type item struct {
	part    *catalog.Part
	refs    []string
	roles   []string
	perUnit int
	inHand  int
	need    int         // to buy
	offers  []*offering // by supplier and order code; at least one, blank when the part has none
	first   int         // index of the first among all
}

// offering is one offer of an item.
type offering struct {
	item     *item
	offer    *catalog.Offer
	seller   *seller // nil for a blank one
	pinned   bool    // the plan departs from the offer that is cheapest by itself
	pinNeed  int
	pinCount int

	tries    []int
	costs    []int64 // -1: not possible
	best     int64   // -1: none
	count    int     // pieces at the best
	quantity int     // pieces bought
	native   int64
	cost     int64
	rank     int // place in the order list, from 1; 0: not in it
}

// seller is one supplier with its charges.
type seller struct {
	catalog.Supplier
	number  int
	use     bool
	weight  int // in hundredths of a percent; what a preference multiplies costs with
	lines   int
	goods   int64
	charged int64 // delivery
	fee     int64
}

// newLedger gathers parts, offers and suppliers. units is the quantity shown,
// which differs from the planned one only when a later quantity is foretold.
func newLedger(d *optimize.Design, o Options, units int) *ledger {
	currency := cmp.Or(o.Terms.Currency, d.Currency, d.Supply.Build.Currency)
	l := &ledger{units: units, market: order.NewMarket(o.Terms, currency), terms: o.Terms, breaks: 4}
	l.addItems(d, o)
	l.addSellers(o)
	l.addOffers()
	l.addForeign()
	planned := cmp.Or(d.Supply.Build.Units, 1)
	if o.Plan != nil {
		l.units = planned
		l.reckon()
		l.pin(o.Plan)
		l.units = units
	}
	l.reckon()
	return l
}

// addItems joins the lines that share a part, in their order.
func (l *ledger) addItems(d *optimize.Design, o Options) {
	byNumber := map[string]*item{}
	l.spares = map[catalog.Kind]Spare{}
	for _, line := range d.Lines {
		it := byNumber[line.Part.Number]
		if it == nil {
			it = &item{part: line.Part, inHand: o.InHand[line.Part.Number]}
			byNumber[line.Part.Number] = it
			l.items = append(l.items, it)
		}
		it.refs = append(it.refs, line.Refs...)
		if role := string(line.Role); !slices.Contains(it.roles, role) {
			it.roles = append(it.roles, role)
		}
		it.perUnit += line.PerUnit()
		if kind := line.Part.Kind; !slices.Contains(l.kinds, kind) {
			l.kinds = append(l.kinds, kind)
			spare, given := o.Spares[kind]
			if !given {
				spare = Spare{Share: float64(d.Supply.Build.Spares)}
			}
			l.spares[kind] = spare
		}
	}
}

// addSellers lists every supplier that an offer names. One that the plan
// passed over, and that charges for an order, is not used; nor is one that
// the terms exclude.
func (l *ledger) addSellers(o Options) {
	known := map[string]catalog.Supplier{}
	for _, s := range o.Suppliers {
		known[s.Name] = s
	}
	names := map[string]bool{}
	for _, it := range l.items {
		for i := range it.part.Offers {
			names[it.part.Offers[i].Supplier] = true
		}
	}
	for _, name := range sorted(names) {
		s := &seller{Supplier: known[name], number: len(l.sellers) + 1, weight: l.terms.Weight(name)}
		s.Name = name
		s.Currency = cmp.Or(s.Currency, l.market.Currency)
		s.use = !slices.Contains(l.terms.Excluded, name) && (o.Plan == nil || inPlan(o.Plan, name) || !s.charges())
		l.sellers = append(l.sellers, s)
	}
}

func (s *seller) charges() bool {
	return s.Delivery.Amount.Sign() > 0 || s.SmallOrderFee.Amount.Sign() > 0
}

func inPlan(p *order.Plan, supplier string) bool {
	return slices.ContainsFunc(p.Orders, func(o order.SupplierOrder) bool { return o.Supplier.Name == supplier })
}

func sorted(set map[string]bool) []string {
	names := make([]string, 0, len(set))
	for name := range set {
		names = append(names, name)
	}
	slices.Sort(names)
	return names
}

func (l *ledger) addOffers() {
	bySeller := map[string]*seller{}
	for _, s := range l.sellers {
		bySeller[s.Name] = s
	}
	for _, it := range l.items {
		it.first = len(l.offers)
		for i := range it.part.Offers {
			offer := &it.part.Offers[i]
			it.offers = append(it.offers, &offering{item: it, offer: offer, seller: bySeller[offer.Supplier]})
			l.breaks = max(l.breaks, len(offer.Prices)+1)
		}
		slices.SortStableFunc(it.offers, func(a, b *offering) int {
			return cmp.Or(strings.Compare(a.offer.Supplier, b.offer.Supplier), strings.Compare(a.offer.OrderCode, b.offer.OrderCode))
		})
		if len(it.offers) == 0 {
			it.offers = []*offering{{item: it, offer: &catalog.Offer{Stock: -1, LeadDays: -1, Least: 1, Multiple: 1}}}
		}
		l.offers = append(l.offers, it.offers...)
	}
	l.rows = len(l.items)
}

func (l *ledger) addForeign() {
	set := map[string]bool{}
	for _, s := range l.sellers {
		set[s.Currency] = true
	}
	for _, o := range l.offers {
		set[l.currencyOf(o)] = true
	}
	delete(set, l.market.Currency)
	l.foreign = sorted(set)
}

// currencyOf is the currency of an offer's prices.
func (l *ledger) currencyOf(o *offering) string {
	if len(o.offer.Prices) == 0 {
		return l.market.Currency
	}
	return o.offer.Prices[0].Price.Currency
}

// pin keeps the plan's own quantities where they depart from what each part
// would get by itself: a split, or a choice made for a supplier's charges.
func (l *ledger) pin(p *order.Plan) {
	planned := map[*catalog.Offer]int{}
	lines := 0
	for _, line := range p.Lines {
		for _, buy := range line.Purchases {
			planned[buy.Offer] += buy.Quantity
			lines++
		}
	}
	l.rows = max(l.rows, lines)
	for _, it := range l.items {
		total := 0
		for _, o := range it.offers {
			total += planned[o.offer]
		}
		same := !slices.ContainsFunc(it.offers, func(o *offering) bool { return planned[o.offer] != o.quantity })
		if same || total < it.need {
			continue
		}
		for _, o := range it.offers {
			o.pinned, o.pinNeed, o.pinCount = true, it.need, planned[o.offer]
		}
	}
}
