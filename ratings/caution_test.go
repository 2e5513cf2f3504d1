package ratings

import (
	"math"
	"slices"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
)

func codes(h Hazard) []string {
	var out []string
	for _, c := range Cautions(h) {
		out = append(out, c.Code)
	}
	return out
}

func caution(t *testing.T, h Hazard, code string) Caution {
	t.Helper()
	for _, c := range Cautions(h) {
		if c.Code == code {
			return c
		}
	}
	t.Fatalf("no caution %q among %v", code, codes(h))
	return Caution{}
}

// A 24 V rail from an isolated winding: little to fear, never nothing.
func TestLowRailStillDefers(t *testing.T) {
	h := Hazard{OutputV: 24, SourcePeakV: 13, StoredJ: 1.2, OutputC: 2e-3, HasBleeder: false, MainsFed: true, Isolated: true}
	if diff := cmp.Diff([]string{"mains-isolation", "not-certified"}, codes(h)); diff != "" {
		t.Error(diff)
	}
	got := caution(t, Hazard{}, "not-certified")
	if got.Title != "figures are calculated, not certified" || !strings.Contains(got.Text, "Local codes and licensed practice come first") {
		t.Errorf("got %+v", got)
	}
	if diff := cmp.Diff([]string{"not-certified"}, codes(Hazard{})); diff != "" {
		t.Error(diff)
	}
}

// The order is that of gravity, and every code is listed.
func TestCautionsGravestFirst(t *testing.T) {
	h := Hazard{OutputV: -20e3, SourcePeakV: 2e3, StoredJ: 20, OutputC: 100e-9, DischargeS: 12, HasBleeder: true, BleederParts: 8, MainsFed: true}
	want := []string{"direct-fed", "lethal-energy", "live-output", "stored-charge", "charged-capacitor", "discharge-time", "bleeder-fault",
		"work-inside", "output-short", "bleeder-sharing", "x-rays", "corona", "spacing", "not-certified"}
	if diff := cmp.Diff(want, codes(h)); diff != "" {
		t.Error(diff)
	}
	all := CautionCodes()
	at := -1
	for _, code := range codes(h) {
		i := slices.Index(all, code)
		if i <= at {
			t.Errorf("%q is out of order in %v", code, all)
		}
		at = i
	}
	if last := all[len(all)-1]; last != "not-certified" || len(all) != 19 {
		t.Errorf("got %v", all)
	}
}

func TestEveryCautionNamesItsSource(t *testing.T) {
	for _, h := range []Hazard{
		{OutputV: 20e3, StoredJ: 20, OutputC: 1e-7, HasBleeder: true, BleederParts: 3, DischargeS: 3},
		{OutputV: 600, StoredJ: 1, OutputC: 1e-6, MainsFed: true}, {OutputV: 50, StoredJ: 20}, {MainsFed: true, Isolated: true},
	} {
		for _, c := range Cautions(h) {
			if !strings.HasSuffix(c.Source, "from memory") && c.Source != "common practice, no source" {
				t.Errorf("%s: source %q", c.Code, c.Source)
			}
			if c.Title == "" || c.Text == "" || strings.Contains(c.Title+c.Text, "%!") || strings.Contains(c.Text, "NaN") {
				t.Errorf("got %+v", c)
			}
		}
	}
}

// Each hazard appears just past its figure and not at it (or at it, where the
// figure itself already counts).
func TestCautionThresholds(t *testing.T) {
	isolated := func(h Hazard) Hazard { h.Isolated = true; return h }
	for _, c := range []struct {
		code  string
		h     Hazard
		there bool
	}{
		{"live-output", Hazard{OutputV: 60}, false},
		{"live-output", Hazard{OutputV: -60.01}, true},
		{"live-output", Hazard{OutputV: 24, SourcePeakV: 61}, true},
		{"live-output", Hazard{OutputV: 24, NodeV: []NodeVoltage{{"n1", -61}}}, true},
		{"live-output", Hazard{OutputV: math.NaN()}, true},
		{"work-inside", Hazard{OutputV: 60}, false},
		{"work-inside", Hazard{OutputV: 61}, true},
		{"spacing", Hazard{OutputV: 60}, false},
		{"spacing", Hazard{OutputV: 61}, true},
		{"output-short", Hazard{OutputV: 60}, false},
		{"output-short", Hazard{OutputV: 61}, true},
		{"no-bleeder", Hazard{OutputV: 60}, false},
		{"no-bleeder", Hazard{OutputV: 61}, true},
		{"no-bleeder", Hazard{OutputV: 61, HasBleeder: true}, false},
		{"lethal-energy", Hazard{OutputV: 100, StoredJ: 10}, true},
		{"lethal-energy", Hazard{OutputV: 100, StoredJ: 9.99}, false},
		{"lethal-energy", Hazard{OutputV: 99, StoredJ: 50}, false},
		{"burn", Hazard{OutputV: 99, StoredJ: 10}, true},
		{"burn", Hazard{OutputV: 99, StoredJ: 9.99}, false},
		{"burn", Hazard{OutputV: 100, StoredJ: 10}, false},
		{"startle", Hazard{OutputV: 401, StoredJ: 0.25}, true},
		{"startle", Hazard{OutputV: 400, StoredJ: 0.25}, false},
		{"startle", Hazard{OutputV: 401, StoredJ: 0.249}, false},
		{"startle", Hazard{OutputV: 401, StoredJ: 10}, false},           // lethal-energy says more
		{"stored-charge", Hazard{OutputV: 4500, OutputC: 10e-9}, false}, // 45 µC
		{"stored-charge", Hazard{OutputV: 4501, OutputC: 10e-9}, true},
		{"stored-charge", Hazard{OutputV: 60, OutputC: 1}, false},
		{"stored-charge", Hazard{OutputV: 61, OutputC: 1}, true},
		{"stored-charge", Hazard{OutputV: 15e3, OutputC: 4e-9, StoredJ: 0.1}, true},    // 60 µC
		{"stored-charge", Hazard{OutputV: 15001, OutputC: 4e-9, StoredJ: 0.35}, false}, // energy counts above 15 kV
		{"stored-charge", Hazard{OutputV: 15001, OutputC: 4e-9, StoredJ: 0.351}, true},
		{"charged-capacitor", Hazard{OutputV: 1000, OutputC: 4e-9}, false},
		{"charged-capacitor", Hazard{OutputV: 1001, OutputC: 4e-9}, true},
		{"charged-capacitor", Hazard{OutputV: 1001}, false},
		{"corona", Hazard{OutputV: 5000}, false},
		{"corona", Hazard{OutputV: 5001}, true},
		{"x-rays", Hazard{OutputV: 10000}, false},
		{"x-rays", Hazard{OutputV: 10001}, true},
		{"direct-fed", Hazard{MainsFed: true}, true},
		{"direct-fed", isolated(Hazard{MainsFed: true}), false},
		{"direct-fed", Hazard{OutputV: 1000}, false},
		{"mains-isolation", isolated(Hazard{MainsFed: true}), true},
		{"mains-isolation", Hazard{Isolated: true}, false},
		{"source-isolation", Hazard{OutputV: 61}, true},
		{"source-isolation", Hazard{OutputV: 60}, false},
		{"source-isolation", isolated(Hazard{OutputV: 61}), false},
		{"source-isolation", Hazard{OutputV: 61, MainsFed: true}, false},
		{"discharge-time", Hazard{OutputV: 61, HasBleeder: true}, true},
		{"discharge-time", Hazard{OutputV: 60, HasBleeder: true}, false},
		{"discharge-time", Hazard{OutputV: 61}, false},
		{"bleeder-fault", Hazard{OutputV: 61, HasBleeder: true}, true},
		{"bleeder-fault", Hazard{OutputV: 60, HasBleeder: true}, false},
		{"bleeder-fault", Hazard{OutputV: 61}, false},
		{"bleeder-sharing", Hazard{OutputV: 61, HasBleeder: true, BleederParts: 2}, true},
		{"bleeder-sharing", Hazard{OutputV: 61, HasBleeder: true, BleederParts: 1}, false},
		{"bleeder-sharing", Hazard{OutputV: 60, HasBleeder: true, BleederParts: 2}, false},
		{"bleeder-sharing", Hazard{OutputV: 61, BleederParts: 2}, false},
	} {
		if got := slices.Contains(codes(c.h), c.code); got != c.there {
			t.Errorf("%s, %+v: there %v, want %v", c.code, c.h, got, c.there)
		}
	}
}

func TestDischargeTimeAgainstItsLimits(t *testing.T) {
	for seconds, want := range map[float64]string{
		4: "within the 5 s", 5: "within the 5 s", 5.1: "more than the 5 s", 10: "more than the 5 s", 10.1: "more than the 10 s",
		math.Inf(1): "does not fall below 60 V", math.NaN(): "does not fall below 60 V",
	} {
		c := caution(t, Hazard{OutputV: 600, HasBleeder: true, DischargeS: seconds}, "discharge-time")
		if !strings.Contains(c.Text, want) {
			t.Errorf("%v s: %q does not say %q", seconds, c.Text, want)
		}
	}
}

// One string open: nothing discharges. Of three, the other two take 3/2 of
// the time.
func TestBleederSingleFault(t *testing.T) {
	h := Hazard{OutputV: 600, HasBleeder: true, DischargeS: 6}
	for _, strings1 := range []int{0, 1} {
		h.BleederStrings = strings1
		if c := caution(t, h, "bleeder-fault"); !strings.Contains(c.Title, "stays charged") || !strings.Contains(c.Text, "two independent bleeders") {
			t.Errorf("got %+v", c)
		}
	}
	h.BleederStrings = 3
	if c := caution(t, h, "bleeder-fault"); !strings.Contains(c.Text, "3 strings open, the output takes 9 s") {
		t.Errorf("got %+v", c)
	}
	h.BleederStrings = 2
	if c := caution(t, h, "bleeder-fault"); !strings.Contains(c.Text, "takes 12 s") {
		t.Errorf("got %+v", c)
	}
}

// The figures that triggered a caution stand in it.
func TestCautionsShowTheirFigures(t *testing.T) {
	h := Hazard{OutputV: 5600, SourcePeakV: 700, StoredJ: 0.4, OutputC: 10e-9, DischargeS: 8, HasBleeder: true, BleederParts: 4, AltitudeM: 3000,
		NodeV: []NodeVoltage{{"n4", -6000}}}
	for code, want := range map[string]string{
		"live-output":       "Node n4 reaches 6 kV",
		"stored-charge":     "56 µC are stored, above the 45 µC",
		"charged-capacitor": "charged to 850 V for class ES2; it reaches 5.6 kV", // 10 nF: ES1 425 V
		"work-inside":       "at least 8 s",
		"bleeder-sharing":   "Each sees 1.4 kV",
		"startle":           "400 mJ at 5.6 kV",
		"output-short":      "400 mJ",
		"source-isolation":  "700 V",
		"corona":            "6 kV",
		"spacing":           "wants 6.27 mm through air and 60 mm over a surface", // 5.5·1.14
	} {
		if c := caution(t, h, code); !strings.Contains(c.Title+" "+c.Text, want) {
			t.Errorf("%s: %q %q does not say %q", code, c.Title, c.Text, want)
		}
	}
	for h, want := range map[float64]string{5600: "The output reaches", 100: "The source reaches"} {
		if c := caution(t, Hazard{OutputV: h, SourcePeakV: 700}, "live-output"); !strings.HasPrefix(c.Text, want) {
			t.Errorf("got %q, want %s…", c.Text, want)
		}
	}
	// 6 kV bare: 2.5 + 5500·0.005 = 30 mm; coated 0.8 + 5500·0.00305 = 17.575 mm;
	// above 3050 m bare 12.5 + 5500·0.025 = 150 mm.
	if c := caution(t, h, "spacing"); !strings.Contains(c.Text, "want 30 mm by IPC-2221 table 6-1, coated ones 17.6 mm") || strings.Contains(c.Text, "beyond") {
		t.Errorf("got %q", c.Text)
	}
	for altitude, want := range map[float64]string{3050: "want 30 mm", 3051: "want 150 mm"} {
		h.AltitudeM = altitude
		if c := caution(t, h, "spacing"); !strings.Contains(c.Text, want) {
			t.Errorf("%v m: got %q", altitude, c.Text)
		}
	}
	h.NodeV[0].V = 10001
	if c := caution(t, h, "spacing"); !strings.Contains(c.Text, "beyond the tables") {
		t.Errorf("got %q", c.Text)
	}
	if c := caution(t, Hazard{OutputV: 100, OutputC: 200e-9}, "charged-capacitor"); !strings.Contains(c.Title, "ES2") {
		t.Errorf("got %+v", c)
	}
	if c := caution(t, Hazard{OutputV: 2000, OutputC: 4e-9}, "charged-capacitor"); !strings.Contains(c.Title, "ES2") {
		t.Errorf("at the ES2 limit: got %+v", c)
	}
	if c := caution(t, Hazard{OutputV: 2001, OutputC: 4e-9}, "charged-capacitor"); !strings.Contains(c.Title, "ES3") {
		t.Errorf("above it: got %+v", c)
	}
	for joules, arc := range map[float64]bool{100: false, 101: true} {
		if c := caution(t, Hazard{OutputV: 50, StoredJ: joules}, "burn"); strings.Contains(c.Text, "arc") != arc {
			t.Errorf("%v J: got %q", joules, c.Text)
		}
	}
	for seconds, want := range map[float64]string{0: "Wait until", 0.5: "at least 500 ms", 7.256: "at least 7.26 s", math.NaN(): "Wait until"} {
		if c := caution(t, Hazard{OutputV: 600, HasBleeder: true, DischargeS: seconds}, "work-inside"); !strings.Contains(c.Text, want) {
			t.Errorf("%v s: got %q", seconds, c.Text)
		}
	}
	if c := caution(t, Hazard{OutputV: 600, HasBleeder: true, DischargeS: math.Inf(1)}, "work-inside"); strings.Contains(c.Text, "∞") {
		t.Errorf("got %q", c.Text)
	}
}
