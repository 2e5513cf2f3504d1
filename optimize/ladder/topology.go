package ladder

// Topology names a circuit form.
type Topology string

// The topologies. Positions, with stages counted from the source:
// see the builder of each, one file per topology.
const (
	HalfWave      Topology = "half-wave"
	FullWave      Topology = "full-wave"
	BridgeDoubler Topology = "bridge-doubler"
	ParallelFed   Topology = "parallel-fed"
	OddMultiple   Topology = "odd-multiple" // 2n+1 times: a half stage at the foot
	Bipolar       Topology = "bipolar"      // two half-wave ladders of opposite polarity
)

// MaxStages is the most stages that a circuit may have.
const MaxStages = 20

// form is what a topology must say of itself. A new topology is one file with
// one form, and one line in the table below.
type form struct {
	capacitors func(stages int) int
	diodes     func(stages int) int
	ends       int // winding ends that feed it
	maxStages  int
	build      func(stages int) netlist
}

var forms = map[Topology]form{
	HalfWave:      halfWave,
	FullWave:      fullWave,
	BridgeDoubler: bridgeDoubler,
	ParallelFed:   parallelFed,
	OddMultiple:   oddMultiple,
	Bipolar:       bipolar,
}

// Topologies lists every topology, the common ones first.
func Topologies() []Topology {
	return []Topology{HalfWave, FullWave, BridgeDoubler, ParallelFed, OddMultiple, Bipolar}
}

// CapacitorCount is how many capacitors the topology has at n stages.
func (t Topology) CapacitorCount(stages int) int { return forms[t].capacitors(stages) }

// DiodeCount is how many diodes the topology has at n stages.
func (t Topology) DiodeCount(stages int) int { return forms[t].diodes(stages) }

// WindingEnds is 2 for a topology that needs a centre-tapped source, else 1.
func (t Topology) WindingEnds() int { return forms[t].ends }

// MaxStages is the most stages that the topology can have.
func (t Topology) MaxStages() int { return forms[t].maxStages }

// Known tells whether t is one of Topologies.
func (t Topology) Known() bool { _, ok := forms[t]; return ok }

// OutputFactor is the ideal no-load output in units of the source peak: 2n,
// or 2n+1 for the odd multiples, 4n across both outputs of a bipolar one.
func (t Topology) OutputFactor(stages int) int { return len(netlistOf(t, stages).climb) }

// SmoothingColumn tells for each capacitor whether it is one of the smoothing
// capacitors across which the output stands; the others couple.
func (t Topology) SmoothingColumn(stages int) []bool { return netlistOf(t, stages).smoothing }

// CapacitorLevels is the ideal no-load voltage of each capacitor in units of
// the source peak.
func (t Topology) CapacitorLevels(stages int) []float64 {
	return netlistOf(t, stages).capacitorLevels(1)
}

// FirstCoupling tells for each capacitor whether it is a first coupling
// capacitor, the one that carries the charge of every stage.
func (t Topology) FirstCoupling(stages int) []bool {
	n := netlistOf(t, stages)
	out := make([]bool, len(n.capacitors))
	for k, b := range n.capacitors {
		for _, e := range n.ends {
			if !n.smoothing[k] && (b.a == e.node || b.b == e.node) {
				out[k] = true
			}
		}
	}
	return out
}

// Charge is the charge that one diode passes per period in units of the
// load's: 1, or ½ where two sides share it.
func (t Topology) Charge() float64 { return netlistOf(t, 1).share }
