package proof

import (
	"fmt"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// meaning is what a declared variable stands for, or whose start or finish it is.
type meaning struct {
	kind  string // "start", "finish", "end", "order", "pair", "choice", "mode", "timing", "part", "keep"
	a, b  int
	time  int  // of a part: the number of its timing
	watch bool // of a part: hot work is only watched
}

// tail is one of the two tails of a pair.
type tail struct {
	pair  int
	first bool
}

// variables makes the variables that every log has, with the bounds that the problem gives them.
func (c *checker) variables() {
	p := c.p
	for i := range p.Acts {
		a := &p.Acts[i]
		last := min(p.End, a.By)
		if a.Site && a.By < problem.Inf {
			last = min(last, p.Close-int(c.book.watch(i)))
		}
		s := span{int32(max(a.From, 0)), int32(max(last, -1))}
		if a.From > p.End {
			s.lo = furthest
		}
		d := c.book.rigid(i)
		switch {
		case len(a.Modes) == 0: // "shut" says it
			s, d = span{0, int32(p.End)}, 0
		case d >= 0:
			s.hi -= d
		default:
			c.add(fmt.Sprintf("f%d", i), s, meaning{kind: "finish", a: i})
		}
		c.rigid, c.start = append(c.rigid, d), append(c.start, int32(len(c.root)))
		c.add(fmt.Sprintf("s%d", i), s, meaning{kind: "start", a: i})
	}
	c.add("e", span{0, int32(p.End)}, meaning{kind: "end"})
	c.domain = append([]span(nil), c.root...)
}

// declare makes a variable of a log's own.
func (c *checker) declare(name, kind string, args []int) error {
	if _, taken := c.vars[name]; taken {
		return fmt.Errorf("%q is declared already", name)
	}
	if want := map[string]int{"order": 2, "pair": 1, "choice": 2, "mode": 2, "timing": 2, "keep": 2, "part": 4}[kind]; want != len(args) {
		return fmt.Errorf("%q with %d numbers means nothing", kind, len(args))
	}
	p := c.p
	m := meaning{kind: kind, a: args[0], b: append(args, 0)[1]}
	a, b := m.a, m.b
	switch kind {
	case "order":
		if a >= len(p.Acts) || b >= len(p.Acts) || a == b {
			return fmt.Errorf("no activities %d and %d", a, b)
		}
		if !c.overfill(a, b) {
			return fmt.Errorf("nothing keeps activities %d and %d from being worked at once", a, b)
		}
	case "pair":
		if a >= len(p.Pairs) {
			return fmt.Errorf("no pair %d", a)
		}
		if pr := &p.Pairs[a]; c.book.mayBeNothing(pr.A) || c.book.mayBeNothing(pr.B) {
			return fmt.Errorf("the activities of pair %d need not take any time", a)
		}
	case "choice":
		if a >= len(p.Orders) || b >= len(p.Orders[a].Choices) {
			return fmt.Errorf("no choice %d of order rule %d", b, a)
		}
		if _, taken := c.choices[[2]int{a, b}]; taken {
			return fmt.Errorf("choice %d of order rule %d has a variable already", b, a)
		}
		c.choices[[2]int{a, b}] = int32(len(c.root))
	default:
		if a >= len(p.Acts) || p.Acts[a].Cut {
			return fmt.Errorf("not all that may do activity %d is known", a)
		}
		if kind == "part" {
			m.time, m.watch = args[2], args[3] == 1
		}
	}
	c.add(name, span{0, 1}, m)
	c.domain = append(c.domain, span{0, 1})
	return nil
}

// overfill says whether two activities ask more of some resource than there is, from start to finish.
func (c *checker) overfill(a, b int) bool {
	if c.book.rigid(a) <= 0 || c.book.rigid(b) <= 0 {
		return false
	}
	for r := range c.p.Res {
		var sum [2]int
		for k, i := range [2]int{a, b} {
			for _, u := range c.p.Acts[i].Uses {
				if u.Res == r {
					sum[k] += u.Amount
				}
			}
		}
		if sum[0] > 0 && sum[1] > 0 && sum[0]+sum[1] > c.p.Res[r].Capacity {
			return true
		}
	}
	return false
}

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

// passed gives the first minute by which n minutes of set have passed since t, with more = 1 the last one before
// which no more than n have passed.
func passed(set hours.Set, t, n, more int) int64 {
	for _, s := range set {
		from := max(t, int(s.From))
		if from >= int(s.To) {
			continue
		}
		if room := int(s.To) - from; room >= n+more {
			return int64(from + n)
		} else {
			n -= room
		}
	}
	return problem.Inf
}

// heat gives, for each minute t, the last minute that a longest wait which shortens with heat allows for any
// start of it up to t.
func (b *book) heat(l *problem.Link) []int32 {
	if b.curves[l] == nil {
		list := make([]int32, b.p.End+1)
		most := int32(-problem.Inf)
		for t := range list {
			most = max(most, int32(l.Last(t)))
			list[t] = most
		}
		b.curves[l] = list
	}
	return b.curves[l]
}

// clear gives, for each minute t, the first minute at which the tail of a pair's first or second activity is
// over, for any finish of it from t on.
func (b *book) clear(k tail) []int32 {
	if b.tails[k] == nil {
		over := b.p.Pairs[k.pair].TailA
		if !k.first {
			over = b.p.Pairs[k.pair].TailB
		}
		list := make([]int32, b.p.End+1)
		least := int32(problem.Inf)
		for t := b.p.End; t >= 0; t-- {
			n := t
			if over != nil {
				n = over(t)
			}
			least = min(least, int32(n))
			list[t] = least
		}
		b.tails[k] = list
	}
	return b.tails[k]
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
