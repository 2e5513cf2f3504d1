package ratings

import "math"

// FailureWorth says what failure rates are worth; it goes wherever they are
// shown.
const FailureWorth = "failure rates by MIL-HDBK-217F Notice 2 (from memory) compare designs; they do not predict a unit's life"

// Environment is where the unit works, by MIL-HDBK-217F Notice 2.
type Environment int

// The environments that are known here.
const (
	GroundBenign Environment = iota
	GroundFixed
	GroundMobile
)

// environmentFactors πE by part kind; MIL-HDBK-217F Notice 2: from memory.
var (
	diodeEnvironment     = [...]float64{GroundBenign: 1, GroundFixed: 6, GroundMobile: 9}
	capacitorEnvironment = [...]float64{GroundBenign: 1, GroundFixed: 10, GroundMobile: 20}
	resistorEnvironment  = [...]float64{GroundBenign: 1, GroundFixed: 4, GroundMobile: 16}
)

// Quality factors πQ; MIL-HDBK-217F Notice 2: from memory.
const (
	QualityJANTXV      = 0.7
	QualityJANTX       = 1.0
	QualityJAN         = 2.4
	QualityLowerDiode  = 5.5
	QualityPlastic     = 8.0  // diodes
	QualityCommercial  = 10.0 // capacitors and resistors
	QualityMilStandard = 3.0  // capacitors and resistors, no established reliability
)

// Base rates λb, failures per 10⁶ h; MIL-HDBK-217F Notice 2: from memory.
const (
	RateRectifier     = 0.0030
	RateFastRectifier = 0.0690
	RateSwitching     = 0.0010
	RateGeneral       = 0.0038
	RateCeramic       = 0.00099
	RateFilm          = 0.00051
	RateAluminium     = 0.00012
	RateFilmResistor  = 0.0037
)

// arrhenius is exp(−k·(1/T − 1/298)), T being the temperature [°C] + 273.
func arrhenius(k, celsius float64) float64 {
	return math.Exp(-k * (1/(celsius+273) - 1.0/298))
}

// boltzmann in eV/K.
const boltzmann = 8.617e-5

// DiodeRate is λ = λb·πT·πS·πC·πQ·πE in failures per 10⁶ h of a low-frequency
// diode with bonded contacts (πC = 1): junction in °C, reverse voltage as a
// share of its rating.
func DiodeRate(base, junction, reverse, quality float64, where Environment) float64 {
	stress := 0.054
	if reverse > 0.3 {
		stress = math.Pow(reverse, 2.43)
	}
	return base * arrhenius(3091, junction) * stress * quality * diodeEnvironment[where]
}

// CapacitorModel holds what differs between capacitor technologies.
type CapacitorModel struct {
	Base     float64 // λb, failures per 10⁶ h
	Energy   float64 // of activation [eV]
	Exponent float64 // of the capacitance in µF
	Voltage  float64 // exponent of the voltage share over 0.6
}

// The capacitor models; MIL-HDBK-217F Notice 2: from memory.
var (
	CeramicModel   = CapacitorModel{RateCeramic, 0.35, 0.09, 3}
	FilmModel      = CapacitorModel{RateFilm, 0.15, 0.09, 5}
	AluminiumModel = CapacitorModel{RateAluminium, 0.35, 0.23, 5}
)

// Rate is λ = λb·πT·πC·πV·πSR·πQ·πE in failures per 10⁶ h (πSR, for tantalum
// alone, is 1): temperature in °C, capacitance in F, peak voltage as a share
// of its rating.
func (m CapacitorModel) Rate(celsius, farads, share, quality float64, where Environment) float64 {
	capacitance := math.Pow(farads*1e6, m.Exponent)
	voltage := math.Pow(share/0.6, m.Voltage) + 1
	return m.Base * arrhenius(m.Energy/boltzmann, celsius) * capacitance * voltage * quality * capacitorEnvironment[where]
}

// FilmResistorRate is λ = λb·πT·πP·πS·πQ·πE in failures per 10⁶ h of a film
// resistor: temperature in °C, power in W, and as a share of its rating. πT
// has 0.08 eV, πP = P^0.39, πS = 0.71·e^(1.1·share).
func FilmResistorRate(celsius, watts, share, quality float64, where Environment) float64 {
	return RateFilmResistor * arrhenius(0.08/boltzmann, celsius) * math.Pow(watts, 0.39) *
		0.71 * math.Exp(1.1*share) * quality * resistorEnvironment[where]
}
