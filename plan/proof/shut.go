package proof

import (
	"fmt"

	"sailby/plan/problem"
	"sailby/tasks"
)

// excess verifies that activity i takes more of resource r than there is.
func (c *checker) excess(r, i int) error {
	if c.book.mayBeNothing(i) {
		return fmt.Errorf("activity %d need not take any time", i)
	}
	sum := 0
	for _, u := range c.p.Acts[i].Uses {
		if u.Res == r {
			sum += u.Amount
		}
	}
	if sum <= c.p.Res[r].Capacity {
		return fmt.Errorf("activity %d takes %d of resource %d, and there is %d", i, sum, r, c.p.Res[r].Capacity)
	}
	return nil
}

// shut verifies that activity i has no possible start: none in the hours of any team, or no team.
func (c *checker) shut(i int) error {
	a := &c.p.Acts[i]
	if len(a.Modes) > 0 {
		for _, w := range a.Timings() {
			if len(c.book.table(w).at) > 0 {
				return fmt.Errorf("activity %d has possible starts", i)
			}
		}
		return nil
	}
	for _, w := range a.Tried {
		if len(c.book.table(w).at) > 0 {
			return fmt.Errorf("activity %d has possible starts", i)
		}
	}
	if len(a.Tried) == 0 && (a.Step == nil || c.staffed(a)) {
		return fmt.Errorf("activity %d has people who can do it", i)
	}
	return nil
}

// staffed says whether different people can fill all of an activity's needs (augmenting paths: Kuhn 1955).
func (c *checker) staffed(a *problem.Act) bool {
	s := a.Step
	var places []*tasks.Need
	for k := range s.Needs {
		for range s.Needs[k].Count {
			places = append(places, &s.Needs[k])
		}
	}
	takes := make([]int, len(c.p.People)) // the place that each person fills, counted from 1
	var fill func(k int, tried []bool) bool
	fill = func(k int, tried []bool) bool {
		for p := range c.p.People {
			if tried[p] || !may(c.p.Work.Job.People[p], places[k]) || c.p.People[p].Shifts[s.Place].Total() == 0 {
				continue
			}
			tried[p] = true
			if takes[p] == 0 || fill(takes[p]-1, tried) {
				takes[p] = k + 1
				return true
			}
		}
		return false
	}
	for k := range places {
		if !fill(k, make([]bool, len(c.p.People))) {
			return false
		}
	}
	return true
}

// may says whether a person has what a need asks for: the name, the tickets.
func may(p *tasks.Person, n *tasks.Need) bool {
	if n.Who != nil {
		named := false
		for _, x := range n.Who {
			named = named || x == p.Name
		}
		if !named || n.Ticket.Name == "" {
			return named
		}
	}
	return p.Holds(n.Ticket) && p.HoldsAll(n.Also)
}
