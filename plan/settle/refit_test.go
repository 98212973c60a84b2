package settle

import (
	"fmt"
	"math/rand/v2"
	"strings"
	"testing"

	"sailby/tasks"
	"sailby/tasks/jobfile"
)

// refit writes a job of so many tasks on a ship in dock: fit-ups, welds, cuts, coats and lifts at
// three workfaces, each after up to two of the dozen before it, for six people. Two coats have
// three steps, so that there are about a fifth more activities than tasks.
func refit(tasks int, seed uint64) string {
	rng := rand.New(rand.NewPCG(seed, 1))
	days := max(7, tasks/8)
	var b strings.Builder
	closes := 10 + days
	month := 5
	for _, n := range []int{31, 30, 31, 31, 30, 31, 30, 31} {
		if closes <= n {
			break
		}
		closes -= n
		month++
	}
	fmt.Fprintf(&b, `job: Refit of %d tasks
zone: Europe/London
places:
  yard: {open: [Mon-Fri 08:00-12:30 13:00-17:00]}
  dock:
    at: [55.7 N, 5.1 W]
    open: [Mon-Sat 07:00-12:30 13:00-19:00]
    opening up: 15 min
    clearing up: 15 min
    workfaces:
      bow: {people: 3, next to: [mid]}
      mid: {people: 3}
      stern: {people: 4}
window: {place: dock, opens: 2027-05-10 07:00, closes: 2027-%02d-%02d 19:00}
people:
  A: {tickets: [{weld: 136, positions: all, joints: [fillet, butt]}, fire watch]}
  B: {tickets: [{weld: 136, positions: all, joints: [fillet, butt]}, fire watch, fitter]}
  C: {tickets: [fitter, fire watch, painter, slinger/signaller]}
  D: {tickets: [fitter, fire watch, painter]}
  E: {tickets: [fitter, fire watch, slinger/signaller]}
  F: {tickets: [fitter, fire watch]}
kit:
  hoist: {count: 1, rated: 1 t}
  set: {count: 2, draws: 8 kVA}
  gen: {gives: 20 kVA}
paints:
  primer: {kind: two-pack epoxy, dft: 100 um}
tasks:
`, tasks, month, closes)
	kinds := []string{"fit-up", "fit-up", "fit-up", "fit-up", "weld", "weld", "weld", "weld", "plain", "plain", "plain", "plain", "coat", "lift", "cut", "cut"}
	for i := range tasks {
		kind := kinds[rng.IntN(len(kinds))]
		fmt.Fprintf(&b, "  t%d: {kind: %s, at: dock/%s", i, kind, []string{"bow", "mid", "stern"}[rng.IntN(3)])
		hours := []string{"1 h", "1 h 30 min", "2 h", "3 h", "4 h"}[rng.IntN(5)]
		switch kind {
		case "coat":
			b.WriteString(", area: 1 m2, coats: [primer, primer]")
		case "lift":
			b.WriteString(", mass: 300 kg, by: hoist")
		case "weld":
			fmt.Fprintf(&b, ", hours: %s, kit: {set: 1}, needs: {weld 136: 1}", hours)
		case "cut":
			fmt.Fprintf(&b, ", hours: %s, people: 1, by: disc", hours)
		default:
			fmt.Fprintf(&b, ", hours: %s, people: %d", hours, 1+rng.IntN(5)/3)
		}
		var after []string
		for range []int{0, 1, 1, 2}[rng.IntN(4)] {
			if j := max(0, i-12) + rng.IntN(12); j < i {
				after = append(after, fmt.Sprint("t", j))
			}
		}
		if len(after) == 2 && after[0] == after[1] {
			after = after[:1]
		}
		if after != nil {
			fmt.Fprintf(&b, ", after: [%s]", strings.Join(after, ", "))
		}
		b.WriteString("}\n")
	}
	return b.String()
}

// refitJob reads a refit.
func refitJob(t testing.TB, n int) *tasks.Job {
	job, err := jobfile.ReadBytes("refit.yaml", []byte(refit(n, 1)), nil)
	if err != nil {
		t.Fatal(err)
	}
	return job
}
