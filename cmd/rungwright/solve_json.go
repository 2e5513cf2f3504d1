package main

import (
	"rungwright/optimize/ladder"
	"rungwright/ratings"
)

// solvedDocument is what solve prints as JSON; every key carries its unit.
type solvedDocument struct {
	Topology   string               `json:"topology"`
	Stages     int                  `json:"stages"`
	Output     outputDocument       `json:"output"`
	Capacitors []capacitorDocument  `json:"capacitors"`
	Diodes     []diodeDocument      `json:"diodes"`
	Source     []sourceDocument     `json:"source"`
	InputW     number               `json:"input_w"`
	LossW      number               `json:"loss_w"`
	Efficiency *number              `json:"efficiency"` // null without a load
	ResidualV  number               `json:"residual_v"` // how far the period fails to close
	Periods    int                  `json:"periods"`
	Note       string               `json:"note,omitempty"`
	Regulation []regulationDocument `json:"regulation,omitempty"`
	Cautions   []cautionDocument    `json:"cautions"`
}

type outputDocument struct {
	MeanV   number `json:"mean_v"`
	MinV    number `json:"min_v"`
	MaxV    number `json:"max_v"`
	RippleV number `json:"ripple_v"` // peak to peak
	LoadA   number `json:"load_a"`
	LoadW   number `json:"load_w"`
}

type capacitorDocument struct {
	Ref   string `json:"ref"`
	MeanV number `json:"mean_v"`
	MaxV  number `json:"max_v"`
	MinV  number `json:"min_v"`
	RMSA  number `json:"rms_a"`
	LossW number `json:"loss_w"`
}

type diodeDocument struct {
	Ref      string `json:"ref"`
	InverseV number `json:"inverse_v"`
	AverageA number `json:"average_a"`
	PeakA    number `json:"peak_a"`
	RMSA     number `json:"rms_a"`
	LossW    number `json:"loss_w"`
}

type sourceDocument struct {
	RMSA       number `json:"rms_a"`
	PeakA      number `json:"peak_a"`
	PowerW     number `json:"power_w"`
	ApparentVA number `json:"apparent_va"`
	LossW      number `json:"loss_w"`
}

type cautionDocument struct {
	Code   string `json:"code"`
	Title  string `json:"title"`
	Text   string `json:"text"`
	Source string `json:"source"`
}

func solvedJSON(c ladder.Circuit, a ladder.Steady, curve ladder.Regulation) solvedDocument {
	d := solvedDocument{
		Topology: string(c.Topology), Stages: c.Stages,
		Output: outputDocument{number(a.MeanV), number(a.MinV), number(a.MaxV),
			number(a.RippleV), number(a.LoadA), number(a.LoadW)},
		InputW: number(a.InputW), LossW: number(a.LossW),
		ResidualV: number(a.ResidualV), Periods: a.Periods, Note: a.Note,
		Regulation: regulationJSON(curve), Cautions: cautionsJSON(circuitCautions(c, a)),
	}
	if share, ok := efficiency(a); ok {
		d.Efficiency = new(number(share))
	}
	for _, k := range a.Capacitors {
		d.Capacitors = append(d.Capacitors, capacitorDocument{k.Ref, number(k.MeanV), number(k.MaxV),
			number(k.MinV), number(k.RMSA), number(k.LossW)})
	}
	for _, k := range a.Diodes {
		d.Diodes = append(d.Diodes, diodeDocument{k.Ref, number(k.InverseV), number(k.AverageA),
			number(k.PeakA), number(k.RMSA), number(k.LossW)})
	}
	for _, e := range a.Source {
		d.Source = append(d.Source, sourceDocument{number(e.RMSA), number(e.PeakA), number(e.PowerW),
			number(e.ApparentVA), number(e.LossW)})
	}
	return d
}

func cautionsJSON(cautions []ratings.Caution) []cautionDocument {
	out := []cautionDocument{}
	for _, c := range cautions {
		out = append(out, cautionDocument{c.Code, c.Title, c.Text, c.Source})
	}
	return out
}
