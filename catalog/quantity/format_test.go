package quantity

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func TestFormat(t *testing.T) {
	for _, tt := range []struct {
		v      float64
		d      Dimension
		digits int
		want   string
	}{
		{4.7e-9, Capacitance, 4, "4.7 nF"}, {999.96e-9, Capacitance, 4, "1 µF"}, {999.94e-9, Capacitance, 4, "999.9 nF"}, {1e-6, Capacitance, 4, "1 µF"},
		{0.0123, Capacitance, 4, "12.3 mF"}, {5e-17, Capacitance, 4, "0.05 fF"},
		{5600, Voltage, 4, "5.6 kV"}, {24, Voltage, 4, "24 V"}, {-6000, Voltage, 4, "-6 kV"}, {0, Voltage, 4, "0 V"}, {math.Copysign(0, -1), Voltage, 4, "0 V"},
		{470, Voltage, 1, "500 V"}, {1234.5678, Voltage, 6, "1.23457 kV"}, {1234.5678, Voltage, 0, "1 kV"}, {1e20, Voltage, 3, "1e11 GV"}, {1e-25, Voltage, 3, "1e-13 pV"},
		{180e-6, Current, 4, "180 µA"}, {45, Resistance, 4, "45 Ω"}, {0.12, Resistance, 4, "120 mΩ"}, {1e6, Resistance, 4, "1 MΩ"},
		{60e-9, Time, 4, "60 ns"}, {90, Time, 4, "90 s"}, {600, Time, 4, "10 min"}, {18e6, Time, 4, "5000 h"}, {119.999, Time, 4, "2 min"},
		{45, Temperature, 4, "45 °C"}, {-55, Temperature, 4, "-55 °C"}, {90, ThermalResistance, 4, "90 K/W"}, {0.5, TemperatureRise, 4, "0.5 K"},
		{18e-3, Length, 4, "18 mm"}, {0.5e-3, Length, 4, "0.5 mm"}, {1500, Length, 4, "1500 m"}, {250e-9, Volume, 4, "250 mm³"}, {12.5e-6, Volume, 4, "12.5 cm³"},
		{400e-6, Area, 4, "400 mm²"}, {0.02, Area, 4, "200 cm²"}, {0.1, Proportion, 4, "10 %"}, {200e-6, Proportion, 4, "0.02 %"},
		{92e6, SlewRate, 4, "92 V/µs"}, {5e9, SlewRate, 4, "5 kV/µs"}, {2e3, SlewRate, 4, "2 kV/s"}, {1.9, None, 4, "1.9"},
		{math.NaN(), Voltage, 4, "NaN V"}, {math.Inf(1), Voltage, 4, "∞ V"}, {math.Inf(-1), Voltage, 4, "-∞ V"},
	} {
		if got := Format(tt.v, tt.d, tt.digits); got != tt.want {
			t.Errorf("%v %s at %d digits prints %q, want %q", tt.v, tt.d.Name(), tt.digits, got, tt.want)
		}
	}
}

// checkFormat requires that a printed value is read back as the value rounded
// to those digits (one rounding more where the unit is no power of ten), that
// printing this again changes nothing, and that no more than three digits
// stand before the point where a prefix could have taken them.
func checkFormat(t interface{ Fatalf(string, ...any) }, v float64, d Dimension, digits int) {
	text := Format(v, d, digits)
	back, err := Parse(text, d)
	if err != nil {
		t.Fatalf("%v prints %q, which is refused: %v", v, text, err)
	}
	rounded, err := strconv.ParseFloat(strconv.FormatFloat(v, 'e', digits-1, 64), 64)
	if err != nil {
		t.Fatalf("cannot round %v: %v", v, err)
	}
	hours := strings.HasSuffix(text, " h") || strings.HasSuffix(text, " min")
	if !hours && back != rounded {
		t.Fatalf("%v at %d digits prints %q, which is %v, not %v", v, digits, text, back, rounded)
	}
	if hours && math.Abs(back-v) > math.Abs(v)*max(1.01*math.Pow(10, float64(1-digits)), 4e-16) {
		t.Fatalf("%v at %d digits prints %q, which is %v", v, digits, text, back)
	}
	again, err := Parse(Format(back, d, digits), d)
	if err != nil || !hours && again != back || math.Abs(again-back) > 1e-12*math.Abs(back) {
		t.Fatalf("%q is read as %v, which prints %q (%v)", text, back, Format(back, d, digits), err)
	}
	number, unit, _ := strings.Cut(text, " ")
	whole, _, _ := strings.Cut(strings.TrimPrefix(number, "-"), ".")
	if len(whole) > 3 && strings.HasPrefix(unit, "n") && !strings.Contains(whole, "e") {
		t.Fatalf("%v prints %q, which wants a larger prefix", v, text)
	}
}

var dimensions = func() (all []Dimension) {
	for d := None; d <= SlewRate; d++ {
		all = append(all, d)
	}
	return all
}()

func TestFormatIsReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := rapid.SampledFrom(dimensions).Draw(t, "dimension")
		v := rapid.Float64Range(-10, 10).Draw(t, "mantissa") * math.Pow(10, float64(rapid.IntRange(-20, 15).Draw(t, "ten")))
		if v == 0 {
			return
		}
		checkFormat(t, v, d, rapid.IntRange(1, 17).Draw(t, "digits"))
	})
}

// Just below a power of ten rounding takes the next prefix.
func TestFormatAtTheEdges(t *testing.T) {
	for _, d := range dimensions {
		for ten := -18; ten <= 12; ten++ {
			edge := math.Pow(10, float64(ten))
			for _, v := range []float64{edge, math.Nextafter(edge, 0), math.Nextafter(edge, math.Inf(1)), edge * 0.99996, edge * 9.9996} {
				for _, digits := range []int{1, 3, 4, 6, 17} {
					checkFormat(t, v, d, digits)
				}
			}
		}
	}
}

// The table of prefixes is used in full: 1 to 999 stand before every prefix.
func TestNoPrefixIsSkipped(t *testing.T) {
	for ten := -15; ten <= 0; ten++ {
		text := Format(4.7*math.Pow(10, float64(ten)), Capacitance, 3)
		number, _, _ := strings.Cut(text, " ")
		if v, err := strconv.ParseFloat(number, 64); err != nil || v < 1 || v >= 1000 {
			t.Errorf("4.7e%d F prints %q", ten, text)
		}
	}
}

// Reading any text gives a finite number or an error that quotes it; what was
// read prints and reads as itself.
func FuzzParse(f *testing.F) {
	for _, seed := range []string{"4.7 nF", "4n7", "R47", "10 %", "45 °C", "92 V/us", "1,000 V", "0x1p4 V", "NaN", "5000 h", "1e-400 V", "4.7 MF", "3V3"} {
		for _, d := range []Dimension{Capacitance, Resistance, Voltage, Time} {
			f.Add(seed, int(d))
		}
	}
	f.Fuzz(func(t *testing.T, text string, n int) {
		d := dimensions[uint(n)%uint(len(dimensions))]
		v, err := Parse(text, d)
		if err != nil {
			if strings.ContainsAny(err.Error(), "\n\x1b") || v != 0 {
				t.Fatalf("%q: value %v with a raw error %q", text, v, err)
			}
			return
		}
		if math.IsNaN(v) || math.IsInf(v, 0) {
			t.Fatalf("%q is read as %v", text, v)
		}
		if v == 0 || math.Abs(v) > 1e280 || math.Abs(v) < 1e-280 {
			return
		}
		checkFormat(t, v, d, 17)
		checkFormat(t, v, d, 4)
		if mark := RKM(v, d, 17); mark != "" {
			if back, err := Parse(mark, d); err != nil || back != v {
				t.Fatalf("%v is marked %q, which is read as %v (%v)", v, mark, back, err)
			}
		}
		_, _ = ParseTolerance(text)
	})
}

func ExampleFormat() {
	fmt.Println(Farads(4.7e-9), Ohms(2200), Volts(5600), Ratio(0.1), Celsius(45), Meters(0.018))
	fmt.Println(Format(5612.3456, Voltage, 6))
	// Output:
	// 4.7 nF 2.2 kΩ 5.6 kV 10 % 45 °C 18 mm
	// 5.61235 kV
}

func ExampleRead() {
	c, _ := Read[Farads]("4n7")
	fmt.Println(c)
	_, err := Read[Volts]("10 kΩ")
	fmt.Println(err)
	// Output:
	// 4.7 nF
	// "10 kΩ" is in ohms; write volts, such as 25 V
}

func BenchmarkParse(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		if _, err := Parse("4.7 nF", Capacitance); err != nil {
			b.Fatal(err)
		}
	}
}
