package ratings

import (
	"math"
	"strings"
	"testing"

	"rungwright/catalog"
)

func withoutLeakage(d *catalog.Diode) { d.Leakage = catalog.LeakagePoint{} }

// By hand: 45 °C + 1.6 W · 50 K/W = 125 °C, `general`'s limit of 150 − 25.
func TestJunctionAtTheLimit(t *testing.T) {
	p, part := shippedPolicy(t, "general"), diode(withoutLeakage)
	for watts, over := range map[float64]bool{1.6: false, 1.6001: true, -1.6001: true} {
		s := find(t, p, part, Use{Ambient: 45, LossW: watt(watts)}, "junction temperature")
		if s.Over != over || s.Limit != 125 || s.Rating != 150 || !near(s.Value, 45+math.Abs(watts)*50) {
			t.Errorf("%v W: got %+v", watts, s)
		}
		if !strings.Contains(s.Note, "no leakage") {
			t.Errorf("%v W: note %q", watts, s.Note)
		}
	}
}

// The documents' lines for a 150 °C and a 175 °C junction, by hand.
func TestJunctionLimitOfEachDocument(t *testing.T) {
	for _, c := range []struct {
		policy   string
		junction float64
		want     float64
	}{
		{"general", 150, 125}, {"general", 175, 150},
		{"nasa-eee-inst-002", 150, 120}, {"nasa-eee-inst-002", 175, 125}, // 0.80·150 = 120; 0.80·175 = 140 > 125
		{"ecss-q-st-30-11c", 125, 85}, {"ecss-q-st-30-11c", 150, 110}, {"ecss-q-st-30-11c", 175, 110},
		{"military-1", 150, 95}, {"military-2", 150, 105}, {"military-3", 150, 125}, {"military-3", 100, 100},
	} {
		part := diode(func(d *catalog.Diode) { d.Junction = celsius(c.junction) })
		s := find(t, shippedPolicy(t, c.policy), part, Use{Ambient: 40}, "junction temperature")
		if !near(s.Limit, c.want) {
			t.Errorf("%s, %v °C junction: limit %v °C, want %v °C", c.policy, c.junction, s.Limit, c.want)
		}
	}
}

// One leakage of 10 µA at 25 °C doubles every 10 K. Half of the inverse 1000 V
// stands across the diode on the mean, so that the balance is
// T = 45 °C + 500 V · 10 µA · 2^((T−25)/10) · 50 K/W.
func TestJunctionCountsLeakage(t *testing.T) {
	part := diode(func(d *catalog.Diode) { d.Leakage.Value = 10e-6 })
	u := Use{Ambient: 45, InverseV: -1000}
	s := find(t, shippedPolicy(t, "general"), part, u, "junction temperature")
	if balance := 45 + 500*10e-6*math.Exp2((s.Value-25)/10)*50; math.Abs(s.Value-balance) > 1e-4 || s.Value < 46 {
		t.Errorf("got %v °C, balance %v °C", s.Value, balance)
	}
	if !strings.Contains(s.Note, "double every 10 K") {
		t.Errorf("note %q", s.Note)
	}
}

// Two leakages, 1 µA at 25 °C and 100 µA at 105 °C, double every
// 80 K/log2(100) = 12.04 K; at 65 °C, halfway, it is 10 µA.
func TestLeakageThroughTwoPoints(t *testing.T) {
	d := diode(func(d *catalog.Diode) {
		d.Leakage = catalog.LeakagePoint{At: 1000, Value: 1e-6}
		d.LeakageHot = catalog.LeakagePoint{At: 1000, Value: 100e-6, Temperature: 105}
	}).Diode
	l, why := leakageOf(d)
	for celsius, want := range map[float64]float64{25: 1e-6, 65: 10e-6, 105: 100e-6} {
		if got := l.at(celsius); !near(got, want) {
			t.Errorf("%v °C: got %v A, want %v A", celsius, got, want)
		}
	}
	if why != 0 {
		t.Errorf("notes %v", why.texts())
	}
	d.Leakage = catalog.LeakagePoint{}
	if l, why := leakageOf(d); !near(l.at(95), 50e-6) || why != leakageDoubles {
		t.Errorf("hot point alone: %v A at 95 °C, notes %v", l.at(95), why.texts())
	}
	d.LeakageHot.Temperature = 0 // at 25 °C, then, which makes it no hot point
	d.Leakage = catalog.LeakagePoint{At: 1000, Value: 1e-6, Temperature: 35}
	if l, _ := leakageOf(d); !near(l.at(45), 2e-6) {
		t.Errorf("cold point alone: %v A at 45 °C", l.at(45))
	}
}

func TestThermalRunawayIsOver(t *testing.T) {
	part := diode(func(d *catalog.Diode) { d.Leakage.Value = 100e-6 })
	s := find(t, shippedPolicy(t, "general"), part, Use{Ambient: 45, InverseV: 1000}, "junction temperature")
	if !s.Over || !strings.Contains(s.Note, "runaway") {
		t.Errorf("got %+v", s)
	}
}

func TestJunctionNotStated(t *testing.T) {
	p := shippedPolicy(t, "general")
	for name, part := range map[string]*catalog.Part{
		"no thermal resistance": diode(func(d *catalog.Diode) { d.ThermalResistance = 0 }),
		"no highest junction":   diode(func(d *catalog.Diode) { d.Junction, d.AverageAt = 0, 0 }),
	} {
		s := find(t, p, part, Use{Ambient: 45, LossW: 0.1}, "junction temperature")
		if !s.Unjudged || s.Over || !strings.Contains(s.Note, "NOT JUDGED") {
			t.Errorf("%s: got %+v", name, s)
		}
	}
}

// ECSS: half the power that takes the junction from 25 °C to 150 °C through
// 50 K/W, which is 2.5 W.
func TestPowerAtTheLimit(t *testing.T) {
	p := shippedPolicy(t, "ecss-q-st-30-11c")
	for watts, over := range map[float64]bool{1.25: false, above(1.25): true} {
		s := find(t, p, diode(nil), Use{Ambient: 25, LossW: watt(watts)}, "power")
		if s.Over != over || !near(s.Limit, 1.25) || !near(s.Rating, 2.5) {
			t.Errorf("%v W: got %+v", watts, s)
		}
	}
	if _, there := lookFor(shippedPolicy(t, "general"), diode(nil), Use{LossW: 1}, "power"); there {
		t.Error("general has no such rule: the junction temperature says all")
	}
	bare := diode(func(d *catalog.Diode) { d.ThermalResistance = 0 })
	if s := find(t, p, bare, Use{LossW: 1}, "power"); !s.Unjudged {
		t.Errorf("no thermal resistance: got %+v", s)
	}
}
