package check

import (
	"fmt"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// links checks the waits between ends of steps (R10), the last moment for a recoat (R11), and the
// order through tasks that do not happen (R16).
func (c *checker) links() {
	for i := range c.w.Links {
		l := &c.w.Links[i]
		from, to := c.rows[l.From], c.rows[l.To]
		if to == nil || to.bad || l.From != nil && (from == nil || from.bad) {
			continue
		}
		c.link(l, from, to)
	}
	for _, r := range c.list {
		if m := r.s.Task.NotBefore; m != nil && !r.bad && !r.s.Absent {
			if at, _, ok := c.w.Window.At(*m); ok && r.p.Start < at {
				c.add("R10", r, c.when(at, r.s.Place), c.when(r.p.Start, r.s.Place), "starts before the time that it must wait for").Pos = m.Pos
			}
		}
	}
}

func (c *checker) link(l *expand.Link, from, to *row) {
	a, b := c.span.From, to.end(l.ToEnd)
	if from != nil {
		a = from.end(l.FromEnd)
	}
	tell := func(rule, need, format string) {
		b := c.add(rule, to, need, fmt.Sprintf("%s to %s", c.when(a, to.s.Place), c.when(b, to.s.Place)), format, l.Why)
		b.Pos = l.Pos
		if from != nil {
			b.Other = from.s.Key()
		}
	}
	if from != nil && from.s.Absent || to.s.Absent {
		if l.Min > expand.NoMin && b < a {
			tell("R16", "the same order", "%s: comes before what it follows, through a task that does not happen")
		}
		return
	}
	passed := func(working bool) int {
		if working {
			return c.working(to.s.Place, a, b)
		}
		return int(b - a)
	}
	if l.Min > expand.NoMin && (passed(l.Working) < l.Min || l.Min >= 0 && b < a) {
		tell("R10", "at least "+wait(l.Min, l.Working), "%s: comes too early")
	}
	if l.Max < expand.NoMax && passed(l.MaxWorking) > l.Max {
		tell("R10", "at most "+wait(l.Max, l.MaxWorking), "%s: comes too late")
	}
	if l.MaxCure != nil && b > l.MaxCure.Last(a) {
		tell("R11", "at the latest "+c.when(l.MaxCure.Last(a), to.s.Place), "%s: comes when the coat below has hardened too far")
	}
}

func (r *row) end(e tasks.LinkEnd) hours.Minute {
	if e == tasks.Start {
		return r.p.Start
	}
	return r.p.Finish
}

// working counts the working minutes of a place between two moments, workfaces and people left out.
func (c *checker) working(at *tasks.Place, from, to hours.Minute) int {
	n := 0
	for t := max(from, c.lo); t < min(to, c.hi); t++ {
		if c.places[at].work.has(t) {
			n++
		}
	}
	return n
}

func wait(n int, working bool) string {
	if working {
		return fmt.Sprintf("%d working min", n)
	}
	return mins(n)
}

func share(v float64) string { return fmt.Sprintf("%.6f", v) }
