package ratings

import "math"

// Caution is a hazard with the figures that triggered it.
type Caution struct {
	Code   string // stable, such as "stored-energy"
	Title  string // a short line
	Text   string // what to do, with the numbers
	Source string // the standard that the figure is from, with its mark
}

// Hazard is what the circuit could do to people.
type Hazard struct {
	OutputV        float64 // greatest magnitude, no load, high line [V]
	SourcePeakV    float64
	StoredJ        float64 // in all capacitors at that voltage [J]
	OutputC        float64 // capacitance seen at the output [F]
	DischargeS     float64 // time to fall below the touch limit with the bleeder [s]; infinite without
	HasBleeder     bool
	BleederParts   int  // resistors in each string
	BleederStrings int  // strings side by side, each able to discharge alone; zero: one
	MainsFed       bool // the source is at mains frequency
	Isolated       bool // by the source part's word
	NodeV          []NodeVoltage
	AltitudeM      float64
	Pollution      int // degree of IEC 60664-1; zero: 2
}

// NodeVoltage is the greatest voltage of a ladder node to ground.
type NodeVoltage struct {
	Node string
	V    float64
}

// hazardKinds are looked through in this order, the gravest first. A new
// caution is a function and a line here.
var hazardKinds = []struct {
	code  string
	about func(h Hazard) (Caution, bool)
}{
	{"direct-fed", directFed},
	{"lethal-energy", lethalEnergy},
	{"live-output", liveOutput},
	{"no-bleeder", noBleeder},
	{"stored-charge", storedCharge},
	{"charged-capacitor", chargedCapacitor},
	{"discharge-time", dischargeTime},
	{"bleeder-fault", bleederFault},
	{"work-inside", workInside},
	{"output-short", outputShort},
	{"bleeder-sharing", bleederSharing},
	{"startle", startle},
	{"burn", burn},
	{"mains-isolation", mainsIsolation},
	{"source-isolation", sourceIsolation},
	{"x-rays", xRays},
	{"corona", corona},
	{"spacing", spacing},
	{"not-certified", notCertified},
}

// Cautions lists the hazards that apply, gravest first; the last defers to
// local codes and licensed practice and is always there.
func Cautions(h Hazard) []Caution {
	h.OutputV, h.SourcePeakV = math.Abs(h.OutputV), math.Abs(h.SourcePeakV)
	var out []Caution
	for _, k := range hazardKinds {
		if c, applies := k.about(h); applies {
			c.Code = k.code
			out = append(out, c)
		}
	}
	return out
}

// CautionCodes lists every code that Cautions can give, gravest first.
func CautionCodes() []string {
	var codes []string
	for _, k := range hazardKinds {
		codes = append(codes, k.code)
	}
	return codes
}

// highest is the node with the greatest voltage, the output when no node is
// given.
func (h Hazard) highest() NodeVoltage {
	top := NodeVoltage{"output", h.OutputV}
	if h.SourcePeakV > top.V {
		top = NodeVoltage{"source", h.SourcePeakV}
	}
	for _, n := range h.NodeV {
		if math.Abs(n.V) > top.V {
			top = NodeVoltage{n.Node, math.Abs(n.V)}
		}
	}
	return top
}

// place is how a sentence starts that speaks of the node.
func (n NodeVoltage) place() string {
	if n.Node == "output" || n.Node == "source" {
		return "The " + n.Node
	}
	return "Node " + n.Node
}

// live tells whether any part is above the touch limit.
func (h Hazard) live() bool { return !(h.highest().V <= TouchLimitV) }
