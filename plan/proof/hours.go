package proof

import (
	"sort"

	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// starts is every possible start of a timing with the finish that it leads to, worked out minute
// by minute from R5, R6 and R8.
type starts struct {
	w       *problem.Timing
	open    []hours.Set // openings
	at, end []int32
	rising  bool         // no later start finishes earlier
	skips   map[int]bool // openings that work from some start passes over
}

// book keeps what has been worked out of timings. O(horizon) of memory for each timing that is asked for.
type book struct {
	p      *problem.Problem
	tables map[*problem.Timing]*starts
	sures  map[int]hours.Set
	curves map[*problem.Link][]int32
	tails  map[tail][]int32
}

func newBook(p *problem.Problem) book {
	return book{p, map[*problem.Timing]*starts{}, map[int]hours.Set{}, map[*problem.Link][]int32{}, map[tail][]int32{}}
}

// length gives the clock minutes that a timing takes from any start, -1 if that depends on the start.
func length(w *problem.Timing) int32 {
	if w.Cured() != nil || !w.Standing() {
		return -1
	}
	return int32(w.Length())
}

// rigid gives the one length of activity i in all of its timings, -1 if there is none.
func (b *book) rigid(i int) int32 {
	d := int32(-1)
	for k, w := range b.p.Acts[i].Timings() {
		if n := length(w); n < 0 || k > 0 && n != d {
			return -1
		} else {
			d = n
		}
	}
	return d
}

// mayBeNothing says whether activity i may take no time at all.
func (b *book) mayBeNothing(i int) bool {
	for _, w := range b.p.Acts[i].Timings() {
		if w.Cured() == nil && w.Length() == 0 {
			return true
		}
	}
	return false
}

// watch gives the minutes of fire watch that follow activity i at least.
func (b *book) watch(i int) int32 {
	if b.mayBeNothing(i) {
		return 0
	}
	n := int32(furthest)
	for _, w := range b.p.Acts[i].Timings() {
		n = min(n, int32(w.Watch()))
	}
	return n
}

// table gives the starts of a timing.
func (b *book) table(w *problem.Timing) *starts {
	if t := b.tables[w]; t != nil {
		return t
	}
	t := &starts{w: w, open: w.Openings(), rising: true, skips: map[int]bool{}}
	add := func(s, f int) {
		if f > b.p.End {
			return
		}
		if n := len(t.end); n > 0 && t.end[n-1] > int32(f) {
			t.rising = false
		}
		t.at, t.end = append(t.at, int32(s)), append(t.end, int32(f))
	}
	switch {
	case w.Cured() != nil:
		sum := w.Cured()
		u := 0
		for s := 0; s < len(sum) && u < len(sum); s++ {
			for u = max(u, s); u < len(sum) && sum[u]-sum[s] < problem.CuredAt; u++ {
			}
			if u < len(sum) {
				add(s, u)
			}
		}
	case w.Standing() || w.Length() == 0:
		for s := 0; s <= b.p.End; s++ {
			add(s, s+w.Length())
		}
	default:
		for k, o := range t.open {
			for _, run := range o {
				for s := int(run.From); s < int(run.To); s++ {
					if f, ok := t.walk(k, s, nil); ok {
						add(s, f)
					}
				}
			}
		}
	}
	b.tables[w] = t
	return t
}

// walk works from minute s of opening first to the finish, and gives it; ok is false where s is
// no possible start. It notes the openings that are passed over on the way, and tells piece, if that is not
// nil, of every run of worked minutes.
func (t *starts) walk(first, s int, piece func(from, to int)) (finish int, ok bool) {
	r := t.w.Rules()
	left, done := r.Work, 0
	for k := first; k < len(t.open); k++ {
		o, room := t.open[k], 0
		for _, run := range o {
			room += max(0, int(run.To)-max(s, int(run.From)))
			if room > 0 && r.InOneGo && !r.OverMeals {
				break // no pause at all: one run of minutes
			}
		}
		take := r.SetUp + left
		if room < take {
			switch {
			case r.InOneGo:
				return 0, false
			case done == 0 && room < r.SetUp+max(r.Least, r.Safe, 1):
				return 0, false
			case done > 0 && room < r.SetUp+max(r.Least, 1):
				t.skips[k] = true
				continue
			}
			take = room
		}
		done += take - r.SetUp
		left -= take - r.SetUp
		for _, run := range o {
			from := max(s, int(run.From))
			n := min(take, int(run.To)-from)
			if n <= 0 {
				continue
			}
			take -= n
			finish = from + n
			if piece != nil {
				piece(from, finish)
			}
		}
		if left == 0 {
			return finish, true
		}
	}
	return 0, false
}

// possible says whether some start within a, with its finish within b, is possible.
func (t *starts) possible(a, b span) bool {
	k := sort.Search(len(t.at), func(k int) bool { return t.at[k] >= a.lo })
	if t.rising {
		k = max(k, sort.Search(len(t.end), func(k int) bool { return t.end[k] >= b.lo }))
		return k < len(t.at) && t.at[k] <= a.hi && t.end[k] <= b.hi
	}
	for ; k < len(t.at) && t.at[k] <= a.hi; k++ {
		if b.lo <= t.end[k] && t.end[k] <= b.hi {
			return true
		}
	}
	return false
}

// sure gives the minutes in which activity i is at work for certain, in whatever timing, if it runs from
// before them to after them; all is true where these are all minutes.
func (b *book) sure(i int) hours.Set {
	if s, ok := b.sures[i]; ok {
		return s
	}
	out := hours.Set{{From: 0, To: hours.Minute(b.p.End)}}
	for _, w := range b.p.Acts[i].Timings() {
		out = out.And(b.steady(w))
	}
	b.sures[i] = out
	return out
}

// steady gives the same for one timing.
func (b *book) steady(w *problem.Timing) hours.Set {
	if w.Standing() {
		return hours.Set{{From: 0, To: hours.Minute(b.p.End)}}
	}
	t := b.table(w)
	var worked []hours.Span
	for k, o := range t.open {
		if !t.skips[k] {
			worked = append(worked, o...)
		}
	}
	return hours.NewSet(worked...)
}

// pieces tells the worked minutes from a possible start.
func (t *starts) pieces(s, end int32, piece func(from, to int)) {
	if t.w.Standing() || t.w.Length() == 0 {
		if end > s {
			piece(int(s), int(end))
		}
		return
	}
	k := sort.Search(len(t.open), func(k int) bool { o := t.open[k]; return int(o[len(o)-1].To) > int(s) })
	t.walk(k, int(s), piece)
}
