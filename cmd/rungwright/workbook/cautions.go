package workbook

import (
	"fmt"
	"slices"
	"strings"
)

// cautionsSheet: what can hurt and what to do, then what was assumed.
func (b *book) cautionsSheet() *sheet {
	s := &sheet{name: sheetCautions, tab: overFill, frozen: 4, repeat: "$4:$4", widths: map[int]float64{0: 6, 1: 40, 2: 80, 3: 40}}
	s.row(saying(title, "Cautions and assumptions"))
	s.spread(soft, "High voltage can kill. Local codes and the judgement of a licensed practitioner stand above anything written here.", 4)
	s.row()
	s.heads("No.", "Caution", "What to do", "Source")
	for i, c := range b.design.Cautions {
		s.row(count(i+1), saying(wrapped, "⚠ "+c.Title), saying(wrapped, c.Text), saying(wrapped, c.Source))
	}
	s.row()
	s.head("Assumptions", 4)
	for i, text := range b.assumptions() {
		s.row(count(i+1), cell{style: wrapped, value: text}, cell{style: wrapped}, cell{style: wrapped})
		s.merges = append(s.merges, [2]string{at(1, len(s.rows)), at(3, len(s.rows))})
	}
	return s
}

// assumptions gathers what the figures rest on.
func (b *book) assumptions() []string {
	d := b.design
	var all []string
	for _, c := range d.Corners {
		all = append(all, fmt.Sprintf("Simulated at %s: source at %.4g %% of nominal, load %s, ambient %.3g °C.", c.Name, c.Line*100, inUnit(c.LoadA, "A"), c.Ambient))
	}
	for _, st := range d.Stresses {
		if st.Note != "" {
			all = append(all, fmt.Sprintf("%s, %s: %s", st.Part, st.Quantity, st.Note))
		}
	}
	all = append(all, "Prices are those of the catalog files that were read, without tax and customs; each line is rounded to the smallest coin of its currency.",
		"Stock and lead times are as the catalog states them; ask the supplier before you promise a date.")
	if len(b.ledger.foreign) > 0 {
		all = append(all, "Exchange rates are those given by the user"+orNothing(b.options.RatesNote)+"; no rate is looked up.")
	}
	all = append(all, d.Notes...)
	all = append(all, b.options.Notes...)
	var once []string
	for _, text := range all {
		if text = clean(text); !slices.Contains(once, text) {
			once = append(once, text)
		}
	}
	return once
}

func orNothing(note string) string {
	if strings.TrimSpace(note) == "" {
		return ""
	}
	return " (" + note + ")"
}
