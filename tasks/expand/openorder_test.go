package expand

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks"
)

// The rules forbid just the orders that are not allowed, and nothing can be left out of any of them.
func TestRulesForbidJustTheBadOrders(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 6).Draw(t, "open")
		tab := table{n: n, bad: rapid.SliceOfN(rapid.Bool(), 1<<n, 1<<n).Draw(t, "bad"), judged: make([]Judgement, 1<<n)}
		rules := tab.forbidden()
		hits := func(f forbidden, set int) bool {
			for _, i := range f.before {
				if set>>i&1 == 0 {
					return false
				}
			}
			for _, i := range f.after {
				if set>>i&1 == 1 {
					return false
				}
			}
			return true
		}
		for set, bad := range tab.bad {
			forbidden := false
			for _, f := range rules {
				forbidden = forbidden || hits(f, set)
			}
			if forbidden != bad {
				t.Fatalf("order %b: forbidden %v, not allowed %v", set, forbidden, bad)
			}
		}
		for _, f := range rules { // with one task left out it would forbid something that is allowed
			for k := range len(f.before) + len(f.after) {
				less := forbidden{before: append([]int(nil), f.before...), after: append([]int(nil), f.after...)}
				if k < len(f.before) {
					less.before = append(less.before[:k], less.before[k+1:]...)
				} else {
					k -= len(f.before)
					less.after = append(less.after[:k], less.after[k+1:]...)
				}
				needed := false
				for set, bad := range tab.bad {
					needed = needed || hits(less, set) && !bad
				}
				if !needed {
					t.Fatalf("%v is longer than it must be", f)
				}
			}
		}
	})
}

const beam = `assemblies:
  beam:
    parts:
      middle: {section: SHS 100x100x5, length: 4 m, at: [0, 0, 0]}
      left: {item: 200 kg, at: [0, 0, 0]}
      right: {item: 200 kg, at: [4 m, 0, 0]}
      post: {item: 300 kg, at: [2 m, 0, 0]}`

// With one end weight on, the centre of gravity is outside the lugs; with both or none it is between them. A weight
// more is then what makes the lift allowed.
func TestOneEndAlone(t *testing.T) {
	w := likely(t, beam, "kit: {chain hoist: {rated: 2 t}}", `tasks:
  left on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [beam, beam/left]}
  right on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [beam, beam/right]}
  post on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [beam, beam/post], after: up}
  up: {kind: lift, at: pier/hinge, lifts: beam, by: chain hoist, slings: {lugs: [[1.6 m, 0, 100 mm], [2.4 m, 0, 100 mm]], hook above: 1 m, rated: 5 t}}`)
	got := strings.Join(madeOrders(w), "\n")
	if len(madeOrders(w)) != 2 || !strings.Contains(got, "up before left on, or right on before that: else the centre of gravity is outside the lugs") ||
		!strings.Contains(got, "up before right on, or left on before that") {
		t.Errorf("got %s", got)
	}
	w = likely(t, beam, "kit: {chain hoist: {rated: 2 t}}", `tasks:
  left on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [beam, beam/left]}
  right on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [beam, beam/right]}
  post on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [beam, beam/post], after: up}
  up: {kind: lift, at: pier/hinge, lifts: beam, by: chain hoist, after: left on, slings: {lugs: [[1.6 m, 0, 100 mm], [2.4 m, 0, 100 mm]], hook above: 1 m, rated: 5 t}}`)
	if got := strings.Join(madeOrders(w), "\n"); !strings.Contains(got, "right on before up: without that, the centre of gravity is outside the lugs") {
		t.Errorf("left is on for sure: %q", got)
	}
}

// More open tasks than are tried are told of.
func TestMoreOpenThanAreTried(t *testing.T) {
	var parts, list strings.Builder
	for i := range 14 {
		name := string(rune('a' + i))
		parts.WriteString("\n      " + name + ": {item: 10 kg}")
		list.WriteString("\n  " + name + " on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [rack, rack/" + name + "]}")
	}
	w := likely(t, "assemblies:\n  rack:\n    parts:\n      base: {item: 100 kg}"+parts.String(), "kit: {chain hoist: {rated: 250 kg}}",
		"tasks:\n  up: {kind: lift, at: pier/hinge, lifts: rack, by: chain hoist}"+list.String())
	found := false
	for _, n := range w.Notes {
		found = found || strings.Contains(n.Text, "14 joining tasks may come before or after it; only the orders of the first 12 are tried")
	}
	if !found {
		t.Errorf("notes: %v", w.Notes)
	}
}

const crate = `assemblies:
  crate:
    parts:
      shell: {item: 100 kg, weight allowance: 1}
      lid: {item: 40 kg, weight allowance: 1}
      motor: {item: 60 kg, weight allowance: 1}
  hook: {mass: 10 kg, known: weighed}`

// What hangs together after things are taken off and put on again, and what each lift weighs.
func TestTakenOff(t *testing.T) {
	w := likely(t, crate, "kit: {chain hoist: {rated: 1 t}}", `tasks:
  hook on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [crate/lid, hook], after: lid off}
  lid off: {kind: plain, at: pier/hinge, hours: 1 h, takes off: crate/lid}
  lid on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [crate, crate/lid], after: lid off}
  motor out: {kind: cut, at: pier/hinge, hours: 1 h, takes off: crate/motor}
  lift crate: {kind: lift, at: pier/hinge, lifts: crate, by: chain hoist}
  lift lid: {kind: lift, at: pier/hinge, lifts: crate/lid, by: chain hoist}
  lift motor: {kind: lift, at: pier/hinge, lifts: crate/motor, by: chain hoist}
  lift shell: {kind: lift, at: pier/hinge, lifts: crate/shell, by: chain hoist}`)
	for _, tc := range []struct {
		lift, done string
		kg         float64
	}{
		{"lift crate", "", 200}, {"lift crate", "lid off", 160}, {"lift crate", "motor out", 140}, {"lift crate", "lid off, motor out", 100},
		{"lift crate", "lid off, lid on", 200}, {"lift crate", "lid off, hook on", 160}, {"lift crate", "lid off, hook on, lid on", 210},
		{"lift crate", "lid off, lid on, motor out", 140},
		{"lift lid", "", 200}, {"lift lid", "lid off", 40}, {"lift lid", "lid off, hook on", 50}, {"lift lid", "lid off, hook on, lid on, motor out", 150},
		{"lift motor", "lid off", 160}, {"lift motor", "motor out", 60},
		{"lift shell", "", 100}, // a part that nothing takes off is that part
	} {
		r := w.step(t, tc.lift+" / lift").Rigging
		j, err := r.Judge(r.Among(both(func(u *tasks.Task) bool { return strings.Contains(tc.done, u.Name) })))
		if err != nil || math.Abs(j.Load.Mass-tc.kg) > 1e-6 {
			t.Errorf("%s after %q weighs %v kg, by hand %v: %v %v", tc.lift, tc.done, j.Load.Mass, tc.kg, j.Pieces, err)
		}
	}
	refused(t, "nothing says which comes first", crate, "kit: {chain hoist: {rated: 1 t}}", `tasks:
  lid off: {kind: plain, at: pier/hinge, hours: 1 h, takes off: crate/lid}
  lid on: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [crate, crate/lid]}
  up: {kind: lift, at: pier/hinge, lifts: crate, by: chain hoist}`)
}

// The hoist carries it only with something off: the order follows, and so does a refusal where nothing helps.
func TestTakenOffBeforeTheLift(t *testing.T) {
	job := func(rated, rest string) []string {
		return []string{crate, "kit: {chain hoist: {rated: " + rated + "}}", `tasks:
  motor out: {kind: cut, at: pier/hinge, hours: 1 h, takes off: crate/motor}
  lid off: {kind: plain, at: pier/hinge, hours: 1 h, takes off: crate/lid}
  up: {kind: lift, at: pier/hinge, lifts: crate, by: chain hoist` + rest + "}"}
	}
	got := madeOrders(likely(t, job("160 kg", "")...)) // 140 x 1.1 is within 160, 160 x 1.1 is not
	if len(got) != 1 || !strings.Contains(got[0], "motor out before up: without that, the chain hoist: ") {
		t.Errorf("got %v", got)
	}
	if got := madeOrders(likely(t, job("240 kg", "")...)); len(got) != 0 {
		t.Errorf("carries all: %v", got)
	}
	got = madeOrders(likely(t, job("180 kg", "")...))
	if len(got) != 1 || !strings.Contains(got[0], "motor out or lid off before up") {
		t.Errorf("either would do: %v", got)
	}
	refused(t, "110 kg exceeds 100 kg", job("100 kg", "")...)
}

// What is cut apart at home travels in two pieces.
func TestCutApartTravelsInTwo(t *testing.T) {
	w := likely(t, crate, `tasks:
  apart: {kind: cut, at: shop, hours: 1 h, takes off: crate/motor}
  together: {kind: fit-up, at: pier/hinge, hours: 1 h, joins: [crate, crate/motor]}`)
	got := Travels(w, w.Job.Assemblies[0])
	if len(got) != 2 || math.Abs(got[0].Total.Mass-140) > 1e-6 || math.Abs(got[1].Total.Mass-60) > 1e-6 {
		t.Errorf("%+v", got)
	}
}
