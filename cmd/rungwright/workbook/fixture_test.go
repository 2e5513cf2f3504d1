package workbook

import (
	"fmt"
	"math"
	"time"

	exact "github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize"
	"rungwright/optimize/ladder"
	"rungwright/optimize/order"
	"rungwright/ratings"
)

// A hand-made design with all that a workbook must carry: foreign currency,
// supplier charges, a part without an offer, one from a single source, one
// that is last buy, and stresses in every state.

func sum(text, code string) quantity.Money {
	return quantity.Money{Amount: exact.RequireFromString(text), Currency: code}
}

func prices(code string, pairs ...any) []catalog.Break {
	var all []catalog.Break
	for i := 0; i < len(pairs); i += 2 {
		all = append(all, catalog.Break{Quantity: pairs[i].(int), Price: sum(pairs[i+1].(string), code)})
	}
	return all
}

func testSuppliers() []catalog.Supplier {
	return []catalog.Supplier{
		{Name: "Brackenlow Parts", Currency: "EUR", Delivery: sum("6.90", "EUR"), FreeAbove: sum("90", "EUR")},
		{Name: "Fellmarket", Currency: "EUR", Delivery: sum("4.50", "EUR"), FreeAbove: sum("60", "EUR"), SmallOrderFee: sum("5", "EUR"), SmallOrder: sum("25", "EUR")},
		{Name: "Ostrand & Vale", Currency: "USD", Delivery: sum("18", "USD"), FreeAbove: sum("150", "USD")},
	}
}

func testParts() (coupling, smoothing, diode, bleeder, winding, board *catalog.Part) {
	coupling = &catalog.Part{Number: "QLF-HV-103-3K", Maker: "Quillfen", Kind: catalog.KindCapacitor, Mounting: catalog.ThroughHole, Status: catalog.Active,
		Size: catalog.Size{Length: 0.010, Width: 0.005, Height: 0.011}, Temperature: catalog.Range{Least: -55, Most: 125},
		Capacitor: &catalog.Capacitor{Technology: catalog.CeramicClass2, Characteristic: "X7R", Capacitance: 10e-9, ToleranceLow: 0.1, ToleranceHigh: 0.1, Voltage: 3000},
		Offers: []catalog.Offer{
			{Supplier: "Fellmarket", OrderCode: "FM-88213", Stock: 4200, LeadDays: 14, Least: 10, Multiple: 10, Prices: prices("EUR", 1, "0.62", 100, "0.41", 1000, "0.29")},
			{Supplier: "Ostrand & Vale", OrderCode: "0012-7", Stock: 900, LeadDays: -1, Least: 1, Multiple: 1, Prices: prices("USD", 1, "0.7055", 250, "0.3955", 500, "0.3333", 2500, "0.2875")},
		}}
	smoothing = &catalog.Part{Number: "QLF-HV-472-3K", Maker: "Quillfen", Kind: catalog.KindCapacitor, Mounting: catalog.ThroughHole, Status: catalog.LastBuy,
		Capacitor: &catalog.Capacitor{Technology: catalog.CeramicClass1, Characteristic: "C0G", Capacitance: 4.7e-9, ToleranceLow: 0.05, ToleranceHigh: 0.05, Voltage: 3000},
		Offers: []catalog.Offer{
			{Supplier: "Fellmarket", OrderCode: "FM-88190", Stock: 120, LeadDays: 21, Least: 5, Multiple: 5, Prices: prices("EUR", 1, "0.48", 50, "0.395", 500, "0.2222")},
			{Supplier: "Brackenlow Parts", OrderCode: "BL/4N7", Stock: -1, LeadDays: -1, Least: 1, Multiple: 1, Prices: prices("EUR", 1, "0.50", 100, "0.38")},
		}}
	diode = &catalog.Part{Number: "TVD-2K2-F", Maker: "Tarnvale", Kind: catalog.KindDiode, Mounting: catalog.ThroughHole, Status: catalog.Active,
		Temperature: catalog.Range{Least: -40, Most: 150},
		Diode:       &catalog.Diode{Type: catalog.HighVoltage, ReverseVoltage: 2200, AverageCurrent: 0.03, SurgeCurrent: 1, Recovery: catalog.Recovery{Time: 60e-9}, Junction: 150},
		Offers: []catalog.Offer{
			{Supplier: "Brackenlow Parts", OrderCode: "BL/TV22", Stock: 2000, LeadDays: 10, Least: 1, Multiple: 1, Prices: prices("EUR", 1, "0.31", 100, "0.224", 500, "0.1985", 1000, "0.1675")},
			{Supplier: "Fellmarket", OrderCode: "FM-10077", Stock: 480, LeadDays: -1, Least: 20, Multiple: 20, Prices: prices("EUR", 20, "0.29", 200, "0.21")},
		}}
	bleeder = &catalog.Part{Number: "WRM-47M-2K5", Maker: "Wrenmoor", Kind: catalog.KindResistor, Status: catalog.Active,
		Resistor: &catalog.Resistor{Technology: "thick film", Resistance: 47e6, Power: 0.5, WorkingVoltage: 2500},
		Offers:   []catalog.Offer{{Supplier: "Fellmarket", OrderCode: "FM-47M", Stock: 6000, LeadDays: 7, Least: 1, Multiple: 1, Prices: prices("EUR", 1, "0.155", 10, "0.0975", 100, "0.0625")}}}
	winding = &catalog.Part{Number: "DRS-700-32", Maker: "Dorsay Windings", Kind: catalog.KindWinding, Status: catalog.NotForNew,
		Winding: &catalog.Winding{Type: "inverter", Peak: 700, Power: 6, FrequencyMin: 28e3, FrequencyMax: 36e3, Resistance: 45, Isolated: true},
		Offers:  []catalog.Offer{{Supplier: "Ostrand & Vale", OrderCode: "DRS70032", Stock: 14, LeadDays: 42, Least: 1, Multiple: 1, Prices: prices("USD", 1, "11.85", 25, "9.995", 100, "8.20")}}}
	board = &catalog.Part{Number: "HB-8-REV2", Maker: "", Kind: catalog.KindOther, Description: "ladder board, 1.6 mm, slotted", Other: &catalog.Other{Category: "board"}}
	return
}

func names(prefix string, from, to int) []string {
	var all []string
	for i := from; i <= to; i++ {
		all = append(all, fmt.Sprint(prefix, i))
	}
	return all
}

func testDesign() *optimize.Design {
	coupling, smoothing, diode, bleeder, winding, board := testParts()
	d := &optimize.Design{Topology: ladder.HalfWave, Stages: 4, Currency: "EUR", StoredJ: 0.071}
	d.Supply.Name = "Harbour air ioniser, emitter rail"
	d.Supply.Output = optimize.Output{Voltage: 5600, Window: 0.04, Negative: true, Load: optimize.LoadRange{Most: 180e-6}, Ripple: 25}
	d.Supply.Source = optimize.Source{Peak: 700, Frequency: 32e3, Waveform: ladder.Sine}
	d.Circuit.Source = ladder.Source{Peak: 700, Frequency: 32e3}
	d.Supply.Build = optimize.Build{Units: 120, Spares: 0.02, Currency: "EUR"}
	d.Supply.Input = catalog.Input{Name: "supplies/harbour.yaml", SHA256: "2f0a5b7c9d1e3f60718293a4b5c6d7e8f90a1b2c3d4e5f60718293a4b5c6d7e8"}
	d.Inputs = []catalog.Input{{Name: "parts/high-voltage.yaml", SHA256: "9b1c2d3e4f5061728394a5b6c7d8e9f0a1b2c3d4e5f60718293a4b5c6d7e8f90"}}
	d.Lines = []optimize.Line{
		{Part: coupling, Refs: []string{"C1", "C3", "C5", "C7"}, Role: optimize.RoleCoupling},
		{Part: smoothing, Refs: []string{"C2", "C4", "C6", "C8"}, Role: optimize.RoleSmoothing},
		{Part: diode, Refs: names("D", 1, 8), Role: optimize.RoleRectifier},
		{Part: bleeder, Refs: []string{"R1"}, Role: optimize.RoleBleeder, Series: 4},
		{Part: winding, Refs: []string{"T1"}, Role: optimize.RoleSource},
	}
	_ = board
	for i, load := range []float64{0, 60e-6, 120e-6, 180e-6} {
		d.Corners = append(d.Corners, optimize.Corner{Name: fmt.Sprintf("low line, load %d of 3", i), LoadA: load, Line: 0.92, Ambient: 45,
			Steady: ladder.Steady{MeanV: -5700 + 1.9e6*load, RippleV: 2 + 9e4*load}})
	}
	d.Corners[3].Steady.Waves = testWaves()
	d.Targets = []optimize.Target{
		{Name: "output voltage, least", Unit: "V", Wanted: "5.376 kV or more", Got: 5402, Limit: 5376, Met: true, Corner: "low line, full load"},
		{Name: "output voltage, most", Unit: "V", Wanted: "5.824 kV or less", Got: 5819, Limit: 5824, Met: true, Corner: "high line, least load"},
		{Name: "ripple, peak to peak", Unit: "V", Wanted: "25 V or less", Got: 18.23, Limit: 25, Met: true, Corner: "low line, full load"},
		{Name: "discharge to 60 V", Unit: "s", Wanted: "10 s or less", Got: 11.4, Limit: 10, Met: false, Corner: "switch-off at high line"},
	}
	rule := func(name, source string) ratings.Rule {
		return ratings.Rule{Policy: "general", Name: name, Source: source}
	}
	d.Stresses = []ratings.Stress{
		{Ref: "D3", Part: diode.Number, Quantity: "repetitive reverse voltage", Value: 1598, Rating: 2200, Limit: 1540, Unit: quantity.Voltage, Ratio: 1.038, Over: true, Corner: "high line, least load", Rule: rule("diode reverse voltage", "common practice, no source")},
		{Ref: "C3 C5 C7", Part: coupling.Number, Quantity: "peak voltage", Value: 1604, Rating: 3000, Limit: 1680, Unit: quantity.Voltage, Ratio: 0.955, Corner: "high line, least load", Rule: rule("ceramic class 2 voltage", "from memory"), Note: "the sheet gives no ripple rating; 5 K inner rise assumed"},
		{Ref: "C2 C4 C6 C8", Part: smoothing.Number, Quantity: "peak voltage", Value: 1604, Rating: 3000, Limit: 2100, Unit: quantity.Voltage, Ratio: 0.764, Corner: "high line, least load", Rule: rule("ceramic class 1 voltage", "from memory")},
		{Ref: "R1", Part: bleeder.Number, Quantity: "working voltage", Value: 1455, Rating: 2500, Limit: 2000, Unit: quantity.Voltage, Ratio: 0.728, Corner: "high line, least load", Rule: rule("resistor working voltage", "common practice, no source")},
		{Ref: "T1", Part: winding.Number, Quantity: "apparent power", Value: 1.2, Rating: 6, Limit: 6, Unit: quantity.ApparentPower, Ratio: 0.2, Corner: "high line, full load", Note: "the policy has no rule for this rating"},
	}
	d.Notes = []string{"a made-up design"}
	d.Cautions = []ratings.Caution{
		{Code: "output-voltage", Title: "5.8 kV at the output and on the board: lethal", Text: "Keep the unit closed. Switch off, wait 30 s, measure, then short the output before you touch anything.", Source: "common practice, no source"},
		{Code: "stored-energy", Title: "71 mJ stay in the capacitors after switch-off", Text: "The bleeder takes 11.4 s to bring the output below 60 V. Wait, then measure.", Source: "from memory"},
	}
	d.Certificate = optimize.Certificate{Proved: true, Text: []string{"1,204,331 combinations: 1,190,020 ruled out by dominance, 13,900 by the cost bound, 411 simulated.", "No cheaper combination passes."},
		Rejected: "three stages with 22 nF at 9.10 EUR: diode D3 at 118 % of its limit"}
	d.RunnersUp = []optimize.RunnerUp{{Summary: "full-wave, 3 stages, 4.7 nF", UnitCost: exact.RequireFromString("13.07"), Note: "Half the ripple."}}
	return d
}

func testWaves() *ladder.Waves {
	w := &ladder.Waves{}
	for i := range 801 {
		x := float64(i) / 800
		w.Time = append(w.Time, x/32e3)
		w.Output = append(w.Output, -5358+9*math.Sin(2*math.Pi*x)*(1-x/2))
	}
	return w
}

func testOptions() Options {
	coupling, _, _, _, _, _ := testParts()
	coupling.Number = "QLF-HV-103-4K"
	startup := Curve{Note: "low line, full load"}
	var full, none []float64
	for i := range 60 {
		t := float64(i) * 0.004
		startup.X = append(startup.X, t)
		full, none = append(full, -5400*(1-math.Exp(-t/0.03))), append(none, -5700*(1-math.Exp(-t/0.024)))
	}
	startup.Series = []Series{{"full load", full}, {"no load", none}}
	return Options{
		Made: time.Date(2026, 3, 4, 9, 0, 0, 0, time.UTC), Program: "rungwright 0.1",
		Terms:     order.Terms{Currency: "EUR", Rates: map[string]exact.Decimal{"USD": exact.RequireFromString("0.9215")}},
		RatesNote: "given by the user, 3 March 2026", Suppliers: testSuppliers(),
		InHand: map[string]int{"WRM-47M-2K5": 100}, Curves: &Curves{StartUp: startup},
		Spares:     map[catalog.Kind]Spare{catalog.KindDiode: {Share: 0.05, Least: 10}, catalog.KindWinding: {Least: 1}},
		Alternates: []Alternate{{For: "QLF-HV-103-3K", Part: coupling, Effect: "lead spacing 10 mm", Note: "fits the same board"}},
	}
}
