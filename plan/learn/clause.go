package learn

import (
	"math"
	"sort"
)

// store keeps the clauses: each is a run of facts, at least one of which holds. Two facts of
// each clause are watched: it is looked at only when one of them fails (Moskewicz et al. 2001).
// The clause at ref has its header in facts[ref-2] and facts[ref-1]: size, levels, activity, and its
// number in the log.
type store struct {
	facts []fact
	refs  []int32 // the clauses in the order learnt
	watch [][]watcher
	bump  float32 // what one use adds to a clause's activity
}

// watcher looks at clause ref when its side reaches from; if ahead holds there is nothing to do.
type watcher struct {
	from  int32
	ref   int32
	ahead fact
}

func (c *store) size(ref int32) int32   { return c.facts[ref-2].s }
func (c *store) levels(ref int32) int32 { return c.facts[ref-2].v }
func (c *store) clause(ref int32) []fact {
	return c.facts[ref : ref+c.size(ref)]
}
func (c *store) activity(ref int32) float32 {
	return math.Float32frombits(uint32(c.facts[ref-1].s))
}

// use makes a clause more worth keeping.
func (c *store) use(ref int32) {
	a := c.activity(ref) + c.bump
	c.facts[ref-1].s = int32(math.Float32bits(a))
	if a > 1e20 {
		for _, r := range c.refs {
			c.facts[r-1].s = int32(math.Float32bits(c.activity(r) * 1e-20))
		}
		c.bump *= 1e-20
	}
}

// keep adds a clause of at least two facts; the first two are watched. levels is the number of
// different levels in it, the measure of how useful it is (Audemard and Simon 2009).
func (c *store) keep(fs []fact, levels int32) int32 {
	c.facts = append(c.facts, fact{int32(len(fs)), levels}, fact{int32(math.Float32bits(c.bump)), 0})
	ref := int32(len(c.facts))
	c.facts = append(c.facts, fs...)
	c.refs = append(c.refs, ref)
	c.watchAt(ref, fs[0], fs[1])
	c.watchAt(ref, fs[1], fs[0])
	return ref
}

func (c *store) watchAt(ref int32, f, ahead fact) {
	c.watch[f.s^1] = append(c.watch[f.s^1], watcher{from: 1 - f.v, ref: ref, ahead: ahead})
}

// visit looks at the clauses that side s, just raised, may have made unit or false. It gives
// false with the clash filled in if one is false.
func (e *engine) visit(s side) bool {
	ws := e.watch[s]
	now := e.now
	v := now[s]
	kept := 0
	for i := range ws {
		w := ws[i]
		if w.from > v || now[w.ahead.s] >= w.ahead.v {
			if kept < i {
				ws[kept] = w
			}
			kept++
			continue
		}
		e.ticks++
		fs := e.clause(w.ref)
		if fs[0].s == s^1 && fs[0].v == 1-w.from {
			fs[0], fs[1] = fs[1], fs[0]
		}
		if fs[0] != w.ahead && e.holds(fs[0]) {
			ws[kept] = watcher{w.from, w.ref, fs[0]}
			kept++
			continue
		}
		moved := false
		for k := 2; k < len(fs); k++ {
			if !e.fails(fs[k]) {
				fs[1], fs[k] = fs[k], fs[1]
				e.watchAt(w.ref, fs[1], fs[0])
				moved = true
				break
			}
		}
		if moved {
			continue
		}
		ws[kept] = watcher{w.from, w.ref, fs[0]}
		kept++
		if !e.raise(fs[0].s, fs[0].v, why{kind: whyClause, id: w.ref}) {
			kept += copy(ws[kept:], ws[i+1:])
			e.watch[s] = ws[:kept]
			return false
		}
	}
	e.watch[s] = ws[:kept]
	return true
}

// reduce drops about half of the clauses with more than two levels, the least active of those
// with the most levels first, and packs the store. Clauses that are reasons stay.
func (e *engine) reduce() {
	locked := map[int32]bool{}
	for i := range e.list {
		if e.list[i].why.kind == whyClause {
			locked[e.list[i].why.id] = true
		}
	}
	order := append([]int32(nil), e.refs...)
	sort.SliceStable(order, func(i, j int) bool {
		a, b := order[i], order[j]
		if la, lb := e.levels(a), e.levels(b); la != lb {
			return la > lb
		}
		return e.activity(a) < e.activity(b)
	})
	drop := map[int32]bool{}
	for _, r := range order[:len(order)/2] {
		if e.levels(r) > 2 && !locked[r] {
			drop[r] = true
			if e.log != nil {
				e.log.drop(e.facts[r-1].v)
			}
			e.atoms.release(e.clause(r))
		}
	}
	e.pack(drop)
}

// pack moves the clauses together, leaving out those dropped, and renews the watchers.
func (e *engine) pack(drop map[int32]bool) {
	moved := make(map[int32]int32, len(e.refs))
	facts := make([]fact, 0, len(e.facts))
	refs := e.refs[:0]
	for _, r := range e.refs {
		if drop[r] {
			continue
		}
		facts = append(facts, e.facts[r-2], e.facts[r-1])
		n := int32(len(facts))
		facts = append(facts, e.clause(r)...)
		moved[r] = n
		refs = append(refs, n)
	}
	e.facts, e.refs = facts, refs
	for s := range e.watch {
		kept := e.watch[s][:0]
		for _, w := range e.watch[s] {
			if n, ok := moved[w.ref]; ok {
				w.ref = n
				kept = append(kept, w)
			}
		}
		e.watch[s] = kept
	}
	for i := range e.list {
		if w := &e.list[i].why; w.kind == whyClause {
			w.id = moved[w.id]
		}
	}
}
