package form

import (
	"fmt"
	"regexp"
	"strconv"
	"strings"
)

// Doc is a mapping to be written, with its keys in the order of Set. A value
// is a string, bool, int, a fmt.Stringer (the quantities and money), a *Doc,
// or a List of such values; a nil *Doc and an empty List are left out.
//
//	form.NewMap().
//		Set("supply", name).
//		Set("load", form.NewMap().Flow().Set("least", least).Set("most", most)).
//		Set("prices", form.List{form.List{1, price}})
type Doc struct {
	entries []entry
	pending string // comment for the key that comes next
	flow    bool
}

type entry struct {
	key, comment string
	value        any
}

// List is a list to be written. It stands on one line, unless it holds
// mappings that are not Flow: then each entry has its own lines.
type List []any

// NewMap starts a mapping.
func NewMap() *Doc { return &Doc{} }

// Set appends a key with its value. A key set twice would not be read back,
// so that it panics, as does a value of another type (when written).
func (d *Doc) Set(key string, value any) *Doc {
	for _, e := range d.entries {
		if e.key == key {
			panic("form: key set twice: " + key)
		}
	}
	d.entries = append(d.entries, entry{key, d.pending, value})
	d.pending = ""
	return d
}

// Comment puts lines of comment above the key that is set next, and goes
// when that key is left out.
func (d *Doc) Comment(text string) *Doc {
	d.pending = text
	return d
}

// Flow has the mapping written on one line, in braces. Comments in it are
// left out.
func (d *Doc) Flow() *Doc {
	d.flow = true
	return d
}

// Bytes is the YAML text, which Parse reads back.
func (d *Doc) Bytes() []byte {
	var w writer
	if len(d.written()) == 0 {
		return []byte("{}\n")
	}
	w.block(d, "", "")
	return []byte(w.text.String())
}

// written are the entries that have something to say.
func (d *Doc) written() []entry {
	var out []entry
	if d == nil {
		return nil
	}
	for _, e := range d.entries {
		if !isNothing(e.value) {
			out = append(out, e)
		}
	}
	return out
}

func isNothing(value any) bool {
	switch v := value.(type) {
	case *Doc:
		return v == nil
	case List:
		return len(v) == 0
	}
	return value == nil
}

type writer struct{ text strings.Builder }

// block writes a mapping line by line. Its first key stands after lead, a
// list entry's dash or the indent; the others after the indent.
func (w *writer) block(d *Doc, lead, indent string) {
	for _, e := range d.written() {
		w.comment(e.comment, indent)
		w.text.WriteString(lead + scalar(e.key) + ":")
		w.value(e.value, indent)
		lead = indent
	}
}

func (w *writer) comment(text, indent string) {
	if text == "" {
		return
	}
	for line := range strings.Lines(visible(text)) {
		w.text.WriteString(strings.TrimRight(indent+"# "+strings.TrimRight(line, "\r\n"), " ") + "\n")
	}
}

// visible drops what may not stand in a comment.
func visible(text string) string {
	return strings.Map(func(r rune) rune {
		if r != '\n' && unseen(r) {
			return -1
		}
		return r
	}, strings.ToValidUTF8(text, ""))
}

// value writes what follows the colon of a key.
func (w *writer) value(value any, indent string) {
	list, _ := value.(List)
	switch {
	case isTall(value):
		w.text.WriteString("\n")
		w.block(value.(*Doc), indent+"  ", indent+"  ")
	case list.tall():
		w.text.WriteString("\n")
		w.entries(list, indent+"  ")
	default:
		w.text.WriteString(" " + inline(value) + "\n")
	}
}

// isTall tells a mapping that takes its own lines.
func isTall(value any) bool {
	d, ok := value.(*Doc)
	return ok && d != nil && !d.flow && len(d.written()) > 0
}

// tall tells a list whose entries take their own lines.
func (l List) tall() bool {
	for _, v := range l {
		if isTall(v) {
			return true
		}
	}
	return false
}

func (w *writer) entries(l List, indent string) {
	for _, v := range l {
		if isTall(v) {
			w.block(v.(*Doc), indent+"- ", indent+"  ")
			continue
		}
		w.text.WriteString(indent + "- " + inline(v) + "\n")
	}
}

// inline writes a value on one line.
func inline(value any) string {
	switch v := value.(type) {
	case string:
		return scalar(v)
	case bool:
		return strconv.FormatBool(v)
	case int:
		return strconv.Itoa(v)
	case *Doc:
		var pairs []string // none for a nil Doc within a list
		for _, e := range v.written() {
			pairs = append(pairs, scalar(e.key)+": "+inline(e.value))
		}
		return "{" + strings.Join(pairs, ", ") + "}"
	case List:
		var items []string
		for _, item := range v {
			items = append(items, inline(item))
		}
		return "[" + strings.Join(items, ", ") + "]"
	case fmt.Stringer:
		return plainOr(v.String())
	}
	panic(fmt.Sprintf("form: cannot write a value of type %T", value))
}

var (
	// safeText means itself anywhere in YAML: nothing in it is a sign of the
	// language, and it neither starts nor ends with a blank.
	safeText = regexp.MustCompile(`^[\pL\pN°±(/.][\pL\pN°±²³µ×%+/().;_ -]*$`)
	// safeValue is a number with a unit, which may start with its sign.
	safeValue = regexp.MustCompile(`^-?[0-9][0-9.e+-]* ?[\pL°%²³/]*$`)
	// looksTyped is text that a YAML reader may take for a number, a date, a
	// truth value or nothing.
	looksTyped = regexp.MustCompile(`(?i)^(true|false|yes|no|on|off|y|n|null|~|[-+]?\.(inf|nan)|[-+.]*[0-9][0-9a-fx_.:+-]*)$`)
)

// scalar writes a text, in quotes unless it is safe without.
func scalar(text string) string {
	if safeText.MatchString(text) && !looksTyped.MatchString(text) && !strings.HasSuffix(text, " ") && len(text) < 400 {
		return text
	}
	return quoted(text)
}

func plainOr(text string) string {
	if safeValue.MatchString(text) {
		return text
	}
	return scalar(text)
}

// quoted writes a text in double quotes with every doubtful character as an
// escape of YAML 1.2 (section 5.7).
func quoted(text string) string {
	var b strings.Builder
	b.WriteByte('"')
	for _, r := range strings.ToValidUTF8(text, "\ufffd") {
		switch {
		case r == '"' || r == '\\':
			b.WriteByte('\\')
			b.WriteRune(r)
		case r == '\n':
			b.WriteString(`\n`)
		case r == '\t':
			b.WriteString(`\t`)
		case strconv.IsPrint(r) || r == '\u00a0':
			b.WriteRune(r)
		case r > 0xffff:
			fmt.Fprintf(&b, `\U%08x`, r)
		default:
			fmt.Fprintf(&b, `\u%04x`, r)
		}
	}
	b.WriteByte('"')
	return b.String()
}
