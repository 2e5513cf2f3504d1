package catalog

import "rungwright/catalog/quantity"

// Read reads catalogs from files and folders (every *.yaml and *.yml in
// them); later ones add. All mistakes come back at once as form.Problems.
func Read(paths ...string) (*Catalog, error) { return nil, nil }

// Demo returns the embedded invented catalog.
func Demo() *Catalog { return nil }

// Find returns the part of that number, or nil. Spaces around and letter
// case do not matter.
func (c *Catalog) Find(number string) *Part { return nil }

// Title is a line that tells a buyer what the part is, made from its data:
// "10 nF ±10 % 3 kV X7R ceramic class 2".
func (p *Part) Title() string { return "" }

// CapacitanceAt is the capacitance at a DC bias, marked value times the bias
// curve (linear between points, flat outside).
func (c *Capacitor) CapacitanceAt(bias quantity.Volts) quantity.Farads { return c.Capacitance }
