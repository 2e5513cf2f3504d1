package form

import (
	"fmt"
	"slices"
	"strings"
	"unicode"
)

// Unknown is the message for a word that is not among the known ones, with
// the nearest of them, or with all when none is near: `unknown key
// "tolerence"; did you mean "tolerance"?`.
func Unknown(what, word string, known []string) string {
	if near := Nearest(word, known); near != "" {
		return fmt.Sprintf("unknown %s %q; did you mean %q?", what, short(word), near)
	}
	const most = 24
	if len(known) == 0 || len(known) > most {
		return fmt.Sprintf("unknown %s %q", what, short(word))
	}
	sorted := slices.Clone(known)
	slices.Sort(sorted)
	return fmt.Sprintf("unknown %s %q; known here: %s", what, short(word), strings.Join(sorted, ", "))
}

// Nearest is the known word that a person most likely meant, "" when none is
// near: fewest slips (a letter wrong, missing, too many, or two swapped), at
// most one in three letters; the first in the alphabet among equals.
func Nearest(word string, known []string) string {
	plain := plainWord(word)
	const longest = 100
	if plain == "" || len(plain) > longest {
		return ""
	}
	best, least := "", max(1, len([]rune(plain))/3)+1
	sorted := slices.Clone(known)
	slices.Sort(sorted)
	for _, k := range sorted {
		if n := Slips(plain, plainWord(k)); n < least {
			best, least = k, n
		}
	}
	return best
}

// plainWord drops what people vary: letter case, spaces and joining signs.
func plainWord(word string) string {
	return strings.Map(func(r rune) rune {
		if unicode.IsSpace(r) || r == '_' || r == '-' {
			return -1
		}
		return unicode.ToLower(r)
	}, word)
}

// Slips is the number of slips between two words: the optimal string
// alignment distance, which counts a swap of neighbours as one.
func Slips(a, b string) int {
	x, y := []rune(a), []rune(b)
	before, last, row := make([]int, len(y)+1), make([]int, len(y)+1), make([]int, len(y)+1)
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(x); i++ {
		row[0] = i
		for j := 1; j <= len(y); j++ {
			differ := 1
			if x[i-1] == y[j-1] {
				differ = 0
			}
			row[j] = min(last[j]+1, row[j-1]+1, last[j-1]+differ)
			if i > 1 && j > 1 && x[i-1] == y[j-2] && x[i-2] == y[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
		}
		before, last, row = last, row, before
	}
	return last[len(y)]
}
