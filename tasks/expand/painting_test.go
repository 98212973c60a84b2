package expand

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"sailby/tasks"
	"sailby/tasks/origin"
	"sailby/tasks/site"
)

func TestAStripeIsACoatOfItsOwnWithItsWait(t *testing.T) {
	w := likely(t, "tasks: {paint: {kind: coat, at: shop, area: 4 m2, stripe: 12 m, coats: [primer, primer]}, next: {at: shop, hours: 1 h, after: {paint: applied}}}")
	same(t, "steps", w.keys(), "paint / stripe, paint / stripe touch dry, paint / coat 1, paint / dry 1, paint / coat 2, next / plain")
	stripe, full := w.step(t, "paint / stripe"), w.step(t, "paint / coat 1")
	// 12 m at 60 m/h are 12 min, half of a brush's 20 min of setting up and cleaning (house judgement, by hand), and
	// the mix stands 15 min
	same(t, "minutes of the stripe", stripe.HandsOn, 37)
	same(t, "states of a stripe", states(stripe), "people, wet film, soft film, solvent")
	same(t, "the full coat waits until it is touch dry", w.linksOf(full), "paint / stripe touch dry finish -> start")
	if want := 1 / between(360, 180); math.Abs(w.step(t, "paint / stripe touch dry").Rate(0)-want) > 1e-12 {
		t.Error("the stripe dries by the paint's touch dry")
	}
	same(t, "what follows follows the last coat", w.linksOf(w.step(t, "next / plain")), "paint / coat 2 finish -> start")
}

func TestStripsAlongSeamsStayBareAndArePatched(t *testing.T) {
	area := func(task string) float64 {
		w := likely(t, "tasks: {it: {at: shop, "+task+"}}")
		for _, f := range w.Steps[0].Estimate.Facts {
			if f.Name == "area" {
				return f.Value
			}
		}
		t.Fatalf("%s: no area", task)
		return 0
	}
	whole := area("kind: coat, surface: frame, coats: primer")
	for _, c := range []struct {
		what, task string
		want       float64
	}{
		{"10 m of seam, 50 mm to each side", "kind: coat, surface: frame, coats: primer, leave bare: 10 m", whole - 1},
		{"an area that is given is what is painted", "kind: coat, area: 4 m2, coats: primer, leave bare: 10 m", 4},
		{"the patch of 10 m", "kind: coat, patch: 10 m, coats: primer", 1},
		{"its preparation", "kind: surface prep, patch: 10 m, grade: St 3", 1},
	} {
		if got := area(c.task); math.Abs(got-c.want) > 1e-9 {
			t.Errorf("%s: %.3f m2, want %.3f", c.what, got, c.want)
		}
	}
	// taping both sides of 10 m at 40 m/h takes half an hour (house judgement, by hand)
	minutes := func(more string) int {
		return likely(t, "tasks: {it: {at: shop, kind: coat, area: 4 m2, coats: primer"+more+"}}").Steps[0].HandsOn
	}
	if got := minutes(", leave bare: 10 m") - minutes(""); got != 30 {
		t.Errorf("taping takes %d min, want 30", got)
	}
	refused(t, "are more than its surface", "tasks: {it: {at: shop, kind: coat, surface: frame, coats: primer, leave bare: 900 m}}")
}

// The first mix stands before it is used: that is planned, whoever shares the rest of the work; it is no part of hours that
// the file gives, nor of a paint of one part.
func TestTheFirstMixStands(t *testing.T) {
	minutes := func(paint, more string) int {
		w := likely(t, "paints: {own: {kind: "+paint+"}}", "tasks: {it: {at: shop, kind: coat, area: 6 m2, coats: own"+more+"}}")
		return w.step(t, "it / coat 1").HandsOn
	}
	for _, c := range []struct {
		what, paint, more string
		want              int
	}{
		{"one painter", "two-pack epoxy", "", 40},
		{"two painters", "two-pack epoxy", ", people: 2", 40},
		{"hours given", "two-pack epoxy", ", hours: 3 h", 0},
		{"one part", "alkyd", "", 0},
	} {
		if got := minutes(c.paint+", induction: 40 min", c.more) - minutes(c.paint+", induction: 0 min", c.more); got != c.want {
			t.Errorf("%s: standing takes %d min of the plan, want %d", c.what, got, c.want)
		}
	}
	w := likely(t, "paints: {own: {kind: two-pack epoxy, induction: 40 min}}", "tasks: {it: {at: shop, kind: coat, area: 6 m2, coats: own}}")
	found := false
	w.Steps[0].Estimate.Figure.Walk(func(f origin.Figure, _ int) {
		found = found || f.Name == "induction" && f.Value == 40 && f.Origin.File == "job.yaml"
	})
	if !found {
		t.Errorf("why does not tell where the standing comes from: %+v", w.Steps[0].Estimate.Figure)
	}
}

// Two coats of 15 m2 at 75 um and 60 % with an eighth lost take 2.143 L each: by themselves a tin of 5 L each, in all
// 4.29 L out of one tin (by hand).
func TestTinsArePickedForTheSum(t *testing.T) {
	const paint = "paints: {own: {kind: two-pack epoxy, dft: 75 um, volume solids: 60 %, packs: [5 L]}, enamel: {kind: alkyd}}"
	w := likely(t, paint, "tasks: {a: {at: shop, kind: coat, area: 15 m2, coats: own}, b: {at: shop, kind: coat, area: 15 m2, coats: own, after: a}, c: {at: shop, kind: coat, area: 2 m2, coats: enamel}}")
	const want = "open 1 of 5 L of own for all 2 coats of it, 4.29 L in all; a part-used tin of base or hardener is closed and kept, a mix is not"
	for _, key := range []string{"a / coat 1", "b / coat 1"} {
		if notes := strings.Join(w.step(t, key).Estimate.Notes, "|"); !strings.Contains(notes, want) {
			t.Errorf("%s: no %q in %q", key, want, notes)
		}
	}
	// 2 m2 at 50 um and 45 %: 0.254 L
	if notes := strings.Join(w.step(t, "c / coat 1").Estimate.Notes, "|"); !strings.Contains(notes, "open 1 of 1 L of enamel") || strings.Contains(notes, "for all") {
		t.Errorf("one coat: %q", notes)
	}
}

func TestPreparationHoldsForSoLong(t *testing.T) {
	links := func(text string) string {
		w := likely(t, "tasks: {"+text+"}")
		return w.linksOf(w.step(t, "paint / coat 1"))
	}
	for _, c := range []struct{ what, tasks, want string }{
		{"at home a shift", "grind: {kind: surface prep, at: shop, area: 2 m2, grade: St 3}, paint: {kind: coat, at: shop, area: 2 m2, coats: primer, after: grind}",
			"grind / surface prep finish -> start; grind / surface prep finish -> start max 480"},
		{"on site four hours (UFGS-09971 3.7.2.6)", "grind: {kind: surface prep, at: pier, area: 2 m2, grade: St 3}, paint: {kind: coat, at: pier, area: 2 m2, coats: primer, after: grind}",
			"grind / surface prep finish -> start; grind / surface prep finish -> start max 240"},
		{"as the task says", "grind: {kind: surface prep, at: pier, area: 2 m2, grade: St 3, holds: 26 h}, paint: {kind: coat, at: pier, area: 2 m2, coats: primer, after: grind}",
			"grind / surface prep finish -> start; grind / surface prep finish -> start max 1560"},
		{"as the link says", "grind: {kind: surface prep, at: pier, area: 2 m2, grade: St 3}, paint: {kind: coat, at: pier, area: 2 m2, coats: primer, after: {grind: {max: 26 h}}}",
			"grind / surface prep finish -> start max 1560"},
		{"through a wipe, which holds nothing and dries first", "grind: {kind: surface prep, at: pier, area: 2 m2, grade: St 3}, wipe: {kind: surface prep, at: pier, area: 2 m2, method: solvent wipe, after: grind}, paint: {kind: coat, at: pier, area: 2 m2, coats: primer, after: wipe}",
			"grind / surface prep finish -> start max 240; wipe / drying finish -> start"},
		{"through a look at it", "grind: {kind: surface prep, at: pier, area: 2 m2, grade: St 3}, look: {kind: sign-off, at: pier, after: grind}, paint: {kind: coat, at: pier, area: 2 m2, coats: primer, after: look}",
			"grind / surface prep finish -> start max 240; look / sign-off finish -> start"},
		{"not of another surface", "grind: {kind: surface prep, at: shop, surface: frame/base, grade: St 3}, paint: {kind: coat, at: shop, surface: frame/posts, coats: primer, after: grind}",
			"grind / surface prep finish -> start"},
	} {
		same(t, c.what, links(c.tasks), c.want)
	}
	for _, c := range []struct {
		what, more string
		oneGo      bool
		noted      bool
	}{
		{"short enough: not left half done", "hours: 2 h", true, false},
		{"longer than four hours over the face factor", "hours: 3 h", false, true},
		{"its author lets it stop", "hours: 2 h, in one go: no", false, false},
	} {
		w := likely(t, "tasks: {grind: {kind: surface prep, at: pier, area: 2 m2, grade: St 3, "+c.more+"}, paint: {kind: coat, at: pier, area: 2 m2, coats: primer, after: grind}}")
		s := w.step(t, "grind / surface prep")
		if s.InOneGo != c.oneGo || strings.Contains(strings.Join(s.Estimate.Notes, " "), "takes longer than it holds") != c.noted {
			t.Errorf("%s: in one go %v, notes %q", c.what, s.InOneGo, s.Estimate.Notes)
		}
	}
	w := likely(t, "tasks: {wash: {kind: surface prep, at: pier, area: 2 m2, method: wash}, own: {kind: surface prep, at: pier, area: 2 m2, method: wash, standing: 30 min, why: dries}}")
	same(t, "a wash dries two hours, or as the file says", w.keys(), "wash / surface prep, wash / drying, own / surface prep, own / dries")
	same(t, "minutes", []int{w.Steps[1].Clock, w.Steps[3].Clock}, []int{120, 30})
}

func TestAMissedLongestWaitHasItsRescue(t *testing.T) {
	w := likely(t, "tasks: {paint: {kind: coat, at: shop, area: 4 m2, coats: [primer, top]}}")
	why := ""
	for _, l := range w.Links {
		if l.Max < NoMax && l.Max > 0 {
			why = l.Why
		}
	}
	same(t, "the link names it (tack coat over epoxy: UFGS-09971)", why, "longest recoat of primer (missed: tack coat)")
	if notes := strings.Join(w.Steps[0].Estimate.Notes, "\n"); strings.Count(notes, "if the longest wait to the next coat is missed: tack coat") != 1 {
		t.Errorf("the coat notes it once: %s", notes)
	}
}

// A longest wait that is mended does not hold; what mends it is a step before the coat that would come too late.
func TestMendedWait(t *testing.T) {
	with := func(tasksText, paint string, rescue ...string) *Work {
		w, faults := Expand(read(t, "tasks: {"+tasksText+"}", paint), Basis{Rescue: rescue})
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		return w
	}
	const epoxy = "paints: {p: {kind: two-pack epoxy, induction: 0 min, next coat: {p: {10 C: {min: 8 h, max: 2 d}}}}}"
	const enamel = "paints: {p: {kind: alkyd, next coat: {p: {10 C: {min: 8 h, max: 2 d}}}}}"
	const two = "it: {kind: coat, at: shop, area: 8 m2, coats: [p, p]}"
	w := with(two, epoxy, "it / coat 2")
	same(t, "steps", w.keys(), "it / coat 1, it / dry 1, it / tack coat before coat 2, it / coat 2")
	tack := w.step(t, "it / tack coat before coat 2")
	same(t, "it comes after the least wait", w.linksOf(tack), "it / dry 1 finish -> start")
	// 92.99 min by hand (testdata/jobs/corners/missed-recoat.yaml), 20 of tools, 10 of mixing
	same(t, "minutes", tack.HandsOn, 123)
	same(t, "states", states(tack), "people, wet film, soft film, solvent")
	if tack.Paint == nil || !tack.Mends || !tack.InOneGo || tack.Estimate.Consumables[0].What != "paint p" {
		t.Errorf("the tack coat is no coat: %+v", tack)
	}
	waits := ""
	for _, l := range w.Links {
		if l.To.Key() == "it / coat 2" {
			ends := map[tasks.LinkEnd]string{tasks.Start: "start", tasks.Finish: "finish"}
			waits += fmt.Sprintf("%s %s->%s %d..%d; ", l.From.Name, ends[l.FromEnd], ends[l.ToEnd], l.Min, l.Max)
		}
	}
	// the longest wait of 2 d at 10 °C is 2 d / root of 2 at the shop's 15 °C
	same(t, "the coat after it", waits, fmt.Sprintf("tack coat before coat 2 finish->start 240..%d; tack coat before coat 2 start->start %d..2036; tack coat before coat 2 finish->finish %d..2036; ", NoMax, NoMin, NoMin))

	w = with(two, enamel, "it / coat 2")
	abraded := w.step(t, "it / abrade and wipe before coat 2")
	// 8 m2 at 5 and 12 m2/h, halved on sections: (192 + 80)/2 min
	same(t, "minutes of abrading", abraded.HandsOn, 136)
	same(t, "states of abrading", states(abraded), "people, grit")
	if abraded.Paint != nil || abraded.InOneGo || !abraded.OverMeals || !abraded.Mends {
		t.Errorf("abrading: %+v", abraded)
	}
	damp := w.NatureIn(abraded, w.Span)
	same(t, "no weather, nothing closed", len(damp), 0)

	w = with("first: {kind: coat, at: shop, area: 8 m2, coats: p}, look: {at: shop, hours: 1 h}, next: {kind: coat, at: shop, area: 8 m2, stripe: 3 m, coats: p, after: [first, look]}", epoxy, "next / coat 1")
	same(t, "before the stripe", strings.Contains(w.keys(), "next / tack coat before stripe, next / stripe, next / stripe touch dry, next / coat 1"), true)
	same(t, "it waits for what the task waits for", w.linksOf(w.step(t, "next / tack coat before stripe")), "first / recoat finish -> start; look / plain finish -> start")

	w = with(strings.Replace(two, "area", "rescue: no, area", 1), epoxy, "it / coat 2")
	same(t, "not wanted", w.keys()+fmt.Sprint(len(w.Rescues)), "it / coat 1, it / dry 1, it / coat 20")
	plain, loose := with(two, epoxy), func() *Work {
		w, _ := Expand(read(t, "tasks: {"+two+"}", epoxy), Basis{Unbound: true})
		return w
	}()
	same(t, "longest waits that hold, and that do not", fmt.Sprint(len(plain.Links)-len(loose.Links), len(plain.Rescues), len(loose.Rescues)), "2 1 1")
}

// Abrading is closed in damp air, a tack coat as any coat is.
func TestMendingWaitsForWeather(t *testing.T) {
	for _, kind := range []string{"alkyd", "two-pack epoxy"} {
		job := read(t, "tasks: {it: {kind: coat, at: pier/hinge, area: 8 m2, coats: [p, p]}}", "paints: {p: {kind: "+kind+", next coat: {p: {10 C: {min: 8 h, max: 2 d}}}}}")
		b := Basis{Rescue: []string{"it / coat 2"}}
		w, faults := Expand(job, b)
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		job.Places[1].Climate = &tasks.Climate{Hourly: weatherOf(w.Span, func(h int) site.Weather {
			x := fine()
			if h%48 == 0 {
				x.Steel = 7
			}
			return x
		})}
		w, _ = Expand(job, b)
		for _, s := range w.Steps {
			if s.Mends && len(w.Nature(s)) == 0 {
				t.Errorf("%s: %s is done in damp air", kind, s.Name)
			}
		}
	}
}

func TestMixesAreNoted(t *testing.T) {
	w := likely(t, "tasks: {paint: {kind: coat, at: shop, area: 60 m2, shape: flat, method: brush, coats: quick}}",
		"paints: {quick: {kind: two-pack epoxy, pot life: {10 C: 2 h, 20 C: 1 h}, induction: 10 min, packs: [5 L], mix: \"4:1\"}}")
	notes := strings.Join(w.Steps[0].Estimate.Notes, "\n")
	for _, want := range []string{" mixes of ", "of mixing at 15 °C", "L hardener", "stands 10 min before use", "of 5 L of quick"} {
		if !strings.Contains(notes, want) {
			t.Errorf("no %q in\n%s", want, notes)
		}
	}
}

const hotOnFrame = "weld: {kind: weld, at: shop, hours: 1 h, part: frame/base"

func TestHotWorkComesBeforePaint(t *testing.T) {
	paint := "paint: {kind: coat, at: shop, surface: frame, coats: primer"
	w := likely(t, "tasks: {"+hotOnFrame+"}, "+paint+"}}")
	if len(w.Orders) != 1 || w.Orders[0].Choices[0].First[0].Key() != "weld / weld" || w.Orders[0].Choices[0].Then[0].Key() != "paint / coat 1" {
		t.Errorf("orders %+v", w.Orders)
	}
	for _, c := range []struct{ what, tasks string }{
		{"links say so already", hotOnFrame + "}, " + paint + ", after: weld}"},
		{"other parts", strings.Replace(hotOnFrame, "base", "posts", 1) + "}, " + strings.Replace(paint, "frame", "frame/base", 1) + "}"},
		{"strips are bare", hotOnFrame + ", after: paint}, " + paint + ", leave bare: 1 m}"},
		{"the paint comes off first", hotOnFrame + ", paint off first: yes, after: paint}, " + paint + "}"},
		{"cold work", "weld: {kind: fit-up, at: shop, hours: 1 h, part: frame/base, after: paint}, " + paint + "}"},
	} {
		if w := likely(t, "tasks: {"+c.tasks+"}"); len(w.Orders) != 0 {
			t.Errorf("%s: orders %+v", c.what, w.Orders)
		}
	}
	behind := "paint: {kind: coat, at: shop, area: 4 m2, coats: primer, behind: frame}"
	if w := likely(t, "tasks: {"+hotOnFrame+"}, "+behind+"}"); len(w.Orders) != 1 || len(w.Orders[0].Choices) != 1 || w.Orders[0].Choices[0].First[0].Task.Name != "weld" {
		t.Errorf("behind the coat: orders %+v", w.Orders)
	}
	if w := likely(t, "tasks: {"+hotOnFrame+", paint off first: yes, after: paint}, "+behind+"}"); len(w.Orders) != 0 {
		t.Errorf("behind the coat, paint taken off first: orders %+v", w.Orders)
	}
	refused(t, `hot work behind what "paint" has coated`, "tasks: {"+hotOnFrame+", after: paint}, "+strings.Replace(behind, "behind", "leave bare: 1 m, behind", 1)+"}")
	refused(t, `hot work on what "paint" has coated`, "tasks: {"+hotOnFrame+", after: paint}, "+paint+"}}")
}

func TestGasIsTestedWhereThereIsPaint(t *testing.T) {
	places := "places: {shop: {open: always}, pier: {open: always, face factor: 0.5, workfaces: {hold: {closed space: yes, next to: deck}, deck: {}, bow: {}}}}"
	people := "people: {Ines: {tickets: [{weld: all}]}, Tom: {tickets: [fitter, fire watch, gas tester]}, Ann: {tickets: [painter]}}"
	at := func(face, more string) *Step {
		w := likely(t, "tasks: {burn: {kind: weld, at: pier/hold, hours: 1 h, needs: {weld: 1}"+more+"}, paint: {kind: coat, at: pier/"+face+", area: 2 m2, coats: primer}}", places, people)
		return w.step(t, "burn / weld")
	}
	tested, none := at("deck", ""), at("bow", "")
	same(t, "15 min over the face factor at every start", tested.SetUp-none.SetUp, 30)
	tester := func(s *Step) (n int) {
		for _, need := range s.Needs {
			for _, a := range append([]tasks.Ticket{need.Ticket}, need.Also...) {
				if a.Name == GasTester {
					n++
				}
			}
		}
		return n
	}
	same(t, "by the fire watch", []int{tester(tested), len(tested.Needs) - len(none.Needs), tester(none)}, []int{1, 0, 0})
	alone := at("hold", ", fire watch: 0 min")
	same(t, "by one more where there is no watch", []int{tester(alone), len(alone.Needs)}, []int{1, 2})
	refused(t, "wants a gas test, and nobody has the ticket", "tasks: {burn: {kind: weld, at: pier/hold, hours: 1 h, needs: {weld: 1}}, paint: {kind: coat, at: pier/hold, area: 2 m2, coats: primer}}", places)
	w := likely(t, "tasks: {burn: {kind: weld, at: pier/hold, hours: 1 h, needs: {weld: 1}}, paint: {kind: coat, at: pier/hold, area: 2 m2, coats: primer, after: burn}}", places)
	same(t, "not where links put the paint after it", tester(w.step(t, "burn / weld")), 0)
}
