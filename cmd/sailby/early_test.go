package main

import (
	"errors"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"sailby/tasks"
	"sailby/tasks/jobfile"
)

const twoKinds = `job: two kinds of fault
zone: Europe/London
places:
  shop: {open: Mon-Fri 08:00-12:30 13:00-17:00}
  quay: {open: daily 07:00-12:00}
window: {place: quay, opens: 2027-05-11 07:00, closes: 2027-05-13 19:00}
people: {Ann: {}, Bo: {}}
tasks:
  fit: {at: shop, hours: 3 bananas}
  scan: {kind: test, at: quay, by: PAUT}
  paint: {kind: coat, at: quay, area: 3 m2, coats: [nothing]}
  hand over: {kind: sign-off, at: quay, hours: 9 h, after: fit}
`

// Faults of reading, of hours and of openings come in one round.
func TestFaultsComeInOneRound(t *testing.T) {
	path := filepath.Join(t.TempDir(), "job.yaml")
	if err := os.WriteFile(path, []byte(twoKinds), 0o644); err != nil {
		t.Fatal(err)
	}
	_, err := (&globals{limit: 1}).read(path)
	var faults tasks.Faults
	if !errors.As(err, &faults) {
		t.Fatalf("no faults: %v", err)
	}
	var got []string
	for i, f := range faults {
		got = append(got, f.Error())
		if i > 0 && f.Pos.Line < faults[i-1].Pos.Line {
			t.Errorf("%v comes after line %d", f, faults[i-1].Pos.Line)
		}
	}
	all := strings.Join(got, "\n")
	for _, want := range []string{"bananas", `a test by "PAUT" has no hours`, `no paint is called "nothing"`, `task "hand over": goes in one go and needs 12 h 52 min at quay`} {
		if !strings.Contains(all, want) {
			t.Errorf("not told: %s\n%s", want, all)
		}
	}
	if len(faults) != 4 {
		t.Errorf("%d faults, want 4:\n%s", len(faults), all)
	}
}

// Whatever value is spoiled in a job that is whole, nothing is told but what reading finds: the other tasks have
// no fault, and none is made up because something could not be read.
func TestNoFaultIsMadeUp(t *testing.T) {
	for _, job := range []string{"sluice", "starter", "lanehead"} {
		whole, err := os.ReadFile("../../testdata/jobs/" + job + "/job.yaml")
		if err != nil {
			t.Fatal(err)
		}
		lines := strings.Split(string(whole), "\n")
		path := filepath.Join(t.TempDir(), "job.yaml")
		spoiled := 0
		for i, l := range lines {
			k := strings.Index(l, ": ")
			if k < 0 || strings.HasPrefix(strings.TrimSpace(l), "#") {
				continue
			}
			for _, value := range []string{"9 bananas", "[]"} {
				out := slices.Clone(lines)
				out[i] = l[:k+2] + value
				if err := os.WriteFile(path, []byte(strings.Join(out, "\n")), 0o644); err != nil {
					t.Fatal(err)
				}
				var read, all tasks.Faults
				if _, err := jobfile.Read(path); !errors.As(err, &read) {
					continue // some words may be anything
				}
				spoiled++
				_, err := (&globals{limit: 1}).read(path)
				if !errors.As(err, &all) || len(all) != len(read.Sorted()) {
					t.Errorf("%s, line %d spoiled: %v\nreading alone: %v", job, i+1, all, read)
				}
			}
		}
		if spoiled < 30 {
			t.Errorf("%s: only %d values could be spoiled", job, spoiled)
		}
	}
}
