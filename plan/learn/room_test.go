package learn

import (
	"math/rand/v2"
	"testing"
)

// Slots and stretches of time are two ways to keep the same thing: they give the same places. What
// stretches give is held against plain arithmetic elsewhere.
func TestSlotsAndStretchesAgree(t *testing.T) {
	r := rand.New(rand.NewPCG(31, 7))
	for round := 0; round < 300; round++ {
		capacity := make([]int32, 1+r.IntN(4))
		for i := range capacity {
			capacity[i] = int32(1 + r.IntN(6))
		}
		l := newLanes(capacity)
		all := l.pack(capacity)
		a, b := newRoom(l, all, 100), newRoom(l, all, longSlots)
		if _, ok := a.(*slots); !ok {
			t.Fatal("a short horizon has no slots")
		}
		if _, ok := b.(*profile); !ok {
			t.Fatal("a long horizon has no stretches")
		}
		for again := 0; again < 3; again++ { // rooms are used again and again, in forward and in mirrored time
			from := int32(-r.IntN(40))
			a.reset(from)
			b.reset(from)
			for k := 0; k < 25; k++ {
				want := make([]int32, len(capacity))
				for i := range want {
					want[i] = int32(r.IntN(int(capacity[i]) + 1))
				}
				t0, length, w := from+int32(r.IntN(30)), int32(1+r.IntN(6)), l.pack(want)
				if x, y := a.place(t0, length, w), b.place(t0, length, w); x != y {
					t.Fatalf("round %d: %v for %d from %d on: slots say %d, stretches %d", round, want, length, t0, x, y)
				}
			}
		}
	}
}

// Sorting by time begins at the order given and gives one order, whatever that was.
func TestByTime(t *testing.T) {
	r := rand.New(rand.NewPCG(2, 19))
	for round := 0; round < 100; round++ {
		n := 1 + r.IntN(30)
		h := &shop{n: n, key: make([]int64, n)}
		time, order := make([]int32, n), make([]int32, n)
		for i, k := range r.Perm(n) {
			h.rank = append(h.rank, int32(k))
			order[i], time[i] = int32(i), int32(r.IntN(8)-4)
		}
		for _, mirrored := range []bool{false, true} {
			r.Shuffle(n, func(i, j int) { order[i], order[j] = order[j], order[i] })
			h.byTime(order, time, mirrored)
			for k := 1; k < n; k++ {
				a, b := order[k-1], order[k]
				if time[a] > time[b] || time[a] == time[b] && (h.rank[a] < h.rank[b]) == mirrored {
					t.Fatalf("round %d, mirrored %v: %d before %d", round, mirrored, a, b)
				}
			}
		}
	}
}
