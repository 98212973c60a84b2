package learn

import (
	"math/rand/v2"
	"testing"

	"sailby/plan/problem"
)

// crammed says whether the facts, with what held from the start, overfill interval [a, b) of the
// resource: the arithmetic of the rule alone.
func crammed(g *energy, root []int32, a, b int32, facts []fact) bool {
	now := append([]int32(nil), root...)
	for _, f := range facts {
		now[f.s] = max(now[f.s], f.v)
	}
	work := int64(0)
	for i := range g.users {
		u := &g.users[i]
		lst, ect := -now[u.start^1], now[u.finish]+u.length
		part := int32(0)
		for q := b - a; q > 0; q-- { // the most that it has in any case
			if lst <= b-q && ect >= a+q && (u.least >= q || ect-max(a, lst) >= q && ect-lst >= q) {
				part = q
				break
			}
		}
		work += int64(part) * int64(u.amount)
	}
	return work > int64(g.capacity)*int64(b-a)
}

// energyFixture is one resource with activities of random lengths, amounts and bounds.
func energyFixture(r *rand.Rand) (*engine, *energy) {
	e := newEngine()
	capacity := int32(2 + r.IntN(3))
	var us []user
	for n := 4 + r.IntN(3); n > 0; n-- {
		d := int32(1 + r.IntN(4))
		lo := int32(r.IntN(5))
		s := e.variable(lo, lo+int32(r.IntN(5)))
		us = append(us, user{s, s, d, 1 + int32(r.IntN(int(capacity))), d})
	}
	e.energetic = true
	return e, newEnergy(e, newTimetable(e, capacity, us))
}

// possible lists, for each side, the least value that a schedule within the bounds gives it; ok is
// false if there is no schedule.
func (g *energy) possible(e *engine) (least []int32, ok bool) {
	least = make([]int32, len(e.now))
	for i := range least {
		least[i] = far
	}
	at := make([]int32, len(g.users))
	use := make([]int32, 64)
	var place func(k int)
	place = func(k int) {
		if k == len(at) {
			ok = true
			for i, t := range at {
				s := g.users[i].start
				least[s], least[s^1] = min(least[s], t), min(least[s^1], -t)
			}
			return
		}
		u := &g.users[k]
		for t := e.now[u.start]; t <= e.latestStart(u); t++ {
			fits := true
			for m := t; m < t+u.length; m++ {
				use[m] += u.amount
				fits = fits && use[m] <= g.capacity
			}
			if at[k] = t; fits {
				place(k + 1)
			}
			for m := t; m < t+u.length; m++ {
				use[m] -= u.amount
			}
		}
	}
	place(0)
	return least, ok
}

// narrowed gives bounds at the root with some facts added.
func narrowed(e *engine, root []int32, facts []fact) *engine {
	out := &engine{}
	out.now = append(out.now, root...)
	for _, f := range facts {
		out.now[f.s] = max(out.now[f.s], f.v)
	}
	return out
}

// The rule never takes a start that some schedule has, never says that there is no schedule where
// there is one, and each of its reasons overfills the interval that it names.
func TestEnergyAgainstBruteForce(t *testing.T) {
	r := rand.New(rand.NewPCG(11, 3))
	raises, clashes, alone := 0, 0, 0
	for round := 0; round < 6000; round++ {
		e, g := energyFixture(r)
		root := append([]int32(nil), e.now...)
		least, ok := g.possible(e)
		e.heard = func(f fact, w why, behind []fact) {
			if w.kind == whyRule && w.id == g.id {
				if !crammed(g, root, w.at, w.upTo, append(append([]fact(nil), behind...), f.not())) {
					t.Fatalf("round %d: %v and not %v do not overfill %d to %d", round, behind, f, w.at, w.upTo)
				}
				for _, h := range behind {
					if !e.holds(h) {
						t.Fatalf("round %d: %v is a reason and does not hold", round, h)
					}
				}
				raises++
			}
		}
		e.decide(fact{0, e.now[0]}) // reasons of level 0 are not given back
		settled := e.settle()
		if !settled && ok {
			t.Fatalf("round %d: there is a schedule, and the rule says there is none", round)
		}
		if !settled {
			clashes++
			if _, ok := g.possible(narrowed(e, root, e.clash)); ok {
				t.Fatalf("round %d: there is a schedule with %v, said to be impossible", round, e.clash)
			}
			continue
		}
		for i := int32(len(e.list)) - 1; i >= 0; i-- {
			x := e.list[i]
			if v := e.step[i].v; ok && v > least[x.s] {
				t.Fatalf("round %d: side %d raised to %d, a schedule has %d", round, x.s, v, least[x.s])
			}
			if x.why.kind == whyRule && x.why.id == g.id {
				alone++
				for v := e.step[e.step[i].prev].v + 1; v <= e.step[i].v; v++ { // every weaker fact has its reason too
					e.reason(fact{x.s, v}, x.why, i, nil)
				}
			}
		}
	}
	if raises < 300 || clashes < 300 || alone < 100 {
		t.Errorf("%d reasons, %d contradictions, %d raises of its own: too few to tell", raises, clashes, alone)
	}
}

// What the rule is for: it sees contradictions, and takes starts, that the profile alone does not.
func TestEnergySeesMoreThanTheProfile(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 8))
	refuted, raised := 0, 0
	for round := 0; round < 2000; round++ {
		seed := r.Uint64()
		e, _ := energyFixture(rand.New(rand.NewPCG(seed, 0)))
		plain, _ := energyFixture(rand.New(rand.NewPCG(seed, 0)))
		plain.energetic = false
		switch with, without := e.settle(), plain.settle(); {
		case with && !without:
			t.Fatalf("round %d: the profile alone refutes what both together do not", round)
		case !with && without:
			refuted++
		case with:
			for s := range e.now {
				if e.now[s] < plain.now[s] {
					t.Fatalf("round %d: side %d at %d, at %d with the profile alone", round, s, e.now[s], plain.now[s])
				}
				if e.now[s] > plain.now[s] {
					raised++
				}
			}
		}
	}
	if refuted < 20 || raised < 20 {
		t.Errorf("%d more contradictions, %d more raises", refuted, raised)
	}
}

// Work with a length of its own for each start counts by its least length, or by its compulsory part
// where that is longer.
func TestLoadOfVaryingLength(t *testing.T) {
	e := newEngine()
	s, f := e.variable(2, 4), e.variable(8, 12)
	u := user{start: s, finish: f, amount: 1, least: 3}
	for _, c := range []struct{ a, b, want int32 }{
		{0, 20, 4}, // from 4 to 8, whatever comes
		{4, 8, 4},
		{5, 7, 2},
		{6, 20, 2},
		{0, 6, 2},
		{8, 20, 0},
	} {
		if got := e.had(&u, c.a, c.b, int32(len(e.list))); got != c.want {
			t.Errorf("in [%d, %d): %d, want %d", c.a, c.b, got, c.want)
		}
		if c.want == 0 {
			continue
		}
		from, to := u.within(c.a, c.b, c.want, e.latestStart(&u))
		if !e.holds(from) || !e.holds(to) {
			t.Errorf("in [%d, %d): the facts %v and %v do not hold", c.a, c.b, from, to)
		}
	}
}

// The same in a search, where profiles come and go with the levels.
func TestEnergyReasonsInASearch(t *testing.T) {
	r := rand.New(rand.NewPCG(21, 4))
	said := 0
	for round := 0; round < 60; round++ {
		p := randomOpen(r, 14, round%2 == 0)
		m, ok := build(p, named)
		if !ok {
			continue
		}
		root := append([]int32(nil), m.now...)
		s := &search{model: m, opt: Options{}, silent: true}
		m.heard = func(f fact, w why, behind []fact) {
			g := energyOf(m.engine, w)
			if g == nil {
				return
			}
			said++
			if !crammed(g, root, w.at, w.upTo, append(append([]fact(nil), behind...), f.not())) {
				t.Fatalf("problem %d: %v and not %v do not overfill %d to %d", round, behind, f, w.at, w.upTo)
			}
			for _, h := range behind {
				if !m.holds(h) {
					t.Fatalf("problem %d: %v is a reason for %v and does not hold", round, h, f)
				}
			}
		}
		s.energize(true)
		if !s.begin() {
			continue
		}
		for k := int32(0); k < 4 && s.now[s.end]+k < s.value; k++ {
			s.run([]fact{{s.end ^ 1, -(s.now[s.end] + k)}}, 100, false)
		}
	}
	if said < 200 {
		t.Errorf("%d reasons were heard: too few to tell", said)
	}
}

// Refutations that rest on work in intervals replay.
func TestEnergyLemmasReplay(t *testing.T) {
	r := rand.New(rand.NewPCG(8, 15))
	said := 0
	solve := func(p *problem.Problem, o Options) Result {
		log := newRecord(o.Log)
		m, ok := buildFor(p, named, log)
		if !ok {
			return log.close(none())
		}
		m.heard = func(_ fact, w why, _ []fact) {
			if energyOf(m.engine, w) != nil {
				said++
			}
		}
		s := &search{model: m, opt: o}
		s.energize(true)
		for ok := s.begin(); ok; {
			ok = s.run(nil, 1<<40, false) != over
		}
		return log.close(s.result())
	}
	for round := 0; round < 40; round++ {
		p := randomOpen(r, 9, round%2 == 0)
		res, _ := replayed(t, "instance", p, solve, Options{})
		if plain := Solve(p, Options{}); plain.Status != res.Status || plain.Finish != res.Finish {
			t.Fatalf("instance %d: status %d and finish %d with work in intervals, else %d and %d", round, res.Status, res.Finish, plain.Status, plain.Finish)
		}
	}
	if said < 50 {
		t.Errorf("%d reasons were asked for: too few to tell", said)
	}
}

// energyOf gives the energy rule that gave a reason, nil if it was another.
func energyOf(e *engine, w why) *energy {
	if w.kind != whyRule {
		return nil
	}
	g, _ := e.rules[w.id].(*energy)
	return g
}
