package sheet

import (
	"fmt"
	"strings"
)

// checkQuantities compares each row's quantity with its designators. Where
// they disagree the user says which counts.
func checkQuantities(rows []draft, o *Options, d *doubts) {
	for i := range rows {
		w := &rows[i]
		n := len(w.Refs)
		if !w.hasQuantity || w.doubtful || n == 0 || w.Quantity == n || !w.Fitted {
			continue
		}
		seen := itoa(w.Quantity)
		switch o.Quantity {
		case ByDesignators:
			d.note(w.quantityAt, seen, "the quantity is %d, but there are %s; the designators count, as asked", w.Quantity, countRefs(w.Refs))
			w.Quantity = n
		case ByColumn:
			d.note(w.quantityAt, seen, "the quantity is %d, but there are %s; the quantity counts, as asked", w.Quantity, countRefs(w.Refs))
		default:
			d.wrong(w.quantityAt, seen, "the quantity is %d, but there are %s; mend one of the two, or say which counts", w.Quantity, countRefs(w.Refs))
		}
	}
}

// countRefs is "4 designators (C1, C2, C3, C4)", cut when long.
func countRefs(refs []string) string {
	const most = 6
	list := strings.Join(refs[:min(len(refs), most)], ", ")
	if len(refs) > most {
		list += ", …"
	}
	if len(refs) == 1 {
		return fmt.Sprintf("1 designator (%s)", list)
	}
	return fmt.Sprintf("%d designators (%s)", len(refs), list)
}

// checkTwice finds designators that stand twice. A part that is fitted in one
// row and not in another is usual for variants, and only worth a look.
func checkTwice(rows []draft, d *doubts) {
	first := map[string]int{}
	for i := range rows {
		for _, ref := range rows[i].Refs {
			same := sameDesignator(ref)
			j, twice := first[same]
			switch {
			case !twice:
				first[same] = i
			case j == i:
				d.wrong(rows[i].refsAt, ref, "%s stands twice in this row; keep it once", ref)
			case rows[i].Fitted && rows[j].Fitted:
				d.wrong(rows[i].refsAt, ref, "%s stands in %s too; keep it in one row", ref, rows[j].refsAt.short())
			default:
				d.warn(rows[i].refsAt, ref, "%s stands in %s too; only the row that is fitted counts", ref, rows[j].refsAt.short())
				if rows[i].Fitted {
					first[same] = i
				}
			}
		}
	}
}

// checkValues finds part numbers that stand with different values.
func checkValues(rows []draft, d *doubts) {
	first := map[string]int{}
	for i := range rows {
		w := &rows[i]
		if w.Part == "" || w.Value == "" {
			continue
		}
		name := strings.ToUpper(strings.ReplaceAll(w.Part, " ", ""))
		j, before := first[name]
		if !before {
			first[name] = i
			continue
		}
		if plainValue(rows[j].Value) != plainValue(w.Value) {
			d.warn(w.valueAt, w.Value, "the part %q has the value %q here, but %q in %s; check both",
				cut(w.Part), cut(w.Value), cut(rows[j].Value), rows[j].valueAt.short())
		}
	}
}

// plainValue drops what people vary in a value: blanks and the unit's letter.
func plainValue(text string) string {
	text = strings.ReplaceAll(strings.ReplaceAll(text, " ", ""), ",", ".")
	for _, unit := range []string{"Ohm", "ohm", "OHM", "F", "\u03a9", "H", "V"} {
		text = strings.TrimSuffix(text, unit)
	}
	return text
}

// short is the place within its file: "C7" or "line 7".
func (p Place) short() string {
	switch {
	case p.Line > 0:
		return fmt.Sprintf("line %d", p.Line)
	case p.Cell != "":
		return "cell " + p.Cell
	}
	return p.File
}
