package catalog

import "rungwright/catalog/quantity"

// DiodeType is a rectifier family.
type DiodeType string

// The diode types.
const (
	Standard    DiodeType = "standard"
	Fast        DiodeType = "fast"
	Ultrafast   DiodeType = "ultrafast"
	Schottky    DiodeType = "schottky"
	HighVoltage DiodeType = "high-voltage" // stacked junctions in one body
)

// Diode is what a rectifier's sheet says. Zero means not stated.
type Diode struct {
	Type              DiodeType
	ReverseVoltage    quantity.Volts // repetitive peak
	AverageCurrent    quantity.Amps
	AverageAt         quantity.Celsius // ambient up to which AverageCurrent holds
	RepetitivePeak    quantity.Amps
	SurgeCurrent      quantity.Amps // one half-sine of SurgeTime, non-repetitive
	SurgeTime         quantity.Seconds
	Forward           []ForwardPoint // rising current, rising voltage
	Capacitance       JunctionCapacitance
	Recovery          Recovery
	Leakage           LeakagePoint
	LeakageHot        LeakagePoint
	ThermalResistance quantity.KelvinPerWatt // junction to ambient
	Junction          quantity.Celsius       // the highest allowed
	Avalanche         bool                   // controlled avalanche
}

// ForwardPoint is one point of the forward curve at 25 °C.
type ForwardPoint struct {
	Current quantity.Amps
	Voltage quantity.Volts
}

// JunctionCapacitance is the capacitance at a reverse voltage.
type JunctionCapacitance struct {
	At    quantity.Volts
	Value quantity.Farads
}

// Recovery is the reverse recovery test.
type Recovery struct {
	Time    quantity.Seconds
	Forward quantity.Amps
	Reverse quantity.Amps
}

// LeakagePoint is the reverse current at a voltage and temperature.
type LeakagePoint struct {
	At          quantity.Volts
	Value       quantity.Amps
	Temperature quantity.Celsius // zero: 25 °C
}
