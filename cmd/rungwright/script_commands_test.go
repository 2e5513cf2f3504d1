package main

import (
	"encoding/hex"
	"errors"
	"os"
	"os/exec"
	"slices"
	"strconv"
	"strings"

	"github.com/rogpeppe/go-internal/testscript"
)

// scriptCommands are the commands of the scripts beside the library's own.
var scriptCommands = map[string]func(*testscript.TestScript, bool, []string){
	"exits": exits, "fill": fill, "bytes": writeBytes, "holds": holds,
}

// exits runs a command and demands its exit status: exits 2 rungwright solve x.
func exits(ts *testscript.TestScript, neg bool, args []string) {
	usage(ts, neg || len(args) < 2, "exits STATUS COMMAND ARGUMENT...")
	want, err := strconv.Atoi(args[0])
	ts.Check(err)
	got := 0
	if err := ts.Exec(args[1], args[2:]...); err != nil {
		failed, ok := errors.AsType[*exec.ExitError](err)
		if !ok {
			ts.Fatalf("%v", err)
		}
		got = failed.ExitCode()
	}
	if strings.Contains(ts.ReadFile("stderr"), "goroutine ") { // a panic's status is 2 as well
		ts.Fatalf("panic")
	}
	if got != want {
		ts.Fatalf("exit status %d, want %d", got, want)
	}
}

// fill makes a file of a repeated line: fill big.yaml 50MB 'a: b'.
func fill(ts *testscript.TestScript, neg bool, args []string) {
	usage(ts, neg || len(args) != 3, "fill FILE SIZE LINE")
	mb, err := strconv.Atoi(strings.TrimSuffix(args[1], "MB"))
	ts.Check(err)
	line := args[2] + "\n"
	ts.Check(os.WriteFile(ts.MkAbs(args[0]), []byte(strings.Repeat(line, mb<<20/len(line)+1)), 0o666))
}

// writeBytes makes a file of bytes in hex: bytes x.bin 7f454c46.
func writeBytes(ts *testscript.TestScript, neg bool, args []string) {
	usage(ts, neg || len(args) != 2, "bytes FILE HEX")
	data, err := hex.DecodeString(args[1])
	ts.Check(err)
	ts.Check(os.WriteFile(ts.MkAbs(args[0]), data, 0o666))
}

// holds demands that a folder has exactly the named entries: holds . a.yaml b.
func holds(ts *testscript.TestScript, neg bool, args []string) {
	usage(ts, neg || len(args) < 1, "holds FOLDER NAME...")
	entries, err := os.ReadDir(ts.MkAbs(args[0]))
	ts.Check(err)
	var got []string
	for _, e := range entries {
		if e.Name() != ".tmp" { // the library's own
			got = append(got, e.Name())
		}
	}
	if want := slices.Sorted(slices.Values(args[1:])); !slices.Equal(got, want) {
		ts.Fatalf("%s holds %q, want %q", args[0], got, want)
	}
}

func usage(ts *testscript.TestScript, wrong bool, text string) {
	if wrong {
		ts.Fatalf("usage: %s", text)
	}
}
