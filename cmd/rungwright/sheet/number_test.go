package sheet

import "testing"

func TestNumbers(t *testing.T) {
	for _, c := range []struct {
		text string
		mark rune
		want string
	}{
		{"1.234,56", undecided, "1234.56"},
		{"1,234.56", undecided, "1234.56"},
		{"1 234,5", undecided, "1234.5"},
		{"1\u00a0234", undecided, "1234"},
		{"1'234.5", undecided, "1234.5"},
		{"1’234’567", undecided, "1234567"},
		{"€ 0,62", undecided, "0.62"},
		{"$1,234,567", undecided, "1234567"},
		{"1.234.567", undecided, "1234567"},
		{"0,125", undecided, "0.125"},
		{"1234,567", undecided, "1234.567"},
		{"1.234", ',', "1234"},
		{"1,234", '.', "1234"},
		{"1.234", '.', "1.234"},
		{"-3", undecided, "-3"},
		{"1e-3", undecided, "1e-3"},
		{"−2,5", undecided, "-2.5"},
		{".5", undecided, ".5"},
	} {
		if got, err := readNumber(c.text, c.mark); err != nil || got != c.want {
			t.Errorf("%q with %q: got %q %v, want %q", c.text, c.mark, got, err, c.want)
		}
	}
	for _, c := range []struct {
		text string
		mark rune
	}{{"1,234", undecided}, {"1.234", mixed}, {"1,5", '.'}, {"1.23,456.7", undecided}, {"12,34,567.8", undecided}, {"ten", '.'}, {"", '.'}, {"1 2", '.'}, {"0x10", '.'}, {"Inf", '.'}, {"1,,5", undecided}} {
		if got, err := readNumber(c.text, c.mark); err == nil {
			t.Errorf("%q with %q: got %q, want an error", c.text, c.mark, got)
		}
	}
}

// A column settles its own doubtful numbers.
func TestDecideMark(t *testing.T) {
	for _, c := range []struct {
		texts []string
		want  rune
	}{
		{[]string{"1,234", "2"}, undecided},
		{[]string{"1,234", "0,5"}, ','},
		{[]string{"1,234", "0.5"}, '.'},
		{[]string{"1.234", "1.234.567"}, ','},
		{[]string{"0,5", "0.5"}, mixed},
		{[]string{"N/A", "x.y", "1,5 EUR"}, undecided},
	} {
		if got := decideMark(c.texts); got != c.want {
			t.Errorf("%q: got %q, want %q", c.texts, got, c.want)
		}
	}
}

func TestQuantities(t *testing.T) {
	for text, want := range map[string]int{"4": 4, "4 pcs": 4, "3 Stück": 3, "2x": 2, "x 2": 2, "4,0": 4, "1 000": 1000, "10 ea.": 10, "5 Stk.": 5, "+2": 2} {
		if n, _, err := parseQuantity(text, undecided); err != nil || n != want {
			t.Errorf("%q: got %d %v, want %d", text, n, err, want)
		}
	}
	for _, text := range []string{"", "four", "-1", "1.5", "1,234", "1e9", "3 boxes", "1/2", "4-5"} {
		if n, _, err := parseQuantity(text, undecided); err == nil {
			t.Errorf("%q: got %d, want an error", text, n)
		}
	}
}
