package sheets

import (
	"fmt"
	"slices"
	"strings"

	"sailby/report/agenda"
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
	head := day
	if s.Site {
		head += ", " + agenda.DayOf(k.work, s)
	}
	p.begin(head, "shift "+s.Date.String(), true)
	p.big(day)
	p.para(joined(", ", agenda.PlaceLabel(s.Place), agenda.DayOf(k.work, s), agenda.Between(s.Span, s.Zone)), strong, true)
	p.para(upper(agenda.Facts(k.work, s))+".", body, false)
	k.running(s)
	steps := stepsOf(s.Entries)
	k.dayStrip(s, steps)
	k.begun(s)
	k.conditions(s, steps)
	k.dayTasks(s, steps)
	k.stopped(s, steps)
	if list := cautionsOf(k.work, steps); len(list) > 0 {
		p.heading("Take care", float64(min(len(list), 10))*lineHeight(body))
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
	var whole []string
	for i, st := range steps {
		if st.InOneGo {
			whole = append(whole, fmt.Sprint(i+1))
		} else if st.SafeStop > 0 {
			p.point(fmt.Sprint(i+1), fmt.Sprintf("is not stopped before %s of it is done; starting again takes %s.", quantity.Hours(st.SafeStop), quantity.Hours(st.SetUp)), false)
		}
	}
	if len(whole) > 0 {
		p.para("In one go, not to be begun unless it can be finished: "+strings.Join(whole, ", ")+".", body, false)
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
