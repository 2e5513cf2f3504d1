package quantity

import (
	"fmt"
	"slices"
	"strings"
	"unicode"
)

// A refusal first quotes what was read, then says how to mend it.

func tooLong(text string, d Dimension) error {
	runes := []rune(text)
	return fmt.Errorf("%q… is %d characters long; write %s in %d or fewer, such as %s",
		string(runes[:20]), len(runes), d.Name(), maxText, d.Example())
}

func outOfRange(text string) error {
	return fmt.Errorf("%q is beyond what a number can hold; check the exponent", text)
}

func noUnit(text string, d Dimension) error {
	return fmt.Errorf("%q has no unit; write a number and a unit, such as %s", text, d.Example())
}

func notA(text string, d Dimension) error {
	if d == None {
		return fmt.Errorf("%q is not a plain number; write it without a unit, such as %s", text, d.Example())
	}
	return fmt.Errorf("%q is not %s; write a number and a unit, such as %s", text, d.Name(), d.Example())
}

// explainNumber is the refusal of text that does not start with a number.
func explainNumber(text string, d Dimension) error {
	bare := strings.ToLower(strings.TrimLeft(text, "+-−"))
	switch {
	case text == "":
		return fmt.Errorf("nothing is written; write %s, such as %s", d.Name(), d.Example())
	case strings.HasPrefix(bare, "nan"), strings.HasPrefix(bare, "inf"), strings.HasPrefix(bare, "∞"):
		return fmt.Errorf("%q is not a finite number; write %s, such as %s", text, d.Name(), d.Example())
	case strings.HasPrefix(bare, ","):
		return separator(text, "write the decimal point as a full stop")
	}
	return notA(text, d)
}

// explainUnit is the refusal of a number followed by something that is not a
// unit of the dimension.
func explainUnit(text, rest string, d Dimension) error {
	if err := explainDigits(text, rest); err != nil {
		return err
	}
	spelled := plainUnit(strings.TrimSpace(rest))
	if d == Capacitance && spelled == "MF" {
		return fmt.Errorf("%q would be millions of farads; write uF for microfarads or mF for millifarads", text)
	}
	if spelled, ok := spellOut(text, d); ok {
		return fmt.Errorf("%q leaves the unit out; write %s", text, spelled)
	}
	if other, ok := measures(spelled); ok {
		if d == None {
			return notA(text, d)
		}
		return fmt.Errorf("%q is in %s; write %s, such as %s", text, nouns[other].units, nouns[d].units, d.Example())
	}
	if near := otherCase(spelled, d); len(near) > 0 {
		return fmt.Errorf("%q has no unit known here; did you mean %s?", text, strings.Join(near, " or "))
	}
	return notA(text, d)
}

// spellOut turns a code that is not read for the dimension, such as 3V3, 4m7
// or 4.7k, into a value that is.
func spellOut(text string, d Dimension) (string, bool) {
	n, rest := scanNumber(text)
	plain := plainUnit(rest)
	letter := strings.TrimRight(plain, "0123456789")
	decimals := plain[len(letter):]
	if d == None || n.exponent != "" || n.point && decimals != "" {
		return "", false
	}
	if _, other := measures(letter); other && decimals == "" {
		return "", false
	}
	unit := mainSymbol(d)
	if letter != unit {
		unit = letter + unit
	}
	if _, ok := spellings[d][unit]; !ok {
		return "", false
	}
	return strings.Trim(n.whole+"."+n.decimal+decimals, ".") + " " + unit, true
}

// mainSymbol is the base unit of a dimension as one types it.
func mainSymbol(d Dimension) string {
	i := slices.IndexFunc(units, func(u unit) bool { return u.dimension == d })
	return strings.Replace(units[i].symbols[0], "Ω", "ohm", 1)
}

// measures names the first dimension that has the unit.
func measures(spelled string) (Dimension, bool) {
	for _, u := range units {
		if _, ok := spellings[u.dimension][spelled]; ok {
			return u.dimension, true
		}
	}
	return None, false
}

// otherCase lists the units of the dimension that differ in letter case
// alone, sorted.
func otherCase(spelled string, d Dimension) []string {
	var near []string
	for s := range spellings[d] {
		if strings.EqualFold(s, spelled) {
			near = append(near, s)
		}
	}
	slices.Sort(near)
	return near
}

// explainDigits recognises the usual ways in which a number goes on after
// what was taken for its end.
func explainDigits(text, rest string) error {
	trimmed := strings.TrimLeftFunc(rest, unicode.IsSpace)
	switch {
	case strings.HasPrefix(rest, ",") && thousands(rest[1:]):
		return separator(text, "a comma may mean thousands or a decimal point; write neither a comma nor a gap within the digits")
	case strings.HasPrefix(rest, ","):
		return separator(text, "write the decimal point as a full stop")
	case strings.HasPrefix(rest, "_"), strings.HasPrefix(rest, "'"), strings.HasPrefix(rest, "’"),
		rest != trimmed && startsWithDigit(trimmed):
		return separator(text, "write the digits without a gap or a mark between them")
	case strings.HasPrefix(rest, "."):
		return separator(text, "there is more than one decimal point; write one")
	case strings.HasPrefix(rest, "x"), strings.HasPrefix(rest, "X"):
		return separator(text, "write a plain decimal number")
	case strings.HasPrefix(trimmed, "/") && startsWithDigit(trimmed[1:]):
		return separator(text, "write the fraction as a decimal, such as 0.25")
	}
	return nil
}

func separator(text, mend string) error { return fmt.Errorf("%q: %s", text, mend) }

// thousands tells whether exactly three digits stand at the start.
func thousands(text string) bool {
	digits, _ := cutDigits(text)
	return len(digits) == 3
}

func startsWithDigit(text string) bool { return text != "" && text[0] >= '0' && text[0] <= '9' }
