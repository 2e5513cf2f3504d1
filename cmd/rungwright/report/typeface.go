package report

import (
	"strings"
	"sync"

	stdfont "golang.org/x/image/font"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/font/liberation"
	"gonum.org/v1/plot/vg"
)

// families is how a page or an SVG file asks for the typeface in which
// everything is measured, and for others of the same widths.
const families = "'Liberation Sans',Arial,Helvetica,sans-serif"

// faces holds the typeface that measures text. The cache is locked inside.
var faces = sync.OnceValue(func() *font.Cache { return font.NewCache(liberation.Collection()) })

// sans is the typeface at a size [points].
func sans(size float64, bold bool) font.Font {
	f := font.Font{Typeface: "Liberation", Variant: "Sans"}
	if bold {
		f.Weight = stdfont.WeightBold
	}
	return font.From(f, vg.Length(size))
}

func face(size float64, bold bool) font.Face {
	f := sans(size, bold)
	return faces().Lookup(f, f.Size)
}

// width is how wide s is at a size [points].
func width(s string, size float64, bold bool) float64 {
	f := face(size, bold)
	return f.Width(s).Points()
}

// fit is s, shortened to at most the width with a mark that it was.
func fit(s string, size float64, bold bool, most float64) string {
	if width(s, size, bold) <= most {
		return s
	}
	letters := []rune(s)
	for n := len(letters) - 1; n > 0; n-- {
		short := strings.TrimSpace(string(letters[:n])) + "…"
		if width(short, size, bold) <= most {
			return short
		}
	}
	return "…"
}
