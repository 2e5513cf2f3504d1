package main

import (
	"encoding/json"
	"math"
	"testing"
)

// TestRegulation: the output falls as the load rises, and the point at the
// circuit's own load current is the plain answer.
func TestRegulation(t *testing.T) {
	p := pretendPipe()
	if status := run([]string{"solve", threeStage, "--regulation", "--format", "json"}, &p.streams); status != exitDone {
		t.Fatalf("status %d: %s", status, p.errText.String())
	}
	var got struct {
		Output     map[string]float64
		Regulation []map[string]float64
	}
	if err := json.Unmarshal([]byte(p.printed()), &got); err != nil {
		t.Fatal(err)
	}
	if len(got.Regulation) != len(loadShares) {
		t.Fatalf("%d points, want %d", len(got.Regulation), len(loadShares))
	}
	for i, r := range got.Regulation {
		if i > 0 && r["output_v"] >= got.Regulation[i-1]["output_v"] {
			t.Errorf("at %g A the output rises to %g V", r["load_a"], r["output_v"])
		}
		if loadShares[i] == 1 && math.Abs(r["output_v"]/got.Output["mean_v"]-1) > 1e-4 {
			t.Errorf("at full load %g V; the plain answer is %g V", r["output_v"], got.Output["mean_v"])
		}
	}
	if got.Regulation[0]["load_a"] != 0 {
		t.Errorf("the first point draws %g A, want none", got.Regulation[0]["load_a"])
	}
}
