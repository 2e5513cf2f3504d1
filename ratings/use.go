package ratings

import "rungwright/catalog/quantity"

// Use is how a circuit uses one part at one corner. Only the fields that the
// part's kind has are read; zero means nothing of the sort. Signs do not
// matter.
type Use struct {
	Ref       string
	Corner    string
	Ambient   quantity.Celsius
	Frequency quantity.Hertz

	// capacitor
	PeakV   quantity.Volts // greatest DC plus ripple
	ACV     quantity.Volts // RMS of the alternating part
	RippleA quantity.Amps  // RMS
	SlewVps quantity.VoltPerSecond

	// diode
	InverseV   quantity.Volts
	AverageA   quantity.Amps
	PeakA      quantity.Amps // repetitive
	RMSA       quantity.Amps // of a winding too, each end
	LossW      quantity.Watts
	SurgeA     quantity.Amps    // start-up peak
	SurgeTime  quantity.Seconds // of the equivalent half-sine
	ConductFor quantity.Seconds // conduction time per period

	// resistor
	PowerW   quantity.Watts
	WorkingV quantity.Volts
	PulseJ   quantity.Joules

	// winding
	ApparentVA  quantity.VoltAmps
	InsulationV quantity.Volts // RMS between the winding and earth or another winding
}
