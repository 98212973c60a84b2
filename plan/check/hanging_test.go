package check

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// The checker plays what hangs together through in the order of the plan, the expansion works it out from what has
// been done: over random work that joins and takes off, in a settled order, both come to the same.
func TestHangingIsFoundTwice(t *testing.T) {
	things := []string{"gate", "gate/skin", "gate/brace", "gate/rail", "hook", "sole", "sole/pad", "sole/bolt"}
	rapid.Check(t, func(t *rapid.T) {
		thing := rapid.SampledFrom(things)
		n := rapid.IntRange(1, 6).Draw(t, "tasks")
		var list strings.Builder
		plan := "up " + fmt.Sprint(rapid.IntRange(0, 2*n).Draw(t, "lift at"))
		for i := range n {
			if rapid.Bool().Draw(t, "joins") {
				two := rapid.SliceOfNDistinct(thing, 2, 2, rapid.ID[string]).Draw(t, "things")
				fmt.Fprintf(&list, "  t%d: {kind: fit-up, at: dock, hours: 1 h, joins: [%s]", i, strings.Join(two, ", "))
			} else {
				fmt.Fprintf(&list, "  t%d: {kind: cut, at: dock, hours: 1 h, takes off: %s", i, thing.Draw(t, "off"))
			}
			if i > 0 {
				fmt.Fprintf(&list, ", after: t%d", i-1)
			}
			list.WriteString("}\n")
			plan += fmt.Sprintf(", t%d %d", i, 2*i+1)
		}
		text := `job: Lifts
zone: Europe/London
places: {yard: {open: always}, dock: {open: always, face factor: 1}}
window: {place: dock, opens: 2027-06-07 00:00, closes: 2027-06-08 00:00}
people: {Ada: {tickets: [slinger/signaller]}, Ben: {}}
kit: {chain hoist: {rated: 9 t}}
assemblies:
  gate: {parts: {skin: {item: 100 kg}, brace: {item: 50 kg}, rail: {item: 20 kg}}}
  hook: {mass: 5 kg}
  sole: {parts: {pad: {item: 10 kg}, bolt: {item: 1 kg}}}
tasks:
` + list.String() + "  up: {kind: lift, at: dock, hours: 1 h, by: chain hoist, lifts: " + thing.Draw(t, "lifts") + "}\n"
		job, err := jobfile.ReadBytes("job.yaml", []byte(text), nil)
		if err != nil {
			t.Fatalf("%v\n%s", err, text)
		}
		w, faults := expand.Expand(job, expand.Basis{})
		if len(faults) > 0 {
			t.Fatalf("%v\n%s", faults, text)
		}
		p := planAt(w, plan)
		c := &checker{w: w, plan: p}
		begun, done := map[string]bool{}, map[string]bool{}
		var lifts *row
		for i, s := range w.Steps {
			r := &row{s: s, p: p.Steps[i]}
			c.list = append(c.list, r)
			if s.Task.Name == "up" {
				lifts = r
			}
		}
		if lifts.s.Rigging == nil {
			return // all of it comes on later: nothing to lift
		}
		for _, r := range c.list {
			if r != lifts {
				begun[r.s.Task.Name] = r.p.Start < lifts.p.Finish
				done[r.s.Task.Name] = r.p.Finish <= lifts.p.Start
			}
		}
		for name, yes := range begun {
			if !yes {
				delete(begun, name)
			}
		}
		mine := c.hanging(lifts.s.Task, begun, done)
		theirs := lifts.s.Rigging.Pieces(lifts.s.Rigging.Among(func(u *tasks.Task) bool { return begun[u.Name] }, func(u *tasks.Task) bool { return done[u.Name] }))
		if !slices.Equal(mine, theirs) {
			t.Fatalf("%s\n%s\nthe checker: %v\nthe expansion: %v", text, plan, mine, theirs)
		}
	})
}
