package order

import (
	"math/rand/v2"
	"testing"

	"github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// Each case is worked by hand; the sums stand in the comments.
func TestCheapestByHand(t *testing.T) {
	cases := []struct {
		name     string
		part     *catalog.Part
		need     int
		terms    Terms
		supplier string
		quantity int
		cost     string
	}{
		{"500 are cheaper than 480", // 480 × 0.41 = 196.80, 500 × 0.36 = 180.00
			part("P", offer("Fellmarket", 1, 1, 1, "0.62", 100, "0.41", 500, "0.36")), 480, Terms{}, "Fellmarket", 500, "180.00"},
		{"buying up does not pay", // 300 × 0.41 = 123.00, 500 × 0.36 = 180.00
			part("P", offer("Fellmarket", 1, 1, 1, "0.62", 100, "0.41", 500, "0.36")), 300, Terms{}, "Fellmarket", 300, "123.00"},
		{"minimum and multiple", // 7 → 10 × 0.62
			part("P", offer("Fellmarket", 10, 5, 1, "0.62")), 7, Terms{}, "Fellmarket", 10, "6.20"},
		{"the multiple lifts past a break", // 97 → 100 × 0.41, not × 0.62
			part("P", offer("Fellmarket", 1, 10, 1, "0.62", 100, "0.41")), 97, Terms{}, "Fellmarket", 100, "41.00"},
		{"the other supplier", // 3 × 0.50 = 1.50 against 10 × 0.20 = 2.00
			part("P", offer("Orrick", 10, 10, 1, "0.20"), offer("Fellmarket", 1, 1, 1, "0.50")), 3, Terms{}, "Fellmarket", 3, "1.50"},
		{"that one excluded", // then 10 × 0.20
			part("P", offer("Orrick", 10, 10, 1, "0.20"), offer("Fellmarket", 1, 1, 1, "0.50")), 3,
			Terms{Excluded: []string{"Fellmarket"}}, "Orrick", 10, "2.00"},
		{"half a cent goes up", // 3 × 0.015 = 0.045
			part("P", offer("Fellmarket", 1, 1, 1, "0.015")), 3, Terms{}, "Fellmarket", 3, "0.05"},
		{"equal cost: fewer pieces", // 5 × 0.20 = 10 × 0.10
			part("P", offer("Fellmarket", 1, 1, 1, "0.20", 10, "0.10")), 5, Terms{}, "Fellmarket", 5, "1.00"},
		{"equal in all: first name", part("P", offer("Zed", 1, 1, 1, "0.20"), offer("Abe", 1, 1, 1, "0.20")), 5, Terms{}, "Abe", 5, "1.00"},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			p, ok := Cheapest(c.part, c.need, c.terms)
			if !ok || p.Offer.Supplier != c.supplier || p.Quantity != c.quantity || p.Cost.StringFixed(2) != c.cost {
				t.Fatalf("got %v %d from %+v for %s, want %d from %s for %s", ok, p.Quantity, p.Offer, p.Cost, c.quantity, c.supplier, c.cost)
			}
		})
	}
}

// A line is invoiced in the supplier's currency and then converted:
// 7 × 1.115 USD = 7.805 → 7.81 USD; × 0.9 = 7.029 → 7.03 EUR. In yen there
// are no decimals: 7 × 1.115 × 150 JPY → 7.81 × 150 = 1171.5 → 1172.
func TestCheapestConverts(t *testing.T) {
	o := offer("Fellmarket", 1, 1, 1, "1.115")
	o.Prices[0].Price.Currency = "USD"
	p := part("P", o)
	for _, c := range []struct {
		currency, rate, want string
	}{{"EUR", "0.9", "7.03"}, {"JPY", "150", "1172"}} {
		terms := Terms{Currency: c.currency, Rates: map[string]decimal.Decimal{"USD": amount(c.rate)}}
		got, ok := Cheapest(p, 7, terms)
		if !ok || got.Cost.String() != c.want {
			t.Errorf("%s: got %s, want %s", c.currency, got.Cost, c.want)
		}
	}
	if _, ok := Cheapest(p, 7, Terms{Currency: "EUR"}); ok {
		t.Error("an offer without a rate was taken")
	}
	if _, ok := Cheapest(part("P", o, offer("Orrick", 1, 1, 1, "1")), 7, Terms{}); ok {
		t.Error("two currencies were compared without rates")
	}
}

func TestAvailable(t *testing.T) {
	cases := []struct {
		name               string
		stock, lead, until int
		want               int
	}{
		{"nothing stated, no date", -1, -1, 0, unlimited},
		{"nothing stated, a date", -1, -1, 10, 0},
		{"shelf only", 40, -1, 0, 40},
		{"shelf only, a date", 40, -1, 10, 40},
		{"lead keeps the date", 40, 7, 10, unlimited},
		{"lead misses the date", 40, 14, 10, 40},
		{"lead, no date", 0, 90, 0, unlimited},
		{"lead without stock misses", -1, 14, 10, 0},
	}
	for _, c := range cases {
		got, _ := Terms{NeedBy: c.until}.Available(&catalog.Offer{Stock: c.stock, LeadDays: c.lead})
		if got != c.want {
			t.Errorf("%s: got %d, want %d", c.name, got, c.want)
		}
	}
}

// Every quantity of every offer is tried, in plain decimals, against Cheapest.
func TestCheapestAgainstTryingEverything(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 1))
	for trial := range 3000 {
		p := randomPart(r, "P", 3, 4, 30)
		need := 1 + r.IntN(25)
		terms := Terms{NeedBy: r.IntN(4)}
		got, ok := Cheapest(p, need, terms)
		want, found := tryEverything(p, need, terms)
		if ok != found || ok && !got.Cost.Equal(want) {
			t.Fatalf("trial %d: need %d of %+v: got %v %s, want %v %s", trial, need, p.Offers, ok, got.Cost, found, want)
		}
	}
}

func tryEverything(p *catalog.Part, need int, terms Terms) (least decimal.Decimal, found bool) {
	for _, o := range p.Offers {
		most, _ := terms.Available(&o)
		for n := need; n <= min(most, 100); n++ {
			if n < o.Least || n%o.Multiple != 0 {
				continue
			}
			var price decimal.Decimal
			for _, b := range o.Prices {
				if b.Quantity <= n {
					price = b.Price.Amount
				}
			}
			if cost := price.Mul(decimal.NewFromInt(int64(n))).Round(2); price.Sign() > 0 && (!found || cost.LessThan(least)) {
				least, found = cost, true
			}
		}
	}
	return least, found
}

// The integer path and the decimals must agree, also where the integers give up.
func TestTimesIsExact(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 2))
	for range 20000 {
		price := decimal.New(1+r.Int64N(1<<r.IntN(60)), int32(r.IntN(24)-20))
		n, digits := 1+r.IntN(1<<r.IntN(30)), r.IntN(4)
		want := price.Mul(decimal.NewFromInt(int64(n))).Round(int32(digits)).Shift(int32(digits))
		got, ok := times(price, n, digits)
		if fits := want.Cmp(decimal.NewFromInt(mostMinor)) <= 0; fits != ok || ok && !decimal.NewFromInt(got).Equal(want) {
			t.Fatalf("%s × %d to %d digits: got %d %v, want %s", price, n, digits, got, ok, want)
		}
	}
}

func TestTimesRefuses(t *testing.T) {
	for _, price := range []decimal.Decimal{{}, amount("-1"), decimal.New(1, 2_000_000_000), decimal.New(9, 17)} {
		if minor, ok := times(price, 3, 2); ok {
			t.Errorf("price with exponent %d was taken as %d", price.Exponent(), minor)
		}
	}
}

// ISO 4217: minor units of the currencies.
func TestDigits(t *testing.T) {
	for code, want := range map[string]int{"EUR": 2, "USD": 2, "JPY": 0, "KRW": 0, "KWD": 3, "CHF": 2, "XYZ": 2, "": 2} {
		if got := Digits(code); got != want {
			t.Errorf("%q: got %d, want %d", code, got, want)
		}
	}
}

func TestWithSpares(t *testing.T) {
	cases := []struct {
		need   int
		spares float64
		want   int
	}{{100, 0.1, 110}, {100, 0, 100}, {120, 0.02, 123}, {1, 0.02, 2}, {0, 0.5, 0}, {150, 0.02, 153}, {1000, 0.0001, 1001}, {3, 0.07, 4}}
	for _, c := range cases {
		if got := WithSpares(c.need, c.spares); got != c.want {
			t.Errorf("%d with %g: got %d, want %d", c.need, c.spares, got, c.want)
		}
	}
}

func BenchmarkCheapest(b *testing.B) {
	o := offer("Fellmarket", 10, 10, 1, "0.62", 100, "0.41", 500, "0.36", 1000, "0.29")
	p := part("P", o, offer("Orrick", 1, 1, 1, "0.70", 250, "0.33"), quoteIn("USD", o))
	terms := Terms{Currency: "EUR", Rates: map[string]decimal.Decimal{"USD": amount("0.92")}}
	for name, part := range map[string]*catalog.Part{"one currency": {Offers: p.Offers[:2]}, "two currencies": p} {
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Cheapest(part, 480, terms)
			}
		})
	}
}

func quoteIn(code string, o catalog.Offer) catalog.Offer {
	o.Prices = append([]catalog.Break(nil), o.Prices...)
	for i, b := range o.Prices {
		o.Prices[i].Price = quantity.Money{Amount: b.Price.Amount, Currency: code}
	}
	return o
}
