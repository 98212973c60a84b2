package main

import (
	"context"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"sync"

	"sailby/plan/instance"
	"sailby/plan/learn"
)

// row is what came out for one instance. Times are seconds from the reading of the file.
type row struct {
	name       string
	activities int
	status     learn.Status
	finish     int
	bound      int
	known      *known
	first      float64
	best       float64
	proof      float64
	checked    bool
	wrong      string // what is wrong with the answer, "" if nothing is
	conflicts  int64
	ticks      int64
	replay     *replay // of its proof; nil: not asked for
}

var columns = []string{"instance", "activities", "status", "makespan", "bound", "best_known", "first_s", "best_s", "proof_s", "checked"}

var words = map[learn.Status]string{learn.Optimal: "optimal", learn.Feasible: "feasible",
	learn.Infeasible: "infeasible", learn.Unknown: "unknown"}

func (r *row) settled() bool { return r.status == learn.Optimal || r.status == learn.Infeasible }

// fields are the columns as text; what is not known is empty.
func (r *row) fields() []string {
	num := func(ok bool, v int) string {
		if !ok {
			return ""
		}
		return strconv.Itoa(v)
	}
	sec := func(ok bool, v float64) string {
		if !ok {
			return ""
		}
		return strconv.FormatFloat(v, 'f', 3, 64)
	}
	plan := r.status == learn.Optimal || r.status == learn.Feasible
	best := ""
	if r.known != nil {
		best = strconv.Itoa(r.known.upper)
		if r.known.none {
			best = "unsat"
		}
	}
	return []string{r.name, strconv.Itoa(r.activities), words[r.status], num(plan, r.finish),
		num(r.status != learn.Infeasible, r.bound), best, sec(plan, r.first), sec(plan, r.best), sec(r.settled(), r.proof),
		strconv.FormatBool(r.checked)}
}

// solveInstance runs one instance and judges the answer.
func solveInstance(ctx context.Context, path string, o settings, f *folder) (*row, error) {
	since := watch(o.cpu)
	in, err := instance.Read(path)
	if err != nil {
		return nil, err
	}
	r := &row{name: in.Name, activities: len(in.Length) - 2}
	if k, ok := f.known[strings.ToLower(in.Name)]; ok {
		r.known = &k
	}
	log, err := openLog(o.proofs, in.Name)
	if err != nil {
		return nil, err
	}
	got := learn.Solve(in.Problem(), learn.Options{
		Log:  log.writer(),
		Stop: func() bool { return ctx.Err() != nil || since() > o.limit.Seconds() },
		Found: func([]int, int) {
			r.best = since()
			if r.first == 0 {
				r.first = r.best
			}
		},
	})
	r.proof = since()
	r.status, r.finish, r.bound = got.Status, got.Finish, got.Bound
	r.conflicts, r.ticks = got.Conflicts, got.Ticks
	r.judge(in, got.Starts)
	if r.replay, err = log.replay(in.Problem(), got); err != nil && r.wrong == "" {
		r.wrong = err.Error()
	}
	return r, nil
}

// judge checks the plan against the file and the answer against what is known.
func (r *row) judge(in *instance.Instance, starts []int) {
	if starts != nil {
		if err := errors.Join(in.Check(starts), in.CheckAsJob(starts)); err != nil {
			r.wrong = err.Error()
			return
		}
		if f := in.Finish(starts); f != r.finish {
			r.wrong = fmt.Sprintf("finish %d is said to be %d", f, r.finish)
			return
		}
		r.checked = true
	}
	k := r.known
	if k == nil {
		return
	}
	switch {
	case k.none && starts != nil:
		r.wrong = "a plan where none is known to exist"
	case !k.none && r.status == learn.Infeasible:
		r.wrong = fmt.Sprintf("no plan, but one with finish %d is known", k.upper)
	case !k.none && starts != nil && r.finish < k.lower:
		r.wrong = fmt.Sprintf("finish %d is below the proved bound %d", r.finish, k.lower)
	case !k.none && r.bound > k.upper:
		r.wrong = fmt.Sprintf("bound %d is above the known finish %d", r.bound, k.upper)
	}
}

// bench solves all instances, writes the rows and the summaries.
func bench(ctx context.Context, folders []folder, o settings, out, talk io.Writer) error {
	var all []*row
	wrong := 0
	for i := range folders {
		rows, err := benchFolder(ctx, &folders[i], o, talk)
		if err != nil {
			return err
		}
		all = append(all, rows...)
		wrong += summary(out, filepath.Base(folders[i].path), rows)
	}
	if o.csv != "" {
		if err := writeRows(o.csv, all); err != nil {
			return err
		}
	}
	if err := ctx.Err(); err != nil {
		return fmt.Errorf("stopped before the end")
	}
	if wrong > 0 {
		return fmt.Errorf("%d wrong answers", wrong)
	}
	return nil
}

func benchFolder(ctx context.Context, f *folder, o settings, talk io.Writer) ([]*row, error) {
	rows := make([]*row, len(f.files))
	errs := make([]error, len(f.files))
	next := make(chan int)
	var wg sync.WaitGroup
	var say sync.Mutex
	for w := 0; w < o.workers; w++ {
		wg.Add(1)
		go func() {
			defer wg.Done()
			for i := range next {
				r, err := solveInstance(ctx, f.files[i], o, f)
				rows[i], errs[i] = r, err
				if err == nil && o.verbose {
					say.Lock()
					fmt.Fprintf(talk, "%s conflicts=%d ticks=%dk %s%s\n", strings.Join(r.fields(), ","), r.conflicts, r.ticks/1000, r.replay, r.wrong)
					say.Unlock()
				}
			}
		}()
	}
	for i := range f.files {
		if ctx.Err() != nil {
			break
		}
		next <- i
	}
	close(next)
	wg.Wait()
	var done []*row
	for i := range rows {
		if errs[i] != nil {
			return nil, errs[i]
		}
		if rows[i] != nil {
			done = append(done, rows[i])
		}
	}
	return done, nil
}

// summary prints how a folder came out and gives the number of wrong answers.
func summary(out io.Writer, name string, rows []*row) int {
	proved, wrong, plans, none := 0, 0, 0, 0
	gap, counted, slowest := 0.0, 0, 0.0
	for _, r := range rows {
		if r.settled() {
			proved++
			slowest = max(slowest, r.proof)
		}
		switch r.status {
		case learn.Infeasible:
			none++
		case learn.Optimal, learn.Feasible:
			plans++
			if r.known != nil && !r.known.none && r.known.upper > 0 {
				gap += 100 * float64(r.finish-r.known.upper) / float64(r.known.upper)
				counted++
			}
		}
		if r.wrong != "" {
			wrong++
			fmt.Fprintf(out, "WRONG %s: %s\n", r.name, r.wrong)
		}
	}
	mean := 0.0
	if counted > 0 {
		mean = gap / float64(counted)
	}
	fmt.Fprintf(out, "%-8s %3d instances: %d settled (%d without a plan), %d with a plan, %d with nothing; wrong %d; mean gap to best known %.2f %%; slowest settled %.1f s\n",
		name, len(rows), proved, none, plans, len(rows)-plans-none, wrong, mean, slowest)
	tellReplays(out, rows)
	return wrong
}

func writeRows(path string, rows []*row) error {
	file, err := os.Create(path)
	if err != nil {
		return err
	}
	w := csv.NewWriter(file)
	err = w.Write(columns)
	for _, r := range rows {
		if err == nil {
			err = w.Write(r.fields())
		}
	}
	w.Flush()
	if err == nil {
		err = w.Error()
	}
	if e := file.Close(); err == nil {
		err = e
	}
	return err
}
