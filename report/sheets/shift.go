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
	p.big(dayName(s))
	if at := joined(", ", agenda.PlaceLabel(s.Place), agenda.DayOf(k.work, s), agenda.Between(s.Span, s.Zone)); how == dense {
		p.para(at, body, true)
	} else {
		p.para(at, strong, true)
	}
	facts := []string{upper(agenda.Day(k.work, s)) + "."}
	facts = append(facts, k.running(s)...)
	if how == dense {
		facts = []string{strings.Join(facts, " ")}
	}
	for _, f := range facts {
		p.para(f, body, false)
	}
	steps := stepsOf(s.Entries)
	if how == loose || s.Site || len(steps) > 2 { // one or two tasks at home are plain from the table
		k.dayStrip(s, steps, how)
	}
	k.begun(s, how)
	k.conditions(s, steps, how)
	k.dayTasks(s, steps, how)
	k.stopped(s, steps, how)
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
	k.closing(how, slices.ContainsFunc(steps, func(st *expand.Step) bool { return st.Watch > 0 }))
}

// dayStrip draws the strip: reach and hire in grey, then each person with the numbers of the
// tasks; what they mean is told once on a page.
func (k *pack) dayStrip(s *agenda.Shift, steps []*expand.Step, how form) {
	var lanes []lane
	var reach []string
	for _, g := range agenda.Reach(k.work, s) {
		if how == dense {
			reach = append(reach, g.Name+" "+agenda.Opens(g, s.Zone))
			continue
		}
		lanes = append(lanes, lane{name: "reach of " + g.Name, open: g.Open})
	}
	if len(reach) > 0 {
		k.p.para("Reach: "+strings.Join(reach, "; ")+".", body, false)
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
	if how == followed {
		return
	}
	legend := "Grey: there or on shift. Numbers: tasks below."
	if agenda.LeewayKnown(k.a) {
		legend += " Latest: later, and a deadline is missed."
	}
	if slices.ContainsFunc(s.Entries, func(e agenda.Entry) bool { return e.Watch }) {
		legend += " w: fire watch."
	}
	k.p.para(legend, body, false)
}

// dayTasks is the table of the shift's tasks with boxes for what really happened.
func (k *pack) dayTasks(s *agenda.Shift, steps []*expand.Step, how form) {
	p := k.p
	p.skip(2)
	t := p.table(column{"No.", 10}, column{"Task", taskShare}, column{"Planned", 33}, column{"Started", 20}, column{"Finished", 21}, column{"Hours left", 22})
	notes, numbers := sharedNotes(steps)
	for i, st := range steps {
		t.row(loud(fmt.Sprint(i+1)), k.taskCell(s, st, notes, how), k.plannedCell(s, st), write(), write(), write())
	}
	t.end()
	for i, n := range notes {
		p.point("-", numbers[i]+": "+n, false)
	}
}

// running says what nobody works on but the clock does.
func (k *pack) running(s *agenda.Shift) []string {
	var out []string
	for _, st := range s.Standing {
		why := st.Step.Task.Why
		if why == st.Step.Task.Name {
			why = ""
		}
		out = append(out, "Standing: "+joined(", ", agenda.StepLabel(k.work, st.Step), why, agenda.Where(st.Step))+", until "+agenda.When(st.To, s.Zone)+".")
	}
	return out
}
