package settle

import (
	"context"
	"errors"
	"fmt"
	"reflect"
	"testing"

	"sailby/plan"
	"sailby/plan/check"

	"pgregory.net/rapid"
)

// drawLaw makes a small job for a law; jobs with a fault are left out.
func drawLaw(t *rapid.T) *small {
	return drawSmall(t, rapid.SampledFrom([]int{10, 30}).Draw(t, "grain"), 6)
}

// TestWeekLater: all dates a week later, in a zone without a change of clocks, move the plan and
// all that is said of it by a week.
func TestWeekLater(t *testing.T) {
	checks(t, 25)
	rapid.Check(t, func(rt *rapid.T) {
		s := drawLaw(rt)
		s.zones = [2]string{"Africa/Abidjan", "Africa/Abidjan"}
		a := settled(rt, s)
		s.monday = s.monday.AddDate(0, 0, 7)
		b := settled(rt, s)
		const week = 7 * 1440
		if a.Verdict != b.Verdict || a.Late != b.Late || a.Best != b.Best || a.Proof == nil && a.Bound+week != b.Bound || a.InHand != b.InHand {
			rt.Fatalf("%v, bound %d, in hand %d; a week later %v, bound %d, in hand %d\n%s", a.Verdict, a.Bound, a.InHand, b.Verdict, b.Bound-week, b.InHand, s.yaml())
		}
		if a.Plan == nil {
			return
		}
		for i := range a.Plan.Steps {
			x, y := a.Plan.Steps[i], b.Plan.Steps[i]
			if x.Start+week != y.Start || x.Finish+week != y.Finish || !reflect.DeepEqual(x.People, y.People) || a.Rows[i].Leeway != b.Rows[i].Leeway {
				rt.Fatalf("%s / %s differs a week later:%s\n%s\n%s", x.Task, x.Step, show(a.Work, a.Plan), show(b.Work, b.Plan), s.yaml())
			}
		}
	})
}

// TestOneMoreLink: a link more never makes a job that cannot fit fit, nor brings the best finish forward.
func TestOneMoreLink(t *testing.T) {
	checks(t, 40)
	rapid.Check(t, func(rt *rapid.T) {
		s := drawLaw(rt)
		a := settled(rt, s)
		j := rapid.IntRange(1, len(s.tasks)-1).Draw(rt, "later")
		i := rapid.IntRange(0, j-1).Draw(rt, "earlier")
		name := s.tasks[i].name
		for key, list := range s.tasks[j].links {
			for _, l := range list {
				if len(l) > len(name) && l[:len(name)+1] == name+":" && key == "after" {
					rt.Skip("linked already")
				}
			}
		}
		s.tasks[j].links["after"] = append(s.tasks[j].links["after"], fmt.Sprintf("%s: {min: %d min}", name, 30*rapid.IntRange(0, 4).Draw(rt, "min")))
		b := settled(rt, s)
		switch {
		case a.Verdict == plan.CannotFit && b.Verdict == plan.Fits:
			rt.Fatalf("cannot fit, but with a link more it does:%s\n%s", show(b.Work, b.Plan), s.yaml())
		case a.Best && b.Verdict == plan.Fits && b.Finish < a.Finish:
			rt.Fatalf("%d min is called the best finish, and with a link more it is %d earlier\n%s", a.Finish, a.Finish-b.Finish, s.yaml())
		}
	})
}

// TestTwiceThePeople: with a second of everybody no bound is later than the finish that the first
// ones reach, and what fits is not proved impossible.
func TestTwiceThePeople(t *testing.T) {
	checks(t, 30)
	rapid.Check(t, func(rt *rapid.T) {
		s := drawLaw(rt)
		a := settled(rt, s)
		for i, n := range s.names {
			s.names = append(s.names, n+" two")
			s.people = append(s.people, s.people[i])
		}
		b := settled(rt, s)
		if a.Verdict != plan.Fits {
			return
		}
		if b.Verdict == plan.CannotFit {
			rt.Fatalf("fits, and with a second of everybody it cannot: %s\n%s", b.Proof.Summary, s.yaml())
		}
		if b.Bound > a.Finish {
			rt.Fatalf("finishes %d min before what is called possible with a second of everybody (%s)\n%s", b.Bound-a.Finish, b.BoundWhy, s.yaml())
		}
	})
}

// TestBoundAndPlan: no plan ends before its bound, every plan passes the checker, and "best" is
// said where the two meet and nowhere else.
func TestBoundAndPlan(t *testing.T) {
	checks(t, 60)
	rapid.Check(t, func(rt *rapid.T) {
		s := drawLaw(rt)
		a := settled(rt, s)
		if a.Plan == nil {
			return
		}
		if a.Verdict == plan.Fits && (a.Bound > a.Finish || a.Best != (a.Bound == a.Finish)) {
			rt.Fatalf("bound %d, finish %d, best %v\n%s", a.Bound, a.Finish, a.Best, s.yaml())
		}
		if br := check.Plan(a.Work, a.Plan); (len(br) > 0) != a.Late || a.Late != (a.Verdict != plan.Fits) {
			rt.Fatalf("%v, late %v, and the checker says %v\n%s", a.Verdict, a.Late, br, s.yaml())
		}
		if a.InHand != int(a.Work.Window.Closes-a.Finish) {
			rt.Fatalf("in hand %d, closes %d, finish %d", a.InHand, a.Work.Window.Closes, a.Finish)
		}
	})
}

// TestEqualAnswers: the same job, seed and ticks give the same answer, to the last field.
func TestEqualAnswers(t *testing.T) {
	checks(t, 15)
	rapid.Check(t, func(rt *rapid.T) {
		s := drawLaw(rt)
		a, b := settled(rt, s), settled(rt, s)
		a.Work, b.Work = nil, nil
		for i := range a.Deadlines {
			a.Deadlines[i].Step, a.Deadlines[i].Task, b.Deadlines[i].Step, b.Deadlines[i].Task = nil, nil, nil, nil
		}
		for _, p := range []*plan.Proof{a.Proof, b.Proof} {
			for i := 0; p != nil && i < len(p.Lines); i++ { // each points into its own work
				p.Lines[i].Limit = plan.Limit{Kind: p.Lines[i].Limit.Kind}
			}
		}
		if !reflect.DeepEqual(a, b) {
			rt.Fatalf("asked twice:\n%+v\n%+v\n%s", a, b, s.yaml())
		}
	})
}

// TestCancelled: a cancelled question gets what there is, marked as cut short, and never a proof
// or a "best" that a full answer does not have.
func TestCancelled(t *testing.T) {
	checks(t, 20)
	rapid.Check(t, func(rt *rapid.T) {
		s := drawLaw(rt)
		job, ok := s.read(rt)
		if !ok {
			return
		}
		ctx, cancel := context.WithCancel(context.Background())
		cancel()
		rep, err := Ask(ctx, job, Options{Only: true})
		if errors.Is(err, ErrStopped) {
			return
		}
		if err != nil {
			rt.Fatal(err)
		}
		a := rep.Likely
		if !a.CutShort && a.Verdict != plan.CannotFit && !a.Best {
			rt.Fatalf("cancelled, and not marked: %v\n%s", a.Verdict, s.yaml())
		}
		full := settled(rt, s)
		if a.Verdict == plan.CannotFit && full.Verdict == plan.Fits || a.Best && full.Verdict == plan.Fits && full.Finish < a.Finish {
			rt.Fatalf("cancelled: %v, best %v; in full: %v\n%s", a.Verdict, a.Best, full.Verdict, s.yaml())
		}
	})
}
