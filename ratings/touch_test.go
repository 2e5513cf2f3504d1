package ratings

import (
	"math"
	"testing"

	"github.com/google/go-cmp/cmp"
)

// IEC 61010-1 (3rd ed.) cl. 6.3, DOE handbook and NFPA 70E: from memory.
func TestTouchFigures(t *testing.T) {
	got := []float64{TouchLimitV, TouchChargeC, TouchChargeV, TouchEnergyJ, PinsWithinS, InsideWithinS, LethalJ, StartleJ, StartleV, BurnV, BurnMostJ}
	want := []float64{60, 45e-6, 15000, 0.35, 5, 10, 10, 0.25, 400, 100, 100}
	if diff := cmp.Diff(want, got); diff != "" {
		t.Error(diff)
	}
}

// IEC 62368-1, table of charged capacitors: from memory, put down a second
// time; ES1 and ES2 peak limits by nF, on lines between.
func TestChargedCapacitorTable(t *testing.T) {
	for nF, want := range map[float64][2]float64{
		1000: {60, 120}, 300: {60, 120}, 170: {75, 150}, 91: {100, 200}, 61: {125, 250}, 41: {150, 300}, 28: {200, 400},
		18: {250, 500}, 12: {350, 700}, 8: {500, 1000}, 4: {1000, 2000}, 1: {1000, 2000}, 0: {1000, 2000},
		235: {67.5, 135}, 6: {750, 1500}, // halfway between rows
	} {
		es1, es2 := ChargedCapacitorLimits(nF * 1e-9)
		if diff := cmp.Diff(want, [2]float64{es1, es2}, closely); diff != "" {
			t.Errorf("%v nF: %s", nF, diff)
		}
	}
}

// 6 kV on 10 nF through 50 MΩ to 60 V: 0.5 s · ln 100 = 2.302585 s; and the
// resistor for that time is the one it came from.
func TestDischargeTime(t *testing.T) {
	if got := DischargeTime(-6000, 60, 50e6, 10e-9); !near(got, 2.302585092994046) {
		t.Errorf("got %v s", got)
	}
	if got := BleederFor(6000, -60, 10e-9, 2.302585092994046); !near(got, 50e6) {
		t.Errorf("got %v Ω", got)
	}
	for name, c := range map[string]struct{ got, want float64 }{
		"at the limit":          {DischargeTime(60, 60, 1e6, 1e-6), 0},
		"below the limit":       {DischargeTime(30, 60, 1e6, 1e-6), 0},
		"nothing, no bleeder":   {DischargeTime(600, 0, 0, 0), 0},
		"a small one":           {DischargeTime(60*math.E, 60, 0.5, 1), 0.5},
		"none below the limit":  {BleederFor(30, 60, 1e-6, 1), math.Inf(1)},
		"nothing stored":        {DischargeTime(600, 60, 1e6, 0), 0},
		"no bleeder":            {DischargeTime(600, 60, 0, 1e-6), math.Inf(1)},
		"no limit":              {DischargeTime(600, 0, 1e6, 1e-6), math.Inf(1)},
		"any bleeder does":      {BleederFor(60, 60, 1e-6, 1), math.Inf(1)},
		"any does, none stored": {BleederFor(600, 60, 0, 1), math.Inf(1)},
	} {
		if !near(c.got, c.want) {
			t.Errorf("%s: got %v, want %v", name, c.got, c.want)
		}
	}
}
