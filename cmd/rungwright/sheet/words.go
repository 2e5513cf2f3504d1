package sheet

import (
	"fmt"
	"regexp"
	"slices"
	"strings"
)

// Field is what a column of a bill of materials means.
type Field string

// The fields. Options.Columns names them so.
const (
	Designators Field = "designators"
	Quantity    Field = "quantity"
	Part        Field = "part"
	Maker       Field = "maker"
	Value       Field = "value"
	Description Field = "description"
	Fitted      Field = "fitted"     // yes means that it is fitted
	NotFitted   Field = "not-fitted" // yes means that it is not
	Position    Field = "position"   // where in the circuit, when it differs from the designator
)

// Fields lists them in the order of messages.
func Fields() []Field {
	return []Field{Designators, Quantity, Part, Maker, Value, Description, Fitted, NotFitted, Position}
}

// weight is how much a field tells that a row is the header.
func (f Field) weight() int {
	switch f {
	case Designators, Part:
		return 4
	case Quantity:
		return 2
	}
	return 1
}

// headings are the words that head a column, as key writes them: English,
// German and French, common practice, no source. The first list of a field
// means it beyond doubt; a heading of the second counts where no other column
// has one of the first.
var headings = map[Field][2][]string{
	Designators: {
		{"designator", "designators", "reference designator", "reference designators", "ref des", "refdes", "ref designator", "ref designators",
			"references", "component reference", "component references", "part reference", "part references", "circuit reference", "circuit references",
			"referenzbezeichner", "referenzbezeichnung", "bauteilreferenz", "bauteilkennzeichen", "kennzeichen", "kurzzeichen",
			"repere", "reperes", "repere topologique", "reperes topologiques", "reference schema", "references schema"},
		{"reference", "ref", "refs", "reference s", "ref s", "designator s", "designation reference", "referenz", "referenzen", "bezeichner", "location", "locations"},
	},
	Quantity: {
		{"quantity", "qty", "qnty", "quant", "qty per unit", "quantity per unit", "per unit", "qty unit", "qty per board", "quantity per board", "qty board",
			"qty per assembly", "quantity per assembly", "qty assy", "each unit", "pieces per unit",
			"menge", "anzahl", "stuckzahl", "menge pro gerat", "stuck pro gerat", "menge pro baugruppe", "stuck pro baugruppe",
			"quantite", "qte", "quantite par carte", "quantite par unite", "qte par carte", "qte unitaire"},
		{"count", "pcs", "pieces", "number off", "no off", "amount", "stuck", "stk", "nombre", "nb"},
	},
	Part: {
		{"part number", "part no", "part nr", "mpn", "manufacturer part number", "manufacturer part no", "manufacturers part number", "manufacturer s part number",
			"mfr part number", "mfr part no", "mfr part", "mfg part number", "mfg part no", "mfg part", "mfr pn", "mfg pn", "mfr p n", "mfg p n",
			"maker part number", "maker s part number", "manufacturer pn", "manufacturer p n",
			"herstellernummer", "hersteller nr", "hersteller teilenummer", "herstellerteilenummer", "hersteller bestellnummer", "teilenummer", "bauteilnummer", "typenbezeichnung",
			"reference fabricant", "ref fabricant", "numero de piece", "reference du fabricant", "reference constructeur"},
		{"part", "part name", "parts", "p n", "pn", "partnumber", "partno", "component", "article", "article number", "type", "type number", "model", "model number",
			"bauteil", "typ", "artikel", "artikelnummer", "teil", "composant", "modele"},
	},
	Maker: {
		{"maker", "manufacturer", "manufacturer name", "mfr", "mfg", "mfr name", "mfg name", "hersteller", "fabrikat", "fabricant", "constructeur"},
		{"brand", "make", "vendor name", "marke", "marque"},
	},
	Value: {
		{"value", "wert", "nennwert", "valeur", "component value", "nominal value"},
		{"val", "comment"},
	},
	Description: {
		{"description", "part description", "beschreibung", "what it is", "descriptif", "libelle"},
		{"desc", "descr", "details", "remarks", "bezeichnung", "benennung", "designation", "specification"},
	},
	Fitted: {
		{"fitted", "populate", "populated", "placed", "mounted", "bestuckt", "bestucken", "bestuckung", "monte", "equipe"},
		{"fit", "install"},
	},
	NotFitted: {
		{"dnp", "dnf", "dni", "do not fit", "do not populate", "do not place", "do not install", "do not mount", "not fitted", "not populated", "not placed", "unfitted",
			"nicht bestucken", "nicht bestuckt", "unbestuckt", "non monte", "ne pas monter", "non equipe"},
		{"no fit", "nofit", "no pop", "nopop", "omit", "omitted"},
	},
	Position: {
		{"circuit position", "position in circuit", "position in the circuit", "circuit place", "place in circuit", "schaltungsposition", "position dans le circuit"},
		{},
	},
}

// meaning is what a heading may mean, and whether beyond doubt.
type meaning struct {
	field  Field
	strong bool
}

// meanings turns the lists round.
var meanings = func() map[string]meaning {
	out := map[string]meaning{}
	for _, f := range Fields() {
		for i, list := range headings[f] {
			for _, words := range list {
				if before, twice := out[words]; twice {
					panic(fmt.Sprintf("sheet: the heading %q means %s and %s", words, before.field, f))
				}
				out[words] = meaning{f, i == 0}
			}
		}
	}
	return out
}()

var inBrackets = regexp.MustCompile(`[(\[][^)\]]*[)\]]`)

// meaningOf reads a heading: as a whole, then without what is in brackets.
func meaningOf(heading string) (meaning, bool) {
	if m, ok := meanings[key(heading)]; ok {
		return m, true
	}
	m, ok := meanings[key(inBrackets.ReplaceAllString(heading, " "))]
	return m, ok
}

// markers say that a row's part is not fitted; common practice, no source.
// (NF is left out, for nF is a unit, and NP, for NP0 is a dielectric.)
var markers = append(slices.Concat(headings[NotFitted][0], headings[NotFitted][1]), "dns", "do not stuff", "not mounted", "not installed", "not used",
	"unpopulated", "no load", "a ne pas monter", "nicht montieren", "entfallt")

func isMarker(text string) bool { return slices.Contains(markers, key(text)) }

// insideMarker is a marker within a longer text, such as "10 nF (DNP)"; "" for
// none.
func insideMarker(text string) string {
	padded := " " + key(text) + " "
	for _, m := range markers {
		if strings.Contains(padded, " "+m+" ") {
			return m
		}
	}
	return ""
}

var (
	yes = []string{"yes", "y", "x", "1", "true", "ja", "j", "oui", "o", "vrai", "wahr", "fitted", "fit", "populate", "populated", "place", "placed", "mounted", "bestuckt", "monte"}
	no  = []string{"no", "n", "0", "false", "nein", "non", "faux", "falsch"}
	sum = []string{"total", "totals", "sum", "subtotal", "sub total", "grand total", "total cost", "total quantity", "total parts", "summe", "gesamt", "gesamtsumme", "zwischensumme",
		"total general", "sous total", "somme"}
)

// isYes reads a tick too, which key drops.
func isYes(text string) bool {
	return slices.Contains(yes, key(text)) || strings.ContainsAny(text, "✓✔☑")
}

// isNo reads a cross and a dash too.
func isNo(text string) bool {
	return slices.Contains(no, key(text)) || text == "-" || strings.ContainsAny(text, "✗✘☐")
}

func isTotal(text string) bool { return slices.Contains(sum, key(text)) }
