package main

import (
	"bytes"
	"strings"
	"testing"
)

const module = "../.."

// TestListMatches: every line that a mutant changes stands in its file just once, so that the
// list does not rot; no two mutants are the same, and there are enough of them for each part.
func TestListMatches(t *testing.T) {
	parts := map[string]int{}
	seen := map[string]bool{}
	for k := range mutants {
		m := &mutants[k]
		if after, err := m.apply(module); err != nil {
			t.Errorf("mutant %d: %v", k+1, err)
		} else if !bytes.Contains(after, []byte(m.now)) || m.was == m.now || strings.Count(m.now, "\n") > strings.Count(m.was, "\n") {
			t.Errorf("mutant %d changes nothing, or more than a line", k+1)
		}
		if key := m.file + m.was + m.now; seen[key] {
			t.Errorf("mutant %d stands in the list twice", k+1)
		} else {
			seen[key] = true
		}
		parts[strings.Join(strings.Split(m.file, "/")[:2], "/")]++
		if len(m.tests) == 0 {
			t.Errorf("mutant %d has no tests", k+1)
		}
	}
	for part, least := range map[string]int{"plan/network": 9, "plan/problem": 10, "plan/solve": 12, "plan/check": 12} {
		if parts[part] < least {
			t.Errorf("%s has %d mutants, want %d", part, parts[part], least)
		}
	}
}

// TestApply: a line that is not there, or there twice, is no mutant; a number out of range is told.
func TestApply(t *testing.T) {
	for _, was := range []string{"no such line in the file", "func "} {
		m := mutant{file: "plan/mutants/main.go", was: was, now: "x"}
		if _, err := m.apply(module); err == nil || !strings.Contains(err.Error(), "not once") {
			t.Errorf("%q: got %v, want that it does not stand there once", was, err)
		}
	}
	if _, err := pick([]string{"0"}); err == nil {
		t.Error("there is no mutant 0")
	}
	if all, err := pick(nil); err != nil || len(all) != len(mutants) {
		t.Errorf("got %d of %d, %v", len(all), len(mutants), err)
	}
}
