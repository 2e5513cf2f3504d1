package optimize

import (
	"context"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"rungwright/catalog"
	"rungwright/catalog/form"
	"rungwright/optimize/ladder"
)

// designLimits are ample for the largest design with its certificate.
var designLimits = form.Limits{Bytes: 4 << 20, Nodes: 200_000, Depth: 12}

// ReadDesign reads a design file and judges the design afresh: what the file
// says of results is compared, never trusted. A proof is kept only when
// wishes, choice and inputs are those that it was given for. Mistakes come
// back at once as form.Problems.
func ReadDesign(file string, data []byte, c *catalog.Catalog) (*Design, error) {
	return ReadDesignContext(context.Background(), file, data, c)
}

// ReadDesignContext is ReadDesign that can be stopped.
func ReadDesignContext(ctx context.Context, file string, data []byte, c *catalog.Catalog) (*Design, error) {
	var r form.Report
	top := form.ParseWithin(file, data, designLimits, &r)
	w := readDesignForm(top, c)
	if err := r.Err(); err != nil {
		return nil, err
	}
	d, err := Evaluate(ctx, w.supply, w.plan, c, nil)
	if err != nil {
		if ctx.Err() != nil {
			return nil, ctx.Err()
		}
		top.Problem("wanted", "%v", err)
		return nil, r.Err()
	}
	w.compare(d, c)
	return d, nil
}

// designFile is what a design file holds.
type designFile struct {
	supply      Supply
	plan        Plan
	certificate Certificate
	covers      string
	runners     []RunnerUp
	inputs      []catalog.Input
	results     map[string]string // what each target got, as written
	unitCost    string
}

func readDesignForm(top *form.Map, c *catalog.Catalog) designFile {
	var w designFile
	if top == nil {
		return w
	}
	if !top.Has("design") {
		top.Problem("", "this is no design file, which has the key design%s", otherForm(top))
		return w
	}
	top.Text("design")
	top.Require("form", "wanted", "choice")
	if top.Int("form", designForm, designForm, 0) == designForm {
		wanted := top.Map("wanted")
		w.supply = readSupply(wanted)
		wanted.Done()
		w.plan = readPlan(top.Map("choice"), c)
	}
	w.readRest(top)
	top.Done()
	return w
}

// otherForm names the kind of file that was given for a design.
func otherForm(top *form.Map) string {
	for _, key := range []string{"supply", "circuit", "parts", "policy"} {
		if top.Has(key) {
			return "; it looks like a " + strings.Replace(key, "parts", "catalog", 1) + " file"
		}
	}
	return ""
}

// readRest reads what is compared or shown.
func (w *designFile) readRest(top *form.Map) {
	top.Has("cautions") // made again from the simulation
	w.results = map[string]string{}
	if m := top.Map("results"); m != nil {
		w.unitCost = m.Text("unit_cost")
		targets := m.Map("targets")
		for _, name := range targets.Keys() {
			w.results[name] = targets.Map(name).Text("got")
		}
	}
	if m := top.Map("certificate"); m != nil {
		w.certificate.Proved, w.covers = m.Bool("proved"), m.Text("covers")
		for _, i := range m.List("text") {
			w.certificate.Text = append(w.certificate.Text, i.Text())
		}
		m.Done()
	}
	for _, m := range top.Maps("runners_up") {
		cost := m.Money("unit_cost")
		w.runners = append(w.runners, RunnerUp{Summary: m.Text("design"), UnitCost: cost.Amount, Note: m.Text("note")})
		m.Done()
	}
	for _, m := range top.Maps("inputs") {
		w.inputs = append(w.inputs, catalog.Input{Name: m.Text("file"), SHA256: m.Text("sha256")})
		m.Done()
	}
	if len(w.inputs) > 0 {
		w.supply.Input = w.inputs[0]
	}
}

// readPlan reads the choice. Every position must be filled once.
func readPlan(m *form.Map, c *catalog.Catalog) Plan {
	m.Require("topology", "stages", "parts")
	defer m.Done()
	p := Plan{Topology: ladder.Topology(m.Choice("topology", topologyWords()...))}
	if !p.Topology.Known() {
		return p
	}
	p.Stages = m.Int("stages", 1, p.Topology.MaxStages(), 0)
	if p.Stages == 0 {
		return p
	}
	r := planReader{catalog: c, plan: &p, filled: map[string]bool{}}
	p.Capacitors = make([]Group, p.Topology.CapacitorCount(p.Stages))
	p.Diodes = make([]Group, p.Topology.DiodeCount(p.Stages))
	for _, one := range m.Maps("parts") {
		r.part(one)
	}
	r.missing(m)
	return p
}

// planReader puts the parts of a choice in their positions.
type planReader struct {
	catalog *catalog.Catalog
	plan    *Plan
	filled  map[string]bool
}

func (r *planReader) part(m *form.Map) {
	m.Require("part", "for", "at")
	number, maker := m.Text("part"), m.Text("maker")
	role := Role(m.Choice("for", string(RoleCoupling), string(RoleSmoothing), string(RoleLadder), string(RoleRectifier),
		string(RoleBleeder), string(RoleSurge)))
	g := Group{Part: r.catalog.Find(number), Series: m.Int("series", 1, 1000, 1), Parallel: m.Int("parallel", 1, 1000, 1)}
	if number != "" && g.Part == nil {
		m.Problem("part", "%q is not in the catalog%s", number, nearText(r.catalog, number))
	}
	if g.Part != nil && maker != "" && maker != g.Part.Maker {
		m.Problem("maker", "%s is made by %s in the catalog, not by %s; check which is meant", g.Part.Number, g.Part.Maker, maker)
	}
	for _, at := range m.List("at") {
		r.place(at, role, g)
	}
	m.Done()
}

// kindOf is the kind of part that a role takes.
func (role Role) kind() catalog.Kind {
	switch role {
	case RoleRectifier:
		return catalog.KindDiode
	case RoleBleeder, RoleSurge, RoleBalance:
		return catalog.KindResistor
	}
	return catalog.KindCapacitor
}

// place fills one position.
func (r *planReader) place(at form.Item, role Role, g Group) {
	ref := at.Text()
	if role == "" || g.Part == nil || ref == "" {
		return // reported
	}
	if r.filled[ref] {
		at.Problem("the position %s is filled twice; keep one", ref)
		return
	}
	r.filled[ref] = true
	if kind := role.kind(); g.Part.Kind != kind {
		at.Problem("%s is a %s, but a %s takes a %s", g.Part.Number, g.Part.Kind, role, kind)
		return
	}
	if to := r.position(ref, role); to != nil {
		*to = g
		return
	}
	at.Problem("%s is no position of a %s in a %s ladder of %d stages", ref, role, r.plan.Topology, r.plan.Stages)
}

// position is where a reference points to; nil when there is no such place.
func (r *planReader) position(ref string, role Role) *Group {
	letters := strings.TrimRight(ref, "0123456789")
	n, err := strconv.Atoi(ref[len(letters):])
	if err != nil || n < 1 || ref != letters+strconv.Itoa(n) {
		return nil
	}
	p := r.plan
	switch {
	case role == RoleBleeder && letters == "R":
		return &p.Bleeder
	case role == RoleSurge && letters == "R":
		return &p.Surge
	case role == RoleRectifier && letters == "D" && n <= len(p.Diodes):
		return &p.Diodes[n-1]
	case role.kind() == catalog.KindCapacitor && letters == "C" && n <= len(p.Capacitors):
		return &p.Capacitors[n-1]
	}
	return nil
}

// missing reports positions without a part.
func (r *planReader) missing(m *form.Map) {
	var empty []string
	for i, g := range r.plan.Capacitors {
		if ref := "C" + strconv.Itoa(i+1); g.Part == nil && !r.filled[ref] {
			empty = append(empty, ref)
		}
	}
	for i, g := range r.plan.Diodes {
		if ref := "D" + strconv.Itoa(i+1); g.Part == nil && !r.filled[ref] {
			empty = append(empty, ref)
		}
	}
	if len(empty) > 0 && m.Has("parts") {
		m.Problem("parts", "no part is given for %s", strings.Join(empty, ", "))
	}
}

// complete finds what keeps a plan from being a circuit.
func (p *Plan) complete() error {
	switch {
	case !p.Topology.Known():
		return fmt.Errorf("topology %q is not known", p.Topology)
	case p.Stages < 1 || p.Stages > p.Topology.MaxStages():
		return fmt.Errorf("%s may have 1 to %d stages, not %d", p.Topology, p.Topology.MaxStages(), p.Stages)
	case len(p.Capacitors) != p.Topology.CapacitorCount(p.Stages) || len(p.Diodes) != p.Topology.DiodeCount(p.Stages):
		return fmt.Errorf("%s of %d stages has other positions than are filled", p.Topology, p.Stages)
	}
	for _, g := range slices.Concat(p.Capacitors, p.Diodes) {
		if g.Part == nil || g.Series < 1 || g.Parallel < 1 {
			return fmt.Errorf("a position has no part")
		}
	}
	return nil
}

// compare keeps the proof where it still holds and notes what has changed
// since the file was written.
func (w *designFile) compare(d *Design, c *catalog.Catalog) {
	d.Notes = append(d.Notes, changedInputs(w.inputs, d.Inputs)...)
	now := *d
	now.Inputs = w.inputs
	if w.covers == now.covers() && len(d.Notes) == 0 {
		d.Certificate, d.RunnersUp = w.certificate, w.runners
	} else if w.covers != "" {
		d.Notes = append(d.Notes, "what the proof was given for has changed since: run the search again for a new one")
	}
	for _, t := range d.Targets {
		if was, is := w.results[t.Name], shown(t.Got, t.Unit); was != "" && was != is {
			d.Notes = append(d.Notes, fmt.Sprintf("%s was %s when the file was written and is %s now", t.Name, was, is))
		}
	}
	if is := d.UnitCost.String() + " " + d.Currency; w.unitCost != "" && w.unitCost != is {
		d.Notes = append(d.Notes, fmt.Sprintf("a unit cost %s when the file was written and costs %s now", w.unitCost, is))
	}
}

// changedInputs tells which files differ from those that a design was made
// of, whatever they are called. The supply's own file need not be there.
func changedInputs(were, are []catalog.Input) []string {
	var notes []string
	rest := func(l []catalog.Input) []catalog.Input { return l[min(1, len(l)):] }
	same := func(l []catalog.Input, in catalog.Input) bool {
		return slices.ContainsFunc(l, func(x catalog.Input) bool { return x.SHA256 == in.SHA256 })
	}
	called := func(l []catalog.Input, in catalog.Input) bool {
		return slices.ContainsFunc(l, func(x catalog.Input) bool { return x.Name == in.Name })
	}
	for _, in := range rest(were) {
		switch {
		case same(rest(are), in):
		case called(rest(are), in):
			notes = append(notes, in.Name+" has changed since the design was chosen")
		default:
			notes = append(notes, in.Name+", from which the design was chosen, was not read")
		}
	}
	for _, in := range rest(are) {
		if !same(rest(were), in) && !called(rest(were), in) {
			notes = append(notes, in.Name+" was not among what the design was chosen from")
		}
	}
	return notes
}
