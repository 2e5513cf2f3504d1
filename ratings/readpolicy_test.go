package ratings

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"rungwright/catalog"
	"rungwright/catalog/form"
)

const wholePolicy = `policy: house
title: House rules
source: house rules, revision 3
capacitors:
  - technology: [film, mica]
    characteristic: polypropylene
    source: page 4
    remark: measure it
    voltage: [[70 °C, 50 %], [110 °C, 30 %]]
    ac_voltage: 60 %
    ripple_current: 70 %
    slew: 40 %
    temperature: {most: 100 °C, below: 10 K, share: 90 %}
    life: 5000 h
diodes:
  - type: [standard, high-voltage]
    reverse_voltage: 70 %
    reverse_voltage_avalanche: 80 %
    average_current: 60 %
    repetitive_peak: 90 %
    peak_times_average: 10
    surge_current: 70 %
    power: 50 %
    junction: {below: 25 K}
    recovery: {of_period: 5 %, of_conduction: 10 %}
resistors:
  - technology: metal film
    power: {share: 60 %, to: 70 °C, zero: 125 °C}
    working_voltage: 80 %
    pulse_energy: 50 %
windings:
  - apparent_power: 85 %
    insulation: 50 %
    hot_spot: {below: 20 K}
`

// Every key lands in its own field.
func TestReadWholePolicy(t *testing.T) {
	got, err := ReadPolicyBytes("house.yaml", []byte(wholePolicy))
	if err != nil {
		t.Fatal(err)
	}
	sum := sha256.Sum256([]byte(wholePolicy))
	own := Family{Source: "house rules, revision 3"}
	want := &Policy{
		Name: "house", Title: "House rules", Source: "house rules, revision 3", SHA256: hex.EncodeToString(sum[:]),
		Capacitors: []CapacitorRules{{
			Family:          Family{Source: "page 4", Remark: "measure it"},
			Technologies:    []catalog.Technology{catalog.Film, catalog.Mica},
			Characteristics: []string{"polypropylene"},
			Voltage:         Shares{{70, 0.5}, {110, 0.3}}, ACVoltage: 0.6, Ripple: 0.7, Slew: 0.4,
			Temperature: TemperatureRule{Most: 100, Below: 10, Share: 0.9}, Life: 5000 * 3600,
		}},
		Diodes: []DiodeRules{{
			Family: own, Types: []catalog.DiodeType{catalog.Standard, catalog.HighVoltage},
			Reverse: 0.7, ReverseAvalanche: 0.8, Average: 0.6, RepetitivePeak: 0.9, PeakTimesAverage: 10,
			Surge: 0.7, Power: 0.5, Junction: TemperatureRule{Below: 25}, RecoveryPeriod: 0.05, RecoveryConduct: 0.1,
		}},
		Resistors: []ResistorRules{{Family: own, Technologies: []string{"metal film"},
			Power: PowerLine{0.6, 70, 125}, WorkingVoltage: 0.8, PulseEnergy: 0.5}},
		Windings: []WindingRules{{Family: own, ApparentPower: 0.85, Insulation: 0.5, HotSpot: TemperatureRule{Below: 20}}},
	}
	if diff := cmp.Diff(want, got); diff != "" {
		t.Error(diff)
	}
}

// The remark of a family goes with what it judges.
func TestRemarkIsNoted(t *testing.T) {
	p, err := ReadPolicyBytes("house.yaml", []byte(wholePolicy))
	if err != nil {
		t.Fatal(err)
	}
	part := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) {
		c.Technology, c.Characteristic = catalog.Film, "Polypropylene"
	})
	if s := find(t, p, part, Use{Ambient: 25, PeakV: 1}, "peak voltage"); s.Note != "measure it" || s.Rule.Source != "page 4" {
		t.Errorf("got %+v", s)
	}
}

// The three ways to limit one temperature: the lowest counts. Of a 110 °C
// part: 100 °C, 110 − 10 = 100 °C, 0.9·110 = 99 °C.
func TestLowestOfThreeTemperatures(t *testing.T) {
	r := TemperatureRule{Most: 100, Below: 10, Share: 0.9}
	for most, want := range map[float64]float64{110: 99, 90: 80, 150: 100} {
		if got, ok := r.limit(celsius(most)); !ok || !near(got, want) {
			t.Errorf("highest %v °C: got %v, want %v", most, got, want)
		}
	}
}

func TestPolicyMistakes(t *testing.T) {
	const head = "policy: p\ntitle: t\nsource: s\n"
	for name, c := range map[string]struct{ text, want string }{
		"empty":              {"", "the file is empty"},
		"no head":            {"resistors: [{power: 50 %}]", `the key "policy" is missing`},
		"no rule":            {head, "there is no rule"},
		"unknown key":        {head + "resistors: [{power: 50 %, voltige: 3}]", `unknown key "voltige"`},
		"unknown technology": {head + "capacitors: [{technology: filn, voltage: 50 %}]", `did you mean "film"?`},
		"a far word":         {head + "capacitors: [{technology: wood, voltage: 50 %}]", "mica, tantalum, glass\n"},
		"technology twice":   {head + "capacitors: [{technology: [film, film], voltage: 50 %}]", `"film" is written twice`},
		"unknown type":       {head + "diodes: [{type: slow, reverse_voltage: 50 %}]", `"slow" is not one of standard, fast, ultrafast, schottky, high-voltage`},
		"capacitor without":  {head + "capacitors: [{technology: film}]", `the key "voltage" is missing`},
		"diode without":      {head + "diodes: [{type: fast}]", `the key "reverse_voltage" is missing`},
		"resistor without":   {head + "resistors: [{working_voltage: 50 %}]", `the key "power" is missing`},
		"over the maker":     {head + "resistors: [{power: 101 %}]", "above the maker's rating"},
		"point over maker":   {head + "capacitors: [{voltage: [[70 °C, 101 %]]}]", "above the maker's rating"},
		"zero share":         {head + "resistors: [{power: 0 %}]", "zero"},
		"bare share":         {head + "resistors: [{power: 0.5}]", "has no unit"},
		"points fall":        {head + "capacitors: [{voltage: [[70 °C, 50 %], [70 °C, 40 %]]}]", "does not come after"},
		"point of one":       {head + "capacitors: [{voltage: [[70 °C]]}]", "a point must be a pair"},
		"no point":           {head + "capacitors: [{voltage: []}]", "write a share"},
		"empty temperature":  {head + "capacitors: [{voltage: 50 %, temperature: {}}]", "nothing is limited"},
		"line without to":    {head + "resistors: [{power: {share: 50 %}}]", `resistors.power.to" is missing`},
		"line upside down":   {head + "resistors: [{power: {share: 50 %, to: 85 °C, zero: 85 °C}}]", "is not above"},
		"two windings":       {head + "windings: [{apparent_power: 50 %}, {apparent_power: 60 %}]", "join the two"},
		"recovery typo":      {head + "diodes: [{reverse_voltage: 50 %, recovery: {of_peroid: 5 %}}]", `unknown key "of_peroid"`},
		"empty word":         {head + "resistors: [{technology: ['', wirewound], power: 50 %}]", "a word is missing"},
	} {
		p, err := ReadPolicyBytes("p.yaml", []byte(c.text))
		if _, ok := errors.AsType[form.Problems](err); !ok || p != nil || !strings.Contains(err.Error()+"\n", c.want) || !strings.HasPrefix(err.Error(), "p.yaml:") {
			t.Errorf("%s: got %v, want …%s…", name, err, c.want)
		}
	}
}

// The bounds themselves are allowed.
func TestPolicyBounds(t *testing.T) {
	for times, ok := range map[string]bool{"0": false, "1": true, "100": true, "101": false} {
		text := "policy: p\ntitle: t\nsource: s\ndiodes: [{reverse_voltage: 100 %, peak_times_average: " + times + "}]"
		if _, err := ReadPolicyBytes("p.yaml", []byte(text)); (err == nil) != ok {
			t.Errorf("peak_times_average %s: %v", times, err)
		}
	}
	text := "policy: p\ntitle: t\nsource: s\ncapacitors: [{voltage: [[70 °C, 100 %], [80 °C, 50 %]]}]"
	if _, err := ReadPolicyBytes("p.yaml", []byte(text)); err != nil {
		t.Errorf("a share of 100 %%: %v", err)
	}
}

func TestAllMistakesAtOnce(t *testing.T) {
	_, err := ReadPolicyBytes("p.yaml", []byte("policy: p\nsource: s\nresistors:\n  - power: 150 %\n    volts: 1\n"))
	problems, _ := errors.AsType[form.Problems](err)
	if len(problems) != 3 {
		t.Errorf("got %d problems, want 3:\n%v", len(problems), err)
	}
}

func TestReadPolicyByNameOrFile(t *testing.T) {
	dir := t.TempDir()
	file := filepath.Join(dir, "house.yaml")
	if err := os.WriteFile(file, []byte(wholePolicy), 0o600); err != nil {
		t.Fatal(err)
	}
	if p, err := ReadPolicy(file); err != nil || p.Name != "house" {
		t.Errorf("got %v, %v", p, err)
	}
	big := filepath.Join(dir, "big.yaml")
	if err := os.WriteFile(big, make([]byte, 1<<20+1), 0o600); err != nil {
		t.Fatal(err)
	}
	for name, want := range map[string]string{
		"generl":                      `did you mean "general"?`,
		"xyz":                         "shipped are ecss-q-st-30-11c, general, military-1, military-2, military-3, nasa-eee-inst-002",
		"":                            "no such policy or file",
		"../policy/general":           "no such policy or file",
		dir:                           "not a plain file",
		big:                           "may have 1048576",
		filepath.Join(dir, "no.yaml"): "no such policy or file",
	} {
		_, err := ReadPolicy(name)
		if _, ok := errors.AsType[form.Problems](err); !ok || !strings.Contains(err.Error(), want) {
			t.Errorf("%q: got %v, want …%s…", name, err, want)
		}
	}
}

func TestDefaultPolicyIsShipped(t *testing.T) { shippedPolicy(t, DefaultPolicy) }

// Any bytes: a policy that judges without a panic, or at least one problem
// with its file.
func FuzzReadPolicy(f *testing.F) {
	f.Add([]byte(wholePolicy))
	for _, name := range PolicyNames() {
		data, err := shipped.ReadFile("policy/" + name + ".yaml")
		if err != nil {
			f.Fatal(err)
		}
		f.Add(data)
	}
	f.Add([]byte("policy: p\ntitle: t\nsource: s\ncapacitors: [{voltage: [[70 °C, 50 %], [70 °C, 50 %]]}]"))
	f.Fuzz(func(t *testing.T, data []byte) {
		p, err := ReadPolicyBytes("p.yaml", data)
		if err != nil {
			problems, ok := errors.AsType[form.Problems](err)
			if !ok || len(problems) == 0 || p != nil {
				t.Fatalf("got %v, %T %v", p, err, err)
			}
			return
		}
		for _, part := range []*catalog.Part{capacitor(nil), electrolytic(nil), diode(nil), resistor(nil), winding(nil)} {
			u := Use{Ambient: 60, Frequency: 1e3, PeakV: 10, InverseV: 10, AverageA: 0.01, PowerW: 0.1, ApparentVA: 1, RippleA: 0.01}
			for _, s := range Judge(p, part, []Use{u}) {
				if s.Ratio != s.Ratio || s.Over && s.Ratio <= 1 {
					t.Fatalf("got %+v", s)
				}
			}
		}
	})
}
