package coat

import (
	"errors"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/origin"
)

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if math.IsNaN(got) || math.Abs(got-want) > tolerance {
		t.Errorf("%s: got %.5g, want %.5g (within %.3g)", what, got, want, tolerance)
	}
}

// The points of published sheets that several tests use.
var (
	// Two-pack epoxy zinc phosphate primer, data sheet: dry and least recoat, use, longest recoat, pot life.
	zincPhosphateDry  = at(hour, 10, 24, 20, 16, 30, 10)
	zincPhosphateUse  = at(day, 10, 7, 20, 5, 30, 3)
	zincPhosphateMax  = at(day, 20, 7, 30, 3)
	zincPhosphatePot  = at(day, 20, 1, 10, 2)
	coalTarDry        = at(hour, 7, 36, 20, 24, 30, 12)                             // two-pack coal-tar epoxy, data sheet
	coalTarPot        = at(hour, 7, 10, 20, 8, 30, 4)                               // the same
	tankLining        = at(day, 10, 18, 15, 14, 20, 10, 25, 8, 30, 7, 35, 6, 40, 4) // phenolic-type tank lining, full cure, data sheet
	alkydTouch        = at(hour, 10, 10, 23, 5, 40, 3)                              // alkyd enamel at 50 % humidity, data sheet
	alkydHard         = at(hour, 10, 30, 23, 15, 40, 9)                             // the same
	chlorinatedPrimer = at(hour, 7, 1, 20, 0.5, 30, 0.5)                            // chlorinated-rubber primer, data sheet
)

func publishedSheets() map[string]Curve {
	return map[string]Curve{"zinc phosphate dry": zincPhosphateDry, "zinc phosphate use": zincPhosphateUse, "zinc phosphate max": zincPhosphateMax,
		"zinc phosphate pot": zincPhosphatePot, "coal tar dry": coalTarDry, "coal tar pot": coalTarPot, "tank lining": tankLining,
		"alkyd touch": alkydTouch, "alkyd hard": alkydHard, "chlorinated rubber": chlorinatedPrimer,
		"polyurethane min": polyurethaneMin, "polyurethane max": polyurethaneMax, "tack min": tackCoatMin, "tack max": tackCoatMax}
}

// Every published sheet is a valid curve, and comes back at its own points, in any order.
func TestPublishedPointsComeBack(t *testing.T) {
	for name, c := range publishedSheets() {
		if err := c.Validate(); err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		turned := make(Curve, len(c))
		for i, p := range c {
			turned[len(c)-1-i] = p
		}
		for _, p := range c {
			for _, c := range []Curve{c, turned} {
				got, fig, err := c.Time(p.Celsius)
				if err != nil || got != p.Min || fig.Value != p.Min || fig.Unit != "min" {
					t.Errorf("%s at %v C: got %v (%v), want %v", name, p.Celsius, got, err, p.Min)
				}
				near(t, name+" rate", c.Rate(p.Celsius)*p.Min, 1, 1e-12)
			}
		}
	}
}

// A phenolic-type tank lining's sheet gives seven points; every second one is told from its
// neighbours within a seventh, where doubling per 10 C from 20 C is out by a third at 40 C.
func TestTankLiningBetweenPoints(t *testing.T) {
	for i := 1; i+1 < len(tankLining); i++ {
		without := Curve{tankLining[i-1], tankLining[i+1]}
		got, _, err := without.Time(tankLining[i].Celsius)
		if err != nil {
			t.Fatal(err)
		}
		near(t, amount(tankLining[i].Celsius, "C"), got/tankLining[i].Min, 1, 1.0/7)
	}
}

// Log of time against temperature: half way between two points lies their geometric mean.
func TestHalfWayIsTheGeometricMean(t *testing.T) {
	got, fig, err := zincPhosphateDry.Time(15)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "15 C", got/hour, math.Sqrt(24*16), 1e-9)
	if len(fig.From) != 2 || fig.From[0].Value != 24*hour || fig.From[1].Value != 16*hour || !strings.Contains(fig.Origin.Source, "log of time") {
		t.Errorf("the figure does not tell its two points: %+v", fig)
	}
}

// Outside the points, always on the careful side.
func TestOutsideThePoints(t *testing.T) {
	one := at(hour, 20, 8)
	for _, c := range []struct {
		name    string
		curve   Curve
		celsius float64
		side    side
		hours   float64
		soft    bool
	}{
		{"wait, one point, 10 C: twice (published rule for paints at 20 C)", one, 10, toWait, 16, true},
		{"wait, one point, 30 C: no faster credit", one, 30, toWait, 8, false},
		{"wait, hotter than all points", zincPhosphateDry, 45, toWait, 10, false},
		{"wait, colder, slope below doubling: doubling", zincPhosphateDry, 5, toWait, 24 * math.Sqrt2, true},
		{"wait, colder, slope above doubling: the slope", at(hour, 10, 30, 20, 10), 0, toWait, 90, false},
		{"longest wait, colder: no longer", at(hour, 20, 168), 5, toLive, 168, false},
		{"longest wait, hotter: halves", at(hour, 20, 168), 30, toLive, 84, true},
		{"longest wait, hotter, own slope steeper", at(hour, 20, 90, 30, 30), 40, toLive, 10, false},
		{"pot life at 31 C from 21 C: half (UFGS-09971 3.7.1.3)", at(hour, 21, 4), 31, toPot, 2, false},
		{"pot life at 11 C from 21 C: double (UFGS-09971 3.7.1.3)", at(hour, 21, 4), 11, toPot, 8, false},
		{"polyurethane pot life at 31 C (UFGS-09970 3.10.1.3)", at(hour, 21, 2), 31, toPot, 1, false},
		{"polyurethane pot life at 11 C (UFGS-09970 3.10.1.3)", at(hour, 21, 2), 11, toPot, 4, false},
		{"pot life: zinc phosphate primer's own points obey the rule", at(day, 20, 1), 10, toPot, 48, false},
		{"pot life, 20 C colder: counted for 10 C only", at(hour, 21, 4), 1, toPot, 8, false},
	} {
		got, fig, err := c.curve.figure("time", c.celsius, c.side, origin.Origin{Kind: origin.Table})
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		near(t, c.name, got/hour, c.hours, 1e-9*c.hours)
		soft := false
		fig.Walk(func(f origin.Figure, _ int) { soft = soft || f.Origin.Soft() })
		if soft != c.soft {
			t.Errorf("%s: house judgement in the figure is %v, want %v", c.name, soft, c.soft)
		}
	}
}

func TestTooColdIsNoCure(t *testing.T) {
	_, _, err := zincPhosphateDry.Time(-0.5)
	if !errors.Is(err, ErrCold) || !strings.Contains(err.Error(), "-0.5 C") || !strings.Contains(err.Error(), "10 C") || hint(err) == "" {
		t.Errorf("got %v (try: %s), want ErrCold with both temperatures and a way out", err, hint(err))
	}
	if r := zincPhosphateDry.Rate(-0.5); r != 0 {
		t.Errorf("rate below the reach is %v, want 0", r)
	}
	if r := zincPhosphateDry.Rate(0); r <= 0 {
		t.Errorf("rate at the end of the reach is %v, want above 0", r)
	}
	if _, _, err := zincPhosphateMax.Life(-30); err != nil {
		t.Errorf("a longest wait has no cold end: %v", err)
	}
}

func TestCurveFaults(t *testing.T) {
	nan := math.NaN()
	for _, c := range []struct {
		curve Curve
		says  string
	}{
		{nil, "no points"},
		{Curve{{nan, 60, 0}}, "not a number"},
		{Curve{{500, 60, 0}}, "500 C"},
		{Curve{{20, 0, 0}}, "must be above 0"},
		{Curve{{20, nan, 0}}, "must be above 0"},
		{Curve{{20, math.Inf(1), 0}}, "at most 2 years"},
		{Curve{{20, -5, 0}}, "must be above 0"},
		{Curve{{20, 60, 30}}, "the max at 20 C is 30 min, the min 60 min"},
		{Curve{{20, 60, nan}}, "the max at 20 C"},
		{Curve{{20, 60, 0}, {20.2, 50, 0}}, "closer than 0.5 K"},
		{Curve{{20, 60, 0}, {10, 50, 0}}, "60 min at 20 C is longer than 50 min at 10 C"},
		{Curve{{10, 60, 600}, {20, 50, 700}}, "700 min at 20 C"},
		{Curve{{10, 60, 600}, {20, 50, 0}}, "only one of the points at 10 C and 20 C has a max"},
	} {
		err := c.curve.Validate()
		if err == nil || !strings.Contains(err.Error(), c.says) || hint(err) == "" {
			t.Errorf("%v: got %v (try: %q), want %q and a way out", c.curve, err, hint(err), c.says)
		}
		if c.curve.Rate(20) != 0 {
			t.Errorf("%v: a faulty curve has a rate", c.curve)
		}
		if _, _, err := c.curve.Time(20); err == nil {
			t.Errorf("%v: a faulty curve has a time", c.curve)
		}
	}
	if _, _, err := zincPhosphateDry.Time(nan); err == nil {
		t.Error("a temperature that is not a number has a time")
	}
}

// aCurve draws a valid curve of one to five points.
func aCurve(t *rapid.T) Curve {
	n := rapid.IntRange(1, 5).Draw(t, "points")
	celsius, minutes := rapid.Float64Range(-5, 15).Draw(t, "coldest"), rapid.Float64Range(200, 4000).Draw(t, "longest")
	var c Curve
	for range n {
		c = append(c, Point{Celsius: celsius, Min: minutes})
		celsius += rapid.Float64Range(1, 12).Draw(t, "apart")
		minutes *= rapid.Float64Range(0.3, 1).Draw(t, "faster")
	}
	return rapid.Permutation(c).Draw(t, "curve")
}

func TestCurveLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := aCurve(t)
		if err := c.Validate(); err != nil {
			t.Fatal(err)
		}
		a := rapid.Float64Range(-40, 70).Draw(t, "a")
		b := rapid.Float64Range(a, 75).Draw(t, "b")
		if c.Rate(a) > c.Rate(b)*(1+1e-12) {
			t.Fatalf("colder is faster: %v at %v, %v at %v", c.Rate(a), a, c.Rate(b), b)
		}
		la, _, _ := c.Life(a)
		lb, _, _ := c.Life(b)
		if lb > la*(1+1e-12) {
			t.Fatalf("a longest wait grows with heat: %v at %v, %v at %v", la, a, lb, b)
		}
		if m, _, err := c.Time(a); err == nil && la > m*(1+1e-12) {
			t.Fatalf("the same points give a longest wait %v above the least wait %v", la, m)
		}
		for _, p := range c {
			if got, _, err := c.Time(p.Celsius); err != nil || got != p.Min {
				t.Fatalf("the curve misses its point %v: %v %v", p, got, err)
			}
		}
	})
}
