package sheet

import (
	"fmt"
	"regexp"
	"strings"
	"unicode"
)

// The sign before the decimals, as a column uses it.
const (
	undecided rune = 0
	mixed     rune = 'x' // some of its numbers use the one, some the other
)

var (
	plainNumber = regexp.MustCompile(`^[-+]?(?:[0-9]+(?:\.[0-9]*)?|\.[0-9]+)(?:[eE][-+]?[0-9]{1,3})?$`)
	groupedBy   = map[rune]*regexp.Regexp{
		'.': regexp.MustCompile(`^[-+]?[0-9]{1,3}(?:\.[0-9]{3})+(?:,[0-9]*)?$`), // 1.234.567,8
		',': regexp.MustCompile(`^[-+]?[0-9]{1,3}(?:,[0-9]{3})+(?:\.[0-9]*)?$`), // 1,234,567.8
	}
	oneMark = regexp.MustCompile(`^([-+]?)([0-9]*)([.,])([0-9]*)$`)
)

// bareNumber drops what stands about a number's digits: blanks and
// apostrophes between groups of three, currency signs at either end.
func bareNumber(text string) string {
	text = clean(text)
	text = strings.TrimFunc(text, func(r rune) bool { return unicode.Is(unicode.Sc, r) || r == ' ' })
	if groupedByBlank.MatchString(text) {
		text = strings.NewReplacer(" ", "", "'", "", "\u2019", "").Replace(text)
	}
	return text
}

var groupedByBlank = regexp.MustCompile(`^[-+]?[0-9]{1,3}(?:[ '\x{2019}][0-9]{3})+(?:[.,][0-9]*)?$`)

// markOf tells which sign stands before the decimals of a number; undecided
// when it has none of the two or could be read either way, such as 1,234.
func markOf(text string) rune {
	text = bareNumber(text)
	point, comma := strings.Count(text, "."), strings.Count(text, ",")
	switch {
	case point > 0 && comma > 0:
		if strings.LastIndex(text, ",") > strings.LastIndex(text, ".") {
			return ','
		}
		return '.'
	case point > 1:
		return ','
	case comma > 1:
		return '.'
	case point+comma == 0 || isAmbiguous(text):
		return undecided
	}
	if m := oneMark.FindStringSubmatch(text); m != nil {
		return rune(m[3][0])
	}
	return undecided
}

// isAmbiguous tells 1,234 and 1.234, which may have a mark of thousands or of
// decimals.
func isAmbiguous(text string) bool {
	m := oneMark.FindStringSubmatch(text)
	return m != nil && len(m[4]) == 3 && len(m[2]) >= 1 && len(m[2]) <= 3 && m[2][0] != '0'
}

// decideMark settles a column's sign by those of its numbers that leave no
// doubt.
func decideMark(texts []string) rune {
	decided := undecided
	for _, text := range texts {
		mark := markOf(text)
		switch {
		case mark == undecided || mark == decided:
		case decided == undecided:
			decided = mark
		default:
			return mixed
		}
	}
	return decided
}

// readNumber writes a number of a sheet plainly, with a point before its
// decimals: "1.234,50 €" becomes "1234.50". The mark is the one of its
// column. The error says what to do, without the place.
func readNumber(text string, mark rune) (string, error) {
	bare := bareNumber(text)
	own := markOf(bare)
	if own == undecided && isAmbiguous(bare) {
		if mark != '.' && mark != ',' {
			return "", fmt.Errorf("%q may be a number with thousands or with decimals; write it without the mark of thousands, or say which sign stands before the decimals", cut(text))
		}
		own = mark
	}
	if (mark == '.' || mark == ',') && own != undecided && own != mark {
		return "", fmt.Errorf("%q does not fit the other numbers of its column, whose decimals follow a %q; write it likewise", cut(text), mark)
	}
	plain := bare
	switch {
	case own == ',' && strings.Contains(bare, "."):
		if !groupedBy['.'].MatchString(bare) {
			return "", notNumber(text)
		}
		plain = strings.ReplaceAll(plain, ".", "")
	case own == '.' && strings.Contains(bare, ","):
		if !groupedBy[','].MatchString(bare) {
			return "", notNumber(text)
		}
		plain = strings.ReplaceAll(plain, ",", "")
	}
	plain = strings.ReplaceAll(plain, ",", ".")
	if !plainNumber.MatchString(plain) {
		return "", notNumber(text)
	}
	return plain, nil
}

func notNumber(text string) error {
	return fmt.Errorf("%q is not a number; write digits alone", cut(text))
}
