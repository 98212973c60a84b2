package hours

import (
	"testing"
	"time"

	"pgregory.net/rapid"
)

func zone(t interface {
	Helper()
	Fatal(...any)
}, name string) *time.Location {
	t.Helper()
	loc, err := time.LoadLocation(name)
	if err != nil {
		t.Fatal(err)
	}
	return loc
}

// Changes of the clocks: Europe at 01:00 UTC on the last Sunday of March and October; New York at 02:00 local
// on the second Sunday of March; Lord Howe by half an hour at 02:00 local on the first Sundays of October and
// April; Samoa left out all of 2011-12-30. (From the IANA time zone database.)
func TestInstant(t *testing.T) {
	for _, c := range []struct {
		zone   string
		d      Date
		minute int
		want   string
		clock  Clock
	}{
		{"Europe/London", Date{2027, 4, 5}, 615, "2027-04-05 09:15", Plain},
		{"Europe/London", Date{2027, 3, 28}, 59, "2027-03-28 00:59", Plain},
		{"Europe/London", Date{2027, 3, 28}, 60, "2027-03-28 01:00", Gap},
		{"Europe/London", Date{2027, 3, 28}, 119, "2027-03-28 01:00", Gap},
		{"Europe/London", Date{2027, 3, 28}, 120, "2027-03-28 01:00", Plain},
		{"Europe/London", Date{2027, 10, 31}, 59, "2027-10-30 23:59", Plain},
		{"Europe/London", Date{2027, 10, 31}, 60, "2027-10-31 00:00", Repeated},
		{"Europe/London", Date{2027, 10, 31}, 119, "2027-10-31 00:59", Repeated},
		{"Europe/London", Date{2027, 10, 31}, 120, "2027-10-31 02:00", Plain},
		{"America/New_York", Date{2027, 3, 14}, 150, "2027-03-14 07:00", Gap},
		{"Australia/Lord_Howe", Date{2027, 10, 3}, 135, "2027-10-02 15:30", Gap},
		{"Australia/Lord_Howe", Date{2027, 4, 4}, 105, "2027-04-03 14:45", Repeated},
		{"Pacific/Apia", Date{2011, 12, 30}, 600, "2011-12-30 10:00", Gap},
		{"Pacific/Kiritimati", Date{2027, 4, 5}, 0, "2027-04-04 10:00", Plain},
		{"Etc/GMT+12", Date{2027, 4, 5}, 0, "2027-04-05 12:00", Plain},
		{"UTC", Date{2027, 4, 5}, 1440, "2027-04-06 00:00", Plain},
		{"UTC", Date{2027, 4, 5}, 3000, "2027-04-07 02:00", Plain},
		{"UTC", Date{2027, 4, 5}, -30, "2027-04-04 23:30", Plain},
		{"UTC", Date{2027, 4, 5}, -1440, "2027-04-04 00:00", Plain},
	} {
		got, clock := Instant(c.d, c.minute, zone(t, c.zone))
		if s := got.In(time.UTC).Format("2006-01-02 15:04"); s != c.want || clock != c.clock {
			t.Errorf("%s %s %d: %s (%d), want %s (%d)", c.zone, c.d, c.minute, s, clock, c.want, c.clock)
		}
	}
}

// A local time that is plain reads back as itself, and later minutes of the clock never come earlier.
func TestInstantLaws(t *testing.T) {
	zones := []string{"Europe/London", "America/St_Johns", "Australia/Lord_Howe", "Asia/Kathmandu", "Africa/Casablanca", "Pacific/Chatham"}
	rapid.Check(t, func(t *rapid.T) {
		loc := zone(t, rapid.SampledFrom(zones).Draw(t, "zone"))
		d := Date{2027, 1, 1}.Add(rapid.IntRange(0, 400).Draw(t, "day"))
		m := rapid.IntRange(0, 1439).Draw(t, "minute")
		at, clock := Instant(d, m, loc)
		if clock != Gap && (DateOf(at.In(loc)) != d || MinuteOfDay(at, loc) != m) {
			t.Fatalf("%s %d reads back as %v", d, m, at.In(loc))
		}
		later, _ := Instant(d, m+1, loc)
		if later < at {
			t.Fatalf("%s: minute %d is %v, the next %v", d, m, at.In(loc), later.In(loc))
		}
	})
}

func TestOf(t *testing.T) {
	for s, want := range map[string]Minute{"1970-01-01T00:00:59Z": 0, "1970-01-01T00:01:00Z": 1, "1969-12-31T23:59:59Z": -1, "1969-12-31T23:59:00Z": -1, "1969-12-31T23:58:59Z": -2} {
		at, err := time.Parse(time.RFC3339, s)
		if err != nil {
			t.Fatal(err)
		}
		if got := Of(at); got != want {
			t.Errorf("%s is minute %d, want %d", s, got, want)
		}
	}
}

func TestDate(t *testing.T) {
	d := Date{2028, 2, 28}
	if d.Add(2) != (Date{2028, 3, 1}) || d.Add(-59) != (Date{2027, 12, 31}) || d.Weekday() != time.Monday || d.String() != "2028-02-28" {
		t.Errorf("%s %s %s", d.Add(2), d.Add(-59), d.Weekday())
	}
	if !d.Valid() || (Date{2027, 2, 29}).Valid() || (Date{2027, 13, 1}).Valid() || (Date{2027, 1, 0}).Valid() {
		t.Error("Valid is wrong")
	}
	if !d.Before(d.Add(1)) || d.Before(d) || !(Date{2027, 12, 31}).Before(Date{2028, 1, 1}) || (Date{2028, 3, 1}).Before(Date{2028, 2, 28}) {
		t.Error("Before is wrong")
	}
}

func TestParseWeekday(t *testing.T) {
	for s, want := range map[string]time.Weekday{"Mon": time.Monday, "mon": time.Monday, " Sunday ": time.Sunday, "SAT": time.Saturday} {
		if d, ok := ParseWeekday(s); !ok || d != want {
			t.Errorf("%q is %v, want %v", s, d, want)
		}
	}
	for _, s := range []string{"", "Mo", "Montag", "Monda"} {
		if _, ok := ParseWeekday(s); ok {
			t.Errorf("%q is a day", s)
		}
	}
}
