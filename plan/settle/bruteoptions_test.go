package settle

import (
	"fmt"
	"slices"

	"sailby/plan"
	"sailby/plan/check"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// option is one way to do one step: a start, people, and what follows from them.
type option struct {
	plan.Step
	s   *expand.Step
	end hours.Minute // its finish, fire watches included
}

// options lists every way to do a step with a start on the lattice, or, for what begins when
// another step ends, with each end of that.
func (b *brute) options(s *expand.Step) []option {
	var out []option
	starts := b.starts(s)
	for _, c := range b.choices(s) {
		for _, i := range starts {
			if o, ok := b.at(s, c, i); ok {
				out = append(out, o)
			}
		}
	}
	return out
}

func (b *brute) starts(s *expand.Step) []int {
	var out []int
	for i := 0; i < b.index(b.hi); i += b.grain {
		out = append(out, i)
	}
	for _, l := range b.w.Links {
		if l.To != s || l.From == nil || l.Max != 0 {
			continue
		}
		for _, o := range b.opts[l.From.Index] {
			if i := b.index(o.Finish); i < b.index(b.hi) {
				out = append(out, i)
			}
		}
	}
	slices.Sort(out)
	return slices.Compact(out)
}

// choice is a choice of people for a step.
type choice struct {
	team, relief []string
	keepers      []string // who keeps the watch after each stop; the last of them after all others
}

// keeper gives who keeps the watch after a stop, counted from 0.
func (c *choice) keeper(stop int) string {
	if len(c.keepers) == 0 {
		return ""
	}
	return c.keepers[min(stop, len(c.keepers)-1)]
}

// choices lists all the people that a step could be given, by R9 and R13.
func (b *brute) choices(s *expand.Step) []choice {
	if idle(s) || s.Class != expand.Hands {
		return []choice{{}}
	}
	var teams [][]string
	var fill func(team []string)
	fill = func(team []string) {
		k := 0
		for _, n := range s.Needs {
			for j := 0; j < n.Count; j++ {
				if k == len(team) {
					for _, p := range b.w.Job.People {
						if !slices.Contains(team, p.Name) && may(p, &n) && (j == 0 || p.Name > team[k-1]) {
							fill(append(slices.Clone(team), p.Name))
						}
					}
					return
				}
				k++
			}
		}
		teams = append(teams, team)
	}
	fill(nil)
	var out []choice
	for _, t := range teams {
		for _, k := range b.keepers(s, t) {
			out = append(out, choice{team: t, keepers: k})
			if !s.ChangeHands {
				continue
			}
			for _, r := range teams {
				if !slices.Equal(r, t) {
					out = append(out, choice{team: t, relief: r, keepers: k})
				}
			}
		}
	}
	return out
}

// may says whether somebody may fill a need (R9).
func may(p *tasks.Person, n *tasks.Need) bool {
	if n.Who != nil && !slices.Contains(n.Who, p.Name) || n.Who == nil && n.Ticket.Name == "" && p.Outside {
		return false
	}
	for _, t := range append([]tasks.Ticket{n.Ticket}, n.Also...) {
		if t.Name != "" && !slices.ContainsFunc(p.Tickets, func(h tasks.Ticket) bool { return h.Covers(t) }) {
			return false
		}
	}
	return true
}

// keepers lists who may keep the watches after the stops of a step, one after another: its own
// people, or anybody with the ticket (R13). From the third stop on it is the same one.
func (b *brute) keepers(s *expand.Step, team []string) [][]string {
	if s.Watch == 0 {
		return [][]string{nil}
	}
	var one []string
	for _, p := range b.w.Job.People {
		if slices.Contains(team, p.Name) || may(p, s.Watcher) {
			one = append(one, p.Name)
		}
	}
	var out [][]string
	for _, x := range one {
		for _, y := range one {
			for _, z := range one {
				out = append(out, []string{x, y, z})
			}
		}
	}
	return out
}

// idle says whether a step takes no time.
func idle(s *expand.Step) bool {
	return s.Absent || s.Class == expand.Hands && s.Working == 0 || s.Class == expand.Clock && s.Clock == 0
}

// at gives the option that starts at minute i with the people of c; ok is false where there is none.
func (b *brute) at(s *expand.Step, c choice, i int) (o option, ok bool) {
	t := b.minute(i)
	o = option{Step: plan.Step{Task: s.Task.Name, Step: s.Name, Start: t, Finish: t}, s: s, end: t}
	switch {
	case idle(s):
		return o, true
	case s.Class == expand.Clock:
		o.Finish += hours.Minute(s.Clock)
	case s.Class == expand.Cure:
		sum := 0.0
		for ; sum < 1-1e-9; o.Finish++ {
			if o.Finish > b.w.Span.To {
				return o, false
			}
			sum += s.Rate(o.Finish)
		}
	default:
		return b.hands(o, c, i)
	}
	o.Pieces, o.end = []hours.Span{{From: o.Start, To: o.Finish}}, o.Finish
	return o, true
}

// hands works out hands-on work.
func (b *brute) hands(o option, c choice, i int) (option, bool) {
	s := o.s
	lines := func(stops int) []bool {
		if c.relief == nil {
			return b.open(s, c.team, c.keeper(stops))
		}
		return b.either(s, c, c.keeper(stops))
	}
	r, ok := walk(s, lines, b.access(s, c.team), i)
	if !ok {
		return o, false
	}
	for k := len(r.stops); k < len(c.keepers); k++ {
		if c.keepers[k] != c.keepers[k-1] {
			return o, false // the same as another choice
		}
	}
	o.People, o.Relief = c.team, c.relief
	b.cut(&o, c, r)
	o.end = o.Finish
	for k, e := range r.stops {
		if s.Watch > 0 {
			o.Watches = append(o.Watches, plan.Watch{Span: hours.Span{From: b.minute(e), To: b.minute(e + s.Watch)}, Person: c.keeper(k)})
			o.end = b.minute(e + s.Watch)
		}
	}
	return o, len(r.stops) < 2 || s.Watch == 0 || b.accepted(&o)
}

// either gives the minutes in which one team or the other can work.
func (b *brute) either(s *expand.Step, c choice, keeper string) []bool {
	key := fmt.Sprint(s.Index, c.team, c.relief, keeper)
	l := b.lines[key]
	if l == nil {
		l = slices.Clone(b.open(s, c.team, keeper))
		for k, v := range b.open(s, c.relief, keeper) {
			l[k] = l[k] || v
		}
		b.lines[key] = l
	}
	return l
}

// cut makes pieces of the minutes worked, by team.
func (b *brute) cut(o *option, c choice, r run) {
	last, lastTeam, stop := -2, -1, 0
	for _, m := range r.worked {
		for stop < len(r.stops)-1 && m >= r.stops[stop] {
			stop++
		}
		team := 0
		if c.relief != nil && !b.open(o.s, c.team, c.keeper(stop))[m] {
			team = 1
		}
		if m != last+1 || team != lastTeam {
			o.Pieces = append(o.Pieces, hours.Span{From: b.minute(m), To: b.minute(m + 1)})
			if c.relief != nil {
				o.Shifts = append(o.Shifts, team)
			}
		}
		o.Pieces[len(o.Pieces)-1].To = b.minute(m + 1)
		last, lastTeam = m, team
	}
	o.Finish = b.minute(last + 1)
}

// accepted asks the checker about a step by itself: where the watch is kept by one after another
// the hours open to it change with each stop.
func (b *brute) accepted(o *option) bool {
	w := *b.w
	s := *o.s
	s.Index, s.Deadline, s.NotBefore = 0, hours.Far, hours.Never
	w.Steps, w.Links, w.Orders, w.Deadlines = []*expand.Step{&s}, nil, nil, nil
	for _, br := range check.Plan(&w, &plan.Plan{Basis: w.Basis, Steps: []plan.Step{o.Step}}) {
		if slices.Contains([]string{"R5", "R6", "R8", "R9", "R13"}, br.Rule) {
			return false
		}
	}
	return true
}
