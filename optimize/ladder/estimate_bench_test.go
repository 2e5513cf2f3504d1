package ladder

import (
	"fmt"
	"testing"
)

// BenchmarkEstimate times the estimate and the bound, which a search asks for
// every combination.
func BenchmarkEstimate(b *testing.B) {
	for _, n := range []int{1, 5, 10} {
		c := equal(HalfWave, n, 22e-9, plainDiode, Source{Peak: 240, Frequency: 25e3, Resistance: 12}, Load{Current: 1.2e-3})
		b.Run(fmt.Sprintf("estimate/n=%d", n), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Estimate(c)
			}
		})
		b.Run(fmt.Sprintf("bound/n=%d", n), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Bound(c, 100)
			}
		})
	}
}
