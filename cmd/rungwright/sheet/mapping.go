package sheet

import (
	"regexp"
	"slices"
	"strings"

	"rungwright/catalog/form"
)

// Mapping says how a supplier's table becomes a catalog. Its file:
//
//	import: Fellmarket stock list
//	sheet: Stock                    # of a workbook; else the one that fits best
//	header: 3                       # row of the headings; else found
//	decimal: ","                    # else decided by each column
//	delimiter: ";"                  # of a text file; else found
//	rows: [{column: Group, match: '(?i)ceramic'}]   # take only rows that match all
//	part:                           # keys of a catalog's part, dotted where nested
//	  part: {column: MPN}
//	  maker: {column: Brand}
//	  kind: capacitor               # plain text is the same in every row
//	  technology: {column: Family, words: {MLCC 2: ceramic class 2}}
//	  capacitance: {column: Capacity, unit: uF}
//	  voltage: {column: Text, find: '([0-9.]+ ?k?V) DC'}
//	  temperature.most: 125 °C
//	offer:
//	  supplier: Fellmarket
//	  order_code: {column: Order no.}
//	  stock: {column: Stock}
//	  currency: EUR
//	  prices:
//	    - {quantity: 1, price: {column: Price 1}}
//	    - {quantity: {column: From 2}, price: {column: Price 2}}
type Mapping struct {
	Title string

	options Options
	rows    []filter
	part    []field
	offer   []field
	code    rule // currency of the prices
	prices  []priceRule
	file    string
}

// filter takes rows whose cell matches.
type filter struct {
	rule
	match *regexp.Regexp
}

// field is a key of a catalog with its rule.
type field struct {
	key string
	rule
}

// rule makes a value of a row: the same in each when there is no column.
type rule struct {
	constant any // for a form.Doc; nil with a column
	column   string
	find     *regexp.Regexp // part of the cell that counts; nil: all of it
	unit     string         // of a bare number; empty: the cell says it
	words    map[string]string
	place    form.Place
}

type priceRule struct{ quantity, price rule }

// ReadMapping reads a mapping file; errors are form.Problems.
func ReadMapping(name string, data []byte) (*Mapping, error) {
	var report form.Report
	top := form.Parse(name, data, &report)
	if top == nil || report.Len() > 0 {
		return nil, report.Err() // a key that stands twice cannot be gone through
	}
	top.Require("import", "part")
	m := &Mapping{Title: top.Text("import"), file: name}
	m.options = Options{Sheet: top.Text("sheet"), HeaderRow: top.Int("header", 1, maxRow, 0), Decimal: sign(top, "decimal", ".,"), Delimiter: sign(top, "delimiter", "")}
	for _, f := range top.Maps("rows") {
		m.rows = append(m.rows, readFilter(f))
	}
	part := top.Map("part")
	m.part = readFields(part, nil)
	checkKeys(part, m.part)
	if part != nil && !slices.ContainsFunc(m.part, func(f field) bool { return f.key == "part" }) {
		part.Problem("", "nothing says which column holds the part numbers; write part: {column: …}")
	}
	if offer := top.Map("offer"); offer != nil {
		m.readOffer(offer)
	}
	top.Done()
	if err := report.Err(); err != nil {
		return nil, err
	}
	return m, nil
}

// sign reads a key whose value is one sign; allowed lists them, any when
// empty.
func sign(m *form.Map, name, allowed string) rune {
	text := m.Text(name)
	if text == `\t` || text == "tab" {
		return '\t'
	}
	signs := []rune(text)
	switch {
	case text == "":
		return 0
	case len(signs) != 1 || allowed != "" && !strings.ContainsRune(allowed, signs[0]) || !validDelimiter(signs[0]):
		m.Problem(name, "%q is not a sign that it may be; write one sign in quotes, such as \",\"", cut(text))
		return 0
	}
	return signs[0]
}

func readFilter(m *form.Map) filter {
	f := filter{rule: rule{column: m.Text("column"), place: m.PlaceOf("column")}, match: pattern(m, "match")}
	m.Require("column", "match")
	m.Done()
	return f
}

// pattern compiles a regular expression.
func pattern(m *form.Map, name string) *regexp.Regexp {
	text := m.Text(name)
	if text == "" {
		return nil
	}
	p, err := regexp.Compile(text)
	if err != nil {
		m.Problem(name, "%q is no regular expression: %s", cut(text), strings.TrimPrefix(err.Error(), "error parsing regexp: "))
		return nil
	}
	return p
}

// readFields reads the rules of a map, but for the keys to leave out.
func readFields(m *form.Map, except []string) []field {
	var fields []field
	if m == nil {
		return nil
	}
	for _, name := range m.Keys() {
		if !slices.Contains(except, name) {
			fields = append(fields, field{name, readRule(m, name)})
		}
	}
	return fields
}

// checkKeys refuses keys that cannot stand together in one part.
func checkKeys(m *form.Map, fields []field) {
	for _, f := range fields {
		outer, _, dotted := strings.Cut(f.key, ".")
		switch {
		case outer == "offers":
			m.Problem(f.key, "offers are described under the key offer")
		case dotted && slices.ContainsFunc(fields, func(g field) bool { return g.key == outer }):
			m.Problem(f.key, "%q is given as a whole already; keep one of the two", outer)
		}
	}
}

// readRule reads a constant, or a column with what is done to its cells.
func readRule(m *form.Map, name string) rule {
	r := rule{place: m.PlaceOf(name)}
	value := plainValueOf(m, name)
	if doc, ok := value.(*form.Doc); !ok || doc == nil {
		r.constant = value
		return r
	}
	inner := m.Map(name)
	if !inner.Has("column") {
		inner.Problem("", "nothing says where it comes from; write {column: …}, or a text that holds for every row")
	}
	r.column, r.unit, r.find, r.place = inner.Text("column"), inner.Text("unit"), pattern(inner, "find"), inner.PlaceOf("column")
	if words := inner.Map("words"); words != nil {
		r.words = map[string]string{}
		for _, w := range words.Keys() {
			r.words[key(w)] = words.Text(w)
		}
		words.Done()
	}
	inner.Done()
	return r
}

func (m *Mapping) readOffer(offer *form.Map) {
	offer.Require("supplier", "prices", "currency")
	m.offer = readFields(offer, []string{"prices", "currency"})
	checkKeys(offer, m.offer)
	if offer.Has("currency") {
		m.code = readRule(offer, "currency")
	}
	for _, p := range offer.Maps("prices") {
		p.Require("quantity", "price")
		if p.Has("quantity") && p.Has("price") {
			m.prices = append(m.prices, priceRule{readRule(p, "quantity"), readRule(p, "price")})
		}
		p.Done()
	}
}

// columns are the rules that read one, in the order of the file.
func (m *Mapping) columns() []rule {
	var rules []rule
	for _, f := range m.rows {
		rules = append(rules, f.rule)
	}
	for _, f := range slices.Concat(m.part, m.offer) {
		rules = append(rules, f.rule)
	}
	rules = append(rules, m.code)
	for _, p := range m.prices {
		rules = append(rules, p.quantity, p.price)
	}
	return slices.DeleteFunc(rules, func(r rule) bool { return r.column == "" })
}

// Options are those that the mapping has for Open.
func (m *Mapping) Options() *Options { return &m.options }
