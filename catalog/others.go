package catalog

import "rungwright/catalog/quantity"

// Resistor is what a resistor's sheet says. Zero means not stated.
type Resistor struct {
	Technology     string // metal film, thick film, metal oxide, wirewound, carbon composition
	Resistance     quantity.Ohms
	ToleranceLow   quantity.Ratio
	ToleranceHigh  quantity.Ratio
	Power          quantity.Watts   // at PowerAt
	PowerAt        quantity.Celsius // zero: 70 °C; falls in a line to zero at Temperature.Most
	WorkingVoltage quantity.Volts   // the limiting element voltage
	PulseEnergy    quantity.Joules  // one pulse
}

// Winding is a source: a transformer winding or an inverter module.
type Winding struct {
	Type         string         // transformer | inverter
	Peak         quantity.Volts // at rated load; each half when CentreTap
	NoLoadRise   quantity.Ratio // how far the no-load voltage stands above
	Power        quantity.VoltAmps
	FrequencyMin quantity.Hertz
	FrequencyMax quantity.Hertz
	Resistance   quantity.Ohms // each winding end, primary resistance referred
	Leakage      quantity.Henries
	Waveform     string // sine | square | triangle
	CentreTap    bool
	Isolated     bool           // safety isolating (IEC 61558) by the maker's word
	TestVoltage  quantity.Volts // insulation test, RMS
}

// Other is a fixed extra line: board, fuse, connector, enclosure, potting.
type Other struct {
	Category string // board | fuse | connector | enclosure | potting | hardware
}
