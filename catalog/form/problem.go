package form

import (
	"cmp"
	"fmt"
	"slices"
	"strings"
)

// Place is where something was written; lines and columns start at 1, and
// columns count characters.
type Place struct {
	File         string
	Line, Column int
}

// String prints file:line:column, which editors make clickable; the parts
// that are zero are left out.
func (p Place) String() string {
	switch {
	case p.Line == 0:
		return p.File
	case p.Column == 0:
		return fmt.Sprintf("%s:%d", p.File, p.Line)
	}
	return fmt.Sprintf("%s:%d:%d", p.File, p.Line, p.Column)
}

// Problem is one mistake in a file: its place, then what was read and how to
// mend it.
type Problem struct {
	Place Place
	Text  string
}

// String is the problem's line: "caps.yaml:88:5: unknown key …".
func (p Problem) String() string { return p.Place.String() + ": " + p.Text }

// Problems is every mistake found, sorted by place and free of repeats. It is
// an error that the command line turns into exit status 2.
type Problems []Problem

// Error lists the problems, a line each.
func (p Problems) Error() string {
	lines := make([]string, len(p))
	for i, problem := range p {
		lines[i] = problem.String()
	}
	return strings.Join(lines, "\n")
}

// maxProblems bounds what one report keeps, so that a file of nothing but
// mistakes cannot fill the memory.
const maxProblems = 10_000

// Report gathers problems while files are read. Its zero value is ready; it
// is not safe for concurrent use: give each goroutine one and Merge them.
type Report struct {
	problems Problems
	dropped  bool
}

// Add notes a problem at a place.
func (r *Report) Add(at Place, format string, args ...any) {
	if len(r.problems) >= maxProblems {
		r.dropped = true
		return
	}
	r.problems = append(r.problems, Problem{at, fmt.Sprintf(format, args...)})
}

// Merge takes over the problems of another report.
func (r *Report) Merge(other *Report) {
	for _, p := range other.problems {
		r.Add(p.Place, "%s", p.Text)
	}
	r.dropped = r.dropped || other.dropped
}

// Len is how many problems were noted so far, repeats included.
func (r *Report) Len() int { return len(r.problems) }

// Err returns nil or the sorted Problems.
func (r *Report) Err() error {
	if len(r.problems) == 0 {
		return nil
	}
	sorted := slices.Clone(r.problems)
	slices.SortStableFunc(sorted, func(a, b Problem) int {
		return cmp.Or(cmp.Compare(a.Place.File, b.Place.File), cmp.Compare(a.Place.Line, b.Place.Line),
			cmp.Compare(a.Place.Column, b.Place.Column), cmp.Compare(a.Text, b.Text))
	})
	sorted = slices.Compact(sorted)
	if r.dropped {
		last := sorted[len(sorted)-1].Place
		sorted = append(sorted, Problem{last, fmt.Sprintf("there are more than %d problems; mend these first", maxProblems)})
	}
	return sorted
}
