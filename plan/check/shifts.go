package check

import (
	"cmp"
	"slices"

	"sailby/tasks/hours"
)

// Where a job says nothing (R15).
const (
	longestDuty = 12 * 60 // minutes
	leastRest   = 11 * 60 // minutes
)

// shifts cuts the hours in work and the legs of the trip into shifts, no longer than the longest
// duty and with a rest between them (R15). It gives the minutes inside shifts.
func (c *checker) shifts(work line, legs []hours.Span) line {
	duty, rest := hours.Minute(c.w.Job.Duty.Value), hours.Minute(c.w.Job.Rest.Value)
	if duty <= 0 {
		duty = longestDuty
	}
	if rest <= 0 && !c.w.Job.Rest.Pos.Given() {
		rest = leastRest
	}
	slices.SortFunc(legs, func(a, b hours.Span) int { return cmp.Compare(a.From, b.From) })
	on := c.line(false) // hours and legs
	for t := c.span.From; t < c.hi; t++ {
		on.on[t-c.lo] = work.has(t)
	}
	for _, leg := range legs {
		on.fill(leg, true)
	}
	for _, way := range joinLegs(legs, rest) {
		first := way.To - duty
		if way.From < first {
			first = way.From
		}
		for first < way.From && !on.has(first) {
			first++
		}
		for t := first - rest; t < first; t++ { // a rest before the shift that holds the legs
			if !inAny(legs, t) {
				on.fill(hours.Span{From: t, To: t + 1}, false)
			}
		}
	}
	out := c.line(false)
	for t := c.span.From; t < c.hi; {
		if !on.has(t) {
			t++
			continue
		}
		stop := t + duty
		for _, leg := range legs { // legs are not cut
			if t < leg.To && leg.From <= stop && leg.To > stop {
				stop = leg.To
			}
		}
		end := t + 1
		for u := t + 1; u < min(stop, c.hi) && u-end < max(rest, 1); u++ {
			if on.has(u) {
				end = u + 1
			}
		}
		out.fill(hours.Span{From: t, To: end}, true)
		t = end + rest
	}
	return out
}

// joinLegs joins legs with less than a rest between them: one shift holds them.
func joinLegs(legs []hours.Span, rest hours.Minute) []hours.Span {
	var out []hours.Span
	for _, l := range legs {
		if n := len(out); n > 0 && l.From-out[n-1].To < rest {
			out[n-1].To = max(out[n-1].To, l.To)
			continue
		}
		out = append(out, l)
	}
	return out
}

func inAny(spans []hours.Span, t hours.Minute) bool {
	return slices.ContainsFunc(spans, func(s hours.Span) bool { return s.Has(t) })
}
