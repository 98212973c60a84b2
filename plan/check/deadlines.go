package check

import (
	"slices"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// window checks that a step at the window's place starts and finishes in the window, its fire
// watch too (R1, R2). Missing the close is lateness.
func (c *checker) window(r *row) {
	win := c.w.Window
	if r.s.Absent || r.s.Place != win.Place {
		return
	}
	opens, closes := c.when(win.Opens, win.Place), c.when(win.Closes, win.Place)
	if r.p.Start < win.Opens {
		c.add("R2", r, opens, c.when(r.p.Start, win.Place), "starts before the window opens")
	}
	end := r.p.Finish
	if service(r.s) {
		end = r.p.Start
	}
	for _, w := range r.p.Watches {
		end = max(end, w.To)
	}
	if end > win.Closes {
		c.add("R2", r, closes, c.when(end, win.Place), "is not finished when the window closes").Late = true
	}
}

// leaving checks that work at home on what is also worked on or lifted at the site is finished
// before the trip leaves (R1), and a coat on it hard dry: it is moved then (R11).
func (c *checker) leaving(r *row) {
	leaves, done := c.away().From, r.p.Finish
	if r.s.Task.Kind == tasks.Coat && r.s.Class == expand.Hands {
		done = max(done, c.hardDry(r))
	}
	if r.s.Absent || r.s.Place == c.w.Window.Place || done <= leaves {
		return
	}
	for _, o := range c.w.Steps {
		if o.Absent || o.Place != c.w.Window.Place {
			continue
		}
		for _, a := range slices.Concat(o.Works, []string{o.Moves}) {
			if touches(r.s, a) {
				rule, text := "R1", "is not finished when %s leaves for the site"
				if r.p.Finish <= leaves {
					rule, text = "R11", "leaves %s to travel before its coat is hard dry"
				}
				c.add(rule, r, c.when(leaves, r.s.Place), c.when(done, r.s.Place), text, a).Other = o.Key()
				return
			}
		}
	}
}

// deadlines checks every time by which something must be done (R18): those of the tasks, by
// their last hands-on step or, without one, their last standing step; and those of the work.
func (c *checker) deadlines() {
	told := map[*tasks.Task]bool{}
	late := func(r *row, finish, by hours.Minute, pos tasks.Pos) {
		if finish > by && !told[r.s.Task] {
			told[r.s.Task] = true
			b := c.add("R18", r, c.when(by, r.s.Place), c.when(finish, r.s.Place), "is late by %d min", finish-by)
			b.Late, b.Pos = true, pos
		}
	}
	for _, t := range c.w.Job.Tasks {
		if t.Deadline == nil {
			continue
		}
		by, _, ok := c.w.Window.At(*t.Deadline)
		if last := c.last(t); ok && last != nil {
			late(last, last.p.Finish, by, t.Deadline.Pos)
		}
	}
	for _, d := range c.w.Deadlines {
		if r := c.rows[d.Step]; r != nil && !r.bad && !r.s.Absent {
			late(r, r.p.Finish, d.By, d.Pos)
		}
		if d.Step == nil && d.By < c.w.Window.Closes { // the close itself is R2
			c.siteBy(d, late)
		}
	}
}

// last gives the step whose finish counts for a task's deadline.
func (c *checker) last(t *tasks.Task) *row {
	var last *row
	for _, r := range c.list {
		if r.s.Task != t || r.bad || r.s.Absent || service(r.s) {
			continue
		}
		hands := r.s.Class == expand.Hands
		if last == nil || hands && last.s.Class != expand.Hands ||
			hands == (last.s.Class == expand.Hands) && r.p.Finish > last.p.Finish {
			last = r
		}
	}
	return last
}

// siteBy holds the finish of the site, fire watches included (R19), against a deadline.
func (c *checker) siteBy(d expand.Deadline, late func(*row, hours.Minute, hours.Minute, tasks.Pos)) {
	for _, r := range c.list {
		if r.bad || r.s.Absent || !r.s.Site {
			continue
		}
		end := r.p.Finish
		for _, w := range r.p.Watches {
			end = max(end, w.To)
		}
		late(r, end, d.By, d.Pos)
	}
}

// orders checks that of every order rule at least one choice holds (R17). A task that does not
// happen stands in nobody's way.
func (c *checker) orders() {
	before := func(b expand.Before) bool {
		for _, x := range b.First {
			for _, y := range b.Then {
				rx, ry := c.rows[x], c.rows[y]
				if rx == nil || ry == nil || x.Absent || y.Absent || rx.bad || ry.bad {
					continue
				}
				if rx.p.Finish > ry.p.Start {
					return false
				}
			}
		}
		return true
	}
	for _, o := range c.w.Orders {
		if len(o.Choices) > 0 && !slices.ContainsFunc(o.Choices, before) {
			c.out = append(c.out, Breach{Rule: "R17", Pos: o.Pos, Need: o.Text, Text: "none of the orders holds"})
		}
	}
}
