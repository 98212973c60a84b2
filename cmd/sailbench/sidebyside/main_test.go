package main

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"sailby/plan/instance"
)

// TestRead: what solvers print of a plan, a proof, a plan without proof, and nothing.
func TestRead(t *testing.T) {
	for text, want := range map[string]answer{
		"finish=9\n----------\nfinish=7\n----------\n==========\n": {status: "optimal", finish: 7},
		"finish=9\n----------\n":                                   {status: "feasible", finish: 9},
		"=====UNSATISFIABLE=====\n":                                {status: "infeasible"},
		"=====UNKNOWN=====\n":                                      {status: "unknown"},
		`{"output":{"default":"finish=4\ns=[1]\n"}}` + "\n" + `{"status":"OPTIMAL_SOLUTION"}`: {status: "optimal", finish: 4},
	} {
		if got := read(text, answer{status: "unknown"}); got != want {
			t.Errorf("%q: %+v, want %+v", text, got, want)
		}
	}
}

// TestData: an instance as the model reads it.
func TestData(t *testing.T) {
	in, err := instance.Parse("x", ".rcp", "3 1 1 0 0 1 2 2 1 1 3 0 0 0")
	if err != nil {
		t.Fatal(err)
	}
	want := "n = 3;\nm = 1;\nH = 2;\nL = 2;\nlength = [0,2,0];\ncapacity = [1];\ndemand = [|0,1,0,|];\nfrom = [1,2];\nto = [2,3];\nlag = [0,2];\n"
	if got := dataOf(in); got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
}

// TestSummary: an instance that is not proved counts with the limit; answers that contradict each other are an error.
func TestSummary(t *testing.T) {
	solvers := []solver{{name: "ours"}, {name: "other"}}
	all := [][]answer{
		{{status: "optimal", finish: 5, wall: 1, cpu: 1}, {status: "infeasible", wall: 2, cpu: 1}, {status: "optimal", finish: 8, wall: 3, cpu: 1}},
		{{status: "optimal", finish: 5, wall: 2, cpu: 2}, {status: "unknown", wall: 9}, {status: "feasible", finish: 9, wall: 9}},
	}
	var out bytes.Buffer
	summary(&out, solvers, all, 10)
	if !strings.Contains(out.String(), "other     proved 1 of 3; median time to proof 10.00 s, of the processor 10.00 s; ours to it: 3.00 on proofs, 0.20 on time, 0.10 on processor time") {
		t.Errorf("summary\n%s", out.String())
	}
	if err := disagreements(solvers, all); err != nil {
		t.Error(err)
	}
	all[1][2].finish = 7
	if err := disagreements(solvers, all); err == nil {
		t.Error("a plan of 7 where 8 is proved is no contradiction")
	}
}

// TestGather: one in so many of each folder, and no folder without instances.
func TestGather(t *testing.T) {
	dir := t.TempDir()
	for _, f := range []string{"a.sm", "b.sm", "c.sm", "note.txt"} {
		if err := os.WriteFile(filepath.Join(dir, f), nil, 0o666); err != nil {
			t.Fatal(err)
		}
	}
	got, err := gather([]string{dir}, flags{every: 2})
	if err != nil || len(got) != 2 || filepath.Base(got[1]) != "c.sm" {
		t.Errorf("%v, %v", got, err)
	}
	if _, err := gather([]string{t.TempDir()}, flags{every: 1}); err == nil {
		t.Error("an empty folder is no error")
	}
}
