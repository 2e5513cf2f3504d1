package catalog

import (
	"cmp"
	"slices"
	"strings"
	"unicode"

	"rungwright/catalog/form"
)

// checkParts indexes the parts and reports numbers used twice.
func (c *Catalog) checkParts(r *form.Report) {
	for _, p := range c.Parts {
		if p.Number == "" {
			continue // reported
		}
		key := numberKey(p.Number)
		before, twice := c.index[key]
		switch {
		case !twice:
			c.index[key] = p
		case before.Maker == p.Maker && before.Number == p.Number:
			r.Add(p.Place, "the part %q of %s is given already at %v; remove one of the two", p.Number, p.Maker, before.Place)
		default:
			r.Add(p.Place, "the part number %q is taken already by %q of %s at %v; numbers must differ in more than spaces and letter case",
				p.Number, before.Number, before.Maker, before.Place)
		}
	}
}

// checkSuppliers reports suppliers given twice and offers by suppliers that
// are not given although others are, or in another currency than theirs.
func (c *Catalog) checkSuppliers(r *form.Report) {
	known := map[string]Supplier{}
	var names []string
	for _, s := range c.Suppliers {
		if before, twice := known[s.Name]; twice {
			r.Add(s.Place, "the supplier %q is given already at %v; remove one of the two", s.Name, before.Place)
			continue
		}
		known[s.Name] = s
		names = append(names, s.Name)
	}
	if len(known) == 0 {
		return
	}
	for _, p := range c.Parts {
		for _, o := range p.Offers {
			if s, ok := known[o.Supplier]; ok {
				s.checkCurrency(o, r)
			} else if o.Supplier != "" {
				r.Add(o.Place, "offers: %s", form.Unknown("supplier", o.Supplier, names))
			}
		}
	}
}

func (s Supplier) checkCurrency(o Offer, r *form.Report) {
	if len(o.Prices) > 0 && s.Currency != "" && o.Prices[0].Price.Currency != s.Currency {
		r.Add(o.Place, "offers: the prices are in %s, but %s sells in %s; mend one of the two",
			o.Prices[0].Price.Currency, s.Name, s.Currency)
	}
}

// numberKey is a part number without what people vary: spaces and letter case.
func numberKey(number string) string {
	return strings.Map(func(r rune) rune {
		if unicode.IsSpace(r) {
			return -1
		}
		return unicode.ToUpper(r)
	}, number)
}

// Find returns the part of that number, or nil. Spaces and letter case do not
// matter.
func (c *Catalog) Find(number string) *Part {
	key := numberKey(number)
	if c.index != nil {
		return c.index[key]
	}
	for _, p := range c.Parts {
		if numberKey(p.Number) == key {
			return p
		}
	}
	return nil
}

// Near lists at most n parts whose numbers a person may have meant, fewest
// slips first, then by number.
func (c *Catalog) Near(number string, n int) []*Part {
	type candidate struct {
		part  *Part
		slips int
	}
	key := numberKey(number)
	if len(key) > mostName {
		return nil
	}
	var near []candidate
	for _, p := range c.Parts {
		if slips := form.Slips(key, numberKey(p.Number)); slips <= max(1, len(key)/3) {
			near = append(near, candidate{p, slips})
		}
	}
	slices.SortStableFunc(near, func(a, b candidate) int {
		return cmp.Or(cmp.Compare(a.slips, b.slips), cmp.Compare(a.part.Number, b.part.Number))
	})
	var parts []*Part
	for _, c := range near[:min(n, len(near))] {
		parts = append(parts, c.part)
	}
	return parts
}

// Title is a line that tells a buyer what the part is, made from its data:
// "10 nF ±10 % 3 kV X7R ceramic class 2".
func (p *Part) Title() string {
	for _, k := range kinds {
		if k.kind == p.Kind {
			return k.title(p)
		}
	}
	return p.Number
}
