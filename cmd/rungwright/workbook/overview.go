package workbook

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// overviewSheet: hazards, the build with its inputs and sums, targets against
// result, why this design, the others, and what was read.
func (b *book) overviewSheet() *sheet {
	s := &sheet{name: sheetOverview, tab: overFill, locked: true, portrait: true,
		widths: map[int]float64{0: 28, 1: 20, 2: 22, 3: 29, 4: 26, 5: 22}}
	s.row(saying(title, cmp.Or(b.design.Supply.Name, "Design")))
	s.row(saying(plain, b.subtitle()))
	s.row(saying(plain, "Yellow cells are inputs; everything else follows from them."))
	s.row()
	b.addHazards(s)
	b.addBuild(s)
	b.addSpares(s)
	b.addRates(s)
	b.addTargets(s)
	b.addCertificate(s)
	b.addRunnersUp(s)
	b.addInputs(s)
	return s
}

const overviewWidth = 6

func (b *book) planned() int { return cmp.Or(b.design.Supply.Build.Units, 1) }

// subtitle says in a line what the supply is.
func (b *book) subtitle() string {
	d := b.design
	volts := d.Supply.Output.Voltage
	if d.Supply.Output.Negative {
		volts = -volts
	}
	return fmt.Sprintf("%s, %d stages: %s from a %s source of %s peak at %s", d.Topology, d.Stages, volts,
		cmp.Or(string(d.Supply.Source.Waveform), "sine"), quantity.Volts(d.Circuit.Source.Peak), quantity.Hertz(d.Circuit.Source.Frequency))
}

// addHazards puts the cautions' titles first of all.
func (b *book) addHazards(s *sheet) {
	s.head("Before anything else", overviewWidth)
	for _, text := range b.design.Failed {
		s.spread(hazard, "✖ This design does not meet its targets: "+text, overviewWidth)
	}
	for _, c := range b.design.Cautions {
		s.spread(hazard, "⚠ "+c.Title, overviewWidth)
	}
	if len(b.design.Cautions) == 0 {
		s.spread(soft, "No caution came with this design; that is not a word of safety.", overviewWidth)
	}
	s.row(saying(plain, "What to do about each stands on the Cautions sheet."))
	s.row()
}

// addBuild is the build quantity with the sums of the order beside it.
func (b *book) addBuild(s *sheet) {
	l := b.ledger
	s.head("Build and cost", overviewWidth)
	goods, charges, open := l.sums()
	total := l.market.Amount(goods + charges)
	last := partsHead + len(l.items)
	row := s.row(saying(label, "Units to build"), cell{style: inWhole, value: l.units}, cell{}, saying(label, "Goods ("+l.market.Currency+")"),
		live(money, of(sheetParts, fixed(partsCost, last+1)), b.money(goods)))
	if row != b.places.build {
		panic("workbook: the build row has moved")
	}
	s.checks = append(s.checks, whole(at(1, row), 1, 10_000_000, "How many units are built: a whole number from 1 to 10,000,000."))
	extra := "0"
	if n := len(l.sellers); n > 0 {
		extra = fmt.Sprintf("SUM(%s)+SUM(%s)", of(sheetOrder, b.sellersOf(sellerCharge)), of(sheetOrder, b.sellersOf(sellerFee)))
	}
	s.row(cell{}, cell{}, cell{}, saying(label, "Delivery and fees ("+l.market.Currency+")"), live(money, extra, b.money(charges)))
	b.sums = [][]cell{
		{saying(label, "Total ("+l.market.Currency+")"), live(totalMoney, fmt.Sprintf("ROUND(%s+%s,%d)", at(4, row), at(4, row+1), l.market.Digits), total.InexactFloat64())},
		{saying(label, "For one unit ("+l.market.Currency+")"), live(unitPrice, fmt.Sprintf("ROUND(%s/BuildQty,4)", at(4, row+2)), total.DivRound(decimalOf(l.units), 4).InexactFloat64())},
		{saying(label, "Parts without a full offer"), live(number, fmt.Sprintf(`COUNTIF(%s,"✖*")`, of(sheetParts, span(partsNote, partsHead+1, last))), open),
			live(note, fmt.Sprintf(`IF(%s=0,"● complete","✖ sums leave them out")`, at(4, row+4)), completeness(open))},
	}
	cells := at(5, row+4)
	s.marks = append(s.marks, mark{cells, at(4, row+4) + ">0", markOver})
}

func completeness(open int) string {
	if open == 0 {
		return "● complete"
	}
	return "✖ sums leave them out"
}

// sellersOf is the range of one column of the supplier table.
func (b *book) sellersOf(column int) string {
	sellers := b.ledger.sellers
	return span(column, b.sellerRow(sellers[0]), b.sellerRow(sellers[len(sellers)-1]))
}

// addSpares is the table of spares by kind of part.
func (b *book) addSpares(s *sheet) {
	beside := func(i int, cells ...cell) {
		if i < len(b.sums) {
			cells = append(cells, b.sums[i]...)
		}
		s.row(cells...)
	}
	beside(0, saying(header, "Spares for"), saying(headerRight, "Share"), saying(headerRight, "At least (pieces)"))
	first := len(s.rows) + 1
	if first != b.places.spares {
		panic("workbook: the spares table has moved")
	}
	for i := range b.kinds() {
		if i >= len(b.ledger.kinds) {
			beside(i+1, cell{}, cell{}, cell{})
			continue
		}
		kind := b.ledger.kinds[i]
		spare := b.ledger.spares[kind]
		beside(i+1, saying(label, plural(kind)), cell{style: inShare, value: spare.Share}, cell{style: inWhole, value: spare.Least})
	}
	last := first + len(b.ledger.kinds) - 1
	s.checks = append(s.checks,
		asShare(at(1, first)+":"+at(1, last), "Pieces beyond the need, as a share: 0 % to 100 %; rounded up to whole pieces."),
		whole(at(2, first)+":"+at(2, last), 0, 1_000_000, "Pieces beyond the need at least."))
	s.row()
}

func plural(kind catalog.Kind) string {
	if kind == catalog.KindOther {
		return "other parts"
	}
	return string(kind) + "s"
}

// addRates is the table of exchange rates, when any is needed.
func (b *book) addRates(s *sheet) {
	l := b.ledger
	if len(l.foreign) == 0 {
		return
	}
	s.row(saying(header, "Currency"), saying(headerRight, l.market.Currency+" for one"), saying(header, "Rate from"))
	for i, code := range l.foreign {
		rate, known := l.market.Rate(code)
		c := cell{style: inDecimal}
		if known {
			c.value = rate.InexactFloat64()
		}
		row := s.row(saying(label, code), c, saying(note, cmp.Or(b.options.RatesNote, "not stated")))
		if row != b.places.rates+i {
			panic("workbook: the rates table has moved")
		}
		s.checks = append(s.checks, amountFrom(at(1, row), "What one unit of this currency costs in "+l.market.Currency+"."))
	}
	s.row()
}

// addTargets sets each wish against the result.
func (b *book) addTargets(s *sheet) {
	s.head("Targets against result", overviewWidth)
	s.heads("Target", "Wanted", "Result", "Limit", "Worst corner", "State")
	first := len(s.rows) + 1
	for _, t := range b.design.Targets {
		state := "● met"
		if !t.Met {
			state = "✖ MISSED"
		}
		s.row(saying(wrapped, t.Name), saying(wrapped, t.Wanted), saying(wrapped, inUnit(t.Got, t.Unit)), saying(wrapped, inUnit(t.Limit, t.Unit)), saying(wrapped, t.Corner), say(state))
	}
	if last := len(s.rows); last >= first {
		s.marks = append(s.marks, mark{at(5, first) + ":" + at(5, last), fmt.Sprintf(`COUNTIF(%s,"✖*")>0`, at(5, first)), markOver})
	}
	s.row()
}

// units are the dimensions whose unit a target may name.
var units = map[string]quantity.Dimension{"V": quantity.Voltage, "A": quantity.Current, "s": quantity.Time, "W": quantity.Power, "J": quantity.Energy,
	"VA": quantity.ApparentPower, "Hz": quantity.Frequency, "F": quantity.Capacitance, "°C": quantity.Temperature, "m": quantity.Length, "m³": quantity.Volume,
	"m²": quantity.Area, "1": quantity.Proportion, "%": quantity.Proportion}

// inUnit prints a target's number as the trade does.
func inUnit(v float64, unit string) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "none"
	}
	if d, known := units[unit]; known {
		return quantity.Format(v, d, 4)
	}
	return strings.TrimSpace(strconv.FormatFloat(v, 'g', 5, 64) + " " + unit)
}

func (b *book) addCertificate(s *sheet) {
	c := b.design.Certificate
	if len(c.Text) == 0 && c.Rejected == "" {
		return
	}
	s.head("Why this design", overviewWidth)
	for _, line := range c.Text {
		s.spread(wrapped, line, overviewWidth)
	}
	if c.Rejected != "" {
		s.spread(wrapped, "Cheapest design refused: "+c.Rejected, overviewWidth)
	}
	s.row()
}

func (b *book) addRunnersUp(s *sheet) {
	if len(b.design.RunnersUp) == 0 {
		return
	}
	s.head("Other designs that pass", overviewWidth)
	for _, r := range b.design.RunnersUp {
		s.spread(wrapped, fmt.Sprintf("%s: %s %s a unit. %s", r.Summary, r.UnitCost.StringFixed(int32(b.ledger.market.Digits)), b.design.Currency, r.Note), overviewWidth)
	}
	s.row()
}

// inputs are the files behind the design, each once.
func (b *book) inputs() []catalog.Input {
	all := b.design.Inputs
	if in := b.design.Supply.Input; in.Name != "" && !slices.Contains(all, in) {
		all = append([]catalog.Input{in}, all...)
	}
	return all
}

func (b *book) addInputs(s *sheet) {
	if len(b.inputs()) == 0 {
		return
	}
	s.head("What was read", overviewWidth)
	s.heads("File", "SHA-256", "", "", "", "")
	for _, in := range b.inputs() {
		s.row(saying(wrapped, in.Name), saying(note, in.SHA256))
	}
}
