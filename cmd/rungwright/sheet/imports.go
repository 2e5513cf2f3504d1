package sheet

import (
	"errors"
	"fmt"
	"slices"
	"strings"
)

// Import is what a mapping makes of a table.
type Import struct {
	Title  string
	Files  [][]byte // catalog files, each of 20,000 parts at most; none when no row could be read
	Parts  int      // in them
	Rows   int      // that were looked at, below the headings
	Passed int      // of these, not taken because of the mapping's rows
	Unread []Doubt  // every row that could not be read, and why
	Doubts []Doubt  // what else is to be said

	records []*record
}

// record is one part with its offer, or several rows' worth of either.
type record struct {
	at     Place
	number string
	part   []keyed
	offers []*offerRecord
}

type keyed struct {
	key   string
	value any // for a form.Doc
}

type offerRecord struct {
	fields []keyed
	prices []pricePoint
}

type pricePoint struct {
	quantity int
	price    string
}

// Apply makes a catalog of a table. Rows that give no part that a catalog
// would take are left out and reported; the error is for what is wrong with
// the mapping or the table as a whole.
func (m *Mapping) Apply(t *Table) (*Import, error) {
	c, err := m.locate(t)
	if err != nil {
		return nil, err
	}
	im := &Import{Title: m.Title, Doubts: t.Doubts}
	rows := m.readRows(c, im)
	im.join(c, rows)
	for _, r := range im.records {
		slices.SortStableFunc(r.offers, func(a, b *offerRecord) int { return strings.Compare(a.key(), b.key()) })
	}
	im.check()
	im.Files = im.files()
	return im, nil
}

// readRows reads every line that the mapping takes, on its own.
func (m *Mapping) readRows(c *columnSet, im *Import) []*record {
	var d doubts
	var rows []*record
	for i := range c.lines() {
		l := &c.lines()[i]
		im.Rows++
		at := c.sheet.Place(l, -1)
		take, err := m.takes(c, l)
		if err != nil {
			d.wrong(at, "", "%v", err)
			continue
		}
		if !take {
			im.Passed++
			continue
		}
		r, errs := m.record(c, l)
		for _, e := range errs {
			at := at
			if e.column >= 0 {
				at = c.sheet.Place(l, e.column)
			}
			d.wrong(at, "", "%v", e.err)
		}
		if len(errs) == 0 {
			rows = append(rows, r)
		}
	}
	im.Unread = d.sorted()
	return rows
}

func (m *Mapping) takes(c *columnSet, l *Line) (bool, error) {
	for _, f := range m.rows {
		text, err := c.text(rule{column: f.column}, l)
		if err != nil {
			return false, err
		}
		if !f.match.MatchString(text) {
			return false, nil
		}
	}
	return true, nil
}

// cellError is what is wrong with one cell of a row; column -1 means the row.
type cellError struct {
	column int
	err    error
}

// record reads one line; every error of it comes back.
func (m *Mapping) record(c *columnSet, l *Line) (*record, []cellError) {
	r := &record{at: c.sheet.Place(l, -1)}
	var errs []cellError
	fail := func(from rule, key string, err error) {
		column := -1
		if from.column != "" {
			column = c.index[from.column]
		}
		errs = append(errs, cellError{column, fmt.Errorf("%s: %w", key, err)})
	}
	for _, f := range m.part {
		v, err := c.value(f.rule, l)
		if err != nil {
			fail(f.rule, f.key, err)
			continue
		}
		if f.key == "part" {
			r.number = text(v)
			v = r.number
		}
		if v != nil {
			r.part = append(r.part, keyed{f.key, v})
		}
	}
	if r.number == "" && len(errs) == 0 {
		errs = append(errs, cellError{-1, errors.New("the part number is blank")})
	}
	if len(m.prices) > 0 {
		m.recordOffer(c, l, r, fail)
	}
	return r, errs
}

func text(v any) string {
	if v == nil {
		return ""
	}
	return fmt.Sprint(v)
}

// countKeys are the keys of an offer that are numbers of pieces.
var countKeys = []string{"stock", "least", "multiple"}

func (m *Mapping) recordOffer(c *columnSet, l *Line, r *record, fail func(rule, string, error)) {
	o := &offerRecord{}
	for _, f := range m.offer {
		if slices.Contains(countKeys, f.key) {
			n, err := c.count(f.rule, l)
			if err != nil {
				fail(f.rule, f.key, err)
			} else if n >= 0 {
				o.fields = append(o.fields, keyed{f.key, n})
			}
			continue
		}
		v, err := c.value(f.rule, l)
		if err != nil {
			fail(f.rule, f.key, err)
		} else if v != nil {
			o.fields = append(o.fields, keyed{f.key, v})
		}
	}
	m.recordPrices(c, l, o, fail)
	if len(o.prices) > 0 {
		r.offers = append(r.offers, o)
	}
}

// recordPrices reads the price breaks; a break whose price is blank is none.
func (m *Mapping) recordPrices(c *columnSet, l *Line, o *offerRecord, fail func(rule, string, error)) {
	code, err := c.text(m.code, l)
	if err != nil {
		fail(m.code, "currency", err)
	}
	for _, p := range m.prices {
		price, err := c.text(p.price, l)
		if err == nil && price != "" && p.price.column != "" {
			price, err = c.number(p.price, l.At(c.index[p.price.column]), price)
		}
		if err != nil {
			fail(p.price, "price", err)
			continue
		}
		if price == "" {
			continue
		}
		n, err := c.count(p.quantity, l)
		switch {
		case err != nil:
			fail(p.quantity, "quantity", err)
		case n < 1:
			fail(p.quantity, "quantity", errors.New("a price has no quantity"))
		default:
			o.prices = append(o.prices, pricePoint{n, price + " " + code})
		}
	}
}

// join brings rows of the same part together: further offers, or further
// price breaks of the same offer.
func (im *Import) join(c *columnSet, rows []*record) {
	var d doubts
	byNumber := map[string]*record{}
	for _, r := range rows {
		first, known := byNumber[r.number]
		if !known {
			byNumber[r.number] = r
			im.records = append(im.records, r)
			continue
		}
		if why := first.takeOver(r); why != "" {
			d.wrong(r.at, r.number, "%q stands in %s too, %s", cut(r.number), first.at.short(), why)
		}
	}
	im.Unread = append(im.Unread, d.sorted()...)
}

// takeOver adds another row's offer, or says why it cannot.
func (r *record) takeOver(other *record) string {
	if fmt.Sprint(r.part) != fmt.Sprint(other.part) {
		return "with other ratings"
	}
	if len(other.offers) == 0 {
		return "and this row adds nothing"
	}
	for _, o := range other.offers {
		i := slices.IndexFunc(r.offers, func(known *offerRecord) bool { return known.key() == o.key() })
		if i < 0 {
			r.offers = append(r.offers, o)
			continue
		}
		known := r.offers[i]
		if fmt.Sprint(known.fields) != fmt.Sprint(o.fields) {
			return "with the same order code but another stock or minimum"
		}
		for _, p := range o.prices {
			if slices.ContainsFunc(known.prices, func(k pricePoint) bool { return k.quantity == p.quantity }) {
				return fmt.Sprintf("with a price for %d already", p.quantity)
			}
			known.prices = append(known.prices, p)
		}
	}
	return ""
}
