package ratings

import (
	"strings"
	"testing"

	"rungwright/catalog"
)

// 1 W at 70 °C, highest 155 °C.
func TestPowerLineOfEachDocument(t *testing.T) {
	for _, c := range []struct {
		policy         string
		ambient, limit float64
	}{
		// 60 % to 70 °C, then a line to nothing at 155 °C: at 112.5 °C half.
		{"general", 25, 0.6}, {"general", 70, 0.6}, {"general", 112.5, 0.3}, {"general", 155, 0}, {"general", 160, 0},
		{"nasa-eee-inst-002", 70, 0.6}, {"nasa-eee-inst-002", 112.5, 0.3},
		// 50 % to 85 °C, then a line to nothing at 125 °C: at 105 °C half.
		{"ecss-q-st-30-11c", 85, 0.5}, {"ecss-q-st-30-11c", 105, 0.25}, {"ecss-q-st-30-11c", 125, 0},
		// 50 % of what the maker allows: at 112.5 °C half of half.
		{"military-1", 70, 0.5}, {"military-1", 112.5, 0.25}, {"military-3", 155, 0},
	} {
		s := find(t, shippedPolicy(t, c.policy), resistor(nil), Use{Ambient: celsius(c.ambient), PowerW: watt(c.limit)}, "power")
		if s.Over || !near(s.Limit, c.limit) || s.Rating != 1 || s.Note != "" {
			t.Errorf("%s at %v °C: got %+v, want limit %v W", c.policy, c.ambient, s, c.limit)
		}
		if s := find(t, shippedPolicy(t, c.policy), resistor(nil), Use{Ambient: celsius(c.ambient), PowerW: watt(above(c.limit) + 1e-9)}, "power"); !s.Over {
			t.Errorf("%s at %v °C, above %v W: got %+v", c.policy, c.ambient, c.limit, s)
		}
	}
}

// The maker's own line counts where it is the stricter: rated up to 25 °C
// and nothing at 85 °C, at 70 °C a quarter is left, below `general`'s 60 %.
func TestPowerNeverPassesTheMakersLine(t *testing.T) {
	part := resistor(func(p *catalog.Part, r *catalog.Resistor) { r.PowerAt, p.Temperature.Most = 25, 85 })
	if s := find(t, shippedPolicy(t, "general"), part, Use{Ambient: 70}, "power"); !near(s.Limit, 0.25) {
		t.Errorf("got %+v", s)
	}
}

func TestPowerWithoutTemperatures(t *testing.T) {
	part := resistor(func(p *catalog.Part, r *catalog.Resistor) { r.PowerAt, p.Temperature = 0, catalog.Range{} })
	// 70 °C and 125 °C are taken: at 97.5 °C half of 60 %.
	s := find(t, shippedPolicy(t, "general"), part, Use{Ambient: 97.5}, "power")
	if !near(s.Limit, 0.3) || !strings.Contains(s.Note, "125 °C assumed") {
		t.Errorf("got %+v", s)
	}
	// By the maker's line alone: half of 50 %.
	if s := find(t, shippedPolicy(t, "military-2"), part, Use{Ambient: 97.5}, "power"); !near(s.Limit, 0.25) {
		t.Errorf("got %+v", s)
	}
}

func TestWorkingVoltage(t *testing.T) {
	p := shippedPolicy(t, "general")
	for volts, over := range map[float64]bool{400: false, above(400): true, -401: true} {
		if s := find(t, p, resistor(nil), Use{WorkingV: volt(volts)}, "working voltage"); s.Over != over || s.Limit != 400 || s.Note != "" {
			t.Errorf("%v V: got %+v", volts, s)
		}
	}
	// Without the figure, 80 % of 25 V.
	silent := resistor(func(_ *catalog.Part, r *catalog.Resistor) { r.WorkingVoltage = 0 })
	for volts, over := range map[float64]bool{20: false, above(20): true} {
		if s := find(t, p, silent, Use{WorkingV: volt(volts)}, "working voltage"); s.Over != over || !strings.Contains(s.Note, "25 V assumed") {
			t.Errorf("no figure, %v V: got %+v", volts, s)
		}
	}
	// No rule: the maker's rating in full, and the rule says so.
	s := find(t, shippedPolicy(t, "military-1"), resistor(nil), Use{WorkingV: 500}, "working voltage")
	if s.Over || s.Limit != 500 || s.Rule.Source != "no rule in policy military-1 for metal film resistor working voltage" {
		t.Errorf("no rule: got %+v", s)
	}
}

func TestPulseEnergy(t *testing.T) {
	p := policyText(t, "resistors: [{power: 60 %, pulse_energy: 50 %}]")
	for joules, over := range map[float64]bool{1: false, above(1): true} {
		if s := find(t, p, resistor(nil), Use{PulseJ: joule(joules)}, "pulse energy"); s.Over != over || s.Limit != 1 {
			t.Errorf("%v J: got %+v", joules, s)
		}
	}
	silent := resistor(func(_ *catalog.Part, r *catalog.Resistor) { r.PulseEnergy = 0 })
	if s := find(t, p, silent, Use{PulseJ: 1}, "pulse energy"); !s.Unjudged || !strings.Contains(s.Note, "no pulse energy") {
		t.Errorf("no figure: got %+v", s)
	}
}

func TestWindingPowerAndCurrent(t *testing.T) {
	p := shippedPolicy(t, "general")
	for va, over := range map[float64]bool{8.5: false, above(8.5): true} {
		if s := find(t, p, winding(nil), Use{ApparentVA: voltAmp(va)}, "apparent power"); s.Over != over || s.Limit != 8.5 {
			t.Errorf("%v VA: got %+v", va, s)
		}
	}
	// 10 VA at 100 V RMS is 0.1 A, of which 85 %; with a centre tap each half
	// of 100 V carries half.
	tapped := winding(func(_ *catalog.Part, w *catalog.Winding) { w.CentreTap = true })
	for _, c := range []struct {
		part  *catalog.Part
		limit float64
	}{{winding(nil), 0.085}, {tapped, 0.0425}} {
		if s := find(t, p, c.part, Use{RMSA: amp(c.limit)}, "current, RMS"); s.Over || !near(s.Limit, c.limit) {
			t.Errorf("got %+v, want limit %v A", s, c.limit)
		}
	}
	unrated := winding(func(_ *catalog.Part, w *catalog.Winding) { w.Power = 0 })
	for _, name := range []string{"apparent power", "current, RMS"} {
		if s := find(t, p, unrated, Use{ApparentVA: 1, RMSA: 1}, name); !s.Unjudged || s.Note == "" {
			t.Errorf("no power, %s: got %+v", name, s)
		}
	}
}

// ECSS: half of the 4 kV test voltage, and a hot spot 20 K below 130 °C.
func TestWindingInsulationAndHotSpot(t *testing.T) {
	p := shippedPolicy(t, "ecss-q-st-30-11c")
	for volts, over := range map[float64]bool{2000: false, above(2000): true} {
		if s := find(t, p, winding(nil), Use{InsulationV: volt(volts)}, "insulation"); s.Over != over || s.Limit != 2000 {
			t.Errorf("%v V: got %+v", volts, s)
		}
	}
	for ambient, over := range map[float64]bool{110: false, 110.01: true} {
		if s := find(t, p, winding(nil), Use{Ambient: celsius(ambient)}, "hot spot"); s.Over != over || s.Limit != 110 || !strings.Contains(s.Note, "at least at the ambient") {
			t.Errorf("%v °C: got %+v", ambient, s)
		}
	}
	// A test voltage is no working voltage: without a rule nothing judges it.
	if s := find(t, shippedPolicy(t, "general"), winding(nil), Use{InsulationV: 1000}, "insulation"); !s.Unjudged || s.Limit != 0 {
		t.Errorf("no rule: got %+v", s)
	}
	silent := winding(func(_ *catalog.Part, w *catalog.Winding) { w.TestVoltage = 0 })
	if s := find(t, p, silent, Use{InsulationV: 1000}, "insulation"); !s.Unjudged || !strings.Contains(s.Note, "no test voltage") {
		t.Errorf("no figure: got %+v", s)
	}
}
