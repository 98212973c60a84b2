package expand

import (
	"fmt"
	"testing"
)

// R4: rounded up once, when the step is made: first the hands-on minutes, then the working minutes.
func TestMinutesAreRoundedUpOnce(t *testing.T) {
	for _, tc := range []struct {
		what, task, face  string
		hands, work, site int
	}{
		{"an hour on site", "at: pier, hours: 1 h", "", 60, 86, 1}, // 60 / 0.7 = 85.7
		{"an hour in the shop", "at: shop, hours: 1 h", "", 60, 71, 0},
		{"a third of ten minutes is four minutes, and eight working ones", "at: pier, man-hours: 10 min, people: 3", "0.5", 4, 8, 1}, // not 6.67
		{"man-hours over one person", "at: pier, man-hours: 5 h", "1", 300, 300, 1},
		{"man-hours over those named", "at: pier, man-hours: 5 h, who: [Ines, Tom, Ann]", "1", 100, 100, 1},
		{"man-hours over the tickets asked for", "at: pier, man-hours: 5 h, needs: {fitter: 1, painter: 1}", "1", 150, 150, 1},
		{"man-hours over the people of the kind", "at: pier, kind: fit-up, man-hours: 5 h", "1", 150, 150, 1},
		{"seconds are kept until the end", "at: pier, hours: 0.011 h", "1", 1, 1, 1},
		{"no time at all", "at: pier, hours: 0 h", "", 0, 0, 1},
		{"an even split is not rounded up by a hair", "at: pier, man-hours: 0.7 h, people: 3", "0.7", 14, 20, 1},
	} {
		pier := "pier: {open: [daily 07:00-19:00]}"
		if tc.face != "" {
			pier = "pier: {open: [daily 07:00-19:00], face factor: " + tc.face + "}"
		}
		w := likely(t, "places: {shop: {open: [Mon-Fri 08:00-17:00]}, "+pier+"}", "tasks: {it: {"+tc.task+"}}")
		s := w.Steps[0]
		same(t, tc.what, []any{s.HandsOn, s.Working, s.Minutes(), s.Site}, []any{tc.hands, tc.work, tc.work, tc.site == 1})
		if tc.hands == 0 && len(s.Needs) != 0 {
			t.Errorf("%s needs %s (R4)", tc.what, people(s.Needs))
		}
	}
}

func TestTheBasisTakesItsEndOfEveryRange(t *testing.T) {
	tasks := `tasks:
  given: {at: shop, hours: 3 to 5 h}
  named: {at: shop, hours: {low: 3 h, likely: 3.5 h, high: 5 h}}
  shared: {at: shop, man-hours: 6 to 10 h, people: 2}
  fixed: {at: shop, hours: 2 h}
  reckoned: {kind: test, at: shop, by: magnetic particle, length: 10 m}
  set: {at: shop, standing: 4 to 8 h}
  coat: {kind: coat, at: shop, area: 4 m2, coats: [primer, primer], hours: 2 to 6 h}`
	// 50 min by its figures: 15 % less and 25 % more for what is reckoned
	for _, tc := range []struct {
		b    Basis
		want [7]int
	}{
		{Basis{End: Low}, [7]int{180, 180, 180, 120, 43, 240, 60}},
		{Basis{End: Likely}, [7]int{240, 210, 240, 120, 50, 360, 120}},
		{Basis{End: High}, [7]int{300, 300, 300, 120, 63, 480, 180}},
	} {
		w := on(t, tc.b, tasks)
		for i, key := range []string{"given / plain", "named / plain", "shared / plain", "fixed / plain", "reckoned / test", "set / standing", "coat / coat 2"} {
			s := w.step(t, key)
			if got := max(s.HandsOn, s.Clock); got != tc.want[i] {
				t.Errorf("%s, %s: %d min, want %d", tc.b.End, key, got, tc.want[i])
			}
			if key == "coat / coat 2" {
				same(t, key+", its range", s.Estimate.Range, [3]int{60, 120, 180})
			}
		}
		same(t, "the range is told whatever the basis", w.step(t, "reckoned / test").Estimate.Range, [3]int{43, 50, 63})
	}
}

func TestGivenHoursOverruleTheEstimateAndKeepItToTell(t *testing.T) {
	w := likely(t, `tasks:
  own: {kind: fit-up, at: shop, part: frame, hours: 4 h}
  reckoned: {kind: fit-up, at: shop, part: frame}
  nothing known: {kind: lift, at: shop, hours: 1 h}`)
	own, reckoned := w.step(t, "own / fit-up"), w.step(t, "reckoned / fit-up")
	if !own.Estimate.Overruled || reckoned.Estimate.Overruled || w.step(t, "nothing known / lift").Estimate.Overruled {
		t.Error("what is overruled is mixed up")
	}
	facts := own.Estimate.Facts
	if n := len(facts); n == 0 || facts[n-1].Value != reckoned.Estimate.Figure.From[0].Value {
		t.Errorf("the estimate that was overruled is lost: %v", facts)
	}
	if f := own.Estimate.Figure.From[0]; f.Value != 240 || f.Origin.Line == 0 {
		t.Errorf("the hours given come from %v", f)
	}
}

// R16: on likely hours a maybe does not happen; of a group the likeliest does, the first of equals.
func TestMaybes(t *testing.T) {
	job := `tasks:
  first: {at: pier, hours: 1 h}
  maybe: {at: pier, hours: 2 h, chance: 35 %, after: {first: {min: 4 h, max: 9 h}}, needs: {fitter: 1}}
  last: {at: pier, hours: 1 h, after: maybe}
  weld on: {at: pier, hours: 1 h, chance: 40 %, group: pin}
  ream: {at: pier, hours: 2 h, chance: 40 %, group: pin}
  new pin: {at: pier, hours: 3 h, chance: 20 %, group: pin}`
	present := func(w *Work) string {
		out := ""
		for _, s := range w.Steps {
			if !s.Absent {
				out += s.Task.Name + ", "
			}
		}
		return out
	}
	w := likely(t, job)
	same(t, "likely", present(w), "first, last, weld on, ")
	gone := w.step(t, "maybe / plain")
	same(t, "one that does not happen has no minutes, needs or bounds", []any{gone.HandsOn, gone.Working, gone.Minutes(), len(gone.Needs), gone.NotBefore < 0, gone.Deadline > gone.NotBefore+1e9},
		[]any{0, 0, 0, 0, true, true})
	same(t, "its wait is gone, its order kept", w.linksOf(gone), "first / plain finish -> start")
	same(t, "what comes after it comes after what came before it", w.linksOf(w.step(t, "last / plain")), "maybe / plain finish -> start")

	w = on(t, Basis{Maybes: true}, job)
	same(t, "with every maybe: of a group the longest", present(w), "first, maybe, last, new pin, ")
	same(t, "its wait is there", w.linksOf(w.step(t, "maybe / plain")), "first / plain finish -> start min 240 max 540")
	same(t, "a sure thing is no maybe", present(likely(t, "tasks: {sure: {at: pier, hours: 1 h, chance: 100 %}}")), "sure, ")
}

func TestTheLongestOfAGroupCountsCoatsAndStandingTime(t *testing.T) {
	for _, tc := range []struct{ what, a, b, want string }{
		{"a coat is as long as it takes", "kind: coat, area: 40 m2, coats: [primer, top]", "hours: 1 h", "a"},
		{"standing time counts", "hours: 1 h, standing: 3 h", "hours: 2 h", "a"},
		{"at the end of the hours that is asked for", "hours: 1 to 9 h", "hours: 6 h", "b"},
	} {
		w := on(t, Basis{Maybes: true}, fmt.Sprintf("tasks: {a: {at: shop, %s, chance: 50 %%, group: g}, b: {at: shop, %s, chance: 40 %%, group: g}}", tc.a, tc.b))
		if got := map[bool]string{true: "b", false: "a"}[w.Steps[0].Absent]; got != tc.want {
			t.Errorf("%s: %s happens, want %s", tc.what, got, tc.want)
		}
	}
	w := on(t, Basis{Maybes: true, End: High}, "tasks: {a: {at: shop, hours: 1 to 9 h, chance: 50 %, group: g}, b: {at: shop, hours: 6 h, chance: 40 %, group: g}}")
	if w.step(t, "a / plain").Absent {
		t.Error("with high hours 9 h is the longer")
	}
}

func TestRoundsOfARepeatTakeTheirFactor(t *testing.T) {
	w := likely(t, "tasks: {last: {at: shop, hours: 1 h, after: every grind bay}}", `repeat:
  bay:
    count: 4
    first times: [1.5, 1.2, 1]
    tasks:
      grind: {at: shop, hours: 50 min, after: previous grind}
      prime: {at: shop, man-hours: 100 min, people: 2, after: grind}`)
	for i, want := range []int{75, 60, 50, 50} {
		for _, task := range []string{"grind", "prime"} {
			s := w.step(t, fmt.Sprintf("%s bay %d / plain", task, i+1))
			if s.HandsOn != want || s.Estimate.Range != [3]int{want, want, want} || s.Estimate.Figure.From[0].Value != float64(want) {
				t.Errorf("%s takes %d min (range %v), want %d", s.Key(), s.HandsOn, s.Estimate.Range, want)
			}
		}
	}
	same(t, "the round before", w.linksOf(w.step(t, "grind bay 3 / plain")), "grind bay 2 / plain finish -> start")
	same(t, "the same round", w.linksOf(w.step(t, "prime bay 3 / plain")), "grind bay 3 / plain finish -> start")
	same(t, "every round", w.linksOf(w.step(t, "last / plain")),
		"grind bay 1 / plain finish -> start; grind bay 2 / plain finish -> start; grind bay 3 / plain finish -> start; grind bay 4 / plain finish -> start")
}
