// Package limits names the limits of a job in the job's own words, each with its place in the job
// file, and finds out which of them a contradiction needs: every one is taken away by itself and the rest is asked
// again. Minutes as in package expand; nothing here is changed in the work that is asked about.
package limits

import (
	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// slice is a copy of a part of a work: some of its steps and links, whose limits can be taken away.
type slice struct {
	work  *expand.Work
	steps map[*expand.Step]*expand.Step // the work's own to the copy
	place map[*tasks.Place]*tasks.Place
	face  map[*tasks.Workface]*tasks.Workface
	kit   map[*tasks.Kit]*tasks.Kit
	after []func(p *problem.Problem) // taken away once the copy is compiled
	late  bool                       // the window does not close
	early bool                       // it is open from the start
	home  bool                       // people may work at home while the trip is away
}

// cut copies a part of a work: the steps in it, and the links and order rules between those.
func cut(w *expand.Work, in func(*expand.Step) bool) *slice {
	c, job := *w, *w.Job
	c.Job = &job
	s := &slice{work: &c, steps: map[*expand.Step]*expand.Step{}, place: map[*tasks.Place]*tasks.Place{}, face: map[*tasks.Workface]*tasks.Workface{}, kit: map[*tasks.Kit]*tasks.Kit{}}
	s.places()
	s.things()
	known := map[*tasks.Task]*tasks.Task{}
	c.Steps = nil
	for _, st := range w.Steps {
		if in(st) {
			s.step(st, known)
		}
	}
	c.Links = nil
	for _, l := range w.Links {
		to, from := s.steps[l.To], s.steps[l.From]
		if to == nil || l.From != nil && from == nil {
			continue
		}
		l.From, l.To = from, to
		c.Links = append(c.Links, l)
	}
	s.orders(w)
	return s
}

func (s *slice) places() {
	job := s.work.Job
	list := job.Places
	job.Places = nil
	for _, p := range list {
		q := *p
		q.Workfaces = nil
		for _, f := range p.Workfaces {
			g := *f
			g.Place = &q
			s.face[f] = &g
			q.Workfaces = append(q.Workfaces, &g)
		}
		q.Permits = append([]tasks.Permit(nil), p.Permits...)
		s.place[p] = &q
		job.Places = append(job.Places, &q)
	}
	s.work.Window.Place = s.place[s.work.Window.Place]
}

func (s *slice) things() {
	job := s.work.Job
	kit, people := job.Kit, job.People
	job.Kit, job.People = nil, nil
	for _, k := range kit {
		q := *k
		if k.At != nil {
			q.At = s.place[k.At]
		}
		s.kit[k] = &q
		job.Kit = append(job.Kit, &q)
	}
	for _, p := range people {
		q := *p
		job.People = append(job.People, &q)
	}
}

func (s *slice) step(st *expand.Step, known map[*tasks.Task]*tasks.Task) {
	q := *st
	t := known[st.Task]
	if t == nil {
		c := *st.Task
		c.Place, c.Face = s.place[c.Place], s.face[c.Face]
		t = &c
		known[st.Task] = t
	}
	q.Task, q.Place, q.Face, q.Index = t, s.place[st.Place], s.face[st.Face], len(s.work.Steps)
	q.Needs = append([]tasks.Need(nil), st.Needs...)
	q.Kit = append([]expand.Use(nil), st.Kit...)
	for i := range q.Kit {
		q.Kit[i].Kit = s.kit[q.Kit[i].Kit]
	}
	s.steps[st] = &q
	s.work.Steps = append(s.work.Steps, &q)
}

// orders keeps the order rules all of whose steps are in the slice.
func (s *slice) orders(w *expand.Work) {
	s.work.Orders = nil
	for _, o := range w.Orders {
		whole := true
		list := func(in []*expand.Step) []*expand.Step {
			out := make([]*expand.Step, len(in))
			for i, st := range in {
				out[i] = s.steps[st]
				whole = whole && out[i] != nil
			}
			return out
		}
		c := o
		c.Choices = nil
		for _, b := range o.Choices {
			c.Choices = append(c.Choices, expand.Before{First: list(b.First), Then: list(b.Then)})
		}
		if whole {
			s.work.Orders = append(s.work.Orders, c)
		}
	}
}

// compile makes the problem of what is left.
func (s *slice) compile() *problem.Problem {
	w := s.work
	w.Settle()
	if s.late || s.early || s.home {
		s.open()
	}
	p := problem.Compile(w)
	if s.late {
		p.Close = p.End
	}
	for _, f := range s.after {
		f(p)
	}
	return p
}

// open lets everybody who goes to the site be there before the window opens, or after it closes,
// as long as they are there at all.
func (s *slice) open() {
	w := s.work
	for _, p := range w.Job.People {
		goes := false
		for _, st := range w.Presence[p.Name] {
			goes = goes || st.Site
		}
		if p.Outside || !goes {
			continue
		}
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
		add := func(from, to hours.Minute, site bool) {
			if from, to = max(from, there.From), min(to, there.To); from < to {
				w.Presence[p.Name] = append(w.Presence[p.Name], expand.Stay{Span: hours.Span{From: from, To: to}, Site: site})
			}
		}
		var legs []hours.Span
		for _, l := range w.Travel[p.Name] {
			out := l.From < w.Window.Opens
			if !s.home && (out && !s.early || !out && !s.late) {
				legs = append(legs, l)
			}
		}
		w.Travel[p.Name] = legs
		if s.early {
			add(w.Span.From, w.Window.Opens, true)
		}
		if s.late {
			add(w.Window.Closes, w.Span.To, true)
		}
		if s.home {
			add(w.Span.From, w.Span.To, false)
		}
	}
}
