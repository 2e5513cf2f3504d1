package main

import (
	"bytes"
	"encoding/csv"
	"fmt"

	"rungwright/optimize/ladder"
)

// wavesCSV is one period as CSV (RFC 4180): a line per instant at which the
// integrator stepped, in SI units.
func wavesCSV(a ladder.Steady) []byte {
	w := a.Waves
	heads, columns := []string{"time_s", "output_v"}, [][]float64{w.Time, w.Output}
	for i, c := range w.Source {
		heads, columns = append(heads, fmt.Sprintf("source%d_a", i+1)), append(columns, c)
	}
	for i, c := range w.Capacitor {
		heads, columns = append(heads, a.Capacitors[i].Ref+"_v"), append(columns, c)
	}
	for i, c := range w.Diode {
		heads, columns = append(heads, a.Diodes[i].Ref+"_a"), append(columns, c)
	}
	var b bytes.Buffer
	out := csv.NewWriter(&b) // writing to memory cannot fail
	out.UseCRLF = true
	out.Write(heads)
	row := make([]string, len(columns))
	for i := range w.Time {
		for k, c := range columns {
			row[k] = plainNumber(c[i])
		}
		out.Write(row)
	}
	out.Flush()
	return b.Bytes()
}
