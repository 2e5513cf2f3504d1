package form

import (
	"bytes"
	"unicode"
	"unicode/utf8"
)

// checkText refuses, before parsing, what cannot be a YAML file: too large,
// empty, binary, not UTF-8, with control characters, or with too many values.
func checkText(file string, data []byte, limits Limits, r *Report) bool {
	start := Place{file, 1, 1}
	switch {
	case len(data) > limits.Bytes:
		r.Add(start, "the file has %d bytes; %d are the most that such a file may have", len(data), limits.Bytes)
	case len(bytes.TrimSpace(data)) == 0:
		r.Add(start, "the file is empty")
	case bytes.HasPrefix(data, []byte{0xff, 0xfe}), bytes.HasPrefix(data, []byte{0xfe, 0xff}):
		r.Add(start, "the file is UTF-16 text; save it as UTF-8")
	case bytes.IndexByte(data, 0) >= 0:
		r.Add(start, "the file is not text; name a YAML file, in UTF-8")
	default:
		return checkCharacters(file, data, r) && checkCount(file, data, limits.Nodes, r)
	}
	return false
}

// checkCharacters finds the first byte that is not UTF-8 and the first
// control character.
func checkCharacters(file string, data []byte, r *Report) bool {
	line, column := 1, 1
	for i := 0; i < len(data); {
		c, size := rune(data[i]), 1
		if c >= utf8.RuneSelf {
			c, size = utf8.DecodeRune(data[i:])
		}
		switch {
		case c == utf8.RuneError && size == 1:
			r.Add(Place{file, line, column}, "the byte %#02x is not UTF-8; save the file as UTF-8", data[i])
			return false
		case unicode.IsControl(c) && c != '\n' && c != '\r' && c != '\t':
			r.Add(Place{file, line, column}, "the control character %U is not text; remove it", c)
			return false
		case c == '\n':
			line, column = line+1, 0
		}
		i += size
		column++
	}
	return true
}

// checkCount bounds the number of values before they are made.
func checkCount(file string, data []byte, limit int, r *Report) bool {
	if countValues(data) <= limit {
		return true
	}
	r.Add(Place{file, 1, 1}, "the file holds more than the %d values that one file may; split it into several", limit)
	return false
}

// countValues counts what separates values, twice, for each may bring a value
// and what holds it; and comments, which take as much room.
func countValues(data []byte) int {
	n := 0
	for _, separator := range []string{":", ",", "[", "{", "?", "- ", "-\n", "-\r", "-\t"} {
		n += 2 * bytes.Count(data, []byte(separator))
	}
	return n + bytes.Count(data, []byte("#"))
}
