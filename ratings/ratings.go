// Package ratings judges parts: derating policies, stress against limit,
// hazards with their cautions, life and failure-rate figures. Values are SI
// in quantity's units, ratios are fractions, temperatures °C.
package ratings

import (
	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// Stress is one rating of one part at its worst corner.
type Stress struct {
	Ref      string // reference designators that share it, "C3"
	Part     string // part number
	Quantity string // what is stressed: "peak voltage", "ripple current" …
	Value    float64
	Rating   float64 // the maker's number; the limit is Rating × LimitRatio or an absolute
	Limit    float64 // what the policy allows
	Unit     quantity.Dimension
	Ratio    float64 // Value/Limit; above 1 is over. For temperatures and times, a margin expressed the same way round
	Corner   string  // the corner at which it is worst
	Rule     Rule
	Over     bool
	Note     string // assumptions made, such as a figure the sheet does not give
}

// Rule names what judged a number.
type Rule struct {
	Policy string // "general"
	Name   string // "ceramic class 2 voltage"
	Source string // document, table and level, or "common practice, no source"; "from memory" where so
}

// Use is how a circuit uses one part at one corner. Only the fields that the
// part's kind has are read; zero means nothing of the sort.
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
	RMSA       quantity.Amps
	LossW      quantity.Watts
	SurgeA     quantity.Amps    // start-up peak
	SurgeTime  quantity.Seconds // of the equivalent half-sine
	ConductFor quantity.Seconds // conduction time per period

	// resistor
	PowerW   quantity.Watts
	WorkingV quantity.Volts
	PulseJ   quantity.Joules

	// winding
	ApparentVA quantity.VoltAmps
}

// Judge gives every stress of a part over all its uses, the worst use of each
// kept. A rating that the policy has no rule for comes back as a Stress with
// an empty Rule.Name and a loud Note; nothing passes by silence.
func Judge(p *Policy, part *catalog.Part, uses []Use) []Stress { return nil }

// Policy is a derating policy.
type Policy struct {
	Name   string
	Title  string
	Source string
	SHA256 string
}

// ReadPolicy returns a shipped policy by name, or reads a file.
func ReadPolicy(nameOrFile string) (*Policy, error) { return nil, nil }

// Caution is a hazard with the figures that triggered it.
type Caution struct {
	Code   string // stable, such as "stored-energy"
	Title  string // a short line
	Text   string // what to do, with the numbers
	Source string // the standard that the figure is from, with its mark
}

// Hazard is what the circuit could do to people.
type Hazard struct {
	OutputV      float64 // greatest magnitude, no load, high line [V]
	SourcePeakV  float64
	StoredJ      float64 // in all capacitors at that voltage [J]
	OutputC      float64 // capacitance seen at the output [F]
	DischargeS   float64 // time to fall below the touch limit with the bleeder [s]; infinite without
	HasBleeder   bool
	BleederParts int  // resistors in the string
	MainsFed     bool // the source is at mains frequency
	Isolated     bool // by the source part's word
	NodeV        []NodeVoltage
	AltitudeM    float64
	Pollution    int
}

// NodeVoltage is the greatest voltage of a ladder node to ground.
type NodeVoltage struct {
	Node string
	V    float64
}

// Cautions lists the hazards that apply, gravest first; there is always at
// least one.
func Cautions(h Hazard) []Caution { return nil }
