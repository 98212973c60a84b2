package hours

import (
	"fmt"
	"strings"
	"testing"
	"time"

	"pgregory.net/rapid"
)

func rule(t *testing.T, s string) Rule {
	t.Helper()
	r, err := ParseRule(s)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func TestParseRule(t *testing.T) {
	for s, want := range map[string]string{
		"Mon-Fri 07:30-12:00 12:30-17:30": "Mon Tue Wed Thu Fri [{450 720} {750 1050}]", "sat 8:00-13:00": "Sat [{480 780}]", "Fri-Mon 19:00-07:00": "Sun Mon Fri Sat [{1140 1860}]",
		"Mon,Wed,Friday 00:00-24:00": "Mon Wed Fri [{0 1440}]", "daily 06:00-22:00": "Sun Mon Tue Wed Thu Fri Sat [{360 1320}]", "always": "Sun Mon Tue Wed Thu Fri Sat [{0 1440}]",
	} {
		r := rule(t, s)
		got := ""
		for d, on := range r.Days {
			if on {
				got += time.Weekday(d).String()[:3] + " "
			}
		}
		if got += fmt.Sprint(r.Turns); got != want {
			t.Errorf("%q: %s, want %s", s, got, want)
		}
	}
	for s, says := range map[string]string{
		"": "empty", "Mon": "no hours", "Mo 08:00-12:00": `"Mo" is not a day`, "Mon-Fry 08:00-12:00": `"Fry" is not a day`, "Mon, 08:00-12:00": "is not a day", "Mon 08:00": "not a span", "Mon 8-12": "not a time of day",
		"Mon 08:60-12:00": "not a time", "Mon 24:30-12:00": "not a time", "Mon 24:00-12:00": "begins at 24:00", "Mon 08:00-08:00": "is empty", "Mon 12:00-13:00 08:00-09:00": "begins before", "Mon 19:00-07:00 06:00-08:00": "begins before",
		"Mon 08:00-12:0": "not a time", "Mon 008:00-12:00": "not a time", "Mon -08:00-12:00": "not a time", "daily": "no hours",
	} {
		if _, err := ParseRule(s); err == nil || !strings.Contains(err.Error(), says) {
			t.Errorf("%q: %v, want %q", s, err, says)
		}
	}
}

func TestSpans(t *testing.T) {
	london := zone(t, "Europe/London")
	week := func(p Pattern, from Date, days int, closed func(Date) bool) string {
		a, _ := Instant(from, 0, london)
		b, _ := Instant(from.Add(days), 0, london)
		var out []string
		for _, s := range p.Spans(london, Span{a, b}, closed) {
			out = append(out, s.From.In(london).Format("02 15:04")+"-"+s.To.In(london).Format("02 15:04"))
		}
		return strings.Join(out, ", ")
	}
	shop := Pattern{rule(t, "Mon-Fri 07:30-12:00 12:30-17:30"), rule(t, "Sat 08:00-13:00")}
	friday := Date{2027, 4, 9}
	if got, want := week(shop, friday, 3, nil), "09 07:30-09 12:00, 09 12:30-09 17:30, 10 08:00-10 13:00"; got != want {
		t.Errorf("%s, want %s", got, want)
	}
	if got := week(shop, friday, 3, func(d Date) bool { return d == friday }); got != "10 08:00-10 13:00" {
		t.Errorf("a closed day: %s", got)
	}
	// A night belongs to the day on which it begins: it runs into a closed day, and not out of one.
	night := Pattern{rule(t, "Thu,Fri 19:00-07:00")}
	if got := week(night, friday, 3, nil); got != "09 00:00-09 07:00, 09 19:00-10 07:00" {
		t.Errorf("nights: %s", got)
	}
	if got := week(night, friday, 3, func(d Date) bool { return d == friday }); got != "09 00:00-09 07:00" {
		t.Errorf("nights of a closed day: %s", got)
	}
	// Clocks go on at 01:00 on 2027-03-28 and back at 02:00 on 2027-10-31.
	all := Pattern{rule(t, "daily 01:30-03:00")}
	if got := week(all, Date{2027, 3, 28}, 1, nil); got != "28 02:00-28 03:00" {
		t.Errorf("an opening in the gap: %s", got)
	}
	a, _ := Instant(Date{2027, 10, 31}, 0, london)
	if got := all.Spans(london, Span{a, a + 25*60}, nil).Total(); got != 150 {
		t.Errorf("01:30 to 03:00 of the night with the hour twice has %d min, want 150 from the earlier 01:30", got)
	}
	if got := Always.Spans(london, Span{a, a + 25*60}, nil).Total(); got != 1500 {
		t.Errorf("always is open for %d min of a day of 25 h", got)
	}
	if Pattern(nil).Spans(london, Span{a, a + 100}, nil) != nil || Always.Spans(london, Span{a, a}, nil) != nil {
		t.Error("the nil pattern, or no time at all, is open")
	}
}

func TestLongest(t *testing.T) {
	for s, want := range map[string][2]int{"Mon-Fri 07:30-12:00 12:30-17:30": {300, 570}, "Fri 19:00-07:00": {720, 720}, "daily 08:00-12:00": {240, 240}} {
		p := Pattern{rule(t, s)}
		if p.Longest(0) != want[0] || p.Longest(120) != want[1] {
			t.Errorf("%s: %d and %d, want %v", s, p.Longest(0), p.Longest(120), want)
		}
	}
}

// In UTC a pattern repeats every week.
func TestPatternWeeks(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		from, length := rapid.IntRange(0, 1439).Draw(t, "from"), rapid.IntRange(1, 1440).Draw(t, "length")
		var r Rule
		r.Days[rapid.IntRange(0, 6).Draw(t, "day")] = true
		r.Turns = []Turn{{from, from + length}}
		p := Pattern{r}
		a := Of(time.Date(2027, 1, 1, 0, 0, 0, 0, time.UTC)) + Minute(rapid.IntRange(0, 50000).Draw(t, "start"))
		w := Span{a, a + 10000}
		one, two := p.Spans(time.UTC, w, nil), p.Spans(time.UTC, Span{w.From + 10080, w.To + 10080}, nil)
		if len(one) != len(two) {
			t.Fatalf("%v and %v", one, two)
		}
		for i := range one {
			if one[i].From+10080 != two[i].From || one[i].To+10080 != two[i].To {
				t.Fatalf("%v and %v", one, two)
			}
		}
	})
}
