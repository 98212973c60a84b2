package expand

import (
	"strings"
	"testing"

	"sailby/tasks"
	"sailby/weld"
)

func TestLinksBetweenTasks(t *testing.T) {
	for _, tc := range []struct{ what, link, want string }{
		{"after", "after: a", "a / plain finish -> start"},
		{"with a least and a longest wait", "after: {a: {min: 4 h, max: 2 d}}", "a / plain finish -> start min 240 max 2880"},
		{"a wait in open hours", "after: {a: {min: 4 working h}}", "a / plain finish -> start min 240 working"},
		{"both in open hours", "after: {a: {min: 1 working h, max: 8 working h}}", "a / plain finish -> start min 60 working max 480 working"},
		{"after the start", "after start of: {a: {min: 30 min}}", "a / plain start -> start min 30"},
		{"finish after the finish", "finish after: a", "a / plain finish -> finish"},
		{"finish after the start", "finish after start of: {a: {max: 6 h}}", "a / plain start -> finish max 360"},
		{"starts with", "starts with: a", "a / plain start -> start max 0"},
		{"after two", "after: [a, b]", "a / plain finish -> start; b / plain finish -> start"},
		{"after what stands: its standing time included", "after: glue", "glue / resin sets finish -> start"},
		{"after what is standing time alone", "after: set", "set / standing finish -> start"},
	} {
		w := likely(t, `tasks:
  a: {at: shop, hours: 1 h}
  b: {at: pier, hours: 1 h}
  glue: {at: shop, hours: 1 h, standing: 12 h, why: resin sets}
  set: {at: shop, standing: 12 h}
  it: {at: shop, hours: 1 h, `+tc.link+"}")
		same(t, tc.what, w.linksOf(w.step(t, "it / plain")), tc.want)
		for _, l := range w.Links {
			if l.To.Task.Name == "it" && (l.Pos.Line == 0 || l.Why == "") {
				t.Errorf("%s: the link does not say where it comes from: %v %q", tc.what, l.Pos, l.Why)
			}
		}
	}
}

func TestALinkToTheFinishHoldsTheLastPartThatPeopleWorkOn(t *testing.T) {
	w := likely(t, "tasks: {a: {at: shop, hours: 1 h}, coat: {kind: coat, at: shop, hours: 2 h, coats: [primer, primer], finish after: a}}")
	same(t, "last coat", w.linksOf(w.step(t, "coat / coat 2")), "a / plain finish -> finish; coat / dry 1 finish -> start")
}

func TestStandingTime(t *testing.T) {
	w := likely(t, `tasks:
  alone: {at: shop, standing: 3 h, why: water cools}
  after: {at: pier/hinge, hours: 1 h, standing: 90 min}
  kept: {at: pier/hinge, hours: 1 h, standing: 2 h, why: pressure held, keeps: {fitter: 1, painter: 1}}
  watch: {at: pier/hinge, standing: 2 h, keeps: {fitter: 1}}`)
	alone := w.step(t, "alone / water cools")
	same(t, "alone it is clock time, and nobody's", []any{alone.Class == Clock, alone.Clock, alone.Minutes(), len(alone.Needs), states(alone)}, []any{true, 180, 180, 0, ""})
	after := w.step(t, "after / standing")
	same(t, "after the hands-on part it follows at once", w.linksOf(after), "after / plain finish -> start max 0")
	same(t, "without a face factor", after.Clock, 90)
	kept := w.step(t, "kept / pressure held")
	same(t, "it may keep people: in one go, no face factor, no meal", []any{kept.Class == Hands, kept.Working, kept.HandsOn, kept.Clock, kept.InOneGo, kept.OverMeals, people(kept.Needs), kept.Room, states(kept)},
		[]any{true, 120, 120, 0, true, false, "fitter x1, painter x1", 2, "people"})
	same(t, "they come when it begins", w.linksOf(kept), "kept / plain finish -> start max 0")
	same(t, "alone, kept by somebody", w.step(t, "watch / standing").Class == Hands, true)
}

// R10: to a coat or a surface prep from the end of cooling, to a test from the end of the hold before NDT.
func TestAfterAWeld(t *testing.T) {
	thick := weld.Seam{Joint: weld.Joint{Type: weld.SingleV, Thickness: 40, Length: 1000}, Position: weld.PA, Procedure: &weld.Procedure{Process: 136}}
	e, err := weld.Work([]weld.Seam{thick}, weld.Circumstances{Ambient: 15, Steel: weld.Steel{Grade: "S460"}, Execution: "EN 1090-2"})
	if err != nil {
		t.Fatal(err)
	}
	if e.Cooling <= 0 || e.BeforeNDT <= e.Cooling {
		t.Fatalf("this weld must be held: cooling %v, before NDT %v", e.Cooling, e.BeforeNDT)
	}
	job := func(next string) *Work {
		return likely(t, "steel: S460", "to standard: EN 1090-2", "procedures: {flux: {process: 136}}", "people: {Ines: {tickets: [weld 136, NDT, painter]}}",
			"tasks: {weld: {kind: weld, at: shop, joints: [{single V: {thickness: 40 mm}, length: 1 m, position: PA, procedure: flux}]}, next: {at: shop, hours: 1 h, "+next+"}}")
	}
	for _, tc := range []struct{ what, next, want string }{
		{"plain work waits for the welding", "after: weld", "weld / weld finish -> start"},
		{"a coat for the cooling", "kind: coat, coats: primer, after: weld", "weld / cooling finish -> start"},
		{"a surface prep too", "kind: surface prep, after: weld", "weld / cooling finish -> start"},
		{"a test for the hold", "kind: test, by: ultrasonic, after: weld", "weld / hold before NDT finish -> start"},
		{"whatever names the state", "after: {weld: cooled}", "weld / cooling finish -> start"},
		{"a test that happens seldom, when it does not", "kind: test, by: ultrasonic, after: weld, chance: 10 %", "weld / cooling finish -> start"},
	} {
		w := job(tc.next)
		same(t, tc.what, w.linksOf(w.Steps[len(w.Steps)-1]), tc.want)
		held := strings.Contains(w.keys(), "hold before NDT")
		if want := strings.Contains(tc.want, "hold"); held != want {
			t.Errorf("%s: a hold is kept: %v", tc.what, held)
		}
	}
	w := job("kind: test, by: ultrasonic, after: weld")
	cooling, hold := w.step(t, "weld / cooling"), w.step(t, "weld / hold before NDT")
	same(t, "minutes of both", []int{cooling.Clock, hold.Clock}, []int{up(float64(e.Cooling)), up(float64(e.BeforeNDT))})
	same(t, "both run from the welding", []string{w.linksOf(cooling), w.linksOf(hold)}, []string{"weld / weld finish -> start max 0", "weld / weld finish -> start max 0"})
	given := likely(t, "tasks: {weld: {kind: weld, at: shop, hours: 1 h}, test: {kind: test, at: shop, hours: 1 h, after: weld}}")
	same(t, "a weld without joints has no hold", given.linksOf(given.step(t, "test / test")), "weld / weld finish -> start")
}

func TestOrders(t *testing.T) {
	job := `tasks:
  a: {at: shop, hours: 1 h}
  coats: {kind: coat, at: shop, hours: 2 h, coats: [primer, primer]}
  c: {at: shop, hours: 1 h}
  maybe: {at: shop, hours: 1 h, chance: 10 %}`
	w := likely(t, job, "orders: [{either: [a before coats, coats before c]}, {not both: [a, coats], before: c}, {either: [maybe before a, a before c]}]")
	var got []string
	for _, o := range w.Orders {
		for _, c := range o.Choices {
			text := ""
			for _, x := range c.First {
				for _, y := range c.Then {
					text += x.Key() + " before " + y.Key() + ", "
				}
			}
			got = append(got, text)
		}
	}
	same(t, "every hands-on step of one before any of the other (R17); none where one does not happen (R16)", strings.Join(got, "\n"), strings.Join([]string{
		"a / plain before coats / coat 1, a / plain before coats / coat 2, ",
		"coats / coat 1 before c / plain, coats / coat 2 before c / plain, ",
		"c / plain before a / plain, ",
		"c / plain before coats / coat 1, c / plain before coats / coat 2, "}, "\n"))
	if w = on(t, Basis{Maybes: true}, job, "orders: [{either: [maybe before a, a before c]}]"); len(w.Orders) != 1 || len(w.Orders[0].Choices) != 2 {
		t.Error("with every maybe the rule holds")
	}
}

func TestStepsAreNamedByTaskAndStep(t *testing.T) {
	s := &Step{Task: &tasks.Task{Name: "weld lugs"}, Name: "cooling", Class: Cure}
	if s.Key() != "weld lugs / cooling" || s.Minutes() != 0 {
		t.Errorf("%s, %d min", s.Key(), s.Minutes())
	}
	same(t, "the three ends", []string{Likely.String(), Low.String(), High.String()}, []string{"likely hours", "low end of the hours", "high end of the hours"})
}
