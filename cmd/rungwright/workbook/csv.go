package workbook

import (
	"bytes"
	"encoding/csv"
	"strconv"
	"strings"

	"github.com/shopspring/decimal"

	"rungwright/optimize"
	"rungwright/optimize/order"
)

// The CSV files are RFC 4180 with a byte-order mark, so that spreadsheets read
// them as UTF-8. A field that a spreadsheet would take for a formula gets an
// apostrophe in front; raw leaves it out, for machines.

// PartsCSV is the parts list of the design at its build quantity.
func PartsCSV(d *optimize.Design, o Options, raw bool) []byte {
	l := newLedger(d, o, max(1, d.Supply.Build.Units))
	rows := [][]string{{"references", "use", "per_unit", "maker", "part", "description", "key_ratings", "status", "sources", "alternates", "in_hand", "needed",
		"supplier", "buy", "cost_" + strings.ToLower(l.market.Currency), "note"}}
	b := &book{design: d, options: o, ledger: l}
	for _, it := range l.items {
		cost := ""
		if minor, ok := it.cost(); ok {
			cost = l.market.Amount(minor).StringFixed(int32(l.market.Digits))
		}
		rows = append(rows, []string{strings.Join(it.refs, " "), strings.Join(it.roles, ", "), strconv.Itoa(it.perUnit), it.part.Maker, it.part.Number, it.part.Title(),
			keyRatings(it.part), statusOf(it.part), sourcesOf(it.part), b.alternatesOf(it.part), strconv.Itoa(it.inHand), strconv.Itoa(it.need),
			b.supplierOf(it), strconv.Itoa(it.bought()), cost, noteOf(it)})
	}
	return writeCSV(rows, raw)
}

// OrderCSV is what goes to one supplier, in the supplier's currency.
func OrderCSV(o order.SupplierOrder, raw bool) []byte {
	rows := [][]string{{"order_code", "part", "maker", "description", "quantity", "currency", "unit_price", "amount"}}
	for _, p := range o.Purchases {
		price := order.PriceFor(p.Offer, p.Quantity).Price
		digits := int32(order.Digits(price.Currency))
		amount := price.Amount.Mul(decimal.NewFromInt(int64(p.Quantity))).StringFixed(digits)
		rows = append(rows, []string{p.Offer.OrderCode, p.Part.Number, p.Part.Maker, p.Part.Title(), strconv.Itoa(p.Quantity), price.Currency, price.Amount.String(), amount})
	}
	return writeCSV(rows, raw)
}

// writeCSV never fails: it writes into memory.
func writeCSV(rows [][]string, raw bool) []byte {
	out := bytes.NewBufferString("\uFEFF")
	w := csv.NewWriter(out)
	w.UseCRLF = true
	for _, row := range rows {
		for i := range row {
			row[i] = clean(row[i])
			if !raw {
				row[i] = harmless(row[i])
			}
		}
		_ = w.Write(row)
	}
	w.Flush()
	return out.Bytes()
}

// harmless puts an apostrophe before what a spreadsheet would calculate.
// Numbers stay as they are.
func harmless(field string) string {
	rest := strings.TrimLeft(field, " ")
	if rest == "" || !strings.ContainsRune("=+-@＝＋－＠", []rune(rest)[0]) {
		return field
	}
	if _, err := decimal.NewFromString(rest); err == nil {
		return field
	}
	return "'" + field
}
