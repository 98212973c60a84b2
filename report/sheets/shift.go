package sheets

import (
	"fmt"
	"slices"
	"strings"

	"sailby/report/agenda"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

func dayName(s *agenda.Shift) string {
	if s.Night {
		return agenda.LongDay(s.Date) + ", night"
	}
	return agenda.LongDay(s.Date)
}

// shift prints one shift's sheet, named by the day on which it begins.
func (k *pack) shift(s *agenda.Shift, how form) {
	p := k.p
	day := dayName(s)
	p.big(day)
	p.para(joined(", ", agenda.PlaceLabel(s.Place), agenda.DayOf(k.work, s), agenda.Between(s.Span, s.Zone)), strong, true)
	p.para(upper(agenda.Day(k.work, s))+".", body, false)
	k.running(s)
	steps := stepsOf(s.Entries)
	if how == loose || s.Site || len(steps) > 2 { // one or two tasks at home are plain from the table
		k.dayStrip(s, steps, how == followed)
	}
	k.begun(s, how != loose)
	k.conditions(s, steps)
	k.dayTasks(s, steps)
	k.stopped(s, steps, how != loose)
	if list := cautionsOf(k.work, steps); len(list) > 0 && how != loose {
		var short []string
		for _, c := range list {
			short = append(short, c.short)
		}
		p.skip(1.5)
		p.para("Take care. "+strings.Join(short, " "), body, false)
	} else if len(list) > 0 {
		p.heading("Take care", float64(min(len(list), 10))*lineHeight(body))
		for _, c := range list {
			p.point("-", c.short, false)
		}
	}
	k.closing(how != loose, slices.ContainsFunc(steps, func(st *expand.Step) bool { return st.Watch > 0 }))
}

// dayStrip draws the strip: reach and hire in grey, then each person with the numbers of the
// tasks; what they mean is told once on a page.
func (k *pack) dayStrip(s *agenda.Shift, steps []*expand.Step, again bool) {
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
	if again {
		return
	}
	legend := "Grey: there or on shift. Numbers: tasks below. Latest: later, and a deadline is missed."
	if slices.ContainsFunc(s.Entries, func(e agenda.Entry) bool { return e.Watch }) {
		legend += " w: fire watch."
	}
	k.p.para(legend, body, false)
}

// dayTasks is the table of the shift's tasks with boxes for what really happened.
func (k *pack) dayTasks(s *agenda.Shift, steps []*expand.Step) {
	p := k.p
	p.skip(2)
	t := p.table(column{"No.", 10}, column{"Task", taskShare}, column{"Planned", 33}, column{"Started", 20}, column{"Finished", 21}, column{"Hours left", 22})
	notes, numbers := sharedNotes(steps)
	for i, st := range steps {
		t.row(loud(fmt.Sprint(i+1)), k.taskCell(s, st, notes), k.plannedCell(s, st), write(), write(), write())
	}
	t.end()
	for i, n := range notes {
		p.point("-", numbers[i]+": "+n, false)
	}
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
