package hours

import (
	"strings"
	"testing"
	"time"

	"pgregory.net/rapid"
)

func zone(t testing.TB, name string) *time.Location {
	t.Helper()
	z, err := time.LoadLocation(name)
	if err != nil {
		t.Fatal(err)
	}
	return z
}

func pattern(t testing.TB, rules ...string) Pattern {
	t.Helper()
	var p Pattern
	for _, r := range rules {
		rule, err := ParseRule(r)
		if err != nil {
			t.Fatal(err)
		}
		p = append(p, rule)
	}
	return p
}

// walked says of every minute of w whether it lies in a turn, by the clock on the wall alone. The turn
// from a to b of day d holds from the first minute at which the wall shows d and a, or later, to
// the first at which it shows d and b, or later (R4: the earlier of two, the jump for a gap).
func walked(p Pattern, loc *time.Location, w Span, closed func(Date) bool) map[Minute]bool {
	type clock struct {
		day    int // since the first
		minute int
	}
	before := func(a, b clock) bool { return a.day < b.day || a.day == b.day && a.minute < b.minute }
	base := DateOf(w.From.In(loc)).Add(-2)
	first := map[clock]Minute{} // of every wall time the first minute at or past it
	want := map[clock]bool{}
	type turn struct{ from, to clock }
	var turns []turn
	for n := range int(w.Len()/1440) + 7 {
		d := base.Add(n)
		if closed != nil && closed(d) {
			continue
		}
		for _, r := range p {
			if !r.Days[d.Weekday()] {
				continue
			}
			for _, x := range r.Turns {
				v := turn{clock{n, x.From}, clock{n + x.To/1440, x.To % 1440}}
				turns = append(turns, v)
				want[v.from], want[v.to] = true, true
			}
		}
	}
	for m := w.From - 3*1440; m < w.To+4*1440; m++ {
		tm := m.In(loc)
		d := DateOf(tm)
		n := int(time.Date(d.Year, d.Month, d.Day, 0, 0, 0, 0, time.UTC).Sub(time.Date(base.Year, base.Month, base.Day, 0, 0, 0, 0, time.UTC)).Hours() / 24)
		now := clock{n, tm.Hour()*60 + tm.Minute()}
		for c := range want {
			if !before(now, c) {
				first[c] = m
				delete(want, c)
			}
		}
	}
	out := map[Minute]bool{}
	for _, v := range turns {
		for m := max(w.From, first[v.from]); m < min(w.To, first[v.to]); m++ {
			out[m] = true
		}
	}
	return out
}

// Weeks in which the clocks change, and one where they never do. New York and London: US and UK
// rules; Lord Howe goes by half an hour; Beirut's day begins at 01:00 when its clocks go forward.
var changes = []struct {
	zone string
	day  Date
}{
	{"Europe/London", Date{2027, time.March, 28}}, {"Europe/London", Date{2027, time.October, 31}},
	{"America/New_York", Date{2027, time.March, 14}}, {"America/New_York", Date{2027, time.November, 7}},
	{"Australia/Lord_Howe", Date{2027, time.April, 4}}, {"Australia/Lord_Howe", Date{2027, time.October, 3}},
	{"Asia/Tokyo", Date{2027, time.March, 28}}, {"Asia/Beirut", Date{2025, time.March, 30}},
}

func TestSpansAreTheMinutesOfTheWallClock(t *testing.T) {
	patterns := map[string]Pattern{
		"shop":                pattern(t, "Mon-Fri 07:30-12:00 12:30-17:30", "Sat 08:00-13:00"),
		"nights":              pattern(t, "Sat,Sun 19:00-07:00"),
		"always":              {Always[0]},
		"turns in the change": pattern(t, "Sun 00:30-01:30 02:10-02:20 02:30-03:30"),
		"midnight":            pattern(t, "daily 00:00-00:30 23:30-00:00"),
	}
	for name, p := range patterns {
		for _, c := range changes {
			loc := zone(t, c.zone)
			noon, _ := Instant(c.day, 720, loc)
			w := Span{noon - 2*1440 - 37, noon + 2*1440 + 11}
			shut := func(d Date) bool { return d == c.day.Add(-1) }
			for _, closed := range []func(Date) bool{nil, shut} {
				got, want := p.Spans(loc, w, closed), walked(p, loc, w, closed)
				n := 0
				for m := w.From; m < w.To; m++ {
					if got.Has(m) != want[m] {
						t.Errorf("%s, %s: at %v open is %v", name, c.zone, m.In(loc), got.Has(m))
						break
					}
					if want[m] {
						n++
					}
				}
				if got.Total() != n {
					t.Errorf("%s, %s: %d min, want %d", name, c.zone, got.Total(), n)
				}
			}
		}
	}
}

func TestRandomHoursAreTheMinutesOfTheWallClock(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := changes[rapid.IntRange(0, len(changes)-1).Draw(t, "change")]
		loc, err := time.LoadLocation(c.zone)
		if err != nil {
			t.Fatal(err)
		}
		var p Pattern
		for range rapid.IntRange(1, 2).Draw(t, "rules") {
			var r Rule
			for d := range r.Days {
				r.Days[d] = rapid.Bool().Draw(t, "day")
			}
			from := rapid.IntRange(0, 1439).Draw(t, "from")
			r.Turns = []Turn{{from, from + rapid.IntRange(1, 1440).Draw(t, "length")}}
			p = append(p, r)
		}
		noon, _ := Instant(c.day, 720, loc)
		w := Span{noon - 1440, noon + 1440}
		got, want := p.Spans(loc, w, nil), walked(p, loc, w, nil)
		for m := w.From; m < w.To; m++ {
			if got.Has(m) != want[m] {
				t.Fatalf("%s, %v: at %v open is %v", c.zone, p, m.In(loc), got.Has(m))
			}
		}
	})
}

func TestNightsOverTheChange(t *testing.T) {
	london := zone(t, "Europe/London")
	p := pattern(t, "Sat 19:00-07:00")
	for _, tc := range []struct {
		what string
		day  Date
		want int
	}{
		{"the night in March is an hour short", Date{2027, time.March, 27}, 11 * 60},
		{"the night in October is an hour long", Date{2027, time.October, 30}, 13 * 60},
		{"a night without a change", Date{2027, time.June, 5}, 12 * 60},
	} {
		from, _ := Instant(tc.day, 0, london)
		if got := p.Spans(london, Span{from, from + 3*1440}, nil).Total(); got != tc.want {
			t.Errorf("%s: %d min, want %d", tc.what, got, tc.want)
		}
		sunday := func(d Date) bool { return d == tc.day.Add(1) }
		if got := p.Spans(london, Span{from, from + 3*1440}, sunday).Total(); got != tc.want {
			t.Errorf("%s belongs to the day on which it begins, but closing the next day leaves %d min", tc.what, got)
		}
		saturday := func(d Date) bool { return d == tc.day }
		if got := p.Spans(london, Span{from, from + 3*1440}, saturday); got != nil {
			t.Errorf("%s: closed on its own day, and still %v", tc.what, got)
		}
	}
	if got := p.Spans(london, Span{5, 5}, nil); got != nil {
		t.Errorf("nothing is open in an empty span: %v", got)
	}
	if got := Pattern(nil).Spans(london, Span{0, 9999}, nil); got != nil {
		t.Errorf("no pattern is never open: %v", got)
	}
}

func TestLongestJoinsBreaks(t *testing.T) {
	p := pattern(t, "Mon-Thu 07:30-12:00 12:30-17:30", "Fri 19:00-07:00")
	for gap, want := range map[int]int{29: 12 * 60, 90: 12 * 60, 14 * 60: 4 * 570} { // from Thursday to Friday night it is 25.5 h
		if got := p.Longest(gap); got != want {
			t.Errorf("breaks of at most %d min joined: %d min, want %d", gap, got, want)
		}
	}
	day := pattern(t, "Mon 07:30-12:00 12:30-17:30")
	if a, b := day.Longest(29), day.Longest(30); a != 300 || b != 570 {
		t.Errorf("the longest turn is %d min and %d min with its break, want 300 and 570", a, b)
	}
}

func TestRulesAsWritten(t *testing.T) {
	for text, want := range map[string]Rule{
		"Mon-Fri 07:30-12:00 12:30-17:30": {[7]bool{false, true, true, true, true, true, false}, []Turn{{450, 720}, {750, 1050}}},
		"Sat 08:00-13:00":                 {[7]bool{6: true}, []Turn{{480, 780}}},
		"Mon,wed,Friday 19:00-07:00":      {[7]bool{1: true, 3: true, 5: true}, []Turn{{1140, 1860}}},
		"Fri-Mon 8:00-24:00":              {[7]bool{true, true, false, false, false, true, true}, []Turn{{480, 1440}}},
		"daily 06:00-22:00":               {[7]bool{true, true, true, true, true, true, true}, []Turn{{360, 1320}}},
		"always":                          Always[0],
	} {
		got, err := ParseRule(text)
		if err != nil || got.Days != want.Days || len(got.Turns) != len(want.Turns) {
			t.Errorf("%q: %v, %v, want %v", text, got, err, want)
			continue
		}
		for i := range got.Turns {
			if got.Turns[i] != want.Turns[i] {
				t.Errorf("%q: %v, want %v", text, got.Turns, want.Turns)
			}
		}
	}
}

func TestFaultyRulesQuoteTheWord(t *testing.T) {
	for text, says := range map[string]string{
		"":                            "empty",
		"Mon-Fri":                     "no hours",
		"Mun 08:00-12:00":             `"Mun" is not a day`,
		"Mon-Fry 08:00-12:00":         `"Fry" is not a day`,
		"Mon,, 08:00-12:00":           `"" is not a day`,
		"Mon 08:00":                   `"08:00" is not a span`,
		"Mon 8-12":                    `"8" is not a time of day`,
		"Mon 08:00-12":                `"12" is not a time of day`,
		"Mon 08:00-25:00":             `"25:00"`,
		"Mon 08:60-12:00":             `"08:60"`,
		"Mon 08:00-24:01":             `"24:01"`,
		"Mon 24:00-06:00":             "begins at 24:00",
		"Mon 08:00-08:00":             "is empty",
		"Mon 08:0x-09:00":             `"08:0x"`,
		"Mon 008:00-09:00":            `"008:00"`,
		"Mon 12:30-17:00 07:00-12:00": `"07:00-12:00" begins before`,
		"Mon 19:00-07:00 06:00-08:00": `"06:00-08:00" begins before`,
	} {
		if _, err := ParseRule(text); err == nil || !strings.Contains(err.Error(), says) {
			t.Errorf("%q: %v, want a fault that says %s", text, err, says)
		}
	}
	if _, err := ParseClock(" 07:30 "); err != nil {
		t.Errorf("blanks around a time do no harm: %v", err)
	}
}
