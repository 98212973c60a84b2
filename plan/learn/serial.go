package learn

import "slices"

// shop builds schedules for activities with fixed lengths and minimum lags, one activity after
// the other, each as early as the lags and the resources let it (serial generation: Kelley 1963).
// O(n x stretches) for a schedule.
type shop struct {
	n      int
	length []int32
	want   [][]uint64
	from   []int32
	before [][]lagTo // lags into each activity
	after  [][]lagTo // the same in mirrored time
	rank   []int32   // an order in which every activity comes after those it waits for
	room   room
	idle   []bool  // asks for nothing
	key    []int64 // what byTime sorts by
}

type lagTo struct{ other, lag int32 }

// newShop makes a shop, nil if the problem has more to it than such lags and
// resources.
func newShop(m *model) *shop {
	h := m.wants()
	if h == nil {
		return nil
	}
	h.before, h.after, h.key = make([][]lagTo, h.n), make([][]lagTo, h.n), make([]int64, h.n)
	for _, a := range m.lags {
		if a.lag < 0 {
			return nil
		}
		h.before[a.j] = append(h.before[a.j], lagTo{int32(a.i), a.lag})
		h.after[a.i] = append(h.after[a.i], lagTo{int32(a.j), a.lag + h.length[a.j] - h.length[a.i]})
	}
	if !h.sort() {
		return nil
	}
	return h
}

// wants is a shop without its lags, nil if the problem has more to it than fixed lengths, lags and resources.
func (m *model) wants() *shop {
	p := m.p
	if !m.plain || len(p.Pairs) > 0 || len(p.Orders) > 0 || len(p.People) > 0 {
		return nil
	}
	n := len(p.Acts)
	capacity := make([]int32, len(p.Res))
	for k := range p.Res {
		capacity[k] = int32(p.Res[k].Capacity)
	}
	l := newLanes(capacity)
	h := &shop{n: n, length: m.length, room: newRoom(l, l.pack(capacity), p.End),
		want: make([][]uint64, n), idle: make([]bool, n), from: make([]int32, n)}
	for i := range p.Acts {
		use := make([]int32, len(p.Res))
		h.idle[i] = true
		if p.Acts[i].By < p.End || p.Acts[i].Site != p.Acts[0].Site || m.acts[i].watch > 0 {
			return nil
		}
		h.from[i] = int32(p.Acts[i].From)
		for _, u := range p.Acts[i].Uses {
			use[u.Res] += int32(u.Amount)
			if use[u.Res] > capacity[u.Res] {
				return nil
			}
			h.idle[i] = h.idle[i] && (u.Amount == 0 || h.length[i] == 0)
		}
		h.want[i] = l.pack(use)
	}
	return h
}

// sort fills rank; false if the lags run in a circle.
func (h *shop) sort() bool {
	left := make([]int, h.n)
	for j := range h.before {
		left[j] = len(h.before[j])
	}
	h.rank = make([]int32, h.n)
	var ready []int
	for j, k := range left {
		if k == 0 {
			ready = append(ready, j)
		}
	}
	done := int32(0)
	for len(ready) > 0 {
		i := ready[0]
		ready = ready[1:]
		h.rank[i] = done
		done++
		for _, a := range h.after[i] {
			if left[a.other]--; left[a.other] == 0 {
				ready = append(ready, int(a.other))
			}
		}
	}
	return int(done) == h.n
}

// forward schedules in the given order, in which every activity comes after those it waits for,
// and gives the finish.
func (h *shop) forward(order, start []int32) int32 {
	h.room.reset(0)
	end := int32(0)
	for _, i := range order {
		t := h.from[i]
		for _, a := range h.before[i] {
			t = max(t, start[a.other]+a.lag)
		}
		if !h.idle[i] {
			t = h.room.place(t, h.length[i], h.want[i])
		}
		start[i] = t
		end = max(end, t+h.length[i])
	}
	return end
}

// backward schedules in mirrored time: the same, with activities in an order in which each comes
// before those it waits for. start gets minus the finishes, from -end on.
func (h *shop) backward(order, start []int32, end int32) {
	h.room.reset(-end)
	for _, i := range order {
		t := -end
		for _, a := range h.after[i] {
			t = max(t, start[a.other]+a.lag)
		}
		if !h.idle[i] {
			t = h.room.place(t, h.length[i], h.want[i])
		}
		start[i] = t
	}
}

// justify moves everything as late as it can go, in order of falling finishes, and then as early
// as it can go, in order of rising starts (forward-backward improvement: Li and Willis 1992,
// Valls, Ballestin and Quintanilla 2005). order and start get the outcome; it gives the finish.
func (h *shop) justify(order, start, tmp []int32, end int32) int32 {
	for i := range start {
		tmp[i] = -(start[i] + h.length[i])
	}
	slices.Reverse(order)
	h.byTime(order, tmp, true)
	h.backward(order, tmp, end)
	for i := range start {
		tmp[i] = -tmp[i] - h.length[i]
	}
	slices.Reverse(order)
	h.byTime(order, tmp, false)
	return h.forward(order, start)
}

// byTime sorts all activities by time; equal ones go by rank, which is turned round in mirrored
// time. The order given is where it begins: each is put in its place among those before it, so that it
// costs O(n) where little changes.
func (h *shop) byTime(order, time []int32, mirrored bool) {
	turn := int64(1)
	if mirrored {
		turn = -1
	}
	for i, t := range time {
		h.key[i] = int64(t)<<32 + turn*int64(h.rank[i])
	}
	for k := 1; k < len(order); k++ {
		i := order[k]
		v, j := h.key[i], k
		for ; j > 0 && h.key[order[j-1]] > v; j-- {
			order[j] = order[j-1]
		}
		order[j] = i
	}
}
