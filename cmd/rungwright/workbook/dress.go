package workbook

import (
	"fmt"

	"github.com/xuri/excelize/v2"
)

// decorate adds what may only come after the rows of a streamed sheet.
func (s *sheet) decorate(f *excelize.File) error {
	for _, m := range s.marks {
		look, err := f.NewConditionalStyle(m.kind.look())
		if err != nil {
			return err
		}
		err = f.SetConditionalFormat(s.name, m.cells, []excelize.ConditionalFormatOptions{
			{Type: "formula", Criteria: m.formula, Format: &look}})
		if err != nil {
			return err
		}
	}
	for _, check := range s.checks {
		if err := f.AddDataValidation(s.name, check); err != nil {
			return err
		}
	}
	for _, c := range s.charts {
		if err := f.AddChart(s.name, c.at, c.chart); err != nil {
			return err
		}
	}
	if s.filter == "" {
		return nil
	}
	return f.AutoFilter(s.name, s.filter, nil)
}

func (k markKind) look() *excelize.Style {
	fill := func(ink, ground string) *excelize.Style {
		return &excelize.Style{Font: &excelize.Font{Color: ink, Bold: true}, Fill: excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{ground}}}
	}
	switch k {
	case markNear:
		return fill(nearInk, nearFill)
	case markOver:
		return fill(overInk, overFill)
	case markDim:
		return &excelize.Style{Font: &excelize.Font{Color: softInk, Italic: true}}
	}
	return &excelize.Style{Border: []excelize.Border{{Type: "top", Style: 1, Color: headFill}}}
}

// setPrint makes the sheet one page wide with its header repeated and the
// footer filled in.
func (s *sheet) setPrint(f *excelize.File, foot string) error {
	size, wide, high, turn := 9, 1, 0, "landscape" // 9: A4
	if s.portrait {
		turn = "portrait"
	}
	if err := f.SetPageLayout(s.name, &excelize.PageLayoutOptions{Size: &size, Orientation: &turn, FitToWidth: &wide, FitToHeight: &high}); err != nil {
		return err
	}
	side, top, low := 0.4, 0.5, 0.7 // inch
	if err := f.SetPageMargins(s.name, &excelize.PageLayoutMarginsOptions{Left: &side, Right: &side, Top: &top, Bottom: &low}); err != nil {
		return err
	}
	if err := f.SetHeaderFooter(s.name, &excelize.HeaderFooterOptions{OddFooter: foot}); err != nil {
		return err
	}
	if err := s.setNames(f); err != nil {
		return err
	}
	if len(s.rows) == 0 {
		return nil
	}
	return f.AddIgnoredErrors(s.name, "A1:"+at(s.columns()-1, len(s.rows)), excelize.IgnoredErrorsNumberStoredAsText)
}

func (s *sheet) setNames(f *excelize.File) error {
	names := []struct{ name, refers string }{{"_xlnm.Print_Titles", s.repeat}, {"_xlnm.Print_Area", s.area}}
	for _, n := range names {
		if n.refers == "" {
			continue
		}
		if err := f.SetDefinedName(&excelize.DefinedName{Name: n.name, RefersTo: of(s.name, n.refers), Scope: s.name}); err != nil {
			return fmt.Errorf("%s: %w", n.name, err)
		}
	}
	return nil
}

func (s *sheet) protect(f *excelize.File) error {
	if !s.locked {
		return nil
	}
	return f.ProtectSheet(s.name, &excelize.SheetProtectionOptions{
		SelectLockedCells: true, SelectUnlockedCells: true, FormatColumns: true, FormatRows: true, AutoFilter: true, Sort: true})
}

// whole asks for a whole number within bounds, with a word on what it is.
func whole(cells string, least, most int, about string) *excelize.DataValidation {
	return ask(cells, "whole", fmt.Sprint(least), fmt.Sprint(most), about)
}

// amountFrom asks for a number of zero or more.
func amountFrom(cells, about string) *excelize.DataValidation {
	return ask(cells, "decimal", "0", "1000000000", about)
}

// asShare asks for 0 % to 100 %.
func asShare(cells, about string) *excelize.DataValidation {
	return ask(cells, "decimal", "0", "1", about)
}

// yesNo asks for one of two words.
func yesNo(cells, about string) *excelize.DataValidation {
	v := ask(cells, "list", `"yes,no"`, "", about)
	v.Operator = ""
	return v
}

func ask(cells, kind, least, most, about string) *excelize.DataValidation {
	stop, wrong, input := "stop", "Not possible here", "Input"
	return &excelize.DataValidation{Type: kind, Operator: "between", Formula1: least, Formula2: most, Sqref: cells, AllowBlank: true,
		ShowErrorMessage: true, ErrorStyle: &stop, ErrorTitle: &wrong, Error: &about,
		ShowInputMessage: true, PromptTitle: &input, Prompt: &about}
}
