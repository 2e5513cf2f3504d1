package report

import (
	"bytes"
	"fmt"
	"time"

	"github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize"
	"rungwright/optimize/ladder"
)

// Options of a report; the zero value is ready to use.
type Options struct {
	Made    time.Time // printed at the foot; zero: left out
	Program string    // name and version; empty: rungwright
}

// Extras are studies of the design that a report shows when it has them. Each
// is optional: a section without data is left out.
type Extras struct {
	Regulation *ladder.Regulation
	Nominal    *ladder.Steady     // at full load and nominal line, with its waves
	Waves      *ladder.Waves      // one period at full load; nil: that of Nominal
	StartUp    *ladder.StartUp    // nil: the design's own
	Discharge  *ladder.Discharged // from the greatest output, through the bleeder
	Front      []FrontPoint
	FrontOf    string // what FrontPoint.Other is: "ripple, peak to peak"
	FrontUnit  quantity.Dimension
	Tolerance  *Histogram
	CostCurve  []CostPoint
	Alternates []Alternate
}

// FrontPoint is a design that none beats in both cost and the other measure.
type FrontPoint struct {
	Name   string // its summary
	Cost   decimal.Decimal
	Other  float64 // SI
	Chosen bool
	Note   string
}

// Histogram is how often trials with parts drawn within their tolerances gave
// which value. Counts[i] lies from Edges[i] to Edges[i+1].
type Histogram struct {
	Of      string // "output at full load, low line"
	Unit    quantity.Dimension
	Edges   []float64
	Counts  []int
	Least   float64 // the window; zero: none
	Most    float64
	Outside int // trials outside it
	Seed    uint64
	Note    string
}

// CostPoint is the cost of a unit at a build quantity.
type CostPoint struct {
	Units    int
	UnitCost decimal.Decimal
}

// Alternate is another part that could stand in a line.
type Alternate struct {
	For    string // part number in the design
	Part   *catalog.Part
	Effect string // "output 12 V lower, 4 % dearer"
	Note   string
}

// HTML is the report: one document that holds its style, script, drawings and
// plots, and fetches nothing. The error is one of drawing, or the topology
// that cannot be drawn.
func HTML(d *optimize.Design, e Extras, o Options) ([]byte, error) {
	s := &subject{d: d, e: e}
	page := page{Title: d.Supply.Name, Style: styleElement, Script: scriptElement, Policy: policy(), Program: o.Program}
	if page.Title == "" {
		page.Title = stagesOf(d.Topology, d.Stages) + " supply"
	}
	if page.Program == "" {
		page.Program = "rungwright"
	}
	if !o.Made.IsZero() {
		page.Made = o.Made.Format("2 January 2006")
	}
	page.Answer = s.answer()
	for _, k := range sections {
		body, err := k.write(s)
		if err != nil {
			return nil, fmt.Errorf("section %s: %w", k.id, err)
		}
		if body != "" {
			page.Sections = append(page.Sections, section{k.id, k.title, body})
		}
	}
	var b bytes.Buffer
	if err := templates.ExecuteTemplate(&b, "page", page); err != nil {
		return nil, fmt.Errorf("writing the report: %w", err)
	}
	return []byte(neutral(b.String())), nil
}
