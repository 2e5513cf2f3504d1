package ladder

import (
	"fmt"
	"math"
)

// Check reports every way in which the circuit is not one, in words for a
// caller that reads circuits from people. Solve and Estimate need a circuit
// that passes.
func (c Circuit) Check() []error {
	if !c.Topology.Known() {
		return []error{fmt.Errorf("topology %q is not known", c.Topology)}
	}
	var bad faults
	most := c.Topology.MaxStages()
	bad.when(c.Stages < 1 || c.Stages > most, "stages must be 1 to %d, not %d", most, c.Stages)
	if len(bad) > 0 {
		return bad
	}
	if want := c.Topology.CapacitorCount(c.Stages); len(c.Capacitors) != want {
		bad.add("%s of %d stages has %d capacitors, not %d", c.Topology, c.Stages, want, len(c.Capacitors))
	}
	if want := c.Topology.DiodeCount(c.Stages); len(c.Diodes) != want {
		bad.add("%s of %d stages has %d diodes, not %d", c.Topology, c.Stages, want, len(c.Diodes))
	}
	c.Source.check(&bad)
	for i, k := range c.Capacitors {
		k.check(&bad, fmt.Sprintf("C%d", i+1))
	}
	for i, d := range c.Diodes {
		d.check(&bad, fmt.Sprintf("D%d", i+1))
	}
	c.Load.check(&bad)
	bad.notNegative("stray capacitance", c.Stray)
	bad.notNegative("filter resistance", c.Filter.R)
	bad.notNegative("filter capacitance", c.Filter.C)
	bad.when((c.Filter.R > 0) != (c.Filter.C > 0), "a filter needs both a resistance and a capacitance")
	return bad
}

// faults gathers what is wrong.
type faults []error

func (f *faults) add(format string, args ...any) { *f = append(*f, fmt.Errorf(format, args...)) }

func (f *faults) when(wrong bool, format string, args ...any) {
	if wrong {
		f.add(format, args...)
	}
}

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

func (f *faults) positive(what string, x float64) {
	f.when(!finite(x) || x <= 0, "%s must be above zero, not %g", what, x)
}

func (f *faults) notNegative(what string, x float64) {
	f.when(!finite(x) || x < 0, "%s must be zero or above, not %g", what, x)
}

func (s Source) check(bad *faults) {
	bad.positive("source peak", s.Peak)
	bad.positive("source frequency", s.Frequency)
	bad.notNegative("source resistance", s.Resistance)
	bad.notNegative("source leakage inductance", s.Leakage)
	bad.notNegative("ring quality factor", s.RingQ)
	bad.when(!(s.Edge >= 0 && s.Edge <= 0.5), "a square wave's edge must be 0 to 0.5 of a period, not %g", s.Edge)
	switch s.Waveform {
	case "", Sine, Square, Triangle:
	case Table:
		bad.when(len(s.Points) < 3 || len(s.Points) > 10000, "a table waveform needs 3 to 10000 points, not %d", len(s.Points))
		for _, p := range s.Points {
			bad.when(!(math.Abs(p) <= 1), "a waveform point must be −1 to 1 of the peak, not %g", p)
		}
		if high, low := s.wave().crests(); len(s.Points) > 0 {
			bad.when(!(high > low), "a table waveform must change over the period")
		}
	default:
		bad.add("waveform %q is not known", s.Waveform)
	}
}

func (k Capacitor) check(bad *faults, ref string) {
	bad.positive(ref+" capacitance", k.C)
	bad.notNegative(ref+" series resistance", k.ESR)
	bad.notNegative(ref+" leakage", k.Conductance)
	for i, p := range k.Bias {
		bad.when(!(p.Share > 0 && p.Share <= 1), "%s keeps a share of 0 to 1 under bias, not %g", ref, p.Share)
		bad.when(!finite(p.V) || p.V < 0 || i > 0 && p.V <= k.Bias[i-1].V, "%s bias voltages must rise from zero", ref)
	}
}

func (d Diode) check(bad *faults, ref string) {
	bad.positive(ref+" saturation current", d.IS)
	bad.positive(ref+" ideality", d.N)
	bad.notNegative(ref+" series resistance", d.RS)
	bad.notNegative(ref+" junction capacitance", d.CJ0)
	bad.notNegative(ref+" built-in voltage", d.VJ)
	bad.when(!(d.M >= 0 && d.M < 1), "%s grading exponent must be 0 to 1, not %g", ref, d.M)
	bad.notNegative(ref+" transit time", d.Transit)
	bad.notNegative(ref+" leakage", d.Leakage)
	bad.notNegative(ref+" thermal voltage", d.VT)
}

func (l Load) check(bad *faults) {
	bad.notNegative("load current", l.Current)
	bad.notNegative("load resistance", l.Resistance)
	bad.notNegative("load power", l.Power)
	for i, p := range l.Table {
		bad.when(!finite(p.V) || !finite(p.A) || p.V < 0 || p.A < 0 || i > 0 && p.V <= l.Table[i-1].V,
			"a load table needs rising voltages and currents of zero or above")
	}
}
