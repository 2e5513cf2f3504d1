package quantity

import "strings"

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

// noun is how messages speak of a dimension.
type noun struct {
	name    string // with its article: "a voltage"
	units   string // the unit in words, plural: "volts"
	example string
}

var nouns = map[Dimension]noun{
	None:              {"a plain number", "no unit", "1.9"},
	Voltage:           {"a voltage", "volts", "25 V"},
	Current:           {"a current", "amperes", "1.2 mA"},
	Resistance:        {"a resistance", "ohms", "4.7 kohm"},
	Capacitance:       {"a capacitance", "farads", "4.7 nF"},
	Inductance:        {"an inductance", "henries", "120 uH"},
	Frequency:         {"a frequency", "hertz", "32 kHz"},
	Time:              {"a time", "seconds, hours or days", "60 ns"},
	Power:             {"a power", "watts", "250 mW"},
	ApparentPower:     {"an apparent power", "volt-amperes", "6 VA"},
	Energy:            {"an energy", "joules", "1 J"},
	Charge:            {"a charge", "coulombs", "40 nC"},
	Temperature:       {"a temperature", "degrees Celsius", "85 °C"},
	TemperatureRise:   {"a temperature difference", "kelvins", "10 K"},
	ThermalResistance: {"a thermal resistance", "kelvins per watt", "90 K/W"},
	Length:            {"a length", "metres", "18 mm"},
	Volume:            {"a volume", "cubic metres", "250 mm³"},
	Area:              {"an area", "square metres", "400 mm²"},
	Proportion:        {"a proportion", "per cent", "10 %"},
	SlewRate:          {"a rate of voltage change", "volts per second", "50 V/us"},
}

// Name is the dimension in words with its article, "a voltage".
func (d Dimension) Name() string { return nouns[d].name }

// noun is the dimension in one or two words without an article, "voltage".
func (d Dimension) noun() string {
	_, word, _ := strings.Cut(d.Name(), " ")
	return word
}

// Example is a well-written value of the dimension, "25 V".
func (d Dimension) Example() string { return nouns[d].example }

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
