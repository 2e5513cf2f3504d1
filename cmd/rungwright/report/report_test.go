package report

import (
	"bytes"
	"crypto/sha256"
	"encoding/base64"
	"fmt"
	"math"
	"regexp"
	"strings"
	"testing"

	"rungwright/catalog"
	"rungwright/optimize"
	"rungwright/optimize/order"
	"rungwright/ratings"
)

func TestSameDesignSameBytes(t *testing.T) {
	if !bytes.Equal(fixtureHTML(t), fixtureHTML(t)) {
		t.Error("two reports of one design differ")
	}
}

// A figure is in the page because the solver gave it: these are asked of the
// design, not of the report's own code.
func TestFiguresAreTheDesigns(t *testing.T) {
	d, e := fixture()
	page := string(fixtureHTML(t))
	for _, want := range []string{
		d.Supply.Name,
		fmt.Sprintf("−%.3f to −%.3f kV", -d.Corners[0].Steady.MeanV/1e3, -d.Corners[1].Steady.MeanV/1e3),
		fmt.Sprintf("<strong>%.1f V</strong>", max(d.Corners[0].Steady.RippleV, d.Corners[1].Steady.RippleV, d.Corners[2].Steady.RippleV)),
		fmt.Sprintf(">−%.0f V<", e.Nominal.Capacitors[0].MeanV),                                      // c1
		fmt.Sprintf(">−%.2f kV<", (e.Nominal.Capacitors[1].MeanV+e.Nominal.Capacitors[3].MeanV)/1e3), // s2
		">0 A</th>", ">180 µA</th>", ">12 mA</th>", // loads of the regulation curve, without the bleeder's current
		"D1–D8", "C1 C3 C5 C7", "FM-TVD", "4 in series", "1\u202F204\u202F331",
		d.Supply.Input.SHA256, d.Inputs[0].SHA256, "Closest limit", "live-output", d.Certificate.Rejected,
	} {
		if !strings.Contains(page, want) {
			t.Errorf("the report does not say %q", want)
		}
	}
}

func TestSectionsInOrder(t *testing.T) {
	page := string(fixtureHTML(t))
	last := strings.Index(page, `class="tiles"`)
	for _, k := range sections {
		at := strings.Index(page, `<section id="`+k.id+`"`)
		if at < 0 || at < last {
			t.Errorf("section %s is missing or out of order", k.id)
		}
		last = at
		if !strings.Contains(page, `<a href="#`+k.id+`">`) {
			t.Errorf("nothing leads to section %s", k.id)
		}
	}
}

// Without data a section is left out; what is there must not change.
func TestSectionsWithoutDataAreLeftOut(t *testing.T) {
	d, _ := fixture()
	bare := &optimize.Design{Topology: d.Topology, Stages: d.Stages, Circuit: d.Circuit}
	out, err := HTML(bare, Extras{}, Options{})
	if err != nil {
		t.Fatal(err)
	}
	for _, k := range sections {
		has := bytes.Contains(out, []byte(`<section id="`+k.id+`"`))
		if want := k.id == "schematic" || k.id == "inputs"; has != want {
			t.Errorf("section %s: shown %v, want %v", k.id, has, want)
		}
	}
	if bytes.Contains(out, []byte("NaN")) || bytes.Contains(out, []byte("Inf")) {
		t.Error("a bare design shows numbers that are none")
	}
}

func TestFailureIsSaidFirst(t *testing.T) {
	d, e := fixture()
	bad := *d
	bad.Stresses = append([]ratings.Stress(nil), d.Stresses...)
	bad.Stresses[0].Ratio, bad.Stresses[0].Over = 1.004, true
	out, err := HTML(&bad, e, Options{})
	if err != nil {
		t.Fatal(err)
	}
	page := string(out)
	head := page[strings.Index(page, "<header>"):strings.Index(page, "</header>")]
	for _, want := range []string{"Does not meet every target and limit", "D3 (TVD-2K2-F): repetitive reverse voltage at 100.4 % of its limit"} {
		if !strings.Contains(head, want) {
			t.Errorf("the head does not say %q", want)
		}
	}
	if strings.Contains(page, "Meets every target") {
		t.Error("a design that fails is said to pass")
	}
}

func TestPercentNeverRoundsOverTheLimit(t *testing.T) {
	for share, want := range map[float64]string{0.99996: "99.9 %", 1: "100 %", 1.0001: "100.1 %", 0.954: "95 %", 0.001: "below 1 %", 1e6: "more than 1000 %", 0: "0 %"} {
		if got := percent(share); got != want {
			t.Errorf("percent(%v) = %q, want %q", share, got, want)
		}
	}
}

// hostile are strings that a catalog could carry to break a page, run script
// in it, or show something else than it says.
var hostile = []string{
	`<script>alert(1)</script>`, `"><img src=x onerror=alert(1)>`, `</svg><script>1</script>`, `</title></style><style>*{display:none}`,
	`javascript:alert(1)`, "`${alert(1)}`", `{{.Policy}}`, `]]><a href="//x.test">`, "&#x202E;&lt;b&gt;",
	"\u202Eright to left\u202C", "\u2066isolate\u2069", "zero\u200Bwidth\uFEFF", "bell\x07null\x00", "bad\xff\xfeutf8", "line\u2028separator\r\n",
	strings.Repeat("W", 4000), strings.Repeat("e\u0301", 50),
}

// poison puts a hostile string into every text that a report shows.
func poison(bad string) (*optimize.Design, Extras) {
	d0, e := fixture()
	d := *d0
	p := *d.Lines[0].Part
	p.Number, p.Maker, p.Description = bad, bad, bad
	k := *p.Capacitor
	k.Characteristic, k.Technology = bad, catalog.Technology(bad)
	p.Capacitor = &k
	line := d.Lines[0]
	line.Part = &p
	line.Purchase = order.Purchase{Part: &p, Offer: &catalog.Offer{Supplier: bad, OrderCode: bad}, Quantity: 1, UnitPrice: line.Purchase.UnitPrice, Cost: line.Purchase.Cost}
	d.Lines = append([]optimize.Line{line}, d.Lines[1:]...)
	d.Supply.Name, d.Supply.Derating = bad, bad
	d.Inputs = []catalog.Input{{Name: bad, SHA256: bad}}
	d.Cautions = []ratings.Caution{{Code: bad, Title: bad, Text: bad, Source: bad}}
	d.Targets = []optimize.Target{{Name: bad, Wanted: bad, Unit: bad, Corner: bad}}
	d.Stresses = []ratings.Stress{{Ref: "C1", Part: bad, Quantity: bad, Corner: bad, Note: bad, Limit: 1, Ratio: 0.5, Rule: ratings.Rule{Policy: bad, Name: bad, Source: bad}},
		{Ref: bad, Part: bad, Quantity: bad, Unjudged: true, Note: bad}}
	d.Failed, d.Notes = []string{bad}, []string{bad}
	d.Certificate.Text, d.Certificate.Rejected = []string{bad}, bad
	d.RunnersUp = []optimize.RunnerUp{{Summary: bad, Note: bad}}
	e.Front = []FrontPoint{{Name: bad, Note: bad}, {Name: "other", Other: 3}}
	e.Alternates = []Alternate{{For: bad, Part: &p, Effect: bad, Note: bad}}
	tolerance := *e.Tolerance
	tolerance.Of, tolerance.Note = bad, bad
	e.Tolerance = &tolerance
	e.FrontOf = bad
	regulation := *e.Regulation
	regulation.Ended = bad
	e.Regulation = &regulation
	return &d, e
}

var tag0 = regexp.MustCompile(`<(script|img|a|iframe|style|link|object|embed|form)[\s>/]`)

func TestHostileStringsStayWords(t *testing.T) {
	clean := tag0.FindAllString(string(fixtureHTML(t)), -1)
	for _, bad := range hostile {
		d, e := poison(bad)
		out, err := HTML(d, e, Options{Program: bad})
		if err != nil {
			t.Errorf("%.30q: %v", bad, err)
			continue
		}
		page := string(out)
		if got := tag0.FindAllString(page, -1); len(got) != len(clean) {
			t.Errorf("%.30q made elements: %d of those that matter, want %d", bad, len(got), len(clean))
		}
		for _, r := range page {
			if r != '\n' && r != '\t' && (r < 0x20 || r == 0x7F || 0x200B <= r && r <= 0x200F || 0x2028 <= r && r <= 0x202E || 0x2060 <= r && r <= 0x206F || r == 0xFEFF) {
				t.Errorf("%.30q: %U came through", bad, r)
				break
			}
		}
		if m := regexp.MustCompile(`\son[a-z]+=|href="(?:[^#])`).FindString(strings.ReplaceAll(page, "&#34;", "")); m != "" && !strings.Contains(bad, "onerror") && !strings.Contains(bad, "href") {
			t.Errorf("%.30q made an attribute %q", bad, m)
		}
		for _, c := range Charts(d, e) {
			svg, err := c.SVG()
			if err != nil {
				t.Errorf("%.30q: %v", bad, err)
				continue
			}
			wellFormed(t, svg)
		}
	}
}

// The policy allows exactly the style and the script that stand in the page.
func TestPolicyNamesWhatIsThere(t *testing.T) {
	page := string(fixtureHTML(t))
	policy := regexp.MustCompile(`http-equiv="Content-Security-Policy" content="([^"]*)"`).FindStringSubmatch(page)
	if policy == nil {
		t.Fatal("no policy")
	}
	allowed := strings.NewReplacer("&#39;", "'", "&#43;", "+").Replace(policy[1])
	if !strings.HasPrefix(allowed, "default-src 'none'; ") || strings.Contains(allowed, "unsafe") {
		t.Errorf("the policy is %s", allowed)
	}
	for _, element := range []string{"style", "script"} {
		found := regexp.MustCompile(`(?s)<`+element+`>(.*?)</`+element+`>`).FindAllStringSubmatch(page, -1)
		if len(found) != 1 {
			t.Fatalf("%d elements %s", len(found), element)
		}
		sum := sha256.Sum256([]byte(found[0][1]))
		if want := element + "-src 'sha256-" + base64.StdEncoding.EncodeToString(sum[:]) + "'"; !strings.Contains(allowed, want) {
			t.Errorf("the policy does not hold %s", want)
		}
	}
	if strings.Contains(page, ` style="`) {
		t.Error("a style attribute, which the policy forbids")
	}
}

// Contrast by WCAG 2.2, success criteria 1.4.3 (text, 4.5:1) and 1.4.11
// (lines and shapes, 3:1); the formula is its "relative luminance" (from
// memory).
func TestContrast(t *testing.T) {
	for _, mode := range []struct {
		name string
		rgb  func(ink) uint32
	}{{"light", func(i ink) uint32 { return i.light }}, {"dark", func(i ink) uint32 { return i.dark }}} {
		for _, ground := range []ink{paper, panel} {
			for _, i := range []ink{textInk, faint, link, alarm, good} {
				if r := contrast(mode.rgb(i), mode.rgb(ground)); r < 4.5 {
					t.Errorf("%s: text in %s on %s has a contrast of %.2f", mode.name, i.name, ground.name, r)
				}
			}
		}
		for _, i := range []ink{line, blue, red, green, alarm} {
			if r := contrast(mode.rgb(i), mode.rgb(paper)); r < 3 {
				t.Errorf("%s: lines in %s have a contrast of %.2f", mode.name, i.name, r)
			}
		}
	}
}

func contrast(a, b uint32) float64 {
	la, lb := luminance(a), luminance(b)
	return (max(la, lb) + 0.05) / (min(la, lb) + 0.05)
}

func luminance(rgb uint32) float64 {
	part := func(shift int) float64 {
		c := float64(rgb>>shift&0xFF) / 255
		if c <= 0.04045 {
			return c / 12.92
		}
		return math.Pow((c+0.055)/1.055, 2.4)
	}
	return 0.2126*part(16) + 0.7152*part(8) + 0.0722*part(0)
}

// Every mark that is told by its colour is told by a word or a sign too.
func TestColourIsNeverAlone(t *testing.T) {
	page := string(fixtureHTML(t))
	for _, m := range regexp.MustCompile(`<span class="mark (\w+)"[^>]*>([^<]*)</span>([^<]*)`).FindAllStringSubmatch(page, -1) {
		if strings.TrimSpace(m[2]) == "" || strings.TrimSpace(strings.Trim(m[3], "\u00A0")) == "" {
			t.Errorf("a mark without sign or word: %q", m[0])
		}
	}
	for k := range lineInks {
		for j := range k {
			if fmt.Sprint(lineStyle(k).Dashes) == fmt.Sprint(lineStyle(j).Dashes) {
				t.Errorf("lines %d and %d differ in colour alone", j, k)
			}
		}
	}
}

func TestIdentitiesAreUnique(t *testing.T) {
	seen := map[string]bool{}
	for _, m := range regexp.MustCompile(` id="([^"]*)"`).FindAllStringSubmatch(string(fixtureHTML(t)), -1) {
		if seen[m[1]] {
			t.Errorf("two elements are called %q", m[1])
		}
		seen[m[1]] = true
	}
}

func TestRanges(t *testing.T) {
	for want, refs := range map[string][]string{"C1 C3 C5 C7–C9": {"C1", "C3", "C5", "C7", "C8", "C9"}, "D1 D2": {"D1", "D2"}, "R1A R1B": {"R1A", "R1B"}, "": nil, "T1": {"T1"}, "C9 D10": {"C9", "D10"}} {
		if got := ranges(refs); got != want {
			t.Errorf("ranges(%v) = %q, want %q", refs, got, want)
		}
	}
}
