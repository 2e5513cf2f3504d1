package sheet

import (
	"strings"
	"testing"

	"golang.org/x/text/encoding/charmap"
	"golang.org/x/text/encoding/unicode"
)

const plainCSV = "Designator;Part number;Qty;Value\r\nC1-C4;QLF-103;4;\"10 nF, 1,5 kV\"\r\nD1, D2;TVD-2K2;2;\r\n"

func TestText(t *testing.T) {
	plain := []string{"C1 C2 C3 C4|4|QLF-103", "D1 D2|2|TVD-2K2"}
	utf16 := func(order unicode.Endianness, mark unicode.BOMPolicy, text string) []byte {
		out, err := unicode.UTF16(order, mark).NewEncoder().Bytes([]byte(text))
		must(t, err)
		return out
	}
	western, err := charmap.Windows1252.NewEncoder().Bytes([]byte(strings.ReplaceAll(plainCSV, "10 nF", "10 µF ±5 %")))
	must(t, err)
	cases := []struct {
		name   string
		data   []byte
		o      *Options
		doubts []string
	}{
		{name: "semicolons", data: []byte(plainCSV)},
		{name: "byte-order mark", data: []byte("\ufeff" + plainCSV)},
		{name: "LF alone", data: []byte(strings.ReplaceAll(plainCSV, "\r", ""))},
		{name: "CR alone", data: []byte(strings.ReplaceAll(plainCSV, "\n", ""))},
		{name: "no line end at the end", data: []byte(strings.TrimSpace(plainCSV))},
		{name: "a line that names the delimiter", data: []byte("sep=;\r\n" + plainCSV)},
		{name: "tabs", data: []byte(strings.ReplaceAll(plainCSV, ";", "\t"))},
		{name: "bars", data: []byte(strings.ReplaceAll(plainCSV, ";", "|"))},
		{name: "commas", data: csvOf("Designator,Part number,Qty", "C1-C4,QLF-103,4", `"D1, D2",TVD-2K2,2`)},
		{name: "commas, with semicolons within", data: csvOf("Designator,Part number,Qty", "C1;C2;C3;C4,QLF-103,4", "D1;D2,TVD-2K2,2")},
		{name: "a delimiter that the user names", data: []byte(strings.ReplaceAll(plainCSV, ";", "#")), o: &Options{Delimiter: '#'}},
		{name: "UTF-16 LE", data: utf16(unicode.LittleEndian, unicode.UseBOM, strings.ReplaceAll(plainCSV, ";", "\t"))},
		{name: "UTF-16 BE", data: utf16(unicode.BigEndian, unicode.UseBOM, plainCSV)},
		{name: "UTF-16 LE without a mark", data: utf16(unicode.LittleEndian, unicode.IgnoreBOM, plainCSV),
			doubts: []string{"note: f.csv: read as UTF-16 text, which the file does not say; save it as UTF-8 if signs look wrong"}},
		{name: "Windows-1252", data: western,
			doubts: []string{"warning: f.csv: the text is not UTF-8 and was read as Windows-1252 (Western European); save it as UTF-8 if signs such as µ and Ω look wrong"}},
		{name: "ragged rows and blank lines", data: csvOf("My list", "", "Designator;Part number;Qty;;;", "C1-C4;QLF-103;4;;", "", "D1,D2;TVD-2K2;2", ";;;;;;;")},
		{name: "line breaks in quotes", data: csvOf("\"Designator\";\"Part\nnumber\";Qty", "\"C1,C2,\nC3,C4\";QLF-103;4", "D1 D2;TVD-2K2;2")},
		{name: "bare quotation marks", data: csvOf("Designator;Part number;Qty;Description", "C1-C4;QLF-103;4;2\" long", "D1 D2;TVD-2K2;2"),
			doubts: []string{"warning: f.csv:2: a quotation mark stands where none may (first on this line); the marks were read as plain text, so check this row and those after it"}},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			b, err := ReadBOM("f.csv", c.data, c.o)
			must(t, err)
			sameLines(t, "rows", shortRows(b), plain)
			sameLines(t, "doubts", linesOf(b.Doubts), c.doubts)
		})
	}
}

// Signs outside ASCII survive the encoding, and the decimal comma is no
// delimiter.
func TestWesternText(t *testing.T) {
	data, err := charmap.Windows1252.NewEncoder().Bytes([]byte("Bauteilkennzeichen;Teilenummer;Menge;Wert\r\nC1;QLF-1;1;4,7 µF\r\n"))
	must(t, err)
	b, err := ReadBOM("f.csv", data, nil)
	must(t, err)
	if got := b.Rows[0].Value; got != "4,7 µF" {
		t.Errorf("got %q", got)
	}
}

// Places count lines as an editor does, and cells as a spreadsheet program
// does, which counts blank lines too but not the line of the delimiter.
func TestTextPlaces(t *testing.T) {
	table, err := Open("f.csv", []byte("sep=;\n\na;\"b\nb\"\n\nc;d\n"), nil)
	must(t, err)
	s := &table.Sheets[0]
	var got []string
	for i := range s.Lines {
		p := s.Place(&s.Lines[i], 1)
		got = append(got, p.String()+" "+p.Cell)
	}
	sameLines(t, "places", got, []string{"f.csv:3:3 B2", "f.csv:6:3 B4"})
}

func TestTextRefused(t *testing.T) {
	long := "\"C1" + strings.Repeat("\nC2", 30) + "\";Q\n"
	for _, c := range []struct {
		name, want string
		data       []byte
		o          *Options
	}{
		{"an empty file", "f.csv: the file is empty", []byte("\r\n \n"), nil},
		{"bytes", "f.csv: the file is not a table that can be read; save it as .xlsx, or as .csv in UTF-8", []byte("a;b\x00\x01;c\x00\n"), nil},
		{"control characters", "f.csv: the file is not text that can be read; save it as .xlsx, or as .csv in UTF-8", []byte("\x01\x02\x03\x04"), nil},
		{"a web page", "f.csv: this is a web page, whatever its name says; open it in a spreadsheet program and save it as .xlsx", []byte("\n <HTML><table>"), nil},
		{"a delimiter that is none", `f.csv: '"' cannot divide columns; name a single sign such as ; or ,`, []byte("a;b"), &Options{Delimiter: '"'}},
		{"a sheet of a text file", `f.csv: a text file has no sheets; leave out the sheet "Parts"`, []byte("a;b"), &Options{Sheet: "Parts"}},
		{"an unclosed quotation mark", "f.csv:2:1: one field runs over 31 lines, which looks like a quotation mark that is not closed; close it or remove it", []byte("Ref;Part number\n" + long), nil},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := ReadBOM("f.csv", c.data, c.o)
			if err == nil || strings.Split(err.Error(), "\n")[0] != c.want {
				t.Errorf("got %v, want %s", err, c.want)
			}
		})
	}
}

// The reader takes any bytes and gives a table or says what is wrong.
func FuzzText(f *testing.F) {
	for _, text := range []string{plainCSV, "sep=,\na,b\n", "\xff\xfea\x00;\x00", "a;\"b\nc", "Ref,Part no\nC1-C4,x\n", "\ufeffRef\tPart\tQty\rC1\tX\t1,200\r", "bom: [{refs: C1, part: X}]"} {
		f.Add([]byte(text), false)
		f.Add([]byte(text), true)
	}
	f.Fuzz(func(t *testing.T, data []byte, yaml bool) {
		name := "f.csv"
		if yaml {
			name = "f.yaml"
		}
		checkReading(t, name, data)
	})
}

// checkReading demands rows or at least one problem, and the same every time.
func checkReading(t *testing.T, name string, data []byte) {
	b, err := ReadBOM(name, data, nil)
	if err == nil && (b == nil || len(b.Rows) == 0) {
		t.Fatal("no rows and no error")
	}
	if err != nil && err.Error() == "" {
		t.Fatal("an error that says nothing")
	}
	again, err2 := ReadBOM(name, data, nil)
	if (err == nil) != (err2 == nil) || err != nil && err.Error() != err2.Error() {
		t.Fatalf("first %v, then %v", err, err2)
	}
	if b != nil && again != nil && strings.Join(append(linesOf(b.Doubts), shortRows(b)...), "\n") != strings.Join(append(linesOf(again.Doubts), shortRows(again)...), "\n") {
		t.Fatal("two readings differ")
	}
}
