package agenda

import (
	"fmt"
	"strings"
	"time"

	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// Headline names a shift by the day on which it begins: "Tuesday 6 April 2027, day 1 of 4,
// Tarskay pier, 07:30-18:00".
func Headline(w *expand.Work, s *Shift) string {
	parts := []string{LongDay(s.Date)}
	if s.Night {
		parts[0] += ", night"
	}
	if d := DayOf(w, s); d != "" {
		parts = append(parts, d)
	}
	if s.Place != nil {
		parts = append(parts, PlaceLabel(s.Place))
	}
	return strings.Join(append(parts, Between(s.Span, s.Zone)), ", ")
}

// DayOf says which day of the window a shift at the site begins on ("day 2 of 4"), or how many
// days are left before the trip leaves or the window opens.
func DayOf(w *expand.Work, s *Shift) string {
	if s.Site {
		first := w.Window.DayOne()
		last := hours.DateOf((w.Window.Closes - 1).In(Zone(w, w.Window.Place)))
		if n := days(last, s.Date); n > 0 { // a late plan
			return counted(n, "day") + " after the window closes"
		}
		return fmt.Sprintf("day %d of %d", days(first, s.Date)+1, days(first, last)+1)
	}
	goes, what := w.Window.Opens, "the window opens"
	if w.Trip != nil {
		goes, what = w.Trip.Leaves, "leaving"
	}
	switch n := days(s.Date, hours.DateOf(goes.In(s.Zone))); {
	case n == 0 && w.Trip != nil:
		return "the day of leaving"
	case n == 0:
		return "the day on which the window opens"
	case n == 1:
		return "1 day before " + what
	case n > 1:
		return fmt.Sprintf("%d days before %s", n, what)
	}
	return ""
}

func counted(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

// days counts the days from a to b.
func days(a, b hours.Date) int {
	t := func(d hours.Date) time.Time { return time.Date(d.Year, d.Month, d.Day, 0, 0, 0, 0, time.UTC) }
	return int(t(b).Sub(t(a)).Hours()) / 24
}

// Facts gives the day's sun and tide, the hours that nature leaves to coats and, at the site, the hours left to the window's end.
func Facts(w *expand.Work, s *Shift) string {
	var nature []string
	if s.Place != nil {
		nature = FitWords(w, s.Place, s.Span)
	}
	return facts(w, s, nature)
}

// Day gives what Facts gives without the hours that nature leaves to coats.
func Day(w *expand.Work, s *Shift) string { return facts(w, s, nil) }

func facts(w *expand.Work, s *Shift, nature []string) string {
	var parts []string
	if t := SunWords(s); t != "" {
		parts = append(parts, t)
	}
	if t := Tides(w, s.Place, s.Date); t != "" {
		parts = append(parts, t)
	}
	if len(nature) > 0 {
		parts = append(parts, "weather and water leave "+strings.Join(nature, ", "))
	}
	if left := int(w.Window.Closes - s.From); s.Site && left >= 0 {
		parts = append(parts, fmt.Sprintf("at the start %s left to the window's end", quantity.Hours(left)))
	} else if s.Site {
		parts = append(parts, fmt.Sprintf("at the start %s past the window's end", quantity.Hours(-left)))
	}
	return strings.Join(append(parts, "times "+s.From.In(s.Zone).Format("MST")), "; ")
}

// Opens writes when a gate is open in a shift: "08:10-12:10 and 20:30-21:00", or "not in this shift".
func Opens(g Gate, zone *time.Location) string {
	if g.Open.Total() == 0 {
		return "not in this shift"
	}
	var parts []string
	for _, s := range g.Open {
		parts = append(parts, Between(s, zone))
	}
	return strings.Join(parts, " and ")
}

// NextPiece says when a step that is not done in this piece goes on: "Thu 8 Apr 08:00".
func NextPiece(w *expand.Work, e Entry) string {
	for _, p := range e.Planned.Pieces {
		if p.From >= e.To {
			return When(p.From, Zone(w, e.Step.Place))
		}
	}
	return When(e.Planned.Finish, Zone(w, e.Step.Place))
}
