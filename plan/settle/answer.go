package settle

import (
	"context"
	"errors"
	"fmt"

	"sailby/plan"
	"sailby/plan/check"
	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/plan/solve"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// ErrChecker is a plan that the independent checker refused: a fault of this program, never of
// the job file. The plan is not shown.
var ErrChecker = errors.New("the independent checker refused the plan")

// explainAll is how many steps a job may have for its plans on every basis to be explained; above
// it only the plan on likely hours is.
const explainAll = 250

// asked is one basis being settled.
type asked struct {
	ctx    context.Context
	o      Options
	work   *expand.Work
	p      *problem.Problem // with the window as it is
	carry  *problem.Problem // with hours carried on past the window
	bounds network.Bounds
	out    *plan.Answer
	plain  bool // that there is a proof is enough: what it needs is not asked for
	once   bool // the first plan that fits is enough
	bare   bool // what explains a plan is left out
	made   int  // schedules made so far
}

// answer settles one basis; where nothing fits, with what mends longest waits that cannot be kept.
func answer(ctx context.Context, job *tasks.Job, b expand.Basis, o Options, explain bool) (*plan.Answer, error) {
	first, err := alone(ctx, job, b, o, explain)
	if err != nil {
		return nil, err
	}
	a, err := mended(ctx, job, first, o, explain)
	if err != nil || a.Verdict != plan.CannotFit || !a.Work.Shared {
		return a, err
	}
	b.Unbound, b.Washed = len(a.Work.Rescues) > 0, true // two starts in one tide may need but one wash (R26)
	if kind, err := alone(ctx, job, b, o, false); err != nil || kind.Verdict != plan.CannotFit {
		open := *a
		open.Verdict, open.Proof = plan.Unsettled, nil
		return &open, nil
	}
	return a, nil
}

// alone settles one basis as it is. explain adds leeway and what sets every start.
func alone(ctx context.Context, job *tasks.Job, b expand.Basis, o Options, explain bool) (*plan.Answer, error) {
	a, err := ask(ctx, job, b, o)
	if err != nil {
		return nil, err
	}
	a.prove()
	if err := a.find(explain); err != nil {
		return nil, err
	}
	if o.left() {
		return nil, ErrStopped
	}
	a.verdict()
	return a.out, nil
}

// cannot says whether a basis is proved impossible without a search.
func cannot(ctx context.Context, job *tasks.Job, b expand.Basis, o Options) bool {
	a, err := ask(ctx, job, b, o)
	if err != nil {
		return false
	}
	a.plain = true
	a.prove()
	return a.out.Proof != nil
}

func ask(ctx context.Context, job *tasks.Job, b expand.Basis, o Options) (*asked, error) {
	w, faults := expand.Expand(job, b)
	if len(faults) > 0 {
		return nil, faults
	}
	if o.left() {
		return nil, ErrStopped
	}
	return &asked{ctx: ctx, o: o, work: w, p: problem.Compile(w), out: &plan.Answer{Work: w}}, nil
}

func (a *asked) stop() bool { return a.ctx.Err() != nil }

func (a *asked) say(format string, args ...any) {
	if a.o.Progress != nil {
		a.o.Progress(fmt.Sprintf(format, args...))
	}
}

func (a *asked) found() {
	if a.o.Found != nil {
		a.o.Found()
	}
}

func (a *asked) at(t int) hours.Minute { return a.p.Base + hours.Minute(t) }

// prove looks for a proof that nothing fits, cheapest first, and for a bound.
func (a *asked) prove() {
	a.say("links, hours and deadlines")
	for i := range a.p.Acts {
		if len(a.p.Acts[i].Modes) == 0 {
			a.out.Proof = a.noOpening(i)
			return
		}
	}
	b, conflict := network.Propagate(a.p, network.Off{})
	a.bounds = b
	if conflict != nil {
		a.out.Proof = a.chain(conflict)
		return
	}
	if a.o.left() {
		return
	}
	a.say("work against open hours")
	loads := solve.Loads(a.p)
	if over := solve.FindOverload(loads, b); over != nil {
		a.out.Proof = a.overload(over)
		return
	}
	a.bound(loads)
}

// bound sets the earliest possible site finish.
func (a *asked) bound(loads []*solve.Load) {
	best, last := 0, -1
	for i := range a.p.Acts {
		if act := &a.p.Acts[i]; act.Site {
			end := a.bounds.Finish[i]
			if w := act.Modes[0].Time.Watch(); act.Step != nil && !act.Step.Absent && act.Modes[0].Time.Length() > 0 {
				end += w
			}
			if end > best {
				best, last = end, i
			}
		}
	}
	if last >= 0 {
		a.out.BoundWhy = fmt.Sprintf("the chain to %q, however many people there are", a.p.Acts[last].Label())
	}
	if t, why := solve.ContentBound(a.p, loads, a.bounds); t > best && why != nil {
		best = t
		a.out.BoundWhy = fmt.Sprintf("%s of work for %s%s from %s", span(why.Total), why.Load.Who, scope(why.Load.Scope), a.clock(why.From))
	}
	a.out.Bound = a.at(best)
	t, why := solve.Squeeze(a.p, loads, best, a.p.Close+1, a.stop)
	switch {
	case t <= best:
		return
	case t > a.p.Close && why != nil:
		a.out.Proof = a.overload(why)
		return
	case why == nil:
		a.out.BoundWhy = "the links, however many people there are"
	default:
		a.out.BoundWhy = fmt.Sprintf("with an earlier finish there would be %s of work for %s%s between %s and %s, and %s open for it", span(why.Total), why.Load.Who, scope(why.Load.Scope), a.clock(why.From), a.clock(why.To), span(why.Have))
	}
	a.out.Bound = a.at(t)
}

// find searches for a plan and has it checked.
func (a *asked) find(explain bool) error {
	if a.o.left() {
		return nil
	}
	a.say("plans")
	a.carry = problem.Compile(a.work.Carry())
	b, ok := undated(a.carry)
	if !ok { // home work that follows the site's: with the hours carried on nobody comes home to do it
		a.carry = a.p
		if b, ok = undated(a.p); !ok {
			a.out.NoPlan = "what some task needs (reach, hire, a permit, somebody booked) does not come again after the window, however late it may be"
			return nil
		}
	}
	bound := int(a.out.Bound - a.p.Base)
	o := solve.Options{Ticks: a.o.ticks(len(a.carry.Acts)), Stop: a.stop, Quit: a.o.left, Seed: a.o.Seed, Good: func(s solve.Score) bool {
		return a.out.Proof == nil && s.Late == 0 && s.Finish <= bound && s.Hand == 0 && s.Stops == 0
	}}
	o.Found = func(s solve.Score) {
		if s.Late == 0 {
			a.found()
		}
	}
	o.Made = a.early
	res := solve.Find(a.carry, b, o)
	o.Made = nil
	if a.out.Proof == nil && a.o.Ticks == 0 && (res.Best == nil || res.Best.Score.Late > 0) && !a.stop() {
		a.say("plans, for longer")
		o.Ticks, o.Seed = longer*o.Ticks, o.Seed+1
		o.Good = func(s solve.Score) bool { return s.Late == 0 }
		if again := solve.Find(a.carry, b, o); res.Best == nil || again.Best != nil && again.Best.Score.Compare(res.Best.Score, true) < 0 {
			again.Ticks += res.Ticks
			res = again
		}
	}
	if a.carry != a.p && a.out.Proof == nil && (res.Best == nil || res.Best.Score.Late > 0) && a.homeAfter() && !a.stop() {
		a.say("plans with home work after the window")
		if b, ok := undated(a.p); ok {
			home := solve.Find(a.p, b, o)
			home.Ticks += res.Ticks
			if home.Best != nil && home.Best.Score.Late == 0 {
				a.carry = a.p
				res = home
			}
		}
	}
	if a.work.Trip != nil && a.carry != a.p && (res.Best == nil || res.Best.Score.Late > 0) && !a.stop() {
		a.say("plans in which nobody goes home before the work is done")
		stay := problem.Compile(a.work.Remain())
		if b, ok := undated(stay); ok {
			o.Good = nil
			late := solve.Find(stay, b, o)
			late.Ticks += res.Ticks
			if late.Best != nil && late.Best.Score.Late > 0 && (res.Best == nil || late.Best.Score.Compare(res.Best.Score, true) < 0) {
				a.carry, res = stay, late
			}
		}
	}
	a.out.Steps = res.Ticks
	if a.carry == a.p || a.carry.Work.Trip == a.work.Trip { // the learning search knows the window as it is
		res.Best = a.learning(res.Best, 1)
		if a.o.Thorough {
			res.Best = a.onward(res.Best, b, o)
		}
	} else {
		a.learning(nil, 1)
	}
	res.Best = a.second(res.Best)
	a.out.CutShort = a.stop()
	if a.o.left() {
		return nil
	}
	if res.Best == nil {
		a.out.NoPlan = "the search found none"
		return nil
	}
	return a.keep(solve.Compact(a.carry, res.Best), explain)
}

// onward searches for plans and proofs in turn, each round for longer, until the answer is settled or
// the search is stopped.
func (a *asked) onward(best *solve.Schedule, b network.Bounds, o solve.Options) *solve.Schedule {
	o.Good = func(s solve.Score) bool { return a.out.Proof == nil && s.Late == 0 && a.at(s.Finish) <= a.out.Bound }
	for round := 1; !a.stop() && a.out.Proof == nil && (best == nil || !o.Good(best.Score)); round++ {
		a.say("better plans, round %d", round)
		o.Ticks, o.Seed, o.From = a.o.ticks(len(a.carry.Acts))<<min(round, 6), a.o.Seed+uint64(round), best
		if again := solve.Find(a.carry, b, o); again.Best != nil {
			best = again.Best
		}
		best = a.learning(best, int64(1)<<min(round, 10))
	}
	return best
}

// undated gives the bounds of a problem without its deadlines; ok is false where it cannot be
// done however late.
func undated(p *problem.Problem) (b network.Bounds, ok bool) {
	free := network.Off{By: map[int]bool{}}
	for i := range p.Acts {
		if len(p.Acts[i].Modes) == 0 {
			return b, false
		}
		free.By[i] = true
	}
	b, conflict := network.Propagate(p, free)
	return b, conflict == nil
}

// homeAfter says whether there is work at home that may be done after the window.
func (a *asked) homeAfter() bool {
	for i := range a.p.Acts {
		if act := &a.p.Acts[i]; act.Home && act.By > a.p.Close {
			return true
		}
	}
	return false
}

// keep has a schedule checked and fills the answer from it.
func (a *asked) keep(s *solve.Schedule, explain bool) error {
	p := solve.Plan(a.carry, s)
	late := s.Score.Late > 0
	if late && a.leftBehind(s) {
		a.out.NoPlan = "the search found none in which what goes along is ready before the trip leaves"
		return nil
	}
	if late && a.carry == a.p && s.Score.Finish > a.p.Close {
		a.out.NoPlan = "the search found none: work at home waits for work at the site, and that runs past the window"
		return nil
	}
	work := a.work
	if late {
		work = a.carry.Work
	}
	if breaches := check.Plan(work, p); len(breaches) > 0 && !(late && check.Late(breaches)) {
		for _, br := range breaches {
			if !br.Late {
				return fmt.Errorf("%w: %s", ErrChecker, br.String())
			}
		}
		return fmt.Errorf("%w: %s", ErrChecker, breaches[0].String())
	}
	a.out.Plan, a.out.Late = p, late
	a.shifts()
	a.out.Finish = a.at(s.Score.Finish)
	a.out.InHand = int(a.work.Window.Closes - a.out.Finish)
	a.deadlines(s)
	if !a.bare && (explain || len(p.Steps) <= explainAll) {
		a.out.Rows = solve.Rows(a.carry, s, a.stop)
		a.out.Governing = solve.Governing(a.carry, s, a.out.Rows)
		a.lastStarts(s)
	} else {
		a.out.Rows = make([]plan.Row, len(p.Steps))
		for i := range a.out.Rows {
			a.out.Rows[i] = plan.Row{Leeway: -1, Latest: p.Steps[i].Finish}
		}
	}
	return nil
}

// leftBehind says whether something that goes along is not ready when the trip leaves (R1, R11):
// that is no lateness, the plan is none.
func (a *asked) leftBehind(s *solve.Schedule) bool {
	leaves := a.p.Open
	if t := a.work.Trip; t != nil {
		leaves = int(t.Leaves - a.p.Base)
	}
	for i := range a.carry.Acts {
		act := &a.carry.Acts[i]
		goes := len(act.Step.Works) > 0 || act.Step.Moves != "" || act.Step.Class == expand.Cure
		if act.Home && goes && act.By <= leaves && s.Finish[i] > leaves {
			return true
		}
	}
	return false
}

// shifts tells the shifts that the plan was made with.
func (a *asked) shifts() {
	a.out.Shifts = map[string]hours.Set{}
	rest := int(a.work.Job.Rest.Value)
	for i := range a.carry.People {
		p := &a.carry.People[i]
		var set []hours.Span
		for _, s := range p.Hours {
			set = append(set, hours.Span{From: s.From + a.carry.Base, To: s.To + a.carry.Base})
		}
		set = append(set, a.carry.Work.Travel[p.Name]...)
		a.out.Shifts[p.Name] = hours.NewSet(set...)
		if !p.Outside {
			a.out.Shifts[p.Name] = a.out.Shifts[p.Name].Joined(max(0, rest-1), nil)
		}
	}
}

// deadlines sets what the plan makes of each deadline.
func (a *asked) deadlines(s *solve.Schedule) {
	for _, d := range a.work.Deadlines {
		r := plan.DeadlineResult{Deadline: d, Name: "window at " + a.work.Window.Place.Name, Finish: a.out.Finish, LastStart: hours.Far}
		if d.Step != nil {
			r.Name = d.Task.Label()
			r.Finish = a.at(s.Finish[d.Step.Index])
		}
		r.InHand = int(d.By - r.Finish)
		a.out.Deadlines = append(a.out.Deadlines, r)
	}
}

// lastStarts sets the last start of each deadline's task from which its finish still lies within
// its leeway.
func (a *asked) lastStarts(s *solve.Schedule) {
	for k := range a.out.Deadlines {
		d := &a.out.Deadlines[k]
		if d.Step == nil {
			continue
		}
		i := d.Step.Index
		if l := a.out.Rows[i].Leeway; l >= 0 {
			d.LastStart = a.at(a.carry.Acts[i].Modes[s.Mode[i]].Time.Latest(s.Finish[i]+l, s.Start[i]))
		}
	}
}

// verdict says what all of it comes to.
func (a *asked) verdict() {
	switch {
	case a.out.Plan != nil && !a.out.Late:
		a.out.Verdict = plan.Fits
		a.out.Best = a.out.Finish <= a.out.Bound
		if a.out.Proof != nil { // cannot be: a checked plan and a proof against it
			a.out.Proof = nil
		}
	case a.out.Proof != nil:
		a.out.Verdict = plan.CannotFit
	default:
		a.out.Verdict = plan.Unsettled
	}
}
