package ratings

import (
	"fmt"
	"math"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// readRipple judges the RMS current by the maker's rating at its frequency
// and ambient.
func readRipple(t *trial, u *Use) (reading, bool) {
	c := t.part.Capacitor
	if u.RippleA == 0 {
		return reading{}, false
	}
	if c.Ripple.Current == 0 {
		return shareOf(float64(u.RippleA), 0, 0), true
	}
	factor, why := rippleFactor(c, float64(u.Frequency))
	room, hot := rippleRoom(c, u.Ambient, t.part.Temperature.Most)
	r := shareOf(float64(u.RippleA), float64(c.Ripple.Current)*factor*room, t.capacitor.Ripple)
	if r.outcome == notStated { // the factors leave nothing of a rating that is stated
		r.outcome, r.ratio = bySheet, MaxRatio
	}
	r.notes |= why | hot
	return r, true
}

// rippleFactor multiplies the rated ripple current at a frequency: by the
// maker's multipliers, on lines in the logarithm of the frequency. Below the
// lowest frequency given it falls with the square root of the frequency (the
// series resistance of a loss factor rises as fast as the frequency falls);
// above the highest it stays.
func rippleFactor(c *catalog.Capacitor, f float64) (float64, notes) {
	points := c.Ripple.Multipliers
	if len(points) == 0 {
		own := catalog.FrequencyFactor{Frequency: c.Ripple.Frequency, Factor: 1}
		if f > float64(own.Frequency) {
			return 1, noMultipliers
		}
		points = []catalog.FrequencyFactor{own}
	}
	if lowest := points[0]; f < float64(lowest.Frequency) {
		return float64(lowest.Factor) * math.Sqrt(f/float64(lowest.Frequency)), belowRippleRange
	}
	for i := 1; i < len(points); i++ {
		a, b := points[i-1], points[i]
		if f < float64(b.Frequency) {
			along := math.Log(f/float64(a.Frequency)) / math.Log(float64(b.Frequency)/float64(a.Frequency))
			return float64(a.Factor) + along*float64(b.Factor-a.Factor), 0
		}
	}
	return float64(points[len(points)-1].Factor), 0
}

// rippleRoom multiplies the rated ripple current above the temperature at
// which it is rated. Heat goes with the square of the current, so that the
// current goes with the square root of the room left.
func rippleRoom(c *catalog.Capacitor, ambient, most quantity.Celsius) (float64, notes) {
	rated := c.Ripple.Temperature
	switch {
	case rated == 0 || ambient <= rated:
		return 1, 0
	case ambient >= most:
		return 0, aboveRippleTemperature
	}
	return math.Sqrt(float64(most-ambient) / float64(most-rated)), aboveRippleTemperature
}

// rippleShare is the ripple current as a share of the rating at its
// frequency; zero when there is no rating.
func rippleShare(c *catalog.Capacitor, u *Use) (float64, notes) {
	if c.Ripple.Current == 0 || u.RippleA == 0 {
		return 0, 0
	}
	factor, why := rippleFactor(c, float64(u.Frequency))
	if factor == 0 { // no frequency, no factor: as if far above its rating
		return MaxRatio, why
	}
	return math.Abs(float64(u.RippleA)) / (float64(c.Ripple.Current) * factor), why
}

// explainRipple tells the heat where there is no rating to judge by.
func explainRipple(t *trial, u *Use, r reading) string {
	if r.outcome != notStated {
		return ""
	}
	watts, ok := rippleLoss(t.part.Capacitor, u)
	if !ok {
		return "the sheet gives no loss figure either"
	}
	return fmt.Sprintf("its loss figure makes %v of heat", quantity.Watts(watts))
}
