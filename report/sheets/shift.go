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

// shift prints one shift's sheet, named by the day on which it begins.
func (k *pack) shift(s *agenda.Shift) {
	p := k.p
	day := agenda.LongDay(s.Date)
	if s.Night {
		day += ", night"
	}
	p.begin(joined(", ", day, agenda.DayOf(k.work, s)), "shift "+s.Date.String(), true)
	p.big(day)
	p.para(joined(", ", agenda.PlaceLabel(s.Place), agenda.DayOf(k.work, s), agenda.Between(s.Span, s.Zone)), strong, true)
	p.para(upper(agenda.Facts(k.work, s))+".", body, false)
	k.running(s)
	steps := stepsOf(s.Entries)
	k.dayStrip(s, steps)
	k.begun(s)
	k.dayTasks(s, steps)
	k.stopped(s, steps)
	if list := cautionsOf(k.work, steps); len(list) > 0 {
		p.heading("Take care", lineHeight(body))
		for _, c := range list {
			p.point("-", c.short, false)
		}
	}
	k.closing()
}

// dayStrip draws the strip: reach and hire in grey, then each person with the numbers of the
// tasks.
func (k *pack) dayStrip(s *agenda.Shift, steps []*expand.Step) {
	var lanes []lane
	for _, g := range agenda.Reach(k.work, s) {
		lanes = append(lanes, lane{name: "reach of " + g.Name, open: g.Open})
	}
	for _, g := range agenda.Hire(k.work, s) {
		lanes = append(lanes, lane{name: g.Name, open: g.Open})
	}
	for _, q := range s.People {
		l := lane{name: q.Name, open: hours.Set{q.On}}
		for _, e := range q.Entries {
			word := fmt.Sprint(slices.Index(steps, e.Step) + 1)
			if e.Watch {
				word += "w"
			}
			l.bars = append(l.bars, bar{e.Span, word, e.Watch})
		}
		lanes = append(lanes, l)
	}
	k.p.skip(2)
	k.p.strip(s.Span, s.Zone, lanes)
	legend := "Grey: there or on shift. Numbers: the tasks below. At the latest: done by then, or a deadline falls."
	if slices.ContainsFunc(s.Entries, func(e agenda.Entry) bool { return e.Watch }) {
		legend += " w: fire watch after that task."
	}
	k.p.para(legend, body, false)
}

// dayTasks is the table of the shift's tasks with boxes for what really happened.
func (k *pack) dayTasks(s *agenda.Shift, steps []*expand.Step) {
	p := k.p
	p.skip(2)
	t := p.table(column{"No.", 10}, column{"Task", 83}, column{"Planned", 27}, column{"Started", 20}, column{"Finished", 21}, column{"Hours left", 22})
	for i, st := range steps {
		times := []string{}
		for _, e := range s.Entries {
			if e.Step == st && !e.Watch {
				times = append(times, agenda.Between(e.Span, s.Zone))
			}
		}
		t.row(loud(fmt.Sprint(i+1)), k.taskCell(s, st), say(slices.Compact(times)...), write(), write(), write())
	}
	t.end()
}

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
	add(false, upper(strings.Join(ways, "; ")))
	k.byWhen(st, s, add)
	return c
}

// byWhen adds the deadline, and the latest finish that keeps every deadline.
func (k *pack) byWhen(st *expand.Step, s *agenda.Shift, add func(bool, string)) {
	if st.Task.Deadline != nil && st.Deadline < hours.Far {
		add(true, "Must be done by "+onDay(st.Deadline, s))
	}
	if st.Index >= len(k.a.Rows) {
		return
	}
	switch m := k.a.Rows[st.Index].Latest; {
	case m <= 0 || m >= hours.Far:
	case m > k.planned(st).Finish:
		add(false, "At the latest "+onDay(m, s))
	default:
		add(true, "No leeway: at the latest "+onDay(m, s))
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

// running prints what nobody works on but the clock does.
func (k *pack) running(s *agenda.Shift) {
	for _, st := range s.Standing {
		why := st.Step.Task.Why
		if why == st.Step.Task.Name {
			why = ""
		}
		k.p.para("Standing: "+joined(", ", agenda.StepLabel(k.work, st.Step), why, agenda.Where(st.Step))+", until "+agenda.When(st.To, s.Zone)+".", body, false)
	}
}

// stopped prints what else could be done if the work has to stop.
func (k *pack) stopped(s *agenda.Shift, steps []*expand.Step) {
	p := k.p
	spare := agenda.Spare(k.a, s, 4)
	p.heading("If you have to stop", 2*lineHeight(body))
	for i, st := range steps {
		if st.InOneGo {
			p.point(fmt.Sprint(i+1), "goes in one go: do not begin it unless it can be finished.", false)
		} else if st.SafeStop > 0 {
			p.point(fmt.Sprint(i+1), fmt.Sprintf("is not stopped before %s of it is done; starting again takes %s.", quantity.Hours(st.SafeStop), quantity.Hours(st.SetUp)), false)
		}
	}
	if len(spare) == 0 {
		p.para("Nothing planned for later is ready to be brought forward.", body, false)
		return
	}
	p.para("Work planned for later that is ready; look first at reach, hire and who is free:", body, false)
	for _, sp := range spare {
		when := ""
		if sp.From > s.From {
			when = "from " + agenda.Clock(sp.From, s.Zone) + " on"
		}
		p.point("-", joined(", ", agenda.StepLabel(k.work, sp.Step), where(s, sp.Step), quantity.Hours(sp.Step.Working), when), false)
	}
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

// begun has the boxes to fill in before work begins: permits first.
func (k *pack) begun(s *agenda.Shift) {
	p := k.p
	p.heading("Before work begins", boxHeight+2*lineHeight(body))
	for _, g := range agenda.Permits(k.work, s) {
		p.fields(3, field{label: upper(g.Name) + " no."}, field{label: "Valid", value: agenda.Opens(g, s.Zone)}, field{label: "Issued at, by"})
	}
	p.fields(4, field{label: "Brief held, initials"}, field{label: "Tools and gear seen"}, field{label: "Forecast, wind"}, field{label: "Gas, tests"})
}

// closing has the boxes for the end of the shift; the largest takes what is left of the page.
func (k *pack) closing() {
	const least, most = 12.0, 80.0
	p := k.p
	below := 1 + lineHeight(body) + boxHeight + 1.6
	p.heading("At the end", lineHeight(body)+least+below)
	p.run(p.left, p.y+ascent*body*mmPerPoint, "Found, changed, stopped, and why", body, false)
	p.y += lineHeight(body)
	h := min(max(p.bottom-p.y-below, least), most)
	p.put(Item{Kind: Blank, X: p.left, Y: p.y, W: p.wide() - gutter, H: h, Stroke: thin})
	p.y += h + 1
	p.fields(4, field{label: "Lead hand, name and signature", units: 2}, field{label: "Time"}, field{label: "Last fire watch ended"})
}
