package ladder

import (
	"os"
	"testing"
)

// heavy is the number of trials: few on every run, fewer with -short, many
// where the environment asks for the long check, as the project's CI does.
func heavy(few, many int) int {
	switch {
	case os.Getenv("RUNGWRIGHT_HEAVY") != "":
		return many
	case testing.Short():
		return max(1, few/6)
	}
	return few
}
