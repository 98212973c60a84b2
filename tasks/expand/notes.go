package expand

import (
	"fmt"

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
	x.aside(add)
	for _, k := range x.w.Job.Kit {
		if k.Gives > 0 {
			x.generator(k, add)
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
