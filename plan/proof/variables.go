package proof

import (
	"fmt"

	"sailby/plan/problem"
)

// meaning is what a declared variable stands for, or whose start or finish it is.
type meaning struct {
	kind  string // "start", "finish", "end", "order", "pair", "choice", "mode", "timing", "part", "keep"
	a, b  int
	time  int  // of a part: the number of its timing
	watch bool // of a part: hot work is only watched
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
