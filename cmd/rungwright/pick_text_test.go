package main

import (
	"fmt"
	"strings"
	"testing"

	"github.com/shopspring/decimal"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize"
	"rungwright/optimize/ladder"
	"rungwright/optimize/order"
	"rungwright/ratings"
)

// paperDesign is a design made up for the screen, as full as they get.
func paperDesign() *optimize.Design {
	capacitor := &catalog.Part{Number: "QLF-HV-103-3K", Maker: "Quillfen", Kind: catalog.KindCapacitor,
		Capacitor: &catalog.Capacitor{Technology: catalog.CeramicClass2, Capacitance: 10e-9, Voltage: 3000}}
	diode := &catalog.Part{Number: "TVD-2K2-F", Maker: "Tarnvale", Kind: catalog.KindDiode,
		Diode: &catalog.Diode{Type: catalog.HighVoltage, ReverseVoltage: 2200, AverageCurrent: 0.03}}
	offer := &catalog.Offer{Supplier: "Fellmarket", OrderCode: "FM-88213", Least: 10, Multiple: 10}
	line := func(role optimize.Role, part *catalog.Part, refs ...string) optimize.Line {
		return optimize.Line{Part: part, Role: role, Refs: refs, Series: 1, Parallel: 1, Purchase: order.Purchase{
			Part: part, Offer: offer, Quantity: 980, UnitPrice: money("0.29"), Cost: money("284.20")}}
	}
	d := &optimize.Design{
		Supply: optimize.Supply{Name: "Harbour air ioniser, emitter rail",
			Output: optimize.Output{Voltage: 5600, Negative: true}, Build: optimize.Build{Units: 120, Currency: "EUR"}},
		Topology: ladder.HalfWave, Stages: 4, Plan: optimize.Plan{Topology: ladder.HalfWave, Stages: 4}, Circuit: ladder.Circuit{Source: ladder.Source{Peak: 700, Frequency: 32e3}},
		Lines: []optimize.Line{line(optimize.RoleCoupling, capacitor, "C1", "C3", "C5", "C7"),
			line(optimize.RoleSmoothing, capacitor, "C2", "C4", "C6", "C8"),
			line(optimize.RoleRectifier, diode, "D1", "D2", "D3", "D4", "D5", "D6", "D7", "D8"),
			line(optimize.RoleBleeder, capacitor, "R1", "R2", "R3"), line(optimize.RoleSurge, diode, "R4")},
		UnitCost: money("7.4318"), BuildCost: money("891.82"), Currency: "EUR", StoredJ: 0.12,
		RunnersUp: []optimize.RunnerUp{{Summary: "half-wave, 4 stages, film capacitors", UnitCost: money("7.90")},
			{Summary: "full-wave, 3 stages", UnitCost: money("8.15")}, {Summary: "half-wave, 5 stages", UnitCost: money("8.33")}},
	}
	d.Targets = []optimize.Target{
		{Name: "output, least", Unit: "V", Wanted: "5.376 kV or more", Got: 5471, Limit: 5376, Met: true, Corner: "full load, low line"},
		{Name: "output, most", Unit: "V", Wanted: "5.824 kV or less", Got: 5830, Limit: 5824, Corner: "least load, high line"},
		{Name: "efficiency", Unit: "1", Wanted: "60 % or more", Got: 0.8, Limit: 0.6, Met: true},
	}
	for _, name := range []string{"ripple", "discharge", "rise", "cost"} {
		d.Targets = append(d.Targets, optimize.Target{Name: name, Unit: "V", Wanted: "25 V or less", Got: 24.5, Limit: 25, Met: true, Corner: "full load, low line"})
	}
	for i := range 12 {
		d.Stresses = append(d.Stresses, ratings.Stress{Ref: fmt.Sprint("C", i+1), Part: capacitor.Number, Quantity: "peak voltage", Value: 1421 - float64(i),
			Limit: 1800, Unit: quantity.Voltage, Ratio: (1421 - float64(i)) / 1800, Corner: "least load, high line", Rule: ratings.Rule{Name: "ceramic class 2 voltage"}})
	}
	for i := range 4 {
		d.Cautions = append(d.Cautions, ratings.Caution{Code: fmt.Sprint("hazard-", i), Title: fmt.Sprint("hazard number ", i),
			Text: strings.Repeat("what to do about it, with the numbers that call for it, ", 3)})
	}
	return d
}

func money(text string) decimal.Decimal { return decimal.RequireFromString(text) }

func paperAnswer() optimize.Answer {
	return optimize.Answer{Design: paperDesign(), Certificate: optimize.Certificate{Proved: true, Combinations: 1_234_567,
		Dominated: 1_200_000, Bounded: 30_000, Estimated: 4_000, Dearer: 536, Simulated: 31, Guard: 0.05}}
}

func printPaper(t *testing.T, p *pretend, o *pickOptions) string {
	t.Helper()
	files := pickFiles{design: "ioniser/design.yaml", workbook: "ioniser/workbook.xlsx"}
	if err := printPicked(&p.streams, o, paperAnswer(), files, true); err != nil {
		t.Fatal(err)
	}
	return p.printed()
}

// mostLines is one screen, as tall as a window usually is.
const mostLines = 45

func TestPickedOnATerminal(t *testing.T) {
	for _, width := range []int{80, 200} {
		got := printPaper(t, pretendTerminal(width), &pickOptions{format: formatText})
		mustFit(t, got, width)
		if n := strings.Count(got, "\n"); n > mostLines {
			t.Errorf("%d lines at %d columns are more than a screen:\n%s", n, width, got)
		}
		if !strings.HasPrefix(got, "CAUTION hazard number 0") {
			t.Errorf("the gravest caution does not come first:\n%s", got)
		}
		for _, want := range []string{"hazard number 3", "with film capacitors", "1 234 567 combinations", "half-wave, 4 stages, -5.6 kV from 700 V peak at 32 kHz: 7.43 EUR a unit",
			"891.82 EUR for 120 units", "QLF-HV-103-3K", "D1–D8", "5.471 kV", "■■■■■·····  58 %", "■■■■■■■■■■ 103 % OVER", "80 %", "■■■■■■■■■·  98 % near",
			"■■■■■■■···  79 %", "Proved cheapest.", "8.33", "ioniser/workbook.xlsx"} {
			if !strings.Contains(got, want) {
				t.Errorf("at %d columns %q is missing:\n%s", width, want, got)
			}
		}
	}
}

func TestPickedInAPipe(t *testing.T) {
	got := printPaper(t, pretendPipe(), &pickOptions{format: formatText})
	for _, want := range []string{
		"hazard-3\thazard number 3\t", "Harbour air ioniser, emitter rail\thalf-wave\t4\t7.4318\t891.82\tEUR\t120\ttrue\t0.12\n",
		"rectifier\tD1 D2 D3 D4 D5 D6 D7 D8\tTVD-2K2-F\t", "\t8\t980\tFellmarket\tFM-88213\t0.29\t284.2\n",
		"ripple\t25 V or less\t24.5\tV\t0.98", "C12\tQLF-HV-103-3K\tpeak voltage\t1410\t1800\tV\t0.783",
	} {
		if !strings.Contains(got, want) {
			t.Errorf("%q is missing:\n%s", want, got)
		}
	}
}

func TestUsedShareOfATarget(t *testing.T) {
	for _, c := range []struct {
		name       string
		got, limit float64
		met        bool
		want       float64
	}{
		{"upper limit kept", 20, 25, true, 0.8},
		{"upper limit broken", 30, 25, false, 1.2},
		{"lower limit kept", 50, 40, true, 0.8},
		{"lower limit broken", 40, 50, false, 1.25},
		{"at the limit", 5, 5, true, 1},
	} {
		if got := used(&optimize.Design{}, optimize.Target{Got: c.got, Limit: c.limit, Met: c.met}); got != c.want {
			t.Errorf("%s: %g, want %g", c.name, got, c.want)
		}
	}
}

func TestSpan(t *testing.T) {
	for in, want := range map[string]string{
		"C1": "C1", "C1 C2": "C1 C2", "C1 C2 C3": "C1–C3", "C1 C3 C5": "C1 C3 C5",
		"C1 C3 C5 C7 C9": "C1 C3 … C9", "C1 D2 C3": "C1 D2 C3", "R9 R10 R11": "R9–R11",
	} {
		if got := span(strings.Fields(in)); got != want {
			t.Errorf("span(%q) = %q, want %q", in, got, want)
		}
	}
}

func TestWhyNot(t *testing.T) {
	p := pretendTerminal(80)
	answer := optimize.Answer{Why: &optimize.WhyNot{Text: []string{strings.Repeat("the ripple of 1 mV is out of reach ", 4), "second", "  of it"}}}
	if err := printWhyNot(&pretendPipe().streams, &pickOptions{}, optimize.Supply{}, answer, true); exitStatus(err, true) != exitUnexpected {
		t.Errorf("a stopped search gives %v", err)
	}
	err := printWhyNot(&p.streams, &pickOptions{format: formatText}, optimize.Supply{Name: "Rail"}, answer, false)
	if exitStatus(err, true) != exitNo {
		t.Errorf("status %d, want %d", exitStatus(err, true), exitNo)
	}
	got := p.printed()
	mustFit(t, got, 80)
	if !strings.Contains(got, "No design was found for Rail.\n- the ripple of 1 mV") || !strings.Contains(got, "\n- second\n    of it\n") {
		t.Errorf("printed\n%s", got)
	}
}
