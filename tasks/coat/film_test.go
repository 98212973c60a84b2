package coat

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

const litreUSGallon, mil = 3.785411784, 25.4

// Published examples of wet film and volume solids.
func TestWetFilm(t *testing.T) {
	// A note on volume solids: 60 %, one gallon with a quart of thinner leaves 48 %, not 35 or 45.
	near(t, "solids of 60 % thinned by a quarter", 100/WetFilm(100, 0.60, 0.25), 0.48, 1e-12)
	// A maker's guide to wet film: 100 um dry at 60 % is 167 um wet.
	near(t, "100 um at 60 %", WetFilm(100, 0.60, 0), 167, 0.5)
	// A journal of a painting centre, October 2003: 1.5 mil dry at 42 % is 3.57 mil wet.
	near(t, "1.5 mil at 42 %", WetFilm(1.5*mil, 0.42, 0)/mil, 3.57, 0.005)
	// Two notes on spread rates: 8 m2/L is 125 um wet, 10 m2/L is 100 um.
	for rate, want := range map[float64]float64{8: 125, 10: 100} {
		dft := 60.0
		near(t, amount(rate, "m2/L"), WetFilm(dft, rate*dft/1000, 0), want, 1e-9)
		near(t, amount(rate, "m2/L")+" back", Spreading(want, 1), rate, 1e-9)
	}
}

// A published table of theoretical spreading rates in m2/L.
func TestSpreading(t *testing.T) {
	for _, c := range []struct{ solids, dft, want float64 }{
		{1.00, 25, 40.0}, {0.80, 125, 6.4}, {0.65, 75, 8.7}, {0.60, 150, 4.0}, {0.50, 100, 5.0}, {0.45, 400, 1.1},
	} {
		near(t, amount(c.solids*100, "%")+" "+amount(c.dft, "um"), Spreading(c.dft, c.solids), c.want, 0.05)
	}
	// US Army TM 43-0139, table 3-2: 400 to 600 ft2 a gallon of oil paint to prime steel sheet; an alkyd
	// at its usual solids and film lies within.
	p, _ := Defaults("alkyd")
	rate := Spreading(p.DFT, p.VolumeSolids) * litreUSGallon / 0.09290304
	if rate < 350 || rate > 600 {
		t.Errorf("alkyd spreads %.0f ft2/gal, the manual says 400 to 600", rate)
	}
}

// Published losses by method: brush and roller 10-15 %, airless 30 %, air spray up to 50 %; wind 5-30 %.
func TestLosses(t *testing.T) {
	for _, c := range []struct {
		method    string
		low, high float64
	}{{Brush, 0.10, 0.15}, {Roller, 0.10, 0.15}, {Airless, 0.30, 0.30}, {AirSpray, 0, 0.50}} {
		for _, s := range []string{Flat, Sections} {
			l := methodLoss(c.method, s)
			if l.likely < c.low || l.likely > c.high || l.high > c.high {
				t.Errorf("%s on %s loses %v", c.method, s, l.likely)
			}
		}
	}
	// The two conventions of the tables: a consumption factor of 1.3 is a 23 % loss, 30 % is 1.43.
	near(t, "factor 1.3", need(1, 1000, 1, 0, 0.2308), 1.30, 0.001)
	near(t, "30 % lost", need(1, 1000, 1, 0, 0.30), 1.43, 0.002)
}

// A published hull: 22 x 2.1 x 1.5 m box, both sides and bottom 112.2 m2; at 6 m2/L 18.7 L a coat,
// three coats 56.1 L, twelve tins of 5 L.
func TestBoxHull(t *testing.T) {
	area := 2*(22*1.5) + 22*2.1
	near(t, "area", area, 112.2, 1e-9)
	litres := need(area, 100, 0.60, 0, 0) // spreads 6 m2/L
	near(t, "litres a coat", litres, 18.7, 1e-9)
	near(t, "litres in all", 3*litres, 56.1, 1e-9)
	tins, err := Tins(3*litres, []float64{5})
	if err != nil || len(tins) != 1 || tins[0] != (Tin{12, 5}) {
		t.Errorf("tins %v (%v), want 12 of 5 L", tins, err)
	}
}

// The dead volume of a blast profile, as remembered in the trade, in L/m2 of dry film.
func TestProfileVolume(t *testing.T) {
	for rz, want := range map[float64]float64{0: 0, 30: 0.02, 45: 0.03, 60: 0.04, 75: 0.05, 90: 0.06, 52.5: 0.035} {
		near(t, amount(rz, "um"), profileVolume(rz), want, 1e-12)
	}
}

func TestFilmSpecialCases(t *testing.T) {
	nan := math.NaN()
	for _, c := range [][3]float64{{100, 0, 0}, {100, 1.2, 0}, {100, nan, 0}, {-1, 0.6, 0}, {nan, 0.6, 0}, {100, 0.6, -1}, {100, 0.6, nan}} {
		if v := WetFilm(c[0], c[1], c[2]); !math.IsNaN(v) {
			t.Errorf("wet film of %v is %v", c, v)
		}
	}
	for _, c := range [][2]float64{{0, 0.6}, {nan, 0.6}, {100, 0}, {100, 60}} {
		if v := Spreading(c[0], c[1]); !math.IsNaN(v) {
			t.Errorf("spreading rate of %v is %v", c, v)
		}
	}
}

func TestTins(t *testing.T) {
	for _, c := range []struct {
		litres float64
		sizes  []float64
		want   []Tin
	}{
		{18.7, []float64{5}, []Tin{{4, 5}}},
		{18.7, []float64{1, 5}, []Tin{{3, 5}, {4, 1}}},
		{20, []float64{5, 20, 1}, []Tin{{1, 20}}},
		{23, []float64{20, 5}, []Tin{{1, 20}, {1, 5}}},
		{6, []float64{5, 3}, []Tin{{2, 3}}}, // the largest tin is not always the way
		{0.4, []float64{0.375, 2.5}, []Tin{{2, 0.375}}},
		{5000, []float64{20}, []Tin{{250, 20}}},
		{0, []float64{5}, nil},
	} {
		got, err := Tins(c.litres, c.sizes)
		if err != nil || len(got) != len(c.want) {
			t.Errorf("%v L of %v: %v %v, want %v", c.litres, c.sizes, got, err, c.want)
			continue
		}
		for i := range got {
			if got[i] != c.want[i] {
				t.Errorf("%v L of %v: %v, want %v", c.litres, c.sizes, got, c.want)
			}
		}
	}
	for _, c := range []struct {
		litres float64
		sizes  []float64
	}{{math.NaN(), []float64{5}}, {-1, []float64{5}}, {1e9, []float64{5}}, {5, nil}, {5, []float64{0}}, {5, []float64{math.NaN()}}, {5, []float64{1e6}}} {
		if got, err := Tins(c.litres, c.sizes); err == nil || got != nil {
			t.Errorf("%v L of %v: %v, want an error", c.litres, c.sizes, got)
		}
	}
}

// Tins hold enough, and no tin of the largest size is too many. With the bulk in the largest size
// they are as good as any choice: tried against all choices of two sizes.
func TestTinsLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := float64(rapid.IntRange(1, 40).Draw(t, "a")) / 2
		b := float64(rapid.IntRange(1, 40).Draw(t, "b")) / 2
		litres := rapid.Float64Range(0.1, 60).Draw(t, "litres")
		tins, err := Tins(litres, []float64{a, b})
		if err != nil {
			t.Fatal(err)
		}
		best := math.Inf(1)
		for n := 0; float64(n)*a < litres+a; n++ {
			m := math.Max(0, math.Ceil((litres-float64(n)*a)/b-1e-9))
			best = math.Min(best, float64(n)*a+m*b)
		}
		got := held(tins)
		if got < litres-1e-9 || got >= litres+math.Max(a, b) {
			t.Fatalf("%v L in tins of %v and %v: %v hold %v", litres, a, b, tins, got)
		}
		if litres <= 2*math.Max(a, b) && got > best+1e-9 {
			t.Fatalf("%v L in tins of %v and %v: %v hold %v, %v is possible", litres, a, b, tins, got, best)
		}
	})
}
