package report

import (
	"bytes"
	"image/png"
	"strings"
	"testing"

	"rungwright/catalog/quantity"
)

func TestChartsAreFiles(t *testing.T) {
	d, e := fixture()
	charts := Charts(d, e)
	var names []string
	for _, c := range charts {
		names = append(names, c.Name)
		a, err := c.SVG()
		if err != nil {
			t.Fatal(err)
		}
		b, _ := c.SVG()
		if !bytes.Equal(a, b) {
			t.Errorf("%s differs from itself", c.Name)
		}
		wellFormed(t, a)
		if strings.Contains(string(a), "class=") || strings.Contains(string(a), "NaN") {
			t.Errorf("%s needs the page's style, or has no-numbers", c.Name)
		}
		picture, err := c.PNG(1)
		if err != nil {
			t.Fatal(err)
		}
		if m, err := png.Decode(bytes.NewReader(picture)); err != nil || m.Bounds().Dx() != chartWidth {
			t.Errorf("%s: %v", c.Name, err)
		}
	}
	if got, want := strings.Join(names, " "), "front regulation ripple waveform currents switch-on switch-off cost-curve tolerance"; got != want {
		t.Errorf("plots %s, want %s", got, want)
	}
}

func TestScales(t *testing.T) {
	for _, c := range []struct {
		name         string
		scale        Scale
		low, high    float64
		label, ticks string
	}{
		{name: "kilovolts", scale: Scale{Name: "output", Unit: quantity.Voltage}, low: 5302, high: 5920, label: "output [kV]", ticks: "5.3 5.4 5.5 5.6 5.7 5.8 5.9 6.0"},
		{name: "zero kept", scale: Scale{Name: "load", Unit: quantity.Current, Zero: true}, low: 1e-5, high: 1.8e-4, label: "load [µA]", ticks: "0 50 100 150 200"},
		{name: "tight", scale: Scale{Name: "time", Unit: quantity.Time, Zero: true, Tight: true}, low: 0, high: 31.25e-6, label: "time [µs]", ticks: "0 5 10 15 20 25 30"},
		{name: "money", scale: Scale{Name: "cost", Symbol: "EUR"}, low: 8, high: 8, label: "cost [EUR]", ticks: "7.6 7.8 8.0 8.2 8.4"},
	} {
		f := c.scale.over(c.low, c.high)
		var ticks []string
		for _, k := range f.Ticks(f.low, f.high) {
			ticks = append(ticks, k.Label)
		}
		if f.label() != c.label || strings.Join(ticks, " ") != c.ticks {
			t.Errorf("%s: %s with ticks %s, want %s with %s", c.name, f.label(), strings.Join(ticks, " "), c.label, c.ticks)
		}
		if f.low*f.unit > c.low*(1+1e-9) || f.high*f.unit < c.high*(1-1e-9) {
			t.Errorf("%s: %v to %v does not hold the values", c.name, f.low, f.high)
		}
	}
}

func TestEmptyAndOddData(t *testing.T) {
	for _, c := range []*Chart{{Name: "none"}, {Name: "one", Marks: []Mark{{X: 1, Y: 1}}}, {Name: "flat", Lines: []Trace{{X: []float64{0, 1}, Y: []float64{0, 0}}}}} {
		if _, err := c.SVG(); err != nil {
			t.Errorf("%s: %v", c.Name, err)
		}
	}
}
