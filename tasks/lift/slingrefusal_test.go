package lift

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
	"sailby/tasks/quantity"
)

func TestSlingRefusals(t *testing.T) {
	low := plain(1000)
	low.CG[2] = 500
	for _, c := range []struct {
		name    string
		load    Load
		rig     Rig
		reason  string
		nearest string
	}{
		{"61 degrees", plain(10), Rig{Legs: 2, WLL: 5000, Angle: 61, Datum: FromVertical}, "too flat: 61 deg exceeds 60 deg", "spreader beam"},
		{"29 from horizontal", plain(10), Rig{Legs: 2, WLL: 5000, Angle: 29, Datum: FromHorizontal}, "61 deg exceeds 60 deg", "45 degrees"},
		{"short legs", plain(10), Rig{Legs: 2, WLL: 5000, LegLength: 1000, Rise: 400}, "too flat", "legs of at least 1297 mm"},
		{"next size", plain(2500), Rig{Table: "EN 818-4 grade 8", Size: 7, Legs: 2, Angle: 45, Datum: FromVertical}, "exceeds", "EN 818-4 grade 8, 8 mm"},
		{"tag", plain(1000), Rig{WLL: 750}, "1000 kg exceeds 750 kg", "WLL 1000 kg"},
		{"lug", plain(1000), Rig{WLL: 5000, Legs: 2, Angle: 45, Datum: FromVertical, LugWLL: 700}, "the lug: 707.1 kg exceeds 700 kg", "lugs rated 708 kg"},
		{"coupling", plain(1000), Rig{WLL: 5000, Coupling: 900}, "the coupling", "couplings rated 1000 kg"},
		{"top heavy", low, Rig{WLL: 5000, Rise: 1000, Lugs: [][3]float64{{-500, 0, 100}, {500, 0, 100}}}, "roll over", "above the centre of gravity"},
		{"outside", plain(1000), Rig{WLL: 5000, Rise: 1000, Lugs: [][3]float64{{100, 0, 100}, {500, 0, 100}}}, "outside the lugs", "both sides"},
		{"outside three", plain(1000), Rig{WLL: 5000, Rise: 1000, Lugs: [][3]float64{{100, 0, 100}, {500, 0, 100}, {300, 200, 100}}}, "outside the lugs", "both sides"},
	} {
		s := slings(t, c.load, c.rig)
		if s.OK || !strings.Contains(s.Reason, c.reason) || !strings.Contains(s.Nearest, c.nearest) {
			t.Errorf("%s: %v %q, nearest %q", c.name, s.OK, s.Reason, s.Nearest)
		}
	}
	for _, c := range []struct {
		rig  Rig
		want string
	}{
		{Rig{Legs: 2, WLL: 1000, Angle: 30}, "no datum"}, {Rig{Legs: 2, WLL: 1000}, "shape of 2"}, {Rig{}, "no rating"},
		{Rig{Table: "EN 818-4", Size: 8}, "not a sling table"}, {Rig{Table: "EN 818-4 grade 8", Size: 9}, "no size"},
		{Rig{WLL: math.NaN()}, "not a number"}, {Rig{WLL: -1}, "outside"}, {Rig{Legs: 5}, "outside 0 to 4"},
		{Rig{WLL: 1000, Legs: 2, LegLength: 500, Rise: 600}, "more than the leg"}, {Rig{WLL: 1, Lugs: [][3]float64{{}, {}}, Rise: 10}, "same lug"},
		{Rig{WLL: 1, Lugs: [][3]float64{{}, {9}}}, "height above the lugs is not known"}, {Rig{WLL: 1, Legs: 2, Hitch: Endless}, "judged alone"},
		{Rig{WLL: 1, Legs: 1, Lugs: [][3]float64{{}, {9}}, Rise: 1}, "1 legs but 2 lugs"}, {Rig{WLL: 1, Hitch: 77}, "not a known one"},
	} {
		if _, err := Slings(plain(1), c.rig); err == nil || !strings.Contains(err.Error(), c.want) || quantity.Hint(err) == "" {
			t.Errorf("%+v: %v", c.rig, err)
		}
	}
	tilt := plain(1000)
	tilt.CG = [3]float64{0, 100, -500}
	if s := slings(t, tilt, Rig{WLL: 5000, Rise: 1000, Lugs: [][3]float64{{-500, 0, 0}, {500, 0, 0}}}); !strings.Contains(fmt.Sprint(s.Warnings), "tilted by 11 degrees") {
		t.Error(s.Warnings)
	}
}

// Leg loads balance the weight; a steeper sling never raises a leg's load.
func TestSlingLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		w := rapid.Float64Range(1, 1e5).Draw(t, "weight")
		n := rapid.IntRange(2, 4).Draw(t, "legs")
		level := rapid.Bool().Draw(t, "lugs at one height")
		at := rapid.Float64Range(200, 2000)
		lugs := make([][3]float64, n)
		for i := range lugs { // one in each sector around the centre of gravity
			a := (float64(i) + rapid.Float64Range(-.1, .1).Draw(t, "turn")) * 2 * math.Pi / float64(n)
			r := at.Draw(t, "out")
			lugs[i] = [3]float64{r * math.Cos(a), r * math.Sin(a), rapid.Float64Range(0, 100).Draw(t, "up")}
			if level {
				lugs[i][2] = 0
			}
		}
		if n == 2 {
			lugs[0][1], lugs[1][1] = 0, 0
		}
		h := rapid.Float64Range(1500, 9000).Draw(t, "hook")
		equal := rapid.Bool().Draw(t, "equalised")
		low, ok1 := statics(w, lugs, [3]float64{0, 0, h}, equal)
		high, ok2 := statics(w, lugs, [3]float64{0, 0, h * 1.3}, equal)
		if !ok1 || !ok2 {
			t.Fatal("no pulls found")
		}
		total := 0.0
		for _, g := range low {
			total += g.Share
		}
		if n < 4 && !near1(total, w, 1e-6*w) || total < w*(1-1e-6) {
			t.Fatalf("shares sum to %v of %v", total, w)
		}
		if level && (n < 4 || !equal) { // where the shares do not depend on the height
			for i := range low {
				if high[i].Tension > low[i].Tension*(1+1e-9) {
					t.Fatalf("leg %d: %v lower, %v higher", i, low[i].Tension, high[i].Tension)
				}
			}
		}
		a := rapid.Float64Range(0, 59).Draw(t, "angle")
		steep, flat := even(w, n, a, 0, equal), even(w, n, a+1, 0, equal)
		if steep[0].Tension > flat[0].Tension {
			t.Fatalf("%v at %v degrees, %v one flatter", steep[0].Tension, a, flat[0].Tension)
		}
	})
}
