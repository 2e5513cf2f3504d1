package sheet

// fitted reads whether a row's part is fitted: by the columns for it, or by a
// marker that stands where a part number, value, description or quantity
// would.
func (r *rowReader) fitted(w *draft, cells map[Field]Cell, place func(Field) Place) {
	w.Fitted = true
	r.fittedColumn(w, Fitted, cells[Fitted].Text, place(Fitted))
	r.fittedColumn(w, NotFitted, cells[NotFitted].Text, place(NotFitted))
	for _, f := range []Field{Part, Value, Description, Quantity} {
		text := cells[f].Text
		switch {
		case text == "":
		case isMarker(text):
			w.Fitted = false
			r.d.note(place(f), text, "%q: taken as not fitted", cut(text))
		case f != Part && w.Fitted && insideMarker(text) != "":
			r.d.wrong(place(f), text, "%q may mean that the part is not fitted; say so in a column headed fitted, or leave the words out", cut(text))
		}
	}
	if isMarker(w.Value) {
		w.Value = ""
	}
	if isMarker(w.Description) {
		w.Description = ""
	}
}

// fittedColumn reads one column. In either a marker such as DNP means that
// the part is not fitted; yes and no mean what the heading says.
func (r *rowReader) fittedColumn(w *draft, f Field, text string, at Place) {
	if !r.h.has(f) {
		return
	}
	yesMeansFitted := f == Fitted
	switch {
	case isMarker(text):
		w.Fitted = false
	case text == "" && f == Fitted && r.saysYes:
		r.d.wrong(at, "", "the column %q is blank here but says yes elsewhere; write yes or no", cut(r.h.heading(f)))
	case text == "":
	case isYes(text):
		w.Fitted = w.Fitted && yesMeansFitted
	case isNo(text):
		w.Fitted = w.Fitted && !yesMeansFitted
	default:
		r.d.wrong(at, text, "%q does not say whether the part is fitted; write yes or no", cut(text))
	}
}
