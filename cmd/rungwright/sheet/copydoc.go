package sheet

import (
	"bytes"
	"strconv"

	"rungwright/catalog/form"
)

// copyDoc is a mapping that was read as one to be written: the same keys and
// values in the same order, without comments.
func copyDoc(m *form.Map) *form.Doc {
	doc := form.NewMap()
	for _, name := range m.Keys() {
		doc.Set(name, plainValueOf(m, name))
	}
	return doc
}

// plainValueOf is the value of a key for a form.Doc: a string, a *form.Doc
// or a form.List.
func plainValueOf(m *form.Map, name string) any {
	if m.IsText(name) {
		return scalarOf(m.Text(name))
	}
	if m.IsList(name) {
		list := form.List{}
		for _, item := range m.List(name) {
			list = append(list, plainItem(item))
		}
		return list
	}
	return flat(copyDoc(m.Map(name)), m.Map(name))
}

// flat puts a mapping of single values on one line.
func flat(doc *form.Doc, m *form.Map) *form.Doc {
	for _, name := range m.Keys() {
		if !m.IsText(name) {
			return doc
		}
	}
	return doc.Flow()
}

func plainItem(i form.Item) any {
	if i.IsText() {
		return scalarOf(i.Text())
	}
	if items := i.Items(); items != nil {
		list := form.List{}
		for _, item := range items {
			list = append(list, plainItem(item))
		}
		return list
	}
	return copyDoc(i.Map())
}

// scalarOf keeps whole numbers without quotation marks.
func scalarOf(text string) any {
	if n, err := strconv.Atoi(text); err == nil && strconv.Itoa(n) == text {
		return n
	}
	return text
}

// hasComments tells whether a YAML text has any, as far as its lines show.
func hasComments(data []byte) bool {
	return bytes.HasPrefix(bytes.TrimSpace(data), []byte("#")) || bytes.Contains(data, []byte("\n#")) || bytes.Contains(data, []byte(" #"))
}
