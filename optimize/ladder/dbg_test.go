package ladder

import (
	"context"
	"math/rand/v2"
	"os"
	"strconv"
	"testing"
)

func TestDbg(t *testing.T) {
	i, _ := strconv.Atoi(os.Getenv("CASE"))
	r := rand.New(rand.NewPCG(1, uint64(i)))
	c := wild(r)
	sh := newShooter(c, &Settings{})
	e := newEstimator(c)
	t.Logf("est %+v period %g unit C %g", e.solve(), sh.s.period, c.Capacitors[0].C)
	for k, n := range sh.s.names {
		t.Logf("x %s %.5g", n, sh.x[k])
	}
	for j := range 6 {
		err := sh.run(context.Background(), false, j > 0, 1e-4)
		t.Logf("run err %v gap %.3g steps %d evals %d newton %g ready %v", err, sh.size(sh.gap), len(sh.r.mesh), sh.r.st.evaluations, sh.newton(), sh.ready)
		if err != nil {
			break
		}
		copy(sh.x, sh.r.st.start.x)
	}
}
