package learn

import (
	"math/rand/v2"
	"testing"

	"sailby/plan/problem"
	"sailby/tasks/hours"
)

func randomTiming(r *rand.Rand, end int) *problem.Timing {
	switch r.IntN(6) {
	case 0:
		return problem.Fixed(r.IntN(6))
	case 1:
		rate := make([]float64, end)
		for t := range rate {
			rate[t] = 0.05 + 0.5*r.Float64()
		}
		return problem.Curing(rate)
	}
	s := randomSet(r, end)
	return problem.Worked(s, s.Joined(1+r.IntN(2), nil), problem.Rules{Work: 1 + r.IntN(14), SetUp: r.IntN(3), Least: r.IntN(4),
		Safe: r.IntN(4), InOneGo: r.IntN(3) == 0, OverMeals: r.IntN(2) == 0})
}

// TestGrid holds a timing written out in stretches against the timing itself, minute by minute.
func TestGrid(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 1))
	const end = 60
	for k := 0; k < 3000; k++ {
		w := randomTiming(r, end)
		g := newGrid(w, end)
		for at := 0; at <= end; at++ {
			start, finish, last, latest := far, far, -far, -far
			for s := 0; s <= end; s++ {
				if w.Start(s) != s || w.Finish(s) > end {
					continue
				}
				if s >= at && start == far {
					start, finish = int32(s), int32(w.Finish(s))
				}
				if s <= at {
					last = int32(s)
				}
				if w.Finish(s) <= at {
					latest = int32(s)
				}
			}
			v := int32(at)
			if g.start(v) != start || g.finish(v) != finish || g.last(v) != last || g.latest(v) != latest {
				t.Fatalf("timing %d at %d: start %d finish %d last %d latest %d, want %d %d %d %d", k, at,
					g.start(v), g.finish(v), g.last(v), g.latest(v), start, finish, last, latest)
			}
		}
	}
}

// TestSteady holds the minutes of sure work against every start that runs over them.
func TestSteady(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2))
	const end = 60
	kept, skipped := 0, 0
	for k := 0; k < 3000; k++ {
		w := randomTiming(r, end)
		sure := steady(w, newGrid(w, end))
		if sure == nil {
			continue
		}
		for s := 0; s <= end; s++ {
			if w.Start(s) != s || w.Finish(s) > end {
				continue
			}
			var works [end + 1]bool
			w.Pieces(s, func(from, to int) {
				for t := from; t < to; t++ {
					works[t] = true
				}
			})
			for m := s; m < w.Finish(s); m++ {
				if !sure.has(int32(m)) {
					if works[m] {
						skipped++
					}
					continue
				}
				kept++
				if !works[m] {
					t.Fatalf("timing %d: minute %d is sure, but work begun at %d rests in it", k, m, s)
				}
			}
		}
	}
	if kept < 10*skipped || skipped == 0 {
		t.Errorf("%d minutes are sure and %d are worked without being so", kept, skipped)
	}
}

// TestCurves holds the inverses of monotone functions against their definition: least(v) is the
// first place from which v is reached, in both directions.
func TestCurves(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 3))
	const end = 40
	for k := 0; k < 500; k++ {
		table := make([]int, end+1)
		v := r.IntN(4)
		for i := range table {
			v += r.IntN(3) * r.IntN(2)
			table[i] = v
		}
		f := byFunc(func(t int) int { return table[t] }, end)
		for _, c := range []curve{up{f}, down{f}} {
			lo, hi := int32(0), int32(end)
			if _, mirrored := c.(down); mirrored {
				lo, hi = int32(-table[end]+1), int32(-table[0])
			}
			for x := lo; x < hi; x++ {
				if c.at(x) > c.at(x+1) {
					t.Fatalf("%T falls from %d to %d at %d", c, c.at(x), c.at(x+1), x)
				}
				want := c.at(x)
				at := c.least(want)
				if at > x || at >= lo && c.at(at) < want || at-1 >= lo && c.at(at-1) >= want {
					t.Fatalf("%T: least(%d) is %d, but the value at %d is %d", c, want, at, x, c.at(x))
				}
			}
		}
	}
}

func TestSpans(t *testing.T) {
	a := toSpans(hours.Set{{From: 0, To: 10}, {From: 20, To: 30}})
	b := toSpans(hours.Set{{From: 5, To: 25}})
	for at := int32(-2); at < 35; at++ {
		inA, inB := at >= 0 && at < 10 || at >= 20 && at < 30, at >= 5 && at < 25
		if a.has(at) != inA || a.and(b).has(at) != (inA && inB) || a.less(b).has(at) != (inA && !inB) {
			t.Errorf("minute %d: in %v, both %v, only the first %v", at, a.has(at), a.and(b).has(at), a.less(b).has(at))
		}
	}
	if got := a.lastBefore(20); got != 9 {
		t.Errorf("the last minute before 20 is %d, want 9", got)
	}
	if got := a.firstFrom(10); got != 20 {
		t.Errorf("the first minute from 10 on is %d, want 20", got)
	}
	if a.lastBefore(0) != -far || a.firstFrom(30) != far {
		t.Error("there is nothing before the first minute and after the last")
	}
}
