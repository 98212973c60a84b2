package expand

import (
	"fmt"
	"sort"
	"strings"

	"sailby/tasks"
)

// Where the order of joining tasks about a lift is open, every order is tried (R24): each of n tasks is before the
// lift or after it, 2^n stages. From those that are not allowed the rules follow: a rule forbids a set of "this one
// before, that one after" that is not allowed whatever the others do, and of which nothing can be left out (the prime
// implicants). Together the rules forbid just the orders that are not allowed. Cost: O(2^n) stages, O(n 3^n) look-ups.

// mostOpen bounds n. What is beyond it is told in a note, and the checker judges what a plan makes of it.
const mostOpen = 12

// stageOf makes the rules for one lift.
func (x *expander) stageOf(s *Step) {
	r := s.Rigging
	sure, open := x.split(s)
	now, err := r.Judge(sure)
	if err != nil {
		return // the estimate has told
	}
	if len(open) > mostOpen {
		open = r.relevant(sure, open)
	}
	must, ok := x.stiffen(s, sure, open)
	if !ok {
		return
	}
	if heaviest, err := r.Judge(onto(sure, open, false)); err == nil && heaviest.OK && now.OK && r.byMassAlone() {
		return // what carries all of it carries less
	}
	if len(open) > mostOpen {
		x.cutShort(s, open)
		open = open[:mostOpen]
	}
	t := r.try(sure, open)
	if t.allBad() {
		best := t.judged[len(t.judged)-1]
		for _, j := range t.judged {
			if j.Load.Mass < best.Load.Mass {
				best = j
			}
		}
		x.refuse(s, best, "")
		return
	}
	for _, f := range t.forbidden() {
		if len(must) == 1 && len(f.before) == 1 && len(f.after) == 0 && must[open[f.before[0]].Task] {
			x.refuse(s, f.judged, fmt.Sprintf(" with %s on, without which it is too floppy", open[f.before[0]].Task.Label()))
			return
		}
		x.forbid(s, open, f)
	}
}

// onto gives the tasks sure to be done with those of the open ones that only join, or only take off.
func onto(sure, open []Join, off bool) []Join {
	out := sure[:len(sure):len(sure)]
	for _, j := range open {
		if j.Off == off {
			out = append(out, j)
		}
	}
	return out
}

// cutShort tells that not every order is tried.
func (x *expander) cutShort(s *Step, open []Join) {
	x.late = append(x.late, tasks.Note{Pos: s.Task.Pos, Text: fmt.Sprintf("%s: %d joining tasks may come before or after it; only the orders of the first %d are tried for whether it is allowed. Settle the others by `after`", s.Task.Label(), len(open), mostOpen)})
}

// table is every order of the open tasks about a lift: bit i of a place says that task i is before it.
type table struct {
	n      int
	bad    []bool
	judged []Judgement // of each place
}

// try judges every order.
func (r *Rigging) try(sure, open []Join) table {
	t := table{n: len(open), bad: make([]bool, 1<<len(open)), judged: make([]Judgement, 1<<len(open))}
	known := map[string]Judgement{}
	for set := range t.bad {
		some := sure[:len(sure):len(sure)]
		for i, j := range open {
			if set>>i&1 == 1 {
				some = append(some, j)
			}
		}
		key := strings.Join(r.Pieces(some), "\n")
		j, ok := known[key]
		if !ok {
			var err error
			if j, err = r.Judge(some); err != nil {
				j.OK = true // not known: the lift sheet asks
			}
			known[key] = j
		}
		t.judged[set], t.bad[set] = j, !j.OK
	}
	return t
}

func (t table) allBad() bool {
	for _, b := range t.bad {
		if !b {
			return false
		}
	}
	return true
}

// forbidden is one rule: not all of before are before the lift while all of after are after it.
type forbidden struct {
	before, after []int
	judged        Judgement
}

// forbidden gives the rules, those with the fewest tasks first, then in the order of the file. A partial order is a
// number in base three: digit i is 0 for after, 1 for before, 2 for either.
func (t table) forbidden() []forbidden {
	size, pow := 1, make([]int, t.n+1)
	for i := range pow {
		pow[i] = size
		size *= 3
	}
	bad := make([]bool, pow[t.n])
	var out []forbidden
	for p := range bad {
		set, free := 0, -1
		for i := range t.n {
			switch p / pow[i] % 3 {
			case 1:
				set |= 1 << i
			case 2:
				free = i
			}
		}
		if free < 0 {
			bad[p] = t.bad[set]
		} else {
			bad[p] = bad[p-pow[free]] && bad[p-2*pow[free]]
		}
	}
	for p := range bad {
		if !bad[p] {
			continue
		}
		f, set, least := forbidden{}, 0, true
		for i := range t.n {
			d := p / pow[i] % 3
			switch d {
			case 0:
				f.after = append(f.after, i)
			case 1:
				f.before, set = append(f.before, i), set|1<<i
			}
			least = least && (d == 2 || !bad[p+(2-d)*pow[i]])
		}
		if least {
			f.judged = t.judged[set]
			out = append(out, f)
		}
	}
	sort.SliceStable(out, func(i, k int) bool {
		return len(out[i].before)+len(out[i].after) < len(out[k].before)+len(out[k].after)
	})
	return out
}

// forbid writes one rule out as an order (R17): one of those that must not be before comes after, or one of those that
// must not be after comes before.
func (x *expander) forbid(s *Step, open []Join, f forbidden) {
	out := Order{Pos: s.Task.Pos, Made: true}
	var late, early []string
	for _, i := range f.before {
		late = append(late, open[i].Task.Label())
		out.Choices = append(out.Choices, Before{First: []*Step{s}, Then: x.handsOf(open[i].Task)})
	}
	for _, i := range f.after {
		early = append(early, open[i].Task.Label())
		out.Choices = append(out.Choices, Before{First: x.handsOf(open[i].Task), Then: []*Step{s}})
	}
	name, why := s.Task.Label(), f.judged.Refused.Result.Reason
	switch {
	case len(early) == 0:
		out.Text = fmt.Sprintf("%s before %s: with that on, %s", name, strings.Join(late, " or "), why)
	case len(late) == 0:
		out.Text = fmt.Sprintf("%s before %s: without that, %s", strings.Join(early, " or "), name, why)
	default:
		out.Text = fmt.Sprintf("%s before %s, or %s before that: else %s", name, strings.Join(late, " or "), strings.Join(early, " or "), why)
	}
	x.w.Orders = append(x.w.Orders, out)
}

// byMassAlone says whether more on the hook is never easier: no lugs or second hook whose share
// hangs on where the centre of gravity is.
func (r *Rigging) byMassAlone() bool {
	l := r.lifting()
	return l.Second == nil && (l.Slings == nil || len(l.Slings.Lugs) == 0)
}

// relevant leaves out the tasks that by themselves change nothing about what is lifted.
func (r *Rigging) relevant(sure, open []Join) []Join {
	var out []Join
	same := func(a, b []Join) bool { return strings.Join(r.Pieces(a), "\n") == strings.Join(r.Pieces(b), "\n") }
	all := append(sure[:len(sure):len(sure)], open...)
	for i, j := range open {
		rest := append(sure[:len(sure):len(sure)], open[:i]...)
		rest = append(rest, open[i+1:]...)
		alone := append(sure[:len(sure):len(sure)], j)
		if !same(rest, all) || !same(alone, sure) {
			out = append(out, j)
		}
	}
	return out
}

// offAndOn wants it settled whether a thing comes on before or after a task takes it off: what a lift takes up hangs
// on it.
func (x *expander) offAndOn() {
	for _, off := range x.w.Job.Tasks {
		for _, thing := range off.TakesOff {
			for _, on := range x.w.Job.Tasks {
				if on == off || x.absent[on] || x.absent[off] || !names(on.Joins, thing.Name) || x.stager.before(on, off) || x.stager.before(off, on) {
					continue
				}
				x.fault(thing.Pos, fmt.Sprintf("write `after: %s` on %q, or `after: %s` on %q", on.Name, off.Name, off.Name, on.Name),
					"task %q takes off %q and %q joins it: nothing says which comes first", off.Name, thing.Name, on.Name)
			}
		}
	}
}
