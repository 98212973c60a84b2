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
