// Package ladder is the circuit itself: diode-capacitor ladders as netlists,
// the charge-balance estimate, the periodic steady state in the time domain,
// and transients. Every number is SI: volt, ampere, farad, ohm, henry, second,
// hertz, watt. It knows no parts.
package ladder

// Circuit is a ladder by values. Capacitors and Diodes stand in the order of
// their reference designators: C1, C2 … and D1, D2 ….
type Circuit struct {
	Topology   Topology
	Stages     int
	Negative   bool // output below ground: every diode turned round
	Source     Source
	Capacitors []Capacitor
	Diodes     []Diode
	Load       Load
	Stray      float64 // from each ladder node to ground [F]
	Filter     Filter  // series resistor and capacitor at the output; zero: none
}

// Source drives the ladder. A centre-tapped source has two ends of opposite
// phase, each with Peak, Resistance and Leakage.
type Source struct {
	Waveform   Waveform
	Peak       float64   // of each winding end [V]
	Frequency  float64   // [Hz]
	Resistance float64   // in each winding end, surge resistor included [Ω]
	Leakage    float64   // leakage inductance in each winding end [H]
	RingQ      float64   // quality factor at which leakage inductance rings with the ladder's junction and stray capacitance; zero: undamped
	Edge       float64   // rise time of a square wave, in periods; zero: 1/50
	Points     []float64 // of a table waveform: equally spaced over one period, in units of Peak
}

// Waveform names the shape of the source voltage.
type Waveform string

// The waveforms.
const (
	Sine     Waveform = "sine"
	Square   Waveform = "square"
	Triangle Waveform = "triangle"
	Table    Waveform = "table"
)

// Capacitor is one position. Zero fields mean an ideal capacitor.
type Capacitor struct {
	C           float64     // at zero bias [F]
	Bias        []BiasPoint // share of C left at a voltage; linear between, flat outside
	ESR         float64     // series resistance at the working frequency [Ω]
	Conductance float64     // leakage [S]
}

// BiasPoint is the share of C left at a DC voltage [V].
type BiasPoint struct{ V, Share float64 }

// Diode is the exponential diode with series resistance,
// i = IS(exp((v − i·RS)/(N·VT)) − 1), and its charges.
type Diode struct {
	IS      float64 // saturation current [A]
	N       float64 // ideality; for stacked junctions their number times each one's
	RS      float64 // series resistance [Ω]
	CJ0     float64 // junction capacitance at zero bias [F]
	VJ      float64 // its built-in voltage [V]; zero: the capacitance is constant
	M       float64 // its grading exponent
	Transit float64 // stored charge per forward current [s]
	Leakage float64 // reverse conductance [S]
	VT      float64 // thermal voltage kT/q [V]; zero: that of 25 °C
}

// Load draws from the output; the parts add up.
type Load struct {
	Current    float64     // constant while the output is above a small part of the source peak [A]
	Resistance float64     // [Ω]; zero: none
	Power      float64     // constant power [W]; zero: none
	Table      []LoadPoint // current against voltage, rising voltage; linear between
}

// LoadPoint is a load current [A] at an output voltage [V].
type LoadPoint struct{ V, A float64 }

// Filter is an R-C section between ladder and load.
type Filter struct{ R, C float64 }
