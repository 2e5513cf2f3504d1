// Package demo holds the demo catalog and the demo supply. Makers, part
// numbers, suppliers and prices in them are invented.
package demo

import "embed"

// Files are the catalog's files, and the supply's, which is no catalog.
//
//go:embed *.yaml
var Files embed.FS

// SupplyName is the name of the demo supply within Files.
const SupplyName = "supply.yaml"

// Supply is the demo supply.
//
//go:embed supply.yaml
var Supply []byte
