package sheet

import (
	"strings"
	"unicode"
	"unicode/utf8"

	"golang.org/x/text/unicode/norm"
	"golang.org/x/text/width"
)

// clean is a cell's text without what people cannot see or do not mean: odd
// spaces and line breaks become single spaces, signs without width go, dashes
// become -, full-width letters plain, and the several codes of µ and Ω one.
func clean(text string) string {
	text = width.Fold.String(norm.NFC.String(strings.ToValidUTF8(text, "\uFFFD")))
	return strings.Join(strings.Fields(strings.Map(plainRune, text)), " ")
}

// plainRune maps one sign; -1 drops it.
func plainRune(r rune) rune {
	switch {
	case r == '\u03bc': // Greek mu
		return '\u00b5' // micro
	case r == '\u2126': // ohm
		return '\u03a9' // Greek omega, which NFC prefers too
	case r >= '\u2010' && r <= '\u2015', r == '\u2212', r == '\ufe58', r == '\ufe63':
		return '-'
	case unicode.IsSpace(r), r == '\u2007', r == '\u2060':
		return ' '
	case unseen(r):
		return -1
	}
	return r
}

// unseen tells control characters and those that take no room or steer the
// direction of writing.
func unseen(r rune) bool { return unicode.IsControl(r) || unicode.Is(unicode.Cf, r) }

// visible is text fit for a message.
func visible(text string) string {
	return strings.Map(func(r rune) rune {
		if unseen(r) || r == '\u2028' || r == '\u2029' {
			return ' '
		}
		return r
	}, strings.ToValidUTF8(text, "\uFFFD"))
}

// cut shortens a text for a message.
func cut(text string) string {
	const most = 60
	text = strings.TrimSpace(visible(text))
	if utf8.RuneCountInString(text) <= most {
		return text
	}
	return string([]rune(text)[:most]) + "…"
}

// key is a text as headers and markers are compared: letters and digits in
// lower case without accents, anything else as single spaces.
func key(text string) string {
	text = strings.ReplaceAll(strings.ToLower(clean(text)), "ß", "ss")
	var b strings.Builder
	for _, r := range norm.NFD.String(text) {
		switch {
		case unicode.Is(unicode.Mn, r):
		case unicode.IsLetter(r) || unicode.IsDigit(r):
			b.WriteRune(r)
		default:
			b.WriteByte(' ')
		}
	}
	return strings.Join(strings.Fields(b.String()), " ")
}
