package order

import (
	"fmt"
	"math/rand/v2"
	"testing"

	"github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// largeCase is a real order's shape: every supplier sells most parts at
// prices that lie close together, with breaks, reels, stock limits and charges.
func largeCase(seed uint64, lines, suppliers int) ([]Need, []catalog.Supplier) {
	r := rand.New(rand.NewPCG(seed, 5))
	var sellers []catalog.Supplier
	for i := range suppliers {
		sellers = append(sellers, catalog.Supplier{Name: fmt.Sprintf("S%02d", i), Currency: "EUR",
			Delivery: euros(fmt.Sprintf("%d.90", 3+r.IntN(12))), FreeAbove: euros(fmt.Sprint(40 + r.IntN(20)*10)),
			SmallOrder: euros(fmt.Sprint(20 + r.IntN(40))), SmallOrderFee: euros(fmt.Sprint(3 + r.IntN(8)))})
	}
	var needs []Need
	for i := range lines {
		base := int64(1+r.IntN(200)) * int64(1+r.IntN(30)) // up to 0.60 in units of 0.0001
		p := part(fmt.Sprintf("P%03d", i))
		for s := range suppliers {
			if r.IntN(3) == 0 {
				continue
			}
			o := catalog.Offer{Supplier: sellers[s].Name, OrderCode: fmt.Sprint(i), Stock: r.IntN(4000), LeadDays: r.IntN(40) - 10, Least: 1, Multiple: 1}
			if r.IntN(4) == 0 {
				o.Least, o.Multiple = 100, 100
			}
			if o.LeadDays < 0 {
				o.LeadDays = -1
			}
			price := base * int64(90+r.IntN(25)) / 100
			for _, from := range []int{1, 10, 100, 500, 1000, 5000} {
				o.Prices = append(o.Prices, catalog.Break{Quantity: from, Price: quantity.Money{Amount: decimal.New(max(10, price), -4), Currency: "EUR"}})
				price = price * int64(82+r.IntN(12)) / 100
			}
			p.Offers = append(p.Offers, o)
		}
		needs = append(needs, Need{Part: p, Pieces: 10 + r.IntN(1500)})
	}
	return needs, sellers
}

func BenchmarkMake(b *testing.B) {
	for _, size := range []struct{ lines, suppliers int }{{20, 5}, {200, 12}} {
		b.Run(fmt.Sprintf("lines=%d/suppliers=%d", size.lines, size.suppliers), func(b *testing.B) {
			needs, sellers := largeCase(1, size.lines, size.suppliers)
			b.ReportAllocs()
			for b.Loop() {
				p, err := Make(needs, sellers, Terms{})
				if err != nil {
					b.Fatal(err)
				}
				b.ReportMetric(p.Slack.InexactFloat64(), "slack-EUR")
			}
		})
	}
}

func TestLargeOrders(t *testing.T) {
	proved := 0
	for seed := range uint64(6) {
		needs, sellers := largeCase(seed, 40+30*int(seed), 6+int(seed))
		p, err := Make(needs, sellers, Terms{})
		if err != nil {
			t.Fatal(err)
		}
		checkSums(t, p, sellers, Terms{})
		t.Logf("%d lines, %d suppliers: %s at %d suppliers, proved %v, slack %s", len(needs), len(sellers), p.Total, len(p.Orders), p.Proved, p.Slack)
		if p.Proved {
			proved++
		}
	}
	t.Logf("%d of 6 proved", proved)
}
