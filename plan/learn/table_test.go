package learn

import (
	"math/rand/v2"
	"testing"
)

// TestTable compares a table with a map over a long run of puts, drops and clears.
func TestTable(t *testing.T) {
	rnd := rand.New(rand.NewPCG(1, 2))
	got, want := newTable(), map[int64]int32{}
	for n := range 200_000 {
		key := fact{rnd.Int32N(40), rnd.Int32N(40) - 20}.key()
		switch k := rnd.IntN(1000); {
		case k == 0:
			got.clear()
			clear(want)
		case k == 1:
			got.round = ^uint32(0) // the next round is the first one again
			got.clear()
			clear(want)
		case k < 400:
			got.drop(key)
			delete(want, key)
		default:
			got.put(key, int32(n))
			want[key] = int32(n)
		}
		key = fact{rnd.Int32N(40), rnd.Int32N(40) - 20}.key()
		v, ok := got.find(key)
		if w, there := want[key]; ok != there || ok && v != w {
			t.Fatalf("step %d: key %d gives %d %v, not %d %v", n, key, v, ok, w, there)
		}
		if got.used != len(want) {
			t.Fatalf("step %d: %d keys, not %d", n, got.used, len(want))
		}
	}
}
