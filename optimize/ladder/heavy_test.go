package ladder

import "os"

// heavy is the number of trials: few on every run, many where the
// environment asks for the long check, as the project's CI does.
func heavy(few, many int) int {
	if os.Getenv("RUNGWRIGHT_HEAVY") != "" {
		return many
	}
	return few
}
