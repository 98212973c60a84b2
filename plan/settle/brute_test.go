package settle

import (
	"context"
	"fmt"
	"testing"

	"sailby/plan"
	"sailby/plan/check"
	"sailby/tasks/expand"

	"pgregory.net/rapid"
)

// askTicks is the work of the search that tests of small jobs allow: a tenth of the default.
const askTicks = 25_000

// finishStep is the step in which site finishes are told apart, minutes (R19).
const finishStep = 15

// settled asks the likely basis of a small job.
func settled(t rapid.TB, s *small) *plan.Answer {
	job, ok := s.read(t)
	if !ok {
		t.Skip("the job has a fault")
	}
	rep, err := Ask(context.Background(), job, Options{Only: true, Ticks: askTicks})
	if err != nil {
		t.Fatalf("%v\n%s", err, s.yaml())
	}
	return rep.Likely
}

// tally counts what came of a run of small jobs.
type tally struct {
	t                           *testing.T
	fits, none, skipped         int
	missed, later, proved, best int
}

func (n *tally) String() string {
	return fmt.Sprintf("%d fit, %d cannot, %d have too much to try; not settled %d, not the best %d; proved that they cannot %d, that it is the best %d",
		n.fits, n.none, n.skipped, n.missed, n.later, n.proved, n.best)
}

// TestLattice tries out every start on the half hour and all people of small jobs in which every
// time is a half hour, so that the optimum lies on it or just before: the plan found is the best there is, no
// bound passes it, and "cannot fit" is never said of a job that can.
func TestLattice(t *testing.T) {
	checks(t, 60)
	n := &tally{t: t}
	rapid.Check(t, func(rt *rapid.T) {
		s := drawSmall(rt, 30, 6)
		a := settled(rt, s)
		b := newBrute(a.Work, 30, 30)
		best, p := b.optimum()
		if b.nodes > mostNodes {
			n.skipped++
			return
		}
		compare(rt, s, a, p, int(best-a.Work.Span.From), n)
		if p == nil && a.Verdict == plan.Fits {
			rt.Fatalf("a plan was found where trying everything finds none (%s):%s\n%s", b.differs(a.Plan), show(a.Work, a.Plan), s.yaml())
		}
		if p != nil && a.Verdict == plan.Fits && a.Finish <= best-30 { // off the lattice less is possible: a start just after a meal
			rt.Fatalf("finishes %d min before the best that trying everything finds:%v\nand not%v\n%s", best-a.Finish, show(a.Work, a.Plan), show(a.Work, p), s.yaml())
		}
	})
	t.Log(n)
	if n.missed > 0 || n.later > 0 {
		t.Errorf("of %d jobs that fit %d were not settled, and %d have an earlier finish than was found", n.fits, n.missed, n.later)
	}
}

// TestOffLattice does the same for jobs in which lengths are any minutes: what is found is no
// worse than the best with starts on the half hour.
func TestOffLattice(t *testing.T) {
	checks(t, 40)
	n := &tally{t: t}
	rapid.Check(t, func(rt *rapid.T) {
		s := drawSmall(rt, 10, 6)
		a := settled(rt, s)
		b := newBrute(a.Work, 30, 10)
		best, p := b.optimum()
		if b.nodes > mostNodes {
			n.skipped++
			return
		}
		compare(rt, s, a, p, int(best-a.Work.Span.From), n)
	})
	t.Log(n)
	if n.missed > 0 || n.later > 0 {
		t.Errorf("of %d jobs that fit %d were not settled, and %d have an earlier finish than was found", n.fits, n.missed, n.later)
	}
}

// compare holds an answer against the best plan of the lattice.
func compare(t rapid.TB, s *small, a *plan.Answer, p *plan.Plan, best int, n *tally) {
	if a.Best {
		n.best++
	}
	if p == nil {
		n.none++
		if a.Verdict == plan.CannotFit {
			n.proved++
		}
		return
	}
	n.fits++
	if br := check.Plan(a.Work, p); len(br) > 0 {
		t.Fatalf("the checker refuses a plan made from its own answers: %v\n%s", br, s.yaml())
	}
	if a.Verdict == plan.CannotFit {
		t.Fatalf("cannot fit: %s\nbut it can: %v\n%s", a.Proof.Summary, show(a.Work, p), s.yaml())
	}
	if bound := int(a.Bound - a.Work.Span.From); bound > best {
		t.Fatalf("bound %d min after what is possible (%s): %v\n%s", bound-best, a.BoundWhy, show(a.Work, p), s.yaml())
	}
	if a.Verdict != plan.Fits {
		n.missed++
		n.t.Logf("not settled, but it fits: %v\n%s", show(a.Work, p), s.yaml())
	} else if finish := int(a.Finish - a.Work.Span.From); finish >= best+finishStep {
		n.later++
		n.t.Logf("found:%v\n%d min earlier is%v\n%s", show(a.Work, a.Plan), finish-best, show(a.Work, p), s.yaml())
	}
}

// show writes a plan for a message.
func show(w *expand.Work, p *plan.Plan) string {
	out := ""
	for _, s := range p.Steps {
		out += "\n  " + s.Task + " / " + s.Step + ": " + s.Start.In(w.Window.Place.Zone).Format("02 15:04") + " to " + s.Finish.In(w.Window.Place.Zone).Format("02 15:04")
		for _, n := range s.People {
			out += " " + n
		}
		if len(s.Relief) > 0 {
			out += " / "
		}
		for _, n := range s.Relief {
			out += " " + n
		}
		for _, x := range s.Watches {
			out += " (watch " + x.Person + ")"
		}
	}
	return out
}
