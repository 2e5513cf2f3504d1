package main

import (
	"fmt"
	"path/filepath"
	"strings"

	"rungwright/catalog/quantity"
	"rungwright/optimize"
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
