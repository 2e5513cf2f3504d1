package ratings

import (
	"math"
	"strings"
	"testing"

	"rungwright/catalog"
)

// A maker's worked figures (from memory): 2000 h at 105 °C, 5 K inner rise;
// at 65 °C without, with half and with all of the rated ripple.
func TestElectrolyticLifeOfTheMakersExample(t *testing.T) {
	e := Endurance{Hours: 2000, At: 105, CoreRise: 5}
	for share, want := range map[float64]float64{0: 47552, 0.5: 43484, 1: 32000} {
		if got := ElectrolyticLife(e, 65, share); math.Abs(got-want) > 0.5 {
			t.Errorf("%v of the rated ripple: got %.1f h, want %v h", share, got, want)
		}
	}
}

// By hand beyond the rating: 1.2 times the current makes 7.2 K; the exponent
// is 5/8.75 − 7.2/8.2 = −0.306620; 32 000 h · 2^−0.306620 = 25 873 h.
func TestElectrolyticLifeBeyondTheRating(t *testing.T) {
	if got := ElectrolyticLife(Endurance{2000, 105, 5}, 65, 1.2); math.Abs(got-25873) > 1 {
		t.Errorf("got %.1f h", got)
	}
	// √8 of the rating makes 40 K, where the formula ends.
	for share, dead := range map[float64]bool{2.82: false, math.Sqrt(8) + 1e-9: true, 100: true} {
		if got := ElectrolyticLife(Endurance{2000, 105, 5}, 65, share); (got == 0) != dead {
			t.Errorf("share %v: got %v h", share, got)
		}
	}
	if got := ElectrolyticLife(Endurance{2000, 105, 40}, 65, 0); got != 0 {
		t.Errorf("a rated rise of 40 K: got %v h, want 0", got)
	}
}

func TestCombinedRipple(t *testing.T) {
	if got := CombinedRipple(0.3, 0.4); !near(got, 0.5) {
		t.Errorf("got %v, want 0.5", got)
	}
}

// `general` wants 5000 h. At rated ripple and 105−10·log2(2.5) °C the life is
// 2000·2.5 = 5000 h: it passes, and a hundredth of a degree more does not.
func TestLifeAtTheLimit(t *testing.T) {
	p := shippedPolicy(t, "general")
	ambient := 105 - 10*math.Log2(2.5)
	s := find(t, p, electrolytic(nil), ripple(0.1, 120, ambient), "expected life")
	if s.Over || !near(s.Ratio, 1) || !near(s.Value, 5000*3600) || s.Limit != 5000*3600 || s.Rating != 2000*3600 || !s.AtLeast {
		t.Errorf("at the limit: %+v", s)
	}
	if s := find(t, p, electrolytic(nil), ripple(0.1, 120, ambient+0.01), "expected life"); !s.Over {
		t.Errorf("warmer: %+v", s)
	}
	if s := find(t, p, electrolytic(nil), ripple(0.1, 120, ambient-10), "expected life"); !near(s.Ratio, 0.5) || s.Over {
		t.Errorf("10 K cooler lasts twice as long: %+v", s)
	}
}

func TestLifeUsesTheFrequency(t *testing.T) {
	part := electrolytic(func(_ *catalog.Part, c *catalog.Capacitor) {
		c.Ripple.Multipliers = []catalog.FrequencyFactor{{Frequency: 120, Factor: 1}, {Frequency: 10e3, Factor: 2}}
	})
	// 0.1 A at a factor of 2 is half the rating: 43 484 h.
	s := find(t, shippedPolicy(t, "general"), part, ripple(0.1, 10e3, 65), "expected life")
	if math.Abs(s.Value/3600-43484) > 0.5 {
		t.Errorf("got %v h", s.Value/3600)
	}
}

func TestLifeNotes(t *testing.T) {
	p := shippedPolicy(t, "general")
	if s := find(t, p, electrolytic(nil), ripple(0, 120, 60), "expected life"); s.Note != "" {
		t.Errorf("at 60 °C: note %q", s.Note)
	}
	if s := find(t, p, electrolytic(nil), ripple(0, 120, 65), "expected life"); math.Abs(s.Value/3600-47552) > 0.5 {
		t.Errorf("without ripple: got %v h, want 47 552 h", s.Value/3600)
	}
	if s := find(t, p, electrolytic(nil), ripple(0, 120, 59), "expected life"); !strings.Contains(s.Note, "ten-degree rule") {
		t.Errorf("at 59 °C: note %q", s.Note)
	}
	bare := electrolytic(func(_ *catalog.Part, c *catalog.Capacitor) { c.Ripple = catalog.RippleRating{} })
	s := find(t, p, bare, ripple(1, 120, 65), "expected life")
	if !strings.Contains(s.Note, "wear by ripple is not counted") || !near(s.Value, 32000*3600) {
		t.Errorf("no ripple rating: %+v", s)
	}
	unrated := electrolytic(func(_ *catalog.Part, c *catalog.Capacitor) { c.Life = catalog.LifeRating{} })
	if s := find(t, p, unrated, ripple(1, 120, 65), "expected life"); !s.Unjudged || !strings.Contains(s.Note, "the sheet gives no life") {
		t.Errorf("no life: %+v", s)
	}
	if _, there := lookFor(p, capacitor(nil), ripple(1, 120, 65), "expected life"); there {
		t.Error("a ceramic capacitor is not rated by wear")
	}
	// A document without a rule for life leaves it unjudged, and says so.
	s = find(t, shippedPolicy(t, "military-3"), electrolytic(nil), ripple(0.1, 120, 65), "expected life")
	if !s.Unjudged || s.Over || !near(s.Value, 32000*3600) || !strings.Contains(s.Note, "no rule in policy military-3 for aluminium electrolytic life") {
		t.Errorf("no rule: %+v", s)
	}
}

// The worst of several uses is the one that lives shortest, with a rule or
// without.
func TestShortestLifeIsKept(t *testing.T) {
	uses := []Use{ripple(0.1, 120, 70), ripple(0.1, 120, 90), ripple(0.1, 120, 80)}
	for i := range uses {
		uses[i].Corner = []string{"a", "b", "c"}[i]
	}
	for _, name := range []string{"general", "military-3"} {
		for _, s := range Judge(shippedPolicy(t, name), electrolytic(nil), uses) {
			if s.Quantity == "expected life" && s.Corner != "b" {
				t.Errorf("%s: worst at %q, want b", name, s.Corner)
			}
		}
	}
}
