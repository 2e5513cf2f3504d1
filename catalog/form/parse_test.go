package form_test

import (
	"bytes"
	"errors"
	"fmt"
	"os"
	"strings"
	"testing"

	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// problemsOf parses and reads nothing.
func problemsOf(data string) []string {
	var r form.Report
	form.Parse("f.yaml", []byte(data), &r)
	return linesOf(r.Err())
}

func linesOf(err error) []string {
	problems, _ := errors.AsType[form.Problems](err)
	var lines []string
	for _, p := range problems {
		lines = append(lines, p.String())
	}
	return lines
}

// Each file that cannot be read is answered in plain words at its place. The
// lines of syntax faults are pinned one by one, for the library's own are
// missing on the first line and one too small where its parser finds them.
func TestWhatIsNoForm(t *testing.T) {
	tests := map[string]struct{ data, want string }{
		"empty":                {"", "f.yaml:1:1: the file is empty"},
		"blank":                {" \n\t\r\n", "f.yaml:1:1: the file is empty"},
		"byte-order mark only": {"\ufeff", "f.yaml:1:1: the file is empty"},
		"comments only":        {"# a\n# b\n", "f.yaml:1:1: nothing is written but comments or blank lines"},
		"null":                 {"~\n", "f.yaml:1:1: the file must hold keys with values; this is a single value"},
		"binary":               {"PK\x03\x04\x00\x00", "f.yaml:1:1: the file is not text; name a YAML file, in UTF-8"},
		"UTF-16":               {"\xff\xfea\x00", "f.yaml:1:1: the file is UTF-16 text; save it as UTF-8"},
		"Latin-1":              {"a: 1\nb: 5 \xb5F\n", `f.yaml:2:6: the byte 0xb5 is not UTF-8; save the file as UTF-8`},
		"escape character":     {"a: 1\nb: é\x1b[0m\n", "f.yaml:2:5: the control character U+001B is not text; remove it"},
		"a list":               {"# c\n- a\n", "f.yaml:2:1: the file must hold keys with values; this is a list"},
		"a word":               {"hello\n", "f.yaml:1:1: the file must hold keys with values; this is a single value"},
		"two documents":        {"a: 1\n---\nb: 2\n", "f.yaml:2:1: a second document starts here; a file holds one"},
		"two documents, one empty": {"a: 1\n---\n",
			"f.yaml:2:1: a second document starts here; a file holds one"},
		"open bracket, line 1":  {"a: [1, 2\n", "f.yaml:1:1: the list that opens here with [ is not closed, or a comma is missing in it"},
		"open bracket, line 3":  {"a: 1\nb: 2\nc: [1, 2\nd: 4\n", "f.yaml:3:1: the list that opens here with [ is not closed, or a comma is missing in it"},
		"open brace":            {"a: 1\nb: {c: 2\nd: 4\n", "f.yaml:2:1: the mapping that opens here with { is not closed, or a comma is missing in it"},
		"list under a mapping":  {"a: 1\nb: 2\n- c\n", "f.yaml:3:1: this does not continue the keys above it; check the indentation, the colon, and quotes that end early"},
		"open quote, line 1":    {"a: 'b\nc: 1\nd: 2\n", "f.yaml:1:1: a quotation mark that opens here is not closed"},
		"open quote, line 2":    {"a: 1\nb: \"c\nd: 2\n", "f.yaml:2:1: a quotation mark that opens here is not closed"},
		"tab":                   {"a:\n\tb: 1\n", "f.yaml:2:1: a value cannot start with this sign or a tab; indent with spaces, and put text that starts with @, ` or % in quotes"},
		"at sign":               {"a: @b\n", "f.yaml:1:1: a value cannot start with this sign or a tab; indent with spaces, and put text that starts with @, ` or % in quotes"},
		"two colons":            {"a: 1\nb: c: d\n", "f.yaml:2:1: a colon and a value are not allowed here; check the indentation, and put text that contains a colon and a space in quotes"},
		"list on a key's line":  {"a: - b\n", "f.yaml:1:1: a list entry is not allowed here; start the list on the line below its key"},
		"missing colon":         {"a: 1\nbc\nd: 2\n", "f.yaml:2:1: a colon after a key is missing, or text of several lines is not in quotes"},
		"unknown escape":        {"a: \"C:\\parts\"\n", "f.yaml:1:1: a backslash within \" \" has a meaning of its own; use ' ' for text with backslashes"},
		"bad indentation":       {"a:\n  b: 1\n c: 2\n", "f.yaml:3:1: this does not continue the keys above it; check the indentation, the colon, and quotes that end early"},
		"stray comma":           {"a: , b\n", "f.yaml:1:1: a value was expected; check for a stray comma, bracket or sign, and put text that starts with one in quotes"},
		"unknown alias":         {"a: 1\nb: *c\n", "f.yaml:2:1: aliases (words that start with *) are not used here; put text that starts with * in quotes"},
		"directive":             {"%YAML 1.1\n%YAML 1.1\n---\na: 1\n", "f.yaml:2:1: directives (lines that start with %) are not used here; remove them"},
		"unknown directive":     {"%FOO\n", "f.yaml:1:1: directives (lines that start with %) are not used here; put text that starts with % in quotes"},
		"deep brackets":         {"a: " + strings.Repeat("[", 20000), "f.yaml:1:1: the values are nested too deeply"},
		"key in a list":         {"# x\n\na:\n  - b\n  - c\n  d: e\n  - f\n", "f.yaml:6:1: this does not continue the list above it; check the indentation and the dash"},
		"two closing brackets":  {"a: 1\nb: [c]]\n", "f.yaml:2:1: this does not continue the keys above it; check the indentation, the colon, and quotes that end early"},
		"quotes that end early": {"a: 1\nb: 'it's'\nc: 2\n", "f.yaml:2:1: this does not continue the keys above it; check the indentation, the colon, and quotes that end early"},
		"fault on line 301": {strings.Repeat("- b: [1,\n   2]\n  c: 'x\n    y'\n", 75) + " d: 1\n- b: 3\n",
			"f.yaml:301:1: this does not continue the list above it; check the indentation and the dash"},
		"text after brackets": {"a: 1\nb: [c] d\n", "f.yaml:2:1: this does not continue the keys above it; check the indentation, the colon, and quotes that end early"},
	}
	for name, tt := range tests {
		t.Run(name, func(t *testing.T) {
			if got := strings.Join(problemsOf(tt.data), "\n"); got != tt.want {
				t.Errorf("%q\n got %s\nwant %s", short(tt.data), got, tt.want)
			}
		})
	}
}

func short(s string) string { return s[:min(len(s), 60)] }

// What no form allows is reported all at once, each at its place.
func TestRefusedFeatures(t *testing.T) {
	got := problemsOf(strings.Join([]string{
		"base: &b {x: 1}",        // 1
		"copy: *b",               // 2
		"tagged: !volt 3",        // 3
		"twice: 1",               // 4
		"[a, b]: list as key",    // 5
		"twice: 2",               // 6
		"typed: !!str 4",         // 7
		"inner: {x: 1, x: 2}",    // 8
		"é: {y: 1, é: 2, y: &c}", // 9
	}, "\n"))
	want := []string{
		`f.yaml:1:7: the anchor "&b" is not used here; write the value out wherever it is needed`,
		`f.yaml:2:7: the alias "*b" is not used here; write the value out`,
		`f.yaml:3:9: the tag "!volt" is not used here; leave it out`,
		`f.yaml:4:1: the key "twice" is written again further down; keep one`,
		`f.yaml:5:1: a key must be a word; this is a list`,
		`f.yaml:6:1: the key "twice" is written already at line 4; keep one`,
		`f.yaml:7:8: the tag "!!str" is not used here; leave it out`,
		`f.yaml:8:9: the key "x" is written again further down; keep one`,
		`f.yaml:8:15: the key "x" is written already at line 8; keep one`,
		`f.yaml:9:5: the key "y" is written again further down; keep one`,
		`f.yaml:9:17: the key "y" is written already at line 9; keep one`,
		`f.yaml:9:20: the anchor "&c" is not used here; write the value out wherever it is needed`,
	}
	if g, w := strings.Join(got, "\n"), strings.Join(want, "\n"); g != w {
		t.Errorf("got\n%s\nwant\n%s", g, w)
	}
}

// A byte-order mark, CRLF and characters of several bytes leave lines and
// columns as an editor shows them.
func TestPlaces(t *testing.T) {
	for name, data := range map[string]string{
		"plain":           "é: 1\nbcd: {é: x, f: g}\n",
		"CRLF":            "é: 1\r\nbcd: {é: x, f: g}\r\n",
		"byte-order mark": "\ufeffé: 1\nbcd: {é: x, f: g}\n",
	} {
		t.Run(name, func(t *testing.T) {
			var r form.Report
			m := form.Parse("f.yaml", []byte(data), &r)
			if got, want := fmt.Sprint(m.PlaceOf("é"), m.PlaceOf("bcd"), m.Map("bcd").PlaceOf("f")), "f.yaml:1:4 f.yaml:2:6 f.yaml:2:16"; got != want {
				t.Errorf("got %s, want %s", got, want)
			}
		})
	}
}

func TestLimits(t *testing.T) {
	tests := map[string]struct {
		data   string
		limits form.Limits
		want   string
	}{
		"bytes": {"a: 123456", form.Limits{Bytes: 8}, "f.yaml:1:1: the file has 9 bytes; 8 are the most that such a file may have"},
		"nodes": {"a: [1, 2, 3, 4]", form.Limits{Nodes: 5}, "f.yaml:1:1: the file holds more than the 5 values that one file may; split it into several"},
		"depth": {"a: {b: {c: [1]}}", form.Limits{Depth: 3}, "f.yaml:1:12: the values are nested more than 3 deep"},
		"right": {"a: {b: {c: [1]}}", form.Limits{Depth: 4, Bytes: 16, Nodes: 12}, ""},
	}
	for name, tt := range tests {
		t.Run(name, func(t *testing.T) {
			var r form.Report
			form.ParseWithin("f.yaml", []byte(tt.data), tt.limits, &r)
			if got := strings.Join(linesOf(r.Err()), "\n"); got != tt.want {
				t.Errorf("got %s\nwant %s", got, tt.want)
			}
		})
	}
}

// Large files of anything are answered with a problem, most of them without
// being parsed: 50 MB with RUNGWRIGHT_HEAVY=1, otherwise 5 MB.
func TestLargeFiles(t *testing.T) {
	size := 5_000_000
	if os.Getenv("RUNGWRIGHT_HEAVY") == "1" {
		size = 50_000_000
	}
	for name, unit := range map[string]string{
		"keys": "a: b\n", "dashes": "- \n", "brackets": "[", "braces": "{a: ", "commas": "a,", "words": "a ", "hashes": "#\n", "anchors": "&a ",
		"quotes": "''", "spaces": " ", "blank lines": "\n", "question marks": "? ", "zeros": "\x00",
	} {
		t.Run(name, func(t *testing.T) {
			var r form.Report
			form.Parse("f.yaml", bytes.Repeat([]byte(unit), size/len(unit)), &r)
			if r.Err() == nil {
				t.Error("no problem was reported")
			}
		})
	}
}

// Any bytes give a mapping or at least one problem, and every getter copes.
func FuzzParse(f *testing.F) {
	for _, seed := range []string{"", "a: 1", "a: [1, {b: 2}]\nb: {c: d}\n", "a: &x 1\nb: *x", "- a", "a: |\n  b\n", "\ufeffa: 'b'", "? [a]\n: b", "a: 25 VV", "%YAML 1.1\n---\na: 1", "!!binary a: b"} {
		f.Add([]byte(seed))
	}
	f.Fuzz(func(t *testing.T, data []byte) {
		var r form.Report
		m := form.Parse("f.yaml", data, &r)
		if m == nil && r.Err() == nil {
			t.Fatal("neither a mapping nor a problem")
		}
		readEverything(m, 0)
		m.Done()
		problems, _ := errors.AsType[form.Problems](r.Err())
		lines := bytes.Count(data, []byte("\n")) + bytes.Count(data, []byte("\r")) + 2
		for _, p := range problems {
			if p.Text == "" || p.Place.Line < 1 || p.Place.Line > lines || p.Place.Column < 1 || strings.ContainsAny(p.Text, "\n\x1b") {
				t.Fatalf("a problem without a proper place or text: %q at %v", p.Text, p.Place)
			}
		}
	})
}

func readEverything(m *form.Map, level int) {
	for _, key := range append(m.Keys(), "absent") {
		m.Text(key)
		m.Choice(key, "one", "two")
		m.Int(key, 1, 10, 1)
		m.Bool(key)
		m.Money(key)
		form.Get[quantity.Volts](m, key, form.Positive)
		for _, item := range m.List(key) {
			form.GetItem[quantity.Ratio](item, form.Fraction)
			for _, inner := range item.Items() {
				inner.Text()
				inner.Problem("seen")
			}
		}
		m.Maps(key)
		m.Problem(key, "seen")
		if level < 3 {
			readEverything(m.Map(key), level+1)
		}
	}
}
