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

// between is the room in mm that two shifts on one page keep between them.
const between = 9.0

// allShifts prints a sheet for each shift. Short days at home follow each other on one page.
func (k *pack) allShifts() {
	list := slices.Clone(k.shifts)
	if k.opt.SiteOnly {
		list = slices.DeleteFunc(list, func(s *agenda.Shift) bool { return !s.Site })
	}
	for i := 0; i < len(list); {
		n, used := 1, k.height(list[i])
		for i+n < len(list) && !list[i].Site && !list[i+n].Site {
			more := between + k.height(list[i+n])
			if used+more > k.p.bottom-k.p.doc.Top-headRoom {
				break
			}
			used += more
			n++
		}
		k.shared(list[i : i+n])
		i += n
	}
}

// shared prints shifts on one page; a single one may run on, and is drawn together where that
// saves a page.
func (k *pack) shared(list []*agenda.Shift) {
	var heads, names []string
	for _, s := range list {
		heads, names = append(heads, dayName(s)), append(names, s.Date.String())
	}
	head := heads[0]
	if s := list[0]; s.Site {
		head += ", " + agenda.DayOf(k.work, s)
	} else if len(list) > 1 {
		head += " to " + heads[len(heads)-1]
	}
	k.p.begin(head, "shift "+strings.Join(names, ", "), true)
	loose, _ := k.trial(list[0], false)
	tight, _ := k.trial(list[0], true)
	for i, s := range list {
		if i > 0 {
			k.p.y += between / 2
			k.p.rule(thick)
			k.p.y += between / 2
		}
		k.shift(s, len(list) > 1 || tight < loose)
	}
}

// height gives the height of a shift drawn together in mm, more than a page where it takes more
// than one.
func (k *pack) height(s *agenda.Shift) float64 {
	pages, h := k.trial(s, true)
	if pages > 1 {
		return k.p.doc.Height
	}
	return h
}

// trial lays a shift out on paper that is thrown away and gives the pages it takes and the height
// in mm on the last.
func (k *pack) trial(s *agenda.Shift, tight bool) (pages int, height float64) {
	t := *k
	doc := *k.p.doc
	doc.Pages = nil
	t.p = newPen(&doc)
	t.p.begin("", "", true)
	top := t.p.y
	t.shift(s, tight)
	return len(doc.Pages), t.p.y - top
}

func dayName(s *agenda.Shift) string {
	if s.Night {
		return agenda.LongDay(s.Date) + ", night"
	}
	return agenda.LongDay(s.Date)
}

// shift prints one shift's sheet, named by the day on which it begins; tight where something else
// follows on the page.
func (k *pack) shift(s *agenda.Shift, tight bool) {
	p := k.p
	day := dayName(s)
	p.big(day)
	p.para(joined(", ", agenda.PlaceLabel(s.Place), agenda.DayOf(k.work, s), agenda.Between(s.Span, s.Zone)), strong, true)
	p.para(upper(agenda.Day(k.work, s))+".", body, false)
	k.running(s)
	steps := stepsOf(s.Entries)
	k.dayStrip(s, steps)
	k.begun(s, tight)
	k.conditions(s, steps)
	k.dayTasks(s, steps)
	k.stopped(s, steps, tight)
	if list := cautionsOf(k.work, steps); len(list) > 0 && tight {
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
	k.closing(tight, slices.ContainsFunc(steps, func(st *expand.Step) bool { return st.Watch > 0 }))
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

// stopped prints what else could be done if the work has to stop.
func (k *pack) stopped(s *agenda.Shift, steps []*expand.Step, tight bool) {
	p := k.p
	spare := agenda.Spare(k.a, s, 4)
	lead := ""
	if tight {
		p.skip(1.5)
		lead = "If you have to stop."
	} else {
		p.heading("If you have to stop", 3*lineHeight(body))
	}
	p.para(joined(" ", lead, "Make it safe, write down the time and why, tell the lead hand.", prefixed("Telephone ", k.job.Emergency.Phone)), body, false)
	var whole, safe []string
	for i, st := range steps {
		if st.InOneGo {
			whole = append(whole, fmt.Sprint(i+1))
		} else if st.SafeStop > 0 {
			words := fmt.Sprintf("%d not before %s of it is done", i+1, quantity.Hours(st.SafeStop))
			if st.SetUp > 0 {
				words += ", and starting again takes " + quantity.Hours(st.SetUp)
			}
			safe = append(safe, words)
		}
	}
	if len(safe) > 0 {
		p.para("Stopping: "+strings.Join(safe, "; ")+".", body, false)
	}
	if len(whole) > 0 {
		p.para("In one go, not to be begun unless it can be finished: "+strings.Join(whole, ", ")+".", body, false)
	}
	if len(spare) == 0 {
		if !tight {
			p.para("Nothing planned for later is ready to be brought forward.", body, false)
		}
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
func (k *pack) begun(s *agenda.Shift, tight bool) {
	p := k.p
	if tight {
		p.skip(1)
	} else {
		p.heading("Before work begins", boxHeight+2*lineHeight(body))
	}
	for _, g := range agenda.Permits(k.work, s) {
		p.fields(3, field{label: upper(g.Name) + " no."}, field{label: "Valid", value: agenda.Opens(g, s.Zone)}, field{label: "Issued at, by"})
	}
	p.fields(4, field{label: "Brief held, initials"}, field{label: "Tools and gear seen"}, field{label: "Forecast, wind"}, field{label: "Gas, tests"})
}

// closing has the boxes for the end of the shift. The box for notes takes what is left of the page;
// where little is left it stands beside the signature.
func (k *pack) closing(tight, watched bool) {
	const least, most = 25.0, 80.0
	p := k.p
	sign := []field{{label: "Lead hand, name and signature", units: 2}, {label: "Time"}}
	if watched {
		sign = append(sign, field{label: "Last fire watch ended"})
	}
	below := 1 + lineHeight(body) + boxHeight + 1.6
	beside := lineHeight(body) + boxHeight + 1.5 + lineHeight(body) + boxHeight
	head := 2.5 + lineHeight(strong) + 0.8
	if tight || p.y+head+lineHeight(body)+least+below > p.bottom && p.y+2+beside <= p.bottom {
		p.skip(2)
		p.room(beside)
		w, top := p.wide()*0.55, p.y
		p.note(w-gutter, beside-lineHeight(body))
		end, left := p.y, p.left
		p.y, p.left = top, p.left+w
		p.fields(1, field{label: sign[0].label})
		p.fields(len(sign)-1, sign[1:]...)
		p.y, p.left = max(end, p.y)+0.1, left
		return
	}
	p.heading("At the end", lineHeight(body)+least+below)
	p.note(p.wide()-gutter, min(max(p.bottom-p.y-lineHeight(body)-below, least), most))
	p.y++
	p.fields(2+len(sign)-1, sign...)
}

// note draws the box for what was found, w mm wide and h mm high.
func (p *pen) note(w, h float64) {
	p.run(p.left, p.y+ascent*body*mmPerPoint, fitted("Found, changed, stopped, and why", body, false, w), body, false)
	p.y += lineHeight(body)
	p.put(Item{Kind: Blank, X: p.left, Y: p.y, W: w, H: h, Stroke: thin})
	p.y += h
}
