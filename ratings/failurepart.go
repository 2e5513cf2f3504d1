package ratings

import (
	"math"
	"slices"
	"strings"

	"rungwright/catalog"
)

// FailureRate is a part's failure rate by the handbook, at its worst use and
// of commercial quality.
type FailureRate struct {
	Part            string
	PerMillionHours float64
	Known           bool   // false: the handbook's figures here do not cover the part
	Note            string // what was assumed, or why it is not known
}

// FailureRateOf gives the rate of a part over its uses, the worst counting.
// See FailureWorth for what it is worth.
func FailureRateOf(part *catalog.Part, uses []Use, where Environment) FailureRate {
	f := FailureRate{Part: part.Number, Known: len(uses) > 0, Note: "nothing uses the part"}
	for i := range uses {
		rate, note := rateOf(part, &uses[i], where)
		if math.IsNaN(rate) {
			return FailureRate{Part: part.Number, Note: note}
		}
		if rate >= f.PerMillionHours {
			f.PerMillionHours, f.Note = rate, note
		}
	}
	return f
}

// rateOf is NaN where no model covers the part.
func rateOf(part *catalog.Part, u *Use, where Environment) (float64, string) {
	switch part.Kind {
	case catalog.KindCapacitor:
		return capacitorRate(part, u, where)
	case catalog.KindDiode:
		return diodeRate(part.Diode, u, where)
	case catalog.KindResistor:
		return resistorRate(part, u, where)
	}
	return math.NaN(), "no failure-rate figure is known here for this kind of part"
}

func capacitorRate(part *catalog.Part, u *Use, where Environment) (float64, string) {
	c := part.Capacitor
	var model CapacitorModel
	switch c.Technology {
	case catalog.CeramicClass1, catalog.CeramicClass2:
		model = CeramicModel
	case catalog.Film:
		model = FilmModel
	case catalog.AluminiumElectrolytic:
		model = AluminiumModel
	default:
		return math.NaN(), "no failure-rate figure is known here for " + string(c.Technology) + " capacitors"
	}
	rise, _ := selfHeating(part, u)
	share := math.Abs(float64(u.PeakV)) / float64(c.Voltage)
	return model.Rate(float64(u.Ambient)+rise, float64(c.Capacitance), share, QualityCommercial, where), "commercial quality assumed"
}

// diodeRate takes every diode but standard and Schottky ones as a fast
// rectifier, which is the stricter.
func diodeRate(d *catalog.Diode, u *Use, where Environment) (float64, string) {
	base := RateFastRectifier
	if d.Type == catalog.Standard || d.Type == catalog.Schottky {
		base = RateRectifier
	}
	junction, _ := junctionCelsius(d, u)
	share := math.Abs(float64(u.InverseV)) / float64(d.ReverseVoltage)
	return DiodeRate(base, junction, share, QualityPlastic, where), "commercial plastic quality assumed"
}

// filmWords are the resistor technologies that count as film.
var filmWords = []string{"metal film", "thick film", "thin film", "carbon film", "metal oxide"}

func resistorRate(part *catalog.Part, u *Use, where Environment) (float64, string) {
	r := part.Resistor
	if !slices.ContainsFunc(filmWords, func(w string) bool { return strings.EqualFold(w, r.Technology) }) {
		return math.NaN(), "no failure-rate figure is known here for resistors that are not film"
	}
	watts := math.Abs(float64(u.PowerW))
	return FilmResistorRate(float64(u.Ambient), watts, watts/float64(r.Power), QualityCommercial, where), "commercial quality assumed"
}
