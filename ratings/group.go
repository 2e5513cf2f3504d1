package ratings

import (
	"math"

	"rungwright/catalog"
	"rungwright/catalog/quantity"
)

// Group is several equal pieces at one position: Parallel strings of Series
// pieces. Zero counts as one.
type Group struct {
	Series, Parallel int
	BalanceOhms      float64 // resistor across each piece; zero: none
}

// DiodeStringShare is how much of the sum of ratings a string of diodes may
// be counted for: common practice, no source.
const DiodeStringShare = 0.8

// Piece turns the use of a whole group into that of its worst piece, which
// Judge then judges.
//
//   - Capacitors in series: the smallest within tolerance sees the most. An
//     electrolytic string settles by leakage: without balancing resistors one
//     piece may see all of it; with them, it may leak nothing while the others
//     leak what the sheet allows.
//   - Capacitors in parallel: the largest carries the most ripple.
//   - Diodes in series count for 0.8 of their sum. Diodes in parallel do not
//     share: one carries all.
//   - Resistors share by tolerance both ways.
//
// A winding is always one.
func (g Group) Piece(part *catalog.Part, u Use) Use {
	n, m := max(1, g.Series), max(1, g.Parallel)
	switch part.Kind {
	case catalog.KindCapacitor:
		return g.capacitorPiece(part.Capacitor, u, n, m)
	case catalog.KindDiode:
		return diodePiece(u, n)
	case catalog.KindResistor:
		return resistorPiece(part.Resistor, u, n, m)
	}
	return u
}

func (g Group) capacitorPiece(c *catalog.Capacitor, u Use, n, m int) Use {
	low, high := 1-float64(c.ToleranceLow), 1+float64(c.ToleranceHigh)
	across := WorstShare(n, 1/low, 1/high)
	peak := across * float64(u.PeakV)
	if n > 1 && polarised(c) {
		settled := float64(u.PeakV)
		if g.BalanceOhms > 0 {
			settled = LeakageShare(n, math.Abs(float64(u.PeakV)), g.BalanceOhms, float64(c.Leakage))
		}
		peak = max(math.Abs(peak), min(math.Abs(settled), math.Abs(float64(u.PeakV))))
	}
	u.PeakV = quantity.Volts(peak)
	u.ACV *= quantity.Volts(across)
	u.SlewVps *= quantity.VoltPerSecond(across)
	u.RippleA *= quantity.Amps(WorstShare(m, high, low))
	return u
}

func diodePiece(u Use, n int) Use {
	if n > 1 {
		u.InverseV = quantity.Volts(float64(u.InverseV) / (DiodeStringShare * float64(n)))
		u.LossW /= quantity.Watts(n)
	}
	return u
}

func resistorPiece(r *catalog.Resistor, u Use, n, m int) Use {
	low, high := 1-float64(r.ToleranceLow), 1+float64(r.ToleranceHigh)
	along := WorstShare(n, high, low)     // of voltage and power in a string
	aside := WorstShare(m, 1/low, 1/high) // of current and power among strings
	u.WorkingV *= quantity.Volts(along)
	u.PowerW *= quantity.Watts(along * aside)
	u.PulseJ *= quantity.Joules(along * aside)
	return u
}

// WorstShare is the share of the whole that the worst of n pieces takes, its
// weight being the highest and the others' the lowest.
func WorstShare(n int, highest, lowest float64) float64 {
	if n <= 1 {
		return 1
	}
	return highest / (highest + float64(n-1)*lowest)
}

// SeriesVoltages shares a voltage [V] among capacitances [F] in series: each
// sees V·(1/C)/Σ(1/C).
func SeriesVoltages(volts float64, farads ...float64) []float64 {
	sum := 0.0
	for _, c := range farads {
		sum += 1 / c
	}
	shares := make([]float64, len(farads))
	for i, c := range farads {
		shares[i] = volts / c / sum
	}
	return shares
}

// LeakageShare is the voltage [V] of the one of n pieces in series that leaks
// nothing while each other leaks spread [A], each with a balancing resistor
// [Ω] across it: (V + (n−1)·R·spread)/n.
func LeakageShare(n int, volts, ohms, spread float64) float64 {
	return (volts + float64(n-1)*ohms*spread) / float64(n)
}

// BalancingResistor is the highest resistance [Ω] across each of n pieces in
// series that keeps the worst at its allowed voltage: R = (n·Vr − V)/((n−1)·ΔI),
// ΔI being the greatest difference in leakage [A]. Zero: none is low enough.
// Infinite: none is needed. The string current V/(n·R) should stand well above
// ΔI, and the resistors' own tolerance wants some room.
func BalancingResistor(n int, allowed, volts, spread float64) float64 {
	room := float64(n)*allowed - volts
	switch {
	case room <= 0:
		return 0
	case n <= 1 || spread <= 0:
		return math.Inf(1)
	}
	return room / (float64(n-1) * spread)
}

// SharingCapacitor is the least capacitance [F] across each of n diodes in
// series that keeps the first to recover at its allowed voltage while the
// others still hold the charge difference [C]: C = ΔQ/ΔV, where ΔV is the
// voltage the first may take from each other, (n·Vr − V)/(n−1). Infinite:
// none is large enough. Matched or controlled-avalanche diodes do without.
func SharingCapacitor(n int, allowed, volts, chargeSpread float64) float64 {
	room := float64(n)*allowed - volts
	switch {
	case room <= 0:
		return math.Inf(1)
	case n <= 1:
		return 0
	}
	return float64(n-1) * chargeSpread / room
}
