package site

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/origin"
)

func TestNeaped(t *testing.T) {
	tt := table(t, port)
	for _, c := range []struct {
		what     string
		level    float64
		from, to string
		neaped   bool
		why      string
	}{
		// A sill 2.0 m above the datum, draught 1.7 m and a margin: "close to 4 m" is needed, and is not
		// reached at neaps (published account of a drying berth).
		{"tides building", 4.0, "2026-04-15 00:10", "2026-04-16 08:00", false, "at 2026-04-16 02:00 UTC at the latest"},
		{"one tide too early", 3.88, "2026-04-13 23:25", "2026-04-14 20:00", true,
			"neaped: 3.88 m needed to get off, the highest water before 2026-04-14 20:00 UTC is 3.87 m (0.01 m short); the next that would do is high water 4.11 m at 2026-04-15 00:10 UTC"},
		{"on the highest spring", 4.47, "2026-04-18 02:02", "2026-04-19 12:00", true,
			"neaped: 4.47 m needed to get off, the highest water before 2026-04-19 12:00 UTC is 4.47 m (0.00 m short)"},
		{"never aground", 0.7, "2026-04-14 23:00", "2026-04-15 20:00", false, "stays afloat: water never below 0.79 m, 0.70 m needed"},
		{"just the height again", 4.468, "2026-04-18 02:02", "2026-04-19 12:00", false, "just the 4.47 m needed"},
		{"window ends on the rise", 3.0, "2026-04-13 10:32", "2026-04-13 22:00", false, "at 2026-04-13 22:00 UTC at the latest: water up to"},
		{"window ends before low water", 3.0, "2026-04-13 10:32", "2026-04-13 14:00", true, "the water only falls before 2026-04-13 14:00 UTC; the next that would do is high water 3.90 m"},
	} {
		g, err := tt.Neaped(c.level, utc(t, c.from), 0, utc(t, c.to))
		if err != nil {
			t.Errorf("%s: %v", c.what, err)
			continue
		}
		if g.Neaped != c.neaped || !strings.Contains(g.Why, c.why) || g.Neaped == (len(g.Off) > 0) && g.Grounds != 0 {
			t.Errorf("%s: neaped %v, want %v: %s\n(want %s)", c.what, g.Neaped, c.neaped, g.Why, c.why)
		}
	}
	g, _ := tt.Neaped(3.88, utc(t, "2026-04-13 23:25"), 0, utc(t, "2026-04-14 20:00"))
	if g.Next.At != utc(t, "2026-04-15 00:10") {
		t.Errorf("next %v", g.Next)
	}
}

// The tide that comes while the work is still going on helps nobody: 13 April 23:25 and 14 April 11:27 stand at 3.895 and
// 3.869 m, 15 April 00:10 at 4.109 m. At 12:30, 63 of 379 min down to 0.975 m: 2.422 + 1.447 cos(63/379 pi) = 3.68 m.
func TestNeapedWhileWorking(t *testing.T) {
	tt := table(t, port)
	for _, c := range []struct {
		what, ready string
		level       float64
		neaped      bool
		why         string
	}{
		{"done before it", "2026-04-14 11:00", 3.86, false, "gets off at 2026-04-14 11:"},
		{"done in the middle of it", "2026-04-14 11:30", 3.86, false, "gets off at 2026-04-14 11:30 UTC at the earliest after the work is done at 2026-04-14 11:30 UTC"},
		{"done as it falls", "2026-04-14 12:30", 3.86, true,
			"neaped: 3.86 m needed to get off, the highest water after the work is done at 2026-04-14 12:30 UTC and before 2026-04-14 20:00 UTC is 3.68 m (0.18 m short); the next that would do is high water 4.11 m"},
		{"done too late", "2026-04-14 20:30", 3.86, true, "neaped: the work is done at 2026-04-14 20:30 UTC, it must be off by 2026-04-14 20:00 UTC; the next"},
	} {
		g, err := tt.Neaped(c.level, utc(t, "2026-04-13 23:25"), utc(t, c.ready), utc(t, "2026-04-14 20:00"))
		if err != nil || g.Neaped != c.neaped || !strings.Contains(g.Why, c.why) {
			t.Errorf("%s: neaped %v, want %v: %s %v", c.what, g.Neaped, c.neaped, g.Why, err)
		}
	}
}

func TestNeapedRefuses(t *testing.T) {
	tt := table(t, port)
	_, err := tt.Neaped(4.0, utc(t, "2026-04-14 20:00"), 0, utc(t, "2026-04-15 06:00"))
	if err == nil || !strings.Contains(err.Error(), "4.00 m are needed to come in") {
		t.Errorf("coming in without water: %v", err)
	}
	for _, level := range []float64{math.NaN(), math.Inf(-1)} {
		if _, err := tt.Neaped(level, utc(t, "2026-04-14 20:00"), 0, utc(t, "2026-04-15 06:00")); err == nil {
			t.Errorf("took level %v", level)
		}
	}
	if _, err := tt.Neaped(2, utc(t, "2026-04-14 20:00"), 0, utc(t, "2026-05-15 06:00")); err == nil {
		t.Error("answered beyond the table")
	}
}

func TestNeapedLaw(t *testing.T) { // what gets off at a level gets off at every lower one that grounds it
	tt := table(t, port)
	rapid.Check(t, func(t *rapid.T) {
		hw := rapid.SampledFrom([]string{"2026-04-13 10:32", "2026-04-13 23:25", "2026-04-14 11:27", "2026-04-16 00:50", "2026-04-18 02:02"}).Draw(t, "hw")
		from := utc(&testing.T{}, hw)
		to := from + rapid.Int64Range(60, 2*day-800).Draw(t, "stay")
		to = min(to, tt.Waters[len(tt.Waters)-1].At)
		top, _ := tt.Height(from)
		high := rapid.Float64Range(2, top).Draw(t, "high")
		low := rapid.Float64Range(2, high).Draw(t, "low")
		a, err1 := tt.Neaped(high, from, 0, to)
		b, err2 := tt.Neaped(low, from, 0, to)
		if err1 != nil || err2 != nil {
			t.Fatal(err1, err2)
		}
		if !a.Neaped && b.Neaped && a.Grounds != 0 && len(a.Off) > 0 && b.Grounds != 0 {
			t.Fatalf("gets off at %v but is neaped at the lower %v: %s / %s", high, low, a.Why, b.Why)
		}
	})
}

func TestAllowance(t *testing.T) {
	for _, c := range []struct {
		a     Allowance
		below bool
		want  float64 // shift of a level of 2 m
	}{
		{Allowance{}, true, -0.3}, // default from memory: keep at least 0.3 m
		{Allowance{}, false, 0.3},
		{Allowance{LeastPressure: 983}, true, -0.30}, // arithmetic: 30 hPa at 1 cm each
		{Allowance{LeastPressure: 983, Surge: 0.2}, true, -0.50},
		{Allowance{LeastPressure: 983}, false, 0.3}, // only the other side is known: the default
		{Allowance{GreatestPressure: 1038}, false, 0.25},
		{Allowance{LeastPressure: 1020, GreatestPressure: 1030}, true, 0}, // high pressure lowers the water: no credit
		{Allowance{Surge: 0.4}, false, 0.4},
	} {
		f, err := c.a.Level(c.below, 2)
		if err != nil || math.Abs(f.Value-2-c.want) > 1e-9 || f.Origin.Kind != origin.Formula || len(f.From) != 2 {
			t.Errorf("%+v below %v: level %v, %v, want %v", c.a, c.below, f.Value, err, 2+c.want)
		}
	}
	nan := math.NaN()
	for _, a := range []Allowance{{LeastPressure: 98}, {GreatestPressure: nan}, {Surge: -1}, {Surge: nan}, {Surge: 6}, {LeastPressure: 1020, GreatestPressure: 1010}} {
		if _, err := a.Level(true, 1); err == nil {
			t.Errorf("took %+v", a)
		}
	}
	if _, err := (Allowance{}).Level(true, nan); err == nil {
		t.Error("took a level that is no number")
	}
}
