package main

import (
	"encoding/json"
	"math"
)

// number prints like the plain numbers of a pipe; what is not finite is null.
type number float64

// MarshalJSON prints the number.
func (n number) MarshalJSON() ([]byte, error) {
	if math.IsNaN(float64(n)) || math.IsInf(float64(n), 0) {
		return []byte("null"), nil
	}
	return []byte(plainNumber(float64(n))), nil
}

// printJSON writes one indented document.
func printJSON(s *streams, document any) error {
	e := json.NewEncoder(s.out)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	return e.Encode(document)
}
