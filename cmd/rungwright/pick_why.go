package main

import (
	"fmt"
	"strings"

	"rungwright/optimize"
)

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
