package weld

import (
	"strings"
	"testing"
)

func warned(e Estimate, part string) bool {
	for _, w := range e.Warnings {
		if strings.Contains(w, part) {
			return true
		}
	}
	return false
}

// Submerged arc welds flat and horizontal only: AWS D1.1:2020 Table 5.1 has no size for it in the
// vertical and overhead columns.
func TestSubmergedArcStaysFlat(t *testing.T) {
	for p := PA; p <= lastPosition; p++ {
		_, err := Work([]Seam{{Joint: Joint{Type: Fillet, Leg: 10, Length: 1000}, Position: p, Procedure: &Procedure{Process: 121}}}, Circumstances{})
		if flat := p == PA || p == PB || p == PC; flat != (err == nil) {
			t.Errorf("%s: %v", p, err)
		}
	}
}

// A weld with more current than the set gives is told of, whether the current is given or usual; at
// what the set gives nothing is said.
func TestMoreThanTheSetGives(t *testing.T) {
	for _, c := range []struct {
		p    Procedure
		want bool
	}{
		{Procedure{Process: 111, Current: 220, Set: Set{RatedCurrent: 160, DutyCycle: 0.35}}, true},
		{Procedure{Process: 111, ElectrodeDiameter: 5, Set: Set{RatedCurrent: 160, DutyCycle: 0.35}}, true},
		{Procedure{Process: 111, Current: 160, Set: Set{RatedCurrent: 160, DutyCycle: 0.35}}, false},
		{Procedure{Process: 111, Current: 220, Set: Set{RatedCurrent: 160, DutyCycle: 0.6, MaxCurrent: 250}}, false},
		{Procedure{Process: 111, Current: 220}, false},
	} {
		e := mustWork(t, Circumstances{}, Seam{Joint: Joint{Type: Fillet, Leg: 6, Length: 1000}, Procedure: &c.p})
		if warned(e, "A at most") != c.want {
			t.Errorf("%+v: %q", c.p, e.Warnings)
		}
	}
}

// On plain thin steel nothing is said of how fast it cools; thicker or stronger steel, or figures
// that heat is reckoned from, bring it.
func TestCoolingRateIsAskedFor(t *testing.T) {
	thin := Joint{Type: SingleV, Thickness: 10, Length: 1000}
	thick := Joint{Type: SingleV, Thickness: 15, Length: 1000}
	for what, c := range map[string]struct {
		j    Joint
		p    Procedure
		c    Circumstances
		want bool
	}{
		"thin":          {j: thin},
		"thick":         {j: thick, want: true},
		"on thick":      {j: Joint{Type: SingleV, Thickness: 10, Thickness2: 15, Length: 1000}, want: true},
		"strong":        {j: thin, c: Circumstances{Steel: Steel{Grade: "S460"}}, want: true},
		"volts given":   {j: thin, p: Procedure{Volts: 25}, want: true},
		"CET given":     {j: thin, c: Circumstances{Steel: Steel{Cet: 0.3}}, want: true},
		"preheat asked": {j: thin, c: Circumstances{PreheatStandard: "EN 1011-2 B"}, want: true},
		"preheated":     {j: thin, p: Procedure{Preheat: 80}, want: true},
	} {
		c.p.Process = 135
		if e := mustWork(t, c.c, Seam{Joint: c.j, Procedure: &c.p}); (e.Why.T85.Name != "") != c.want {
			t.Errorf("%s: %+v", what, e.Why.T85)
		}
	}
}

// Where neither procedure nor standard says anything of preheat, thick and strong steel get a word,
// thin plain steel none (AWS D1.1:2015 Table 3.3, low hydrogen: from above 20 mm).
func TestNoPreheatReckoned(t *testing.T) {
	for _, c := range []struct {
		thick float64
		grade string
		p     Procedure
		std   string
		want  bool
	}{
		{20, "S355", Procedure{}, "", false}, {25, "S355", Procedure{}, "", true}, {10, "S690", Procedure{}, "", true},
		{25, "S355", Procedure{Preheat: 75}, "", false}, {25, "S355", Procedure{Preheat: None}, "", false}, {25, "S355", Procedure{}, "AWS D1.1", false},
	} {
		c.p.Process = 135
		e := mustWork(t, Circumstances{Steel: Steel{Grade: c.grade}, PreheatStandard: c.std}, Seam{Joint: Joint{Type: SingleV, Thickness: c.thick, Length: 1000}, Procedure: &c.p})
		if warned(e, "no preheat is reckoned for "+c.grade) != c.want {
			t.Errorf("%+v: %q", c, e.Warnings)
		}
	}
}

// The shop says MIG where ISO 4063 says 135 MAG; 131 is for light metal, where 135 is told of.
func TestMIG(t *testing.T) {
	if p, ok := ParseProcess("MIG"); !ok || p != 135 {
		t.Errorf("MIG is %v", p)
	}
	if p, ok := ParseProcess("131 MIG"); !ok || p != 131 {
		t.Errorf("131 MIG is %v", p)
	}
	for p, want := range map[Process]bool{131: false, 141: false, 135: true, 111: true} {
		e := mustWork(t, Circumstances{Steel: Steel{Density: 2700}}, Seam{Joint: Joint{Type: Fillet, Leg: 6, Length: 1000}, Procedure: &Procedure{Process: p}})
		if warned(e, "is no steel") != want {
			t.Errorf("%v on aluminium: %q", p, e.Warnings)
		}
	}
}

// A title names the plate, and the depth where it is not all through; a quarter-inch leg stays one.
func TestTitles(t *testing.T) {
	for want, j := range map[string]Joint{
		"20 mm single V 8 mm deep PA, 135 MAG": {Type: SingleV, Thickness: 20, PartialDepth: 8, Length: 1000},
		"20 mm single V PA, 135 MAG":           {Type: SingleV, Thickness: 20, Length: 1000},
		"6.35 mm fillet PB, 135 MAG":           {Type: Fillet, Leg: 6.35, Length: 1000},
	} {
		if e := mustWork(t, Circumstances{}, Seam{Joint: j}); e.Seams[0].Title != want {
			t.Errorf("%q, want %q", e.Seams[0].Title, want)
		}
	}
}

// Outside its rows the V table is no evidence.
func TestBeyondTheVTable(t *testing.T) {
	for thick, soft := range map[float64]bool{3: true, 4: false, 25: false, 30: true} {
		j, err := Joint{Type: SingleV, Thickness: thick, Cap: None, RootFace: None, Length: 1000}.filled(PA, false)
		if err != nil {
			t.Fatal(err)
		}
		if f := j.depositFactor(PA); f.Origin.Soft() != soft {
			t.Errorf("%v mm: %v", thick, f.Origin)
		}
	}
}

// The count of electrodes is a step of its own, filler over the mass of one, stubs thrown away; as many
// as kilograms hold them, from memory of makers' tables: 2.5 x 350 48 to 52, 3.2 x 350 27 to 30,
// 3.2 x 450 20 to 22, 4.0 x 450 13 to 15, 5.0 x 450 8 to 9 (a tenth more passes).
func TestElectrodesAKilogram(t *testing.T) {
	for _, c := range []struct{ size, length, from, to float64 }{
		{2.5, 350, 48, 52}, {3.2, 350, 27, 30}, {3.2, 450, 20, 22.1}, {4, 450, 13, 15}, {5, 450, 8, 9.1},
	} {
		e := mustWork(t, Circumstances{}, Seam{Joint: Joint{Type: Fillet, Leg: 6, Length: 500000}, Procedure: &Procedure{Process: 111, ElectrodeDiameter: c.size, ElectrodeLength: c.length}})
		n := e.Consumables[0]
		if each := n.Count.Value / n.Amount; each < c.from || each > c.to {
			t.Errorf("%v x %v: %v a kilogram", c.size, c.length, each)
		}
		near(t, "filler", n.Amount, e.Metal/(0.72*(c.length-50)/c.length), 1e-9)
		found := false
		for _, f := range e.Steps() {
			found = found || strings.HasSuffix(f.Name, "count without spare") && f.Value == n.Count.Value
		}
		if !found {
			t.Errorf("%v mm: no step counts the electrodes", c.size)
		}
	}
	two := Seam{Joint: Joint{Type: Fillet, Leg: 6, Length: 1000}, Procedure: &Procedure{Process: 111}}
	if e := mustWork(t, Circumstances{}, two, two); e.Consumables[0].Count.Name != "" || e.Consumables[0].Pieces == 0 {
		t.Errorf("two seams: %+v", e.Consumables[0])
	}
}
