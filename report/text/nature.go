package text

import (
	"fmt"
	"strings"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// nature prints sun, tide, weather and the hours that they leave, day by day of the window, where the
// job file tells the tide or the weather there.
func (p *page) nature(a *plan.Answer) {
	list := daysOfNature(a)
	if len(list) == 0 {
		return
	}
	p.gap()
	p.para("", "The days at "+agenda.PlaceLabel(a.Work.Window.Place)+": sun, tide, weather planned with, and the hours that they leave")
	for _, d := range list {
		p.para("  ", d.name+": "+strings.Join(d.Says, "; "))
	}
}

// daysOfNature gives what nature does on each day of the window; none where the job file tells
// neither tide nor weather.
func daysOfNature(a *plan.Answer) []dayForm {
	win := a.Work.Window
	zone := agenda.Zone(a.Work, win.Place)
	var out []dayForm
	for d := win.DayOne(); ; d = d.Add(1) {
		from, _ := hours.Instant(d, 0, zone)
		words := agenda.DayWords(a.Work, win.Place, d)
		if from >= win.Closes || len(words) == 0 {
			return out
		}
		out = append(out, dayForm{Date: d.String(), Says: words, name: agenda.ShortDay(from+720, zone)})
	}
}

func getaways(a *plan.Answer) []getawayForm {
	var out []getawayForm
	for _, g := range agenda.Getaways(a) {
		out = append(out, getawayForm{g.Place.Name, g.Neaped, g.Words})
	}
	return out
}

// curing prints how a film's cure adds up, midnight by midnight and at noon, and the weather that a
// coat starts in.
func (p *page) curing(a *plan.Answer, i int, s *expand.Step) {
	ps := a.Plan.Steps[i]
	zone := agenda.Zone(a.Work, s.Place)
	if s.Class == expand.Hands && (s.Paint != nil || s.Task.Kind == tasks.Prep) {
		for k, f := range agenda.Hour(s, ps.Start) {
			lead := "            "
			if k == 0 {
				lead = "  weather   "
			}
			p.para(lead, f.Name+" "+f.Amount()+" ["+f.Origin.String()+"]"+mark(f.Origin.Soft()))
		}
		p.assumed(s, ps.Start)
	}
	if s.Class != expand.Cure || s.Rate == nil || ps.Finish <= ps.Start {
		return
	}
	const most = 60 * 1440
	var parts []string
	sum := 0.0
	for m := ps.Start; m < ps.Finish && m-ps.Start < most; m++ {
		sum += s.Rate(m)
		if at := hours.MinuteOfDay(m+1, zone); at%720 == 0 && m+1 < ps.Finish {
			word := agenda.When(m+1, zone) + steel(s, m)
			parts = append(parts, fmt.Sprintf("%s %.0f %%", word, sum*100))
		}
	}
	parts = append(parts, agenda.When(ps.Finish, zone)+steel(s, ps.Finish-1)+" 100 %")
	if n := len(parts); n > 12 {
		parts = append(append(parts[:6:6], fmt.Sprintf("(%d more)", n-11)), parts[n-5:]...)
	}
	p.para("  cure      ", strings.Join(parts, ", "))
}

// assumed prints what the weather of a step rests on where it is that of the normals.
func (p *page) assumed(s *expand.Step, at hours.Minute) {
	series := s.Place.Hourly(s.Face)
	if series == nil {
		return
	}
	w, ok := series.At(int64(at))
	if !ok || !strings.HasPrefix(w.Basis, "climate") {
		return
	}
	for k, f := range s.Place.Climate.Assumed {
		lead := "            "
		if k == 0 {
			lead = "  assumes   "
		}
		p.para(lead, f.Name+" "+f.Amount()+" ["+f.Origin.String()+"]"+mark(f.Origin.Soft()))
	}
}

// steel writes the steel temperature of a minute, where it is known by the hour.
func steel(s *expand.Step, m hours.Minute) string {
	series := s.Place.Hourly(s.Face)
	if series == nil {
		return ""
	}
	if w, ok := series.At(int64(m)); ok {
		return fmt.Sprintf(" (steel %.0f °C)", w.Steel)
	}
	return ""
}
