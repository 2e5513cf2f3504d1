package main

import (
	"github.com/shopspring/decimal"

	"rungwright/optimize"
)

// pickedDocument is what pick prints as JSON; every key carries its unit, and
// money is exact decimal text.
type pickedDocument struct {
	Found       bool                `json:"found"`
	Supply      string              `json:"supply"`
	Why         []string            `json:"why,omitempty"` // when nothing was found
	Topology    string              `json:"topology,omitempty"`
	Stages      int                 `json:"stages,omitempty"`
	UnitCost    *decimal.Decimal    `json:"unit_cost,omitempty"`
	BuildCost   *decimal.Decimal    `json:"build_cost,omitempty"`
	Currency    string              `json:"currency,omitempty"`
	Units       int                 `json:"units,omitempty"`
	StoredJ     number              `json:"stored_j"`
	Cautions    []cautionDocument   `json:"cautions"`
	Lines       []lineDocument      `json:"lines"`
	Targets     []targetDocument    `json:"targets"`
	Stresses    []stressDocument    `json:"stresses"`
	RunnersUp   []runnerUpDocument  `json:"runners_up"`
	Certificate certificateDocument `json:"certificate"`
	Inputs      []inputDocument     `json:"inputs"`
}

type lineDocument struct {
	Role      string          `json:"role"`
	Refs      []string        `json:"refs"`
	Part      string          `json:"part"`
	Maker     string          `json:"maker"`
	Title     string          `json:"title"`
	Series    int             `json:"series"`
	Parallel  int             `json:"parallel"`
	PerUnit   int             `json:"per_unit"`
	Supplier  string          `json:"supplier"`
	OrderCode string          `json:"order_code"`
	Buy       int             `json:"buy"`
	UnitPrice decimal.Decimal `json:"unit_price"`
	Cost      decimal.Decimal `json:"cost"`
}

type targetDocument struct {
	Name   string `json:"name"`
	Wanted string `json:"wanted"`
	Unit   string `json:"unit"`
	Got    number `json:"got"`
	Limit  number `json:"limit"`
	Met    bool   `json:"met"`
	Corner string `json:"corner"`
}

type stressDocument struct {
	Ref      string `json:"ref"`
	Part     string `json:"part"`
	Quantity string `json:"quantity"`
	Unit     string `json:"unit"`
	Value    number `json:"value"`
	Rating   number `json:"rating"`
	Limit    number `json:"limit"`
	Used     number `json:"used_ratio"`
	Over     bool   `json:"over"`
	Unjudged bool   `json:"unjudged"` // the note says what is missing
	Corner   string `json:"corner"`
	Rule     string `json:"rule"`
	Source   string `json:"source"`
	Note     string `json:"note,omitempty"`
}

type runnerUpDocument struct {
	Summary  string          `json:"summary"`
	UnitCost decimal.Decimal `json:"unit_cost"`
	Note     string          `json:"note,omitempty"`
}

type certificateDocument struct {
	Proved       bool     `json:"proved"`
	Combinations int64    `json:"combinations"`
	Dominated    int64    `json:"dominated"`
	Bounded      int64    `json:"bounded"`
	Estimated    int64    `json:"estimated"`
	Dearer       int64    `json:"dearer"`
	Simulated    int      `json:"simulated"`
	Guard        number   `json:"guard_ratio"`
	GuardBroken  int      `json:"guard_broken"`
	Text         []string `json:"text"`
	Rejected     string   `json:"cheapest_rejected,omitempty"`
}

type inputDocument struct {
	Name   string `json:"name"`
	SHA256 string `json:"sha256"`
}

func pickedJSON(a optimize.Answer) pickedDocument {
	d := a.Design
	doc := pickedDocument{
		Found: true, Supply: d.Supply.Name, Topology: string(d.Topology), Stages: d.Stages,
		UnitCost: &d.UnitCost, BuildCost: &d.BuildCost, Currency: d.Currency, Units: d.Supply.Build.Units,
		StoredJ: number(d.StoredJ), Cautions: cautionsJSON(d.Cautions), Certificate: certificateJSON(a.Certificate),
	}
	doc.Lines, doc.RunnersUp = []lineDocument{}, []runnerUpDocument{}
	for _, l := range d.Lines {
		doc.Lines = append(doc.Lines, lineJSON(l))
	}
	for _, t := range d.Targets {
		doc.Targets = append(doc.Targets, targetDocument{t.Name, t.Wanted, t.Unit, number(t.Got), number(t.Limit), t.Met, t.Corner})
	}
	for _, x := range d.Stresses {
		doc.Stresses = append(doc.Stresses, stressDocument{x.Ref, x.Part, x.Quantity, baseUnit(x.Unit), number(x.Value), number(x.Rating),
			number(x.Limit), number(x.Ratio), x.Over, x.Unjudged, x.Corner, x.Rule.Name, x.Rule.Source, x.Note})
	}
	for _, r := range d.RunnersUp {
		doc.RunnersUp = append(doc.RunnersUp, runnerUpDocument(r))
	}
	for _, in := range d.Inputs {
		doc.Inputs = append(doc.Inputs, inputDocument(in))
	}
	return doc
}

func lineJSON(l optimize.Line) lineDocument {
	p := l.Purchase
	doc := lineDocument{Role: string(l.Role), Refs: l.Refs, Part: l.Part.Number, Maker: l.Part.Maker, Title: l.Part.Title(),
		Series: max(1, l.Series), Parallel: max(1, l.Parallel), PerUnit: l.PerUnit(),
		Buy: p.Quantity, UnitPrice: p.UnitPrice, Cost: p.Cost}
	if p.Offer != nil {
		doc.Supplier, doc.OrderCode = p.Offer.Supplier, p.Offer.OrderCode
	}
	return doc
}

func certificateJSON(c optimize.Certificate) certificateDocument {
	return certificateDocument{c.Proved, c.Combinations, c.Dominated, c.Bounded, c.Estimated, c.Dearer, c.Simulated,
		number(c.Guard), c.GuardBroken, c.Text, c.Rejected}
}

// whyNotJSON is the document of a supply that nothing fits.
func whyNotJSON(supply optimize.Supply, a optimize.Answer) pickedDocument {
	doc := pickedDocument{Supply: supply.Name, Cautions: []cautionDocument{}, Lines: []lineDocument{}, Targets: []targetDocument{},
		Stresses: []stressDocument{}, RunnersUp: []runnerUpDocument{}, Inputs: []inputDocument{}, Certificate: certificateJSON(a.Certificate)}
	if a.Why != nil {
		doc.Why = a.Why.Text
	}
	return doc
}
