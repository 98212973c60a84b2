package settle

import (
	"context"
	"testing"

	"sailby/plan"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/jobfile"

	"pgregory.net/rapid"
)

// tightest gives the least time in hand over the deadlines of a plan's steps other than the window's close; ok is
// false where there are none.
func tightest(a *plan.Answer) (hand hours.Minute, ok bool) {
	hand = hours.Far
	for i, s := range a.Work.Steps {
		if s.Deadline < hours.Far && s.Deadline != a.Work.Window.Closes {
			hand, ok = min(hand, s.Deadline-a.Plan.Steps[i].Finish), true
		}
	}
	return hand, ok
}

// TestMostInHand: where the time in hand is said to be the most, trying everything finds no plan that finishes as early with
// half an hour more at every deadline.
func TestMostInHand(t *testing.T) {
	checks(t, 60)
	said, tried := 0, 0
	rapid.Check(t, func(rt *rapid.T) {
		s := drawSmall(rt, 30, 6)
		a := settled(rt, s)
		if a.Verdict != plan.Fits {
			return
		}
		hand, ok := tightest(a)
		if !ok || !a.HandBest {
			return
		}
		said++
		for _, st := range a.Work.Steps {
			if st.Deadline < hours.Far && st.Deadline != a.Work.Window.Closes {
				st.Deadline -= hand + 30
			}
		}
		b := newBrute(a.Work, 30, 30)
		best, p := b.optimum()
		if b.nodes > mostNodes {
			return
		}
		tried++
		if p != nil && best <= a.Finish {
			rt.Fatalf("%d min in hand is said to be the most with a finish at %d; there is a plan with 30 more:%v\n%s", hand, a.Finish, show(a.Work, p), s.yaml())
		}
	})
	t.Logf("said %d times, tried %d", said, tried)
	if tried == 0 && !testing.Short() {
		t.Error("it was never tried")
	}
}

// TestSecondAim: of two tasks of one person that the finish does not tell apart the one with the deadline goes first, and
// that is shown to be the most: 2 h of work from 8:00 are done at 10:00, 5 h before 15:00.
func TestSecondAim(t *testing.T) {
	job, err := jobfile.ReadBytes("job.yaml", []byte(`
job: second
zone: UTC
places: {quay: {open: [daily 08:00-18:00], face factor: 1}}
window: {place: quay, opens: 2027-04-05 08:00, closes: 2027-04-05 18:00}
people: {Ann: {}, Bob: {}}
tasks:
  a: {at: quay, hours: 3 h, who: Ann}
  b: {at: quay, hours: 3 h, who: Ann}
  c: {at: quay, hours: 2 h, who: Ann, must be done by: 2027-04-05 15:00}
`), nil)
	if err != nil {
		t.Fatal(err)
	}
	rep, err := Ask(context.Background(), job, Options{Only: true, Ticks: 1000})
	if err != nil {
		t.Fatal(err)
	}
	a := rep.Likely
	hand, _ := tightest(a)
	if !a.Best || !a.HandBest || hand != 300 {
		t.Errorf("best %v, most in hand %v, %d min in hand; want 300, and both shown", a.Best, a.HandBest, hand)
	}
	w, _ := expand.Expand(job, expand.Basis{})
	if finish := a.Finish - w.Window.Opens; finish != 480 {
		t.Errorf("the finish is %d min after the opening, want 480: the first aim is not traded", finish)
	}
}
