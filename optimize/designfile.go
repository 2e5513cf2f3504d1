package optimize

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"math"
	"strings"

	"rungwright/catalog"
	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// designForm is the version of the design file.
const designForm = 1

// Encode is the design file: the wishes, the parts with their positions, and
// the hashes of what they were chosen from, so that a colleague can repeat the
// answer. Results and cautions are for the reader's eye: ReadDesign simulates
// again. The same design gives the same bytes.
func (d *Design) Encode() ([]byte, error) {
	if err := d.Plan.complete(); err != nil {
		return nil, fmt.Errorf("the design cannot be written: %w", err)
	}
	doc := form.NewMap().
		Comment("High voltage can kill: read the cautions below. Local codes and licensed practice come first.\n"+
			"Commands that read this file go by wanted and choice and simulate again; the rest is for the reader.").
		Set("design", d.Supply.Name).
		Set("form", designForm).
		Set("cautions", d.cautionsForm()).
		Set("wanted", d.Supply.form()).
		Set("choice", d.Plan.form()).
		Set("results", d.resultsForm()).
		Set("certificate", d.Certificate.form(d.covers())).
		Set("runners_up", d.runnersForm()).
		Set("inputs", d.inputsForm())
	return doc.Bytes(), nil
}

// covers is a hash of what a certificate was given for: wishes, choice and
// inputs. A file in which one of them was changed afterwards has lost its
// proof.
func (d *Design) covers() string {
	text := form.NewMap().Set("wanted", d.Supply.form()).Set("choice", d.Plan.form()).Set("inputs", d.inputsForm()).Bytes()
	sum := sha256.Sum256(text)
	return hex.EncodeToString(sum[:])
}

func (d *Design) cautionsForm() form.List {
	var l form.List
	for _, c := range d.Cautions {
		l = append(l, form.NewMap().Set("title", c.Title).Set("text", c.Text).Set("source", c.Source))
	}
	return l
}

// form is the choice: each part with the positions that it fills.
func (p *Plan) form() *form.Doc {
	var parts form.List
	for _, x := range p.placings() {
		one := form.NewMap().Set("part", x.group.Part.Number).Set("maker", x.group.Part.Maker).
			Set("for", string(x.role)).Set("at", words(x.refs))
		if x.group.Series > 1 {
			one.Set("series", x.group.Series)
		}
		if x.group.Parallel > 1 {
			one.Set("parallel", x.group.Parallel)
		}
		parts = append(parts, one)
	}
	return form.NewMap().Set("topology", string(p.Topology)).Set("stages", p.Stages).Set("parts", parts)
}

func (d *Design) resultsForm() *form.Doc {
	r := form.NewMap().
		Set("unit_cost", d.UnitCost.String()+" "+d.Currency).
		Set("build_cost", d.BuildCost.String()+" "+d.Currency).
		Set("stored_energy", written(quantity.Joules(d.StoredJ).String()))
	targets, stresses := form.NewMap(), form.NewMap()
	once := named{}
	for _, t := range d.Targets {
		targets.Set(once.name(t.Name), form.NewMap().Flow().Set("wanted", t.Wanted).Set("got", shown(t.Got, t.Unit)).
			Set("met", t.Met).Set("corner", t.Corner))
	}
	for _, s := range d.Stresses {
		stresses.Set(once.name(s.Ref+" "+s.Quantity), form.NewMap().Flow().Set("value", quantity.Format(s.Value, s.Unit, 4)).
			Set("limit", quantity.Format(s.Limit, s.Unit, 4)).Set("used", quantity.Format(s.Ratio, quantity.Proportion, 3)).Set("corner", s.Corner))
	}
	return r.Set("targets", targets).Set("stresses", stresses)
}

// named keeps keys apart, which must differ within a mapping.
type named map[string]int

func (n named) name(key string) string {
	n[key]++
	if n[key] > 1 {
		return fmt.Sprintf("%s, %d", key, n[key])
	}
	return key
}

// shown prints a number in the unit that a target names, in four digits.
func shown(v float64, unit string) string {
	if math.IsInf(v, 0) || math.IsNaN(v) {
		return "none"
	}
	for d := quantity.None; d <= quantity.SlewRate; d++ {
		if d.Unit() == unit {
			return quantity.Format(v, d, 4)
		}
	}
	if unit == "1" {
		return quantity.Format(v, quantity.Proportion, 4)
	}
	return strings.TrimSpace(quantity.Format(v, quantity.None, 4) + " " + unit)
}

func (c Certificate) form(covers string) *form.Doc {
	return form.NewMap().Set("proved", c.Proved).Set("covers", covers).Set("text", words(c.Text))
}

func (d *Design) runnersForm() form.List {
	var l form.List
	for _, r := range d.RunnersUp {
		one := form.NewMap().Set("design", r.Summary).Set("unit_cost", r.UnitCost.String()+" "+d.Currency)
		putText(one, "note", r.Note)
		l = append(l, one)
	}
	return l
}

func (d *Design) inputsForm() form.List {
	var l form.List
	for _, in := range d.Inputs {
		l = append(l, inputForm(in))
	}
	return l
}

func inputForm(in catalog.Input) *form.Doc {
	one := form.NewMap()
	putText(one, "file", in.Name)
	putText(one, "sha256", in.SHA256)
	return one
}
