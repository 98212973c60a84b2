package coat

import (
	"math"
	"strings"
	"testing"

	"sailby/tasks/origin"
)

// Abrasive blasting handbook, table 6.3: new steel to Sa 2 1/2 with a 9.5 mm nozzle at 7 bar, m2/h and kg/m2.
func TestBlastingTable(t *testing.T) {
	for _, c := range []struct {
		abrasive  string
		rate, use float64
	}{
		{"sand", 26, 12.7}, {"flint", 15, 17.6}, {"staurolite", 27, 15.1}, {"coal slag", 21, 15.1},
		{"copper slag", 24, 15.1}, {"garnet", 20, 17.6}, {"aluminium oxide", 25, 15.1}, {"steel grit", 17, 26.8},
	} {
		got, err := Prepare(Prep{Area: 100, Grade: "Sa 2 1/2", State: "new", Surface: Flat, Abrasive: c.abrasive})
		if err != nil {
			t.Fatal(err)
		}
		near(t, c.abrasive+", minutes", float64(got.Minutes), 100/c.rate*60, 1e-6)
		near(t, c.abrasive+", kg", got.Abrasive, 100*c.use, 1e-6)
		if f := child(got.Hours, "rate with "+c.abrasive); f.Origin.Kind != origin.Table {
			t.Errorf("%s: the rate comes from %v, want a table", c.abrasive, f.Origin)
		}
		if !got.Dust || !got.Noise || !got.Sparks || got.Grade != "Sa 2 1/2 (SSPC-SP 10)" {
			t.Errorf("%s: %+v", c.abrasive, got)
		}
		if silica := strings.Contains(strings.Join(got.Warnings, " "), "silica"); silica != (c.abrasive == "sand" || c.abrasive == "flint") {
			t.Errorf("%s: silica warning is %v", c.abrasive, silica)
		}
	}
}

// Blast nozzle chart at 100 psi: at 5 lb/ft2 nozzles of 1/4, 5/16 and 3/8 in clean 9.2, 15.1 and 21.4 m2/h.
func TestNozzleChart(t *testing.T) {
	for bore, want := range map[float64]float64{6.35: 9.2, 7.9375: 15.1, 9.525: 21.4} {
		near(t, amount(bore, "mm")+" by the chart", between(nozzles, bore)/(5*4.88243), want, 0.06)
		got, err := Prepare(Prep{Area: 100, Grade: "Sa 2 1/2", Surface: Flat, Abrasive: "coal slag", Nozzle: bore})
		if err != nil {
			t.Fatal(err)
		}
		// The handbook's 21 m2/h agrees with the chart's 21.4 at 3/8 in; so do the smaller nozzles.
		near(t, amount(bore, "mm"), 100/(float64(got.Minutes)/60)/want, 1, 0.03)
	}
}

// Published loss of production by blast hose: 3/4 in 16.6 %, 1 in 3.6 %, 1 1/4 in 1.0 %.
func TestHoseLoss(t *testing.T) {
	rate := func(hose float64) float64 {
		got, err := Prepare(Prep{Area: 100, Grade: "Sa 2 1/2", Surface: Flat, Hose: hose})
		if err != nil {
			t.Fatal(err)
		}
		return 1 / float64(got.Minutes)
	}
	for bore, want := range map[float64]float64{19.05: 0.166, 25.4: 0.036, 31.75: 0.010} {
		near(t, amount(bore, "mm"), 1-rate(bore)/rate(0), want, 1e-9)
	}
}

// A guide to specifying blasting gives the twins of ISO 8501-1 and SSPC grades.
func TestGradeTwins(t *testing.T) {
	for iso, sspc := range map[string]string{"St 2": "SP2", "St 3": "SP3", "Sa 1": "SP7", "Sa 2": "SP6", "Sa 2 1/2": "SP10", "Sa 3": "SP5", "solvent clean": "SP1"} {
		for _, spelling := range []string{iso, strings.ToUpper(iso), strings.ReplaceAll(iso, " ", ""), sspc, "SSPC-" + sspc, strings.Replace(sspc, "SP", "sspc sp ", 1)} {
			g, err := findGrade(spelling)
			if err != nil || g.name != iso {
				t.Errorf("%q is read as %q (%v), want %q", spelling, g.name, err, iso)
			}
		}
	}
	for _, s := range []string{"Sa 2½", "sa2.5", "near-white"} {
		if g, err := findGrade(s); err != nil || g.name != "Sa 2 1/2" {
			t.Errorf("%q is read as %q (%v)", s, g.name, err)
		}
	}
}

// Without blasting the rates are remembered: they say so, and keep to their ranges.
func TestHandAndPowerTools(t *testing.T) {
	for _, c := range []struct {
		grade, method, state string
		low, high            float64 // m2/h
		noise, dust          bool
	}{
		{"St 2", "", "light rust", 2, 5, false, true},
		{"St 2", "hand tool", "C", 1, 2, false, true},
		{"St 3", "", "B", 3, 8, true, true},
		{"St 3", "power tool", "heavy rust", 1, 3, true, true},
		{"St 3", "needle gun", "painted", 0.5, 2, true, true},
		{"SP 11", "", "new", 0.5, 2, true, true},
		{"SP 1", "", "", 20, 40, false, false},
		{"fresh-water wash", "", "painted", 50, 150, false, false},
	} {
		got, err := Prepare(Prep{Area: 60, Grade: c.grade, Method: c.method, State: c.state, Surface: Flat})
		if err != nil {
			t.Errorf("%s %s: %v", c.grade, c.method, err)
			continue
		}
		near(t, c.grade+" quick", got.Range.Low, 60/c.high*60, 1e-6)
		near(t, c.grade+" slow", got.Range.High, 60/c.low*60, 1e-6)
		if got.Noise != c.noise || got.Dust != c.dust || got.Abrasive != 0 {
			t.Errorf("%s %s: %+v", c.grade, c.method, got)
		}
		if f := child(got.Hours, "slow rate"); !f.Origin.Soft() {
			t.Errorf("%s: the rate comes from %v, want from memory", c.grade, f.Origin)
		}
	}
}

// UFGS-09971 3.7.2.6: zinc-rich primer on repairs within 4 h of preparation; a city's specification
// prefers 24 h after blasting, which no limit here exceeds.
func TestWaitToFirstCoat(t *testing.T) {
	for _, c := range []struct {
		prep    Prep
		minutes float64
		kind    origin.Kind
	}{
		{Prep{Grade: "Sa 2 1/2", Site: true}, 240, origin.Table},
		{Prep{Grade: "St 3", Site: true}, 240, origin.Table},
		{Prep{Grade: "Sa 2 1/2"}, 480, origin.Memory},
		{Prep{Grade: "St 2"}, 480, origin.Memory},
		{Prep{Grade: "solvent clean", Site: true}, 0, origin.Judgement},
	} {
		c.prep.Area = 10
		got, err := Prepare(c.prep)
		if err != nil || float64(got.MaxWait) != c.minutes || got.Wait.Origin.Kind != c.kind || got.MaxWait > 24*60 {
			t.Errorf("%s: %v min from %v (%v), want %v", c.prep.Grade, got.MaxWait, got.Wait.Origin, err, c.minutes)
		}
	}
}

func TestPrepareFaults(t *testing.T) {
	for _, c := range []struct {
		change func(*Prep)
		says   string
	}{
		{func(p *Prep) { p.Area = math.NaN() }, "the area is not a number"},
		{func(p *Prep) { p.Area = 0 }, "the area is 0 m2"},
		{func(p *Prep) { p.Grade = "shiny" }, `"shiny" is not a grade`},
		{func(p *Prep) { p.Grade = "" }, `"" is not a grade`},
		{func(p *Prep) { p.Method = "prayer" }, `"prayer" is no method`},
		{func(p *Prep) { p.Method = "hand tool" }, "Sa 2 1/2 is not reached by hand tool"},
		{func(p *Prep) { p.State = "sad" }, `"sad" is not a state`},
		{func(p *Prep) { p.State, p.Grade = "sad", "St 3" }, `"sad" is not a state`},
		{func(p *Prep) { p.Abrasive = "flour" }, `"flour" is no abrasive`},
		{func(p *Prep) { p.Surface = "round" }, `"round" is no surface`},
		{func(p *Prep) { p.Nozzle = 30 }, "the nozzle is 30 mm"},
		{func(p *Prep) { p.Hose = 5 }, "the hose is 5 mm"},
		{func(p *Prep) { p.Rate = math.Inf(1) }, "the rate is not a number"},
	} {
		p := Prep{Area: 10, Grade: "Sa 2 1/2"}
		c.change(&p)
		if _, err := Prepare(p); err == nil || !strings.Contains(err.Error(), c.says) || hint(err) == "" {
			t.Errorf("got %v (try: %q), want %q and a way out", err, hint(err), c.says)
		}
	}
}

// Harder work takes longer: by grade, by state, by surface.
func TestPrepareOrder(t *testing.T) {
	minutes := func(p Prep) float64 {
		p.Area = 10
		got, err := Prepare(p)
		if err != nil {
			t.Fatal(err)
		}
		return float64(got.Minutes)
	}
	for _, list := range [][]Prep{
		{{Grade: "Sa 1"}, {Grade: "Sa 2"}, {Grade: "Sa 2 1/2"}, {Grade: "Sa 3"}},
		{{Grade: "Sa 2", State: "A"}, {Grade: "Sa 2", State: "D"}, {Grade: "Sa 2", State: "painted"}},
		{{Grade: "St 3", Surface: Flat}, {Grade: "St 3"}, {Grade: "St 3", Surface: Lattice}},
		{{Grade: "Sa 2", Rate: 20}, {Grade: "Sa 2", Rate: 10}},
		{{Grade: "St 3", Rate: 20}, {Grade: "St 3", Rate: 10}},
	} {
		for i := 1; i < len(list); i++ {
			if a, b := minutes(list[i-1]), minutes(list[i]); a >= b {
				t.Errorf("%+v takes %v min, %+v %v", list[i-1], a, list[i], b)
			}
		}
	}
}

// A man-hour manual, p. 202: blasting (commercial) and painting pipe, net man-hours a foot for 12 and 24 in
// pipe: four coats of a conventional system 0.18 and 0.34, five of epoxy 0.32 and 0.60. With a
// nozzle man, a pot man, rollers and the shop's share of the hour at the face the estimate here
// must lie within half and one and a half times of it.
func TestPipeAgainstTheManual(t *testing.T) {
	const feet, foot = 100.0, 0.3048
	for _, c := range []struct {
		kind     string
		diameter float64 // m
		coats    float64
		want     float64 // man-hours a foot
	}{
		{"alkyd", 0.3239, 4, 0.18}, {"alkyd", 0.6096, 4, 0.34}, {"two-pack epoxy", 0.3239, 5, 0.32}, {"two-pack epoxy", 0.6096, 5, 0.60},
	} {
		area := math.Pi * c.diameter * feet * foot
		blast, err := Prepare(Prep{Area: area, Grade: "commercial"})
		if err != nil {
			t.Fatal(err)
		}
		p, _ := Defaults(c.kind)
		p.DFT = 40 // several thin coats
		coat, err := Apply(Job{Paint: p, Area: area, Method: Roller, Celsius: 20})
		if err != nil {
			t.Fatal(err)
		}
		hours := (float64(blast.Minutes)*float64(blast.People) + c.coats*float64(coat.Minutes)) / 60 / faceShop
		if ratio := hours / feet / c.want; ratio < 0.5 || ratio > 1.5 {
			t.Errorf("%s on %.0f mm pipe: %.3f man-hours a foot, the manual says %.2f", c.kind, c.diameter*1000, hours/feet, c.want)
		} else {
			t.Logf("%s on %.0f mm pipe: %.3f man-hours a foot, the manual says %.2f", c.kind, c.diameter*1000, hours/feet, c.want)
		}
	}
}

// Open steelwork halves and worse the rate of tools, and less so that of water and cloth.
func TestPrepareOnLattice(t *testing.T) {
	ratio := func(grade string) float64 {
		flat, err := Prepare(Prep{Area: 10, Grade: grade, Surface: Flat})
		lattice, err2 := Prepare(Prep{Area: 10, Grade: grade, Surface: Lattice})
		if err != nil || err2 != nil {
			t.Fatal(err, err2)
		}
		return float64(lattice.Minutes / flat.Minutes)
	}
	if tools, water := ratio("St 3"), ratio("fresh-water wash"); tools < 2 || water < 1.3 || water > 2 {
		t.Errorf("lattice takes %.2f times as long with tools, %.2f with water", tools, water)
	}
}

// Washing and wiping need time to dry before the next coat.
func TestDrying(t *testing.T) {
	for grade, want := range map[string]float64{"fresh-water wash": 120, "solvent clean": 15, "Sa 2": 0} {
		got, err := Prepare(Prep{Area: 10, Grade: grade})
		if err != nil || float64(got.Dry) != want {
			t.Errorf("%s: dry after %v min (%v), want %v", grade, got.Dry, err, want)
		}
	}
}
