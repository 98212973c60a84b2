package sheets

import (
	"fmt"
	"math"
	"strings"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// cover prints the verdicts, the window, the deadlines, what sets the finish, what to watch and
// whom to call.
func (k *pack) cover() {
	p, a := k.p, k.a
	p.begin("Cover", "cover", false)
	p.big(k.job.Name)
	if s := joined(", ", prefixed("for ", k.job.Client), prefixed("drawing ", k.job.Drawing), prefixed("to ", k.job.Execution)); s != "" {
		p.para(s, body, false)
	}
	k.verdicts()
	k.windowBlock()
	k.deadlines()
	k.emergency()
	k.watchList()
	k.governing()
	p.skip(3)
	p.para(agenda.Care, body, true)
	if a.Late {
		p.para("This plan is late. It is printed to show what is missing, not to work to.", body, true)
	}
}

func prefixed(lead, s string) string {
	if s == "" {
		return ""
	}
	return lead + s
}

func (k *pack) verdicts() {
	p := k.p
	p.skip(2)
	p.para(agenda.Sentence(k.report.Likely, k.report.LowToo), strong, true)
	side := func(a *plan.Answer, none string) {
		if a == nil {
			p.para(none, body, false)
			return
		}
		p.para(agenda.Sentence(a, false), body, false)
	}
	side(k.report.Maybes, "With every maybe: the same, there are none.")
	side(k.report.High, "At the high end of the hours: the same, no hours are given as a range.")
	for _, g := range agenda.Getaways(k.a) {
		p.para(g.Words+".", body, g.Neaped)
	}
	if k.a != k.report.Likely {
		p.para("These sheets are for the plan "+agenda.BasisWords(k.a.Work.Basis)+".", body, true)
	}
}

func (k *pack) windowBlock() {
	p, win := k.p, k.work.Window
	zone := agenda.Zone(k.work, win.Place)
	p.heading("The window", 30)
	s := fmt.Sprintf("%s: %s to %s (%s).", agenda.PlaceLabel(win.Place), agenda.When(win.Opens, zone), agenda.When(win.Closes, zone),
		quantity.Span(int(win.Closes-win.Opens)))
	if k.work.Trip != nil {
		s = "Trip " + k.work.Trip.Name + ". " + s
	}
	p.para(s, body, false)
	p.y++
	var spans []hours.Span
	for _, e := range k.worked {
		if e.Step.Site {
			spans = append(spans, e.Span)
		}
	}
	p.windowStrip(hours.Span{From: win.Opens, To: win.Closes}, k.a.Finish, hours.NewSet(spans...), zone)
	p.para(fmt.Sprintf("Dark: work. Heavy line: planned finish %s, %s.", agenda.Finish(k.a), handWords(k.a, k.a.InHand)), body, false)
}

func handWords(a *plan.Answer, n int) string {
	if n < 0 {
		return agenda.InHand(a, n)
	}
	return agenda.InHand(a, n) + " in hand"
}

func (k *pack) deadlines() {
	if len(k.a.Deadlines) == 0 {
		return
	}
	p := k.p
	p.heading("Deadlines", 25)
	t := p.table(column{"What", 24}, column{"Must be done by", 21}, column{"Planned finish", 20}, column{"In hand", 14}, column{"Latest start", 21})
	for _, d := range k.a.Deadlines {
		last := "-"
		if d.LastStart < hours.Far {
			last = agenda.Moment(k.a, d.LastStart)
		}
		t.row(say(agenda.DeadlineName(d)), loud(agenda.Moment(k.a, d.By)), say(agenda.Moment(k.a, d.Finish)), say(agenda.InHand(k.a, d.InHand)), loud(last))
	}
	t.end()
}

// mostGoverning is the number of lines of the governing chain on the cover.
const mostGoverning = 10

// governing prints what sets the finish, one line for each step, as far back as the cover has room.
func (k *pack) governing() {
	p := k.p
	var lines []string
	for _, link := range agenda.Chain(k.a) {
		var causes []string
		for _, c := range link.Causes {
			causes = append(causes, agenda.CauseText(k.work, c))
		}
		lines = append(lines, link.Head+strings.Join(causes, "; "))
	}
	if len(lines) == 0 {
		return
	}
	p.heading("What sets the finish, the last first", 2*lineHeight(body))
	for i, s := range lines[:min(len(lines), mostGoverning)] {
		p.point(fmt.Sprint(i+1), s, false)
	}
	if n := len(lines) - mostGoverning; n > 0 {
		p.point("", fmt.Sprintf("and %d more, back to: %s", n, lines[len(lines)-1]), false)
	}
}

func side(v float64, plus, minus string) string {
	if v < 0 {
		return minus
	}
	return plus
}

// emergency prints whom to call and where; what the job file leaves open has a box.
func (k *pack) emergency() {
	e := k.job.Emergency
	k.p.heading("If something happens", 2*(boxHeight+lineHeight(body)))
	grid := e.GridRef
	if pl := k.work.Window.Place; grid == "" && pl != nil && pl.HasAt {
		grid = fmt.Sprintf("%.4f %s, %.4f %s", math.Abs(pl.Lat), side(pl.Lat, "N", "S"), math.Abs(pl.Lon), side(pl.Lon, "E", "W"))
	}
	k.p.fields(3, field{label: "We are at (grid or position)", value: grid}, field{label: "Telephone", value: e.Phone}, field{label: "Radio", value: e.Radio},
		field{label: "Nearest emergency department", value: e.Hospital}, field{label: "Muster point", value: e.Muster}, field{label: "Boat or rescue cover", value: e.Boat})
}
