package report

import "math"

// Label is what stands beside one symbol. Empty fields are left out.
type Label struct {
	Ref       string  // "C1"
	Value     string  // "10 nF"
	Rating    string  // "3 kV"
	Group     string  // "2 in series"
	Stress    float64 // the worst share of a limit; zero: not known
	AtMost    bool    // the stress is that of the worst part of its group
	Polarised bool    // a capacitor that must not be reversed
	Winding   bool    // a source that is a transformer winding
}

// Labels is what stands on a schematic. Slices may be short or nil: positions
// beyond them carry their reference alone.
type Labels struct {
	Title      string
	Capacitors []Label // C1, C2 …
	Diodes     []Label // D1, D2 …
	Source     Label
	Surge      []Label // resistors in series with each winding end; none: not drawn
	Bleeder    Label   // empty Ref: not drawn
	Load       Label
	Output     string    // what stands at the output, "−5.6 kV"; empty: its name alone
	CapacitorV []float64 // mean voltage of each [V]; nil: no voltages at the nodes
}

// lines are the label as it is written, one entry a line, the reference first.
func (l Label) lines() []string {
	var out []string
	for _, s := range []string{l.Ref, l.Value, l.Rating, l.Group, l.stress()} {
		if s != "" {
			out = append(out, neutral(s))
		}
	}
	return out
}

// stress is the share in words; what is over carries a mark and a word.
func (l Label) stress() string {
	switch p := percent(l.Stress); {
	case l.Stress <= 0:
		return ""
	case l.AtMost:
		return "≤ " + p
	case l.Stress > 1:
		return "▲ " + p
	default:
		return p
	}
}

// shade is a class of stress.
type shade struct {
	upTo   float64 // the share up to which it reaches
	tint   ink
	edge   ink
	dashes []float64
	word   string
}

// shades go from slack to over. Each differs in its edge as well as its tint.
var shades = []shade{
	{0.5, panel, grid, nil, "up to 50 % of the limit"},
	{0.8, bluish, blue, nil, "50 to 80 %"},
	{1, ambery, amber, []float64{4, 2}, "80 to 100 %"},
	{math.Inf(1), reddy, alarm, []float64{1.5, 1.5}, "▲ over the limit"},
}

// shade is the class of a label's stress. What is at most over its limit may be
// within, so it is not called over.
func (l Label) shade() (shade, bool) {
	if l.AtMost {
		return shadeOf(min(1, l.Stress))
	}
	return shadeOf(l.Stress)
}

// shadeOf is the class of a stress; ok is false when it is not known.
func shadeOf(stress float64) (s shade, ok bool) {
	if !(stress > 0) {
		return s, false
	}
	for _, s = range shades {
		if stress <= s.upTo {
			break
		}
	}
	return s, true
}

// at is the label of a position, or the reference alone.
func at(labels []Label, i int, ref string) Label {
	l := Label{}
	if i < len(labels) {
		l = labels[i]
	}
	if l.Ref == "" {
		l.Ref = ref
	}
	return l
}
