package report

import (
	"cmp"
	"html/template"
	"slices"

	"rungwright/catalog"
	"rungwright/optimize"
)

// loss is what one line turns into heat.
type loss struct {
	name, refs string
	watts      float64
}

func (s *subject) losses() (template.HTML, error) {
	_, where := s.lossState()
	list := s.lossList()
	if len(list) == 0 {
		return "", nil
	}
	t := table{Caption: "At " + where, Heads: numbers(words("Part", "Loss", "Share of all losses"), 1)}
	total, most := 0.0, 0.0
	for _, l := range list {
		total, most = total+l.watts, max(most, l.watts)
	}
	for _, l := range list {
		t.Rows = append(t.Rows, []cell{{Text: l.name, Below: l.refs}, {Text: watts(l.watts)}, {Text: percent(l.watts / total), Bar: share(l.watts, most)}})
	}
	t.Rows = append(t.Rows, cells("all", watts(total), ""))
	return fill("table", t)
}

// lossState is the steady state of the losses: nominal, or the corner that
// takes most from the source.
func (s *subject) lossState() (*optimize.Corner, string) {
	if s.e.Nominal != nil {
		return &optimize.Corner{Steady: *s.e.Nominal}, "full load and nominal line"
	}
	var worst *optimize.Corner
	for k := range s.d.Corners {
		c := &s.d.Corners[k]
		if len(c.Steady.Diodes) > 0 && (worst == nil || c.Steady.LossW > worst.Steady.LossW) {
			worst = c
		}
	}
	if worst == nil {
		return nil, ""
	}
	return worst, worst.Name
}

// lossList adds up the losses by line, the greatest first.
func (s *subject) lossList() []loss {
	c, _ := s.lossState()
	if c == nil {
		return nil
	}
	by := map[string]float64{}
	for _, k := range c.Steady.Capacitors {
		by[k.Ref] = k.LossW
	}
	for _, k := range c.Steady.Diodes {
		by[k.Ref] = k.LossW
	}
	var out []loss
	surge := 0.0
	for _, l := range s.d.Lines {
		if l.Part == nil {
			continue
		}
		x := loss{name: l.Part.Number, refs: ranges(l.Refs)}
		for _, ref := range l.Refs {
			x.watts += by[ref]
		}
		switch r := groupOhms(l); l.Role {
		case optimize.RoleBleeder:
			x.watts = c.Steady.MeanV * c.Steady.MeanV / r
		case optimize.RoleSurge:
			for _, e := range c.Steady.Source {
				x.watts += e.RMSA * e.RMSA * r
			}
			surge += x.watts
		}
		if x.watts > 0 {
			out = append(out, x)
		}
	}
	source := -surge
	for _, e := range c.Steady.Source {
		source += e.LossW
	}
	if source > 1e-9*c.Steady.InputW {
		out = append(out, loss{"resistance of the source", "", source})
	}
	slices.SortStableFunc(out, func(a, b loss) int { return cmp.Compare(b.watts, a.watts) })
	return out
}

// groupOhms is the resistance of a line's group; 0 for other parts.
func groupOhms(l optimize.Line) float64 {
	if l.Part.Kind != catalog.KindResistor {
		return 0
	}
	return float64(l.Part.Resistor.Resistance) * float64(max(1, l.Series)) / float64(max(1, l.Parallel))
}
