package optimize

import (
	"errors"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"rungwright/catalog/form"
	"rungwright/optimize/ladder"
)

const plainCircuit = `circuit:
  topology: half-wave
  stages: 1
  source: {peak: 240 V, frequency: 25 kHz}
  capacitors: [22 nF, 10 nF]
  diode: {saturation_current: 10 nA, ideality: 1.9}
  load: {current: 1.2 mA}
`

func TestReadCircuit(t *testing.T) {
	diode := ladder.Diode{IS: 10e-9, N: 1.9}
	want := ladder.Circuit{
		Topology: ladder.HalfWave, Stages: 1,
		Source:     ladder.Source{Waveform: ladder.Sine, Peak: 240, Frequency: 25e3},
		Capacitors: []ladder.Capacitor{{C: 22e-9}, {C: 10e-9}},
		Diodes:     []ladder.Diode{diode, diode},
		Load:       ladder.Load{Current: 1.2e-3},
	}
	got, err := ReadCircuit("c.yaml", []byte(plainCircuit))
	if err != nil {
		t.Fatal(err)
	}
	if diff := cmp.Diff(want, got); diff != "" {
		t.Error(diff)
	}
}

func TestReadCircuitWithEverything(t *testing.T) {
	got, err := ReadCircuit("c.yaml", []byte(`circuit:
  topology: bridge-doubler
  stages: 1
  polarity: negative
  source: {rms: 10 V, frequency: 50 Hz, resistance: 1.5 ohm, leakage: 2 mH, waveform: square, edge: 4 %}
  capacitors:
    - {capacitance: 1 mF, series_resistance: 80 mohm, insulation_resistance: 200 kohm, bias: [[0 V, 100 %], [10 V, 90 %]]}
    - 2 mF
  diodes:
    - {saturation_current: 4 nA, ideality: 1.8, series_resistance: 20 mohm, junction_capacitance: 15 pF,
       built_in_voltage: 600 mV, grading: 0.4, transit_time: 5 us, leakage_resistance: 10 Mohm}
    - {saturation_current: 5 nA, ideality: 1.7}
  stray: 3 pF
  filter: {resistance: 10 ohm, capacitance: 100 uF}
  load: {current: 10 mA, resistance: 1 kohm, power: 100 mW, table: [[0 V, 0 A], [5 V, 1 mA]]}
`))
	if err != nil {
		t.Fatal(err)
	}
	want := ladder.Circuit{
		Topology: ladder.BridgeDoubler, Stages: 1, Negative: true, Stray: 3e-12,
		Source: ladder.Source{Waveform: ladder.Square, Peak: 10, Frequency: 50, Resistance: 1.5, Leakage: 2e-3, Edge: 0.04},
		Capacitors: []ladder.Capacitor{
			{C: 1e-3, ESR: 0.08, Conductance: 1 / 200e3, Bias: []ladder.BiasPoint{{V: 0, Share: 1}, {V: 10, Share: 0.9}}},
			{C: 2e-3}},
		Diodes: []ladder.Diode{
			{IS: 4e-9, N: 1.8, RS: 0.02, CJ0: 15e-12, VJ: 0.6, M: 0.4, Transit: 5e-6, Leakage: 1 / 10e6},
			{IS: 5e-9, N: 1.7}},
		Filter: ladder.Filter{R: 10, C: 100e-6},
		Load:   ladder.Load{Current: 10e-3, Resistance: 1e3, Power: 0.1, Table: []ladder.LoadPoint{{}, {V: 5, A: 1e-3}}},
	}
	if diff := cmp.Diff(want, got); diff != "" {
		t.Error(diff)
	}
}

// TestPeakFromRMS: the ratios of peak to RMS value follow from the shapes'
// integrals: √2 for a sine, 1 for a square, √3 for a triangle.
func TestPeakFromRMS(t *testing.T) {
	for shape, ratio := range map[string]float64{"sine": math.Sqrt2, "square": 1, "triangle": math.Sqrt(3)} {
		text := strings.Replace(plainCircuit, "peak: 240 V", "rms: 100 V, waveform: "+shape, 1)
		c, err := ReadCircuit("c.yaml", []byte(text))
		if err != nil || math.Abs(c.Source.Peak-100*ratio) > 1e-9 {
			t.Errorf("%s of 100 V rms: peak %g, %v; want %g", shape, c.Source.Peak, err, 100*ratio)
		}
	}
}

// TestCircuitMistakes changes one thing in a good file each time and demands
// exactly one problem, at its place and with its words.
func TestCircuitMistakes(t *testing.T) {
	for _, c := range []struct{ name, from, to, at, words string }{
		{"no circuit", "circuit:", "circuits:", "c.yaml:1:1", "circuit"},
		{"topology unknown", "half-wave", "ladder", "c.yaml:2:13", "is not one of half-wave"},
		{"negative stages", "stages: 1", "stages: -1", "c.yaml:3:11", "-1"},
		{"too many stages", "stages: 1", "stages: 21", "c.yaml:3:11", "20"},
		{"peak negative", "240 V", "-240 V", "c.yaml:4:18", "-240 V"},
		{"peak missing", "peak: 240 V, ", "", "c.yaml:4:11", "peak"},
		{"peak twice", "peak: 240 V", "peak: 240 V, rms: 170 V", "c.yaml:4:30", "keep one of the two"},
		{"wrong unit", "25 kHz", "25 kohm", "c.yaml:4:36", "hertz"},
		{"too many capacitors", "22 nF, 10 nF", "22 nF, 10 nF, 1 nF", "c.yaml:5:15", "has 2 positions"},
		{"capacitor zero", "10 nF", "0 F", "c.yaml:5:23", "0 F"},
		{"capacitor a list", "10 nF", "[10 nF]", "c.yaml:5:23", "list"},
		{"ideality with a unit", "1.9", "1.9 V", "c.yaml:6:48", "plain number"},
		{"ideality zero", "1.9", "0", "c.yaml:6:48", "above zero"},
		{"saturation current missing", "saturation_current: 10 nA, ", "", "c.yaml:6:10", "saturation_current"},
		{"load empty", "{current: 1.2 mA}", "{}", "c.yaml:7:9", "current: 0 A for no load"},
		{"load negative", "1.2 mA", "-1.2 mA", "c.yaml:7:19", "-1.2 mA"},
		{"misspelt key", "load:", "laod:", "c.yaml:7:3", "did you mean"},
		{"filter in part", "  load:", "  filter: {resistance: 1 ohm}\n  load:", "c.yaml:7:11", "capacitance"},
		{"bias falls back", "10 nF]", "{capacitance: 1 nF, bias: [[5 V, 50 %], [2 V, 40 %]]}]", "", "bias voltages must rise"},
		{"pair of three", "{current: 1.2 mA}", "{table: [[1 V, 2 A, 3 A]]}", "c.yaml:7:18", "not a pair"},
	} {
		t.Run(c.name, func(t *testing.T) { mustComplain(t, strings.Replace(plainCircuit, c.from, c.to, 1), c.at, c.words) })
	}
}

func mustComplain(t *testing.T, text, at, words string) {
	_, err := ReadCircuit("c.yaml", []byte(text))
	problems, ok := errors.AsType[form.Problems](err)
	if !ok {
		t.Fatalf("error is %v, want problems", err)
	}
	for _, p := range problems {
		if strings.HasPrefix(p.String(), at) && strings.Contains(p.Text, words) {
			if len(problems) > 2 { // a misspelt key is unknown, and the right one missing
				t.Errorf("one mistake gave %d problems:\n%v", len(problems), err)
			}
			return
		}
	}
	t.Errorf("no problem at %s with %q in\n%v", at, words, err)
}

// FuzzReadCircuit: any bytes give a circuit that passes its check or at least
// one problem, never a panic.
func FuzzReadCircuit(f *testing.F) {
	f.Add([]byte(plainCircuit))
	examples, err := filepath.Glob("../testdata/circuits/*.yaml")
	if err != nil || len(examples) == 0 {
		f.Fatal("no example circuits", err)
	}
	for _, path := range examples {
		data, err := os.ReadFile(path)
		if err != nil {
			f.Fatal(err)
		}
		f.Add(data)
	}
	f.Fuzz(func(t *testing.T, data []byte) {
		c, err := ReadCircuit("c.yaml", data)
		if err != nil {
			if problems, ok := errors.AsType[form.Problems](err); !ok || len(problems) == 0 {
				t.Errorf("error without problems: %v", err)
			}
			return
		}
		if bad := c.Check(); len(bad) > 0 {
			t.Errorf("accepted a circuit that does not pass: %v", bad)
		}
	})
}
