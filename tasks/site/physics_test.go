package site_test

import (
	"fmt"
	"math"
	"testing"
	"time"

	"sailby/tasks/coat"
	"sailby/tasks/site"
)

// How a reference value came to be known.
const (
	seen   = "seen"   // read in the publication named
	worked = "worked" // worked out by another program, whose output and command are kept in testdata
)

// check is one number worked out here against one that comes from outside.
type check struct {
	what, source, mark   string
	got, want, tolerance float64
	because              string // reason of the tolerance
}

// The reasons of tolerances.
const (
	printed   = "as printed"
	truncated = "the chart cuts to whole degrees"
	yes       = "yes is 1, no is 0"
	between   = "a point told from its neighbours: sheets are rounded to whole hours and days"
	dark      = "rounded to the dark side by up to a minute, 10 s between ephemerides"
)

// The least numbers of checks from outside, and of those read in publications.
const leastChecks, leastSeen = 50, 30

// TestPhysicsFromOutside runs every check, and counts them.
func TestPhysicsFromOutside(t *testing.T) {
	var all []check
	for _, list := range []func(*testing.T) []check{filmChecks, potChecks, recoatChecks, sheetChecks, airChecks, psychrolibChecks, sunChecks, tideChecks, spellChecks} {
		all = append(all, list(t)...)
	}
	named := map[string]bool{}
	count := map[string]int{}
	for _, c := range all {
		if named[c.what] || c.source == "" || c.because == "" || c.mark != seen && c.mark != worked {
			t.Errorf("%s: stands twice, or does not say where it comes from: %+v", c.what, c)
		}
		named[c.what] = true
		count[c.mark]++
		t.Run(c.what, func(t *testing.T) {
			if !(math.Abs(c.got-c.want) <= c.tolerance+1e-9) {
				t.Errorf("got %.5g, %s (%s) has %.5g, within %.3g (%s)", c.got, c.source, c.mark, c.want, c.tolerance, c.because)
			}
		})
	}
	if len(all) < leastChecks || count[seen] < leastSeen {
		t.Errorf("%d checks from outside, %d of them seen; at least %d and %d are wanted", len(all), count[seen], leastChecks, leastSeen)
	}
	t.Logf("%d checks: %d seen, %d worked out by other programs", len(all), count[seen], count[worked])
}

func truth(b bool) float64 {
	if b {
		return 1
	}
	return 0
}

// must gives a value that has no error.
func must[V any](t *testing.T) func(V, error) V {
	return func(v V, err error) V {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return v
	}
}

func paint(t *testing.T, kind string) coat.Paint {
	t.Helper()
	p, ok := coat.Defaults(kind)
	if !ok {
		t.Fatalf("no paint %q", kind)
	}
	return p
}

func filmChecks(t *testing.T) []check {
	const mil = 25.4
	out := []check{
		{"60 % thinned by a quarter leaves 48 %", "a note on volume solids", seen, 100 / coat.WetFilm(100, 0.60, 0.25), 0.48, 0, printed},
		{"100 um dry at 60 % is 167 um wet", "a maker's guide to wet film", seen, coat.WetFilm(100, 0.60, 0), 167, 0.5, printed},
		{"1.5 mil dry at 42 % is 3.57 mil wet", "journal of a painting centre, October 2003", seen, coat.WetFilm(1.5*mil, 0.42, 0) / mil, 3.57, 0.005, printed},
		{"8 m2/L is 125 um wet", "two notes on spread rates", seen, coat.Spreading(125, 1), 8, 1e-9, printed},
		{"10 m2/L is 100 um wet", "two notes on spread rates", seen, coat.Spreading(100, 1), 10, 1e-9, printed},
	}
	for _, c := range [][3]float64{{1.00, 25, 40.0}, {0.80, 125, 6.4}, {0.65, 75, 8.7}, {0.60, 150, 4.0}, {0.50, 100, 5.0}, {0.45, 400, 1.1}} {
		out = append(out, check{fmt.Sprintf("spreading rate of %v at %v um", c[0], c[1]), "a table of theoretical spreading rates", seen, coat.Spreading(c[1], c[0]), c[2], 0.05, printed})
	}
	loss := func(method string) float64 {
		return must[coat.Application](t)(coat.Apply(coat.Job{Paint: paint(t, "alkyd"), Area: 10, Method: method, Surface: coat.Flat, Celsius: 20})).Loss
	}
	const table = "a table of paint consumption"
	out = append(out,
		check{"loss by brush", table, seen, loss(coat.Brush), 0.125, 0.025, "printed as 10 to 15 %"},
		check{"loss by roller", table, seen, loss(coat.Roller), 0.125, 0.025, "printed as 10 to 15 %"},
		check{"loss by airless", table, seen, loss(coat.Airless), 0.30, 0, printed},
		check{"loss by air spray", table, seen, loss(coat.AirSpray), 0.50, 0, printed})

	hull := paint(t, "alkyd") // 60 % at 100 um spreads 6 m2/L, with nothing lost as in the example
	hull.VolumeSolids, hull.DFT = 0.60, 100
	const area = 2*(22*1.5) + 22*2.1
	a := must[coat.Application](t)(coat.Apply(coat.Job{Paint: hull, Area: area, Method: coat.Roller, Surface: coat.Flat, Celsius: 20, Loss: 1e-9}))
	tins := must[[]coat.Tin](t)(coat.Tins(3*a.Litres, []float64{5}))
	out = append(out,
		check{"box hull, litres a coat", "a boat owners' dry dock example", seen, a.Litres, 18.7, 0.01, printed},
		check{"box hull, three coats", "a boat owners' dry dock example", seen, 3 * a.Litres, 56.1, 0.01, printed},
		check{"box hull, tins of 5 L", "a boat owners' dry dock example", seen, float64(tins[0].Count), 12, 0, printed})
	return out
}

func potChecks(t *testing.T) []check {
	pot := func(p coat.Paint, celsius float64) float64 {
		v, _, err := p.Pot(celsius)
		if err != nil {
			t.Fatal(err)
		}
		return v / 60
	}
	own := func(hours ...float64) coat.Paint { // pairs of temperature and hours
		var c coat.Curve
		for i := 0; i < len(hours); i += 2 {
			c = append(c, coat.Point{Celsius: hours[i], Min: hours[i+1] * 60})
		}
		return coat.Paint{Name: "own", PotLife: c}
	}
	epoxy, pu := paint(t, "two-pack epoxy"), paint(t, "polyurethane")
	return []check{
		{"pot life of epoxy at 21 C", "UFGS-09971 3.7.1.3", seen, pot(epoxy, 21), 4, 0, printed},
		{"pot life of epoxy at 31 C", "UFGS-09971 3.7.1.3: halves per 10 C", seen, pot(epoxy, 31), 2, 1e-6, printed},
		{"pot life of epoxy at 11 C", "UFGS-09971 3.7.1.3: doubles per 10 C", seen, pot(epoxy, 11), 8, 1e-6, printed},
		{"pot life of polyurethane at 21 C", "UFGS-09970 3.10.1.3", seen, pot(pu, 21), 2, 0, printed},
		{"pot life of polyurethane at 31 C", "UFGS-09970 3.10.1.3", seen, pot(pu, 31), 1, 1e-6, printed},
		{"zinc phosphate primer's pot life at 10 C, from its 20 C", "data sheet of a two-pack epoxy zinc phosphate primer", seen, pot(own(20, 24), 10), 48, 1e-6, printed},
		{"coal-tar epoxy's pot life at 30 C, from its 20 C", "data sheet of a two-pack coal-tar epoxy", seen, pot(own(20, 8), 30), 4, 1e-6, printed},
	}
}

// recoatChecks hold the default polyurethane to the table of UFGS-09971, in the middle of each of its bands.
func recoatChecks(t *testing.T) []check {
	const table = `UFGS-09971, table "RECOAT WINDOWS"`
	pu := paint(t, "polyurethane")
	r, err := pu.Next(pu)
	if err != nil {
		t.Fatal(err)
	}
	var out []check
	for _, b := range []struct{ from, to, least, most float64 }{{16, 21, 8, 48}, {22, 27, 6, 48}, {28, 32, 4, 36}, {33, 38, 3, 24}, {39, 43, 2, 12}, {44, 49, 1, 2}} {
		mid := (b.from + b.to) / 2
		steel := func(int) float64 { return mid }
		least, _ := coat.Cure(0, r.Min, pu.ApplyMin, steel, 1<<20)
		name := fmt.Sprintf("polyurethane over itself at %v C", mid)
		out = append(out, check{name + ", least", table, seen, float64(least) / 60, b.least, 0, printed},
			check{name + ", longest", table, seen, float64(coat.LastRecoat(0, r.Max, steel, 1<<20)) / 60, b.most, 0, printed})
	}
	heat := func(m int) float64 { // an hour at 35 C on the first day
		if m >= 600 && m < 660 {
			return 35
		}
		return 18
	}
	out = append(out, check{"the hottest hour between the coats picks the band", "UFGS-09971: highest temperature sustained for an hour", seen,
		float64(coat.LastRecoat(0, r.Max, heat, 1<<20)) / 60, 24, 0, printed})
	rescue := must[coat.Rescue](t)(coat.Missed(coat.Job{Paint: paint(t, "two-pack epoxy"), Area: 10, Celsius: 20}))
	return append(out,
		check{"tack coat over a missed epoxy, wet film", "UFGS-09971: 25 to 50 um", seen, rescue.Wet, 37.5, 12.5, "printed as 25 to 50 um"},
		check{"tack coat over a missed epoxy, thinner", "UFGS-09971: about 25 %", seen, rescue.Thinner, 0.25, 0, printed},
		check{"tack coat over a missed epoxy, hours to the full coat", "MIL-HDBK-1110 2.3.4: about 4 h", seen, float64(rescue.Wait) / 60, 4, 0, printed})
}

// sheetChecks hold the cure to published sheets: at their own points, and at points left out and told from those beside.
func sheetChecks(t *testing.T) []check {
	tank := []coat.Point{{Celsius: 10, Min: 18}, {Celsius: 15, Min: 14}, {Celsius: 20, Min: 10}, {Celsius: 25, Min: 8}, {Celsius: 30, Min: 7}, {Celsius: 35, Min: 6}, {Celsius: 40, Min: 4}}
	const lining = "sheet of a phenolic-type epoxy tank lining, full cure in days"
	var days coat.Curve
	for _, p := range tank {
		days = append(days, coat.Point{Celsius: p.Celsius, Min: p.Min * 1440})
	}
	var out []check
	for _, p := range tank {
		finish, _ := coat.Cure(0, days, 5, func(int) float64 { return p.Celsius }, 1<<30)
		out = append(out, check{fmt.Sprintf("tank lining's cure at %v C", p.Celsius), lining, seen, float64(finish) / 1440, p.Min, 0, printed})
	}
	left := func(name, source string, cold, hot, asked coat.Point, tolerance float64) {
		got, _, err := coat.Curve{cold, hot}.Time(asked.Celsius)
		if err != nil {
			t.Fatal(err)
		}
		out = append(out, check{name, source, seen, got, asked.Min, tolerance * asked.Min, between})
	}
	for i := 1; i+1 < len(tank); i++ {
		left(fmt.Sprintf("tank lining's cure at %v C, left out", tank[i].Celsius), lining, tank[i-1], tank[i+1], tank[i], 1.0/7)
	}
	const zinc, alkyd = "data sheet of a two-pack epoxy zinc phosphate primer", "data sheet of an alkyd enamel at 50 % humidity"
	left("zinc phosphate primer dry at 20 C, left out", zinc, coat.Point{Celsius: 10, Min: 24}, coat.Point{Celsius: 30, Min: 10}, coat.Point{Celsius: 20, Min: 16}, 0.05)
	left("zinc phosphate primer cured at 20 C, left out", zinc, coat.Point{Celsius: 10, Min: 7}, coat.Point{Celsius: 30, Min: 3}, coat.Point{Celsius: 20, Min: 5}, 0.1)
	left("alkyd enamel touch dry at 23 C, left out", alkyd, coat.Point{Celsius: 10, Min: 10}, coat.Point{Celsius: 40, Min: 3}, coat.Point{Celsius: 23, Min: 5}, 0.2)
	left("alkyd enamel hard dry at 23 C, left out", alkyd, coat.Point{Celsius: 10, Min: 30}, coat.Point{Celsius: 40, Min: 9}, coat.Point{Celsius: 23, Min: 15}, 0.2)
	twice, _, err := coat.Curve{{Celsius: 20, Min: 8}}.Time(10)
	if err != nil {
		t.Fatal(err)
	}
	return append(out, check{"a single point at 20 C, at 10 C", "a cure rule: twice the time of 20 C", seen, twice / 8, 2, 1e-9, printed})
}

func airChecks(t *testing.T) []check {
	f := func(v float64) float64 { return (v - 32) / 1.8 }
	const chart = "a dew point calculation chart in whole F"
	var out []check
	for _, c := range [][3]float64{{70, 65, 57}, {60, 80, 54}, {50, 70, 40}, {80, 50, 59}, {70, 85, 65}, {90, 60, 74}} {
		out = append(out, check{fmt.Sprintf("dew point at %v F and %v %%", c[0], c[1]), chart, seen, coat.DewPoint(f(c[0]), c[1]/100)*1.8 + 32, c[2], 1, truncated})
	}
	out = append(out,
		check{"dew point at 30 C and 55 %", "a maker's page on the dew point", seen, coat.DewPoint(30, 0.55), 20, 0.05, printed},
		check{"dew point at 24 C and 35 %", "a second maker's page", seen, coat.DewPoint(24, 0.35), 7, 1, truncated},
		check{"humidity at steel of 40 C, air 30 C and 85 %", "a guide to testing zinc silicate: just below 50 %", seen, coat.SteelHumidity(30, 0.85, 40), 0.49, 0.01, "printed as just below 50 %"})
	for _, c := range [][3]float64{{5, 82, 86}, {15, 54, 62}, {20, 43, 51}, {25, 34, 42}, {30, 27, 35}} {
		steel := f(70)
		out = append(out, check{fmt.Sprintf("humidity at steel %v F above the dew point", c[0]), "NACE 6A192/SSPC-TR 3", seen,
			coat.SteelHumidity(steel-c[0]/1.8, 1, steel) * 100, (c[1] + c[2]) / 2, (c[2]-c[1])/2 + 0.5, "printed as a range of whole percent"})
	}
	limits := coat.Paint{Name: "plain", ApplyMin: 4, ApplyMax: 52, RHMax: 0.85}
	may := func(air, steel, rh float64) float64 {
		ok, _ := coat.MayApply(limits, air, steel, rh, 1, coat.Brush)
		return truth(ok)
	}
	dew := coat.DewPoint(15, 0.7)
	const fhwa, federal = "FHWA-RD-98-084: 3 C above the dew point", "US federal road specification"
	return append(out,
		check{"steel 3.05 K above the dew point", fhwa, seen, may(15, dew+3.05, 0.7), 1, 0, yes},
		check{"steel 2.95 K above the dew point", fhwa, seen, may(15, dew+2.95, 0.7), 0, 0, yes},
		check{"humidity of 84 %, steel warm", federal, seen, may(15, 20, 0.84), 1, 0, yes},
		check{"humidity of 86 %, steel warm", federal, seen, may(15, 20, 0.86), 0, 0, yes},
		check{"steel at 39 F", federal + ": not below 40 F", seen, may(15, f(39), 0.2), 0, 0, yes},
		check{"steel at 126 F", federal + ": not above 125 F", seen, may(30, f(126), 0.2), 0, 0, yes})
}

func psychrolibChecks(t *testing.T) []check {
	var out []check
	for _, r := range kept(t, "dew.csv") {
		air, rh, want := r.number(0), r.number(1), r.number(2)
		got := coat.FrostPoint(coat.DewPoint(air, rh/100))
		out = append(out, check{fmt.Sprintf("dew point at %v C and %v %%", air, rh), "npm psychrolib 1.1.1, testdata/dew.csv", worked, got, want, 0.03,
			"0.02 K between the formulas, over ice below 0 C"})
	}
	return out
}

func sunChecks(t *testing.T) []check {
	var out []check
	add := func(what, source, mark string, got site.Minute, ok bool, want float64, up bool) {
		v := math.NaN()
		if late := float64(got) - want; ok && up {
			v = late
		} else if ok {
			v = -late
		}
		out = append(out, check{what + ", minutes on the dark side", source, mark, v, 0.5, 0.5 + 10.0/60, dark})
	}
	d := must[site.SunDay](t)(site.Sun(40.9, -74.3, site.Minute(minutes(t, "1990-06-25 04:00:00"))))
	add("sunrise at 40.9 N 74.3 W on 25 June 1990", "Almanac for Computers, US Naval Observatory, worked example: UT 9.441 h", seen, d.Rise, d.HasRise, minutes(t, "1990-06-25 00:00:00")+9.441*60, true)
	for _, r := range kept(t, "astronomy.csv") {
		lat, lon := r.number(0), r.number(1)
		d := must[site.SunDay](t)(site.Sun(lat, lon, site.Minute(minutes(t, r.cells[2]+" 00:00:00")-lon*4)))
		const source = "npm astronomy-engine 2.1.19, testdata/astronomy.csv"
		for i, e := range []struct {
			name    string
			at      site.Minute
			has, up bool
		}{{"sunrise", d.Rise, d.HasRise, true}, {"sunset", d.Set, d.HasSet, false}, {"dawn", d.CivilDawn, d.HasDawn, true}, {"dusk", d.CivilDusk, d.HasDusk, false}} {
			what := fmt.Sprintf("%s at %v, %v on %s", e.name, lat, lon, r.cells[2])
			if want := r.cells[3+i]; want != "" {
				add(what, source, worked, e.at, e.has, minutes(t, want), e.up)
			} else {
				out = append(out, check{"no " + what, source, worked, truth(e.has), 0, 0, yes})
			}
		}
	}
	return out
}

func tideChecks(t *testing.T) []check {
	var out []check
	// Station 8443970, National Ocean Service: metres, degrees on Greenwich, mean level above MLLW.
	boston := site.Harmonic{Name: "Boston", Datum: "MLLW", Mean: 1.586, Constituents: constituents("M2 1.371 109.2 S2 .208 146.2 N2 .305 76.7 K1 .143 205.6 O1 .116 187.1 P1 .047 204.8 K2 .059 146.1 Q1 .019 172.1 M4 .023 29 MS4 .009 74 NU2 .066 84 SA .049 136.3 SSA .022 97.5")}
	from := site.Minute(minutes(t, "2004-04-19 05:00:00"))
	got := must[*site.TideTable](t)(boston.Table(from, from+1440)).Between(from+240, from+1440)
	const table, few = "NOAA tide tables, table 1, Boston, 19 April 2004", "13 of 37 constituents"
	for i, w := range []struct {
		est  string
		feet float64
	}{{"04:56", -0.1}, {"11:11", 10.0}, {"17:10", 0.5}, {"23:22", 10.4}} {
		if i >= len(got) {
			t.Fatalf("%d waters", len(got))
		}
		at := minutes(t, "2004-04-19 "+w.est+":00") + 300
		out = append(out, check{"Boston, minutes off at " + w.est, table, seen, float64(got[i].At) - at, 0, 5, few},
			check{"Boston, metres at " + w.est, table, seen, got[i].Metres, w.feet * 0.3048, 0.065, few + ", printed to 0.1 ft"})
	}
	rule := &site.TideTable{Waters: []site.Water{{At: 0}, {At: 360, Metres: 12, High: true}}}
	for hour, twelfths := range []float64{0, 1, 3, 6, 9, 11, 12} {
		h, _ := rule.Height(site.Minute(hour * 60))
		out = append(out, check{fmt.Sprintf("rise in twelfths after %d h of 6", hour), "the rule of twelfths in two almanacs", seen, h, twelfths, 0.2, "the rule is a rounding of the cosine"})
	}
	port := site.Harmonic{Name: "invented port", Datum: "chart", Mean: 2.6, Constituents: constituents("M2 1.40 30 S2 .50 70 K1 .12 180 O1 .10 20")}
	rows := kept(t, "port.csv")
	first := site.Minute(minutes(t, rows[0].cells[0]))
	waters := must[*site.TideTable](t)(port.Table(first, first+7*1440)).Between(first-2, first+7*1440)
	if len(waters) < len(rows) {
		t.Fatalf("%d waters of %d", len(waters), len(rows))
	}
	for i, r := range rows {
		const source = "npm @neaps/tide-predictor 0.11.0, testdata/port.csv"
		out = append(out, check{"invented port, minutes off at " + r.cells[0], source, worked, float64(waters[i].At) - minutes(t, r.cells[0]), 0, 1, "whole minutes here, seconds there"},
			check{"invented port, metres at " + r.cells[0], source, worked, waters[i].Metres, r.number(1), 0.003, "node factors of two schools"})
	}
	return out
}

func spellChecks(*testing.T) []check {
	return []check{{"long-run share of wet days where wet follows wet by 0.4 and dry by 0.1", "a textbook's quiz: 1/7", seen,
		site.Spells{WetAfterWet: .4, WetAfterDry: .1}.LongRun(), 1.0 / 7, 1e-12, printed}}
}

// minutes gives a UTC time in minutes of the Unix clock.
func minutes(t *testing.T, text string) float64 {
	t.Helper()
	v, err := time.Parse("2006-01-02 15:04:05", text)
	if err != nil {
		t.Fatal(err)
	}
	return float64(v.Unix()) / 60
}
