// Package site says when nature lets people work at a place: sun, tide and weather by hour.
// Each source gives open hours, or closed hours with the reason in plain words.
//
// Times are UTC minutes since 1970-01-01 00:00; spans are half-open. Heights are metres above the
// datum that the tide table names, temperatures degrees Celsius, differences of temperature
// kelvin, wind metres a second, relative humidity a share from 0 to 1, latitudes and longitudes
// degrees, north and east positive.
//
// Sources: the sun is the NOAA long form after Meeus, Astronomical Algorithms; the tide between
// high and low water is the cosine; harmonic tides follow Schureman, Manual of Harmonic Analysis
// and Prediction of Tides, US Coast and Geodetic Survey Special Publication 98 (1940).
package site

import (
	"fmt"
	"math"
	"time"

	"sailby/tasks/quantity"
)

// Minute is a moment in whole UTC minutes since 1970-01-01 00:00.
type Minute = int64

// Span is the half-open time [From, To). Why says in plain words what closes it, and is empty
// for open spans unless a function says otherwise.
type Span struct {
	From, To Minute
	Why      string
}

const (
	day         Minute = 24 * 60
	firstMinute Minute = -36816480 // 1900-01-01: before it no table or formula here is meant
	lastMinute  Minute = 120968640 // 2200-01-01: beyond any plan; keeps sums from overflowing
	longestSpan Minute = 11 * 366 * day
)

// moment writes m as people read it, in UTC.
func moment(m Minute) string { return time.Unix(m*60, 0).UTC().Format("2006-01-02 15:04") + " UTC" }

// checkSpan refuses spans that run backwards, are empty, or lie outside 1900 to 2200.
func checkSpan(from, to Minute) error {
	switch {
	case from < firstMinute || to > lastMinute:
		return advice("give dates between 1900 and 2200",
			"the time from minute %d to %d is out of all proportion", from, to)
	case from >= to:
		return advice("give the earlier time first", "the time from %s to %s has no length", moment(from), moment(to))
	case to-from > longestSpan:
		return advice("ask for a few years at a time", "the time from %s to %s is longer than %d years",
			moment(from), moment(to), longestSpan/(366*day))
	}
	return nil
}

// checkPlace refuses positions that are not on the globe.
func checkPlace(lat, lon float64) error {
	if !(lat >= -90 && lat <= 90) {
		return advice("south is negative: 33.9 S is -33.9", "latitude %v is not between -90 and 90 degrees", lat)
	}
	if !(lon >= -180 && lon <= 180) {
		return advice("west is negative: 5.5 W is -5.5", "longitude %v is not between -180 and 180 degrees", lon)
	}
	return nil
}

func finite(v float64) bool { return !math.IsNaN(v) && !math.IsInf(v, 0) }

// advice makes an error without a place in a file; hint is the way out.
func advice(hint, format string, args ...any) error {
	return &quantity.Error{Problem: fmt.Sprintf(format, args...), Hint: hint}
}

// gaps gives what open leaves of [from, to), each gap with the reason why. Open is sorted and
// does not overlap.
func gaps(open []Span, from, to Minute, why func(from, to Minute) string) []Span {
	var out []Span
	at := from
	add := func(end Minute) {
		if at < end {
			out = append(out, Span{at, end, why(at, end)})
		}
	}
	for _, s := range open {
		if s.To <= from || s.From >= to {
			continue
		}
		add(min(s.From, to))
		at = max(at, s.To)
	}
	add(to)
	return out
}

// clip keeps the part of each span that lies in [from, to).
func clip(spans []Span, from, to Minute) []Span {
	var out []Span
	for _, s := range spans {
		s.From, s.To = max(s.From, from), min(s.To, to)
		if s.From < s.To {
			out = append(out, s)
		}
	}
	return out
}

// WayOff shortens open spans by the minutes that people need to leave before the water comes;
// spans that are no longer than that fall away. A span that ends at last, where the question
// ended and not the opening, keeps its end. Negative minutes count as none.
func WayOff(open []Span, minutes, last Minute) []Span {
	var out []Span
	for _, s := range open {
		if s.To != last {
			s.To -= max(minutes, 0)
		}
		if s.From < s.To {
			out = append(out, s)
		}
	}
	return out
}

// minutesIn finds the minutes of [from, to) in which pass holds at the start and at the end of
// the minute. Knots are the moments, in order, between which pass changes at most once; the
// first is from and the last is to. Cost: O(k log m) calls of pass for k knots m minutes apart.
func minutesIn(knots []Minute, pass func(Minute) bool) []Span {
	var out []Span
	add := func(a, b Minute) {
		if n := len(out); n > 0 && out[n-1].To == a {
			out[n-1].To = b
		} else if a < b {
			out = append(out, Span{From: a, To: b})
		}
	}
	for i := 1; i < len(knots); i++ {
		a, b := knots[i-1], knots[i]
		if a >= b {
			continue
		}
		pa, pb := pass(a), pass(b)
		switch {
		case pa && pb:
			add(a, b)
		case pa:
			add(a, turn(a, b, pass))
		case pb:
			add(turn(a, b, pass), b)
		}
	}
	return out
}

// turn gives the passing minute next to the change of pass between a and b, where exactly one
// of them passes.
func turn(a, b Minute, pass func(Minute) bool) Minute {
	pa := pass(a)
	for b-a > 1 {
		m := a + (b-a)/2
		if pass(m) == pa {
			a = m
		} else {
			b = m
		}
	}
	if pa {
		return a
	}
	return b
}
