package ratings

import (
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// A policy that lacks a rule for a part's first rating says so, and the part
// does not pass, however small the stress.
func TestNoRuleIsLoudAndDoesNotPass(t *testing.T) {
	p := policyText(t, "windings: [{apparent_power: 85 %}]")
	for _, c := range []struct {
		part *catalog.Part
		name string
		what string
	}{
		{capacitor(nil), "peak voltage", "ceramic class 2 voltage"},
		{diode(nil), "reverse voltage", "fast diode reverse voltage"},
		{resistor(nil), "power", "metal film resistor power"},
	} {
		for _, u := range []Use{{Ambient: 25}, {Ambient: 25, PeakV: 1, InverseV: 1, PowerW: 1e-3}} {
			s := find(t, p, c.part, u, c.name)
			if !s.Over || s.Ratio != MaxRatio || s.Limit != 0 || s.Rule.Name != "" || !strings.Contains(s.Note, "NO RULE: no rule in policy house for "+c.what) {
				t.Errorf("got %+v", s)
			}
			if Passes(p, c.part, []Use{u}) {
				t.Errorf("%s passes without a rule", c.part.Number)
			}
		}
	}
}

// What a document has no row for, in the shipped policies.
func TestDocumentsWithoutARow(t *testing.T) {
	wet := electrolytic(func(_ *catalog.Part, c *catalog.Capacitor) { c.Characteristic = "radial" })
	solid := electrolytic(func(_ *catalog.Part, c *catalog.Capacitor) { c.Characteristic = "Polymer" })
	mica := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.Technology = catalog.Mica })
	wirewound := resistor(func(_ *catalog.Part, r *catalog.Resistor) { r.Technology = "wirewound" })
	for _, c := range []struct {
		policy string
		part   *catalog.Part
		passes bool
	}{
		{"nasa-eee-inst-002", wet, false}, {"nasa-eee-inst-002", mica, true}, {"nasa-eee-inst-002", wirewound, false},
		{"ecss-q-st-30-11c", wet, false}, {"ecss-q-st-30-11c", solid, true}, {"ecss-q-st-30-11c", mica, false},
		{"military-1", wet, false}, {"military-2", wet, false}, {"military-3", wet, true}, {"military-3", wirewound, false},
		{"general", wet, true}, {"general", mica, true}, {"general", wirewound, true},
	} {
		if got := Passes(shippedPolicy(t, c.policy), c.part, []Use{{Ambient: 25}}); got != c.passes {
			t.Errorf("%s, %s: passes %v, want %v", c.policy, c.part.Title(), got, c.passes)
		}
	}
}

func TestForbiddenPart(t *testing.T) {
	s := find(t, shippedPolicy(t, "military-1"), electrolytic(nil), Use{Ambient: 25, PeakV: 1}, "peak voltage")
	if !s.Over || s.Rule.Name != "aluminium electrolytic not to be used" || !strings.Contains(s.Rule.Source, "level I;") || !strings.Contains(s.Note, "forbids") {
		t.Errorf("got %+v", s)
	}
	p := policyText(t, "diodes: [{forbidden: true, remark: ask first}]\nresistors: [{forbidden: true}]\nwindings: [{forbidden: true}]")
	for part, name := range map[*catalog.Part]string{diode(nil): "reverse voltage", resistor(nil): "power", winding(nil): "apparent power"} {
		if s := find(t, p, part, Use{Ambient: 25}, name); !s.Over || !strings.Contains(s.Rule.Name, "not to be used") {
			t.Errorf("%s: got %+v", part.Number, s)
		}
	}
	if s := find(t, p, diode(nil), Use{}, "reverse voltage"); !strings.Contains(s.Note, "ask first") {
		t.Errorf("the remark is lost: %+v", s)
	}
}

// A first rating that the sheet does not give is over too.
func TestFirstRatingNotStatedIsOver(t *testing.T) {
	p := shippedPolicy(t, "general")
	cap0 := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.Voltage = 0 })
	dio0 := diode(func(d *catalog.Diode) { d.ReverseVoltage = 0 })
	for part, name := range map[*catalog.Part]string{cap0: "peak voltage", dio0: "reverse voltage"} {
		if s := find(t, p, part, Use{PeakV: 1, InverseV: 1}, name); !s.Over || !strings.Contains(s.Note, "the sheet gives no") {
			t.Errorf("got %+v", s)
		}
	}
}

func TestNotANumberIsOver(t *testing.T) {
	p, nan := shippedPolicy(t, "general"), math.NaN()
	u := Use{Ambient: 25, Frequency: 50, PeakV: volt(nan), InverseV: volt(nan), AverageA: amp(nan), PowerW: watt(nan), ApparentVA: voltAmp(nan)}
	for _, part := range []*catalog.Part{capacitor(nil), diode(nil), resistor(nil), winding(nil)} {
		if Passes(p, part, []Use{u}) {
			t.Errorf("%s passes with a stress that is not a number", part.Number)
		}
	}
	if Passes(p, capacitor(nil), []Use{{Ambient: celsius(nan)}}) {
		t.Error("an ambient that is not a number passes")
	}
	if Passes(p, capacitor(nil), []Use{{Ambient: 25, PeakV: volt(math.Inf(1))}}) {
		t.Error("an infinite voltage passes")
	}
}

// The worst use of each stress is kept, the first among equals, and the
// order of stresses does not depend on the uses.
func TestWorstUseIsKept(t *testing.T) {
	p := shippedPolicy(t, "general")
	uses := []Use{
		{Ref: "D1", Corner: "a", Ambient: 40, InverseV: 300, AverageA: 0.2},
		{Ref: "D2", Corner: "b", Ambient: 40, InverseV: 500, AverageA: 0.1},
		{Ref: "D3", Corner: "c", Ambient: 60, InverseV: 500, AverageA: 0.1},
	}
	got := map[string]string{}
	var order []string
	for _, s := range Judge(p, diode(nil), uses) {
		got[s.Quantity] = s.Ref + s.Corner
		order = append(order, s.Quantity)
	}
	want := map[string]string{"reverse voltage": "D2b", "average current": "D1a", "junction temperature": "D3c", "lowest ambient": "D1a"}
	if diff := cmp.Diff(want, got); diff != "" {
		t.Error(diff)
	}
	if diff := cmp.Diff([]string{"reverse voltage", "average current", "junction temperature", "lowest ambient"}, order); diff != "" {
		t.Error(diff)
	}
}

// Among uses that nothing judges, the one with the greatest value is kept.
func TestWorstOfTheUnjudged(t *testing.T) {
	part := resistor(func(_ *catalog.Part, r *catalog.Resistor) { r.PulseEnergy = 0 })
	uses := []Use{{Corner: "a", PulseJ: 1}, {Corner: "b", PulseJ: 3}, {Corner: "c", PulseJ: 2}}
	for _, s := range Judge(shippedPolicy(t, "general"), part, uses) {
		if s.Quantity == "pulse energy" && (s.Corner != "b" || s.Value != 3) {
			t.Errorf("got %+v", s)
		}
	}
}

// A use that has nothing of a sort gets no stress of it, and what is always
// judged needs no note.
func TestOnlyWhatTheUseHas(t *testing.T) {
	p := shippedPolicy(t, "general")
	film := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) {
		c.Technology, c.ACVoltage, c.Slew = catalog.Film, 100, 1e6
	})
	for part, want := range map[*catalog.Part][]string{
		film:              {"peak voltage", "body temperature", "lowest ambient"},
		electrolytic(nil): {"peak voltage", "body temperature", "lowest ambient", "expected life"},
		diode(nil):        {"reverse voltage", "junction temperature", "lowest ambient"},
		resistor(nil):     {"power", "lowest ambient"},
		winding(nil):      {"apparent power", "hot spot", "lowest ambient"},
	} {
		var got []string
		for _, s := range Judge(p, part, []Use{{Ambient: 60}}) {
			got = append(got, s.Quantity)
		}
		if diff := cmp.Diff(want, got); diff != "" {
			t.Error(diff)
		}
	}
}

// A part at its limit passes whatever the rounding of the product, and one
// a few billionths above does not.
func TestRoomForRounding(t *testing.T) {
	p := policyText(t, "capacitors: [{voltage: 55 %}]")
	part := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.Voltage = 100 })
	for volts, over := range map[float64]bool{55 * (1 - 1e-12): false, 55: false, 55 * (1 + 0.9e-9): false, 55 * (1 + 1.1e-9): true} {
		if s := find(t, p, part, Use{Ambient: 25, PeakV: volt(volts)}, "peak voltage"); s.Over != over {
			t.Errorf("%v V: got %+v", volts, s)
		}
	}
}

func TestNothingToJudge(t *testing.T) {
	p := shippedPolicy(t, "general")
	board := &catalog.Part{Number: "PCB", Kind: catalog.KindOther, Other: &catalog.Other{Category: "board"}}
	if got := Judge(p, board, []Use{{}}); len(got) != 0 || !Passes(p, board, []Use{{}}) {
		t.Errorf("a board has no stress, got %+v", got)
	}
	if got := Judge(p, capacitor(nil), nil); len(got) != 0 {
		t.Errorf("no use, no stress, got %+v", got)
	}
}

func TestFirstFittingFamilyJudges(t *testing.T) {
	p := policyText(t, `
capacitors:
  - {technology: film, voltage: 50 %}
  - {voltage: 40 %}
diodes:
  - {type: schottky, reverse_voltage: 60 %}
  - {reverse_voltage: 30 %}
resistors:
  - {technology: wirewound, power: 20 %}
  - {power: 10 %}
`)
	film := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.Technology = catalog.Film })
	schottky := diode(func(d *catalog.Diode) { d.Type = catalog.Schottky })
	if got := []float64{VoltageLimit(p, film, 25), VoltageLimit(p, capacitor(nil), 25), ReverseLimit(p, schottky), ReverseLimit(p, diode(nil))}; !cmp.Equal(got, []float64{500, 400, 600, 300}) {
		t.Errorf("got %v", got)
	}
	wirewound := resistor(func(_ *catalog.Part, r *catalog.Resistor) { r.Technology = "Wirewound" })
	for part, limit := range map[*catalog.Part]float64{wirewound: 0.2, resistor(nil): 0.1} {
		if s := find(t, p, part, Use{Ambient: 25}, "power"); s.Limit != limit {
			t.Errorf("got %+v, want limit %v W", s, limit)
		}
	}
}

// Over random parts and uses of the demo catalog and every policy: Passes
// says what Judge says; no figure is infinite or not a number; a stress is
// over exactly when its ratio passes 1; every stress names a rule or says
// why there is none; the pre-filter limits are those that Judge uses.
func TestJudgeOnTheDemoCatalog(t *testing.T) {
	random := rand.New(rand.NewPCG(11, 7))
	passed, failed := 0, 0
	for _, name := range PolicyNames() {
		p := shippedPolicy(t, name)
		for _, part := range catalog.Demo().Parts {
			uses := []Use{randomUse(random, part), randomUse(random, part), randomUse(random, part)}
			over := false
			for _, s := range Judge(p, part, uses) {
				over = over || s.Over
				checkStress(t, p, part, uses, s)
			}
			if Passes(p, part, uses) == over {
				t.Errorf("%s, %s: Passes and Judge disagree", name, part.Number)
			}
			if over {
				failed++
			} else {
				passed++
			}
		}
	}
	if passed < 100 || failed < 100 {
		t.Errorf("%d passed, %d failed: the trial is one-sided", passed, failed)
	}
}

func checkStress(t *testing.T, p *Policy, part *catalog.Part, uses []Use, s Stress) {
	t.Helper()
	for _, v := range []float64{s.Value, s.Rating, s.Limit, s.Ratio} {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			t.Errorf("%s, %s: %+v", p.Name, part.Number, s)
		}
	}
	if s.Over != (s.Ratio > 1+1e-9) || s.Ratio < 0 || s.Ratio > MaxRatio {
		t.Errorf("%s, %s: ratio and verdict disagree: %+v", p.Name, part.Number, s)
	}
	if s.Rule.Name == "" && s.Note == "" || s.Rule.Name != "" && s.Rule.Source == "" || s.Unjudged && s.Rule.Name != "" {
		t.Errorf("%s, %s: a silent stress: %+v", p.Name, part.Number, s)
	}
	ambient := uses[0].Ambient // all the same
	switch s.Quantity {
	case "peak voltage":
		if got := VoltageLimit(p, part, ambient); got != s.Limit {
			t.Errorf("%s, %s: VoltageLimit %v, Judge %v", p.Name, part.Number, got, s.Limit)
		}
	case "reverse voltage":
		if got := ReverseLimit(p, part); got != s.Limit {
			t.Errorf("%s, %s: ReverseLimit %v, Judge %v", p.Name, part.Number, got, s.Limit)
		}
	case "average current":
		if got := AverageLimit(p, part, ambient); got != s.Limit {
			t.Errorf("%s, %s: AverageLimit %v, Judge %v", p.Name, part.Number, got, s.Limit)
		}
	}
}

// randomUse is a use about half of the part's ratings.
func randomUse(random *rand.Rand, part *catalog.Part) Use {
	u := Use{Ref: "X1", Corner: "random", Ambient: 55, Frequency: quantity.Hertz(math.Pow(10, 1.7+3*random.Float64()))}
	some := func(rating float64) float64 { return rating * random.Float64() * 0.55 }
	switch part.Kind {
	case catalog.KindCapacitor:
		c := part.Capacitor
		u.PeakV, u.ACV = volt(some(float64(c.Voltage))), volt(some(float64(c.ACVoltage)))
		u.RippleA, u.SlewVps = amp(some(float64(c.Ripple.Current))), quantity.VoltPerSecond(some(float64(c.Slew)))
	case catalog.KindDiode:
		d := part.Diode
		u.InverseV, u.AverageA = volt(some(float64(d.ReverseVoltage))), amp(some(float64(d.AverageCurrent)))
		u.PeakA, u.SurgeA, u.LossW = amp(some(float64(d.RepetitivePeak))), amp(some(float64(d.SurgeCurrent))), watt(some(0.2))
	case catalog.KindResistor:
		u.PowerW, u.WorkingV = watt(some(float64(part.Resistor.Power))), volt(some(float64(part.Resistor.WorkingVoltage)))
	case catalog.KindWinding:
		u.ApparentVA = voltAmp(some(float64(part.Winding.Power)))
	}
	return u
}

// The pre-filter limits of another kind of part are none.
func TestLimitsOfOtherKinds(t *testing.T) {
	p := shippedPolicy(t, "general")
	if VoltageLimit(p, diode(nil), 25) != 0 || ReverseLimit(p, capacitor(nil)) != 0 || AverageLimit(p, capacitor(nil), 25) != 0 {
		t.Error("a limit of another kind is not zero")
	}
	if got := VoltageLimit(shippedPolicy(t, "military-1"), electrolytic(nil), 25); got != 0 {
		t.Errorf("a forbidden part has the limit %v V", got)
	}
}

func BenchmarkJudge(b *testing.B) {
	p := shippedPolicy(b, "general")
	random := rand.New(rand.NewPCG(1, 1))
	for name, part := range map[string]*catalog.Part{"capacitor": electrolytic(nil), "diode": diode(nil)} {
		var uses []Use
		for range 20 {
			uses = append(uses, randomUse(random, part))
		}
		b.Run(name+"/judge", func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Judge(p, part, uses)
			}
		})
		b.Run(name+"/passes", func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Passes(p, part, uses)
			}
		})
	}
}
