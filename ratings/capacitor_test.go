package ratings

import (
	"math"
	"strings"
	"testing"

	"rungwright/catalog"
)

// 1000 V class 2 under `general` (60 %): 600 V passes, a millionth more does
// not; the sign does not matter.
func TestPeakVoltageAtTheLimit(t *testing.T) {
	p, part := shippedPolicy(t, "general"), capacitor(nil)
	for _, c := range []struct {
		volts, ratio float64
		over         bool
	}{{300, 0.5, false}, {600, 1, false}, {above(600), above(1), true}, {-601, 601.0 / 600, true}, {-600, 1, false}} {
		s := find(t, p, part, Use{Ref: "C3", Corner: "high line", Ambient: 40, PeakV: volt(c.volts)}, "peak voltage")
		if s.Limit != 600 || s.Rating != 1000 || !near(s.Ratio, c.ratio) || s.Over != c.over || s.Value != math.Abs(c.volts) {
			t.Errorf("%v V: got %+v", c.volts, s)
		}
		if s.Ref != "C3" || s.Corner != "high line" || s.Part != "CAP" || s.Rule != (Rule{"general", "ceramic class 2 voltage", "common practice, no source"}) {
			t.Errorf("%v V: got %+v", c.volts, s)
		}
	}
}

func TestAlternatingVoltage(t *testing.T) {
	p := policyText(t, "capacitors: [{technology: film, voltage: 70 %, ac_voltage: 50 %}]")
	part := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.Technology, c.ACVoltage = catalog.Film, 200 })
	if s := find(t, p, part, Use{Ambient: 25, ACV: 100}, "AC voltage, RMS"); s.Over || s.Limit != 100 || s.Ratio != 1 {
		t.Errorf("at the limit: %+v", s)
	}
	if s := find(t, p, part, Use{Ambient: 25, ACV: 100.001}, "AC voltage, RMS"); !s.Over {
		t.Errorf("above it: %+v", s)
	}
	if _, there := lookFor(p, electrolytic(nil), Use{ACV: 1}, "AC voltage, RMS"); there {
		t.Error("an electrolytic's alternating part is its ripple current")
	}
}

// Film above 85 °C loses rated voltage; no catalog says how much, so a note does.
func TestFilmAboveItsKneeIsNoted(t *testing.T) {
	p := shippedPolicy(t, "general")
	part := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.Technology, c.ACVoltage = catalog.Film, 200 })
	for _, name := range []string{"peak voltage", "AC voltage, RMS"} {
		if s := find(t, p, part, Use{Ambient: 85, PeakV: 1, ACV: 1}, name); strings.Contains(s.Note, "1.25 %") {
			t.Errorf("%s at 85 °C: note %q", name, s.Note)
		}
		if s := find(t, p, part, Use{Ambient: 85.5, PeakV: 1, ACV: 1}, name); !strings.Contains(s.Note, "1.25 %") {
			t.Errorf("%s above 85 °C: note %q", name, s.Note)
		}
	}
	if s := find(t, p, capacitor(nil), Use{Ambient: 100, PeakV: 1}, "peak voltage"); s.Note != "" {
		t.Errorf("ceramic at 100 °C: note %q", s.Note)
	}
}

func TestSlewRate(t *testing.T) {
	p := policyText(t, "capacitors: [{technology: [film, aluminium electrolytic], voltage: 70 %, slew: 50 %}]")
	part := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.Technology, c.Slew = catalog.Film, 80e6 })
	if s := find(t, p, part, Use{SlewVps: 40e6}, "rate of voltage change"); s.Over || s.Limit != 40e6 {
		t.Errorf("at the limit: %+v", s)
	}
	if s := find(t, p, part, Use{SlewVps: 41e6}, "rate of voltage change"); !s.Over {
		t.Errorf("above it: %+v", s)
	}
	if _, there := lookFor(p, electrolytic(nil), Use{SlewVps: 1}, "rate of voltage change"); there {
		t.Error("an electrolytic is not rated by it")
	}
}

// `general`: 10 K below 125 °C is 115 °C. The ratio is the share of the room
// from 25 °C used: (70−25)/(115−25) = 0.5.
func TestBodyTemperature(t *testing.T) {
	p, part := shippedPolicy(t, "general"), capacitor(nil)
	for _, c := range []struct {
		ambient, ratio float64
		over           bool
	}{{-20, 0, false}, {25, 0, false}, {25.9, 0.01, false}, {70, 0.5, false}, {115, 1, false}, {115.001, 90.001 / 90, true}} {
		s := find(t, p, part, Use{Ambient: celsius(c.ambient)}, "body temperature")
		if s.Note != "" || s.Limit != 115 || s.Rating != 125 || !near(s.Ratio, c.ratio) || s.Over != c.over {
			t.Errorf("%v °C: got %+v", c.ambient, s)
		}
	}
}

// A limit below 35 °C leaves 10 K of room to measure by: limit 30 °C, from
// 20 °C; 25 °C is half of it.
func TestTemperatureRatioOfALowLimit(t *testing.T) {
	part := capacitor(func(p *catalog.Part, _ *catalog.Capacitor) { p.Temperature = catalog.Range{Least: -10, Most: 40} })
	s := find(t, shippedPolicy(t, "general"), part, Use{Ambient: 25}, "body temperature")
	if s.Limit != 30 || !near(s.Ratio, 0.5) {
		t.Errorf("got %+v", s)
	}
}

// A policy's own figure never allows more than the maker: NASA's 110 °C on an
// 85 °C part is 85 °C, and on one without a figure it counts alone.
func TestTemperatureRuleAndMaker(t *testing.T) {
	p := shippedPolicy(t, "nasa-eee-inst-002")
	for most, want := range map[float64]float64{85: 85, 110: 110, 125: 110, 0: 110} {
		part := capacitor(func(p *catalog.Part, _ *catalog.Capacitor) { p.Temperature.Most = celsius(most) })
		s := find(t, p, part, Use{Ambient: 40}, "body temperature")
		if s.Limit != want || s.Unjudged || strings.Contains(s.Note, "counts alone") != (most == 0) {
			t.Errorf("highest %v °C: got %+v", most, s)
		}
	}
	none := capacitor(func(p *catalog.Part, _ *catalog.Capacitor) { p.Temperature = catalog.Range{} })
	if s := find(t, shippedPolicy(t, "general"), none, Use{Ambient: 40}, "body temperature"); !s.Unjudged || s.Over || s.Rule.Name != "" {
		t.Errorf("neither figure: got %+v", s)
	}
}

// The lower of the two for ECSS: min(110 °C, Tmax − 10 K).
func TestTheLowerTemperatureCounts(t *testing.T) {
	p := shippedPolicy(t, "ecss-q-st-30-11c")
	for most, want := range map[float64]float64{105: 95, 120: 110, 150: 110} {
		part := capacitor(func(p *catalog.Part, _ *catalog.Capacitor) { p.Temperature.Most = celsius(most) })
		if s := find(t, p, part, Use{Ambient: 40}, "body temperature"); s.Limit != want {
			t.Errorf("highest %v °C: limit %v, want %v", most, s.Limit, want)
		}
	}
}

// Loss 2 % at 10 kHz and 10 nF is 0.02/(2π·10⁴·10⁻⁸) = 31.831 Ω; 50 mA make
// 79.577 mW; a box of 10 × 5 × 11 mm has 2·(50+55+110) = 430 mm²; at
// 10 W/(m²K) it rises by 0.079577/0.0043 = 18.506 K.
func TestSelfHeatingByLosses(t *testing.T) {
	part := capacitor(func(p *catalog.Part, c *catalog.Capacitor) {
		c.LossFactor = 0.02
		p.Size = catalog.Size{Length: 10e-3, Width: 5e-3, Height: 11e-3}
	})
	u := Use{Ambient: 40, Frequency: 10e3, RippleA: 50e-3}
	p := shippedPolicy(t, "general")
	if s := find(t, p, part, u, "body temperature"); math.Abs(s.Value-58.506) > 0.001 || !strings.Contains(s.Note, "10 W/(m²K)") {
		t.Errorf("got %+v", s)
	}
	if s := find(t, p, part, u, "ripple current, RMS"); !s.Unjudged || !strings.Contains(s.Note, "79.58 mW") || !strings.Contains(s.Note, "no ripple current") {
		t.Errorf("got %+v", s)
	}
	// The greater of the two loss figures counts: 63.662 Ω doubles the rise.
	part.Capacitor.ESR = 63.662
	if s := find(t, p, part, u, "body temperature"); math.Abs(s.Value-77.012) > 0.002 {
		t.Errorf("with ESR: got %+v", s)
	}
	full := part.Size
	for _, flat := range []catalog.Size{{Width: full.Width, Height: full.Height}, {Length: full.Length, Height: full.Height}} {
		part.Size = flat
		if s := find(t, p, part, u, "body temperature"); s.Value != 40 || !strings.Contains(s.Note, "no outline") {
			t.Errorf("without a side: got %+v", s)
		}
	}
	part.Size = full
	// A small ESR alone: 0.05² A² · 0.8 Ω = 2 mW make 2 mW/(10·430 mm²) = 0.4651 K.
	part.Capacitor.ESR, part.Capacitor.LossFactor = 0.8, 0
	if s := find(t, p, part, u, "body temperature"); math.Abs(s.Value-40.4651) > 0.0001 {
		t.Errorf("with a small ESR: got %+v", s)
	}
	// A loss factor says nothing without a frequency.
	part.Capacitor.ESR, part.Capacitor.LossFactor = 0, 0.02
	if s := find(t, p, part, Use{Ambient: 40, RippleA: 0.05}, "body temperature"); s.Value != 40 || !strings.Contains(s.Note, "no loss figure") {
		t.Errorf("without a frequency: got %+v", s)
	}
	part.Size.Height = 0
	if s := find(t, p, part, u, "body temperature"); s.Value != 40 || !strings.Contains(s.Note, "no outline") {
		t.Errorf("without outline: got %+v", s)
	}
	part.Capacitor.ESR, part.Capacitor.LossFactor = 0, 0
	if s := find(t, p, part, u, "body temperature"); s.Value != 40 || !strings.Contains(s.Note, "no loss figure") {
		t.Errorf("without loss: got %+v", s)
	}
	if s := find(t, p, part, u, "ripple current, RMS"); !strings.Contains(s.Note, "no loss figure either") {
		t.Errorf("without loss: got %+v", s)
	}
}

// The loss factor acts on the capacitance left under bias: 40 % of 10 nF at
// 600 V is 4 nF, 2.5 times the series resistance.
func TestSelfHeatingUnderBias(t *testing.T) {
	part := capacitor(func(p *catalog.Part, c *catalog.Capacitor) {
		c.LossFactor = 0.02
		c.Bias = []catalog.BiasPoint{{Voltage: 0, Share: 1}, {Voltage: 600, Share: 0.4}}
		p.Size = catalog.Size{Length: 10e-3, Width: 5e-3, Height: 11e-3}
	})
	s := find(t, shippedPolicy(t, "general"), part, Use{Ambient: 40, Frequency: 10e3, RippleA: 50e-3, PeakV: 600}, "body temperature")
	if want := 40 + 2.5*18.506; math.Abs(s.Value-want) > 0.002 {
		t.Errorf("got %v °C, want %v °C", s.Value, want)
	}
}

// By the maker's 5 K at the rated ripple: half the ripple is a quarter of it.
func TestSelfHeatingByTheMakersRise(t *testing.T) {
	u := Use{Ambient: 60, Frequency: 120, RippleA: 0.05}
	s := find(t, shippedPolicy(t, "general"), electrolytic(nil), u, "body temperature")
	if s.Value != 61.25 || s.Note != "" {
		t.Errorf("got %+v", s)
	}
	silent := electrolytic(func(_ *catalog.Part, c *catalog.Capacitor) { c.Ripple.CoreRise = 0 })
	s = find(t, shippedPolicy(t, "general"), silent, u, "body temperature")
	if s.Value != 61.25 || !strings.Contains(s.Note, "5 K assumed") {
		t.Errorf("sheet without a rise: got %+v", s)
	}
}

// A film capacitor with a ripple rating but no rise heats by its losses: the
// 5 K of electrolytics are not assumed for it.
func TestRippleRatingWithoutARise(t *testing.T) {
	part := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) {
		c.Technology, c.Ripple = catalog.Film, catalog.RippleRating{Current: 1, Frequency: 1e3}
	})
	p, u := shippedPolicy(t, "general"), Use{Ambient: 40, Frequency: 1e3, RippleA: 1}
	if s := find(t, p, part, u, "body temperature"); s.Value != 40 || !strings.Contains(s.Note, "no loss figure") {
		t.Errorf("got %+v", s)
	}
	part.Capacitor.Ripple.CoreRise = 0.8
	if s := find(t, p, part, u, "body temperature"); s.Value != 40.8 || s.Note != "" {
		t.Errorf("with a rise: got %+v", s)
	}
}

func TestCold(t *testing.T) {
	p, part := shippedPolicy(t, "general"), capacitor(nil)
	for ambient, over := range map[float64]bool{20: false, -55: false, -55.01: true} {
		s := find(t, p, part, Use{Ambient: celsius(ambient)}, "lowest ambient")
		if s.Over != over || !s.AtLeast || s.Limit != -55 || s.Rule.Source != "the part's sheet" {
			t.Errorf("%v °C: got %+v", ambient, s)
		}
	}
	// −15 °C is half of the way from 25 °C to −55 °C.
	if s := find(t, p, part, Use{Ambient: -15}, "lowest ambient"); !near(s.Ratio, 0.5) {
		t.Errorf("got ratio %v, want 0.5", s.Ratio)
	}
	unknown := capacitor(func(p *catalog.Part, _ *catalog.Capacitor) { p.Temperature = catalog.Range{} })
	if s := find(t, p, unknown, Use{Ambient: 9.9}, "lowest ambient"); !s.Unjudged {
		t.Errorf("below 10 °C, unknown: got %+v", s)
	}
	if _, there := lookFor(p, unknown, Use{Ambient: 10}, "lowest ambient"); there {
		t.Error("at 10 °C every part works")
	}
}

// A Z5U part (from +10 °C) in a room at 20 °C: the ratio runs from 10 K
// above the limit where that is over 25 °C; here from 25 °C: 5/15.
func TestColdRatio(t *testing.T) {
	part := capacitor(func(p *catalog.Part, _ *catalog.Capacitor) { p.Temperature.Least = 10 })
	if s := find(t, shippedPolicy(t, "general"), part, Use{Ambient: 20}, "lowest ambient"); !near(s.Ratio, 5.0/15) {
		t.Errorf("got %+v", s)
	}
	part.Temperature.Least = 20 // from 30 °C
	if s := find(t, shippedPolicy(t, "general"), part, Use{Ambient: 25}, "lowest ambient"); !near(s.Ratio, 0.5) {
		t.Errorf("got %+v", s)
	}
}
