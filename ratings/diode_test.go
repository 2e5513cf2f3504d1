package ratings

import (
	"math"
	"strings"
	"testing"

	"rungwright/catalog"
)

// 1000 V under `general`: 700 V, and 800 V for a controlled-avalanche type.
func TestReverseVoltageAtTheLimit(t *testing.T) {
	p := shippedPolicy(t, "general")
	avalanche := diode(func(d *catalog.Diode) { d.Avalanche = true })
	for _, c := range []struct {
		part        *catalog.Part
		volts, most float64
		over        bool
	}{{diode(nil), 700, 700, false}, {diode(nil), -above(700), 700, true}, {avalanche, 800, 800, false}, {avalanche, above(800), 800, true}} {
		s := find(t, p, c.part, Use{Ambient: 40, InverseV: volt(c.volts)}, "reverse voltage")
		if s.Over != c.over || !near(s.Limit, c.most) || s.Rating != 1000 {
			t.Errorf("%v V: got %+v", c.volts, s)
		}
	}
	// A document without an exception treats both alike.
	if s := find(t, shippedPolicy(t, "military-1"), avalanche, Use{InverseV: 700}, "reverse voltage"); s.Over || s.Limit != 700 {
		t.Errorf("military-1 at its limit: %+v", s)
	}
	if s := find(t, shippedPolicy(t, "military-1"), avalanche, Use{InverseV: 701}, "reverse voltage"); !s.Over {
		t.Errorf("military-1 makes no exception: %+v", s)
	}
}

// 1 A up to 50 °C, then to nothing at 150 °C: at 100 °C half of it; 60 % of
// that is 0.3 A.
func TestAverageCurrentAboveTheKnee(t *testing.T) {
	p, part := shippedPolicy(t, "general"), diode(nil)
	for _, c := range []struct {
		ambient, limit float64
		note           bool
	}{{25, 0.6, false}, {50, 0.6, false}, {75, 0.45, true}, {100, 0.3, true}, {149, 0.006, true}} {
		s := find(t, p, part, Use{Ambient: celsius(c.ambient), AverageA: amp(c.limit)}, "average current")
		if s.Over || !near(s.Limit, c.limit) || strings.Contains(s.Note, "falls in a line") != c.note || !c.note && s.Note != "" {
			t.Errorf("%v °C: got %+v", c.ambient, s)
		}
		if s := find(t, p, part, Use{Ambient: celsius(c.ambient), AverageA: amp(above(c.limit))}, "average current"); !s.Over {
			t.Errorf("%v °C, above: got %+v", c.ambient, s)
		}
		if got := AverageLimit(p, part, celsius(c.ambient)); !near(got, c.limit) {
			t.Errorf("%v °C: AverageLimit %v, want %v", c.ambient, got, c.limit)
		}
	}
	if s := find(t, p, part, Use{Ambient: 150, AverageA: 1e-6}, "average current"); !s.Over || s.Ratio != MaxRatio || AverageLimit(p, part, 150) != 0 {
		t.Errorf("at 150 °C: got %+v", s)
	}
}

// Makers ask for 20 % less into capacitors: that is what counts where the
// policy has no rule, and is said where the policy allows more.
func TestAverageCurrentIntoCapacitors(t *testing.T) {
	u := Use{Ambient: 25, AverageA: 0.8}
	bare := policyText(t, "diodes: [{reverse_voltage: 70 %}]")
	s := find(t, bare, diode(nil), u, "average current")
	if s.Over || !near(s.Limit, 0.8) || !strings.Contains(s.Note, "20 % less") || !strings.Contains(s.Rule.Source, "no rule in policy house for fast diode average current") {
		t.Errorf("no rule: got %+v", s)
	}
	if got := AverageLimit(bare, diode(nil), 25); !near(got, 0.8) {
		t.Errorf("AverageLimit %v, want 0.8", got)
	}
	for share, noted := range map[string]bool{"80 %": false, "81 %": true} {
		p := policyText(t, "diodes: [{reverse_voltage: 70 %, average_current: "+share+"}]")
		if s := find(t, p, diode(nil), u, "average current"); strings.Contains(s.Note, "20 % less") != noted {
			t.Errorf("%s: note %q", share, s.Note)
		}
	}
}

func TestAverageCurrentNotStated(t *testing.T) {
	part := diode(func(d *catalog.Diode) { d.AverageCurrent = 0 })
	if s := find(t, shippedPolicy(t, "general"), part, Use{Ambient: 25, AverageA: 0.1}, "average current"); !s.Unjudged || !strings.Contains(s.Note, "no average current") {
		t.Errorf("got %+v", s)
	}
}

func TestAverageCurrentWithoutAKneeIsNoted(t *testing.T) {
	part := diode(func(d *catalog.Diode) { d.AverageAt = 0 })
	s := find(t, shippedPolicy(t, "general"), part, Use{Ambient: 100, AverageA: 0.6}, "average current")
	if s.Over || !near(s.Limit, 0.6) || !strings.Contains(s.Note, "up to which ambient") {
		t.Errorf("got %+v", s)
	}
}

// The maker's 8 A; ten times the average of 1 A where there is none.
func TestRepetitivePeak(t *testing.T) {
	p := shippedPolicy(t, "general")
	silent := diode(func(d *catalog.Diode) { d.RepetitivePeak = 0 })
	for _, c := range []struct {
		part  *catalog.Part
		limit float64
	}{{diode(nil), 8}, {silent, 10}} {
		if s := find(t, p, c.part, Use{PeakA: amp(c.limit)}, "repetitive peak current"); s.Over || s.Limit != c.limit || s.Rule.Name != "fast diode repetitive peak" {
			t.Errorf("at %v A: got %+v", c.limit, s)
		}
		if s := find(t, p, c.part, Use{PeakA: amp(above(c.limit))}, "repetitive peak current"); !s.Over {
			t.Errorf("above %v A: got %+v", c.limit, s)
		}
	}
	if s := find(t, p, silent, Use{PeakA: 1}, "repetitive peak current"); !strings.Contains(s.Note, "multiple of the average") {
		t.Errorf("note %q", s.Note)
	}
	if s := find(t, shippedPolicy(t, "military-2"), silent, Use{PeakA: 1}, "repetitive peak current"); !s.Unjudged || strings.Contains(s.Note, "multiple") {
		t.Errorf("neither sheet nor policy: got %+v", s)
	}
}

// I_FSM 30 A for 8.3 ms, `general` 70 % = 21 A. A half-sine of 2.075 ms, a
// quarter as long, may have twice the peak at the same I²t: 42 A.
func TestSurgeByEqualI2t(t *testing.T) {
	p, part := shippedPolicy(t, "general"), diode(nil)
	for _, c := range []struct {
		peak, lasts float64
		over        bool
	}{{21, 8.3e-3, false}, {above(21), 8.3e-3, true}, {42, 8.3e-3 / 4, false}, {above(42), 8.3e-3 / 4, true}, {10.5, 4 * 8.3e-3, false}, {10.6, 4 * 8.3e-3, true}} {
		s := find(t, p, part, Use{SurgeA: amp(c.peak), SurgeTime: second(c.lasts)}, "start-up surge")
		if s.Over != c.over || !near(s.Limit, 21) || !near(s.Value, c.peak*math.Sqrt(c.lasts/8.3e-3)) {
			t.Errorf("%v A for %v s: got %+v", c.peak, c.lasts, s)
		}
	}
}

func TestSurgeAssumptions(t *testing.T) {
	p := shippedPolicy(t, "general")
	silent := diode(func(d *catalog.Diode) { d.SurgeTime = 0 })
	if s := find(t, p, silent, Use{SurgeA: 42, SurgeTime: 8.3e-3 / 4}, "start-up surge"); !near(s.Value, 21) || !strings.Contains(s.Note, "8.3 ms assumed") {
		t.Errorf("sheet without a time: got %+v", s)
	}
	if s := find(t, p, diode(nil), Use{SurgeA: 21}, "start-up surge"); !near(s.Value, 21) || !strings.Contains(s.Note, "as long as the rated surge") || strings.Contains(s.Note, "a pulse of") {
		t.Errorf("use without a time: got %+v", s)
	}
	for lasts, short := range map[float64]bool{0.9e-3: true, 1e-3: false} {
		s := find(t, p, diode(nil), Use{SurgeA: 21, SurgeTime: second(lasts)}, "start-up surge")
		if strings.Contains(s.Note, "rule of thumb") != short || !strings.Contains(s.Note, "21 A") {
			t.Errorf("%v s: note %q", lasts, s.Note)
		}
	}
	unrated := diode(func(d *catalog.Diode) { d.SurgeCurrent = 0 })
	if s := find(t, p, unrated, Use{SurgeA: 21, SurgeTime: 1e-3}, "start-up surge"); !s.Unjudged || !strings.Contains(s.Note, "no surge current") {
		t.Errorf("unrated: got %+v", s)
	}
}

// 1/20 of the period: at 50 kHz 1 µs. The conduction time counts where a
// policy says so and it is the stricter.
func TestRecoveryTime(t *testing.T) {
	p := shippedPolicy(t, "general")
	for ns, over := range map[float64]bool{1000: false, 1001: true} {
		part := diode(func(d *catalog.Diode) { d.Recovery.Time = second(ns * 1e-9) })
		s := find(t, p, part, Use{Frequency: 50e3, ConductFor: 1e-9}, "recovery time")
		if s.Over != over || !near(s.Limit, 1e-6) || !near(s.Rating, 20e-6) {
			t.Errorf("%v ns: got %+v", ns, s)
		}
	}
	house := policyText(t, "diodes: [{reverse_voltage: 70 %, recovery: {of_period: 5 %, of_conduction: 10 %}}]")
	for conduct, limit := range map[float64]float64{0: 1e-6, 2e-6: 0.2e-6, 30e-6: 1e-6} {
		s := find(t, house, diode(nil), Use{Frequency: 50e3, ConductFor: second(conduct)}, "recovery time")
		if !near(s.Limit, limit) {
			t.Errorf("conduction %v s: limit %v s, want %v s", conduct, s.Limit, limit)
		}
	}
	alone := policyText(t, "diodes: [{reverse_voltage: 70 %, recovery: {of_conduction: 10 %}}]")
	if s := find(t, alone, diode(nil), Use{Frequency: 50e3, ConductFor: 1e-6}, "recovery time"); !near(s.Limit, 1e-7) || s.Over {
		t.Errorf("conduction alone, 100 ns of 1 µs: got %+v", s)
	}
}

func TestRecoveryNotStated(t *testing.T) {
	p := shippedPolicy(t, "general")
	part := diode(func(d *catalog.Diode) { d.Recovery.Time = 0 })
	if s := find(t, p, part, Use{Frequency: 50e3}, "recovery time"); !s.Unjudged || !strings.Contains(s.Note, "no recovery time") {
		t.Errorf("not stated: got %+v", s)
	}
	part.Diode.Type = catalog.Schottky
	if s := find(t, p, part, Use{Frequency: 50e3}, "recovery time"); s.Unjudged || s.Ratio != 0 || !strings.Contains(s.Note, "stores no charge") {
		t.Errorf("Schottky: got %+v", s)
	}
	s := find(t, shippedPolicy(t, "nasa-eee-inst-002"), diode(nil), Use{Frequency: 50e3}, "recovery time")
	if !s.Unjudged || !strings.Contains(s.Note, "no rule in policy nasa-eee-inst-002 for fast diode recovery time") {
		t.Errorf("no rule: got %+v", s)
	}
}
