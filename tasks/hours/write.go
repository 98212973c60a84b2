package hours

import (
	"fmt"
	"slices"
	"strings"
	"time"
)

// String writes the rule as ParseRule reads it: "Mon-Fri 07:30-12:00 12:30-17:30", "always".
func (r Rule) String() string {
	if r.Days == Always[0].Days && slices.Equal(r.Turns, Always[0].Turns) {
		return "always"
	}
	words := []string{daysWord(r.Days)}
	for _, t := range r.Turns {
		words = append(words, Clock24(t.From)+"-"+Clock24(t.To))
	}
	return strings.Join(words, " ")
}

// Clock24 writes minutes after midnight as "07:30"; 1440 is "24:00", and what lies beyond is of the next day.
func Clock24(m int) string {
	if m > 1440 {
		m -= 1440
	}
	return fmt.Sprintf("%02d:%02d", m/60, m%60)
}

// String writes the pattern, one rule after the other.
func (p Pattern) String() string {
	var out []string
	for _, r := range p {
		out = append(out, r.String())
	}
	return strings.Join(out, ", ")
}

// daysWord writes weekdays from Monday on: "Mon-Fri", "Mon,Wed", "daily".
func daysWord(days [7]bool) string {
	day := func(k int) int { return (k + 1) % 7 } // k from Monday
	name := func(k int) string { return time.Weekday(day(k)).String()[:3] }
	var out []string
	for k := 0; k < 7; k++ {
		if !days[day(k)] {
			continue
		}
		last := k
		for last+1 < 7 && days[day(last+1)] {
			last++
		}
		switch {
		case k == 0 && last == 6:
			return "daily"
		case last > k+1:
			out = append(out, name(k)+"-"+name(last))
		case last == k+1:
			out = append(out, name(k), name(last))
		default:
			out = append(out, name(k))
		}
		k = last
	}
	return strings.Join(out, ",")
}
