package limits

import (
	"sort"
	"strings"
	"time"

	"sailby/plan"
	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// people lists what limits the people who may work on the steps, or must be there beside them.
func (l *lister) people() {
	for i, p := range l.w.Job.People {
		p := p
		works := l.any(func(s *expand.Step) bool { return l.mayWork(s, p) })
		near := l.any(func(s *expand.Step) bool { return s.Lone && !p.Outside })
		if !works && !near {
			continue
		}
		if works {
			l.add(plan.Limit{Kind: plan.LimitPerson, Person: p}, p.Pos, afterwards(func(q *problem.Problem, _ *slice) { multiply(q, i) }), "%s does one thing at a time", p.Name)
		}
		l.hoursOf(i, p)
	}
	if l.any(func(s *expand.Step) bool { return len(s.Needs) > 0 }) {
		job := l.w.Job
		pos := job.Duty.Pos
		if !pos.Given() {
			pos = job.Rest.Pos
		}
		l.add(plan.Limit{Kind: plan.LimitRest}, pos, func(c *slice) {
			c.work.Job.Duty.Value, c.work.Job.Rest.Value = 1e6, 0
		}, "no shift is longer than %s, and %s of rest lie between two (R15)", span(int(job.Duty.Value)), span(int(job.Rest.Value)))
	}
}

func (l *lister) mayWork(s *expand.Step, p *tasks.Person) bool {
	for i := range s.Needs {
		if problem.CanFill(p, &s.Needs[i]) {
			return true
		}
	}
	return s.Watch > 0 && s.Watcher != nil && p.Holds(s.Watcher.Ticket)
}

// hoursOf lists when a person is there at all.
func (l *lister) hoursOf(i int, p *tasks.Person) {
	person := func(c *slice) *tasks.Person { return c.work.Job.People[i] }
	of := func(k plan.LimitKind) plan.Limit { return plan.Limit{Kind: k, Person: p} }
	zone := l.w.Window.Place
	if p.Hours != nil {
		l.add(of(plan.LimitPersonHours), p.Keys.At("hours", p.Pos), func(c *slice) { person(c).Hours = nil }, "%s works %s", p.Name, p.Hours)
	}
	if len(p.Off) > 0 {
		var days []string
		for d := range p.Off {
			days = append(days, d.String())
		}
		sort.Strings(days)
		l.add(of(plan.LimitPersonOff), p.Keys.At("off", p.Pos), func(c *slice) { person(c).Off = nil }, "%s is off on %s", p.Name, strings.Join(days, ", "))
	}
	if at, ok := l.moment(p.From); ok {
		l.add(of(plan.LimitPersonFrom), p.From.Pos, func(c *slice) { person(c).From = nil }, "%s is there from %s", p.Name, When(at, zone))
	}
	if at, ok := l.moment(p.Until); ok {
		l.add(of(plan.LimitPersonUntil), p.Until.Pos, func(c *slice) { person(c).Until = nil }, "%s is there until %s", p.Name, When(at, zone))
	}
	if p.Outside {
		l.add(of(plan.LimitBooked), p.Keys.At("booked", p.Pos), func(c *slice) {
			far := tasks.Slot{From: absolute(c.work.Span.From), To: absolute(c.work.Span.To)}
			person(c).Booked = []tasks.Slot{far}
		}, "%s is there only %s", p.Name, slots(l.w.Window.Slots(p.Booked), zone))
	} else if len(p.Places) > 0 {
		l.add(of(plan.LimitPersonPlaces), p.Keys.At("places", p.Pos), func(c *slice) { person(c).Places = nil }, "%s works only at %s", p.Name, strings.Join(p.Places, ", "))
	}
}

// absolute is a moment that is a minute.
func absolute(m hours.Minute) tasks.Moment {
	t := m.In(time.UTC)
	return tasks.Moment{Date: hours.DateOf(t), Minute: t.Hour()*60 + t.Minute(), Zone: time.UTC}
}

func (l *lister) moment(m *tasks.Moment) (hours.Minute, bool) {
	if m == nil {
		return 0, false
	}
	at, _, ok := l.w.Window.At(*m)
	return at, ok
}

// multiply gives every activity a person who is like person i, so that i is in nobody's way.
func multiply(p *problem.Problem, i int) {
	swap := func(list []int, by int) []int {
		out := append([]int(nil), list...)
		for k := range out {
			if out[k] == i {
				out[k] = by
			}
		}
		return out
	}
	for k := range p.Acts {
		a := &p.Acts[k]
		by, made := len(p.People), false
		modes := append([]problem.Mode(nil), a.Modes...)
		for m := range modes {
			for _, list := range []*[]int{&modes[m].Crew, &modes[m].Relief, &modes[m].Keepers} {
				if *list != nil {
					next := swap(*list, by)
					made = made || !equal(next, *list)
					*list = next
				}
			}
		}
		if made {
			a.Modes = modes
			p.People = append(p.People, p.People[i])
		}
	}
}

func equal(a, b []int) bool {
	for i := range a {
		if a[i] != b[i] {
			return false
		}
	}
	return len(a) == len(b)
}
