package main

import (
	"fmt"
	"math"
	"strings"
)

// bar is how much of a limit is used, 1 being all of it.
type bar float64

// barCells is the length of a bar; a full one is at its limit.
const barCells = 10

// nearLimit is the share of a limit from which it is called near.
const nearLimit = 0.9

// String draws the bar, the share and a word, so that it reads without
// colour: "■■■■■■■■·· 83 %", "■■■■■■■■■■ 104 % OVER".
func (b bar) String() string {
	full := barCells
	if share := float64(b) * barCells; share < barCells {
		full = max(0, int(share)) // the last cell fills only at the limit
	}
	drawn := strings.Repeat("■", full) + strings.Repeat("·", barCells-full)
	word := ""
	switch {
	case b > 1:
		word = " OVER"
	case b >= nearLimit:
		word = " near"
	}
	return fmt.Sprintf("%s %s%s", drawn, b.percent(), word)
}

// percent says 100 % of the limit itself only, never of what is just over or
// just within it.
func (b bar) percent() string {
	p := math.Round(float64(b) * 100)
	switch {
	case !(p <= 999): // NaN too
		return ">999 %"
	case p == 100 && b > 1:
		return ">100 %"
	case p == 100 && b < 1:
		return "<100 %"
	}
	return fmt.Sprintf("%3.0f %%", p)
}

func (b bar) style() style {
	switch {
	case b > 1:
		return red
	case b >= nearLimit:
		return yellow
	}
	return green
}
