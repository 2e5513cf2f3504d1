// Package quantity holds values with units: it alone parses and prints them.
// Inside the program every value is a plain float64 in its SI base unit; the
// named types below say which. Temperatures are degrees Celsius.
//
// # What is read
//
// A number and a unit ("4.7 nF", "4.7nF", "1e-9 F"), with SI prefixes from
// femto to tera where the unit takes them, µ or u for micro, Ω or ohm for
// ohms; the RKM code of IEC 60062 for resistance, capacitance and inductance
// ("4k7", "4R7", "4n7", "100p"); per cent and ppm for proportions. Letter
// case is never guessed, for m and M are nine powers of ten apart.
//
// # What is refused
//
// A number without a unit (a bare 0 is read, for it is the same in any unit,
// except as a temperature), another dimension's unit, text that is not finite
// decimal, a decimal comma and any other separator within the digits, and
// text of more than 64 characters. The error says how to mend it.
//
// # Exactness
//
// Decimal powers are applied to the text, not by multiplying, so that "4n7",
// "4.7 nF" and the Go constant 4.7e-9 are the same float64.
package quantity

// Named SI values. The comment is the unit that the float holds.
type (
	Volts         float64 // V
	Amps          float64 // A
	Ohms          float64 // Ω
	Farads        float64 // F
	Henries       float64 // H
	Hertz         float64 // Hz
	Seconds       float64 // s
	Watts         float64 // W
	VoltAmps      float64 // VA
	Joules        float64 // J
	Coulombs      float64 // C
	Celsius       float64 // °C
	Kelvins       float64 // K, a temperature difference
	KelvinPerWatt float64 // K/W
	Meters        float64 // m
	CubicMeters   float64 // m³
	SquareMeters  float64 // m²
	Ratio         float64 // 1; written and read in %
	VoltPerSecond float64 // V/s
)

// Quantity is any of the named types above.
type Quantity interface {
	~float64
	Dimension() Dimension
	String() string
}

// Read parses text such as "4.7 nF", "4n7" (RKM code of IEC 60062) or
// "10 %" into Q. The error says what was read and how to mend it, without
// file or key, which the caller adds.
func Read[Q Quantity](text string) (Q, error) {
	v, err := Parse(text, Q(0).Dimension())
	return Q(v), err
}
