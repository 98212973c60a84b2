package learn

import (
	"math/rand/v2"
	"testing"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// hotProblem makes two or three pieces of hot work in two workfaces that stop on the way, with few people to
// keep the watches.
func hotProblem(r *rand.Rand) *problem.Problem {
	const end = 26
	p := &problem.Problem{End: end, Close: end}
	faces := []*tasks.Workface{{}, {}}
	people := 2 + r.IntN(2)
	var shift []hours.Set
	for range people {
		p.People = append(p.People, problem.Person{})
		shift = append(shift, randomSet(r, end))
	}
	long := 1 + r.IntN(3)
	for range 2 + r.IntN(2) {
		a := problem.Act{By: end, Site: true, From: r.IntN(3), Step: &expand.Step{Face: faces[r.IntN(2)]}}
		rules := problem.Rules{Work: 2 + r.IntN(5), Watch: long * min(1, r.IntN(4))}
		for q := range people {
			if r.IntN(3) == 0 && len(a.Modes) > 0 {
				continue
			}
			m := problem.Mode{Crew: []int{q}, Time: problem.Worked(shift[q], shift[q], rules)}
			for k := range people {
				if rules.Watch > 0 && (k == q || r.IntN(2) == 0) {
					m.Keepers, m.Stay = append(m.Keepers, k), append(m.Stay, hours.NewSet(hours.Span{From: 0, To: 2 * end}))
				}
			}
			a.Modes = append(a.Modes, m)
		}
		p.Acts = append(p.Acts, a)
	}
	return p
}

// hotBrute gives the earliest finish with the watches after it, by trying every start, mode and keeper.
type hotBrute struct {
	p     *problem.Problem
	start []int
	mode  []int
	best  int
}

func (b *hotBrute) place(i, end int) {
	if end >= b.best {
		return
	}
	if i == len(b.p.Acts) {
		if b.kept() {
			b.best = end
		}
		return
	}
	a := &b.p.Acts[i]
	for k := range a.Modes {
		w := a.Modes[k].Time
		for s := a.From; s < b.p.End; s++ {
			if w.Start(s) == s && w.Finish(s)+w.Watch() <= b.p.End {
				b.start[i], b.mode[i] = s, k
				b.place(i+1, max(end, w.Finish(s)+w.Watch()))
			}
		}
	}
}

// kept tries everybody for every watch. A minute holds -1 for a person at work, else the workface watched.
func (b *hotBrute) kept() bool {
	busy := make([][]int, len(b.p.People))
	for q := range busy {
		busy[q] = make([]int, 3*b.p.End)
	}
	type watch struct{ act, at int }
	var all []watch
	for i := range b.p.Acts {
		md := &b.p.Acts[i].Modes[b.mode[i]]
		clash := false
		md.Time.Pieces(b.start[i], func(from, to int) {
			for t := from; t < to; t++ {
				clash = clash || busy[md.Crew[0]][t] != 0
				busy[md.Crew[0]][t] = -1
			}
		})
		if clash {
			return false
		}
		if md.Time.Watch() > 0 {
			for _, e := range md.Time.Stops(b.start[i]) {
				all = append(all, watch{i, e})
			}
		}
	}
	faces := map[*tasks.Workface]int{}
	for i := range b.p.Acts {
		f := b.p.Acts[i].Step.Face
		if faces[f] == 0 {
			faces[f] = len(faces) + 1
		}
	}
	var try func(k int) bool
	try = func(k int) bool {
		if k == len(all) {
			return true
		}
		md := &b.p.Acts[all[k].act].Modes[b.mode[all[k].act]]
		face := faces[b.p.Acts[all[k].act].Step.Face]
		for _, q := range md.Keepers {
			was, free := append([]int(nil), busy[q]...), true
			for t := all[k].at; t < all[k].at+md.Time.Watch(); t++ {
				free = free && (busy[q][t] == 0 || busy[q][t] == face)
				busy[q][t] = face
			}
			if free && try(k+1) {
				return true
			}
			busy[q] = was
		}
		return false
	}
	return try(0)
}

// Watches on the way are settled at the leaf: the finish is what trying everything gives, and every
// clash holds when it is given and names fewer than all activities now and then.
func TestWatchesOnTheWay(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 37))
	plans, clashes := 0, 0
	for k := range 1500 {
		p := hotProblem(r)
		b := &hotBrute{p: p, start: make([]int, len(p.Acts)), mode: make([]int, len(p.Acts)), best: problem.Inf}
		b.place(0, 0)
		got := Solve(p, Options{})
		if got.Finish != b.best || got.Status != Optimal && got.Status != Infeasible {
			t.Fatalf("problem %d: finish %d (status %d), trying everything gives %d", k, got.Finish, got.Status, b.best)
		}
		if b.best < problem.Inf {
			plans++
		}
		m, ok := build(p, named)
		if !ok {
			continue
		}
		s := &search{model: m, people: true}
		if s.begin() {
			clashes += hotLeaf(t, s)
		}
	}
	if plans < 300 || clashes < 20 {
		t.Errorf("%d plans, %d clashes of watches: the test says little", plans, clashes)
	}
}

// hotLeaf goes down to one leaf, as early as can be, and looks at its clash.
func hotLeaf(t *testing.T, s *search) int {
	for s.settle() {
		f, ok := s.choose(true)
		if ok {
			s.decide(f)
			continue
		}
		h := &holdings{model: s.model, res: make([][]holding, len(s.p.Res)), people: make([][]holding, len(s.p.People))}
		for i := range s.p.Acts {
			h.add(i)
		}
		if h.watchStops() {
			return 0
		}
		if len(s.clash) == 0 {
			t.Fatal("an empty clash")
		}
		for _, f := range s.clash {
			if !s.holds(f) {
				t.Fatalf("the clash says what does not hold: %+v", f)
			}
		}
		return 1
	}
	return 0
}
