package ratings

import (
	"math"
	"strings"
	"testing"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// 0.1 A at 120 Hz, `general` 80 %: 80 mA pass.
func TestRippleAtTheLimit(t *testing.T) {
	p := shippedPolicy(t, "general")
	for amps, over := range map[float64]bool{0.08: false, above(0.08): true, -0.081: true} {
		s := find(t, p, electrolytic(nil), ripple(amps, 120, 65), "ripple current, RMS")
		if s.Over != over || !near(s.Limit, 0.08) || !near(s.Rating, 0.1) {
			t.Errorf("%v A: got %+v", amps, s)
		}
	}
}

func TestRippleFactorByFrequency(t *testing.T) {
	part := electrolytic(func(_ *catalog.Part, c *catalog.Capacitor) {
		c.Ripple.Multipliers = []catalog.FrequencyFactor{{Frequency: 100, Factor: 1}, {Frequency: 1e3, Factor: 1.3}, {Frequency: 10e3, Factor: 1.5}}
	})
	for _, c := range []struct{ hertz, factor float64 }{
		{25, 0.5},              // √(25/100): below the sheet's range
		{100, 1},               // on a point
		{math.Sqrt(1e5), 1.15}, // 316.2 Hz, halfway in log f
		{1e3, 1.3},             // on a point
		{math.Sqrt(1e7), 1.4},  // 3162 Hz
		{10e3, 1.5},            // on the last
		{100e3, 1.5},           // stays beyond
	} {
		s := find(t, shippedPolicy(t, "general"), part, ripple(0.01, c.hertz, 65), "ripple current, RMS")
		if !near(s.Rating, 0.1*c.factor) {
			t.Errorf("%v Hz: rating %v A, want %v A", c.hertz, s.Rating, 0.1*c.factor)
		}
		if said := strings.Contains(s.Note, "square root of the frequency"); said != (c.hertz < 100) || !said && s.Note != "" {
			t.Errorf("%v Hz: note %q", c.hertz, s.Note)
		}
	}
}

// Without multipliers the rating holds from its own frequency up, and falls
// with the root of the frequency below: 30 Hz of 120 Hz is half.
func TestRippleWithoutMultipliers(t *testing.T) {
	p := shippedPolicy(t, "general")
	for hertz, rating := range map[float64]float64{30: 0.05, 120: 0.1, 1e4: 0.1} {
		s := find(t, p, electrolytic(nil), ripple(0.01, hertz, 65), "ripple current, RMS")
		if !near(s.Rating, rating) || strings.Contains(s.Note, "no frequency multipliers") != (hertz > 120) {
			t.Errorf("%v Hz: got %+v", hertz, s)
		}
	}
	if s := find(t, p, electrolytic(nil), ripple(0.01, 0, 65), "ripple current, RMS"); !s.Over || s.Unjudged {
		t.Errorf("no frequency: got %+v", s)
	}
}

// A rating without a temperature holds at any.
func TestRippleWithoutTemperature(t *testing.T) {
	part := electrolytic(func(_ *catalog.Part, c *catalog.Capacitor) { c.Ripple.Temperature = 0 })
	if s := find(t, shippedPolicy(t, "general"), part, ripple(0.01, 120, 100), "ripple current, RMS"); !near(s.Rating, 0.1) || s.Note != "" {
		t.Errorf("got %+v", s)
	}
}

// Rated at 85 °C, highest 105 °C: at 100 °C a quarter of the room is left,
// half the current; at 105 °C none.
func TestRippleAboveItsTemperature(t *testing.T) {
	part := electrolytic(func(_ *catalog.Part, c *catalog.Capacitor) { c.Ripple.Temperature = 85 })
	p := shippedPolicy(t, "general")
	if s := find(t, p, part, ripple(0.01, 120, 85), "ripple current, RMS"); !near(s.Rating, 0.1) || s.Note != "" {
		t.Errorf("at 85 °C: got %+v", s)
	}
	if s := find(t, p, part, ripple(0.01, 120, 100), "ripple current, RMS"); !near(s.Rating, 0.05) || s.Note == "" {
		t.Errorf("at 100 °C: got %+v", s)
	}
	if s := find(t, p, part, ripple(0.01, 120, 105), "ripple current, RMS"); !s.Over || s.Ratio != MaxRatio {
		t.Errorf("at 105 °C: got %+v", s)
	}
}

func ripple(amps, hertz, ambient float64) Use {
	return Use{Ambient: celsius(ambient), Frequency: quantity.Hertz(hertz), RippleA: quantity.Amps(amps)}
}
