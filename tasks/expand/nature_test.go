package expand

import (
	"strings"
	"testing"

	"sailby/tasks"
)

const kindTasks = `tasks:
  weld: {kind: weld, at: pier/hinge, hours: 1 h}
  flame: {kind: cut, at: pier/hinge, hours: 1 h, by: oxy-fuel}
  disc: {kind: cut, at: pier/hinge, hours: 1 h, by: disc}
  saw: {kind: cut, at: pier/hinge, hours: 1 h, by: saw}
  blast: {kind: surface prep, at: pier/hinge, hours: 1 h, method: blast}
  wipe: {kind: surface prep, at: pier/hinge, hours: 1 h, method: solvent wipe}
  coat: {kind: coat, at: pier/hinge, hours: 1 h, coats: top}
  lift: {kind: lift, at: pier/hinge, hours: 1 h}
  fit: {kind: fit-up, at: pier/hinge, hours: 1 h}
  test: {kind: test, at: pier/hinge, hours: 1 h, by: ultrasonic}
  move: {kind: move, at: pier/hinge, hours: 1 h}
  sign: {kind: sign-off, at: pier/hinge, hours: 1 h}
  plain: {at: pier/hinge, hours: 1 h}`

// The tables of R6, R12, R13 and R14, kind by kind.
func TestEveryKindStopsPausesAndFillsItsWorkface(t *testing.T) {
	w := likely(t, kindTasks)
	keys := strings.Split("weld / weld, flame / cut, disc / cut, saw / cut, blast / surface prep, wipe / surface prep, coat / coat 1, lift / lift, fit / fit-up, test / test, move / move, sign / sign-off, plain / plain", ", ")
	for i, want := range []struct {
		oneGo, meals, lone, noisy bool
		states                    string
		watch                     int
	}{
		{false, true, true, false, "hot work, people", 60},
		{false, true, true, false, "hot work, people", 60},
		{false, true, true, true, "hot work, people", 60},
		{false, true, false, true, "people", 0},
		{false, true, false, true, "grit, people", 0},
		{false, true, false, false, "people", 0},
		{true, false, false, false, "people, wet film, soft film, solvent", 0},
		{true, false, true, false, "load overhead", 0},
		{false, true, false, false, "people", 0},
		{true, true, false, false, "people", 0},
		{true, false, false, false, "people", 0},
		{true, false, false, false, "people", 0},
		{false, true, false, false, "people", 0},
	} {
		s := w.step(t, keys[i])
		same(t, s.Key()+": in one go, over meals, not alone, noisy, states, watch", []any{s.InOneGo, s.OverMeals, s.Lone, s.Noisy, states(s), s.Watch},
			[]any{want.oneGo, want.meals, want.lone, want.noisy, want.states, want.watch})
	}
}

func TestTheFileOverrulesTheKind(t *testing.T) {
	w := likely(t, `tasks:
  weld: {kind: weld, at: pier/hinge, hours: 4 h, in one go: yes, may pause over meals: no, hot work: no, noisy: yes}
  plain: {at: pier/hinge, hours: 4 h, hot work: yes, alone: yes, states: [grit, solvent], may change hands: yes, fire watch: 30 min, needs light: yes}
  stop: {at: pier/hinge, hours: 4 h, set-up: 21 min, may stop: {not before: 70 min, least piece: 35 min}}
  short: {at: pier/hinge, hours: 7 min, may stop: {not before: 70 min, least piece: 35 min}}`,
		"places: {shop: {open: always}, pier: {open: always, at: [57 N, 7 W], workfaces: {hinge: {}}}}")
	weld, plain := w.step(t, "weld / weld"), w.step(t, "plain / plain")
	same(t, "weld", []any{weld.InOneGo, weld.OverMeals, weld.Hot, weld.Noisy, weld.Watch, weld.Lone, states(weld)}, []any{true, false, false, true, 0, false, "people"})
	same(t, "plain", []any{plain.Hot, plain.Lone, plain.ChangeHands, plain.Watch, plain.Light, states(plain)}, []any{true, false, true, 30, true, "hot work, people, grit, solvent"})
	stop, short := w.step(t, "stop / plain"), w.step(t, "short / plain")
	same(t, "stops in working minutes: 21, 70 and 35 over 0.7", []int{stop.SetUp, stop.SafeStop, stop.LeastPiece}, []int{30, 100, 50})
	same(t, "no stop is asked to come after the end", []int{short.Working, short.SafeStop, short.LeastPiece}, []int{10, 10, 10})
}

// R13: by default 60 min at the window's place and none elsewhere; the place and the task may say otherwise.
func TestFireWatch(t *testing.T) {
	for _, tc := range []struct {
		what, shop, pier, task string
		watch                  int
	}{
		{"on site", "", "", "at: pier", 60},
		{"in the shop", "", "", "at: shop", 0},
		{"a designated hot-work area on site", "", ", fire watch: 0 min", "at: pier", 0},
		{"a shop that is none", ", fire watch: 45 min", "", "at: shop", 45},
		{"the task says so", "", "", "at: shop, fire watch: 90 min", 90},
		{"the task says none", "", "", "at: pier, fire watch: 0 min", 0},
	} {
		w := likely(t, "places: {shop: {open: always"+tc.shop+"}, pier: {open: always"+tc.pier+"}}", "tasks: {cut: {kind: cut, hours: 1 h, "+tc.task+", people: 1}}")
		s := w.Steps[0]
		want := "anybody x1"
		room := 1
		if tc.watch > 0 {
			want, room = "anybody x1, fire watch x1 (watch)", 2
		}
		same(t, tc.what, []any{s.Watch, people(s.Needs), s.Room, s.Watcher != nil}, []any{tc.watch, want, room, tc.watch > 0})
		for _, st := range s.States {
			if from := w.Window.Opens; tc.watch > 0 && (st.Tail == nil || int(st.Tail(from)-from) != tc.watch) {
				t.Errorf("%s: %s does not last until the watch ends", tc.what, st.Name)
			} else if tc.watch == 0 && st.Tail != nil {
				t.Errorf("%s: %s lasts on without a watch", tc.what, st.Name)
			}
		}
	}
}

func TestWorkThatIsNotDoneAlone(t *testing.T) {
	for _, tc := range []struct {
		face string
		lone bool
	}{
		{"", false}, {"closed space: yes", true}, {"over water: yes", true}, {"between tides: yes, reach: [day 1 09:00-12:00]", true}, {"daylight: yes", false},
	} {
		places := "places: {shop: {open: always}, pier: {open: always, at: [57 N, 7 W], workfaces: {hinge: {" + tc.face + "}}}}"
		for task, want := range map[string]bool{"hours: 1 h": tc.lone, "hours: 1 h, alone: yes": false, "hours: 1 h, alone: no": tc.lone,
			"standing: 1 h, keeps: {fire watch: 1}": tc.lone} {
			if s := likely(t, places, "tasks: {it: {at: pier/hinge, "+task+"}}").Steps[0]; s.Lone != want {
				t.Errorf("%s at a workface {%s}: may not be alone is %v", task, tc.face, s.Lone)
			}
		}
	}
}

func TestWhoIsNeeded(t *testing.T) {
	for _, tc := range []struct{ what, task, want string }{
		{"anybody does plain work", "hours: 1 h", "anybody x1"},
		{"so many of anybody", "hours: 1 h, people: 3", "anybody x3"},
		{"nobody", "hours: 1 h, people: 0", "anybody x1"},
		{"those named", "hours: 1 h, who: [Ines, Tom]", "Ines x1, Tom x1"},
		{"those named and one more", "hours: 1 h, who: [Ines, Tom], kind: fit-up", "Ines x1, Tom x1"},
		{"one named to fit, and a second of anybody", "hours: 1 h, who: Ines, kind: fit-up", "Ines x1, anybody x1"},
		{"by ticket, in the order written", "hours: 1 h, needs: {painter: 1, fitter: 1}", "painter x1, fitter x1"},
		{"one of two", "hours: 1 h, needs: {Ines or Tom: 1}", "Ines or Tom x1"},
		{"tickets and those named", "hours: 1 h, needs: {painter: 1}, who: [Ines]", "painter x1, Ines x1"},
		{"fitters fit where there are any", "hours: 1 h, kind: fit-up", "fitter x1, anybody x1"},
		{"painters paint where there are any", "hours: 1 h, kind: coat, coats: top", "painter x1"},
		{"nobody has an NDT ticket here", "hours: 1 h, kind: test, by: ultrasonic", "anybody x1"},
		{"looking needs no ticket", "hours: 1 h, kind: test, by: visual", "anybody x1"},
		{"a lift has its slinger", "hours: 1 h, kind: lift", "slinger/signaller x1, anybody x1"},
		{"by hand it has none", "mass: 40 kg, kind: lift, by: hands", "anybody x2"},
	} {
		s := likely(t, "tasks: {it: {at: shop, "+tc.task+"}}").Steps[0]
		same(t, tc.what, people(s.Needs), tc.want)
		n := 0
		for _, need := range s.Needs {
			n += need.Count
		}
		if s.Room != n {
			t.Errorf("%s: takes room for %d", tc.what, s.Room)
		}
	}
}

func TestOneWelderHoldsTheTicketsOfAllSeams(t *testing.T) {
	seams := "joints: [{fillet: {leg: 6 mm}, length: 1 m, position: PF, procedure: flux}, {single V: {thickness: 12 mm}, length: 1 m, position: PA, procedure: flux}]"
	crew := "people: {Ines: {tickets: [{weld: 136}, fire watch]}, Una: {tickets: [{weld: 136}]}}"
	for _, tc := range []struct {
		what, task, want string
	}{
		{"one welder", "", "weld 136 PF fillet x1"},
		{"two welders", ", people: 2", "weld 136 PF fillet x2"},
		{"the welder named", ", who: Una", "Una x1"},
		{"both named", ", who: [Ines, Una]", "Ines or Una x2"},
		{"one named, and one more", ", who: Una, people: 2", "Una x1, weld 136 PF fillet x1"},
		{"tickets given in place", ", needs: {fire watch: 1}", "fire watch x1 (watch)"},
	} {
		s := likely(t, crew, "procedures: {flux: {process: 136}}", "tasks: {it: {kind: weld, at: shop, "+seams+tc.task+"}}").Steps[0]
		same(t, tc.what, people(s.Needs), tc.want)
		if n := s.Needs[0]; tc.task == "" && (len(n.Also) != 1 || n.Also[0].String() != "weld 136 PA butt" || n.Also[0].ThickFrom != 12) {
			t.Errorf("%s: %v, and also %v", tc.what, n.Ticket, n.Also)
		}
	}
}

func TestKitItsPowerAndWhatStays(t *testing.T) {
	kit := `kit:
  set: {count: 2, draws: 9 kVA, stays: yes}
  lamp: {draws: 0.5 kVA}
  gauge: {}
  bench: {at: shop}`
	procedures := "procedures: {own: {process: 136, kit: set}}"
	joints := "joints: [{fillet: {leg: 6 mm}, length: 1 m, procedure: own}]"
	for _, tc := range []struct {
		what, task string
		want       string
		power      float64
	}{
		{"what the task uses", "hours: 1 h, kit: {set: 2, lamp: 1}", "2 set stays, 1 lamp", 18.5},
		{"what draws nothing", "hours: 1 h, kit: gauge", "1 gauge", 0},
		{"at its own place", "hours: 1 h, kit: bench", "1 bench", 0},
		{"the set of the procedure", "kind: weld, " + joints, "1 set stays", 9},
		{"a set for each welder", "kind: weld, people: 2, " + joints, "2 set stays", 18},
		{"named twice, used once", "kind: weld, kit: set, " + joints, "1 set stays", 9},
	} {
		s := likely(t, kit, procedures, "people: {Ines: {tickets: [weld 136]}, Una: {tickets: [weld 136]}}", "tasks: {it: {at: shop, "+tc.task+"}}").Steps[0]
		got := ""
		for i, u := range s.Kit {
			if i > 0 {
				got += ", "
			}
			got += string(rune('0'+u.Count)) + " " + u.Kit.Name
			if u.Stays {
				got += " stays"
			}
		}
		same(t, tc.what, []any{got, s.Power}, []any{tc.want, tc.power})
	}
}

func TestPermitsAreWantedByWhatTheyAreFor(t *testing.T) {
	places := `places:
  shop: {open: always}
  pier:
    open: always
    permits:
      hot work: {valid: daily 08:00-16:00}
      water: {for: over water, valid: daily 08:00-16:00}
      lifts: {for: lift, valid: daily 08:00-16:00}
      dusty: {for: grit, valid: daily 08:00-16:00}
      tank: {for: closed space, valid: daily 08:00-16:00}
      tidal: {for: between tides, valid: daily 08:00-16:00}
    workfaces: {hinge: {over water: yes}, tank: {closed space: yes}, sill: {between tides: yes, reach: [day 1 09:00-12:00]}}`
	for task, want := range map[string]string{
		"hours: 1 h, at: pier":                                          "[]",
		"hours: 1 h, at: pier, kind: cut":                               "[hot work]",
		"hours: 1 h, at: pier, kind: lift":                              "[lifts]",
		"hours: 1 h, at: pier, kind: surface prep":                      "[dusty]",
		"hours: 1 h, at: pier/hinge, hot work: yes":                     "[hot work water]",
		"hours: 1 h, at: pier/tank":                                     "[tank]",
		"hours: 1 h, at: pier/sill":                                     "[tidal]",
		"hours: 1 h, at: shop, kind: cut":                               "[]",
		"hours: 1 h, at: pier/hinge, kind: surface prep, hot work: yes": "[hot work water dusty]",
	} {
		same(t, task, likely(t, places, "tasks: {it: {"+task+"}}").Steps[0].Wants, want)
	}
}

func TestWhatIsWorkedOnAndMoved(t *testing.T) {
	w := likely(t, "assemblies: {frame: {mass: 100 kg, parts: {base: {plate: [1 m, 1 m, 10 mm]}}}, mast: {mass: 80 kg}}", `tasks:
  weld: {kind: weld, at: shop, hours: 1 h, part: [frame/base, mast]}
  blast: {kind: surface prep, at: shop, hours: 1 h, surface: frame/base}
  load: {kind: lift, at: shop, hours: 1 h, lifts: frame}
  shift: {kind: move, at: shop, hours: 1 h, lifts: frame/base}`)
	for i, want := range []string{"[frame mast] ", "[frame] ", "[] frame", "[] frame"} {
		s := w.Steps[i]
		same(t, s.Key(), []any{s.Works, s.Moves}, "["+want+"]")
	}
	if len(tasks.Kinds()) != len(kindRules) {
		t.Error("a kind has no rule for closing time")
	}
}
