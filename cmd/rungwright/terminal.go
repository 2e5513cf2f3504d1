package main

// The rules of the terminal, which every command keeps:
//
//   - Results go to standard output; messages, progress and questions go to
//     standard error. Both are written through streams only.
//   - Colour: none when NO_COLOR is set and not empty, none when TERM is dumb,
//     otherwise only on a terminal. Colour never carries meaning alone.
//   - On a terminal results are tables for the eye that fit 80 columns and use
//     more when there are more. Otherwise they are tab-separated lines in base
//     units, with nothing rounded for the eye.
//   - Progress is one line on standard error, after a second, only when both
//     streams are terminals; it is erased at the end.

import (
	"bufio"
	"io"
	"math"
	"os"

	"golang.org/x/term"
)

// streams is where a command reads and writes, and what is at the other end.
type streams struct {
	in          io.Reader
	out         *bufio.Writer
	err         io.Writer
	outTerminal bool
	errTerminal bool
	width       int // columns of the terminal; at least leastWidth
	colour      bool
}

// leastWidth is the width that every table for the eye fits.
const leastWidth = 80

// systemStreams are the process's own.
func systemStreams() *streams {
	s := &streams{
		in: os.Stdin, out: bufio.NewWriter(os.Stdout), err: os.Stderr,
		outTerminal: term.IsTerminal(int(os.Stdout.Fd())),
		errTerminal: term.IsTerminal(int(os.Stderr.Fd())),
		width:       leastWidth,
	}
	if w, _, err := term.GetSize(int(os.Stdout.Fd())); err == nil && w > leastWidth {
		s.width = w
	}
	dumb := os.Getenv("TERM") == "dumb"
	s.colour = s.outTerminal && !dumb && os.Getenv("NO_COLOR") == ""
	s.errTerminal = s.errTerminal && !dumb // progress erases itself, which a dumb terminal cannot
	return s
}

// prose is the width of running text: lines over 100 columns tire the eye. In
// a pipe it is not broken at all.
func (s *streams) prose() int {
	if !s.outTerminal {
		return math.MaxInt
	}
	return min(s.width, 100)
}

// progressShown tells whether a progress line may be drawn.
func (s *streams) progressShown() bool { return s.outTerminal && s.errTerminal }

// style is a way to print text on a terminal that has colour.
type style string

// The styles, as the SGR codes of ECMA-48.
const (
	bold   style = "1"
	faint  style = "2"
	red    style = "31"
	yellow style = "33"
	green  style = "32"
)

// paint puts text in a style where colour is allowed.
func (s *streams) paint(how style, text string) string {
	if !s.colour || text == "" {
		return text
	}
	return "\x1b[" + string(how) + "m" + text + "\x1b[0m"
}
