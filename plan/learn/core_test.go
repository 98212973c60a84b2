package learn

import (
	"math/rand/v2"
	"testing"

	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// onlyLimits gives p with nothing but the limits left: an activity without its hours takes its
// minutes at any hour, and people are kept only where a limit speaks of them.
func onlyLimits(p *problem.Problem, limits []Limit) *problem.Problem {
	in := map[LimitKind]map[int]bool{}
	people := false
	for _, l := range limits {
		if in[l.Kind] == nil {
			in[l.Kind] = map[int]bool{}
		}
		in[l.Kind][l.Index] = true
		people = people || l.Kind == ByPeople
	}
	q := *p
	q.Acts, q.Links, q.Pairs, q.Orders = nil, nil, nil, nil
	for i, a := range p.Acts {
		if !in[ByDeadline][i] {
			a.By = problem.Inf
		}
		if !in[ByFrom][i] {
			a.From = 0
		}
		uses := a.Uses
		a.Uses = nil
		for _, u := range uses {
			if in[ByResource][u.Res] {
				a.Uses = append(a.Uses, u)
			}
		}
		modes := a.Modes
		a.Modes, a.Times = nil, nil
		least := problem.Inf
		for _, m := range modes {
			least = min(least, m.Time.Length())
			if !people {
				m.Crew = nil
			}
			a.Modes = append(a.Modes, m)
		}
		if !in[ByHours][i] && (a.Modes[0].Time.Calendar() != nil || a.Modes[0].Time.Length() == 0) {
			for m := range a.Modes {
				a.Modes[m].Time = problem.Fixed(least)
			}
		}
		q.Acts = append(q.Acts, a)
	}
	for i, l := range p.Links {
		if in[ByLink][i] {
			q.Links = append(q.Links, l)
		}
	}
	for i, pr := range p.Pairs {
		if in[ByPair][i] {
			q.Pairs = append(q.Pairs, pr)
		}
	}
	for i, o := range p.Orders {
		if in[ByOrder][i] {
			q.Orders = append(q.Orders, o)
		}
	}
	return &q
}

func TestContradictionsStandByThemselves(t *testing.T) {
	r := rand.New(rand.NewPCG(8, 21))
	found, needed, members := 0, 0, 0
	kinds := map[LimitKind]bool{}
	for k := 0; k < 400; k++ {
		p := randomProblem(r, k%2 == 0)
		for i := range p.Acts { // deadlines that bite
			p.Acts[i].By = min(p.Acts[i].By, 4+r.IntN(12))
		}
		limits := Contradiction(p, 1000, Options{})
		if limits == nil {
			continue
		}
		found++
		if f := bruteFinish(onlyLimits(p, limits)); f < problem.Inf {
			t.Fatalf("problem %d: the limits %v can all hold, with finish %d", k, limits, f)
		}
		for i, l := range limits {
			kinds[l.Kind] = true
			members++
			if !l.Needed {
				continue
			}
			needed++
			rest := append(append([]Limit(nil), limits[:i]...), limits[i+1:]...)
			if again := Contradiction(onlyLimits(p, rest), 1000, Options{}); again != nil && comparable(p, rest) {
				t.Fatalf("problem %d: %v is said to be needed, but %v contradict each other without it", k, l, again)
			}
		}
	}
	if found < 80 || needed < members*9/10 {
		t.Errorf("%d contradictions with %d members, %d of them needed: too few", found, members, needed)
	}
	for k := ByPair; k <= ByDeadline; k++ {
		if !kinds[k] {
			t.Errorf("no contradiction had a limit of kind %d", k)
		}
	}
}

// comparable says whether onlyLimits asks no more than the limits do: it names people one by one,
// and gives an activity without its hours a length where the limits only give it a least one.
func comparable(p *problem.Problem, limits []Limit) bool {
	hours := map[int]bool{}
	for _, l := range limits {
		if l.Kind == ByPeople {
			return false
		}
		if l.Kind == ByHours {
			hours[l.Index] = true
		}
	}
	for i := range p.Acts {
		if w := p.Acts[i].Modes[0].Time; !isFixed(w) && !hours[i] {
			return false
		}
	}
	return true
}

func TestContradictionByHand(t *testing.T) {
	// One person works from 0 to 10 and from 20 to 30; two jobs of 8 minutes in one go are due by
	// 25: the second can start at 20 and ends at 28. The third, due by 40, has nothing to do with it.
	shift := hours.Set{{From: 0, To: 10}, {From: 20, To: 30}}
	act := func(work, by int) problem.Act {
		w := problem.Worked(shift, shift, problem.Rules{Work: work, InOneGo: true})
		return problem.Act{Modes: []problem.Mode{{Crew: []int{0}, Time: w}}, By: by, Site: true}
	}
	p := &problem.Problem{End: 60, Close: 60, People: make([]problem.Person, 1), Acts: []problem.Act{act(8, 25), act(8, 25), act(1, 40)}}
	limits := Contradiction(p, 1000, Options{})
	want := map[LimitKind][]int{ByPeople: nil, ByHours: {0, 1}, ByDeadline: {0, 1}}
	for _, l := range limits {
		ids, ok := want[l.Kind]
		if !ok || !l.Needed {
			t.Errorf("limit %+v is not needed", l)
		}
		if l.Kind != ByPeople && l.Index > 1 || ok && l.Kind != ByPeople && len(ids) == 0 {
			t.Errorf("limit %+v is of another activity", l)
		}
	}
	if len(limits) < 4 || len(limits) > 5 {
		t.Errorf("%d limits, want the one person, both deadlines and the hours of one or both: %+v", len(limits), limits)
	}
	if q := onlyLimits(p, limits); bruteFinish(q) < problem.Inf {
		t.Error("the limits can all hold")
	}
}
