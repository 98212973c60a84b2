package lift

import (
	"strings"
	"testing"
)

// windRows are worked examples of wind on a hung load.
func windRows(t *testing.T) []outside {
	gust := func(mass float64, w Wind) WindResult {
		r, err := Gust(plain(mass), w)
		if err != nil {
			t.Fatal(err)
		}
		return r
	}
	const loader = "loader crane maker's manual, wind on large loads, example"
	const calc = "published wind speed calculation, 96.8 t"
	const mobile = "mobile crane maker's manual, wind"
	mean, _ := Gust(Load{Mass: 3000, Length: 3000, Width: 2000, Height: 10}, Wind{Mean: 5})
	big := gust(96800, Wind{Limit: 11.3, Area: 133.65, Drag: 1.2})
	return []outside{
		{"wind examples", "cylinder 3 x 3 m of 2 t: 36 km/h becomes 18", loader, seen, gust(2000, Wind{Limit: 10, Area: 9, Body: RoundBody}).Have * 3.6, 18, .7, "the manual rounds 0.516 to 0.5", false},
		{"wind examples", "cylinder 3 x 3 m of 2 t: 50 km/h becomes 25", loader, seen, gust(2000, Wind{Limit: 50 / 3.6, Area: 9, Body: RoundBody}).Have * 3.6, 25, .9, "the manual rounds 0.516 to 0.5", false},
		{"wind examples", "96.8 t: pressure at 11.3 m/s, N/m2", calc, seen, pressure(11.3), 79.81, digits(2), "", false},
		{"wind examples", "96.8 t: pressure at the permitted gust, N/m2", calc, seen, pressure(big.Have), 57.80, digits(2), "", false},
		{"wind examples", "96.8 t: force at the permitted gust, N", calc, seen, big.Force, 9270.29, 1, "the calculation rounds as it goes", false},
		{"wind examples", "gust at 10 m over the mean", mobile, seen, mean.Need / 5, 1.4, digits(2), "", false},
		{"wind examples", "no check below 0.5 m2 a tonne", mobile, seen, gust(10000, Wind{Limit: 10, Area: 4.99, Drag: 5}).Have, 10, digits(1), "", false},
		{"wind examples", "drag of a box", loader, seen, (Wind{Body: BoxBody}).drag().Value, 2, digits(1), "", false},
		{"wind examples", "drag of a cylinder", loader, seen, (Wind{Body: RoundBody}).drag().Value, 1, digits(1), "", false},
		{"wind examples", "drag of an unknown shape", loader, seen, (Wind{}).drag().Value, 2.4, digits(1), "", false},
	}
}

// roadRows are straps, friction and what the road asks.
func roadRows(t *testing.T) []outside {
	one := secure(t, plain(1000), Cargo{Friction: .3}, Strap{STF: 400, LC: 2500})
	c4, c3 := secure(t, plain(1000), Cargo{Friction: .4}, Strap{STF: 400, Angle: 90}), secure(t, plain(1000), Cargo{Friction: .3}, Strap{STF: 400, Angle: 90})
	out := []outside{
		{"straps", "S_TF 400 daN, friction 0.3: one strap over the top holds, daN", handbook, seen, one.HoldsMost, 240, digits(0), "", false},
		{"straps", "forward, g", "EN 12195-1, in the CTU Code", seen, c4.Directions[0].G, .8, digits(2), "", false},
		{"straps", "sideways, g", "EN 12195-1, in the CTU Code", seen, c3.Directions[2].G, .5, digits(2), "", false},
	}
	for sea, want := range map[Sea]float64{SeaA: .5, SeaB: .7, SeaC: .8} {
		r := secure(t, plain(1000), Cargo{Friction: .3, Sea: sea}, Strap{})
		worst := 0.0
		for _, d := range r.Directions {
			if strings.HasPrefix(d.Name, "sideways, sea") {
				worst = max(worst, d.G)
			}
		}
		out = append(out, outside{"straps", named("sideways at sea, area %d, g", sea), "CTU Code chapter 5", recalled, worst, want, digits(2), "", false})
	}
	for on, want := range map[Surface]float64{WoodOnPly: .45, WoodOnSteel: .30, SteelOnPly: .45, SteelOnAlu: .30, SteelOnStainles: .20, SteelOnSteel: .40, PaintOnPaint: .30, SmoothPainted: .20} {
		f, err := (Cargo{On: on}).friction()
		if err != nil {
			t.Fatal(err)
		}
		out = append(out, outside{"friction", string(on), "CTU Code informative material, friction factors", seen, f.Value, want, digits(2), "", false})
	}
	return out
}

// hookRows are two hooks and lifts from the water.
func hookRows(t *testing.T) []outside {
	const marine = "0027/ND Rev 11 Table 5-1"
	factor := func(kg float64, w Water) float64 {
		f, err := DynamicFactor(kg, w)
		if err != nil {
			t.Fatal(err)
		}
		return f.Value
	}
	l := plain(1000)
	l.CG[0] = 2000
	pair, err := TwoHooks(l, Pair{A: 1000, B: 3000, RatedA: 1e4, RatedB: 1e4, Queensland: true})
	if err != nil {
		t.Fatal(err)
	}
	moving, _ := Crane(Load{Mass: 1000, Allowance: 1}, CraneLift{Chart: []ChartRow{{4000, 2400}}, Radius: 4000, Moving: true})
	return []outside{
		{"dynamic factors", "4 t on shore", marine, seen, factor(4000, Onshore), 1.10, digits(2), "", false}, {"dynamic factors", "200 t on shore", marine, seen, factor(2e5, Onshore), 1.05, digits(2), "", false},
		{"dynamic factors", "2000 t on shore", marine, seen, factor(2e6, Onshore), 1.03, digits(2), "", false},
		{"dynamic factors", "100 t inshore", marine, seen, factor(1e5, Inshore), 1.12, digits(2), "", false}, {"dynamic factors", "100 t offshore", marine, seen, factor(1e5, Offshore), 1.25, digits(2), "", false},
		{"dynamic factors", "crane moving with the load", "Guidelines for Lifting, Rev 5", seen, moving.Need / 1000, 1.15, digits(2), "", false},
		{"two hooks", "at least 20 % over the share", "Queensland Mobile Crane Code of Practice 14.3.2", seen, pair.Need / pair.ShareA, 1.2, digits(2), "", false},
		{"slings", "greatest angle from the vertical", osha, seen, MaxSling, 60, digits(0), "", false},
	}
}
