package sheet

import (
	"fmt"
	"strings"
	"testing"

	"rungwright/catalog"
)

// The suppliers, makers and part numbers are invented.
const stockMapping = `import: Fellmarket stock list
decimal: ","
rows: [{column: Group, match: '(?i)^capacitors?$'}]
part:
  part: {column: MPN}
  maker: {column: Brand}
  kind: capacitor
  technology: {column: Family, words: {MLCC-2: ceramic class 2, Film: film}}
  capacitance: {column: Capacity, unit: nF}
  voltage: {column: Text, find: '([0-9.]+ ?k?V) DC'}
  temperature.least: -55 °C
  temperature.most: {column: Tmax}
offer:
  supplier: Fellmarket
  order_code: {column: Order no.}
  stock: {column: Stock}
  lead: {column: Weeks, unit: wk}
  currency: EUR
  prices:
    - {quantity: 1, price: {column: Price 1}}
    - {quantity: {column: From}, price: {column: Price 2}}
`

func stockList(rows ...string) []byte {
	head := []string{"Stock list of the week;;", "", "Order no.;MPN;Brand;Group;Family;Capacity;Text;Tmax;Stock;Weeks;Price 1;From;Price 2"}
	return csvOf(append(head, rows...)...)
}

func apply(t *testing.T, mapping string, list []byte) *Import {
	t.Helper()
	m, err := ReadMapping("map.yaml", []byte(mapping))
	must(t, err)
	table, err := Open("list.csv", list, m.Options())
	must(t, err)
	im, err := m.Apply(table)
	must(t, err)
	return im
}

func TestImport(t *testing.T) {
	im := apply(t, stockMapping, stockList(
		"FM-2;QLF-HV-473;Quillfen;Capacitors;MLCC-2;47;hv cap 3 kV DC;125 °C;1.200;6;0,95;100;0,62",
		"FM-1;QLF-HV-103;Quillfen;Capacitors;MLCC-2;4,7;hv cap 3 kV DC;125 °C;0;;0,62 €;;",
		"FM-9;R-1;Ohmly;Resistors;;;;;;;;;",
	))
	want := `catalog: Fellmarket stock list
parts:
  - part: QLF-HV-103
    maker: Quillfen
    kind: capacitor
    technology: ceramic class 2
    capacitance: 4.7 nF
    voltage: 3 kV
    temperature: {least: "-55 °C", most: 125 °C}
    offers:
      - supplier: Fellmarket
        order_code: FM-1
        stock: 0
        prices: [[1, 0.62 EUR]]
  - part: QLF-HV-473
    maker: Quillfen
    kind: capacitor
    technology: ceramic class 2
    capacitance: 47 nF
    voltage: 3 kV
    temperature: {least: "-55 °C", most: 125 °C}
    offers:
      - supplier: Fellmarket
        order_code: FM-2
        stock: 1200
        lead: 6 wk
        prices: [[1, 0.95 EUR], [100, 0.62 EUR]]
`
	sameLines(t, "catalogs", strings.Split(string(im.Files[0]), "\n"), strings.Split(want, "\n"))
	if im.Parts != 2 || im.Rows != 3 || im.Passed != 1 || len(im.Unread) != 0 {
		t.Errorf("got %d parts, %d rows, %d passed, unread %q", im.Parts, im.Rows, im.Passed, linesOf(im.Unread))
	}
	c, err := catalog.ReadBytes("out.yaml", im.Files[0])
	must(t, err)
	if got := float64(c.Parts[0].Capacitor.Capacitance); got != 4.7e-9 {
		t.Errorf("got %g F", got)
	}
}

// Every row that cannot be read is told with its place and reason, and none of
// them reaches the catalog.
func TestImportUnread(t *testing.T) {
	good := "FM-1;QLF-1;Quillfen;Capacitors;MLCC-2;10;hv cap 3 kV DC;125 °C;5;6;0,95;100;0,62"
	im := apply(t, stockMapping, stockList(
		good,
		strings.Replace(good, "QLF-1;", ";", 1),
		strings.NewReplacer("QLF-1", "QLF-2", "MLCC-2", "MLCC-9").Replace(good),
		strings.NewReplacer("QLF-1", "QLF-3", "3 kV DC", "a lot").Replace(good),
		strings.NewReplacer("QLF-1", "QLF-4", ";10;", ";ten;").Replace(good),
		strings.NewReplacer("QLF-1", "QLF-5", "0,62", "0,99").Replace(good),
		strings.NewReplacer("QLF-1", "QLF-6", "Quillfen", "").Replace(good),
		strings.NewReplacer("QLF-1", "QLF-7", ";5;", ";#N/A;").Replace(good),
		good,
		strings.Replace(good, ";10;", ";22;", 1),
	))
	sameLines(t, "unread rows", linesOf(im.Unread), []string{
		`wrong: list.csv:5: the part number is blank`,
		`wrong: list.csv:6:32: technology: "MLCC-9" is not among the words of the mapping; add it there`,
		`wrong: list.csv:7:42: voltage: "hv cap a lot" does not match "([0-9.]+ ?k?V) DC"`,
		`wrong: list.csv:8:39: capacitance: "ten" is not a number; write digits alone`,
		`wrong: list.csv:9: QLF-5: offers.prices: the unit price rises from 0.95 EUR to 0.99 EUR as the quantity rises; check both`,
		`wrong: list.csv:10: QLF-6: the key "maker" is missing`,
		`wrong: list.csv:11:64: stock: "#N/A" is an error of the spreadsheet`,
		`wrong: list.csv:12: "QLF-1" stands in line 4 too, with a price for 1 already`,
		`wrong: list.csv:13: "QLF-1" stands in line 4 too, with other ratings`,
	})
	if im.Parts != 1 {
		t.Errorf("got %d parts", im.Parts)
	}
}

// Lists with a row for each price break or each pack come together.
func TestImportJoinsRows(t *testing.T) {
	row := func(code, from, price string) string {
		return code + ";QLF-1;Quillfen;Capacitors;MLCC-2;10;3 kV DC;125 °C;5;6;;" + from + ";" + price
	}
	im := apply(t, stockMapping, stockList(row("FM-1", "100", "0,62"), row("FM-1", "1", "0,95"), row("FM-1R", "1", "1,10")))
	sameLines(t, "unread rows", linesOf(im.Unread), nil)
	for _, want := range []string{"prices: [[1, 0.95 EUR], [100, 0.62 EUR]]", "order_code: FM-1R"} {
		if !strings.Contains(string(im.Files[0]), want) {
			t.Errorf("%q is missing in\n%s", want, im.Files[0])
		}
	}
}

// A number that a workbook stores in binary comes out as the decimal that was
// typed, and an ambiguous text does not come out at all.
func TestImportNumbers(t *testing.T) {
	mapping := `import: list
part:
  part: {column: MPN}
  maker: Quillfen
  kind: other
  category: board
offer:
  supplier: Fellmarket
  currency: {column: Currency}
  stock: {column: Stock}
  prices: [{quantity: 1, price: {column: Price}}]
`
	m, err := ReadMapping("map.yaml", []byte(mapping))
	must(t, err)
	data := sheetOf(t, [][]any{{"MPN", "Price", "Currency", "Stock"}, {"B-1", 0.1 + 0.2, "EUR", 1234}, {"B-2", "1,250", "EUR", 7}})
	table, err := Open("list.xlsx", data, m.Options())
	must(t, err)
	im, err := m.Apply(table)
	must(t, err)
	if want := "prices: [[1, 0.3 EUR]]"; !strings.Contains(string(im.Files[0]), want) {
		t.Errorf("%q is missing in\n%s", want, im.Files[0])
	}
	sameLines(t, "unread rows", linesOf(im.Unread), []string{
		`wrong: list.xlsx:Parts!B3: price: "1,250" may be a number with thousands or with decimals; write it without the mark of thousands, or say which sign stands before the decimals`})
}

func TestMappingMistakes(t *testing.T) {
	for _, c := range []struct{ text, want string }{
		{"import: a", `map.yaml:1:1: the key "part" is missing`},
		{"import: a\npart: {maker: {column: B}}", `map.yaml:2:7: part: nothing says which column holds the part numbers; write part: {column: …}`},
		{"import: a\npart: {part: {colum: B}}", "map.yaml:2:14: part.part: nothing says where it comes from; write {column: …}, or a text that holds for every row\n" +
			`map.yaml:2:15: unknown key "colum"; did you mean "column"?`},
		{"import: a\npart: {part: {column: B, find: (}}", "map.yaml:2:32: part.part.find: \"(\" is no regular expression: missing closing ): `(`"},
		{"import: a\npart: {part: {column: B}, size: [1], size.height: {column: H}}", `map.yaml:2:51: part.size.height: "size" is given as a whole already; keep one of the two`},
		{"import: a\ndecimal: x\npart: {part: {column: B}}", `map.yaml:2:10: decimal: "x" is not a sign that it may be; write one sign in quotes, such as ","`},
		{"import: a\npart: {part: {column: B}, offers: []}", `map.yaml:2:35: part.offers: offers are described under the key offer`},
	} {
		if _, err := ReadMapping("map.yaml", []byte(c.text)); err == nil || err.Error() != c.want {
			t.Errorf("%q: got\n%v\nwant\n%s", c.text, err, c.want)
		}
	}
	m, err := ReadMapping("map.yaml", []byte(stockMapping))
	must(t, err)
	table, err := Open("list.csv", csvOf("Order no.;Brand;Group", "1;2;3"), nil)
	must(t, err)
	_, err = m.Apply(table)
	want := `map.yaml:5:18: there is no column "MPN" in list.csv:1; the headings are "Order no.", "Brand", "Group"`
	if err == nil || strings.Split(err.Error(), "\n")[0] != want {
		t.Errorf("got %v, want %s", err, want)
	}
}

// A second import changes stock and prices and nothing else: what a person
// added stays, as do offers and parts that the list does not know.
func TestUpdate(t *testing.T) {
	row := func(mpn, stock, price string) string {
		return "FM-" + mpn + ";" + mpn + ";Quillfen;Capacitors;MLCC-2;10;3 kV DC;125 °C;" + stock + ";6;" + price + ";;"
	}
	first := apply(t, stockMapping, stockList(row("A", "5", "0,60"), row("B", "9", "0,70")))
	old := strings.Replace(string(first.Files[0]), "    voltage: 3 kV\n", "    voltage: 3 kV\n    loss_factor: 2 %\n", 1)
	old = strings.Replace(old, "    offers:\n", "    offers:\n      - supplier: Oakpellet\n        prices: [[1, 0.55 EUR]]\n", 1)

	same, changes, lost, err := Update([]File{{"old.yaml", []byte(old)}}, first)
	must(t, err)
	if string(same[0].Data) != old || len(changes) != 0 || lost != nil {
		t.Errorf("the same import changes %v, lost %v\n%s", changes, lost, same[0].Data)
	}

	next := apply(t, stockMapping, stockList(row("A", "3", "0,6"), row("C", "1", "0,80")))
	updated, changes, lost, err := Update([]File{{"old.yaml", []byte("# ours\n" + old)}}, next)
	must(t, err)
	var got []string
	for _, c := range changes {
		got = append(got, fmt.Sprintf("%s %s %s %s: %s > %s", c.Part, c.Supplier, c.OrderCode, c.What, c.Old, c.New))
	}
	sameLines(t, "changes", got, []string{"A Fellmarket FM-A stock: 5 > 3", "B   not listed any more:  > ", "C   new part:  > "})
	if len(lost) != 1 {
		t.Error("nothing is said of the comment that is lost")
	}
	c, err := catalog.ReadBytes("new.yaml", updated[0].Data)
	must(t, err)
	if len(c.Parts) != 3 || len(c.Parts[0].Offers) != 2 || c.Parts[0].Offers[1].Stock != 3 || c.Parts[0].Capacitor.LossFactor == 0 {
		t.Errorf("got\n%s", updated[0].Data)
	}
}

// Any mapping and any list give a catalog that reads back, or problems.
func FuzzImport(f *testing.F) {
	f.Add(stockMapping, string(stockList("FM-1;QLF-1;Quillfen;Capacitors;MLCC-2;4,7;3 kV DC;125 °C;0;;0,62 €;;")))
	f.Add("import: a\npart: {part: {column: a}, kind: other, maker: [x, {y: z}], a.b: 1, a.c: 2}", "a;b\n1;2\n")
	f.Fuzz(func(t *testing.T, mapping, list string) {
		m, err := ReadMapping("map.yaml", []byte(mapping))
		if err != nil {
			return
		}
		table, err := Open("list.csv", []byte(list), m.Options())
		if err != nil {
			return
		}
		im, err := m.Apply(table)
		if err != nil || im.Files == nil {
			return
		}
		if _, err := catalog.ReadBytes("out.yaml", im.Files[0]); err != nil {
			t.Fatalf("%v\n%s", err, im.Files[0])
		}
		if _, changes, _, err := Update([]File{{"out.yaml", im.Files[0]}}, im); err != nil || len(changes) > 0 {
			t.Fatalf("updating a catalog by itself: %v %v", changes, err)
		}
	})
}
