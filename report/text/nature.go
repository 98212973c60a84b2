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
	win := a.Work.Window
	zone := agenda.Zone(a.Work, win.Place)
	told := false
	for d := win.DayOne(); ; d = d.Add(1) {
		from, _ := hours.Instant(d, 0, zone)
		if from >= win.Closes {
			return
		}
		words := agenda.DayWords(a.Work, win.Place, d)
		if len(words) == 0 {
			return
		}
		if !told {
			told = true
			p.gap()
			p.para("", "The days at "+agenda.PlaceLabel(win.Place)+": sun, tide, weather planned with, and the hours that they leave")
		}
		p.para("  ", agenda.ShortDay(from+720, zone)+": "+strings.Join(words, "; "))
	}
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
