package report

import (
	"context"
	"fmt"
	"math"
	"sync"
	"testing"

	exact "github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize"
	"rungwright/optimize/ladder"
	"rungwright/optimize/order"
	"rungwright/ratings"
)

// An invented design whose electrical figures are the solver's own: 5.6 kV
// below ground, four stages, with every study that a report can show.

func fixtureParts() (coupling, smoothing, rectifier, bleeder, winding *catalog.Part) {
	coupling = &catalog.Part{Number: "QLF-HV-103-3K", Maker: "Quillfen", Kind: catalog.KindCapacitor, Mounting: catalog.ThroughHole, Status: catalog.Active,
		Capacitor: &catalog.Capacitor{Technology: catalog.CeramicClass2, Characteristic: "X7R", Capacitance: 10e-9, ToleranceLow: 0.1, ToleranceHigh: 0.1, Voltage: 3000}}
	smoothing = &catalog.Part{Number: "QLF-HV-472-3K", Maker: "Quillfen", Kind: catalog.KindCapacitor, Mounting: catalog.ThroughHole, Status: catalog.LastBuy,
		Capacitor: &catalog.Capacitor{Technology: catalog.CeramicClass1, Characteristic: "C0G", Capacitance: 4.7e-9, ToleranceLow: 0.05, ToleranceHigh: 0.05, Voltage: 3000}}
	rectifier = &catalog.Part{Number: "TVD-2K2-F", Maker: "Tarnvale", Kind: catalog.KindDiode, Mounting: catalog.ThroughHole, Status: catalog.Active,
		Diode: &catalog.Diode{Type: catalog.HighVoltage, ReverseVoltage: 2200, AverageCurrent: 0.03, SurgeCurrent: 1, Recovery: catalog.Recovery{Time: 60e-9}, Junction: 150}}
	bleeder = &catalog.Part{Number: "WRM-47M-2K5", Maker: "Wrenmoor", Kind: catalog.KindResistor, Status: catalog.Active,
		Resistor: &catalog.Resistor{Technology: "thick film", Resistance: 47e6, Power: 0.5, WorkingVoltage: 2500}}
	winding = &catalog.Part{Number: "DRS-700-32", Maker: "Dorsay Windings", Kind: catalog.KindWinding, Status: catalog.NotForNew,
		Winding: &catalog.Winding{Type: "inverter", Peak: 750, Power: 6, FrequencyMin: 28e3, FrequencyMax: 36e3, Resistance: 45, Isolated: true}}
	return
}

func fixtureLine(p *catalog.Part, role optimize.Role, series, pieces int, price string, refs ...string) optimize.Line {
	bought := 120 * pieces
	each := exact.RequireFromString(price)
	offer := &catalog.Offer{Supplier: "Fellmarket", OrderCode: "FM-" + p.Number[:3], Least: 1, Multiple: 1}
	return optimize.Line{Part: p, Role: role, Series: series, Parallel: 1, Refs: refs,
		Purchase: order.Purchase{Part: p, Offer: offer, Quantity: bought, UnitPrice: each, Cost: each.Mul(exact.NewFromInt(int64(bought)))}}
}

func refs(prefix string, list ...int) []string {
	var out []string
	for _, k := range list {
		out = append(out, fmt.Sprint(prefix, k))
	}
	return out
}

func fixtureCircuit() ladder.Circuit {
	c := ladder.Circuit{Topology: ladder.HalfWave, Stages: 4, Negative: true,
		Source: ladder.Source{Waveform: ladder.Sine, Peak: 750, Frequency: 32e3, Resistance: 45}, Load: ladder.Load{Current: 180e-6, Resistance: 188e6}}
	for k := range 8 {
		c.Capacitors = append(c.Capacitors, ladder.Capacitor{C: []float64{10e-9, 4.7e-9}[k%2]})
		c.Diodes = append(c.Diodes, ladder.Diode{IS: 1e-9, N: 4, RS: 60, CJ0: 2.4e-12})
	}
	return c
}

// fixture is the design with its studies; the solver is asked once.
var fixture = sync.OnceValues(func() (*optimize.Design, Extras) {
	ctx := context.Background()
	must := func(err error) {
		if err != nil {
			panic("report: the fixture does not solve: " + err.Error())
		}
	}
	c := fixtureCircuit()
	d := fixtureDesign(c)
	for _, at := range []struct {
		name string
		line float64
		load float64
	}{{"full load, low line", 0.97, 180e-6}, {"least load, high line", 1.03, 0}, {"full load, high line", 1.03, 180e-6}} {
		x := c
		x.Source.Peak *= at.line
		x.Load.Current = at.load
		s, err := ladder.Solve(ctx, x, nil)
		must(err)
		d.Corners = append(d.Corners, optimize.Corner{Name: at.name, LoadA: at.load, Line: at.line, Ambient: 45, Steady: s})
	}
	e := fixtureStudies()
	nominal, err := ladder.Solve(ctx, c, &ladder.Settings{Waves: true})
	must(err)
	e.Nominal = &nominal
	curve, err := ladder.Regulate(ctx, c, []float64{0, 50e-6, 100e-6, 180e-6, 400e-6, 1e-3, 2e-3, 4e-3, 8e-3, 12e-3, 16e-3, 20e-3}, nil)
	must(err)
	e.Regulation = &curve
	d.StartUp, err = ladder.SwitchOn(ctx, c, 0.25, 5376, 0.02)
	must(err)
	off := c
	off.Load.Current = 0
	fall, err := ladder.SwitchOff(ctx, off, nominal, 60, 12)
	must(err)
	e.Discharge = &fall
	d.DischargeS = fall.Seconds
	fixtureVerdicts(d, &nominal, fall.Seconds)
	return d, e
})

func fixtureDesign(c ladder.Circuit) *optimize.Design {
	coupling, smoothing, rectifier, bleeder, winding := fixtureParts()
	d := &optimize.Design{Topology: c.Topology, Stages: c.Stages, Circuit: c, Currency: "EUR", StoredJ: 0.071}
	d.Supply = optimize.Supply{Name: "Harbour air ioniser, emitter rail", Derating: "general",
		Output: optimize.Output{Voltage: 5600, Window: 0.1, Negative: true, Load: optimize.LoadRange{Most: 180e-6}, Ripple: 25,
			Discharge: optimize.Discharge{Below: 60, Within: 10}, Rise: 0.5},
		Source:       optimize.Source{Line: 0.03, Frequency: 32e3, Waveform: ladder.Sine},
		Surroundings: optimize.Surroundings{Ambient: 45, Altitude: 1500, PollutionDegree: 2},
		Build:        optimize.Build{Units: 120, Spares: 0.02, Currency: "EUR"}, Choose: optimize.Choose{Least: optimize.LeastCost},
		Input: catalog.Input{Name: "supplies/harbour.yaml", SHA256: "2f0a5b7c9d1e3f60718293a4b5c6d7e8f90a1b2c3d4e5f60718293a4b5c6d7e8"}}
	d.Inputs = []catalog.Input{{Name: "parts/high-voltage.yaml", SHA256: "9b1c2d3e4f5061728394a5b6c7d8e9f0a1b2c3d4e5f60718293a4b5c6d7e8f90"}}
	d.Lines = []optimize.Line{
		fixtureLine(coupling, optimize.RoleCoupling, 1, 4, "0.41", refs("C", 1, 3, 5, 7)...),
		fixtureLine(smoothing, optimize.RoleSmoothing, 1, 4, "0.38", refs("C", 2, 4, 6, 8)...),
		fixtureLine(rectifier, optimize.RoleRectifier, 1, 8, "0.1675", refs("D", 1, 2, 3, 4, 5, 6, 7, 8)...),
		fixtureLine(bleeder, optimize.RoleBleeder, 4, 4, "0.0625", "R1"),
		fixtureLine(winding, optimize.RoleSource, 1, 1, "8.20", "T1"),
	}
	for _, l := range d.Lines {
		d.BuildCost = d.BuildCost.Add(l.Purchase.Cost)
	}
	d.UnitCost = d.BuildCost.DivRound(exact.NewFromInt(120), 4)
	d.Certificate = optimize.Certificate{Combinations: 1204331, Dominated: 1190020, Bounded: 13900, Simulated: 411, Guard: 0.08, Proved: true,
		Text: []string{"No cheaper combination of the catalog passes."}, Rejected: "three stages with 22 nF at 9.10 EUR: diode D3 at 118 % of its limit"}
	d.RunnersUp = []optimize.RunnerUp{{Summary: "full-wave, 3 stages, 12 × QLF-HV-472-3K", UnitCost: exact.RequireFromString("15.07"), Note: "half the ripple"}}
	d.Notes = []string{"an invented design"}
	return d
}

func fixtureVerdicts(d *optimize.Design, s *ladder.Steady, fall float64) {
	low, high, ripple := math.Inf(1), 0.0, 0.0
	for _, c := range d.Corners {
		low, high, ripple = min(low, math.Abs(c.Steady.MeanV)), max(high, math.Abs(c.Steady.MeanV)), max(ripple, c.Steady.RippleV)
	}
	d.Targets = []optimize.Target{
		{Name: "output, least", Unit: "V", Wanted: "5.04 kV or more", Got: low, Limit: 5040, Met: low >= 5040, Corner: "full load, low line"},
		{Name: "output, most", Unit: "V", Wanted: "6.16 kV or less", Got: high, Limit: 6160, Met: high <= 6160, Corner: "least load, high line"},
		{Name: "ripple, peak to peak", Unit: "V", Wanted: "25 V or less", Got: ripple, Limit: 25, Met: ripple <= 25, Corner: "full load, low line"},
		{Name: "discharge time", Unit: "s", Wanted: "below 60 V within 10 s", Got: fall, Limit: 10, Met: fall <= 10, Corner: "switch-off, high line, least load"},
	}
	general := func(name string) ratings.Rule {
		return ratings.Rule{Policy: "general", Name: name, Source: "common practice, no source"}
	}
	stress := func(ref, part, what string, value, rating, limit float64, unit quantity.Dimension, rule string) ratings.Stress {
		return ratings.Stress{Ref: ref, Part: part, Quantity: what, Value: value, Rating: rating, Limit: limit, Unit: unit, Ratio: value / limit,
			Over: value > limit, Corner: "least load, high line", Rule: general(rule)}
	}
	peak := d.Corners[1].Steady
	d.Stresses = []ratings.Stress{
		stress("D3", "TVD-2K2-F", "repetitive reverse voltage", peak.Diodes[2].InverseV, 2200, 1540, quantity.Voltage, "diode reverse voltage"),
		stress("C3", "QLF-HV-103-3K", "peak voltage", peak.Capacitors[2].MaxV, 3000, 1800, quantity.Voltage, "ceramic class 2 voltage"),
		stress("C4", "QLF-HV-472-3K", "peak voltage", peak.Capacitors[3].MaxV, 3000, 2100, quantity.Voltage, "ceramic class 1 voltage"),
		stress("R1", "WRM-47M-2K5", "working voltage", math.Abs(peak.MeanV)/4, 2500, 2000, quantity.Voltage, "resistor working voltage"),
		stress("D1", "TVD-2K2-F", "average current", s.Diodes[0].AverageA, 0.03, 0.018, quantity.Current, "diode average current"),
		{Ref: "T1", Part: "DRS-700-32", Quantity: "insulation", Unjudged: true, Note: "the sheet gives no test voltage"},
	}
	d.Cautions = []ratings.Caution{
		{Code: "live-output", Title: "5.8 kV at the output and on the board: lethal", Text: "Keep the unit closed. Switch off, wait, measure, then short the output before you touch anything.", Source: "common practice, no source"},
		{Code: "stored-charge", Title: "71 mJ stay in the capacitors after switch-off", Text: "The bleeder takes some seconds to bring the output below 60 V. Wait, then measure.", Source: "from memory"},
		{Code: "not-certified", Title: "This is a calculation, not a certificate", Text: "Local codes and licensed practice come first.", Source: ""},
	}
	for _, x := range d.Stresses {
		if x.Over {
			d.Failed = append(d.Failed, fmt.Sprintf("%s (%s): %s at %.0f %% of its limit, %s", x.Ref, x.Part, x.Quantity, 100*x.Ratio, x.Corner))
		}
	}
	for _, x := range d.Targets {
		if !x.Met {
			d.Failed = append(d.Failed, x.Name+": "+x.Wanted+" wanted, not met ("+x.Corner+")")
		}
	}
}

func fixtureStudies() Extras {
	coupling, _, _, _, _ := fixtureParts()
	other := *coupling
	other.Number = "QLF-HV-103-4K"
	e := Extras{FrontOf: "ripple, peak to peak", FrontUnit: quantity.Voltage,
		Alternates: []Alternate{{For: "QLF-HV-103-3K", Part: &other, Effect: "4 % dearer, peak voltage at 67 % of its limit", Note: "fits the same board"}},
		Tolerance: &Histogram{Of: "output at full load", Unit: quantity.Voltage, Edges: []float64{5020, 5080, 5140, 5200, 5260, 5320, 5380, 5440},
			Counts: []int{4, 31, 118, 201, 109, 33, 4}, Least: 5040, Most: 6160, Outside: 2, Seed: 7}}
	for k, cost := range []string{"13.20", "13.90", "15.07", "17.40", "22.10"} {
		e.Front = append(e.Front, FrontPoint{Name: fmt.Sprintf("half-wave, %d stages, %d nF", 4+k%2, 5*(k+1)), Cost: exact.RequireFromString(cost), Other: 30 / float64(k+1), Chosen: k == 1})
	}
	for _, n := range []int{1, 10, 50, 100, 120, 500, 1000} {
		e.CostCurve = append(e.CostCurve, CostPoint{n, exact.NewFromFloat(12.6 + 14/math.Sqrt(float64(n))).Round(2)})
	}
	return e
}

func fixtureHTML(t *testing.T) []byte {
	t.Helper()
	d, e := fixture()
	out, err := HTML(d, e, Options{Program: "rungwright 0.1"})
	if err != nil {
		t.Fatal(err)
	}
	return out
}
