package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"
	"sync"
	"sync/atomic"
	"time"

	"sailby/plan"
	"sailby/plan/check"
	"sailby/plan/learn"
	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/plan/random"
	"sailby/plan/settle"
	"sailby/plan/solve"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/jobfile"
)

// randomJobs are the flags that make jobs at random.
type randomJobs struct {
	count, size int
	seed        uint64
	class       string
	lattice     bool
}

// knobs lists the jobs to be made: the classes in turn, or the one that is named.
func (r randomJobs) knobs() ([]random.Knobs, error) {
	classes := random.Classes()
	if r.class != "" {
		k := slices.IndexFunc(classes, func(c random.Class) bool { return c.String() == r.class })
		if k < 0 {
			return nil, fmt.Errorf("-class %q: want one of %v", r.class, classes)
		}
		classes = classes[k : k+1]
	}
	if r.size < 2 || r.size > 3000 {
		return nil, fmt.Errorf("-size %d: want 2 to 3000 activities", r.size)
	}
	var out []random.Knobs
	for i := range r.count {
		out = append(out, random.Knobs{Size: r.size, Seed: r.seed + uint64(i), Class: classes[i%len(classes)], Lattice: r.lattice})
	}
	return out, nil
}

// jobRow is a row with what only jobs have.
type jobRow struct {
	row
	class   string
	easy    bool    // a plan by one rule of thumb meets the bound of links and hours, or those alone refute it
	gap     int     // minutes from bound to finish
	openGap float64 // open site minutes from bound to finish, in % of those from the window's opening to the bound
	why     string  // what the bound rests on
}

// solveJob asks a job as `sailby fits` does, on likely hours, and has the plan checked once more.
func solveJob(ctx context.Context, name string, job *tasks.Job, o settings) *jobRow {
	r := &jobRow{row: row{name: name}}
	since := watch(o.cpu)
	limited, cancel := within(ctx, o.limit, since)
	defer cancel()
	rep, err := settle.Ask(limited, job, settle.Options{Only: true, Thorough: true, Found: func() {
		r.best = since()
		if r.first == 0 {
			r.first = r.best
		}
	}})
	r.proof = since()
	var faults tasks.Faults
	switch {
	case errors.As(err, &faults):
		r.wrong = strings.Join(strings.Fields(faults.Error()), " ")
		return r
	case errors.Is(err, settle.ErrStopped):
		return r
	case err != nil:
		r.wrong = err.Error()
		return r
	}
	r.take(rep.Likely)
	limited, cancel = context.WithTimeout(ctx, o.limit)
	defer cancel()
	if r.replay, err = refuteJob(limited, o.proofs, name, rep.Likely); err != nil && r.wrong == "" {
		r.wrong = err.Error()
	}
	return r
}

// within gives a context that ends with the limit, by the given stopwatch.
func within(ctx context.Context, limit time.Duration, since func() float64) (context.Context, func()) {
	l := &limited{Context: ctx, done: make(chan struct{})}
	gone := make(chan struct{})
	go func() {
		defer close(l.done)
		for {
			select {
			case <-ctx.Done():
				return
			case <-gone:
				return
			case <-time.After(time.Millisecond):
				if since() >= limit.Seconds() {
					l.over.Store(true)
					return
				}
			}
		}
	}()
	return l, sync.OnceFunc(func() { close(gone) })
}

// limited is a context with a limit of its own.
type limited struct {
	context.Context
	done chan struct{}
	over atomic.Bool
}

// Done is closed when the limit or the context behind it has ended.
func (l *limited) Done() <-chan struct{} { return l.done }

// Err says which of the two it was.
func (l *limited) Err() error {
	if l.over.Load() {
		return context.DeadlineExceeded
	}
	return l.Context.Err()
}

// take fills the row from an answer.
func (r *jobRow) take(a *plan.Answer) {
	opens := a.Work.Window.Opens
	r.activities = len(a.Work.Steps)
	r.finish, r.bound, r.why = int(a.Finish-opens), int(a.Bound-opens), a.BoundWhy
	switch {
	case a.Verdict == plan.CannotFit:
		r.status, r.why = learn.Infeasible, a.Proof.Summary
	case a.Verdict == plan.Fits && a.Best:
		r.status = learn.Optimal
	case a.Verdict == plan.Fits:
		r.status = learn.Feasible
	}
	if a.Verdict != plan.Fits {
		return
	}
	if br := check.Plan(a.Work, a.Plan); len(br) > 0 {
		r.wrong = "the checker refuses the plan: " + br[0].String()
		return
	}
	if r.checked = true; a.Bound > a.Finish {
		r.wrong = fmt.Sprintf("bound %d is above the finish %d", r.bound, r.finish)
	}
	r.gap = r.finish - r.bound
	site := a.Work.Window.Place.Open.Spans(a.Work.Window.Place.Zone, a.Work.Span, func(d hours.Date) bool { _, no := a.Work.Window.Place.Closed[d]; return no })
	if open := minutes(site, opens, a.Bound); open > 0 {
		r.openGap = 100 * float64(minutes(site, a.Bound, a.Finish)) / float64(open)
	}
}

func minutes(set hours.Set, from, to hours.Minute) int {
	n := 0
	for _, s := range set {
		n += max(0, int(min(s.To, to)-max(s.From, from)))
	}
	return n
}

// easy says whether one rule of thumb finds a plan that links and hours alone cannot better, or
// whether these alone refute the job.
func easy(job *tasks.Job) bool {
	w, faults := expand.Expand(job, expand.Basis{})
	if len(faults) > 0 {
		return false
	}
	p := problem.Compile(w)
	b, conflict := network.Propagate(p, network.Off{})
	if conflict != nil {
		return true
	}
	end := 0
	for i := range p.Acts {
		if len(p.Acts[i].Modes) == 0 {
			return true
		}
		if p.Acts[i].Site {
			end = max(end, b.Finish[i])
		}
	}
	got := solve.Find(p, b, solve.Options{Ticks: 1}).Best
	return got != nil && got.Score.Late == 0 && got.Score.Finish <= end
}

// benchJobs makes jobs at random, asks them and prints the rows and a summary of each class.
func benchJobs(ctx context.Context, o settings, out, talk io.Writer) error {
	knobs, err := o.random.knobs()
	if err != nil {
		return err
	}
	rows := make([]*jobRow, len(knobs))
	errs := make([]error, len(knobs))
	next := make(chan int)
	var wg sync.WaitGroup
	var say sync.Mutex
	for range o.workers {
		wg.Go(func() {
			for i := range next {
				k := knobs[i]
				name := fmt.Sprintf("%s-%d-%d", k.Class, k.Size, k.Seed)
				job, err := jobfile.ReadBytes(name+".yaml", []byte(random.Job(k)), nil)
				if err != nil {
					errs[i] = err
					continue
				}
				r := solveJob(ctx, name, job, o)
				r.class, r.easy = k.Class.String(), easy(job)
				rows[i] = r
				if o.verbose {
					say.Lock()
					fmt.Fprintf(talk, "%s gap=%d min, %.1f %% %s; %s%s\n", strings.Join(r.fields(), ","), r.gap, r.openGap, r.why, r.replay, r.wrong)
					say.Unlock()
				}
			}
		})
	}
	for i := range knobs {
		if ctx.Err() != nil {
			break
		}
		next <- i
	}
	close(next)
	wg.Wait()
	if err := errors.Join(errs...); err != nil {
		return err
	}
	return reportJobs(slices.DeleteFunc(rows, func(r *jobRow) bool { return r == nil }), o, out)
}

// reportJobs prints a line for each class and one for all, and writes the rows.
func reportJobs(rows []*jobRow, o settings, out io.Writer) error {
	wrong := 0
	var all []*row
	by := map[string][]*jobRow{}
	var order []string
	for _, r := range rows {
		all = append(all, &r.row)
		if r.wrong != "" {
			wrong++
			fmt.Fprintf(out, "WRONG %s: %s\n", r.name, r.wrong)
		}
		if by[r.class] == nil {
			order = append(order, r.class)
		}
		by[r.class] = append(by[r.class], r)
	}
	for _, c := range order {
		jobLine(out, c, by[c])
	}
	if len(order) > 1 {
		jobLine(out, "all", rows)
	}
	tellReplays(out, all)
	if o.csv != "" {
		if err := writeRows(o.csv, all); err != nil {
			return err
		}
	}
	if wrong > 0 {
		return fmt.Errorf("%d wrong answers", wrong)
	}
	return nil
}

func jobLine(out io.Writer, name string, rows []*jobRow) {
	n := map[learn.Status]int{}
	settled, easy := 0, 0
	var times, gaps []float64
	for _, r := range rows {
		n[r.status]++
		if r.settled() {
			settled++
			times = append(times, r.proof)
		}
		if r.easy {
			easy++
		}
		if r.status == learn.Feasible {
			gaps = append(gaps, r.openGap)
		}
	}
	fmt.Fprintf(out, "%-6s %4d jobs: %d settled (%d best, %d cannot fit), %d fit unproved, %d open; easy %.0f %%; median %.2f s, slowest %.1f s to settle; gap in open hours, of the unproved: median %.1f %%, most %.1f %%\n",
		name, len(rows), settled, n[learn.Optimal], n[learn.Infeasible], n[learn.Feasible], n[learn.Unknown], 100*float64(easy)/float64(max(1, len(rows))),
		quantile(times, 0.5), quantile(times, 1), quantile(gaps, 0.5), quantile(gaps, 1))
}

// quantile gives the value that so much of a list does not pass, 0 for an empty list.
func quantile(list []float64, q float64) float64 {
	if len(list) == 0 {
		return 0
	}
	s := slices.Sorted(slices.Values(list))
	return s[min(len(s)-1, int(q*float64(len(s))))]
}
