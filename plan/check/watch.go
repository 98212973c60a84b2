package check

import (
	"slices"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/hours"
)

// anyWatch says whether anybody who may keep the step's fire watch could stay it out: hot work
// goes on only while that is so.
func (c *checker) anyWatch(r *row, watch hours.Span) bool {
	for _, p := range c.w.Job.People {
		if !p.Outside && r.mayWatch(c.people[p.Name], plan.Watch{Span: watch, Person: p.Name}) && c.canWatch(r, c.people[p.Name], watch) {
			return true
		}
	}
	return false
}

// canWatch says whether somebody is on shift at the place through a watch, meals apart, with the
// workface in reach (R13).
func (c *checker) canWatch(r *row, p *person, watch hours.Span) bool {
	if p == nil {
		return true // reported by watches
	}
	f, faced := c.faces[r.s.Face]
	for t := watch.From; t < watch.To; t++ {
		if !p.here[r.s.Place].has(t) || !p.stay[r.s.Place].has(t) || faced && f.limited && !f.reach.has(t) {
			return false
		}
	}
	return true
}

// watches checks that somebody who may stays the fire watch out after every piece that ends in a
// stop, and after the last (R13).
func (c *checker) watches(r *row) {
	due := map[hours.Minute]bool{}
	for i, piece := range r.p.Pieces {
		if r.watch == 0 {
			break
		}
		if i+1 == len(r.p.Pieces) || !r.isMeal(hours.Span{From: piece.To, To: r.p.Pieces[i+1].From}) {
			due[piece.To] = true
		}
	}
	kept := map[hours.Minute]bool{}
	for _, w := range r.p.Watches {
		switch p := c.people[w.Person]; {
		case !due[w.From]:
			c.add("R13", r, "", c.when(w.From, r.s.Place), "a fire watch is kept where no piece ends in a stop")
		case w.Len() < r.watch:
			c.add("R13", r, mins(r.watch), mins(w.Len()), "its fire watch is too short")
		case p == nil || !r.mayWatch(p, w):
			c.add("R13", r, "somebody of its own or with the ticket fire watch", w.Person, "%s may not keep its fire watch", w.Person)
		case !c.canWatch(r, p, w.Span):
			c.add("R13", r, mins(r.watch), c.when(w.From, r.s.Place), "%s cannot stay the fire watch out: shift or reach ends before", w.Person)
		}
		kept[w.From] = true
	}
	for _, piece := range r.p.Pieces {
		if due[piece.To] && !kept[piece.To] {
			c.add("R13", r, mins(r.watch), c.when(piece.To, r.s.Place), "nobody keeps the fire watch after a piece")
		}
	}
}

// mayWatch says whether somebody is of the step's own people or has the ticket.
func (r *row) mayWatch(p *person, w plan.Watch) bool {
	if slices.Contains(r.p.People, w.Person) || slices.Contains(r.p.Relief, w.Person) {
		return true
	}
	need := r.s.Watcher
	if need == nil {
		need = &tasks.Need{Ticket: tasks.Ticket{Name: "fire watch"}}
	}
	return fills(p.Person, need)
}
