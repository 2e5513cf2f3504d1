package sheet

import (
	"slices"
	"strings"
	"testing"
)

func TestDesignators(t *testing.T) {
	for text, want := range map[string]string{
		"C1":                          "C1",
		"c1-c4, C7":                   "C1 C2 C3 C4 C7",
		"C1-4":                        "C1 C2 C3 C4",
		"C1–C4":                       "C1 C2 C3 C4",
		"C1..C4":                      "C1 C2 C3 C4",
		"C1…C3":                       "C1 C2 C3",
		"C1 to C4":                    "C1 C2 C3 C4",
		"C1 bis C3":                   "C1 C2 C3",
		"C1 - C4":                     "C1 C2 C3 C4",
		"C08-C11":                     "C08 C09 C10 C11",
		"C1;C2/C3|C4 C5\nC6，C7；C8、C9": "C1 C2 C3 C4 C5 C6 C7 C8 C9",
		"R10A, TR1":                   "R10A TR1",
		"Ｃ１":                          "C1",
		"C1-C1":                       "C1",
		", C1,,":                      "C1",
		"":                            "",
	} {
		refs, errs := ParseDesignators(text)
		if got := strings.Join(refs, " "); got != want || len(errs) > 0 {
			t.Errorf("%q: got %q %v, want %q", text, got, errs, want)
		}
	}
	for _, text := range []string{"C", "1", "C1-R4", "C9-C1", "C1-", "-C4", "C1-C4-C7", "C1A-C4", "R?", "C1 (DNP)", "DNP", "J1-1", "C1-C5001", "C123456789", "Ω1", "C1.2"} {
		if refs, errs := ParseDesignators(text); len(errs) == 0 {
			t.Errorf("%q: got %q and no error", text, refs)
		}
	}
	if _, errs := ParseDesignators("C1-C5000"); len(errs) > 0 {
		t.Error(errs)
	}
	if refs, errs := ParseDesignators(strings.Repeat("C1-C5000,", 9000)); len(errs) == 0 || len(refs) > maxDesignators {
		t.Errorf("got %d designators and %v", len(refs), errs)
	}
}

// Whatever is written, each designator comes out as one that reads as itself.
func FuzzDesignators(f *testing.F) {
	for _, text := range []string{"C1-C4, C7", "C1..C4", "C1 to C4", "C1 (DNP)", "J1-1", "c1–r4", "，；、", "C0001-2", "C1-C5000", "((("} {
		f.Add(text)
	}
	f.Fuzz(func(t *testing.T, text string) {
		refs, errs := ParseDesignators(text)
		if len(refs) > maxDesignators {
			t.Fatalf("%d designators", len(refs))
		}
		if len(refs) == 0 && len(errs) == 0 && key(text) != "" {
			t.Fatalf("%q was dropped without a word", text)
		}
		again, errs := ParseDesignators(strings.Join(refs, ","))
		if len(errs) > 0 || !slices.Equal(again, refs) {
			t.Fatalf("%q gives %q, which gives %q %v", text, refs, again, errs)
		}
	})
}
