package site

import "math"

// Spells is how wet and dry days follow each other: a chain in which tomorrow depends on today
// alone (first order). Days drawn independently would halve the variance of a week's dry days and
// so hide the long wet spell that breaks a job.
type Spells struct {
	WetAfterWet float64 // chance that a day after a wet day is wet, 0 to 1
	WetAfterDry float64 // chance that a day after a dry day is wet, 0 to 1
}

// persistence is the correlation of wet from one day to the next where a place gives only its number
// of wet days: P(wet after wet) - P(wet after dry) = 213/326 - 117/511 for Tel Aviv in December
// (data of Gabriel and Neumann, Quarterly Journal of the Royal Meteorological Society 88, 1962).
const persistence = 213.0/326 - 117.0/511

// SpellsOf makes the chain for a share of wet days (0 to 1) with the usual persistence.
//
// Errors: a share that is not from 0 to 1.
func SpellsOf(wet float64) (Spells, error) {
	if !(wet >= 0 && wet <= 1) {
		return Spells{}, advice("divide the wet days by the days of the month",
			"share of wet days %v is not between 0 and 1", wet)
	}
	return Spells{wet + persistence*(1-wet), wet * (1 - persistence)}, nil
}

// LongRun gives the share of wet days over a long time: b/(1-a+b) for a = WetAfterWet and
// b = WetAfterDry. Special cases are: a chain that never changes gives NaN.
func (s Spells) LongRun() float64 { return s.WetAfterDry / (1 - s.WetAfterWet + s.WetAfterDry) }

// DryRun gives the chance that the next n days are all dry, after a dry or a wet day.
func (s Spells) DryRun(n int, afterWet bool) float64 {
	if n <= 0 {
		return 1
	}
	first := 1 - s.WetAfterDry
	if afterWet {
		first = 1 - s.WetAfterWet
	}
	return first * math.Pow(1-s.WetAfterDry, float64(n-1))
}

// WetDays gives the chance of 0, 1, ... n wet days among n, of which the first is as likely wet as the
// long run. Cost: O(n^2). At most 400 days; nil beyond, below 0 and where LongRun is NaN.
func (s Spells) WetDays(n int) []float64 {
	long := s.LongRun()
	if n < 0 || n > 400 || !(long >= 0 && long <= 1) {
		return nil
	}
	// dry[k], wet[k]: chance of k wet days so far, today dry or wet.
	dry, wet := make([]float64, n+1), make([]float64, n+1)
	if n == 0 {
		return []float64{1}
	}
	dry[0], wet[1] = 1-long, long
	for i := 1; i < n; i++ {
		for k := i + 1; k >= 0; k-- {
			d, w := dry[k], 0.0
			stay := wet[k]
			if k > 0 {
				w = dry[k-1]*s.WetAfterDry + wet[k-1]*s.WetAfterWet
			}
			dry[k] = d*(1-s.WetAfterDry) + stay*(1-s.WetAfterWet)
			wet[k] = w
		}
	}
	out := make([]float64, n+1)
	for k := range out {
		out[k] = dry[k] + wet[k]
	}
	return out
}

// PoorWetDays gives the number of wet days among n that is passed only with the chance poor.
func (s Spells) PoorWetDays(n int, poor float64) int {
	sum := 0.0
	for k, p := range s.WetDays(n) {
		if sum += p; sum >= 1-poor-slack {
			return k
		}
	}
	return max(n, 0)
}
