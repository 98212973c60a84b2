package learn

import "math/rand/v2"

// fitter builds schedules for activities with fixed lengths and lags both ways: one activity after the other,
// each as early as the lags and the resources let it. If one cannot start by when a longest wait wants it,
// those that it would come too late after are taken out again, with all that starts no earlier, and
// may not start before they are late enough (unscheduling: Franck, Neumann and Schwindt 2001). It
// finds plans, it proves nothing. O(n) for a placing, O(n^2) for each time that activities are taken out.
type fitter struct {
	n        int
	length   []int32
	want     [][]uint64
	idle     []bool
	net      *network // closed
	floor    []int32  // no start before this: the problem's, and what taking out asks for
	first    []int32  // the problem's
	last     []int32  // the problem's latest starts
	es, ls   []int32
	start    []int32
	in       []bool
	key      []float64
	room     room
	rnd      *rand.Rand
	attempts int
	ticks    int64
}

// An attempt is given up when activities have been taken out so many times for each there is, or after so many ticks.
const (
	takenOut    = 4
	attemptMost = 2_000_000
)

// newFitter makes a fitter, nil if the problem has more to it than lags and resources.
func newFitter(m *model, seed uint64) *fitter {
	p, n := m.p, len(m.p.Acts)
	h := m.wants()
	if h == nil || n == 0 || n > mostClosed {
		return nil
	}
	f := &fitter{n: n, length: m.length, want: h.want, idle: h.idle, room: h.room, net: newNetwork(n),
		es: make([]int32, n), ls: make([]int32, n), start: make([]int32, n), in: make([]bool, n), key: make([]float64, n),
		floor: make([]int32, n), rnd: rand.New(rand.NewPCG(seed, 41))}
	for _, a := range m.lags {
		f.net.put(a.i, a.j, a.lag)
	}
	if !f.net.close() {
		return nil
	}
	for i := range p.Acts {
		f.first = append(f.first, m.now[m.start[i]])
		f.last = append(f.last, -m.now[m.start[i]^1])
	}
	return f
}

// attempt gives a schedule, nil if there was too much to take out. The first attempt goes by latest
// starts alone, the others with some noise.
func (f *fitter) attempt() *beast {
	copy(f.floor, f.first)
	clear(f.in)
	f.bounds()
	spread := 0.0
	if f.attempts > 0 {
		spread = f.rnd.Float64() * 0.3
	}
	f.attempts++
	for i := range f.key {
		f.key[i] = float64(f.ls[i]) * (1 - spread*f.rnd.Float64())
	}
	f.room.reset(0)
	for left, out := f.n, 0; left > 0; {
		j := f.next()
		t := f.es[j]
		if !f.idle[j] {
			t = f.room.place(t, f.length[j], f.want[j])
		}
		f.ticks += 4 * int64(f.n)
		if t <= f.ls[j] {
			f.put(j, t)
			left--
			continue
		}
		if out++; out > takenOut*f.n || t > f.last[j] || f.ticks > attemptMost {
			return nil
		}
		left += f.takeOut(j, t)
	}
	x := &beast{start: append([]int32(nil), f.start...)}
	for i, t := range x.start {
		x.end = max(x.end, t+f.length[i])
	}
	return x
}

// fit makes some attempts.
func (s *search) fit(f *fitter) outcome {
	for k := 0; k < fitAtOne; k++ {
		f.ticks = 0
		x := f.attempt()
		s.ticks += f.ticks
		if x != nil && x.end < s.value && !s.adopt(x) {
			return over
		}
		if s.stopped() {
			return stopped
		}
	}
	return tired
}

// fitAtOne is how many attempts are made in one turn, fitInAll how many once there is a plan.
const (
	fitAtOne = 4
	fitInAll = 40
)

// bounds brings es and ls up to date with floors and all that is placed.
func (f *fitter) bounds() {
	copy(f.es, f.floor)
	copy(f.ls, f.last)
	for i := 0; i < f.n; i++ {
		if f.in[i] {
			f.reach(i, f.start[i], f.start[i])
		} else {
			f.reach(i, f.floor[i], f.last[i])
		}
	}
	f.ticks += int64(f.n) * int64(f.n) / 4
}

// reach tells all others that activity i starts from lo to hi.
func (f *fitter) reach(i int, lo, hi int32) {
	for j := 0; j < f.n; j++ {
		if d := f.net.get(i, j); d != unlinked {
			f.es[j] = max(f.es[j], lo+d)
		}
		if d := f.net.get(j, i); d != unlinked {
			f.ls[j] = min(f.ls[j], hi-d)
		}
	}
}

// next gives the most urgent activity of those that wait for no other.
func (f *fitter) next() int {
	best := -1
	for j := 0; j < f.n; j++ {
		if !f.in[j] && (best < 0 || f.key[j] < f.key[best]) && f.ready(j) {
			best = j
		}
	}
	return best
}

// ready says whether all that start no later than j in any case are in; of two that start together
// the first goes first.
func (f *fitter) ready(j int) bool {
	for i := 0; i < f.n; i++ {
		if f.in[i] || i == j || f.net.get(i, j) < 0 {
			continue
		}
		if f.net.get(i, j) > 0 || f.net.get(j, i) < 0 || i < j {
			return false
		}
	}
	return true
}

func (f *fitter) put(j int, t int32) {
	f.in[j], f.start[j] = true, t
	f.reach(j, t, t)
}

// takeOut takes those out that keep j from starting at t, and all that start no earlier than the first of them.
// They start late enough from now on. It gives how many have gone.
func (f *fitter) takeOut(j int, t int32) int {
	from := far
	for i := 0; i < f.n; i++ {
		if d := f.net.get(j, i); f.in[i] && d != unlinked && f.start[i]-d < t {
			from = min(from, f.start[i])
			f.floor[i] = max(f.floor[i], t+d)
		}
	}
	gone := 0
	f.room.reset(0)
	for i := 0; i < f.n; i++ {
		switch {
		case !f.in[i]:
		case f.start[i] >= from:
			f.in[i] = false
			gone++
		case !f.idle[i]:
			f.room.place(f.start[i], f.length[i], f.want[i])
		}
	}
	f.bounds()
	return gone
}
