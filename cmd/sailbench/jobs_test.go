package main

import (
	"bytes"
	"context"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"sailby/plan/random"
)

// TestRandomJobs: a few small jobs are asked, checked and reported by class, with the same columns as instances.
func TestRandomJobs(t *testing.T) {
	rows := filepath.Join(t.TempDir(), "rows.csv")
	var out, talk bytes.Buffer
	if err := run(context.Background(), []string{"-jobs", "8", "-size", "6", "-limit", "30s", "-csv", rows, "-v"}, &out, &talk); err != nil {
		t.Fatal(err, out.String())
	}
	for _, want := range []string{"slack     2 jobs:", "over      2 jobs:", "all       8 jobs:"} {
		if !strings.Contains(out.String(), want) {
			t.Errorf("no %q in\n%s", want, out.String())
		}
	}
	data, err := os.ReadFile(rows)
	if err != nil {
		t.Fatal(err)
	}
	lines := strings.Split(strings.TrimSpace(string(data)), "\n")
	if len(lines) != 9 || lines[0] != strings.Join(columns, ",") {
		t.Fatalf("rows %q", lines)
	}
	for _, l := range lines[1:] {
		f := strings.Split(l, ",")
		if planned := f[2] == "optimal" || f[2] == "feasible"; planned != (f[9] == "true") {
			t.Errorf("row %q: every plan is checked, and nothing else", l)
		}
	}
}

func TestKnobsOfJobs(t *testing.T) {
	k, err := randomJobs{count: 3, size: 20, seed: 5, class: "tight"}.knobs()
	if err != nil || len(k) != 3 || k[2] != (random.Knobs{Size: 20, Seed: 7, Class: random.Tight}) {
		t.Errorf("%+v, %v", k, err)
	}
	for _, args := range [][]string{{"-jobs", "1", "-size", "1"}, {"-jobs", "1", "-size", "9999"}, {"-jobs", "1", "-class", "loose"}, {"-jobs", "1", "-limit", "0s"}, {"-jobs", "1", "file.sm"}, {"-jobs", "-1"}} {
		var out bytes.Buffer
		if err := run(context.Background(), args, &out, &out); err == nil {
			t.Errorf("%q: no error", args)
		}
	}
}

// TestWrongJobs: an answer that its checker refuses is counted as wrong and makes the command fail.
func TestWrongJobs(t *testing.T) {
	var out bytes.Buffer
	rows := []*jobRow{{row: row{name: "a", wrong: "it is"}, class: "snug"}, {row: row{name: "b"}, class: "snug"}}
	if err := reportJobs(rows, settings{}, &out); err == nil || !strings.Contains(out.String(), "WRONG a: it is") {
		t.Errorf("%v, %q", err, out.String())
	}
}
