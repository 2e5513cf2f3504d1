package ratings

import (
	"math"
	"testing"

	"github.com/google/go-cmp/cmp"

	"rungwright/catalog"
)

// Three in series of ±10 %, the worst at −10 %: (1/0.9)/(1/0.9 + 2/1.1) =
// 1.11111/2.92929 = 0.379310 of the whole.
func TestSeriesCapacitorsShareByTolerance(t *testing.T) {
	part := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.ToleranceLow, c.ToleranceHigh = 0.1, 0.1 })
	u := Group{Series: 3}.Piece(part, Use{PeakV: 1000, ACV: 100, SlewVps: 1e6, RippleA: 0.5})
	if !near(float64(u.PeakV), 379.31034482758622) || !near(float64(u.ACV), 37.931034482758622) ||
		!near(float64(u.SlewVps), 379310.34482758622) || u.RippleA != 0.5 {
		t.Errorf("got %+v", u)
	}
}

// Two in parallel of −20/+80 %: the largest takes 1.8/(1.8+0.8) of the current.
func TestParallelCapacitorsShareByTolerance(t *testing.T) {
	part := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.ToleranceLow, c.ToleranceHigh = 0.2, 0.8 })
	u := Group{Parallel: 2}.Piece(part, Use{PeakV: 1000, RippleA: 2.6})
	if u.PeakV != 1000 || !near(float64(u.RippleA), 1.8) {
		t.Errorf("got %+v", u)
	}
}

// An electrolytic string without balancing resistors may settle on one piece;
// with 100 kΩ across each of 3 and 1 mA of leakage the worst sees
// (900 + 2·100 kΩ·1 mA)/3 = 366.67 V, more than its third.
func TestElectrolyticStringSettlesByLeakage(t *testing.T) {
	part := electrolytic(func(_ *catalog.Part, c *catalog.Capacitor) { c.Leakage = 1e-3 })
	for ohms, want := range map[float64]float64{0: 900, 100e3: 1100.0 / 3, 1e9: 900} {
		for _, sign := range []float64{1, -1} {
			u := Group{Series: 3, BalanceOhms: ohms}.Piece(part, Use{PeakV: volt(sign * 900)})
			if !near(math.Abs(float64(u.PeakV)), want) {
				t.Errorf("%v Ω: got %v, want %v V", ohms, u.PeakV, want)
			}
		}
	}
	if u := (Group{Series: 2}).Piece(part, Use{PeakV: 900}); u.PeakV != 900 {
		t.Errorf("two without resistors: got %v, want 900 V", u.PeakV)
	}
	// Without leakage on the sheet, tolerance decides: (1/0.8)/(1/0.8+2/1.2) = 3/7.
	part = electrolytic(func(_ *catalog.Part, c *catalog.Capacitor) { c.ToleranceLow, c.ToleranceHigh = 0.2, 0.2 })
	if u := (Group{Series: 3, BalanceOhms: 1e5}).Piece(part, Use{PeakV: 700}); !near(float64(u.PeakV), 300) {
		t.Errorf("got %v, want 300 V", u.PeakV)
	}
	if u := (Group{Series: 1}).Piece(part, Use{PeakV: 700}); u.PeakV != 700 {
		t.Errorf("one piece: got %v", u.PeakV)
	}
}

// Four diodes count for 0.8·4 = 3.2; parallel ones count as one.
func TestDiodeGroups(t *testing.T) {
	use := Use{InverseV: 3200, AverageA: 1, SurgeA: 10, LossW: 0.4}
	want := use
	want.InverseV, want.LossW = 1000, 0.1
	if diff := cmp.Diff(want, Group{Series: 4}.Piece(diode(nil), use)); diff != "" {
		t.Error(diff)
	}
	want.InverseV, want.LossW = 2000, 0.2 // two count for 1.6
	if diff := cmp.Diff(want, Group{Series: 2}.Piece(diode(nil), use)); diff != "" {
		t.Error(diff)
	}
	if diff := cmp.Diff(use, Group{Parallel: 3}.Piece(diode(nil), use)); diff != "" {
		t.Error(diff)
	}
}

// Two strings of three at ±5 %: along the string 1.05/(1.05+2·0.95) = 0.355932,
// among the strings (1/0.95)/(1/0.95+1/1.05) = 0.525.
func TestResistorGroups(t *testing.T) {
	part := resistor(func(_ *catalog.Part, r *catalog.Resistor) { r.ToleranceLow, r.ToleranceHigh = 0.05, 0.05 })
	u := Group{Series: 3, Parallel: 2}.Piece(part, Use{WorkingV: 1000, PowerW: 1, PulseJ: 2})
	along, aside := 1.05/2.95, 0.525
	if !near(float64(u.WorkingV), 1000*along) || !near(float64(u.PowerW), along*aside) || !near(float64(u.PulseJ), 2*along*aside) {
		t.Errorf("got %+v", u)
	}
}

func TestAWindingIsOne(t *testing.T) {
	use := Use{ApparentVA: 3, RMSA: 1}
	if diff := cmp.Diff(use, Group{Series: 2, Parallel: 2}.Piece(winding(nil), use)); diff != "" {
		t.Error(diff)
	}
}

// 10, 20 and 20 nF: 1/C in the ratio 2:1:1.
func TestSeriesVoltages(t *testing.T) {
	if got := SeriesVoltages(400, 10e-9, 20e-9, 20e-9); !near(got[0], 200) || !near(got[1], 100) || !near(got[2], 100) {
		t.Errorf("got %v", got)
	}
}

// Three 450 V capacitors on 1200 V, leakage spread 0.5 mA:
// (3·450 − 1200)/(2·0.5 mA) = 150 kΩ; and with it the worst sees 450 V.
func TestBalancingResistor(t *testing.T) {
	r := BalancingResistor(3, 450, 1200, 0.5e-3)
	if !near(r, 150e3) || !near(LeakageShare(3, 1200, r, 0.5e-3), 450) {
		t.Errorf("got %v Ω", r)
	}
	for name, c := range map[string]struct{ got, want float64 }{
		"two":        {BalancingResistor(2, 450, 600, 1e-3), 300e3}, // 300 V at 1 mA
		"tight":      {BalancingResistor(2, 400, 799.5, 1e-3), 500},
		"one, less":  {BalancingResistor(1, 450, 449, 1e-3), math.Inf(1)},
		"no room":    {BalancingResistor(3, 400, 1200, 1e-3), 0},
		"overloaded": {BalancingResistor(2, 400, 1200, 1e-3), 0},
		"one":        {BalancingResistor(1, 450, 400, 1e-3), math.Inf(1)},
		"no spread":  {BalancingResistor(2, 450, 400, 0), math.Inf(1)},
	} {
		if c.got != c.want {
			t.Errorf("%s: got %v, want %v", name, c.got, c.want)
		}
	}
}

// Three 1 kV diodes on 2 kV, 100 nC apart: the first may take
// (3000−2000)/2 = 500 V from each other: 100 nC/500 V = 200 pF.
func TestSharingCapacitor(t *testing.T) {
	if got := SharingCapacitor(3, 1000, 2000, 100e-9); !near(got, 200e-12) {
		t.Errorf("got %v F", got)
	}
	if got := SharingCapacitor(2, 1000, 1999.5, 1e-9); !near(got, 2e-9) {
		t.Errorf("two, half a volt of room: got %v F", got)
	}
	if got := SharingCapacitor(2, 1000, 2000, 1e-9); !math.IsInf(got, 1) {
		t.Errorf("no room: got %v F", got)
	}
	if got := SharingCapacitor(1, 1000, 900, 1e-9); got != 0 {
		t.Errorf("one: got %v F", got)
	}
}
