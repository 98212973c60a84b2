package proof

import (
	"fmt"

	"sailby/plan/problem"
)

// fact is a bound of a variable: at least v, or at most v.
type fact struct {
	x     int32
	upper bool
	v     int32
}

func (f fact) not() fact {
	if f.upper {
		return fact{f.x, false, f.v + 1}
	}
	return fact{f.x, true, f.v - 1}
}

// furthest is the latest minute that a problem may have: beyond it sums could leave 32 bits.
const furthest = 1 << 27

// span is the bounds of a variable; it is empty where lo is above hi.
type span struct{ lo, hi int32 }

// narrow takes a fact into account.
func (s *span) narrow(f fact) {
	if f.upper {
		s.hi = min(s.hi, f.v)
	} else {
		s.lo = max(s.lo, f.v)
	}
}

// within says whether f holds for certain, and whether it cannot.
func (s span) within(f fact) (holds, fails bool) {
	if f.upper {
		return s.hi <= f.v, s.lo > f.v
	}
	return s.lo >= f.v, s.hi < f.v
}

// checker replays one log.
type checker struct {
	p       *problem.Problem
	line    int
	stage   int // head lines read
	root    []span
	domain  []span  // what the problem gives each variable
	start   []int32 // by activity: its start; the finish, if that has a variable, comes before it
	rigid   []int32 // by activity: its one length, -1 if there is none
	choices map[[2]int]int32
	now     []span // with the facts of the line at hand taken as true
	dirty   []int32
	vars    map[string]int32
	means   []meaning // by variable
	clauses map[int][]fact
	steps   [][]fact // collected lemmas and clauses
	until   int
	dead    bool // the root facts contradict each other
	over    bool
	result  Result
	book    book
}

func newChecker(p *problem.Problem) *checker {
	c := &checker{p: p, vars: map[string]int32{}, clauses: map[int][]fact{}, choices: map[[2]int]int32{}, until: problem.Inf, book: newBook(p)}
	c.variables()
	return c
}

// add makes a variable.
func (c *checker) add(name string, s span, m meaning) {
	c.vars[name] = int32(len(c.root))
	c.root, c.now, c.means = append(c.root, s), append(c.now, s), append(c.means, m)
	c.dead = c.dead || s.lo > s.hi
}

// assume takes a fact as true for the line at hand; it gives false where that is a contradiction.
func (c *checker) assume(f fact) bool {
	c.dirty = append(c.dirty, f.x)
	c.now[f.x].narrow(f)
	return c.now[f.x].lo <= c.now[f.x].hi
}

// back forgets what was assumed.
func (c *checker) back() {
	for _, x := range c.dirty {
		c.now[x] = c.root[x]
	}
	c.dirty = c.dirty[:0]
}

// derive verifies that the facts cannot all hold: assumed together, the collected lines lead to
// a contradiction. It ends the collection.
func (c *checker) derive(fs []fact) error {
	defer c.back()
	steps := c.steps
	c.steps = c.steps[:0]
	if c.dead {
		return nil
	}
	for _, f := range fs {
		if !c.assume(f) {
			return nil
		}
	}
	for k, step := range steps {
		open := -1
		loose := false
		for i, f := range step {
			holds, fails := c.now[f.x].within(f)
			switch {
			case holds:
			case fails: // it says nothing any more
				loose, open = true, -1
			case open >= 0:
				return fmt.Errorf("line %d of the %d collected leaves two facts open", k+1, len(steps))
			default:
				open = i
			}
			if loose {
				break
			}
		}
		switch {
		case loose:
		case open < 0:
			return nil
		case !c.assume(step[open].not()):
			return nil
		}
	}
	return fmt.Errorf("the %d lines collected lead to no contradiction", len(steps))
}

// so takes a derived clause over.
func (c *checker) so(number int, fs []fact) error {
	if err := c.derive(fs); err != nil {
		return err
	}
	c.result.Clauses++
	switch len(fs) {
	case 0:
		c.dead = true
	case 1:
		f := fs[0].not()
		s := &c.root[f.x]
		s.narrow(f)
		c.now[f.x] = *s
		c.dead = c.dead || s.lo > s.hi
	default:
		return c.keep(number, fs)
	}
	return nil
}

// keep notes a clause under its number.
func (c *checker) keep(number int, fs []fact) error {
	if number < 1 {
		return fmt.Errorf("a clause of %d facts has no number", len(fs))
	}
	if _, taken := c.clauses[number]; taken {
		return fmt.Errorf("there is a clause %d already", number)
	}
	c.clauses[number] = fs
	return nil
}

// end takes the last line over: nothing, or no finish before bound.
func (c *checker) end(bound int) error {
	if bound < 0 {
		if err := c.derive(nil); err != nil {
			return err
		}
		c.result.Finish = problem.Inf
	} else {
		if lo := int(c.root[c.vars["e"]].lo); !c.dead && lo < bound {
			return fmt.Errorf("no finish before %d is shown, not %d", lo, bound)
		}
		if c.until < problem.Inf && bound > c.until+1 {
			return fmt.Errorf("no finish before %d is shown, not %d", c.until+1, bound)
		}
		c.result.Finish = bound
	}
	if c.until < problem.Inf {
		c.result.Finish = min(c.result.Finish, c.until+1)
	}
	c.over = true
	return nil
}
