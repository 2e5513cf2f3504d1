package sheet

import "testing"

func TestYAML(t *testing.T) {
	b, err := ReadBOM("bom.yaml", []byte(`title: ioniser
bom:
  - {refs: C1-C3 C7, part: QLF-103, quantity: 4, maker: Quillfen, value: 10 nF}
  - refs: [D1, D2-D3]
    part: TVD-2K2
    position: [D1-D2, D4]
  - {refs: R9, fitted: false}
  - {part: BOX-7, quantity: 1}
`), nil)
	must(t, err)
	sameLines(t, "rows", shortRows(b), []string{"C1 C2 C3 C7|4|QLF-103", "D1 D2 D3|3|TVD-2K2", "R9|1||off", "|1|BOX-7"})
	if got := b.Rows[0].Place.String(); got != "bom.yaml:3:28" {
		t.Errorf("got the place %s", got)
	}
	if b.Rows[0].Maker != "Quillfen" || b.Rows[0].Value != "10 nF" || len(b.Rows[1].Positions) != 3 {
		t.Errorf("got %+v", b.Rows)
	}
}

func TestYAMLMistakes(t *testing.T) {
	_, err := ReadBOM("bom.yaml", []byte(`bom:
  - {refs: C1-R3, part: QLF-103}
  - {refs: C1-C4, part: QLF-103, quantity: 3}
  - {refs: C4, part: QLF-103}
  - {refs: C5}
  - {part: QLF-103}
  - {refs: [C6, {a: b}], part: X, quanity: 1}
`), nil)
	want := `bom.yaml:2:12: refs: "C1-R3" runs from C1 to R3; write a range of one kind, such as C1-C3
bom.yaml:3:44: the quantity is 3, but there are 4 designators (C1, C2, C3, C4); mend one of the two, or say which counts
bom.yaml:4:12: C4 stands in line 3 too; keep it in one row
bom.yaml:5:5: the key "bom.part" is missing
bom.yaml:6:5: bom.quantity: no designator and no quantity is given; write refs, or how many one unit needs
bom.yaml:7:17: bom.refs: this is no text; write designators such as C1-C4, C7
bom.yaml:7:35: unknown key "quanity"; did you mean "quantity"?`
	if err == nil || err.Error() != want {
		t.Errorf("got\n%v\nwant\n%s", err, want)
	}
	for _, text := range []string{"", "bom: []", "parts: []", "- a", "bom: {a: b}"} {
		if _, err := ReadBOM("bom.yaml", []byte(text), nil); err == nil {
			t.Errorf("%q: got no error", text)
		}
	}
}
