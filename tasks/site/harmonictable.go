package site

import "math"

// leastRise is the least difference between a high and a low water that counts as a tide; smaller
// wiggles at the turn of the water are left out.
const leastRise = 0.02 // metres

// Table predicts the high and low waters that make Reach and the rest answer for [from, to): it
// begins with the last water at or before from and ends with the first at or after to. Times are to
// the minute. The table is marked NotForSafety. Cost: O(m c) for m minutes and c constituents, in
// steps of ten minutes. At most two years.
//
// Errors: unknown constituents, constants out of range, an empty or too long span, and a tide with less
// than two waters in the days about it.
func (h Harmonic) Table(from, to Minute) (*TideTable, error) {
	if err := h.check(); err != nil {
		return nil, err
	}
	if err := checkSpan(from, to); err != nil {
		return nil, err
	}
	if to-from > 2*366*day {
		return nil, advice("ask for one window at a time", "the time from %s to %s is longer than two years",
			moment(from), moment(to))
	}
	waters := h.waters(from-2*day, to+2*day)
	first, last := 0, len(waters)
	for first+1 < last && waters[first+1].At <= from {
		first++
	}
	for last-1 > first && waters[last-2].At >= to {
		last--
	}
	waters = waters[first:last]
	if len(waters) < 2 || waters[0].At > from || waters[len(waters)-1].At < to {
		return nil, advice("check the amplitudes", "%s has no tide to speak of from %s to %s", h.Name,
			moment(from), moment(to))
	}
	return &TideTable{Name: h.Name, Datum: h.Datum, Zone: "UTC", Waters: waters, NotForSafety: true,
		Notes: []string{h.Name + ": tide predicted from constants, not for safety"}}, nil
}

// waters finds the turning points between two moments: sampled every ten minutes, then to the minute.
func (h Harmonic) waters(from, to Minute) []Water {
	const step = 10
	var out []Water
	a, b := h.height(float64(from-step)), h.height(float64(from))
	for m := from; m < to; m += step {
		c := h.height(float64(m + step))
		if high := b > a && b >= c; high || b < a && b <= c {
			out = addWater(out, h.turning(m-step, m+step, high))
		}
		a, b = b, c
	}
	return out
}

// turning finds the highest (or lowest) whole minute between two.
func (h Harmonic) turning(from, to Minute, high bool) Water {
	best, at := h.height(float64(from)), from
	for m := from + 1; m <= to; m++ {
		if v := h.height(float64(m)); v != best && (v > best) == high {
			best, at = v, m
		}
	}
	return Water{At: at, Metres: math.Round(best*1000) / 1000, High: high}
}

// addWater appends a water; one that goes on where the last went, or hardly turns, replaces it.
func addWater(out []Water, w Water) []Water {
	n := len(out)
	if n == 0 {
		return append(out, w)
	}
	last := out[n-1]
	switch {
	case last.High == w.High: // a wiggle between them was left out: keep the further
		if w.High == (w.Metres > last.Metres) {
			out[n-1] = w
		}
		return out
	case math.Abs(w.Metres-last.Metres) < leastRise && n > 1: // the tide before goes on
		return addWater(out[:n-1], w)
	}
	return append(out, w)
}
