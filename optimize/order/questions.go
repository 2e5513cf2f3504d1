package order

import (
	"cmp"
	"fmt"
	"math/bits"
	"slices"

	"rungwright/catalog"
)

// Choice is one answer to a what-if question. Plan is nil when nothing serves
// every need that the freest choice serves.
type Choice struct {
	Name      string // "3 suppliers", "within 14 days", "480 units"
	Suppliers int    // orders to place
	Days      int    // need-by date; 0: none
	Units     int
	Plan      *Plan
}

// BySuppliers is the least total for each number of suppliers, so that one can
// see what one more or fewer saves. Numbers too small to serve every need are
// left out.
func BySuppliers(needs []Need, suppliers []catalog.Supplier, terms Terms) ([]Choice, error) {
	s, err := newSolver(needs, suppliers, terms)
	if err != nil {
		return nil, err
	}
	var all []Choice
	for n := 1; n <= len(s.bidders); n++ {
		s.work = 0
		a := s.search(func(set uint32) bool { return bits.OnesCount32(set) == n })
		if a.cost >= never || len(a.ways) == 0 {
			continue
		}
		if p := s.plan(a); len(p.Orders) == n { // fewer: listed already
			all = append(all, Choice{Name: counted(n, "supplier"), Suppliers: n, Plan: p})
		}
	}
	return all, nil
}

func counted(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

// ByDate is the least total for each need-by date, so that one can see what a
// week costs. Dates are in days; nil takes the lead times that the offers
// state, and no date at all. Plans that leave a need unserved are listed too:
// their Unserved says which.
func ByDate(needs []Need, suppliers []catalog.Supplier, terms Terms, dates []int) ([]Choice, error) {
	if dates == nil {
		dates = leadTimes(needs)
	}
	var all []Choice
	for _, d := range dates {
		terms.NeedBy = d
		p, err := Make(needs, suppliers, terms)
		if err != nil {
			return nil, err
		}
		name := "no date"
		if d > 0 {
			name = "within " + counted(d, "day")
		}
		all = append(all, Choice{Name: name, Days: d, Suppliers: len(p.Orders), Plan: p})
	}
	return all, nil
}

// leadTimes lists the stated lead times, shortest first, and 0 for no date;
// 1 stands for what is on the shelf.
func leadTimes(needs []Need) []int {
	dates := []int{1}
	for _, n := range needs {
		for i := range n.Part.Offers {
			if d := n.Part.Offers[i].LeadDays; d > 0 {
				dates = append(dates, d)
			}
		}
	}
	slices.Sort(dates)
	return append(slices.Compact(dates), 0)
}

// ByUnits is the least total for each build quantity. needs says what so many
// units want.
func ByUnits(units []int, needs func(units int) []Need, suppliers []catalog.Supplier, terms Terms) ([]Choice, error) {
	var all []Choice
	for _, n := range units {
		p, err := Make(needs(n), suppliers, terms)
		if err != nil {
			return nil, err
		}
		all = append(all, Choice{Name: counted(n, "unit"), Units: n, Suppliers: len(p.Orders), Plan: p})
	}
	return all, nil
}

// Steps lists the build quantities from least to most at which the cheapest
// unit price of some part changes: where a break, reached by the need or
// bought up to, takes over. perUnit is pieces in one unit, by part.
func Steps(parts []*catalog.Part, need func(part *catalog.Part, units int) int, least, most int, terms Terms) []int {
	steps := []int{least}
	for _, p := range parts {
		price := func(units int) string {
			c, ok := Cheapest(p, need(p, units), terms)
			if !ok || c.Offer == nil {
				return ""
			}
			return c.Offer.Supplier + "\x00" + c.Offer.OrderCode + "\x00" + c.UnitPrice.String()
		}
		steps = append(steps, changes(price, least, most)...)
	}
	slices.SortFunc(steps, cmp.Compare)
	return slices.Compact(append(steps, most))
}

// changes finds where a step function changes, by halving wherever the ends
// differ, and by looking at forty places in between.
func changes(f func(int) string, least, most int) []int {
	var all []int
	at := least
	for k := 1; k <= 40; k++ {
		next := least + (most-least)*k/40
		for at < next && f(at) != f(next) {
			low, high := at, next // the first value other than f(at)
			for low+1 < high {
				if mid := (low + high) / 2; f(mid) == f(at) {
					low = mid
				} else {
					high = mid
				}
			}
			all, at = append(all, high), high
		}
		at = next
	}
	return all
}
