package report

import (
	"bytes"
	"encoding/xml"
	"fmt"
	"image/png"
	"io"
	"math"
	"strings"
	"testing"

	"rungwright/optimize/ladder"
)

// drawn calls f with every topology at 1, 2, 5, 10 and 20 stages, as far as it
// has them, each with the widest labels that a design may have: positive and
// negative, with and without surge resistors.
func drawn(t *testing.T, f func(t *testing.T, s *sheet)) {
	for _, top := range ladder.Topologies() {
		for _, n := range []int{1, 2, 5, 10, 20} {
			for _, negative := range []bool{false, true} {
				if n > top.MaxStages() {
					continue
				}
				t.Run(fmt.Sprintf("%s/%d/negative=%v", top, n, negative), func(t *testing.T) {
					c := ladder.Circuit{Topology: top, Stages: n, Negative: negative, Source: ladder.Source{Peak: 12e3}}
					if n%2 == 0 {
						c.Filter = ladder.Filter{R: 12.5e3, C: 12.5e-9}
					}
					s, err := draft(c, wideLabels(c))
					if err != nil {
						t.Fatal(err)
					}
					f(t, s)
				})
			}
		}
	}
}

func wideLabels(c ladder.Circuit) Labels {
	l := Labels{Source: Label{Ref: "T1", Value: "12.5 kV peak", Rating: "32.5 kHz sine", Winding: c.Negative},
		Bleeder: Label{Ref: "R3", Value: "188 MΩ", Rating: "12.5 kV", Group: "20 in series", Stress: 0.97},
		Load:    Label{Ref: "load", Value: "188 µA", Rating: "1.25 kΩ"}, Output: "−125.6 kV"}
	if c.Negative {
		l.Surge = []Label{{Ref: "R1", Value: "12.5 kΩ", Rating: "12.5 W", Stress: 0.5}, {Ref: "R2", Value: "12.5 kΩ", Stress: 0.5}}
	}
	for k := range c.Topology.CapacitorCount(c.Stages) {
		l.Capacitors = append(l.Capacitors, Label{Value: "680 nF", Rating: "12.5 kV", Group: "12 in series", Stress: 0.99 + 0.5*float64(k%2), Polarised: k%3 == 0})
		l.CapacitorV = append(l.CapacitorV, 1234.5)
	}
	for range c.Topology.DiodeCount(c.Stages) {
		l.Diodes = append(l.Diodes, Label{Value: "125 mA", Rating: "12.5 kV", Group: "12 in series", Stress: 1.49})
	}
	return l
}

// area is an upright rectangle with what it is for messages.
type area struct {
	name      string
	low, high point
}

func (a area) meets(b area) bool {
	return a.low.x < b.high.x && b.low.x < a.high.x && a.low.y < b.high.y && b.low.y < a.high.y
}

// areas are the texts of a row, and all else that a text must not touch.
func (r *row) areas() (texts, marks []area) {
	for _, w := range r.texts {
		low, high := w.box()
		texts = append(texts, area{"text " + w.s, low, high})
	}
	for _, p := range r.parts {
		reach := p.reach()
		marks = append(marks, area{"symbol " + p.label.Ref, point{p.middle.x - reach.x, p.middle.y - reach.y}, point{p.middle.x + reach.x, p.middle.y + reach.y}})
		marks = append(marks, stroke("lead of "+p.label.Ref, p.a, p.middle), stroke("lead of "+p.label.Ref, p.middle, p.b))
	}
	for _, w := range r.wires {
		marks = append(marks, stroke("wire", w.a, w.b))
	}
	for _, f := range r.flags {
		x := f.at.x
		if f.enter {
			x -= 44
		}
		marks = append(marks, area{"flag " + f.name, point{x, f.at.y - 9}, point{x + 44, f.at.y + 9}})
	}
	for _, e := range r.earths {
		marks = append(marks, area{"earth", point{e.x - 9, e.y}, point{e.x + 9, e.y + 17}})
	}
	for _, w := range r.swatches {
		marks = append(marks, area{"swatch", w.at, point{w.at.x + 16, w.at.y + 11}})
	}
	return texts, marks
}

func stroke(name string, a, b point) area {
	return area{name, point{min(a.x, b.x) - 0.5, min(a.y, b.y) - 0.5}, point{max(a.x, b.x) + 0.5, max(a.y, b.y) + 0.5}}
}

func TestNoTextMeetsAnything(t *testing.T) {
	drawn(t, func(t *testing.T, s *sheet) {
		for r, row := range s.rows {
			texts, marks := row.areas()
			for i, a := range texts {
				if a.low.x < 0 || a.low.y < 0 || a.high.x > row.width || a.high.y > row.height {
					t.Errorf("row %d: %s leaves the row: %v %v of %v × %v", r, a.name, a.low, a.high, row.width, row.height)
				}
				for _, b := range append(append([]area(nil), texts[i+1:]...), marks...) {
					if a.meets(b) {
						t.Errorf("row %d: %s meets %s at %v", r, a.name, b.name, a.low)
					}
				}
			}
		}
	})
}

func TestNoSymbolMeetsAnother(t *testing.T) {
	drawn(t, func(t *testing.T, s *sheet) {
		for _, row := range s.rows {
			for i, p := range row.parts {
				for _, q := range row.parts[i+1:] {
					a, b := p.reach(), q.reach()
					if math.Abs(p.middle.x-q.middle.x) < a.x+b.x+4 && math.Abs(p.middle.y-q.middle.y) < a.y+b.y+4 {
						t.Errorf("%s meets %s", p.label.Ref, q.label.Ref)
					}
				}
			}
			for i, a := range row.wires { // wires that cross without meeting would read as joined
				for _, b := range row.wires[i+1:] {
					if crosses(a, b) {
						t.Errorf("wires %v and %v cross", a, b)
					}
				}
			}
		}
	})
}

// crosses tells whether a level and an upright wire cross inside both.
func crosses(a, b wire) bool {
	if a.a.y != a.b.y {
		a, b = b, a
	}
	if a.a.y != a.b.y || b.a.x != b.b.x {
		return false
	}
	within := func(v, p, q float64) bool { return min(p, q) < v && v < max(p, q) }
	return within(b.a.x, a.a.x, a.b.x) && within(a.a.y, b.a.y, b.b.y)
}

// The picture is read back as a circuit, from its lines alone, and set beside
// what the ladder package says of the topology: at no load every diode is
// just reached at one crest of the source and blocks two peaks at the other,
// and the output stands at its multiple of the peak.
func TestPictureIsTheCircuit(t *testing.T) {
	drawn(t, func(t *testing.T, s *sheet) {
		top, n := s.circuit.Topology, s.circuit.Stages
		sign := 1.0
		if s.circuit.Negative {
			sign = -1
		}
		level := top.CapacitorLevels(n)
		crest := []map[int]float64{s.read(level, 1), s.read(level, -1)}
		joined := netsOf(s.rows)
		diodes, capacitors := 0, 0
		for r, row := range s.rows {
			for _, p := range row.parts {
				if p.kind == capacitor {
					capacitors++
				}
				if p.kind != diode {
					continue
				}
				diodes++
				var drop []float64
				for _, v := range crest {
					drop = append(drop, v[joined.at(r, p.a)]-v[joined.at(r, p.b)])
				}
				if !near1(max(drop[0], drop[1]), 0) || !near1(min(drop[0], drop[1]), -2) {
					t.Errorf("%s stands at %v and %v peaks, want 0 and −2", p.label.Ref, drop[0], drop[1])
				}
			}
		}
		if diodes != top.DiodeCount(n) || capacitors != top.CapacitorCount(n) {
			t.Errorf("%d diodes and %d capacitors drawn, want %d and %d", diodes, capacitors, top.DiodeCount(n), top.CapacitorCount(n))
		}
		last := len(s.rows) - 1
		for len(s.rows[last].rings) == 0 {
			last--
		}
		var out []float64
		for _, ring := range s.rows[last].rings {
			out = append(out, crest[0][joined.at(last, ring)])
		}
		got := out[0]
		if len(out) == 2 {
			got -= out[1]
		}
		if !near1(got, sign*float64(top.OutputFactor(n))) {
			t.Errorf("the drawn output stands at %v peaks, want %v", got, sign*float64(top.OutputFactor(n)))
		}
	})
}

func near1(a, b float64) bool { return math.Abs(a-b) < 1e-9 }

// read gives the voltage of every drawn net for given capacitor voltages and
// voltage of each source.
func (s *sheet) read(capacitors []float64, source0 float64) map[int]float64 {
	joined := netsOf(s.rows)
	var steps []step
	for r, row := range s.rows {
		for _, p := range row.parts {
			x := step{high: joined.at(r, p.a), low: joined.at(r, p.b)}
			switch p.kind {
			case capacitor:
				x.volts = capacitors[p.index]
			case source:
				x.volts = source0
			case series, filter:
			default:
				continue
			}
			steps = append(steps, x)
		}
	}
	return spread(steps)
}

// Kirchhoff's voltage law around every drawn diode, at every instant of a
// period that the solver gives: with no two parts alike, a number that stood
// at the wrong symbol would show.
func TestPictureObeysKirchhoff(t *testing.T) {
	for _, top := range ladder.Topologies() {
		t.Run(string(top), func(t *testing.T) {
			n := min(5, top.MaxStages())
			c := ladder.Circuit{Topology: top, Stages: n, Load: ladder.Load{Current: 2e-3},
				Source: ladder.Source{Waveform: ladder.Sine, Peak: 300, Frequency: 20e3, Resistance: 20}}
			for k := range top.CapacitorCount(n) {
				c.Capacitors = append(c.Capacitors, ladder.Capacitor{C: 20e-9 * (1 + 0.13*float64(k))})
			}
			for k := range top.DiodeCount(n) {
				c.Diodes = append(c.Diodes, ladder.Diode{IS: 1e-9, N: 1.8, RS: 5 * float64(k+1)})
			}
			steady, err := ladder.Solve(t.Context(), c, &ladder.Settings{Waves: true})
			if err != nil {
				t.Fatal(err)
			}
			s, err := draft(c, Labels{})
			if err != nil {
				t.Fatal(err)
			}
			checkDrops(t, s, steady.Waves)
		})
	}
}

func checkDrops(t *testing.T, s *sheet, w *ladder.Waves) {
	joined := netsOf(s.rows)
	conducting := map[int]bool{}
	worst := 0.0
	for i := range w.Time {
		volts := s.read(column(w.Capacitor, i), 0)
		ends := endVoltages(s.circuit, w, i)
		for r, row := range s.rows {
			for _, p := range row.parts {
				if p.kind != diode || w.Diode[p.index][i] < 1e-3 {
					continue
				}
				conducting[p.index] = true
				d := s.circuit.Diodes[p.index]
				current := w.Diode[p.index][i]
				want := d.N*0.025693*math.Log1p(current/d.IS) + current*d.RS
				got := s.fed(joined, r, p.a, volts, ends) - s.fed(joined, r, p.b, volts, ends)
				worst = max(worst, math.Abs(got-want))
			}
		}
	}
	if worst > 0.05 { // volts of 300; a wrong diode is off by its series resistance, 5 Ω × 10 mA and more
		t.Errorf("a diode's drawn voltage is %v V off what its current asks for", worst)
	}
	if len(conducting) != len(s.circuit.Diodes) {
		t.Errorf("only %d of %d diodes were seen to conduct", len(conducting), len(s.circuit.Diodes))
	}
}

func column(rows [][]float64, i int) []float64 {
	var out []float64
	for _, r := range rows {
		out = append(out, r[i])
	}
	return out
}

// endVoltages are those of the winding ends, behind their resistance.
func endVoltages(c ladder.Circuit, w *ladder.Waves, i int) []float64 {
	v := c.Source.Peak * math.Sin(2*math.Pi*c.Source.Frequency*w.Time[i])
	out := []float64{v - c.Source.Resistance*w.Source[0][i]}
	if len(w.Source) == 2 {
		out = append(out, -v-c.Source.Resistance*w.Source[1][i])
	}
	return out
}

// fed is the voltage of a point: what the capacitors give it, and the winding
// end to which they join it.
func (s *sheet) fed(joined *nets, r int, at point, volts map[int]float64, ends []float64) float64 {
	net := joined.at(r, at)
	v := volts[net]
	if end := s.endOf(joined, net); end >= 0 {
		v += ends[end]
	}
	return v
}

// endOf is the winding end that reaches a net through capacitors, or −1.
func (s *sheet) endOf(joined *nets, net int) int {
	var ends []int
	for _, p := range s.rows[0].parts {
		if p.kind == source {
			a, b := joined.at(0, p.a), joined.at(0, p.b)
			if a == earthNet {
				a = b
			}
			ends = append(ends, a)
		}
	}
	for k, e := range ends {
		reached := map[int]bool{e: true}
		for grew := true; grew; {
			grew = false
			for r, row := range s.rows {
				for _, p := range row.parts {
					a, b := joined.at(r, p.a), joined.at(r, p.b)
					if p.kind == capacitor && a != earthNet && b != earthNet && reached[a] != reached[b] {
						reached[a], reached[b], grew = true, true, true
					}
				}
			}
		}
		if reached[net] {
			return k
		}
	}
	return -1
}

func TestFilesAreWellFormed(t *testing.T) {
	drawn(t, func(t *testing.T, s *sheet) {
		a, err := Schematic(s.circuit, s.labels)
		if err != nil {
			t.Fatal(err)
		}
		b, _ := Schematic(s.circuit, s.labels)
		if !bytes.Equal(a, b) {
			t.Error("the same circuit gives other bytes")
		}
		wellFormed(t, a)
		if s.circuit.Stages > 2 {
			return
		}
		picture, err := SchematicPNG(s.circuit, s.labels, 1)
		if err != nil {
			t.Fatal(err)
		}
		if _, err := png.Decode(bytes.NewReader(picture)); err != nil {
			t.Error(err)
		}
	})
}

func wellFormed(t *testing.T, data []byte) {
	t.Helper()
	d := xml.NewDecoder(bytes.NewReader(data))
	for {
		_, err := d.Token()
		if err == io.EOF {
			return
		}
		if err != nil {
			t.Fatalf("not XML: %v", err)
		}
	}
}

func TestSchematicRefuses(t *testing.T) {
	for _, c := range []ladder.Circuit{{Topology: "ring", Stages: 2}, {Topology: ladder.HalfWave}, {Topology: ladder.Bipolar, Stages: 11}} {
		if _, err := Schematic(c, Labels{}); err == nil {
			t.Errorf("%s with %d stages was drawn", c.Topology, c.Stages)
		}
	}
}

func TestHostileLabelsStayWords(t *testing.T) {
	c := ladder.Circuit{Topology: ladder.HalfWave, Stages: 1}
	out, err := Schematic(c, Labels{Title: "</title><script>x</script>", Source: Label{Ref: "T1\u202Egnp\x00", Value: `"><a href="x">`}})
	if err != nil {
		t.Fatal(err)
	}
	wellFormed(t, out)
	for _, bad := range []string{"<script", "<a ", "\u202E", "\x00"} {
		if strings.Contains(string(out), bad) {
			t.Errorf("%q came through", bad)
		}
	}
}
