package proof

import (
	"math/rand/v2"
	"testing"

	"sailby/plan/problem"
	"sailby/tasks/hours"
)

func randomSet(r *rand.Rand, end int) hours.Set {
	var out []hours.Span
	for t := r.IntN(3); t < end; {
		w := 2 + r.IntN(8)
		out = append(out, hours.Span{From: hours.Minute(t), To: hours.Minute(min(end, t+w))})
		t += w + 1 + r.IntN(3)
	}
	return hours.NewSet(out...)
}

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

// TestStarts holds the starts and finishes worked out here against those that the planner works out: two readings
// of R8 by two programs.
func TestStarts(t *testing.T) {
	r := rand.New(rand.NewPCG(4, 8))
	const end = 60
	found := 0
	for k := 0; k < 4000; k++ {
		w := randomTiming(r, end)
		b := newBook(&problem.Problem{End: end})
		table := b.table(w)
		at := 0
		for s := 0; s <= end; s++ {
			f := problem.Inf
			if w.Start(s) == s {
				f = w.Finish(s)
			}
			if f > end {
				continue
			}
			found++
			if at >= len(table.at) || int(table.at[at]) != s || int(table.end[at]) != f {
				t.Fatalf("timing %d: from %d to %d by the planner, here %v to %v", k, s, f, table.at, table.end)
			}
			at++
			var own, other []int
			table.pieces(int32(s), int32(f), func(from, to int) { own = append(own, from, to) })
			w.Pieces(s, func(from, to int) { other = append(other, from, to) })
			if hoursOf(own).Total() != hoursOf(own).And(hoursOf(other)).Total() || hoursOf(own).Total() != hoursOf(other).Total() {
				t.Fatalf("timing %d from %d: pieces %v by the planner, here %v", k, s, other, own)
			}
		}
		if at != len(table.at) {
			t.Fatalf("timing %d: starts %v here, the planner knows %d of them", k, table.at, at)
		}
	}
	if found < 10000 {
		t.Errorf("%d starts: too few to tell", found)
	}
}

func hoursOf(pairs []int) hours.Set {
	var out []hours.Span
	for i := 0; i+1 < len(pairs); i += 2 {
		out = append(out, hours.Span{From: hours.Minute(pairs[i]), To: hours.Minute(pairs[i+1])})
	}
	return hours.NewSet(out...)
}

// TestSteady tries every start: what is called certain work is done from each that runs over it, and a minute that all of
// them work is called certain.
func TestSteady(t *testing.T) {
	r := rand.New(rand.NewPCG(8, 8))
	const end = 60
	for k := 0; k < 2000; k++ {
		w := randomTiming(r, end)
		b := newBook(&problem.Problem{End: end})
		table, steady := b.table(w), b.steady(w)
		for m := hours.Minute(0); m < end; m++ {
			over, all := false, true
			for i := range table.at {
				if s, f := table.at[i], table.end[i]; int(s) <= int(m) && int(m) < int(f) {
					over = true
					worked := false
					table.pieces(s, f, func(from, to int) { worked = worked || from <= int(m) && int(m) < to })
					all = all && worked
				}
			}
			if over && steady.Has(m) && !all {
				t.Fatalf("timing %d: minute %d is not worked from every start that runs over it", k, m)
			}
		}
	}
}

// TestLeast holds the least overlap with a window against a count over every start.
func TestLeast(t *testing.T) {
	r := rand.New(rand.NewPCG(9, 8))
	const end = 60
	some := 0
	for k := 0; k < 3000; k++ {
		w := randomTiming(r, end)
		p := &problem.Problem{End: end, Close: end, Res: []problem.Resource{{Capacity: 1}},
			Acts: []problem.Act{{By: problem.Inf, Modes: []problem.Mode{{Time: w}}, Uses: []problem.Use{{Res: 0, Amount: 1, Stays: r.IntN(2) == 0}}}}}
		c := newChecker(p)
		s := span{int32(r.IntN(end)), 0}
		s.hi = s.lo + int32(r.IntN(30))
		from := r.IntN(end)
		win := hours.Span{From: hours.Minute(from), To: hours.Minute(min(end, from+1+r.IntN(20)))}
		v, ok := c.look([]fact{{c.start[0], false, s.lo}, {c.start[0], true, s.hi}})
		if !ok {
			continue
		}
		table, want := c.book.table(w), int64(furthest)
		for i := range table.at {
			if table.at[i] < s.lo || table.at[i] > s.hi {
				continue
			}
			n := int64(0)
			count := func(a, b int) {
				n += int64(hours.Set{win}.Count(hours.Span{From: hours.Minute(a), To: hours.Minute(b)}))
			}
			if p.Acts[0].Uses[0].Stays {
				count(int(table.at[i]), int(table.end[i]))
			} else {
				w.Pieces(int(table.at[i]), count)
			}
			want = min(want, n)
		}
		quick := c.newLoad(v, win, false).overlap(0, p.Acts[0].Uses[0].Stays)
		full := c.newLoad(v, win, true).overlap(0, p.Acts[0].Uses[0].Stays)
		if quick > want || full != want && c.rigid[0] < 0 || full > want {
			t.Fatalf("timing %d, starts from %d to %d, window %v: %d, or at least %d, and it is %d", k, s.lo, s.hi, win, full, quick, want)
		}
		if want > 0 && want < furthest {
			some++
		}
	}
	if some < 200 {
		t.Errorf("%d overlaps: too few to tell", some)
	}
}
