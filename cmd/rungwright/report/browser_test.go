package report

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// The report in a real browser: nothing is complained of, nothing is fetched,
// nothing sticks out, the points of the front answer to mouse and keys.
func TestInBrowser(t *testing.T) {
	d, e := fixture()
	hostileD, hostileE := poison(strings.Join(hostile[:15], " "))
	bad, err := HTML(hostileD, hostileE, Options{})
	if err != nil {
		t.Fatal(err)
	}
	bare := *d
	bare.Stresses, bare.Cautions = nil, nil
	few, err := HTML(&bare, Extras{Front: e.Front}, Options{})
	if err != nil {
		t.Fatal(err)
	}
	b := chromium(t)
	for _, page := range []struct {
		name string
		html []byte
	}{{"whole", fixtureHTML(t)}, {"hostile", bad}, {"few sections", few}} {
		t.Run(page.name, func(t *testing.T) {
			b.t = t
			b.look(1280, 900, "screen", "light")
			b.open(page.html)
			b.quiet()
			b.fits(page.name)
			b.prints(page.name)
		})
	}
	t.Run("front", func(t *testing.T) {
		b.t = t
		b.look(1280, 900, "screen", "light")
		b.open(fixtureHTML(t))
		b.front(e)
		b.tabOrder()
	})
}

// quiet checks that the console is empty and that nothing but the file itself
// was asked for.
func (b *browser) quiet() {
	b.t.Helper()
	for _, kind := range []string{"Log.entryAdded", "Runtime.consoleAPICalled", "Runtime.exceptionThrown", "Audits.issueAdded", "Page.javascriptDialogOpening"} {
		for _, e := range b.seen(kind) {
			b.t.Errorf("the browser complains: %.400s", e)
		}
	}
	if n := len(b.seen("Network.requestWillBeSent")); n != 1 {
		b.t.Errorf("%d requests, want the file alone", n)
	}
}

// sticksOut names elements that reach beyond the window, other than those
// inside a scrolling region.
const sticksOut = `[...document.querySelectorAll("body *")].filter(e => !e.closest(".wide") && !e.closest("svg") && !e.matches(".skip") &&
	e.getBoundingClientRect().right > document.documentElement.clientWidth + 1).map(e => e.tagName + "." + e.className + " " + e.textContent.slice(0, 40))`

func (b *browser) fits(name string) {
	b.t.Helper()
	for _, width := range []int{360, 800, 1280} {
		for _, scheme := range []string{"light", "dark"} {
			b.look(width, 900, "screen", scheme)
			var out []string
			b.eval(sticksOut, &out)
			if len(out) > 0 {
				b.t.Errorf("at %d %s, beyond the window: %.300v", width, scheme, out)
			}
			var ground string
			b.eval("getComputedStyle(document.body).backgroundColor", &ground)
			b.keepScreen(fmt.Sprintf("%s-%d-%s.png", name, width, scheme), width)
			if dark := ground == "rgb(20, 24, 28)"; dark != (scheme == "dark") {
				b.t.Errorf("at %d %s the ground is %s", width, scheme, ground)
			}
		}
	}
}

// papers are in inches, with what is between the margins in pixels.
var papers = []struct {
	name          string
	width, height float64
}{{"A4", 8.27, 11.69}, {"Letter", 8.5, 11}}

const printMargin = 14 / 25.4 // inches, as in the style

// prints checks that a page printed on either paper holds all that is on it,
// the scrolling regions too, and that paper is light whatever the screen is.
func (b *browser) prints(name string) {
	b.t.Helper()
	for _, p := range papers {
		inner := int((p.width - 2*printMargin) * 96)
		b.look(inner, 1000, "print", "dark")
		b.eval("dispatchEvent(new Event('beforeprint'))", new(bool))
		var out []string
		b.eval(strings.ReplaceAll(sticksOut, `!e.closest(".wide") && `, ""), &out)
		if len(out) > 0 {
			b.t.Errorf("%s: beyond the paper: %.300v", p.name, out)
		}
		var ground string
		if b.eval("getComputedStyle(document.body).backgroundColor", &ground); ground != "rgb(255, 255, 255)" {
			b.t.Errorf("%s: printed on %s", p.name, ground)
		}
		b.eval("dispatchEvent(new Event('afterprint'))", new(bool))
		pdf := b.pdf(p.width, p.height)
		box := fmt.Sprintf("/MediaBox [0 0 %.0f", p.width*72)
		if !bytes.HasPrefix(pdf, []byte("%PDF")) || !bytes.Contains(pdf, []byte(box)) {
			b.t.Errorf("%s: the print has no page of its size, %s", p.name, box)
		}
		b.keep(name+"-"+p.name+".pdf", pdf)
	}
}

// keep leaves a file for a person to look at when RUNGWRIGHT_LOOK names a
// folder.
func (b *browser) keep(name string, data []byte) {
	folder := os.Getenv("RUNGWRIGHT_LOOK")
	if folder == "" {
		return
	}
	if err := os.WriteFile(filepath.Join(folder, strings.ReplaceAll(name, " ", "-")), data, 0o644); err != nil {
		b.t.Error(err)
	}
}

// keepScreen keeps a picture of the whole page.
func (b *browser) keepScreen(name string, width int) {
	if os.Getenv("RUNGWRIGHT_LOOK") == "" {
		return
	}
	var height float64
	b.eval("document.documentElement.scrollHeight", &height)
	b.keep(name, b.clip(0, 0, float64(width), height))
}

// front hovers over a point, then walks the points by keys.
func (b *browser) front(e Extras) {
	b.t.Helper()
	readout := func() (s string) {
		b.eval(`document.querySelector("#front .readout").textContent`, &s)
		return s
	}
	var place struct{ X, Y float64 }
	b.eval(`(() => { const c = document.querySelectorAll("#front .spot circle")[2]; c.scrollIntoView({block: "center", behavior: "instant"});
		const r = c.getBoundingClientRect(); return {x: r.x + r.width / 2, y: r.y + r.height / 2} })()`, &place)
	b.call("Input.dispatchMouseEvent", map[string]any{"type": "mouseMoved", "x": place.X, "y": place.Y}, nil)
	if got := readout(); !strings.Contains(got, e.Front[2].Name) {
		b.t.Errorf("hovering over a point reads %q, want %q", got, e.Front[2].Name)
	}
	b.eval(`(document.querySelector("#front .spot").focus(), true)`, new(bool))
	for k, key := range []string{"ArrowRight", "End", "ArrowRight", "ArrowLeft", "Home"} {
		b.press(key)
		want := e.Front[[]int{1, 4, 4, 3, 0}[k]].Name
		if got := readout(); !strings.Contains(got, want) {
			b.t.Errorf("key %s reads %q, want %q", key, got, want)
		}
	}
	if got := readout(); !strings.Contains(got, "13.20") || !strings.Contains(got, "30 V") {
		b.t.Errorf("a point reads %q without its numbers", got)
	}
}

// tabOrder presses Tab through the page: first the skip link, which leads to
// the report, and the points of the front are one stop.
func (b *browser) tabOrder() {
	b.t.Helper()
	b.eval("(document.activeElement.blur(), scrollTo(0, 0), getSelection().removeAllRanges(), true)", new(bool))
	b.open(fixtureHTML(b.t))
	var names []string
	for range 60 {
		b.press("Tab")
		var at string
		b.eval(`(e => e.className.baseVal ?? (e.className || e.hash || e.tagName))(document.activeElement)`, &at)
		names = append(names, at)
		var visible bool
		b.eval(`(r => r.right > 0 && r.width > 0)(document.activeElement.getBoundingClientRect())`, &visible)
		if !visible {
			b.t.Errorf("the focus is on %s, which is not to be seen", at)
		}
		if at == "BODY" {
			break
		}
	}
	if names[0] != "skip" || names[1] != "#cautions" {
		b.t.Errorf("Tab goes to %v first", names[:3])
	}
	if n := strings.Count(strings.Join(names, " "), "spot"); n != 1 {
		b.t.Errorf("the front's points take %d stops, want 1", n)
	}
}
