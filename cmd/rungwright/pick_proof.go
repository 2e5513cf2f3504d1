package main

import (
	"fmt"

	"rungwright/optimize"
)

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
		"with a guard of %.1f %%; %s simulated at every corner; "+rest+".",
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
