package ladder

import (
	"context"
	"math"
	"testing"
)

func TestAcc(t *testing.T) {
	for _, top := range []Topology{HalfWave, FullWave} {
		for _, n := range []int{1, 3, 6} {
			c := equal(top, n, 22e-9, plainDiode, Source{Peak: 240, Frequency: 25e3, Resistance: 12}, Load{Current: 1.2e-3})
			ref, err := Solve(context.Background(), c, &Settings{Tolerance: 1e-9})
			if err != nil {
				t.Fatal(err)
			}
			for _, tol := range []float64{1e-4, 1e-5, 1e-6, 1e-7} {
				s, _ := Solve(context.Background(), c, &Settings{Tolerance: tol})
				var rms, peak, inv, crms, avg float64
				for i := range s.Diodes {
					rms = math.Max(rms, math.Abs(s.Diodes[i].RMSA/ref.Diodes[i].RMSA-1))
					peak = math.Max(peak, math.Abs(s.Diodes[i].PeakA/ref.Diodes[i].PeakA-1))
					inv = math.Max(inv, math.Abs(s.Diodes[i].InverseV/ref.Diodes[i].InverseV-1))
					avg = math.Max(avg, math.Abs(s.Diodes[i].AverageA/ref.Diodes[i].AverageA-1))
				}
				for i := range s.Capacitors {
					crms = math.Max(crms, math.Abs(s.Capacitors[i].RMSA/ref.Capacitors[i].RMSA-1))
				}
				t.Logf("%s %d tol %.0e: mean %.1e ripple %.1e inv %.1e avg %.1e peak %.1e rms %.1e crms %.1e src %.1e | drms %.3g dpeak %.3g steps", top, n, tol, s.MeanV/ref.MeanV-1, s.RippleV/ref.RippleV-1, inv, avg, peak, rms, crms, s.Source[0].RMSA/ref.Source[0].RMSA-1, ref.Diodes[0].RMSA, ref.Diodes[0].PeakA)
			}
		}
	}
}
