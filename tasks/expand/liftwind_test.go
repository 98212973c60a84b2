package expand

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// A lift by hook stands still in the hours whose gust is above the lower of gear and sail; hands, a
// workface indoors or sheltered, and a place without weather by the hour know no such hours.
func TestWindClosesLifts(t *testing.T) {
	gusts := func(h int) site.Weather {
		w := fine()
		w.Gust = float64(h % 24)
		return w
	}
	for _, tc := range []struct {
		name, kit, task string
		want            float64 // m/s at 10 m; 0 is none
	}{
		{"the gear's own limit", "kit: {chain hoist: {rated: 1 t, gust limit: 11 m/s}}", "{kind: lift, at: pier/hinge, mass: 400 kg, by: chain hoist}", 11},
		{"from memory where it states none", "kit: {chain hoist: {rated: 1 t}}", "{kind: lift, at: pier/hinge, mass: 400 kg, by: chain hoist}", 9.8},
		// maker's manual: a cylinder of 9 m2 and 2 t has sqrt(1.2 x 2 / 9) of the limit
		{"a large sail", "kit: {crane: {kind: loader crane, chart: {4 m: 5 t}, gust limit: 10 m/s}}", "{kind: lift, at: pier/hinge, mass: 2 t, by: crane, radius: 4 m, sail area: 9 m2, body: round}", 10 * math.Sqrt(2.4/9)},
		{"a high tip", "kit: {crane: {kind: loader crane, chart: {4 m: 5 t}, gust limit: 10 m/s}}", "{kind: lift, at: pier/hinge, mass: 2 t, by: crane, radius: 4 m, tip height: 20 m}", 10 * 1.4 / (math.Pow(2, .14) + .4)},
		{"as the lift's planner says", "kit: {chain hoist: {rated: 1 t, gust limit: 9 m/s}}", "{kind: lift, at: pier/hinge, mass: 400 kg, by: chain hoist, sail area: 4 m2, gust limit: 6 m/s}", 6},
		{"the planner's, and never above the gear's", "kit: {chain hoist: {rated: 1 t, gust limit: 9 m/s}}", "{kind: lift, at: pier/hinge, mass: 400 kg, by: chain hoist, gust limit: 12 m/s}", 9},
		{"by hand", "", "{kind: lift, at: pier/hinge, mass: 10 kg, by: hands}", 0},
		{"a move that does not say by what", "", "{kind: move, at: pier/hinge, mass: 10 kg}", 0},
		{"its hours alone, and the gear's limit", "kit: {chain hoist: {rated: 1 t, gust limit: 7 m/s}}", "{kind: lift, at: pier/hinge, hours: 1 h, kit: chain hoist}", 7},
	} {
		sections := []string{tc.kit, "tasks: {up: " + tc.task + "}"}
		w := under(t, gusts, sections...)
		key := "up / lift"
		if strings.Contains(tc.task, "kind: move") {
			key = "up / move"
		}
		s := w.step(t, key)
		if math.Abs(s.Gust.Value-tc.want) > 1e-9 {
			t.Errorf("%s: %v m/s, want %v", tc.name, s.Gust.Value, tc.want)
			continue
		}
		shut := w.Nature(s)
		for h := 0; h < 48; h++ {
			m := w.Span.From + hours.Minute(h*60+30)
			if got, want := closedAt(shut, m), tc.want > 0 && float64(h%24) > tc.want; got != want {
				t.Errorf("%s, hour %d: closed %v", tc.name, h, got)
			}
		}
		if tc.want > 0 && !strings.Contains(shut[len(shut)-1].Why, " m/s, lifted up to ") {
			t.Error(shut[len(shut)-1].Why)
		}
		if none := likely(t, sections...); none.step(t, key).Gust.Name != "" {
			t.Errorf("%s: a limit for the hours where no weather is known", tc.name)
		}
	}
}

// While the order is open, the least mass and the largest sail count.
func TestWindOverOpenOrder(t *testing.T) {
	const kit = "kit: {crane: {kind: loader crane, chart: {4 m: 5 t}, gust limit: 10 m/s}}"
	const parts = `assemblies:
  gate:
    parts:
      post: {item: 100 kg, area: 1 m2}
      skin: {plate: [3 m, 2 m, 1 mm]}`
	limit := func(link string) float64 {
		w := under(t, func(int) site.Weather { return fine() }, kit, parts,
			"tasks: {skin on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [gate, gate/skin]}, up: {kind: lift, at: pier/hinge, lifts: gate, by: crane, radius: 4 m"+link+"}}")
		return w.step(t, "up / lift").Gust.Value
	}
	sail := func(kg float64) float64 { return 10 * math.Sqrt(1.2*kg/1000/(6*2.4)) }
	if got := limit(""); math.Abs(got-sail(100)) > 1e-9 {
		t.Errorf("open: %v, by hand %v", got, sail(100))
	}
	if got := limit(", after: skin on"); math.Abs(got-sail(147.1)) > 1e-9 {
		t.Errorf("after it is on: %v, by hand %v", got, sail(147.1))
	}
}

// Gusts that are worked out from monthly normals close no hour: they are a share of the time in a note, worked out
// here from Rayleigh's distribution, P(v > w) = exp(-pi/4 (w/mean)^2), with gusts 1.5 of the wind.
func TestUsualWindClosesNoLift(t *testing.T) {
	const kit = "kit: {chain hoist: {rated: 1 t, gust limit: 6 m/s}}"
	const up = "tasks: {up: {kind: lift, at: pier/hinge, mass: 400 kg, by: chain hoist}}"
	forecast := map[int]float64{30: 20} // one hour that somebody has forecast
	gusts := func(usual bool) func(int) site.Weather {
		return func(h int) site.Weather {
			w := fine()
			w.Gust, w.Usual = 15, usual
			if g, ok := forecast[h]; ok {
				w.Gust, w.Usual = g, false
			}
			return w
		}
	}
	w := under(t, gusts(true), kit, up)
	s := w.step(t, "up / lift")
	shut := w.Nature(s)
	if len(shut) != 1 || shut[0].To-shut[0].From != 60 || !closedAt(shut, w.Span.From+30*60) {
		t.Fatalf("closed: %v", shut)
	}
	if all := under(t, gusts(false), kit, up); len(all.Nature(all.step(t, "up / lift"))) == 0 || !closedAt(all.Nature(all.step(t, "up / lift")), all.Span.From) {
		t.Error("what was forecast closes nothing")
	}
	const mean = 5.0
	job := w.Job
	job.Places[1].Climate.Average = weatherOf(w.Span, func(int) site.Weather { return site.Weather{Gust: 1.5 * mean} })
	again, faults := Expand(job, Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	want := fmt.Sprintf("pass that for %.0f %% of the time", 100*math.Exp(-math.Pi/4*math.Pow(6/1.5/mean, 2)))
	told := ""
	for _, n := range again.Notes {
		told += n.Text + "\n"
	}
	if len(again.Winds) != 1 || !strings.Contains(again.Winds[0].Text, want) {
		t.Errorf("beside the verdict: %v", again.Winds)
	}
	if !strings.Contains(told, want) || !strings.Contains(told, "no forecast tells its hours yet") {
		t.Errorf("want %q in %s", want, told)
	}
}

// The size of an assembly is its sail where its parts have no places of their own; parts that span more keep theirs,
// and a part by itself has not the size of the whole.
func TestSizeAsSail(t *testing.T) {
	const kit = "kit: {crane: {kind: loader crane, chart: {4 m: 5 t}, gust limit: 10 m/s}}"
	for _, tc := range []struct {
		name, parts, lifts string
		area, kg           float64
	}{
		{"size alone", "{mass: 300 kg, size: [2 m, 1.5 m, 200 mm]}", "gate", 3, 300},
		{"items without places", "{size: [2 m, 1.5 m, 200 mm], parts: {a: {item: 100 kg}, b: {item: 200 kg}}}", "gate", 3, 300},
		{"a plate that spans more", "{size: [1 m, 1 m, 200 mm], parts: {a: {plate: [3 m, 2 m, 1 mm]}}}", "gate", 6, 47.1},
		{"a part of it", "{size: [9 m, 9 m, 200 mm], parts: {a: {plate: [3 m, 2 m, 1 mm]}, b: {item: 200 kg}}}", "gate/a", 6, 47.1},
	} {
		w := under(t, func(int) site.Weather { return fine() }, kit, "assemblies: {gate: "+tc.parts+"}",
			"tasks: {up: {kind: lift, at: pier/hinge, lifts: "+tc.lifts+", by: crane, radius: 4 m}}")
		want := 10 * math.Min(1, math.Sqrt(1.2*tc.kg/1000/(tc.area*2.4)))
		if got := w.step(t, "up / lift").Gust.Value; math.Abs(got-want) > 1e-9 {
			t.Errorf("%s: %v m/s, by hand %v", tc.name, got, want)
		}
	}
}

// Where every part is joined by name, the whole is nothing before that: the fault says so and the ways out hold.
func TestNothingToLiftYet(t *testing.T) {
	job := func(joins, lifts string) []string {
		return []string{"kit: {chain hoist: {rated: 1 t}}", "assemblies: {gate: {parts: {frame: {item: 100 kg}, skin: {item: 50 kg}}}}",
			"tasks: {on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: " + joins + "}, up: {kind: lift, at: pier/hinge, by: chain hoist, " + lifts + "}}"}
	}
	refused(t, `before its parts are joined "gate" is nothing`, job("[gate/frame, gate/skin]", "lifts: gate")...)
	for _, ok := range [][]string{job("[gate/frame, gate/skin]", "lifts: gate/frame"), job("[gate, gate/skin]", "lifts: gate"), job("[gate/frame, gate/skin]", "lifts: gate, after: on")} {
		likely(t, ok...)
	}
}
