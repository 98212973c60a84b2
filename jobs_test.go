package sailby_test

import (
	"bufio"
	"context"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"sailby/plan"
	"sailby/plan/settle"
	"sailby/report/agenda"
	"sailby/tasks/hours"
	"sailby/tasks/jobfile"
)

// expected reads the lines "#   key: value" that stand under "# Expected" in a job file's head.
func expected(t *testing.T, path string) [][2]string {
	t.Helper()
	f, err := os.Open(path)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	var out [][2]string
	found := false
	for s := bufio.NewScanner(f); s.Scan() && strings.HasPrefix(s.Text(), "#"); {
		if !found {
			found = s.Text() == "# Expected"
			continue
		}
		key, value, ok := strings.Cut(strings.TrimSpace(strings.TrimPrefix(s.Text(), "#")), ": ")
		if !ok {
			t.Fatalf("%s: %q is not `key: value`", path, s.Text())
		}
		out = append(out, [2]string{key, value})
	}
	if len(out) == 0 {
		t.Fatalf("%s: its head says nothing under # Expected", path)
	}
	return out
}

// The hard corners come out as worked out by hand in the head of each file.
func TestCorners(t *testing.T) {
	files, err := filepath.Glob("testdata/jobs/corners/*.yaml")
	if err != nil || len(files) < 10 {
		t.Fatalf("found %d corners: %v", len(files), err)
	}
	for _, path := range files {
		t.Run(filepath.Base(path), func(t *testing.T) {
			t.Parallel()
			job, err := jobfile.Read(path)
			if err != nil {
				t.Fatal(err)
			}
			rep, err := settle.Ask(context.Background(), job, settle.Options{Ticks: 20_000})
			if err != nil {
				t.Fatal(err)
			}
			for _, e := range expected(t, path) {
				if got := said(rep, e[0]); got != e[1] {
					t.Errorf("%s: got %s, by hand %s", e[0], got, e[1])
				}
			}
		})
	}
}

// said gives what a report says about a key of the head.
func said(rep *plan.Report, key string) string {
	a := rep.Likely
	zone := a.Work.Window.Place.Zone
	switch key {
	case "verdict":
		return strings.ReplaceAll(a.Verdict.String(), "-", " ")
	case "opens":
		return stamp(a.Work.Window.Opens, zone)
	case "closes":
		return stamp(a.Work.Window.Closes, zone)
	case "finish", "late plan":
		if a.Plan == nil || a.Late != (key == "late plan") {
			return fmt.Sprintf("no such plan (late: %v)", a.Late)
		}
		return stamp(a.Finish, zone)
	case "getting off":
		for _, g := range agenda.Getaways(a) {
			if g.Neaped {
				if s := agenda.Sentence(a, false); !strings.HasPrefix(s, "Fits, but neaped:") || agenda.Word(a) != "fits, but neaped" {
					return "the first line says " + s
				}
				return "neaped"
			}
		}
		return "gets off"
	case "mended":
		var names []string
		for _, m := range a.Work.Rescues {
			if m.Mended {
				names = append(names, m.Name)
			}
		}
		return strings.Join(names, ", ")
	case "with maybes":
		return fmt.Sprintf("%s %s", rep.Maybes.Verdict, stamp(rep.Maybes.Finish, zone))
	}
	first, last := "", ""
	for i, s := range a.Plan.Steps {
		if s.Task != key || a.Work.Steps[i].HandsOn == 0 {
			continue
		}
		zone := a.Work.Steps[i].Place.Zone
		if first == "" {
			first = stamp(s.Start, zone)
		}
		last = stamp(s.Finish, zone)
	}
	return first + " to " + last
}

func stamp(m hours.Minute, zone *time.Location) string { return m.In(zone).Format("2006-01-02 15:04") }

// The demonstration jobs come out as their heads say.
func TestDemonstrations(t *testing.T) {
	for _, c := range []struct {
		job, trip, changes string
		want               plan.Verdict
		maybes             plan.Verdict // with every maybe, where it is said
		low                bool         // cannot fit even at the low end
		tasks              int          // at least so many
	}{
		{job: "tarskay", want: plan.Fits, maybes: plan.CannotFit, tasks: 50},
		{job: "tarskay", changes: "staging at the hinge, insert cut at home", want: plan.Fits, maybes: plan.Fits},
		{job: "tarskay", trip: "seven days", want: plan.CannotFit, low: true},
		{job: "lanehead", want: plan.CannotFit, low: true, tasks: 40},
		{job: "lanehead", changes: "consent", want: plan.CannotFit, low: true},
		{job: "lanehead", changes: "fast strip", want: plan.CannotFit, low: true},
		{job: "lanehead", changes: "consent, fast strip", want: plan.Fits},
		{job: "lanehead", changes: "consent, fast strip, bay by bay", want: plan.CannotFit, low: true},
		{job: "narrows", want: plan.CannotFit, low: true},
		{job: "narrows", changes: "second welder, staging", want: plan.Fits},
		{job: "starter", want: plan.Fits, tasks: 6},
		{job: "sluice", want: plan.Fits, tasks: 12},
	} {
		t.Run(c.job+" "+c.trip+c.changes, func(t *testing.T) {
			path := filepath.Join("testdata/jobs", c.job, "job.yaml")
			job, err := jobfile.Read(path)
			if err != nil {
				t.Fatal(err)
			}
			if len(job.Tasks) < c.tasks {
				t.Errorf("%d tasks, at least %d are promised", len(job.Tasks), c.tasks)
			}
			sets := job.Changes[:0:0]
			for _, name := range strings.Split(c.changes, ", ") {
				for _, change := range job.Changes {
					if change.Name == name {
						sets = append(sets, change)
					}
				}
			}
			if len(sets) > 0 {
				all := sets[0].Sets
				for _, s := range sets[1:] {
					all = append(all, s.Sets...)
				}
				if job, err = jobfile.ReadChanged(path, all); err != nil {
					t.Fatal(err)
				}
			}
			rep, err := settle.Ask(context.Background(), job, settle.Options{Trip: c.trip, Only: c.maybes == 0})
			if err != nil {
				t.Fatal(err)
			}
			if rep.Likely.Verdict != c.want || rep.LowToo != c.low {
				t.Errorf("got %s (even at the low end: %v), want %s (%v)", rep.Likely.Verdict, rep.LowToo, c.want, c.low)
			}
			if c.maybes != 0 && rep.Maybes.Verdict != c.maybes {
				t.Errorf("with every maybe: got %s, want %s", rep.Maybes.Verdict, c.maybes)
			}
		})
	}
}
