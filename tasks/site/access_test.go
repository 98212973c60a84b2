package site

import (
	"strings"
	"testing"
)

const slip = `# zone: Europe/London
from,to,why
2026-04-13 06:00,2026-04-13 09:30,morning low water
2026-04-13 18:30,2026-04-13 22:00
2026-04-14 23:00,2026-04-15 02:00,night
`

func TestAccessTimes(t *testing.T) {
	a, err := ReadReach("slip.csv", strings.NewReader(slip))
	if err != nil {
		t.Fatal(err)
	}
	from, to := utc(t, "2026-04-13 08:00"), utc(t, "2026-04-15 06:00")
	open := a.Reach(from, to)
	if len(open) != 3 || open[0] != (Span{from, utc(t, "2026-04-13 08:30"), "morning low water"}) || open[2].From != utc(t, "2026-04-14 22:00") {
		t.Errorf("open %v", open)
	}
	shut := a.Shut(from, to)
	if len(shut) != 3 || shut[0] != (Span{utc(t, "2026-04-13 08:30"), utc(t, "2026-04-13 17:30"), "no access by slip.csv"}) ||
		shut[2].Why != "after the last access time in slip.csv (2026-04-15 01:00 UTC)" {
		t.Errorf("shut %v", shut)
	}
	if early := a.Shut(from-2*day, from-day); len(early) != 1 || !strings.HasPrefix(early[0].Why, "before the first access time") {
		t.Errorf("early %v", early)
	}
	if a.Shut(to, from) != nil || a.Reach(to, from) != nil {
		t.Error("a span that runs backwards has times")
	}
}

func TestAccessFaults(t *testing.T) {
	const head = "# zone: UTC\n"
	for _, c := range []struct{ text, want string }{
		{"2026-04-13 06:00,2026-04-13 09:30\n", "s:1:1: does not state its zone"},
		{head, "s:1:1: no access time"},
		{head + "2026-04-13 09:00,2026-04-13 08:30\n", `s:2:18: "2026-04-13 08:30" is not after "2026-04-13 09:00"`},
		{head + "2026-04-13 06:00,2026-04-13 09:30\n2026-04-13 09:00,2026-04-13 10:30\n", `s:3:1: "2026-04-13 09:00" is before the end of the access before it, 30 min later`},
		{head + "2026-04-13 06:00\n", "s:2:1: 1 fields where 2 to 3 was expected"},
		{head + "6:00,7:00\n", `s:2:1: "6:00" is not a date and time`},
	} {
		a, err := ReadReach("s", strings.NewReader(c.text))
		if a != nil || err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("want %q in\n%v", c.want, err)
		}
	}
}

func TestWayOff(t *testing.T) {
	open := []Span{{From: 0, To: 100}, {From: 200, To: 220}, {From: 300, To: 400}}
	got := WayOff(open, 30, 400)
	if len(got) != 2 || got[0].To != 70 || got[1].To != 400 {
		t.Errorf("got %v", got)
	}
	if open[0].To != 100 {
		t.Error("the question was changed")
	}
}
