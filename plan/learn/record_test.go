package learn

import (
	"bytes"
	"math/rand/v2"
	"testing"

	"sailby/plan/problem"
	"sailby/plan/proof"
)

// replayed has a search write its log and the log replayed: what has been shown must be what the
// search says.
func replayed(t *testing.T, name string, p *problem.Problem, solve func(*problem.Problem, Options) Result, o Options) (Result, proof.Result) {
	t.Helper()
	var log bytes.Buffer
	o.Log = &log
	r := solve(p, o)
	if r.LogErr != nil {
		t.Fatalf("%s: %v", name, r.LogErr)
	}
	got, err := proof.Replay(p, bytes.NewReader(log.Bytes()))
	if err != nil {
		if len(log.String()) < 20000 {
			t.Logf("%s", log.String())
		}
		t.Fatalf("%s: %v", name, err)
	}
	want := r.Bound
	if r.Status == Infeasible && o.Best == 0 {
		want = problem.Inf
	}
	if got.Finish < want {
		t.Fatalf("%s: shown that nothing finishes before %d, the search says %d", name, got.Finish, want)
	}
	return r, got
}

func TestRandomRefutationsReplay(t *testing.T) {
	r := rand.New(rand.NewPCG(21, 4))
	var none, best, lemmas int
	for round := 0; round < 1500; round++ {
		p := randomProblem(r, round%3 > 0)
		if round%2 == 0 {
			crowd(r, p)
		}
		res, got := replayed(t, "relaxed problem", p, Relax, Options{})
		if _, named := replayed(t, "problem", p, Solve, Options{}); named.Finish < got.Finish {
			t.Fatalf("problem %d: with people named nothing finishes before %d is shown, without %d", round, named.Finish, got.Finish)
		}
		switch res.Status {
		case Infeasible:
			none++
		case Optimal:
			best++
		}
		lemmas += got.Lemmas
	}
	t.Logf("%d without a plan, %d bounds, %d lemmas", none, best, lemmas)
}

// TestOpenRefutationsReplay has longer searches: many conflicts, many pairs forced by lags and by each other.
func TestOpenRefutationsReplay(t *testing.T) {
	r := rand.New(rand.NewPCG(31, 7))
	forced, conflicts := 0, int64(0)
	for round := range 36 {
		p := randomOpen(r, 14+r.IntN(12), round%3 > 0)
		if round%2 == 0 { // everything takes most of something
			for i := range p.Acts {
				p.Acts[i].Uses = []problem.Use{{Res: round % 4 / 2, Amount: 2 + r.IntN(2)}}
			}
		}
		res, _ := replayed(t, "instance", p, Solve, Options{Ticks: 200_000})
		conflicts += res.Conflicts
		if m, ok := build(p, relaxed); ok {
			for k, q := range m.forced {
				if longest(len(m.start), m.hops(0), q.a, q.b) == nil || k > 0 && sum(longest(len(m.start), m.hops(k), q.a, q.b)) > sum(longest(len(m.start), m.hops(0), q.a, q.b)) {
					forced++
				}
			}
		}
	}
	if forced < 3 || conflicts < 5000 {
		t.Errorf("%d pairs forced by forced pairs, %d conflicts: too few to tell", forced, conflicts)
	}
}

func sum(path []hop) int32 {
	n := int32(0)
	for _, h := range path {
		n += h.w
	}
	return n
}
