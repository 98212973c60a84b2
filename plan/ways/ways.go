// Package ways finds the single changes to a job file with which work that does not fit its window
// would fit, and by how much each must change. Every change is written as it would stand in the file, the job read with
// it, planned and checked: what is offered has been done. Amounts are minutes in steps that somebody would ask
// for, or how many more.
//
// Which changes are tried: those of the limits in the proof that it cannot fit. A limit that is in no proof cannot
// help by itself, since the others contradict each other without it; each refusal of a trial is a further such proof.
// The safety of people, what a material needs and what must come before what are never offered.
package ways

import (
	"context"
	"fmt"
	"slices"
	"sort"
	"strings"

	"sailby/plan"
	"sailby/plan/settle"
	"sailby/tasks"
)

// Options bound the work. The zero value uses the defaults.
type Options struct {
	Trip     string
	Seed     uint64
	Ticks    int64 // of all trials together; 0 is 250 million
	Trials   int   // 0 is 240
	Progress func(text string)
	// Read reads the job with some of its values replaced, as jobfile.ReadChanged.
	Read func(sets []tasks.Setting) (*tasks.Job, error)
}

// mostAsked is of how many refusals the limits are asked for, to leave out what cannot help: it costs as much as many
// trials, and the first few say nearly all.
const mostAsked = 4

const (
	usualTicks  = 250_000_000
	usualTrials = 240
)

// seeker is one search for ways.
type seeker struct {
	ctx    context.Context
	o      Options
	job    *tasks.Job
	a      *plan.Answer
	keys   map[string]bool // of the limits that every contradiction met so far has in common; nil: not known
	ticks  int64
	trials int
	asked  int // refusals by search whose limits were asked for
	out    *plan.Ways
}

// Find gives the ways of a job whose answer on likely hours is a; nil where it fits. A cancel gives those
// found so far, with Left above zero. Equal inputs give equal ways unless it is cancelled. Cost: for each limit of the proof one trial,
// and some eight more for each that helps.
func Find(ctx context.Context, job *tasks.Job, a *plan.Answer, o Options) *plan.Ways {
	if a == nil || a.Verdict == plan.Fits || o.Read == nil || a.Work == nil {
		return nil
	}
	if o.Ticks == 0 {
		o.Ticks = usualTicks
	}
	if o.Trials == 0 {
		o.Trials = usualTrials
	}
	s := &seeker{ctx: ctx, o: o, job: job, a: a, out: &plan.Ways{}}
	if a.Proof != nil {
		s.keys = keysOf(a.Proof)
	}
	list := dials(job, a)
	s.out.Not = refused(a.Proof)
	for i := range list {
		d := &list[i]
		if s.keys != nil && d.keys != nil && !slices.ContainsFunc(d.keys, func(k string) bool { return s.keys[k] }) {
			continue // some contradiction stands whatever is done about it
		}
		if s.spent() {
			s.out.Left++
			continue
		}
		if o.Progress != nil {
			o.Progress("what if: " + d.says(d.steps[0]))
		}
		s.out.Tried++
		if w, whole := s.turn(d); w != nil {
			s.out.List = append(s.out.List, *w)
		} else if !whole {
			s.out.Left++
		}
	}
	slices.SortStableFunc(s.out.List, func(x, y plan.Way) int { return rank(x.Kind) - rank(y.Kind) })
	return s.out
}

func (s *seeker) spent() bool {
	return s.ctx.Err() != nil || s.ticks >= s.o.Ticks || s.trials >= s.o.Trials
}

// trial is what came of one amount.
type trial uint8

const (
	open trial = iota // neither a plan nor a proof in the time of a trial
	no
	yes
)

// turn finds the least amount of a dial with which the job fits: from its amounts, from the greatest down, by halves. The amount
// before it has been tried and did not fit. whole is false where the limits of the search ended it.
func (s *seeker) turn(d *dial) (w *plan.Way, whole bool) {
	if s.readable(d); len(d.steps) == 0 {
		return nil, true
	}
	hi := -1
	var tried []plan.WayTrial
	try := func(k int, why bool) trial {
		t := s.try(d, d.steps[k], why)
		verdict := map[trial]plan.Verdict{yes: plan.Fits, no: plan.CannotFit, open: plan.Unsettled}[t]
		tried = append(tried, plan.WayTrial{Text: d.says(d.steps[k]), Amount: d.steps[k], Verdict: verdict})
		return t
	}
	for _, k := range d.probes() {
		if s.spent() {
			return nil, false
		}
		if try(k, d.relaxes && s.asked < mostAsked) == yes {
			hi = k
			break
		}
	}
	if hi < 0 {
		return nil, true
	}
	lo := -1 // does not fit: nothing is changed
	for hi-lo > 1 {
		if s.spent() {
			break
		}
		mid := (lo + hi) / 2
		if try(mid, false) == yes {
			hi = mid
		} else {
			lo = mid
		}
	}
	w = s.way(d, d.steps[hi])
	if w != nil {
		slices.SortStableFunc(tried, func(x, y plan.WayTrial) int { return x.Amount - y.Amount })
		w.Tried = tried
	}
	return w, true
}

// readable leaves out the amounts that are too great to be read: a deadline after the window's close, say.
func (s *seeker) readable(d *dial) {
	n := sort.Search(len(d.steps), func(k int) bool {
		k = len(d.steps) - 1 - k // from the greatest down
		_, ok := s.read(d, d.steps[k])
		return ok
	})
	d.steps = d.steps[:len(d.steps)-n]
}

// try plans the job with one amount of a dial.
func (s *seeker) try(d *dial, n int, why bool) trial {
	job, ok := s.read(d, n)
	if !ok {
		return no
	}
	s.trials++
	a, err := settle.Try(s.ctx, job, settle.Options{Trip: s.trip(d), Seed: s.o.Seed}, why)
	if err != nil || a == nil {
		return no
	}
	s.ticks += a.Steps + 100_000
	switch a.Verdict {
	case plan.Fits:
		return yes
	case plan.CannotFit:
		if why && a.Proof.Kind == plan.BySearch {
			s.asked++
			s.narrow(a.Proof)
		}
		return no
	}
	return open
}

func (s *seeker) trip(d *dial) string {
	if d.trip != "" {
		return d.trip
	}
	return s.o.Trip
}

func (s *seeker) read(d *dial, n int) (*tasks.Job, bool) {
	sets, ok := d.sets(n)
	if !ok {
		return nil, false
	}
	if len(sets) == 0 {
		return s.job, true
	}
	job, err := s.o.Read(sets)
	return job, err == nil && job != nil
}

// narrow keeps the limits that a further contradiction has too.
func (s *seeker) narrow(p *plan.Proof) {
	more := keysOf(p)
	if more == nil {
		return
	}
	if s.keys == nil {
		s.keys = more
		return
	}
	for k := range s.keys {
		if !more[k] {
			delete(s.keys, k)
		}
	}
}

// way plans the changed job as `fits` does, so that what is said of it is what will be seen; nil where that
// finds no plan.
func (s *seeker) way(d *dial, n int) *plan.Way {
	job, ok := s.read(d, n)
	if !ok {
		return nil
	}
	s.trials++
	rep, err := settle.Ask(s.ctx, job, settle.Options{Trip: s.trip(d), Seed: s.o.Seed, Only: true})
	if err != nil || rep == nil || rep.Likely.Verdict != plan.Fits {
		return nil
	}
	s.ticks += rep.Likely.Steps + 100_000
	sets, _ := d.sets(n)
	w := &plan.Way{Kind: d.kind, Text: d.says(n), Was: d.was, Pos: d.pos, Sets: sets, Amount: n, Finish: rep.Likely.Finish, InHand: rep.Likely.InHand}
	if d.writes != nil {
		w.Write = d.writes(n)
	}
	return w
}

// keysOf gives the keys of the limits of a proof; nil where it does not name them all.
func keysOf(p *plan.Proof) map[string]bool {
	if p == nil || len(p.Lines) == 0 {
		return nil
	}
	out := map[string]bool{}
	for _, l := range p.Lines {
		if l.Limit.Kind == plan.LimitOther {
			return nil
		}
		out[keyOf(l.Limit)] = true
	}
	return out
}

// keyOf names a limit by what it is about, so that it is the same in every reading of the job.
func keyOf(l plan.Limit) string {
	k := fmt.Sprint(l.Kind)
	switch l.Kind {
	case plan.LimitLength, plan.LimitStanding, plan.LimitDeadline, plan.LimitNotBefore, plan.LimitDaylight:
		return k + "/" + strings.Join(taskPath(l.Step.Task), "/")
	case plan.LimitMaxWait, plan.LimitMinWait:
		from := ""
		if l.Link.From != nil {
			from = strings.Join(taskPath(l.Link.From.Task), "/")
		}
		return k + "/" + from + " > " + strings.Join(taskPath(l.Link.To.Task), "/")
	case plan.LimitNeed, plan.LimitLone:
		return k + "/" + strings.Join(taskPath(l.Step.Task), "/")
	}
	if l.Place != nil {
		k += "/" + l.Place.Name
	}
	if l.Face != nil {
		k += "/" + l.Face.Name
	}
	if l.Person != nil {
		k += "/" + l.Person.Name
	}
	if l.Kit != nil {
		k += "/" + l.Kit.Name
	}
	if l.Permit != nil {
		k += "/" + l.Permit.Name
	}
	return k
}
