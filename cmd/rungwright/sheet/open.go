package sheet

import (
	"bytes"
	"path"
	"strings"
)

// Options settle what a file leaves open; nil and the zero value settle
// nothing, and what is in doubt is then an error.
type Options struct {
	Sheet     string           // the sheet to read; empty: the one with the best header
	HeaderRow int              // row of the header, its last when it has two; 0: found
	Columns   map[Field]string // by header text or column letter; missing: found by the header
	Quantity  QuantitySource   // which counts when they disagree; empty: that is an error
	Decimal   rune             // '.' or ','; 0: decided by each column
	Delimiter rune             // of a text file; 0: found
}

// filled gives options that may be read, for nil too.
func (o *Options) filled() *Options {
	if o == nil {
		return &Options{}
	}
	return o
}

// Open reads a workbook or a text table; name stands for the file in
// messages, and the contents alone say what it is. Errors are form.Problems.
func Open(name string, data []byte, o *Options) (*Table, error) {
	o = o.filled()
	if len(data) > maxFile {
		return nil, refusal(Place{File: name}, "the file has %d MB; %d MB are the most that a table may have", len(data)>>20, maxFile>>20)
	}
	if why := notTable(data); why != "" {
		return nil, refusal(Place{File: name}, "%s", why)
	}
	if isZip(data) {
		return readWorkbook(name, data)
	}
	return readText(name, data, o)
}

func isZip(data []byte) bool { return bytes.HasPrefix(data, []byte("PK\x03\x04")) }

// foreign are files that are told by how they begin.
var foreign = []struct{ begins, why string }{
	{"%PDF", "this is a PDF document; ask for the table as .xlsx or .csv"},
	{"{\\rtf", "this is a text document; save the table as .xlsx or .csv"},
	{"\x89PNG", "this is a picture; ask for the table as .xlsx or .csv"},
	{"\xff\xd8\xff", "this is a picture; ask for the table as .xlsx or .csv"},
	{"\x1f\x8b", "this is a compressed file; unpack it first"},
	{"7z\xbc\xaf", "this is a compressed archive; unpack it first"},
	{"PK\x05\x06", "this is an empty zip archive, no workbook"},
	{"<html", "this is a web page, whatever its name says; open it in a spreadsheet program and save it as .xlsx"},
	{"<!doctype html", "this is a web page, whatever its name says; open it in a spreadsheet program and save it as .xlsx"},
	{"<table", "this is a web page, whatever its name says; open it in a spreadsheet program and save it as .xlsx"},
	{"<?xml", "this is an XML document, no table; open it in a spreadsheet program and save it as .xlsx"},
}

// compound is how old office files and password-protected workbooks begin.
const compound = "\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1"

// notTable says in words what a file is that cannot be read; "" for a file
// that may be a table.
func notTable(data []byte) string {
	if len(bytes.TrimSpace(data)) == 0 {
		return "the file is empty"
	}
	if bytes.HasPrefix(data, []byte(compound)) {
		return compoundKind(data)
	}
	start := strings.ToLower(string(bytes.TrimLeft(bytes.TrimPrefix(data[:min(len(data), 200)], []byte("\ufeff")), " \t\r\n")))
	for _, f := range foreign {
		if strings.HasPrefix(start, f.begins) || bytes.HasPrefix(data, []byte(f.begins)) {
			return f.why
		}
	}
	return ""
}

// compoundKind tells a password-protected workbook from an old one by the
// name of the stream that it holds.
func compoundKind(data []byte) string {
	protected := utf16Bytes("EncryptedPackage")
	if bytes.Contains(data, protected) {
		return "the workbook is protected with a password; open it, save a copy as .xlsx without a password, and name that"
	}
	if bytes.Contains(data, utf16Bytes("Workbook")) || bytes.Contains(data, utf16Bytes("Book")) {
		return "this is an old .xls workbook; open it and save it as .xlsx"
	}
	return "this is an old office document or a protected one; open it and save the table as .xlsx without a password"
}

// utf16Bytes is text as the directory of a compound file holds it.
func utf16Bytes(ascii string) []byte {
	var out []byte
	for i := range len(ascii) {
		out = append(out, ascii[i], 0)
	}
	return out
}

// isYAML tells a YAML file by its name, or, where there is none (standard
// input), by a key at the start of a line.
func isYAML(name string, data []byte) bool {
	switch strings.ToLower(path.Ext(name)) {
	case ".yaml", ".yml":
		return true
	case ".csv", ".tsv", ".txt", ".xlsx", ".xlsm", ".xls", ".ods":
		return false
	}
	return bytes.HasPrefix(data, []byte("bom:")) || bytes.Contains(data[:min(len(data), 4096)], []byte("\nbom:"))
}
