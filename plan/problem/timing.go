package problem

import (
	"sort"

	"sailby/tasks/hours"
)

// Inf is later than any minute of a problem; -Inf earlier than any. Sums of two still fit into 32 bits.
const Inf = 1 << 29

// Timing says when a step can run in one mode: which starts are possible, and the finish that
// each start leads to. Finish is monotone in the start. Minutes count from the problem's base.
//
// There are three shapes: fixed length on any minute (cal nil), a film that cures (cum not
// nil), and hands-on work on a calendar.
type Timing struct {
	length int // fixed length, or working minutes without set-up

	cure []float64 // cure[t]: cure gathered from base to minute t

	cal                *calendar
	setUp, least, safe int
	inOneGo, overMeals bool
	watch              int // minutes of fire watch after the last piece
}

// calendar is a set of worked spans grouped into openings: runs joined over meals.
type calendar struct {
	spans []hours.Span // from base, sorted, disjoint
	open  []int        // open[i]: worked minutes before spans[i]
	block []int        // block[i]: first span of the opening that spans[i] belongs to
	last  []int        // last[i]: last span of that opening
}

// Fixed gives the timing of a step that takes length minutes of clock time at any minute.
func Fixed(length int) *Timing { return &Timing{length: length} }

// Curing gives the timing of a film: rate[t] is the share of the cure that minute t adds.
// A start from which the cure is not reached within rate is impossible.
func Curing(rate []float64) *Timing {
	sum := make([]float64, len(rate)+1)
	for i, r := range rate {
		sum[i+1] = sum[i] + r
	}
	return &Timing{cure: sum}
}

// Rules are the stopping rules of hands-on work (R6, R8, R13), in working minutes.
type Rules struct {
	Work, SetUp, Least, Safe int
	InOneGo, OverMeals       bool
	Watch                    int // minutes of fire watch after the last piece and after every stop
}

// Worked gives the timing of hands-on work: spans are its worked minutes, joined its openings
// (spans joined over meals), both from base.
func Worked(spans, joined hours.Set, r Rules) *Timing {
	return &Timing{length: r.Work, cal: newCalendar(spans, joined), setUp: r.SetUp, least: r.Least, safe: r.Safe,
		inOneGo: r.InOneGo, overMeals: r.OverMeals, watch: r.Watch}
}

func newCalendar(spans, joined hours.Set) *calendar {
	c := &calendar{spans: spans, open: make([]int, len(spans)+1), block: make([]int, len(spans)), last: make([]int, len(spans))}
	first, j := 0, 0
	for i, s := range spans {
		c.open[i+1] = c.open[i] + s.Len()
		for j < len(joined) && joined[j].To <= s.From {
			j++
			first = i
		}
		c.block[i] = first
	}
	end := len(spans) - 1
	for i := len(spans) - 1; i >= 0; i-- {
		c.last[i] = end
		if c.block[i] == i {
			end = i - 1
		}
	}
	return c
}

// Start gives the first possible start at or after t, or Inf.
func (w *Timing) Start(t int) int {
	if w.cal == nil {
		if w.cure != nil && w.finishCure(max(t, 0)) >= Inf {
			return Inf
		}
		return t
	}
	if w.length == 0 {
		return t
	}
	c := w.cal
	for i := c.at(t); i < len(c.spans); {
		s := max(t, int(c.spans[i].From))
		end := i // last span that the first piece may use
		if !w.inOneGo || w.overMeals {
			end = c.last[i]
		}
		room := c.open[end+1] - c.open[i] - (s - int(c.spans[i].From))
		if room >= w.setUp+w.length {
			return s
		}
		if !w.inOneGo && room >= w.setUp+max(w.least, w.safe, 1) {
			if w.Finish(s) < Inf {
				return s
			}
			return Inf
		}
		if w.inOneGo && !w.overMeals {
			i++
		} else {
			i = c.last[i] + 1
		}
	}
	return Inf
}

// at gives the index of the first span that ends after t.
func (c *calendar) at(t int) int {
	return sort.Search(len(c.spans), func(i int) bool { return int(c.spans[i].To) > t })
}

// Finish gives the finish that the possible start s leads to, or Inf where the calendar ends
// before the work does.
func (w *Timing) Finish(s int) int {
	switch {
	case w.cure != nil:
		return w.finishCure(s)
	case w.cal == nil || w.length == 0:
		return s + w.length
	}
	finish := Inf
	w.pieces(s, func(_, to int) { finish = to }, func() { finish = Inf })
	return finish
}

// curedAt is how near to one a sum of rates counts as reached: the sums are of a few thousand
// terms, each rounded to one part in 1e16.
const curedAt = 1 - 1e-9

func (w *Timing) finishCure(s int) int {
	if s < 0 || s >= len(w.cure) {
		return Inf
	}
	want := w.cure[s] + curedAt
	u := sort.Search(len(w.cure)-s, func(k int) bool { return w.cure[s+k] >= want })
	if s+u >= len(w.cure) {
		return Inf
	}
	return s + u
}

// Pieces calls emit for every hands-on piece of the work that begins at s, in order; standing
// work is one piece.
func (w *Timing) Pieces(s int, emit func(from, to int)) {
	switch {
	case w.cure != nil || w.cal == nil:
		if f := w.Finish(s); f < Inf && f > s {
			emit(s, f)
		}
	case w.length > 0:
		w.pieces(s, emit, func() {})
	}
}

// pieces walks the openings from s: each is used, or skipped where it is too short (R8).
func (w *Timing) pieces(s int, emit func(from, to int), never func()) {
	c, left := w.cal, w.length
	i := c.at(s)
	from := s
	for first := true; ; first = false {
		if i >= len(c.spans) {
			never()
			return
		}
		from = max(from, int(c.spans[i].From))
		room := c.open[c.last[i]+1] - c.open[i] - (from - int(c.spans[i].From))
		todo := w.setUp + left
		if room < todo {
			if !first && room < w.setUp+max(w.least, 1) {
				i = c.last[i] + 1
				continue
			}
			todo = room
			left -= room - w.setUp
		} else {
			left = 0
		}
		for todo > 0 {
			to := min(from+todo, int(c.spans[i].To))
			emit(from, to)
			todo -= to - from
			if todo > 0 {
				i++
				from = int(c.spans[i].From)
			}
		}
		if left == 0 {
			return
		}
		i = c.last[i] + 1
	}
}

// Stops gives the ends of the pieces after which the work that begins at s stops (R6), the
// finish included.
func (w *Timing) Stops(s int) []int {
	var ends []int
	w.Pieces(s, func(from, to int) {
		if n := len(ends); n > 0 && w.cal != nil && w.cal.block[w.cal.at(from)] <= w.cal.at(ends[n-1]-1) {
			ends[n-1] = to
			return
		}
		ends = append(ends, to)
	})
	return ends
}

// Latest gives the last possible start whose finish is at most f, or -Inf. The starts are
// searched from lo on.
func (w *Timing) Latest(f, lo int) int {
	if w.cal == nil && w.cure == nil {
		return f - w.length
	}
	s := w.Start(lo)
	if s >= Inf || w.Finish(s) > f {
		return -Inf
	}
	hi := f + 1 // Start(hi) finishes after f, or is f itself for empty work
	if w.length == 0 && w.cure == nil {
		return f
	}
	for lo = s; lo+1 < hi; {
		mid := lo + (hi-lo)/2
		if s := w.Start(mid); s < Inf && w.Finish(s) <= f {
			lo = s
			if lo >= hi {
				return s
			}
		} else {
			hi = mid
		}
	}
	return lo
}

// Length gives the working or clock minutes, set-up left out; 0 for a film.
func (w *Timing) Length() int { return w.length }

// Watch gives the minutes of fire watch after the last piece.
func (w *Timing) Watch() int { return w.watch }

// Calendar gives the worked spans, nil for standing work.
func (w *Timing) Calendar() hours.Set {
	if w.cal == nil {
		return nil
	}
	return w.cal.spans
}
