package ladder

import (
	"context"
	"testing"
)

// TestRegulation: the output falls as the load rises, and the knee lies where
// the power peaks, near half the no-load voltage of a nearly linear source.
func TestRegulation(t *testing.T) {
	c := equal(HalfWave, 3, 10e-9, plainDiode, Source{Peak: 200, Frequency: 20e3, Resistance: 20}, Load{})
	var loads []float64
	for k := range 13 {
		loads = append(loads, float64(k)*0.8e-3)
	}
	r, err := Regulate(context.Background(), c, loads, nil)
	if err != nil || len(r.Points) < 10 {
		t.Fatalf("%d points, ended %q, %v", len(r.Points), r.Ended, err)
	}
	for k := 1; k < len(r.Points); k++ {
		if r.Points[k].MeanV >= r.Points[k-1].MeanV {
			t.Errorf("output rises from %g V to %g V at %g A", r.Points[k-1].MeanV, r.Points[k].MeanV, r.Points[k].LoadA)
		}
	}
	if share := r.Points[r.Knee].MeanV / r.Points[0].MeanV; share < 0.35 || share > 0.65 {
		t.Errorf("knee at %.2f of the no-load voltage", share)
	}
}
