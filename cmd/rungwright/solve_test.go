package main

import (
	"encoding/json"
	"fmt"
	"math"
	"strings"
	"testing"

	"rungwright/ratings"
)

const threeStage = "../../testdata/circuits/three-stage.yaml"

func TestSolveOnATerminal(t *testing.T) {
	for _, width := range []int{80, 200} {
		p := pretendTerminal(width)
		if status := run([]string{"solve", threeStage}, &p.streams); status != exitDone {
			t.Fatalf("status %d: %s", status, p.errText.String())
		}
		got := p.printed()
		mustFit(t, got, width)
		for _, want := range []string{"half-wave, 3 stages, 240 V peak at 25 kHz", " kV mean", "C6", "D6", "end 1", "loss"} {
			if !strings.Contains(got, want) {
				t.Errorf("at %d columns %q is missing:\n%s", width, want, got)
			}
		}
		if strings.Contains(got, "\t") {
			t.Errorf("tabs on a terminal:\n%s", got)
		}
	}
}

// TestCautionsInFull: a screen has the gravest in full and counts the others,
// and has every text when asked.
func TestCautionsInFull(t *testing.T) {
	short, full := pretendTerminal(80), pretendTerminal(80)
	run([]string{"solve", threeStage}, &short.streams)
	run([]string{"solve", threeStage, "--cautions"}, &full.streams)
	brief, long := strings.Join(strings.Fields(short.printed()), " "), strings.Join(strings.Fields(full.printed()), " ")
	if !strings.HasPrefix(brief, "CAUTION ") || strings.Count(brief, "CAUTION") != 1 {
		t.Errorf("want one caution in full, first:\n%s", short.printed())
	}
	cautions := ratings.Cautions(ratings.Hazard{OutputV: 1430, SourcePeakV: 240, DischargeS: math.Inf(1)})
	last := cautions[len(cautions)-1]
	if len(cautions) < 3 || strings.Contains(brief, last.Text) || !strings.Contains(long, last.Text) {
		t.Errorf("the last of %d cautions, %q, is not shown as asked:\n%s\n%s", len(cautions), last.Title, brief, long)
	}
	all := strings.Count(long, "CAUTION")
	if want := fmt.Sprintf("; and %d more. All in full: --cautions.", all-1-mostTitles); !strings.Contains(brief, want) {
		t.Errorf("%q is missing:\n%s", want, short.printed())
	}
}

// contract is the part of the JSON that other programs rely on.
type contract struct {
	Output     map[string]any   `json:"output"`
	Capacitors []map[string]any `json:"capacitors"`
	Diodes     []map[string]any `json:"diodes"`
	Source     []map[string]any `json:"source"`
	ResidualV  *float64         `json:"residual_v"`
}

func TestSolveJSONContract(t *testing.T) {
	p := pretendPipe()
	if status := run([]string{"solve", threeStage, "--format", "json"}, &p.streams); status != exitDone {
		t.Fatalf("status %d: %s", status, p.errText.String())
	}
	var got contract
	if err := json.Unmarshal([]byte(p.printed()), &got); err != nil {
		t.Fatal(err)
	}
	numbers(t, "output", got.Output, "mean_v", "ripple_v")
	if got.ResidualV == nil || math.Abs(*got.ResidualV) > 0.01 {
		t.Errorf("residual_v is %v, want less than 10 mV", got.ResidualV)
	}
	if len(got.Capacitors) != 6 || len(got.Diodes) != 6 || len(got.Source) != 1 {
		t.Fatalf("%d capacitors, %d diodes, %d winding ends; want 6, 6, 1", len(got.Capacitors), len(got.Diodes), len(got.Source))
	}
	for i := range 6 {
		numbers(t, "capacitors", got.Capacitors[i], "mean_v", "max_v", "rms_a")
		numbers(t, "diodes", got.Diodes[i], "inverse_v", "average_a", "peak_a", "rms_a")
	}
	if got.Capacitors[5]["ref"] != "C6" || got.Diodes[5]["ref"] != "D6" {
		t.Errorf("the last are %v and %v, want C6 and D6", got.Capacitors[5]["ref"], got.Diodes[5]["ref"])
	}
	numbers(t, "source", got.Source[0], "rms_a")
}

// numbers demands positive numbers under the keys.
func numbers(t *testing.T, what string, m map[string]any, keys ...string) {
	t.Helper()
	for _, k := range keys {
		if v, ok := m[k].(float64); !ok || v <= 0 {
			t.Errorf("%s.%s is %v, want a positive number", what, k, m[k])
		}
	}
}

// TestSolveTwice: the same circuit prints the same bytes.
func TestSolveTwice(t *testing.T) {
	var outputs []string
	for range 2 {
		p := pretendPipe()
		run([]string{"solve", threeStage, "--format", "json"}, &p.streams)
		outputs = append(outputs, p.printed())
	}
	if outputs[0] != outputs[1] || outputs[0] == "" {
		t.Errorf("two runs differ:\n%s\n%s", outputs[0], outputs[1])
	}
}
