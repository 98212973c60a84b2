package learn

// table holds small numbers by key: open addressing, at most half full. It is emptied at no cost.
type table struct {
	slots []slot
	used  int
	round uint32 // slots of other rounds are empty
	shift uint
}

type slot struct {
	key   int64
	val   int32
	round uint32
}

func newTable() table { return table{slots: make([]slot, 64), round: 1, shift: 58} }

// key packs a fact.
func (f fact) key() int64 { return int64(f.s)<<32 | int64(uint32(f.v)) }

// home is the slot where the search for a key begins (multiplicative hashing, Knuth 1973).
func (t *table) home(key int64) int { return int(uint64(key) * 0x9e3779b97f4a7c15 >> t.shift) }

// seek gives the slot of key, or the empty one where it would be.
func (t *table) seek(key int64) int {
	k := t.home(key)
	for t.slots[k].round == t.round && t.slots[k].key != key {
		k = (k + 1) & (len(t.slots) - 1)
	}
	return k
}

func (t *table) find(key int64) (val int32, ok bool) {
	x := &t.slots[t.seek(key)]
	return x.val, x.round == t.round
}

func (t *table) put(key int64, val int32) {
	x := &t.slots[t.seek(key)]
	if x.round != t.round {
		if t.used++; 2*t.used > len(t.slots) {
			t.grow()
			x = &t.slots[t.seek(key)]
		}
	}
	*x = slot{key, val, t.round}
}

func (t *table) grow() {
	old := t.slots
	t.slots = make([]slot, 2*len(old))
	t.shift--
	for _, x := range old {
		if x.round == t.round {
			t.slots[t.seek(x.key)] = x
		}
	}
}

// drop takes a key out and moves those up that were put behind it for want of room.
func (t *table) drop(key int64) {
	gap := t.seek(key)
	if t.slots[gap].round != t.round {
		return
	}
	t.used--
	mask := len(t.slots) - 1
	for k := (gap + 1) & mask; t.slots[k].round == t.round; k = (k + 1) & mask {
		if (k-t.home(t.slots[k].key))&mask >= (k-gap)&mask {
			t.slots[gap] = t.slots[k]
			gap = k
		}
	}
	t.slots[gap].round = 0
}

// clear empties the table.
func (t *table) clear() {
	t.used = 0
	if t.round++; t.round == 0 {
		clear(t.slots)
		t.round = 1
	}
}
