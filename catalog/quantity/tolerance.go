package quantity

import (
	"errors"
	"fmt"
	"regexp"
	"strings"
)

// Tolerance is how far a value may lie below and above what is marked, both
// as positive proportions: −20/+80 % is {0.2, 0.8}.
type Tolerance struct{ Low, High Ratio }

// toleranceLetters are those of IEC 60062, from memory.
var toleranceLetters = map[string]Tolerance{
	"E": {0.00005, 0.00005},
	"L": {0.0001, 0.0001},
	"P": {0.0002, 0.0002},
	"W": {0.0005, 0.0005},
	"B": {0.001, 0.001},
	"C": {0.0025, 0.0025},
	"D": {0.005, 0.005},
	"F": {0.01, 0.01},
	"G": {0.02, 0.02},
	"H": {0.03, 0.03},
	"J": {0.05, 0.05},
	"K": {0.1, 0.1},
	"M": {0.2, 0.2},
	"N": {0.3, 0.3},
	"Q": {0.1, 0.3},
	"T": {0.1, 0.5},
	"S": {0.2, 0.5},
	"Z": {0.2, 0.8},
}

// ToleranceLetter is the meaning of a tolerance letter of IEC 60062, in per
// cent. (On capacitors below 10 pF the letters B to G are picofarads instead.)
func ToleranceLetter(letter string) (Tolerance, bool) {
	t, ok := toleranceLetters[letter]
	return t, ok
}

// twoSided is "-20/+80 %" and its like, each side with its sign.
var twoSided = regexp.MustCompile(`^([+-][0-9.]+)\s*%?\s*/?\s*([+-][0-9.]+)\s*%$`)

// ParseTolerance reads "10 %", "±10 %", "-20/+80 %" (either order) or a
// letter of IEC 60062.
func ParseTolerance(text string) (Tolerance, error) {
	plain := strings.TrimSpace(strings.ReplaceAll(text, "−", "-"))
	if t, ok := ToleranceLetter(plain); ok {
		return t, nil
	}
	if sides := twoSided.FindStringSubmatch(plain); sides != nil {
		return twoSides(text, sides[1], sides[2])
	}
	plain = strings.TrimSpace(strings.TrimPrefix(strings.TrimPrefix(plain, "±"), "+/-"))
	r, err := Read[Ratio](plain)
	if err != nil {
		return Tolerance{}, notTolerance(text)
	}
	if r < 0 {
		return Tolerance{}, fmt.Errorf("%q gives one side alone; write both, such as -20/+80 %%", text)
	}
	return Tolerance{r, r}, nil
}

func twoSides(text, first, second string) (Tolerance, error) {
	a, errA := Read[Ratio](first + " %")
	b, errB := Read[Ratio](second + " %")
	switch {
	case errors.Join(errA, errB) != nil:
		return Tolerance{}, notTolerance(text)
	case first[0] == second[0]:
		return Tolerance{}, fmt.Errorf("%q gives one side twice; write both, such as -20/+80 %%", text)
	case first[0] == '-':
		return Tolerance{-a, b}, nil
	}
	return Tolerance{-b, a}, nil
}

func notTolerance(text string) error {
	if len(text) > maxText {
		text = text[:20] + "…"
	}
	return fmt.Errorf("%q is not a tolerance; write it such as 10 %%, -20/+80 %% or a letter of IEC 60062 such as K", text)
}

// String prints "±10 %" or "-20/+80 %", which ParseTolerance reads; it is
// empty when both sides are zero.
func (t Tolerance) String() string {
	switch {
	case t == Tolerance{}:
		return ""
	case t.Low == t.High:
		return "±" + t.Low.String()
	}
	return "-" + strings.TrimSuffix(t.Low.String(), " %") + "/+" + t.High.String()
}
