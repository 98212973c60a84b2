package hours

import (
	"time"
)

// Of gives the minute that t lies in.
func Of(t time.Time) Minute {
	s := t.Unix()
	if s < 0 && s%60 != 0 {
		return Minute(s/60 - 1)
	}
	return Minute(s / 60)
}

// In gives minute m as a time in loc.
func (m Minute) In(loc *time.Location) time.Time { return time.Unix(int64(m)*60, 0).In(loc) }

// Date is a calendar day.
type Date struct {
	Year  int
	Month time.Month
	Day   int
}

// DateOf gives the calendar day of t in t's own zone.
func DateOf(t time.Time) Date {
	y, m, d := t.Date()
	return Date{y, m, d}
}

// Add gives the day n days later.
func (d Date) Add(n int) Date {
	return DateOf(time.Date(d.Year, d.Month, d.Day+n, 12, 0, 0, 0, time.UTC))
}

// Weekday gives the day of the week.
func (d Date) Weekday() time.Weekday {
	return time.Date(d.Year, d.Month, d.Day, 12, 0, 0, 0, time.UTC).Weekday()
}

// Before says whether d comes before o.
func (d Date) Before(o Date) bool {
	if d.Year != o.Year {
		return d.Year < o.Year
	}
	if d.Month != o.Month {
		return d.Month < o.Month
	}
	return d.Day < o.Day
}

// Valid says whether the day exists.
func (d Date) Valid() bool {
	return DateOf(time.Date(d.Year, d.Month, d.Day, 12, 0, 0, 0, time.UTC)) == d
}

// String writes the day as 2027-04-05.
func (d Date) String() string {
	return time.Date(d.Year, d.Month, d.Day, 12, 0, 0, 0, time.UTC).Format("2006-01-02")
}

// Clock tells how a local time maps to an instant.
type Clock uint8

const (
	Plain    Clock = iota
	Gap            // the local time does not exist: the clocks go forward over it
	Repeated       // it exists twice; the earlier one is meant
)

// Instant gives the UTC minute of local time d at minute of day (0 to 1440 and beyond: minutes
// after midnight on the wall clock, negative ones before it) in loc. In a repeated hour the earlier instant is meant; in
// a gap the first instant after the gap is given, with Gap.
func Instant(d Date, minute int, loc *time.Location) (Minute, Clock) {
	days := minute / 1440
	if minute < 0 {
		days = (minute - 1439) / 1440
	}
	d = d.Add(days)
	minute -= days * 1440
	wall := time.Date(d.Year, d.Month, d.Day, 0, minute, 0, 0, time.UTC)
	// Candidates: the wall time read with the offsets in force a day before and a day after.
	var found []Minute
	for _, near := range []time.Duration{-26 * time.Hour, 26 * time.Hour} {
		_, off := wall.Add(near).In(loc).Zone()
		m := Of(wall) - Minute(off/60)
		t := m.In(loc)
		if DateOf(t) == d && t.Hour()*60+t.Minute() == minute {
			found = append(found, m)
		}
	}
	switch {
	case len(found) == 0:
		return gapEnd(wall, loc), Gap
	case len(found) == 2 && found[0] != found[1]:
		return min(found[0], found[1]), Repeated
	}
	return found[0], Plain
}

// gapEnd finds the instant at which the clocks go forward over the wall time.
func gapEnd(wall time.Time, loc *time.Location) Minute {
	lo, hi := Of(wall)-26*60, Of(wall)+26*60
	_, before := lo.In(loc).Zone()
	for lo+1 < hi { // first minute with another offset than before
		mid := (lo + hi) / 2
		if _, off := mid.In(loc).Zone(); off == before {
			lo = mid
		} else {
			hi = mid
		}
	}
	return hi
}

// MinuteOfDay gives the wall-clock minutes after midnight of m in loc, 0 to 1439.
func MinuteOfDay(m Minute, loc *time.Location) int {
	t := m.In(loc)
	return t.Hour()*60 + t.Minute()
}
