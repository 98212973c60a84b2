package expand

import (
	"sailby/tasks"
)

// needs lists who a task's hands-on step needs, fire watch left out (R9): what the job file asks
// for, else the kind's default; then anybody, up to the number of people.
func (x *expander) needs(t *tasks.Task, h hands) []tasks.Need {
	var out []tasks.Need
	count := 0
	anybody := func(n tasks.Need) bool { return n.Who == nil && n.Ticket.Name == "" && len(n.Also) == 0 }
	add := func(n tasks.Need) {
		count += n.Count
		switch last := len(out) - 1; {
		case n.Count == 0:
		case last >= 0 && anybody(n) && anybody(out[last]):
			out[last].Count += n.Count
		default:
			out = append(out, n)
		}
	}
	switch {
	case len(t.Needs) > 0:
		for _, n := range t.Needs {
			add(n)
		}
	case t.Kind == tasks.Weld && len(t.Welds()) > 0:
		first, also := x.welders(t)
		n := tasks.Need{Ticket: first, Also: also, Pos: t.Pos}
		if len(t.Who) > 0 {
			named := n
			named.Who, named.Count = t.Who, len(t.Who)
			add(named)
		}
		n.Count = max(1, h.people) - count // as many again as are not named, up to the number of people
		if n.Count > 0 {
			add(n)
		}
		return out
	case t.Who == nil:
		add(x.usual(t))
		add(x.supervisor(t, h))
	}
	for _, who := range t.Who {
		add(tasks.Need{Who: []string{who}, Count: 1, Pos: t.Pos})
	}
	if rest := h.people - count; rest > 0 {
		add(tasks.Need{Count: rest, Pos: t.Pos})
	}
	return out
}

// welders gives the tickets that one welder must hold for all seams of a task.
func (x *expander) welders(t *tasks.Task) (first tasks.Ticket, also []tasks.Ticket) {
	e := x.welded[t]
	for i, s := range t.Welds() {
		n := tasks.Ticket{Name: tasks.WeldTicket, ThickFrom: s.Joint.Thickness, ThickTo: s.Joint.Thickness}
		if i < len(e.Seams) {
			n.Positions = []string{e.Seams[i].Position.String()}
		}
		if p := s.Seam.Procedure; p != nil && p.Process != 0 {
			n.Process = process(int(p.Process))
		}
		n.Joints = []string{jointGroup(s)}
		if i == 0 {
			first = n
		} else {
			also = append(also, n)
		}
	}
	return first, also
}

func process(n int) string {
	digits := ""
	for ; n > 0; n /= 10 {
		digits = string(rune('0'+n%10)) + digits
	}
	return digits
}

// jointGroup says which of the two qualification groups a joint belongs to: fillet or butt.
func jointGroup(s tasks.Seam) string {
	switch s.Joint.Type.String() {
	case "fillet", "lap", "corner", "plug", "slot":
		return "fillet"
	}
	return "butt"
}

// usual gives the need of a kind when the job file does not say: somebody with the ticket that
// goes with it where anybody on the job holds that ticket, else anybody.
func (x *expander) usual(t *tasks.Task) tasks.Need {
	ticket := ""
	switch t.Kind {
	case tasks.Cut:
		ticket = t.By + " cutting"
	case tasks.Coat:
		ticket = "painter"
	case tasks.FitUp:
		ticket = "fitter"
	case tasks.Test:
		if t.By != "" && t.By != "visual" {
			ticket = "NDT"
		}
	case tasks.Lift:
		if t.By != "hands" && t.By != "by hand" {
			return tasks.Need{Ticket: tasks.Ticket{Name: tasks.SlingerTicket}, Count: 1, Pos: t.Pos}
		}
	}
	n := tasks.Need{Count: 1, Pos: t.Pos}
	want := tasks.Ticket{Name: ticket}
	for _, p := range x.w.Job.People {
		if ticket != "" && p.Holds(want) {
			n.Ticket = want
		}
	}
	return n
}
