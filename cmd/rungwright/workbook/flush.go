package workbook

import (
	"fmt"
	"math"

	"github.com/xuri/excelize/v2"
)

// flush streams the sheet into the book. The order is the library's: sheet
// properties, columns and panes, rows, then everything else, then the end.
func (s *sheet) flush(f *excelize.File, ids styles, foot string) error {
	fit, tab := true, "FF"+s.tab
	if err := f.SetSheetProps(s.name, &excelize.SheetPropsOptions{FitToPage: &fit, TabColorRGB: &tab}); err != nil {
		return err
	}
	if err := f.SetSheetDimension(s.name, "A1:"+at(max(s.columns(), 1)-1, max(len(s.rows), 1))); err != nil {
		return err
	}
	w, err := f.NewStreamWriter(s.name)
	if err != nil {
		return err
	}
	widths := s.fitted()
	steps := []func() error{
		func() error { return s.setColumns(w, widths) },
		func() error { return s.setPanes(w) },
		func() error { return s.writeRows(w, ids, widths) },
		func() error { return s.decorate(f) },
		func() error { return s.setPrint(f, foot) },
		func() error { return s.protect(f) },
		w.Flush,
	}
	for _, step := range steps {
		if err := step(); err != nil {
			return fmt.Errorf("sheet %s: %w", s.name, err)
		}
	}
	return nil
}

func (s *sheet) columns() int {
	n := 0
	for _, r := range s.rows {
		n = max(n, len(r.cells))
	}
	return n
}

// fitted gives each column the width of its widest short text; long ones wrap.
func (s *sheet) fitted() []float64 {
	widths := make([]float64, s.columns())
	for i := range widths {
		widths[i] = 7
	}
	for _, r := range s.rows {
		for i, c := range r.cells {
			widths[i] = max(widths[i], min(44, c.width()))
		}
	}
	for i, w := range s.widths {
		if i < len(widths) {
			widths[i] = w
		}
	}
	return widths
}

// width is the room a cell asks for; numbers get a factor of ten to grow by.
func (c cell) width() float64 {
	switch v := c.value.(type) {
	case string:
		switch c.style {
		case title, heading, soft, wrapped, hazard, header, headerRight:
			return 0 // they wrap, or run on over empty cells
		}
		return width(v) + 2
	case float64:
		if c.style == money || c.style == totalMoney {
			return width(fmt.Sprintf("%.2f", v))*1.15 + 4
		}
		return 9
	case int:
		return width(fmt.Sprint(v)) + 4
	}
	return 0
}

func (s *sheet) setColumns(w *excelize.StreamWriter, widths []float64) error {
	for i, wide := range widths {
		if err := w.SetColWidth(i+1, i+1, wide); err != nil {
			return err
		}
	}
	return nil
}

func (s *sheet) setPanes(w *excelize.StreamWriter) error {
	if s.frozen == 0 && s.beside == 0 {
		return nil
	}
	pane := "bottomLeft"
	if s.beside > 0 {
		pane = "bottomRight"
	}
	corner := at(s.beside, s.frozen+1)
	return w.SetPanes(&excelize.Panes{Freeze: true, XSplit: s.beside, YSplit: s.frozen, TopLeftCell: corner, ActivePane: pane,
		Selection: []excelize.Selection{{SQRef: corner, ActiveCell: corner, Pane: pane}}})
}

func (s *sheet) writeRows(w *excelize.StreamWriter, ids styles, widths []float64) error {
	for i, r := range s.rows {
		values := make([]any, len(r.cells))
		for j, c := range r.cells {
			values[j] = excelize.Cell{StyleID: ids[c.style], Formula: c.formula, Value: c.value}
		}
		height := r.height
		if height == 0 {
			height = s.heightOf(i, widths)
		}
		if err := w.SetRow(at(0, i+1), values, excelize.RowOpts{Height: height}); err != nil {
			return err
		}
	}
	for _, m := range s.merges {
		if err := w.MergeCell(m[0], m[1]); err != nil {
			return err
		}
	}
	return nil
}

// heightOf is the height a row needs for its wrapped texts, in points.
func (s *sheet) heightOf(index int, widths []float64) float64 {
	lines, point := 1.0, 13.5
	for j, c := range s.rows[index].cells {
		switch c.style {
		case title:
			point = max(point, 22)
		case heading:
			point = max(point, 18)
		case wrapped, soft, hazard, header, headerRight:
			v, _ := c.value.(string)
			factor := 1.0
			if c.style != wrapped && c.style != soft {
				factor = 1.1 // bold
			}
			lines = max(lines, wrap(v, s.room(index, j, widths)/factor))
		}
	}
	return min(400, lines*point)
}

// room is the width that a cell has to wrap in, over merged columns too.
func (s *sheet) room(index, column int, widths []float64) float64 {
	for _, m := range s.merges {
		if m[0] == at(column, index+1) {
			total := 0.0
			for k := column; k < len(s.rows[index].cells); k++ {
				total += widths[k]
			}
			return total
		}
	}
	return widths[column]
}

// wrap estimates the lines that a text takes in a width.
func wrap(v string, room float64) float64 {
	return max(1, math.Ceil(width(v)/max(1, room-2)))
}
