package check

import (
	"fmt"
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/lift"
)

// lifts checks the stages of what is lifted (R24): what hangs together when the lift ends is
// worked out anew from the plan's own order, weighed, and held against the gear; and that what
// secures a load or proves it free comes where it must.
func (c *checker) lifts() {
	for _, r := range c.list {
		t := r.s.Task
		if r.bad || r.s.Absent || r.s.Class != expand.Hands || r.s.HandsOn == 0 || t.Kind != tasks.Lift && t.Kind != tasks.Move {
			continue
		}
		c.stage(r)
		c.hooks(r)
		if l := t.Lifting; l != nil {
			if l.Proved != nil {
				c.sides(r, l.Proved, true)
			}
			if l.Secured != nil {
				c.sides(r, l.Secured, false)
			}
		}
	}
}

// hooks checks that what holds each of two hooks is taken (R24).
func (c *checker) hooks(r *row) {
	l := r.s.Task.Lifting
	if l == nil || l.Second == nil || l.Second.Kit == nil {
		return
	}
	want, have := 1, 0
	if r.s.Task.By == l.Second.Kit.Name {
		want = 2
	}
	for _, u := range r.s.Kit {
		if u.Kit == l.Second.Kit {
			have += u.Count
		}
	}
	if have < want {
		c.add("R24", r, fmt.Sprint(want), fmt.Sprint(have), "hangs on two hooks and does not take %s for both", l.Second.Kit.Name)
	}
}

// sides checks that a named task is finished before the lift, or starts after it.
func (c *checker) sides(r *row, n *tasks.Named, before bool) {
	for _, o := range c.list {
		if o.s.Task.Name != n.Name || o.bad || o.s.Absent || o.s.Class != expand.Hands {
			continue
		}
		if before && o.p.Finish > r.p.Start {
			c.add("R24", r, "after "+o.s.Key(), c.when(r.p.Start, r.s.Place), "lifts an old part before %s has proved it free", n.Name).Pos = n.Pos
		}
		if !before && o.p.Start < r.p.Finish {
			c.add("R24", r, "before "+o.s.Key(), c.when(o.p.Start, o.s.Place), "%s secures it before it is landed", n.Name).Pos = n.Pos
		}
	}
}

// stage weighs what is taken up and holds it against the gear.
func (c *checker) stage(r *row) {
	t := r.s.Task
	begun, busy := map[string]bool{}, map[string]bool{}
	for _, o := range c.list {
		if o.s.Class != expand.Hands || o.bad || o.s.Absent || o.s.Task == t {
			continue
		}
		if o.p.Start < r.p.Finish {
			begun[o.s.Task.Name] = true
		}
		if o.p.Finish > r.p.Start {
			busy[o.s.Task.Name] = true
		}
	}
	if r.s.Rigging == nil {
		return // its hours are given, and nothing says what it lifts
	}
	done := map[string]bool{}
	for name := range begun {
		done[name] = !busy[name]
	}
	pieces := c.hanging(t, begun, done)
	joined := r.s.Rigging.Among(func(u *tasks.Task) bool { return begun[u.Name] }, func(u *tasks.Task) bool { return done[u.Name] })
	j, err := r.s.Rigging.Judge(joined)
	if err != nil {
		return
	}
	if t.Lifts != "" && !slices.Equal(pieces, j.Pieces) {
		c.add("R24", r, strings.Join(pieces, ", "), strings.Join(j.Pieces, ", "), "the lift was judged for other pieces than hang on it then")
	}
	if !j.OK {
		c.add("R24", r, "at most "+j.Refused.Result.Limit.Amount(), j.Refused.Result.Figure.Amount(), "is lifted when too much hangs on it: %s", j.Refused.Result.Reason)
	}
	c.sail(r, j)
	if heavy, ok := c.weight(t, pieces); ok && j.OK {
		for _, u := range r.s.Kit {
			k := u.Kit
			single := t.Lifting == nil || t.Lifting.Second == nil
			if single && k.HasKind && k.Kind != lift.ByJack && len(k.Chart) == 0 && k.Rated.Pos.Given() && heavy > k.Rated.Value*float64(u.Count)+1e-6 {
				c.add("R24", r, fmt.Sprintf("at most %g kg", k.Rated.Value*float64(u.Count)), fmt.Sprintf("%.1f kg", heavy), "weighs more than %s is rated for", k.Name)
			}
		}
	}
	if t.Lifting != nil {
		for _, want := range t.Lifting.Stiff {
			for _, p := range c.pieces24(want.Name, c.onLater()) {
				if !slices.Contains(pieces, p) {
					c.add("R24", r, p, strings.Join(pieces, ", "), "is lifted before it is stiff enough: %s is not on", p).Pos = want.Pos
				}
			}
		}
	}
}

// partsOfOne gives the parts among names, if there are two or more and all of one assembly.
func partsOfOne(names []string) []string {
	var out []string
	of := ""
	for _, n := range names {
		a, _, single := strings.Cut(n, "/")
		if !single {
			continue
		}
		if of != "" && a != of {
			return nil
		}
		of = a
		out = append(out, n)
	}
	if len(out) < 2 {
		return nil
	}
	return out
}

// weight sums what pieces weigh by their sizes, without any allowance; ok is false where a mass
// that somebody states stands for them.
func (c *checker) weight(t *tasks.Task, pieces []string) (kg float64, ok bool) {
	if t.Mass.Pos.Given() {
		return t.Mass.Value, true
	}
	for _, a := range c.w.Job.Assemblies {
		var parts []lift.Part
		for _, p := range a.Parts {
			if slices.Contains(pieces, a.Name+"/"+p.Name) {
				parts = append(parts, p.Part)
			}
		}
		switch {
		case slices.Contains(pieces, a.Name):
			kg += a.Mass.Value
		case len(parts) == 0:
		case a.Mass.Pos.Given():
			return 0, false
		default:
			m, err := lift.Mass(parts)
			if err != nil {
				return 0, false
			}
			kg += m.Mass
		}
	}
	return kg, kg > 0
}

// landed gives the uses of kit by loads that are landed and not secured yet (R24): from the start of
// the lift to the end of what secures it, beside what the lift and that task use themselves.
func (c *checker) landed(by map[*tasks.Kit][]use) {
	for _, r := range c.list {
		l := r.s.Task.Lifting
		if r.bad || r.s.Absent || l == nil || l.Secured == nil || r.s.Class != expand.Hands {
			continue
		}
		var until hours.Minute
		var last *row
		for _, o := range c.list {
			if o.s.Task.Name == l.Secured.Name && !o.bad && !o.s.Absent && o.s.Class != expand.Cure && o.p.Finish >= until {
				until, last = o.p.Finish, o
			}
		}
		if last == nil || until <= r.p.Start {
			continue
		}
		for _, u := range r.s.Kit {
			list := slices.DeleteFunc(by[u.Kit], func(x use) bool { return x.r == r })
			span := hours.Span{From: r.p.Start, To: until}
			for i := range list { // what secures it works with what is kept
				if list[i].r.s.Task.Name == l.Secured.Name && list[i].Overlaps(span) {
					list[i].amount = max(0, list[i].amount-float64(u.Count))
				}
			}
			by[u.Kit] = append(list, use{Span: span, r: r, amount: float64(u.Count)})
		}
	}
}
