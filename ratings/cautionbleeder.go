package ratings

import (
	"fmt"
	"math"
)

func noBleeder(h Hazard) (Caution, bool) {
	return Caution{
		Title:  "no bleeder: it stays charged for hours",
		Text:   fmt.Sprintf("Nothing but leakage discharges %s when the load is off. Fit a bleeder that brings it below %s within %s.", volts(h.OutputV), volts(TouchLimitV), seconds(InsideWithinS)),
		Source: fromTouch,
	}, h.OutputV > TouchLimitV && !h.HasBleeder
}

// dischargeTime tells the time even where it is short enough.
func dischargeTime(h Hazard) (Caution, bool) {
	c := Caution{Title: fmt.Sprintf("wait %s after switch-off", seconds(h.DischargeS)), Source: fromTouch}
	c.Text = fmt.Sprintf("With the bleeder whole, the output takes %s to fall below %s. ", seconds(h.DischargeS), volts(TouchLimitV))
	switch {
	case math.IsInf(h.DischargeS, 0) || math.IsNaN(h.DischargeS):
		c.Title = "the bleeder does not discharge the output"
		c.Text = fmt.Sprintf("With the bleeder, the output does not fall below %s by itself. Mend the bleeder.", volts(TouchLimitV))
	case h.DischargeS > InsideWithinS:
		c.Text += fmt.Sprintf("That is more than the %s for parts behind a cover: put a warning with the time on the cover, or lower the bleeder's resistance.", seconds(InsideWithinS))
	case h.DischargeS > PinsWithinS:
		c.Text += fmt.Sprintf("That is more than the %s for pins and terminals that can be reached at once.", seconds(PinsWithinS))
	default:
		c.Text += fmt.Sprintf("That is within the %s for pins and terminals.", seconds(PinsWithinS))
	}
	return c, h.OutputV > TouchLimitV && h.HasBleeder
}

// bleederFault is the single fault: resistors fail open.
func bleederFault(h Hazard) (Caution, bool) {
	c := Caution{
		Title:  "one open bleeder resistor, and it stays charged",
		Text:   "Resistors fail open, and there is one string. Fit two independent bleeders, each of which meets the time alone, and a warning that the output may be charged.",
		Source: fromTrade,
	}
	if n := h.BleederStrings; n > 1 {
		c.Title = "one open bleeder resistor, and it takes longer"
		c.Text = fmt.Sprintf("Resistors fail open. With one of the %d strings open, the output takes %s to fall below %s.",
			n, seconds(h.DischargeS*float64(n)/float64(n-1)), volts(TouchLimitV))
	}
	return c, h.OutputV > TouchLimitV && h.HasBleeder
}

func bleederSharing(h Hazard) (Caution, bool) {
	return Caution{
		Title:  fmt.Sprintf("the bleeder's %d resistors share %s", h.BleederParts, volts(h.OutputV)),
		Text:   fmt.Sprintf("Each sees %s, and the tolerance more: take resistors of one value, make and batch, each rated for its working voltage, with spacing along the string for the whole.", volts(h.OutputV/float64(h.BleederParts))),
		Source: fromTrade,
	}, h.OutputV > TouchLimitV && h.HasBleeder && h.BleederParts > 1
}
