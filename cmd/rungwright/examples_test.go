package main

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/spf13/cobra"
)

// TestEveryExampleInHelpRuns: each command line that help shows, in a folder
// where only testdata is, ends with status 0 and prints something.
func TestEveryExampleInHelpRuns(t *testing.T) {
	data, err := filepath.Abs("../../testdata")
	if err != nil {
		t.Fatal(err)
	}
	seen := map[string]bool{}
	for _, cmd := range commands((&app{streams: &pretendPipe().streams}).root()) {
		lines := strings.Split(strings.TrimSpace(cmd.Example), "\n")
		if cmd.Runnable() && cmd.Example == "" {
			t.Errorf("%s has no example", cmd.CommandPath())
		}
		for _, line := range lines {
			if line = strings.TrimSpace(line); line != "" && !seen[line] {
				seen[line] = true
				t.Run(line, func(t *testing.T) { runExample(t, data, line) })
			}
		}
	}
}

func runExample(t *testing.T, data, line string) {
	if testing.Short() && line == "rungwright pick" {
		t.Skip("the whole demo search is left to the run without -short")
	}
	t.Chdir(t.TempDir())
	if err := os.Symlink(data, "testdata"); err != nil {
		t.Skip("this system makes no symbolic links:", err)
	}
	args := shellWords(line)
	p := pretendPipe()
	if status := run(args[1:], &p.streams); args[0] != "rungwright" || status != 0 {
		t.Errorf("status %d\n%s", status, p.errText.String())
	}
	if p.printed() == "" {
		t.Error("printed nothing")
	}
}

// commands lists a command and all below it that are ours.
func commands(c *cobra.Command) []*cobra.Command {
	out := []*cobra.Command{c}
	for _, sub := range c.Commands() {
		out = append(out, commands(sub)...)
	}
	return out
}

// shellWords splits a command line; double quotes keep words together.
func shellWords(line string) []string {
	var words []string
	for i, part := range strings.Split(line, `"`) {
		if i%2 == 1 {
			words = append(words, part)
			continue
		}
		words = append(words, strings.Fields(part)...)
	}
	return words
}
