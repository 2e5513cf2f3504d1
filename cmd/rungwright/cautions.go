package main

import (
	"fmt"
	"math"
	"strings"

	"rungwright/optimize/ladder"
	"rungwright/ratings"
)

// mainsMost is the highest frequency that is taken for a mains one [Hz].
const mainsMost = 70

// circuitCautions are the hazards of a circuit of which only values are
// known: nothing discharges it, nothing isolates it.
func circuitCautions(c ladder.Circuit, a ladder.Steady) []ratings.Caution {
	h := ratings.Hazard{
		OutputV:     max(math.Abs(a.MaxV), math.Abs(a.MinV), math.Abs(ladder.Estimate(c).NoLoadV)),
		SourcePeakV: c.Source.Peak,
		DischargeS:  math.Inf(1),
		MainsFed:    c.Source.Frequency <= mainsMost,
	}
	column := 0.0 // 1/C of the smoothing capacitors in series
	smoothing := c.Topology.SmoothingColumn(c.Stages)
	for i, k := range c.Capacitors {
		h.StoredJ += k.C * a.Capacitors[i].MaxV * a.Capacitors[i].MaxV / 2
		if smoothing[i] {
			column += 1 / k.C
		}
	}
	if column > 0 {
		h.OutputC = 1/column + c.Filter.C
	}
	return ratings.Cautions(h)
}

// printCautions shows cautions first: high voltage can kill. A screen has the
// gravest in full and the others by title, unless all are asked for; a pipe
// has all in full.
func printCautions(s *streams, cautions []ratings.Caution, all bool) {
	if len(cautions) == 0 {
		return
	}
	switch {
	case !s.outTerminal:
		t := table{columns: []column{words("", "caution"), words("", "title"), words("", "text")}}
		for _, c := range cautions {
			t.add(c.Code, c.Title, c.Text)
		}
		s.printTable(t)
	case all:
		for _, c := range cautions {
			printCaution(s, c)
		}
	default:
		printCaution(s, cautions[0])
		printCautionTitles(s, cautions[1:])
	}
}

// printCaution shows one on a screen.
func printCaution(s *streams, c ratings.Caution) {
	const word = "CAUTION"
	for i, line := range wrap(word+" "+c.Title+". "+c.Text, s.prose(), "  ") {
		if i == 0 {
			line = s.paint(red, word) + strings.TrimPrefix(line, word)
		}
		fmt.Fprintln(s.out, line)
	}
}

// mostTitles is how many cautions a screen names beside the gravest.
const mostTitles = 5

func printCautionTitles(s *streams, cautions []ratings.Caution) {
	if len(cautions) == 0 {
		return
	}
	var titles []string
	for _, c := range cautions[:min(len(cautions), mostTitles)] {
		titles = append(titles, c.Title)
	}
	text := "Also: " + strings.Join(titles, "; ")
	if more := len(cautions) - mostTitles; more > 0 {
		text += fmt.Sprintf("; and %d more", more)
	}
	for _, line := range wrap(text+". All in full: --"+flagCautions+".", s.prose(), "  ") {
		fmt.Fprintln(s.out, line)
	}
}
