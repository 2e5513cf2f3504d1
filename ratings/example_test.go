package ratings_test

import (
	"fmt"

	"rungwright/catalog"
	"rungwright/ratings"
)

func ExampleJudge() {
	policy, err := ratings.ReadPolicy("general")
	if err != nil {
		fmt.Println(err)
		return
	}
	part := &catalog.Part{
		Number: "EX-1", Kind: catalog.KindCapacitor, Temperature: catalog.Range{Least: -55, Most: 125},
		Capacitor: &catalog.Capacitor{Technology: catalog.CeramicClass2, Capacitance: 10e-9, Voltage: 2000},
	}
	uses := []ratings.Use{
		{Ref: "C3", Corner: "low line, full load", Ambient: 45, PeakV: 1080},
		{Ref: "C3", Corner: "high line, least load", Ambient: 45, PeakV: 1310},
	}
	for _, s := range ratings.Judge(policy, part, uses) {
		fmt.Printf("%s of %s at %s: %.3g of the limit, over %v (%s)\n", s.Quantity, s.Ref, s.Corner, s.Ratio, s.Over, s.Rule.Name)
	}
	// Output:
	// peak voltage of C3 at high line, least load: 1.09 of the limit, over true (ceramic class 2 voltage)
	// body temperature of C3 at low line, full load: 0.222 of the limit, over false (ceramic class 2 temperature)
	// lowest ambient of C3 at low line, full load: 0 of the limit, over false (maker's rating)
}

func ExampleCautions() {
	for _, c := range ratings.Cautions(ratings.Hazard{OutputV: 400, SourcePeakV: 210, StoredJ: 0.2, OutputC: 2.2e-6, Isolated: true}) {
		fmt.Printf("%s: %s\n", c.Code, c.Title)
	}
	// Output:
	// live-output: 400 V: do not touch
	// no-bleeder: no bleeder: it stays charged for hours
	// stored-charge: 880 µC are stored, above the 45 µC that may be touched
	// charged-capacitor: the output capacitance is of energy class ES3: it can injure
	// work-inside: before any work inside: discharge, and short
	// output-short: a short or flash-over lets 200 mJ go
	// spacing: 0.2 mm through air, 4 mm over surfaces
	// not-certified: figures are calculated, not certified
}
