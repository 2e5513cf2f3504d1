package report

import (
	"fmt"
	"image/color"
	"strings"
)

// ink is a colour by what it is for. It is a color.Color, in the light
// colours, for the canvases that know only those.
type ink struct {
	name        string
	light, dark uint32 // 0xRRGGBB
}

// The inks. The series are from the colour-blind-safe set of Okabe and Ito
// (jfly.uni-koeln.de/color, from memory), lightened for the dark page.
var (
	paper   = ink{"paper", 0xFFFFFF, 0x14181C}
	panel   = ink{"panel", 0xF3F5F4, 0x1E242A}
	textInk = ink{"text", 0x1A2126, 0xE6EAEC}
	faint   = ink{"faint", 0x55606A, 0xA3AEB7}
	line    = ink{"line", 0x2B343B, 0xC9D1D6}
	grid    = ink{"grid", 0xDDE2E4, 0x343C44}
	blue    = ink{"blue", 0x0072B2, 0x5CB8EC}
	red     = ink{"red", 0xD55E00, 0xFF8F45}
	green   = ink{"green", 0x009E73, 0x35C99C}
	amber   = ink{"amber", 0xE69F00, 0xF3BE4A}
	bluish  = ink{"bluish", 0xDCECF6, 0x1F3A4B} // tints behind symbols
	ambery  = ink{"ambery", 0xFBE8BF, 0x4D3F16}
	reddy   = ink{"reddy", 0xF8CFB5, 0x63310F}
	alarm   = ink{"alarm", 0xA13F00, 0xFFA66B} // words of warning
	good    = ink{"good", 0x006B4E, 0x57D6AE}  // words of approval
	link    = ink{"link", 0x005A8D, 0x7CC7F2}
)

var inks = []ink{paper, panel, textInk, faint, line, grid, blue, red, green, amber, bluish, ambery, reddy, alarm, good, link}

// lineInks are the inks of a plot's lines, in order; each has its own dashes.
var lineInks = []ink{blue, red, green, amber}

// RGBA is the light colour.
func (i ink) RGBA() (r, g, b, a uint32) {
	return color.NRGBA{uint8(i.light >> 16), uint8(i.light >> 8), uint8(i.light), 0xFF}.RGBA()
}

func hex(rgb uint32) string { return fmt.Sprintf("#%06X", rgb) }

// inkStyles are the page's rules for the inks: a variable each, light and
// dark, and a class each for strokes and fills.
func inkStyles() string {
	var light, dark, classes strings.Builder
	for _, i := range inks {
		fmt.Fprintf(&light, "--%s:%s;", i.name, hex(i.light))
		fmt.Fprintf(&dark, "--%s:%s;", i.name, hex(i.dark))
		fmt.Fprintf(&classes, ".k-%s{stroke:var(--%s)}.f-%s{fill:var(--%s)}\n", i.name, i.name, i.name, i.name)
	}
	return ":root{color-scheme:light dark;" + light.String() + "}\n" +
		"@media screen and (prefers-color-scheme:dark){:root{" + dark.String() + "}}\n" + classes.String()
}
