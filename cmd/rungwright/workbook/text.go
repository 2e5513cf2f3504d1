package workbook

import (
	"strings"
	"unicode"
	"unicode/utf8"
)

// mostText is how much of a text goes into a cell: far below the 32,767
// UTF-16 units at which office programs cut without a word.
const mostText = 2000

// clean makes any text fit to be shown: control characters and the marks
// that turn the reading direction are dropped, line breaks become spaces, bad
// UTF-8 becomes U+FFFD, and what is too long ends in an ellipsis.
func clean(s string) string { return cut(strings.Join(strings.Fields(strip(s)), " "), mostText) }

// strip drops what cannot be seen.
func strip(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r == '\n' || r == '\r' || r == '\t' || r == '\v' || r == '\f' || r == 0x85:
			return ' '
		case unicode.IsControl(r), r == 0xFEFF, r == 0xFFFE, r == 0xFFFF:
			return -1
		case r >= 0x202A && r <= 0x202E, r >= 0x2066 && r <= 0x2069, r == 0x200E, r == 0x200F:
			return -1
		}
		return r
	}, strings.ToValidUTF8(s, "\uFFFD"))
}

// cut shortens to at most n characters.
func cut(s string, n int) string {
	if utf8.RuneCountInString(s) <= n {
		return s
	}
	return string([]rune(s)[:n-1]) + "…"
}

// width is about how wide a text shows, in digits of a sans-serif face: East
// Asian wide characters count twice.
func width(s string) float64 {
	w := 0.0
	for _, r := range s {
		switch {
		case unicode.Is(unicode.Mn, r):
		case r >= 0x1100 && unicode.In(r, unicode.Han, unicode.Hangul, unicode.Hiragana, unicode.Katakana), r >= 0xFF01 && r <= 0xFF60, r >= 0x1F300:
			w += 2
		case strings.ContainsRune(" .,:;'|!()[]ijlftrI-·", r):
			w += 0.55
		case strings.ContainsRune("mwMW@%—…", r):
			w += 1.5
		case unicode.IsUpper(r):
			w += 1.22
		default:
			w++
		}
	}
	return w
}

// footer doubles ampersands, which begin codes in headers and footers.
func footer(s string, most int) string { return strings.ReplaceAll(cut(clean(s), most), "&", "&&") }
