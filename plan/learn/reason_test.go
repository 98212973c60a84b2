package learn

import (
	"math/rand/v2"
	"testing"

	"sailby/plan/problem"
)

// holdsBehind says whether f follows from the facts behind it in the problem itself: in a fresh
// model with nothing learnt, these facts and the contrary of f lead to a contradiction without
// any search.
func holdsBehind(p *problem.Problem, k kind, f fact, behind []fact) bool {
	m, ok := build(p, k)
	if !ok || !m.settle() {
		return true
	}
	for _, g := range append(append([]fact(nil), behind...), f.not()) {
		if !m.raise(g.s, g.v, why{kind: whyRoot}) {
			return true
		}
	}
	return !m.settle()
}

// TestReasonsHold listens to every reason that the conflict analysis asks for, and has it
// propagated again from nothing.
func TestReasonsHold(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 9))
	seen := map[uint8]int{}
	for round := 0; round < 900; round++ {
		p := randomProblem(r, round%3 > 0)
		if round%2 == 0 {
			crowd(r, p)
		}
		k := []kind{relaxed, named, guarded}[round%3]
		m, ok := build(p, k)
		if !ok {
			continue
		}
		said := 0
		s := &search{model: m, people: k == named, opt: Options{Ticks: 60_000}}
		m.heard = func(f fact, w why, behind []fact) {
			if w.kind == whyClause || w.kind == whyRoot || said > 40 {
				return // roots need no reason, and a learnt clause needs search to be seen
			}
			said++
			seen[w.kind]++
			if energyOf(m.engine, w) == nil && !holdsBehind(p, k, f, behind) {
				t.Fatalf("problem %d: %v does not follow from %v (reason %+v)", round, f, behind, w)
			}
			for _, g := range behind {
				if !m.holds(g) {
					t.Fatalf("problem %d: %v is given as a reason for %v but does not hold", round, g, f)
				}
			}
		}
		s.minimise()
	}
	for _, k := range []uint8{whyArc, whyOff, whyRule} {
		if seen[k] < 100 {
			t.Errorf("%d reasons of kind %d were heard: too few to tell", seen[k], k)
		}
	}
}

// crowd makes everybody want the same thing, so that there are conflicts.
func crowd(r *rand.Rand, p *problem.Problem) {
	if len(p.Res) == 0 {
		p.Res = append(p.Res, problem.Resource{Capacity: 2})
	}
	for i := range p.Acts {
		p.Acts[i].Uses = append(p.Acts[i].Uses[:0:0], problem.Use{Res: 0, Amount: 1 + r.IntN(p.Res[0].Capacity), Stays: r.IntN(2) == 0})
		p.Acts[i].Site, p.Acts[i].By = true, p.Close
	}
}

// TestLearntClausesHold lets random instances with long conflicts learn, and tries every clause on
// the best schedule, which keeps all of them that do not speak of a better finish.
func TestLearntClausesHold(t *testing.T) {
	r := rand.New(rand.NewPCG(12, 1))
	tried := 0
	for round := 0; round < 60; round++ {
		p := randomOpen(r, 10, round%2 == 0)
		best := Solve(p, Options{})
		if best.Status != Optimal {
			continue
		}
		m, ok := build(p, named)
		if !ok {
			t.Fatal("no model of a problem with a plan")
		}
		s := &search{model: m, opt: Options{Best: best.Finish + 1}, silent: true}
		if !s.begin() {
			t.Fatal("the root refuses a finish that there is")
		}
		s.energize(round%4 < 2)
		s.run([]fact{{m.end ^ 1, -int32(best.Finish - 1)}}, 300, false)
		value := make([]int32, len(m.now)/2)
		for i, x := range m.start {
			value[x/2] = int32(best.Starts[i])
		}
		value[m.end/2] = int32(best.Finish)
		for _, ref := range m.refs {
			judged, holds := true, false
			for _, f := range m.clause(ref) {
				x := f.s / 2
				if f.s >= m.end+2 { // an order variable: either value may be meant
					judged = false
				}
				v := value[x]
				if f.s%2 == 1 {
					v = -v
				}
				holds = holds || v >= f.v
			}
			if judged {
				tried++
				if !holds {
					t.Fatalf("round %d: clause %v is broken by a plan", round, m.clause(ref))
				}
			}
		}
	}
	if tried < 100 {
		t.Errorf("%d clauses tried: too few to tell", tried)
	}
}
