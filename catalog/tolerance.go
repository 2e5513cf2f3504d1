package catalog

import (
	"rungwright/catalog/form"
	"rungwright/catalog/quantity"
)

// smallCapacitance is where IEC 60062 (from memory) starts to mean picofarads
// by the tolerance letters B to G.
const smallCapacitance quantity.Farads = 10e-12

// letterFarads are those letters.
var letterFarads = map[string]quantity.Farads{"B": 0.1e-12, "C": 0.25e-12, "D": 0.5e-12, "F": 1e-12, "G": 2e-12}

// readTolerance reads the key tolerance as two proportions, low and high. On
// a capacitor it may be a capacitance too ("0.25 pF"); elsewhere nominal is
// zero.
func readTolerance(m *form.Map, nominal quantity.Farads) (low, high quantity.Ratio) {
	written := m.Text("tolerance")
	if written == "" {
		return 0, 0
	}
	t, err := quantity.ParseTolerance(written)
	if farads, ok := asFarads(written, nominal); ok {
		share := quantity.Ratio(farads / nominal)
		t, err = quantity.Tolerance{Low: share, High: share}, nil
	}
	switch {
	case err != nil:
		m.Problem("tolerance", "%v", err)
		return 0, 0
	case t.Low >= 1 || t.High > 1:
		m.Problem("tolerance", "%q cannot be: it is 100 %% or more; check the number", written)
		return 0, 0
	}
	return t.Low, t.High
}

func asFarads(written string, nominal quantity.Farads) (quantity.Farads, bool) {
	if nominal <= 0 {
		return 0, false
	}
	if f, ok := letterFarads[written]; ok && nominal < smallCapacitance {
		return f, true
	}
	f, err := quantity.Read[quantity.Farads](written)
	return f, err == nil && f > 0
}
