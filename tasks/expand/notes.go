package expand

import (
	"fmt"
	"slices"

	"sailby/tasks"
	"sailby/tasks/origin"
	"sailby/weld"
)

// notes gathers what is worth saying about the work as a whole: what the estimates of welds and cuts warn
// of, and generators that are too small for the welding sets on them. Each is said once.
func (x *expander) notes() {
	said := map[tasks.Note]bool{}
	add := func(pos tasks.Pos, format string, args ...any) {
		n := tasks.Note{Pos: pos, Text: fmt.Sprintf(format, args...)}
		if !said[n] {
			said[n] = true
			x.w.Notes = append(x.w.Notes, n)
		}
	}
	for _, t := range x.w.Job.Tasks {
		if x.absent[t] {
			continue
		}
		for _, s := range x.first[t] {
			for _, text := range s.warnings {
				what := t.Label()
				if t.Block != "" {
					what = t.Block // all rounds say the same
				}
				add(t.Pos, "%s: %s", what, text)
			}
		}
	}
	x.meals(add)
	x.aside(add)
	for _, k := range x.w.Job.Kit {
		if k.Gives > 0 {
			x.generator(k, add)
		}
	}
}

// unbroken is the longest opening without a break of which nothing is said, minutes (common practice).
const unbroken = 480

// meals says which places have more work in an opening than anybody should do without a break, and no break:
// what the plan gives comes from opening hours and people's hours alone.
func (x *expander) meals(add func(tasks.Pos, string, ...any)) {
	for _, p := range x.w.Job.Places {
		work := 0
		for _, s := range x.w.Steps {
			if s.Place == p && s.Class == Hands && !s.Absent {
				work += s.Working
			}
		}
		whole := func(q *tasks.Person) bool {
			return !q.Outside && (len(q.Places) == 0 || slices.Contains(q.Places, p.Name)) && (q.Hours == nil || q.Hours.Longest(0) > unbroken)
		}
		if work > unbroken && p.Open.Longest(0) > unbroken && slices.ContainsFunc(x.w.Job.People, whole) {
			add(p.OpenPos, "%s is open for more than 8 h without a break, so nobody is given a meal there: write breaks into its opening hours (daily 07:00-12:00 12:30-19:00), or into people's hours", p.Name)
		}
	}
}

// generator says where what welds on a generator wants a larger one. Where a place has mains
// the sets may hang on those.
func (x *expander) generator(k *tasks.Kit, add func(tasks.Pos, string, ...any)) {
	at := k.At
	if at == nil {
		at = x.w.Window.Place
	}
	if at.Mains.Pos.Given() {
		return
	}
	for _, other := range x.w.Job.Kit { // the largest of them carries the sets
		if other != k && other.Gives > k.Gives && (other.At == k.At || other.At == at) {
			return
		}
	}
	var most float64
	var by *Step
	for _, s := range x.w.Steps {
		e, ok := x.welded[s.Task]
		if !ok || s.Absent || s.Place != at || s.HandsOn == 0 || s.Power == 0 {
			continue
		}
		wants := e.Why.Generator.Value * float64(max(1, s.welders))
		for _, u := range s.Kit {
			if u.Kit.Draws > 0 { // the file says what its set draws
				wants = weld.Generator(s.Power)
			}
		}
		if wants > most {
			most, by = wants, s
		}
	}
	if by != nil && most > k.Gives+1e-9 {
		add(k.Pos, "%s gives %s kVA, %s wants a generator of %s kVA (1.35 times what its welding sets draw at most): expect it to sag or trip",
			k.Name, origin.Trim(k.Gives), by.Task.Label(), origin.Trim(most))
	}
}
