package order

import (
	"reflect"
	"strings"
	"testing"

	"github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

func shop(name, delivery, free, small, fee string) catalog.Supplier {
	return catalog.Supplier{Name: name, Currency: "EUR", Delivery: euros(delivery), FreeAbove: euros(free), SmallOrder: euros(small), SmallOrderFee: euros(fee)}
}

// Worked by hand: 100 at 0.20 from Abe (20.00) and 50 at 0.30 from Bea (15.00)
// are cheapest line by line, 35.00, but carry two deliveries of 5.00: 45.00.
// All from Abe: 20.00 + 50 × 0.36 = 38.00, and 38.00 is below the free 40.00,
// so 43.00. Six pieces more of the second at 0.36 = 2.16 reach 40.16, free:
// the least, unless ten more of the first (2.00) reach 40.00 exactly.
func TestPadsToFreeDelivery(t *testing.T) {
	first := part("P1", offer("Abe", 1, 1, 1, "0.20"))
	second := part("P2", offer("Abe", 1, 1, 1, "0.36"), offer("Bea", 1, 1, 1, "0.30"))
	needs := []Need{{Part: first, Pieces: 100}, {Part: second, Pieces: 50}}
	p, err := Make(needs, []catalog.Supplier{shop("Abe", "5", "40", "0", "0"), shop("Bea", "5", "0", "0", "0")}, Terms{})
	if err != nil {
		t.Fatal(err)
	}
	if p.Total.StringFixed(2) != "40.00" || len(p.Orders) != 1 || p.Lines[0].Purchases[0].Quantity != 110 || !p.Charges.IsZero() {
		t.Errorf("got %s over %d orders, first line %+v", p.Total, len(p.Orders), p.Lines[0].Purchases)
	}
	choices, err := BySuppliers(needs, []catalog.Supplier{shop("Abe", "5", "40", "0", "0"), shop("Bea", "5", "0", "0", "0")}, Terms{})
	if err != nil {
		t.Fatal(err)
	}
	// two suppliers: 20.00 + 15.00 + 5.00 + 5.00
	if len(choices) != 2 || choices[0].Plan.Total.StringFixed(2) != "40.00" || choices[1].Plan.Total.StringFixed(2) != "45.00" {
		t.Errorf("by suppliers: got %+v", choices)
	}
}

// 1080 of a part on reels of 1000 at 0.10, or loose at 0.30: one reel and 80
// loose cost 100 + 24 = 124, two reels 200, all loose 324.
func TestSplitsOverReelAndLoose(t *testing.T) {
	p := part("P", offer("Abe", 1000, 1000, 1000, "0.10"), offer("Bea", 1, 1, 1, "0.30"))
	plan, err := Make([]Need{{Part: p, Pieces: 1080}}, nil, Terms{})
	if err != nil {
		t.Fatal(err)
	}
	if plan.Total.StringFixed(2) != "124.00" || len(plan.Orders) != 2 || !plan.Proved {
		t.Errorf("got %s over %d orders", plan.Total, len(plan.Orders))
	}
}

// Four shelves of 30 pieces must all be emptied for 110, though a line is
// otherwise not split over more than three offers.
func TestSplitsAsFarAsStockForces(t *testing.T) {
	p := part("P")
	for _, name := range []string{"A", "B", "C", "D"} {
		o := offer(name, 1, 1, 1, "0.50")
		o.Stock = 30
		p.Offers = append(p.Offers, o)
	}
	plan, err := Make([]Need{{Part: p, Pieces: 110}}, nil, Terms{})
	if err != nil || len(plan.Lines[0].Purchases) != 4 || plan.Total.StringFixed(2) != "55.00" {
		t.Errorf("got %+v %v", plan, err)
	}
	plan, err = Make([]Need{{Part: p, Pieces: 121}}, nil, Terms{})
	if err != nil || len(plan.Unserved) != 1 || !strings.Contains(plan.Unserved[0].Why, "A has 30 of 121 in stock") {
		t.Errorf("got %+v %v", plan.Unserved, err)
	}
}

// 3 % dearer at a preferred supplier wins at a premium of 4 %, not of 2 %:
// 100 × 1.03 = 103 against 100 × 1.04 = 104, and against 102.
func TestPreference(t *testing.T) {
	p := part("P", offer("Abe", 1, 1, 1, "1.00"), offer("Bea", 1, 1, 1, "1.03"))
	for premium, want := range map[float64]string{0.04: "Bea", 0.02: "Abe"} {
		plan, err := Make([]Need{{Part: p, Pieces: 100}}, nil, Terms{Preferred: []string{"Bea"}, Premium: premium})
		if err != nil || plan.Orders[0].Supplier.Name != want || !plan.Proved {
			t.Errorf("%g: got %+v %v, want %s", premium, plan.Orders, err, want)
		}
	}
}

// From stock at 2.00, or in 14 days at 1.50: ten pieces cost 20.00 now, 15.00
// later; a week costs nothing more until the date is 14 days away.
func TestByDate(t *testing.T) {
	now, later := offer("Abe", 1, 1, 1, "2.00"), offer("Bea", 1, 1, 1, "1.50")
	now.Stock, later.Stock, later.LeadDays = 50, 0, 14
	got, err := ByDate([]Need{{Part: part("P", now, later), Pieces: 10}}, nil, Terms{}, nil)
	if err != nil {
		t.Fatal(err)
	}
	var totals []string
	for _, c := range got {
		totals = append(totals, c.Name+" "+c.Plan.Total.StringFixed(2))
	}
	if want := []string{"within 1 day 20.00", "within 14 days 15.00", "no date 15.00"}; !reflect.DeepEqual(totals, want) {
		t.Errorf("got %q, want %q", totals, want)
	}
}

// 0.62 up to 99, 0.41 from 100: 67 pieces cost 41.54 and 100 cost 41.00, so
// with four pieces a unit the step lies at 17 units, where 68 are needed.
func TestSteps(t *testing.T) {
	p := part("P", offer("Abe", 1, 1, 1, "0.62", 100, "0.41"))
	need := func(_ *catalog.Part, units int) int { return 4 * units }
	got := Steps([]*catalog.Part{p}, need, 1, 1000, Terms{})
	if want := []int{1, 17, 1000}; !reflect.DeepEqual(got, want) {
		t.Errorf("got %v, want %v", got, want)
	}
}

// Two currencies, charges in the supplier's own: 40 × 1.20 USD = 48.00 USD,
// 43.20 EUR at 0.9; free from 50 USD = 45.00 EUR is not reached, so 10 USD =
// 9.00 EUR come on top.
func TestPlanInTwoCurrencies(t *testing.T) {
	o := quoteIn("USD", offer("Bea", 1, 1, 1, "1.20"))
	usd := func(text string) quantity.Money { return quantity.Money{Amount: amount(text), Currency: "USD"} }
	seller := catalog.Supplier{Name: "Bea", Currency: "USD", Delivery: usd("10"), FreeAbove: usd("50")}
	terms := Terms{Currency: "EUR", Rates: map[string]decimal.Decimal{"USD": amount("0.9")}}
	plan, err := Make([]Need{{Part: part("P", o), Pieces: 40}}, []catalog.Supplier{seller}, terms)
	if err != nil {
		t.Fatal(err)
	}
	// two more pieces would make 42 × 1.20 = 50.40 USD = 45.36 EUR, and free
	if plan.Total.StringFixed(2) != "45.36" || plan.Lines[0].Purchases[0].Quantity != 42 {
		t.Errorf("got %s for %d", plan.Total, plan.Lines[0].Purchases[0].Quantity)
	}
	plan, err = Make([]Need{{Part: part("P", o), Pieces: 40}}, nil, Terms{Currency: "EUR"})
	if err != nil || len(plan.Unserved) != 1 || !strings.Contains(plan.Unserved[0].Why, "no rate is given for USD") {
		t.Errorf("got %+v %v", plan, err)
	}
	if _, err := Make([]Need{{Part: part("P", o, offer("Abe", 1, 1, 1, "1")), Pieces: 1}}, nil, Terms{}); err == nil {
		t.Error("two currencies were added without rates")
	}
}

func TestWhyUnserved(t *testing.T) {
	short := offer("Abe", 1, 1, 1, "1")
	short.Stock = 3
	free := offer("Abe", 1, 1, 1, "0")
	cases := []struct {
		part  *catalog.Part
		terms Terms
		want  string
	}{
		{part("P"), Terms{Currency: "EUR"}, "no offer in the catalog"},
		{part("P", short), Terms{}, "Abe has 3 of 10 in stock and states no lead time"},
		{part("P", short), Terms{NeedBy: 5}, "Abe can deliver 3 of 10 within 5 days"},
		{part("P", short), Terms{Excluded: []string{"Abe"}}, "Abe is excluded"},
		{part("P", free), Terms{}, "Abe gives a price of 0.00 EUR, which must be a mistake"},
	}
	for _, c := range cases {
		plan, err := Make([]Need{{Part: c.part, Pieces: 10}}, nil, c.terms)
		if err != nil || len(plan.Unserved) != 1 || !strings.HasPrefix(plan.Unserved[0].Why, c.want) {
			t.Errorf("got %+v %v, want %q", plan, err, c.want)
		}
	}
}

func TestDrawerAndNothingToBuy(t *testing.T) {
	p := part("P", offer("Abe", 1, 1, 1, "1"))
	plan, err := Make([]Need{{Part: p, Pieces: 10, InHand: 4}}, nil, Terms{})
	if err != nil || plan.Total.StringFixed(2) != "6.00" {
		t.Errorf("got %+v %v", plan, err)
	}
	plan, err = Make([]Need{{Part: p, Pieces: 10, InHand: 40}}, nil, Terms{})
	if err != nil || !plan.Total.IsZero() || len(plan.Orders) != 0 || !plan.Proved {
		t.Errorf("got %+v %v", plan, err)
	}
}
