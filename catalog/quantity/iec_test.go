package quantity

import (
	"fmt"
	"math"
	"slices"
	"testing"
)

// The marks of IEC 60062, tables of resistance and capacitance marks, from
// memory: each value with its code, the way both are printed there.
var marks = []struct {
	d     Dimension
	code  string
	value float64
}{
	{Resistance, "R10", 0.1}, {Resistance, "R15", 0.15}, {Resistance, "R332", 0.332}, {Resistance, "R59", 0.59},
	{Resistance, "1R0", 1}, {Resistance, "1R5", 1.5}, {Resistance, "3R32", 3.32}, {Resistance, "5R9", 5.9},
	{Resistance, "10R", 10}, {Resistance, "15R", 15}, {Resistance, "33R2", 33.2}, {Resistance, "59R", 59},
	{Resistance, "100R", 100}, {Resistance, "150R", 150}, {Resistance, "332R", 332}, {Resistance, "590R", 590},
	{Resistance, "1K0", 1e3}, {Resistance, "1K5", 1.5e3}, {Resistance, "3K32", 3.32e3}, {Resistance, "5K9", 5.9e3},
	{Resistance, "10K", 10e3}, {Resistance, "33K2", 33.2e3}, {Resistance, "332K", 332e3},
	{Resistance, "1M0", 1e6}, {Resistance, "3M32", 3.32e6}, {Resistance, "10M", 10e6}, {Resistance, "332M", 332e6},
	{Resistance, "1G0", 1e9}, {Resistance, "5G9", 5.9e9}, {Resistance, "1T0", 1e12}, {Resistance, "10T", 10e12},
	{Capacitance, "p10", 0.1e-12}, {Capacitance, "p332", 0.332e-12}, {Capacitance, "1p0", 1e-12}, {Capacitance, "3p32", 3.32e-12},
	{Capacitance, "10p", 10e-12}, {Capacitance, "33p2", 33.2e-12}, {Capacitance, "100p", 100e-12}, {Capacitance, "332p", 332e-12},
	{Capacitance, "1n0", 1e-9}, {Capacitance, "3n32", 3.32e-9}, {Capacitance, "10n", 10e-9}, {Capacitance, "590n", 590e-9},
	{Capacitance, "1µ0", 1e-6}, {Capacitance, "3µ32", 3.32e-6}, {Capacitance, "100µ", 100e-6},
	{Capacitance, "1m0", 1e-3}, {Capacitance, "15m", 15e-3},
}

func TestMarksOfIEC60062(t *testing.T) {
	for _, m := range marks {
		if got, err := Parse(m.code, m.d); err != nil || got != m.value {
			t.Errorf("%s is read as %v (%v), want %v", m.code, got, err, m.value)
		}
		if got := RKM(m.value, m.d, 4); got != m.code {
			t.Errorf("%v is marked %q, want %q", m.value, got, m.code)
		}
	}
}

// Every letter beside the point, small and large, and what has no mark.
func TestMarksBeyondTheTable(t *testing.T) {
	for text, want := range map[string]float64{"4k7": 4700, "2k2": 2200, "4R7": 4.7, "1R": 1, "R047": 0.047, "4k7Ω": 4700, "4k7 ohm": 4700, "0R5": 0.5} {
		if got, err := Parse(text, Resistance); err != nil || got != want {
			t.Errorf("%s is read as %v (%v), want %v", text, got, err, want)
		}
	}
	for text, want := range map[string]float64{"4n7": 4.7e-9, "4u7": 4.7e-6, "4μ7": 4.7e-6, "4n7F": 4.7e-9, "1F5": 1.5} {
		if got, err := Parse(text, Capacitance); err != nil || got != want {
			t.Errorf("%s is read as %v (%v), want %v", text, got, err, want)
		}
	}
	if got := RKM(0.047, Resistance, 3); got != "R047" {
		t.Errorf("0.047 Ω is marked %q", got)
	}
	for _, v := range []float64{0, -1, math.NaN(), math.Inf(1), 1e30, 1e-9} {
		if got := RKM(v, Resistance, 3); got != "" {
			t.Errorf("%v Ω is marked %q, want nothing", v, got)
		}
	}
	if got := RKM(5, Voltage, 3); got != "" {
		t.Errorf("a voltage is marked %q", got)
	}
}

// IEC 60062, table of tolerance letters.
func TestToleranceLetters(t *testing.T) {
	for letter, percent := range map[string]float64{"B": 0.1, "C": 0.25, "D": 0.5, "F": 1, "G": 2, "J": 5, "K": 10, "M": 20} {
		got, ok := ToleranceLetter(letter)
		if want := Ratio(percent / 100); !ok || got != (Tolerance{want, want}) {
			t.Errorf("%s is %v, want ±%v %%", letter, got, percent)
		}
	}
	if got, _ := ToleranceLetter("Z"); got != (Tolerance{0.2, 0.8}) {
		t.Errorf("Z is %v, want -20/+80 %%", got)
	}
}

// IEC 60063, tables 1 and 2.
func TestPreferredNumbersOfIEC60063(t *testing.T) {
	for s, want := range map[Series][]int{
		E3:  {10, 22, 47},
		E6:  {10, 15, 22, 33, 47, 68},
		E12: {10, 12, 15, 18, 22, 27, 33, 39, 47, 56, 68, 82},
		E24: {10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91},
	} {
		var got []int
		for _, v := range s.Decade() {
			got = append(got, v/10)
		}
		if !slices.Equal(got, want) {
			t.Errorf("E%d is %v, want %v", s, got, want)
		}
	}
	// E48, from memory; E96 and E192 by their ends and their nesting.
	want := []int{100, 105, 110, 115, 121, 127, 133, 140, 147, 154, 162, 169, 178, 187, 196, 205, 215, 226, 237, 249, 261, 274, 287, 301,
		316, 332, 348, 365, 383, 402, 422, 442, 464, 487, 511, 536, 562, 590, 619, 649, 681, 715, 750, 787, 825, 866, 909, 953}
	if got := E48.Decade(); !slices.Equal(got, want) {
		t.Errorf("E48 is %v, want %v", got, want)
	}
	for _, pair := range [][2]Series{{E48, E96}, {E96, E192}} {
		for i, v := range pair[0].Decade() {
			if got := pair[1].Decade()[2*i]; got != v {
				t.Errorf("E%d lacks %d of E%d", pair[1], v, pair[0])
			}
		}
	}
	if d := E192.Decade(); d[185] != 920 || d[191] != 988 {
		t.Errorf("E192 ends %v, want 920 at 185 and 988 last", d[180:])
	}
}

func TestNearestPreferred(t *testing.T) {
	for _, tt := range []struct {
		s                     Series
		v                     float64
		below, nearest, above float64
	}{
		{E12, 4.7e3, 4.7e3, 4.7e3, 4.7e3},
		{E12, 5e-9, 4.7e-9, 4.7e-9, 5.6e-9},
		{E12, 9.5, 8.2, 10, 10},
		{E24, 95e-12, 91e-12, 91e-12, 100e-12},
		{E96, 4720, 4640, 4750, 4750},
		{E3, 1e6, 1e6, 1e6, 1e6},
		{E6, 0.99, 0.68, 1, 1},
	} {
		if b, n, a := tt.s.Below(tt.v), tt.s.Nearest(tt.v), tt.s.Above(tt.v); b != tt.below || n != tt.nearest || a != tt.above {
			t.Errorf("E%d around %v: got %v %v %v, want %v %v %v", tt.s, tt.v, b, n, a, tt.below, tt.nearest, tt.above)
		}
	}
	for _, v := range []float64{0, -3, math.Inf(1)} {
		if got := E12.Nearest(v); got != v {
			t.Errorf("nearest to %v is %v", v, got)
		}
	}
}

func ExampleSeries_Nearest() {
	fmt.Println(Ohms(E24.Nearest(4900)), Farads(E6.Above(8e-9)))
	// Output: 5.1 kΩ 10 nF
}
