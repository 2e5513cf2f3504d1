package ladder

// ground is the reference node.
const ground = -1

// branch joins two nodes; for a diode a is the anode and b the cathode.
type branch struct{ a, b int }

// end is one winding end: the node that it drives and its phase.
type end struct {
	node  int
	phase float64 // +1 or −1
}

// pulse is what flows through each capacitor while the diodes of one crest
// conduct, in units of q = load current / frequency, positive when charging.
type pulse []float64

// netlist is a topology at a number of stages: pure structure, no values.
type netlist struct {
	names      []string // of the nodes
	capacitors []branch // a is the positive end
	smoothing  []bool   // per capacitor
	diodes     []branch
	ends       []end
	plus       int
	minus      int
	climb      []int    // the diodes in series that lead from minus to plus
	column     []int    // the capacitors in series across the output
	pulses     [2]pulse // at the positive and at the negative crest
	drain      []float64
	share      float64 // of q that each diode passes per period
	feed       float64 // diodes that one winding end feeds at once
}

// node adds a node and returns its index.
func (n *netlist) node(name string) int {
	n.names = append(n.names, name)
	return len(n.names) - 1
}

// capacitor adds a capacitor with what each pulse and the load move through
// it, in units of q.
func (n *netlist) capacitor(a, b int, smoothing bool, positive, negative, drain float64) int {
	n.capacitors = append(n.capacitors, branch{a, b})
	n.smoothing = append(n.smoothing, smoothing)
	n.pulses[0] = append(n.pulses[0], positive)
	n.pulses[1] = append(n.pulses[1], negative)
	n.drain = append(n.drain, drain)
	return len(n.capacitors) - 1
}

// diode adds a diode from anode to cathode.
func (n *netlist) diode(anode, cathode int) int {
	n.diodes = append(n.diodes, branch{anode, cathode})
	return len(n.diodes) - 1
}
