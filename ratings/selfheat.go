package ratings

import (
	"math"

	"rungwright/catalog"
)

// stillAir is the heat that a small body gives off in still air by convection
// and radiation [W/(m²K)]: common practice, no source.
const stillAir = 10

// assumedCoreRise is the inner rise at rated ripple of an electrolytic whose
// sheet is silent [K]: common practice, no source.
const assumedCoreRise = 5

// selfHeating is how far a capacitor's inside stands above the ambient [K]:
// by the maker's rise at rated ripple where there is one, else by its losses
// and its surface.
func selfHeating(p *catalog.Part, u *Use) (float64, notes) {
	c := p.Capacitor
	if u.RippleA == 0 {
		return 0, 0
	}
	if c.Ripple.Current > 0 && (c.Ripple.CoreRise > 0 || polarised(c)) {
		rise, why := ratedRise(c)
		share, shared := rippleShare(c, u)
		return rise * share * share, why | shared
	}
	watts, ok := rippleLoss(c, u)
	if !ok {
		return 0, noHeatFigure
	}
	surface := surfaceOf(p.Size)
	if surface == 0 {
		return 0, noOutline
	}
	return watts / (stillAir * surface), lossHeating
}

// ratedRise is the inner rise at the rated ripple current [K].
func ratedRise(c *catalog.Capacitor) (float64, notes) {
	if c.Ripple.CoreRise > 0 {
		return float64(c.Ripple.CoreRise), 0
	}
	return assumedCoreRise, coreRiseAssumed
}

// rippleLoss is I²·ESR [W], the ESR being the greater of the sheet's and
// tanδ/(2πfC) at the capacitance left under bias; false when the sheet gives
// neither.
func rippleLoss(c *catalog.Capacitor, u *Use) (float64, bool) {
	ohms := float64(c.ESR)
	if c.LossFactor > 0 && u.Frequency > 0 {
		ohms = max(ohms, float64(c.LossFactor)/(2*math.Pi*float64(u.Frequency)*float64(c.CapacitanceAt(u.PeakV))))
	}
	return float64(u.RippleA) * float64(u.RippleA) * ohms, ohms > 0
}

// surfaceOf is the surface of the outline taken as a box [m²]; zero when a
// side is not known.
func surfaceOf(s catalog.Size) float64 {
	l, w, h := float64(s.Length), float64(s.Width), float64(s.Height)
	if l == 0 || w == 0 || h == 0 {
		return 0
	}
	return 2 * (l*w + w*h + h*l)
}
