package settle

import (
	"context"
	"flag"
	"testing"

	"sailby/plan"
	"sailby/plan/check"
	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/plan/random"
	"sailby/plan/solve"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

var randomJobs = flag.Int("jobs", 2000, "how many random jobs TestRandomJobs asks")

// randomTicks is the work of the search for each of the random jobs: they are many.
const randomTicks = 2_000

// TestRandomJobs asks thousands of jobs with everything in them: every plan passes the checker, no
// bound passes a finish, "best" is said where the two meet and nowhere else, a plan that is not late fits, and
// nothing goes wrong on the way. Few of them are easy: settled by one rule of thumb and the links.
func TestRandomJobs(t *testing.T) {
	n := *randomJobs
	if testing.Short() {
		n /= 10
	}
	var fits, none, open, easy int
	for i := range n {
		k := random.Knobs{Size: 2 + i%9, Seed: uint64(i), Class: random.Classes()[i%4], Lattice: i%5 == 0}
		text := random.Job(k)
		job, err := jobfile.ReadBytes("job.yaml", []byte(text), nil)
		if err != nil {
			t.Fatalf("%+v: %v\n%s", k, err, text)
		}
		rep, err := Ask(context.Background(), job, Options{Only: true, Ticks: randomTicks})
		if err != nil {
			t.Fatalf("%+v: %v\n%s", k, err, text)
		}
		a := rep.Likely
		switch a.Verdict {
		case plan.Fits:
			fits++
		case plan.CannotFit:
			none++
		default:
			open++
		}
		if a.Verdict == plan.CannotFit && a.Proof == nil || a.Verdict == plan.Fits && (a.Plan == nil || a.Proof != nil) {
			t.Errorf("%+v: %v, plan %v, proof %v", k, a.Verdict, a.Plan != nil, a.Proof != nil)
		}
		if a.Plan == nil {
			continue
		}
		if br := check.Plan(a.Work, a.Plan); (len(br) > 0) != a.Late {
			t.Errorf("%+v: late %v, and the checker says %v\n%s", k, a.Late, br, text)
		}
		if a.Verdict == plan.Fits && (a.Bound > a.Finish || a.Best != (a.Bound == a.Finish)) {
			t.Errorf("%+v: bound %d, finish %d, best %v\n%s", k, a.Bound, a.Finish, a.Best, text)
		}
	}
	for i := range 60 {
		if k := (random.Knobs{Size: 60, Seed: uint64(1000 + i), Class: random.Classes()[i%4]}); easyJob(t, k) {
			easy++
		}
	}
	t.Logf("%d fit, %d cannot, %d open; of 60 jobs with 60 activities %d are easy", fits, none, open, easy)
	if easy > 18 {
		t.Errorf("%d of 60 jobs are settled by a rule of thumb and the links: more than 30 %%", easy)
	}
}

// easyJob says whether one rule of thumb meets the bound of links and hours, or these refute the job.
func easyJob(t *testing.T, k random.Knobs) bool {
	p, b, refuted := compiled(t, k)
	if refuted {
		return true
	}
	got := solve.Find(p, b, solve.Options{Ticks: 1}).Best
	end := 0
	for i := range p.Acts {
		if p.Acts[i].Site {
			end = max(end, b.Finish[i])
		}
	}
	return got != nil && got.Score.Late == 0 && got.Score.Finish <= end
}

func compiled(t *testing.T, k random.Knobs) (p *problem.Problem, b network.Bounds, refuted bool) {
	var job *tasks.Job
	job, err := jobfile.ReadBytes("job.yaml", []byte(random.Job(k)), nil)
	if err != nil {
		t.Fatal(err)
	}
	w, faults := expand.Expand(job, expand.Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	p = problem.Compile(w)
	for i := range p.Acts {
		if len(p.Acts[i].Modes) == 0 {
			return p, b, true
		}
	}
	b, conflict := network.Propagate(p, network.Off{})
	return p, b, conflict != nil
}
