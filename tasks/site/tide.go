package site

import (
	"fmt"
	"math"
	"sort"

	"sailby/tasks/origin"
)

// Water is one high or low water. Metres is above the table's datum, to the millimetre.
type Water struct {
	At     Minute
	Metres float64
	High   bool
	Line   int // in the table's file, from 1; 0 if predicted here
}

// String gives the water as a tide table prints it.
func (w Water) String() string {
	kind := "low water"
	if w.High {
		kind = "high water"
	}
	return fmt.Sprintf("%s %.2f m at %s", kind, w.Metres, moment(w.At))
}

// TideTable is the high and low waters of one port in order of time. Between two neighbours the
// height follows half a cosine. Neighbours more than 16 hours apart (longestTide) have a
// hole between them, in which nothing is known.
type TideTable struct {
	Name         string  // file, or port for predicted tables
	Datum        string  // in the file's own words; workface levels must stand on the same one
	Zone         string  // in the file's own words; the waters here are in UTC
	Waters       []Water // at least two
	Notes        []string
	NotForSafety bool // predicted from constants here, not by an authority
}

// longestTide is the longest time between neighbouring waters that is still one tide. Half a
// day's tide takes 6.2 h, a once-a-day tide 12.4 h; with two rows missing it is 18.6 h.
const longestTide Minute = 16 * 60

// leastTide is the least difference of height between neighbours: tables go by centimetres, and
// half a millimetre would drown in rounding.
const leastTide = 0.001

// highest bounds heights: the greatest range known is near 16 m (Bay of Fundy).
const highest = 25.0

// Height gives the water's height at a moment, in metres above the table's datum:
// h = (a+b)/2 + (a-b)/2 cos(pi t/T) between neighbours a and b that are T apart.
// It is not ok outside the table and in its holes. Cost: O(log n).
func (t *TideTable) Height(at Minute) (metres float64, ok bool) {
	i := t.after(at)
	if i == len(t.Waters) {
		return 0, false
	}
	b := t.Waters[i]
	if b.At == at {
		return b.Metres, true
	}
	if i == 0 || b.At-t.Waters[i-1].At > longestTide {
		return 0, false
	}
	a := t.Waters[i-1]
	x := float64(at-a.At) / float64(b.At-a.At)
	return (a.Metres+b.Metres)/2 + (a.Metres-b.Metres)/2*math.Cos(math.Pi*x), true
}

// after gives the index of the first water at or after m.
func (t *TideTable) after(m Minute) int {
	return sort.Search(len(t.Waters), func(i int) bool { return t.Waters[i].At >= m })
}

// Figure gives the height at a moment with the two waters that it lies between.
func (t *TideTable) Figure(at Minute) (origin.Figure, error) {
	h, ok := t.Height(at)
	if !ok {
		return origin.Figure{}, t.uncovered(at)
	}
	i := t.after(at)
	from := []origin.Figure{t.waterFigure(t.Waters[i])}
	if t.Waters[i].At > at {
		from = append([]origin.Figure{t.waterFigure(t.Waters[i-1])}, from...)
	}
	return origin.Worked("water at "+moment(at), h, "m above "+t.Datum,
		"half a cosine between high and low water", from...), nil
}

func (t *TideTable) waterFigure(w Water) origin.Figure {
	name := "low water " + moment(w.At)
	if w.High {
		name = "high water " + moment(w.At)
	}
	if t.NotForSafety {
		return origin.Worked(name, w.Metres, "m above "+t.Datum, "harmonic sum of "+t.Name+", not for safety")
	}
	return origin.Written(name, w.Metres, "m above "+t.Datum, origin.Origin{File: t.Name, Line: w.Line, Col: 1})
}

// Between lists the high and low waters in [from, to), for the sheet.
func (t *TideTable) Between(from, to Minute) []Water {
	a, b := t.after(from), t.after(to)
	if a >= b {
		return nil
	}
	return t.Waters[a:b:b]
}

// Clear says whether the water stays below (or with below false, at or above) the level through
// the whole minute from m on. It is false where the table does not reach. It is the test behind Reach,
// for checking minute by minute.
func (t *TideTable) Clear(below bool, level float64, m Minute) bool {
	return t.passes(below, level, m) && t.passes(below, level, m+1)
}

func (t *TideTable) passes(below bool, level float64, m Minute) bool {
	h, ok := t.Height(m)
	if below {
		return ok && h < level
	}
	return ok && h >= level
}

// Reach gives the minutes of [from, to) in which the water is below the level all through (or
// with below false, at or above it): exact to the minute, rounded to the careful side, so
// that the minute in which the water passes the level belongs to neither. The level is
// in metres above the table's datum; see Allowance for pressure and surge.
//
// Errors: a level that is no number, an empty span, a span that the table does not cover.
func (t *TideTable) Reach(below bool, level float64, from, to Minute) ([]Span, error) {
	if !finite(level) {
		return nil, advice("give the level in metres above "+t.Datum, "level %v is not a height", level)
	}
	if err := t.covers(from, to); err != nil {
		return nil, err
	}
	knots := []Minute{from}
	for _, w := range t.Between(from+1, to) {
		knots = append(knots, w.At)
	}
	return minutesIn(append(knots, to), func(m Minute) bool { return t.passes(below, level, m) }), nil
}

// Shut gives the rest of what Reach gives: the minutes of [from, to) in which the water stands
// in the way, each span with the reason in words and both heights.
func (t *TideTable) Shut(below bool, level float64, from, to Minute) ([]Span, error) {
	open, err := t.Reach(below, level, from, to)
	if err != nil {
		return nil, err
	}
	return gaps(open, from, to, func(a, b Minute) string {
		lo, hi := t.extremes(a, b)
		if below {
			return fmt.Sprintf("water up to %.2f m, must be below %.2f m", hi, level)
		}
		return fmt.Sprintf("water down to %.2f m, must be %.2f m or more", lo, level)
	}), nil
}

// extremes gives the least and greatest height in a covered span.
func (t *TideTable) extremes(from, to Minute) (lo, hi float64) {
	lo, _ = t.Height(from)
	hi = lo
	add := func(h float64) { lo, hi = min(lo, h), max(hi, h) }
	for _, w := range t.Between(from, to) {
		add(w.Metres)
	}
	end, _ := t.Height(to)
	add(end)
	return lo, hi
}

// covers is nil if every minute of [from, to] lies in the table.
func (t *TideTable) covers(from, to Minute) error {
	if err := checkSpan(from, to); err != nil {
		return err
	}
	if len(t.Waters) == 0 {
		return t.uncovered(from)
	}
	if _, ok := t.Height(from); !ok {
		return t.uncovered(from)
	}
	for i := max(t.after(from), 1); i < len(t.Waters) && t.Waters[i-1].At < to; i++ {
		if a, b := t.Waters[i-1], t.Waters[i]; b.At-a.At > longestTide {
			return t.uncovered(a.At + 1)
		}
	}
	if _, ok := t.Height(to); !ok {
		return t.uncovered(to)
	}
	return nil
}

// uncovered says what the table has and what was asked of it.
func (t *TideTable) uncovered(at Minute) error {
	n := len(t.Waters)
	if n == 0 {
		return advice("give its high and low waters", "tide table %s is empty", t.Name)
	}
	if i := t.after(at); i > 0 && i < n {
		return advice("add the waters that are missing", "tide table %s says nothing of %s: no water between %s and %s",
			t.Name, moment(at), moment(t.Waters[i-1].At), moment(t.Waters[i].At))
	}
	return advice("add the waters before and after the time asked for",
		"tide table %s says nothing of %s: it runs from %s to %s",
		t.Name, moment(at), moment(t.Waters[0].At), moment(t.Waters[n-1].At))
}
