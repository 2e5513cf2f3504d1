package ladder

import (
	"context"
	"math/rand/v2"
	"sort"
	"testing"
	"time"
)

func TestSlow(t *testing.T) {
	type row struct {
		d time.Duration
		s string
	}
	for i := range 150 {
		r := rand.New(rand.NewPCG(3, uint64(i)))
		c := broad(r)
		t0 := time.Now()
		s, err := Solve(context.Background(), c, &Settings{Tolerance: 1e-5})
		d := time.Since(t0)
		if d > 60*time.Millisecond || err != nil {
			t.Logf("%d %v periods %d bias %d L %.2g tau %.2g %s %s %d ideal %.4g mean %.4g: %v", i, d, s.Periods, len(c.Capacitors[0].Bias), c.Source.Leakage, c.Diodes[0].Transit, c.Source.Waveform, c.Topology, c.Stages, c.Source.Peak*float64(c.Topology.OutputFactor(c.Stages)), s.MeanV, err)
		}
	}
	sort.Strings(nil)
}
