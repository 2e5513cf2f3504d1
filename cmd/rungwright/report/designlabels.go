package report

import (
	"slices"
	"strconv"
	"strings"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
	"rungwright/optimize"
	"rungwright/optimize/ladder"
)

// DesignLabels is what a design's schematic says beside each symbol. The node
// voltages are those of the steady state; nil: of the corner at full load whose
// line is nearest to nominal.
func DesignLabels(d *optimize.Design, at *ladder.Steady) Labels {
	l := Labels{Title: "Schematic of " + stagesOf(d.Topology, d.Stages)}
	for k := range d.Topology.CapacitorCount(d.Stages) {
		l.Capacitors = append(l.Capacitors, positionLabel(d, "C"+strconv.Itoa(k+1)))
	}
	for k := range d.Topology.DiodeCount(d.Stages) {
		l.Diodes = append(l.Diodes, positionLabel(d, "D"+strconv.Itoa(k+1)))
	}
	l.Source = sourceLabel(d)
	for _, line := range d.Lines {
		for _, ref := range line.Refs {
			switch line.Role {
			case optimize.RoleSurge:
				l.Surge = append(l.Surge, positionLabel(d, ref))
			case optimize.RoleBleeder:
				l.Bleeder = positionLabel(d, ref)
			}
		}
	}
	l.Load = loadLabel(d)
	if c := nominal(d); at == nil && c != nil {
		at = &c.Steady
	}
	if at != nil {
		for _, k := range at.Capacitors {
			l.CapacitorV = append(l.CapacitorV, k.MeanV)
		}
		l.Output = minus(quantity.Format(at.MeanV, quantity.Voltage, 3))
	}
	return l
}

// nominal is the corner whose voltages stand at the nodes: full load, and the
// line nearest to nominal.
func nominal(d *optimize.Design) *optimize.Corner {
	var best *optimize.Corner
	for k := range d.Corners {
		c := &d.Corners[k]
		if len(c.Steady.Capacitors) == 0 {
			continue
		}
		if best == nil || c.LoadA > best.LoadA || c.LoadA == best.LoadA && away(c) < away(best) {
			best = c
		}
	}
	return best
}

func away(c *optimize.Corner) float64 { return max(c.Line-1, 1-c.Line) }

// positionLabel is the label of one position, from the line that fills it.
func positionLabel(d *optimize.Design, ref string) Label {
	l := Label{Ref: ref}
	for _, line := range d.Lines {
		if line.Part != nil && slices.Contains(line.Refs, ref) {
			l.Value, l.Rating = partWords(line.Part)
			l.Group = grouped(line.Series, line.Parallel)
			l.Polarised = line.Part.Capacitor != nil && polarised(line.Part.Capacitor.Technology)
			l.Stress, l.AtMost = stressOf(d, ref, line.Refs)
		}
	}
	return l
}

// partWords are a part's value and rating as a drawing has room for.
func partWords(p *catalog.Part) (value, rating string) {
	switch {
	case p.Capacitor != nil:
		return p.Capacitor.Capacitance.String(), p.Capacitor.Voltage.String()
	case p.Diode != nil:
		return p.Diode.AverageCurrent.String(), p.Diode.ReverseVoltage.String()
	case p.Resistor != nil:
		return p.Resistor.Resistance.String(), p.Resistor.Power.String()
	}
	return "", ""
}

func polarised(t catalog.Technology) bool {
	return t == catalog.AluminiumElectrolytic || t == catalog.Tantalum
}

// grouped says how the pieces of a position are joined.
func grouped(series, parallel int) string {
	switch {
	case series > 1 && parallel > 1:
		return strconv.Itoa(series) + " s × " + strconv.Itoa(parallel) + " p"
	case series > 1:
		return strconv.Itoa(series) + " in series"
	case parallel > 1:
		return strconv.Itoa(parallel) + " parallel"
	}
	return ""
}

// stressOf is the worst stress of a position. The ratings name the worst
// position of each line; the others of the line are at most as hard worked.
func stressOf(d *optimize.Design, ref string, line []string) (worst float64, atMost bool) {
	all := 0.0
	for _, x := range d.Stresses {
		if x.Unjudged {
			continue
		}
		named := strings.Fields(x.Ref)
		if slices.Contains(named, ref) {
			worst = max(worst, x.Ratio)
		}
		if len(named) > 0 && slices.Contains(line, named[0]) {
			all = max(all, x.Ratio)
		}
	}
	if worst < all {
		return all, true
	}
	return worst, false
}

func sourceLabel(d *optimize.Design) Label {
	c := d.Circuit.Source
	l := Label{Ref: "source", Value: quantity.Format(c.Peak, quantity.Voltage, 3) + " peak", Rating: quantity.Format(c.Frequency, quantity.Frequency, 3)}
	for _, line := range d.Lines {
		if line.Role == optimize.RoleSource && len(line.Refs) > 0 {
			l.Ref = line.Refs[0]
			l.Winding = line.Part != nil && line.Part.Winding != nil && line.Part.Winding.Type == "transformer"
			if line.Part != nil {
				l.Stress, _ = stressOf(d, l.Ref, line.Refs)
			}
		}
	}
	return l
}

func loadLabel(d *optimize.Design) Label {
	l := Label{Ref: "load"}
	switch o := d.Supply.Output.Load; {
	case o.Resistance > 0:
		l.Value = o.Resistance.String()
	case o.Most > 0:
		l.Value = o.Most.String()
	default:
		l.Value = quantity.Format(d.Circuit.Load.Current, quantity.Current, 3)
	}
	return l
}
