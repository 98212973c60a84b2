package weld

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// TestSectionsByHand: areas worked by hand from the formulas of doc and shape; laid without
// overweld, flush, mm2.
func TestSectionsByHand(t *testing.T) {
	tan := func(deg float64) float64 { return math.Tan(deg * math.Pi / 180) }
	for _, c := range []struct {
		name string
		j    Joint
		area float64
	}{
		{"unequal legs", Joint{Type: Fillet, Leg: 8, Leg2: 12}, 48},
		{"fit-up gap of 2", Joint{Type: Fillet, Leg: 6, Gap: 2}, 32},
		{"both sides", Joint{Type: Fillet, Leg: 6, BothSides: true}, 36},
		{"lap of 10 mm plate: leg 8", Joint{Type: Lap, Thickness: 10}, 32},
		{"lap of 5 mm plate: leg 5", Joint{Type: Lap, Thickness: 5}, 12.5},
		{"open corner of 10 and 8", Joint{Type: Corner, Thickness: 10, Thickness2: 8}, 40},
		{"V with root face", Joint{Type: SingleV, Thickness: 14, RootGap: 3, RootFace: 2, Angle: 60}, 3*14 + 144*tan(30)},
		{"V of 60 deg, hard together", Joint{Type: SingleV, Thickness: 10, RootGap: None, Angle: 60}, 100 * tan(30)},
		{"partial V, 6 deep", Joint{Type: SingleV, Thickness: 20, PartialDepth: 6, Angle: 60}, 36 * tan(30)},
		{"V on backing", Joint{Type: SingleV, Thickness: 20, Backing: true, Angle: 45}, 6*20 + 400*tan(22.5)},
		{"double V, other side 90", Joint{Type: DoubleV, Thickness: 20, RootGap: 2, Angle: 60, Angle2: 90}, 40 + 100*(tan(30)+1)},
		{"double bevel", Joint{Type: DoubleBevel, Thickness: 20, RootGap: 2, Angle: 45}, 40 + 100},
		{"square, two sides, half the thickness open", Joint{Type: Square, Thickness: 6, BothSides: true}, 18},
		{"square with a fit-up gap", Joint{Type: Square, Thickness: 6, RootGap: 2, Gap: 1}, 18},
	} {
		c.j.Length = 100
		s := areaOf(t, c.j, PA)
		near(t, c.name, s.Area, c.area, 1e-9)
		checkTree(t, s.Why)
	}
	// A U with upright sides: gap, half a circle and a slab; a J is half of it.
	u := areaOf(t, Joint{Type: SingleU, Thickness: 30, RootGap: 2, RootFace: 2, Radius: 6, Angle: 1e0, Length: 1}, PA)
	j := areaOf(t, Joint{Type: SingleJ, Thickness: 30, RootGap: 2, RootFace: 2, Radius: 6, Angle: 0.5e1, Length: 1}, PA)
	near(t, "U nearly upright", u.Area, 60+18*math.Pi+22*12+484*tan(0.5), 0.5)
	if j.Area >= u.Area || j.Width >= u.Width {
		t.Errorf("J %v mm2, U %v mm2", j.Area, u.Area)
	}
	// Plugs and slots hold their volume: 4 plugs of 20 in 10 mm, 3 slots of 20 x 60.
	for _, c := range []struct {
		j  Joint
		mm float64
	}{{Joint{Type: Plug, Diameter: 20, Thickness: 10, Count: 4}, 4 * math.Pi * 100 * 10}, {Joint{Type: Slot, Diameter: 20, Bead: 60, Thickness: 10, Count: 3}, 3 * (math.Pi*100 + 800) * 10}} {
		e := mustWork(t, plain, Seam{Joint: c.j})
		near(t, c.j.Type.String(), e.Metal, c.mm*7.85e-6, 1e-9)
	}
	// Round a tube of 114.3: pi x 114.3; two of them.
	e := mustWork(t, plain, Seam{Joint: Joint{Type: Fillet, Leg: 6, Diameter: 114.3, Count: 2}})
	near(t, "tube", e.Seams[0].Length, 2*math.Pi*114.3, 1e-9)
	// 50 mm welds at a pitch of 150 are a third of the metal.
	whole := mustWork(t, plain, Seam{Joint: Joint{Type: Fillet, Leg: 6, Length: 3000}})
	third := mustWork(t, plain, Seam{Joint: Joint{Type: Fillet, Leg: 6, Length: 3000, Bead: 50, Pitch: 150}})
	near(t, "intermittent", third.Metal*3, whole.Metal, 1e-12)
	// Throat and leg are the same fillet.
	a, b := areaOf(t, Joint{Type: Fillet, Throat: 5, Length: 1}, PB), areaOf(t, Joint{Type: Fillet, Leg: 5 * math.Sqrt2, Length: 1}, PB)
	near(t, "throat", a.Area, b.Area, 1e-12)
	near(t, "size", a.Size, 5, 1e-12)
}

// TestBackGouge: the backing run of the V table (0.10 to 0.15 kg/m) and 20 min a metre.
func TestBackGouge(t *testing.T) {
	for _, c := range []struct {
		thick float64
		pos   Position
		want  float64
	}{{10, PA, .10}, {20, PA, .15}, {10, PF, .15}, {10, PC, .15}, {16, PE, .10}} {
		s := Seam{Joint: Joint{Type: SingleV, Thickness: c.thick, Length: 1000}, Position: c.pos}
		a := mustWork(t, plain, s)
		s.Joint.BackGouge = true
		b := mustWork(t, plain, s)
		near(t, fmt.Sprint(c), b.Metal-a.Metal, c.want, 1e-9)
		near(t, "minutes", float64(b.HandsOn-b.Seams[0].Welding)-float64(a.HandsOn-a.Seams[0].Welding), 20, 1e-6)
	}
}

// TestRatesOverride: each of the house's minutes can be given, or taken away.
func TestRatesOverride(t *testing.T) {
	s := Seam{Joint: Joint{Type: Fillet, Leg: 6, Length: 2000}, Procedure: &Procedure{Process: 111}, Turns: 2}
	base := mustWork(t, Circumstances{Site: true}, s)
	for _, c := range []struct {
		name string
		r    Rates
		want float64 // change of hands-on minutes
	}{{"fit-up", Rates{FitUp: 7}, -10}, {"no fit-up", Rates{FitUp: None}, -24}, {"moving", Rates{Moving: 6}, 2}, {"turn", Rates{Turn: 15}, 10}, {"no turn", Rates{Turn: None}, -20},
		{"factor", Rates{OperatingFactor: 0.4}, -float64(base.Seams[0].Welding) / 2}} {
		e := mustWork(t, Circumstances{Site: true, Rates: c.r}, s)
		near(t, c.name, float64(e.HandsOn-base.HandsOn), c.want, 1e-9)
	}
	near(t, "set-up", float64(mustWork(t, Circumstances{Rates: Rates{SetUp: 35}}, s).SetUp), 35, 0)
	near(t, "site set-up", float64(base.SetUp), 20, 0)
	slow := s
	slow.Access = 1.5
	near(t, "access", float64(mustWork(t, Circumstances{Site: true}, slow).Seams[0].Welding), 1.5*float64(base.Seams[0].Welding), 1e-9)
	if _, err := Work([]Seam{s}, Circumstances{Rates: Rates{Gouging: None}}); err == nil {
		t.Error("gouging of nothing an hour ends")
	}
	if _, err := Work([]Seam{s}, Circumstances{Rates: Rates{Moving: -1}}); err == nil {
		t.Error("leads move in less than no time")
	}
}

// TestOriginsReachTheTree: a figure from the job file keeps its line, a default is never called
// written.
func TestOriginsReachTheTree(t *testing.T) {
	line := origin.Origin{File: "job.yaml", Line: 42}
	p := &Procedure{Name: "site fillet", Process: 136, Current: 210, Origins: map[string]origin.Origin{"current": line}}
	e := mustWork(t, Circumstances{Site: true}, Seam{Joint: Joint{Type: SingleV, Thickness: 12, Length: 1000, Origin: origin.Origin{File: "job.yaml", Line: 7}}, Position: PF, Procedure: p})
	want := map[string]string{"current": "job.yaml:42", "thickness": "job.yaml:7", "included angle": "published: ", "cap height": "house judgement: ",
		"operating factor": "house judgement: ", "rate from the table": "from memory: ", "root face": "from memory: "}
	for _, top := range e.Steps() {
		top.Walk(func(f origin.Figure, _ int) {
			if w, ok := want[f.Name]; ok && !strings.HasPrefix(f.Origin.String(), w) {
				t.Errorf("%s comes from %q, want %q", f.Name, f.Origin, w)
			}
		})
	}
	seen := map[string]bool{}
	e.Hours.Walk(func(f origin.Figure, _ int) { seen[f.Name] = true })
	for _, n := range []string{"current", "thickness", "included angle", "cap height", "operating factor", "root face"} {
		if !seen[n] {
			t.Errorf("hours do not show %s", n)
		}
	}
}

// TestSafeStop: later of root with second run and a third of the thickness; a third of the length
// in one or two runs; with the fit-up before it.
func TestSafeStop(t *testing.T) {
	one := mustWork(t, plain, Seam{Joint: Joint{Type: Fillet, Leg: 6, Length: 3000}})
	near(t, "one run", float64(one.SafeStop), float64(one.Seams[0].Welding)/3, 1e-9)
	five := mustWork(t, plain, Seam{Joint: Joint{Type: Fillet, Leg: 12, Length: 3000}, Procedure: &Procedure{Process: 111, BeadArea: 15}})
	if five.Passes != 5 {
		t.Fatalf("%d runs", five.Passes)
	}
	near(t, "five runs", float64(five.SafeStop), float64(five.Seams[0].Welding)*2/5, 1e-9)
	// V 30, 60 deg, gap 2: a third of the thickness holds (2x10 + 100 tan 30) of (60 + 900 tan 30).
	v := mustWork(t, plain, Seam{Joint: Joint{Type: SingleV, Thickness: 30, Length: 3000}, Procedure: &Procedure{Process: 111, BeadArea: 10}})
	near(t, "many runs", float64(v.SafeStop)/float64(v.Seams[0].Welding), (20+100*tanDeg(30))/(60+900*tanDeg(30)), 1e-9)
	fitted := mustWork(t, Circumstances{NoOverweld: true}, Seam{Joint: Joint{Type: Fillet, Leg: 6, Length: 3000}})
	near(t, "with fit-up", float64(fitted.SafeStop-one.SafeStop), 9, 1e-9)
}

// TestPreheatRules: method B wants a CET and says where it holds; method A asks for its chart; the
// cold is warmed to 20 C; thin plain steel has none.
func TestPreheatRules(t *testing.T) {
	thick := Seam{Joint: Joint{Type: SingleV, Thickness: 50, Length: 500}, Procedure: &Procedure{Process: 111}}
	thin := Seam{Joint: Joint{Type: Fillet, Leg: 5, Thickness: 6, Length: 500}}
	rich := Steel{C: 0.20, Mn: 1.5, Cr: 0.1}
	for _, c := range []struct {
		name     string
		s        Seam
		c        Circumstances
		min, max float64
		warns    string
	}{
		{"B", thick, Circumstances{PreheatStandard: "EN 1011-2 B", Steel: rich}, 60, 250, ""},
		{"B without CET", thick, Circumstances{PreheatStandard: "EN 1011-2 B"}, 0, 0, "wants the CET"},
		{"B out of range", thick, Circumstances{PreheatStandard: "EN 1011-2 B", Steel: Steel{Cet: 0.6}}, 100, 400, "outside the range"},
		{"A", thick, Circumstances{PreheatStandard: "EN 1011-2 A", Steel: rich}, 60, 250, "combined thickness 100 mm"},
		{"thin", thin, Circumstances{PreheatStandard: "EN 1011-2 B", Steel: rich}, 0, 0, ""},
		{"cold", thin, Circumstances{Ambient: -5}, 20, 20, ""},
		{"AWS", thick, Circumstances{Execution: "AWS D1.1"}, 65, 65, ""},
		{"AWS, damp electrodes", thick, Circumstances{Execution: "AWS D1.1", Steel: Steel{Hydrogen: 20}}, 110, 110, ""},
		{"AWS, higher strength", thick, Circumstances{Execution: "AWS D1.1", Steel: Steel{Grade: "S460"}}, 110, 110, ""},
		{"AWS, quenched", thick, Circumstances{Execution: "AWS D1.1", Steel: Steel{Grade: "A514"}}, 110, 110, "quenched and tempered"},
		{"plain thin steel", thin, Circumstances{}, 0, 0, ""},
	} {
		e := mustWork(t, c.c, c.s)
		if p := e.Seams[0].Preheat; p < c.min || p > c.max {
			t.Errorf("%s: preheat %v C, want %v to %v", c.name, p, c.min, c.max)
		}
		if all := strings.Join(e.Warnings, "; "); c.warns == "" && all != "" || !strings.Contains(all, c.warns) {
			t.Errorf("%s: warnings %q, want %q", c.name, all, c.warns)
		}
		gas := false
		for _, n := range e.Consumables {
			gas = gas || n.Name == "propane for preheat"
		}
		if gas != (e.Seams[0].Preheat > max(c.c.Ambient, 20) || c.name == "cold") {
			t.Errorf("%s: propane %v at %v C", c.name, gas, e.Seams[0].Preheat)
		}
	}
	for ml, want := range map[float64]string{16: "A", 15: "B", 10: "C", 5: "D", 3: "E"} {
		if got := hydrogenScale(ml); got != want {
			t.Errorf("%v ml is scale %s, want %s", ml, got, want)
		}
	}
	near(t, "T joint", Joint{Type: Fillet, Thickness: 12, Thickness2: 20}.CombinedThickness(), 52, 0)
}

func TestGrades(t *testing.T) {
	for grade, want := range map[string]float64{"S235": 235, "s355J2": 355, "S460N": 460, "S690QL": 690, "": 355, "A36": 355, "A514": 690, "Sxyz": 355, "S": 355} {
		near(t, grade, Steel{Grade: grade}.yield(), want, 0)
	}
}

// TestUnitsThereAndBack: what is written in one unit and read again is the same weld, whatever the
// size: inches, feet, pounds an hour, inches a minute, Fahrenheit.
func TestUnitsThereAndBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		read := func(v float64, unit string, d quantity.Dim) float64 {
			got, err := quantity.Parse(strconv.FormatFloat(v, 'f', 12, 64)+" "+unit, d)
			if err != nil {
				t.Fatal(err)
			}
			return got
		}
		leg, length := drawNumber(t, "leg", 3, 25), drawNumber(t, "length", 50, 9000)
		rate, travel, warm := drawNumber(t, "rate", 1, 9), drawNumber(t, "travel", 100, 900), drawNumber(t, "preheat", 30, 250)
		work := func(leg, length, rate, travel, warm float64) Estimate {
			return mustWork(t, plain, Seam{Joint: Joint{Type: Fillet, Leg: leg, Length: length}, Procedure: &Procedure{Process: 136, Deposition: rate, Travel: travel, Preheat: warm}})
		}
		si := work(leg, length, rate, travel, warm)
		us := work(read(leg/inch, "in", quantity.Length), read(length/inch/12, "ft", quantity.Length), read(rate/pound, "lb/h", quantity.Deposition),
			read(travel/inch, "in/min", quantity.Travel), read(warm*1.8+32, "F", quantity.Temperature))
		for _, c := range [][2]float64{{us.Metal, si.Metal}, {float64(us.Arc), float64(si.Arc)}, {float64(us.HandsOn), float64(si.HandsOn)}, {us.HeatInput, si.HeatInput}, {us.Seams[0].Preheat, si.Seams[0].Preheat}} {
			if math.Abs(c[0]-c[1]) > 1e-7*math.Abs(c[1]) || !(c[1] > 0) {
				t.Errorf("%v in inches and pounds, %v in metres and kilograms", c[0], c[1])
			}
		}
	})
}

// TestUnitsRoundTrip: sizes written in inches, pounds and Fahrenheit give the same weld.
func TestUnitsRoundTrip(t *testing.T) {
	read := func(s string, d quantity.Dim) float64 {
		v, err := quantity.Parse(s, d)
		if err != nil {
			t.Fatal(err)
		}
		return v
	}
	si := mustWork(t, plain, Seam{Joint: Joint{Type: Fillet, Leg: 6.35, Length: 3048}, Procedure: &Procedure{Process: 136, Deposition: 4.5359237, Travel: 330.2}})
	us := mustWork(t, plain, Seam{Joint: Joint{Type: Fillet, Leg: read("1/4 in", quantity.Length), Length: read("10 ft", quantity.Length)},
		Procedure: &Procedure{Process: 136, Deposition: read("10 lb/h", quantity.Deposition), Travel: read("13 in/min", quantity.Travel)}})
	near(t, "kg", us.Metal, si.Metal, 1e-12)
	near(t, "min", float64(us.HandsOn), float64(si.HandsOn), 1e-9)
}

// TestWarnings: what contradicts is said once, for the right seam.
func TestWarnings(t *testing.T) {
	fillet := Joint{Type: Fillet, Leg: 6, Length: 1000}
	for _, c := range []struct {
		s    Seam
		want string
	}{
		{Seam{Joint: fillet, Position: PF, Procedure: &Procedure{Name: "shop", Process: 136, Position: PB}}, "the procedure shop is for PB, the seam is in PF"},
		{Seam{Joint: fillet, Procedure: &Procedure{Process: 136, Current: 500}}, "far from what"},
		{Seam{Joint: Joint{Type: Fillet, Leg: 14, Length: 1000}, Procedure: &Procedure{Process: 111, BeadArea: 200}}, "above the 8 mm of AWS D1.1:2020"},
		{Seam{Joint: Joint{Type: SingleV, Thickness: 20, Length: 1000}, Procedure: &Procedure{Process: 111, BeadArea: 200}}, "a root run"},
		{Seam{Joint: fillet, Position: PF, Procedure: &Procedure{Process: 111, ElectrodeDiameter: 6}}, "electrode of 6 mm in PF is above"},
		{Seam{Joint: Joint{Type: Fillet, Leg: 6, Gap: 6, Length: 1000}}, "fit-up gap of 6 mm is above 5 mm"},
		{Seam{Joint: fillet, Procedure: &Procedure{Process: 136, MinHeatInput: 3}}, "below the procedure's 3.00"},
		{Seam{Joint: fillet, Procedure: &Procedure{Process: 136, Travel: 100, MaxHeatInput: 0.5}}, "above the procedure's 0.50"},
		{Seam{Joint: fillet, Procedure: &Procedure{Process: 136, Preheat: 200, Interpass: 150}}, "interpass 150 C is not above the preheat"},
	} {
		e := mustWork(t, plain, c.s)
		if all := strings.Join(e.Warnings, "; "); !strings.Contains(all, c.want) {
			t.Errorf("warnings %q, want %q", all, c.want)
		}
	}
	e := mustWork(t, Circumstances{Execution: "AWS D1.1"}, Seam{Joint: Joint{Type: Fillet, Leg: 4, Thickness: 25, Length: 1000}}, Seam{Joint: Joint{Type: Fillet, Leg: 8, Thickness: 25, Length: 1000}})
	if len(e.Warnings) != 1 || !strings.HasPrefix(e.Warnings[0], "joint 1: a leg of 4 mm is below the 8 mm") {
		t.Errorf("warnings %q", e.Warnings)
	}
	if e := mustWork(t, Circumstances{}, Seam{Joint: fillet}); len(e.Warnings) != 0 {
		t.Errorf("a plain fillet warns %q", e.Warnings)
	}
}

// TestPureFunctionsRefuse: each names the value, its limits and a way out.
func TestPureFunctionsRefuse(t *testing.T) {
	nan := math.NaN()
	_, heat := HeatInput(0.8, 25, 180, 0)
	_, cool := Cool(1, nan, 20, 1, 1)
	_, table := PreheatAWS("Z", 20)
	_, thin := PreheatAWS("B", 2)
	_, hold := HoldBeforeNDT(-1, 1, 355)
	_, drop := VoltageDrop(20, 0, 20, true)
	_, none := ArcByTravel(100)
	_, stand := ArcByTravel(100, 0)
	_, lost := Weighed(2, 1.9, 60)
	_, order := OrderOf([]Placed{{"a", nan, 0, 0}})
	for i, err := range []error{heat, cool, table, thin, hold, drop, none, stand, lost, order} {
		if e, ok := err.(*Error); !ok || e.Hint == "" || e.Field == "" {
			t.Errorf("%d: %v", i, err)
		}
	}
	if v := (Set{RatedCurrent: 100, DutyCycle: 0.35}).Share(nan); v != 1 {
		t.Errorf("share of no current %v", v)
	}
	if v, err := VoltageDrop(20, 0.75, 20, true); err != nil || math.Abs(v-16.1) > 0.05 { // root 3 instead of 2
		t.Errorf("three phases lose %v V, %v", v, err)
	}
}
