package agenda_test

import (
	"strings"
	"testing"
	"time"

	"sailby/report/agenda"
	"sailby/tasks/hours"
)

// In a night shift the end of a piece goes without its day; a late plan's days are told from the close on.
func TestNightsAndLateDays(t *testing.T) {
	w := bridge(t, "daily 21:00-05:00") // Fri 4 June 21:00 to Mon 01:00
	z := london(t)
	from := w.Window.Opens + 125
	for span, want := range map[hours.Span]string{
		{From: from, To: from + 86}:                              "23:05-00:31",
		{From: from, To: from + 55}:                              "23:05-24:00",
		{From: w.Window.Opens, To: w.Window.Opens + 60}:          "21:00-22:00",
		{From: w.Window.Opens, To: w.Window.Opens + 12*60}:       "21:00-Sat 5 Jun 09:00",
		{From: w.Window.Opens + 1440, To: w.Window.Opens + 2000}: "21:00-06:20",
	} {
		if got := agenda.Within(span, z); got != want {
			t.Errorf("%v is written %q, want %q", span, got, want)
		}
	}
	s := &agenda.Shift{Span: hours.Span{From: w.Window.Closes + 1200, To: w.Window.Closes + 1500}, Site: true, Zone: z, Place: w.Window.Place,
		Date: hours.Date{Year: 2027, Month: time.June, Day: 7}}
	if got := agenda.DayOf(w, s); got != "day 4 of 4" {
		t.Errorf("the day of the close is %q", got)
	}
	s.Date.Day = 9
	if got := agenda.DayOf(w, s); got != "2 days after the window closes" {
		t.Errorf("two days after the close is %q", got)
	}
	if got := agenda.Facts(w, s); !strings.Contains(got, "at the start 20 h past the window's end") {
		t.Errorf("past the end it says %q", got)
	}
}
