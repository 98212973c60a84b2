// Package hours holds working time: sets of half-open intervals of UTC minutes, weekly opening
// hours with nights and holidays, and local times that survive a change of the clocks.
package hours

import "sort"

// Minute is a whole minute since 1970-01-01 00:00 UTC.
type Minute int64

// Far is later than any minute of a job; Never is earlier than any.
const (
	Far   Minute = 1 << 40
	Never Minute = -1 << 40
)

// Span is the half-open interval [From, To).
type Span struct{ From, To Minute }

// Len gives the minutes in the span, 0 if it is empty.
func (s Span) Len() int {
	if s.To <= s.From {
		return 0
	}
	return int(s.To - s.From)
}

// Has says whether the minute starting at t lies in the span.
func (s Span) Has(t Minute) bool { return s.From <= t && t < s.To }

// Overlaps says whether the two spans share a minute.
func (s Span) Overlaps(o Span) bool {
	return s.From < o.To && o.From < s.To && s.Len() > 0 && o.Len() > 0
}

// Set is a sorted list of disjoint spans that do not touch. The nil set is empty.
type Set []Span

// NewSet sorts and joins spans; empty ones are dropped. O(n log n).
func NewSet(spans ...Span) Set {
	in := make([]Span, 0, len(spans))
	for _, s := range spans {
		if s.Len() > 0 {
			in = append(in, s)
		}
	}
	sort.Slice(in, func(i, j int) bool { return in[i].From < in[j].From })
	var out Set
	for _, s := range in {
		if n := len(out); n > 0 && s.From <= out[n-1].To {
			if s.To > out[n-1].To {
				out[n-1].To = s.To
			}
			continue
		}
		out = append(out, s)
	}
	return out
}

// And is the intersection, in O(n+m).
func (a Set) And(b Set) Set {
	var out Set
	for i, j := 0, 0; i < len(a) && j < len(b); {
		lo, hi := max(a[i].From, b[j].From), min(a[i].To, b[j].To)
		if lo < hi {
			out = append(out, Span{lo, hi})
		}
		if a[i].To < b[j].To {
			i++
		} else {
			j++
		}
	}
	return out
}

// Or is the union.
func (a Set) Or(b Set) Set {
	return NewSet(append(append([]Span(nil), a...), b...)...)
}

// Less is a without the minutes of b, in O(n+m).
func (a Set) Less(b Set) Set {
	var out Set
	j := 0
	for _, s := range a {
		at := s.From
		for j < len(b) && b[j].To <= at {
			j++
		}
		for k := j; k < len(b) && b[k].From < s.To; k++ {
			if b[k].From > at {
				out = append(out, Span{at, b[k].From})
			}
			at = max(at, b[k].To)
		}
		if at < s.To {
			out = append(out, Span{at, s.To})
		}
	}
	return out
}

// Within is the part of a inside w.
func (a Set) Within(w Span) Set { return a.And(Set{w}) }

// Has says whether minute t lies in the set, in O(log n).
func (a Set) Has(t Minute) bool {
	i := a.after(t)
	return i < len(a) && a[i].From <= t
}

// after gives the index of the first span that ends after t.
func (a Set) after(t Minute) int {
	return sort.Search(len(a), func(i int) bool { return a[i].To > t })
}

// Next gives the first minute of the set at or after t; ok is false where there is none.
func (a Set) Next(t Minute) (at Minute, ok bool) {
	i := a.after(t)
	if i == len(a) {
		return Far, false
	}
	return max(t, a[i].From), true
}

// Total counts the minutes in the set.
func (a Set) Total() int {
	n := 0
	for _, s := range a {
		n += s.Len()
	}
	return n
}

// Count counts the minutes of the set inside w.
func (a Set) Count(w Span) int {
	n := 0
	for i := a.after(w.From); i < len(a) && a[i].From < w.To; i++ {
		n += Span{max(a[i].From, w.From), min(a[i].To, w.To)}.Len()
	}
	return n
}

// Covers says whether every minute of w is in the set; an empty w is covered.
func (a Set) Covers(w Span) bool { return a.Count(w) == w.Len() }

// Joined closes every gap of at most gap minutes between two spans of the set, but only where
// all of the gap lies in allowed; a nil allowed allows every gap.
func (a Set) Joined(gap int, allowed Set) Set {
	var out Set
	for _, s := range a {
		if n := len(out); n > 0 {
			g := Span{out[n-1].To, s.From}
			if g.Len() <= gap && (allowed == nil || allowed.Covers(g)) {
				out[n-1].To = s.To
				continue
			}
		}
		out = append(out, s)
	}
	return out
}
