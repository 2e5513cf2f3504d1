package catalog

import "rungwright/catalog/quantity"

// Technology is a capacitor's dielectric family.
type Technology string

// The capacitor technologies.
const (
	CeramicClass1         Technology = "ceramic class 1"
	CeramicClass2         Technology = "ceramic class 2"
	Film                  Technology = "film"
	AluminiumElectrolytic Technology = "aluminium electrolytic"
	Mica                  Technology = "mica"
	Tantalum              Technology = "tantalum"
)

// Capacitor is what a capacitor's sheet says. Zero means not stated.
type Capacitor struct {
	Technology     Technology
	Characteristic string // X7R, C0G, polypropylene …
	Capacitance    quantity.Farads
	ToleranceLow   quantity.Ratio // 0.2 for −20 %
	ToleranceHigh  quantity.Ratio // 0.8 for +80 %
	Voltage        quantity.Volts // rated DC
	ACVoltage      quantity.Volts // rated AC, RMS
	Bias           []BiasPoint    // rising voltage, falling share of Capacitance
	LossFactor     quantity.Ratio // tan δ at LossAt
	LossAt         quantity.Hertz
	ESR            quantity.Ohms
	Leakage        quantity.Amps // at rated voltage
	Slew           quantity.VoltPerSecond
	Ageing         quantity.Ratio // loss per decade of hours
	Ripple         RippleRating
	Life           LifeRating
}

// BiasPoint is the share of the marked capacitance left at a DC voltage.
type BiasPoint struct {
	Voltage quantity.Volts
	Share   quantity.Ratio
}

// RippleRating is the maker's RMS ripple current, with multipliers for other
// frequencies (rising frequency).
type RippleRating struct {
	Current     quantity.Amps
	Frequency   quantity.Hertz
	Temperature quantity.Celsius
	CoreRise    quantity.Kelvins // inner temperature rise at rated ripple; zero: 5 K assumed
	Multipliers []FrequencyFactor
}

// FrequencyFactor multiplies the rated ripple current at a frequency.
type FrequencyFactor struct {
	Frequency quantity.Hertz
	Factor    quantity.Ratio
}

// LifeRating is the maker's endurance: hours at a temperature.
type LifeRating struct {
	Time        quantity.Seconds
	Temperature quantity.Celsius
}
