package ratings

import (
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/google/go-cmp/cmp/cmpopts"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// The figures below were put down a second time from the documents' tables,
// which are from memory; the policy files must carry the same.

// flat is a share that holds at any temperature.
func flat(s quantity.Ratio) Shares { return Shares{{Share: s}} }

var ceramics = []catalog.Technology{catalog.CeramicClass1, catalog.CeramicClass2}

var films = []string{"metal film", "thick film", "thin film", "carbon film"}

func military(voltage, average quantity.Ratio, junction quantity.Celsius, aluminium CapacitorRules) Policy {
	aluminium.Technologies = []catalog.Technology{catalog.AluminiumElectrolytic}
	return Policy{
		Capacitors: []CapacitorRules{
			{Technologies: ceramics, Voltage: flat(voltage), Temperature: TemperatureRule{Below: 10}},
			{Technologies: []catalog.Technology{catalog.Film}, Voltage: flat(voltage)},
			aluminium,
			{Technologies: []catalog.Technology{catalog.Tantalum}, Voltage: flat(voltage)},
		},
		Diodes:    []DiodeRules{{Reverse: 0.70, Average: average, Junction: TemperatureRule{Most: junction}}},
		Resistors: []ResistorRules{{Technologies: films, Power: PowerLine{Share: 0.50}}},
	}
}

var published = map[string]Policy{
	// NASA EEE-INST-002 (2003, addendum 2008), derating tables: from memory.
	"nasa-eee-inst-002": {
		Capacitors: []CapacitorRules{
			{Technologies: ceramics, Voltage: flat(0.60), Temperature: TemperatureRule{Most: 110}},
			{Technologies: []catalog.Technology{catalog.Mica}, Voltage: flat(0.60), Temperature: TemperatureRule{Most: 110}},
			{Technologies: []catalog.Technology{catalog.Film}, Voltage: flat(0.60), Temperature: TemperatureRule{Most: 85}},
			{Technologies: []catalog.Technology{"glass"}, Voltage: flat(0.50), Temperature: TemperatureRule{Most: 110}},
			{Technologies: []catalog.Technology{catalog.Tantalum}, Voltage: Shares{{70, 0.50}, {110, 0.30}}, Temperature: TemperatureRule{Most: 110}},
		},
		Diodes: []DiodeRules{{Reverse: 0.70, Average: 0.50, Surge: 0.50, Junction: TemperatureRule{Most: 125, Share: 0.80}}},
		Resistors: []ResistorRules{{Technologies: films,
			Power: PowerLine{Share: 0.60, To: 70}, WorkingVoltage: 0.80}},
	},
	// ECSS-Q-ST-30-11C Rev.1 (2011): from memory. Half the ripple power is
	// √0.5 = 0.7071 in current, shipped as 0.707.
	"ecss-q-st-30-11c": {
		Capacitors: []CapacitorRules{
			{Technologies: ceramics, Voltage: flat(0.60), Temperature: TemperatureRule{Most: 110, Below: 10}},
			{Technologies: []catalog.Technology{catalog.Film}, Voltage: flat(0.60), Temperature: TemperatureRule{Most: 110, Below: 10}},
			{Technologies: []catalog.Technology{catalog.Tantalum}, Voltage: flat(0.60), Ripple: 0.707},
			{Technologies: []catalog.Technology{catalog.AluminiumElectrolytic}, Characteristics: []string{"solid", "polymer"}, Voltage: flat(0.60)},
		},
		Diodes: []DiodeRules{{Reverse: 0.75, Average: 0.75, Power: 0.50, Junction: TemperatureRule{Most: 110, Below: 40}}},
		Resistors: []ResistorRules{{Technologies: []string{"metal film"},
			Power: PowerLine{Share: 0.50, To: 85, Zero: 125}, WorkingVoltage: 0.80}},
		Windings: []WindingRules{{Insulation: 0.50, HotSpot: TemperatureRule{Below: 20}}},
	},
	// AFSCP 800-27 and MIL-HDBK-338B appendix, levels I, II, III: from memory.
	"military-1": military(0.50, 0.50, 95, CapacitorRules{Family: Family{Forbidden: true}}),
	"military-2": military(0.60, 0.65, 105, CapacitorRules{Family: Family{Forbidden: true}}),
	"military-3": military(0.60, 0.75, 125, CapacitorRules{Voltage: flat(0.80), Temperature: TemperatureRule{Below: 20}}),
	// Common practice, no source.
	"general": {
		Capacitors: []CapacitorRules{
			{Technologies: []catalog.Technology{catalog.CeramicClass1, catalog.Film, catalog.Mica},
				Voltage: flat(0.70), Ripple: 0.80, Temperature: TemperatureRule{Below: 10}},
			{Technologies: []catalog.Technology{catalog.CeramicClass2}, Voltage: flat(0.60), Ripple: 0.80, Temperature: TemperatureRule{Below: 10}},
			{Technologies: []catalog.Technology{catalog.AluminiumElectrolytic}, Voltage: flat(0.80), Ripple: 0.80,
				Temperature: TemperatureRule{Below: 10}, Life: 5000 * 3600},
			{Technologies: []catalog.Technology{catalog.Tantalum}, Voltage: flat(0.50), Ripple: 0.80, Temperature: TemperatureRule{Below: 10}},
		},
		Diodes: []DiodeRules{{Reverse: 0.70, ReverseAvalanche: 0.80, Average: 0.60, RepetitivePeak: 1, PeakTimesAverage: 10,
			Surge: 0.70, Junction: TemperatureRule{Below: 25}, RecoveryPeriod: 1.0 / 20}},
		Resistors: []ResistorRules{{Power: PowerLine{Share: 0.60, To: 70}, WorkingVoltage: 0.80}},
		Windings:  []WindingRules{{ApparentPower: 0.85}},
	},
}

func TestShippedPoliciesCarryTheirDocumentsFigures(t *testing.T) {
	if got, want := len(PolicyNames()), len(published); got != want {
		t.Fatalf("%d policies are shipped, %d are checked here", got, want)
	}
	for name, want := range published {
		got := *shippedPolicy(t, name)
		ignore := cmp.Options{
			cmpopts.IgnoreFields(Policy{}, "Name", "Title", "Source", "SHA256"),
			cmpopts.IgnoreFields(Family{}, "Source", "Remark"),
		}
		if diff := cmp.Diff(want, got, ignore); diff != "" {
			t.Errorf("%s (- document, + file):\n%s", name, diff)
		}
	}
}

func TestEveryShippedRuleNamesItsSource(t *testing.T) {
	document := map[string][]string{
		"general":           {"common practice, no source"},
		"nasa-eee-inst-002": {"NASA EEE-INST-002 (2003, addendum 2008)", "derating table", "from memory"},
		"ecss-q-st-30-11c":  {"ECSS-Q-ST-30-11C Rev.1 (2011)", "from memory"},
		"military-1":        {"AFSCP 800-27 and MIL-HDBK-338B appendix", "derating table", "level I;", "from memory"},
		"military-2":        {"AFSCP 800-27 and MIL-HDBK-338B appendix", "derating table", "level II;", "from memory"},
		"military-3":        {"AFSCP 800-27 and MIL-HDBK-338B appendix", "derating table", "level III;", "from memory"},
	}
	for _, name := range PolicyNames() {
		p := shippedPolicy(t, name)
		if p.Name != name {
			t.Errorf("%s calls itself %q", name, p.Name)
		}
		for _, f := range families(p) {
			for _, part := range document[name] {
				if !strings.Contains(f.Source, part) {
					t.Errorf("%s: source %q does not say %q", name, f.Source, part)
				}
			}
		}
	}
}

func families(p *Policy) []Family {
	var all []Family
	for _, r := range p.Capacitors {
		all = append(all, r.Family)
	}
	for _, r := range p.Diodes {
		all = append(all, r.Family)
	}
	for _, r := range p.Resistors {
		all = append(all, r.Family)
	}
	for _, r := range p.Windings {
		all = append(all, r.Family)
	}
	return all
}

// A tantalum part of 100 V by NASA's line: at 90 °C halfway from 50 % at
// 70 °C to 30 % at 110 °C, so 40 V; flat outside.
func TestVoltageLineBetweenBreakpoints(t *testing.T) {
	p := shippedPolicy(t, "nasa-eee-inst-002")
	part := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.Technology, c.Voltage = catalog.Tantalum, 100 })
	for ambient, want := range map[quantity.Celsius]float64{-40: 50, 70: 50, 80: 45, 90: 40, 110: 30, 125: 30} {
		if got := VoltageLimit(p, part, ambient); !near(got, want) {
			t.Errorf("at %v: got %v V, want %v V", ambient, got, want)
		}
	}
}
