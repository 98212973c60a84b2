package learn

// room is where activities find their place in time: what is free of each resource.
type room interface {
	reset(from int32) // everything is free; nothing starts before from
	// place gives the first start from t on at which want is free for length > 0, and takes it.
	place(t, length int32, want []uint64) int32
}

// longSlots is the longest horizon for which every unit of time has a slot of its own.
const longSlots = 1 << 13

func newRoom(l lanes, all []uint64, end int) room {
	if l.words == 1 && end < longSlots {
		return &slots{guard: l.guard, all: all[0]}
	}
	return newProfile(l, all)
}

func (p *profile) reset(int32) { p.clear() }

func (p *profile) place(t, length int32, want []uint64) int32 {
	t, k := p.find(t, length, want)
	p.use(t, length, want, k)
	return t
}

// slots keeps a word for each unit of time: for short horizons and few resources, where activities last
// some units only, faster than stretches. O(length + units passed over) for a place.
type slots struct {
	guard, all uint64
	from       int32
	free       []uint64
}

func (s *slots) reset(from int32) {
	s.from = from
	for i := range s.free {
		s.free[i] = s.all
	}
}

func (s *slots) place(t, length int32, want []uint64) int32 {
	at, n, w := int(t-s.from), int(length), want[0]
	for len(s.free) < at+n {
		s.free = append(s.free, s.all)
	}
	for k := at + n - 1; k >= at; { // from behind: a slot that is too full moves the start beyond it
		if ((s.free[k]|s.guard)-w)&s.guard == s.guard {
			k--
			continue
		}
		at = k + 1
		k = at + n - 1
		for len(s.free) <= k {
			s.free = append(s.free, s.all)
		}
	}
	for k := at; k < at+n; k++ {
		s.free[k] -= w
	}
	return int32(at) + s.from
}
