package ladder

// Topology names a circuit form.
type Topology string

// The topologies.
const (
	HalfWave      Topology = "half-wave"
	FullWave      Topology = "full-wave"
	BridgeDoubler Topology = "bridge-doubler"
	ParallelFed   Topology = "parallel-fed"
	OddMultiple   Topology = "odd-multiple" // 2n+1 times: a half stage at the foot
	Bipolar       Topology = "bipolar"      // two half-wave ladders of opposite polarity
)
