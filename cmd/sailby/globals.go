package main

import (
	"context"
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"time"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"sailby/plan"
	"sailby/plan/settle"
	"sailby/report/text"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/jobfile"
)

// defaultLimit is the longest that a plan is searched for where --limit does not say.
const defaultLimit = time.Minute

// globals are the flags that every command takes.
type globals struct {
	trip  string
	with  []string // changes that the job file keeps by name
	now   string
	zone  string
	seed  uint64
	limit time.Duration

	thorough bool // while there is time, go on until the likely answer is proved
}

func (g *globals) flags(f *pflag.FlagSet) {
	f.StringVar(&g.trip, "trip", "", "the trip to plan for, by its name (default: the booked one, else the first)")
	f.StringArrayVar(&g.with, "with", nil, "a change that the job file keeps under `changes`, by its name; may be given several times")
	f.StringVar(&g.now, "now", "", "the time that counts as now, RFC 3339 or \"2027-04-05 10:15\" (stamps calendar files)")
	f.StringVar(&g.zone, "zone", "", "the time zone of --now, as Europe/London (default: that of the job)")
	f.Uint64Var(&g.seed, "seed", 0, "seed of the search; equal seeds give equal plans")
	f.DurationVar(&g.limit, "limit", defaultLimit, "longest time to search; then the best so far is shown, and said to be that")
}

// check looks at the values of the flags that need no job.
func (g *globals) check() error {
	if g.limit <= 0 {
		return misuse("--limit 30s", "--limit %s: the search needs some time", g.limit)
	}
	if g.zone != "" {
		if _, err := time.LoadLocation(g.zone); err != nil || g.zone == "Local" {
			return misuse("--zone Europe/London", "--zone %q is no time zone known here", g.zone)
		}
	}
	return nil
}

// moment gives --now as a minute, 0 where it is not given.
func (g *globals) moment(job *tasks.Job) (hours.Minute, error) {
	if g.now == "" {
		return 0, nil
	}
	if t, err := time.Parse(time.RFC3339, g.now); err == nil {
		return hours.Of(t), nil
	}
	zone := job.Zone
	if g.zone != "" {
		zone, _ = time.LoadLocation(g.zone) // looked at by check
	}
	for _, f := range []string{"2006-01-02 15:04", "2006-01-02T15:04"} {
		t, err := time.Parse(f, g.now)
		if err != nil {
			continue
		}
		m, c := hours.Instant(hours.DateOf(t), t.Hour()*60+t.Minute(), zone)
		if c == hours.Gap {
			return 0, misuse("a time before or after", "--now %q does not exist in %s: the clocks jump over it", g.now, zone)
		}
		return m, nil
	}
	return 0, misuse("--now \"2027-04-05 10:15\"", "--now %q is no time", g.now)
}

// read reads the job file; a folder stands for the job.yaml in it.
func (g *globals) read(path string) (*tasks.Job, error) {
	if err := g.check(); err != nil {
		return nil, err
	}
	path = jobPath(path)
	job, err := jobfile.Read(path)
	if errors.Is(err, os.ErrNotExist) {
		return nil, &advice{err, "sailby start DIR, which writes a job to begin with"}
	}
	if err != nil {
		return nil, g.early(path, err)
	}
	if job, err = g.changed(path, job); err != nil {
		return nil, err
	}
	if _, err := g.moment(job); err != nil {
		return nil, err
	}
	return job, g.knownTrip(job)
}

// early adds to faults of reading those that only the hours of the tasks show, as far as the tasks that read
// without fault have any: so they are not told in a second round.
func (g *globals) early(path string, err error) error {
	var faults tasks.Faults
	if !errors.As(err, &faults) {
		return err
	}
	job := jobfile.Sound(path)
	if job == nil || g.knownTrip(job) != nil {
		return err
	}
	for _, maybes := range []bool{false, true} {
		faults = append(faults, settle.Early(job, expand.Basis{Trip: g.trip, Maybes: maybes})...)
	}
	return faults.Sorted()
}

// changed reads the job again with the changes asked for; the file stays as it is.
func (g *globals) changed(path string, job *tasks.Job) (*tasks.Job, error) {
	if len(g.with) == 0 {
		return job, nil
	}
	var names []string
	var sets []tasks.Setting
	for _, want := range g.with {
		found := false
		for _, c := range job.Changes {
			if c.Name == want {
				found = true
				sets = append(sets, c.Sets...)
			}
		}
		if !found {
			for _, c := range job.Changes {
				names = append(names, c.Name)
			}
			if len(names) == 0 {
				return nil, misuse("a job file with `changes`", "--with %q: the job file keeps no changes", want)
			}
			return nil, misuse("one of: "+strings.Join(names, ", "), "--with %q: the job file keeps no such change", want)
		}
	}
	return jobfile.ReadChanged(path, sets)
}

func jobPath(path string) string {
	if info, err := os.Stat(path); err == nil && info.IsDir() {
		return filepath.Join(path, "job.yaml")
	}
	return path
}

// knownTrip looks whether the job has the trip asked for.
func (g *globals) knownTrip(job *tasks.Job) error {
	if g.trip == "" {
		return nil
	}
	var names []string
	for _, t := range job.Trips {
		if t.Name == g.trip {
			return nil
		}
		names = append(names, t.Name)
	}
	switch {
	case len(names) == 0:
		return misuse("the same without --trip", "--trip %q: the job has a plain window and no trips", g.trip)
	case nearest(g.trip, names) != "":
		return misuse(fmt.Sprintf("--trip %q", nearest(g.trip, names)), "the job has no trip %q", g.trip)
	}
	return misuse(fmt.Sprintf("one of %q", names), "the job has no trip %q", g.trip)
}

// longTicks are the starts tried in each default limit of a longer one, where the search has
// rested without a verdict: more than it tries by itself for any job.
const longTicks = 15e6

// options are those of the search; only leaves out every maybe and the high end.
func (g *globals) options(only bool, show func(string)) settle.Options {
	return settle.Options{Trip: g.trip, Seed: g.seed, Only: only, Progress: show}
}

// settle asks; where no verdict comes out and the limit is longer than the default, it asks again
// for a search that goes on for that much longer.
func (g *globals) settle(ctx context.Context, job *tasks.Job, o settle.Options) (*plan.Report, error) {
	r, err := settle.Ask(ctx, job, o)
	if err != nil || r == nil || r.Likely == nil || r.Likely.Verdict != plan.Unsettled || g.limit <= defaultLimit || ctx.Err() != nil {
		return r, err
	}
	o.Ticks = int64(longTicks * min(g.limit.Seconds()/defaultLimit.Seconds(), 1e6))
	return settle.Ask(ctx, job, o)
}

// goOn searches on for what is left of the limit, where the likely answer is not proved, and keeps what is
// better: by then every basis has had its usual search.
func (g *globals) goOn(ctx context.Context, job *tasks.Job, r *plan.Report, show func(string)) {
	if ctx.Err() != nil || r == nil || !open(r.Likely) {
		return
	}
	o := g.options(true, show)
	o.Thorough = true
	more, err := settle.Ask(ctx, job, o)
	switch {
	case err != nil || more.Likely == nil: // what there is stands
		r.Likely.CutShort = r.Likely.CutShort || ctx.Err() != nil
	case better(more.Likely, r.Likely):
		r.Likely, r.LowToo = more.Likely, more.LowToo
	default:
		r.Likely.CutShort = more.Likely.CutShort
	}
}

// open says whether more search could change an answer.
func open(a *plan.Answer) bool {
	return a != nil && (a.Verdict == plan.Unsettled || a.Verdict == plan.Fits && !a.Best)
}

// better says whether answer a says more than b, which is open.
func better(a, b *plan.Answer) bool {
	switch {
	case b.Verdict == plan.Unsettled:
		return a.Verdict != plan.Unsettled || a.Bound > b.Bound
	case a.Verdict != plan.Fits || a.Finish > b.Finish:
		return false
	}
	return a.Best || a.Finish < b.Finish || a.Bound > b.Bound
}

// ask settles the job, with progress shown, and says so where the search was cut.
func (g *globals) ask(ctx context.Context, st streams, job *tasks.Job) (*plan.Report, error) {
	show, done := st.progress()
	limited, cancel := context.WithTimeout(ctx, g.limit)
	defer cancel()
	r, err := g.settle(limited, job, g.options(false, show))
	if err == nil && g.thorough {
		g.goOn(limited, job, r, show)
	}
	done()
	switch {
	case err != nil && ctx.Err() != nil, errors.Is(err, settle.ErrStopped):
		return nil, errStopped
	case err != nil:
		return nil, err
	case r == nil || r.Likely == nil || r.Likely.Work == nil:
		return nil, errors.New("the search gave no answer")
	case ctx.Err() != nil:
		st.say("stopped: what follows is the best so far")
	case limited.Err() != nil && cutShort(r):
		st.say("cut at the limit of %s: what follows is the best so far; --limit allows more", g.limit)
	}
	return r, nil
}

var errStopped = errors.New("stopped; nothing was written")

func cutShort(r *plan.Report) bool {
	for _, a := range []*plan.Answer{r.Likely, r.Maybes, r.High} {
		if a != nil && a.CutShort {
			return true
		}
	}
	return false
}

// which says which of the plans is asked for.
type which struct {
	maybes, high bool
}

func (w *which) flags(f *pflag.FlagSet) {
	f.BoolVar(&w.maybes, "maybes", false, "the plan with every maybe, in place of the likely one")
	f.BoolVar(&w.high, "high", false, "the plan at the high end of the hours, in place of the likely one")
}

func (w *which) check() error {
	if w.maybes && w.high {
		return misuse("one of them", "--maybes and --high ask for two plans")
	}
	return nil
}

func (w *which) end() expand.End {
	if w.high {
		return expand.High
	}
	return expand.Likely
}

func (w *which) text(st streams) text.Options {
	return text.Options{Width: st.width, Maybes: w.maybes, End: w.end()}
}

// complete gives the shell the names of the trips of the job on the command line.
func (g *globals) complete(root *cobra.Command) {
	_ = root.RegisterFlagCompletionFunc("trip", func(_ *cobra.Command, args []string, _ string) ([]string, cobra.ShellCompDirective) {
		var names []string
		if len(args) > 0 {
			if job, err := jobfile.Read(jobPath(args[0])); err == nil {
				for _, t := range job.Trips {
					names = append(names, t.Name)
				}
			}
		}
		return names, cobra.ShellCompDirectiveNoFileComp
	})
}

// jobFiles gives the shell the files that may be a job.
func jobFiles(_ *cobra.Command, args []string, _ string) ([]string, cobra.ShellCompDirective) {
	if len(args) > 0 {
		return nil, cobra.ShellCompDirectiveNoFileComp
	}
	return []string{"yaml", "yml"}, cobra.ShellCompDirectiveFilterFileExt
}
