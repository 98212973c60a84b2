package expand

import (
	"sailby/tasks"
	"sailby/tasks/hours"
)

// moment resolves a moment and reports one that cannot be.
func (x *expander) moment(m tasks.Moment) hours.Minute {
	at, clock, ok := x.w.Window.At(m)
	if !ok {
		why := "that weekday does not fall just once in the window"
		if clock == hours.Gap {
			why = "the clocks go forward over it"
		}
		x.fault(m.Pos, "write the date, for instance "+x.w.Window.DayOne().String()+" 10:15", "time %q: %s", m.Text, why)
	}
	return at
}

// deadlines collects the deadlines and puts them on the steps (R18).
func (x *expander) deadlines() {
	w := x.w
	w.Deadlines = append(w.Deadlines, Deadline{By: w.Window.Closes, Pos: w.Window.Pos})
	for _, t := range w.Job.Tasks {
		if t.Deadline == nil || x.absent[t] || len(x.first[t]) == 0 {
			continue
		}
		by := x.moment(*t.Deadline)
		step := x.lastHands(t)
		step.Deadline = min(step.Deadline, by)
		w.Deadlines = append(w.Deadlines, Deadline{Task: t, Step: step, By: by, Pos: t.Deadline.Pos})
	}
}

// lastHands gives the last step of t that people work on, or its last step.
func (x *expander) lastHands(t *tasks.Task) *Step {
	steps := x.first[t]
	for i := len(steps) - 1; i >= 0; i-- {
		if steps[i].Class == Hands {
			return steps[i]
		}
	}
	return steps[len(steps)-1]
}

// homeward holds home work on a travelled assembly to the time of leaving (R1).
func (x *expander) homeward() {
	w := x.w
	leaves := w.Window.Opens
	if w.Trip != nil {
		leaves = w.Trip.Leaves
	}
	travels := map[string]bool{}
	for _, s := range w.Steps {
		if s.Site {
			for _, a := range append(s.Works, s.Moves) {
				travels[a] = a != ""
			}
		}
	}
	for _, s := range append([]*Step(nil), w.Steps...) {
		if s.Site || s.Absent {
			continue
		}
		for _, a := range append(s.Works, s.Moves) {
			if !travels[a] {
				continue
			}
			s.Deadline = min(s.Deadline, leaves)
			if s.Task.Kind == tasks.Coat && s == x.lastHands(s.Task) { // what travels is dry to handle (R11)
				if dry, err := x.filmState(s.Task, "hard dry", nil); err == nil {
					dry.Deadline = min(dry.Deadline, leaves)
				}
			}
		}
	}
}

// orders resolves the order rules (R17).
func (x *expander) orders() {
	for _, o := range x.w.Job.Orders {
		out := Order{Pos: o.Pos, Text: o.Text}
		for _, c := range o.Choices {
			a, b := x.byName[c.First], x.byName[c.Then]
			if a == nil || b == nil || x.absent[a] || x.absent[b] {
				out.Choices = nil
				break
			}
			out.Choices = append(out.Choices, Before{First: x.handsOf(a), Then: x.handsOf(b)})
		}
		if len(out.Choices) > 0 {
			x.w.Orders = append(x.w.Orders, out)
		}
	}
}

func (x *expander) handsOf(t *tasks.Task) []*Step {
	var out []*Step
	for _, s := range x.first[t] {
		if s.Class == Hands {
			out = append(out, s)
		}
	}
	return out
}
