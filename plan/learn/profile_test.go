package learn

import (
	"math/rand/v2"
	"slices"
	"testing"

	"sailby/plan/problem"
)

// The packed profile against an array of minutes, with narrow and with wide lanes.
func TestProfile(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 1))
	for round := 0; round < 300; round++ {
		capacity := make([]int32, 1+r.IntN(6))
		for k := range capacity {
			capacity[k] = int32(1 + r.IntN(5))
			if round%2 == 0 {
				capacity[k] += 70_000
			}
		}
		l := newLanes(capacity)
		p := newProfile(l, l.pack(capacity))
		const end = 80
		free := make([][]int32, end)
		for i := range free {
			free[i] = slices.Clone(capacity)
		}
		for k := 0; k < 15; k++ {
			want := make([]int32, len(capacity))
			for i := range want {
				want[i] = int32(r.IntN(int(min(capacity[i], 70_003)) + 1))
			}
			from, length := int32(r.IntN(20)), int32(1+r.IntN(4))
			fits := func(at int32) bool {
				for m := at; m < at+length; m++ {
					for i := range want {
						if m < end && free[m][i] < want[i] {
							return false
						}
					}
				}
				return true
			}
			first := from
			for !fits(first) {
				first++
			}
			at, seg := p.find(from, length, l.pack(want))
			if at != first {
				t.Fatalf("round %d: %v fits at %d first, found %d", round, want, first, at)
			}
			p.use(at, length, l.pack(want), seg)
			for m := at; m < at+length && m < end; m++ {
				for i := range want {
					free[m][i] -= want[i]
				}
			}
		}
	}
}

// A bred schedule is one: every lag and every resource, whatever the herd has been through.
func TestBredSchedules(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 2))
	for round := 0; round < 10; round++ {
		p := randomOpen(r, 30, false)
		m, ok := build(p, named)
		if !ok {
			t.Fatal("no model")
		}
		h := newShop(m)
		if h == nil {
			t.Fatal("no shop for lags that run one way")
		}
		b := newBreeder(h, uint64(round))
		last := problem.Inf
		for k := 0; k < 400; k++ {
			if k == 200 {
				b.welcome(ints(b.best.start))
			}
			if k == 300 {
				b.stale = staleAt // the herd is renewed
			}
			b.step()
			if len(b.herd) == 0 {
				continue // just renewed
			}
			x := b.herd[len(b.herd)-1]
			for _, c := range []*beast{x, b.best} {
				judge := &brute{p: p, start: ints(c.start), finish: make([]int, len(p.Acts)), mode: make([]int, len(p.Acts))}
				for i := range p.Acts {
					judge.finish[i] = judge.start[i] + int(m.length[i])
				}
				if int(c.end) != judge.end(len(p.Acts)) {
					t.Fatalf("finish %d is said to be %d", judge.end(len(p.Acts)), c.end)
				}
				if k%40 == 0 && !sound(judge) {
					t.Fatalf("round %d, beast %d breaks a rule", round, k)
				}
			}
			if int(b.best.end) > last {
				t.Fatalf("the best went from %d to %d", last, b.best.end)
			}
			last = int(b.best.end)
		}
	}
}

func sound(b *brute) bool {
	for i := range b.p.Acts {
		if !b.sound(i) {
			return false
		}
	}
	return true
}

// Problems that have more to them than lags and resources have no shop.
func TestNoShop(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 3))
	for name, change := range map[string]func(p *problem.Problem){
		"pair":     func(p *problem.Problem) { p.Pairs = []problem.Pair{{A: 0, B: 1}} },
		"deadline": func(p *problem.Problem) { p.Acts[3].By-- },
		"home":     func(p *problem.Problem) { p.Acts[3].Site = false },
		"max":      func(p *problem.Problem) { p.Links[0].Max = 100 },
	} {
		p := randomOpen(r, 6, false)
		for len(p.Links) == 0 {
			p = randomOpen(r, 6, false)
		}
		change(p)
		if m, ok := build(p, named); ok && newShop(m) != nil {
			t.Errorf("%s: there is a shop", name)
		}
	}
}

// Dropping clauses changes nothing but the work: the answers with room for a few clauses are
// those with room for all.
func TestClausesDropped(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 4))
	dropped := 0
	for round := 0; round < 8; round++ {
		p := randomOpen(r, 14, round%2 == 0)
		want := Solve(p, Options{})
		m, ok := build(p, named)
		if !ok {
			t.Fatal("no model")
		}
		s := &search{model: m}
		if !s.begin() {
			continue
		}
		for limit := int64(20); ; limit += limit / 2 { // growing, so that it comes to an end
			if s.run(nil, limit, false) == over {
				break
			}
			before := len(s.refs)
			s.reduce()
			dropped += before - len(s.refs)
			for _, ws := range s.watch {
				for _, w := range ws {
					if !slices.Contains(s.refs, w.ref) {
						t.Fatal("a watcher of a clause that is gone")
					}
				}
			}
		}
		if got := s.result(); got.Finish != want.Finish || got.Status != want.Status {
			t.Errorf("round %d: finish %d with few clauses, %d with many", round, got.Finish, want.Finish)
		}
	}
	if dropped < 50 {
		t.Errorf("%d clauses were dropped: too few to tell", dropped)
	}
}

func TestNetwork(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 5))
	for round := 0; round < 200; round++ {
		n := 3 + r.IntN(5)
		a, b := newNetwork(n), newNetwork(n)
		okA, okB := a.close(), true
		for k := 0; k < 2*n; k++ {
			i, j, v := r.IntN(n), r.IntN(n), int32(r.IntN(9)-5)
			if i == j {
				continue
			}
			if okA { // one by one
				okA = a.add(i, j, v)
			}
			b.put(i, j, v) // and all at once
		}
		okB = b.close()
		if okA != okB {
			t.Fatalf("round %d: one by one %v, all at once %v", round, okA, okB)
		}
		if okA && !slices.Equal(a.lag, b.lag) {
			t.Fatalf("round %d: other lags one by one than all at once", round)
		}
	}
}

func BenchmarkOpen(b *testing.B) {
	p := randomOpen(rand.New(rand.NewPCG(1, 1)), 30, true)
	for b.Loop() {
		Solve(p, Options{Ticks: 200_000})
	}
}

func ints(a []int32) []int {
	out := make([]int, len(a))
	for i, v := range a {
		out[i] = int(v)
	}
	return out
}
