package learn

import "sort"

// lanes packs what is free of each resource into words, so that all of them are compared at once:
// a lane of a word holds a number and one guard bit above it. Lanes are 16 bits wide, 32 where a
// capacity is above 32,767.
type lanes struct {
	words int
	per   int // lanes in a word
	width uint
	guard uint64
}

func newLanes(capacity []int32) lanes {
	l := lanes{per: 4, width: 16, guard: 0x8000800080008000}
	for _, c := range capacity {
		if c > 1<<15-1 {
			l = lanes{per: 2, width: 32, guard: 0x8000000080000000}
		}
	}
	l.words = max(1, (len(capacity)+l.per-1)/l.per)
	return l
}

// pack writes amounts into words.
func (l lanes) pack(amounts []int32) []uint64 {
	out := make([]uint64, l.words)
	for k, a := range amounts {
		out[k/l.per] |= uint64(a) << (uint(k%l.per) * l.width)
	}
	return out
}

// profile is what is free in time: stretch i runs from at[i] to at[i+1], the last one for ever.
type profile struct {
	lanes
	at   []int32
	free []uint64
	all  []uint64
}

func newProfile(l lanes, all []uint64) *profile {
	p := &profile{lanes: l, all: all}
	p.clear()
	return p
}

func (p *profile) clear() {
	p.at = append(p.at[:0], -far)
	p.free = append(p.free[:0], p.all...)
}

func (p *profile) fits(i int, want []uint64) bool {
	free := p.free[i*p.words : i*p.words+p.words]
	for w, x := range want {
		if ((free[w]|p.guard)-x)&p.guard != p.guard {
			return false
		}
	}
	return true
}

// find gives the first start from t on at which want is free for length, and the stretch that
// holds it. want must be within what there is in all.
func (p *profile) find(t, length int32, want []uint64) (int32, int) {
	k := sort.Search(len(p.at), func(i int) bool { return p.at[i] > t }) - 1
	for i := k; i < len(p.at) && p.at[i] < t+length; i++ {
		if !p.fits(i, want) {
			t, k = p.at[i+1], i+1
		}
	}
	return t, k
}

// use takes want away from t on for length > 0; stretch k holds t.
func (p *profile) use(t, length int32, want []uint64, k int) {
	if p.at[k] < t {
		k = p.split(k, t)
	}
	i := k
	for ; i < len(p.at) && p.at[i] < t+length; i++ {
		if i+1 == len(p.at) || p.at[i+1] > t+length {
			p.split(i, t+length)
		}
		for w, x := range want {
			p.free[i*p.words+w] -= x
		}
	}
}

// split cuts stretch k at t and gives the index of its later part.
func (p *profile) split(k int, t int32) int {
	p.at = append(p.at, 0)
	copy(p.at[k+2:], p.at[k+1:])
	p.at[k+1] = t
	n := p.words
	p.free = append(p.free, p.free[:n]...)
	copy(p.free[(k+2)*n:], p.free[(k+1)*n:len(p.free)-n])
	copy(p.free[(k+1)*n:(k+2)*n], p.free[k*n:(k+1)*n])
	return k + 1
}
