package order

import (
	"fmt"
	"math/rand/v2"
	"os"
	"testing"

	"github.com/shopspring/decimal"

	"rungwright/catalog"
)

// randomCase is small enough that every order can be written down.
func randomCase(r *rand.Rand, lines, suppliers, breaks int) (needs []Need, sellers []catalog.Supplier, terms Terms) {
	for i := range suppliers {
		s := catalog.Supplier{Name: fmt.Sprintf("S%d", i), Currency: "EUR"}
		if r.IntN(4) > 0 {
			s.Delivery = euros(fmt.Sprintf("%d.%02d", r.IntN(3), r.IntN(100)))
		}
		if r.IntN(3) > 0 {
			s.FreeAbove = euros(fmt.Sprint(1 + r.IntN(6)))
		}
		if r.IntN(2) > 0 {
			s.SmallOrder, s.SmallOrderFee = euros(fmt.Sprint(1+r.IntN(4))), euros(fmt.Sprintf("%d.%02d", r.IntN(2), r.IntN(100)))
		}
		sellers = append(sellers, s)
	}
	for i := range lines {
		needs = append(needs, Need{Part: randomPart(r, fmt.Sprint("P", i), suppliers, breaks, 12), Pieces: 1 + r.IntN(5), InHand: max(0, r.IntN(6)-4)})
	}
	return needs, sellers, Terms{Currency: "EUR", NeedBy: r.IntN(3)}
}

// Every order over all whole quantities that costs no more than the answer is
// written down and added up; none may be cheaper, and the answer's own sums,
// quantities and stock must hold.
func TestMakeAgainstEveryOrder(t *testing.T) {
	r := rand.New(rand.NewPCG(11, 3))
	shapes := []struct{ lines, suppliers, breaks, trials int }{{1, 3, 3, 800}, {2, 2, 3, 600}, {3, 2, 2, 200}, {2, 3, 2, 100}}
	unserved, reached := 0, 0
	for _, shape := range shapes {
		for trial := range shape.trials * heavy() {
			needs, sellers, terms := randomCase(r, shape.lines, shape.suppliers, shape.breaks)
			p, err := Make(needs, sellers, terms)
			if err != nil {
				t.Fatal(err)
			}
			checkSums(t, p, sellers, terms)
			if len(p.Unserved) > 0 {
				unserved++
				continue
			}
			if !p.Proved {
				t.Errorf("%+v trial %d: not proved", shape, trial)
			}
			got := p.Total.Add(splitting(further(p)))
			if least := everyOrder(needs, sellers, terms, got); !least.Equal(got) {
				t.Fatalf("%+v trial %d: got %s, but %s is possible\n%s", shape, trial, got, least, describe(needs, sellers, p))
			}
			if padded(p) {
				reached++
			}
		}
	}
	if reached < 20 || unserved == 0 {
		t.Errorf("the trials are too tame: %d orders buy more than needed, %d lines unserved", reached, unserved)
	}
}

// splitting is what Make counts for purchases beyond one a line: the promise
// is that a split saves at least that.
func splitting(purchases int) decimal.Decimal { return decimal.New(int64(purchases)*splitCost, -2) }

func further(p *Plan) int {
	n := 0
	for _, l := range p.Lines {
		n += max(0, len(l.Purchases)-1)
	}
	return n
}

// padded tells whether an order buys more than the single offer would.
func padded(p *Plan) bool {
	for _, l := range p.Lines {
		pieces := 0
		for _, b := range l.Purchases {
			pieces += b.Quantity
		}
		if len(l.Purchases) == 1 && pieces > Orderable(l.Purchases[0].Offer, l.Need.Net()) {
			return true
		}
	}
	return false
}

// everyOrder is the least total of all orders, by sets of what the suppliers'
// goods can come to. It shares no code with Make but the availability rule.
func everyOrder(needs []Need, sellers []catalog.Supplier, terms Terms, limit decimal.Decimal) decimal.Decimal {
	most := limit.Shift(2).IntPart()
	type goods [3]int64
	reach := map[goods]int{{-1, -1, -1}: 0} // with the fewest further purchases
	for _, n := range needs {
		if n.Net() == 0 {
			continue
		}
		covers, next := map[goods]int{}, map[goods]int{}
		everyCover(n, sellers, terms, 0, [3]int64{-1, -1, -1}, 0, 0, most, func(g [3]int64, further int) { fewest(covers, g, further) })
		for a, more := range reach {
			for b, further := range covers {
				var sum goods
				var all int64
				for i := range sum {
					sum[i] = max(a[i], b[i], a[i]+b[i])
					all += max(0, sum[i])
				}
				if all <= most {
					fewest(next, sum, more+further)
				}
			}
		}
		reach = next
	}
	least := limit.Add(decimal.NewFromInt(1000))
	for g, further := range reach {
		total := splitting(further)
		for i, s := range sellers {
			if g[i] < 0 {
				continue
			}
			amount := decimal.New(g[i], -2)
			total = total.Add(amount)
			if s.FreeAbove.Amount.Sign() == 0 || amount.LessThan(s.FreeAbove.Amount) {
				total = total.Add(s.Delivery.Amount)
			}
			if amount.LessThan(s.SmallOrder.Amount) {
				total = total.Add(s.SmallOrderFee.Amount)
			}
		}
		if total.LessThan(least) {
			least = total
		}
	}
	return least
}

func fewest[K comparable](m map[K]int, k K, n int) {
	if had, ok := m[k]; !ok || n < had {
		m[k] = n
	}
}

func everyCover(n Need, sellers []catalog.Supplier, terms Terms, i int, g [3]int64, pieces, purchases int, most int64, yield func([3]int64, int)) {
	if i == len(n.Part.Offers) {
		if pieces >= n.Net() {
			yield(g, purchases-1)
		}
		return
	}
	everyCover(n, sellers, terms, i+1, g, pieces, purchases, most, yield)
	o := n.Part.Offers[i]
	seller := 0
	for k, s := range sellers {
		if s.Name == o.Supplier {
			seller = k
		}
	}
	available, _ := terms.Available(&o)
	for q := 1; q <= min(available, 400); q++ {
		if q < o.Least || q%o.Multiple != 0 {
			continue
		}
		price := decimal.Zero
		for _, b := range o.Prices {
			if b.Quantity <= q {
				price = b.Price.Amount
			}
		}
		cost := price.Mul(decimal.NewFromInt(int64(q))).Round(2).Shift(2).IntPart()
		next := g
		next[seller] = max(0, g[seller]) + cost
		if next[seller] <= most {
			everyCover(n, sellers, terms, i+1, next, pieces+q, purchases+1, most, yield)
		}
	}
}

// checkSums adds a plan up again.
func checkSums(t *testing.T, p *Plan, sellers []catalog.Supplier, terms Terms) {
	t.Helper()
	taken := map[*catalog.Offer]int{}
	for _, l := range p.Lines {
		pieces := 0
		for _, b := range l.Purchases {
			pieces += b.Quantity
			taken[b.Offer] += b.Quantity
			if b.Quantity < b.Offer.Least || b.Quantity%b.Offer.Multiple != 0 {
				t.Fatalf("%d of an offer with least %d, multiple %d", b.Quantity, b.Offer.Least, b.Offer.Multiple)
			}
		}
		if len(l.Purchases) > 0 && pieces < l.Need.Net() {
			t.Fatalf("%d bought of %d", pieces, l.Need.Net())
		}
	}
	for o, n := range taken {
		if most, _ := terms.Available(o); n > most {
			t.Fatalf("%d ordered of %d", n, most)
		}
	}
	total := decimal.Zero
	for _, o := range p.Orders {
		goods := decimal.Zero
		for _, b := range o.Purchases {
			goods = goods.Add(b.UnitPrice.Mul(decimal.NewFromInt(int64(b.Quantity))).Round(2))
		}
		if !goods.Equal(o.Goods) || !o.Goods.Add(o.Delivery).Add(o.SmallOrderFee).Equal(o.Total) {
			t.Fatalf("the order to %s does not add up", o.Supplier.Name)
		}
		total = total.Add(o.Total)
	}
	if !total.Equal(p.Total) || !p.Goods.Add(p.Charges).Equal(p.Total) {
		t.Fatal("the plan does not add up")
	}
}

func describe(needs []Need, sellers []catalog.Supplier, p *Plan) string {
	s := ""
	for _, v := range sellers {
		s += fmt.Sprintf("%s: delivery %s free from %s, fee %s below %s\n", v.Name, v.Delivery, v.FreeAbove, v.SmallOrderFee, v.SmallOrder)
	}
	for i, n := range needs {
		s += fmt.Sprintf("need %d:", n.Net())
		for _, o := range n.Part.Offers {
			s += fmt.Sprintf("\n  %s stock %d lead %d least %d multiple %d: ", o.Supplier, o.Stock, o.LeadDays, o.Least, o.Multiple)
			for _, b := range o.Prices {
				s += fmt.Sprintf(" %d@%s", b.Quantity, b.Price.Amount)
			}
		}
		for _, b := range p.Lines[i].Purchases {
			s += fmt.Sprintf("\n  bought %d from %s for %s", b.Quantity, b.Offer.Supplier, b.Cost)
		}
		s += "\n"
	}
	return s
}

// heavy multiplies trials where there is time for them.
func heavy() int {
	if os.Getenv("RUNGWRIGHT_HEAVY") != "" {
		return 20
	}
	return 1
}
