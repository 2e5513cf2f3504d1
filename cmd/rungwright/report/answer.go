package report

import (
	"math"
	"strconv"
	"strings"

	"rungwright/catalog/quantity"
	"rungwright/ratings"
)

// answer is what a reader should know after ten seconds.
type answer struct {
	Passes  bool
	Verdict string
	Failed  []string
	Line    string // "half-wave, 4 stages, from 700 V peak at 32 kHz"
	Tiles   []tile
}

// tile is one figure of the answer.
type tile struct {
	Name, Value, Note string
	State             string // "met", "over" or empty
}

func (s *subject) answer() answer {
	d := s.d
	a := answer{Failed: d.Failed, Passes: s.passes()}
	a.Line = stagesOf(d.Topology, d.Stages) + ", from " + quantity.Format(d.Circuit.Source.Peak, quantity.Voltage, 4) + " peak at " +
		quantity.Format(d.Circuit.Source.Frequency, quantity.Frequency, 4)
	a.Verdict = "Meets every target and limit"
	if !a.Passes {
		a.Verdict = "Does not meet every target and limit"
		if len(a.Failed) == 0 {
			a.Failed = s.broken()
		}
	}
	for _, make := range []func() (tile, bool){s.outputTile, s.rippleTile, s.costTile, s.closestTile} {
		if t, ok := make(); ok {
			a.Tiles = append(a.Tiles, t)
		}
	}
	return a
}

// passes tells whether nothing is broken.
func (s *subject) passes() bool { return len(s.d.Failed) == 0 && len(s.broken()) == 0 }

// broken says in words what is not met or over.
func (s *subject) broken() []string {
	var out []string
	for _, t := range s.d.Targets {
		if !t.Met {
			out = append(out, t.Name+": "+t.Wanted+" wanted, "+measured(t.Got, t.Unit)+" reached")
		}
	}
	for _, x := range s.d.Stresses {
		if x.Over {
			out = append(out, x.Ref+" ("+x.Part+"): "+x.Quantity+" at "+percent(x.Ratio)+" of its limit")
		}
	}
	return out
}

// outputTile is the span of the mean output over all corners.
func (s *subject) outputTile() (tile, bool) {
	low, high := math.Inf(1), 0.0
	for _, c := range s.d.Corners {
		v := math.Abs(c.Steady.MeanV)
		low, high = min(low, v), max(high, v)
	}
	o := s.d.Supply.Output
	wanted := volts(s.signed(float64(o.Voltage))) + " ± " + o.Window.String() + " wanted"
	if len(s.d.Corners) == 0 {
		return tile{}, false
	}
	t := tile{Name: "Output over all corners", Value: span(s.signed(low), s.signed(high)), Note: wanted, State: "met"}
	v := float64(o.Voltage)
	if w := float64(o.Window); v > 0 && (low < v*(1-w) || high > v*(1+w)) {
		t.State = "over"
	}
	return t, true
}

// span is "5.4 to 5.82 kV".
func span(low, high float64) string {
	unit, symbol := prefix(max(math.Abs(low), math.Abs(high)), quantity.Voltage)
	text := func(v float64) string { return minus(strconv.FormatFloat(v/unit, 'f', decimals(v/unit, 4), 64)) }
	if text(low) == text(high) {
		return text(low) + " " + symbol
	}
	return text(low) + " to " + text(high) + " " + symbol
}

// decimals is how many a value needs to show so many digits.
func decimals(v float64, digits int) int {
	if v == 0 {
		return 0
	}
	return max(0, digits-1-int(math.Floor(math.Log10(math.Abs(v)))))
}

func (s *subject) rippleTile() (tile, bool) {
	worst, where := 0.0, ""
	for _, c := range s.d.Corners {
		if c.Steady.RippleV > worst {
			worst, where = c.Steady.RippleV, c.Name
		}
	}
	if where == "" {
		return tile{}, false
	}
	t := tile{Name: "Ripple, peak to peak", Value: quantity.Format(worst, quantity.Voltage, 3), Note: where}
	if want := float64(s.d.Supply.Output.Ripple); want > 0 {
		t.Note, t.State = quantity.Format(want, quantity.Voltage, 4)+" or less wanted", "met"
		if worst > want {
			t.State = "over"
		}
	}
	return t, true
}

func (s *subject) costTile() (tile, bool) {
	if s.d.UnitCost.IsZero() {
		return tile{}, false
	}
	t := tile{Name: "Cost of a unit", Value: money(s.d.UnitCost, s.d.Currency)}
	if n := s.d.Supply.Build.Units; n > 0 {
		t.Note = money(s.d.BuildCost, s.d.Currency) + " for " + plural(n, "unit")
	}
	return t, true
}

// closestTile is the stress nearest to its limit.
func (s *subject) closestTile() (tile, bool) {
	worst := -1
	for k, x := range s.d.Stresses {
		if !x.Unjudged && (worst < 0 || x.Ratio > s.d.Stresses[worst].Ratio) {
			worst = k
		}
	}
	if worst < 0 {
		return tile{}, false
	}
	x := s.d.Stresses[worst]
	t := tile{Name: "Closest limit", Value: percent(x.Ratio), Note: x.Ref + ", " + x.Quantity, State: "met"}
	if x.Over {
		t.State = "over"
	}
	return t, true
}

func (s *subject) signed(v float64) float64 {
	if s.d.Supply.Output.Negative {
		return -v
	}
	return v
}

func plural(n int, word string) string {
	if n == 1 {
		return "1 " + word
	}
	return strconv.Itoa(n) + " " + word + "s"
}

// dimensions are the units in which targets are given.
var dimensions = map[string]quantity.Dimension{"V": quantity.Voltage, "A": quantity.Current, "s": quantity.Time, "m": quantity.Length,
	"m²": quantity.Area, "m³": quantity.Volume, "J": quantity.Energy, "W": quantity.Power, "1": quantity.Proportion, "Hz": quantity.Frequency}

// measured is a value in a target's unit.
func measured(v float64, unit string) string {
	if math.IsInf(v, 1) {
		return "never"
	}
	if d, ok := dimensions[unit]; ok {
		return minus(quantity.Format(v, d, 4))
	}
	return minus(strconv.FormatFloat(v, 'f', decimals(v, 4), 64)) + " " + unit
}

// allowed is the limit of a stress as it is printed.
func allowed(x ratings.Stress) string {
	if x.AtLeast {
		return "at least " + minus(quantity.Format(x.Limit, x.Unit, 4))
	}
	return minus(quantity.Format(x.Limit, x.Unit, 4))
}

func joined(list []string) string { return strings.Join(list, " ") }
