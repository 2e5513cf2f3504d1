package catalog_test

import (
	"fmt"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"rungwright/catalog"
)

// base holds one sound part of each kind; a test puts one line in place of
// another and sees what is said about it.
var base = map[string]string{
	"capacitor": `parts:
  - part: C1
    maker: M
    kind: capacitor
    technology: film
    capacitance: 10 nF
    voltage: 3 kV
`,
	"diode": `parts:
  - part: D1
    maker: M
    kind: diode
    reverse_voltage: 2 kV
    average_current: 30 mA
    forward: [[1 mA, 2.9 V]]
`,
	"resistor": `parts:
  - part: R1
    maker: M
    kind: resistor
    resistance: 1 Mohm
    power: 1 W
`,
	"winding": `parts:
  - part: W1
    maker: M
    kind: winding
    frequency: 50 Hz
    peak: 12 V
`,
	"other": `parts:
  - part: X1
    maker: M
    kind: other
    category: fuse
`,
}

// with puts a line at the end of the part, in place of the one with its key.
func with(kind, line string) string {
	data := base[kind]
	key, _, _ := strings.Cut(line, ":")
	var kept []string
	for l := range strings.Lines(data) {
		if !strings.HasPrefix(strings.TrimLeft(l, " -"), key+":") || key == "part" {
			kept = append(kept, l)
		}
	}
	return strings.Join(kept, "") + "    " + line + "\n"
}

// Each mistake is told at its place with a mend, and nothing else is.
func TestMistakes(t *testing.T) {
	for kind := range base {
		if _, err := catalog.ReadBytes("f.yaml", []byte(base[kind])); err != nil {
			t.Fatalf("the base %s is not sound: %v", kind, err)
		}
	}
	tests := []struct{ kind, line, want string }{
		// What every part has.
		{"other", "tolerence: 10 %", `f.yaml:6:5: unknown key "tolerence"; known here: category, description, kind, maker, mounting, offers, part, size, status, temperature`},
		{"other", "categry: fuse", `f.yaml:6:5: unknown key "categry"; did you mean "category"?`},
		{"other", "kind: fuze", `f.yaml:5:11: parts.kind: "fuze" is not one of capacitor, diode, resistor, winding, other`},
		{"other", "kind: Resistor", `f.yaml:5:11: parts.kind: "Resistor" is not one of capacitor, diode, resistor, winding, other; did you mean "resistor"?`},
		{"other", "maker: \"M\\u202e\"", `f.yaml:5:12: parts.maker: the text holds the invisible character U+202E, which can hide what it says; remove it`},
		{"other", "maker: \"M\\e[31m\"", `f.yaml:5:12: parts.maker: the text holds the invisible character U+001B, which can hide what it says; remove it`},
		{"other", "maker: " + strings.Repeat("M", 201), `f.yaml:5:12: parts.maker: the text has 201 characters; shorten it to 200`},
		{"other", "description: " + strings.Repeat("M", 2001), `f.yaml:6:18: parts.description: the text has 2001 characters; shorten it to 2000`},
		{"other", "mounting: surface", `f.yaml:6:15: parts.mounting: "surface" is not one of through-hole, surface-mount, chassis`},
		{"other", "status: obsolet", `f.yaml:6:13: parts.status: "obsolet" is not one of active, not for new designs, last buy, obsolete; did you mean "obsolete"?`},
		{"other", "size: {length: 10 m, width: 0 mm, depth: 3 mm}", `f.yaml:6:20: parts.size.length: "10 m" is beyond any real part (over 2 m); check the prefix
f.yaml:6:33: parts.size.width: "0 mm" is zero; write a value above zero
f.yaml:6:39: unknown key "depth"; known here: height, length, width`},
		{"other", "temperature: {least: 85 °C, most: -40 °C}", `f.yaml:6:26: parts.temperature.least: 85 °C is not below -40 °C; swap the two, or mend the one that is wrong`},
		{"other", "temperature: {least: 85}", `f.yaml:6:18: the key "parts.temperature.most" is missing
f.yaml:6:26: parts.temperature.least: "85" has no unit; write a number and a unit, such as 85 °C`},
		{"other", "category: lamp", `f.yaml:5:15: parts.category: "lamp" is not one of board, fuse, connector, enclosure, potting, hardware`},
		{"other", "offers: [{order_code: 5}]", `f.yaml:6:14: the key "parts.offers.prices" is missing
f.yaml:6:14: the key "parts.offers.supplier" is missing`},

		// Offers.
		{"other", "offers: [{supplier: F, prices: [[1, 0.62 EUR], [100, 0.41 EUR], [10, 0.30 EUR]]}]",
			`f.yaml:6:70: parts.offers.prices: the price break at 10 does not come after the one at 100; put the breaks in rising order, each once`},
		{"other", "offers: [{supplier: F, prices: [[1, 0.62 EUR], [1, 0.41 EUR]]}]",
			`f.yaml:6:53: parts.offers.prices: the price break at 1 does not come after the one at 1; put the breaks in rising order, each once`},
		{"other", "offers: [{supplier: F, prices: [[1, 0.62 EUR], [100, 0.41 USD]]}]",
			`f.yaml:6:58: parts.offers.prices: the price is in USD, the one before in EUR; give an offer's prices in one currency`},
		{"other", "offers: [{supplier: F, prices: [[1, 0.41 EUR], [100, 0.62 EUR]]}]",
			`f.yaml:6:58: parts.offers.prices: the unit price rises from 0.41 EUR to 0.62 EUR as the quantity rises; check both`},
		{"other", "offers: [{supplier: F, prices: [[1, 0 EUR]]}]", `f.yaml:6:41: parts.offers.prices: the price is zero; write what one piece costs, or leave the offer out`},
		{"other", "offers: [{supplier: F, prices: [[1, -1 EUR]]}]", `f.yaml:6:41: parts.offers.prices: "-1 EUR" is negative; write zero or more`},
		{"other", "offers: [{supplier: F, prices: [[0, 1 EUR]]}]", `f.yaml:6:38: parts.offers.prices: 0 is out of range; write 1 to 1000000000`},
		{"other", "offers: [{supplier: F, prices: [[1, 1]]}]", `f.yaml:6:41: parts.offers.prices: "1" has no currency; write an amount and a currency code, such as 0.62 EUR`},
		{"other", "offers: [{supplier: F, prices: [1 EUR]}]", `f.yaml:6:37: parts.offers.prices: a price must be a pair of a quantity and a unit price, such as [1, 0.62 EUR]`},
		{"other", "offers: [{supplier: F, prices: []}]", `f.yaml:6:36: parts.offers.prices: there is no price; write one such as [[1, 0.62 EUR]]`},
		{"other", "offers: [{supplier: F, prices: [[10, 1 EUR]]}]", `f.yaml:6:36: parts.offers.prices: no price is given below 10, yet the least order is 1; write least: 10, or add the price`},
		{"other", "offers: [{supplier: F, prices: [[1, 1 EUR]], stock: -3, lead: 14, least: 0, multiple: 1.5}]",
			`f.yaml:6:57: parts.offers.stock: -3 is out of range; write 0 to 1000000000
f.yaml:6:67: parts.offers.lead: "14" is not a lead time; write days or weeks, such as 14 d or 3 wk
f.yaml:6:78: parts.offers.least: 0 is out of range; write 1 to 1000000000
f.yaml:6:91: parts.offers.multiple: "1.5" is not a whole number; write digits alone, from 1 to 1000000000`},

		// Capacitors.
		{"capacitor", "tolerance: 400 %", `f.yaml:8:16: parts.tolerance: "400 %" cannot be: it is 100 % or more; check the number`},
		{"capacitor", "tolerance: -100/+20 %", `f.yaml:8:16: parts.tolerance: "-100/+20 %" cannot be: it is 100 % or more; check the number`},
		{"capacitor", "tolerance: wide", `f.yaml:8:16: parts.tolerance: "wide" is not a tolerance; write it such as 10 %, -20/+80 % or a letter of IEC 60062 such as K`},
		{"capacitor", "technology: tantalium", `f.yaml:7:17: parts.technology: "tantalium" is not one of ceramic class 1, ceramic class 2, film, aluminium electrolytic, mica, tantalum; did you mean "tantalum"?`},
		{"capacitor", "capacitance: 10", `f.yaml:7:18: parts.capacitance: "10" has no unit; write a number and a unit, such as 4.7 nF`},
		{"capacitor", "capacitance: 100 F", `f.yaml:7:18: parts.capacitance: "100 F" is beyond any real part (over 10 F); check the prefix`},
		{"capacitor", "capacitance: -10 nF", `f.yaml:7:18: parts.capacitance: "-10 nF" is negative; write a value above zero`},
		{"capacitor", "voltage: 3 MV", `f.yaml:7:14: parts.voltage: "3 MV" is beyond any real part (over 1 MV); check the prefix`},
		{"capacitor", "voltage: 3 kohm", `f.yaml:7:14: parts.voltage: "3 kohm" is in ohms; write volts, such as 25 V`},
		{"capacitor", "bias: [[0 V, 100 %], [1 kV, 74 %], [2 kV, 80 %]]", `f.yaml:8:47: parts.bias: the share rises from 74 % to 80 % as the voltage rises; bias never adds capacitance`},
		{"capacitor", "bias: [[0 V, 100 %], [2 kV, 74 %], [1 kV, 70 %]]", `f.yaml:8:41: parts.bias: 1 kV does not come after 2 kV; put the points in rising order, each once`},
		{"capacitor", "bias: [[100 V, 98 %], [1 kV, 74 %]]", `f.yaml:8:13: parts.bias: the curve starts at 100 V and 98 %; start it at [0 V, 100 %]`},
		{"capacitor", "bias: [[0 V, 100 %], [1 kV, 120 %]]", `f.yaml:8:33: parts.bias: 120 % is more than 100 %; write the share of the capacitance without bias`},
		{"capacitor", "bias: [[0 V, 100 %], [1 kV]]", `f.yaml:8:26: parts.bias: a point must be a pair, such as [1.5 kV, 74 %]`},
		{"capacitor", "bias: [[0 V, 100 %], [1 kV, 74]]", `f.yaml:8:33: parts.bias: "74" has no unit; write a number and a unit, such as 10 %`},
		{"capacitor", "ripple: {current: 1 A, multipliers: [[1 kHz, 130 %], [120 Hz, 100 %]]}", `f.yaml:8:13: the key "parts.ripple.frequency" is missing
f.yaml:8:59: parts.ripple.multipliers: 120 Hz does not come after 1 kHz; put the points in rising order, each once`},
		{"capacitor", "life: {time: 5000, temperature: 105 °C}", `f.yaml:8:18: parts.life.time: "5000" has no unit; write a number and a unit, such as 60 ns`},
		{"capacitor", "leakage: {at: 3 kV, value: 1 uA}", `f.yaml:8:14: parts.leakage: this is a mapping; write a single value`},

		// Diodes.
		{"diode", "forward: [[1 mA, 2.9 V], [10 mA, 2.5 V]]", `f.yaml:7:38: parts.forward: the forward voltage falls from 2.9 V to 2.5 V as the current rises; check both points`},
		{"diode", "forward: [[10 mA, 2.9 V], [1 mA, 3.5 V]]", `f.yaml:7:32: parts.forward: 1 mA does not come after 10 mA; put the points in rising order, each once`},
		{"diode", "forward: []", `f.yaml:7:14: parts.forward: there is no point; write at least one, such as [[10 mA, 3.8 V]]`},
		{"diode", "capacitance: 2.4 pF", `f.yaml:8:18: parts.capacitance: this is a single value; write keys with values`},
		{"diode", "leakage: {value: 1 uA}", `f.yaml:8:14: the key "parts.leakage.at" is missing`},
		{"diode", "type: fastish", `f.yaml:8:11: parts.type: "fastish" is not one of standard, fast, ultrafast, schottky, high-voltage`},
		{"diode", "capacitance_at: 3", `f.yaml:8:5: unknown key "capacitance_at"; did you mean "capacitance"?`},

		// Resistors and windings.
		{"resistor", "resistance: 0 ohm", `f.yaml:6:17: parts.resistance: "0 ohm" is zero; write a value above zero`},
		{"resistor", "power_at: 500", `f.yaml:7:15: parts.power_at: "500" has no unit; write a number and a unit, such as 85 °C`},
		{"winding", "rms: 9 V", `f.yaml:7:10: parts.rms: the peak is given as well; keep one of the two`},
		{"winding", "frequency: {least: 60 Hz, most: 50 Hz}", `f.yaml:6:24: parts.frequency.least: 60 Hz is above 50 Hz; swap the two, or mend the one that is wrong`},
		{"winding", "waveform: sawtooth", `f.yaml:7:15: parts.waveform: "sawtooth" is not one of sine, square, triangle`},
		{"winding", "centre_tap: yes", `f.yaml:7:17: parts.centre_tap: "yes" is neither true nor false; write one of the two`},
	}
	for _, tt := range tests {
		t.Run(tt.kind+"/"+short(tt.line), func(t *testing.T) {
			_, err := catalog.ReadBytes("f.yaml", []byte(with(tt.kind, tt.line)))
			if diff := cmp.Diff(tt.want, fmt.Sprint(err)); diff != "" {
				t.Errorf("(-want +got)\n%s", diff)
			}
		})
	}
}

func short(s string) string { return s[:min(len(s), 60)] }

// What is missing is told for each kind.
func TestMissingRatings(t *testing.T) {
	_, err := catalog.ReadBytes("f.yaml", []byte(`parts:
  - {kind: capacitor}
  - {part: D1, maker: M, kind: diode}
  - {part: R1, maker: M, kind: resistor}
  - {part: W1, maker: M, kind: winding}
  - {part: X1, maker: M, kind: other}
  - {part: Y1, maker: M, colour: red}
`))
	want := `f.yaml:2:5: the key "parts.capacitance" is missing
f.yaml:2:5: the key "parts.maker" is missing
f.yaml:2:5: the key "parts.part" is missing
f.yaml:2:5: the key "parts.technology" is missing
f.yaml:2:5: the key "parts.voltage" is missing
f.yaml:3:5: the key "parts.average_current" is missing
f.yaml:3:5: the key "parts.forward" is missing
f.yaml:3:5: the key "parts.reverse_voltage" is missing
f.yaml:4:5: the key "parts.power" is missing
f.yaml:4:5: the key "parts.resistance" is missing
f.yaml:5:5: parts: the voltage is missing; write peak or rms
f.yaml:5:5: the key "parts.frequency" is missing
f.yaml:6:5: the key "parts.category" is missing
f.yaml:7:5: the key "parts.kind" is missing`
	if diff := cmp.Diff(want, fmt.Sprint(err)); diff != "" {
		t.Error(diff)
	}
}

// What only the whole shows: the same part twice, suppliers that are not
// given, and currencies that clash.
func TestMistakesAcrossParts(t *testing.T) {
	_, err := catalog.ReadBytes("f.yaml", []byte(`suppliers:
  - {name: Fellmarket, currency: EUR, delivery: 5 USD, free_above: 50 EUR}
  - {name: Fellmarket, currency: eur}
  - {name: Oakpellet, currency: USD, small_order: 5 USD}
parts:
  - {part: A-1, maker: M, kind: other, category: fuse}
  - {part: A-1, maker: M, kind: other, category: fuse}
  - {part: "a -1", maker: N, kind: other, category: fuse}
  - part: B-1
    maker: M
    kind: other
    category: fuse
    offers:
      - {supplier: Felmarket, prices: [[1, 1 EUR]]}
      - {supplier: Elsewhere, prices: [[1, 1 EUR]]}
      - {supplier: Oakpellet, prices: [[1, 1 EUR]]}
`))
	want := `f.yaml:2:49: suppliers.delivery: the amount is in USD, but the supplier's currency is EUR; use one
f.yaml:3:12: the supplier "Fellmarket" is given already at f.yaml:2:12; remove one of the two
f.yaml:3:34: suppliers.currency: write the currency code in capitals, EUR
f.yaml:4:51: suppliers.small_order: small_order and small_order_fee belong together; give both or neither
f.yaml:7:12: the part "A-1" of M is given already at f.yaml:6:12; remove one of the two
f.yaml:8:12: the part number "a -1" is taken already by "A-1" of M at f.yaml:6:12; numbers must differ in more than spaces and letter case
f.yaml:14:9: offers: unknown supplier "Felmarket"; did you mean "Fellmarket"?
f.yaml:15:9: offers: unknown supplier "Elsewhere"; known here: Fellmarket, Oakpellet
f.yaml:16:9: offers: the prices are in EUR, but Oakpellet sells in USD; mend one of the two`
	if diff := cmp.Diff(want, fmt.Sprint(err)); diff != "" {
		t.Error(diff)
	}
}
