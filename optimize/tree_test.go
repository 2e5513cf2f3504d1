package optimize

import (
	"context"
	"os"
	"testing"
	"time"

	"rungwright/catalog"
	"rungwright/catalog/demo"
)

func TestTree(t *testing.T) {
	data := demo.Supply
	if f := os.Getenv("SUP"); f != "" {
		data, _ = os.ReadFile(f)
	}
	s, err := ReadSupply("demo", data)
	if err != nil {
		t.Fatal(err)
	}
	ctx, cancel := context.WithTimeout(context.Background(), 40*time.Second)
	defer cancel()
	t0 := time.Now()
	e, err := newEvaluator(s, catalog.Demo(), nil)
	if err != nil {
		t.Fatal(err)
	}
	w, err := newTreeWalk(ctx, e, 2)
	t.Log("frames", len(w.frames), time.Since(t0))
	err = w.run(ctx)
	t.Log(time.Since(t0), err, "simulated", w.simulated, "broken", w.broken, "restarts", w.restarts, "audited", w.audited, "left", w.q.Len())
	c := w.count()
	t.Log("all", c.all, "ratings", c.ratings, "repeated", c.repeated, "balance", c.balance, "est", c.estimate, "sim", c.simulated, "dearer", c.dearer)
	if w.best != nil {
		t.Log(w.best.n.least, w.best.t.plan.Summary())
	}
	if w.rejected != nil {
		t.Log("rejected", w.rejected.n.least, w.rejected.t.plan.Summary(), w.rejected.t.failed)
	}
	causes := map[string]int{}
	for _, o := range w.memo {
		if len(o.t.failed) > 0 {
			causes[cause(o.t.failed[0])]++
		}
	}
	t.Log(causes)
}
