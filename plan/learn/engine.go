package learn

// engine is the search at work: bounds, clauses, arcs and propagators, brought to a fixpoint
// after each decision.
type engine struct {
	trail
	store
	arcs  arcs
	atoms atoms

	rules    []rule
	watching [][]int32 // by side: the rules that look at it
	dirty    []bool
	queue    []int32
	late     []bool  // by rule: it runs only when nothing else is left to do
	lateOnes []int32 // their queue
	done     int     // trail entries propagated

	energetic bool  // the energy rules are at work
	worth     int64 // contradictions that they have found

	clash []fact  // facts that cannot hold together, after a failed raise
	fell  why     // what says so, if a rule itself does; nobody if a raise has failed
	log   *record // writes the refutation; nil: nobody wants it
	label label   // what the arcs that are being added stand for
	ticks int64

	// scratch of the conflict analysis
	need     []int32 // by side: the value asked for
	needAt   []int32 // the entry that reached it, -1 if nothing is asked
	asked    []side  // sides asked for, some no longer
	listed   []bool
	learnt   []fact
	scratch  []fact
	proven   table   // by entry and value: 1 if the fact follows, else -1
	stamp    []int64 // by level
	stampNow int64

	conflicts int64
	turns     int64                              // times that levels were taken back
	heard     func(f fact, w why, behind []fact) // told of every reason given, by tests; nil: nobody
	dead      bool                               // no solution at all under the root facts
}

// rule is a propagator: it raises sides from the bounds of several variables, and can say why. A rule
// that fills the clash itself says so in fell. For the log it is a witness, too.
// With explain, out gets facts that held before entry idx and lead to f; w is what run gave
// as the reason.
type rule interface {
	run(e *engine) bool
	explain(e *engine, f fact, w why, idx int32, out []fact) []fact
}

func newEngine() *engine {
	return &engine{atoms: newAtoms(), store: store{bump: 1}, proven: newTable(), fell: nobody}
}

// variable makes a variable and the lists that go by its sides.
func (e *engine) variable(lo, hi int32) side {
	s := e.bounds(lo, hi)
	for k := 0; k < 2; k++ {
		e.watch = append(e.watch, nil)
		e.arcs.plain = append(e.arcs.plain, nil)
		e.arcs.other = append(e.arcs.other, nil)
		e.arcs.wakes = append(e.arcs.wakes, nil)
		e.watching = append(e.watching, nil)
		e.need = append(e.need, 0)
		e.needAt = append(e.needAt, -1)
		e.listed = append(e.listed, false)
	}
	return s
}

// attach adds a rule that is woken by raises of the sides.
func (e *engine) attach(r rule, sides []side) { e.enter(r, sides, false) }

// attachLate adds one that waits until the others are done.
func (e *engine) attachLate(r rule, sides []side) { e.enter(r, sides, true) }

func (e *engine) enter(r rule, sides []side, late bool) {
	id := int32(len(e.rules))
	e.rules = append(e.rules, r)
	e.late = append(e.late, late)
	e.dirty = append(e.dirty, false)
	e.wake(id)
	for _, s := range sides {
		e.watching[s] = append(e.watching[s], id)
	}
}

// wake puts a rule in its queue.
func (e *engine) wake(id int32) {
	if e.dirty[id] {
		return
	}
	e.dirty[id] = true
	if e.late[id] {
		e.lateOnes = append(e.lateOnes, id)
	} else {
		e.queue = append(e.queue, id)
	}
}

// energize switches the energy rules on or off; only at level 0. All rules have another look, as the
// profiles may still be those of a deeper level.
func (e *engine) energize(on bool) {
	if e.energetic == on {
		return
	}
	e.energetic = on
	for id := range e.rules {
		if on {
			e.wake(int32(id))
		}
	}
}

// raise sets side s to at least v. If that is impossible it fills the clash and gives false.
func (e *engine) raise(s side, v int32, w why) bool {
	if e.now[s] >= v {
		return true
	}
	if e.now[s^1] >= 1-v {
		least := 1 - e.now[s^1] // the least value that is impossible
		e.fell = nobody
		if e.log != nil {
			e.log.begin()
		}
		e.clash = e.reason(fact{s, least}, w, int32(len(e.list)), e.clash[:0])
		e.clash = append(e.clash, fact{s ^ 1, 1 - least})
		return false
	}
	e.push(s, v, w)
	return true
}

// reason gives the facts behind f, raised for w at entry idx.
func (e *engine) reason(f fact, w why, idx int32, out []fact) []fact {
	base := len(out)
	out = e.because(f, w, idx, out)
	if e.heard != nil {
		e.heard(f, w, out[base:])
	}
	if e.log != nil {
		e.log.note(idx, f, w, out[base:])
	}
	return out
}

// because is reason, of which nobody is told.
func (e *engine) because(f fact, w why, idx int32, out []fact) []fact {
	switch w.kind {
	case whyClause:
		for _, g := range e.clause(w.id) {
			if g.s != f.s {
				out = append(out, g.not())
			}
		}
	case whyArc:
		out = e.arcReason(w.id, f, out)
	case whyOff:
		out = e.offReason(w.id, idx, out)
	case whyRule:
		out = e.rules[w.id].explain(e, f, w, idx, out)
	}
	return out
}

// settle propagates to a fixpoint: arcs and clauses first, then the rules in turn. It gives
// false with the clash filled in if the bounds contradict each other.
func (e *engine) settle() bool {
	for {
		for e.done < len(e.list) {
			r := &e.list[e.done]
			s := r.s
			latest := e.top[s] == int32(e.done)
			e.done++
			if !latest {
				continue
			}
			for _, id := range e.watching[s] {
				e.wake(id)
			}
			if !e.follow(s) || !e.visit(s) {
				return false
			}
		}
		from := &e.queue
		if len(*from) == 0 {
			from = &e.lateOnes
		}
		if len(*from) == 0 {
			return true
		}
		id := (*from)[0]
		*from = append((*from)[:0], (*from)[1:]...)
		e.dirty[id] = false
		if !e.rules[id].run(e) {
			return false
		}
	}
}

// retreat takes back all levels above k.
func (e *engine) retreat(k int32) {
	e.turns++
	if e.level() > k {
		e.cut(e.head[k])
	}
	e.done = min(e.done, len(e.list))
	for _, id := range e.queue {
		e.dirty[id] = false
	}
	for _, id := range e.lateOnes {
		e.dirty[id] = false
	}
	e.queue, e.lateOnes = e.queue[:0], e.lateOnes[:0]
	e.atoms.back(k)
}

// decide takes a decision: f begins a new level.
func (e *engine) decide(f fact) {
	e.head = append(e.head, int32(len(e.list)))
	if !e.holds(f) {
		e.push(f.s, f.v, why{kind: whyChoice})
	}
}

// add puts in a clause that always holds; it is never dropped. Only before the search. It gives
// false if the clause is empty or contradicts the root.
func (e *engine) add(fs []fact) bool {
	switch len(fs) {
	case 0:
		return false
	case 1:
		return e.raise(fs[0].s, fs[0].v, why{kind: whyRoot})
	}
	e.keep(fs, 0)
	return true
}
