package report

import (
	"bytes"
	"fmt"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/vgimg"

	"rungwright/optimize/ladder"
)

// layouts draw each topology. A new topology is one file and a line here.
var layouts = map[ladder.Topology]func(*sheet){
	ladder.HalfWave:      drawHalfWave,
	ladder.FullWave:      drawFullWave,
	ladder.BridgeDoubler: drawBridgeDoubler,
	ladder.ParallelFed:   drawParallelFed,
	ladder.OddMultiple:   drawOddMultiple,
	ladder.Bipolar:       drawBipolar,
}

// Schematic draws a circuit as an SVG file, with the symbols of IEC 60617.
// The circuit must have a known topology and a number of stages that it can
// have; its values are not looked at, the labels carry what is written.
func Schematic(c ladder.Circuit, l Labels) ([]byte, error) {
	s, err := draft(c, l)
	if err != nil {
		return nil, err
	}
	w, h := s.size()
	canvas := newSVG(w, h, false)
	s.paint(canvas)
	return canvas.document("schematic", s.title(), s.describe()), nil
}

// SchematicPNG is the same as a picture, dots being the pixels for each point
// of its size; zero: 2.
func SchematicPNG(c ladder.Circuit, l Labels, dots float64) ([]byte, error) {
	s, err := draft(c, l)
	if err != nil {
		return nil, err
	}
	if dots <= 0 {
		dots = 2
	}
	w, h := s.size()
	canvas := vgimg.NewWith(vgimg.UseWH(vg.Length(w), vg.Length(h)), vgimg.UseDPI(int(72*dots)))
	s.paint(canvas)
	var b bytes.Buffer
	if _, err := (vgimg.PngCanvas{Canvas: canvas}).WriteTo(&b); err != nil {
		return nil, fmt.Errorf("writing the schematic: %w", err)
	}
	return b.Bytes(), nil
}

// draft lays a circuit out.
func draft(c ladder.Circuit, l Labels) (*sheet, error) {
	layout, ok := layouts[c.Topology]
	if !ok {
		return nil, fmt.Errorf("topology %q cannot be drawn", c.Topology)
	}
	if most := c.Topology.MaxStages(); c.Stages < 1 || c.Stages > most {
		return nil, fmt.Errorf("a %s circuit has 1 to %d stages, not %d", c.Topology, most, c.Stages)
	}
	s := &sheet{circuit: c, labels: l}
	layout(s)
	s.writeTags()
	s.legend()
	s.measure()
	return s, nil
}

func (s *sheet) title() string {
	if s.labels.Title != "" {
		return s.labels.Title
	}
	return "Schematic, " + stagesOf(s.circuit.Topology, s.circuit.Stages)
}

// describe tells someone who cannot see the drawing what it shows.
func (s *sheet) describe() string {
	t, n := s.circuit.Topology, s.circuit.Stages
	return fmt.Sprintf("%s: %d capacitors and %d diodes in %d rows, the source at the left of the first row, the output at the right of the last.",
		stagesOf(t, n), t.CapacitorCount(n), t.DiodeCount(n), len(s.rows))
}

// stagesOf is "half-wave, 4 stages".
func stagesOf(t ladder.Topology, n int) string {
	if n == 1 {
		return string(t) + ", 1 stage"
	}
	return fmt.Sprintf("%s, %d stages", t, n)
}
