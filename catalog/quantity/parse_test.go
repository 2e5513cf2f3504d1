package quantity

import (
	"strings"
	"testing"
)

// Every way to write a value gives the float64 that Go has for the number.
func TestParse(t *testing.T) {
	for _, tt := range []struct {
		text string
		d    Dimension
		want float64
	}{
		{"4.7 nF", Capacitance, 4.7e-9}, {"4.7nF", Capacitance, 4.7e-9}, {"4700 pF", Capacitance, 4.7e-9}, {"4.7e-9 F", Capacitance, 4.7e-9},
		{".0047 uF", Capacitance, 4.7e-9}, {"10 \u00b5F", Capacitance, 10e-6}, {"10 \u03bcF", Capacitance, 10e-6}, {"10 uF", Capacitance, 10e-6},
		{"45 ohm", Resistance, 45}, {"45 ohms", Resistance, 45}, {"45 \u03a9", Resistance, 45}, {"45 \u2126", Resistance, 45},
		{"3 mΩ", Resistance, 3e-3}, {"3 MΩ", Resistance, 3e6}, {"3 mohm", Resistance, 3e-3}, {"3 Mohm", Resistance, 3e6}, {"4.7 KΩ", Resistance, 4.7e3},
		{"5.6 kV", Voltage, 5.6e3}, {" 25  V ", Voltage, 25}, {"25\u00a0V", Voltage, 25}, {"-12 V", Voltage, -12}, {"\u221212 V", Voltage, -12}, {"+12 V", Voltage, 12},
		{"3 mV", Voltage, 3e-3}, {"3 MV", Voltage, 3e6}, {"1e3 V", Voltage, 1e3}, {"0", Voltage, 0}, {"0.0", Resistance, 0},
		{"180 uA", Current, 180e-6}, {"120 uH", Inductance, 120e-6}, {"32 kHz", Frequency, 32e3},
		{"60 ns", Time, 60e-9}, {"10 s", Time, 10}, {"3 min", Time, 180}, {"5000 h", Time, 18e6}, {"14 d", Time, 14 * 86400}, {"3 wk", Time, 21 * 86400}, {"2 weeks", Time, 14 * 86400},
		{"250 mW", Power, 0.25}, {"6 VA", ApparentPower, 6}, {"1.5 kVA", ApparentPower, 1500}, {"1 J", Energy, 1}, {"40 nC", Charge, 40e-9},
		{"45 °C", Temperature, 45}, {"45 degC", Temperature, 45}, {"45 C", Temperature, 45}, {"-55℃", Temperature, -55}, {"45 ºC", Temperature, 45},
		{"10 K", TemperatureRise, 10}, {"90 K/W", ThermalResistance, 90}, {"90 °C/W", ThermalResistance, 90}, {"90 K / W", ThermalResistance, 90},
		{"18 mm", Length, 18e-3}, {"1.8 cm", Length, 18e-3}, {"1500 m", Length, 1500}, {"250 mm³", Volume, 250e-9}, {"250 mm^3", Volume, 250e-9}, {"2 ml", Volume, 2e-6},
		{"400 mm2", Area, 400e-6}, {"4 cm²", Area, 4e-4}, {"10 %", Proportion, 0.1}, {"200 ppm", Proportion, 200e-6},
		{"92 V/us", SlewRate, 92e6}, {"92 V/µs", SlewRate, 92e6}, {"1 kV/ms", SlewRate, 1e6}, {"1.9", None, 1.9}, {"-3e-2", None, -0.03},
	} {
		if got, err := Parse(tt.text, tt.d); err != nil || got != tt.want {
			t.Errorf("%q is read as %v (%v), want %v", tt.text, got, err, tt.want)
		}
	}
}

// What is refused, with the words that a person gets.
func TestRefusals(t *testing.T) {
	for _, tt := range []struct {
		text string
		d    Dimension
		want string
	}{
		{"", Voltage, `nothing is written; write a voltage, such as 25 V`},
		{"  ", Voltage, `nothing is written; write a voltage, such as 25 V`},
		{"25", Voltage, `"25" has no unit; write a number and a unit, such as 25 V`},
		{"0", Temperature, `"0" has no unit; write a number and a unit, such as 85 °C`},
		{"0.1", Proportion, `"0.1" has no unit; write a number and a unit, such as 10 %`},
		{"25 VV", Voltage, `"25 VV" is not a voltage; write a number and a unit, such as 25 V`},
		{"V", Voltage, `"V" is not a voltage; write a number and a unit, such as 25 V`},
		{"25 V DC", Voltage, `"25 V DC" is not a voltage; write a number and a unit, such as 25 V`},
		{"10 kΩ", Voltage, `"10 kΩ" is in ohms; write volts, such as 25 V`},
		{"25 V", Capacitance, `"25 V" is in volts; write farads, such as 4.7 nF`},
		{"25 °C", TemperatureRise, `"25 °C" is in degrees Celsius; write kelvins, such as 10 K`},
		{"298 K", Temperature, `"298 K" is in kelvins; write degrees Celsius, such as 85 °C`},
		{"5 V", None, `"5 V" is not a plain number; write it without a unit, such as 1.9`},
		{"10 kv", Voltage, `"10 kv" has no unit known here; did you mean kV?`},
		{"10 mv", Voltage, `"10 mv" has no unit known here; did you mean MV or mV?`},
		{"10 KV", Voltage, `"10 KV" has no unit known here; did you mean kV?`},
		{"32 khz", Frequency, `"32 khz" has no unit known here; did you mean kHz?`},
		{"4.7 MF", Capacitance, `"4.7 MF" would be millions of farads; write uF for microfarads or mF for millifarads`},
		{"4.7k", Resistance, `"4.7k" leaves the unit out; write 4.7 kohm`},
		{"4m7", Resistance, `"4m7" leaves the unit out; write 4.7 mohm`},
		{"3V3", Voltage, `"3V3" leaves the unit out; write 3.3 V`},
		{"4.7n", Capacitance, `"4.7n" leaves the unit out; write 4.7 nF`},
		{"3kV3", Voltage, `"3kV3" is not a voltage; write a number and a unit, such as 25 V`},
		{"NaN", Voltage, `"NaN" is not a finite number; write a voltage, such as 25 V`},
		{"nan V", Voltage, `"nan V" is not a finite number; write a voltage, such as 25 V`},
		{"-Inf V", Voltage, `"-Inf V" is not a finite number; write a voltage, such as 25 V`},
		{"∞", Voltage, `"∞" is not a finite number; write a voltage, such as 25 V`},
		{"1e400 V", Voltage, `"1e400 V" is beyond what a number can hold; check the exponent`},
		{"1e308 kV", Voltage, `"1e308 kV" is beyond what a number can hold; check the exponent`},
		{"1e-400 V", Voltage, `"1e-400 V" is beyond what a number can hold; check the exponent`},
		{"1e99999999999999999999 V", Voltage, `"1e99999999999999999999 V" is beyond what a number can hold; check the exponent`},
		{"0x10 V", Voltage, `"0x10 V": write a plain decimal number`},
		{"0x1p4 V", Voltage, `"0x1p4 V": write a plain decimal number`},
		{"4,7 nF", Capacitance, `"4,7 nF": write the decimal point as a full stop`},
		{",5 V", Voltage, `",5 V": write the decimal point as a full stop`},
		{"1,000 V", Voltage, `"1,000 V": a comma may mean thousands or a decimal point; write neither a comma nor a gap within the digits`},
		{"1 000 V", Voltage, `"1 000 V": write the digits without a gap or a mark between them`},
		{"1'000 V", Voltage, `"1'000 V": write the digits without a gap or a mark between them`},
		{"1_000 V", Voltage, `"1_000 V": write the digits without a gap or a mark between them`},
		{"1.000.000 V", Voltage, `"1.000.000 V": there is more than one decimal point; write one`},
		{"1/4 W", Power, `"1/4 W": write the fraction as a decimal, such as 0.25`},
		{"٣ V", Voltage, `"٣ V" is not a voltage; write a number and a unit, such as 25 V`},
		{"--3 V", Voltage, `"--3 V" is not a voltage; write a number and a unit, such as 25 V`},
		{"5 V\u202e", Voltage, `"5 V\u202e" is not a voltage; write a number and a unit, such as 25 V`},
		{strings.Repeat("9", 70) + " V", Voltage, `"99999999999999999999"… is 72 characters long; write a voltage in 64 or fewer, such as 25 V`},
	} {
		if got, err := Parse(tt.text, tt.d); err == nil || err.Error() != tt.want {
			t.Errorf("%q: got %v, %v\nwant %s", tt.text, got, err, tt.want)
		}
	}
}

// Milli and mega are never taken for each other, in any dimension that has
// both.
func TestMilliIsNotMega(t *testing.T) {
	for d, spelled := range spellings {
		for unit, milli := range spelled {
			mega, ok := spelled["M"+strings.TrimPrefix(unit, "m")]
			if ok && strings.HasPrefix(unit, "m") && mega.ten-milli.ten != 9 {
				t.Errorf("%v: %s and its mega differ by 10^%d", d, unit, mega.ten-milli.ten)
			}
		}
	}
}

func TestTolerances(t *testing.T) {
	for text, want := range map[string]Tolerance{
		"10 %": {0.1, 0.1}, "±10%": {0.1, 0.1}, "+/-5 %": {0.05, 0.05}, "K": {0.1, 0.1}, "0.1 %": {0.001, 0.001},
		"-20/+80 %": {0.2, 0.8}, "+80/-20 %": {0.2, 0.8}, "+80 %/-20 %": {0.2, 0.8}, "−20/+80%": {0.2, 0.8}, "-0/+100 %": {0, 1}, "400 %": {4, 4}, "100 ppm": {100e-6, 100e-6},
	} {
		if got, err := ParseTolerance(text); err != nil || got != want {
			t.Errorf("%q is %v (%v), want %v", text, got, err, want)
		}
		if again, err := ParseTolerance(want.String()); err != nil || again != want {
			t.Errorf("%v prints as %q, which is read as %v (%v)", want, want.String(), again, err)
		}
	}
	for _, text := range []string{"", "10", "-10 %", "-20/-80 %", "x", "kk", "20/80 %", "+20/+80 %", "-a/+b %", "-1.2.3/+4 %", strings.Repeat("1", 100)} {
		if got, err := ParseTolerance(text); err == nil {
			t.Errorf("%q is read as %v", text, got)
		}
	}
}
