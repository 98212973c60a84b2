package check

import (
	"fmt"
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// needs checks that every need of a step is filled, by different people who may (R9).
func (c *checker) needs(r *row) {
	if r.s.Absent || r.s.Class != expand.Cure && r.s.Minutes() == 0 {
		return
	}
	c.filled(r, r.p.People)
	if len(r.p.Relief) > 0 {
		c.filled(r, r.p.Relief)
	}
}

func (c *checker) filled(r *row, team []string) {
	var want []*tasks.Need
	for i := range r.s.Needs {
		for range r.s.Needs[i].Count {
			want = append(want, &r.s.Needs[i])
		}
	}
	if len(want) != len(team) {
		c.add("R9", r, fmt.Sprint(len(want)), fmt.Sprint(len(team)), "does not have as many people as it needs")
		return
	}
	for i, name := range team {
		p := c.people[name]
		switch {
		case p == nil:
			c.add("R9", r, asks(want[i]), name, "%q is nobody in the job", name)
		case slices.Contains(team[:i], name):
			c.add("R9", r, asks(want[i]), name, "%s fills two of its needs", name)
		case !fills(p.Person, want[i]):
			c.add("R9", r, asks(want[i]), name, "%s does not have what it asks for", name)
		}
	}
}

// fills says whether somebody may fill a need: named by it, with the tickets that it asks for. A
// need for anybody is for nobody from outside.
func fills(p *tasks.Person, n *tasks.Need) bool {
	if n.Who != nil && !slices.Contains(n.Who, p.Name) {
		return false
	}
	if n.Who == nil && n.Ticket.Name == "" && p.Outside {
		return false
	}
	for _, t := range append([]tasks.Ticket{n.Ticket}, n.Also...) {
		if t.Name != "" && !slices.ContainsFunc(p.Tickets, func(h tasks.Ticket) bool { return h.Covers(t) }) {
			return false
		}
	}
	return true
}

func asks(n *tasks.Need) string {
	switch {
	case n.Who != nil:
		return strings.Join(n.Who, " or ")
	case n.Ticket.Name == "":
		return "anybody"
	}
	return n.Ticket.String()
}

// use is something taken for a time: a person, so many of a kit, so much power.
type use struct {
	hours.Span
	r      *row
	who    string
	watch  bool // watches hot work, during it or after it
	amount float64
}

// sweep calls see at every minute at which a use begins, with all uses that run then.
func sweep(uses []use, see func(t hours.Minute, running []use)) {
	slices.SortStableFunc(uses, func(a, b use) int { return int(a.From - b.From) })
	var running []use
	for i, u := range uses {
		running = slices.DeleteFunc(running, func(o use) bool { return o.To <= u.From })
		if u.Len() > 0 {
			running = append(running, u)
		}
		if i+1 == len(uses) || uses[i+1].From > u.From {
			see(u.From, running)
		}
	}
}

// busy lists what everybody does: pieces by the team that works them, standing time that keeps
// people, and watches.
func (c *checker) busy() []use {
	var out []use
	for _, r := range c.list {
		if r.bad || r.s.Absent {
			continue
		}
		for i, piece := range r.p.Pieces {
			team := r.p.People
			if r.teamOf(i) == 1 {
				team = r.p.Relief
			}
			k := 0
			watch := make([]bool, len(team))
			for _, n := range r.s.Needs {
				for j := 0; j < n.Count && k < len(team); j++ {
					watch[k] = n.Watch
					k++
				}
			}
			for j, name := range team {
				out = append(out, use{piece, r, name, watch[j], 0})
			}
		}
		for _, w := range r.p.Watches {
			out = append(out, use{w.Span, r, w.Person, true, 0})
		}
	}
	return out
}

// oneThing checks that nobody does two things at once; several watches in one workface may be
// kept together (R9, R13).
func (c *checker) oneThing() {
	by := map[string][]use{}
	for _, u := range c.busy() {
		by[u.who] = append(by[u.who], u)
	}
	for _, p := range c.w.Job.People {
		told := map[[2]*row]bool{}
		sweep(by[p.Name], func(t hours.Minute, running []use) {
			for i, a := range running {
				for _, b := range running[:i] {
					together := a.watch && b.watch && a.r.s.Face != nil && a.r.s.Face == b.r.s.Face
					if together || told[[2]*row{a.r, b.r}] {
						continue
					}
					told[[2]*row{a.r, b.r}], told[[2]*row{b.r, a.r}] = true, true
					rule, text := "R9", "%s works on two steps at once"
					if a.watch || b.watch {
						rule, text = "R13", "%s keeps a fire watch and does something else"
					}
					c.add(rule, a.r, "", c.when(t, a.r.s.Place), text, p.Name).Other = b.r.s.Key()
				}
			}
		})
	}
}
