package ladder

// Steady is the periodic steady state of a circuit. Output values are
// negative for a negative circuit (MeanV, MinV, MaxV); stresses are
// magnitudes.
type Steady struct {
	MeanV, MinV, MaxV float64
	RippleV           float64 // peak to peak
	LoadA, LoadW      float64 // mean current and power in the load
	InputW, LossW     float64 // from the ideal source; in everything but the load
	Capacitors        []CapacitorState
	Diodes            []DiodeState
	Source            []SourceState // one per winding end
	ResidualV         float64       // how far the period fails to close [V]
	Periods           int           // how many were integrated
	Note              string        // what is particular about the answer, such as a diode that never conducts
	Waves             *Waves        // when asked for

	start []float64 // the state at the start of the period, in the system's numbering
}

// CapacitorState is one capacitor over the period.
type CapacitorState struct {
	Ref        string
	MeanV      float64
	MaxV, MinV float64 // of the voltage across it
	RMSA       float64
	LossW      float64
}

// DiodeState is one diode over the period.
type DiodeState struct {
	Ref      string
	InverseV float64 // greatest reverse voltage
	AverageA float64 // mean forward current
	PeakA    float64
	RMSA     float64
	LossW    float64
}

// SourceState is one winding end over the period.
type SourceState struct {
	RMSA, PeakA float64
	PowerW      float64 // real power delivered
	ApparentVA  float64 // RMS volts times RMS amperes
	LossW       float64 // in its resistance
}

// Waves is one period sampled where the integrator stepped.
type Waves struct {
	Time      []float64   // [s]
	Output    []float64   // [V]
	Source    [][]float64 // current of each winding end [A]
	Capacitor [][]float64 // voltage of each capacitor [V]
	Diode     [][]float64 // current of each diode [A]
}
