package sheet

import (
	"encoding/xml"
	"errors"
	"path"
	"strings"
)

// rootReader checks that the archive's relations name the usual workbook
// part, which is the one that the gate reads.
type rootReader struct{ quiet }

func (*rootReader) start(_ []xml.Name, e xml.StartElement) error {
	target := strings.TrimPrefix(attribute(e, "Target"), "/")
	if e.Name.Local == "Relationship" && strings.HasSuffix(attribute(e, "Type"), "/officeDocument") && target != bookPart {
		return errors.New("its workbook stands at an unusual place")
	}
	return nil
}

// relsReader gathers which part each relation of the workbook names.
type relsReader struct{ *gate }

func (r *relsReader) start(_ []xml.Name, e xml.StartElement) error {
	if e.Name.Local != "Relationship" || !strings.HasSuffix(attribute(e, "Type"), "/worksheet") {
		return nil
	}
	target := attribute(e, "Target")
	if rooted, ok := strings.CutPrefix(target, "/"); ok {
		target = path.Clean(rooted)
	} else {
		target = path.Join("xl", target)
	}
	id := attribute(e, "Id")
	if _, twice := r.targets[id]; twice {
		return errors.New("two relations have one name")
	}
	r.targets[id] = target
	return nil
}

func (*relsReader) text([]xml.Name, []byte) {}
func (*relsReader) end([]xml.Name) error    { return nil }
func (*relsReader) done() error             { return nil }

// bookReader gathers the sheets' names; their part is the relation's name
// until it is resolved.
type bookReader struct {
	quiet
	book *bookScan
}

func (r *bookReader) start(stack []xml.Name, e xml.StartElement) error {
	if e.Name.Local != "sheet" || len(stack) != 3 || stack[1].Local != "sheets" {
		return nil
	}
	if len(r.book.sheets) >= maxSheets {
		return overLimit("the workbook has more than %d sheets", maxSheets)
	}
	state := attribute(e, "state")
	s := sheetScan{name: attribute(e, "name"), hidden: state != "" && state != "visible"}
	for _, a := range e.Attr {
		if a.Name.Local == "id" && a.Name.Space != "" {
			s.part = a.Value
		}
	}
	r.book.sheets = append(r.book.sheets, s)
	return nil
}

// sharedReader counts the shared texts.
type sharedReader struct {
	quiet
	budget *budget
}

func (r *sharedReader) start(stack []xml.Name, e xml.StartElement) error {
	if r.budget.nodes++; r.budget.nodes > maxNodes {
		return overLimit("the texts have more than %d pieces", maxNodes)
	}
	if e.Name.Local == "si" && len(stack) == 2 {
		if r.budget.strings++; r.budget.strings > maxStrings {
			return overLimit("the workbook has more than %d different texts; save the sheet as .csv, or split it", maxStrings)
		}
	}
	return nil
}

// otherReader bounds styles, settings and whatever else the library holds
// whole.
type otherReader struct {
	quiet
	budget *budget
}

func (r *otherReader) start([]xml.Name, xml.StartElement) error {
	if r.budget.styles++; r.budget.styles > maxStyles {
		return overLimit("the workbook has more than %d styles and settings; copy the cells into a new workbook", maxStyles)
	}
	return nil
}
