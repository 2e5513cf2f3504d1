package ladder

import "context"

// RegulationPoint is the steady state at one load current.
type RegulationPoint struct {
	LoadA, MeanV, RippleV float64
	InputW, LoadW         float64
}

// Regulation is the output against load current, from no load upward. Knee is
// the index of the point of greatest output power: past it, more current means
// less power.
type Regulation struct {
	Points []RegulationPoint
	Knee   int
	Ended  string // why the curve stops before the last load, if it does
}

// Regulate solves the circuit at rising constant load currents [A], each
// starting from the one before; what the circuit's own load draws as a
// resistance, such as a bleeder, stays.
func Regulate(ctx context.Context, c Circuit, currents []float64, set *Settings) (Regulation, error) {
	var out Regulation
	step := Settings{}
	if set != nil {
		step = *set
	}
	for _, i := range currents {
		c.Load = Load{Resistance: c.Load.Resistance, Current: i}
		s, err := Solve(ctx, c, &step)
		if ctx.Err() != nil {
			return out, err
		}
		if err != nil {
			out.Ended = err.Error()
			break
		}
		step.Start = &s
		v := s.MeanV
		if c.Negative {
			v = -v
		}
		out.Points = append(out.Points, RegulationPoint{LoadA: s.LoadA, MeanV: v, RippleV: s.RippleV, InputW: s.InputW, LoadW: s.LoadW})
		if s.LoadW > out.Points[out.Knee].LoadW {
			out.Knee = len(out.Points) - 1
		}
	}
	return out, nil
}
