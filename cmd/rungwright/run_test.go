package main

import (
	"context"
	"errors"
	"fmt"
	"os"
	"runtime"
	"strings"
	"testing"
	"time"

	"rungwright/catalog/form"
	"rungwright/optimize/ladder"
)

func TestExitStatus(t *testing.T) {
	problem := form.Problems{{Place: form.Place{File: "a.yaml", Line: 3, Column: 4}, Text: "wrong"}}
	for _, c := range []struct {
		name    string
		err     error
		started bool
		want    int
	}{
		{"no error", nil, true, 0},
		{"usage", errors.New("unknown flag"), false, 2},
		{"bad input", badInput("", "no"), true, 2},
		{"a reader's error", asInput(errors.New("no such file")), true, 2},
		{"problems", fmt.Errorf("reading: %w", problem), true, 2},
		{"the answer is no", errNo, true, 3},
		{"no steady state", fmt.Errorf("D: %w", &ladder.NoSteadyError{Why: "x"}), true, 3},
		{"stopped", context.Canceled, true, 1},
		{"stopped with an answer", errStopped, true, 1},
		{"output", &outputError{errors.New("disk full")}, true, 1},
		{"anything else", errors.New("our fault"), true, 1},
	} {
		if got := exitStatus(c.err, c.started); got != c.want {
			t.Errorf("%s: status %d, want %d", c.name, got, c.want)
		}
	}
}

// fullDisk fails every write.
type fullDisk struct{}

func (fullDisk) Write([]byte) (int, error) { return 0, errors.New("no space left") }

func TestResultsThatCannotBeWritten(t *testing.T) {
	p := pretendPipe()
	p.out.Reset(fullDisk{})
	if status := run([]string{"help", "files"}, &p.streams); status != exitUnexpected {
		t.Errorf("status %d, want %d", status, exitUnexpected)
	}
	if !strings.Contains(p.errText.String(), "cannot write the results: no space left") {
		t.Errorf("said %q", p.errText.String())
	}
}

func TestManyProblems(t *testing.T) {
	var many form.Problems
	for i := range mostProblems + 7 {
		many = append(many, form.Problem{Place: form.Place{File: "a.yaml", Line: i + 1, Column: 1}, Text: fmt.Sprint("wrong ", i)})
	}
	screen, pipe := pretendTerminal(80), pretendPipe()
	report(&screen.streams, many)
	report(&pipe.streams, many)
	if !strings.Contains(screen.errText.String(), "and 7 more") {
		t.Errorf("the screen does not say how many are left out:\n%s", screen.errText.String())
	}
	if n := strings.Count(pipe.errText.String(), "a.yaml:"); n != len(many) {
		t.Errorf("the pipe has %d problems, want %d", n, len(many))
	}
}

// TestFaultIsNotInput: Go ends a panic with status 2, which here would say
// that the input is wrong.
func TestFaultIsNotInput(t *testing.T) {
	p := pretendPipe()
	p.out = nil // makes the program fault
	if status := run([]string{"help"}, &p.streams); status != exitUnexpected {
		t.Errorf("status %d, want %d", status, exitUnexpected)
	}
	if !strings.Contains(p.errText.String(), "a fault of the program, not of your input") {
		t.Errorf("said %q", p.errText.String())
	}
}

// TestCtrlC: the interrupt cancels the context instead of ending the process.
func TestCtrlC(t *testing.T) {
	if runtime.GOOS == "windows" {
		t.Skip("a process cannot send itself an interrupt on Windows")
	}
	ctx, stop := interruptible()
	defer stop()
	self, err := os.FindProcess(os.Getpid())
	if err != nil {
		t.Fatal(err)
	}
	if err := self.Signal(os.Interrupt); err != nil {
		t.Fatal(err)
	}
	select {
	case <-ctx.Done():
	case <-time.After(10 * time.Second):
		t.Error("the context was not cancelled")
	}
}
