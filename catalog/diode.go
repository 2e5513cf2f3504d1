package catalog

import (
	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// DiodeType is a rectifier family.
type DiodeType string

// The diode types.
const (
	Standard    DiodeType = "standard"
	Fast        DiodeType = "fast"
	Ultrafast   DiodeType = "ultrafast"
	Schottky    DiodeType = "schottky"
	HighVoltage DiodeType = "high-voltage" // stacked junctions in one body
)

// Diode is what a rectifier's sheet says. Zero means not stated.
type Diode struct {
	Type              DiodeType
	ReverseVoltage    quantity.Volts // repetitive peak
	AverageCurrent    quantity.Amps
	AverageAt         quantity.Celsius // ambient up to which AverageCurrent holds
	RepetitivePeak    quantity.Amps
	SurgeCurrent      quantity.Amps // one half-sine of SurgeTime, non-repetitive
	SurgeTime         quantity.Seconds
	Forward           []ForwardPoint // rising current, rising voltage
	Capacitance       JunctionCapacitance
	Recovery          Recovery
	Leakage           LeakagePoint
	LeakageHot        LeakagePoint
	ThermalResistance quantity.KelvinPerWatt // junction to ambient
	Junction          quantity.Celsius       // the highest allowed
	Avalanche         bool                   // controlled avalanche
}

// ForwardPoint is one point of the forward curve at 25 °C.
type ForwardPoint struct {
	Current quantity.Amps
	Voltage quantity.Volts
}

// JunctionCapacitance is the capacitance at a reverse voltage.
type JunctionCapacitance struct {
	At    quantity.Volts
	Value quantity.Farads
}

// Recovery is the reverse recovery test.
type Recovery struct {
	Time    quantity.Seconds
	Forward quantity.Amps
	Reverse quantity.Amps
}

// LeakagePoint is the reverse current at a voltage and temperature.
type LeakagePoint struct {
	At          quantity.Volts
	Value       quantity.Amps
	Temperature quantity.Celsius // zero: 25 °C
}

var diodeTypes = []DiodeType{Standard, Fast, Ultrafast, Schottky, HighVoltage}

func readDiode(p *Part, m *form.Map) {
	m.Require("reverse_voltage", "average_current", "forward")
	p.Diode = &Diode{
		Type:              DiodeType(m.Choice("type", words(diodeTypes)...)),
		ReverseVoltage:    get(m, "reverse_voltage", form.Positive, mostVoltage),
		AverageCurrent:    get(m, "average_current", form.Positive, mostCurrent),
		AverageAt:         get(m, "average_at", form.Any, mostCelsius),
		RepetitivePeak:    get(m, "repetitive_peak", form.Positive, mostCurrent),
		SurgeCurrent:      get(m, "surge_current", form.Positive, 100*mostCurrent),
		SurgeTime:         form.Get[quantity.Seconds](m, "surge_time", form.Positive),
		Forward:           readForward(m),
		Capacitance:       readJunctionCapacitance(m.Map("capacitance")),
		Recovery:          readRecovery(m.Map("recovery")),
		Leakage:           readLeakage(m.Map("leakage")),
		LeakageHot:        readLeakage(m.Map("leakage_hot")),
		ThermalResistance: form.Get[quantity.KelvinPerWatt](m, "thermal_resistance", form.Positive),
		Junction:          get(m, "junction", form.Positive, mostCelsius),
		Avalanche:         m.Bool("avalanche"),
	}
}

// readForward reads a curve whose voltage never falls.
func readForward(m *form.Map) []ForwardPoint {
	points, ok := curve[quantity.Amps, quantity.Volts](m, "forward", "[10 mA, 3.8 V]", form.Positive, form.Positive)
	if ok && m.Has("forward") && len(points) == 0 {
		m.Problem("forward", "there is no point; write at least one, such as [[10 mA, 3.8 V]]")
	}
	var forward []ForwardPoint
	for i, p := range points {
		if i > 0 && p.y < points[i-1].y {
			p.yItem.Problem("the forward voltage falls from %v to %v as the current rises; check both points", points[i-1].y, p.y)
		}
		forward = append(forward, ForwardPoint{p.x, p.y})
	}
	return forward
}

func readJunctionCapacitance(m *form.Map) JunctionCapacitance {
	m.Require("value")
	c := JunctionCapacitance{
		At:    get(m, "at", form.NotNegative, mostVoltage),
		Value: get(m, "value", form.Positive, mostCapacitance),
	}
	m.Done()
	return c
}

func readRecovery(m *form.Map) Recovery {
	m.Require("time")
	r := Recovery{
		Time:    form.Get[quantity.Seconds](m, "time", form.Positive),
		Forward: get(m, "forward", form.Positive, mostCurrent),
		Reverse: get(m, "reverse", form.Positive, mostCurrent),
	}
	m.Done()
	return r
}

func readLeakage(m *form.Map) LeakagePoint {
	m.Require("at", "value")
	l := LeakagePoint{
		At:          get(m, "at", form.Positive, mostVoltage),
		Value:       get(m, "value", form.NotNegative, mostCurrent),
		Temperature: get(m, "temperature", form.Any, mostCelsius),
	}
	m.Done()
	return l
}

func diodeTitle(p *Part) string {
	d := p.Diode
	recovery := ""
	if d.Recovery.Time > 0 {
		recovery = d.Recovery.Time.String()
	}
	return join(d.ReverseVoltage.String(), d.AverageCurrent.String(), recovery, string(d.Type), "diode")
}
