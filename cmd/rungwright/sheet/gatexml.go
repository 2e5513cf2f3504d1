package sheet

import (
	"encoding/xml"
	"errors"
	"fmt"
	"io"
)

// handler watches the elements of one part. Names are local ones, without
// their prefix.
type handler interface {
	start(stack []xml.Name, e xml.StartElement) error
	text(stack []xml.Name, data []byte)
	end(stack []xml.Name) error // the stack still holds the element that ends
	done() error
}

// scanXML walks a part to its end and demands that it is well-formed, without
// a document type, not nested deeply and not made of endless tags.
func scanXML(r io.Reader, h handler) error {
	d := xml.NewDecoder(&markupMeter{r: r})
	var stack []xml.Name
	elements := 0
	for {
		before := d.InputOffset()
		token, err := d.RawToken()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return err
		}
		if d.InputOffset()-before > 2*maxMarkup {
			return overLimit("a text or tag has more than %d bytes", maxMarkup)
		}
		switch t := token.(type) {
		case xml.Directive:
			return errors.New("it declares a document type, which no workbook needs")
		case xml.StartElement:
			elements++
			if len(stack) == 0 && elements > 1 {
				return errors.New("it holds two documents")
			}
			if len(stack) >= maxDeep {
				return overLimit("the elements are nested more than %d deep", maxDeep)
			}
			stack = append(stack, t.Name)
			err = h.start(stack, t)
		case xml.EndElement:
			if len(stack) == 0 || stack[len(stack)-1] != t.Name {
				return fmt.Errorf("the element %.40q ends without a start", t.Name.Local)
			}
			err = h.end(stack)
			stack = stack[:len(stack)-1]
		case xml.CharData:
			h.text(stack, t)
		}
		if err != nil {
			return err
		}
	}
	if len(stack) > 0 || elements == 0 {
		return errors.New("it ends in the middle")
	}
	return h.done()
}

// markupMeter stops a text or tag without end before the decoder has
// gathered it.
type markupMeter struct {
	r   io.Reader
	run int // bytes since the last < or >
}

func (m *markupMeter) Read(p []byte) (int, error) {
	n, err := m.r.Read(p)
	for _, b := range p[:n] {
		if m.run++; b == '<' || b == '>' {
			m.run = 0
		}
		if m.run > maxMarkup {
			return 0, overLimit("a text or tag has more than %d bytes", maxMarkup)
		}
	}
	return n, err
}

// attribute is an attribute's value by local name; "" when absent.
func attribute(e xml.StartElement, local string) string {
	for _, a := range e.Attr {
		if a.Name.Local == local && a.Name.Space != "xmlns" {
			return a.Value
		}
	}
	return ""
}

func isTrue(value string) bool { return value == "1" || value == "true" }

// quiet is a handler that only lets things pass.
type quiet struct{}

func (quiet) start([]xml.Name, xml.StartElement) error { return nil }
func (quiet) text([]xml.Name, []byte)                  {}
func (quiet) end([]xml.Name) error                     { return nil }
func (quiet) done() error                              { return nil }

var (
	_ handler = (*rootReader)(nil)
	_ handler = (*relsReader)(nil)
	_ handler = (*bookReader)(nil)
	_ handler = (*sharedReader)(nil)
	_ handler = (*otherReader)(nil)
	_ handler = (*sheetReader)(nil)
)
