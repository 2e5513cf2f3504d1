package ratings

import "math"

// clearances are distances through air in an inhomogeneous field up to
// 2000 m, IEC 60664-1, pollution degree 1: from memory.
var clearances = []xy{ // kV peak or impulse: mm
	{0.33, 0.01}, {0.4, 0.02}, {0.5, 0.04}, {0.6, 0.06}, {0.8, 0.1}, {1, 0.15}, {1.2, 0.25}, {1.5, 0.5},
	{2, 1}, {2.5, 1.5}, {3, 2}, {4, 3}, {5, 4}, {6, 5.5}, {8, 8}, {10, 11}, {12, 14}, {15, 18}, {20, 25},
	{25, 33}, {30, 40}, {40, 60}, {50, 75}, {60, 90}, {80, 130}, {100, 170},
}

// leastClearance is the least clearance by pollution degree [mm], IEC
// 60664-1: from memory.
func leastClearance(pollution int) float64 {
	switch {
	case pollution >= 3:
		return 0.8
	case pollution == 2:
		return 0.2
	}
	return 0
}

// altitudeFactors multiply a clearance, IEC 60664-1 table A.2: from memory.
var altitudeFactors = []xy{ // m: 1
	{2000, 1}, {3000, 1.14}, {4000, 1.29}, {5000, 1.48}, {6000, 1.70}, {7000, 1.95}, {8000, 2.25},
	{9000, 2.62}, {10000, 3.02}, {15000, 6.67}, {20000, 14.5},
}

// creepages are distances over a surface at pollution degree 2, material
// group IIIa, IEC 60664-1: from memory.
var creepages = []xy{ // V RMS or direct: mm
	{50, 1.2}, {100, 1.4}, {125, 1.5}, {160, 1.6}, {200, 2}, {250, 2.5}, {320, 3.2}, {400, 4}, {500, 5},
	{630, 6.3}, {800, 8}, {1000, 10}, {1250, 12.5}, {1600, 16}, {2000, 20}, {2500, 25}, {3200, 32},
	{4000, 40}, {5000, 50}, {6300, 63}, {8000, 80}, {10000, 100},
}

// Clearance is the distance through air [mm] for a peak voltage [V] at a
// pollution degree and an altitude [m], IEC 60664-1 on lines between its
// rows. within is false beyond the table (100 kV, 20 000 m), where the last
// line is carried on: then test the real thing.
func Clearance(volts float64, pollution int, altitudeM float64) (mm float64, within bool) {
	mm, within = interpolate(clearances, math.Abs(volts)/1000)
	factor, low := AltitudeFactor(altitudeM)
	return max(mm, leastClearance(pollution)) * factor, within && low
}

// AltitudeFactor multiplies a clearance at an altitude [m]; 1 up to 2000 m.
func AltitudeFactor(altitudeM float64) (factor float64, within bool) {
	return interpolate(altitudeFactors, altitudeM)
}

// MaterialGroup ranks insulation by its resistance to tracking.
type MaterialGroup int

// The material groups; the zero value is the one to assume of plain board.
const (
	GroupIIIa MaterialGroup = iota // CTI 175 to 400
	GroupII                        // CTI 400 to 600
	GroupI                         // CTI 600 and above
)

// Creepage is the distance over a surface [mm] for a working voltage [V],
// RMS or direct, at a pollution degree, IEC 60664-1 on lines between its
// rows. Groups I and II take about 0.5 and 0.7 of it above 200 V, degree 3
// about 1.6 times degree 2; degree 1 is not granted less (all from memory).
// within is false above 10 kV, where the last line is carried on.
func Creepage(volts float64, pollution int, group MaterialGroup) (mm float64, within bool) {
	const groupsDiffer = 200 // V
	volts = math.Abs(volts)
	mm, within = interpolate(creepages, volts)
	if volts > groupsDiffer {
		mm *= map[MaterialGroup]float64{GroupIIIa: 1, GroupII: 0.7, GroupI: 0.5}[group]
	}
	if pollution >= 3 {
		mm *= 1.6
	}
	return mm, within
}

// NodeSpacing is what one node wants to earth.
type NodeSpacing struct {
	Node        string
	V           float64
	ClearanceMM float64
	CreepageMM  float64 // material group IIIa; never less than the clearance
	Within      bool    // both tables reach so far
}

// Spacings lists what every node of the hazard wants, in its order.
func Spacings(h Hazard) []NodeSpacing {
	var out []NodeSpacing
	for _, n := range h.NodeV {
		out = append(out, spacingOf(h, n))
	}
	return out
}

func spacingOf(h Hazard, n NodeVoltage) NodeSpacing {
	clear, clearWithin := Clearance(n.V, h.pollution(), h.AltitudeM)
	creep, creepWithin := Creepage(n.V, h.pollution(), GroupIIIa)
	return NodeSpacing{n.Node, math.Abs(n.V), clear, max(creep, clear), clearWithin && creepWithin}
}

// pollution is the degree, 2 when not given.
func (h Hazard) pollution() int {
	if h.Pollution == 0 {
		return 2
	}
	return h.Pollution
}
