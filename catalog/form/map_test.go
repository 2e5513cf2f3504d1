package form_test

import (
	"fmt"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

func ExampleParse() {
	var r form.Report
	m := form.Parse("supply.yaml", []byte("output:\n  voltage: 5.6 kV\n  ripple: 25 VV\n  polarty: negative\n"), &r)
	m.Require("output", "source")
	output := m.Map("output")
	fmt.Println(form.Get[quantity.Volts](output, "voltage", form.Positive))
	form.Get[quantity.Volts](output, "ripple", form.Positive)
	output.Choice("polarity", "positive", "negative")
	output.Done()
	m.Done()
	fmt.Println(r.Err())
	// Output:
	// 5.6 kV
	// supply.yaml:1:1: the key "source" is missing
	// supply.yaml:3:11: output.ripple: "25 VV" is not a voltage; write a number and a unit, such as 25 V
	// supply.yaml:4:3: unknown key "polarty"; did you mean "polarity"?
}

// Every getter says what it read, where, and how to mend it; all at once.
func TestGettersReportMistakes(t *testing.T) {
	tests := map[string]struct {
		data string
		read func(m *form.Map)
		want string
	}{
		"text is a list":         {"a: [x]", func(m *form.Map) { m.Text("a") }, "f.yaml:1:4: a: this is a list; write a single value"},
		"text is a mapping":      {"a: {x: 1}", func(m *form.Map) { m.Text("a") }, "f.yaml:1:4: a: this is a mapping; write a single value"},
		"text is missing":        {"a:\nb: 1", func(m *form.Map) { m.Text("a") }, "f.yaml:1:1: a: has no value; write one, or leave the key out"},
		"text is null":           {"a: ~", func(m *form.Map) { m.Text("a") }, "f.yaml:1:1: a: has no value; write one, or leave the key out"},
		"text hides characters":  {"a: \"x\\u202Ey\"", func(m *form.Map) { m.Text("a") }, "f.yaml:1:4: a: the text holds the invisible character U+202E, which can hide what it says; remove it"},
		"text of two lines":      {"a: |\n  x\n  y\n", func(m *form.Map) { m.Text("a") }, "f.yaml:1:4: a: the text has several lines; write it on one"},
		"choice, near":           {"a: filn", func(m *form.Map) { m.Choice("a", "film", "mica") }, `f.yaml:1:4: a: "filn" is not one of film, mica; did you mean "film"?`},
		"choice, far":            {"a: vacuum", func(m *form.Map) { m.Choice("a", "film", "mica") }, `f.yaml:1:4: a: "vacuum" is not one of film, mica`},
		"choice, letter case":    {"a: Film", func(m *form.Map) { m.Choice("a", "film", "mica") }, `f.yaml:1:4: a: "Film" is not one of film, mica; did you mean "film"?`},
		"whole number":           {"a: 1.5", func(m *form.Map) { m.Int("a", 1, 9, 0) }, `f.yaml:1:4: a: "1.5" is not a whole number; write digits alone, from 1 to 9`},
		"whole number, huge":     {"a: 99999999999999999999", func(m *form.Map) { m.Int("a", 1, 9, 0) }, `f.yaml:1:4: a: "99999999999999999999" is not a whole number; write digits alone, from 1 to 9`},
		"whole number, range":    {"a: -2", func(m *form.Map) { m.Int("a", 1, 9, 0) }, `f.yaml:1:4: a: -2 is out of range; write 1 to 9`},
		"truth":                  {"a: yes", func(m *form.Map) { m.Bool("a") }, `f.yaml:1:4: a: "yes" is neither true nor false; write one of the two`},
		"money":                  {"a: 5", func(m *form.Map) { m.Money("a") }, `f.yaml:1:4: a: "5" has no currency; write an amount and a currency code, such as 0.62 EUR`},
		"money, negative":        {"a: -5 EUR", func(m *form.Map) { m.Money("a") }, `f.yaml:1:4: a: "-5 EUR" is negative; write zero or more`},
		"mapping is a list":      {"a: [b]", func(m *form.Map) { m.Map("a") }, "f.yaml:1:4: a: this is a list; write keys with values"},
		"mapping is a value":     {"a: b", func(m *form.Map) { m.Map("a").Done() }, "f.yaml:1:4: a: this is a single value; write keys with values"},
		"mappings are a value":   {"a: b", func(m *form.Map) { m.Maps("a") }, "f.yaml:1:4: a: this is a single value; write a list, each entry with a dash in front"},
		"mappings hold a value":  {"a:\n  - {b: 1}\n  - c\n", func(m *form.Map) { m.Maps("a") }, "f.yaml:3:5: a: this is a single value; write keys with values"},
		"list is a mapping":      {"a: {b: 1}", func(m *form.Map) { m.List("a") }, "f.yaml:1:4: a: this is a mapping; write a list such as [one, two]"},
		"list holds nothing":     {"a: [1 V, ~]", func(m *form.Map) { volts(m.List("a")) }, "f.yaml:1:10: a: an entry has no value; write one, or remove the entry"},
		"negative for positive":  {"a: -1 V", func(m *form.Map) { form.Get[quantity.Volts](m, "a", form.Positive) }, `f.yaml:1:4: a: "-1 V" is negative; write a value above zero`},
		"zero for positive":      {"a: 0 V", func(m *form.Map) { form.Get[quantity.Volts](m, "a", form.Positive) }, `f.yaml:1:4: a: "0 V" is zero; write a value above zero`},
		"negative for zero":      {"a: -1 V", func(m *form.Map) { form.Get[quantity.Volts](m, "a", form.NotNegative) }, `f.yaml:1:4: a: "-1 V" is negative; write zero or more`},
		"over 100 %":             {"a: 400 %", func(m *form.Map) { form.Get[quantity.Ratio](m, "a", form.Fraction) }, `f.yaml:1:4: a: "400 %" is out of range; write 0 % to 100 %`},
		"below absolute zero":    {"a: -300 °C", func(m *form.Map) { form.Get[quantity.Celsius](m, "a", form.Any) }, `f.yaml:1:4: a: "-300 °C" is below absolute zero; write a temperature in degrees Celsius`},
		"nested path":            {"a: {b: [{c: 1}]}", func(m *form.Map) { form.Get[quantity.Volts](m.Map("a").Maps("b")[0], "c", form.Any) }, `f.yaml:1:13: a.b.c: "1" has no unit; write a number and a unit, such as 25 V`},
		"unknown, near":          {"tolerence: 1", func(m *form.Map) { m.Text("tolerance"); m.Done() }, `f.yaml:1:1: unknown key "tolerence"; did you mean "tolerance"?`},
		"unknown, far":           {"zzz: 1", func(m *form.Map) { m.Text("b"); m.Text("a"); m.Done() }, `f.yaml:1:1: unknown key "zzz"; known here: a, b`},
		"missing in a mapping":   {"a:\n  b: {c: 1}", func(m *form.Map) { m.Map("a").Map("b").Require("c", "d") }, `f.yaml:2:6: the key "a.b.d" is missing`},
		"missing, then unneeded": {"a: 1", func(m *form.Map) { m.Require("b"); m.Text("b"); m.Text("a"); m.Done() }, `f.yaml:1:1: the key "b" is missing`},
	}
	for name, tt := range tests {
		t.Run(name, func(t *testing.T) {
			var r form.Report
			tt.read(form.Parse("f.yaml", []byte(tt.data), &r))
			if got := strings.Join(linesOf(r.Err()), "\n"); got != tt.want {
				t.Errorf("%q\n got %s\nwant %s", tt.data, got, tt.want)
			}
		})
	}
}

func volts(items []form.Item) (out []quantity.Volts) {
	for _, i := range items {
		out = append(out, form.GetItem[quantity.Volts](i, form.Any))
	}
	return out
}

// Values come as written, whatever type YAML would see in them.
func TestGettersRead(t *testing.T) {
	var r form.Report
	m := form.Parse("f.yaml", []byte(`
part: 4E7
date: 2026-12-01
octal: 0123
quoted: " a: b "
folded: >
  one
  two
count: 12
on: true
price: 0.62 EUR
one: 5 V
many: [1 V, 2 V]
pairs: [[0 V, 100 %], [1 kV, 74 %]]
inner: {a: 1}
`), &r)
	got := []any{m.Text("part"), m.Text("date"), m.Text("octal"), m.Text("quoted"), m.Text("folded"), m.Text("none"),
		m.Int("count", 0, 99, 1), m.Int("none", 0, 99, 7), m.Bool("on"), m.Bool("none"), m.Money("price").String(),
		volts(m.List("one")), volts(m.List("many")), m.List("pairs")[1].Items()[1].Text(), m.Map("inner").Path(), m.Map("none").Path(),
		m.Has("one"), m.Has("none"), m.IsText("one"), m.IsText("many"), m.Map("inner").Keys()}
	want := []any{"4E7", "2026-12-01", "0123", "a: b", "one two", "", 12, 7, true, false, "0.62 EUR",
		[]quantity.Volts{5}, []quantity.Volts{1, 2}, "74 %", "inner", "", true, false, true, false, []string{"a"}}
	if diff := cmp.Diff(want, got); diff != "" || r.Err() != nil {
		t.Errorf("(-want +got)\n%s%v", diff, r.Err())
	}
}

// A nil Map, as a missing mapping gives, reads as nothing and reports nothing.
func TestNilMap(t *testing.T) {
	var m *form.Map
	m.Require("a")
	m.Problem("a", "never")
	m.Done()
	if m.Text("a") != "" || m.Has("a") || m.Maps("a") != nil || m.List("a") != nil || m.Map("a") != nil || m.Keys() != nil ||
		form.Get[quantity.Volts](m, "a", form.Positive) != 0 || m.PlaceOf("a") != (form.Place{}) || m.Int("a", 1, 2, 1) != 1 {
		t.Error("a nil mapping has values")
	}
}

// Problems come sorted by file, line, column and free of repeats; merging
// keeps them all.
func TestReport(t *testing.T) {
	var a, b form.Report
	a.Add(form.Place{File: "b.yaml", Line: 2, Column: 1}, "two")
	a.Add(form.Place{File: "b.yaml", Line: 10, Column: 1}, "ten at 100 %%")
	a.Add(form.Place{File: "a.yaml", Line: 3, Column: 9}, "nine")
	b.Add(form.Place{File: "a.yaml", Line: 3, Column: 10}, "ten")
	b.Add(form.Place{File: "b.yaml", Line: 2, Column: 1}, "two")
	b.Add(form.Place{File: "c.yaml"}, "no such file")
	a.Merge(&b)
	want := "a.yaml:3:9: nine\na.yaml:3:10: ten\nb.yaml:2:1: two\nb.yaml:10:1: ten at 100 %\nc.yaml: no such file"
	if got := a.Err().Error(); got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
	var none form.Report
	if none.Err() != nil {
		t.Error("an empty report is an error")
	}
}

func TestReportIsBounded(t *testing.T) {
	var r form.Report
	for line := range 20_000 {
		r.Add(form.Place{File: "f", Line: line + 1, Column: 1}, "wrong")
	}
	lines := linesOf(r.Err())
	if len(lines) != 10_001 || !strings.Contains(lines[10_000], "there are more than 10000 problems") {
		t.Errorf("%d lines, last %q", len(lines), lines[len(lines)-1])
	}
}

func TestNearest(t *testing.T) {
	known := []string{"capacitance", "characteristic", "esr", "leakage", "leakage_hot", "loss_at"}
	for word, want := range map[string]string{
		"capacitence": "capacitance", "Capacitance": "capacitance", "leakage-hot": "leakage_hot", "leakgae": "leakage", "ers": "esr", "loss at": "loss_at",
		"colour": "", "": "", "x": "", strings.Repeat("leakage", 100): "",
	} {
		if got := form.Nearest(word, known); got != want {
			t.Errorf("nearest to %q is %q, want %q", word, got, want)
		}
	}
	// Damerau 1964: a swap of neighbours is one slip. kitten and sitting are
	// the usual worked example of Levenshtein's distance.
	for _, tt := range []struct {
		a, b string
		want int
	}{{"kitten", "sitting", 3}, {"ca", "ac", 1}, {"", "abc", 3}, {"é", "e", 1}, {"same", "same", 0}} {
		if got := form.Slips(tt.a, tt.b); got != tt.want {
			t.Errorf("%q to %q takes %d slips, want %d", tt.a, tt.b, got, tt.want)
		}
	}
}
