package ratings

import (
	"fmt"
	"math"

	"rungwright/catalog/quantity"
)

const (
	fromTouch   = "IEC 61010-1 (3rd ed.) cl. 6.3; from memory"
	fromCharged = "IEC 62368-1, table of charged capacitors; from memory"
	fromEnergy  = "US DOE electrical safety handbook and NFPA 70E practice; from memory"
	fromTrade   = "common practice, no source"
)

func volts(v float64) string   { return quantity.Volts(v).String() }
func joules(j float64) string  { return quantity.Joules(j).String() }
func seconds(s float64) string { return quantity.Format(s, quantity.Time, 3) }

func lethalEnergy(h Hazard) (Caution, bool) {
	return Caution{
		Title: fmt.Sprintf("%s are stored: enough to kill", joules(h.StoredJ)),
		Text: fmt.Sprintf("The capacitors hold %s at %s. From %s on, treat the energy as able to kill. Keep people away by an enclosure with an interlock that discharges, and never work on it alone.",
			joules(h.StoredJ), volts(h.OutputV), joules(LethalJ)),
		Source: fromEnergy,
	}, h.StoredJ >= LethalJ && h.OutputV >= BurnV
}

func burn(h Hazard) (Caution, bool) {
	text := fmt.Sprintf("The capacitors hold %s at %s. Below %s such energy burns rather than shocks: rings, tools and loose wire across the output become hot at once.", joules(h.StoredJ), volts(h.OutputV), volts(BurnV))
	if h.StoredJ > BurnMostJ {
		text += fmt.Sprintf(" Above %s the arc alone can injure: shield the terminals and wear eye protection.", joules(BurnMostJ))
	}
	return Caution{
		Title:  fmt.Sprintf("%s are stored: enough to burn", joules(h.StoredJ)),
		Text:   text,
		Source: fromEnergy,
	}, h.StoredJ >= LethalJ && h.OutputV < BurnV
}

func startle(h Hazard) (Caution, bool) {
	return Caution{
		Title: fmt.Sprintf("%s at %s startle", joules(h.StoredJ), volts(h.OutputV)),
		Text: fmt.Sprintf("From %s above %s a discharge makes people jump: falls and hands in machinery hurt more than the shock itself.",
			joules(StartleJ), volts(StartleV)),
		Source: fromEnergy,
	}, h.StoredJ >= StartleJ && h.StoredJ < LethalJ && h.OutputV > StartleV
}

func liveOutput(h Hazard) (Caution, bool) {
	top := h.highest()
	return Caution{
		Title: fmt.Sprintf("%s: do not touch", volts(top.V)),
		Text: fmt.Sprintf("%s reaches %s without load at high line. Direct voltage above %s is hazardous live. Enclose every part of it, and mark the enclosure.",
			top.place(), volts(top.V), volts(TouchLimitV)),
		Source: fromTouch,
	}, h.live()
}

func storedCharge(h Hazard) (Caution, bool) {
	charge := h.OutputC * h.OutputV
	c := Caution{Source: fromTouch}
	if h.OutputV > TouchChargeV {
		c.Title = fmt.Sprintf("%s are stored, above the %s that may be touched", joules(h.StoredJ), joules(TouchEnergyJ))
		c.Text = fmt.Sprintf("Above %s the stored energy counts. The output stays hazardous after switch-off until it has discharged.", volts(TouchChargeV))
		return c, h.StoredJ > TouchEnergyJ
	}
	c.Title = fmt.Sprintf("%v are stored, above the %v that may be touched", quantity.Coulombs(charge), quantity.Coulombs(TouchChargeC))
	c.Text = fmt.Sprintf("The output holds %v at %s. It stays hazardous after switch-off until it has discharged.", quantity.Farads(h.OutputC), volts(h.OutputV))
	return c, charge > TouchChargeC && h.OutputV > TouchLimitV
}

func chargedCapacitor(h Hazard) (Caution, bool) {
	es1, es2 := ChargedCapacitorLimits(h.OutputC)
	c := Caution{Source: fromCharged}
	if h.OutputV > es2 {
		c.Title = "the output capacitance is of energy class ES3: it can injure"
		c.Text = fmt.Sprintf("%v may be charged to %s for class ES2; it reaches %s. Keep it out of everyone's reach.", quantity.Farads(h.OutputC), volts(es2), volts(h.OutputV))
	} else {
		c.Title = "the output capacitance is of energy class ES2: it hurts"
		c.Text = fmt.Sprintf("%v may be charged to %s for class ES1, which anyone may touch; it reaches %s. Keep it out of ordinary persons' reach.", quantity.Farads(h.OutputC), volts(es1), volts(h.OutputV))
	}
	return c, h.OutputC > 0 && h.OutputV > es1
}

func workInside(h Hazard) (Caution, bool) {
	wait := "Wait until a meter that is rated for it reads nothing"
	if h.HasBleeder && !math.IsInf(h.DischargeS, 0) && h.DischargeS > 0 {
		wait = fmt.Sprintf("Wait at least %s, then measure with a meter that is rated for it", seconds(h.DischargeS))
	}
	return Caution{
		Title:  "before any work inside: discharge, and short",
		Text:   "Switch off and unplug. " + wait + ". Then, one hand behind your back, touch the output through a discharge resistor on an insulated stick, its lead clamped to earth first; after that short every capacitor with the bare stick, and leave the output shorted while you work. Capacitors recover some charge by themselves. Only persons trained for it work inside.",
		Source: fromTrade,
	}, h.live()
}

func outputShort(h Hazard) (Caution, bool) {
	return Caution{
		Title: fmt.Sprintf("a short or flash-over lets %s go", joules(h.StoredJ)),
		Text: fmt.Sprintf("The smoothing column's share of %s then goes through the load and the top diodes. A series resistor at the output limits the current; it must stand %s and the pulse.",
			joules(h.StoredJ), volts(h.OutputV)),
		Source: fromTrade,
	}, h.OutputV > TouchLimitV
}
