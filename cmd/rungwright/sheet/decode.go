package sheet

import (
	"bytes"
	"strings"
	"unicode/utf8"

	"golang.org/x/text/encoding/charmap"
	"golang.org/x/text/encoding/unicode"
)

// decode turns the bytes of a text file into UTF-8 with line feeds alone at
// the ends of lines. What is neither UTF-8 nor marked as UTF-16 is taken for
// Windows-1252, which is said, for nothing in such a file tells.
func decode(name string, data []byte, d *doubts) (string, error) {
	at := Place{File: name}
	var text []byte
	var err error
	switch {
	case bytes.HasPrefix(data, []byte("\xff\xfe")), bytes.HasPrefix(data, []byte("\xfe\xff")):
		text, err = unicode.UTF16(unicode.LittleEndian, unicode.UseBOM).NewDecoder().Bytes(data)
	case isUTF16(data, 1):
		text, err = unicode.UTF16(unicode.LittleEndian, unicode.IgnoreBOM).NewDecoder().Bytes(data)
		d.note(at, "", "read as UTF-16 text, which the file does not say; save it as UTF-8 if signs look wrong")
	case isUTF16(data, 0):
		text, err = unicode.UTF16(unicode.BigEndian, unicode.IgnoreBOM).NewDecoder().Bytes(data)
		d.note(at, "", "read as UTF-16 text, which the file does not say; save it as UTF-8 if signs look wrong")
	case bytes.IndexByte(data, 0) >= 0:
		return "", refusal(at, "the file is not a table that can be read; save it as .xlsx, or as .csv in UTF-8")
	case utf8.Valid(data):
		text = bytes.TrimPrefix(data, []byte("\ufeff"))
	default:
		text, err = charmap.Windows1252.NewDecoder().Bytes(data)
		d.warn(at, "", "the text is not UTF-8 and was read as Windows-1252 (Western European); save it as UTF-8 if signs such as µ and Ω look wrong")
	}
	if err != nil || looksBinary(text) {
		return "", refusal(at, "the file is not text that can be read; save it as .xlsx, or as .csv in UTF-8")
	}
	return strings.NewReplacer("\r\n", "\n", "\r", "\n").Replace(string(text)), nil
}

// isUTF16 tells text without a mark by the zero halves of its plain letters:
// nearly all bytes at odd (1) or even (0) positions.
func isUTF16(data []byte, odd int) bool {
	sample := data[:min(len(data), 2000)&^1]
	if len(sample) < 4 {
		return false
	}
	zeros, others := 0, 0
	for i, b := range sample {
		switch {
		case b == 0 && i&1 == odd:
			zeros++
		case b == 0:
			others++
		}
	}
	return others == 0 && zeros*10 >= len(sample)*4
}

// looksBinary tells by control characters that no table holds.
func looksBinary(text []byte) bool {
	controls := 0
	sample := text[:min(len(text), 4000)]
	for _, b := range sample {
		if b < ' ' && b != '\n' && b != '\r' && b != '\t' && b != '\f' {
			controls++
		}
	}
	return controls*50 > len(sample)
}
