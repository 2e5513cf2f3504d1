package sheet

import (
	"fmt"
	"regexp"
	"strconv"
	"strings"
)

// maxRange is how many designators one range may stand for.
const maxRange = 5000

// maxDesignators bounds those of one cell.
const maxDesignators = 20_000

// ParseDesignators reads a list such as "C1-C4, C7; D2..D5 R3 to R6" into
// capitals, in the order written. Separators are comma, semicolon, slash,
// bar, blank and line break; ranges are written with a dash, "..", "…", "to"
// or "bis", the second letters may be left out. Every part that cannot be
// read has an error of its own.
func ParseDesignators(text string) (refs []string, errs []error) {
	for _, word := range designatorWords(text) {
		found, err := parseWord(word)
		if err == nil && len(refs)+len(found) > maxDesignators {
			return refs, append(errs, fmt.Errorf("the cell lists more than %d designators; check its ranges", maxDesignators))
		}
		if err != nil {
			errs = append(errs, err)
		}
		refs = append(refs, found...)
	}
	return refs, errs
}

var (
	// aroundRange are the blanks about the sign of a range, and the sign.
	aroundRange = regexp.MustCompile(`(?i)\s*(?:\.\.+|…|-|~)\s*`)
	spelledTo   = regexp.MustCompile(`(?i)([a-z]*[0-9]+[a-z]?)\s+(?:to|bis|thru|through)\s+([a-z]*[0-9])`)
	bracketed   = regexp.MustCompile(`([(\[])`)
	one         = regexp.MustCompile(`^([A-Z]{1,6})([0-9]{1,7})([A-Z]?)$`)
	tail        = regexp.MustCompile(`^([A-Z]{0,6})([0-9]{1,7})$`)
)

// designatorWords cuts the text at its separators, with the blanks around
// the sign of a range gone. What is in brackets stays with the word before.
func designatorWords(text string) []string {
	text = spelledTo.ReplaceAllString(clean(text), "$1-$2")
	text = aroundRange.ReplaceAllString(text, "-")
	text = strings.ReplaceAll(text, " (", "(")
	depth := 0
	return strings.FieldsFunc(text, func(r rune) bool {
		switch r {
		case '(', '[':
			depth++
		case ')', ']':
			depth--
		case ',', ';', '/', '|', ' ', '、', '､', '+', '&':
			return depth <= 0
		}
		return false
	})
}

// parseWord reads one designator or one range.
func parseWord(word string) ([]string, error) {
	upper := strings.ToUpper(word)
	if one.MatchString(upper) {
		return []string{upper}, nil
	}
	if inner := bracketed.FindStringIndex(word); inner != nil && insideMarker(word[inner[0]:]) != "" {
		return nil, fmt.Errorf("%q says that it is not fitted within the list of designators; put it in a row of its own, with %q in a column headed fitted",
			cut(word), "no")
	}
	first, last, isRange := strings.Cut(upper, "-")
	if !isRange || !one.MatchString(first) || !tail.MatchString(last) {
		return nil, notDesignator(word, upper)
	}
	return spread(word, first, last)
}

func notDesignator(word, upper string) error {
	switch {
	case isMarker(word):
		return fmt.Errorf("%q stands among the designators; put it in a column headed fitted", cut(word))
	case strings.HasSuffix(upper, "?"):
		return fmt.Errorf("%q has no number yet; number the parts", cut(word))
	}
	return fmt.Errorf("%q is not a designator; write letters and a number, such as C12, or a range such as C1-C4", cut(word))
}

// spread writes out a range.
func spread(word, first, last string) ([]string, error) {
	from, to := one.FindStringSubmatch(first), tail.FindStringSubmatch(last)
	low, _ := strconv.Atoi(from[2]) // seven digits at most
	high, _ := strconv.Atoi(to[2])
	switch {
	case from[3] != "":
		return nil, fmt.Errorf("%q is a range from a designator with a letter at its end; list its designators one by one", cut(word))
	case to[1] != "" && to[1] != from[1]:
		return nil, fmt.Errorf("%q runs from %s to %s; write a range of one kind, such as %s-%s%s", cut(word), first, last, first, from[1], to[2])
	case to[1] == "" && high <= low:
		return nil, fmt.Errorf("%q may be a range or the name of a pin; write %s alone, or the range in full, such as %s1-%s4", cut(word), first, from[1], from[1])
	case high < low:
		return nil, fmt.Errorf("%q runs backwards; write %s%s-%s%s", cut(word), from[1], to[2], from[1], from[2])
	case high-low >= maxRange:
		return nil, fmt.Errorf("%q stands for %d designators; %d are the most; check the numbers", cut(word), high-low+1, maxRange)
	}
	refs := make([]string, 0, high-low+1)
	for n := low; n <= high; n++ {
		refs = append(refs, fmt.Sprintf("%s%0*d", from[1], paddedTo(from[2]), n))
	}
	return refs, nil
}

// paddedTo is how many digits the numbers of a range have at least: those of
// its first when that starts with a zero.
func paddedTo(digits string) int {
	if strings.HasPrefix(digits, "0") {
		return len(digits)
	}
	return 1
}

// sameDesignator is a designator without the zeros before its number: C01
// and C1 are one.
func sameDesignator(ref string) string {
	p := one.FindStringSubmatch(ref)
	if p == nil {
		return ref
	}
	digits := strings.TrimLeft(p[2], "0")
	if digits == "" {
		digits = "0"
	}
	return p[1] + digits + p[3]
}
