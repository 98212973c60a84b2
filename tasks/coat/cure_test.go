package coat

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

func steady(c float64) func(int) float64 { return func(int) float64 { return c } }

// Cure at a steady temperature is the sheet's time: every point of every published sheet.
func TestSteadyCureIsTheSheet(t *testing.T) {
	for name, c := range publishedSheets() {
		for _, p := range c {
			finish, ok := Cure(77, c, -50, steady(p.Celsius), 1<<30)
			if want := 77 + int(math.Ceil(p.Min-1e-6)); !ok || finish != want {
				t.Errorf("%s at %v C: finish %d (%v), want %d", name, p.Celsius, finish, ok, want)
			}
		}
	}
}

// Two-pack epoxy zinc phosphate primer, data sheet: dry in 24 h at 10 C and 16 h at 20 C, so half of
// it in 12 h at 10 C and the rest in 8 h at 20 C.
func TestCureAddsUp(t *testing.T) {
	warmer := func(m int) float64 {
		if m < 12*60 {
			return 10
		}
		return 20
	}
	finish, ok := Cure(0, zincPhosphateDry, 5, warmer, 1e6)
	if !ok || finish != 20*60 {
		t.Errorf("finish %d min (%v), want 20 h", finish, ok)
	}
	near(t, "share at 12 h", Cured(0, 12*60, zincPhosphateDry, 5, warmer), 0.5, 1e-9)
	near(t, "share at 40 h", Cured(0, 40*60, zincPhosphateDry, 5, warmer), 1, 0)
}

// "Seriously retarded below 5 C" (the same sheet): a night of 4 C counts for nothing, and the dry time
// moves by the length of the night.
func TestColdNightCountsForNothing(t *testing.T) {
	night := func(m int) float64 {
		if m >= 6*60 && m < 16*60 {
			return 4
		}
		return 20
	}
	finish, ok := Cure(0, zincPhosphateDry, 5, night, 1e6)
	if !ok || finish != (16+10)*60 {
		t.Errorf("finish %d min (%v), want 26 h", finish, ok)
	}
	if finish, ok := Cure(0, zincPhosphateDry, 5, steady(5), 1e6); !ok || finish <= 24*60 {
		t.Errorf("at the least temperature itself: %d %v, want cure, later than at 10 C", finish, ok)
	}
	if end, ok := Cure(0, zincPhosphateDry, 5, steady(4), 5000); ok || end != 5000 {
		t.Errorf("cured at 4 C: %d %v", end, ok)
	}
}

// Zinc silicate wants moisture: the caller gives no temperature in minutes that are too dry.
func TestMinuteWithoutTemperatureCountsForNothing(t *testing.T) {
	c := at(hour, 20, 1)
	dry := func(m int) float64 {
		if m < 30 {
			return math.NaN()
		}
		return 20
	}
	if finish, ok := Cure(0, c, 5, dry, 1000); !ok || finish != 90 {
		t.Errorf("finish %d %v, want 90", finish, ok)
	}
}

func TestCureSpecialCases(t *testing.T) {
	c := at(hour, 20, 1)
	for _, x := range []struct {
		name          string
		start, finish int
		curve         Curve
		minimum       float64
		temp          func(int) float64
		limit         int
	}{
		{"faulty curve", 0, 100, nil, 5, steady(20), 100},
		{"no temperature", 0, 100, c, 5, nil, 100},
		{"limit before start", 50, 50, c, 5, steady(20), 10},
		{"minimum not a number", 0, 100, c, math.NaN(), steady(20), 100},
		{"an endless limit", 0, longestSearch, c, 5, steady(0), math.MaxInt},
		{"a start at the end of time", math.MaxInt - 2, math.MaxInt, c, 5, steady(20), math.MaxInt},
	} {
		if finish, ok := Cure(x.start, x.curve, x.minimum, x.temp, x.limit); ok || finish != x.finish {
			t.Errorf("%s: got %d %v, want %d false", x.name, finish, ok, x.finish)
		}
	}
	if finish, ok := Cure(0, c, 5, steady(math.Inf(1)), 100); !ok || finish != 60 {
		t.Errorf("boundless heat: %d %v, want the hottest point's 60", finish, ok)
	}
	if _, ok := Cure(0, c, math.Inf(-1), steady(math.Inf(-1)), 100); ok {
		t.Error("cured at boundless cold")
	}
}

// UFGS-09971, table "RECOAT WINDOWS": polyurethane over polyurethane and the tack coat, in hours by the
// highest surface temperature between the coats. Every whole degree of every band is tried.
func TestRecoatWindows(t *testing.T) {
	for _, b := range []struct {
		from, to         int
		least, most      int
		tack, tackBefore int
	}{
		{16, 21, 8, 48, 24, 96}, {22, 27, 6, 48, 24, 72}, {28, 32, 4, 36, 16, 48},
		{33, 38, 3, 24, 12, 36}, {39, 43, 2, 12, 10, 24}, {44, 49, 1, 2, 8, 16},
	} {
		for c := b.from; c <= b.to; c++ {
			hot := steady(float64(c))
			if got, ok := Cure(0, polyurethaneMin, 5, hot, 1e6); !ok || got != b.least*60 {
				t.Errorf("%d C: may be recoated after %d min, want %d h", c, got, b.least)
			}
			if got := LastRecoat(0, polyurethaneMax, hot, 1e6); got != b.most*60 {
				t.Errorf("%d C: last recoat at %d min, want %d h", c, got, b.most)
			}
			if got, ok := Cure(0, tackCoatMin, 5, hot, 1e6); !ok || got != b.tack*60 {
				t.Errorf("%d C: tack coat after %d min, want %d h", c, got, b.tack)
			}
			if got := LastRecoat(0, tackCoatMax, hot, 1e6); got != b.tackBefore*60 {
				t.Errorf("%d C: tack coat before %d min, want %d h", c, got, b.tackBefore)
			}
		}
	}
}

// UFGS-09971: the highest temperature at any time between the coats picks the band. A hot
// afternoon a day later closes a window that a cool night had left open.
func TestHottestHourPicksTheBand(t *testing.T) {
	afternoon := func(m int) float64 {
		if m >= 26*60 && m < 28*60 {
			return 35 // 24 h band
		}
		return 18 // 48 h band
	}
	if got := LastRecoat(0, polyurethaneMax, afternoon, 1e6); got != 26*60-1 {
		t.Errorf("last recoat at %d min, want the minute before the heat", got)
	}
	early := func(m int) float64 {
		if m >= 60 && m < 120 {
			return 35
		}
		return 18
	}
	if got := LastRecoat(0, polyurethaneMax, early, 1e6); got != 24*60 {
		t.Errorf("last recoat at %d min, want 24 h although the heat has passed", got)
	}
	if got := LastRecoat(120, polyurethaneMax, early, 1e6); got != 120+48*60 {
		t.Errorf("last recoat at %d min, want 48 h for a coat after the heat", got)
	}
}

func TestLastRecoatSpecialCases(t *testing.T) {
	holed := func(m int) float64 {
		if m == 40 {
			return math.NaN()
		}
		return 20
	}
	for _, x := range []struct {
		name  string
		start int
		curve Curve
		temp  func(int) float64
		limit int
		want  int
	}{
		{"no longest wait", 5, nil, steady(20), 900, 900},
		{"faulty curve", 5, Curve{{20, -1, 0}}, steady(20), 900, 5},
		{"no temperature", 5, at(hour, 20, 9), nil, 900, 5},
		{"temperature lost at 40", 5, at(hour, 20, 9), holed, 900, 39},
		{"temperature lost at the start", 40, at(hour, 20, 9), holed, 900, 40},
		{"limit before start", 50, at(hour, 20, 9), steady(20), 9, 50},
		{"limit first", 0, at(hour, 20, 9), steady(20), 100, 100},
		{"points with a max", 0, Curve{{20, 60, 300}}, steady(20), 900, 300},
		{"least time there is", math.MinInt, at(hour, 20, 9), steady(math.NaN()), 900, math.MinInt},
	} {
		if got := LastRecoat(x.start, x.curve, x.temp, x.limit); got != x.want {
			t.Errorf("%s: got %d, want %d", x.name, got, x.want)
		}
	}
}

// aWeather draws steel temperatures that change every so many minutes, some of them unknown.
func aWeather(t *rapid.T) func(int) float64 {
	steps := rapid.SliceOfN(rapid.Float64Range(-15, 45), 3, 12).Draw(t, "steel")
	if rapid.IntRange(0, 4).Draw(t, "hole") == 0 {
		steps[0] = math.NaN()
	}
	each := rapid.IntRange(20, 300).Draw(t, "minutes each")
	return func(m int) float64 { return steps[((m/each)%len(steps)+len(steps))%len(steps)] }
}

// The engine's rule: neither the end of cure nor the last recoat comes earlier for a later start.
func TestLaterStartNeverEarlier(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c, temp := aCurve(t), aWeather(t)
		minimum := rapid.Float64Range(-10, 15).Draw(t, "minimum")
		start := rapid.IntRange(-2000, 2000).Draw(t, "start")
		next := start + rapid.IntRange(1, 500).Draw(t, "later")
		const limit = 12000
		a, okA := Cure(start, c, minimum, temp, limit)
		b, okB := Cure(next, c, minimum, temp, limit)
		if b < a || okB && !okA {
			t.Fatalf("cure begun at %d ends at %d %v, begun at %d at %d %v", start, a, okA, next, b, okB)
		}
		if u, v := LastRecoat(start, c, temp, limit), LastRecoat(next, c, temp, limit); v < u {
			t.Fatalf("last recoat of a coat at %d is %d, of one at %d is %d", start, u, next, v)
		}
	})
}

// For paints without a humidity rule warmer steel never lengthens a least wait, nor lengthens a
// longest one; and the sum agrees with a plain sum of rates.
func TestWarmerSteel(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c, temp := aCurve(t), aWeather(t)
		more := rapid.Float64Range(0, 10).Draw(t, "warmer by")
		warmer := func(m int) float64 { return temp(m) + more }
		const limit = 9000
		a, ok := Cure(0, c, 0, temp, limit)
		b, okW := Cure(0, c, 0, warmer, limit)
		if b > a || ok && !okW {
			t.Fatalf("steel %v K warmer: cured at %d %v instead of %d %v", more, b, okW, a, ok)
		}
		if u, v := LastRecoat(0, c, temp, limit), LastRecoat(0, c, warmer, limit); v > u {
			t.Fatalf("steel %v K warmer: last recoat at %d instead of %d", more, v, u)
		}
		sum := 0.0
		for m := 0; m < a; m++ {
			if temp(m) >= 0 {
				sum += c.Rate(temp(m))
			}
		}
		if ok != (sum >= 1-cureSlack) {
			t.Fatalf("the rates sum to %v at %d, ok is %v", sum, a, ok)
		}
	})
}

// At any steady temperature the cure ends when Curve.Time says, rounded up to a minute.
func TestSteadyCureIsTheTime(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c, celsius := aCurve(t), rapid.Float64Range(-30, 60).Draw(t, "celsius")
		const limit = 1_000_000
		finish, ok := Cure(0, c, -100, steady(celsius), limit)
		minutes, _, err := c.Time(celsius)
		if minutes > limit-1 && minutes < limit+1 {
			t.Skip("on the limit")
		}
		if ok != (err == nil && minutes < limit) {
			t.Fatalf("cure %v, time %v", ok, err)
		}
		if ok && (float64(finish) < minutes-1e-5 || float64(finish) > minutes+1+1e-5) {
			t.Fatalf("cured at %d, time %v", finish, minutes)
		}
	})
}
