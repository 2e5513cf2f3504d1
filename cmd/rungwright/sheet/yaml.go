package sheet

import "rungwright/catalog/form"

// readYAML reads the YAML form of a bill of materials:
//
//	bom:
//	  - {refs: C1-C4 C7, part: QLF-HV-103-3K, quantity: 5}
//	  - {refs: [D1, D2], part: TVD-2K2-F, maker: Tarnvale, fitted: false}
//
// The keys are refs (text or a list), part, quantity, maker, value,
// description, position and fitted; part alone must be there, and that only
// when fitted.
func readYAML(name string, data []byte, o *Options) (*BOM, error) {
	var report form.Report
	top := form.Parse(name, data, &report)
	if top == nil {
		return nil, report.Err()
	}
	top.Text("title")
	top.Require("bom")
	r := yamlRows{doubts: &doubts{}, o: o}
	for _, m := range top.Maps("bom") {
		r.row(m)
	}
	top.Done()
	b := &BOM{File: name}
	if top.Has("bom") {
		b.finish(r.out, o, r.doubts)
	}
	if err, ok := report.Err().(form.Problems); ok {
		for _, p := range err {
			r.doubts.wrong(fromForm(p.Place), "", "%s", p.Text)
		}
	}
	b.Doubts = r.doubts.sorted()
	return b, problems(b.Doubts)
}

type yamlRows struct {
	doubts *doubts
	o      *Options
	out    []draft
}

func (r *yamlRows) row(m *form.Map) {
	w := draft{refsAt: fromForm(m.PlaceOf("refs")), partAt: fromForm(m.PlaceOf("part")), quantityAt: fromForm(m.PlaceOf("quantity")), valueAt: fromForm(m.PlaceOf("value"))}
	w.Part, w.Maker, w.Value, w.Description = m.Text("part"), m.Text("maker"), m.Text("value"), m.Text("description")
	w.Fitted = !m.Has("fitted") || m.Bool("fitted")
	w.Place = w.partAt
	if w.Fitted {
		m.Require("part")
	}
	w.Refs, w.doubtful = r.refs(m, "refs")
	w.Quantity = len(w.Refs)
	if m.Has("quantity") {
		w.Quantity, w.hasQuantity = m.Int("quantity", 0, maxQuantity, len(w.Refs)), true
	}
	if w.Quantity == 0 && w.Fitted && !w.doubtful {
		m.Problem("quantity", "no designator and no quantity is given; write refs, or how many one unit needs")
	}
	w.Positions, _ = r.refs(m, "position")
	if n := len(w.Positions); n > 0 && n != len(w.Refs) && !w.doubtful {
		m.Problem("position", "%d circuit positions are given for %d designators; give one for each", n, len(w.Refs))
	}
	m.Done()
	r.out = append(r.out, w)
}

// refs reads designators, in one text or a list of such.
func (r *yamlRows) refs(m *form.Map, name string) (refs []string, bad bool) {
	for _, item := range m.List(name) {
		if !item.IsText() {
			item.Problem("this is no text; write designators such as C1-C4, C7")
			bad = true
			continue
		}
		text := item.Text()
		found, errs := ParseDesignators(text)
		for _, err := range errs {
			r.doubts.wrong(fromForm(item.Place), text, "%s: %v", name, err)
			bad = true
		}
		refs = append(refs, found...)
	}
	return refs, bad
}
