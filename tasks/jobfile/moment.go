package jobfile

import (
	"fmt"
	"strconv"
	"strings"
	"time"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// window is one window that the job may be planned for: a trip's or the plain one.
type window struct {
	what          string
	zone          *time.Location
	opens, closes hours.Minute
}

// dayOne is the day on which the window opens, in its own zone.
func (w window) dayOne() hours.Date { return hours.DateOf(w.opens.In(w.zone)) }

// lastDay is the day of the window's last minute.
func (w window) lastDay() hours.Date { return hours.DateOf((w.closes - 1).In(w.zone)) }

// at gives the minute that m means in this window. Times is how often a named weekday occurs
// in it, 1 for every other moment.
func (w window) at(m *tasks.Moment) (at hours.Minute, clock hours.Clock, times int) {
	day, times := m.Date, 1
	switch {
	case m.ByName:
		times = 0
		for d := w.dayOne(); !w.lastDay().Before(d) && times < 3; d = d.Add(1) {
			if d.Weekday() == m.Weekday {
				day = d
				times++
			}
		}
		if times == 0 {
			return 0, hours.Plain, 0
		}
	case m.Day != 0:
		day = w.dayOne().Add(m.Day - 1)
	}
	at, clock = hours.Instant(day, m.Minute, m.Zone)
	return at, clock, times
}

// pending is a moment to be judged when the windows are known.
type pending struct {
	m    *tasks.Moment
	lead string
}

const momentHint = "write `2027-04-05 10:15`, `day 3 10:15` of the window, or `Wed 10:15`"

func advise(hint, format string, args ...any) error {
	return &quantity.Error{Problem: fmt.Sprintf(format, args...), Hint: hint}
}

// parseDay reads "2027-04-05", "day 3" or "Wed".
func parseDay(words []string, m *tasks.Moment) error {
	text := strings.Join(words, " ")
	switch {
	case len(words) == 2 && words[0] == "day":
		n, err := strconv.Atoi(words[1])
		if err != nil || n < 1 || n > 366 || leadingZero(words[1]) {
			return advise("the day on which the window opens is day 1", "%s is not a day of the window", short(text))
		}
		m.Day = n
		return nil
	case len(words) == 1:
		if d, ok := parseDate(words[0]); ok {
			if !d.Valid() {
				return advise("look at the calendar", "there is no day %s", text)
			}
			if d.Year < 2000 || d.Year > 2199 {
				return advise("years from 2000 to 2199 are taken", "%s is out of all proportion", text)
			}
			m.Date = d
			return nil
		}
		if w, ok := hours.ParseWeekday(words[0]); ok {
			m.Weekday, m.ByName = w, true
			return nil
		}
	}
	return advise(momentHint, "%s is not a day", short(text))
}

// parseDate reads year, month and day with hyphens; the day may not exist.
func parseDate(s string) (hours.Date, bool) {
	if len(s) != 10 || s[4] != '-' || s[7] != '-' {
		return hours.Date{}, false
	}
	y, err1 := strconv.ParseUint(s[:4], 10, 16)
	m, err2 := strconv.ParseUint(s[5:7], 10, 8)
	d, err3 := strconv.ParseUint(s[8:], 10, 8)
	if err1 != nil || err2 != nil || err3 != nil {
		return hours.Date{}, false
	}
	return hours.Date{Year: int(y), Month: time.Month(m), Day: int(d)}, true
}

// parseMoment reads a local time.
func parseMoment(text string) (tasks.Moment, error) {
	m := tasks.Moment{Text: text}
	words := strings.Fields(text)
	if len(words) < 2 {
		if strings.Contains(text, "T") && len(text) > 10 {
			return m, advise("write a blank in place of T, and neither seconds nor an offset: "+momentHint[6:], "%s is not a local time as it is written here", short(text))
		}
		if _, ok := parseDate(text); ok {
			return m, advise(fmt.Sprintf("write for instance %s 08:00", text), "%s has no time of day", short(text))
		}
		return m, advise(momentHint, "%s is not a local time", short(text))
	}
	if err := parseDay(words[:len(words)-1], &m); err != nil {
		return m, err
	}
	var err error
	if m.Minute, err = hours.ParseClock(words[len(words)-1]); err != nil {
		return m, advise(momentHint, "%s", err)
	}
	return m, nil
}

// moment reads a local time of zone, to be judged in every window later. Nil is a faulty or no value.
func (f *fields) moment(name string, zone *time.Location) *tasks.Moment {
	s, ok := f.word(name)
	if !ok {
		return nil
	}
	m, err := parseMoment(s)
	if err != nil {
		f.r.advice(f.vals[name], f.lead(name), err, momentHint)
		return nil
	}
	m.Pos, m.Zone = f.pos(name), zone
	f.r.moments = append(f.r.moments, pending{&m, f.lead(name)})
	return &m
}

// fixed reads a local time that must have its date, because it makes the window.
func (f *fields) fixed(name string, zone *time.Location) (hours.Minute, bool) {
	s, ok := f.word(name)
	if !ok || zone == nil {
		return 0, false
	}
	m, err := parseMoment(s)
	if err != nil {
		f.r.advice(f.vals[name], f.lead(name), err, momentHint)
		return 0, false
	}
	if m.Day != 0 || m.ByName {
		f.fault(name, "write date and time, for instance 2027-04-05 10:15", "%s counts from the window, which this time makes", short(s))
		return 0, false
	}
	return f.r.instant(f.lead("")+name, f.pos(name), s, m.Date, m.Minute, zone), true
}

// judgeMoments checks every moment in every window.
func (r *reader) judgeMoments() {
	for _, p := range r.moments {
		if p.m.Zone == nil {
			continue // its place is at fault
		}
		for i, w := range r.windows {
			at, clock, times := w.at(p.m)
			if times != 1 {
				r.faultAt(p.m.Pos, "write the date, or the day of the window as `day 3`", "%s%s: there %s in %s (%s to %s)", p.lead, short(p.m.Text),
					map[bool]string{true: "is no such weekday", false: "are several of that weekday"}[times == 0], w.what, w.dayOne(), w.lastDay())
				break
			}
			if clock == hours.Gap {
				r.faultAt(p.m.Pos, fmt.Sprintf("the clocks go on at %s: give a time before or after", at.In(p.m.Zone).Format("15:04")),
					"%s%s does not exist in %s: the clocks jump over it", p.lead, short(p.m.Text), p.m.Zone)
				break
			}
			if clock == hours.Repeated && i == 0 {
				r.note(p.m.Pos, "%s%s happens twice in %s; the earlier is meant", p.lead, p.m.Text, p.m.Zone)
			}
		}
	}
}
