package site

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance) {
		t.Errorf("%s: %v, want %v", what, got, want)
	}
}

// telAviv is December in Tel Aviv: wet after wet 213 of 326 days, wet after dry 117 of 511 (data of
// Gabriel and Neumann, Quarterly Journal of the Royal Meteorological Society, 1962).
var telAviv = Spells{213.0 / 326, 117.0 / 511}

func TestSpellsOfTelAviv(t *testing.T) {
	const tol = 0.00006 // figures worked out from those counts to four places
	near(t, "wet after dry", telAviv.WetAfterDry, .2290, tol)
	near(t, "wet after wet", telAviv.WetAfterWet, .6534, tol)
	near(t, "long run", telAviv.LongRun(), .3978, tol)
	for n, want := range map[int][2]float64{1: {.7710, .3466}, 2: {.5945, .2673}, 3: {.4584, .2061}, 5: {.2725, .1225}, 7: {.1620, .0728}} {
		near(t, "dry run from dry", telAviv.DryRun(n, false), want[0], tol)
		near(t, "dry run from wet", telAviv.DryRun(n, true), want[1], tol)
	}
	dry := func(n, least int) float64 { // chance of at least so many dry days in n
		sum := 0.0
		for k, p := range telAviv.WetDays(n) {
			if n-k >= least {
				sum += p
			}
		}
		return sum
	}
	for least, want := range map[int]float64{1: .9691, 3: .8020, 5: .4719, 7: .1265} {
		near(t, "dry days in 7", dry(7, least), want, tol)
	}
	near(t, "5 dry days in 10", dry(10, 5), .7405, tol)
	near(t, "7 dry days in 10", dry(10, 7), .4444, tol)
	mean, square := 0.0, 0.0
	for k, p := range telAviv.WetDays(7) {
		mean, square = mean+p*float64(k), square+p*float64(k*k)
	}
	near(t, "variance in 7 days (independent days: 1.68)", square-mean*mean, 3.54, 0.005)
}

func TestSpellsTextbook(t *testing.T) {
	// P(rain after rain) .4, P(rain after none) .1: long run 1/7 (published course exercise).
	s := Spells{.4, .1}
	near(t, "long run", s.LongRun(), 1.0/7, 1e-12)
	near(t, "five dry days", s.DryRun(5, false), .5905, 0.00005)
}

func TestSpellsLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		share := rapid.Float64Range(0, 1).Draw(t, "share")
		n := rapid.IntRange(0, 60).Draw(t, "n")
		s, err := SpellsOf(share)
		if err != nil || math.Abs(s.LongRun()-share) > 1e-9 {
			t.Fatalf("long run %v, want %v, %v", s.LongRun(), share, err)
		}
		sum, mean := 0.0, 0.0
		for k, p := range s.WetDays(n) {
			sum, mean = sum+p, mean+p*float64(k)
		}
		if math.Abs(sum-1) > 1e-9 || math.Abs(mean-share*float64(n)) > 1e-6 {
			t.Fatalf("sum %v, mean %v of %v", sum, mean, share*float64(n))
		}
		if a, b := s.PoorWetDays(n, 0.2), s.PoorWetDays(n, 0.5); a < b || a > n {
			t.Fatalf("one window in five has more than %d wet days, one in two more than %d", a, b)
		}
	})
	for _, v := range []float64{-0.1, 1.1, math.NaN()} {
		if _, err := SpellsOf(v); err == nil {
			t.Errorf("took a share of %v", v)
		}
	}
	if (Spells{1, 0}).WetDays(5) != nil || telAviv.WetDays(-1) != nil || telAviv.WetDays(401) != nil {
		t.Error("an answer where there is none")
	}
}
