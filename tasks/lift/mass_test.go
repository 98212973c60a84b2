package lift

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

func sect(t testing.TB, word string) Section {
	t.Helper()
	s, err := ParseSection(word)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// frame is two UPN 200 of 4 m, three SHS 100x100x5 of 1 m across them at x = 0, 2 and 4 m, and a
// plate of 2 m x 1 m x 8 mm over x = 0 to 2 m.
func frame(t testing.TB) []Part {
	return []Part{
		{Name: "sides", Shape: Shape{Section: sect(t, "UPN 200")}, Length: 4000, Places: [][3]float64{{0, 0, 0}, {0, 1000, 0}}},
		{Name: "cross", Shape: Shape{Section: sect(t, "SHS 100x100x5")}, Length: 1000, Along: [3]float64{0, 1, 0},
			Places: [][3]float64{{0, 0, 0}, {2000, 0, 0}, {4000, 0, 0}}},
		{Name: "deck", Shape: Shape{Kind: Plate, Width: 1000, Thick: 8}, Length: 2000},
	}
}

// The sums by hand: 202.40 + 43.23 + 125.60 = 371.23 kg, x = 1661.7 mm (UPN from DIN 1026 tables).
func TestMassOfFrame(t *testing.T) {
	m, err := Mass(frame(t))
	if err != nil {
		t.Fatal(err)
	}
	if !near1(m.Mass, 371.23, .02) || !near1(m.CG[0], 1661.7, .1) || !near1(m.CG[1], 500, 1e-6) {
		t.Errorf("%.3f kg at %.1f", m.Mass, m.CG)
	}
	for i, want := range []float64{202.40, 43.23, 125.60} {
		if !near1(m.Parts[i].Mass, want, .01) {
			t.Errorf("%s: %.3f kg, want %.2f", m.Parts[i].Name, m.Parts[i].Mass, want)
		}
	}
	if !near1(m.Allowance, 1.10, 1e-9) || !near1(m.Heavy, 408.35, .03) {
		t.Errorf("allowance %.3f, %.2f kg", m.Allowance, m.Heavy)
	}
	// UPN .661 x 8 + SHS .4 less corners x 3 + plate 2 faces and its edges
	shs := (400 - (8-2*math.Pi)*10) / 1000 * 3
	if want := .661*8 + shs + 2*2 + 6*.008; !near1(m.Surface, want, 1e-6) {
		t.Errorf("surface %.4f m2, want %.4f", m.Surface, want)
	}
	total := 0.0
	for _, f := range m.Figure.From {
		total += f.Value
	}
	if !near1(total, m.Figure.Value, 1e-9) {
		t.Errorf("the figure's parts sum to %v, not %v", total, m.Figure.Value)
	}
	l := m.Load("frame")
	if !near1(l.Heavy().Value, m.Heavy, 1e-6) || l.Length != m.High[0]-m.Low[0] {
		t.Errorf("load %+v", l)
	}
}

func TestPartKinds(t *testing.T) {
	item := Part{Name: "winch", Shape: Shape{Kind: Item, Volume: 10, Area: .5}, Stated: 40, Known: Weighed, At: [3]float64{100, 0, 0}}
	bar := Part{Name: "bar", Shape: Shape{Kind: Plate, Width: 100, Thick: 10}, Length: 1000} // 7.85 kg
	for _, c := range []struct {
		name  string
		parts []Part
		want  float64 // kg
		heavy float64
		how   string
	}{
		{"weighed item", []Part{item}, 40, 41.2, "x 1.03"},
		{"weld metal", []Part{bar, {Name: "weld", Shape: Shape{Kind: Weld}}}, 7.85 * 1.015, 7.85 * 1.015 * 1.1, "1.5 % of the steel, from memory"},
		{"weld metal named first", []Part{{Name: "weld", Shape: Shape{Kind: Weld}}, bar}, 7.85 * 1.015, 7.85 * 1.015 * 1.1, "1.5 %"},
		{"paint 300 um", []Part{item, {Name: "paint", Shape: Shape{Kind: Paint, Area: 2}}}, 40 + .9, 41.2 + .99, "0.45 kg/m2 at 300 um"},
		{"paint on all", []Part{item, {Name: "paint", Shape: Shape{Kind: Paint}}}, 40 + .225, 41.2 + .2475, "0.5 m2"},
		{"316L", []Part{{Name: "tube", Shape: Shape{Section: sect(t, "CHS 48.3x3.2")}, Length: 1000, Material: "316L"}}, 3.627, 3.627 * 1.1, "3.559 x 8000/7850"},
		{"316L tube 60.3", []Part{{Name: "tube", Shape: Shape{Section: sect(t, "CHS 60.3x3.6")}, Length: 1000, Material: "1.4404"}}, 5.130, 5.13 * 1.1, "5.034 x 8000/7850"},
		{"stated overrules", []Part{{Name: "tube", Shape: Shape{Section: sect(t, "CHS 48.3x3.2")}, Length: 1000, Stated: 5}}, 5, 6.25, "guessed"},
		{"holes", []Part{{Name: "p", Shape: Shape{Kind: Plate, Width: 100, Thick: 10, Holes: 50000}, Length: 1000}}, 3.925, 3.925 * 1.1, "half is cut out"},
		{"old tank", []Part{{Name: "tank", Shape: Shape{Kind: Item, Area: 2}, Stated: 100, Known: Weighed, Water: 20, Silt: 10, Rust: 1}},
			100 + 20.5 + 18 + 6, 103 + 44.5*1.25, "20 L sea water, 10 L silt, 2 L scale of 3000"},
		{"bolts M20x60", []Part{{Name: "b", Shape: Shape{Kind: Bolts, Thread: 20}, Length: 60, Count: 10}}, 3.26, 3.26 * 1.1, "0.326 kg each by hand"},
		{"floor plate", []Part{{Name: "f", Shape: Shape{Kind: Plate, Width: 1000, Section: sect(t, "floor plate 6")}, Length: 1000}}, 48.7, 53.57, "floor plate tables"},
	} {
		m, err := Mass(c.parts)
		if err != nil || !near1(m.Mass, c.want, .002+c.want*2e-3) || !near1(m.Heavy, c.heavy, .003+c.heavy*2e-3) {
			t.Errorf("%s: %.4f kg, heavy %.4f (%v); want %.4f, %.4f (%s)", c.name, m.Mass, m.Heavy, err, c.want, c.heavy, c.how)
		}
	}
}

func TestPlacing(t *testing.T) {
	plate := Shape{Kind: Plate, Width: 400, Thick: 20}
	for _, c := range []struct {
		name      string
		part      Part
		cg        [3]float64
		low, high [3]float64
	}{
		{"flat", Part{Shape: plate, Length: 1000}, [3]float64{500, 200, 10}, [3]float64{}, [3]float64{1000, 400, 20}},
		{"along y", Part{Shape: plate, Length: 1000, Along: [3]float64{0, 2, 0}}, [3]float64{200, 500, 10}, [3]float64{}, [3]float64{400, 1000, 20}},
		{"upright", Part{Shape: plate, Length: 1000, Along: [3]float64{0, 0, 1}}, [3]float64{200, 10, 500}, [3]float64{}, [3]float64{400, 20, 1000}},
		{"on edge", Part{Shape: plate, Length: 1000, Across: [3]float64{0, 0, 1}}, [3]float64{500, 10, 200}, [3]float64{}, [3]float64{1000, 20, 400}},
		{"middle", Part{Shape: plate, Length: 1000, Middle: true}, [3]float64{}, [3]float64{-500, -200, -10}, [3]float64{500, 200, 10}},
		{"bar", Part{Shape: Shape{Section: sect(t, "SHS 100x100x5")}, Length: 2000, At: [3]float64{0, 0, 50}, Along: [3]float64{0, 0, 1}},
			[3]float64{0, 0, 1050}, [3]float64{-50, -50, 50}, [3]float64{50, 50, 2050}},
		{"backwards", Part{Shape: Shape{Section: sect(t, "RB 20")}, Length: 1000, Along: [3]float64{-1, 0, 0}},
			[3]float64{-500, 0, 0}, [3]float64{-1000, -10, -10}, [3]float64{0, 10, 10}},
	} {
		m, err := Mass([]Part{c.part})
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		for i := range 3 {
			if !near1(m.CG[i], c.cg[i], 1e-6) || !near1(m.Low[i], c.low[i], 1e-6) || !near1(m.High[i], c.high[i], 1e-6) {
				t.Errorf("%s: at %v in %v to %v", c.name, m.CG, m.Low, m.High)
				break
			}
		}
	}
}

func TestMassFaults(t *testing.T) {
	plate := Shape{Kind: Plate, Width: 100, Thick: 10}
	for _, c := range []struct {
		name  string
		parts []Part
		want  string
	}{
		{"none", nil, "without parts"},
		{"no length", []Part{{Name: "p", Shape: plate}}, "without all of its sizes"},
		{"no section", []Part{{Name: "p", Length: 10}}, "without a section"},
		{"NaN", []Part{{Name: "p", Shape: plate, Length: math.NaN()}}, "not a number"},
		{"Inf", []Part{{Name: "p", Shape: plate, Length: 1, At: [3]float64{math.Inf(1)}}}, "not a number"},
		{"negative", []Part{{Name: "p", Shape: plate, Length: -1}}, "outside 0 to"},
		{"item", []Part{{Name: "p", Shape: Shape{Kind: Item}}}, "no stated mass"},
		{"material", []Part{{Name: "p", Shape: plate, Length: 1, Material: "unobtainium"}}, "not a material"},
		{"places", []Part{{Name: "p", Shape: plate, Length: 1, Count: 3, Places: make([][3]float64, 2)}}, "2 places"},
		{"paint on nothing", []Part{{Name: "p", Shape: Shape{Kind: Paint}}}, "something to lie on"},
		{"holes", []Part{{Name: "p", Shape: Shape{Kind: Plate, Width: 100, Thick: 10, Holes: 1e6}, Length: 100}}, "as large as the plate"},
		{"skew", []Part{{Name: "p", Shape: plate, Length: 1, Across: [3]float64{1, 1, 0}}}, "not square to each other"},
		{"kind", []Part{{Name: "p", Shape: Shape{Kind: 99}}}, "no known kind"},
		{"allowance", []Part{{Name: "p", Shape: plate, Length: 1, Allowance: .5}}, "outside 1 to 3"},
	} {
		m, err := Mass(c.parts)
		if err == nil || !strings.Contains(err.Error(), c.want) || quantity.Hint(err) == "" || m.Mass != 0 {
			t.Errorf("%s: %v, hint %q", c.name, err, quantity.Hint(err))
		}
	}
}

func TestDensity(t *testing.T) {
	for word, want := range map[string]float64{"": 7850, "S355": 7850, "S355J2+N": 7850, "aluminium 6061": 2700, "lead": 11340, "Zinc": 7135, "copper": 8930,
		"titanium": 4500, "304": 7930, "concrete": 2300, "reinforced  concrete": 2400} { // Gere; published table of metals; stainless weight table
		if f, err := Density(word); err != nil || f.Value != want || f.Origin.Kind != origin.Table {
			t.Errorf("%q: %v %v (%v)", word, f.Value, f.Origin, err)
		}
	}
	if _, err := Density("alumnium"); err == nil || !strings.Contains(quantity.Hint(err), "aluminium") {
		t.Errorf("alumnium: %v, %s", err, quantity.Hint(err))
	}
}

// Mass is the sum of parts whatever the order, and the centre of gravity lies in their box.
func TestMassLaws(t *testing.T) {
	words := []string{"SHS 100x100x5", "UPN 200", "L 60x60x6", "CHS 48.3x3.2"}
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 8).Draw(t, "parts")
		parts := make([]Part, n)
		for i := range parts {
			place := rapid.Float64Range(-5000, 5000)
			parts[i] = Part{Name: "p", Length: rapid.Float64Range(10, 6000).Draw(t, "length"), Count: rapid.IntRange(1, 5).Draw(t, "count"),
				At:    [3]float64{place.Draw(t, "x"), place.Draw(t, "y"), place.Draw(t, "z")},
				Along: [3]float64{rapid.Float64Range(.1, 1).Draw(t, "u"), rapid.Float64Range(-1, 1).Draw(t, "v"), rapid.Float64Range(-1, 1).Draw(t, "w")}}
			parts[i].Shape.Section, _ = ParseSection(rapid.SampledFrom(words).Draw(t, "section"))
		}
		a, err := Mass(parts)
		if err != nil {
			t.Fatal(err)
		}
		back := make([]Part, n)
		total := 0.0
		for i := range parts {
			back[n-1-i] = parts[i]
			one, err := Mass(parts[i : i+1])
			if err != nil {
				t.Fatal(err)
			}
			total += one.Mass
		}
		b, _ := Mass(back)
		if !near1(a.Mass, b.Mass, 1e-9*a.Mass) || !near1(a.Mass, total, 1e-9*total) {
			t.Fatalf("%v, %v, %v kg", a.Mass, b.Mass, total)
		}
		for range 4 { // inside the hull of the parts: no further in any direction than the furthest of them
			d := [3]float64{rapid.Float64Range(-1, 1).Draw(t, "i"), rapid.Float64Range(-1, 1).Draw(t, "j"), rapid.Float64Range(-1, 1).Draw(t, "k")}
			far := math.Inf(-1)
			for i := range parts {
				one, _ := Mass(parts[i : i+1])
				far = math.Max(far, dot(one.CG, d))
			}
			if dot(a.CG, d) > far+1e-6 {
				t.Fatalf("centre %v is %v out in direction %v, the furthest part %v", a.CG, dot(a.CG, d), d, far)
			}
		}
		for k := range 3 {
			if !near1(a.CG[k], b.CG[k], 1e-6) || a.CG[k] < a.Low[k]-1e-6 || a.CG[k] > a.High[k]+1e-6 {
				t.Fatalf("centre %v or %v in %v to %v", a.CG, b.CG, a.Low, a.High)
			}
		}
	})
}
