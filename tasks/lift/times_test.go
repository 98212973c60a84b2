package lift

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Speed of a hand hoist from the energy balance of 75 W at 0.75: by hand .25 t 1.4, .5 t .69, 1 t .34,
// 2 t .17, 3 t .115, 5 t .07 m/min.
func TestHoistSpeed(t *testing.T) {
	for mass, want := range map[float64]float64{250: 1.4, 500: .69, 1000: .34, 2000: .17, 3000: .115, 5000: .07} {
		if got := (Move{Mass: mass}).handHoist().Value / 1000; math.Abs(got-want) > .025*want {
			t.Errorf("%.0f kg: %.4f m/min, want %.3f", mass, got, want)
		}
	}
	if v := (Move{Mass: 1}).handHoist().Value; v != 3000 {
		t.Errorf("a light load runs at %v mm/min", v)
	}
}

func TestTimes(t *testing.T) {
	m := Move{Mass: 1000, Height: 1000, Travel: 2000, By: ByChainHoist, Site: true}
	e, err := Times(m)
	if err != nil {
		t.Fatal(err)
	}
	speed := 75 * .75 / (1000 * 9.81) * 60000
	if want := 1000/speed + 2000.0/5000; !near1(float64(e.Travel), want, 1e-9) {
		t.Errorf("travel %v, want %v", e.Travel, want)
	}
	if e.Rig != 22 || e.TrialLift != 5 || e.Land != 10 || e.MakeFast != 10 || e.Unhook != 5 {
		t.Errorf("%+v", e)
	}
	sum := e.Rig + e.TrialLift + e.Travel + e.Land + e.MakeFast + e.Unhook
	if !near1(float64(sum), float64(e.HandsOn), 1e-9) || !near1(e.Hours.Value, float64(sum), 1e-9) || e.Hours.Unit != "min" || len(e.Hours.From) != 6 {
		t.Errorf("sum %v, %v, %+v", sum, e.HandsOn, e.Hours)
	}
	soft := 0
	e.Hours.Walk(func(f origin.Figure, _ int) {
		if f.Origin.Soft() {
			soft++
		}
	})
	if soft < 6 {
		t.Errorf("only %d figures are marked as house estimates", soft)
	}
	m.First = true
	first, _ := Times(m)
	if first.Rig != 28 || first.TrialLift != 7.5 || first.Land != 15 || first.Unhook != 5 || first.Travel != e.Travel {
		t.Errorf("first: %+v", first)
	}
	m.Speed = 500
	if given, _ := Times(m); !near1(float64(given.Travel), 2.4, 1e-9) {
		t.Errorf("at 500 mm/min: %v", given.Travel)
	}
	if j, _ := Times(Move{Mass: 1000, Height: 120, By: ByJack}); !near1(float64(j.Travel), 120/speed+6, 1e-9) {
		t.Errorf("jack: %v", j.Travel)
	}
	for _, bad := range []Move{{}, {Mass: math.NaN()}, {Mass: 1, Height: -1}, {Mass: 1, Travel: math.Inf(1)}, {Mass: 1, By: 99}, {Mass: 1, People: -2}} {
		if _, err := Times(bad); err == nil || quantity.Hint(err) == "" {
			t.Errorf("%+v: %v", bad, err)
		}
	}
}

func TestWays(t *testing.T) {
	for w := ByHands; w <= ByJack; w++ {
		if got, err := ParseWay(w.String()); err != nil || got != w {
			t.Errorf("%s reads as %v (%v)", w, got, err)
		}
	}
	if w, err := ParseWay("crane"); err != nil || w != ByLoaderCrane {
		t.Error(w, err)
	}
	if _, err := ParseWay("chain host"); err == nil || !strings.Contains(quantity.Hint(err), "nearest is chain hoist") {
		t.Errorf("%v, %s", err, quantity.Hint(err))
	}
}

// Heavier, higher or further never takes less time.
func TestTimesLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := Move{Mass: rapid.Float64Range(1, 5000).Draw(t, "mass"), Height: rapid.Float64Range(0, 5000).Draw(t, "height"),
			Travel: rapid.Float64Range(0, 20000).Draw(t, "travel"), By: Way(rapid.IntRange(0, int(ByJack)).Draw(t, "way"))}
		a, err := Times(m)
		if err != nil {
			t.Fatal(err)
		}
		k := rapid.Float64Range(1, 3).Draw(t, "factor")
		for _, more := range []Move{{m.Mass * k, m.Height, m.Travel, m.By, 0, 0, false, false}, {m.Mass, m.Height * k, m.Travel, m.By, 0, 0, false, false},
			{m.Mass, m.Height, m.Travel * k, m.By, 0, 0, false, false}, {m.Mass, m.Height, m.Travel, m.By, 0, 0, true, true}} {
			if b, err := Times(more); err != nil || b.HandsOn < a.HandsOn-1e-9 {
				t.Fatalf("%v min, then %v (%v)", a.HandsOn, b.HandsOn, err)
			}
		}
	})
}
