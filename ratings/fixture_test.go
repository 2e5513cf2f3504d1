package ratings

import (
	"math"
	"testing"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// The parts of the tests are invented; each test changes what it needs.

func capacitor(change func(p *catalog.Part, c *catalog.Capacitor)) *catalog.Part {
	c := &catalog.Capacitor{Technology: catalog.CeramicClass2, Capacitance: 10e-9, Voltage: 1000}
	p := &catalog.Part{Number: "CAP", Kind: catalog.KindCapacitor, Temperature: catalog.Range{Least: -55, Most: 125}, Capacitor: c}
	if change != nil {
		change(p, c)
	}
	return p
}

func electrolytic(change func(p *catalog.Part, c *catalog.Capacitor)) *catalog.Part {
	return capacitor(func(p *catalog.Part, c *catalog.Capacitor) {
		*c = catalog.Capacitor{Technology: catalog.AluminiumElectrolytic, Capacitance: 100e-6, Voltage: 50,
			Ripple: catalog.RippleRating{Current: 0.1, Frequency: 120, Temperature: 105, CoreRise: 5},
			Life:   catalog.LifeRating{Time: 2000 * 3600, Temperature: 105}}
		p.Temperature.Most = 105
		if change != nil {
			change(p, c)
		}
	})
}

func diode(change func(d *catalog.Diode)) *catalog.Part {
	d := &catalog.Diode{Type: catalog.Fast, ReverseVoltage: 1000, AverageCurrent: 1, AverageAt: 50, RepetitivePeak: 8,
		SurgeCurrent: 30, SurgeTime: 8.3e-3, ThermalResistance: 50, Junction: 150,
		Leakage: catalog.LeakagePoint{At: 1000, Value: 1e-9}, Recovery: catalog.Recovery{Time: 100e-9}}
	if change != nil {
		change(d)
	}
	return &catalog.Part{Number: "DIO", Kind: catalog.KindDiode, Temperature: catalog.Range{Least: -55, Most: 150}, Diode: d}
}

func resistor(change func(p *catalog.Part, r *catalog.Resistor)) *catalog.Part {
	r := &catalog.Resistor{Technology: "metal film", Resistance: 1e6, Power: 1, PowerAt: 70, WorkingVoltage: 500, PulseEnergy: 2}
	p := &catalog.Part{Number: "RES", Kind: catalog.KindResistor, Temperature: catalog.Range{Least: -55, Most: 155}, Resistor: r}
	if change != nil {
		change(p, r)
	}
	return p
}

func winding(change func(p *catalog.Part, w *catalog.Winding)) *catalog.Part {
	w := &catalog.Winding{Peak: 100 * math.Sqrt2, Power: 10, Waveform: "sine", TestVoltage: 4000}
	p := &catalog.Part{Number: "WIN", Kind: catalog.KindWinding, Temperature: catalog.Range{Least: -20, Most: 130}, Winding: w}
	if change != nil {
		change(p, w)
	}
	return p
}

func shippedPolicy(t testing.TB, name string) *Policy {
	t.Helper()
	p, err := ReadPolicy(name)
	if err != nil {
		t.Fatal(err)
	}
	return p
}

// policyText reads a policy from text, with its head put in front.
func policyText(t testing.TB, rules string) *Policy {
	t.Helper()
	p, err := ReadPolicyBytes("house.yaml", []byte("policy: house\ntitle: House rules\nsource: house rules\n"+rules))
	if err != nil {
		t.Fatal(err)
	}
	return p
}

// find gives the stress of that name from one use.
func find(t testing.TB, p *Policy, part *catalog.Part, u Use, name string) Stress {
	t.Helper()
	s, ok := lookFor(p, part, u, name)
	if !ok {
		t.Fatalf("no stress %q in %+v", name, Judge(p, part, []Use{u}))
	}
	return s
}

func lookFor(p *Policy, part *catalog.Part, u Use, name string) (Stress, bool) {
	for _, s := range Judge(p, part, []Use{u}) {
		if s.Quantity == name {
			return s, true
		}
	}
	return Stress{}, false
}

// near tells whether two figures agree to a few parts in 10⁹.
func near(got, want float64) bool {
	return got == want || math.Abs(got-want) <= 1e-8*math.Max(math.Abs(got), math.Abs(want))
}

// above is a value just over another, by a part in a million.
func above(v float64) float64 { return v * (1 + 1e-6) }

func volt(v float64) quantity.Volts      { return quantity.Volts(v) }
func celsius(v float64) quantity.Celsius { return quantity.Celsius(v) }

func amp(v float64) quantity.Amps         { return quantity.Amps(v) }
func second(v float64) quantity.Seconds   { return quantity.Seconds(v) }
func watt(v float64) quantity.Watts       { return quantity.Watts(v) }
func joule(v float64) quantity.Joules     { return quantity.Joules(v) }
func voltAmp(v float64) quantity.VoltAmps { return quantity.VoltAmps(v) }
