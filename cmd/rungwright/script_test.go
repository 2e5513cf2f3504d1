package main

import (
	"os"
	"os/exec"
	"path/filepath"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
)

// TestMain lets the scripts run the program as a command of its own.
func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){"rungwright": main})
}

// TestScripts runs testdata/script, a file for each behaviour. DATA is the
// repository's testdata.
func TestScripts(t *testing.T) {
	data, err := filepath.Abs("../../testdata")
	if err != nil {
		t.Fatal(err)
	}
	testscript.Run(t, testscript.Params{
		Dir:                "testdata/script",
		Cmds:               scriptCommands,
		UpdateScripts:      os.Getenv("RUNGWRIGHT_UPDATE") != "",
		RequireUniqueNames: true,
		Setup: func(e *testscript.Env) error {
			e.Setenv("DATA", data)
			_, err := exec.LookPath("script") // makes a terminal
			if os.Getenv("RUNGWRIGHT_CI") == "" {
				return nil // the script that needs it is skipped
			}
			return err
		},
	})
}
