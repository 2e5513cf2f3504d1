package main

import (
	"context"
	"errors"
	"fmt"
	"strings"

	"rungwright/catalog/form"
	"rungwright/optimize/ladder"
)

// The exit statuses, also told by `rungwright help exit-status`.
const (
	exitDone       = 0 // done, and everything meets its limits
	exitUnexpected = 1 // stopped early, or a fault that is not the user's
	exitInput      = 2 // the command line or a file is wrong
	exitNo         = 3 // the question was good and the answer is no
)

// inputError is a mistake in what the user gave, with what to do about it.
type inputError struct {
	err  error
	hint string // may be empty
}

func (e *inputError) Error() string { return e.err.Error() }
func (e *inputError) Unwrap() error { return e.err }

// badInput makes an inputError; the hint may be empty.
func badInput(hint, format string, args ...any) error {
	return &inputError{fmt.Errorf(format, args...), hint}
}

// asInput marks an error of a reader as the input's fault.
func asInput(err error) error {
	if err == nil {
		return nil
	}
	return &inputError{err: err}
}

// outputError is a failure to write results to standard output.
type outputError struct{ err error }

func (e *outputError) Error() string { return "cannot write the results: " + e.err.Error() }
func (e *outputError) Unwrap() error { return e.err }

// errNo ends a command whose answer, already printed, is no.
var errNo = errors.New("the answer is no")

// errStopped ends a command that the user stopped after its best answer so
// far was printed.
var errStopped = errors.New("stopped before the end; what is shown is the best so far")

// errNothingYet ends a search that the user stopped before any design passed.
var errNothingYet = errors.New("stopped before any design was found to pass")

// exitStatus is the one place that turns an error into a status. Before a
// command's own work started, every error is one of usage.
func exitStatus(err error, started bool) int {
	if err == nil {
		return exitDone
	}
	_, noSteady := errors.AsType[*ladder.NoSteadyError](err)
	_, problems := errors.AsType[form.Problems](err)
	_, input := errors.AsType[*inputError](err)
	_, output := errors.AsType[*outputError](err)
	switch {
	case output:
		return exitUnexpected
	case errors.Is(err, errNo), noSteady:
		return exitNo
	case input, problems, !started:
		return exitInput
	}
	return exitUnexpected
}

// mostProblems is how many mistakes a terminal shows; a pipe gets them all.
const mostProblems = 40

// report tells an error on standard error: problems in files a line each with
// their place in front, anything else after the program's name, then what to
// do about it.
func report(s *streams, err error) {
	switch {
	case err == nil, errors.Is(err, errNo):
	case errors.Is(err, context.Canceled):
		fmt.Fprintln(s.err, "rungwright: stopped")
	default:
		reportError(s, err)
	}
}

func reportError(s *streams, err error) {
	if problems, ok := errors.AsType[form.Problems](err); ok {
		reportProblems(s, problems)
	} else {
		fmt.Fprintln(s.err, "rungwright:", strings.TrimSpace(err.Error()))
	}
	if e, ok := errors.AsType[*inputError](err); ok && e.hint != "" {
		fmt.Fprintln(s.err, "hint:", e.hint)
	}
}

func reportProblems(s *streams, problems form.Problems) {
	shown := problems
	if s.errTerminal && len(problems) > mostProblems {
		shown = problems[:mostProblems]
	}
	fmt.Fprintln(s.err, strings.TrimSpace(shown.Error()))
	if rest := len(problems) - len(shown); rest > 0 {
		fmt.Fprintf(s.err, "… and %d more; send the messages to a file to see them all\n", rest)
	}
}
