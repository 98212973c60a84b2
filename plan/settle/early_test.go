package settle

import (
	"context"
	"testing"

	"sailby/plan"
	"sailby/plan/check"
	"sailby/tasks/expand"

	"pgregory.net/rapid"
)

// TestEarlyPlans: what is told before the answer is whole is a checked plan, marked as cut short, never called the best, and
// never a verdict that the whole answer takes back.
func TestEarlyPlans(t *testing.T) {
	checks(t, 25)
	told := 0
	rapid.Check(t, func(rt *rapid.T) {
		s := drawLaw(rt)
		job, ok := s.read(rt)
		if !ok {
			return
		}
		var all []*plan.Answer
		o := Options{Only: true, Ticks: askTicks, early: func(a *plan.Answer) { all = append(all, a) }}
		whole, err := answer(context.Background(), job, expand.Basis{}, o, false)
		if err != nil {
			rt.Fatal(err)
		}
		for _, a := range all {
			told++
			if a.Plan == nil || !a.CutShort || a.Best || a.Rows == nil {
				rt.Fatalf("told of %+v\n%s", a, s.yaml())
			}
			if br := check.Plan(a.Work, a.Plan); len(br) > 0 && !a.Late {
				rt.Fatalf("told of a plan that the checker refuses: %v\n%s", br[0], s.yaml())
			}
			if a.Verdict == plan.Fits && whole.Verdict != plan.Fits || a.Verdict == plan.CannotFit && whole.Verdict == plan.Fits {
				rt.Fatalf("told %v, and %v in the end\n%s", a.Verdict, whole.Verdict, s.yaml())
			}
		}
		if whole.Plan != nil && len(all) == 0 && whole.Verdict == plan.Fits && whole.Steps > 0 {
			rt.Fatalf("there is a plan, and nothing was told of one\n%s", s.yaml())
		}
	})
	t.Logf("told %d times", told)
}

// TestCancelWithAPlan: a large job that is cancelled once there is a plan gives that plan.
func TestCancelWithAPlan(t *testing.T) {
	if testing.Short() {
		t.Skip("a large job")
	}
	job := refitJob(t, 400)
	ctx, cancel := context.WithCancel(context.Background())
	defer cancel()
	rep, err := Ask(ctx, job, Options{Only: true, Found: cancel})
	if err != nil || rep.Likely.Plan == nil || !rep.Likely.CutShort {
		t.Fatalf("%+v, %v: want a plan, marked as cut short", rep, err)
	}
}
