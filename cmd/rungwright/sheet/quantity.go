package sheet

import (
	"errors"
	"fmt"
	"regexp"
	"strconv"
	"strings"

	"github.com/shopspring/decimal"
)

// QuantitySource says what counts where the quantity and the number of
// designators disagree.
type QuantitySource string

// The sources.
const (
	ByDesignators QuantitySource = "designators"
	ByColumn      QuantitySource = "column"
)

// maxQuantity of one row; more is a slip.
const maxQuantity = 1_000_000

// counted is a number with a word for pieces, or with a times sign before or
// behind it.
var counted = regexp.MustCompile(`(?i)^(?:[x×]\s*)?([-+0-9][0-9., '’]*?)\s*(?:pcs?\.?|pieces?|ea\.?|each|off|st\.?|stk\.?|stück|pièces?|pce?s?|x|×)?$`)

// parseQuantity reads a whole number of pieces; words tells that it held
// more than the number.
func parseQuantity(text string, mark rune) (n int, words bool, err error) {
	bare := clean(text)
	if m := counted.FindStringSubmatch(bare); m != nil {
		words = strings.TrimSpace(m[1]) != bare
		bare = m[1]
	}
	plain, err := readNumber(bare, mark)
	if err != nil {
		return 0, false, fmt.Errorf("quantity: %w", err)
	}
	d, err := decimal.NewFromString(plain)
	switch {
	case err != nil:
		return 0, false, fmt.Errorf("quantity: %w", notNumber(text))
	case d.IsNegative():
		return 0, false, fmt.Errorf("quantity: %q is negative; write how many pieces one unit needs", cut(text))
	case !d.IsInteger():
		return 0, false, fmt.Errorf("quantity: %q is not a whole number; write pieces", cut(text))
	case d.GreaterThan(decimal.NewFromInt(maxQuantity)):
		return 0, false, fmt.Errorf("quantity: %q is beyond any unit's need; check it", cut(text))
	}
	n, err = strconv.Atoi(d.String())
	if err != nil {
		return 0, false, errors.New("quantity: " + notNumber(text).Error())
	}
	return n, words, nil
}
