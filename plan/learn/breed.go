package learn

import "math/rand/v2"

// breeder improves schedules by mixing their orders: a child takes stretches of time from one
// parent and the rest from the other, is justified forward and backward, and takes the place of a
// worse one (after Hartmann 1998; Debels and Vanhoucke 2007).
type breeder struct {
	*shop
	rnd   *rand.Rand
	herd  []*beast
	best  *beast
	taken []bool
	tmp   []int32
	made  int64 // schedules made
	stale int   // children since the last improvement of the herd's best
	size  int   // beasts in the herd
}

// beast is a schedule with its order.
type beast struct {
	order, start []int32
	end          int32
}

// Measured on seven of the hardest PSPLIB instances at 50,000 schedules: herds of 20 and 40, parents
// chosen by their finish, rarer swaps and repeated justification all came out worse.
const (
	herdSize = 80
	swapOne  = 8  // one in so many neighbours is swapped in a child
	staleAt  = 50 // children for each of the herd without improvement before it is renewed
)

func newBreeder(h *shop, seed uint64) *breeder {
	return &breeder{shop: h, rnd: rand.New(rand.NewPCG(seed, 17)), size: herdSize, taken: make([]bool, h.n), tmp: make([]int32, h.n)}
}

func (b *breeder) fresh() *beast {
	x := &beast{order: make([]int32, b.n), start: make([]int32, b.n)}
	for i := range x.order {
		x.order[i] = int32(i)
	}
	return x
}

// found makes a beast from nothing: latest finishes of the justified plan with noise.
func (b *breeder) found(spread float64) *beast {
	x := b.fresh()
	tail := make([]int32, b.n)
	b.byTime(x.order, b.rank, false)
	for k := b.n - 1; k >= 0; k-- {
		i := x.order[k]
		tail[i] = b.length[i]
		for _, a := range b.after[i] {
			tail[i] = max(tail[i], tail[a.other]+a.lag-b.length[a.other]+b.length[i])
		}
	}
	key := make([]float64, b.n)
	for i := range key {
		key[i] = float64(tail[i]) * (1 - spread*b.rnd.Float64())
	}
	b.topological(x.order, key)
	b.finish(x)
	return x
}

// topological orders the activities by falling key, each after those it waits for. O(n^2).
func (b *breeder) topological(order []int32, key []float64) {
	left := make([]int, b.n)
	for j := range b.before {
		left[j] = len(b.before[j])
	}
	for k := range order {
		pick := -1
		for j, w := range left {
			if w == 0 && (pick < 0 || key[j] > key[pick]) {
				pick = j
			}
		}
		left[pick] = -1
		order[k] = int32(pick)
		for _, a := range b.after[pick] {
			left[a.other]--
		}
	}
}

// finish schedules a beast's order and justifies it.
func (b *breeder) finish(x *beast) {
	end := b.forward(x.order, x.start)
	x.end = b.justify(x.order, x.start, b.tmp, end)
	b.made += 3
	b.byTime(x.order, x.start, false)
	if b.best == nil || x.end < b.best.end {
		b.best = x
		b.stale = 0
	}
}

// step makes one beast more and gives true if it is the best so far.
func (b *breeder) step() bool {
	old := b.best
	if len(b.herd) < b.size {
		spread := 0.1 + 0.6*b.rnd.Float64()
		if len(b.herd) == 0 && old == nil {
			spread = 0
		}
		b.herd = append(b.herd, b.found(spread))
		return b.best != old
	}
	if b.stale++; b.stale > staleAt*b.size {
		b.stale = 0
		b.size += b.size / 2
		b.herd = b.herd[:0]
		if b.rnd.IntN(3) > 0 { // two times in three the best stays in the herd
			b.herd = append(b.herd, b.best)
		}
		return false
	}
	x := b.cross(b.herd[b.rnd.IntN(len(b.herd))], b.herd[b.rnd.IntN(len(b.herd))])
	b.shake(x)
	b.finish(x)
	b.admit(x)
	return b.best != old
}

// welcome takes a schedule that was found elsewhere into the herd.
func (b *breeder) welcome(starts []int) {
	x := b.fresh()
	for i, t := range starts {
		x.start[i] = int32(t)
	}
	b.byTime(x.order, x.start, false)
	b.finish(x)
	if len(b.herd) < b.size {
		b.herd = append(b.herd, x)
		return
	}
	worst := 0
	for k, y := range b.herd {
		if y.end > b.herd[worst].end {
			worst = k
		}
	}
	b.herd[worst] = x
}

// cross takes a stretch of p's order and fills up from q.
func (b *breeder) cross(p, q *beast) *beast {
	x := b.fresh()
	clear(b.taken)
	n := b.n
	width := n/4 + b.rnd.IntN(n/2+1)
	lo := b.rnd.IntN(n) - width/2
	hi := min(n, lo+width)
	lo = max(0, lo)
	k := 0
	put := func(from []int32, upTo int) {
		for _, i := range from {
			if k == upTo {
				return
			}
			if !b.taken[i] {
				b.taken[i] = true
				x.order[k] = i
				k++
			}
		}
	}
	put(q.order, lo)
	put(p.order, hi)
	put(q.order, n)
	return x
}

// shake swaps neighbours that do not wait for each other.
func (b *breeder) shake(x *beast) {
	for k := 0; k+1 < b.n; k++ {
		if b.rnd.IntN(swapOne) > 0 {
			continue
		}
		i, j := x.order[k], x.order[k+1]
		free := true
		for _, a := range b.before[j] {
			free = free && a.other != i
		}
		if free {
			x.order[k], x.order[k+1] = j, i
		}
	}
}

// admit puts x in the place of the worse of two beasts, unless its like is there.
func (b *breeder) admit(x *beast) {
	for _, y := range b.herd {
		if y.end == x.end {
			same := true
			for i := range x.start {
				if x.start[i] != y.start[i] {
					same = false
					break
				}
			}
			if same {
				return
			}
		}
	}
	p, q := b.rnd.IntN(len(b.herd)), b.rnd.IntN(len(b.herd))
	if b.herd[q].end > b.herd[p].end {
		p = q
	}
	if x.end <= b.herd[p].end {
		b.herd[p] = x
	}
}
