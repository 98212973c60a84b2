package check

import (
	"cmp"
	"math"
	"slices"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// basis checks that the plan answers the question asked: window (R2), hours and maybes (R3).
func (c *checker) basis() {
	w, asked, have := c.w, c.w.Basis, c.plan.Basis
	trip := c.trip(asked.Trip)
	if c.trip(have.Trip) != trip {
		c.add("R2", nil, asked.Trip, have.Trip, "the plan is for another trip")
	}
	if tripName(trip) != tripName(w.Trip) || (trip == nil) != (w.Trip == nil) {
		c.add("R2", nil, asked.Trip, tripName(w.Trip), "the work is written out for another trip")
	}
	if trip != nil && w.Trip != nil && trip.Name == w.Trip.Name {
		opens, closes := trip.Opens, trip.Closes
		if n := len(trip.Out); n > 0 {
			opens = trip.Out[n-1].To
		}
		if len(trip.Back) > 0 {
			closes = trip.Back[0].From
		}
		if opens != w.Window.Opens || closes != w.Window.Closes || w.Window.Place != trip.Place {
			c.add("R2", nil, c.when(opens, trip.Place)+" to "+c.when(closes, trip.Place),
				c.when(w.Window.Opens, nil)+" to "+c.when(w.Window.Closes, nil), "the window is not the trip's")
		}
	}
	if asked.End != have.End || asked.Maybes != have.Maybes {
		c.add("R3", nil, asked.End.String(), have.End.String(), "the plan is for other hours, or other maybes")
	}
}

// trip gives the trip named, else the one booked, else the first; nil for a plain window.
func (c *checker) trip(name string) *tasks.Trip {
	var pick *tasks.Trip
	for _, t := range c.w.Job.Trips {
		switch {
		case name != "" && t.Name == name:
			return t
		case name == "" && (pick == nil || t.Booked && !pick.Booked):
			pick = t
		}
	}
	return pick
}

func tripName(t *tasks.Trip) string {
	if t == nil {
		return ""
	}
	return t.Name
}

// match joins the work's steps with the plan's, by name.
func (c *checker) match() {
	type key struct{ task, step string }
	planned := map[key]plan.Step{}
	for _, p := range c.plan.Steps {
		k := key{p.Task, p.Step}
		if _, twice := planned[k]; twice {
			c.out = append(c.out, Breach{Rule: "R4", Step: p.Task + " / " + p.Step, Text: "is planned twice"})
		}
		planned[k] = p
	}
	for _, s := range c.w.Steps {
		r := &row{s: s}
		c.list = append(c.list, r)
		c.rows[s] = r
		k := key{s.Task.Name, s.Name}
		p, ok := planned[k]
		delete(planned, k)
		r.p = p
		r.p.Watches = slices.Clone(p.Watches)
		slices.SortStableFunc(r.p.Watches, func(a, b plan.Watch) int { return cmp.Compare(a.From, b.From) })
		switch {
		case !ok:
			r.bad = true
			c.add("R4", r, "", "", "is not in the plan")
		case s.Place == nil || s.Place.Zone == nil:
			r.bad = true
			c.add("R1", r, "", "", "has no place")
		case !r.bad && !s.Absent && s.Place == c.w.Window.Place && !service(s):
			late := p.Finish
			for _, w := range p.Watches {
				late = max(late, w.To)
			}
			c.carried = c.carried || late > c.w.Window.Closes
		}
	}
	for _, p := range c.plan.Steps { // in the plan's order
		if _, left := planned[key{p.Task, p.Step}]; left {
			delete(planned, key{p.Task, p.Step})
			c.out = append(c.out, Breach{Rule: "R4", Step: p.Task + " / " + p.Step, Text: "is no step of the job"})
		}
	}
}

// service says whether a step is the standing time that ends in service: it may run on past the
// window (R2, R11).
func service(s *expand.Step) bool {
	return s.Class == expand.Cure && (s.Name == "service" || s.Name == "cured")
}

// keeps says whether a step is standing time that keeps people: clock time, no face factor.
func keeps(s *expand.Step) bool {
	return len(s.Task.Keeps) > 0 && (s.Name == s.Task.Why || s.Name == "standing")
}

// shape checks what makes a row readable: start, finish and pieces agree (R4), and that a task
// that does not happen takes nothing (R16).
func (c *checker) shape(r *row) {
	s, p := r.s, &r.p
	if r.bad {
		return
	}
	bad := func(rule, text string) {
		r.bad = true
		c.add(rule, r, c.when(p.Start, s.Place), c.when(p.Finish, s.Place), "%s", text)
	}
	if s.Absent {
		if p.Start != p.Finish || len(p.Pieces)+len(p.People)+len(p.Relief)+len(p.Watches) > 0 {
			bad("R16", "does not happen on this basis, but takes time or people")
		}
		return
	}
	if p.Finish < p.Start || p.Start < c.lo || p.Finish-p.Start > longest {
		bad("R4", "its start and finish are not in order, or out of all proportion")
		return
	}
	if s.Class == expand.Hands && s.Place.FaceFactor.Value > 0 && s.HandsOn > 0 && !keeps(s) {
		exact := float64(s.HandsOn) / s.Place.FaceFactor.Value
		if s.Working < int(math.Ceil(exact-1e-6)) || s.Working > int(math.Ceil(exact+1e-6)) {
			c.add("R4", r, mins(int(math.Ceil(exact))), mins(s.Working), "its working minutes are not its hands-on minutes over the face factor, rounded up")
		}
	}
	if s.Class != expand.Cure && s.Minutes() == 0 {
		if p.Start != p.Finish || len(p.Pieces)+len(p.Watches) > 0 {
			bad("R4", "has no minutes, but takes time")
		}
		return
	}
	if len(p.Pieces) == 0 && p.Start == p.Finish && s.Class == expand.Cure {
		return
	}
	at := p.Start
	for i, piece := range p.Pieces {
		if piece.Len() == 0 || piece.From < at || i == 0 && piece.From != at {
			bad("R4", "its pieces are empty, out of order, or do not begin at its start")
			return
		}
		at = piece.To
	}
	switch {
	case len(p.Pieces) == 0 || at != p.Finish:
		bad("R4", "its last piece does not end at its finish")
	case s.Class != expand.Hands && len(p.Pieces) != 1:
		bad("R4", "is standing time, and has pauses")
	case s.Class == expand.Clock && int(p.Finish-p.Start) != s.Clock:
		c.add("R4", r, mins(s.Clock), mins(int(p.Finish-p.Start)), "its standing time is not kept")
	case p.Shifts != nil && len(p.Shifts) != len(p.Pieces):
		bad("R4", "does not say for every piece which team works it")
	}
}
