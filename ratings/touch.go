package ratings

// Limits of what may be touched, IEC 61010-1 (3rd ed.) cl. 6.3: from memory.
const (
	TouchLimitV   = 60.0   // direct voltage that is not hazardous live [V]
	TouchChargeC  = 45e-6  // stored charge, up to TouchChargeV [C]
	TouchChargeV  = 15e3   // peak or direct [V]
	TouchEnergyJ  = 350e-3 // stored energy above TouchChargeV [J]
	PinsWithinS   = 5.0    // plug pins below the limit after disconnection [s]
	InsideWithinS = 10.0   // inner capacitors, or a warning with the time [s]
)

// Energies that hurt, US DOE electrical safety handbook and NFPA 70E
// practice: from memory.
const (
	LethalJ   = 10.0  // able to kill [J]
	StartleJ  = 0.25  // a startle above StartleV [J]
	StartleV  = 400.0 // [V]
	BurnV     = 100.0 // below it, a burn rather than a shock [V]
	BurnMostJ = 100.0 // up to this energy [J]
)

// chargedLimits are the peak voltages of a charged capacitor by its
// capacitance, IEC 62368-1, table of charged capacitors: from memory.
// Rising capacitance; ES2 is twice ES1 in every row.
var chargedLimits = []xy{ // nF: V of class ES1
	{4, 1000}, {8, 500}, {12, 350}, {18, 250}, {28, 200}, {41, 150}, {61, 125}, {91, 100}, {170, 75}, {300, 60},
}

// ChargedCapacitorLimits gives the peak voltages [V] up to which a charged
// capacitor [F] is of energy class ES1 (may be touched) and ES2 (hurts, does
// not injure), on lines between the rows of IEC 62368-1 (from memory).
func ChargedCapacitorLimits(farads float64) (es1, es2 float64) {
	nF := min(max(farads*1e9, chargedLimits[0].x), chargedLimits[len(chargedLimits)-1].x)
	es1, _ = interpolate(chargedLimits, nF)
	return es1, 2 * es1
}
