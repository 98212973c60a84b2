package learn

import (
	"math/rand/v2"
	"sort"
)

// slicer takes a slice of time out of the best plan and lets the learning search arrange its
// activities anew, everything before it kept and everything after it moved earlier by one, or,
// with calendars, let be no later than it is (the decomposition of Debels and Vanhoucke 2007, with an exact search in the slice). A slice that
// holds a better plan shortens the whole.
type slicer struct {
	rnd   *rand.Rand
	size  float64 // activities in a slice
	step  int32   // with calendars: minutes by which a slice must shorten the whole
	order []int
}

const (
	smallSlice  = 8
	firstSlice  = 20
	sliceWork   = 250 // conflicts for one slice
	slicesAtOne = 4   // slices tried in one turn
)

// pick gives the facts that hold the rest of the best plan in place. The slice begins at a random
// activity in the order of starts.
func (c *slicer) pick(s *search, out []fact) []fact {
	n := len(s.start)
	c.order = c.order[:0]
	for i := 0; i < n; i++ {
		c.order = append(c.order, i)
	}
	sort.SliceStable(c.order, func(x, y int) bool { return s.base[c.order[x]] < s.base[c.order[y]] })
	size := min(n, int(c.size))
	first := c.rnd.IntN(n+size) - size
	from, to := s.base[c.order[max(0, first)]], int(far)
	if first <= 0 {
		from = -1
	}
	if first+size < n {
		to = s.base[c.order[max(0, first+size)]]
	}
	for _, i := range c.order {
		v := int32(s.base[i])
		x := s.start[i]
		switch {
		case s.base[i] >= to && !s.plain: // calendars do not let everything move by one
			out = append(out, fact{x ^ 1, -v})
		case s.base[i] >= to:
			out = append(out, fact{x ^ 1, -(v - 1)}, fact{x, v - 1})
		case int(s.finishOf(i)) <= from:
			out = append(out, fact{x ^ 1, -v}, fact{x, v})
		}
	}
	return out
}

// finishOf gives the finish of activity i in the best plan.
func (s *search) finishOf(i int) int32 { return s.best[s.finish[i]/2] + s.length[i] }

// elsewhere tries slices of another plan of the herd that is as good as the best, every second time that
// there is one: where every slice of one has been refused, another may still give way.
func (s *search) elsewhere(c *slicer, b *breeder) outcome {
	var x *beast
	if b != nil && len(b.herd) > 0 && c.rnd.IntN(2) == 0 {
		x = b.herd[c.rnd.IntN(len(b.herd))]
	}
	if x == nil || x.end != s.value {
		return s.slices(c)
	}
	value, base := s.value, s.base
	best := append([]int32(nil), s.best...)
	s.base = make([]int, len(x.start))
	for i, t := range x.start {
		s.base[i] = int(t)
		s.best[s.start[i]/2] = t
	}
	o := s.slices(c)
	if s.value == value {
		s.base, s.best = base, best
	}
	return o
}

// slices tries some slices; what it gives is over, stopped or tired.
func (s *search) slices(c *slicer) outcome {
	for k := 0; k < slicesAtOne; k++ {
		s.assume = c.pick(s, s.assume[:0])
		if c.step = min(c.step, (s.value-s.now[s.end])/2); c.step > 1 && !s.plain {
			s.assume = append(s.assume, fact{s.end ^ 1, c.step - s.value})
		}
		switch o := s.run(s.assume, sliceWork, false); o {
		case over, stopped:
			return o
		case found:
			c.step = max(2*c.step, 2)
		case refused:
			c.step = max(1, c.step/2)
			c.size = min(c.size*1.03+0.1, float64(len(s.start)))
		case tired:
			c.step = max(1, c.step/2)
			c.size = max(c.size*0.98, smallSlice)
		}
	}
	return tired
}
