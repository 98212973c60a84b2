package expand

import (
	"sailby/tasks"
)

// links makes the links between tasks into links between steps.
func (x *expander) links() {
	for _, t := range x.w.Job.Tasks {
		for i := range t.Links {
			x.link(t, &t.Links[i])
		}
	}
}

func (x *expander) link(t *tasks.Task, l *tasks.Link) {
	f := x.byName[l.Task]
	if f == nil || len(x.first[f]) == 0 || len(x.first[t]) == 0 {
		return
	}
	out := Link{FromEnd: l.From, ToEnd: l.To, Min: l.Min.Minutes, Max: NoMax, Working: l.Min.Working, Pos: l.Pos}
	out.From, out.Why = x.fromStep(f, t, l)
	if out.From == nil {
		return
	}
	out.To = x.first[t][0]
	if l.To == tasks.Finish {
		out.To = x.lastHands(t)
	}
	if l.Max != nil {
		out.Max, out.MaxWorking = l.Max.Minutes, l.Max.Working
	}
	if x.absent[f] || x.absent[t] {
		out.Min, out.Max, out.Working = 0, NoMax, false
	}
	x.w.Links = append(x.w.Links, out)
}

// fromStep finds the step that a link holds on to, and names it in the job's words.
func (x *expander) fromStep(f, t *tasks.Task, l *tasks.Link) (*Step, string) {
	if x.absent[f] {
		return x.first[f][0], "after " + f.Label()
	}
	if l.From == tasks.Start {
		return x.first[f][0], "start of " + f.Label()
	}
	explicit := l.State
	if f.Kind == tasks.Coat {
		return x.fromCoat(f, t, l)
	}
	switch {
	case explicit == "" && f.Kind == tasks.Weld && t.Kind == tasks.Test:
		explicit = "ready for NDT"
	case explicit == "" && f.Kind == tasks.Weld && (t.Kind == tasks.Coat || t.Kind == tasks.Prep):
		explicit = "cooled"
	}
	if explicit != "" {
		if s, ok := x.states[f.Name+" / "+explicit]; ok {
			return s, f.Label() + ", " + explicit
		}
		if f.Kind != tasks.Weld {
			x.fault(l.Pos, "leave the state out, or name one of a coat (touch dry, hard dry, cured, ...) or of a weld (cooled, ready for NDT)",
				"task %q: %q has no state %q", t.Name, f.Name, explicit)
			return nil, ""
		}
	}
	steps := x.first[f]
	last := steps[len(steps)-1]
	if f.Kind == tasks.Weld && !f.Standing.Pos.Given() {
		last = x.lastHands(f)
	}
	return last, "after " + f.Label()
}

// fromCoat finds the film state that a link from a coat waits for.
func (x *expander) fromCoat(f, t *tasks.Task, l *tasks.Link) (*Step, string) {
	state := l.State
	var next *tasks.Paint
	if state == "" {
		state = "hard dry"
		if l.Min.Minutes > 0 || l.Max != nil {
			state = "applied" // the file gives the wait itself
		} else if t.Kind == tasks.Coat && len(t.Coats) > 0 {
			next = x.paint(t.Coats[0])
			state = "recoat"
		}
	}
	s, err := x.filmState(f, state, next)
	if err != nil {
		x.fault(l.Pos, "complete the paint, or write the wait: after: {"+f.Name+": {min: 16 h}}", "task %q: %v", t.Name, err)
		return nil, ""
	}
	if (state == "immersion" || state == "immersion min") && l.Max == nil && !x.absent[t] {
		x.underWater(f, t)
	}
	if next != nil {
		coats := x.handsOf(f)
		a, b := coats[len(coats)-1], x.firstCoat(t)
		p := x.paint(f.Coats[len(f.Coats)-1])
		if w, err := p.Next(next.Paint); err == nil && len(w.Max) > 0 && !x.absent[t] {
			x.longest(t, a, b, p, w.Max)
		}
	}
	return s, f.Label() + ", " + state
}
