package optimize

import (
	"math"

	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
)

// ReadCircuit reads a circuit by values, without parts, from YAML:
//
//	circuit:
//	  topology: half-wave
//	  stages: 3
//	  polarity: negative                 # positive when absent
//	  source: {peak: 240 V, frequency: 25 kHz, resistance: 12 ohm, waveform: sine}
//	  capacitors: [22 nF, 22 nF, 10 nF, 10 nF, 4.7 nF, 4.7 nF]   # or one for all
//	  diode: {saturation_current: 10 nA, ideality: 1.9, series_resistance: 0.12 ohm, junction_capacitance: 12 pF}
//	  load: {current: 1.2 mA}            # or {resistance: 1 Mohm}
//
// The file names places in messages. Every mistake comes back at once as
// form.Problems; a circuit without any passes ladder.Circuit.Check.
func ReadCircuit(file string, data []byte) (ladder.Circuit, error) {
	var r form.Report
	top := form.ParseWithin(file, data, circuitLimits, &r)
	top.Require("circuit")
	m := top.Map("circuit")
	c := readCircuit(m)
	m.Done()
	top.Done()
	if err := r.Err(); err != nil {
		return ladder.Circuit{}, err
	}
	for _, bad := range c.Check() {
		r.Add(m.Place, "circuit: %v", bad)
	}
	return c, r.Err()
}

// circuitLimits are ample for the largest circuit and a table waveform.
var circuitLimits = form.Limits{Bytes: 1 << 20, Nodes: 50_000, Depth: 10}

func readCircuit(m *form.Map) ladder.Circuit {
	m.Require("topology", "stages", "source", "capacitors", "load")
	c := ladder.Circuit{
		Topology: ladder.Topology(m.Choice("topology", topologyWords()...)),
		Negative: m.Choice("polarity", "positive", "negative") == "negative",
		Stray:    float64(form.Get[quantity.Farads](m, "stray", form.NotNegative)),
		Source:   readCircuitSource(m.Map("source")),
		Load:     readCircuitLoad(m.Map("load")),
	}
	most := ladder.MaxStages
	if c.Topology.Known() {
		most = c.Topology.MaxStages()
	}
	c.Stages = m.Int("stages", 1, most, 0)
	if f := m.Map("filter"); f != nil {
		f.Require("resistance", "capacitance")
		c.Filter.R = float64(form.Get[quantity.Ohms](f, "resistance", form.Positive))
		c.Filter.C = float64(form.Get[quantity.Farads](f, "capacitance", form.Positive))
		f.Done()
	}
	capacitors, diodes := readCapacitors(m), readDiodes(m)
	if c.Topology.Known() && c.Stages >= 1 && c.Stages <= most {
		c.Capacitors = fill(m, "capacitors", capacitors, c.Topology.CapacitorCount(c.Stages))
		c.Diodes = fill(m, diodeKey(m), diodes, c.Topology.DiodeCount(c.Stages))
	}
	return c
}

// fill gives one value to all positions, or checks that each has its own.
func fill[T any](m *form.Map, key string, given []T, want int) []T {
	switch {
	case len(given) == 1 && want > 1:
		all := make([]T, want)
		for i := range all {
			all[i] = given[0]
		}
		return all
	case len(given) > 0 && len(given) != want:
		m.Problem(key, "there are %d of them, but this topology and number of stages has %d positions; give %d, or one for all",
			len(given), want, want)
	}
	return given
}

func topologyWords() []string {
	var words []string
	for _, t := range ladder.Topologies() {
		words = append(words, string(t))
	}
	return words
}

func readCircuitSource(m *form.Map) ladder.Source {
	if m == nil {
		return ladder.Source{}
	}
	m.Require("frequency")
	s := ladder.Source{
		Waveform:   ladder.Waveform(m.Choice("waveform", string(ladder.Sine), string(ladder.Square), string(ladder.Triangle), string(ladder.Table))),
		Frequency:  float64(form.Get[quantity.Hertz](m, "frequency", form.Positive)),
		Resistance: float64(form.Get[quantity.Ohms](m, "resistance", form.NotNegative)),
		Leakage:    float64(form.Get[quantity.Henries](m, "leakage", form.NotNegative)),
		Edge:       float64(form.Get[quantity.Ratio](m, "edge", form.Fraction)),
	}
	if s.Waveform == "" {
		s.Waveform = ladder.Sine
	}
	s.Peak = readPeak(m, s.Waveform)
	for _, i := range m.List("points") {
		s.Points = append(s.Points, plainNumber(i.Text(), i.Problem))
	}
	m.Done()
	return s
}

// readPeak takes the source's peak, or its RMS value by the shape's factor.
func readPeak(m *form.Map, shape ladder.Waveform) float64 {
	switch {
	case m.Has("peak") && m.Has("rms"):
		m.Problem("rms", "the peak is given as well; keep one of the two")
	case m.Has("rms"):
		factor := map[ladder.Waveform]float64{ladder.Sine: math.Sqrt2, ladder.Square: 1, ladder.Triangle: math.Sqrt(3)}[shape]
		if factor == 0 {
			m.Problem("rms", "a table waveform has no fixed ratio of peak to rms; give peak")
		}
		return factor * float64(form.Get[quantity.Volts](m, "rms", form.Positive))
	default:
		m.Require("peak")
	}
	return float64(form.Get[quantity.Volts](m, "peak", form.Positive))
}

func readCircuitLoad(m *form.Map) ladder.Load {
	if m == nil {
		return ladder.Load{}
	}
	if len(m.Keys()) == 0 {
		m.Problem("", "nothing is given; write current, resistance or power (current: 0 A for no load)")
	}
	l := ladder.Load{
		Current:    float64(form.Get[quantity.Amps](m, "current", form.NotNegative)),
		Resistance: float64(form.Get[quantity.Ohms](m, "resistance", form.Positive)),
		Power:      float64(form.Get[quantity.Watts](m, "power", form.NotNegative)),
	}
	for _, i := range m.List("table") {
		v, a := pair[quantity.Volts, quantity.Amps](i, "[400 V, 1 mA]")
		l.Table = append(l.Table, ladder.LoadPoint{V: v, A: a})
	}
	m.Done()
	return l
}

// pair reads a list entry of two quantities.
func pair[A, B quantity.Quantity](i form.Item, example string) (a, b float64) {
	two := i.Items()
	if len(two) != 2 {
		i.Problem("is not a pair; write two values such as %s", example)
		return 0, 0
	}
	return float64(form.GetItem[A](two[0], form.NotNegative)), float64(form.GetItem[B](two[1], form.NotNegative))
}

// number reads a plain number that must not be negative, such as an ideality;
// zero when absent.
func number(m *form.Map, key string, rule form.Rule) float64 {
	if !m.Has(key) {
		return 0
	}
	problem := func(format string, args ...any) { m.Problem(key, format, args...) }
	v := plainNumber(m.Text(key), problem)
	switch {
	case rule == form.Positive && v <= 0 && !math.IsNaN(v):
		problem("%q must be above zero", m.Text(key))
	case v < 0:
		problem("%q is negative; write zero or above", m.Text(key))
	}
	return v
}

// plainNumber is NaN for what is no number, which is reported.
func plainNumber(text string, problem func(format string, args ...any)) float64 {
	v, err := quantity.Parse(text, quantity.None)
	if err != nil {
		problem("%v", err)
		return math.NaN()
	}
	return v
}
