package learn

import (
	"fmt"
	"math/rand/v2"
	"reflect"
	"testing"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// randomOpen makes an open instance: fixed lengths, resources held throughout, lags between
// starts, with or without maximum ones.
func randomOpen(r *rand.Rand, n int, most bool) *problem.Problem {
	p := &problem.Problem{}
	for k := 0; k < 2; k++ {
		p.Res = append(p.Res, problem.Resource{Kind: problem.Plain, Capacity: 3 + r.IntN(3)})
	}
	for i := 0; i < n; i++ {
		a := problem.Act{Name: fmt.Sprint(i), Site: true, Modes: []problem.Mode{{Time: problem.Fixed(1 + r.IntN(5))}}}
		for k := range p.Res {
			if u := r.IntN(4); u > 0 {
				a.Uses = append(a.Uses, problem.Use{Res: k, Amount: u})
			}
		}
		p.Acts = append(p.Acts, a)
		p.End += a.Modes[0].Time.Length() + 2
	}
	for k := 0; k < n; k++ {
		i, j := r.IntN(n), r.IntN(n)
		if i >= j {
			continue
		}
		d := p.Acts[i].Modes[0].Time.Length()
		p.Links = append(p.Links, problem.Link{From: i, To: j, FromEnd: tasks.Start, ToEnd: tasks.Start, Min: d, Max: expand.NoMax})
		if most && r.IntN(3) == 0 {
			p.Links = append(p.Links, problem.Link{From: j, To: i, FromEnd: tasks.Start, ToEnd: tasks.Start, Min: -d - r.IntN(4), Max: expand.NoMax})
		}
	}
	p.Close = p.End
	for i := range p.Acts {
		p.Acts[i].By = p.End
	}
	return p
}

func TestOpenInstancesAgainstBruteForce(t *testing.T) {
	r := rand.New(rand.NewPCG(2, 2))
	none := 0
	for k := 0; k < 250; k++ {
		p := randomOpen(r, 4+r.IntN(3), k%2 == 0)
		p.End = min(p.End, 18)
		p.Close = p.End
		for i := range p.Acts {
			p.Acts[i].By = p.End
		}
		got, want := Solve(p, Options{}), bruteFinish(p)
		if got.Finish != want || (got.Status == Optimal) != (want < problem.Inf) {
			t.Fatalf("instance %d: finish %d with status %d, brute force says %d", k, got.Finish, got.Status, want)
		}
		if want == problem.Inf {
			none++
			continue
		}
		if low := Within(p, want-1, Options{}); low.Status != Infeasible {
			t.Errorf("instance %d: a finish of %d is not refuted", k, want-1)
		}
		if at := Within(p, want, Options{}); at.Status != Feasible && at.Status != Optimal {
			t.Errorf("instance %d: a finish of %d is not reached: status %d", k, want, at.Status)
		}
	}
	if none == 0 || none > 200 {
		t.Errorf("%d of 250 instances have no plan: the test is one-sided", none)
	}
}

// Equal limits give equal answers, and a longer search never a worse one.
func TestSameAgain(t *testing.T) {
	r := rand.New(rand.NewPCG(6, 6))
	for k := 0; k < 10; k++ {
		p := randomOpen(r, 25, k%2 == 0)
		last := problem.Inf
		for _, ticks := range []int64{20_000, 200_000, 1_000_000} {
			a, b := Solve(p, Options{Ticks: ticks, Seed: 4}), Solve(p, Options{Ticks: ticks, Seed: 4})
			if !reflect.DeepEqual(a, b) {
				t.Fatalf("instance %d: two searches with %d ticks differ", k, ticks)
			}
			if a.Finish > last {
				t.Errorf("instance %d: finish %d after %d ticks, %d after fewer", k, a.Finish, ticks, last)
			}
			if a.Bound > a.Finish {
				t.Errorf("instance %d: bound %d above finish %d", k, a.Bound, a.Finish)
			}
			last = a.Finish
		}
	}
}

// A search that is told to stop asks no further than it has to, and keeps what it has.
func TestStop(t *testing.T) {
	p := randomOpen(rand.New(rand.NewPCG(1, 5)), 60, false)
	asked := 0
	full := Solve(p, Options{Ticks: 3_000_000, Stop: func() bool { asked++; return false }})
	if asked == 0 && full.Status != Optimal {
		t.Fatal("nobody asked whether to stop")
	}
	calls := 0
	got := Solve(p, Options{Stop: func() bool { calls++; return calls >= 2 }})
	if calls > 2 {
		t.Errorf("asked %d times, but told to stop the second time", calls)
	}
	if calls == 2 && got.Ticks > 4*pollEvery {
		t.Errorf("%d ticks of work before it stopped", got.Ticks)
	}
}

// A hint and a known finish steer the search; they do not change what is true.
func TestKnownPlan(t *testing.T) {
	r := rand.New(rand.NewPCG(4, 4))
	for k := 0; k < 20; k++ {
		p := randomOpen(r, 8, k%2 == 0)
		best := Solve(p, Options{})
		if best.Status != Optimal {
			continue
		}
		hint := Solve(p, Options{Hint: best.Starts})
		if hint.Finish != best.Finish {
			t.Errorf("instance %d: finish %d with a hint, %d without", k, hint.Finish, best.Finish)
		}
		for _, odd := range []Options{{Hint: []int{1}}, {Hint: best.Starts, Modes: make([]int, 1)}, {Hint: best.Starts, Modes: []int{9, 9, 9, 9, 9, 9, 9, 9}},
			{Hint: best.Starts, Modes: best.Modes, Best: best.Finish + 1}} {
			if got := Solve(p, odd); got.Finish != best.Finish {
				t.Errorf("instance %d: finish %d with an odd hint, %d without", k, got.Finish, best.Finish)
			}
		}
		if none := Solve(p, Options{Best: best.Finish}); none.Status != Infeasible {
			t.Errorf("instance %d: better than %d should be refuted, have status %d", k, best.Finish, none.Status)
		}
		if again := Solve(p, Options{Best: best.Finish + 1}); again.Finish != best.Finish {
			t.Errorf("instance %d: finish %d, better than %d asked for", k, again.Finish, best.Finish+1)
		}
	}
}

// A problem that asks for the impossible is refused, not followed into a panic.
func TestOddProblems(t *testing.T) {
	w := problem.Fixed(5)
	one := problem.Act{Modes: []problem.Mode{{Time: w}}, By: problem.Inf}
	for name, p := range map[string]*problem.Problem{
		"no activities":  {End: 10},
		"no horizon":     {End: -1, Acts: []problem.Act{one}},
		"endless":        {End: problem.Inf, Acts: []problem.Act{one}},
		"too short":      {End: 3, Acts: []problem.Act{one}},
		"no mode":        {End: 10, Acts: []problem.Act{{By: 10}}},
		"too much":       {End: 10, Res: []problem.Resource{{Capacity: 1}}, Acts: []problem.Act{{Modes: one.Modes, By: 9, Uses: []problem.Use{{Amount: 2}}}}},
		"no order":       {End: 10, Acts: []problem.Act{one}, Orders: []problem.Order{{}}},
		"waits on waits": {End: 10, Acts: []problem.Act{one, one}, Links: []problem.Link{{From: 0, To: 1, Min: 1, Max: expand.NoMax}, {From: 1, To: 0, Min: 1, Max: expand.NoMax}}},
	} {
		want := Infeasible
		if name == "no activities" {
			want = Optimal
		}
		if got := Solve(p, Options{}); got.Status != want {
			t.Errorf("%s: status %d, want %d", name, got.Status, want)
		}
		if got := Relax(p, Options{}); got.Status != want {
			t.Errorf("%s, relaxed: status %d, want %d", name, got.Status, want)
		}
		Contradiction(p, 10, Options{})
		Within(p, 4, Options{})
	}
}
