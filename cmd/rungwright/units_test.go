package main

import (
	"testing"

	"rungwright/catalog/quantity"
)

// TestBaseUnits: a value in its base unit, printed for the eye, reads back as
// the same value.
func TestBaseUnits(t *testing.T) {
	for d := quantity.None + 1; d <= quantity.SlewRate; d++ {
		const v = 0.0125
		back, err := quantity.Parse(engineering(v, baseUnit(d)), d)
		if err != nil || back < v*0.999999 || back > v*1.000001 {
			t.Errorf("%s: %g %s prints as %q, which reads as %g, %v", d.Name(), v, baseUnit(d), engineering(v, baseUnit(d)), back, err)
		}
	}
	if got := engineering(4.26, "EUR"); got != "4.26 EUR" {
		t.Errorf("money prints as %q", got)
	}
}
