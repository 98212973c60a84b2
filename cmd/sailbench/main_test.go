package main

import (
	"bytes"
	"context"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"sailby/plan/instance"
	"sailby/plan/learn"
)

// A folder with two instances of our own: one resource; in the first, three activities that take
// all of it one after the other for 2 each, so that none is shorter than 6; in the second two
// activities that must overlap and cannot.
func folderOf(t *testing.T) string {
	t.Helper()
	dir := t.TempDir()
	for name, text := range map[string]string{
		"three2.sch": "3 1 0 0\n0 1 3 1 2 3 [0] [0] [0]\n1 1 1 4 [2]\n2 1 1 4 [2]\n3 1 1 4 [2]\n4 1 0\n" +
			"0 1 0 0\n1 1 2 1\n2 1 2 1\n3 1 2 1\n4 1 0 0\n1\n",
		"never10.sch": "2 1 0 0\n0 1 2 1 2 [0] [0]\n1 1 2 3 2 [3] [0]\n2 1 2 3 1 [3] [-1]\n3 1 0\n" +
			"0 1 0 0\n1 1 3 1\n2 1 3 1\n3 1 0 0\n1\n",
		"best.csv": "instance,lower,upper\nthree2,6,6\nnever10,unsat,unsat\n",
	} {
		if err := os.WriteFile(filepath.Join(dir, name), []byte(text), 0o666); err != nil {
			t.Fatal(err)
		}
	}
	return dir
}

func TestRun(t *testing.T) {
	dir := folderOf(t)
	rows, proofs := filepath.Join(t.TempDir(), "rows.csv"), t.TempDir()
	var out, talk bytes.Buffer
	if err := run(context.Background(), []string{"-limit", "20s", "-workers", "2", "-csv", rows, "-v", "-proof", proofs, dir}, &out, &talk); err != nil {
		t.Fatal(err, out.String())
	}
	if s := out.String(); !strings.Contains(s, "2 instances: 2 settled (1 without a plan)") || !strings.Contains(s, "wrong 0") || !strings.Contains(s, "2 proofs replayed, 2 of them of settled instances") {
		t.Errorf("summary %q", s)
	}
	data, err := os.ReadFile(rows)
	if err != nil {
		t.Fatal(err)
	}
	lines := strings.Split(strings.TrimSpace(string(data)), "\n")
	if len(lines) != 3 || lines[0] != "instance,activities,status,makespan,bound,best_known,first_s,best_s,proof_s,checked" {
		t.Fatalf("rows %q", lines)
	}
	if !strings.HasPrefix(lines[1], "never10,2,infeasible,,,unsat,,,") || !strings.HasSuffix(lines[1], ",false") {
		t.Errorf("row %q", lines[1])
	}
	if !strings.HasPrefix(lines[2], "three2,3,optimal,6,6,6,") || !strings.HasSuffix(lines[2], ",true") {
		t.Errorf("row %q", lines[2])
	}
}

func TestWrongAnswersAreFound(t *testing.T) {
	in, err := instance.Parse("x", ".rcp", "3 1 1 0 0 1 2 2 1 1 3 0 0 0")
	if err != nil {
		t.Fatal(err)
	}
	for name, c := range map[string]struct {
		row    row
		starts []int
		wrong  bool
	}{
		"right":          {row{status: learn.Optimal, finish: 2, bound: 2, known: &known{lower: 2, upper: 2}}, []int{0, 0, 2}, false},
		"better":         {row{status: learn.Feasible, finish: 2, bound: 1, known: &known{lower: 1, upper: 3}}, []int{0, 0, 2}, false},
		"nothing known":  {row{status: learn.Feasible, finish: 2}, []int{0, 0, 2}, false},
		"breaks a lag":   {row{status: learn.Feasible, finish: 2}, []int{0, 0, 1}, true},
		"other finish":   {row{status: learn.Feasible, finish: 3}, []int{0, 0, 2}, true},
		"too good":       {row{status: learn.Optimal, finish: 2, known: &known{lower: 3, upper: 3}}, []int{0, 0, 2}, true},
		"bound too high": {row{status: learn.Unknown, bound: 4, known: &known{lower: 2, upper: 3}}, nil, true},
		"has a plan":     {row{status: learn.Infeasible, known: &known{lower: 2, upper: 2}}, nil, true},
		"has none":       {row{status: learn.Feasible, finish: 2, known: &known{none: true}}, []int{0, 0, 2}, true},
	} {
		c.row.judge(in, c.starts)
		if (c.row.wrong != "") != c.wrong {
			t.Errorf("%s: judged %q", name, c.row.wrong)
		}
	}
	var out bytes.Buffer
	if n := summary(&out, "x", []*row{{name: "a", wrong: "it is"}, {name: "b", status: learn.Optimal}}); n != 1 || !strings.Contains(out.String(), "WRONG a: it is") {
		t.Errorf("%d wrong, summary %q", n, out.String())
	}
}

func TestSample(t *testing.T) {
	dir := t.TempDir()
	for _, f := range []string{"p10.sm", "p9.sm", "p100.SCH", "note.txt", "p1.rcp"} {
		if err := os.WriteFile(filepath.Join(dir, f), nil, 0o666); err != nil {
			t.Fatal(err)
		}
	}
	fs, err := gather([]string{dir}, settings{every: 2, offset: 1})
	if err != nil {
		t.Fatal(err)
	}
	var names []string
	for _, f := range fs[0].files {
		names = append(names, filepath.Base(f))
	}
	if got := strings.Join(names, " "); got != "p9.sm p100.SCH" {
		t.Errorf("sample %q, want the second and fourth by number", got)
	}
}

func TestBadArguments(t *testing.T) {
	for _, args := range [][]string{nil, {"-limit", "0s", "."}, {"-workers", "0", "."}, {"/no/such/folder"}, {t.TempDir()}, {"-nosuch"}} {
		var out bytes.Buffer
		if err := run(context.Background(), args, &out, &out); err == nil {
			t.Errorf("%q: no error", args)
		}
	}
}
