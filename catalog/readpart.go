package catalog

import (
	"unicode/utf8"

	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// kinds is the table of part kinds: a new kind is a file with its struct,
// reader, checks and title, and a line here.
var kinds = []struct {
	kind  Kind
	read  func(p *Part, m *form.Map)
	title func(p *Part) string
}{
	{KindCapacitor, readCapacitor, capacitorTitle},
	{KindDiode, readDiode, diodeTitle},
	{KindResistor, readResistor, resistorTitle},
	{KindWinding, readWinding, windingTitle},
	{KindOther, readOther, otherTitle},
}

// The longest texts, in characters.
const (
	mostName = 200
	mostText = 2000
)

// Values beyond these are slips of a prefix, not parts.
const (
	mostVoltage     quantity.Volts   = 1e6
	mostCurrent     quantity.Amps    = 10e3
	mostCapacitance quantity.Farads  = 10
	mostResistance  quantity.Ohms    = 1e15
	mostSize        quantity.Meters  = 2
	mostPower       quantity.Watts   = 1e6
	mostCelsius     quantity.Celsius = 1000
	mostPieces                       = 1_000_000_000
)

func readPart(m *form.Map) *Part {
	m.Require("part", "maker", "kind")
	p := &Part{
		Number:      text(m, "part", mostName),
		Maker:       text(m, "maker", mostName),
		Kind:        Kind(m.Choice("kind", words(kindNames())...)),
		Description: text(m, "description", mostText),
		Mounting:    Mounting(m.Choice("mounting", words([]Mounting{ThroughHole, SurfaceMount, Chassis})...)),
		Status:      Status(m.Choice("status", words([]Status{Active, NotForNew, LastBuy, Obsolete})...)),
		Size:        readSize(m.Map("size")),
		Temperature: readRange(m.Map("temperature")),
		Place:       m.PlaceOf("part"),
	}
	if !m.Has("status") {
		p.Status = Active
	}
	for _, o := range m.Maps("offers") {
		p.Offers = append(p.Offers, readOffer(o))
	}
	for _, k := range kinds {
		if k.kind == p.Kind {
			k.read(p, m)
			m.Done() // of an unknown kind, the keys are unknown too
		}
	}
	return p
}

func kindNames() []Kind {
	var names []Kind
	for _, k := range kinds {
		names = append(names, k.kind)
	}
	return names
}

func words[S ~string](list []S) []string {
	out := make([]string, len(list))
	for i, w := range list {
		out[i] = string(w)
	}
	return out
}

func readSize(m *form.Map) Size {
	s := Size{
		Length: get(m, "length", form.Positive, mostSize),
		Width:  get(m, "width", form.Positive, mostSize),
		Height: get(m, "height", form.Positive, mostSize),
	}
	m.Done()
	return s
}

func readRange(m *form.Map) Range {
	m.Require("least", "most")
	r := Range{
		Least: get(m, "least", form.Any, mostCelsius),
		Most:  get(m, "most", form.Any, mostCelsius),
	}
	if m.Has("least") && m.Has("most") && r.Least >= r.Most {
		m.Problem("least", "%v is not below %v; swap the two, or mend the one that is wrong", r.Least, r.Most)
	}
	m.Done()
	return r
}

// text reads a text of bounded length.
func text(m *form.Map, key string, most int) string {
	s := m.Text(key)
	if n := utf8.RuneCountInString(s); n > most {
		m.Problem(key, "the text has %d characters; shorten it to %d", n, most)
		return ""
	}
	return s
}

// get reads a quantity and refuses what lies beyond any real part.
func get[Q quantity.Quantity](m *form.Map, key string, rule form.Rule, most Q) Q {
	q := form.Get[Q](m, key, rule)
	if q > most {
		m.Problem(key, "%q is beyond any real part (over %v); check the prefix", m.Text(key), most)
		return 0
	}
	return q
}
