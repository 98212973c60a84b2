package hours

import (
	"testing"
	"time"

	"pgregory.net/rapid"
)

func TestInstantOfLocalTimes(t *testing.T) {
	for _, tc := range []struct {
		what, zone string
		day        Date
		minute     int
		utc        string
		clock      Clock
	}{
		{"winter in London", "Europe/London", Date{2027, time.January, 5}, 615, "2027-01-05 10:15", Plain},
		{"summer in London", "Europe/London", Date{2027, time.April, 5}, 615, "2027-04-05 09:15", Plain},
		{"the last minute before the jump", "Europe/London", Date{2027, time.March, 28}, 59, "2027-03-28 00:59", Plain},
		{"a time jumped over is the jump", "Europe/London", Date{2027, time.March, 28}, 90, "2027-03-28 01:00", Gap},
		{"the jump itself does not exist on the wall", "Europe/London", Date{2027, time.March, 28}, 60, "2027-03-28 01:00", Gap},
		{"the first minute after the jump", "Europe/London", Date{2027, time.March, 28}, 120, "2027-03-28 01:00", Plain},
		{"of two the earlier", "Europe/London", Date{2027, time.October, 31}, 90, "2027-10-31 00:30", Repeated},
		{"after the second", "Europe/London", Date{2027, time.October, 31}, 120, "2027-10-31 02:00", Plain},
		{"New York jumps at two", "America/New_York", Date{2027, time.March, 14}, 150, "2027-03-14 07:00", Gap},
		{"New York repeats one to two", "America/New_York", Date{2027, time.November, 7}, 119, "2027-11-07 05:59", Repeated},
		{"half an hour forward", "Australia/Lord_Howe", Date{2027, time.October, 3}, 135, "2027-10-02 15:30", Gap},
		{"half an hour is all that is missing", "Australia/Lord_Howe", Date{2027, time.October, 3}, 150, "2027-10-02 15:30", Plain},
		{"half an hour twice", "Australia/Lord_Howe", Date{2027, time.April, 4}, 100, "2027-04-03 14:40", Repeated},
		{"before that half hour", "Australia/Lord_Howe", Date{2027, time.April, 4}, 89, "2027-04-03 14:29", Plain},
		{"no change at all", "Asia/Tokyo", Date{2027, time.March, 28}, 90, "2027-03-27 16:30", Plain},
		{"the end of a day is the next day's beginning", "Europe/London", Date{2027, time.January, 5}, 1440, "2027-01-06 00:00", Plain},
		{"a night runs into the next day", "Europe/London", Date{2027, time.January, 5}, 1440 + 420, "2027-01-06 07:00", Plain},
		{"minutes before midnight are the day before's", "Europe/London", Date{2027, time.January, 5}, -30, "2027-01-04 23:30", Plain},
		{"a whole day before", "Europe/London", Date{2027, time.January, 5}, -1440, "2027-01-04 00:00", Plain},
		{"a midnight that does not exist", "Asia/Beirut", Date{2025, time.March, 30}, 0, "2025-03-29 22:00", Gap},
		{"a day that does not exist", "Pacific/Apia", Date{2011, time.December, 30}, 720, "2011-12-30 10:00", Gap},
	} {
		want, err := time.Parse("2006-01-02 15:04", tc.utc)
		if err != nil {
			t.Fatal(err)
		}
		at, clock := Instant(tc.day, tc.minute, zone(t, tc.zone))
		if at != Of(want) || clock != tc.clock {
			t.Errorf("%s: %v (%d), want %v (%d)", tc.what, at.In(time.UTC), clock, want, tc.clock)
		}
	}
}

// What the wall shows at any minute leads back to it, or to the earlier of the two that show the same.
func TestInstantInvertsTheWall(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := changes[rapid.IntRange(0, len(changes)-1).Draw(t, "change")]
		loc, err := time.LoadLocation(c.zone)
		if err != nil {
			t.Fatal(err)
		}
		noon, _ := Instant(c.day, 720, loc)
		m := noon + Minute(rapid.IntRange(-1440, 1440).Draw(t, "minute"))
		got, clock := Instant(DateOf(m.In(loc)), MinuteOfDay(m, loc), loc)
		switch {
		case clock == Gap:
			t.Fatalf("%v is on the wall, and said not to be", m.In(loc))
		case clock == Plain && got != m:
			t.Fatalf("%v leads to %v", m.In(loc), got.In(loc))
		case clock == Repeated && got != m && (got > m || MinuteOfDay(got, loc) != MinuteOfDay(m, loc)):
			t.Fatalf("%v leads to %v", m.In(loc), got.In(loc))
		}
	})
}

func TestDates(t *testing.T) {
	d := Date{2027, time.February, 28}
	if got := d.Add(1); got != (Date{2027, time.March, 1}) {
		t.Errorf("the day after %v is %v", d, got)
	}
	if got := (Date{2028, time.February, 28}).Add(1); got.Day != 29 {
		t.Errorf("2028 is a leap year, and got %v", got)
	}
	if d.Weekday() != time.Sunday {
		t.Errorf("%v is a %v", d, d.Weekday())
	}
	if !d.Valid() || (Date{2027, time.February, 29}).Valid() || (Date{2027, 13, 1}).Valid() {
		t.Error("days that exist and days that do not are mixed up")
	}
	if d.String() != "2027-02-28" {
		t.Errorf("written as %q", d.String())
	}
	for _, p := range [][2]Date{{d, d.Add(1)}, {d, Date{2027, time.March, 1}}, {d, Date{2028, time.January, 1}}} {
		if !p[0].Before(p[1]) || p[1].Before(p[0]) || p[0].Before(p[0]) {
			t.Errorf("the order of %v and %v is wrong", p[0], p[1])
		}
	}
}

func TestOfRoundsDownOnBothSidesOf1970(t *testing.T) {
	for sec, want := range map[int64]Minute{0: 0, 59: 0, 60: 1, -1: -1, -60: -1, -61: -2} {
		if got := Of(time.Unix(sec, 0)); got != want {
			t.Errorf("second %d lies in minute %d, want %d", sec, got, want)
		}
	}
}
