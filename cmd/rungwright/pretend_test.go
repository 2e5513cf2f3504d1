package main

import (
	"bufio"
	"bytes"
	"strings"
	"testing"
	"unicode/utf8"
)

// pretend is a set of streams that a test looks into.
type pretend struct {
	streams
	outText, errText bytes.Buffer
}

// pretendTerminal has terminals of the given width at both ends.
func pretendTerminal(width int) *pretend {
	p := &pretend{streams: streams{in: strings.NewReader(""), outTerminal: true, errTerminal: true, width: width}}
	p.out, p.err = bufio.NewWriter(&p.outText), &p.errText
	return p
}

// pretendPipe has a pipe at both ends.
func pretendPipe() *pretend {
	p := pretendTerminal(leastWidth)
	p.outTerminal, p.errTerminal = false, false
	return p
}

// printed is what reached standard output.
func (p *pretend) printed() string {
	p.out.Flush()
	return p.outText.String()
}

// mustFit fails when a line is wider than the screen.
func mustFit(t *testing.T, text string, width int) {
	t.Helper()
	for line := range strings.Lines(text) {
		if n := utf8.RuneCountInString(strings.TrimRight(line, "\n")); n > width {
			t.Errorf("a line has %d columns on a screen of %d: %q", n, width, line)
		}
	}
}
