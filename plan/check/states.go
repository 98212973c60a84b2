package check

import (
	"fmt"
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// held is a state of a workface for a time.
type held struct {
	hours.Span
	name string
}

// states checks that states that clash never overlap in one workface or in neighbours, unless
// both belong to one task (R12).
func (c *checker) states() {
	clash := c.clashes()
	var list []*row
	all := map[*row][]held{}
	for _, r := range c.list {
		if !r.bad && !r.s.Absent && r.s.Face != nil {
			if h := r.held(); len(h) > 0 {
				list = append(list, r)
				all[r] = h
			}
		}
	}
	for i, a := range list {
		for _, b := range list[:i] {
			if a.s.Task == b.s.Task || !near(a.s.Face, b.s.Face) {
				continue
			}
			for _, x := range all[a] {
				for _, y := range all[b] {
					if x.Overlaps(y.Span) && clash[pair(x.name, y.name)] {
						c.add("R12", a, "", c.when(max(x.From, y.From), a.s.Place), "%s meets %s at %s", x.name, y.name, a.s.Task.Where()).Other = b.s.Key()
					}
				}
			}
		}
	}
}

// held gives the states that a step puts its workface in, those of its kind included.
func (r *row) held() []held {
	s := r.s
	var out []held
	add := func(name string, to hours.Minute) {
		if !slices.ContainsFunc(out, func(h held) bool { return h.name == name }) {
			out = append(out, held{hours.Span{From: r.p.Start, To: to}, name})
		}
	}
	for _, st := range s.States {
		to := r.p.Finish
		if st.Tail != nil {
			to = max(to, st.Tail(to))
		}
		add(strings.ToLower(st.Name), to)
	}
	if s.Class != expand.Hands || s.Working == 0 {
		return out
	}
	if s.Hot {
		add(tasks.HotWorkState, r.p.Finish)
	}
	if s.Task.Kind == tasks.Lift {
		add(tasks.LoadOverhead, r.p.Finish)
	} else {
		add(tasks.PeopleState, r.p.Finish)
	}
	return out
}

// near says whether two workfaces are one, or declared next to each other by either.
func near(a, b *tasks.Workface) bool {
	return a == b || a.Place == b.Place && (slices.Contains(a.NextTo, b.Name) || slices.Contains(b.NextTo, a.Name))
}

// clashes gives the pairs that clash in this job: the defaults and the job's own, without those
// that it switches off.
func (c *checker) clashes() map[[2]string]bool {
	out := map[[2]string]bool{}
	for _, x := range append(tasks.DefaultClashes(), c.w.Job.Clashes...) {
		out[pair(x.A, x.B)] = true
	}
	for _, x := range c.w.Job.NoClash {
		delete(out, pair(x.A, x.B))
	}
	return out
}

func pair(a, b string) [2]string {
	a, b = strings.ToLower(a), strings.ToLower(b)
	return [2]string{min(a, b), max(a, b)}
}

// room checks that no more people are at work in a workface than it has room for, fire watches
// included (R12). Somebody who watches several works is one.
func (c *checker) room() {
	by := map[*tasks.Workface][]use{}
	for _, u := range c.busy() {
		if f := u.r.s.Face; f != nil && f.People > 0 {
			by[f] = append(by[f], u)
		}
	}
	for _, p := range c.w.Job.Places {
		for _, f := range p.Workfaces {
			told := false
			sweep(by[f], func(t hours.Minute, running []use) {
				names := map[string]bool{}
				for _, u := range running {
					names[u.who] = true
				}
				if len(names) > f.People && !told {
					told = true
					last := running[len(running)-1].r
					c.add("R12", last, fmt.Sprintf("at most %d", f.People), fmt.Sprintf("%d at %s", len(names), c.when(t, p)), "too many people at work in %s", f.Name)
				}
			})
		}
	}
}

// assemblies checks that nothing is lifted or moved while others work on it (R7), nor from the
// start of a coat on it to hard dry (R11).
func (c *checker) assemblies() {
	for _, m := range c.list {
		if m.bad || m.s.Absent || m.s.Moves == "" {
			continue
		}
		hold := hours.Span{From: m.p.Start, To: m.p.Finish}
		for _, r := range c.list {
			if r == m || r.bad || r.s.Absent || r.s.Class != expand.Hands || !touches(r.s, m.s.Moves) {
				continue
			}
			if r.s.Moves == m.s.Moves && r.s.Index < m.s.Index && r.s.Task != m.s.Task && hold.Overlaps(hours.Span{From: r.p.Start, To: r.p.Finish}) ||
				r.s.Moves != m.s.Moves && slices.ContainsFunc(r.p.Pieces, hold.Overlaps) {
				c.add("R7", m, "", c.when(hold.From, m.s.Place), "moves %s while it is worked on or moved", m.s.Moves).Other = r.s.Key()
			}
			if soft := (hours.Span{From: r.p.Start, To: c.hardDry(r)}); r.s.Task.Kind == tasks.Coat && r.s.Moves == "" && hold.Overlaps(soft) &&
				!slices.ContainsFunc(r.p.Pieces, hold.Overlaps) {
				c.add("R11", m, c.when(soft.To, m.s.Place), c.when(hold.From, m.s.Place), "moves %s before its coat is hard dry", m.s.Moves).Other = r.s.Key()
			}
		}
	}
}

// touches says whether a step works on an assembly or moves it.
func touches(s *expand.Step, assembly string) bool {
	return assembly != "" && (s.Moves == assembly || slices.Contains(s.Works, assembly))
}

// hardDry gives the moment at which a coat is hard dry: the end of its soft film, and of a step
// of its task that stands to hard dry.
func (c *checker) hardDry(coat *row) hours.Minute {
	dry := coat.p.Finish
	for _, st := range coat.s.States {
		if st.Name == tasks.SoftFilm && st.Tail != nil {
			dry = max(dry, st.Tail(coat.p.Finish))
		}
	}
	for _, r := range c.list {
		if r.s.Task == coat.s.Task && r.s.Class == expand.Cure && r.s.Name == "hard dry" && !r.bad {
			dry = max(dry, r.p.Finish)
		}
	}
	return dry
}
