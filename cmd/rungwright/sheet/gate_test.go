package sheet

import (
	"archive/zip"
	"bytes"
	"fmt"
	"hash/crc32"
	"io"
	"regexp"
	"runtime"
	"runtime/metrics"
	"strings"
	"testing"
	"time"

	"github.com/xuri/excelize/v2"
)

const sheetPart = "xl/worksheets/sheet1.xml"

// repack writes the parts of a workbook anew, changed; a nil part is left
// out, and a part that is not there yet is added.
func repack(t testing.TB, book []byte, change map[string]func([]byte) []byte) []byte {
	t.Helper()
	in, err := zip.NewReader(bytes.NewReader(book), int64(len(book)))
	must(t, err)
	var out bytes.Buffer
	w := zip.NewWriter(&out)
	put := func(name string, data []byte) {
		part, err := w.Create(name)
		must(t, err)
		_, err = part.Write(data)
		must(t, err)
	}
	seen := map[string]bool{}
	for _, f := range in.File {
		r, err := f.Open()
		must(t, err)
		data, err := io.ReadAll(r)
		must(t, err)
		seen[f.Name] = true
		if c := change[f.Name]; c != nil {
			if data = c(data); data == nil {
				continue
			}
		}
		put(f.Name, data)
	}
	for name, c := range change {
		if !seen[name] {
			put(name, c(nil))
		}
	}
	must(t, w.Close())
	return out.Bytes()
}

// zipOf makes an archive of small parts.
func zipOf(t testing.TB, parts ...string) []byte {
	var out bytes.Buffer
	w := zip.NewWriter(&out)
	for _, name := range parts {
		part, err := w.Create(name)
		must(t, err)
		_, err = part.Write([]byte("<a/>"))
		must(t, err)
	}
	must(t, w.Close())
	return out.Bytes()
}

func constant(text string) func([]byte) []byte { return func([]byte) []byte { return []byte(text) } }

// sheetXML is a sheet with the given rows.
func sheetXML(rows string) string {
	return `<?xml version="1.0" encoding="UTF-8"?><worksheet xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><sheetData>` + rows + `</sheetData></worksheet>`
}

// withRows is a good workbook whose one sheet has other rows.
func withRows(t testing.TB, rows string) []byte {
	return repack(t, sheetOf(t, [][]any{{"Designator"}}), map[string]func([]byte) []byte{sheetPart: constant(sheetXML(rows))})
}

// bounded runs f, which must take little memory and not long. The bounds are
// generous: without the gate the worst of these files takes 6 GB.
func bounded(t *testing.T, f func()) {
	t.Helper()
	runtime.GC()
	before := heapBytes()
	peak, stop, stopped := before, make(chan struct{}), make(chan struct{})
	go func() {
		defer close(stopped)
		for tick := time.NewTicker(time.Millisecond); ; {
			select {
			case <-stop:
				return
			case <-tick.C:
				peak = max(peak, heapBytes())
			}
		}
	}()
	began := time.Now()
	f()
	took := time.Since(began)
	close(stop)
	<-stopped
	grown := (peak - before) >> 20
	t.Logf("%.2f s, %d MB", took.Seconds(), grown)
	if grown > 512 {
		t.Errorf("the heap grew by %d MB", grown)
	}
	if took > time.Minute {
		t.Errorf("it took %v", took)
	}
}

// heapBytes is what objects take on the heap, garbage included.
func heapBytes() uint64 {
	sample := []metrics.Sample{{Name: "/memory/classes/heap/objects:bytes"}}
	metrics.Read(sample)
	return sample[0].Value.Uint64()
}

func TestHostileWorkbooks(t *testing.T) {
	good := sheetOf(t, [][]any{{"Designator", "Part number"}, {"C1", "QLF"}})
	changed := func(part string, from, to string) []byte {
		return repack(t, good, map[string]func([]byte) []byte{part: func(data []byte) []byte {
			if !bytes.Contains(data, []byte(from)) {
				t.Fatalf("%s does not hold %q", part, from)
			}
			return bytes.Replace(data, []byte(from), []byte(to), 1)
		}})
	}
	cases := []struct {
		name string
		data func() []byte
		err  string
	}{
		{"a sheet that unpacks to 600 MB", func() []byte { return replaceRaw(t, good, make([]byte, 1000), 600<<20, 0) },
			`f.xlsx: the workbook unpacks to more than it may \("xl/worksheets/sheet1.xml": 600 MB\); if it is a real one, save the sheet alone as .xlsx or .csv`},
		{"a part that is longer than it says", func() []byte { return liar(t, good) }, `f.xlsx: the workbook is damaged \(.*\); fetch it again, or open it and save a copy`},
		{"one text of 10 MB", func() []byte {
			return withRows(t, `<row><c t="inlineStr"><is><t>`+strings.Repeat("a", 10<<20)+`</t></is></c></row>`)
		}, `f.xlsx: xl/worksheets/sheet1.xml: a text or tag has more than 1048576 bytes`},
		{"1,048,576 rows with values", func() []byte {
			return withRows(t, strings.Repeat(`<row><c><v>1</v></c></row>`, 1<<20))
		}, `f.xlsx: xl/worksheets/sheet1.xml: the workbook has more than 200000 rows with something in them; keep the sheet that matters, or split it`},
		{"2,000 rows with a cell in the last column", func() []byte {
			var b strings.Builder
			for i := range 2000 {
				fmt.Fprintf(&b, `<row r="%d"><c r="XFD%d"><v>1</v></c></row>`, i+1, i+1)
			}
			return withRows(t, b.String())
		}, `f.xlsx: xl/worksheets/sheet1.xml: the sheet "Parts" goes beyond column AMJ \(in row 1\); delete the cells to the right of the table`},
		{"many wide rows", func() []byte {
			return withRows(t, strings.Repeat(`<row>`+strings.Repeat(`<c/>`, 1023)+`<c><v>1</v></c></row>`, 4200))
		}, `f.xlsx: xl/worksheets/sheet1.xml: the sheet "Parts" is too wide for its many rows; delete the cells to the right of the table`},
		{"row numbers beyond the last", func() []byte { return withRows(t, `<row r="1048577"><c><v>1</v></c></row>`) },
			`f.xlsx: xl/worksheets/sheet1.xml: the sheet "Parts" goes beyond row 1048576`},
		{"deep nesting", func() []byte { return withRows(t, strings.Repeat(`<x>`, 70)+strings.Repeat(`</x>`, 70)) },
			`f.xlsx: xl/worksheets/sheet1.xml: the elements are nested more than 64 deep`},
		{"a bomb of entities", func() []byte {
			return changed(sheetPart, "<worksheet", `<!DOCTYPE a [<!ENTITY b "bbbb"><!ENTITY c "&b;&b;">]><worksheet`)
		}, `f.xlsx: the workbook is damaged \(xl/worksheets/sheet1.xml: it declares a document type, which no workbook needs\); .*`},
		{"an unknown entity", func() []byte { return withRows(t, `<row><c t="str"><v>&b;</v></c></row>`) }, `f.xlsx: the workbook is damaged \(.*\); .*`},
		{"a sheet that ends early", func() []byte {
			return repack(t, good, map[string]func([]byte) []byte{sheetPart: func(data []byte) []byte { return data[:len(data)*2/3] }})
		}, `f.xlsx: the workbook is damaged \(.*\); .*`},
		{"tags that do not match", func() []byte { return withRows(t, `<row><c><v>1</row></c></v>`) }, `f.xlsx: the workbook is damaged \(.*: the element "row" ends without a start\); .*`},
		{"a bad cell address", func() []byte { return withRows(t, `<row r="3"><c r="A2"><v>1</v></c></row>`) },
			`f.xlsx: the workbook is damaged \(.*: the cell "A2" is out of order in row 3\); .*`},
		{"cells out of order", func() []byte { return withRows(t, `<row r="1"><c r="B1"><v>1</v></c><c r="A1"><v>1</v></c></row>`) },
			`f.xlsx: the workbook is damaged \(.*: the cell "A1" is out of order in row 1\); .*`},
		{"rows out of order", func() []byte { return withRows(t, `<row r="2"/><row r="2"/>`) }, `f.xlsx: the workbook is damaged \(.*: the row number "2" does not rise\); .*`},
		{"a text that is missing", func() []byte { return withRows(t, `<row><c t="s"><v>7</v></c></row>`) },
			`f.xlsx: the workbook is damaged \(.*: the cell A1 names the text "7", which is missing\); .*`},
		{"two lists of cells", func() []byte { return withRows(t, `</sheetData><sheetData><row><c><v>1</v></c></row>`) },
			`f.xlsx: the workbook is damaged \(.*: its cells are listed twice\); .*`},
		{"a wrong checksum", func() []byte { return wrongChecksum(t, good) }, `f.xlsx: the workbook is damaged \(.*checksum error\); .*`},
		{"a sheet that is missing", func() []byte {
			return repack(t, good, map[string]func([]byte) []byte{sheetPart: func([]byte) []byte { return nil }})
		}, `f.xlsx: the sheet "Parts" is missing in the workbook, which is damaged; fetch it again`},
		{"a workbook at another place", func() []byte { return changed(rootRels, "xl/workbook.xml", "xl/other.xml") },
			`f.xlsx: the workbook is damaged \(_rels/.rels: its workbook stands at an unusual place\); .*`},
		{"a name that leads out", func() []byte { return zipOf(t, bookPart, "xl/../../etc/a.xml") }, `f.xlsx: the workbook holds a file named "xl/../../etc/a.xml", which no spreadsheet program writes`},
		{"a part twice", func() []byte { return zipOf(t, bookPart, bookPart) }, `f.xlsx: the workbook holds the file "xl/workbook.xml" twice; open it and save a copy`},
		{"too many parts", func() []byte { return zipOf(t, make([]string, 2001)...) }, `f.xlsx: the workbook holds 2001 files; 2000 are the most`},
		{"no sheet", func() []byte { return zipOf(t, bookPart) }, `f.xlsx: the workbook has no sheet with cells`},
		{"an OpenDocument file", func() []byte { return zipOf(t, "mimetype", "content.xml") }, `f.xlsx: this is an OpenDocument file \(.ods or the like\); open it and save the table as .xlsx or .csv`},
		{"a binary workbook", func() []byte { return zipOf(t, "xl/workbook.bin") }, `f.xlsx: this is a binary workbook \(.xlsb\); open it and save it as .xlsx`},
		{"a text document", func() []byte { return zipOf(t, "word/document.xml") }, `f.xlsx: this is a text document; copy its table into a spreadsheet and save that as .xlsx`},
		{"a zip archive", func() []byte { return zipOf(t, "parts.csv") }, `f.xlsx: this is a zip archive without a workbook; name the .xlsx or .csv file itself`},
		{"a password", func() []byte { return protected(t) }, `f.xlsx: the workbook is protected with a password; open it, save a copy as .xlsx without a password, and name that`},
		{"an old workbook", func() []byte { return append([]byte(compound+strings.Repeat("\x00", 600)), utf16Bytes("Workbook")...) },
			`f.xlsx: this is an old .xls workbook; open it and save it as .xlsx`},
		{"a file beyond the limit", func() []byte { return make([]byte, maxFile+1) }, `f.xlsx: the file has 50 MB; 50 MB are the most that a table may have`},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			data := c.data()
			bounded(t, func() {
				_, err := ReadBOM("f.xlsx", data, nil)
				if err == nil || !regexp.MustCompile("^"+c.err+"$").MatchString(err.Error()) {
					t.Errorf("got %v\nwant %s", err, c.err)
				}
			})
		})
	}
}

// liar is a bomb that hides: it declares a tenth of what its sheet unpacks to.
func liar(t *testing.T, good []byte) []byte {
	sheet := []byte(sheetXML(strings.Repeat(`<row><c><v>1</v></c></row>`, 1000)))
	return replaceRaw(t, good, sheet, uint64(len(sheet)/10), crc32.ChecksumIEEE(sheet))
}

func wrongChecksum(t *testing.T, good []byte) []byte {
	sheet := []byte(sheetXML(`<row><c><v>1</v></c></row>`))
	return replaceRaw(t, good, sheet, uint64(len(sheet)), 1)
}

// replaceRaw stores another sheet, with a size and checksum of its own.
func replaceRaw(t *testing.T, book, sheet []byte, size uint64, sum uint32) []byte {
	in, err := zip.NewReader(bytes.NewReader(book), int64(len(book)))
	must(t, err)
	var out bytes.Buffer
	w := zip.NewWriter(&out)
	for _, f := range in.File {
		if f.Name != sheetPart {
			must(t, w.Copy(f))
			continue
		}
		part, err := w.CreateRaw(&zip.FileHeader{Name: f.Name, Method: zip.Store, CRC32: sum, CompressedSize64: uint64(len(sheet)), UncompressedSize64: size})
		must(t, err)
		_, err = part.Write(sheet)
		must(t, err)
	}
	must(t, w.Close())
	return out.Bytes()
}

// protected is a workbook encrypted by the library.
func protected(t *testing.T) []byte {
	f := excelize.NewFile()
	defer f.Close()
	var out bytes.Buffer
	must(t, f.Write(&out, excelize.Options{Password: "secret"}))
	return out.Bytes()
}

// A download that stopped anywhere must never pass for a shorter workbook.
func TestCutOff(t *testing.T) {
	good := sheetOf(t, [][]any{{"Designator", "Part number"}, {"C1", "QLF"}, {"C2", "QLF"}})
	_, err := ReadBOM("f.xlsx", good, nil)
	must(t, err)
	for n := 4; n < len(good); n += 61 {
		if b, err := ReadBOM("f.xlsx", good[:n], nil); err == nil {
			t.Fatalf("cut at %d of %d bytes: got %q", n, len(good), shortRows(b))
		}
	}
}

// Rows that are formatted to the end of the sheet, but blank, are no reason to
// refuse it.
func TestBlankRowsToTheEnd(t *testing.T) {
	rows := `<row r="1"><c t="inlineStr"><is><t>Designator</t></is></c><c t="inlineStr"><is><t>MPN</t></is></c></row>` +
		`<row r="2"><c t="inlineStr"><is><t>C1</t></is></c><c t="inlineStr"><is><t>QLF</t></is></c></row>`
	data := withRows(t, rows+strings.Repeat(`<row s="1"/>`, 1<<20-2))
	bounded(t, func() {
		b, err := ReadBOM("f.xlsx", data, nil)
		must(t, err)
		sameLines(t, "rows", shortRows(b), []string{"C1|1|QLF"})
	})
}

// A large but honest list is read within bounds.
func TestLargeWorkbook(t *testing.T) {
	f := excelize.NewFile()
	w, err := f.NewStreamWriter("Sheet1")
	must(t, err)
	for i := range 10_000 {
		row := []any{fmt.Sprintf("FM-%d", i), fmt.Sprintf("QLF-%d", i), i, 0.25, "a capacitor for high voltage", "EUR"}
		must(t, w.SetRow(fmt.Sprintf("A%d", i+1), row))
	}
	must(t, w.Flush())
	data := saved(t, f)
	bounded(t, func() {
		table, err := Open("f.xlsx", data, nil)
		must(t, err)
		lines := table.Sheets[0].Lines
		if last := lines[len(lines)-1]; len(lines) != 10_000 || last.Number != 10_000 || last.Cells[1].Text != "QLF-9999" || last.Cells[3].Kind != Number {
			t.Errorf("got %d lines, the last %+v", len(lines), last)
		}
	})
}

// The reader takes any bytes within the parts of a workbook.
func FuzzWorkbook(f *testing.F) {
	good := sheetOf(f, [][]any{{"Designator", "Part number", "Qty"}, {"C1-C4", "QLF", 4}, {"D1", "TVD", "1,200"}})
	in, err := zip.NewReader(bytes.NewReader(good), int64(len(good)))
	must(f, err)
	parts := map[string]string{}
	for _, e := range in.File {
		r, err := e.Open()
		must(f, err)
		data, err := io.ReadAll(r)
		must(f, err)
		parts[e.Name] = string(data)
	}
	f.Add(parts[sheetPart], parts[sharedPart], parts[bookPart], parts["xl/styles.xml"])
	f.Add(sheetXML(`<row r="1"><c r="A1" t="s"><v>0</v></c><c t="b"><v>1</v></c><c t="e"><v>#N/A</v></c><c><f>1</f></c></row>`), parts[sharedPart], parts[bookPart], parts["xl/styles.xml"])
	f.Fuzz(func(t *testing.T, sheet, shared, book, styles string) {
		data := repack(t, good, map[string]func([]byte) []byte{
			sheetPart: constant(sheet), sharedPart: constant(shared), bookPart: constant(book), "xl/styles.xml": constant(styles)})
		checkReading(t, "f.xlsx", data)
		checkReading(t, "f.xlsx", data[:len(data)*9/10])
	})
}
