package ratings

import "fmt"

const fromSpacing = "IEC 60664-1, clearance and creepage tables and table A.2; from memory"

const (
	coronaV = 5e3  // from about here, ozone and corona [V]: common practice, no source
	xRayV   = 10e3 // from about here, X-rays in vacuum [V]: common practice, no source
)

func xRays(h Hazard) (Caution, bool) {
	top := h.highest()
	return Caution{
		Title:  "X-rays where there is vacuum",
		Text:   fmt.Sprintf("%s on an electrode in vacuum can make X-rays; above about %s they leave glass and thin metal. Have the radiation measured by who is licensed to, before anyone stands near.", volts(top.V), volts(xRayV)),
		Source: fromTrade,
	}, top.V > xRayV
}

func corona(h Hazard) (Caution, bool) {
	top := h.highest()
	return Caution{
		Title:  "corona and ozone",
		Text:   fmt.Sprintf("Above about %s sharp points glow, make ozone and eat insulation; here are %s. Round off solder joints and wire ends, pot or coat the upper stages without voids, and air the room.", volts(coronaV), volts(top.V)),
		Source: fromTrade,
	}, top.V > coronaV
}

// spacing speaks for the highest node; Spacings has the others.
func spacing(h Hazard) (Caution, bool) {
	top := h.highest()
	s := spacingOf(h, top)
	text := fmt.Sprintf("%s at %s wants %.3g mm through air and %.3g mm over a surface to earth (basic insulation, pollution degree %d, material group IIIa, %.0f m); reinforced insulation wants twice the way over the surface.",
		top.place(), volts(top.V), s.ClearanceMM, s.CreepageMM, h.pollution(), h.AltitudeM)
	if !s.Within {
		text += " That is beyond the tables, whose last line is carried on: have it tested."
	}
	text += fmt.Sprintf(" Bare outer conductors on a board want %.3g mm by IPC-2221 table 6-1, coated ones %.3g mm; take the greater.",
		ConductorSpacing(top.V, bareBoard(h.AltitudeM)), ConductorSpacing(top.V, CoatedB4))
	return Caution{
		Title:  fmt.Sprintf("%.3g mm through air, %.3g mm over surfaces", s.ClearanceMM, s.CreepageMM),
		Text:   text,
		Source: fromSpacing + "; IPC-2221 table 6-1; from memory",
	}, h.live()
}

// bareBoard is the column of uncoated outer conductors at an altitude [m].
func bareBoard(altitudeM float64) ConductorPlace {
	const high = 3050
	if altitudeM > high {
		return UncoatedHighB3
	}
	return UncoatedB2
}

func notCertified(Hazard) (Caution, bool) {
	return Caution{
		Title:  "figures are calculated, not certified",
		Text:   "The figures come from a model and from standards recalled from memory. Local codes and licensed practice come first: have the build inspected by who is licensed to, and measure before you trust.",
		Source: fromTrade,
	}, true
}
