package main

import (
	"cmp"
	"strings"

	"rungwright/catalog/quantity"
)

// baseUnits are the units of plain values where the unit in print differs.
var baseUnits = map[quantity.Dimension]string{
	quantity.Proportion: "1", quantity.Volume: "m³", quantity.Area: "m²", quantity.SlewRate: "V/s",
}

// baseUnit is the unit of a value as a pipe and JSON show it.
func baseUnit(d quantity.Dimension) string { return cmp.Or(baseUnits[d], d.Unit()) }

// engineering prints a value for the eye whose base unit is known by name.
func engineering(v float64, unit string) string {
	for d := quantity.None + 1; d <= quantity.SlewRate; d++ {
		if baseUnit(d) == unit {
			return quantity.Format(v, d, 4)
		}
	}
	return strings.TrimSpace(quantity.Format(v, quantity.None, 4) + " " + unit)
}
