package check

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/jobfile"
	"sailby/tasks/site"
)

// liftJob reads a job of lifts at a dock that is open all day, all steps an hour long.
func liftJob(t *testing.T, kit, tasks string) *expand.Work {
	t.Helper()
	text := `job: Lifts
zone: Europe/London
places: {yard: {open: always}, dock: {open: always, face factor: 1}}
window: {place: dock, opens: 2027-06-07 00:00, closes: 2027-06-08 00:00}
people: {Ada: {tickets: [slinger/signaller]}, Ben: {}}
duty: {longest: 24 h, rest: 0 h}
kit: ` + kit + `
assemblies:
  gate: {parts: {skin: {plate: [2 m, 1 m, 10 mm]}, brace: {plate: [2 m, 1 m, 5 mm]}}}
  old: {mass: 100 kg, known: weighed, old: yes}
tasks:
` + tasks
	job, err := jobfile.ReadBytes("job.yaml", []byte(text), nil)
	if err != nil {
		t.Fatal(err)
	}
	w, faults := expand.Expand(job, expand.Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return w
}

// planOf makes the steps start at the hours given, "name 3, name 5".
func planOf(t *testing.T, w *expand.Work, text string) *plan.Plan {
	t.Helper()
	return planAt(w, text)
}

func planAt(w *expand.Work, text string) *plan.Plan {
	start := map[string]hours.Minute{}
	for _, part := range strings.Split(text, ", ") {
		var name string
		var h int
		if _, err := fmt.Sscanf(part, "%s %d", &name, &h); err != nil {
			panic(err)
		}
		start[name] = w.Window.Opens + hours.Minute(h*60)
	}
	p := &plan.Plan{}
	for _, s := range w.Steps {
		at := start[s.Task.Name]
		span := hours.Span{From: at, To: at + hours.Minute(s.Minutes())}
		if s.Class == expand.Clock {
			at += 60
			span = hours.Span{From: at, To: at + hours.Minute(s.Clock)}
		}
		one := plan.Step{Task: s.Task.Name, Step: s.Name, Start: span.From, Finish: span.To, Pieces: []hours.Span{span}}
		for _, n := range s.Needs {
			for range n.Count {
				one.People = append(one.People, []string{"Ada", "Ben"}[min(len(one.People), 1)])
			}
		}
		p.Steps = append(p.Steps, one)
	}
	return p
}

// broken lists the breaches of R24 and of kit.
func broken(w *expand.Work, p *plan.Plan) string {
	var out []string
	for _, b := range Plan(w, p) {
		if b.Rule == "R24" || b.Rule == "R7" || b.Rule == "R17" {
			out = append(out, b.Rule+" "+b.Text)
		}
	}
	return strings.Join(out, "; ")
}

// The checker weighs what hangs together by the plan's own order, whatever rules the expansion
// made: here they are taken away.
func TestStageByThePlansOrder(t *testing.T) {
	w := liftJob(t, "{chain hoist: {rated: 200 kg}}", `  brace: {kind: fit-up, at: dock, hours: 1 h, joins: [gate, gate/brace]}
  up: {kind: lift, at: dock, lifts: gate, by: chain hoist, hours: 1 h}`)
	if len(w.Orders) != 1 {
		t.Fatalf("rules: %v", w.Orders)
	}
	w.Orders = nil
	if got := broken(w, planOf(t, w, "up 1, brace 2")); got != "" {
		t.Errorf("the lift first: %s", got)
	}
	for _, order := range []string{"brace 1, up 2", "brace 1, up 1"} { // begun is joined
		got := broken(w, planOf(t, w, order))
		if !strings.Contains(got, "R24 is lifted when too much hangs on it") || !strings.Contains(got, "exceeds 200 kg") {
			t.Errorf("%s: %q", order, got)
		}
	}
}

// The checker's own pieces and mass are held against those of the estimate: an estimate that left
// something out is found.
func TestAnEstimateThatLeavesSomethingOut(t *testing.T) {
	w := liftJob(t, "{chain hoist: {rated: 2 t}}", `  brace: {kind: fit-up, at: dock, hours: 1 h, joins: [gate, gate/brace]}
  up: {kind: lift, at: dock, lifts: gate, by: chain hoist, hours: 1 h}`)
	for _, s := range w.Steps {
		if s.Rigging != nil {
			s.Rigging.Joins = nil
		}
	}
	if got := broken(w, planOf(t, w, "brace 1, up 2")); !strings.Contains(got, "judged for other pieces") {
		t.Errorf("got %q", got)
	}
	if got := broken(w, planOf(t, w, "up 1, brace 2")); got != "" {
		t.Errorf("nothing is left out here: %s", got)
	}
}

// A rating that the kit has lost since is found by the plain comparison of mass and rating.
func TestPlainRating(t *testing.T) {
	w := liftJob(t, "{chain hoist: {rated: 400 kg}}", "  up: {kind: lift, at: dock, lifts: gate, by: chain hoist, hours: 1 h}")
	r := &row{s: w.Steps[0]}
	c := &checker{w: w, plan: planOf(t, w, "up 1")}
	if kg, ok := c.weight(r.s.Task, c.hanging(r.s.Task, nil, nil)); !ok || kg < 235.4 || kg > 235.6 {
		t.Errorf("weighs %v, by hand 157 + 78.5 kg", kg)
	}
}

func TestStiffWith(t *testing.T) {
	w := liftJob(t, "{chain hoist: {rated: 1 t}}", `  brace: {kind: fit-up, at: dock, hours: 1 h, joins: [gate, gate/brace]}
  up: {kind: lift, at: dock, lifts: gate, by: chain hoist, hours: 1 h, stiff with: gate/brace}`)
	w.Orders = nil
	if got := broken(w, planOf(t, w, "up 1, brace 2")); !strings.Contains(got, "R24 is lifted before it is stiff enough") {
		t.Errorf("got %q", got)
	}
	if got := broken(w, planOf(t, w, "brace 1, up 2")); got != "" {
		t.Errorf("got %q", got)
	}
}

// A stuck part waits for its proof, and a landed load keeps its gear, standing time included.
func TestProvedAndSecured(t *testing.T) {
	w := liftJob(t, "{chain hoist: {rated: 1 t}}", `  jack: {at: dock, hours: 1 h}
  out: {kind: lift, at: dock, lifts: old, by: chain hoist, hours: 1 h, proved free by: jack, secured by: pin}
  pin: {at: dock, hours: 1 h, standing: 2 h}
  next: {kind: lift, at: dock, mass: 100 kg, by: chain hoist, hours: 1 h}`)
	w.Orders, w.Links = nil, nil
	for text, want := range map[string]string{
		"jack 1, out 2, pin 4, next 7": "",
		"jack 1, out 2, pin 4, next 0": "",
		"jack 1, out 2, pin 4, next 6": "R7 takes more than there is: chain hoist", // the pin's standing time is not over
		"jack 1, out 2, pin 4, next 3": "R7 takes more than there is: chain hoist",
		"jack 3, out 2, pin 4, next 7": "R24 lifts an old part before jack has proved it free",
	} {
		if got := broken(w, planOf(t, w, text)); got != want {
			t.Errorf("%s: got %q, want %q", text, got, want)
		}
	}
	if got := broken(w, planOf(t, w, "jack 1, out 4, pin 2, next 7")); !strings.Contains(got, "R24 pin secures it before it is landed") {
		t.Errorf("pinned first: %q", got)
	}
}

// A lift in an hour with gusts above what it may have, and one that was planned for more than what is
// lifted then may have, by the same arithmetic done by hand: 2 m2 and 157 kg, drag 2.4.
func TestWindForLifts(t *testing.T) {
	limit := 9.8 * math.Sqrt(1.2*.157/(2*2.4))
	weather := func(w *expand.Work, gust float64, usual bool) {
		s := &site.Series{Start: int64(w.Window.Opens)}
		for h := range 24 {
			g := 1.0
			if h == 3 {
				g = gust
			}
			s.Air, s.Steel, s.Dew, s.RH, s.Wet, s.Basis = append(s.Air, 10), append(s.Steel, 10), append(s.Dew, 5), append(s.RH, .7), append(s.Wet, false), append(s.Basis, "test")
			s.Wind, s.Gust, s.Usual = append(s.Wind, 1), append(s.Gust, g), append(s.Usual, usual)
		}
		w.Window.Place.Climate = &tasks.Climate{Hourly: s}
	}
	for _, tc := range []struct {
		name, text string
		gust, cap  float64
		want       string
	}{
		{"calm", "up 3", limit - .01, limit, ""},
		{"gusty", "up 3", limit + .01, limit, "R25 is worked when the wind is stronger than it may be lifted in"},
		{"gusty by the month's normals alone", "up 3", 3 * limit, limit, ""},
		{"another hour", "up 5", 30, limit, ""},
		{"planned up to more than its sail may have", "up 5", 1, limit + .1, "R25 is planned up to a gust"},
		{"no limit at all", "up 5", 1, 0, "R25 is planned up to a gust"},
	} {
		w := liftJob(t, "{chain hoist: {rated: 1 t}}", "  up: {kind: lift, at: dock, lifts: gate/skin, by: chain hoist, hours: 1 h}\n")
		weather(w, tc.gust, tc.name == "gusty by the month's normals alone")
		w.Steps[0].Gust.Value = tc.cap
		var got string
		for _, b := range Plan(w, planOf(t, w, tc.text)) {
			if b.Rule == "R25" {
				got += b.Rule + " " + b.Text
			}
		}
		if tc.want == "" && got != "" || !strings.Contains(got, tc.want) {
			t.Errorf("%s: %q", tc.name, got)
		}
	}
}

// Both hooks take their gear: another lift with the second's gear at the same time is found, and so is an
// estimate that forgot it.
func TestTwoHooksTakeTheirGear(t *testing.T) {
	w := liftJob(t, "{chain hoist: {rated: 1 t}, lever hoist: {rated: 1 t}}", `  up: {kind: lift, at: dock, lifts: gate/skin, by: chain hoist, hours: 1 h, second hook: {by: lever hoist, at: [0 mm, 2 m]}}
  pull: {at: dock, hours: 1 h, kit: lever hoist, people: 0}`)
	if got := broken(w, planOf(t, w, "up 1, pull 2")); got != "" {
		t.Errorf("one after the other: %q", got)
	}
	if got := broken(w, planOf(t, w, "up 1, pull 1")); !strings.Contains(got, "R7 takes more than there is: lever hoist") {
		t.Errorf("at once: %q", got)
	}
	w.Steps[0].Kit = w.Steps[0].Kit[:1]
	if got := broken(w, planOf(t, w, "up 1, pull 2")); !strings.Contains(got, "R24 hangs on two hooks and does not take lever hoist for both") {
		t.Errorf("forgotten: %q", got)
	}
}

// What was taken off by then is not lifted, what is put on again is, and a task that has not ended has taken nothing
// off; the rules that the expansion made are taken away.
func TestTakenOffByThePlansOrder(t *testing.T) {
	const list = `  off: {kind: plain, at: dock, hours: 1 h, people: 0, takes off: gate/brace}
  up: {kind: lift, at: dock, lifts: gate, by: chain hoist, hours: 1 h}
  on: {kind: fit-up, at: dock, hours: 1 h, joins: [gate, gate/brace], after: off}`
	w := liftJob(t, "{chain hoist: {rated: 200 kg}}", list)
	if len(w.Orders) != 2 {
		t.Fatalf("rules: %v", w.Orders)
	}
	w.Orders = nil
	for text, heavy := range map[string]bool{"off 1, up 2, on 3": false, "up 1, off 2, on 3": true, "off 1, on 2, up 3": true, "off 1, on 2, up 2": true} {
		got := broken(w, planOf(t, w, text))
		if strings.Contains(got, "R24 is lifted when too much hangs on it") != heavy || strings.Contains(got, "other pieces") {
			t.Errorf("%s: %q", text, got)
		}
	}
}

// Of an assembly whose every part is joined by name, the lift takes up what has been joined: 235.5 kg by hand, 7.85 kg
// a mm and m2.
func TestEveryPartJoinedByName(t *testing.T) {
	w := liftJob(t, "{chain hoist: {rated: 1 t}}", "  make: {kind: fit-up, at: yard, hours: 1 h, joins: [gate/skin, gate/brace]}\n  up: {kind: lift, at: dock, lifts: gate, by: chain hoist, hours: 1 h}\n")
	if got := broken(w, planOf(t, w, "make 0, up 3")); got != "" {
		t.Error(got)
	}
	for _, s := range w.Steps {
		if s.Rigging == nil {
			continue
		}
		j, err := s.Rigging.Judge(s.Rigging.Joins)
		if err != nil || math.Abs(j.Load.Mass-235.5) > 1e-9 {
			t.Errorf("%v kg, %v", j.Load.Mass, err)
		}
	}
}
