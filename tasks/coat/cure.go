package coat

import "math"

const (
	// cureSlack forgives rounding in a sum of up to a million rates, each exact to 1e-16.
	cureSlack = 1e-9
	// longestSearch bounds a search in minutes whatever limit is given: five years.
	longestSearch = 5 * 525600
)

// Cure gives the first minute at which the cure, begun at minute start, is whole: every minute m
// adds c.Rate(temp(m)), nothing where temp(m) is below minimum (the paint's own, in C) or not a
// number (a minute that must not count, for instance too dry for zinc silicate), and finish is the
// first minute before which the sum has reached one. At a constant temperature finish - start is
// the curve's time rounded up.
//
// A later start never finishes earlier. Cost: O(finish - start).
//
// Special cases are: ok is false and finish the last minute looked at (limit, or start if that is
// later, or five years on) where the sum stays below one, the curve is faulty or temp is nil.
func Cure(start int, c Curve, minimum float64, temp func(minute int) float64, limit int) (finish int, ok bool) {
	end := searchEnd(start, limit)
	if temp == nil || c.Validate() != nil {
		return end, false
	}
	sum := 0.0
	last, rate := math.NaN(), 0.0
	for m := start; m < end; m++ {
		if t := temp(m); t != last { // rates are looked up once for as long as the steel stays the same
			last, rate = t, 0
			if t >= minimum {
				rate = c.rate(t)
			}
		}
		if sum += rate; sum >= 1-cureSlack {
			return m + 1, true
		}
	}
	return end, false
}

// Cured gives the share of cure, from 0 to 1, that has gathered from minute start to minute end;
// the same sum as Cure, for showing it as it grows.
func Cured(start, end int, c Curve, minimum float64, temp func(minute int) float64) float64 {
	end = min(end, searchEnd(start, end))
	if temp == nil || c.Validate() != nil {
		return 0
	}
	sum := 0.0
	for m := start; m < end && sum < 1-cureSlack; m++ {
		if t := temp(m); t >= minimum {
			sum += c.rate(t)
		}
	}
	if sum >= 1-cureSlack {
		return 1
	}
	return sum
}

// LastRecoat gives the last minute u at which the next coat may still go on over a coat of minute
// start: u - start is at most the max wait for the hottest steel from start to u, as UFGS-09971
// picks the band by the highest temperature between the coats (here already the hottest minute,
// which is the careful reading of "sustained for an hour"). longest holds the max waits as its points'
// Min (see Curve.Maxima); where points have a Max, that is used.
//
// A later start never gives an earlier last minute. Cost: O(u - start).
//
// Special cases are: an empty curve is no max and gives limit; a faulty curve or a nil temp gives
// start; a temperature that is not a number ends the wait at the minute before it. The result is
// never before start and, unless start is, never after limit.
func LastRecoat(start int, longest Curve, temp func(minute int) float64, limit int) int {
	end := searchEnd(start, limit)
	if len(longest) == 0 {
		return end
	}
	if temp == nil || longest.Validate() != nil {
		return start
	}
	if own := longest.Maxima(); len(own) > 0 {
		longest = own
	}
	hottest, most := math.Inf(-1), math.Inf(1)
	for u := start; u <= end; u++ {
		t := temp(u)
		if math.IsNaN(t) {
			if u == start {
				return start
			}
			return u - 1
		}
		if t > hottest {
			hottest, most = t, longest.minutes(t, toLive)
		}
		if float64(u-start) > most*(1+cureSlack) {
			return u - 1
		}
	}
	return end
}

// searchEnd is the last minute that a search from start looks at.
func searchEnd(start, limit int) int {
	if start <= math.MaxInt-longestSearch && start+longestSearch < limit {
		return start + longestSearch
	}
	return max(start, limit)
}
