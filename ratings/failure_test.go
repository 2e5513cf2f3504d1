package ratings

import (
	"math"
	"strings"
	"testing"

	"rungwright/catalog"
)

// Worked by hand with the handbook's formulas (MIL-HDBK-217F Notice 2, from
// memory); four or five figures.

// Rectifier, junction 75 °C, 0.5 of the rated voltage, JANTX, ground fixed:
// πT = exp(−3091(1/348 − 1/298)) = exp(1.49030) = 4.43842;
// πS = 0.5^2.43 = 0.185565; λ = 0.003·4.43842·0.185565·1·6 = 0.0148251.
func TestDiodeRate(t *testing.T) {
	if got := DiodeRate(RateRectifier, 75, 0.5, QualityJANTX, GroundFixed); math.Abs(got-0.0148251) > 1e-7 {
		t.Errorf("got %v", got)
	}
	// Up to 0.3 the voltage factor is 0.054; at 25 °C πT = 1.
	for share, want := range map[float64]float64{0: 0.054, 0.3: 0.054, 0.301: math.Pow(0.301, 2.43), 1: 1} {
		if got := DiodeRate(1, 25, share, 1, GroundBenign); !near(got, want) {
			t.Errorf("share %v: got %v, want %v", share, got, want)
		}
	}
}

// Ceramic 10 nF at 55 °C and 0.6 of the rated voltage, commercial, benign:
// πT = exp(−(0.35/8.617e−5)(1/328 − 1/298)) = exp(1.24664) = 3.47866;
// πC = 0.01^0.09 = 0.66069; πV = 2; λ = 0.00099·3.47866·0.660693·2·10 = 0.0455068.
func TestCapacitorRateCeramic(t *testing.T) {
	if got := CeramicModel.Rate(55, 10e-9, 0.6, QualityCommercial, GroundBenign); math.Abs(got-0.0455068) > 1e-7 {
		t.Errorf("got %v", got)
	}
}

// Film 1 µF at 55 °C, 0.3, benign, quality 1: πT = exp((0.15/8.617e−5)·3.06924e−4) =
// exp(0.534273) = 1.70621; πC = 1; πV = 0.5^5 + 1 = 1.03125; λ = 0.00051·1.70621·1.03125 = 0.00089736.
func TestCapacitorRateFilm(t *testing.T) {
	if got := FilmModel.Rate(55, 1e-6, 0.3, 1, GroundBenign); math.Abs(got-0.00089736) > 5e-8 {
		t.Errorf("got %v", got)
	}
}

// Aluminium 100 µF at 25 °C, 0.6, mobile: πT = 1; πC = 100^0.23 = 2.88403;
// πV = 2; λ = 0.00012·2.88403·2·3·20 = 0.0415300.
func TestCapacitorRateAluminium(t *testing.T) {
	if got := AluminiumModel.Rate(25, 100e-6, 0.6, QualityMilStandard, GroundMobile); math.Abs(got-0.04153) > 1e-6 {
		t.Errorf("got %v", got)
	}
}

// 0.1 W of 0.25 W at 25 °C, commercial, fixed: πP = 0.1^0.39 = 0.40738;
// πS = 0.71·e^0.44 = 1.10241; λ = 0.0037·0.40738·1.10241·10·4 = 0.0664675.
func TestFilmResistorRate(t *testing.T) {
	if got := FilmResistorRate(25, 0.1, 0.4, QualityCommercial, GroundFixed); math.Abs(got-0.0664675) > 1e-7 {
		t.Errorf("got %v", got)
	}
	// 0.08 eV at 75 °C: exp((0.08/8.617e−5)·4.82144e−4) = exp(0.447621) = 1.56458.
	if got := FilmResistorRate(75, 0.1, 0.4, QualityCommercial, GroundFixed) / FilmResistorRate(25, 0.1, 0.4, QualityCommercial, GroundFixed); math.Abs(got-1.56458) > 2e-5 {
		t.Errorf("got %v", got)
	}
}

// Away from the points where a factor is 1 or 2, by hand: the voltage factor
// at half of 0.6 is 0.5³+1 or 0.5⁵+1, 0.01^0.09 = 0.660693, 0.35 eV at 55 °C
// makes 3.478655.
func TestFailureModelExponents(t *testing.T) {
	for name, c := range map[string]struct{ got, want float64 }{
		"ceramic":   {CeramicModel.Rate(25, 1e-6, 0.3, 1, GroundBenign), 0.00099 * 1.125},
		"film":      {FilmModel.Rate(25, 10e-9, 0.3, 1, GroundBenign), 0.00051 * 0.660693448 * 1.03125},
		"aluminium": {AluminiumModel.Rate(55, 1e-6, 0.3, 1, GroundBenign), 0.00012 * 3.478655462 * 1.03125},
		"plastic":   {DiodeRate(RateGeneral, 25, 1, QualityPlastic, GroundBenign), 0.0038 * 8},
	} {
		if !near(c.got, c.want) {
			t.Errorf("%s: got %v, want %v", name, c.got, c.want)
		}
	}
}

func TestFailureTablesFromMemory(t *testing.T) {
	for name, c := range map[string]struct{ got, want float64 }{
		"rectifier": {RateRectifier, 0.0030}, "fast": {RateFastRectifier, 0.0690}, "switching": {RateSwitching, 0.0010}, "general": {RateGeneral, 0.0038},
		"JANTXV": {QualityJANTXV, 0.7}, "JANTX": {QualityJANTX, 1}, "JAN": {QualityJAN, 2.4}, "lower": {QualityLowerDiode, 5.5}, "plastic": {QualityPlastic, 8},
		"diode mobile":    {DiodeRate(1, 25, 1, 1, GroundMobile), 9},
		"capacitor fixed": {CapacitorModel{1, 0.35, 0.09, 3}.Rate(25, 1e-6, 0, 1, GroundFixed), 10},
		"resistor mobile": {FilmResistorRate(25, 1, 0, 1, GroundMobile), 0.0037 * 0.71 * 16},
		"resistor benign": {FilmResistorRate(25, 1, 0, 1, GroundBenign), 0.0037 * 0.71},
	} {
		if !near(c.got, c.want) {
			t.Errorf("%s: got %v, want %v", name, c.got, c.want)
		}
	}
	if !strings.Contains(FailureWorth, "do not predict") {
		t.Error("what such figures are worth is not said")
	}
}

func TestFailureRateOfPart(t *testing.T) {
	u := Use{Ambient: 45, PeakV: 500, InverseV: 500, PowerW: 0.5, Frequency: 1e3}
	for _, c := range []struct {
		name string
		part *catalog.Part
		want float64
	}{
		{"ceramic", capacitor(nil), CeramicModel.Rate(45, 10e-9, 0.5, 10, GroundFixed)},
		{"film", capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.Technology = catalog.Film }), FilmModel.Rate(45, 10e-9, 0.5, 10, GroundFixed)},
		{"aluminium", electrolytic(nil), AluminiumModel.Rate(45, 100e-6, 10, 10, GroundFixed)},
		{"fast", diode(withoutLeakage), DiodeRate(0.069, 45, 0.5, 8, GroundFixed)},
		{"standard", diode(func(d *catalog.Diode) { d.Type = catalog.Standard; withoutLeakage(d) }), DiodeRate(0.003, 45, 0.5, 8, GroundFixed)},
		{"schottky", diode(func(d *catalog.Diode) { d.Type = catalog.Schottky; withoutLeakage(d) }), DiodeRate(0.003, 45, 0.5, 8, GroundFixed)},
		{"resistor", resistor(func(_ *catalog.Part, r *catalog.Resistor) { r.Power = 2 }), FilmResistorRate(45, 0.5, 0.25, 10, GroundFixed)},
	} {
		half := u
		half.PeakV, half.InverseV, half.PowerW = u.PeakV/2, u.InverseV/2, u.PowerW/2
		f := FailureRateOf(c.part, []Use{half, u, half}, GroundFixed)
		if !f.Known || !near(f.PerMillionHours, c.want) || f.Note == "" || f.Part != c.part.Number {
			t.Errorf("%s: got %+v, want %v", c.name, f, c.want)
		}
	}
}

// Heat inside counts: 5 K at the rated ripple.
func TestFailureRateCountsSelfHeating(t *testing.T) {
	f := FailureRateOf(electrolytic(nil), []Use{{Ambient: 45, PeakV: 25, Frequency: 120, RippleA: 0.1}}, GroundBenign)
	if want := AluminiumModel.Rate(50, 100e-6, 0.5, 10, GroundBenign); !near(f.PerMillionHours, want) {
		t.Errorf("got %+v, want %v", f, want)
	}
	d := FailureRateOf(diode(withoutLeakage), []Use{{Ambient: 45, InverseV: 500, LossW: 0.2}}, GroundBenign)
	if want := DiodeRate(0.069, 55, 0.5, 8, GroundBenign); !near(d.PerMillionHours, want) {
		t.Errorf("got %+v, want %v", d, want)
	}
}

func TestFailureRateNotKnown(t *testing.T) {
	mica := capacitor(func(_ *catalog.Part, c *catalog.Capacitor) { c.Technology = catalog.Mica })
	wirewound := resistor(func(_ *catalog.Part, r *catalog.Resistor) { r.Technology = "wirewound" })
	for _, part := range []*catalog.Part{mica, wirewound, winding(nil)} {
		if f := FailureRateOf(part, []Use{{}}, GroundFixed); f.Known || f.PerMillionHours != 0 || !strings.Contains(f.Note, "no failure-rate figure") {
			t.Errorf("got %+v", f)
		}
	}
	if f := FailureRateOf(capacitor(nil), nil, GroundFixed); f.Known {
		t.Errorf("unused: got %+v", f)
	}
}
