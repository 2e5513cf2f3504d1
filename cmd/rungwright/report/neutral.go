package report

import (
	"strings"
	"unicode"
)

// neutral replaces what could break a document or reorder what a reader sees:
// control characters, bidirectional controls, zero-width and other invisible
// format characters, bytes that are not UTF-8. Each becomes one visible mark,
// so that the reader knows that something stood there.
func neutral(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r == '\n' || r == '\t':
			return r
		case r == '\r':
			return '\n'
		case unicode.IsControl(r), unicode.Is(unicode.Cf, r), r == '\u2028', r == '\u2029',
			r == 0xFFFE, r == 0xFFFF, unicode.Is(unicode.Co, r):
			return unicode.ReplacementChar
		}
		return r
	}, strings.ToValidUTF8(s, "\uFFFD"))
}
