package expand

import (
	"fmt"
	"strings"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
)

// stages looks at every lift at every stage that the order of the work leaves open (R24): a lift
// that no order allows is a fault; where only some orders allow it, they become a rule (R17).
func (x *expander) stages() {
	x.offAndOn()
	for _, s := range x.w.Steps {
		if s.Rigging == nil || s.Absent || s.HandsOn == 0 {
			continue
		}
		x.stageOf(s)
		x.keepGear(s)
	}
}

// split gives the joining tasks that are surely done before a lift, and those that may be.
func (x *expander) split(s *Step) (sure, open []Join) {
	for _, j := range s.Rigging.Joins {
		first, done := x.first[j.Task][0], x.first[j.Task][0]
		if list := x.handsOf(j.Task); j.Off && len(list) > 0 {
			done = list[len(list)-1]
		}
		switch {
		case x.ahead(done, s):
			sure = append(sure, j)
		case x.ahead(s, first):
		default:
			open = append(open, j)
		}
	}
	return sure, open
}

// stiffen makes the rules for what must be on before the lift; must names the tasks that can put
// it on where there is no choice but them. ok is false where nothing does.
func (x *expander) stiffen(s *Step, sure, open []Join) (must map[*tasks.Task]bool, ok bool) {
	if s.Task.Lifting == nil {
		return nil, true
	}
	for _, want := range s.Task.Lifting.Stiff {
		on := func(joined []Join) bool {
			have := map[string]bool{}
			for _, p := range s.Rigging.Pieces(joined) {
				have[p] = true
			}
			for _, p := range x.stager.pieces(want.Name) {
				if !have[p] {
					return false
				}
			}
			return true
		}
		if on(sure) {
			continue
		}
		out := Order{Pos: want.Pos, Made: true}
		var names []string
		tasksOf := map[*tasks.Task]bool{}
		for i := range open {
			rest := append(append([]Join(nil), sure...), open[:i]...)
			rest = append(rest, open[i+1:]...)
			all := append(append([]Join(nil), sure...), open...)
			if on(append(append([]Join(nil), sure...), open[i])) || on(all) && !on(rest) {
				names = append(names, open[i].Task.Label())
				tasksOf[open[i].Task] = true
				out.Choices = append(out.Choices, Before{First: x.handsOf(open[i].Task), Then: []*Step{s}})
			}
		}
		if len(names) == 0 {
			x.fault(want.Pos, "put the task that joins it before the lift, or leave it out of `stiff with`", "task %q: %q must be on before it is lifted, and no task joins it before", s.Task.Name, want.Name)
			return nil, false
		}
		out.Text = fmt.Sprintf("%s before %s: too floppy without %s", strings.Join(names, " or "), s.Task.Label(), want.Name)
		x.w.Orders = append(x.w.Orders, out)
		must = tasksOf
	}
	return must, true
}

// refuse tells that a lift is not allowed, with the number that fails and what would do.
func (x *expander) refuse(s *Step, j Judgement, when string) {
	x.fault(s.Task.Pos, j.Hint(), "task %q: not allowed%s: %s", s.Task.Name, when, j.Refused.Result.Reason)
}

// keepGear holds the gear of a load that is landed but not secured (R24): no other task uses more
// than is left from the lift to the end of the task that secures it.
func (x *expander) keepGear(s *Step) {
	l := s.Task.Lifting
	if l == nil || l.Secured == nil {
		return
	}
	by := x.byName[l.Secured.Name]
	if by == nil || x.absent[by] || len(x.first[by]) == 0 {
		return
	}
	end := x.first[by]
	last := end[len(end)-1]
	if last.Class == Cure {
		last = x.lastHands(by)
	}
	for _, u := range s.Kit {
		var others []*Step
		for _, o := range x.w.Steps {
			if o != s && o.Task != by && !o.Absent && usesOf(o, u.Kit) > 0 {
				others = append(others, o)
			}
		}
		x.keep(s, last, u, others)
	}
}

// keep makes a rule for every pair, or triple, of uses that is too much with what is kept: two of
// them do not overlap, or one is before the lift or after what secures it.
func (x *expander) keep(s, last *Step, u Use, others []*Step) {
	free := u.Kit.Count - u.Count
	rule := func(list ...*Step) {
		out := Order{Pos: s.Task.Lifting.Secured.Pos, Made: true,
			Text: fmt.Sprintf("%s is kept on %s until %s is done", u.Kit.Name, s.Task.Label(), last.Task.Label())}
		for i, a := range list {
			out.Choices = append(out.Choices, Before{First: []*Step{a}, Then: []*Step{s}}, Before{First: []*Step{last}, Then: []*Step{a}})
			for _, b := range list[i+1:] {
				out.Choices = append(out.Choices, Before{First: []*Step{a}, Then: []*Step{b}}, Before{First: []*Step{b}, Then: []*Step{a}})
			}
		}
		for _, c := range out.Choices {
			if x.ahead(c.First[0], c.Then[0]) {
				return // holds anyway
			}
		}
		x.w.Orders = append(x.w.Orders, out)
	}
	n := func(o *Step) int { return usesOf(o, u.Kit) }
	for i, a := range others {
		if n(a) > free {
			rule(a)
			continue
		}
		for k, b := range others[i+1:] {
			switch {
			case n(b) > free:
			case n(a)+n(b) > free:
				rule(a, b)
			default:
				for _, c := range others[i+k+2:] {
					if n(c) <= free && n(a)+n(c) <= free && n(b)+n(c) <= free && n(a)+n(b)+n(c) > free {
						rule(a, b, c)
					}
				}
			}
		}
	}
}

func usesOf(s *Step, k *tasks.Kit) int {
	n := 0
	for _, u := range s.Kit {
		if u.Kit == k {
			n += u.Count
		}
	}
	return n
}

// ahead says whether a is surely finished before b starts: by links, or because a belongs before
// the trip and b after it.
func (x *expander) ahead(a, b *Step) bool {
	if a.Deadline != hours.Far && b.NotBefore != hours.Never && a.Deadline <= b.NotBefore {
		return true
	}
	if x.after == nil {
		x.after = map[*Step][]*Step{}
		for _, l := range x.w.Links {
			if l.From != nil && l.Min >= 0 && l.FromEnd == tasks.Finish && l.ToEnd == tasks.Start {
				x.after[l.From] = append(x.after[l.From], l.To)
			}
		}
	}
	seen := map[*Step]bool{a: true}
	for list := []*Step{a}; len(list) > 0; {
		s := list[0]
		list = list[1:]
		for _, next := range x.after[s] {
			if next == b {
				return true
			}
			if !seen[next] {
				seen[next] = true
				list = append(list, next)
			}
		}
	}
	return false
}

// freeNote says how far an old part is pulled by the task that proves it free.
func freeNote(t *tasks.Task, cutOff origin.Figure) string {
	return fmt.Sprintf("%s: stop pulling at %s; what does not move by then is not free", t.Label(), cutOff.Amount())
}
