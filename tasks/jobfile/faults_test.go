package jobfile

import (
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"sailby/tasks"
)

const (
	faultsFolder = "../../testdata/faults"
	faultsMark   = "\n# The fault:\n"
)

// found writes the faults of a file as its trailing comment has them, folder names left out.
func found(err error) string {
	var all tasks.Faults
	if !errors.As(err, &all) {
		return ""
	}
	var out []string
	for _, f := range all {
		f.Pos.File = filepath.Base(f.Pos.File)
		for _, line := range strings.Split(f.Error(), "\n") {
			out = append(out, "# "+line)
		}
	}
	return strings.Join(out, "\n") + "\n"
}

// Every file in testdata/faults has one fault, and says at its end how it is told.
func TestFaultFiles(t *testing.T) {
	files, err := filepath.Glob(faultsFolder + "/*.yaml")
	if err != nil || len(files) < 45 {
		t.Fatalf("%d files in %s, want 45 or more (%v)", len(files), faultsFolder, err)
	}
	for _, file := range files {
		name := filepath.Base(file)
		if name == "longer-than-any-opening.yaml" {
			continue // told from the estimates, not by the reader
		}
		t.Run(name, func(t *testing.T) {
			data, err := os.ReadFile(file)
			if err != nil {
				t.Fatal(err)
			}
			job, err := Read(file)
			if job != nil {
				t.Error("a job is given beside the fault, or there is no fault")
			}
			got := found(err)
			body, want, _ := strings.Cut(string(data), faultsMark)
			if *update && got != want {
				if err := os.WriteFile(file, []byte(strings.TrimRight(body, "\n")+"\n"+faultsMark+got), 0o644); err != nil {
					t.Fatal(err)
				}
				want = got
			}
			if got != want {
				t.Errorf("got\n%swant\n%s", got, want)
			}
			var all tasks.Faults
			if errors.As(err, &all) && (len(all) != 1 || all[0].Hint == "" || all[0].Pos.Line == 0) {
				t.Errorf("%d faults, want one with a place and a way out: %v", len(all), err)
			}
		})
	}
}
