package lift

import (
	"math"
	"testing"
)

// slingRows are pulls in legs, off-centre shares and chokes as published.
func slingRows(t *testing.T) []outside {
	strong := func(r Rig) Rig { r.WLL = 1e6; return r }
	two := func(mass float64, r Rig) float64 { return perLeg(t, mass, strong(r)) }
	out := []outside{
		{"sling examples", "4000 kg, two legs, 40 degrees from the horizontal", lgh, seen, two(4000, Rig{Legs: 2, Angle: 40, Datum: FromHorizontal}), 3110, 1.5, "the guide uses its factor 1.555, cut off", false},
		{"sling examples", "6000 kg, two legs, S 36 over H 24", lgh, seen, two(6000, Rig{Legs: 2, LegLength: 36, Rise: 24}), 4500, digits(0), "", false},
		{"sling examples", "1000 lb, two legs, L 10 over H 5", slingSheet, seen, two(1000, Rig{Legs: 2, LegLength: 10, Rise: 5}), 1000, digits(0), "", false},
		{"sling examples", "rated 6000 lb at L 6 over H 4: 4000 lb of the load a leg", slingSheet, seen, 6000 / two(2, Rig{Legs: 2, LegLength: 6, Rise: 4}), 4000, digits(0), "", false},
		{"choke table", "tag 5000 kg below 30 degrees", lgh, seen, most(t, Rig{WLL: 5000 / .75, Hitch: Choked, ChokeAngle: 29}), 2450, digits(0), "", false},
		{"choke table", "chain and EN webbing: 0.8 of straight", "published note on choker hitches; EN 1492-1 (copy)", seen, most(t, Rig{Table: "EN 1492-1 webbing", Size: 1, Hitch: Choked}), 800, digits(0), "", false},
		{"choke table", "wire and web: 0.75 of straight", "published note on choker hitches", seen, most(t, Rig{WLL: 1000, Hitch: Choked}), 750, digits(0), "", false},
	}
	for h, want := range map[float64]float64{90: 1, 85: 1.004, 80: 1.015, 75: 1.035, 70: 1.064, 65: 1.104, 60: 1.155, 55: 1.221, 50: 1.305, 45: 1.414, 40: 1.555, 35: 1.742, 30: 2} {
		out = append(out, outside{"angle factors", named("%v degrees from the horizontal", h), slingSheet, seen,
			two(1000, Rig{Legs: 2, Angle: h, Datum: FromHorizontal}) / 500, want, .002, "the sheet cuts digits off", false})
	}
	for _, c := range []struct{ angle, want float64 }{{135, 1}, {121, 1}, {119, .87}, {90, .87}, {89, .74}, {60, .74}, {59, .62}, {30, .62}, {29, .49}} {
		got := most(t, Rig{WLL: 1e4, Hitch: Choked, ChokeAngle: c.angle}) / most(t, Rig{WLL: 1e4, Hitch: Choked})
		out = append(out, outside{"choke table", named("%v degrees in the bight", c.angle), lgh + "; " + slingSheet, seen, got, c.want, digits(2), "", false})
	}
	upright := slings(t, plain(10000), Rig{WLL: 1e6, Rise: 1e6, Lugs: [][3]float64{{-8, 0, 100}, {2, 0, 100}}})
	const centre = "sling maker's note on centre of gravity and sling loading"
	out = append(out,
		outside{"off-centre shares", "10 000 lb, centre of gravity 2 ft from this sling", centre, seen, upright.Legs[1].Share, 8000, digits(0), "", false},
		outside{"off-centre shares", "10 000 lb, centre of gravity 8 ft from this sling", centre, seen, upright.Legs[0].Share, 2000, digits(0), "", false})
	square := [][3]float64{{-500, -500, 0}, {500, -500, 0}, {500, 500, 0}, {-500, 500, 0}}
	low := plain(1000)
	low.CG[2] = -200
	rigid := slings(t, low, Rig{WLL: 1e6, Rise: 1e6, Lugs: square})
	out = append(out, outside{"four legs", "a rigid load: two legs may carry all of it", "US Navy training manual 14081, load shifting when lifted", seen, rigid.Legs[2].Share, 500, digits(0), "", false})
	for _, c := range []struct{ edge, want float64 }{{3, 1}, {1.5, .7}, {1, .5}} {
		out = append(out, outside{"edges", named("radius %v diameters", c.edge), "chain sling dimensioning sheet", seen, most(t, Rig{WLL: 1000, Edge: c.edge}) / 1000, c.want, digits(2), "", false})
	}
	for _, c := range []struct{ heat, want float64 }{{200, 1}, {250, .9}, {300, .9}, {350, .75}, {400, .75}} {
		out = append(out, outside{"heat", named("%v C", c.heat), en818, seen, most(t, Rig{Table: "EN 818-4 grade 8", Size: 8, Heat: c.heat}) / 2000, c.want, digits(2), "", false})
	}
	return out
}

// tableRows are the printed ratings of EN and US tables, each cell against the greatest load that
// passes. EN rounds to preferred numbers either way, OSHA to 100 lb; the lower of print and product counts.
func tableRows(t *testing.T) []outside {
	const rounds = "the lower of the printed figure and mode factor x one leg counts"
	var out []outside
	for _, c := range []struct {
		table, source string
		size          float64
		cells         [6]float64 // one; two at 45, 60; three at 45, 60; endless choked
	}{
		{"EN 818-4 grade 8", en818, 6, [6]float64{1.12, 1.60, 1.12, 2.36, 1.70, 1.80}}, {"EN 818-4 grade 8", en818, 7, [6]float64{1.50, 2.12, 1.50, 3.15, 2.24, 2.50}},
		{"EN 818-4 grade 8", en818, 8, [6]float64{2.00, 2.80, 2.00, 4.25, 3.00, 3.15}}, {"EN 818-4 grade 8", en818, 10, [6]float64{3.15, 4.25, 3.15, 6.70, 4.75, 5.00}},
		{"EN 818-4 grade 8", en818, 13, [6]float64{5.30, 7.50, 5.30, 11.20, 8.00, 8.50}}, {"EN 818-4 grade 8", en818, 16, [6]float64{8.00, 11.20, 8.00, 17.00, 11.80, 12.50}},
		{"EN 13414-1 steel core", en13414, 8, [6]float64{.750, 1.05, .750, 1.55, 1.10, 1.20}}, {"EN 13414-1 steel core", en13414, 10, [6]float64{1.15, 1.60, 1.15, 2.40, 1.70, 1.85}},
		{"EN 13414-1 steel core", en13414, 12, [6]float64{1.70, 2.30, 1.70, 3.55, 2.50, 2.70}}, {"EN 13414-1 steel core", en13414, 16, [6]float64{3.00, 4.20, 3.00, 6.30, 4.50, 4.80}},
		{"EN 13414-1 steel core", en13414, 20, [6]float64{4.60, 6.50, 4.60, 9.80, 6.90, 7.35}},
	} {
		for i, r := range []Rig{{}, {Legs: 2, Angle: 45}, {Legs: 2, Angle: 60}, {Legs: 3, Angle: 45}, {Legs: 3, Angle: 60}, {Hitch: Endless}} {
			r.Table, r.Size = c.table, c.size
			if r.Legs > 0 {
				r.Datum = FromVertical
			}
			what := named("%s %v mm, %d legs at %v degrees, hitch %d", c.table, c.size, max(1, r.Legs), r.Angle, r.Hitch)
			out = append(out, outside{"EN tables", what, c.source, seen, most(t, r) / 1000, c.cells[i], .045 * c.cells[i], rounds, true})
		}
	}
	for _, c := range []struct {
		hitch Hitch
		legs  int
		angle float64
		want  float64
	}{{Straight, 1, 0, 1}, {Choked, 1, 0, .8}, {Basket, 1, 0, 2}, {Basket, 1, 45, 1.4}, {Basket, 1, 60, 1}, {Straight, 2, 45, 1.4}, {Straight, 2, 60, 1}, {Straight, 3, 45, 2.1}, {Straight, 3, 60, 1.5}} {
		got := most(t, Rig{Table: "EN 1492-1 webbing", Size: 2, Hitch: c.hitch, Legs: c.legs, Angle: c.angle, Datum: FromVertical}) / 2000
		out = append(out, outside{"EN tables", named("webbing, hitch %d, %d legs at %v degrees", c.hitch, c.legs, c.angle), en1492, seen, got, c.want, .0101 * c.want, "at 45 degrees a leg itself carries 1.414", true})
	}
	for _, c := range []struct {
		table string
		size  float64
		cells [8]float64 // lb: one; two at 60, 45, 30; three at 60, 45, 30; choked
	}{
		{"US grade 80 chain", 5.5, [8]float64{2100, 3600, 3000, 2100, 5500, 4400, 3200, 1700}}, {"US grade 80 chain", 7, [8]float64{3500, 6100, 4900, 3500, 9100, 7400, 5200, 2800}},
		{"US grade 80 chain", 8, [8]float64{4500, 7800, 6400, 4500, 11700, 9500, 6800, 3600}}, {"US grade 80 chain", 10, [8]float64{7100, 12300, 10000, 7100, 18400, 15100, 10600, 5700}},
		{"US grade 80 chain", 13, [8]float64{12000, 20800, 17000, 12000, 31200, 25500, 18000, 9600}}, {"US grade 80 chain", 16, [8]float64{18100, 31300, 25600, 18100, 47000, 38400, 27100}},
		{"US grade 80 chain", 20, [8]float64{28300, 49000, 40000, 28300, 73500, 60000, 42400}}, {"US grade 100 chain", 5.5, [8]float64{2700, 4700, 3800, 2700, 7000, 5700, 4000}},
		{"US grade 100 chain", 10, [8]float64{8800, 15200, 12400, 8800, 22900, 18700, 13200}},
	} {
		for i, r := range []Rig{{}, {Legs: 2, Angle: 60}, {Legs: 2, Angle: 45}, {Legs: 2, Angle: 30}, {Legs: 3, Angle: 60}, {Legs: 3, Angle: 45}, {Legs: 3, Angle: 30}, {Hitch: Choked}} {
			if c.cells[i] == 0 {
				continue
			}
			r.Table, r.Size = c.table, c.size
			if r.Legs > 0 {
				r.Datum = FromHorizontal
			}
			what := named("%s %v mm, %d legs at %v degrees, hitch %d", c.table, c.size, max(1, r.Legs), r.Angle, r.Hitch)
			out = append(out, outside{"OSHA tables", what, osha, seen, most(t, r) / pound, c.cells[i], math.Max(100, .012*c.cells[i]), "the table rounds to 100 lb either way", true})
		}
	}
	return out
}
