package check

import (
	"time"

	"sailby/tasks"
	"sailby/tasks/hours"
)

// line is a yes or no for every minute from from on.
type line struct {
	from hours.Minute
	on   []bool
}

// line gives a line of all minutes laid out, all yes or all no.
func (c *checker) line(v bool) line {
	l := line{c.lo, make([]bool, c.hi-c.lo)}
	if v {
		l.fill(hours.Span{From: c.lo, To: c.hi}, true)
	}
	return l
}

// has says yes or no for the minute that begins at t; beyond the line it is no.
func (l line) has(t hours.Minute) bool {
	return t >= l.from && t-l.from < hours.Minute(len(l.on)) && l.on[t-l.from]
}

// fill sets the minutes of s.
func (l line) fill(s hours.Span, v bool) {
	to := min(s.To, l.from+hours.Minute(len(l.on)))
	for t := max(s.From, l.from); t < to; t++ {
		l.on[t-l.from] = v
	}
}

// trim takes the first head and the last tail minutes off every run of yes, runs joined over
// gaps of at most join minutes. A run that the line cuts keeps that end.
func (l line) trim(head, tail, join int) {
	for i := 0; i < len(l.on); {
		if !l.on[i] {
			i++
			continue
		}
		end := i // the last yes of the run
		for j := i; j < len(l.on) && j-end-1 <= join; j++ {
			if l.on[j] {
				end = j
			}
		}
		from, to := l.from+hours.Minute(i), l.from+hours.Minute(end+1)
		if i > 0 {
			l.fill(hours.Span{From: from, To: min(to, from+hours.Minute(head))}, false)
		}
		if end+1 < len(l.on) {
			l.fill(hours.Span{From: max(from, to-hours.Minute(tail)), To: to}, false)
		}
		i = end + 1
	}
}

// joined fills the gaps of at most join minutes between two yes.
func (l line) joined(join int) line {
	out := line{l.from, append([]bool(nil), l.on...)}
	last := -1
	for i, on := range l.on {
		if on {
			if last >= 0 && i-last-1 <= join {
				for j := last + 1; j < i; j++ {
					out.on[j] = true
				}
			}
			last = i
		}
	}
	return out
}

// pattern lays weekly hours over the minutes: a turn belongs to the day on which it begins, and
// falls out where off names that day.
func (c *checker) pattern(p hours.Pattern, zone *time.Location, off func(hours.Date) bool) line {
	l := c.line(false)
	last := hours.DateOf(c.hi.In(zone))
	for d := hours.DateOf(c.lo.In(zone)).Add(-2); !last.Before(d); d = d.Add(1) {
		if off != nil && off(d) {
			continue
		}
		for _, t := range p.On(d) {
			from, _ := hours.Instant(d, t.From, zone)
			to, _ := hours.Instant(d, t.To, zone)
			l.fill(hours.Span{From: from, To: to}, true)
		}
	}
	return l
}

// slots lays given slots over the minutes; those that cannot be read for this window are out.
func (c *checker) slots(l line, slots []tasks.Slot) line {
	for _, s := range slots {
		if span, ok := c.w.Window.Slot(s); ok {
			l.fill(span, true)
		}
	}
	return l
}
