package optimize

import (
	"math"

	"rungwright/catalog/quantity"
	"rungwright/optimize/ladder"
)

// condition is a corner at which designs are simulated.
type condition struct {
	name     string
	line     float64 // factor on the source
	fullLoad bool
	values   float64 // −1: capacitors at their lowest, +1: at their highest, 0: nominal
	junction quantity.Celsius
}

// conditionsFor lists the corners in the order in which designs most often
// fail: output and ripple at low line, then voltages at no load, then currents.
// The diodes are taken hot where that costs output and at ambient elsewhere.
func conditionsFor(s *Supply) []condition {
	line, ambient := float64(s.Source.Line), s.Surroundings.Ambient
	return []condition{
		{"full load, low line", 1 - line, true, -1, ambient + junctionRise},
		{"least load, high line", 1 + line, false, 1, ambient},
		{"full load, high line", 1 + line, true, 1, ambient + junctionRise},
	}
}

// junctionRise is how far a working junction is taken to stand above ambient
// for the circuit; its own temperature is judged from its own losses.
const junctionRise = quantity.Celsius(15)

// circuit is the plan at a condition.
func (e *evaluator) circuit(p *Plan, at condition) ladder.Circuit {
	s := &e.supply.Source
	c := ladder.Circuit{
		Topology: p.Topology, Stages: p.Stages, Negative: e.supply.Output.Negative,
		Source: ladder.Source{Waveform: s.Waveform, Peak: float64(s.Peak) * at.line, Frequency: float64(s.Frequency),
			Resistance: float64(s.Resistance), Leakage: float64(s.Leakage), RingQ: ringQ},
		Load: e.load(at.fullLoad),
	}
	if p.Surge.Part != nil {
		c.Source.Resistance += float64(p.Surge.Part.Resistor.Resistance) * float64(p.Surge.Series) / float64(p.Surge.Parallel)
	}
	if p.Bleeder.Part != nil {
		c.Load.Resistance = parallel(c.Load.Resistance, bleederOhms(p.Bleeder))
	}
	for _, g := range p.Capacitors {
		c.Capacitors = append(c.Capacitors, capacitorModel(g.Part.Capacitor, g.Series, g.Parallel, valueFactor(g, at.values), float64(s.Frequency)))
	}
	for _, g := range p.Diodes {
		c.Diodes = append(c.Diodes, e.diode(g, at.junction))
	}
	return c
}

// valueFactor is what tolerance, temperature and ageing make of the value.
func valueFactor(g Group, way float64) float64 {
	k := g.Part.Capacitor
	switch {
	case way < 0:
		return (1 - float64(k.ToleranceLow)) * drift(k)
	case way > 0:
		return 1 + float64(k.ToleranceHigh)
	}
	return 1
}

func bleederOhms(g Group) float64 {
	return float64(g.Part.Resistor.Resistance) * float64(g.Series) / float64(g.Parallel)
}

// parallel is two resistances side by side; zero means none.
func parallel(a, b float64) float64 {
	if a == 0 {
		return b
	}
	if b == 0 {
		return a
	}
	return a * b / (a + b)
}

// load is the supply's own load, least or most.
func (e *evaluator) load(full bool) ladder.Load {
	l := e.supply.Output.Load
	if l.Resistance > 0 {
		return ladder.Load{Resistance: float64(l.Resistance)}
	}
	if full {
		return ladder.Load{Current: float64(l.Most)}
	}
	return ladder.Load{Current: float64(l.Least)}
}

// fullCurrent is the load current at the wanted output.
func (s *Supply) fullCurrent() float64 {
	if s.Output.Load.Resistance > 0 {
		return float64(s.Output.Voltage) / float64(s.Output.Load.Resistance)
	}
	return float64(s.Output.Load.Most)
}

// lowest and highest are the edges of the window [V].
func (s *Supply) lowest() float64  { return float64(s.Output.Voltage) * (1 - float64(s.Output.Window)) }
func (s *Supply) highest() float64 { return float64(s.Output.Voltage) * (1 + float64(s.Output.Window)) }

// diode is the model of a string of equal diodes.
func (e *evaluator) diode(g Group, junction quantity.Celsius) ladder.Diode {
	key := diodeKeyAt{g.Part.Number, g.Series, junction}
	e.mu.Lock()
	defer e.mu.Unlock()
	if d, ok := e.diodes[key]; ok {
		return d
	}
	fit, ok := e.fits[g.Part.Number]
	if !ok {
		fit = FitDiode(g.Part.Diode.Forward)
		e.fits[g.Part.Number] = fit
	}
	d := diodeModel(g.Part.Diode, fit, junction)
	if s := float64(g.Series); s > 1 {
		d.N *= s
		d.RS *= s
		d.VJ *= s
		d.CJ0 /= s
		d.Leakage /= s
	}
	e.diodes[key] = d
	return d
}

type diodeKeyAt struct {
	number   string
	series   int
	junction quantity.Celsius
}

// columnCapacitance is the smoothing capacitors as seen from the output at
// their highest [F].
func columnCapacitance(c *ladder.Circuit) float64 {
	sum := 0.0
	for k, smoothing := range c.Topology.SmoothingColumn(c.Stages) {
		if smoothing {
			sum += 1 / c.Capacitors[k].C
		}
	}
	if c.Topology == ladder.ParallelFed { // each stands to ground: the top one alone
		return c.Capacitors[len(c.Capacitors)-1].C
	}
	return 1 / sum
}

// storedEnergy is what all capacitors hold at their greatest voltages [J].
func storedEnergy(c *ladder.Circuit, s *ladder.Steady) float64 {
	sum := 0.0
	for k := range c.Capacitors {
		v := math.Max(s.Capacitors[k].MaxV, -s.Capacitors[k].MinV)
		sum += c.Capacitors[k].C * v * v / 2
	}
	return sum
}

// ringQ is how sharply a winding's leakage inductance rings with the ladder:
// copper and core losses damp real ones to a few swings (common practice, no
// source).
const ringQ = 3
