package catalog_test

import (
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/google/go-cmp/cmp/cmpopts"

	"rungwright/catalog"
	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

const sound = `
catalog: Bench drawer
suppliers:
  - {name: Fellmarket, currency: EUR, delivery: 7.50 EUR, free_above: 75 EUR, small_order: 50 EUR, small_order_fee: 10 EUR}
parts:
  - part: TVD-2K2-F
    maker: Tarnvale
    kind: diode
    type: fast
    reverse_voltage: 2.2 kV
    average_current: 30 mA
    average_at: 55 °C
    repetitive_peak: 0.3 A
    surge_current: 1 A
    surge_time: 8.3 ms
    forward: [[1 mA, 2.9 V], [10 mA, 3.8 V], [30 mA, 4.9 V]]
    capacitance: {at: 0 V, value: 2.4 pF}
    recovery: {time: 60 ns, forward: 2 mA, reverse: 4 mA}
    leakage: {at: 2.2 kV, value: 0.5 uA}
    leakage_hot: {at: 2.2 kV, value: 20 uA, temperature: 100 °C}
    thermal_resistance: 90 K/W
    junction: 150 °C
    avalanche: true
  - part: QLF-HV-103-3K
    maker: Quillfen
    kind: capacitor
    description: Disc, radial leads
    technology: ceramic class 2
    characteristic: X7R
    capacitance: 10 nF
    tolerance: -20/+80 %
    voltage: 3 kV
    ac_voltage: 1 kV
    bias: [[0 V, 100 %], [1.5 kV, 74 %], [3 kV, 41 %]]
    loss_factor: 2.5 %
    loss_at: 1 kHz
    esr: 30 mohm
    leakage: 1 uA
    slew: 50 V/us
    ageing: 2.5 %
    ripple: {current: 0.1 A, frequency: 120 Hz, temperature: 85 °C, core_rise: 5 K, multipliers: [[120 Hz, 100 %], [1 kHz, 130 %]]}
    life: {time: 5000 h, temperature: 105 °C}
    temperature: {least: -55 °C, most: 125 °C}
    size: {length: 10 mm, width: 5 mm, height: 11 mm}
    mounting: through-hole
    status: not for new designs
    offers:
      - supplier: Fellmarket
        order_code: FM-88213
        stock: 4200
        lead: 3 wk
        least: 10
        multiple: 5
        prices: [[1, 0.62 EUR], [100, 0.41 EUR]]
`

func ExampleReadBytes() {
	c, err := catalog.ReadBytes("drawer.yaml", []byte(sound))
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, p := range c.Parts {
		fmt.Println(p.Number, p.Title())
	}
	fmt.Println(c.Find("qlf-hv-103-3k").Capacitor.CapacitanceAt(1500))
	// Output:
	// QLF-HV-103-3K 10 nF -20/+80 % 3 kV X7R ceramic class 2
	// TVD-2K2-F 2.2 kV 30 mA 60 ns fast diode
	// 7.4 nF
}

func ExampleReadBytes_mistakes() {
	_, err := catalog.ReadBytes("caps.yaml", []byte(`parts:
  - part: C1
    maker: M
    kind: capacitor
    technology: film
    capacitance: 10
    tolerence: 400 %
    voltage: 3 kV
`))
	fmt.Println(err)
	// Output:
	// caps.yaml:6:18: parts.capacitance: "10" has no unit; write a number and a unit, such as 4.7 nF
	// caps.yaml:7:5: unknown key "tolerence"; did you mean "tolerance"?
}

// Every key reaches its field.
func TestReadsEveryField(t *testing.T) {
	c, err := catalog.ReadBytes("drawer.yaml", []byte(sound))
	if err != nil {
		t.Fatal(err)
	}
	price := c.Parts[0].Offers[0].Prices[1].Price
	want := []*catalog.Part{
		{
			Number: "QLF-HV-103-3K", Maker: "Quillfen", Kind: catalog.KindCapacitor, Description: "Disc, radial leads",
			Mounting: catalog.ThroughHole, Status: catalog.NotForNew,
			Size: catalog.Size{Length: 10e-3, Width: 5e-3, Height: 11e-3}, Temperature: catalog.Range{Least: -55, Most: 125},
			Offers: []catalog.Offer{{Supplier: "Fellmarket", OrderCode: "FM-88213", Stock: 4200, LeadDays: 21, Least: 10, Multiple: 5,
				Prices: []catalog.Break{{Quantity: 1, Price: c.Parts[0].Offers[0].Prices[0].Price}, {Quantity: 100, Price: price}},
				Place:  form.Place{File: "drawer.yaml", Line: 48, Column: 9}}},
			Place: form.Place{File: "drawer.yaml", Line: 24, Column: 11},
			Capacitor: &catalog.Capacitor{
				Technology: catalog.CeramicClass2, Characteristic: "X7R", Capacitance: 10e-9, ToleranceLow: 0.2, ToleranceHigh: 0.8,
				Voltage: 3e3, ACVoltage: 1e3, Bias: []catalog.BiasPoint{{Voltage: 0, Share: 1}, {Voltage: 1500, Share: 0.74}, {Voltage: 3000, Share: 0.41}},
				LossFactor: 0.025, LossAt: 1e3, ESR: 0.03, Leakage: 1e-6, Slew: 50e6, Ageing: 0.025,
				Ripple: catalog.RippleRating{Current: 0.1, Frequency: 120, Temperature: 85, CoreRise: 5,
					Multipliers: []catalog.FrequencyFactor{{Frequency: 120, Factor: 1}, {Frequency: 1000, Factor: 1.3}}},
				Life: catalog.LifeRating{Time: 5000 * 3600, Temperature: 105},
			},
		},
		{
			Number: "TVD-2K2-F", Maker: "Tarnvale", Kind: catalog.KindDiode, Status: catalog.Active, Place: form.Place{File: "drawer.yaml", Line: 6, Column: 11},
			Diode: &catalog.Diode{
				Type: catalog.Fast, ReverseVoltage: 2200, AverageCurrent: 0.03, AverageAt: 55, RepetitivePeak: 0.3, SurgeCurrent: 1, SurgeTime: 8.3e-3,
				Forward:     []catalog.ForwardPoint{{Current: 1e-3, Voltage: 2.9}, {Current: 10e-3, Voltage: 3.8}, {Current: 30e-3, Voltage: 4.9}},
				Capacitance: catalog.JunctionCapacitance{At: 0, Value: 2.4e-12}, Recovery: catalog.Recovery{Time: 60e-9, Forward: 2e-3, Reverse: 4e-3},
				Leakage: catalog.LeakagePoint{At: 2200, Value: 0.5e-6}, LeakageHot: catalog.LeakagePoint{At: 2200, Value: 20e-6, Temperature: 100},
				ThermalResistance: 90, Junction: 150, Avalanche: true,
			},
		},
	}
	if diff := cmp.Diff(want, c.Parts); diff != "" {
		t.Error(diff)
	}
	if price.String() != "0.41 EUR" || c.Title != "Bench drawer" {
		t.Errorf("price %v, title %q", price, c.Title)
	}
	s := c.Suppliers[0]
	if got := fmt.Sprint(s.Name, s.Currency, s.Delivery, s.FreeAbove, s.SmallOrder, s.SmallOrderFee); got != "FellmarketEUR7.50 EUR 75.00 EUR 50.00 EUR 10.00 EUR" {
		t.Errorf("supplier %s", got)
	}
	// The hash of the bytes as sha256sum prints it.
	if got := c.Inputs[0]; got.Name != "drawer.yaml" || len(got.SHA256) != 64 {
		t.Errorf("input %v", got)
	}
}

func TestReadsOtherKinds(t *testing.T) {
	c, err := catalog.ReadBytes("f.yaml", []byte(`
parts:
  - {part: R1, maker: M, kind: resistor, technology: metal film, resistance: 4k7, tolerance: F, power: 250 mW, power_at: 70 °C, working_voltage: 250 V, pulse_energy: 2 J}
  - {part: W1, maker: M, kind: winding, type: transformer, rms: 9 V, no_load_rise: 25 %, power: 6 VA, frequency: {least: 50 Hz, most: 60 Hz},
     resistance: 2 ohm, leakage: 1 mH, centre_tap: true, isolated: true, test_voltage: 3.75 kV}
  - {part: W2, maker: M, kind: winding, type: inverter, peak: 700 V, frequency: 32 kHz, waveform: square}
  - {part: X1, maker: M, kind: other, category: fuse}
  - {part: C1, maker: M, kind: capacitor, technology: mica, capacitance: 4.7 pF, tolerance: C, voltage: 500 V}
  - {part: C2, maker: M, kind: capacitor, technology: mica, capacitance: 47 pF, tolerance: C, voltage: 500 V}
  - {part: C3, maker: M, kind: capacitor, technology: mica, capacitance: 5 pF, tolerance: 0.5 pF, voltage: 500 V}
`))
	if err != nil {
		t.Fatal(err)
	}
	near := cmpopts.EquateApprox(1e-12, 0)
	if diff := cmp.Diff(&catalog.Resistor{Technology: "metal film", Resistance: 4700, ToleranceLow: 0.01, ToleranceHigh: 0.01, Power: 0.25,
		PowerAt: 70, WorkingVoltage: 250, PulseEnergy: 2}, c.Find("r1").Resistor, near); diff != "" {
		t.Error(diff)
	}
	if diff := cmp.Diff(&catalog.Winding{Type: "transformer", Peak: 12.727922061357857, NoLoadRise: 0.25, Power: 6, FrequencyMin: 50, FrequencyMax: 60,
		Resistance: 2, Leakage: 1e-3, Waveform: "sine", CentreTap: true, Isolated: true, TestVoltage: 3750}, c.Find("W1").Winding, near); diff != "" {
		t.Error(diff)
	}
	if w := c.Find("W2").Winding; w.FrequencyMin != 32e3 || w.FrequencyMax != 32e3 || w.RMS() != 700 {
		t.Errorf("square wave: %+v, rms %v", w, w.RMS())
	}
	if got := c.Find("W1").Winding.RMS(); got < 8.999999 || got > 9.000001 {
		t.Errorf("rms is %v, want 9 V", got)
	}
	// IEC 60062 (from memory): C is ±0.25 pF below 10 pF, ±0.25 % above.
	for number, want := range map[string]float64{"C1": 0.25 / 4.7, "C2": 0.0025, "C3": 0.1} {
		if got := float64(c.Find(number).Capacitor.ToleranceLow); got < want*0.999999 || got > want*1.000001 {
			t.Errorf("%s: tolerance %v, want %v", number, got, want)
		}
	}
}

func TestTitles(t *testing.T) {
	c, err := catalog.ReadBytes("f.yaml", []byte(sound+`
  - {part: R1, maker: M, kind: resistor, technology: metal film, resistance: 4k7, tolerance: 1 %, power: 250 mW, working_voltage: 250 V}
  - {part: W1, maker: M, kind: winding, type: transformer, rms: 9 V, power: 6 VA, frequency: {least: 50 Hz, most: 60 Hz}, centre_tap: true}
  - {part: W2, maker: M, kind: winding, type: inverter, peak: 700 V, power: 6 VA, frequency: 32 kHz}
  - {part: X1, maker: M, kind: other, category: fuse}
  - {part: X2, maker: M, kind: other, category: fuse, description: "fuse link, slow, 100 mA"}
`))
	if err != nil {
		t.Fatal(err)
	}
	for number, want := range map[string]string{
		"QLF-HV-103-3K": "10 nF -20/+80 % 3 kV X7R ceramic class 2", "TVD-2K2-F": "2.2 kV 30 mA 60 ns fast diode", "R1": "4.7 kΩ ±1 % 250 mW 250 V metal film resistor",
		"W1": "2 × 9 V RMS 6 VA 50 Hz to 60 Hz transformer winding", "W2": "700 V peak 6 VA 32 kHz inverter", "X1": "fuse X1", "X2": "fuse link, slow, 100 mA",
	} {
		if got := c.Find(number).Title(); got != want {
			t.Errorf("%s is called %q, want %q", number, got, want)
		}
	}
}

func TestFindAndNear(t *testing.T) {
	c := catalog.Demo()
	p := c.Parts[len(c.Parts)/2]
	for _, spelled := range []string{p.Number, strings.ToLower(p.Number), " " + p.Number + " ", strings.Join(strings.Split(p.Number, ""), " ")} {
		if c.Find(spelled) != p {
			t.Errorf("%q is not found", spelled)
		}
	}
	if c.Find("") != nil || c.Find("no such part") != nil {
		t.Error("a part was found for no number")
	}
	slip := p.Number[:len(p.Number)-1] + "#"
	if near := c.Near(slip, 5); len(near) == 0 || len(near) > 5 || near[0] != p {
		t.Errorf("near %q: %v", slip, near)
	}
	if near := c.Near(strings.Repeat("x", 1000), 5); near != nil {
		t.Errorf("near nonsense: %v", near)
	}
	byHand := &catalog.Catalog{Parts: []*catalog.Part{{Number: "A b"}}}
	if byHand.Find("aB") == nil {
		t.Error("a catalog made by hand is not searched")
	}
}

func TestCapacitanceAt(t *testing.T) {
	c := &catalog.Capacitor{Capacitance: 10e-9, Bias: []catalog.BiasPoint{{Voltage: 0, Share: 1}, {Voltage: 1000, Share: 0.8}, {Voltage: 3000, Share: 0.4}}}
	for bias, want := range map[float64]float64{0: 10e-9, 500: 9e-9, 1000: 8e-9, 2000: 6e-9, 3000: 4e-9, 9000: 4e-9, -2000: 6e-9} {
		if got := float64(c.CapacitanceAt(quantity.Volts(bias))); got < want*0.999999 || got > want*1.000001 {
			t.Errorf("at %v V it has %v F, want %v", bias, got, want)
		}
	}
	if plain := (&catalog.Capacitor{Capacitance: 1e-9}); plain.CapacitanceAt(1e4) != 1e-9 {
		t.Error("without a bias curve the capacitance changes")
	}
}

// The demo reads without a problem and has what the trade's range asks for.
func TestDemo(t *testing.T) {
	c := catalog.Demo()
	count := map[catalog.Kind]int{}
	for _, p := range c.Parts {
		count[p.Kind]++
		if len(p.Offers) == 0 || p.Title() == "" {
			t.Errorf("%s has no offer or no title", p.Number)
		}
	}
	for kind, least := range map[catalog.Kind]int{catalog.KindCapacitor: 150, catalog.KindDiode: 50, catalog.KindResistor: 60, catalog.KindWinding: 10, catalog.KindOther: 15} {
		if count[kind] < least {
			t.Errorf("the demo has %d of kind %s, want %d", count[kind], kind, least)
		}
	}
	if len(c.Suppliers) < 5 {
		t.Errorf("the demo has %d suppliers, want 5", len(c.Suppliers))
	}
	if c != catalog.Demo() {
		t.Error("the demo is read twice")
	}
}

func write(t *testing.T, dir string, files map[string]string) {
	t.Helper()
	for name, data := range files {
		if err := os.WriteFile(filepath.Join(dir, name), []byte(data), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}

func onePart(number string) string {
	return fmt.Sprintf("parts:\n  - {part: %s, maker: M, kind: other, category: fuse}\n", number)
}

// Files and folders are read in the order given, a folder's files by name.
func TestReadsFilesAndFolders(t *testing.T) {
	t.Chdir(t.TempDir())
	if err := os.MkdirAll("folder/inner.yaml", 0o755); err != nil {
		t.Fatal(err)
	}
	write(t, ".", map[string]string{"z.yaml": onePart("Z")})
	write(t, "folder", map[string]string{"b.yml": onePart("B"), "a.yaml": onePart("A"), "notes.txt": "not YAML: ["})
	c, err := catalog.Read("z.yaml", "folder", "./z.yaml", "folder/a.yaml")
	if err != nil {
		t.Fatal(err)
	}
	var names, numbers []string
	for _, in := range c.Inputs {
		names = append(names, in.Name)
	}
	for _, p := range c.Parts {
		numbers = append(numbers, p.Number)
	}
	if got := fmt.Sprint(names, numbers); got != "[z.yaml folder/a.yaml folder/b.yml] [A B Z]" {
		t.Errorf("got %s", got)
	}
}

// What cannot be read is told for all paths at once.
func TestUnreadablePaths(t *testing.T) {
	t.Chdir(t.TempDir())
	if err := os.Mkdir("empty", 0o755); err != nil {
		t.Fatal(err)
	}
	write(t, ".", map[string]string{"void.yaml": "", "pic.yaml": "\x89PNG\r\n\x1a\n\x00", "supply.yaml": "supply: x\n", "twin.yaml": onePart("x-1"), "twin2.yaml": onePart("X - 1")})
	_, err := catalog.Read("empty", "gone.yaml", "pic.yaml", "supply.yaml", "void.yaml", "/dev/null", "twin.yaml", "twin2.yaml")
	want := `/dev/null: is not a plain file; name a catalog file or a folder
empty: the folder holds no catalog; put *.yaml files in it, or name another
gone.yaml: no such file; check the spelling and the folder
pic.yaml:1:1: the file is not text; name a YAML file, in UTF-8
supply.yaml:1:1: this is no catalog, which has the key parts or suppliers; it looks like a supply file
twin2.yaml:2:12: the part number "X - 1" is taken already by "x-1" of M at twin.yaml:2:12; numbers must differ in more than spaces and letter case
void.yaml:1:1: the file is empty`
	if diff := cmp.Diff(want, fmt.Sprint(err)); diff != "" {
		t.Error(diff)
	}
}

func FuzzRead(f *testing.F) {
	f.Add([]byte(sound))
	f.Add([]byte("parts:\n  - {part: W1, maker: M, kind: winding, rms: 9 V, frequency: {least: 50 Hz, most: 60 Hz}}\n"))
	f.Add([]byte("parts: [{kind: resistor, resistance: 4k7, tolerance: Z, power: 1 W}, {kind: other}]\nsuppliers: [{}]\n"))
	f.Fuzz(func(t *testing.T, data []byte) {
		c, err := catalog.ReadBytes("f.yaml", data)
		problems, _ := errors.AsType[form.Problems](err)
		if (c == nil) == (err == nil) || err != nil && len(problems) == 0 {
			t.Fatalf("neither a catalog nor problems: %v, %v", c, err)
		}
		for _, p := range problems {
			if p.Place.Line < 1 || p.Place.Column < 1 {
				t.Fatalf("no place: %v", p)
			}
		}
		if c == nil {
			return
		}
		for _, p := range c.Parts {
			_ = p.Title()
			if p.Capacitor != nil {
				if v := p.Capacitor.CapacitanceAt(1e3); !(v > 0) {
					t.Fatalf("%s has %v at 1 kV", p.Number, v)
				}
			}
		}
	})
}
