package expand

import (
	"math"
	"testing"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// between gives the time at 15 C of a paint that takes so many minutes at 10 and at 20 C: log of
// time against temperature (R11).
func between(at10, at20 float64) float64 { return math.Sqrt(at10 * at20) }

func TestCoatsDryBetweenEachOther(t *testing.T) {
	w := likely(t, "tasks: {paint: {kind: coat, at: shop, area: 4 m2, coats: [primer, primer, top]}}")
	same(t, "steps in the order in which they come", w.keys(), "paint / coat 1, paint / dry 1, paint / coat 2, paint / dry 2, paint / coat 3")
	for i, s := range w.Steps {
		if s.Index != i {
			t.Errorf("%s has index %d, and is number %d", s.Key(), s.Index, i)
		}
	}
	dry := w.step(t, "paint / dry 1") // the primer over itself: 12 h at 10 C, 6 h at 20 C
	same(t, "drying begins when the coat is finished", w.linksOf(dry), "paint / coat 1 finish -> start max 0")
	same(t, "drying takes nobody", []any{dry.Class == Cure, len(dry.Needs), dry.Minutes(), dry.Room}, []any{true, 0, 0, 0})
	if want := 1 / between(720, 360); math.Abs(dry.Rate(w.Span.From)-want) > 1e-12 {
		t.Errorf("a minute adds %g, want %g", dry.Rate(w.Span.From), want)
	}
	same(t, "over itself there is no longest wait", w.linksOf(w.step(t, "paint / coat 2")), "paint / dry 1 finish -> start")
	most := int(between(10*1440, 5*1440))
	same(t, "under the top coat there is, from both ends", w.linksOf(w.step(t, "paint / coat 3")),
		"paint / coat 2 finish -> finish max 10182; paint / coat 2 start -> start max 10182; paint / dry 2 finish -> start")
	if most != 10182 {
		t.Errorf("the longest wait by hand is %d min", most)
	}
	if want := 1 / between(960, 480); math.Abs(w.step(t, "paint / dry 2").Rate(0)-want) > 1e-12 {
		t.Error("under the top coat the primer dries by the pair's own points")
	}
}

func TestAFilmKeepsItsStatesUntilItIsDry(t *testing.T) {
	w := likely(t, "tasks: {paint: {kind: coat, at: shop, area: 4 m2, coats: primer}}")
	s := w.step(t, "paint / coat 1")
	same(t, "states of a coat (R12)", states(s), "people, wet film, soft film, solvent")
	at := w.Window.Opens
	for i, want := range []float64{0, between(360, 180), between(1200, 420), between(2880, 1200)} {
		tail := s.States[i].Tail
		if i == 0 {
			if tail != nil {
				t.Error("people leave when they have finished")
			}
			continue
		}
		if got := float64(tail(at) - at); got != math.Ceil(want) {
			t.Errorf("%s lasts %.0f min after the coat, want %.2f rounded up", s.States[i].Name, got, want)
		}
	}
	same(t, "a coat goes in one go, without a meal (R6)", []bool{s.InOneGo, s.OverMeals}, []bool{true, false})
}

func TestWhatWaitsForACoat(t *testing.T) {
	for _, tc := range []struct{ what, task, links, steps string }{
		{"hard dry where nothing is said", "hours: 1 h, after: paint", "paint / hard dry finish -> start", "paint / coat 1, next / plain, paint / hard dry"},
		{"the state named", "hours: 1 h, after: {paint: touch dry}", "paint / touch dry finish -> start", "paint / coat 1, next / plain, paint / touch dry"},
		{"the coat itself", "hours: 1 h, after: {paint: applied}", "paint / coat 1 finish -> start", "paint / coat 1, next / plain"},
		{"the wait that the link gives, from the coat", "hours: 1 h, after: {paint: {min: 16 h, max: 2 d}}", "paint / coat 1 finish -> start min 960 max 2880", "paint / coat 1, next / plain"},
		{"a state and a wait", "hours: 1 h, after: {paint: {min: 1 h, state: hard dry}}", "paint / hard dry finish -> start min 60", "paint / coat 1, next / plain, paint / hard dry"},
		{"its start", "hours: 1 h, after start of: paint", "paint / coat 1 start -> start", "paint / coat 1, next / plain"},
		{"another coat: the recoat window of the pair, from both ends", "kind: coat, area: 4 m2, coats: top, after: paint",
			"paint / coat 1 finish -> finish max 10182; paint / coat 1 start -> start max 10182; paint / recoat finish -> start", "paint / coat 1, next / coat 1, paint / recoat"},
		{"another coat that waits for a state", "kind: coat, area: 4 m2, coats: top, after: {paint: hard dry}", "paint / hard dry finish -> start", "paint / coat 1, next / coat 1, paint / hard dry"},
		{"finish after its finish", "hours: 1 h, finish after: paint", "paint / hard dry finish -> finish", "paint / coat 1, next / plain, paint / hard dry"},
	} {
		w := likely(t, "tasks: {paint: {kind: coat, at: shop, area: 4 m2, coats: primer}, next: {at: shop, "+tc.task+"}}")
		s := w.Steps[1]
		same(t, tc.what, w.linksOf(s), tc.links)
		same(t, tc.what+": steps", w.keys(), tc.steps)
	}
}

func TestTwoThatWaitForOneStateWaitForOneStep(t *testing.T) {
	w := likely(t, "tasks: {paint: {kind: coat, at: pier, area: 4 m2, coats: primer}, a: {at: pier, hours: 1 h, after: paint}, b: {at: pier, hours: 1 h, after: {paint: hard dry}}, c: {at: pier, standing: 1 h, after: {paint: cured}}}")
	same(t, "steps", w.keys(), "paint / coat 1, a / plain, b / plain, c / standing, paint / hard dry, paint / cured")
	dry, cured := w.step(t, "paint / hard dry"), w.step(t, "paint / cured")
	if !dry.Site || dry.Deadline != w.Window.Closes {
		t.Error("drying at the site ends inside the window (R2)")
	}
	if cured.Site || cured.Deadline != hours.Far {
		t.Error("service cure may run on past the window (R11)")
	}
}

func TestMaybesThatDoNotHappenAskNothingOfAFilm(t *testing.T) {
	w := likely(t, "tasks: {paint: {kind: coat, at: shop, area: 4 m2, coats: primer}, next: {kind: coat, at: shop, area: 4 m2, coats: top, chance: 20 %, after: paint}}")
	for _, l := range w.Links {
		if l.To.Absent && (l.Max < NoMax || l.MaxCure != nil || l.Min > 0) {
			t.Errorf("a wait of its own: %v", l)
		}
	}
}

// The steel warms from 10 to 20 C at noon on the second day: rates add up over both (R11).
func TestFilmsCureByTheSteelOfTheHour(t *testing.T) {
	job := read(t, "tasks: {paint: {kind: coat, at: shop, area: 4 m2, coats: [primer, top]}, next: {at: shop, hours: 1 h, after: {paint: hard dry}}}")
	shop := job.Places[0]
	warm := at(t, "04-06 12:00")
	series := &site.Series{Start: site.Minute(at(t, "03-01 00:00"))}
	for h := range 90 * 24 {
		steel := 10.0
		if hours.Minute(series.Start)+hours.Minute(60*h) >= warm {
			steel = 20
		}
		series.Steel, series.Wet, series.Basis = append(series.Steel, steel), append(series.Wet, false), append(series.Basis, "")
		for _, list := range []*[]float64{&series.Air, &series.Dew, &series.RH, &series.Wind, &series.Gust} {
			*list = append(*list, 10)
		}
	}
	shop.Climate = &tasks.Climate{Hourly: series}
	w, faults := Expand(job, Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	dry, coat := w.step(t, "paint / dry 1"), w.step(t, "paint / coat 1")
	if a, b := dry.Rate(warm-1), dry.Rate(warm); math.Abs(a-1.0/960) > 1e-12 || math.Abs(b-1.0/480) > 1e-12 {
		t.Fatalf("rates %g and %g, want one over 960 and over 480", a, b)
	}
	for _, tc := range []struct {
		what         string
		start, solid hours.Minute // of the solvent: 48 h at 10 C, 20 h at 20 C
	}{
		{"all in the warm", warm, warm + 1200},
		{"all in the cold", warm - 2880, warm},
		{"half in the cold", warm - 1440, warm + 600},
	} {
		if got := coat.States[3].Tail(tc.start); got != tc.solid {
			t.Errorf("%s: solvent gone after %d min, want %d", tc.what, got-tc.start, tc.solid-tc.start)
		}
	}
	if got := coat.States[3].Tail(w.Span.To - 100); got != hours.Far {
		t.Errorf("a film is gone before the end of all that is known: %v", got)
	}
	// The longest wait is that of the hottest steel in it: 10 d in the cold, 5 d in the warm.
	var last func(hours.Minute) hours.Minute
	ends := 0
	for _, l := range w.Links {
		if l.MaxCure != nil {
			last = l.MaxCure.Last
			ends++
		}
	}
	if ends != 2 {
		t.Fatalf("%d links shorten with heat, want one for each end", ends)
	}
	for _, tc := range []struct {
		what       string
		start, max hours.Minute
	}{
		{"in the warm five days", warm, warm + 5*1440},
		{"two days in the cold, then three in the warm", warm - 2*1440, warm + 3*1440},
		{"six days in the cold: it is over when the first warm minute comes", warm - 6*1440, warm - 1},
	} {
		if got := last(tc.start); got != tc.max {
			t.Errorf("%s: at most %d min, want %d", tc.what, got-tc.start, tc.max-tc.start)
		}
	}
}
