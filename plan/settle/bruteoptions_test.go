package settle

import (
	"slices"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// option is one way to do one step: a start, people, and what follows from them.
type option struct {
	plan.Step
	s   *expand.Step
	end hours.Minute // its finish, fire watches included

	stops []int // after which a fire watch is kept, minutes of the span
	halts int   // how many stops it has, its finish counted
}

// options lists every way to do a step with a start on the lattice, or, for what begins when
// another step ends, with each end of that.
func (b *brute) options(s *expand.Step) []option {
	var out []option
	starts := b.starts(s)
	for _, c := range b.choices(s) {
		for _, i := range starts {
			if o, ok := b.at(s, c, i); ok {
				out = append(out, b.watched(o)...)
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
type choice struct{ team, relief []string }

// choices lists all the people that a step could be given (R9).
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
		out = append(out, choice{team: t})
		for _, r := range teams {
			if s.ChangeHands && !slices.Equal(r, t) {
				out = append(out, choice{team: t, relief: r})
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

// hands works out hands-on work, fire watches left open.
func (b *brute) hands(o option, c choice, i int) (option, bool) {
	s := o.s
	r, ok := walk(s, b.open(s, c.team, c.relief), b.access(s, c.team), i)
	if !ok {
		return o, false
	}
	o.People, o.Relief = c.team, c.relief
	last, lastTeam := -2, -1
	for _, m := range r.worked {
		team := 0
		if c.relief != nil && !b.first(s, c.team, c.relief)[m] {
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
	o.end = o.Finish
	o.halts = len(r.stops)
	if s.Watch > 0 {
		o.stops = r.stops
	}
	return o, true
}

// watched gives an option with everybody who may keep each of its fire watches: its own people,
// or anybody with the ticket (R13).
func (b *brute) watched(o option) []option {
	out := []option{o}
	for _, e := range o.stops {
		var next []option
		for _, x := range out {
			for _, p := range b.w.Job.People {
				if p.Outside || !slices.Contains(o.People, p.Name) && !slices.Contains(o.Relief, p.Name) && !may(p, o.s.Watcher) {
					continue
				}
				l := b.stays(o.s, o.People, o.Relief, p.Name)
				if up := (e + b.tick - 1) / b.tick * b.tick; up >= len(l) || !l[e] || !l[up] {
					continue
				}
				y := x
				y.end = b.minute(e + o.s.Watch)
				y.Watches = append(slices.Clone(x.Watches), plan.Watch{Span: hours.Span{From: b.minute(e), To: y.end}, Person: p.Name})
				next = append(next, y)
			}
		}
		out = next
	}
	return out
}
