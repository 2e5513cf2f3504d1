package main

import (
	"fmt"
	"math"

	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
)

// printSolved shows the steady state of a circuit.
func printSolved(s *streams, c ladder.Circuit, a ladder.Steady, curve ladder.Regulation) {
	if s.outTerminal {
		printSolvedHead(s, c, a)
	} else {
		printTables(s, solvedTable(a))
	}
	printTables(s, capacitorTable(a), diodeTable(a), sourceTable(a), regulationTable(curve))
	if curve.Ended != "" {
		fmt.Fprintln(s.err, "note: the regulation curve ends early:", curve.Ended)
	}
}

// printSolvedHead is the answer in a few lines for the eye.
func printSolvedHead(s *streams, c ladder.Circuit, a ladder.Steady) {
	fmt.Fprintf(s.out, "\n%s, %s, %s peak at %s\n", c.Topology, stageCount(c.Stages),
		quantity.Volts(c.Source.Peak), quantity.Hertz(c.Source.Frequency))
	fmt.Fprintf(s.out, "  output  %s mean, %s ripple peak to peak, at %s\n",
		s.paint(bold, quantity.Volts(a.MeanV).String()), quantity.Volts(a.RippleV), quantity.Amps(a.LoadA))
	fmt.Fprintf(s.out, "  power   %s in, %s in the load, %s lost%s\n",
		quantity.Watts(a.InputW), quantity.Watts(a.LoadW), quantity.Watts(a.LossW), efficiencyText(a))
	fmt.Fprintf(s.out, "  check   the period closes within %s after %d periods\n", quantity.Volts(a.ResidualV), a.Periods)
	if a.Note != "" {
		fmt.Fprintln(s.out, "  note   ", a.Note)
	}
}

// solvedTable is the same as one row for a pipe.
func solvedTable(a ladder.Steady) table {
	t := table{columns: []column{
		measure("mean", "mean_v", quantity.Voltage), measure("least", "min_v", quantity.Voltage),
		measure("greatest", "max_v", quantity.Voltage), measure("ripple", "ripple_v", quantity.Voltage),
		measure("load", "load_a", quantity.Current), measure("load power", "load_w", quantity.Power),
		measure("input", "input_w", quantity.Power), measure("loss", "loss_w", quantity.Power),
		measure("residual", "residual_v", quantity.Voltage), words("note", "note"),
	}}
	t.add(a.MeanV, a.MinV, a.MaxV, a.RippleV, a.LoadA, a.LoadW, a.InputW, a.LossW, a.ResidualV, a.Note)
	return t
}

func stageCount(n int) string {
	if n == 1 {
		return "1 stage"
	}
	return fmt.Sprintf("%d stages", n)
}

// efficiency is the load's share of the input; ok is false without a load.
func efficiency(a ladder.Steady) (share float64, ok bool) {
	share = a.LoadW / a.InputW
	return share, a.LoadW > 0 && !math.IsInf(share, 0) && !math.IsNaN(share)
}

func efficiencyText(a ladder.Steady) string {
	if share, ok := efficiency(a); ok {
		return fmt.Sprintf(", efficiency %s", quantity.Ratio(share))
	}
	return ""
}

func capacitorTable(a ladder.Steady) table {
	t := table{columns: []column{
		words("capacitor", "capacitor"),
		measure("mean", "mean_v", quantity.Voltage), measure("greatest", "max_v", quantity.Voltage),
		measure("least", "min_v", quantity.Voltage).optional(2),
		measure("ripple current, rms", "rms_a", quantity.Current),
		measure("loss", "loss_w", quantity.Power).optional(1),
	}}
	for _, k := range a.Capacitors {
		t.add(k.Ref, k.MeanV, k.MaxV, k.MinV, k.RMSA, k.LossW)
	}
	return t
}

func diodeTable(a ladder.Steady) table {
	t := table{columns: []column{
		words("diode", "diode"),
		measure("inverse", "inverse_v", quantity.Voltage), measure("average", "average_a", quantity.Current),
		measure("peak", "peak_a", quantity.Current), measure("rms", "rms_a", quantity.Current),
		measure("loss", "loss_w", quantity.Power).optional(1),
	}}
	for _, d := range a.Diodes {
		t.add(d.Ref, d.InverseV, d.AverageA, d.PeakA, d.RMSA, d.LossW)
	}
	return t
}

func sourceTable(a ladder.Steady) table {
	t := table{columns: []column{
		words("winding", "winding_end"),
		measure("rms", "rms_a", quantity.Current), measure("peak", "peak_a", quantity.Current),
		measure("power", "power_w", quantity.Power), measure("apparent", "apparent_va", quantity.ApparentPower),
		measure("loss", "loss_w", quantity.Power).optional(1),
	}}
	for i, e := range a.Source {
		t.add(fmt.Sprintf("end %d", i+1), e.RMSA, e.PeakA, e.PowerW, e.ApparentVA, e.LossW)
	}
	return t
}
