package form_test

import (
	"fmt"
	"strings"
	"testing"
	"unicode"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"

	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

func ExampleDoc() {
	price, _ := quantity.ParseMoney("0.62 EUR")
	d := form.NewMap().
		Comment("A design.\nMade by hand.").
		Set("supply", "Ioniser: emitter rail #2").
		Set("part", "4E7").
		Set("load", form.NewMap().Flow().Set("least", quantity.Amps(0)).Set("most", quantity.Amps(180e-6))).
		Set("places", form.List{
			form.NewMap().Set("ref", "C1").Set("prices", form.List{form.List{1, price}}),
			form.NewMap().Set("ref", "C2").Set("share", quantity.Ratio(0.74)),
		}).
		Set("ambient", form.NewMap().Set("least", quantity.Celsius(-20)).Set("checked", true))
	fmt.Print(string(d.Bytes()))
	// Output:
	// # A design.
	// # Made by hand.
	// supply: "Ioniser: emitter rail #2"
	// part: "4E7"
	// load: {least: 0 A, most: 180 µA}
	// places:
	//   - ref: C1
	//     prices: [[1, 0.62 EUR]]
	//   - ref: C2
	//     share: 74 %
	// ambient:
	//   least: -20 °C
	//   checked: true
}

// What is written is read back, whatever the text: as a value on its own
// line, in a list and in braces, and as a key.
func checkRoundTrip(t interface{ Fatalf(string, ...any) }, text string) {
	text = strings.TrimSpace(strings.Map(func(r rune) rune {
		if unicode.IsControl(r) || unicode.Is(unicode.Cf, r) || r == '\u2028' || r == '\u2029' || r == unicode.ReplacementChar {
			return -1 // refused by Text, so that no reader holds them
		}
		return r
	}, strings.ToValidUTF8(text, "")))
	if text == "" || len(text) > 900 {
		return
	}
	d := form.NewMap().
		Comment(text).
		Set("line", text).
		Set("list", form.List{text, "x"}).
		Set("braces", form.NewMap().Flow().Set("a", text).Set("b", form.List{text})).
		Set("deep", form.List{form.NewMap().Comment(text).Set("a", text).Set("b", 1)}).
		Set("k "+text, "v")
	var r form.Report
	m := form.Parse("f.yaml", d.Bytes(), &r)
	got := []string{m.Text("line"), m.Map("braces").Text("a"), m.Map("braces").List("b")[0].Text(), m.List("list")[0].Text(),
		m.Maps("deep")[0].Text("a"), m.Text("k " + text)}
	want := []string{text, text, text, text, text, "v"}
	if diff := cmp.Diff(want, got); diff != "" || r.Err() != nil {
		t.Fatalf("%q written as\n%s\nreads back differently (-want +got): %s\n%v", text, d.Bytes(), diff, r.Err())
	}
}

func TestHostileTextIsWrittenSafely(t *testing.T) {
	for _, text := range []string{
		"null", "~", "true", "No", "1", "0x1F", "1e3", "12:30", "2026-12-01", ".5", "-", "- a", "?", "? a", ": a", "a: b", "a:", "a #b", "#a",
		"[a", "{a", "a]", "a, b", "&a", "*a", "!a", "|", ">", "%a", "@a", "`a", "'a'", `"a"`, `\n`, "a\\", "---", "...", "=", "<<", "-5 V",
		"a b", "é", "Ω", "日本", "−20/+80 %", "C:\\parts\\x.yaml", strings.Repeat("long ", 150), "a\u00a0b", "\ufeffa", "😀",
	} {
		checkRoundTrip(t, text)
	}
}

func FuzzWrite(f *testing.F) {
	f.Add("a: b # c")
	f.Fuzz(func(t *testing.T, text string) { checkRoundTrip(t, text) })
}

func TestAnyTextIsReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) { checkRoundTrip(t, rapid.String().Draw(t, "text")) })
}

// Quantities are written at the precision that String has and read as such.
func TestQuantitiesAreReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := quantity.Volts(rapid.Float64Range(-1e9, 1e9).Draw(t, "v"))
		var r form.Report
		m := form.Parse("f.yaml", form.NewMap().Set("v", v).Set("l", form.List{v}).Bytes(), &r)
		a, b := form.Get[quantity.Volts](m, "v", form.Any), form.GetItem[quantity.Volts](m.List("l")[0], form.Any)
		if r.Err() != nil || a != b || a.String() != v.String() {
			t.Fatalf("%v came back as %v and %v: %v", v, a, b, r.Err())
		}
	})
}

func TestWriterRefusesMisuse(t *testing.T) {
	for name, misuse := range map[string]func(){
		"a key twice":     func() { form.NewMap().Set("a", 1).Set("a", 2) },
		"an unknown type": func() { form.NewMap().Set("a", 1.5).Bytes() },
	} {
		t.Run(name, func(t *testing.T) {
			defer func() {
				if recover() == nil {
					t.Error("no panic")
				}
			}()
			misuse()
		})
	}
}

func TestNothingIsLeftOut(t *testing.T) {
	var none *form.Doc
	got := string(form.NewMap().Comment("gone").Set("a", none).Set("b", form.List{}).Set("c", nil).Set("d", 1).Bytes())
	if got != "d: 1\n" {
		t.Errorf("got %q", got)
	}
	if got := string(form.NewMap().Set("a", none).Bytes()); got != "{}\n" {
		t.Errorf("an empty mapping is written %q", got)
	}
}
