package report

import (
	"bytes"
	"crypto/sha256"
	_ "embed"
	"encoding/base64"
	"html/template"

	"rungwright/optimize"
)

//go:embed page.html
var pageText string

//go:embed style.css
var styleText string

//go:embed script.js
var scriptText string

// The style and script as they stand in the page, to the byte: the policy
// names them by their hash.
var (
	pageStyle     = inkStyles() + styleText
	styleElement  = template.HTML("<style>" + pageStyle + "</style>")
	scriptElement = template.HTML("<script>" + scriptText + "</script>")
)

var templates = template.Must(template.New("").Parse(pageText))

// policy forbids the page everything but its own style and script.
func policy() string {
	return "default-src 'none'; style-src " + hashed(pageStyle) + "; script-src " + hashed(scriptText) + "; base-uri 'none'; form-action 'none'"
}

func hashed(s string) string {
	sum := sha256.Sum256([]byte(s))
	return "'sha256-" + base64.StdEncoding.EncodeToString(sum[:]) + "'"
}

// page is what the outer template shows.
type page struct {
	Title, Program, Made string
	Policy               string
	Style, Script        template.HTML
	Answer               answer
	Sections             []section
}

// section is a part of the report under its own heading.
type section struct {
	ID, Title string
	Body      template.HTML
}

// subject is what the sections speak of.
type subject struct {
	d *optimize.Design
	e Extras
}

// kindOfSection makes one section; an empty body leaves it out.
type kindOfSection struct {
	id, title string
	write     func(*subject) (template.HTML, error)
}

// sections stand in the order in which they are read, dangers first.
var sections = []kindOfSection{
	{"cautions", "Cautions", (*subject).cautions},
	{"targets", "Targets and results", (*subject).targets},
	{"schematic", "Schematic", (*subject).schematic},
	{"stresses", "How hard the parts work", (*subject).stresses},
	{"front", "What a change would buy", (*subject).front},
	{"regulation", "Output against load", (*subject).regulation},
	{"waveforms", "One period", (*subject).waveforms},
	{"switching", "Switch-on and switch-off", (*subject).switching},
	{"losses", "Where the power goes", (*subject).losses},
	{"cost", "What it costs", (*subject).costs},
	{"tolerance", "Spread by tolerance", (*subject).tolerance},
	{"alternates", "Alternates", (*subject).alternates},
	{"parts", "Parts", (*subject).parts},
	{"certificate", "Certificate", (*subject).certificate},
	{"inputs", "Inputs", (*subject).inputs},
}

// fill writes one of the page's templates.
func fill(name string, data any) (template.HTML, error) {
	var b bytes.Buffer
	err := templates.ExecuteTemplate(&b, name, data)
	return template.HTML(b.String()), err
}
