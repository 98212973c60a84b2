package agenda

import (
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Duty works out the shifts of a person by rule R15 of the manual: from the first minute of
// their hours that is rested enough, to the longest duty or the next gap of a rest's length.
func Duty(w *expand.Work, p *tasks.Person) []hours.Span {
	duty, rest := int(w.Job.Duty.Value), int(w.Job.Rest.Value)
	if duty <= 0 {
		duty = 12 * 60
	}
	if rest <= 0 {
		rest = 11 * 60
	}
	var out []hours.Span
	set := personHours(w, p)
	ready := hours.Never
	for i := 0; i < len(set); {
		if set[i].To <= ready {
			i++
			continue
		}
		from := max(set[i].From, ready)
		end := from
		for ; i < len(set) && set[i].From < from+hours.Minute(duty); i++ {
			if end > from && int(set[i].From-end) >= rest {
				break
			}
			end = min(set[i].To, from+hours.Minute(duty))
			if set[i].To > end {
				break
			}
		}
		out = append(out, hours.Span{From: from, To: end})
		ready = end + hours.Minute(rest)
	}
	return out
}

// personHours are the minutes in which a person is at an open place within their own hours, and
// the legs of the trip.
func personHours(w *expand.Work, p *tasks.Person) hours.Set {
	if p.Outside {
		return w.Window.Slots(p.Booked)
	}
	var out hours.Set
	for _, stay := range w.Presence[p.Name] {
		for _, pl := range w.Job.Places {
			if (pl == w.Window.Place) != stay.Site || !mayWork(p, pl) {
				continue
			}
			open := PlaceHours(w, pl).Within(stay.Span)
			if p.Hours != nil {
				open = open.And(p.Hours.Spans(Zone(w, pl), stay.Span, func(d hours.Date) bool { return p.Off[d] }))
			} else if len(p.Off) > 0 {
				open = open.And(hours.Always.Spans(Zone(w, pl), stay.Span, func(d hours.Date) bool { return p.Off[d] }))
			}
			out = out.Or(open)
		}
	}
	return out.Or(hours.NewSet(w.Travel[p.Name]...))
}

func mayWork(p *tasks.Person, pl *tasks.Place) bool {
	if p.Places == nil {
		return true
	}
	for _, n := range p.Places {
		if n == pl.Name {
			return true
		}
	}
	return false
}

// PlaceHours are the minutes in which a place is open: its opening hours on days not closed,
// and its openings beyond them. Opening up and clearing up are inside.
func PlaceHours(w *expand.Work, p *tasks.Place) hours.Set {
	open := p.Open.Spans(Zone(w, p), w.Span, func(d hours.Date) bool {
		_, closed := p.Closed[d]
		return closed
	})
	return open.Or(w.Window.Slots(p.AlsoOpen))
}
