package catalog

import (
	"math"

	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// Winding is a source: a transformer winding or an inverter module. Zero
// means not stated.
type Winding struct {
	Type         string         // transformer | inverter
	Peak         quantity.Volts // at rated load; each half when CentreTap
	NoLoadRise   quantity.Ratio // how far the no-load voltage stands above
	Power        quantity.VoltAmps
	FrequencyMin quantity.Hertz
	FrequencyMax quantity.Hertz
	Resistance   quantity.Ohms // each winding end, primary resistance referred
	Leakage      quantity.Henries
	Waveform     string // sine | square | triangle; sine when not stated
	CentreTap    bool
	Isolated     bool           // safety isolating (IEC 61558) by the maker's word
	TestVoltage  quantity.Volts // insulation test, RMS
}

// peakFactor is peak over RMS of the waveforms.
var peakFactor = map[string]float64{"sine": math.Sqrt2, "square": 1, "triangle": math.Sqrt(3)}

// RMS is the RMS voltage at rated load, of each half when CentreTap.
func (w *Winding) RMS() quantity.Volts {
	if f := peakFactor[w.Waveform]; f != 0 {
		return quantity.Volts(float64(w.Peak) / f)
	}
	return quantity.Volts(float64(w.Peak) / math.Sqrt2)
}

func readWinding(p *Part, m *form.Map) {
	w := &Winding{
		Type:        m.Choice("type", "transformer", "inverter"),
		NoLoadRise:  form.Get[quantity.Ratio](m, "no_load_rise", form.Fraction),
		Power:       form.Get[quantity.VoltAmps](m, "power", form.Positive),
		Resistance:  get(m, "resistance", form.NotNegative, mostResistance),
		Leakage:     form.Get[quantity.Henries](m, "leakage", form.NotNegative),
		Waveform:    m.Choice("waveform", "sine", "square", "triangle"),
		CentreTap:   m.Bool("centre_tap"),
		Isolated:    m.Bool("isolated"),
		TestVoltage: get(m, "test_voltage", form.Positive, mostVoltage),
	}
	if !m.Has("waveform") {
		w.Waveform = "sine"
	}
	w.Peak = readPeak(m, w.Waveform)
	w.FrequencyMin, w.FrequencyMax = readFrequencies(m)
	p.Winding = w
}

// readPeak takes the voltage by its peak or its RMS value, not both.
func readPeak(m *form.Map, waveform string) quantity.Volts {
	peak := get(m, "peak", form.Positive, mostVoltage)
	rms := get(m, "rms", form.Positive, mostVoltage)
	switch {
	case m.Has("peak") && m.Has("rms"):
		m.Problem("rms", "the peak is given as well; keep one of the two")
	case m.Has("rms"):
		return quantity.Volts(float64(rms) * peakFactor[waveform])
	case !m.Has("peak"):
		m.Problem("", "the voltage is missing; write peak or rms")
	}
	return peak
}

// readFrequencies takes one frequency or a range.
func readFrequencies(m *form.Map) (least, most quantity.Hertz) {
	m.Require("frequency")
	if m.IsText("frequency") {
		f := form.Get[quantity.Hertz](m, "frequency", form.Positive)
		return f, f
	}
	r := m.Map("frequency")
	r.Require("least", "most")
	least = form.Get[quantity.Hertz](r, "least", form.Positive)
	most = form.Get[quantity.Hertz](r, "most", form.Positive)
	if least > most && most > 0 {
		r.Problem("least", "%v is above %v; swap the two, or mend the one that is wrong", least, most)
	}
	r.Done()
	return least, most
}

// windingTitle gives transformers by RMS and inverters by peak, as they are
// sold.
func windingTitle(p *Part) string {
	w := p.Winding
	volts, kind := w.RMS().String()+" RMS", "transformer winding"
	if w.Type == "inverter" {
		volts, kind = w.Peak.String()+" peak", "inverter"
	}
	if w.CentreTap {
		volts = "2 × " + volts
	}
	power := ""
	if w.Power > 0 {
		power = w.Power.String()
	}
	frequency := w.FrequencyMin.String()
	if w.FrequencyMax > w.FrequencyMin {
		frequency += " to " + w.FrequencyMax.String()
	}
	return join(volts, power, frequency, kind)
}
