// Package optimize turns targets and a catalog into a verified design: it
// builds candidates, searches for the cheapest that passes, proves it, and
// explains when nothing does.
package optimize

import (
	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
)

// Supply is what is wanted: targets, source, surroundings and house rules.
type Supply struct {
	Name         string
	Output       Output
	Source       Source
	Surroundings Surroundings
	Derating     string // policy name or file
	Build        Build
	Choose       Choose
	Limits       Limits
	Extras       []Extra // fixed extra lines
	Input        catalog.Input
}

// Output is what the load must see.
type Output struct {
	Voltage   quantity.Volts // magnitude
	Window    quantity.Ratio // allowed either way over line, load and tolerance
	Negative  bool
	Load      LoadRange
	Ripple    quantity.Volts // peak to peak; zero: any
	Discharge Discharge
	Rise      quantity.Seconds // from switch-on to within the window; zero: any
}

// LoadRange is the least and greatest load: by current, or by one resistance.
type LoadRange struct {
	Least, Most quantity.Amps
	Resistance  quantity.Ohms // instead of the currents
}

// Discharge asks that the output falls below a voltage in a time after
// switch-off; zero: not asked.
type Discharge struct {
	Below  quantity.Volts
	Within quantity.Seconds
}

// Source is the winding or inverter that feeds the ladder. When Part is
// empty and Peak is zero the search may choose a winding from the catalog.
type Source struct {
	Part       string // catalog winding that fixes the rest
	Peak       quantity.Volts
	NoLoadRise quantity.Ratio
	Line       quantity.Ratio
	Frequency  quantity.Hertz
	Waveform   ladder.Waveform
	Resistance quantity.Ohms
	Leakage    quantity.Henries
	Power      quantity.VoltAmps
	CentreTap  bool
	Isolated   bool
}

// Surroundings of the supply.
type Surroundings struct {
	Ambient         quantity.Celsius
	Altitude        quantity.Meters
	PollutionDegree int
}

// Build is how many are made.
type Build struct {
	Units    int
	Spares   quantity.Ratio
	Currency string
}

// Objective is what is made least.
type Objective string

// The objectives.
const (
	LeastCost   Objective = "cost"
	LeastVolume Objective = "volume"
	LeastArea   Objective = "area"
	LeastHeight Objective = "height"
	LeastLoss   Objective = "loss"
	LeastParts  Objective = "parts"
)

// Choose steers the search.
type Choose struct {
	Least      Objective
	Then       Objective // second objective among equals
	Topologies []ladder.Topology
	StagesMin  int
	StagesMax  int
	Mounting   catalog.Mounting // empty: any
	Suppliers  []string         // only these; empty: all
	Avoid      []string         // part numbers or makers not to use
}

// Limits that a design must keep; zero: none.
type Limits struct {
	Cost         quantity.Money // per unit
	Height       quantity.Meters
	Volume       quantity.CubicMeters
	Area         quantity.SquareMeters
	StoredEnergy quantity.Joules
	Efficiency   quantity.Ratio
}

// Extra is a fixed line beside the ladder.
type Extra struct {
	Part     string
	Quantity int
	Ref      string
}
