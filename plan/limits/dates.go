package limits

import (
	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// dates lists the dates that hold the steps: not before, the window, deadlines.
func (l *lister) dates() {
	w := l.w
	for _, s := range l.steps {
		if at, ok := l.moment(s.Task.NotBefore); ok && s.NotBefore == at {
			l.add(plan.Limit{Kind: plan.LimitNotBefore, Step: s}, s.Task.NotBefore.Pos, func(c *slice) {
				q := c.steps[s]
				if q.NotBefore = hours.Never; q.Site && !c.early {
					q.NotBefore = w.Window.Opens
				}
			}, "%s not before %s", Name(s), When(at, s.Place))
		}
	}
	if j := w.Job; j.Begin != nil && l.any(func(s *expand.Step) bool { return !s.Site }) {
		if at, ok := l.moment(j.Begin); ok {
			l.add(plan.Limit{Kind: plan.LimitBegin}, j.Begin.Pos, func(c *slice) {
				c.work.Span.From = min(c.work.Span.From, w.Window.Opens-beforehand)
			}, "work at home begins %s", at.In(j.Zone).Format("Mon 2 Jan 15:04"))
		}
	}
	if l.any(func(s *expand.Step) bool { return s.Site }) {
		l.window()
	}
	leaves := w.Window.Opens
	if w.Trip != nil {
		leaves = w.Trip.Leaves
	}
	if l.any(func(s *expand.Step) bool { return !s.Site }) {
		text, pos := "the window opens %s: until then there is time for work at home", w.Window.Pos
		if w.Trip != nil {
			text, pos = "the trip leaves %s", w.Trip.Keys.At("out", pos)
		}
		l.add(plan.Limit{Kind: plan.LimitLeaves}, pos, func(c *slice) {
			c.home = true
			for _, s := range l.steps {
				if by, _, own := l.ownDeadline(s); !s.Site && c.steps[s].Deadline == leaves && (!own || by >= leaves) {
					if c.steps[s].Deadline = hours.Far; own {
						c.steps[s].Deadline = by
					}
				}
			}
		}, text, leaves.In(w.Job.Zone).Format("Mon 2 Jan 15:04"))
	}
	for _, s := range l.steps {
		if by, pos, own := l.ownDeadline(s); own {
			l.add(plan.Limit{Kind: plan.LimitDeadline, Step: s}, pos, func(c *slice) { c.deadline(s, by, leaves) }, "%s must be finished by %s", Name(s), When(by, s.Place))
		}
	}
}

// beforehand is how long before the window work at home may begin once `begin` is taken away: 14 days
// is what holds without it, and as much again.
const beforehand = 28 * 1440

// window lists its two ends.
func (l *lister) window() {
	w := l.w
	what, keys := "the window at "+w.Window.Place.Name, tasks.Keys(nil)
	opens, closes := "opens", "closes"
	switch {
	case w.Trip != nil:
		what, keys = "the window of trip "+w.Trip.Name, w.Trip.Keys
		opens, closes = "out", "back"
	case w.Job.Window != nil:
		keys = w.Job.Window.Keys
	}
	l.add(plan.Limit{Kind: plan.LimitOpens}, keys.At(opens, w.Window.Pos), func(c *slice) {
		c.early = true
		for _, q := range c.work.Steps {
			if q.Site && q.NotBefore == w.Window.Opens {
				q.NotBefore = hours.Never
			}
		}
	}, "%s opens %s", what, When(w.Window.Opens, w.Window.Place))
	l.add(plan.Limit{Kind: plan.LimitCloses}, keys.At(closes, w.Window.Pos), func(c *slice) {
		c.late = true
		for _, s := range l.steps {
			if by, _, own := l.ownDeadline(s); s.Site && (!own || by >= w.Window.Closes) && c.steps[s].Deadline == w.Window.Closes {
				if c.steps[s].Deadline = hours.Far; own {
					c.steps[s].Deadline = by
				}
			}
		}
	}, "%s closes %s", what, When(w.Window.Closes, w.Window.Place))
}

// deadline takes the own deadline of a step away: at the site the window's close is left, unless that is taken
// away too, and of what travels the time of leaving.
func (s *slice) deadline(st *expand.Step, by, leaves hours.Minute) {
	q := s.steps[st]
	switch {
	case q.Deadline != by:
	case st.Site && !s.late:
		q.Deadline = s.work.Window.Closes
	case !st.Site && !s.home && travels(s.work, q):
		q.Deadline = leaves
	default:
		q.Deadline = hours.Far
	}
}

// travels says whether a step at home is on something that is worked on or moved at the site.
func travels(w *expand.Work, s *expand.Step) bool {
	for _, o := range w.Steps {
		for _, a := range append(append([]string(nil), o.Works...), o.Moves) {
			if o.Site && a != "" && has(append(append([]string(nil), s.Works...), s.Moves), a) {
				return true
			}
		}
	}
	return false
}

// ownDeadline gives the deadline that the job file gives the task of a step, if the step is the one that it holds for.
func (l *lister) ownDeadline(s *expand.Step) (hours.Minute, tasks.Pos, bool) {
	for _, d := range l.w.Deadlines {
		if d.Step == s && d.Task != nil {
			return d.By, d.Pos, true
		}
	}
	return 0, tasks.Pos{}, false
}

// links lists the waits between the steps: what comes before what with the least wait, and the longest.
func (l *lister) links() {
	for i := range l.w.Links {
		k := &l.w.Links[i]
		if !l.in[k.To] || k.From != nil && !l.in[k.From] {
			continue
		}
		pos := k.Pos
		if !pos.Given() {
			pos = k.To.Task.Pos
		}
		if k.Max < expand.NoMax || k.MaxCure != nil {
			l.add(plan.Limit{Kind: plan.LimitMaxWait, Link: k}, pos, func(c *slice) {
				if q := c.link(l.w, k); q != nil {
					q.Max, q.MaxCure = expand.NoMax, nil
				}
			}, "%s", maxText(k))
		}
		if k.Min > expand.NoMin {
			l.add(plan.Limit{Kind: plan.LimitMinWait, Link: k}, pos, func(c *slice) {
				if q := c.link(l.w, k); q != nil {
					q.Min = expand.NoMin
				}
			}, "%s", minText(k))
		}
	}
}

// follows says whether a link ties a step to the step before it in the same task.
func follows(k *expand.Link) bool { return k.From != nil && k.From.Task == k.To.Task && k.Max == 0 }

func minText(k *expand.Link) string {
	switch {
	case follows(k):
		return Name(k.To) + " comes after " + Name(k.From)
	case k.Min > 0:
		return Name(k.To) + ": " + k.Why + ", at least " + span(k.Min) + working(k.Working)
	}
	return Name(k.To) + ": " + k.Why
}

func maxText(k *expand.Link) string {
	switch {
	case k.MaxCure != nil:
		return Name(k.To) + ": " + k.Why + ", no later than the longest wait allowed"
	case follows(k):
		return Name(k.To) + " begins when " + Name(k.From) + " ends"
	case k.Max == 0:
		return Name(k.To) + ": " + k.Why + ", at once"
	}
	return Name(k.To) + ": " + k.Why + ", at most " + span(k.Max) + working(k.MaxWorking)
}

func working(yes bool) string {
	if yes {
		return " of opening hours"
	}
	return ""
}

// link finds the copy of a link.
func (s *slice) link(w *expand.Work, k *expand.Link) *expand.Link {
	n := 0 // which of the links that the slice has
	for i := range w.Links {
		l := &w.Links[i]
		if s.steps[l.To] == nil || l.From != nil && s.steps[l.From] == nil {
			continue
		}
		if l == k {
			return &s.work.Links[n]
		}
		n++
	}
	return nil
}
