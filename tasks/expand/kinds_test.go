package expand

import (
	"fmt"
	"math"
	"testing"

	"sailby/tasks/origin"
	"sailby/weld"
)

// up rounds up once, as R4 says.
func up(v float64) int { return int(math.Ceil(v - 1e-6)) }

// Every row: a task, and its hands-on minutes reckoned by hand from the figures that the packages weld,
// coat and lift print beside them.
func TestHoursOfEveryKindByHand(t *testing.T) {
	for _, tc := range []struct {
		what, task string
		minutes    float64
	}{
		// 2000 mm at 300 mm/min (the package's low end for 16 mm), 40 % of the hands-on time cutting
		{"oxy-fuel", "kind: cut, by: oxy-fuel, length: 2 m, thickness: 16 mm", 2000 / 300.0 / 0.4},
		// abrasive blasting handbook, table 6.3: garnet on new steel to Sa 2 1/2: 20 m2/h; half of it on sections
		{"blasting sections", "kind: surface prep, area: 8 m2, grade: Sa 2 1/2, method: blast", 8 / 10.0 * 60},
		{"blasting flat plate", "kind: surface prep, area: 8 m2, grade: Sa 2 1/2, method: blast, shape: flat", 8 / 20.0 * 60},
		{"blasting without a grade is to Sa 2 1/2", "kind: surface prep, area: 8 m2, method: blast, shape: flat", 8 / 20.0 * 60},
		{"blasting with a pair at each of two nozzles", "kind: surface prep, area: 8 m2, method: blast, shape: flat, people: 4", 8 / 20.0 * 60 / 2},
		{"a fifth hand does not help two nozzles", "kind: surface prep, area: 8 m2, method: blast, shape: flat, people: 5", 8 / 20.0 * 60 / 2},
		// 3 to 8 m2/h by hand (the package's range), the middle of slow and quick, half of it on sections
		{"power tools on sections", "kind: surface prep, area: 2 m2, grade: St 3", (2/1.5*60 + 2/4.0*60) / 2},
		{"power tools, two people", "kind: surface prep, area: 2 m2, grade: St 3, people: 2", (2/1.5*60 + 2/4.0*60) / 2 / 2},
		// Process Engineering 2000: 9.3 m2/h in ordinary plant painting; to 11.6; halved on sections; 10 min mixing, 20 min tools
		{"a coat on sections", "kind: coat, area: 8 m2, coats: top", (8/9.3+8/11.6)/2*60*2 + 30},
		{"a coat on flat plate", "kind: coat, area: 8 m2, coats: top, shape: flat", (8/9.3+8/11.6)/2*60 + 30},
		// rig 12 and trial 5, land 10, make fast 10, each half as long again the first time; unhook 5; 1.5 m at 1.2 m/min
		{"a lift by a hoist of known speed", "kind: lift, lifts: frame, by: hoist", 1.5*(12+5+10+10) + 5 + 1.5/1.2},
		{"a higher lift", "kind: lift, lifts: frame, by: hoist, height: 3 m", 1.5*(12+5+10+10) + 5 + 3/1.2},
		// Farkas and Jarmai: 2 x root of 4 parts x 233.4 kg, over two people
		{"fitting the frame", "kind: fit-up, part: frame", 2 * math.Sqrt(4*frameMass) / 2},
		{"fitting the frame, three people", "kind: fit-up, part: frame, people: 3", 2 * math.Sqrt(4*frameMass) / 3},
		// 10 min to make ready and 4 min a metre
		{"magnetic particle", "kind: test, by: magnetic particle, length: 3 m", 10 + 4*3},
		// 10 min and 6 min a metre; ASME V: penetrant at least 10 min, developer 10 min, waited out at the work
		{"dye penetrant", "kind: test, by: dye penetrant, length: 3 m", 10 + 6*3 + 20},
		{"looking is what is done where nothing is said", "kind: test, length: 3 m", 5 + 2*3},
	} {
		w := likely(t, "kit: {hoist: {kind: chain hoist, speed: 1.2 m/min, rated: 1 t}}",
			"people: {Ines: {tickets: [slinger/signaller]}, Tom: {}, Ann: {}, Bo: {}, Cy: {}}", "tasks: {it: {at: shop, "+tc.task+"}}")
		s := w.Steps[0]
		if s.HandsOn != up(tc.minutes) {
			t.Errorf("%s: %d min hands-on, want %.2f rounded up\n%s", tc.what, s.HandsOn, tc.minutes, tree(s.Estimate.Figure, ""))
		}
		if s.Working != up(float64(s.HandsOn)/0.85) {
			t.Errorf("%s: %d working min of %d hands-on ones", tc.what, s.Working, s.HandsOn)
		}
		hands := s.Estimate.Figure.From[0]
		if math.Abs(hands.Value-tc.minutes) > 0.01 || s.Estimate.Figure.Value != float64(s.Working) {
			t.Errorf("%s: what is printed does not lead to %.2f min:\n%s", tc.what, tc.minutes, tree(s.Estimate.Figure, ""))
		}
	}
}

// frameMass by hand: a plate of 2 x 1 x 0.010 m3 at 7850 kg/m3, and 4.5 m of SHS 100x100x6 at 16.98 kg/m
// (EN 10219-2: 21.6 cm2).
const frameMass = 157 + 4.5*16.98

func tree(f origin.Figure, in string) string {
	s := fmt.Sprintf("%s%s %.2f %s: %s\n", in, f.Name, f.Value, f.Unit, f.Origin)
	for _, g := range f.From {
		s += tree(g, in+"  ")
	}
	return s
}

func TestWeldsAreEstimatedWithTheirCircumstances(t *testing.T) {
	own := weld.Seam{Joint: weld.Joint{Type: weld.Fillet, Leg: 6, Length: 3000}, Position: weld.PB, Procedure: &weld.Procedure{Process: weld.Process(136)}}
	for _, tc := range []struct {
		what, task, place string
		c                 weld.Circumstances
		people            float64
	}{
		{"in the shop", "", "shop", weld.Circumstances{Ambient: 15}, 1},
		{"on site", "", "pier", weld.Circumstances{Ambient: 10, Site: true}, 1},
		{"two welders", ", people: 2", "shop", weld.Circumstances{Ambient: 15}, 2},
		{"after a fit-up", ", after: fit", "shop", weld.Circumstances{Ambient: 15, FittedUp: true}, 1},
		{"after what comes after a fit-up", ", after: look", "shop", weld.Circumstances{Ambient: 15, FittedUp: true}, 1},
		{"the steel of its part", ", part: mast", "shop", weld.Circumstances{Ambient: 15, Steel: weld.Steel{Grade: "S690Q"}}, 1},
	} {
		w := likely(t, "procedures: {flux: {process: 136}}",
			"people: {Ines: {tickets: [weld 136, fire watch]}, Una: {tickets: [weld 136]}, Tom: {tickets: [fire watch]}}",
			"assemblies: {frame: {mass: 100 kg}, mast: {steel: S690Q, mass: 100 kg}}",
			"tasks: {it: {kind: weld, at: "+tc.place+", joints: [{fillet: {leg: 6 mm}, length: 3 m, position: PB, procedure: flux}]"+tc.task+
				"}, fit: {kind: fit-up, at: shop, hours: 1 h}, look: {kind: test, at: shop, hours: 1 h, after: fit}}")
		if tc.c.Steel.Grade == "" {
			tc.c.Steel.Grade = w.Job.Steel
		}
		e, err := weld.Work([]weld.Seam{own}, tc.c)
		if err != nil {
			t.Fatal(err)
		}
		s := w.step(t, "it / weld")
		face := 0.85
		if tc.c.Site {
			face = 0.7
		}
		same(t, tc.what, []int{s.HandsOn, s.Working, s.SetUp, s.SafeStop}, []int{up(float64(e.HandsOn) / tc.people),
			up(float64(up(float64(e.HandsOn)/tc.people)) / face), up(float64(e.SetUp) / face), min(s.Working, up(float64(e.SafeStop)/tc.people/face))})
		if want := e.Power * tc.people; math.Abs(s.Power-want) > 1e-9 {
			t.Errorf("%s: draws %g kVA, want %g", tc.what, s.Power, want)
		}
		if len(s.Estimate.Consumables) != len(e.Consumables) || len(s.Estimate.Facts) == 0 {
			t.Errorf("%s: consumables or facts are lost", tc.what)
		}
	}
}

func TestWhatIsUsedUpIsListed(t *testing.T) {
	w := likely(t, `tasks: {blast: {kind: surface prep, at: shop, area: 8 m2, method: blast}, prime: {kind: coat, at: shop, area: 8 m2, coats: primer}}`)
	// Abrasive blasting handbook, table 6.3: garnet; sections take twice that of flat plate.
	for _, tc := range []struct{ step, what, unit string }{{"blast / surface prep", "abrasive", "kg"}, {"prime / coat 1", "paint primer", "L"}} {
		c := w.step(t, tc.step).Estimate.Consumables
		if len(c) == 0 || c[0].What != tc.what || c[0].Unit != tc.unit || c[0].Amount <= 0 || math.Abs(c[0].Spare-c[0].Amount/10) > 1 {
			t.Errorf("%s uses %v, want %s and a tenth to spare", tc.step, c, tc.what)
		}
	}
}

func TestLiftsTakeTheWayOfTheirGear(t *testing.T) {
	kit := "kit: {blue: {kind: lever hoist, rated: 1 t}, barrow: {kind: trolley}}"
	hire := "hire: {crane: {slots: [2027-04-06 08:00-12:00], chart: {4 m: 2 t}}}"
	minutes := func(task string) int {
		return likely(t, kit, hire, "tasks: {it: {kind: lift, at: shop, mass: 300 kg, "+task+"}}").Steps[0].HandsOn
	}
	// 3 m up and 3 m along, with 60.5 min of rigging, landing and letting go as above
	chain, lever, crane := minutes("height: 3 m, travel: 3 m"), minutes("by: blue, height: 3 m, travel: 3 m"), minutes("by: crane, height: 3 m, travel: 3 m")
	if named := minutes("by: lever hoist, height: 3 m, travel: 3 m"); named != lever {
		t.Errorf("a lever hoist by its kind takes %d min, one of the kit %d", named, lever)
	}
	if used := minutes("kit: blue, height: 3 m, travel: 3 m"); used != lever {
		t.Errorf("a lever hoist among the kit takes %d min, named under by %d", used, lever)
	}
	hoisted := 3000 / (75 * 0.75 * 60 / (300 * 9.81) * 1000) // 75 W at 0.75, the package's figures
	same(t, "chain hoist, lever hoist, crane", []int{chain, lever, crane}, []int{up(60.5 + hoisted + 3000.0/5000), up(60.5 + hoisted + 3000.0/1000), up(60.5 + 3000.0/5000 + 3000.0/8000)})
	if hands := minutes("by: hands, people: 3"); hands >= crane {
		t.Errorf("three people take %d min by hand, a crane %d", hands, crane)
	}
	if own := minutes("height: 1.5 m"); own != minutes("by: chain hoist") {
		t.Error("hook travel is 1.5 m and gear a chain hoist where nothing is said")
	}
}
