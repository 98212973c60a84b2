package expand

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks"
)

// A gate whose skin weighs 157 kg (2 x 1 x 0.01 m x 7850 kg/m3, arithmetic) and whose braces come onto it.
const gateParts = `assemblies:
  gate:
    parts:
      skin: {plate: [2 m, 1 m, 10 mm]}
      brace: {plate: [2 m, 1 m, 5 mm]}
      rail: {plate: [2 m, 1 m, 2.5 mm]}
  hook: {mass: 40 kg, known: weighed}
  plain: {mass: 200 kg, parts: {one: {plate: [1 m, 1 m, 10 mm]}, two: {plate: [1 m, 1 m, 5 mm]}}}`

func onHook(kg float64) float64 { return kg * 1.10 * 1.1 } // drawn, starting and stopping

func madeOrders(w *Work) []string {
	var out []string
	for _, o := range w.Orders {
		if o.Made {
			out = append(out, o.Text)
		}
	}
	return out
}

// What hangs together when which tasks have joined, and what it weighs.
func TestStages(t *testing.T) {
	w := likely(t, gateParts, "kit: {chain hoist: {rated: 1 t}}", `tasks:
  brace on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [gate, gate/brace]}
  hook on: {kind: weld, at: pier/hinge, hours: 1 h, joins: [gate/brace, hook]}
  tack: {kind: fit-up, at: pier/deck, hours: 1 h, part: [plain/one, plain/two]}
  lift gate: {kind: lift, at: pier/hinge, lifts: gate, by: chain hoist}
  lift one: {kind: lift, at: pier/deck, lifts: plain/one, by: chain hoist}
  lift plain: {kind: lift, at: pier/deck, lifts: plain, by: chain hoist}
  lift brace: {kind: lift, at: pier/deck, lifts: gate/brace, by: chain hoist}`)
	for _, tc := range []struct {
		lift, joined, pieces string
		kg                   float64
	}{
		{"lift gate", "", "gate/skin gate/rail", 157 + 39.25},
		{"lift gate", "brace on", "gate/skin gate/brace gate/rail", 157 + 78.5 + 39.25},
		{"lift gate", "hook on", "gate/skin gate/rail", 157 + 39.25}, // the hook hangs on a brace that is not on
		{"lift gate", "brace on, hook on", "gate/skin gate/brace gate/rail hook", 157 + 78.5 + 39.25 + 40},
		{"lift brace", "hook on", "gate/brace hook", 78.5 + 40},
		{"lift brace", "", "gate/brace", 78.5},
		{"lift one", "", "plain/one", 78.5},
		{"lift one", "tack", "plain/one plain/two", 200}, // all of it: its stated mass
		{"lift plain", "", "plain/one plain/two", 200},
		{"lift plain", "tack, brace on", "plain/one plain/two", 200},
	} {
		r := w.step(t, tc.lift+" / lift").Rigging
		j, err := r.Judge(r.Among(both(func(u *tasks.Task) bool { return strings.Contains(tc.joined, u.Name) })))
		if err != nil {
			t.Fatal(err)
		}
		same(t, tc.lift+" with "+tc.joined, strings.Join(j.Pieces, " "), tc.pieces)
		if math.Abs(j.Load.Mass-tc.kg) > 1e-6 {
			t.Errorf("%s with %q weighs %v kg, by hand %v", tc.lift, tc.joined, j.Load.Mass, tc.kg)
		}
	}
}

// The order that the hoist allows becomes a rule, and only where it is open and decides.
func TestTheHoistSettlesTheOrder(t *testing.T) {
	const on = "  brace on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [gate, gate/brace]}\n"
	for _, tc := range []struct {
		name, rated, tasks, want string
	}{
		{"too heavy with it", "300 kg", on + "  up: {kind: lift, at: pier/hinge, lifts: gate, by: chain hoist}", "up before brace on: with that on, the chain hoist: 332.4 kg exceeds 300 kg (WLL of the chain hoist)"},
		{"carries both", "400 kg", on + "  up: {kind: lift, at: pier/hinge, lifts: gate, by: chain hoist}", ""},
		{"order is settled", "300 kg", on + "  up: {kind: lift, at: pier/hinge, lifts: gate, by: chain hoist, finish after: brace on}\n  end: {at: pier, hours: 1 h}", "up before brace on: with that on, the chain hoist: 332.4 kg exceeds 300 kg (WLL of the chain hoist)"},
		{"too floppy without it", "400 kg", on + "  up: {kind: lift, at: pier/hinge, lifts: gate, by: chain hoist, stiff with: gate/brace}", "brace on before up: too floppy without gate/brace"},
		{"does not happen", "300 kg", strings.Replace(on, "hours: 1 h", "hours: 1 h, chance: 20 %", 1) + "  up: {kind: lift, at: pier/hinge, lifts: gate, by: chain hoist}", ""},
		{"another thing", "300 kg", "  brace on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [hook, plain]}\n  up: {kind: lift, at: pier/hinge, lifts: gate, by: chain hoist, mass: 100 kg}", ""},
	} {
		w := likely(t, gateParts, "kit: {chain hoist: {rated: "+tc.rated+"}}", "tasks:\n"+tc.tasks)
		same(t, tc.name, strings.Join(madeOrders(w), "; "), tc.want)
	}
	if got := onHook(157 + 78.5 + 39.25); math.Abs(got-332.4) > 0.1 {
		t.Errorf("the sum by hand is %v", got)
	}
}

// Two of three may be on, not all: no set alone is too heavy.
func TestNotAllOfThem(t *testing.T) {
	w := likely(t, `assemblies: {a: {mass: 100 kg, known: weighed}, b: {mass: 100 kg, known: weighed}, c: {mass: 100 kg, known: weighed}}`,
		"kit: {chain hoist: {rated: 250 kg}}", `tasks:
  b on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [a, b]}
  c on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [a, c]}
  up: {kind: lift, at: pier/hinge, lifts: a, by: chain hoist}`)
	var made []Order
	for _, o := range w.Orders {
		if o.Made {
			made = append(made, o)
		}
	}
	if len(made) != 1 || len(made[0].Choices) != 2 || made[0].Choices[0].First[0].Task.Name != "up" {
		t.Fatalf("got %v, want one rule with two choices", madeOrders(w))
	}
}

// A lift that no order allows is a fault that names the number, the gear that would do, and what the job has.
func TestRefusedLifts(t *testing.T) {
	for _, tc := range []struct{ says, hint, kit, lift string }{
		{"332.4 kg exceeds 200 kg (WLL of the chain hoist)", "chain hoist of 500 kg; big one carries it", "{chain hoist: {rated: 200 kg}, big one: {kind: chain hoist, rated: 1 t}}", "by: chain hoist"},
		{"may carry)", "an anchor for", "{chain hoist: {rated: 350 kg, mass: 14 kg, hangs from: {beam: 340 kg}}}", "by: chain hoist"},
		{"too flat: 65 deg exceeds 60 deg", "longer slings", "{chain hoist: {rated: 1 t}}", "by: chain hoist, slings: {legs: 2, angle: 25 deg from horizontal, rated: 2 t}"},
		{"headroom", "less between lifting point and anchor", "{chain hoist: {rated: 1 t, closed height: 400 mm, hung at: 2.5 m}}", "by: chain hoist, height: 1.5 m, lifting point: 1 m"},
		{"side pull", "straight above", "{chain hoist: {rated: 1 t}}", "by: chain hoist, side pull: 10 deg"},
		{"floor may carry", "", "{chain hoist: {rated: 1 t}}", "by: chain hoist, lands on: 0.1 m2, floor: 5 kPa"},
		{"the crane: 332.4 kg exceeds 150 kg (chart at 6 m)", "within 4 m it lifts 400 kg", "", "by: loader crane, radius: 5 m"},
	} {
		sections := []string{gateParts, "tasks:\n  up: {kind: lift, at: pier/hinge, lifts: gate, " + tc.lift + "}"}
		if tc.kit != "" {
			sections = append(sections, "kit: "+tc.kit)
		} else {
			sections = append(sections, "hire: {loader crane: {at: pier, slots: [2027-04-06 08:00-12:00], chart: {4 m: 400 kg, 6 m: 150 kg}}}")
		}
		_, faults := Expand(read(t, sections...), Basis{})
		if len(faults) != 1 || !strings.Contains(faults[0].Text, tc.says) || !strings.Contains(faults[0].Hint, tc.hint) || faults[0].Pos.Line == 0 {
			t.Errorf("%s: got %v, want %q and %q", tc.lift, faults, tc.says, tc.hint)
		}
	}
}

// The file asks for both what makes it stiff and less weight: no order is allowed.
func TestTooHeavyOnceStiff(t *testing.T) {
	refused(t, "not allowed with brace on on, without which it is too floppy", gateParts, "kit: {chain hoist: {rated: 300 kg}}", `tasks:
  brace on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [gate, gate/brace]}
  up: {kind: lift, at: pier/hinge, lifts: gate, by: chain hoist, stiff with: gate/brace}`)
	refused(t, "no task joins it before", gateParts, "kit: {chain hoist: {rated: 300 kg}}", `tasks:
  up: {kind: lift, at: pier/hinge, lifts: gate, by: chain hoist}
  brace on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [gate, gate/brace], after: up}
  again: {kind: lift, at: pier/hinge, lifts: gate/skin, by: chain hoist, stiff with: hook}`)
}

// What is not known refuses nothing and is asked for.
func TestNotKnownIsAsked(t *testing.T) {
	w := likely(t, gateParts, "tasks: {up: {kind: lift, at: pier/hinge, lifts: gate, by: chain hoist}, by hand: {kind: lift, at: pier/deck, lifts: hook, by: hands}}")
	j, err := w.step(t, "up / lift").Rigging.Judge(nil)
	if err != nil || !j.OK || !strings.Contains(strings.Join(j.Ask, "; "), "rated for") || !strings.Contains(strings.Join(j.Ask, "; "), "slings") {
		t.Errorf("got %v %v %v", j.OK, j.Ask, err)
	}
	s := w.step(t, "by hand / lift")
	if j, err := s.Rigging.Judge(nil); err != nil || !j.OK || len(j.Checks) != 1 || j.Checks[0].Result.OK || !j.Checks[0].Filter {
		t.Errorf("lifting by hand is a filter, not a limit: %+v %v", j.Checks, err)
	}
	if len(w.Notes) == 0 || !strings.Contains(w.Notes[0].Text, "guideline") {
		t.Errorf("notes: %v", w.Notes)
	}
}

// A landed piece keeps its hoist until it is secured, standing time included; with two hoists the
// other one is free.
func TestGearIsKept(t *testing.T) {
	const list = `tasks:
  in: {kind: lift, at: pier/hinge, mass: 100 kg, by: chain hoist, hours: 1 h, secured by: resin}
  resin: {at: pier/hinge, hours: 1 h, standing: 3 h}
  other: {kind: lift, at: pier/deck, mass: 100 kg, by: chain hoist, hours: 1 h}
  third: {kind: lift, at: pier/deck, mass: 100 kg, by: chain hoist, hours: 1 h, after: resin}`
	w := likely(t, "kit: {chain hoist: {rated: 1 t}}", list)
	var kept []Order
	for _, o := range w.Orders {
		if o.Made {
			kept = append(kept, o)
		}
	}
	if len(kept) != 1 || len(kept[0].Choices) != 2 || kept[0].Choices[1].First[0].Class != Clock || kept[0].Choices[1].Then[0].Task.Name != "other" {
		t.Fatalf("got %v", madeOrders(w))
	}
	found := false
	for _, l := range w.Links {
		found = found || l.From != nil && l.From.Task.Name == "in" && l.To.Task.Name == "resin"
	}
	if !found {
		t.Error("it is not secured after the lift")
	}
	if w := likely(t, "kit: {chain hoist: {rated: 1 t, count: 2}}", list); len(madeOrders(w)) != 0 {
		t.Errorf("two hoists: %v", madeOrders(w))
	}
}

// A crew with a lift supervisor beside the slinger sends both; one person cannot be both.
func TestLiftSupervisor(t *testing.T) {
	const list = "tasks: {up: {kind: lift, at: pier/hinge, mass: 100 kg, by: chain hoist, hours: 1 h}}"
	w := likely(t, list, "people: {Tom: {tickets: [slinger/signaller]}, Ann: {tickets: [lift supervisor]}}")
	same(t, "two", people(w.step(t, "up / lift").Needs), "slinger/signaller x1, lift supervisor x1")
	w = likely(t, list, "people: {Tom: {tickets: [slinger/signaller, lift supervisor]}, Ann: {}}")
	if strings.Contains(people(w.step(t, "up / lift").Needs), "supervisor") {
		t.Error("one person is to be slinger and supervisor at once")
	}
}

// Mass never falls when more is joined.
func TestMoreJoinedIsNeverLighter(t *testing.T) {
	w := likely(t, gateParts, "kit: {chain hoist: {rated: 9 t}}", `tasks:
  a: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [gate, gate/brace]}
  b: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [gate/rail, hook]}
  c: {kind: weld, at: pier/hinge, hours: 1 h, joins: [plain/one, gate/brace]}
  d: {kind: weld, at: pier/hinge, hours: 1 h, joins: [plain/one, plain/two]}
  up: {kind: lift, at: pier/hinge, lifts: gate, by: chain hoist}`)
	r := w.step(t, "up / lift").Rigging
	rapid.Check(t, func(t *rapid.T) {
		few, more := map[string]bool{}, map[string]bool{}
		for _, j := range r.Joins {
			more[j.Task.Name] = rapid.Bool().Draw(t, "more "+j.Task.Name)
			few[j.Task.Name] = more[j.Task.Name] && rapid.Bool().Draw(t, "few "+j.Task.Name)
		}
		a, err1 := r.Judge(r.Among(both(func(u *tasks.Task) bool { return few[u.Name] })))
		b, err2 := r.Judge(r.Among(both(func(u *tasks.Task) bool { return more[u.Name] })))
		if err1 != nil || err2 != nil || a.Load.Mass > b.Load.Mass+1e-9 || len(a.Pieces) > len(b.Pieces) {
			t.Fatalf("%v kg of %v, then %v kg of %v", a.Load.Mass, a.Pieces, b.Load.Mass, b.Pieces)
		}
	})
}

// Work sent out is told with its snags; a site fit-up of home work that nothing has proved to fit is
// warned of, one with a template is not.
func TestSentOutAndTrialFit(t *testing.T) {
	notes := func(list string) string {
		var out []string
		for _, n := range likely(t, "tasks:\n"+list).Notes {
			out = append(out, n.Text)
		}
		return strings.Join(out, "\n")
	}
	const home = "  make: {kind: fit-up, at: shop, hours: 2 h, part: frame}\n"
	if s := notes(home + "  zinc: {at: shop, standing: 5 d, sent out: galvanizing, after: make}"); !strings.Contains(s, "zinc is sent out (galvanizing, 5 d from leaving to collection): vent and drain holes") {
		t.Errorf("sent out: %s", s)
	}
	const site = "  set: {kind: fit-up, at: pier/hinge, hours: 2 h, part: frame"
	for list, warned := range map[string]bool{home + site + "}": true, home + "  template: {at: shop, hours: 1 h}\n" + site + ", after: template}": false,
		home + "  look: {at: pier/hinge, hours: 1 h}\n" + site + ", fit proved by: look}": false, site + "}": false} {
		if got := strings.Contains(notes(list), "nothing before it has proved that it fits"); got != warned {
			t.Errorf("%s\nwarned %v, want %v", list, got, warned)
		}
	}
}

// both takes one condition for joining and for taking off.
func both(f func(*tasks.Task) bool) (begun, done func(*tasks.Task) bool) { return f, f }
