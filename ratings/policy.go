package ratings

import (
	"slices"
	"strings"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// Policy is a derating policy: for each part kind a list of families, of
// which the first that fits a part judges it. In every family a zero means
// that the policy has no such rule.
type Policy struct {
	Name       string
	Title      string
	Source     string
	SHA256     string // of the policy's bytes, in hex
	Capacitors []CapacitorRules
	Diodes     []DiodeRules
	Resistors  []ResistorRules
	Windings   []WindingRules
}

// Family is what the rules of every part family have in common.
type Family struct {
	Source    string // document, table, level and how it is known
	Remark    string // goes with every number that the family judges
	Forbidden bool   // the document says: not to be used
}

// CapacitorRules judge the capacitors of some technologies.
type CapacitorRules struct {
	Family
	Technologies    []catalog.Technology // empty: any
	Characteristics []string             // empty: any; otherwise the part must have one of them, letter case aside
	Voltage         Shares               // of the rated direct voltage, by ambient
	ACVoltage       quantity.Ratio       // of the rated alternating voltage
	Ripple          quantity.Ratio       // of the rated ripple current at the frequency
	Slew            quantity.Ratio       // of the rated rate of voltage change
	Temperature     TemperatureRule      // of the body, self-heating included
	Life            quantity.Seconds     // the least expected life of an electrolytic
}

// DiodeRules judge the diodes of some types.
type DiodeRules struct {
	Family
	Types            []catalog.DiodeType // empty: any, also a diode without a type
	Reverse          quantity.Ratio      // of the rated repetitive reverse voltage
	ReverseAvalanche quantity.Ratio      // the same for controlled-avalanche types; zero: as Reverse
	Average          quantity.Ratio      // of the rated average current at the ambient
	RepetitivePeak   quantity.Ratio      // of the rated repetitive peak
	PeakTimesAverage int                 // where the sheet gives no repetitive peak: this many times the rated average
	Surge            quantity.Ratio      // of the rated surge current, at equal I²t
	Power            quantity.Ratio      // of the power that heats the junction from 25 °C to its highest
	Junction         TemperatureRule
	RecoveryPeriod   quantity.Ratio // recovery time, at most this share of the period
	RecoveryConduct  quantity.Ratio // the same of the conduction time; the stricter of the two counts
}

// ResistorRules judge the resistors of some technologies.
type ResistorRules struct {
	Family
	Technologies   []string // empty: any
	Power          PowerLine
	WorkingVoltage quantity.Ratio
	PulseEnergy    quantity.Ratio
}

// WindingRules judge windings and inverter modules.
type WindingRules struct {
	Family
	ApparentPower quantity.Ratio
	Insulation    quantity.Ratio  // working voltage across the insulation, of the test voltage
	HotSpot       TemperatureRule // of the winding
}

// SharePoint is a share of a rating that holds at a temperature.
type SharePoint struct {
	Temperature quantity.Celsius
	Share       quantity.Ratio
}

// Shares is a share of a rating by temperature: a single point holds at any,
// several are joined by lines and flat outside. Empty is no rule.
type Shares []SharePoint

// At is the share at a temperature, zero when there is no rule.
func (s Shares) At(t quantity.Celsius) quantity.Ratio {
	for i, p := range s {
		if t > p.Temperature {
			continue
		}
		if i == 0 {
			return p.Share
		}
		q := s[i-1]
		along := float64(t-q.Temperature) / float64(p.Temperature-q.Temperature)
		return q.Share + quantity.Ratio(along*float64(p.Share-q.Share))
	}
	if len(s) == 0 {
		return 0
	}
	return s[len(s)-1].Share
}

// TemperatureRule limits a temperature by the lowest of what it gives.
type TemperatureRule struct {
	Most  quantity.Celsius // at most this
	Below quantity.Kelvins // this far below the maker's highest
	Share quantity.Ratio   // this share of the maker's highest in °C
}

func (r TemperatureRule) given() bool { return r != TemperatureRule{} }

// limit is the highest temperature allowed of a part whose sheet allows most
// (zero: it does not say); false when nothing limits it. A rule never allows
// more than the maker.
func (r TemperatureRule) limit(most quantity.Celsius) (float64, bool) {
	if most == 0 {
		return float64(r.Most), r.Most != 0
	}
	lowest := float64(most) - float64(r.Below)
	if r.Share > 0 {
		lowest = min(lowest, float64(r.Share)*float64(most))
	}
	if r.Most != 0 {
		lowest = min(lowest, float64(r.Most))
	}
	return lowest, true
}

// PowerLine derates a resistor's power. Without To, Share is of the power
// that the maker allows at the ambient. With To, Share holds up to To and
// falls in a line to nothing at Zero; it never passes the maker's own line.
type PowerLine struct {
	Share quantity.Ratio
	To    quantity.Celsius
	Zero  quantity.Celsius // zero: the maker's highest temperature
}

// capacitorRules gives the family that judges the part, or one without rules.
func (p *Policy) capacitorRules(c *catalog.Capacitor) *CapacitorRules {
	for i := range p.Capacitors {
		r := &p.Capacitors[i]
		if fits(r.Technologies, c.Technology) && fitsWord(r.Characteristics, c.Characteristic) {
			return r
		}
	}
	return &CapacitorRules{}
}

func (p *Policy) diodeRules(d *catalog.Diode) *DiodeRules {
	for i := range p.Diodes {
		if fits(p.Diodes[i].Types, d.Type) {
			return &p.Diodes[i]
		}
	}
	return &DiodeRules{}
}

func (p *Policy) resistorRules(r *catalog.Resistor) *ResistorRules {
	for i := range p.Resistors {
		if fitsWord(p.Resistors[i].Technologies, r.Technology) {
			return &p.Resistors[i]
		}
	}
	return &ResistorRules{}
}

func (p *Policy) windingRules() *WindingRules {
	if len(p.Windings) > 0 {
		return &p.Windings[0]
	}
	return &WindingRules{}
}

func fits[S ~string](list []S, word S) bool { return len(list) == 0 || slices.Contains(list, word) }

func fitsWord(list []string, word string) bool {
	return len(list) == 0 || slices.ContainsFunc(list, func(w string) bool { return strings.EqualFold(w, word) })
}
