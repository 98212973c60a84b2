package hours

import (
	"fmt"
	"strings"
	"time"
)

// Turn is one opening on the wall clock: from From to To minutes after midnight of the day it
// belongs to. To may pass 1440: a night belongs to the day on which it begins.
type Turn struct{ From, To int }

// Rule opens the same turns on several weekdays (indexed by time.Weekday).
type Rule struct {
	Days  [7]bool
	Turns []Turn
}

// Pattern is a week of opening hours. Rules add up. The nil pattern is never open.
type Pattern []Rule

// Always is open day and night.
var Always = Pattern{{Days: [7]bool{true, true, true, true, true, true, true}, Turns: []Turn{{0, 1440}}}}

// ParseWeekday reads "Mon", "mon" or "Monday".
func ParseWeekday(s string) (time.Weekday, bool) {
	s = strings.ToLower(strings.TrimSpace(s))
	for d := time.Sunday; d <= time.Saturday; d++ {
		if full := strings.ToLower(d.String()); s == full || s == full[:3] {
			return d, true
		}
	}
	return 0, false
}

// ParseRule reads "Mon-Fri 07:30-12:00 12:30-17:30", "Sat 08:00-13:00", "Mon,Wed 19:00-07:00",
// "daily 06:00-22:00" or "always". Errors quote the word that is wrong.
func ParseRule(text string) (Rule, error) {
	var r Rule
	words := strings.Fields(text)
	if len(words) == 0 {
		return r, fmt.Errorf("opening hours are empty; write for instance Mon-Fri 07:30-12:00 12:30-17:30")
	}
	if len(words) == 1 && words[0] == "always" {
		return Always[0], nil
	}
	if err := parseDays(words[0], &r.Days); err != nil {
		return r, err
	}
	if len(words) == 1 {
		return r, fmt.Errorf("%q has days but no hours; write for instance %s 08:00-17:00", text, words[0])
	}
	for _, w := range words[1:] {
		t, err := parseTurn(w)
		if err != nil {
			return r, err
		}
		if n := len(r.Turns); n > 0 && t.From < r.Turns[n-1].To {
			return r, fmt.Errorf("%q begins before the hours written ahead of it end; write them in order", w)
		}
		r.Turns = append(r.Turns, t)
	}
	return r, nil
}

func parseDays(word string, days *[7]bool) error {
	if strings.EqualFold(word, "daily") {
		for i := range days {
			days[i] = true
		}
		return nil
	}
	for _, part := range strings.Split(word, ",") {
		a, b, span := strings.Cut(part, "-")
		from, ok := ParseWeekday(a)
		if !ok {
			return fmt.Errorf("%q is not a day; write Mon, Tue, Wed, Thu, Fri, Sat, Sun, Mon-Fri or daily", part)
		}
		to := from
		if span {
			if to, ok = ParseWeekday(b); !ok {
				return fmt.Errorf("%q is not a day; write for instance Mon-Fri", b)
			}
		}
		for d := from; ; d = (d + 1) % 7 {
			days[d] = true
			if d == to {
				break
			}
		}
	}
	return nil
}

func parseTurn(word string) (Turn, error) {
	a, b, ok := strings.Cut(word, "-")
	if !ok {
		return Turn{}, fmt.Errorf("%q is not a span of hours; write for instance 07:30-12:00", word)
	}
	from, err := ParseClock(a)
	if err != nil {
		return Turn{}, err
	}
	to, err := ParseClock(b)
	if err != nil {
		return Turn{}, err
	}
	if from == 1440 {
		return Turn{}, fmt.Errorf("%q begins at 24:00; write 00:00 of the next day", word)
	}
	if to == from {
		return Turn{}, fmt.Errorf("%q is empty; for a whole day write 00:00-24:00", word)
	}
	if to < from {
		to += 1440
	}
	return Turn{from, to}, nil
}

// ParseClock reads a wall-clock time "07:30" as minutes after midnight, 0 to 1440 ("24:00").
func ParseClock(s string) (int, error) {
	s = strings.TrimSpace(s)
	h, m, ok := strings.Cut(s, ":")
	hh, ok1 := twoDigits(h)
	mm, ok2 := twoDigits(m)
	if !ok || !ok1 || !ok2 || len(m) != 2 || mm > 59 || hh > 24 || hh == 24 && mm > 0 {
		return 0, fmt.Errorf("%q is not a time of day; write hours and minutes, for instance 07:30", s)
	}
	return hh*60 + mm, nil
}

func twoDigits(s string) (int, bool) {
	if len(s) == 0 || len(s) > 2 {
		return 0, false
	}
	n := 0
	for _, c := range s {
		if c < '0' || c > '9' {
			return 0, false
		}
		n = n*10 + int(c-'0')
	}
	return n, true
}

// On gives the turns that begin on day d.
func (p Pattern) On(d Date) []Turn {
	var out []Turn
	w := d.Weekday()
	for _, r := range p {
		if r.Days[w] {
			out = append(out, r.Turns...)
		}
	}
	return out
}

// Spans lays the pattern over [w.From, w.To) in zone loc, leaving out the days that closed
// names (a turn belongs to the day on which it begins). Wall-clock times map by Instant: a
// turn that begins in a gap begins when the gap ends.
func (p Pattern) Spans(loc *time.Location, w Span, closed func(Date) bool) Set {
	if w.Len() == 0 {
		return nil
	}
	var out []Span
	first := DateOf(w.From.In(loc)).Add(-2)
	last := DateOf(w.To.In(loc)).Add(1)
	for d := first; !last.Before(d); d = d.Add(1) {
		if closed != nil && closed(d) {
			continue
		}
		for _, t := range p.On(d) {
			a, _ := Instant(d, t.From, loc)
			b, _ := Instant(d, t.To, loc)
			out = append(out, Span{max(a, w.From), min(b, w.To)})
		}
	}
	return NewSet(out...)
}

// Longest gives the longest turn of the week in minutes, breaks of at most gap minutes joined.
func (p Pattern) Longest(gap int) int {
	monday := Date{2001, time.January, 1}
	base, _ := Instant(monday, 0, time.UTC)
	week := p.Spans(time.UTC, Span{base, base + 14*1440}, nil)
	best := 0
	for _, s := range week.Joined(gap, nil) {
		n := week.Count(s)
		best = max(best, n)
	}
	return best
}
