package expand

import (
	"sailby/tasks"
	"sailby/tasks/hours"
)

// DayOne is the calendar day, in the window's zone, on which the window opens: day 1.
func (w Window) DayOne() hours.Date {
	return hours.DateOf(w.Opens.In(w.Place.Zone))
}

// At resolves a moment of the job file for a window. ok is false where a weekday does not
// occur just once in the window, or the local time is jumped over by the clocks.
func (w Window) At(m tasks.Moment) (at hours.Minute, clock hours.Clock, ok bool) {
	zone := m.Zone
	if zone == nil {
		zone = w.Place.Zone
	}
	day := m.Date
	switch {
	case m.ByName:
		n := 0
		last := hours.DateOf((w.Closes - 1).In(w.Place.Zone))
		for d := w.DayOne(); !last.Before(d); d = d.Add(1) {
			if d.Weekday() == m.Weekday {
				day = d
				n++
			}
		}
		if n != 1 {
			return 0, hours.Plain, false
		}
	case m.Day != 0:
		day = w.DayOne().Add(m.Day - 1)
	}
	at, clock = hours.Instant(day, m.Minute, zone)
	return at, clock, clock != hours.Gap
}

// Slot resolves a slot for a window; ok is false where one of its ends cannot be.
func (w Window) Slot(s tasks.Slot) (hours.Span, bool) {
	a, _, ok1 := w.At(s.From)
	b, _, ok2 := w.At(s.To)
	return hours.Span{From: a, To: b}, ok1 && ok2
}

// Slots resolves a list of slots; those that cannot be resolved are left out (the reader has
// reported them).
func (w Window) Slots(list []tasks.Slot) hours.Set {
	var out []hours.Span
	for _, s := range list {
		if span, ok := w.Slot(s); ok {
			out = append(out, span)
		}
	}
	return hours.NewSet(out...)
}
