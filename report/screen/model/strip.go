package model

import (
	"fmt"
	"strings"
	"time"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// strip is a row of columns that stand for equal lengths of time.
type strip struct {
	hours.Span
	step  int // minutes in a column
	cells []rune
}

// steps are the lengths of time that a column may stand for, minutes.
var steps = []int{5, 10, 15, 20, 30, 60, 90, 120, 180, 240, 360, 720, 1440}

// newStrip lays a span, widened to whole hours of the zone, into at most n columns.
func newStrip(s hours.Span, zone *time.Location, n int) strip {
	s.From -= hours.Minute(s.From.In(zone).Minute())
	if past := s.To.In(zone).Minute(); past > 0 {
		s.To += hours.Minute(60 - past)
	}
	out := strip{Span: s, step: steps[len(steps)-1]}
	for _, step := range steps {
		if (s.Len()+step-1)/step <= n {
			out.step = step
			break
		}
	}
	out.cells = []rune(strings.Repeat(" ", max(min((s.Len()+out.step-1)/out.step, n), 1)))
	return out
}

// blank gives the same strip, empty.
func (s strip) blank() strip {
	s.cells = []rune(strings.Repeat(" ", len(s.cells)))
	return s
}

// column gives the column of a minute; it may lie outside the strip.
func (s strip) column(m hours.Minute) int {
	d := int(m - s.From)
	if d < 0 {
		return -1
	}
	return d / s.step
}

// fill draws r over a span: every column of which the span takes a half or more, and the first
// one where that is none.
func (s strip) fill(span hours.Span, r rune) (from, to int) {
	if !span.Overlaps(s.Span) {
		return 0, 0
	}
	half := hours.Minute(s.step / 2)
	from, to = s.column(max(span.From, s.From)+half), s.column(min(span.To, s.To)-1+half)
	if (int(span.From-s.From))%s.step == 0 {
		from = s.column(max(span.From, s.From))
	}
	if int(span.To-s.From)%s.step == 0 {
		to = s.column(min(span.To, s.To))
	}
	from = min(from, len(s.cells)-1)
	to = min(max(to, from+1), len(s.cells))
	for i := from; i < to; i++ {
		s.cells[i] = r
	}
	return from, to
}

// point draws r at a minute; where something stands already, in the nearest free column before.
func (s strip) point(m hours.Minute, r rune) {
	c := min(s.column(m), len(s.cells)-1)
	for i := c; i >= 0; i-- {
		if s.cells[i] == ' ' {
			s.cells[i] = r
			return
		}
	}
}

// write puts text from a column on, no further than to.
func (s strip) write(from, to int, text string) {
	for _, r := range text {
		if from >= to || from >= len(s.cells) || width(string(r)) != 1 {
			return
		}
		s.cells[from] = r
		from++
	}
}

func (s strip) String() string { return string(s.cells) }

// ruler writes the hours over a strip, as many as there is room for.
func (s strip) ruler(zone *time.Location) string {
	out := s.blank()
	next := 0
	for t := s.From; t < s.To; t += 60 {
		c := s.column(t)
		if c >= next && c+2 <= len(out.cells) {
			out.write(c, len(out.cells), t.In(zone).Format("15"))
			next = c + 3
		}
	}
	return out.String()
}

// windowStrip draws the window with its days, open hours, hands-on work and marks.
func windowStrip(a *plan.Answer, shifts []*agenda.Shift, n int) []line {
	w := a.Work
	zone := agenda.Zone(w, w.Window.Place)
	span := hours.Span{From: w.Window.Opens, To: w.Window.Closes}
	what := "Window"
	if w.Trip != nil {
		what = "Window of trip " + w.Trip.Name
	}
	out := para(n, "", fmt.Sprintf("%s: %s to %s (times local, %s)", what, agenda.When(span.From, zone), agenda.When(span.To, zone), zone), Head, nil)
	if a.Plan != nil && a.Finish > span.To && a.Finish < span.To+14*1440 {
		span.To = a.Finish // a late plan runs past the close
	}
	const label = 7
	base := newStrip(span, zone, n-label)
	days, open, work, marks := base.blank(), base.blank(), base.blank(), base.blank()
	dayMarks(days, zone)
	for _, o := range agenda.PlaceHours(w, w.Window.Place).Within(hours.Span{From: w.Window.Opens, To: w.Window.Closes}) {
		open.fill(o, '_')
	}
	for _, s := range shifts {
		for _, e := range s.Entries {
			if e.Step.Place == w.Window.Place && !e.Watch {
				work.fill(e.Span, '=')
			}
		}
	}
	key := "_ open   = hands-on work"
	point := func(m hours.Minute, r rune, says string) {
		if m < span.From || m > span.To {
			return
		}
		marks.point(m, r)
		if says = "   " + string(r) + " " + says; !strings.Contains(key, says) {
			key += says
		}
	}
	point(w.Window.Closes, '|', "close")
	if a.Plan != nil {
		point(a.Finish, 'F', "finish")
	}
	for _, d := range a.Deadlines {
		if d.Task != nil {
			point(d.By, 'D', "deadline")
		}
	}
	for _, r := range []struct {
		name string
		s    strip
	}{{"days", days}, {"open", open}, {"work", work}, {"marks", marks}} {
		out = append(out, line{text: strings.TrimRight(pad(r.name, label)+r.s.String(), " ")})
	}
	return append(out, line{text: cut(strings.Repeat(" ", label)+key, n), mark: Faint})
}

// dayMarks writes the days at their midnights, as long as there is room.
func dayMarks(s strip, zone *time.Location) {
	free := 0
	for d := hours.DateOf(s.From.In(zone)); ; d = d.Add(1) {
		m, _ := hours.Instant(d, 0, zone)
		if m >= s.To {
			return
		}
		c := s.column(max(m, s.From))
		next, _ := hours.Instant(d.Add(1), 0, zone)
		room := min(s.column(next), len(s.cells)) - c
		if c < free || c >= len(s.cells) {
			continue
		}
		s.cells[c] = '|'
		for _, f := range []string{"Mon 2 Jan", "Mon 2", "2"} {
			if text := m.In(zone).Format(f); width(text)+1 < room {
				s.write(c+1, len(s.cells), text)
				break
			}
		}
		free = c + 2
	}
}

// standing says whether a step is time that passes without hands.
func standing(s *expand.Step) bool { return s.Class != expand.Hands }
