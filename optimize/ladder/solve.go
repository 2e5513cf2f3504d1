package ladder

import "context"

// Settings tunes a solve; the zero value is right.
type Settings struct {
	Tolerance float64 // local error relative to the source peak; zero: 1e-5
	Waves     bool    // keep the waveforms
	Start     *Steady // a neighbour's solution to start from; nil: the estimate
}

// Solve finds the periodic steady state.
func Solve(ctx context.Context, c Circuit, s *Settings) (Steady, error) { return Steady{}, nil }

// Estimate is the charge-balance estimate of output and ripple.
func Estimate(c Circuit) Estimated { return Estimated{} }

// Check reports every way in which the circuit is not one (counts that do not
// match the stages, values that are not positive), for a caller that reads
// circuits from people.
func (c Circuit) Check() []error { return nil }

// CapacitorCount and DiodeCount are how many a topology has at n stages.
func (t Topology) CapacitorCount(stages int) int { return 0 }

// DiodeCount is how many diodes the topology has at n stages.
func (t Topology) DiodeCount(stages int) int { return 0 }
