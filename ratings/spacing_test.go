package ratings

import (
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/google/go-cmp/cmp/cmpopts"
)

// close ignores the last bits.
var closely = cmpopts.EquateApprox(1e-12, 1e-12)

// IEC 60664-1, clearance in an inhomogeneous field to 2000 m, pollution
// degree 1: from memory, put down a second time.
func TestClearanceTable(t *testing.T) {
	for kV, want := range map[float64]float64{
		0.33: 0.01, 0.4: 0.02, 0.5: 0.04, 0.6: 0.06, 0.8: 0.1, 1.0: 0.15, 1.2: 0.25, 1.5: 0.5, 2: 1, 2.5: 1.5, 3: 2, 4: 3,
		5: 4, 6: 5.5, 8: 8, 10: 11, 12: 14, 15: 18, 20: 25, 25: 33, 30: 40, 40: 60, 50: 75, 60: 90, 80: 130, 100: 170,
	} {
		for _, sign := range []float64{1, -1} {
			if got, within := Clearance(sign*kV*1000, 1, 0); !cmp.Equal(got, want, closely) || !within {
				t.Errorf("%v kV: got %v mm, %v, want %v mm", sign*kV, got, within, want)
			}
		}
	}
}

func TestClearanceBetweenAndBeyondTheRows(t *testing.T) {
	for _, c := range []struct {
		volts     float64
		pollution int
		altitude  float64
		want      float64
		within    bool
	}{
		{5500, 1, 2000, 4.75, true}, // halfway from 4 to 5.5 mm
		{365, 1, 0, 0.015, true},    // halfway from 0.01 to 0.02 mm
		{330, 1, 0, 0.01, true},
		{0, 1, 0, 0.01, true},         // below the first row
		{500, 2, 0, 0.2, true},        // degree 2 not below 0.2 mm
		{1200, 2, 0, 0.25, true},      // above that the table counts
		{1200, 3, 0, 0.8, true},       // degree 3 not below 0.8 mm
		{1200, 4, 0, 0.8, true},       // nor a worse one
		{10000, 2, 5000, 16.28, true}, // 11 · 1.48
		{500, 2, 3000, 0.228, true},   // the least one grows with altitude too
		{110e3, 2, 0, 190, false},     // 170 + 10·(40/20)
		{10000, 2, 21000, 11 * 16.066, false},
	} {
		got, within := Clearance(c.volts, c.pollution, c.altitude)
		if !cmp.Equal(got, c.want, closely) || within != c.within {
			t.Errorf("%+v: got %v mm, %v", c, got, within)
		}
	}
}

// IEC 60664-1 table A.2: from memory.
func TestAltitudeFactorTable(t *testing.T) {
	for m, want := range map[float64]float64{
		-100: 1, 0: 1, 2000: 1, 2500: 1.07, 3000: 1.14, 4000: 1.29, 5000: 1.48, 6000: 1.70, 7000: 1.95, 8000: 2.25, 9000: 2.62,
		10000: 3.02, 15000: 6.67, 20000: 14.5,
	} {
		if got, within := AltitudeFactor(m); !cmp.Equal(got, want, closely) || !within {
			t.Errorf("%v m: got %v, %v, want %v", m, got, within, want)
		}
	}
	if _, within := AltitudeFactor(20001); within {
		t.Error("20 001 m is beyond the table")
	}
}

// IEC 60664-1, creepage, pollution degree 2, material group IIIa: from memory.
func TestCreepageTable(t *testing.T) {
	for volts, want := range map[float64]float64{
		10: 1.2, 50: 1.2, 100: 1.4, 125: 1.5, 160: 1.6, 200: 2.0, 250: 2.5, 320: 3.2, 400: 4.0, 500: 5.0, 630: 6.3, 800: 8,
		1000: 10, 1250: 12.5, 1600: 16, 2000: 20, 2500: 25, 3200: 32, 4000: 40, 5000: 50, 6300: 63, 8000: 80, 10000: 100,
		75: 1.3, 9000: 90,
	} {
		if got, within := Creepage(-volts, 2, GroupIIIa); !cmp.Equal(got, want, closely) || !within {
			t.Errorf("%v V: got %v mm, %v, want %v mm", volts, got, within, want)
		}
	}
	if got, within := Creepage(20000, 2, GroupIIIa); !cmp.Equal(got, 200.0, closely) || within {
		t.Errorf("20 kV: got %v mm, %v", got, within)
	}
}

func TestCreepageByGroupAndPollution(t *testing.T) {
	for _, c := range []struct {
		volts     float64
		pollution int
		group     MaterialGroup
		want      float64
	}{
		{1000, 2, GroupI, 5}, {1000, 2, GroupII, 7}, {1000, 1, GroupIIIa, 10}, {1000, 3, GroupIIIa, 16}, {1000, 4, GroupI, 8},
		{200.5, 2, GroupI, 1.0025},                // 2.005 mm halved
		{200, 2, GroupI, 2}, {200, 2, GroupII, 2}, // no less up to 200 V
	} {
		if got, _ := Creepage(c.volts, c.pollution, c.group); !cmp.Equal(got, c.want, closely) {
			t.Errorf("%+v: got %v mm", c, got)
		}
	}
}

// A node of 400 V: 0.2 mm through air, 4 mm over the surface. At 20 000 m and
// 6 kV the clearance, 5.5·14.5 = 79.75 mm, is above the creepage of 60 mm,
// which is never less.
func TestSpacingsPerNode(t *testing.T) {
	h := Hazard{NodeV: []NodeVoltage{{"n1", -400}, {"n2", 6000}, {"n3", 12000}}}
	want := []NodeSpacing{{"n1", 400, 0.2, 4, true}, {"n2", 6000, 5.5, 60, true}, {"n3", 12000, 14, 120, false}}
	if diff := cmp.Diff(want, Spacings(h), closely); diff != "" {
		t.Error(diff)
	}
	h.AltitudeM, h.Pollution = 20000, 1
	if got := Spacings(h)[1]; !cmp.Equal(got.ClearanceMM, 79.75, closely) || !cmp.Equal(got.CreepageMM, 79.75, closely) {
		t.Errorf("got %+v", got)
	}
}

// IPC-2221 table 6-1: from memory, put down a second time by column.
func TestConductorSpacingTable(t *testing.T) {
	volts := []float64{0, 15, 15.5, 16, 30, 31, 50, 51, 100, 101, 150, 151, 170, 171, 250, 251, 300, 301, 500}
	columns := map[ConductorPlace][]float64{
		InternalB1:      {0.05, 0.05, 0.05, 0.05, 0.05, 0.1, 0.1, 0.1, 0.1, 0.2, 0.2, 0.2, 0.2, 0.2, 0.2, 0.2, 0.2, 0.25, 0.25},
		UncoatedB2:      {0.1, 0.1, 0.1, 0.1, 0.1, 0.6, 0.6, 0.6, 0.6, 0.6, 0.6, 1.25, 1.25, 1.25, 1.25, 1.25, 1.25, 2.5, 2.5},
		UncoatedHighB3:  {0.1, 0.1, 0.1, 0.1, 0.1, 0.6, 0.6, 1.5, 1.5, 3.2, 3.2, 3.2, 3.2, 6.4, 6.4, 12.5, 12.5, 12.5, 12.5},
		CoatedB4:        {0.05, 0.05, 0.05, 0.05, 0.05, 0.13, 0.13, 0.13, 0.13, 0.4, 0.4, 0.4, 0.4, 0.4, 0.4, 0.4, 0.4, 0.8, 0.8},
		AssemblyA5:      {0.13, 0.13, 0.13, 0.13, 0.13, 0.13, 0.13, 0.13, 0.13, 0.4, 0.4, 0.4, 0.4, 0.4, 0.4, 0.4, 0.4, 0.8, 0.8},
		LeadUncoatedA6:  {0.13, 0.13, 0.25, 0.25, 0.25, 0.4, 0.4, 0.5, 0.5, 0.8, 0.8, 0.8, 0.8, 0.8, 0.8, 0.8, 0.8, 1.5, 1.5},
		LeadConformalA7: {0.13, 0.13, 0.13, 0.13, 0.13, 0.13, 0.13, 0.13, 0.13, 0.4, 0.4, 0.4, 0.4, 0.4, 0.4, 0.4, 0.4, 0.8, 0.8},
	}
	perVolt := map[ConductorPlace]float64{InternalB1: 0.0025, UncoatedB2: 0.005, UncoatedHighB3: 0.025, CoatedB4: 0.00305,
		AssemblyA5: 0.00305, LeadUncoatedA6: 0.00305, LeadConformalA7: 0.00305}
	for place, want := range columns {
		for i, v := range volts {
			if got := ConductorSpacing(-v, place); got != want[i] {
				t.Errorf("column %d, %v V: got %v mm, want %v mm", place, v, got, want[i])
			}
		}
		if got, want := ConductorSpacing(1500, place), want[len(want)-1]+1000*perVolt[place]; !cmp.Equal(got, want, closely) {
			t.Errorf("column %d, 1500 V: got %v mm, want %v mm", place, got, want)
		}
	}
}
