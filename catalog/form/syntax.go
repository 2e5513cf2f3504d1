package form

import (
	"bytes"
	"errors"
	"regexp"
	"sort"
	"strconv"
	"strings"
)

// fault is a message of the library in our words. How its line is meant
// differs, and each is pinned by a test.
type fault struct {
	theirs string
	ours   string
	line   lineRule
}

// lineRule says what the line in the library's message is worth. (The line
// that it gives counts the leading comment line of ours.)
type lineRule int

const (
	fromScanner lineRule = iota // right
	fromParser                  // one too small; where the open bracket stands
	searched                    // missing, or where the whole block starts: search for the fault
)

// faults are looked through in order; the first contained in the message
// counts.
var faults = []fault{
	{"did not find expected ',' or ']'", "the list that opens here with [ is not closed, or a comma is missing in it", fromParser},
	{"did not find expected ',' or '}'", "the mapping that opens here with { is not closed, or a comma is missing in it", fromParser},
	{"did not find expected '-' indicator", "this does not continue the list above it; check the indentation and the dash", searched},
	{"did not find expected key", "this does not continue the keys above it; check the indentation, the colon, and quotes that end early", searched},
	{"did not find expected node content", "a value was expected; check for a stray comma, bracket or sign, and put text that starts with one in quotes", searched},
	{"did not find expected <document start>", "this stands outside of what is above it; check the indentation and the closing brackets", searched},
	{"found undefined tag handle", "tags (words that start with !) are not used here; put text that starts with ! in quotes", searched},
	{"found duplicate %", "directives (lines that start with %) are not used here; remove them", searched},
	{"found incompatible YAML document", "directives (lines that start with %) are not used here; remove them", searched},
	{"unknown anchor", "aliases (words that start with *) are not used here; put text that starts with * in quotes", searched},
	{"found unexpected end of stream", "a quotation mark that opens here is not closed", fromScanner},
	{"found unexpected document indicator", "a quotation mark that opens here is not closed", fromScanner},
	{"found unknown escape character", "a backslash within \" \" has a meaning of its own; use ' ' for text with backslashes", fromScanner},
	{"did not find expected hexdecimal number", "an escape within \" \" lacks digits; use ' ' for text with backslashes", fromScanner},
	{"found invalid Unicode character escape code", "an escape within \" \" names no character", fromScanner},
	{"mapping values are not allowed", "a colon and a value are not allowed here; check the indentation, and put text that contains a colon and a space in quotes", fromScanner},
	{"block sequence entries are not allowed", "a list entry is not allowed here; start the list on the line below its key", fromScanner},
	{"found character that cannot start any token", "a value cannot start with this sign or a tab; indent with spaces, and put text that starts with @, ` or % in quotes", fromScanner},
	{"found a tab character", "a tab is used where spaces belong; indent with spaces", fromScanner},
	{"could not find expected ':'", "a colon after a key is missing, or text of several lines is not in quotes", fromScanner},
	{"found unknown directive name", "directives (lines that start with %) are not used here; put text that starts with % in quotes", fromScanner},
	{"exceeded max depth", "the values are nested too deeply", fromScanner},
	{"while scanning an anchor", "anchors and aliases (words that start with & or *) are not used here; put such text in quotes", fromScanner},
	{"while scanning an alias", "anchors and aliases (words that start with & or *) are not used here; put such text in quotes", fromScanner},
	{"did not find expected alphabetic or numeric character", "anchors and aliases (words that start with & or *) are not used here; put such text in quotes", fromScanner},
	{"did not find expected whitespace", "tags (words that start with !) are not used here; put text that starts with ! in quotes", fromScanner},
	{"did not find expected tag URI", "tags (words that start with !) are not used here; put text that starts with ! in quotes", fromScanner},
	{"did not find expected '!'", "tags (words that start with !) are not used here; put text that starts with ! in quotes", fromScanner},
	{"expected a comment or a line break", "text after a | or > must go on the next line", fromScanner},
	{"found an indentation indicator equal to 0", "the number after a | or > must be 1 to 9", fromScanner},
}

var errorLine = regexp.MustCompile(`^yaml: line (\d+): (?s:(.*))$`)

// explainSyntax turns an error of the library about data into a line and
// plain words.
func explainSyntax(data []byte, err error) (line int, text string) {
	if second, ok := errors.AsType[secondDocument](err); ok {
		return int(second), "a second document starts here; a file holds one"
	}
	text = strings.TrimPrefix(err.Error(), "yaml: ")
	if found := errorLine.FindStringSubmatch(err.Error()); found != nil {
		line, _ = strconv.Atoi(found[1])
		text = found[2]
	}
	for _, f := range faults {
		if strings.Contains(text, f.theirs) {
			return f.locate(data, err, line), f.ours
		}
	}
	return max(line-1, 1), "this is not well-formed YAML: " + strings.Map(printable, text)
}

func (f fault) locate(data []byte, err error, line int) int {
	switch {
	case f.line == fromScanner:
		line--
	case f.line == searched && len(data) <= mostSearched:
		line = searchFault(data, err)
	}
	return max(line, 1)
}

// mostSearched bounds the time of a search, some twenty parses.
const mostSearched = 1 << 20

// searchFault finds the first line up to which the text has the same fault:
// the library reads token by token, so that what follows plays no part.
func searchFault(data []byte, fault error) int {
	lines := bytes.SplitAfter(data, []byte("\n"))
	end := make([]int, len(lines)+1)
	for i, l := range lines {
		end[i+1] = end[i] + len(l)
	}
	return sort.Search(len(lines), func(k int) bool {
		_, err := decode(data[:end[k]])
		return err != nil && err.Error() == fault.Error()
	})
}

func printable(r rune) rune {
	if unseen(r) {
		return ' '
	}
	return r
}
