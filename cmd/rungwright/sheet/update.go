package sheet

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"rungwright/catalog"
	"rungwright/catalog/form"
)

// Change is one thing in which a new import differs from the catalog.
type Change struct {
	Part      string
	Supplier  string // empty when the part as a whole is meant
	OrderCode string
	What      string // "new part", "new offer", "not listed any more", "stock", "prices", …
	Old, New  string // as a catalog writes them; empty where there is none
}

// File is a catalog file with its bytes.
type File struct {
	Name string
	Data []byte
}

// Update brings the stock, prices and terms of an import into catalog files
// that are there already; new parts go to the end of the last. Everything
// else of the files stays: other keys of the parts, parts and offers that the
// import does not know. The changes are in the order of part number, then
// supplier. The new files keep no comments; lost names those that had some.
// Errors are form.Problems of the old files.
func Update(old []File, im *Import) (updated []File, changes []Change, lost []string, err error) {
	u := &updater{fresh: map[string]*record{}, known: map[string]bool{}}
	for _, r := range im.records {
		u.fresh[r.number] = r
	}
	for i, f := range old {
		data, err := u.file(f, im, i == len(old)-1)
		if err != nil {
			return nil, nil, nil, err
		}
		updated = append(updated, File{f.Name, data})
		if hasComments(f.Data) {
			lost = append(lost, f.Name)
		}
	}
	slices.SortStableFunc(u.changes, func(a, b Change) int {
		return cmp.Or(cmp.Compare(a.Part, b.Part), cmp.Compare(a.Supplier, b.Supplier), cmp.Compare(a.OrderCode, b.OrderCode))
	})
	return updated, u.changes, lost, nil
}

type updater struct {
	fresh   map[string]*record
	known   map[string]bool // part numbers of the old files
	changes []Change
}

// file is an old file, updated, with the new parts when it is the last.
func (u *updater) file(f File, im *Import, last bool) ([]byte, error) {
	if _, err := catalog.ReadBytes(f.Name, f.Data); err != nil {
		return nil, err
	}
	var report form.Report
	top := form.Parse(f.Name, f.Data, &report)
	if top == nil {
		return nil, report.Err()
	}
	doc := form.NewMap()
	for _, key := range top.Keys() {
		if key != "parts" {
			doc.Set(key, plainValueOf(top, key))
		}
	}
	parts := u.parts(top.Maps("parts"))
	if last {
		parts = append(parts, u.newParts(im)...)
	}
	if len(parts) > partsPerFile {
		return nil, refusal(Place{File: f.Name}, "the file would hold %d parts; %d are the most; split it, or import into new files", len(parts), partsPerFile)
	}
	return doc.Set("parts", parts).Bytes(), nil
}

// parts are those of an old file, updated.
func (u *updater) parts(old []*form.Map) form.List {
	list := form.List{}
	for _, m := range old {
		number := m.Text("part")
		u.known[number] = true
		if r := u.fresh[number]; r != nil {
			list = append(list, u.part(m, r))
			continue
		}
		u.changes = append(u.changes, Change{Part: number, What: "not listed any more"})
		list = append(list, copyDoc(m))
	}
	return list
}

// newParts are those that no old file has.
func (u *updater) newParts(im *Import) form.List {
	var list form.List
	for _, r := range im.records {
		if !u.known[r.number] {
			u.changes = append(u.changes, Change{Part: r.number, What: "new part"})
			list = append(list, r.doc())
		}
	}
	return list
}

// part copies the keys of a part and updates its offers.
func (u *updater) part(m *form.Map, r *record) *form.Doc {
	doc := form.NewMap()
	for _, key := range m.Keys() {
		if key != "offers" {
			doc.Set(key, plainValueOf(m, key))
		}
	}
	var offers form.List
	used := map[string]bool{}
	for _, o := range m.Maps("offers") {
		name := offerName(o)
		i := slices.IndexFunc(r.offers, func(n *offerRecord) bool { return n.key() == name })
		if i < 0 || used[name] {
			offers = append(offers, copyDoc(o))
			continue
		}
		used[name] = true
		offers = append(offers, u.offer(r.number, o, r.offers[i]))
	}
	for _, o := range r.offers {
		if !used[o.key()] {
			u.changes = append(u.changes, Change{Part: r.number, Supplier: o.text("supplier"), OrderCode: o.text("order_code"), What: "new offer", New: o.pricesText()})
			offers = append(offers, o.doc())
		}
	}
	return doc.Set("offers", offers)
}

// offer takes over what the import says of an offer and keeps the rest.
func (u *updater) offer(number string, m *form.Map, o *offerRecord) *form.Doc {
	doc := form.NewMap()
	change := func(what, old, fresh string) {
		u.changes = append(u.changes, Change{number, o.text("supplier"), o.text("order_code"), what, old, fresh})
	}
	for _, key := range m.Keys() {
		fresh := o.text(key)
		switch {
		case key == "prices":
			if before := readPoints(m); !slices.EqualFunc(before, o.sorted(), samePoint) {
				change("prices", pointsText(before), o.pricesText())
			}
			doc.Set(key, o.priceList())
		case fresh == "":
			doc.Set(key, plainValueOf(m, key))
		default:
			if before := m.Text(key); before != fresh {
				change(key, before, fresh)
			}
			doc.Set(key, o.value(key))
		}
	}
	for _, f := range o.fields {
		if !m.Has(f.key) {
			change(f.key, "", text(f.value))
			doc.Set(f.key, f.value)
		}
	}
	return doc
}

func offerName(m *form.Map) string { return m.Text("supplier") + "\n" + m.Text("order_code") }

func (o *offerRecord) key() string { return o.text("supplier") + "\n" + o.text("order_code") }

func (o *offerRecord) value(key string) any {
	for _, f := range o.fields {
		if f.key == key {
			return f.value
		}
	}
	return nil
}

func (o *offerRecord) text(key string) string { return text(o.value(key)) }

// readPoints are an offer's price breaks as written.
func readPoints(m *form.Map) []pricePoint {
	var points []pricePoint
	for _, i := range m.List("prices") {
		if pair := i.Items(); len(pair) == 2 {
			points = append(points, pricePoint{pair[0].Int(1, 1<<30, 0), pair[1].Text()})
		}
	}
	return points
}

func samePoint(a, b pricePoint) bool { return a.quantity == b.quantity && samePrice(a.price, b.price) }

func (o *offerRecord) pricesText() string { return pointsText(o.sorted()) }

func pointsText(points []pricePoint) string {
	var out []string
	for _, p := range points {
		out = append(out, fmt.Sprintf("%d: %s", p.quantity, p.price))
	}
	return strings.Join(out, ", ")
}
