package main

import (
	"bytes"
	"context"
	"errors"
	"os"
	"path/filepath"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/gdamore/tcell/v2"

	"sailby/tasks"
)

const starterJob = "../../testdata/jobs/starter"

// fake gives streams into memory.
func fake() (streams, *bytes.Buffer, *bytes.Buffer) {
	var out, talk bytes.Buffer
	return streams{out: &out, err: &talk}, &out, &talk
}

// TestStopped: with a context that has ended nothing is written, and fits tells what it has.
func TestStopped(t *testing.T) {
	ctx, cancel := context.WithCancel(t.Context())
	cancel()
	file := filepath.Join(t.TempDir(), "x")
	for _, args := range [][]string{
		{"sheets", starterJob, "-o", file}, {"export", starterJob, "--to", "csv", "-o", file}, {"start", filepath.Dir(file)},
		{"export", starterJob, "--to", "csv"}, {"check", starterJob},
	} {
		st, out, talk := fake()
		if got := execute(ctx, args, st); got != statusFault || out.Len() > 0 || !strings.Contains(talk.String(), "sailby: ") {
			t.Errorf("%q gives status %d, %q, %q", args, got, out, talk)
		}
	}
	only(t, filepath.Dir(file))
	st, out, talk := fake()
	got := execute(ctx, []string{"fits", starterJob}, st)
	if want := map[bool]int{true: statusDone, false: statusNotShown}[strings.Contains(out.String(), "\nFits: ")]; got != want || !strings.Contains(talk.String(), "stopped") {
		t.Errorf("fits gives status %d, want %d; %q, %q", got, want, out, talk)
	}
}

// full is a disk without room.
type full struct{}

func (full) Write([]byte) (int, error) { return 0, errors.New("no space left") }

func TestResultNotWritten(t *testing.T) {
	for _, args := range [][]string{{"fits", starterJob}, {"days", starterJob}, {"check", starterJob}, {"schema"}, {"why", starterJob, "prime"}, {"export", starterJob, "--to", "csv"}} {
		st, _, talk := fake()
		st.out = full{}
		if got := execute(t.Context(), args, st); got != statusFault || !strings.Contains(talk.String(), "no space left") {
			t.Errorf("%q gives status %d, %q", args, got, talk)
		}
	}
}

// TestProgress: progress is talk, only on a terminal, and gone at the end.
func TestProgress(t *testing.T) {
	st, out, talk := fake()
	if execute(t.Context(), []string{"fits", starterJob}, st); talk.Len() > 0 {
		t.Errorf("talk without a terminal: %q", talk)
	}
	plain := out.String()
	st, out, talk = fake()
	st.errTerm = true
	execute(t.Context(), []string{"fits", starterJob}, st)
	if out.String() != plain {
		t.Error("the result is another one with progress")
	}
	if s := talk.String(); !strings.HasSuffix(s, "\r\x1b[K") {
		t.Errorf("standard error ends with %q", s)
	}
}

// TestReplan: the planner plans with the changes, tells faults, and leaves the file as it is.
func TestReplan(t *testing.T) {
	path := filepath.Join(t.TempDir(), "job.yaml")
	if err := os.WriteFile(path, starter, 0o644); err != nil {
		t.Fatal(err)
	}
	p := &planner{globals: &globals{limit: time.Minute}, path: path}
	before, err := p.Replan(t.Context(), nil)
	if err != nil {
		t.Fatal(err)
	}
	after, err := p.Replan(t.Context(), []tasks.Setting{{Path: []string{"tasks", "prime welds", "hours"}, Value: "75 min"}})
	if err != nil {
		t.Fatal(err)
	}
	if before.Likely.Plan == nil || after.Likely.Plan == nil || after.Likely.Finish <= before.Likely.Finish {
		t.Errorf("finish %d, with more of the last task %d", before.Likely.Finish, after.Likely.Finish)
	}
	var faults tasks.Faults
	if _, err := p.Replan(t.Context(), []tasks.Setting{{Path: []string{"tasks", "try the gate", "hours"}, Value: "2 m"}}); !errors.As(err, &faults) {
		t.Errorf("a wrong unit gives %v", err)
	}
	if data, _ := os.ReadFile(path); !bytes.Equal(data, starter) {
		t.Error("the job file was written to")
	}
}

// drawn is a screen that says when it was first drawn.
type drawn struct {
	tcell.SimulationScreen
	once  sync.Once
	first chan struct{}
}

func (d *drawn) Show() {
	d.SimulationScreen.Show()
	d.once.Do(func() { close(d.first) })
}

// TestBrowse runs the screen on a real job and leaves it.
func TestBrowse(t *testing.T) {
	s := &drawn{SimulationScreen: tcell.NewSimulationScreen("UTF-8"), first: make(chan struct{})}
	o := &browseOptions{globals: &globals{limit: time.Minute}, screen: s}
	st, out, _ := fake()
	done := make(chan error, 1)
	go func() { done <- runBrowse(t.Context(), o, st, []string{starterJob}) }()
	select {
	case <-s.first:
		s.InjectKey(tcell.KeyCtrlC, 0, 0)
	case err := <-done:
		t.Fatalf("browse ends before it draws: %v", err)
	}
	if err := <-done; err != nil || out.Len() > 0 {
		t.Errorf("browse gives %v, %q", err, out)
	}
}

func TestNearest(t *testing.T) {
	for _, c := range []struct{ word, want string }{
		{"fit", "fits"}, {"dyas", "days"}, {"WHY", "why"}, {"shets", "sheets"}, {"x", ""}, {"pack", ""}, {"", ""},
	} {
		if got := nearest(c.word, []string{"fits", "days", "why", "sheets", "Browse"}); got != c.want {
			t.Errorf("nearest to %q is %q, want %q", c.word, got, c.want)
		}
	}
}

// TestPlainErrors: errors of the file system in plain words, with the path.
func TestPlainErrors(t *testing.T) {
	st, _, talk := fake()
	if execute(t.Context(), []string{"fits", "no\x1b[31m/such.yaml"}, st); talk.String() !=
		"sailby: no/such.yaml: there is no such file or folder\n  try: sailby start DIR, which writes a job to begin with\n" {
		t.Errorf("talk is %q", talk)
	}
}
