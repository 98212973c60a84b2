package learn

// arc says that side to is at least a function of side from, while its condition holds. A link
// with a fixed minimum gives two: start j >= start i + w, and, seen from the upper sides,
// -start i >= -start j + w. Its reason for [to >= v] is [from >= the least value that leads to v].
// Cost: O(1) for a raise of from, plus that of the function.
type arc struct {
	from, to side
	w        int32
	on       fact // condition; s < 0: always
	how      curve
}

// curve is a monotone function between sides.
type curve interface {
	at(x int32) int32    // value at x
	least(v int32) int32 // least x with at(x) >= v
}

func (a *arc) at(x int32) int32 {
	if a.how != nil {
		return a.how.at(x)
	}
	return x + a.w
}

func (a *arc) least(v int32) int32 {
	if a.how != nil {
		return a.how.least(v)
	}
	return v - a.w
}

var always = fact{s: -1}

// plain is an arc without condition and with a fixed length, as it is walked.
type plain struct{ to, w, id int32 }

// arcs holds all arcs by the side that they start from.
type arcs struct {
	all   []arc
	label []label   // what each stands for in the problem
	plain [][]plain // by from
	other [][]int32 // by from: arcs with a condition or a curve
	wakes [][]int32 // by the side of the condition
}

// join adds to >= from + w while on holds, with its mirror image.
func (e *engine) join(from, to side, w int32, on fact) {
	e.addArc(arc{from: from, to: to, w: w, on: on})
	e.addArc(arc{from: to ^ 1, to: from ^ 1, w: w, on: on})
}

func (e *engine) addArc(a arc) {
	id := int32(len(e.arcs.all))
	e.arcs.all, e.arcs.label = append(e.arcs.all, a), append(e.arcs.label, e.label)
	if a.on.s < 0 && a.how == nil {
		e.arcs.plain[a.from] = append(e.arcs.plain[a.from], plain{a.to, a.w, id})
		return
	}
	e.arcs.other[a.from] = append(e.arcs.other[a.from], id)
	if a.on.s >= 0 {
		e.arcs.wakes[a.on.s] = append(e.arcs.wakes[a.on.s], id)
	}
}

// follow walks the arcs from s, just raised, and those whose condition s is.
func (e *engine) follow(s side) bool {
	v := e.now[s]
	for _, a := range e.arcs.plain[s] {
		if e.now[a.to] < v+a.w && !e.raise(a.to, v+a.w, why{kind: whyArc, id: a.id}) {
			return false
		}
	}
	e.ticks += int64(len(e.arcs.plain[s]))
	for _, id := range e.arcs.other[s] {
		if !e.pass(id) {
			return false
		}
	}
	for _, id := range e.arcs.wakes[s] {
		if e.holds(e.arcs.all[id].on) && !e.pass(id) {
			return false
		}
	}
	return true
}

// pass makes arc id do what it can: raise its end if it holds, or give up its condition if its
// end cannot be raised so far.
func (e *engine) pass(id int32) bool {
	a := &e.arcs.all[id]
	e.ticks++
	switch {
	case a.on.s < 0 || e.holds(a.on):
		v := a.at(e.now[a.from])
		return e.now[a.to] >= v || e.raise(a.to, v, why{kind: whyArc, id: id})
	case e.fails(a.on):
		return true
	}
	if a.at(e.now[a.from])+e.now[a.to^1] > 0 {
		n := a.on.not()
		return e.raise(n.s, n.v, why{kind: whyOff, id: id})
	}
	return true
}

// arcReason gives the facts behind f, raised by arc id.
func (e *engine) arcReason(id int32, f fact, out []fact) []fact {
	a := &e.arcs.all[id]
	if a.on.s >= 0 {
		out = append(out, a.on)
	}
	return append(out, fact{a.from, a.least(f.v)})
}

// offReason gives the facts for which arc id cannot hold: its start too late for its end. The
// end is taken as it was before entry idx, and the start as weak as that allows.
func (e *engine) offReason(id, idx int32, out []fact) []fact {
	a := &e.arcs.all[id]
	end := e.before(a.to^1, idx)
	return append(out, fact{a.to ^ 1, end}, fact{a.from, a.least(1 - end)})
}
