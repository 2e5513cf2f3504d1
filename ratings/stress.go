package ratings

import "rungwright/catalog/quantity"

// Stress is one rating of one part at its worst use.
type Stress struct {
	Ref      string // reference designator of the worst use, "C3"
	Part     string // part number
	Quantity string // what is stressed: "peak voltage", "ripple current" …
	Value    float64
	Rating   float64 // the maker's number; zero when the sheet gives none
	Limit    float64 // what the policy allows
	Unit     quantity.Dimension
	Ratio    float64 // above 1 is over; Value/Limit, and see below for temperatures and times; at most MaxRatio
	AtLeast  bool    // Limit is a least: a life, a cold ambient
	Corner   string  // the corner at which it is worst
	Rule     Rule
	Over     bool
	Unjudged bool   // nothing to judge by; the Note says what is missing
	Note     string // assumptions made, such as a figure the sheet does not give
}

// MaxRatio bounds Stress.Ratio, so that it stays a plain number in every
// file: it stands for a limit of zero and for a part that is not allowed.
const MaxRatio = 1e6

// Rule names what judged a number.
type Rule struct {
	Policy string // "general"
	Name   string // "ceramic class 2 voltage"; empty when no rule judged
	Source string // document, table and level, or "common practice, no source"; "from memory" where so
}
