package settle

import (
	"context"
	"encoding/csv"
	"flag"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"sailby/plan"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

var oracleData = flag.String("oracle", "", "write the data of the jobs for testdata/oracle/job.mzn to this folder")

// oracleJobs are the jobs that the outside model answers: made at random by plan/random on its lattice,
// and kept as they were then.
func oracleJobs(t *testing.T) []string {
	list, err := filepath.Glob("testdata/oracle/jobs/*.yaml")
	if err != nil || len(list) < 20 {
		t.Fatal(err, len(list))
	}
	return list
}

func oracleName(path string) string { return strings.TrimSuffix(filepath.Base(path), ".yaml") }

// TestOracle holds our answers against those of general solvers to a model written from JOBFILE.md's rules
// alone (testdata/oracle: the model, what the solvers said, and how to ask them again): where the model's
// answer is proved, ours is not better nor proved worse; where it found a plan, our bound does not
// pass it; where it proved a bound, our plan keeps to it.
func TestOracle(t *testing.T) {
	if *oracleData != "" {
		writeOracle(t, *oracleData)
		return
	}
	file, err := os.Open("testdata/oracle/results.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer file.Close()
	rows := csv.NewReader(file)
	rows.Comment = '#'
	list, err := rows.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	known := map[string][]string{}
	for _, r := range list[1:] {
		known[r[0]] = r
	}
	proved, equal, open := 0, 0, 0
	for i, path := range oracleJobs(t) {
		r, ok := known[oracleName(path)]
		if !ok {
			open++
			continue
		}
		if testing.Short() && i%3 > 0 {
			continue
		}
		job, err := jobfile.Read(path)
		if err != nil {
			t.Fatal(err)
		}
		rep, err := Ask(context.Background(), job, Options{Only: true})
		if err != nil {
			t.Fatal(err)
		}
		a := rep.Likely
		opens := a.Work.Window.Opens
		finish, bound := int(a.Finish-opens), int(a.Bound-opens)
		theirs, _ := strconv.Atoi(r[2])
		theirs *= slot
		if r[1] == "optimal" || r[1] == "infeasible" {
			proved++
		}
		switch r[1] {
		case "infeasible":
			if a.Verdict == plan.Fits {
				t.Errorf("%s: a plan, and the model has none: %v", r[0], show(a.Work, a.Plan))
			} else if a.Verdict == plan.CannotFit {
				equal++
			}
		case "optimal":
			switch {
			case a.Verdict == plan.CannotFit:
				t.Errorf("%s: cannot fit (%s), and the model finishes %d min after the opening", r[0], a.Proof.Summary, theirs)
			case bound > theirs:
				t.Errorf("%s: bound %d (%s), and the model finishes at %d", r[0], bound, a.BoundWhy, theirs)
			case a.Verdict == plan.Fits && finish < theirs:
				t.Errorf("%s: finish %d, and the model's best is %d: %v", r[0], finish, theirs, show(a.Work, a.Plan))
			case a.Verdict == plan.Fits && finish == theirs:
				equal++
			}
		case "feasible":
			if a.Verdict == plan.CannotFit || bound > theirs {
				t.Errorf("%s: %v, bound %d, and the model finishes at %d", r[0], a.Verdict, bound, theirs)
			}
		}
	}
	t.Logf("of %d answers that are proved there, %d are the same here; %d jobs have none there", proved, equal, open)
	if proved == 0 || 10*equal < 9*proved {
		t.Errorf("only %d of %d", equal, proved)
	}
}

func writeOracle(t *testing.T, dir string) {
	for _, path := range oracleJobs(t) {
		job, err := jobfile.Read(path)
		if err != nil {
			t.Fatal(err)
		}
		w, faults := expand.Expand(job, expand.Basis{})
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		if err := os.WriteFile(filepath.Join(dir, oracleName(path)+".dzn"), []byte(newExported(t, w).write()), 0o666); err != nil {
			t.Fatal(err)
		}
	}
}
