package sheets

import (
	"fmt"
	"slices"
	"strings"

	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// taskCell says what the task is, where, who, how much of what, and by when.
func (k *pack) taskCell(s *agenda.Shift, st *expand.Step) cell {
	c := loud(agenda.StepLabel(k.work, st))
	add := func(bold bool, text string) {
		if text != "" {
			c.lines = append(c.lines, line{text, bold})
		}
	}
	ps := k.planned(st)
	add(false, joined(": ", where(s, st), strings.Join(names(ps.People, ps.Relief), ", ")))
	add(false, joined("; ", agenda.Amount(st), prefixed("drawing ", st.Task.Drawing), prefixed("with ", kitWords(st))))
	for _, n := range clean.Lines(st.Task.Note) {
		add(false, n)
	}
	for _, n := range st.Estimate.Notes {
		add(false, n)
	}
	ways := []string{}
	if st.InOneGo {
		ways = append(ways, "in one go")
	}
	if st.Lone {
		ways = append(ways, "never alone")
	}
	for _, e := range s.Entries {
		switch {
		case e.Step != st:
		case e.Watch:
			add(true, fmt.Sprintf("Fire watch %s: %s", agenda.Between(e.Span, s.Zone), strings.Join(names(e.People), ", ")))
		case e.Goes && e.Piece == lastEntry(s, st).Piece:
			ways = append(ways, "goes on "+agenda.NextPiece(k.work, e)+hoursLeft(e))
		}
	}
	latest, bold := k.byWhen(st, s)
	if !bold {
		ways = append(ways, latest)
	}
	add(false, upper(joined("; ", ways...)))
	if st.Task.Deadline != nil && st.Deadline < hours.Far {
		add(true, "Must be done by "+onDay(st.Deadline, s))
	}
	if bold {
		add(true, upper(latest))
	}
	return c
}

// byWhen gives the latest finish that keeps every deadline; bold where there is no leeway.
func (k *pack) byWhen(st *expand.Step, s *agenda.Shift) (text string, bold bool) {
	if st.Index >= len(k.a.Rows) {
		return "", false
	}
	switch m := k.a.Rows[st.Index].Latest; {
	case m <= 0 || m >= hours.Far:
		return "", false
	case m > k.planned(st).Finish:
		return "at the latest " + onDay(m, s), false
	default:
		return "no leeway: at the latest " + onDay(m, s), true
	}
}

// onDay writes a time, without its day where that is the shift's own.
func onDay(m hours.Minute, s *agenda.Shift) string {
	if hours.DateOf(m.In(s.Zone)) == s.Date {
		return agenda.Clock(m, s.Zone)
	}
	return agenda.When(m, s.Zone)
}

// hoursLeft says what working time the plan leaves for later shifts.
func hoursLeft(e agenda.Entry) string {
	n := 0
	for _, p := range e.Planned.Pieces {
		if p.From >= e.To {
			n += p.Len()
		}
	}
	if n == 0 {
		return ""
	}
	return ", " + quantity.Hours(n) + " of it then"
}

// lastEntry is the last piece of a step in a shift.
func lastEntry(s *agenda.Shift, st *expand.Step) agenda.Entry {
	var last agenda.Entry
	for _, e := range s.Entries {
		if e.Step == st && !e.Watch {
			last = e
		}
	}
	return last
}

func names(lists ...[]string) []string {
	var out []string
	for _, l := range lists {
		for _, n := range l {
			if n = paper(n); !slices.Contains(out, n) {
				out = append(out, n)
			}
		}
	}
	return out
}

func kitWords(st *expand.Step) string {
	var out []string
	for _, u := range st.Kit {
		if u.Kit == nil {
			continue
		}
		n := paper(u.Kit.Name)
		if u.Count > 1 {
			n = fmt.Sprintf("%d %s", u.Count, n)
		}
		out = append(out, n)
	}
	return strings.Join(out, ", ")
}

// where names the step's place, the workface alone at the shift's own place.
func where(s *agenda.Shift, st *expand.Step) string {
	switch {
	case st.Place != s.Place:
		return agenda.Where(st)
	case st.Face != nil:
		return clean.Line(st.Face.Name)
	}
	return ""
}
