package main

import (
	"context"

	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
)

// loadShares are the parts of the load current at which regulation is shown.
var loadShares = []float64{0, 0.1, 0.25, 0.5, 0.75, 1, 1.25}

// regulation is the output against a constant load current, from none to more
// than the circuit's load draws.
func regulation(ctx context.Context, c ladder.Circuit, a ladder.Steady) (ladder.Regulation, error) {
	var currents []float64
	for _, share := range loadShares {
		currents = append(currents, share*a.LoadA)
	}
	c.Load = ladder.Load{}
	return ladder.Regulate(ctx, c, currents, nil)
}

func regulationTable(r ladder.Regulation) table {
	t := table{columns: []column{
		measure("load", "load_a", quantity.Current), measure("output", "output_v", quantity.Voltage),
		measure("ripple", "ripple_v", quantity.Voltage), measure("in the load", "load_w", quantity.Power),
		measure("input", "input_w", quantity.Power),
	}}
	for _, p := range r.Points {
		t.add(p.LoadA, p.MeanV, p.RippleV, p.LoadW, p.InputW)
	}
	return t
}

type regulationDocument struct {
	LoadA   number `json:"load_a"`
	OutputV number `json:"output_v"` // magnitude
	RippleV number `json:"ripple_v"`
	LoadW   number `json:"load_w"`
	InputW  number `json:"input_w"`
}

func regulationJSON(r ladder.Regulation) []regulationDocument {
	var out []regulationDocument
	for _, p := range r.Points {
		out = append(out, regulationDocument{number(p.LoadA), number(p.MeanV), number(p.RippleV), number(p.LoadW), number(p.InputW)})
	}
	return out
}
