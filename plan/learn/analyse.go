package learn

import (
	"cmp"
	"slices"
)

// ask notes that f, which holds, is needed for the contradiction. Facts of level 0 hold anyway.
// It gives 1 if one more fact of level cur is asked for, else 0.
func (e *engine) ask(f fact, cur int32) int {
	at := e.needAt[f.s]
	if at >= 0 && e.need[f.s] >= f.v {
		return 0
	}
	i := e.entry(f)
	l := e.list[i].level
	if l == 0 {
		return 0
	}
	e.need[f.s], e.needAt[f.s] = f.v, i
	if at < 0 {
		if !e.listed[f.s] {
			e.listed[f.s] = true
			e.asked = append(e.asked, f.s)
		}
	} else if e.list[at].level == cur {
		return 0
	}
	if l == cur {
		return 1
	}
	return 0
}

// analyse turns the clash into a clause that the search has not known: it goes back over the
// trail, putting reasons in the place of facts, until one fact of the last level is left (the
// first unique implication point, Marques-Silva and Sakallah 1999). It undoes the trail on the way,
// so that reasons see the bounds as they were. It gives the level to go back to; the clause is in
// e.learnt, its first fact the one that will be raised. ok is false if the clash holds at level 0.
func (e *engine) analyse() (level int32, ok bool) {
	if e.log != nil {
		e.log.clash()
	}
	cur := int32(0)
	for _, f := range e.clash {
		cur = max(cur, e.list[e.entry(f)].level)
	}
	if cur == 0 {
		return 0, false
	}
	if cur < e.level() {
		e.retreat(cur)
	}
	e.asked = e.asked[:0]
	open := 0
	for _, f := range e.clash {
		open += e.ask(f, cur)
	}
	idx := int32(len(e.list)) - 1
	for ; ; idx-- {
		if e.needAt[e.list[idx].s] != idx {
			continue
		}
		r := e.list[idx]
		e.atoms.touch(fact{r.s, e.need[r.s]})
		if open == 1 {
			break
		}
		open--
		e.needAt[r.s] = -1
		if r.why.kind == whyClause {
			e.use(r.why.id)
		}
		e.cut(idx)
		e.scratch = e.reason(fact{r.s, e.need[r.s]}, r.why, idx, e.scratch[:0])
		for _, f := range e.scratch {
			open += e.ask(f, cur)
		}
	}
	return e.clauseOf(idx), true
}

// clauseOf writes the clause of the facts asked for; entry idx is the one of the last level. Facts
// that follow from the others are left out. It gives the level to go back to.
func (e *engine) clauseOf(idx int32) int32 {
	top := e.list[idx].s
	e.learnt = append(e.learnt[:0], fact{top, e.need[top]}.not())
	e.proven.clear()
	for _, s := range e.asked {
		if s == top || e.needAt[s] < 0 {
			continue
		}
		if !e.follows(fact{s, e.need[s]}, e.needAt[s], 0) {
			e.learnt = append(e.learnt, fact{s, e.need[s]}.not())
		}
	}
	rest := e.learnt[1:]
	slices.SortStableFunc(rest, func(f, g fact) int {
		return cmp.Compare(e.list[e.needAt[g.s^1]].level, e.list[e.needAt[f.s^1]].level)
	})
	level := int32(0)
	if len(rest) > 0 {
		level = e.list[e.needAt[rest[0].s^1]].level
	}
	return level
}

// deepest is how many reasons in a row are tried to show that a fact follows from the others.
const deepest = 12

// follows says whether f, reached at entry i, is implied by other facts asked for; f itself may
// not be used for that.
func (e *engine) follows(f fact, i int32, depth int) bool {
	r := &e.list[i]
	if r.level == 0 {
		return true
	}
	if r.why.kind == whyChoice || depth > deepest {
		return false
	}
	key := int64(i)<<32 | int64(uint32(f.v))
	if v, ok := e.proven.find(key); ok {
		return v > 0
	}
	e.proven.put(key, -1)
	base, noted := len(e.scratch), e.log.size()
	e.scratch = e.reason(f, r.why, i, e.scratch)
	yes := true
	for k := base; k < len(e.scratch) && yes; k++ {
		g := e.scratch[k]
		if e.needAt[g.s] >= 0 && e.need[g.s] >= g.v && e.needAt[g.s] < i {
			continue
		}
		yes = e.follows(g, e.entry(g), depth+1)
	}
	e.scratch = e.scratch[:base]
	if yes {
		e.proven.put(key, 1)
	} else {
		e.log.void(noted)
	}
	return yes
}

// spread counts the levels of the clause just learnt.
func (e *engine) spread() int32 {
	if len(e.stamp) <= len(e.head)+1 {
		e.stamp = append(e.stamp, make([]int64, len(e.head)+64)...)
	}
	e.stampNow++
	n := int32(0)
	for _, f := range e.learnt {
		l := e.list[e.needAt[f.s^1]].level
		if e.stamp[l] != e.stampNow {
			e.stamp[l] = e.stampNow
			n++
		}
	}
	return n
}

// learn goes back, adds the learnt clause and raises its first fact. It gives false if there is
// no solution.
func (e *engine) learn() bool {
	level, ok := e.analyse()
	if !ok {
		if e.log != nil {
			e.log.none()
		}
		e.dead = true
		return false
	}
	id := int32(0)
	if e.log != nil {
		id = e.log.learnt(e.learnt)
	}
	n := e.spread()
	for _, s := range e.asked {
		e.needAt[s] = -1
		e.listed[s] = false
	}
	e.retreat(level)
	e.conflicts++
	f := e.learnt[0]
	if len(e.learnt) == 1 {
		if !e.raise(f.s, f.v, why{kind: whyRoot}) {
			if e.log != nil {
				e.log.none()
			}
			e.dead = true
			return false
		}
		return true
	}
	ref := e.keep(e.learnt, n)
	e.facts[ref-1].v = id
	e.atoms.claim(e.learnt)
	if !e.raise(f.s, f.v, why{kind: whyClause, id: ref}) {
		e.dead = true
		return false
	}
	return true
}
