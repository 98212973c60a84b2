package expand

import (
	"fmt"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/weld"
)

// How far ahead of leaving home work may begin where the job file does not say, and how far
// past the window the hours are laid out for a plan that is late, in days (a longer window is
// laid out twice over).
const (
	HomeDays = 14
	PastDays = 21
)

// Expand writes a job out for one basis. The faults are those that only estimates and the
// choice of a window show; with any, the work is nil.
func Expand(job *tasks.Job, b Basis) (*Work, tasks.Faults) {
	x, f := begun(job, b)
	if f != nil {
		return nil, tasks.Faults{*f}
	}
	w := x.w
	x.links()
	x.mend()
	x.holds()
	x.hotOverCoats()
	x.homeward()
	x.orders()
	x.stages()
	x.winds()
	x.deadlines()
	x.power()
	if len(x.faults) > 0 {
		return nil, x.faults.Sorted()
	}
	for i, s := range w.Steps {
		s.Index = i
	}
	x.tins()
	x.notes()
	return w, nil
}

// Hours works out the hours of every task and no more: no links, deadlines or stages. The work is nil where no
// window can be chosen; otherwise steps with a fault have no minutes. It is for telling faults.
func Hours(job *tasks.Job, b Basis) (*Work, tasks.Faults) {
	x, f := begun(job, b)
	if f != nil {
		return nil, tasks.Faults{*f}
	}
	return x.w, x.faults.Sorted()
}

// begun chooses the window and makes the steps of every task.
func begun(job *tasks.Job, b Basis) (*expander, *tasks.Fault) {
	w := &Work{Job: job, Basis: b}
	if f := w.choose(b.Trip); f != nil {
		return nil, f
	}
	w.lay()
	x := &expander{w: w, first: map[*tasks.Task][]*Step{}, absent: map[*tasks.Task]bool{}, states: map[string]*Step{}, welded: map[*tasks.Task]weld.Estimate{}, stager: newStager(job, w.Window.Place)}
	x.maybes()
	for _, t := range job.Tasks {
		x.task(t)
	}
	return x, nil
}

// expander holds what is needed while tasks become steps.
type expander struct {
	w      *Work
	faults tasks.Faults
	first  map[*tasks.Task][]*Step // all steps of a task, in order
	absent map[*tasks.Task]bool
	states map[string]*Step // "task / state" to the step whose finish is that state
	byName map[string]*tasks.Task
	welded map[*tasks.Task]weld.Estimate
	stager *stager
	late   []tasks.Note      // told when all is written out
	after  map[*Step][]*Step // steps that surely come after one, by links; made when first asked
}

func (x *expander) fault(pos tasks.Pos, hint, format string, args ...any) {
	x.faults = append(x.faults, tasks.Fault{Pos: pos, Text: fmt.Sprintf(format, args...), Hint: hint})
}

// choose picks the window (R2).
func (w *Work) choose(name string) *tasks.Fault {
	job := w.Job
	if job.Window != nil {
		if name != "" {
			return &tasks.Fault{Pos: job.Window.Pos, Text: fmt.Sprintf("trip %q: the job has a plain window and no trips", name), Hint: "leave the trip's name out"}
		}
		w.Window = Window{Place: job.Window.Place, Opens: job.Window.Opens, Closes: job.Window.Closes, Pos: job.Window.Pos}
		return nil
	}
	var pick *tasks.Trip
	var names string
	for _, t := range job.Trips {
		names += fmt.Sprintf(" %q", t.Name)
		if name == t.Name || name == "" && (pick == nil || t.Booked && !pick.Booked) {
			pick = t
		}
	}
	if pick == nil {
		return &tasks.Fault{Pos: job.Pos, Text: fmt.Sprintf("there is no trip %q", name), Hint: "the trips are:" + names}
	}
	w.Trip = pick
	w.Window = Window{Place: pick.Place, Opens: pick.Opens, Closes: pick.Closes, Pos: pick.Pos}
	return nil
}

// lay sets the span planned over, and who is where (R1).
func (w *Work) lay() {
	leaves := w.Window.Opens
	if w.Trip != nil {
		leaves = w.Trip.Leaves
	}
	begin, _ := hours.Instant(hours.DateOf(leaves.In(w.Job.Zone)).Add(-HomeDays), 0, w.Job.Zone)
	if w.Job.Begin != nil {
		if at, _, ok := w.Window.At(*w.Job.Begin); ok {
			begin = min(at, leaves)
		}
	}
	end := w.Window.Closes
	if w.Trip != nil {
		end = w.Trip.Home
	}
	past := max(PastDays*1440, w.Window.Closes-w.Window.Opens)
	w.Span = hours.Span{From: begin, To: end + past}
	w.Presence, w.Travel = map[string][]Stay{}, map[string][]hours.Span{}
	for _, p := range w.Job.People {
		if !p.Outside {
			w.stays(p)
		}
	}
}

// stays lays out where one person is (R1).
func (w *Work) stays(p *tasks.Person) {
	there := w.Span
	if p.From != nil {
		if at, _, ok := w.Window.At(*p.From); ok {
			there.From = max(there.From, at)
		}
	}
	if p.Until != nil {
		if at, _, ok := w.Window.At(*p.Until); ok {
			there.To = min(there.To, at)
		}
	}
	site := w.Window.Place.Name
	goes := len(p.Places) == 0 || has(p.Places, site)
	add := func(from, to hours.Minute, atSite bool) {
		from, to = max(from, there.From), min(to, there.To)
		if from < to {
			w.Presence[p.Name] = append(w.Presence[p.Name], Stay{hours.Span{From: from, To: to}, atSite})
		}
	}
	closes := w.Window.Closes
	if w.Carried {
		closes = w.Span.To
	}
	switch t := w.Trip; {
	case t == nil && goes:
		add(w.Span.From, w.Window.Opens, false)
		add(w.Window.Opens, closes, true)
		add(closes, w.Span.To, false)
	case t == nil || !goes || t.People != nil && !has(t.People, p.Name):
		add(w.Span.From, w.Span.To, false)
	default:
		own := there.From >= t.Arrives // comes by their own means
		if !own {
			add(w.Span.From, t.Leaves, false)
		}
		add(t.Arrives, closes, true) // unloading included: for those who come later it is no leg, but duty (R15)
		if !w.Carried {
			add(t.Home, w.Span.To, false)
		}
		if !own {
			w.legs(p.Name, t.Out)
		}
		if there.To > t.Departs {
			w.legs(p.Name, t.Back)
		}
	}
}

func (w *Work) legs(name string, legs []tasks.Leg) {
	for _, l := range legs {
		w.Travel[name] = append(w.Travel[name], hours.Span{From: l.From, To: l.To})
	}
}

// Carry gives the same work with everybody's stay at the site carried on past the window, for
// the plan that is shown where deadlines cannot be met (R18).
func (w *Work) Carry() *Work {
	c := *w
	c.Carried = true
	c.Settle()
	return &c
}

// Settle works out anew where everybody is, after people or the trip have been changed.
func (w *Work) Settle() {
	w.Presence, w.Travel = map[string][]Stay{}, map[string][]hours.Span{}
	for _, p := range w.Job.People {
		if !p.Outside {
			w.stays(p)
		}
	}
}

// Remain gives the carried work in which nobody goes home either: the legs back are left out, as
// they are for those who stay until the work is done.
func (w *Work) Remain() *Work {
	if w.Trip == nil {
		return w.Carry()
	}
	c, trip := *w, *w.Trip
	trip.Back, trip.Departs = nil, w.Span.To
	c.Trip = &trip
	return c.Carry()
}

func has(list []string, word string) bool {
	for _, v := range list {
		if v == word {
			return true
		}
	}
	return false
}

// maybes settles which tasks do not happen (R16).
func (x *expander) maybes() {
	x.byName = map[string]*tasks.Task{}
	groups := map[string]*tasks.Task{}
	for _, t := range x.w.Job.Tasks {
		x.byName[t.Name] = t
		if t.Group != "" {
			best := groups[t.Group]
			better := best == nil || t.Chance > best.Chance
			if x.w.Basis.Maybes && best != nil {
				better = x.roughly(t) > x.roughly(best)
			}
			if better {
				groups[t.Group] = t
			}
		}
	}
	for _, t := range x.w.Job.Tasks {
		switch {
		case t.Group != "":
			x.absent[t] = groups[t.Group] != t
		case t.Maybe():
			x.absent[t] = !x.w.Basis.Maybes
		}
	}
}

// roughly gives the hands-on minutes that a task takes, to find the longest of a group.
func (x *expander) roughly(t *tasks.Task) float64 {
	sum := x.pick(t.Standing)
	hands := []hands{}
	if t.Kind == tasks.Coat && !t.Hours.Pos.Given() && !t.ManHours.Pos.Given() {
		for k, name := range t.Coats {
			if p := x.paint(name); p != nil {
				hands = append(hands, x.coatHours(t, p, k))
			}
		}
	} else {
		hands = append(hands, x.estimate(t))
	}
	for _, h := range hands {
		sum += x.pick(tasks.Range{Range: h.minutes})
	}
	return sum
}

// pick takes the basis's value out of a range, in minutes.
func (x *expander) pick(r tasks.Range) float64 {
	switch x.w.Basis.End {
	case Low:
		return r.Low
	case High:
		return r.High
	}
	return r.Likely
}
