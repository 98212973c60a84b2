package learn

import (
	"math/rand/v2"
	"testing"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// What the fitter gives is a schedule; where there is one it mostly finds one, and better ones with the
// number of attempts.
func TestFitter(t *testing.T) {
	r := rand.New(rand.NewPCG(17, 5))
	possible, fitted, better := 0, 0, 0
	for round := 0; round < 120; round++ {
		p := randomOpen(r, 12, true)
		m, ok := build(p, named)
		if !ok {
			continue
		}
		s := &search{model: m}
		if !s.begin() {
			continue
		}
		f := newFitter(m, uint64(round))
		if f == nil {
			t.Fatal("no fitter for lags and resources")
		}
		best, first := far, far
		for k := 0; k < 10; k++ {
			x := f.attempt()
			if x == nil {
				continue
			}
			judge := &brute{p: p, start: ints(x.start), finish: make([]int, len(p.Acts)), mode: make([]int, len(p.Acts))}
			for i := range p.Acts {
				judge.finish[i] = judge.start[i] + int(m.length[i])
			}
			if !sound(judge) {
				t.Fatalf("round %d: %v breaks a rule", round, x.start)
			}
			if int(x.end) != judge.end(len(p.Acts)) {
				t.Fatalf("round %d: finish %d is said to be %d", round, judge.end(len(p.Acts)), x.end)
			}
			if k == 0 {
				first = x.end
			}
			best = min(best, x.end)
		}
		if res := Solve(p, Options{Ticks: 2_000_000}); res.Starts != nil {
			possible++
			if best < far {
				fitted++
			}
			if best < first {
				better++
			}
			if res.Status == Optimal && int(best) < res.Finish {
				t.Fatalf("round %d: a finish of %d, proved best is %d", round, best, res.Finish)
			}
		}
	}
	if possible < 40 || fitted*10 < possible*8 || better < 5 {
		t.Errorf("%d have schedules, %d found, %d made better by more attempts", possible, fitted, better)
	}
}

// A longest wait that the plain order cannot keep: B is urgent and takes the resource for 4; C must start
// within 1 of A, and needs it too. A has to be taken out, and comes later.
func TestFitterTakesOut(t *testing.T) {
	p := randomOpen(rand.New(rand.NewPCG(1, 1)), 3, false)
	p.Links = nil
	p.Res = p.Res[:1]
	p.Res[0].Capacity = 1
	for i, d := range []int{1, 4, 2} {
		a := &p.Acts[i]
		a.Modes[0].Time, a.Uses, a.By = problem.Fixed(d), nil, 30
		if i > 0 {
			a.Uses = []problem.Use{{Res: 0, Amount: 1}}
		}
	}
	p.End, p.Close = 30, 30
	lag := func(i, j, d int) problem.Link {
		return problem.Link{From: i, To: j, FromEnd: tasks.Start, ToEnd: tasks.Start, Min: d, Max: expand.NoMax}
	}
	p.Links = append(p.Links, lag(0, 2, 0), lag(2, 0, -1))
	m, ok := build(p, named)
	if !ok {
		t.Fatal("no model")
	}
	s := &search{model: m}
	if !s.begin() {
		t.Fatal("no way at all")
	}
	f := newFitter(m, 0)
	x := f.attempt()
	if x == nil || x.start[2]-x.start[0] > 1 || x.start[2] < x.start[0] {
		t.Fatalf("starts %v", x)
	}
	if x.start[1] < x.start[2]+2 && x.start[2] < x.start[1]+4 {
		t.Errorf("B and C at once: starts %v", x.start)
	}
}
