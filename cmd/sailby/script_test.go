package main

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
)

func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){"sailby": main})
}

// TestScripts runs the scripts, one behaviour each. JOBS is the folder of the jobs, FAULTS that of
// the faulty ones.
func TestScripts(t *testing.T) {
	tests, err := filepath.Abs(filepath.Join("..", "..", "testdata"))
	if err != nil {
		t.Fatal(err)
	}
	testscript.Run(t, testscript.Params{
		Dir:                 "testdata/script",
		RequireExplicitExec: true,
		Setup: func(e *testscript.Env) error {
			e.Setenv("JOBS", filepath.Join(tests, "jobs"))
			e.Setenv("FAULTS", filepath.Join(tests, "faults"))
			return nil
		},
		Cmds: map[string]func(*testscript.TestScript, bool, []string){"status": status3, "without": without},
	})
}

// status3 runs a command and holds its exit status: status 3 sailby fits job.yaml; "any" takes
// every status.
func status3(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 {
		ts.Fatalf("usage: status N COMMAND...")
	}
	err := ts.Exec(args[1], args[2:]...)
	got := "0"
	if err != nil {
		got = exitOf(err)
	}
	if got != args[0] && args[0] != "any" {
		ts.Fatalf("exit status %s, want %s (%v)", got, args[0], err)
	}
}

// TestStarterIsTheDemo: the job that start writes is the one in testdata, byte for byte.
func TestStarterIsTheDemo(t *testing.T) {
	demo, err := os.ReadFile("../../testdata/jobs/starter/job.yaml")
	if err != nil {
		t.Fatal(err)
	}
	if string(demo) != string(starter) {
		t.Error("cmd/sailby/starter.yaml is not testdata/jobs/starter/job.yaml: copy it over")
	}
}

// without takes the lines that begin with a word, blanks aside, out of a file: without job.yaml trailer:
func without(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) != 2 {
		ts.Fatalf("usage: without FILE WORD")
	}
	var kept []string
	lines := strings.Split(ts.ReadFile(args[0]), "\n")
	for _, l := range lines {
		if !strings.HasPrefix(strings.TrimSpace(l), args[1]) {
			kept = append(kept, l)
		}
	}
	if len(kept) == len(lines) {
		ts.Fatalf("%s has no line that begins with %s", args[0], args[1])
	}
	ts.Check(os.WriteFile(ts.MkAbs(args[0]), []byte(strings.Join(kept, "\n")), 0o644))
}
