package coat

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/origin"
)

// primer is the two-pack epoxy zinc phosphate primer of the data sheet: solids 53 %, 50-62 um.
func primer() Paint {
	return Paint{
		Name: "zinc phosphate", Kind: "two-pack epoxy", VolumeSolids: 0.53, DFT: 55, ApplyMin: 5, ApplyMax: 40, RHMax: 0.85,
		MixRatio: [2]float64{4, 1}, PotLife: zincPhosphatePot, PackSizes: []float64{5, 1},
		TouchDry: zincPhosphateDry, HardDry: zincPhosphateDry, Service: zincPhosphateUse,
		NextCoat: map[string]Recoat{"two-pack epoxy": {Min: zincPhosphateDry, Max: zincPhosphateMax}},
		Origin:   origin.Origin{Kind: origin.Table, Source: "primer data sheet"},
	}
}

// child finds a figure in a tree by its name.
func child(f origin.Figure, name string) origin.Figure {
	var out origin.Figure
	f.Walk(func(g origin.Figure, _ int) {
		if g.Name == name && out.Name == "" {
			out = g
		}
	})
	return out
}

func TestApplyByHand(t *testing.T) {
	p := primer()
	a, err := Apply(Job{Paint: p, Area: 40, Method: Airless, Surface: Flat, Celsius: 20})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "wet film", a.Wet, 55/0.53, 1e-9)
	near(t, "spreading", a.Spreading, 530/55.0, 1e-9)
	near(t, "litres at the published loss of 30 %", a.Litres, 40/(530/55.0)/0.7, 1e-9)
	near(t, "base", a.Base, a.Litres*0.8, 1e-9)
	near(t, "hardener", a.Hardener, a.Litres*0.2, 1e-9)
	if a.Batches != 1 || len(a.Tins) != 2 || held(a.Tins) != 6 {
		t.Errorf("batches %d, tins %v, want 1 and 5+1 L", a.Batches, a.Tins)
	}
	near(t, "minutes", float64(a.Minutes), 55+10+(40/93.0+40/139.0)/2*60, 1e-9)
	near(t, "tree", a.Hours.Value, float64(a.Minutes), 1e-9)
	near(t, "tree's parts", child(a.Hours, "applying").Value+child(a.Hours, "mixing").Value+child(a.Hours, "setting up and cleaning").Value, a.Hours.Value, 1e-9)
	near(t, "paint tree", a.Volume.Value, a.Litres, 1e-9)
	if f := child(a.Volume, "loss by airless"); f.Origin.Kind != origin.Table || f.Value != 0.30 {
		t.Errorf("the loss is %+v, want a published 0.30", f)
	}
	if f := child(a.Volume, "dft"); f.Origin.Source != "primer data sheet" {
		t.Errorf("dft comes from %v", f.Origin)
	}
}

// Brush on flat areas lies round the published base case: 9.3 m2 a man-hour, one coat, ordinary plant
// (Process Engineering, 2000).
func TestBrushRateIsThePublishedBase(t *testing.T) {
	p := primer()
	p.DFT = 60 // one pass
	a, err := Apply(Job{Paint: p, Area: 93, Method: Brush, Surface: Flat, Celsius: 20})
	if err != nil {
		t.Fatal(err)
	}
	if slow := child(a.Hours, "slow rate on flat areas"); slow.Value != 9.3 || slow.Origin.Kind != origin.Table {
		t.Errorf("slow rate %+v, want the published 9.3", slow)
	}
	near(t, "slowest", a.Range.High-float64(20+10*a.Batches), 600, 1e-6)
}

// A mix is used up before it goes off: pot life 4 h at 21 C (UFGS-09971 3.7.1.3) halves at 31 C.
func TestBatchesByPotLife(t *testing.T) {
	p, _ := Defaults("two-pack epoxy")
	p.Induction = 0
	for _, c := range []struct {
		celsius float64
		site    bool
		life    float64
	}{{21, false, 240}, {31, false, 120}, {31, true, 120}, {11, false, 480}} {
		a, err := Apply(Job{Paint: p, Area: 120, Method: Brush, Surface: Sections, Celsius: c.celsius, Site: c.site})
		if err != nil {
			t.Fatal(err)
		}
		thick := 125.0 / 120 // wet film over one pass by brush
		elapsed := 120 * thick / (9.3 * 0.5) * 60 / map[bool]float64{true: 0.7, false: 0.85}[c.site]
		want := int(math.Ceil(elapsed / (c.life * 0.8)))
		if a.Batches != want {
			t.Errorf("%v C: %d mixes, want %d", c.celsius, a.Batches, want)
		}
		near(t, "use within", float64(a.UseWithin), c.life*0.8, 1e-9)
		near(t, "one mix", a.BatchLitres*float64(a.Batches), a.Litres, 1e-9)
	}
}

// What is left of the pot life after standing must be of use.
func TestPotLifeTooShort(t *testing.T) {
	p := primer()
	p.PotLife, p.Induction = at(1, 20, 30), 20
	_, err := Apply(Job{Paint: p, Area: 5, Celsius: 20})
	if err == nil || !strings.Contains(err.Error(), "30 min") || !strings.Contains(err.Error(), "4 min are left") || hint(err) == "" {
		t.Errorf("got %v (try: %s)", err, hint(err))
	}
	p.PotLife, p.Induction = at(1, 20, 14), 0
	_, err = Apply(Job{Paint: p, Area: 90000, Method: Brush, Surface: Lattice, Celsius: 20})
	if err == nil || !strings.Contains(err.Error(), "mixes") {
		t.Errorf("a vast area by brush: %v", err)
	}
}

func TestLossesAddUp(t *testing.T) {
	p := primer()
	apply := func(j Job) Application {
		t.Helper()
		j.Paint, j.Area, j.Celsius = p, 30, 20
		a, err := Apply(j)
		if err != nil {
			t.Fatal(err)
		}
		return a
	}
	near(t, "airless out of doors: 30 % and of the rest 10 % to wind", apply(Job{Method: Airless, Surface: Flat, Site: true}).Loss, 0.37, 1e-9)
	near(t, "roller has no loss to wind", apply(Job{Method: Roller, Surface: Flat, Site: true}).Loss, 0.125, 1e-9)
	near(t, "own loss", apply(Job{Method: Airless, Loss: 0.2, Site: true}).Loss, 0.2, 1e-9)
	near(t, "lattice by airless, from memory 40-60 %", apply(Job{Method: Airless, Surface: Lattice}).Loss, 0.5, 1e-9)
	near(t, "a profile of 60 um takes 0.04 L/m2 of dry film", apply(Job{Method: Brush, Profile: 60}).Litres-apply(Job{Method: Brush}).Litres, 30*0.04/0.53/0.875, 1e-9)
	p.Thinner = 0.25
	thin := apply(Job{Method: Airless, Surface: Flat})
	near(t, "thinner", thin.Thinner, thin.Litres*0.25, 1e-9)
	near(t, "wet film of thinned paint", thin.Wet, 55*1.25/0.53, 1e-9)
	p.Thinner = 0
	near(t, "paint without thinner is the same", apply(Job{Method: Airless, Surface: Flat}).Litres, thin.Litres, 1e-9)
	near(t, "cleaner for one mix", thin.Cleaner, 5, 1e-9)
	p.PotLife = at(hour, 20, 2)
	many := apply(Job{Method: Brush, Surface: Lattice})
	near(t, "cleaner for each further mix", many.Cleaner, 0.5+0.25*float64(many.Batches-1), 1e-9)
	if many.Batches < 2 {
		t.Errorf("%d mixes of a quick paint", many.Batches)
	}
	p.PotLife = zincPhosphatePot
	near(t, "masking 20 m", float64(apply(Job{Method: Brush, Mask: 20}).Minutes-apply(Job{Method: Brush}).Minutes), 30, 1e-9)
	near(t, "own rate", apply(Job{Method: Brush, Rate: 15}).Range.Low, 20+10+120, 1e-9)
}

// US federal road specification: the stripe reaches at least 1 in beyond the edge, and dries or sets to
// touch before the full coat: it is a task and a wait of its own.
func TestStripe(t *testing.T) {
	p := primer()
	j := Job{Paint: p, Area: 30, Method: Airless, Celsius: 20}
	without, _ := Apply(j)
	j.Stripe = 60
	with, err := Apply(j)
	if err != nil || with.Stripe == nil || without.Stripe != nil {
		t.Fatalf("stripe %v (%v), without %v", with.Stripe, err, without.Stripe)
	}
	if with.Minutes != without.Minutes || with.Litres != without.Litres {
		t.Error("the stripe coat is mixed up with the full coat")
	}
	near(t, "wait, dry in 16 h at 20 C", float64(with.Stripe.Wait), 16*60, 1e-9)
	near(t, "paint for 25 mm to each side", with.Stripe.Litres, 60*0.05*55/1000/0.53/0.875, 1e-9)
	near(t, "minutes", float64(with.Stripe.Minutes), 60+10, 1e-9)
}

func TestApplyWarns(t *testing.T) {
	pu, _ := Defaults("polyurethane")
	thick := primer()
	thick.DFT = 200
	for _, c := range []struct {
		job  Job
		says string
	}{
		{Job{Paint: primer(), Celsius: 2}, "2 C is colder than the paint's least 5 C"},
		{Job{Paint: primer(), Celsius: 41}, "41 C is hotter than the paint's greatest 40 C"},
		{Job{Paint: thick, Celsius: 20, Method: Roller}, "a wet film of 377 um is more than roller usually leaves in one pass (120 um)"},
		{Job{Paint: primer(), Celsius: 20, Method: Airless, Surface: Lattice}, "losses may be anything"},
		{Job{Paint: pu, Celsius: 20, Method: AirSpray}, "isocyanate"},
		{Job{Paint: primer(), Celsius: 20, Method: Airless}, "under the skin"},
	} {
		c.job.Area = 20
		a, err := Apply(c.job)
		if all := strings.Join(a.Warnings, "|"); err != nil || !strings.Contains(all, c.says) {
			t.Errorf("want %q, got %q (%v)", c.says, all, err)
		}
	}
	quick := primer()
	quick.PotLife, quick.PackSizes = at(hour, 20, 1), []float64{20}
	a, err := Apply(Job{Paint: quick, Area: 100, Celsius: 20, Method: Brush})
	if all := strings.Join(a.Warnings, "|"); err != nil || !strings.Contains(all, "a kit of 20 L is more than one mix") {
		t.Errorf("big kit, short pot life: %q (%v)", all, err)
	}
}

func TestApplyFaults(t *testing.T) {
	for _, c := range []struct {
		change func(*Job)
		says   string
	}{
		{func(j *Job) { j.Area = math.NaN() }, "the area is not a number"},
		{func(j *Job) { j.Area = -3 }, "the area is -3 m2"},
		{func(j *Job) { j.Celsius = math.Inf(1) }, "the temperature is not a number"},
		{func(j *Job) { j.Method = "mop" }, `"mop" is no method`},
		{func(j *Job) { j.Surface = "round" }, `"round" is no surface`},
		{func(j *Job) { j.Loss = 0.95 }, "the loss is 95 %"},
		{func(j *Job) { j.Profile = 500 }, "the profile is 500 um"},
		{func(j *Job) { j.Stripe = -1 }, "the stripe coat is -1 m"},
		{func(j *Job) { j.Rate = -1 }, "the rate is -1 m2/h"},
		{func(j *Job) { j.Paint.VolumeSolids = 60 }, "volume solids is 6000 %"},
		{func(j *Job) { j.Paint.DFT = 0 }, "dry film is 0 um"},
		{func(j *Job) { j.Paint.PotLife = nil }, "has no pot life"},
		{func(j *Job) { j.Paint.ApplyMax = 1 }, "the greatest steel temperature"},
		{func(j *Job) { j.Paint.RHMin = 0.9 }, "leaves no room"},
		{func(j *Job) { j.Paint.MixRatio[1] = -1 }, "a part of the mix is -1"},
		{func(j *Job) { j.Paint.PackSizes = []float64{0} }, "a pack is 0 L"},
		{func(j *Job) { j.Paint.PackSizes = make([]float64, 13) }, "a pack is 0 L"},
		{func(j *Job) { j.Paint.HardDry = Curve{{20, -1, 0}} }, "hard dry: the time at 20 C"},
		{func(j *Job) { j.Paint.WindMax = map[string]float64{"brush": -1} }, "the wind limit for brush"},
		{func(j *Job) { j.Paint.NextCoat = map[string]Recoat{"x": {}} }, `next coat "x" has no least wait`},
		{func(j *Job) { j.Paint.NextCoat = map[string]Recoat{"x": {at(1, 20, 90), at(1, 20, 60)}} }, "at 20 C the max is 60 min, the min 90 min"},
	} {
		j := Job{Paint: primer(), Area: 10, Celsius: 20}
		c.change(&j)
		a, err := Apply(j)
		if err == nil || !strings.Contains(err.Error(), c.says) || hint(err) == "" || a.Minutes != 0 {
			t.Errorf("got %v (try: %q), want %q and a way out", err, hint(err), c.says)
		}
	}
}

// More area is never less work or less paint; the range is in order; every figure is finite.
func TestApplyLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p, _ := Defaults(rapid.SampledFrom(Kinds()).Draw(t, "kind"))
		j := Job{Paint: p, Area: rapid.Float64Range(0.1, 300).Draw(t, "area"), Celsius: rapid.Float64Range(2, 30).Draw(t, "celsius"),
			Method: rapid.SampledFrom(Methods()).Draw(t, "method"), Surface: rapid.SampledFrom(Surfaces()).Draw(t, "surface"),
			Site: rapid.Bool().Draw(t, "site"), Profile: rapid.Float64Range(0, 90).Draw(t, "profile")}
		a, err := Apply(j)
		if err != nil {
			t.Fatal(err)
		}
		if !(a.Range.Low <= a.Range.Likely && a.Range.Likely <= a.Range.High) || float64(a.Minutes) != a.Range.Likely || held(a.Tins) < a.Litres-1e-9 {
			t.Fatalf("%+v", a)
		}
		a.Hours.Walk(func(f origin.Figure, _ int) {
			if math.IsNaN(f.Value) || math.IsInf(f.Value, 0) || f.Name == "" {
				t.Fatalf("a figure without sense: %+v", f)
			}
		})
		j.Area *= rapid.Float64Range(1, 3).Draw(t, "more")
		b, err := Apply(j)
		if err != nil || b.Minutes < a.Minutes || b.Litres < a.Litres || b.Batches < a.Batches {
			t.Fatalf("more area is less work: %+v, then %+v (%v)", a, b, err)
		}
	})
}
