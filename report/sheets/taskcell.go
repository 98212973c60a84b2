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

// taskShare is the share of the column of tasks in 183.
const taskShare = 77

// taskCell says what the task is, where and who beside the boxes; how much of what, what holds and
// by when below them. Notes that several tasks of the shift share come once below the table.
func (k *pack) taskCell(s *agenda.Shift, st *expand.Step, shared []string, how form) cell {
	c := loud(agenda.StepLabel(k.work, st))
	who := joined(": ", where(s, st), strings.Join(workers(s, st), ", "))
	rules := ""
	if st.Lone {
		rules = "never alone"
	}
	if st.InOneGo {
		rules = joined("; ", "in one go", rules)
	}
	if all := joined("; ", who, rules); len(wrapText(all, body, false, k.p.wide()*taskShare/183-2*pad)) == 1 {
		who, rules = all, ""
	}
	if who != "" {
		c.lines = append(c.lines, line{text: upper(who)})
	}
	add := func(bold bool, text string) {
		if text != "" {
			c.under = append(c.under, line{text, bold})
		}
	}
	words := []string{rules, signs(agenda.Amount(st)), prefixed("drawing ", st.Task.Drawing), prefixed("with ", kitWords(st))}
	for _, e := range s.Entries {
		if e.Step == st && !e.Watch && e.Goes && e.Piece == lastEntry(s, st).Piece {
			words = append(words, "goes on "+agenda.NextPiece(k.work, e)+hoursLeft(e))
		}
	}
	latest, bold := k.byWhen(st, s)
	texts := []string{upper(joined("; ", words...))}
	for _, n := range notesOf(st) {
		if !slices.Contains(shared, n) {
			texts = append(texts, upper(n))
		}
	}
	if how == dense {
		texts = []string{joined(". ", texts...)}
	}
	for _, s := range texts {
		add(false, s)
	}
	for _, e := range s.Entries {
		if e.Step == st && e.Watch {
			add(true, fmt.Sprintf("Fire watch %s: %s", agenda.Within(e.Span, s.Zone), strings.Join(names(e.People), ", ")))
		}
	}
	if st.Task.Deadline != nil && st.Deadline < hours.Far {
		add(true, "Must be done by "+onDay(st.Deadline, s))
	}
	if bold {
		add(true, "No leeway: "+latest)
	}
	return c
}

// plannedCell gives when the task is worked on in the shift, and by when it has to be done at the
// latest.
func (k *pack) plannedCell(s *agenda.Shift, st *expand.Step) cell {
	var times []string
	for _, e := range agenda.Merged(s.Entries) {
		if e.Step == st && !e.Watch {
			times = append(times, agenda.Within(e.Span, s.Zone), agenda.Breaks(e, s.Zone), agenda.Sliver(e))
		}
	}
	if latest, bold := k.byWhen(st, s); !bold && latest != "" {
		times = append(times, latest)
	}
	return say(slices.Compact(times)...)
}

// planners are marks of notes for who plans and packs; `sailby why` and the packing list have them.
var planners = []string{"is counted in proportion", "open 1 of", "stands here to compare"}

// notesOf gives the notes of the task and those of its estimate that the people at the work need.
func notesOf(st *expand.Step) []string {
	out := clean.Lines(st.Task.Note)
	for _, n := range st.Estimate.Notes {
		if !slices.ContainsFunc(planners, func(mark string) bool { return strings.Contains(n, mark) }) {
			out = append(out, signs(n))
		}
	}
	return out
}

// sharedNotes gives the notes that more than one of the steps has, in order, each with the numbers
// of its steps.
func sharedNotes(steps []*expand.Step) (notes, numbers []string) {
	has := map[string][]string{}
	var all []string
	for i, st := range steps {
		for _, n := range notesOf(st) {
			if no := fmt.Sprint(i + 1); !slices.Contains(has[n], no) {
				has[n] = append(has[n], no)
			}
			all = append(all, n)
		}
	}
	for _, n := range all {
		if len(has[n]) > 1 && !slices.Contains(notes, n) {
			notes, numbers = append(notes, n), append(numbers, strings.Join(has[n], ", "))
		}
	}
	return notes, numbers
}

// byWhen gives the latest finish that keeps every deadline; bold where there is no leeway. In the
// next six days the day of the week alone is clear.
func (k *pack) byWhen(st *expand.Step, s *agenda.Shift) (text string, bold bool) {
	if st.Index >= len(k.a.Rows) || k.a.Rows[st.Index].Leeway < 0 {
		return "", false
	}
	m := k.a.Rows[st.Index].Latest
	if m <= 0 || m >= hours.Far {
		return "", false
	}
	day := hours.DateOf(m.In(s.Zone))
	switch {
	case day == s.Date:
		text = "latest " + agenda.Clock(m, s.Zone)
	case day.Before(s.Date.Add(7)) && s.Date.Before(day):
		text = "latest " + m.In(s.Zone).Format("Mon 15:04")
	default:
		text = "latest " + agenda.When(m, s.Zone)
	}
	return text, m <= k.planned(st).Finish
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

// workers names who works on a step in a shift; a relief of a later shift is on that shift's sheet.
func workers(s *agenda.Shift, st *expand.Step) []string {
	var out []string
	for _, e := range s.Entries {
		if e.Step == st && !e.Watch {
			out = append(out, e.People...)
		}
	}
	return names(out)
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
		if u.Kit == nil || u.Kit.Name == st.Task.By && u.Count <= 1 {
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
