package sheet

import (
	"archive/zip"
	"bytes"
	"errors"
	"fmt"
	"io"
	"path"
	"slices"
	"strings"
)

// The limits of a workbook. They bound memory to some hundreds of MB and time
// to some seconds, and lie beyond any bill of materials or supplier's list
// that a spreadsheet program handles well.
const (
	maxFile    = 50 << 20  // bytes of the file
	maxEntries = 2000      // files within it
	maxEntry   = 128 << 20 // bytes of one of them, unpacked: a sheet or the shared texts
	maxOther   = 16 << 20  // bytes of any other XML, unpacked: the library holds it whole
	maxUnpack  = 256 << 20 // bytes of all, unpacked
	maxSheets  = 250
	maxRow     = 1 << 20   // row number
	maxColumns = 1024      // column number
	maxRows    = 200_000   // rows with anything in them, over all sheets
	maxCells   = 2_000_000 // cells with anything in them, over all sheets
	maxSpan    = 4_000_000 // sum over the rows of the last column used
	maxMerges  = 10_000
	maxStrings = 1_000_000 // shared texts
	maxNodes   = 4_000_000 // XML elements of the shared texts
	maxStyles  = 1_000_000 // XML elements of all other parts together
	maxDeep    = 64        // nesting of XML elements
	maxMarkup  = 1 << 20   // bytes of one text or one tag
)

// bookScan is what the gate learns of a workbook while checking it.
type bookScan struct{ sheets []sheetScan }

// sheetScan is what it learns of a sheet. Rows are those with anything in
// them.
type sheetScan struct {
	name, part    string
	hidden        bool
	rows          []rowScan
	merges        []Merge
	hiddenColumns []span
}

type rowScan struct {
	number int
	hidden bool
	kinds  []Kind // from column A
}

// gate reads a workbook to its end and refuses what is damaged, hostile or
// beyond the limits, before the library reads it: that library takes a
// damaged sheet for a shorter one, and has no bounds.
type gate struct {
	file    string
	parts   map[string]*zip.File
	targets map[string]string // part of each relation of the workbook
	budget  budget
}

// budget counts what is shared by all parts.
type budget struct{ rows, cells, span, merges, strings, nodes, styles int }

func passGate(name string, data []byte) (*bookScan, error) {
	g := &gate{file: name, parts: map[string]*zip.File{}, targets: map[string]string{}}
	archive, err := zip.NewReader(bytes.NewReader(data), int64(len(data)))
	if err != nil {
		return nil, g.refuse("the workbook is damaged or cut off; fetch it again, or open it and save a copy")
	}
	if err := g.checkEntries(archive.File); err != nil {
		return nil, err
	}
	return g.scan(archive.File)
}

func (g *gate) refuse(format string, args ...any) error {
	return refusal(Place{File: g.file}, format, args...)
}

// checkEntries looks at names and declared sizes only.
func (g *gate) checkEntries(entries []*zip.File) error {
	if len(entries) > maxEntries {
		return g.refuse("the workbook holds %d files; %d are the most", len(entries), maxEntries)
	}
	total := uint64(0)
	for _, e := range entries {
		size := e.UncompressedSize64
		total += min(size, maxUnpack+1)
		switch {
		case !plainName(e.Name):
			return g.refuse("the workbook holds a file named %.60q, which no spreadsheet program writes", e.Name)
		case g.parts[e.Name] != nil:
			return g.refuse("the workbook holds the file %.60q twice; open it and save a copy", e.Name)
		case e.Flags&1 != 0:
			return g.refuse("the workbook is protected with a password; save a copy without")
		case size > maxEntry, total > maxUnpack, isXML(e.Name) && !isLong(e.Name) && size > maxOther:
			return g.refuse("the workbook unpacks to more than it may (%.60q: %d MB); if it is a real one, save the sheet alone as .xlsx or .csv",
				e.Name, size>>20)
		}
		g.parts[e.Name] = e
	}
	return g.checkKind()
}

// plainName refuses names that lead out of the archive.
func plainName(name string) bool {
	return name != "" && !strings.HasPrefix(name, "/") && !strings.ContainsAny(name, "\\\x00") &&
		!slices.Contains(strings.Split(name, "/"), "..")
}

// isXML tells the parts that are scanned. Others, such as pictures, drawings
// in the old format and foreign data, are only unpacked and checked.
func isXML(name string) bool {
	ext := path.Ext(name)
	return (ext == ".xml" || ext == ".rels") && !strings.HasPrefix(name, "customXml/")
}

// isLong tells the parts that the library reads piece by piece.
func isLong(name string) bool {
	return strings.HasPrefix(name, "xl/worksheets/sheet") || name == sharedPart
}

// The fixed parts of a workbook.
const (
	bookPart   = "xl/workbook.xml"
	sharedPart = "xl/sharedStrings.xml"
	rootRels   = "_rels/.rels"
	bookRels   = "xl/_rels/workbook.xml.rels"
)

// checkKind tells other documents that are zip archives too.
func (g *gate) checkKind() error {
	switch {
	case g.parts[bookPart] != nil:
		return nil
	case g.parts["content.xml"] != nil && g.parts["mimetype"] != nil:
		return g.refuse("this is an OpenDocument file (.ods or the like); open it and save the table as .xlsx or .csv")
	case g.parts["xl/workbook.bin"] != nil:
		return g.refuse("this is a binary workbook (.xlsb); open it and save it as .xlsx")
	case g.parts["word/document.xml"] != nil:
		return g.refuse("this is a text document; copy its table into a spreadsheet and save that as .xlsx")
	}
	return g.refuse("this is a zip archive without a workbook; name the .xlsx or .csv file itself")
}

// scan reads every entry to its end: the relations first, which name the
// sheets, then the shared texts, which the sheets count on.
func (g *gate) scan(entries []*zip.File) (*bookScan, error) {
	first := []string{rootRels, bookRels, bookPart, sharedPart}
	book := &bookScan{}
	for _, name := range first {
		if e := g.parts[name]; e != nil {
			if err := g.scanPart(e, g.handlerOf(name, book)); err != nil {
				return nil, err
			}
		}
	}
	if err := g.resolve(book); err != nil {
		return nil, err
	}
	for _, e := range entries {
		if slices.Contains(first, e.Name) {
			continue
		}
		if err := g.scanPart(e, g.handlerOf(e.Name, book)); err != nil {
			return nil, err
		}
	}
	return book, nil
}

// handlerOf picks what watches a part's elements.
func (g *gate) handlerOf(name string, book *bookScan) handler {
	switch name {
	case rootRels:
		return &rootReader{}
	case bookRels:
		return &relsReader{g}
	case bookPart:
		return &bookReader{book: book}
	case sharedPart:
		return &sharedReader{budget: &g.budget}
	}
	for i := range book.sheets {
		if book.sheets[i].part == name {
			return newSheetReader(&book.sheets[i], &g.budget)
		}
	}
	return &otherReader{budget: &g.budget}
}

// resolve finds the part of every sheet. Chart sheets and the like have no
// cells and are left out.
func (g *gate) resolve(book *bookScan) error {
	var sheets []sheetScan
	names, parts := map[string]bool{}, map[string]bool{}
	for _, s := range book.sheets {
		target, known := g.targets[s.part]
		switch {
		case !known:
			continue
		case s.name == "":
			return g.refuse("a sheet has no name; open the workbook and save a copy")
		case g.parts[target] == nil:
			return g.refuse("the sheet %q is missing in the workbook, which is damaged; fetch it again", s.name)
		case names[strings.ToLower(s.name)], parts[target]:
			return g.refuse("the sheet %q is listed twice in the workbook, which is damaged; open it and save a copy", s.name)
		}
		names[strings.ToLower(s.name)], parts[target] = true, true
		s.part = target
		sheets = append(sheets, s)
	}
	if len(sheets) == 0 {
		return g.refuse("the workbook has no sheet with cells")
	}
	book.sheets = sheets
	return nil
}

// scanPart unpacks a part to its end, which checks its length and checksum,
// and scans it when it is XML.
func (g *gate) scanPart(e *zip.File, h handler) error {
	damaged := func(err error) error {
		if limit, ok := errors.AsType[limitError](err); ok {
			return g.refuse("%s: %s", e.Name, limit)
		}
		return g.refuse("the workbook is damaged (%s: %v); fetch it again, or open it and save a copy", e.Name, err)
	}
	unpacked, err := e.Open()
	if err != nil {
		return damaged(err)
	}
	defer unpacked.Close()
	bounded := &io.LimitedReader{R: unpacked, N: int64(e.UncompressedSize64) + 1}
	if isXML(e.Name) {
		if err := scanXML(bounded, h); err != nil {
			return damaged(err)
		}
	}
	if _, err := io.Copy(io.Discard, bounded); err != nil {
		return damaged(err)
	}
	if bounded.N == 0 {
		return damaged(errors.New("it is longer than it says"))
	}
	return nil
}

// limitError is a limit that a workbook breaks, told apart from damage.
type limitError string

func (e limitError) Error() string { return string(e) }

func overLimit(format string, args ...any) error { return limitError(fmt.Sprintf(format, args...)) }
