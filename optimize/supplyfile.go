package optimize

import (
	"crypto/sha256"
	"encoding/hex"

	"rungwright/catalog"
	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
)

// ReadSupply reads a supply file. All its mistakes come back at once as
// form.Problems.
func ReadSupply(file string, data []byte) (Supply, error) {
	var report form.Report
	m := form.ParseWithin(file, data, form.Limits{Bytes: 1 << 20, Nodes: 5000}, &report)
	s := readSupply(m)
	m.Done()
	if err := report.Err(); err != nil {
		return Supply{}, err
	}
	sum := sha256.Sum256(data)
	s.Input = catalog.Input{Name: file, SHA256: hex.EncodeToString(sum[:])}
	return s, nil
}

func readSupply(m *form.Map) Supply {
	m.Require("supply", "output", "source")
	s := Supply{Name: m.Text("supply"), Derating: m.Text("derating")}
	if s.Derating == "" {
		s.Derating = "general"
	}
	s.Output = readOutput(m.Map("output"))
	s.Source = readSource(m.Map("source"))
	s.Surroundings = readSurroundings(m.Map("surroundings"))
	s.Build = readBuild(m.Map("build"))
	s.Choose = readChoose(m.Map("choose"))
	s.Limits = readLimits(m.Map("limits"))
	for _, x := range m.Maps("extras") {
		x.Require("part")
		s.Extras = append(s.Extras, Extra{Part: x.Text("part"), Quantity: x.Int("quantity", 1, 1000, 1), Ref: x.Text("ref")})
		x.Done()
	}
	return s
}

func readOutput(m *form.Map) Output {
	m.Require("voltage", "window", "load")
	o := Output{
		Voltage: form.Get[quantity.Volts](m, "voltage", form.Positive),
		Window:  form.Get[quantity.Ratio](m, "window", form.Fraction),
		Ripple:  form.Get[quantity.Volts](m, "ripple", form.Positive),
		Rise:    form.Get[quantity.Seconds](m, "rise", form.Positive),
	}
	if m.Has("window") && o.Window == 0 {
		m.Problem("window", "a window of nothing cannot be met; write how far the output may stray either way, such as 5 %%")
	}
	o.Negative = m.Choice("polarity", "positive", "negative") == "negative"
	o.Load = readLoad(m.Map("load"))
	if d := m.Map("discharge"); d != nil {
		d.Require("below", "within")
		o.Discharge = Discharge{form.Get[quantity.Volts](d, "below", form.Positive), form.Get[quantity.Seconds](d, "within", form.Positive)}
		d.Done()
	}
	m.Done()
	return o
}

func readLoad(m *form.Map) LoadRange {
	l := LoadRange{
		Least:      form.Get[quantity.Amps](m, "least", form.NotNegative),
		Most:       form.Get[quantity.Amps](m, "most", form.Positive),
		Resistance: form.Get[quantity.Ohms](m, "resistance", form.Positive),
	}
	switch {
	case m == nil:
	case m.Has("resistance") && m.Has("most"):
		m.Problem("resistance", "the load is given as a current and as a resistance; keep one")
	case !m.Has("resistance") && !m.Has("most"):
		m.Problem("", "says neither most (a current) nor resistance; write most: 2 mA, say")
	case l.Least > l.Most && l.Resistance == 0:
		m.Problem("least", "the least load, %s, is above the most, %s", l.Least, l.Most)
	}
	m.Done()
	return l
}

func readSource(m *form.Map) Source {
	s := Source{
		Part:       m.Text("part"),
		Peak:       form.Get[quantity.Volts](m, "peak", form.Positive),
		NoLoadRise: form.Get[quantity.Ratio](m, "no_load_rise", form.Fraction),
		Line:       form.Get[quantity.Ratio](m, "line", form.Fraction),
		Frequency:  form.Get[quantity.Hertz](m, "frequency", form.Positive),
		Resistance: form.Get[quantity.Ohms](m, "resistance", form.NotNegative),
		Leakage:    form.Get[quantity.Henries](m, "leakage", form.NotNegative),
		Power:      form.Get[quantity.VoltAmps](m, "power", form.Positive),
		CentreTap:  m.Bool("centre_tap"),
		Isolated:   m.Bool("isolated"),
	}
	if m.Has("rms") {
		s.Peak = quantity.Volts(1.4142135623730951) * form.Get[quantity.Volts](m, "rms", form.Positive)
		if m.Has("peak") {
			m.Problem("rms", "the source is given by its peak as well; keep one of the two")
		}
	}
	s.Waveform = ladder.Waveform(m.Choice("waveform", string(ladder.Sine), string(ladder.Square), string(ladder.Triangle)))
	if s.Part == "" && m != nil {
		if !m.Has("peak") && !m.Has("rms") {
			m.Problem("", "says neither peak, rms nor part; write peak: 700 V, say, or part: and a winding of the catalog")
		}
		m.Require("frequency")
		if s.Waveform == "" {
			s.Waveform = ladder.Sine
		}
	}
	m.Done()
	return s
}

func readSurroundings(m *form.Map) Surroundings {
	s := Surroundings{Ambient: 40, PollutionDegree: m.Int("pollution_degree", 1, 4, 2),
		Altitude: form.Get[quantity.Meters](m, "altitude", form.Any)}
	if m.Has("ambient") {
		s.Ambient = form.Get[quantity.Celsius](m, "ambient", form.Any)
	}
	m.Done()
	return s
}

func readBuild(m *form.Map) Build {
	b := Build{Units: m.Int("units", 1, 10_000_000, 1), Spares: form.Get[quantity.Ratio](m, "spares", form.Fraction), Currency: m.Text("currency")}
	if b.Currency == "" {
		b.Currency = "EUR"
	}
	m.Done()
	return b
}

func readChoose(m *form.Map) Choose {
	c := Choose{
		Least: Objective(m.Choice("least", objectives...)),
		Then:  Objective(m.Choice("then", objectives...)),
	}
	if c.Least == "" {
		c.Least = LeastCost
	}
	for _, i := range m.List("topologies") {
		t := ladder.Topology(i.Text())
		if !t.Known() {
			i.Problem("%s", form.Unknown("topology", i.Text(), topologyNames()))
			continue
		}
		c.Topologies = append(c.Topologies, t)
	}
	if s := m.Map("stages"); s != nil {
		c.StagesMin, c.StagesMax = s.Int("least", 1, ladder.MaxStages, 1), s.Int("most", 1, ladder.MaxStages, ladder.MaxStages)
		if c.StagesMin > c.StagesMax {
			s.Problem("least", "least is above most")
		}
		s.Done()
	}
	if w := m.Choice("mounting", "any", string(catalog.ThroughHole), string(catalog.SurfaceMount)); w != "any" {
		c.Mounting = catalog.Mounting(w)
	}
	for _, i := range m.List("suppliers") {
		c.Suppliers = append(c.Suppliers, i.Text())
	}
	for _, i := range m.List("avoid") {
		c.Avoid = append(c.Avoid, i.Text())
	}
	m.Done()
	return c
}

var objectives = []string{string(LeastCost), string(LeastVolume), string(LeastArea), string(LeastHeight), string(LeastLoss), string(LeastParts)}

func topologyNames() []string {
	var names []string
	for _, t := range ladder.Topologies() {
		names = append(names, string(t))
	}
	return names
}

func readLimits(m *form.Map) Limits {
	l := Limits{
		Cost:         m.Money("cost"),
		Height:       form.Get[quantity.Meters](m, "height", form.Positive),
		Volume:       form.Get[quantity.CubicMeters](m, "volume", form.Positive),
		Area:         form.Get[quantity.SquareMeters](m, "area", form.Positive),
		StoredEnergy: form.Get[quantity.Joules](m, "stored_energy", form.Positive),
		Efficiency:   form.Get[quantity.Ratio](m, "efficiency", form.Fraction),
	}
	m.Done()
	return l
}
