package optimize

import (
	"context"

	"rungwright/optimize/ladder"
)

// regulationShares are the load currents of the regulation curve, in the full
// load's.
var regulationShares = []float64{0, 0.05, 0.1, 0.2, 0.35, 0.5, 0.65, 0.8, 1, 1.2, 1.5, 2}

// Regulation is the nominal design's output against its load current, from
// none to twice the full load, the bleeder staying.
func (d *Design) Regulation(ctx context.Context) (ladder.Regulation, error) {
	c := d.Circuit
	c.Load = ladder.Load{}
	if d.Plan.Bleeder.Part != nil {
		c.Load.Resistance = bleederOhms(d.Plan.Bleeder)
	}
	full := d.Supply.fullCurrent()
	var currents []float64
	for _, share := range regulationShares {
		currents = append(currents, share*full)
	}
	return ladder.Regulate(ctx, c, currents, nil)
}

// Period is the nominal design's steady state at full load with its waves.
func (d *Design) Period(ctx context.Context) (ladder.Steady, error) {
	return ladder.Solve(ctx, d.Circuit, &ladder.Settings{Waves: true})
}
