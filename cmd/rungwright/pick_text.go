package main

import (
	"fmt"
	"path/filepath"
	"slices"
	"strings"

	"github.com/shopspring/decimal"

	"rungwright/catalog/quantity"
	"rungwright/optimize"
	"rungwright/ratings"
)

// printPicked shows a design that was found.
func printPicked(s *streams, o *pickOptions, a optimize.Answer, files pickFiles, saved bool) error {
	if o.format == formatJSON {
		return printJSON(s, pickedJSON(a))
	}
	d := a.Design
	printCautions(s, d.Cautions, o.cautions)
	if s.outTerminal {
		printPickedHead(s, d)
	}
	printTables(s, summaryTable(s, a), lineTable(s, d), targetTable(s, d), stressTable(s, d))
	printUnjudged(s, d)
	printTables(s, runnerUpTable(s, d))
	if s.outTerminal {
		printProof(s, a.Certificate, d.Supply.Choose.Least)
		if saved {
			printNext(s, files)
		}
	}
	return nil
}

// printPickedHead says what was chosen and what it costs.
func printPickedHead(s *streams, d *optimize.Design) {
	fmt.Fprintf(s.out, "\n%s\n", s.paint(bold, d.Supply.Name))
	fmt.Fprintf(s.out, "%s, %s, %s from %s peak at %s: %s a unit\n", d.Topology, stageCount(d.Stages),
		signedOutput(d.Supply.Output), quantity.Volts(d.Circuit.Source.Peak), quantity.Hertz(d.Circuit.Source.Frequency),
		s.paint(bold, d.UnitCost.StringFixed(2)+" "+d.Currency))
	fmt.Fprintf(s.out, "%s %s for %s, spares and minimum quantities included\n",
		d.BuildCost.StringFixed(2), d.Currency, plural(d.Supply.Build.Units, "unit"))
}

func signedOutput(o optimize.Output) quantity.Volts {
	if o.Negative {
		return -o.Voltage
	}
	return o.Voltage
}

// summaryTable is the head and the proof as one row for a pipe.
func summaryTable(s *streams, a optimize.Answer) table {
	if s.outTerminal {
		return table{}
	}
	d := a.Design
	t := table{columns: []column{words("", "supply"), words("", "topology"), words("", "stages"), words("", "unit_cost"),
		words("", "build_cost"), words("", "currency"), words("", "units"), words("", "proved"), measure("", "stored_j", quantity.Energy)}}
	t.add(d.Supply.Name, d.Topology, d.Stages, d.UnitCost, d.BuildCost, d.Currency, d.Supply.Build.Units, a.Certificate.Proved, d.StoredJ)
	return t
}

// lineTable is the parts, a row for each line of the list.
func lineTable(s *streams, d *optimize.Design) table {
	t := table{columns: []column{
		words("for", "role"), words("positions", "refs"), words("part", "part"), words("what", "title").optional(2),
		{title: "each", key: "per_unit", right: true}, {title: "buy", key: "buy", right: true, extra: 1},
		words("from", "supplier").optional(3), words("order code", "order_code").optional(4),
		{title: d.Currency + " each", key: "unit_price", right: true}, {title: "for all", key: "cost", right: true, extra: 1},
	}}
	for _, l := range d.Lines {
		refs := strings.Join(l.Refs, " ")
		if s.outTerminal {
			refs = span(l.Refs)
		}
		p := l.Purchase
		supplier, code := "", ""
		if p.Offer != nil {
			supplier, code = p.Offer.Supplier, p.Offer.OrderCode
		}
		t.add(string(l.Role), refs, l.Part.Number, l.Part.Title(), l.PerUnit(), p.Quantity, supplier, code, s.money(p.UnitPrice), s.money(p.Cost))
	}
	return t
}

// money has two decimals or more on a screen, and what it has in a pipe.
func (s *streams) money(d decimal.Decimal) string {
	text := d.String()
	if _, decimals, _ := strings.Cut(text, "."); s.outTerminal && len(decimals) < 2 {
		return d.StringFixed(2)
	}
	return text
}

// span shortens a run of references: "C1–C6", "C1 C3 C5" or "C1 C3 … (8)".
func span(refs []string) string {
	n := len(refs)
	switch {
	case n > 2 && consecutive(refs):
		return refs[0] + "–" + refs[n-1]
	case n > 4:
		return fmt.Sprintf("%s %s … %s", refs[0], refs[1], refs[n-1])
	}
	return strings.Join(refs, " ")
}

// consecutive tells whether the references count up by one.
func consecutive(refs []string) bool {
	letters := strings.TrimRight(refs[0], "0123456789")
	first := 0
	if _, err := fmt.Sscanf(refs[0][len(letters):], "%d", &first); err != nil {
		return false
	}
	for i, r := range refs {
		if r != fmt.Sprintf("%s%d", letters, first+i) {
			return false
		}
	}
	return true
}

// targetTable is every wish against the answer.
func targetTable(s *streams, d *optimize.Design) table {
	t := table{columns: []column{words("target", "target"), words("wanted", "wanted"), {title: "got", key: "got", right: true},
		words("unit", "unit"), words("used", "used_ratio"), words("at", "corner").optional(1)}}
	for _, g := range d.Targets {
		if s.outTerminal {
			t.add(g.Name, g.Wanted, engineering(g.Got, g.Unit), "", bar(used(d, g)), g.Corner)
			continue
		}
		t.add(g.Name, g.Wanted, g.Got, g.Unit, used(d, g), g.Corner)
	}
	if s.outTerminal {
		t.drop("unit")
	}
	return t
}

// used is the share of a target that is used up: of the output's window what
// lies between the wanted voltage and the edge, for an upper limit what was
// got over the limit, for a lower one the limit over what was got.
func used(d *optimize.Design, t optimize.Target) float64 {
	lower := (t.Got > t.Limit) == t.Met
	if wanted := float64(d.Supply.Output.Voltage); strings.HasPrefix(t.Name, "output") {
		return max(0, (t.Got-wanted)/(t.Limit-wanted))
	}
	switch {
	case t.Got == t.Limit:
		return 1
	case lower && t.Got != 0:
		return t.Limit / t.Got
	}
	return t.Got / t.Limit
}

// mostStresses is how many stresses a screen shows, the nearest to their
// limits; a pipe and the files have all.
const mostStresses = 4

// stressTable is the parts that are nearest to their limits.
func stressTable(s *streams, d *optimize.Design) table {
	t := table{columns: []column{words("stress", "ref"), words("part", "part").optional(2), words("of", "quantity"),
		{title: "value", key: "value", right: true}, {title: "limit", key: "limit", right: true}, words("unit", "unit"),
		words("used", "used_ratio"), words("at", "corner").optional(1), words("rule", "rule").optional(3), words("note", "note")}}
	shown := d.Stresses
	if s.outTerminal {
		judged := slices.DeleteFunc(slices.Clone(shown), func(x ratings.Stress) bool { return x.Unjudged })
		shown = judged[:min(len(judged), mostStresses)]
	}
	for _, x := range shown {
		if s.outTerminal {
			t.add(x.Ref, x.Part, x.Quantity, quantity.Format(x.Value, x.Unit, 3), quantity.Format(x.Limit, x.Unit, 3), "", bar(x.Ratio), x.Corner, x.Rule.Name, "")
			continue
		}
		t.add(x.Ref, x.Part, x.Quantity, x.Value, x.Limit, baseUnit(x.Unit), x.Ratio, x.Corner, x.Rule.Name, x.Note)
	}
	if s.outTerminal {
		t.drop("unit")
		t.drop("note")
	}
	return t
}

// printUnjudged says which ratings nothing could be judged by: what a sheet
// does not give must not pass in silence.
func printUnjudged(s *streams, d *optimize.Design) {
	var said []string
	for _, x := range d.Stresses {
		if x.Unjudged {
			said = append(said, x.Quantity+" of "+x.Part)
		}
	}
	if len(said) == 0 || !s.outTerminal {
		return
	}
	for _, line := range wrap("NOT JUDGED, for the data do not say: "+strings.Join(said, ", ")+".", s.prose(), "  ") {
		fmt.Fprintln(s.out, line)
	}
}

func runnerUpTable(s *streams, d *optimize.Design) table {
	t := table{columns: []column{{title: d.Currency + " each", key: "unit_cost", right: true}, words("next best", "runner_up"),
		words("", "note").optional(1)}}
	own := strings.Split(d.Plan.Summary(), ", ")
	for i, r := range d.RunnersUp {
		summary := r.Summary
		if s.outTerminal {
			if i == mostRunnersUp {
				break
			}
			summary = difference(summary, own)
		}
		t.add(s.money(r.UnitCost), summary, r.Note)
	}
	return t
}

// mostRunnersUp is how many runners-up a screen shows.
const mostRunnersUp = 3

// difference is what a runner-up has that the answer has not.
func difference(summary string, own []string) string {
	others := slices.DeleteFunc(strings.Split(summary, ", "), func(part string) bool { return slices.Contains(own, part) })
	if len(others) == 0 {
		return summary
	}
	return "with " + strings.Join(others, ", ")
}

// printProof says in short what was proved; the files have it in full.
func printProof(s *streams, c optimize.Certificate, least optimize.Objective) {
	superlative := "cheapest"
	if least != "" && least != optimize.LeastCost {
		superlative = "least in " + string(least)
	}
	title, how := "Proved "+superlative+".", green
	if !c.Proved {
		title, how = "NOT PROVED "+superlative+".", yellow
	}
	fmt.Fprintf(s.out, "\n%s\n", s.paint(how, title))
	for _, line := range wrap(proof(c), s.prose(), "") {
		fmt.Fprintln(s.out, line)
	}
}

// proof counts the combinations by the argument that excluded them.
func proof(c optimize.Certificate) string {
	rest := "the other %s are no better"
	if !c.Proved {
		rest = "%s are untried"
	}
	return fmt.Sprintf("Of %s combinations %s cannot bear their place, %s fall to bounds that no circuit breaks, %s to the estimate "+
		"with a guard of %.0f %%; %s simulated at every corner; "+rest+".",
		grouped(c.Combinations), grouped(c.Dominated), grouped(c.Bounded), grouped(c.Estimated), 100*c.Guard,
		were(c.Simulated), grouped(c.Dearer))
}

func were(n int) string {
	if n == 1 {
		return "1 was"
	}
	return grouped(int64(n)) + " were"
}

// grouped writes a whole number in groups of three.
func grouped(n int64) string {
	text := fmt.Sprint(n)
	for i := len(text) - 3; i > 0; i -= 3 {
		text = text[:i] + " " + text[i:]
	}
	return text
}

// printNext says what to do with the answer.
func printNext(s *streams, files pickFiles) {
	next := "add --" + flagWorkbook + " for the purchase workbook"
	switch {
	case files.workbook != "":
		next = "review and order from " + filepath.ToSlash(files.workbook)
	case files.design == "":
		next = "leave out --print-only to write the design and its workbook"
	}
	fmt.Fprintln(s.out)
	for _, line := range wrap("Next: "+next, s.prose(), "  ") {
		fmt.Fprintln(s.out, line)
	}
}

// printWhyNot explains why nothing fits; the answer is then no, unless the
// search was stopped.
func printWhyNot(s *streams, o *pickOptions, supply optimize.Supply, a optimize.Answer, stopped bool) error {
	verdict := errNo
	if stopped {
		verdict = errNothingYet
	}
	if o.format == formatJSON {
		if err := printJSON(s, whyNotJSON(supply, a)); err != nil {
			return err
		}
		return verdict
	}
	fmt.Fprintf(s.out, "No design was found for %s.\n", supply.Name)
	if a.Why != nil {
		for _, text := range a.Why.Text {
			printReason(s, text)
		}
	}
	return verdict
}

// printReason is one line of the why; an indented one belongs to the line
// above it.
func printReason(s *streams, text string) {
	bullet := "- "
	if strings.HasPrefix(text, " ") {
		bullet = "    "
	}
	for i, line := range wrap(text, s.prose()-len(bullet), "  ") {
		if i > 0 {
			bullet = strings.Repeat(" ", len(bullet))
		}
		fmt.Fprintln(s.out, bullet+line)
	}
}
