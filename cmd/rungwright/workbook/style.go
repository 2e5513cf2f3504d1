package workbook

import (
	"strings"

	"github.com/xuri/excelize/v2"
)

// The palette; every pair of text and ground has a contrast above 5.9 (WCAG),
// and near and over stay apart in each kind of colour blindness. No colour
// carries a meaning that a word beside it does not.
const (
	face     = "Arial"
	ink      = "1F1F1F"
	headInk  = "FFFFFF"
	headFill = "1F3864"
	softInk  = "595959"
	linkInk  = "0563C1"
	inFill   = "FFF2CC"
	inEdge   = "7F6000"
	nearInk  = "5C4400"
	nearFill = "FFE699"
	overInk  = "FFFFFF"
	overFill = "9C2A00"
	edge     = "BFBFBF"
)

// style names one look of a cell.
type style int

const (
	plain style = iota
	title
	heading
	header
	headerRight
	label
	text    // untrusted text: never read as a formula, even when edited
	wrapped // the same, over several lines
	soft
	number  // whole number
	measure // up to four places
	ratio
	share
	money
	unitPrice
	totalMoney
	note
	figure // a number with its unit, as text
	bar
	hazard
	inWhole // the inputs
	inShare
	inMoney
	inText
	inDecimal
	styleCount
)

// styles are the book's registered looks.
type styles [styleCount]int

// register adds every look to the book, always in the same order. digits are
// the decimals of the book's currency.
func register(f *excelize.File, digits int) (styles, error) {
	var ids styles
	cents := "#,##0"
	if digits > 0 {
		cents += "." + strings.Repeat("0", digits)
	}
	quoted := true
	for s := plain; s < styleCount; s++ {
		id, err := f.NewStyle(look(s, cents))
		if err != nil {
			return ids, err
		}
		ids[s] = id
		if s == text || s == wrapped || s == inText {
			f.Styles.CellXfs.Xf[id].QuotePrefix = &quoted
		}
	}
	return ids, nil
}

// look describes one style.
func look(s style, cents string) *excelize.Style {
	d := &excelize.Style{
		Font:      &excelize.Font{Family: face, Size: 10, Color: ink},
		Alignment: &excelize.Alignment{Vertical: "top"},
	}
	format := func(code string) { d.CustomNumFmt = &code }
	ground := func(fill string) { d.Fill = excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{fill}} }
	right := func() { d.Alignment.Horizontal = "right" }
	indent := func() { d.Alignment.Horizontal, d.Alignment.Indent = "left", 1 }
	switch s {
	case title:
		d.Font.Size, d.Font.Bold, d.Font.Color = 16, true, headFill
	case heading:
		d.Font.Size, d.Font.Bold, d.Font.Color = 12, true, headFill
		d.Border = []excelize.Border{{Type: "bottom", Style: 1, Color: headFill}}
	case header, headerRight:
		d.Font.Bold, d.Font.Color = true, headInk
		d.Alignment.WrapText, d.Alignment.Vertical = true, "center"
		ground(headFill)
		if s == headerRight {
			right()
		} else {
			indent()
		}
	case text:
		d.NumFmt = 49
		indent()
	case wrapped:
		d.NumFmt, d.Alignment.WrapText = 49, true
		indent()
	case soft:
		d.Font.Color, d.Alignment.WrapText = softInk, true
	case figure:
		right()
	case number:
		format("#,##0")
		right()
	case measure:
		format("#,##0.####")
		right()
	case ratio:
		format("0.00")
		right()
	case share:
		format("0.##%")
		right()
	case money, totalMoney:
		format(cents)
		right()
		if s == totalMoney {
			d.Font.Bold = true
			d.Border = []excelize.Border{{Type: "top", Style: 1, Color: ink}, {Type: "bottom", Style: 6, Color: ink}}
		}
	case unitPrice:
		format("#,##0.00####")
		right()
	case note, label:
		d.Font.Bold = s == label
		indent()
	case bar:
		d.Font.Size, d.Font.Color = 8, headFill
		indent()
	case hazard:
		d.Font.Bold, d.Font.Color = true, overInk
		d.Alignment.WrapText = true
		ground(overFill)
	case inWhole, inShare, inMoney, inText, inDecimal:
		ground(inFill)
		d.Protection = &excelize.Protection{Locked: false}
		for _, side := range []string{"left", "right", "top", "bottom"} {
			d.Border = append(d.Border, excelize.Border{Type: side, Style: 1, Color: inEdge})
		}
		switch s {
		case inWhole:
			format("#,##0")
		case inShare:
			format("0.##%")
		case inMoney:
			format("#,##0.00####")
		case inDecimal:
			format("#,##0.######")
		case inText:
			d.NumFmt = 49
		}
		right()
		if s == inText {
			indent()
		}
	}
	return d
}
