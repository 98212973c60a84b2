package problem

import (
	"slices"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/hours"
)

// day is a stretch of minutes, each of them worked or not, accessible or not, and the rules of a step.
type day struct {
	work, access []bool
	Rules
}

func (d *day) open(t int) bool { return t < len(d.work) && d.work[t] }

// opening lists the minutes worked in the opening that begins at t: a run with its meals (R8). A
// pause is a meal if it is at most 2 h long and only opening hours or shifts are closed (R6).
func (d *day) opening(t int, meals bool) (minutes []int) {
	for d.open(t) {
		for ; d.open(t); t++ {
			minutes = append(minutes, t)
		}
		pause := 0
		for t < len(d.work) && !d.open(t) && d.access[t] && pause <= 120 {
			t++
			pause++
		}
		if pause > 120 || !meals {
			break
		}
	}
	return minutes
}

// walk works a step from start s by R5, R6 and R8: the minutes worked, and the ends of the openings
// worked in. ok is false where the step may not begin at s, or is never done.
func (d *day) walk(s int) (worked, stops []int, ok bool) {
	if !d.open(s) {
		return nil, nil, false
	}
	left := d.Work
	for t := s; t < len(d.work); {
		if !d.open(t) {
			t++
			continue
		}
		first := worked == nil
		room := d.opening(t, !d.InOneGo || d.OverMeals)
		all := d.opening(t, true)
		t = all[len(all)-1] + 1
		piece := max(d.Least, 1) // R8: room for set-up and the least piece, or for set-up and all that is left
		if first {
			piece = max(piece, d.Safe)
		}
		switch {
		case len(room) >= d.SetUp+left:
			worked = append(worked, room[:d.SetUp+left]...)
			return worked, append(stops, worked[len(worked)-1]+1), true
		case first && (d.InOneGo || len(room) < d.SetUp+piece):
			return nil, nil, false
		case len(room) < d.SetUp+piece:
			continue // skipped
		}
		worked = append(worked, room...)
		stops = append(stops, room[len(room)-1]+1)
		left -= len(room) - d.SetUp
	}
	return nil, nil, false
}

func (d *day) timing() *Timing {
	spans := setOf(d.work)
	return Worked(spans, spans.Joined(Meal, setOf(d.access)), d.Rules)
}

func setOf(b []bool) hours.Set {
	var out []hours.Span
	for t, on := range b {
		if on {
			out = append(out, hours.Span{From: hours.Minute(t), To: hours.Minute(t + 1)})
		}
	}
	return hours.NewSet(out...)
}

func daysGen() *rapid.Generator[*day] {
	return rapid.Custom(func(t *rapid.T) *day {
		const n = 1600
		d := &day{work: make([]bool, n), access: make([]bool, n)}
		for i := range d.access {
			d.access[i] = true
		}
		for range rapid.IntRange(0, 3).Draw(t, "stops") { // tide, night, hire: a pause there is no meal
			at := rapid.IntRange(0, n-1).Draw(t, "no access from")
			for i := at; i < min(n, at+rapid.IntRange(1, 200).Draw(t, "for")); i++ {
				d.access[i] = false
			}
		}
		for at := rapid.IntRange(0, 100).Draw(t, "first opening"); at < n; {
			to := at + rapid.OneOf(rapid.IntRange(1, 30), rapid.IntRange(30, 300)).Draw(t, "open for")
			for i := at; i < min(n, to); i++ {
				d.work[i] = d.access[i]
			}
			at = to + rapid.OneOf(rapid.IntRange(1, 60), rapid.IntRange(118, 123), rapid.IntRange(120, 400)).Draw(t, "closed for")
		}
		d.Work = rapid.OneOf(rapid.IntRange(1, 60), rapid.IntRange(1, 400)).Draw(t, "work")
		d.SetUp = rapid.SampledFrom([]int{0, 0, 10, 30}).Draw(t, "set-up")
		d.Least = min(d.Work, rapid.SampledFrom([]int{0, 0, 15, 45}).Draw(t, "least piece"))
		d.Safe = min(d.Work, rapid.SampledFrom([]int{0, 0, 20, 90}).Draw(t, "safe point"))
		d.InOneGo, d.OverMeals = rapid.Bool().Draw(t, "in one go"), rapid.Bool().Draw(t, "over meals")
		return d
	})
}

func TestTimingWorksMinuteByMinute(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := daysGen().Draw(t, "day")
		w := d.timing()
		next, finish := Inf, Inf
		for s := len(d.work); s >= 0; s-- {
			worked, stops, ok := d.walk(s)
			if ok {
				end := worked[len(worked)-1] + 1
				if end > finish {
					t.Fatalf("a start at %d finishes at %d, a later one at %d already", s, end, finish)
				}
				next, finish = s, end
				checkStart(t, w, s, worked, stops)
			}
			if got := w.Start(s); got != next {
				t.Fatalf("the first start from %d on is %d, want %d", s, got, next)
			}
		}
		if w.Length() != d.Work {
			t.Fatalf("length %d", w.Length())
		}
	})
}

// checkStart holds finish, pieces and stops of one start against the minutes walked.
func checkStart(t *rapid.T, w *Timing, s int, worked, stops []int) {
	t.Helper()
	if got, want := w.Finish(s), worked[len(worked)-1]+1; got != want {
		t.Fatalf("a start at %d finishes at %d, want %d", s, got, want)
	}
	var minutes []int
	w.Pieces(s, func(from, to int) {
		if to <= from {
			t.Fatalf("an empty piece %d to %d", from, to)
		}
		for m := from; m < to; m++ {
			minutes = append(minutes, m)
		}
	})
	if !slices.Equal(minutes, worked) {
		t.Fatalf("a start at %d works %v, want %v", s, setOfMinutes(minutes), setOfMinutes(worked))
	}
	if got := w.Stops(s); !slices.Equal(got, stops) {
		t.Fatalf("a start at %d stops at %v, want %v", s, got, stops)
	}
}

func setOfMinutes(list []int) hours.Set {
	var out []hours.Span
	for _, m := range list {
		out = append(out, hours.Span{From: hours.Minute(m), To: hours.Minute(m + 1)})
	}
	return hours.NewSet(out...)
}

func TestLatestIsTheLastStartInTime(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := daysGen().Draw(t, "day")
		w := d.timing()
		f, lo := rapid.IntRange(0, len(d.work)+50).Draw(t, "finish by"), rapid.IntRange(0, len(d.work)).Draw(t, "from")
		want := -Inf
		for s := lo; s < len(d.work); s++ {
			if worked, _, ok := d.walk(s); ok && worked[len(worked)-1] < f {
				want = s
			}
		}
		if got := w.Latest(f, lo); got != want {
			t.Fatalf("the last start from %d on that is done by %d is %d, want %d", lo, f, got, want)
		}
	})
}

func TestFilmsCureByTheSumOfTheirRates(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 300).Draw(t, "minutes")
		rate := make([]float64, n)
		for i := range rate {
			rate[i] = rapid.SampledFrom([]float64{0, 0, 1.0 / 3, 1.0 / 7, 0.01, 1.0 / 60, 0.25}).Draw(t, "rate")
		}
		w := Curing(rate)
		finish := make([]int, n+1)
		for s := range finish {
			finish[s] = Inf
			sum := 0.0
			for u := s; u < n; u++ {
				if sum += rate[u]; sum > 1-1e-8 {
					finish[s] = u + 1
					break
				}
			}
			if got := w.Finish(s); got != finish[s] {
				t.Fatalf("a film begun at %d is cured at %d, want %d", s, got, finish[s])
			}
			if got, never := w.Start(s), finish[s] >= Inf; never != (got >= Inf) || !never && got != s {
				t.Fatalf("a film can begin at %d, want %d (cured: %v)", got, s, !never)
			}
		}
		f := rapid.IntRange(0, n).Draw(t, "cured by")
		want := -Inf
		for s := range finish {
			if finish[s] <= f {
				want = s
			}
		}
		if got := w.Latest(f, 0); got != want {
			t.Fatalf("the last film cured by %d begins at %d, want %d", f, got, want)
		}
	})
	if w := Curing([]float64{1, 1}); w.Finish(-1) != Inf || w.Finish(2) != Inf {
		t.Error("a film begins before or after all that is known")
	}
}

func TestClockTimeRunsAtAnyMinute(t *testing.T) {
	w := Fixed(90)
	if w.Start(17) != 17 || w.Finish(17) != 107 || w.Latest(200, 0) != 110 || w.Calendar() != nil || w.Length() != 90 {
		t.Errorf("start %d, finish %d, latest %d", w.Start(17), w.Finish(17), w.Latest(200, 0))
	}
	var got [][2]int
	w.Pieces(17, func(from, to int) { got = append(got, [2]int{from, to}) })
	if len(got) != 1 || got[0] != [2]int{17, 107} || !slices.Equal(w.Stops(17), []int{107}) {
		t.Errorf("standing time is one piece: %v, %v", got, w.Stops(17))
	}
	nothing := Fixed(0)
	nothing.Pieces(5, func(int, int) { t.Error("no time has a piece") })
	if nothing.Finish(5) != 5 {
		t.Error("no time takes time")
	}
	empty := Worked(hours.Set{{From: 10, To: 20}}, hours.Set{{From: 10, To: 20}}, Rules{})
	if empty.Start(3) != 3 || empty.Finish(3) != 3 || empty.Latest(8, 0) != 8 {
		t.Error("work of no minutes needs no opening (R4)")
	}
	empty.Pieces(3, func(int, int) { t.Error("work of no minutes has a piece") })
}

// R8 by hand: openings of 60, 30 and 120 min with nights between, set-up 10, least piece 25.
func TestStopsByHand(t *testing.T) {
	spans := hours.Set{{From: 0, To: 60}, {From: 500, To: 530}, {From: 1000, To: 1120}}
	rules := Rules{Work: 100, SetUp: 10, Least: 25}
	for _, tc := range []struct {
		what          string
		rules         Rules
		start, finish int
	}{
		{"50 min done, 30 min skipped, 50 min after the second night", rules, 0, 1060},
		{"the last opening of the day has room for the least piece", Rules{Work: 100, SetUp: 10, Least: 20}, 0, 1040},
		{"the safe point is not reached on the first day", Rules{Work: 100, SetUp: 10, Safe: 51}, 1000, 1110},
		{"the safe point is just reached", Rules{Work: 100, SetUp: 10, Safe: 50}, 0, 1040},
		{"a short rest is done in a short opening", Rules{Work: 70, SetUp: 10, Least: 25}, 0, 530},
		{"in one go waits for the long opening", Rules{Work: 100, SetUp: 10, InOneGo: true}, 1000, 1110},
		{"nothing is long enough", Rules{Work: 111, SetUp: 10, InOneGo: true}, Inf, 0},
	} {
		w := Worked(spans, spans.Joined(Meal, nil), tc.rules)
		if s := w.Start(0); s != tc.start || s < Inf && w.Finish(s) != tc.finish {
			t.Errorf("%s: starts %d, finishes %d, want %d and %d", tc.what, s, w.Finish(min(s, 1000)), tc.start, tc.finish)
		}
	}
}
