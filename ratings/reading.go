package ratings

import (
	"math"

	"rungwright/catalog/quantity"
)

// outcome is what judged a reading.
type outcome int

const (
	byRule    outcome = iota // the policy
	byMaker                  // no rule; the maker's rating
	bySheet                  // the maker's figure, which no policy derates
	noRule                   // no rule for the part's first rating: over
	banned                   // the policy forbids the part: over
	notStated                // the sheet gives no rating: not judged
	noLimit                  // neither the policy nor any sheet limits it: not judged
)

// rounding is how far a value may pass its limit and still be at it: the room
// for the rounding of a product.
const rounding = 1e-9

// reading is one use against its limit, without words.
type reading struct {
	value, rating, limit float64
	ratio                float64
	atLeast              bool
	outcome              outcome
	notes                notes
}

func (r reading) over() bool { return r.ratio > 1+rounding }

// worse orders readings by ratio; those without one by value.
func (r reading) worse(than reading) bool {
	if r.ratio != than.ratio {
		return r.ratio > than.ratio
	}
	if r.atLeast {
		return r.value < than.value
	}
	return r.value > than.value
}

// shareOf judges a value by the policy's share of a rating, or by the rating
// itself where the policy has no share. A rating of zero is one not stated.
func shareOf(value, rating float64, share quantity.Ratio) reading {
	return shareOr(value, rating, share, 1)
}

// shareOr is shareOf with another share where the policy has none.
func shareOr(value, rating float64, share, otherwise quantity.Ratio) reading {
	r := reading{value: math.Abs(value), rating: rating}
	if rating == 0 {
		r.outcome = notStated
		return r
	}
	if share == 0 {
		share, r.outcome = otherwise, byMaker
	}
	r.limit = rating * float64(share)
	r.ratio = ratioOf(r.value, r.limit)
	return r
}

// firstShare is shareOf for a part's first rating: without a rule for it, or
// without the rating, the part does not pass.
func firstShare(value, rating float64, share quantity.Ratio, forbidden bool) reading {
	r := shareOf(value, rating, share).first(share != 0, forbidden)
	if r.outcome == notStated {
		r.ratio = MaxRatio
	}
	return r
}

// first turns a reading over where the policy forbids the part or is silent.
func (r reading) first(ruled, forbidden bool) reading {
	switch {
	case forbidden:
		r.outcome = banned
	case !ruled:
		r.outcome = noRule
	default:
		return r
	}
	r.limit, r.ratio = 0, MaxRatio
	return r
}

// ratioOf is value over limit within 0 and MaxRatio. What is not a number is
// over: nothing passes for want of sense.
func ratioOf(value, limit float64) float64 {
	switch {
	case value == 0 && limit >= 0:
		return 0
	case limit > 0 && value <= limit*MaxRatio:
		return value / limit
	}
	return MaxRatio
}

// atMostCelsius judges a temperature; the ratio is the used share of the room
// from 25 °C (or from 10 K below a lower limit) up to the limit.
func atMostCelsius(value, rating, limit float64) reading {
	from := min(25, limit-10)
	return reading{value: value, rating: rating, limit: limit, ratio: betweenCelsius(value-from, limit-from)}
}

// atLeastCelsius is the same downwards, for the cold.
func atLeastCelsius(value, rating, limit float64) reading {
	from := max(25, limit+10)
	return reading{value: value, rating: rating, limit: limit, ratio: betweenCelsius(from-value, from-limit), atLeast: true}
}

func betweenCelsius(used, room float64) float64 {
	if used < 0 {
		return 0
	}
	return ratioOf(used, room)
}

// atLeast judges a value that must not be less than the limit.
func atLeast(value, rating, limit float64) reading {
	return reading{value: value, rating: rating, limit: limit, ratio: ratioOf(limit, value), atLeast: true}
}
