package settle

import (
	"slices"
	"testing"

	"sailby/plan"
	"sailby/tasks/expand"
	"sailby/tasks/hours"

	"pgregory.net/rapid"
)

// replay is a plan taken apart into options, to move single steps of it minute by minute.
type replay struct {
	*brute
	all []*option
	own map[int]bool // links that tie a step to standing time of its own, which moves along with it
}

func newReplay(a *plan.Answer, tick int) *replay {
	r := &replay{brute: newBrute(a.Work, 30, tick), own: map[int]bool{}}
	for i, s := range a.Plan.Steps {
		o := &option{Step: s, s: a.Work.Steps[i], end: s.Finish}
		for _, w := range s.Watches {
			o.end = max(o.end, w.To)
		}
		if x, ok := r.at(o.s, choice{o.People, o.Relief}, r.index(o.Start)); ok {
			o.halts = x.halts
		}
		r.all = append(r.all, o)
	}
	for k, l := range a.Work.Links {
		r.own[k] = l.From != nil && l.From.Task == l.To.Task && l.Max == 0 && len(l.To.Needs) == 0
	}
	return r
}

// earlier says whether step i could start earlier, all others where they are, with some things
// left out for it: every minute before its start is tried, with the people that it has.
func (r *replay) earlier(i int, but without) bool {
	o := r.all[i]
	but.step = o.s
	if but.links == nil {
		but.links = map[int]bool{}
	}
	for k := range r.own {
		but.links[k] = but.links[k] || r.own[k] && r.w.Links[k].From.Index == i
	}
	r.early = but.begin
	defer func() { r.early = false }()
	for t := r.index(o.Start) - 1; t >= 0; t-- {
		for _, x := range r.tries(o, t, but.clock) {
			if (!but.calm || x.halts <= o.halts) && r.stands(i, &x, &but) {
				return true
			}
		}
	}
	return false
}

// tries gives the ways to start a step at minute t with the people that it has.
func (r *replay) tries(o *option, t int, clock bool) []option {
	if clock {
		x := *o
		x.Start = r.minute(t)
		x.Finish = x.Start + hours.Minute(o.s.Working)
		x.Pieces, x.Watches, x.end = []hours.Span{{From: x.Start, To: x.Finish}}, nil, x.Finish
		x.Shifts = nil
		return []option{x}
	}
	x, ok := r.at(o.s, choice{o.People, o.Relief}, t)
	if !ok {
		return nil
	}
	return slices.DeleteFunc(r.watched(x), func(y option) bool { // those who keep the watches are kept too
		for k := range min(len(y.Watches), len(o.Watches)) {
			if y.Watches[k].Person != o.Watches[k].Person {
				return true
			}
		}
		return false
	})
}

// stands says whether step i as x stands beside all other steps as they are planned.
func (r *replay) stands(i int, x *option, but *without) bool {
	if !but.begin && x.Start < x.s.NotBefore {
		return false
	}
	all := slices.Clone(r.all)
	all[i] = x
	for j, y := range all {
		if j != i && !r.together(x, y, but) {
			return false
		}
	}
	return r.holds(all, but)
}

// out leaves one printed cause out.
func (r *replay) out(c plan.Cause, but *without) {
	add := func(m *map[string]bool, k string) {
		if *m == nil {
			*m = map[string]bool{}
		}
		(*m)[k] = true
	}
	switch c.Kind {
	case plan.ByLink, plan.ByMaxWait:
		if but.links == nil {
			but.links = map[int]bool{}
		}
		for k := range r.w.Links {
			l := &r.w.Links[k]
			from := -1
			if l.From != nil {
				from = l.From.Index
			}
			if l.Pos == c.Pos && (l.To.Index == c.Step && from == c.Other || from == c.Step && l.To.Index == c.Other) {
				but.links[k] = true
			}
		}
	case plan.ByPerson:
		if c.Other < 0 && c.Text != c.Name+" is busy" { // not on shift
			but.clock = true
		}
		add(&but.persons, c.Name)
	case plan.ByKit:
		add(&but.kit, c.Name)
	case plan.ByRoom:
		but.room = true
	case plan.ByPower:
		but.power = true
	case plan.ByState:
		if but.apart == nil {
			but.apart = map[*expand.Step]bool{}
		}
		but.apart[r.all[c.Other].s] = true
	case plan.ByOrder:
		but.orders = true
	case plan.ByNotBefore:
		but.begin = true
	case plan.ByStart: // were the window open before, they would be there before
		but.begin, but.clock = true, true
	default:
		but.clock = true
	}
}

// first says whether a step starts at the first minute at which it could for itself.
func (r *replay) first(i int) bool {
	o := r.all[i]
	for t := r.index(o.Start) - 1; t >= 0; t-- {
		for _, x := range r.tries(o, t, false) {
			if x.Start >= x.s.NotBefore || x.s.NotBefore == r.w.Window.Opens && x.Start >= r.w.Window.Opens {
				return false
			}
		}
	}
	return true
}

// TestSetBy: whatever is printed as setting a start does. Each cause left out alone, or those
// that are printed together all at once, lets the step start earlier in the plan as it is, tried minute by
// minute; and every step has a cause.
func TestSetBy(t *testing.T) {
	checks(t, 50)
	seen := map[plan.CauseKind]int{}
	rapid.Check(t, func(rt *rapid.T) {
		grain := rapid.SampledFrom([]int{30, 10}).Draw(rt, "grain")
		s := drawSmall(rt, grain, 6)
		a := settled(rt, s)
		if a.Plan == nil || a.Late {
			return
		}
		r := newReplay(a, grain)
		for i, row := range a.Rows {
			st := r.all[i].s
			if len(row.SetBy) == 0 {
				rt.Fatalf("%s: nothing is said to set its start:%s\n%s", st.Key(), show(a.Work, a.Plan), s.yaml())
			}
			var joint without
			together := false
			for _, c := range row.SetBy {
				seen[c.Kind]++
				if c.Kind == plan.ByStart && len(row.SetBy) == 1 {
					if !r.first(i) && !r.earlier(i, without{begin: true}) {
						rt.Fatalf("%s is said to be set by the beginning (%s), but its own hours allow an earlier start:%s\n%s", st.Key(), c.Text, show(a.Work, a.Plan), s.yaml())
					}
					continue
				}
				if c.Together {
					together = true
					r.out(c, &joint)
					continue
				}
				var but without
				r.out(c, &but)
				if !r.earlier(i, but) {
					rt.Fatalf("%s is said to be set by %q (%d), but without it it starts no earlier:%s\n%s", st.Key(), c.Text, c.Kind, show(a.Work, a.Plan), s.yaml())
				}
			}
			if together && !r.earlier(i, joint) {
				rt.Fatalf("%s is said to be set by %v together, but without them it starts no earlier:%s\n%s", st.Key(), row.SetBy, show(a.Work, a.Plan), s.yaml())
			}
			if r.earlier(i, without{calm: true}) { // with more stops it may: fewer are better (R19)
				rt.Fatalf("%s could start earlier in the plan as it is:%s\n%s", st.Key(), show(a.Work, a.Plan), s.yaml())
			}
		}
	})
	t.Log(seen)
	for _, k := range []plan.CauseKind{plan.ByLink, plan.ByPerson, plan.ByHours, plan.ByNotBefore, plan.ByStart} {
		if seen[k] == 0 && !testing.Short() {
			t.Errorf("no cause of kind %d among all these plans", k)
		}
	}
}
