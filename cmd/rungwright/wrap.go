package main

import (
	"strings"
	"unicode/utf8"
)

// wrap breaks text between words into lines of at most width characters; the
// lines after the first begin with indent. A longer word has a line to itself.
func wrap(text string, width int, indent string) []string {
	var lines []string
	line, bare := "", true
	for _, word := range strings.Fields(text) {
		if !bare && utf8.RuneCountInString(line)+1+utf8.RuneCountInString(word) > width {
			lines = append(lines, line)
			line, bare = indent, true
		}
		if !bare {
			line += " "
		}
		line += word
		bare = false
	}
	if !bare {
		lines = append(lines, line)
	}
	return lines
}
