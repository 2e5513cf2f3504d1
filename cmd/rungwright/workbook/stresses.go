package workbook

import (
	"fmt"
	"math"
	"strings"

	"rungwright/catalog/quantity"
	"rungwright/ratings"
)

const stressesHead = 4

// near is the share of a limit from which a stress is called near.
const near = 0.9

// stressesSheet shows every stress against what the policy allows.
func (b *book) stressesSheet() *sheet {
	s := &sheet{name: sheetStresses, tab: "D55E00", frozen: stressesHead, beside: 2, repeat: fmt.Sprintf("$%d:$%d", stressesHead, stressesHead),
		widths: map[int]float64{0: 20, 1: 19, 2: 26, 6: 9, 7: 19, 8: 13, 9: 22, 10: 32, 11: 30, 12: 36}}
	s.row(saying(title, "Stresses against limits"))
	s.spread(soft, fmt.Sprintf("Worst first, each at its worst corner. The limit is what the derating rule allows of the maker's rating. A full bar is the limit; %.0f %% of it and more is near.", near*100), 9)
	s.row()
	s.heads("References", "Part", "Stress", ">Value", ">Limit", ">Rating", ">Of limit", "0 … limit", "State", "Worst corner", "Rule", "Source", "Remark")
	for _, st := range b.design.Stresses {
		s.row(stressCells(st)...)
	}
	last := len(s.rows)
	if last == stressesHead {
		s.row(saying(plain, "No stress came with this design."))
		return s
	}
	s.filter = at(0, stressesHead) + ":" + at(12, last)
	states := at(8, stressesHead+1) + ":" + at(8, last)
	s.marks = append(s.marks,
		mark{states, fmt.Sprintf(`COUNTIF(%s,"✖*")>0`, at(8, stressesHead+1)), markOver},
		mark{states, fmt.Sprintf(`COUNTIF(%s,"▲*")>0`, at(8, stressesHead+1)), markNear})
	return s
}

func stressCells(st ratings.Stress) []cell {
	share := cell{style: ratio}
	if !math.IsNaN(st.Ratio) && !math.IsInf(st.Ratio, 0) {
		share.value = st.Ratio
	}
	rule := strings.TrimSuffix(st.Rule.Policy+": "+st.Rule.Name, ": ")
	return []cell{saying(wrapped, st.Ref), say(st.Part), saying(wrapped, st.Quantity), rightly(st.Value, st.Unit), rightly(st.Limit, st.Unit), rightly(st.Rating, st.Unit),
		share, {style: bar, value: barOf(st.Ratio)}, say(stateOf(st)), saying(wrapped, st.Corner), saying(wrapped, rule), saying(wrapped, st.Rule.Source), saying(wrapped, st.Note)}
}

// rightly prints a figure with its unit, leaning right; empty when not given.
func rightly(v float64, unit quantity.Dimension) cell {
	c := cell{style: figure}
	if v != 0 && !math.IsNaN(v) && !math.IsInf(v, 0) {
		c.value = quantity.Format(v, unit, 4)
	}
	return c
}

// barOf draws a ratio as a bar of ten blocks to the limit, fourteen at most.
func barOf(ratio float64) string {
	if math.IsNaN(ratio) || ratio < 0 {
		return ""
	}
	full := int(math.Round(math.Min(ratio, 1.4) * 10))
	return strings.Repeat("█", full) + strings.Repeat("░", max(0, 10-full))
}

// stateOf is a word with a symbol, so that no colour is needed.
func stateOf(st ratings.Stress) string {
	switch {
	case st.Over:
		return "✖ OVER"
	case st.Rule.Name == "":
		return "▲ NO RULE"
	case st.Ratio >= near:
		return "▲ NEAR"
	}
	return "● ok"
}
