package ratings

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"rungwright/catalog"
	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// glass is a technology that documents have rules for and catalogs do not
// know yet; a policy carries its document's table whole.
const glass catalog.Technology = "glass"

var (
	technologies = []catalog.Technology{catalog.CeramicClass1, catalog.CeramicClass2, catalog.Film,
		catalog.AluminiumElectrolytic, catalog.Mica, catalog.Tantalum, glass}
	diodeTypes = []catalog.DiodeType{catalog.Standard, catalog.Fast, catalog.Ultrafast, catalog.Schottky, catalog.HighVoltage}
)

// policyOf reads the whole file.
func policyOf(top *form.Map) *Policy {
	top.Require("policy", "title", "source")
	p := &Policy{
		Name:   top.Text("policy"),
		Title:  top.Text("title"),
		Source: top.Text("source"),
	}
	for _, m := range top.Maps("capacitors") {
		p.Capacitors = append(p.Capacitors, capacitorFamily(m, p.Source))
	}
	for _, m := range top.Maps("diodes") {
		p.Diodes = append(p.Diodes, diodeFamily(m, p.Source))
	}
	for _, m := range top.Maps("resistors") {
		p.Resistors = append(p.Resistors, resistorFamily(m, p.Source))
	}
	for i, m := range top.Maps("windings") {
		p.Windings = append(p.Windings, windingFamily(m, p.Source))
		if i > 0 {
			m.Problem("", "the first entry judges every winding; join the two")
		}
	}
	if !top.Has("capacitors") && !top.Has("diodes") && !top.Has("resistors") && !top.Has("windings") {
		top.Problem("", "there is no rule; write capacitors, diodes, resistors or windings")
	}
	top.Done()
	return p
}

func familyOf(m *form.Map, source string) Family {
	return Family{
		Source:    cmp.Or(m.Text("source"), source),
		Remark:    m.Text("remark"),
		Forbidden: m.Bool("forbidden"),
	}
}

func capacitorFamily(m *form.Map, source string) CapacitorRules {
	r := CapacitorRules{
		Family:          familyOf(m, source),
		Technologies:    choices(m, "technology", technologies),
		Characteristics: texts(m, "characteristic"),
		Voltage:         shares(m, "voltage"),
		ACVoltage:       share(m, "ac_voltage"),
		Ripple:          share(m, "ripple_current"),
		Slew:            share(m, "slew"),
		Temperature:     temperature(m, "temperature"),
		Life:            form.Get[quantity.Seconds](m, "life", form.Positive),
	}
	if len(r.Voltage) == 0 && !r.Forbidden && !m.Has("voltage") {
		m.Problem("", "the key %q is missing; without it no such capacitor passes, so write it, or forbidden: true", "voltage")
	}
	m.Done()
	return r
}

func diodeFamily(m *form.Map, source string) DiodeRules {
	recovery := m.Map("recovery")
	r := DiodeRules{
		Family:           familyOf(m, source),
		Types:            choices(m, "type", diodeTypes),
		Reverse:          share(m, "reverse_voltage"),
		ReverseAvalanche: share(m, "reverse_voltage_avalanche"),
		Average:          share(m, "average_current"),
		RepetitivePeak:   share(m, "repetitive_peak"),
		PeakTimesAverage: m.Int("peak_times_average", 1, 100, 0),
		Surge:            share(m, "surge_current"),
		Power:            share(m, "power"),
		Junction:         temperature(m, "junction"),
		RecoveryPeriod:   share(recovery, "of_period"),
		RecoveryConduct:  share(recovery, "of_conduction"),
	}
	if !r.Forbidden && !m.Has("reverse_voltage") {
		m.Problem("", "the key %q is missing; without it no such diode passes, so write it, or forbidden: true", "reverse_voltage")
	}
	recovery.Done()
	m.Done()
	return r
}

func resistorFamily(m *form.Map, source string) ResistorRules {
	r := ResistorRules{
		Family:         familyOf(m, source),
		Technologies:   texts(m, "technology"),
		Power:          powerLine(m, "power"),
		WorkingVoltage: share(m, "working_voltage"),
		PulseEnergy:    share(m, "pulse_energy"),
	}
	if !r.Forbidden && !m.Has("power") {
		m.Problem("", "the key %q is missing; without it no such resistor passes, so write it, or forbidden: true", "power")
	}
	m.Done()
	return r
}

func windingFamily(m *form.Map, source string) WindingRules {
	r := WindingRules{
		Family:        familyOf(m, source),
		ApparentPower: share(m, "apparent_power"),
		Insulation:    share(m, "insulation"),
		HotSpot:       temperature(m, "hot_spot"),
	}
	m.Done()
	return r
}

// share reads a share of the maker's rating, above zero and not above it.
func share(m *form.Map, key string) quantity.Ratio {
	s := form.Get[quantity.Ratio](m, key, form.Positive)
	if s > 1 {
		m.Problem(key, "%q is above the maker's rating; write 100 %% or less", m.Text(key))
		return 0
	}
	return s
}

// shares reads one share, or points such as [[70 °C, 50 %], [110 °C, 30 %]].
func shares(m *form.Map, key string) Shares {
	if !m.Has(key) {
		return nil
	}
	if m.IsText(key) {
		if s := share(m, key); s > 0 {
			return Shares{{Share: s}}
		}
		return nil
	}
	var out Shares
	for _, i := range m.List(key) {
		p, ok := sharePoint(i)
		if !ok {
			continue
		}
		if n := len(out); n > 0 && p.Temperature <= out[n-1].Temperature {
			i.Problem("%v does not come after %v; put the points in rising order, each once", p.Temperature, out[n-1].Temperature)
			continue
		}
		out = append(out, p)
	}
	if len(out) == 0 {
		m.Problem(key, "write a share, such as 60 %%, or points, such as [[70 °C, 50 %%], [110 °C, 30 %%]]")
	}
	return out
}

func sharePoint(i form.Item) (SharePoint, bool) {
	pair := i.Items()
	if len(pair) != 2 {
		i.Problem("a point must be a pair, such as [70 °C, 50 %%]")
		return SharePoint{}, false
	}
	t, okT := form.TryItem[quantity.Celsius](pair[0], form.Any)
	s, okS := form.TryItem[quantity.Ratio](pair[1], form.Positive)
	if okS && s > 1 {
		pair[1].Problem("%q is above the maker's rating; write 100 %% or less", pair[1].Text())
		return SharePoint{}, false
	}
	return SharePoint{t, s}, okT && okS
}

// temperature reads {most: 125 °C, below: 25 K, share: 80 %}, any of them.
func temperature(m *form.Map, key string) TemperatureRule {
	t := m.Map(key)
	r := TemperatureRule{
		Most:  form.Get[quantity.Celsius](t, "most", form.Positive),
		Below: form.Get[quantity.Kelvins](t, "below", form.Positive),
		Share: share(t, "share"),
	}
	if t != nil && !t.Has("most") && !t.Has("below") && !t.Has("share") {
		t.Problem("", "nothing is limited; write most, below or share")
	}
	t.Done()
	return r
}

// powerLine reads one share, or {share: 60 %, to: 70 °C, zero: 125 °C}.
func powerLine(m *form.Map, key string) PowerLine {
	if !m.Has(key) {
		return PowerLine{}
	}
	if m.IsText(key) {
		return PowerLine{Share: share(m, key)}
	}
	t := m.Map(key)
	t.Require("share", "to")
	l := PowerLine{
		Share: share(t, "share"),
		To:    form.Get[quantity.Celsius](t, "to", form.Positive),
		Zero:  form.Get[quantity.Celsius](t, "zero", form.Positive),
	}
	if t.Has("zero") && l.Zero <= l.To {
		t.Problem("zero", "%v is not above %v, from where the power falls", l.Zero, l.To)
	}
	t.Done()
	return l
}

// choices reads one word or a list of words, each one of the known.
func choices[S ~string](m *form.Map, key string, known []S) []S {
	var out []S
	for _, i := range m.List(key) {
		word := S(i.Text())
		switch {
		case !slices.Contains(known, word):
			i.Problem("%s", oneOf(string(word), known))
		case slices.Contains(out, word):
			i.Problem("%q is written twice; keep one", word)
		default:
			out = append(out, word)
		}
	}
	return out
}

func oneOf[S ~string](word string, known []S) string {
	var words []string
	for _, k := range known {
		words = append(words, string(k))
	}
	list := strings.Join(words, ", ")
	if near := form.Nearest(word, words); near != "" {
		return fmt.Sprintf("%q is not one of %s; did you mean %q?", word, list, near)
	}
	return fmt.Sprintf("%q is not one of %s", word, list)
}

// texts reads one text or a list of texts.
func texts(m *form.Map, key string) []string {
	var out []string
	for _, i := range m.List(key) {
		text := i.Text()
		if text == "" {
			i.Problem("a word is missing; write one, or leave the key out")
			continue
		}
		out = append(out, text)
	}
	return out
}
