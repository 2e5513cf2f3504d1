package ratings

import "math"

// ConductorPlace is a column of IPC-2221 table 6-1.
type ConductorPlace int

// The columns.
const (
	InternalB1      ConductorPlace = iota // inner conductors
	UncoatedB2                            // outer, uncoated, up to 3050 m
	UncoatedHighB3                        // outer, uncoated, above 3050 m
	CoatedB4                              // outer, permanent polymer coating
	AssemblyA5                            // outer, conformal coating over the assembly
	LeadUncoatedA6                        // lead or termination, uncoated
	LeadConformalA7                       // lead or termination, conformal coating
	places
)

// conductorRows are the spacings in mm by voltage, direct or peak, IPC-2221
// table 6-1: from memory. A row holds up to its voltage.
var conductorRows = []struct {
	upTo float64
	mm   [places]float64
}{
	{15, [places]float64{0.05, 0.1, 0.1, 0.05, 0.13, 0.13, 0.13}},
	{30, [places]float64{0.05, 0.1, 0.1, 0.05, 0.13, 0.25, 0.13}},
	{50, [places]float64{0.1, 0.6, 0.6, 0.13, 0.13, 0.4, 0.13}},
	{100, [places]float64{0.1, 0.6, 1.5, 0.13, 0.13, 0.5, 0.13}},
	{150, [places]float64{0.2, 0.6, 3.2, 0.4, 0.4, 0.8, 0.4}},
	{170, [places]float64{0.2, 1.25, 3.2, 0.4, 0.4, 0.8, 0.4}},
	{250, [places]float64{0.2, 1.25, 6.4, 0.4, 0.4, 0.8, 0.4}},
	{300, [places]float64{0.2, 1.25, 12.5, 0.4, 0.4, 0.8, 0.4}},
	{500, [places]float64{0.25, 2.5, 12.5, 0.8, 0.8, 1.5, 0.8}},
}

// conductorPerVolt adds to the last row above 500 V [mm/V].
var conductorPerVolt = [places]float64{0.0025, 0.005, 0.025, 0.00305, 0.00305, 0.00305, 0.00305}

// ConductorSpacing is the least spacing of board conductors [mm] for a
// voltage between them [V], direct or peak, by IPC-2221 table 6-1.
func ConductorSpacing(volts float64, place ConductorPlace) float64 {
	volts = math.Abs(volts)
	for _, row := range conductorRows {
		if volts <= row.upTo {
			return row.mm[place]
		}
	}
	last := conductorRows[len(conductorRows)-1]
	return last.mm[place] + (volts-last.upTo)*conductorPerVolt[place]
}
