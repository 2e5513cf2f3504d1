package main

import (
	"bytes"
	"context"
	"encoding/json"
	"os"
	"path/filepath"
	"testing"

	"rungwright/catalog"
	"rungwright/optimize"
)

const benchRail = "../../testdata/supplies/bench-rail-24v.yaml"

// TestPickJSONAndFiles: what is printed is a design that passes, and the
// design file reads back as the same.
func TestPickJSONAndFiles(t *testing.T) {
	dir := t.TempDir()
	p := pretendPipe()
	if status := run([]string{"pick", benchRail, "--out", dir, "--format", "json"}, &p.streams); status != exitDone {
		t.Fatalf("status %d: %s", status, p.errText.String())
	}
	var got struct {
		Found       bool
		Topology    string
		Stages      int
		UnitCost    string `json:"unit_cost"`
		Lines       []struct{ Part string }
		Targets     []struct{ Met bool }
		Stresses    []struct{ Over bool }
		Cautions    []struct{ Text string }
		Certificate struct{ Proved bool }
	}
	if err := json.Unmarshal([]byte(p.printed()), &got); err != nil {
		t.Fatal(err)
	}
	if !got.Found || !got.Certificate.Proved || len(got.Lines) == 0 || len(got.Cautions) == 0 || len(got.Stresses) == 0 || len(got.Targets) == 0 {
		t.Fatalf("printed %s", p.printed())
	}
	for i, x := range got.Targets {
		if !x.Met {
			t.Errorf("target %d is not met", i)
		}
	}
	for i, x := range got.Stresses {
		if x.Over {
			t.Errorf("stress %d is over its limit", i)
		}
	}
	data, err := os.ReadFile(filepath.Join(dir, designName))
	if err != nil {
		t.Fatal(err)
	}
	d, err := optimize.ReadDesign(designName, data, catalog.Demo())
	if err != nil {
		t.Fatal(err)
	}
	if string(d.Topology) != got.Topology || d.Stages != got.Stages || len(d.Lines) != len(got.Lines) || d.UnitCost.String() != got.UnitCost {
		t.Errorf("read back %s, %d stages, %d lines, %s; printed %s, %d, %d, %s",
			d.Topology, d.Stages, len(d.Lines), d.UnitCost, got.Topology, got.Stages, len(got.Lines), got.UnitCost)
	}
	if book, err := os.ReadFile(filepath.Join(dir, workbookName)); err != nil || !bytes.HasPrefix(book, []byte("PK\x03\x04")) {
		t.Errorf("the workbook is no zip file: %v", err)
	}
}

// TestStoppedBeforeAnything: a search that is stopped at once says so, with
// status 1, and writes nothing.
func TestStoppedBeforeAnything(t *testing.T) {
	ctx, stop := context.WithCancel(context.Background())
	stop()
	dir := t.TempDir()
	p := pretendTerminal(80)
	err := pick(ctx, &p.streams, &pickOptions{supply: benchRail, out: dir, format: formatText})
	if status := exitStatus(err, true); status != exitUnexpected {
		t.Errorf("status %d (%v), want %d", status, err, exitUnexpected)
	}
	if files, _ := os.ReadDir(dir); len(files) > 0 {
		t.Errorf("wrote %v", files)
	}
}
