package proof

import (
	"fmt"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// some verifies that every choice of order rule r is denied.
func (c *checker) some(r int, v view) error {
	for k := range c.p.Orders[r].Choices {
		if x, ok := c.choices[[2]int{r, k}]; !ok || v.of(x).hi > 0 {
			return fmt.Errorf("choice %d of order rule %d may hold", k, r)
		}
	}
	return nil
}

// view is the bounds of a lemma's facts; for all else those that the problem gives.
type view struct {
	c    *checker
	seen map[int32]span
}

// look takes the facts of a lemma; it gives false where two of them contradict each other, which
// proves it whatever it says.
func (c *checker) look(fs []fact) (view, bool) {
	v := view{c, map[int32]span{}}
	for _, f := range fs {
		s := v.of(f.x)
		s.narrow(f)
		v.seen[f.x] = s
		if s.lo > s.hi {
			return v, false
		}
	}
	return v, true
}

func (v view) of(x int32) span {
	if s, ok := v.seen[x]; ok {
		return s
	}
	return v.c.domain[x]
}

// act gives the bounds of the start and of the finish of activity i.
func (v view) act(i int) (s, f span) {
	x := v.c.start[i]
	s = v.of(x)
	if d := v.c.rigid[i]; d >= 0 {
		return s, span{s.lo + d, s.hi + d}
	}
	return s, v.of(x - 1)
}

func (v view) side(i int, end tasks.LinkEnd) span {
	s, f := v.act(i)
	if end == tasks.Start {
		return s
	}
	return f
}

// link verifies that the waits of link k do not let both ends be within their bounds.
func (c *checker) link(k int, v view) error {
	l := &c.p.Links[k]
	from := span{0, 0}
	if l.From >= 0 {
		from = v.side(l.From, l.FromEnd)
	}
	to := v.side(l.To, l.ToEnd)
	if l.Min > expand.NoMin {
		first := int64(from.lo) + int64(l.Min)
		if l.Count != nil && l.Min > 0 {
			first = passed(l.Count, int(from.lo), l.Min, 0)
		}
		if first > int64(to.hi) {
			return nil
		}
	}
	last := int64(problem.Inf)
	switch {
	case l.Last != nil:
		last = int64(c.book.heat(l)[min(max(from.hi, 0), int32(c.p.End))])
	case l.Max >= expand.NoMax:
	case l.MaxCount != nil:
		last = passed(l.MaxCount, int(from.hi), l.Max, 1) // the minute in which it would be one too many
	default:
		last = int64(from.hi) + int64(l.Max)
	}
	if int64(to.lo) > last {
		return nil
	}
	return fmt.Errorf("link %d can hold: from %d to %d, to %d to %d", k, from.lo, from.hi, to.lo, to.hi)
}

// hours verifies that no possible start of activity i agrees with the bounds.
func (c *checker) hours(i int, v view) error {
	s, f := v.act(i)
	for _, w := range v.timings(i) {
		if c.book.table(w).possible(s, f) {
			return fmt.Errorf("activity %d can start from %d to %d and finish from %d to %d", i, s.lo, s.hi, f.lo, f.hi)
		}
	}
	return nil
}

// ending verifies that the whole cannot be over so early if activity i counts for it.
func (c *checker) ending(i int, v view) error {
	site := false
	for k := range c.p.Acts {
		site = site || c.p.Acts[k].Site
	}
	if site && !c.p.Acts[i].Site {
		return fmt.Errorf("activity %d does not count for the finish", i)
	}
	_, f := v.act(i)
	if e := v.of(c.vars["e"]); f.lo+c.book.watch(i) <= e.hi {
		return fmt.Errorf("activity %d can be over by %d", i, e.hi)
	}
	return nil
}

// apart verifies that two activities cannot follow each other as x says.
func (c *checker) apart(x int32, v view) error {
	m, s := c.means[x], v.of(x)
	if s.lo != s.hi {
		return fmt.Errorf("nothing is said about which goes first")
	}
	first := s.lo == 1
	a, b := m.a, m.b
	if m.kind == "pair" {
		a, b = c.p.Pairs[m.a].A, c.p.Pairs[m.a].B
	}
	if !first {
		a, b = b, a
	}
	_, f := v.act(a)
	next, _ := v.act(b)
	over := f.lo
	if m.kind == "pair" {
		over = c.book.clear(tail{m.a, first})[min(max(f.lo, 0), int32(c.p.End))]
	}
	if over <= next.hi {
		return fmt.Errorf("activity %d can start at %d, after activity %d, which may be clear at %d", b, next.hi, a, over)
	}
	return nil
}

// rule verifies that choice k of order rule r cannot hold.
func (c *checker) rule(r, k int, v view) error {
	choices := c.p.Orders[r].Choices
	if len(choices) == 0 {
		return nil
	}
	if k < 0 || k >= len(choices) {
		return fmt.Errorf("order rule %d has no choice %d", r, k)
	}
	if x, ok := c.choices[[2]int{r, k}]; len(choices) > 1 && (!ok || v.of(x).lo < 1) {
		return fmt.Errorf("choice %d of order rule %d is not said to hold", k, r)
	}
	for _, b := range choices[k] {
		_, f := v.act(b.First)
		if s, _ := v.act(b.Then); f.lo > s.hi {
			return nil
		}
	}
	return fmt.Errorf("choice %d of order rule %d can hold", k, r)
}
