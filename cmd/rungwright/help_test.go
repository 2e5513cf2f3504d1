package main

import (
	"strings"
	"testing"
)

// TestHelpFitsTheScreen: every page of help, topics too, fits 80 columns.
func TestHelpFitsTheScreen(t *testing.T) {
	for _, cmd := range commands((&app{streams: &pretendPipe().streams}).root()) {
		p := pretendTerminal(80)
		args := append([]string{"help"}, strings.Fields(cmd.CommandPath())[1:]...)
		if status := run(args, &p.streams); status != exitDone {
			t.Errorf("%q ends with %d: %s", args, status, p.errText.String())
		}
		mustFit(t, p.printed(), 80)
	}
}
