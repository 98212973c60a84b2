package expand

import (
	"math"
	"strings"
	"testing"

	"sailby/tasks"
)

const plates = `assemblies:
  frame: {parts: {base: {plate: [2 m, 1 m, 10 mm]}, lugs: {plate: [300 mm, 200 mm, 10 mm], count: 2}}}
  mixed: {parts: {base: {plate: [2 m, 1 m, 10 mm]}, cap: {plate: [2 m, 1 m, 12 mm]}}}
  posts: {parts: {post: {section: SHS 100x100x6, length: 1.5 m}}}`

func TestCutsByWhatIsCut(t *testing.T) {
	minutes := func(task string) int {
		return likely(t, plates, "tasks: {it: {kind: cut, at: shop, "+task+"}}").Steps[0].HandsOn
	}
	// The outlines of the plates by hand: 2 x (2 + 1) m, and twice 2 x (0.3 + 0.2) m.
	for part, length := range map[string]string{"frame/base": "6 m", "frame/lugs": "2 m", "frame": "8 m", "[frame/base, frame/lugs]": "8 m"} {
		if got, want := minutes("by: oxy-fuel, part: "+part), minutes("by: oxy-fuel, thickness: 10 mm, length: "+length); got != want || want == 0 {
			t.Errorf("%s takes %d min, %s of cut %d", part, got, length, want)
		}
	}
	if got, want := minutes("by: oxy-fuel, part: frame/base, length: 1 m, thickness: 10 mm"), minutes("by: oxy-fuel, thickness: 10 mm, length: 1 m"); got != want {
		t.Errorf("the length given counts, not the outline: %d min, want %d", got, want)
	}
	for task, want := range map[string]float64{ // by the package's own figures
		"by: saw, length: 200 mm, thickness: 20 mm":        200*20/800.0 + 5,
		"by: drill, count: 12":                             12 * 5,
		"by: drill, count: 12, thickness: 20 mm":           12 * 5 * 2,
		"by: tack, count: 40":                              40 * 0.75,
		"by: dress flush, length: 3 m":                     60,
		"by: grind away, mass: 4 kg":                       120,
		"by: bevel by disc, length: 3 m, thickness: 20 mm": 3 / 1.5 * 60 * 4,
	} {
		if got := minutes(task); got != up(want) {
			t.Errorf("%s takes %d min, want %g", task, got, want)
		}
	}
	for says, task := range map[string]string{
		"it needs length and thickness": "by: oxy-fuel, part: mixed", "or hours": "by: oxy-fuel, part: posts", "drill has no count": "by: drill, length: 1 m, thickness: 10 mm",
		"dress flush has no length": "by: dress flush, part: frame",
	} {
		refused(t, says, plates, "tasks: {it: {kind: cut, at: shop, "+task+"}}")
	}
}

func TestTheCrewsOwnRatesCount(t *testing.T) {
	w := likely(t, "rates: {drill: 8 min}", "tasks: {it: {kind: cut, at: shop, by: drill, count: 12}}")
	if s := w.Steps[0]; s.HandsOn != 96 {
		t.Errorf("twelve holes at 8 min take %d min", s.HandsOn)
	}
}

// A generator wants 1.35 times what its sets draw (the package's figure); the note says which kit and which task.
func TestAGeneratorThatIsTooSmallIsTold(t *testing.T) {
	for _, tc := range []struct {
		what, kit, pier string
		told            bool
	}{
		{"too small", "kit: {generator: {gives: 7 kVA}}", "", true},
		{"large enough", "kit: {generator: {gives: 60 kVA}}", "", false},
		{"the larger of two carries the sets", "kit: {generator: {gives: 7 kVA}, big: {gives: 60 kVA}}", "", false},
		{"on mains", "kit: {generator: {gives: 7 kVA}}", ", mains: 60 kVA", false},
		{"the file says what the set draws", "kit: {generator: {gives: 7 kVA}, set: {draws: 3 kVA}}", "", false},
	} {
		kit := ""
		if strings.Contains(tc.kit, "draws") {
			kit = ", kit: set"
		}
		w := likely(t, tc.kit, "places: {shop: {open: always}, pier: {open: always"+tc.pier+"}}",
			"tasks: {it: {kind: weld, at: pier, joints: [{fillet: {leg: 6 mm}, length: 1 m}]"+kit+"}}")
		told := false
		for _, n := range w.Notes {
			told = told || strings.Contains(n.Text, "generator gives 7 kVA") && n.Pos.Given()
		}
		if told != tc.told {
			t.Errorf("%s: told is %v: %v", tc.what, told, w.Notes)
		}
	}
}

func TestWhatAnEstimateCannotDoIsToldWithItsWayOut(t *testing.T) {
	job := read(t, "tasks: {it: {kind: weld, at: shop, joints: [{fillet: {leg: 6 mm}, length: 1 m}]}}")
	job.Tasks[0].Seams[0].Joint.Length = math.NaN()
	w, err := Expand(job, Basis{})
	faulty(t, w, err, `task "it"`)
	job = read(t, "tasks: {it: {kind: cut, at: shop, by: oxy-fuel, length: 1 m, thickness: 10 mm}}")
	job.Tasks[0].Thickness = tasks.Amount{Value: -1, Pos: job.Tasks[0].Pos}
	w, err = Expand(job, Basis{})
	faulty(t, w, err, `task "it"`)
}
