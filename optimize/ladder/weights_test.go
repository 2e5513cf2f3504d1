package ladder

import "testing"

// TestWeights: the sums over equal capacitors are the closed forms
// 2n³/3+n²/2+n/3 and n(n+1)/2 of the half-wave cascade, n³/6+n²/4+n/3 and n/2
// of the full-wave one (charge balance, derived).
func TestWeights(t *testing.T) {
	sum := func(w []float64) (s float64) {
		for _, x := range w {
			s += x
		}
		return s
	}
	for k := 1; k <= 12; k++ {
		n := float64(k)
		half, full := HalfWave.Weights(k), FullWave.Weights(k)
		near(t, "half-wave drop", sum(half.Drop), 2*n*n*n/3+n*n/2+n/3, 1e-12)
		near(t, "half-wave ripple", sum(half.Ripple), n*(n+1)/2, 1e-12)
		near(t, "full-wave drop", sum(full.Drop), n*n*n/6+n*n/4+n/3, 1e-12)
		near(t, "full-wave ripple", sum(full.Ripple), n/2, 1e-12)
		if !half.Sum || !full.Sum {
			t.Error("the ripples of a column must add up")
		}
		if half.Levels[0] != 1 || full.Levels[1] != 1 || k > 1 && (half.Levels[2] != 2 || full.Levels[5] != 2) {
			t.Errorf("levels %v, %v", half.Levels, full.Levels)
		}
	}
	if BridgeDoubler.Weights(1).Sum {
		t.Error("the two ripples of a bridge doubler alternate")
	}
}
