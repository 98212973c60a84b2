package learn

import (
	"math/rand/v2"
	"testing"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// brute tries out every start and mode of a small problem, minute by minute, and knows nothing of
// the search: the plainest reading of the rules.
type brute struct {
	p      *problem.Problem
	start  []int
	finish []int
	mode   []int
	best   int
}

func bruteFinish(p *problem.Problem) int {
	n := len(p.Acts)
	b := &brute{p: p, start: make([]int, n), finish: make([]int, n), mode: make([]int, n), best: problem.Inf}
	b.place(0)
	return b.best
}

func (b *brute) place(i int) {
	if i == len(b.p.Acts) {
		if f := b.end(i); f < b.best {
			b.best = f
		}
		return
	}
	a := &b.p.Acts[i]
	for k := range a.Modes {
		w := a.Modes[k].Time
		for s := a.From; s <= b.p.End; s++ {
			if w.Start(s) != s {
				continue
			}
			f := w.Finish(s)
			if f > b.p.End || f > a.By || a.Site && a.By < problem.Inf && f > b.p.Close {
				continue
			}
			b.start[i], b.finish[i], b.mode[i] = s, f, k
			if b.end(i+1) < b.best && b.sound(i) {
				b.place(i + 1)
			}
		}
	}
}

// end gives the latest finish of the first n activities that count.
func (b *brute) end(n int) int {
	site := false
	for i := range b.p.Acts {
		site = site || b.p.Acts[i].Site
	}
	end := 0
	for i := 0; i < n; i++ {
		if b.p.Acts[i].Site || !site {
			end = max(end, b.finish[i])
		}
	}
	return end
}

func (b *brute) at(i int, e tasks.LinkEnd) int {
	if e == tasks.Start {
		return b.start[i]
	}
	return b.finish[i]
}

// sound checks activity i against those before it.
func (b *brute) sound(i int) bool {
	for k := range b.p.Links {
		l := &b.p.Links[k]
		if max(l.From, l.To) != i {
			continue
		}
		from := 0
		if l.From >= 0 {
			from = b.at(l.From, l.FromEnd)
		}
		if to := b.at(l.To, l.ToEnd); to < l.Earliest(from) || to > l.LastAt(from) {
			return false
		}
	}
	for _, pr := range b.p.Pairs {
		if max(pr.A, pr.B) == i && !b.clear(pr.A, pr.B, pr.TailA) && !b.clear(pr.B, pr.A, pr.TailB) {
			return false
		}
	}
	for _, o := range b.p.Orders {
		if !b.ordered(o, i) {
			return false
		}
	}
	return b.crowd(i)
}

func (b *brute) clear(x, y int, tail func(int) int) bool {
	f := b.finish[x]
	if tail != nil {
		f = tail(f)
	}
	return b.start[y] >= f
}

// ordered says whether some choice of the rule still may hold.
func (b *brute) ordered(o problem.Order, i int) bool {
	for _, c := range o.Choices {
		ok := true
		for _, x := range c {
			ok = ok && (max(x.First, x.Then) > i || b.start[x.Then] >= b.finish[x.First])
		}
		if ok {
			return true
		}
	}
	return false
}

// crowd counts people and resources in every minute of activities 0 to i.
func (b *brute) crowd(i int) bool {
	end := b.p.End + 1
	for t := 0; t < end; t++ {
		busy := make([]bool, len(b.p.People))
		used := make([]int, len(b.p.Res))
		for j := 0; j <= i; j++ {
			a := &b.p.Acts[j]
			working := false
			a.Modes[b.mode[j]].Time.Pieces(b.start[j], func(from, to int) { working = working || from <= t && t < to })
			for _, u := range a.Uses {
				if u.Stays && b.start[j] <= t && t < b.finish[j] || !u.Stays && working {
					used[u.Res] += u.Amount
				}
			}
			if !working {
				continue
			}
			for _, p := range a.Modes[b.mode[j]].Crew {
				if busy[p] {
					return false
				}
				busy[p] = true
			}
		}
		for k := range used {
			if used[k] > b.p.Res[k].Capacity {
				return false
			}
		}
	}
	return true
}

// randomProblem makes a problem with everything in it: calendars with breaks and stops, two or
// three people, kit that stays and kit that does not, waits both ways, pairs with tails, order rules.
func randomProblem(r *rand.Rand, rich bool) *problem.Problem {
	n := 2 + r.IntN(3)
	end := 16 + r.IntN(14)
	p := &problem.Problem{End: end, Close: end - r.IntN(4)}
	people := 1 + r.IntN(3)
	shift := make([]hours.Set, people)
	for k := range shift {
		p.People = append(p.People, problem.Person{})
		shift[k] = randomSet(r, end)
	}
	for k := r.IntN(3); k > 0; k-- {
		p.Res = append(p.Res, problem.Resource{Kind: problem.Kit, Capacity: 1 + r.IntN(3)})
	}
	for i := 0; i < n; i++ {
		p.Acts = append(p.Acts, randomAct(r, p, shift, rich))
	}
	for k := r.IntN(n + 2); k > 0; k-- {
		i, j := r.IntN(n), r.IntN(n)
		if i == j {
			continue
		}
		l := problem.Link{From: i, To: j, FromEnd: tasks.LinkEnd(r.IntN(2)), ToEnd: tasks.LinkEnd(r.IntN(2)),
			Min: r.IntN(6) - 1, Max: expand.NoMax}
		switch r.IntN(6) {
		case 0:
			l.Max = max(l.Min, 0) + r.IntN(8)
		case 1:
			l.Count = randomSet(r, end)
		case 2:
			l.Max, l.MaxCount = max(l.Min, 0)+r.IntN(8), randomSet(r, end)
		case 3:
			w := 3 + r.IntN(9)
			l.Last = func(t int) int { return t + w - min(t/4, 2) }
		case 4:
			l.From, l.Min = -1, r.IntN(5)
		}
		p.Links = append(p.Links, l)
	}
	for k := r.IntN(3); rich && k > 0; k-- {
		i, j := r.IntN(n), r.IntN(n)
		if i == j {
			continue
		}
		pr := problem.Pair{A: i, B: j}
		if r.IntN(2) == 0 {
			w := r.IntN(5)
			pr.TailA = func(f int) int { return f + w + f/7 }
		}
		p.Pairs = append(p.Pairs, pr)
	}
	if rich && n > 2 && r.IntN(3) == 0 {
		a, b := r.IntN(n), r.IntN(n-1)
		if b >= a {
			b++
		}
		p.Orders = append(p.Orders, problem.Order{Choices: [][]problem.Before{{{First: a, Then: b}}, {{First: b, Then: a}, {First: 0, Then: n - 1}}}})
	}
	return p
}

func randomSet(r *rand.Rand, end int) hours.Set {
	var out []hours.Span
	for t := r.IntN(3); t < end; {
		w := 2 + r.IntN(8)
		out = append(out, hours.Span{From: hours.Minute(t), To: hours.Minute(min(end, t+w))})
		t += w + 1 + r.IntN(3)
	}
	return hours.NewSet(out...)
}

func randomAct(r *rand.Rand, p *problem.Problem, shift []hours.Set, rich bool) problem.Act {
	a := problem.Act{By: problem.Inf, From: r.IntN(3), Site: r.IntN(2) == 0}
	if a.Site {
		a.By = p.Close
	}
	for k := range p.Res {
		if r.IntN(2) == 0 {
			a.Uses = append(a.Uses, problem.Use{Res: k, Amount: 1 + r.IntN(p.Res[k].Capacity), Stays: r.IntN(2) == 0})
		}
	}
	switch r.IntN(5) {
	case 0:
		a.Modes = []problem.Mode{{Time: problem.Fixed(1 + r.IntN(5))}}
		return a
	case 1:
		rate := make([]float64, p.End)
		for t := range rate {
			rate[t] = 0.15 + 0.2*r.Float64()
		}
		a.Modes = []problem.Mode{{Time: problem.Curing(rate)}}
		return a
	}
	rules := problem.Rules{Work: 1 + r.IntN(6), SetUp: r.IntN(2), Least: r.IntN(3), InOneGo: r.IntN(4) == 0, OverMeals: r.IntN(2) == 0}
	team := 1
	if rich && len(shift) > 1 && r.IntN(4) == 0 {
		team = 2
	}
	for q := range shift {
		if r.IntN(4) == 0 && len(a.Modes) > 0 {
			continue
		}
		m := problem.Mode{Crew: []int{q}}
		spans := shift[q]
		if team == 2 {
			other := (q + 1) % len(shift)
			m.Crew = append(m.Crew, other)
			spans = spans.And(shift[other])
		}
		m.Time = problem.Worked(spans, spans.Joined(1, nil), rules)
		a.Modes = append(a.Modes, m)
	}
	return a
}

func TestAgainstBruteForce(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 11))
	plans := 0
	const rounds = 1200
	for k := 0; k < rounds; k++ {
		p := randomProblem(r, k%3 > 0)
		want := bruteFinish(p)
		got := Solve(p, Options{})
		if got.Status != Optimal && got.Status != Infeasible {
			t.Fatalf("problem %d: status %d without a limit", k, got.Status)
		}
		if got.Finish != want {
			t.Fatalf("problem %d: finish %d, brute force says %d (problem.Inf is none)", k, got.Finish, want)
		}
		if low := Relax(p, Options{}); low.Bound > want {
			t.Fatalf("problem %d: without people no plan finishes before %d, but one finishes at %d", k, low.Bound, want)
		}
		if want < problem.Inf {
			plans++
			b := &brute{p: p, start: got.Starts, mode: got.Modes, finish: make([]int, len(p.Acts))}
			for i := range p.Acts {
				b.finish[i] = p.Acts[i].Modes[got.Modes[i]].Time.Finish(got.Starts[i])
			}
			for i := range p.Acts {
				if !b.sound(i) {
					t.Fatalf("problem %d: the plan breaks a rule at activity %d", k, i)
				}
			}
		}
	}
	if plans < rounds/4 || plans > rounds*19/20 {
		t.Errorf("%d of %d problems have a plan: the test is one-sided", plans, rounds)
	}
}
