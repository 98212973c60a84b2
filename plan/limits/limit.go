package limits

import (
	"fmt"
	"strings"
	"time"

	"sailby/plan"
	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// Limit is one limit that can be taken away.
type Limit struct {
	plan.Limit
	Text    string
	Minutes int // the length that the text tells, 0 where it tells none
	Pos     tasks.Pos
	take    func(s *slice)
}

// lister collects the limits of some steps.
type lister struct {
	w     *expand.Work
	steps []*expand.Step
	in    map[*expand.Step]bool
	out   []Limit
}

// list gives every limit that bears on the steps, in the order in which they are tried to be left out: what
// is rare and of no help to the reader first, what the sum is made of last.
func list(w *expand.Work, in func(*expand.Step) bool) []Limit {
	l := &lister{w: w, in: map[*expand.Step]bool{}}
	for _, s := range w.Steps {
		if in(s) {
			l.steps = append(l.steps, s)
			l.in[s] = true
		}
	}
	l.orders()
	l.clashes()
	l.resources()
	for _, s := range l.steps {
		l.manner(s)
	}
	l.people()
	l.places()
	l.dates()
	l.links()
	for _, s := range l.steps {
		l.length(s)
	}
	return l.out
}

func (l *lister) add(k plan.Limit, pos tasks.Pos, take func(s *slice), format string, args ...any) {
	l.out = append(l.out, Limit{Limit: k, Text: fmt.Sprintf(format, args...), Pos: pos, take: take})
}

// afterwards takes something away from the compiled problem.
func afterwards(f func(p *problem.Problem, s *slice)) func(s *slice) {
	return func(s *slice) { s.after = append(s.after, func(p *problem.Problem) { f(p, s) }) }
}

// Name names a step: its task, and which step of it unless that is plain.
func Name(s *expand.Step) string {
	if s.Name == string(s.Task.Kind) {
		return fmt.Sprintf("%q", s.Task.Label())
	}
	return fmt.Sprintf("%q (%s)", s.Task.Label(), s.Name)
}

// Length says how long a step takes, and of what.
func Length(s *expand.Step) string {
	switch s.Class {
	case expand.Hands:
		return span(s.Working+s.SetUp) + " of working time"
	case expand.Clock:
		return span(s.Clock) + " standing"
	}
	return span(s.Estimate.Range[1]) + " drying"
}

func span(minutes int) string { return quantity.Hours(minutes) }

// When writes a minute on the clock of a place.
func When(m hours.Minute, p *tasks.Place) string { return m.In(p.Zone).Format("Mon 2 Jan 15:04") }

func (l *lister) length(s *expand.Step) {
	k := plan.Limit{Kind: plan.LimitLength, Step: s}
	if s.Class != expand.Hands {
		k.Kind = plan.LimitStanding
	}
	if s.Absent || s.Class != expand.Cure && s.Minutes() == 0 {
		return
	}
	l.add(k, lengthPos(s), func(c *slice) {
		q := c.steps[s]
		q.Working, q.Clock, q.SetUp, q.LeastPiece, q.SafeStop, q.Watch = 0, 0, 0, 0, 0, 0
		if q.Class == expand.Cure {
			q.Class = expand.Clock
		}
		if q.Class == expand.Clock {
			q.Needs = nil
		}
	}, "%s: %s", Name(s), Length(s))
	l.out[len(l.out)-1].Minutes = s.Minutes() + s.SetUp
}

func lengthPos(s *expand.Step) tasks.Pos {
	t := s.Task
	if s.Class == expand.Hands {
		return t.Keys.At("hours", t.Keys.At("man-hours", t.Pos))
	}
	return t.Keys.At("standing", t.Pos)
}

func (l *lister) orders() {
	for _, o := range l.w.Orders {
		pos, text := o.Pos, o.Text
		l.add(plan.Limit{Kind: plan.LimitOrder}, pos, func(c *slice) {
			for i := range c.work.Orders {
				if c.work.Orders[i].Pos == pos && c.work.Orders[i].Text == text {
					c.work.Orders = append(c.work.Orders[:i:i], c.work.Orders[i+1:]...)
					return
				}
			}
		}, "%s", text)
	}
}

// clashes lists the pairs that may not be at once.
func (l *lister) clashes() {
	s := cut(l.w, func(st *expand.Step) bool { return l.in[st] })
	back := map[*expand.Step]*expand.Step{}
	for own, copy := range s.steps {
		back[copy] = own
	}
	bare := *s.work // pairs need no calendars
	bare.Links, bare.Job.People = nil, nil
	p := problem.Pairs(&bare)
	for _, pr := range p {
		a, b, why := back[bare.Steps[pr.A]], back[bare.Steps[pr.B]], pr.Why
		l.add(plan.Limit{Kind: plan.LimitClash, Step: a, Other: b}, a.Task.Pos, afterwards(func(p *problem.Problem, c *slice) {
			for i := range p.Pairs {
				if p.Acts[p.Pairs[i].A].Step == c.steps[a] && p.Acts[p.Pairs[i].B].Step == c.steps[b] {
					p.Pairs = append(p.Pairs[:i:i], p.Pairs[i+1:]...)
					return
				}
			}
		}), "%s and %s not at once: %s", Name(a), Name(b), why)
	}
}

// resources lists the kit, the room and the power that the steps use.
func (l *lister) resources() {
	free := func(kind problem.ResourceKind, name string) func(*slice) {
		return afterwards(func(p *problem.Problem, _ *slice) {
			for i := range p.Res {
				if p.Res[i].Kind == kind && p.Res[i].Name == name {
					p.Res[i].Capacity, p.Res[i].Taken = askedOf(p, i), nil
				}
			}
		})
	}
	for _, k := range l.w.Job.Kit {
		if l.any(func(s *expand.Step) bool { return uses(s, k) }) {
			l.add(plan.Limit{Kind: plan.LimitKit, Kit: k}, k.Keys.At("count", k.Pos), free(problem.Kit, k.Name), "there is %d of %s", k.Count, k.Name)
		}
	}
	for _, p := range l.w.Job.Places {
		for _, f := range p.Workfaces {
			if f.People > 0 && l.any(func(s *expand.Step) bool { return s.Face == f }) {
				name := p.Name + "/" + f.Name
				l.add(plan.Limit{Kind: plan.LimitRoom, Face: f, Place: p}, f.Keys.At("people", f.Pos), free(problem.Room, name), "room for %d at %s", f.People, name)
			}
		}
		if kva, limited := problem.Supply(l.w, p); limited && l.any(func(s *expand.Step) bool { return s.Place == p && s.Power > 0 }) {
			l.add(plan.Limit{Kind: plan.LimitPower, Place: p}, l.powerPos(p), free(problem.Power, "power at "+p.Name), "power at %s: %g kVA", p.Name, kva)
		}
	}
}

// askedOf is what all activities together ask of a resource, watches included.
func askedOf(p *problem.Problem, r int) int {
	n := 1
	for i := range p.Acts {
		for _, u := range p.Acts[i].Uses {
			if u.Res == r {
				n += u.Amount
			}
		}
		if p.Acts[i].WatchRoom == r+1 {
			n++
		}
	}
	return n
}

// powerPos is where the power of a place stands: its mains, else the first generator there.
func (l *lister) powerPos(p *tasks.Place) tasks.Pos {
	if p.Mains.Pos.Given() {
		return p.Mains.Pos
	}
	for _, k := range l.w.Job.Kit {
		if k.Gives > 0 && (k.At == p || k.At == nil && p == l.w.Window.Place) {
			return k.Keys.At("gives", k.Pos)
		}
	}
	return p.Pos
}

func (l *lister) any(f func(*expand.Step) bool) bool {
	for _, s := range l.steps {
		if !s.Absent && f(s) {
			return true
		}
	}
	return false
}

func uses(s *expand.Step, k *tasks.Kit) bool {
	for _, u := range s.Kit {
		if u.Kit == k {
			return true
		}
	}
	return false
}

// manner lists how a step must be done: in company, watched, in one go, by whom.
func (l *lister) manner(s *expand.Step) {
	if s.Absent || s.Class != expand.Hands || s.Working == 0 {
		return
	}
	if s.Lone {
		l.add(plan.Limit{Kind: plan.LimitLone, Step: s}, s.Task.Pos, func(c *slice) { c.steps[s].Lone = false }, "%s is not done alone (R14)", Name(s))
	}
	if s.Watch > 0 {
		l.add(plan.Limit{Kind: plan.LimitWatch, Step: s}, s.Task.Keys.At("fire watch", s.Place.Keys.At("fire watch", s.Task.Pos)), func(c *slice) {
			q := c.steps[s]
			q.Watch, q.Watcher = 0, nil
			for i := range q.Needs {
				if q.Needs[i].Watch {
					q.Room -= q.Needs[i].Count
					q.Needs[i].Count = 0
				}
			}
		}, "%s is watched while it is worked and for %s after it (R13)", Name(s), span(s.Watch))
	}
	if s.InOneGo {
		l.add(plan.Limit{Kind: plan.LimitInOneGo, Step: s}, s.Task.Keys.At("in one go", s.Task.Pos), func(c *slice) { c.steps[s].InOneGo = false }, "%s goes in one go", Name(s))
	}
	for i := range s.Needs {
		n := &s.Needs[i]
		if who := l.fillers(n); len(who) < len(l.w.Job.People) {
			l.add(plan.Limit{Kind: plan.LimitNeed, Step: s, Need: n}, n.Pos, func(c *slice) {
				q := &c.steps[s].Needs[i]
				if l.outside(who) { // nobody of the crew takes the place of one from outside
					q.Count = 0
				}
				q.Who, q.Ticket, q.Also = nil, tasks.Ticket{}, nil
			}, "%s", needText(s, n, who))
			if !n.Pos.Given() {
				l.out[len(l.out)-1].Pos = s.Task.Pos
			}
		}
	}
}

func (l *lister) fillers(n *tasks.Need) []string {
	var out []string
	for _, p := range l.w.Job.People {
		if problem.CanFill(p, n) {
			out = append(out, p.Name)
		}
	}
	return out
}

// outside says whether somebody of these is from outside.
func (l *lister) outside(who []string) bool {
	for _, p := range l.w.Job.People {
		if p.Outside && has(who, p.Name) {
			return true
		}
	}
	return false
}

func needText(s *expand.Step, n *tasks.Need, who []string) string {
	what := fmt.Sprintf("%s needs %s", Name(s), problem.NeedName(n))
	if n.Count > 1 {
		what = fmt.Sprintf("%s needs %d x %s", Name(s), n.Count, problem.NeedName(n))
	}
	switch {
	case n.Who != nil:
		return what
	case n.Ticket.Name == "":
		return what + " from the crew"
	case len(who) == 0:
		return what + ", and nobody has that ticket"
	}
	return what + ": " + names(who, "has", "have") + " that ticket"
}

// names joins names, with the verb that fits their number.
func names(who []string, one, many string) string {
	if len(who) == 1 {
		return "only " + who[0] + " " + one
	}
	return "only " + strings.Join(who[:len(who)-1], ", ") + " and " + who[len(who)-1] + " " + many
}

// slots writes spans on a place's clock, the first few of them.
func slots(set hours.Set, p *tasks.Place) string {
	const most = 4
	var out []string
	for i, s := range set {
		if i == most && len(set) > most+1 {
			out = append(out, fmt.Sprintf("and %d more", len(set)-most))
			break
		}
		from, to := s.From.In(p.Zone), s.To.In(p.Zone)
		end := to.Format("15:04")
		if !sameDay(from, to) {
			end = to.Format("Mon 2 Jan 15:04")
		}
		out = append(out, from.Format("Mon 2 Jan 15:04")+"-"+end)
	}
	return strings.Join(out, ", ")
}

func sameDay(a, b time.Time) bool { return a.YearDay() == b.YearDay() && a.Year() == b.Year() }
