package learn

// atoms are the facts that learnt clauses speak of, each with an activity: how often it has
// lately taken part in a conflict. The search branches on the most active one that is open
// (Moskewicz et al. 2001), so the literals of the search are made only where they matter.
type atoms struct {
	list []atom
	ids  table // of the facts
	free []int32
	heap []int32 // by activity, the greatest first
	out  []taken
	bump float64
}

type atom struct {
	fact              // always on the lower side of its variable
	refs, place int32 // clauses that speak of it; place in the heap, -1 if not there
	score       float64
}

// taken is an atom taken off the heap at a level; it comes back when the search goes below.
type taken struct{ id, level int32 }

func newAtoms() atoms { return atoms{ids: newTable(), bump: 1} }

// lower gives f or its contrary, whichever is on the lower side.
func lower(f fact) fact {
	if f.s&1 == 1 {
		return f.not()
	}
	return f
}

// claim counts one more clause for each fact, making new atoms.
func (a *atoms) claim(fs []fact) {
	for _, f := range fs {
		f = lower(f)
		id, ok := a.ids.find(f.key())
		if !ok {
			if n := len(a.free); n > 0 {
				id = a.free[n-1]
				a.free = a.free[:n-1]
				a.list[id] = atom{fact: f, place: -1}
			} else {
				id = int32(len(a.list))
				a.list = append(a.list, atom{fact: f, place: -1})
			}
			a.ids.put(f.key(), id)
			a.push(id)
		}
		a.list[id].refs++
		a.raise(id)
	}
}

// release counts one clause less; an atom without clauses goes.
func (a *atoms) release(fs []fact) {
	for _, f := range fs {
		f = lower(f)
		id, ok := a.ids.find(f.key())
		if !ok {
			continue
		}
		if a.list[id].refs--; a.list[id].refs == 0 {
			a.ids.drop(f.key())
			if a.list[id].place >= 0 {
				a.remove(id)
			}
			a.list[id].refs = -1
			a.free = append(a.free, id)
		}
	}
}

// touch bumps f if it is an atom.
func (a *atoms) touch(f fact) {
	if id, ok := a.ids.find(lower(f).key()); ok {
		a.raise(id)
	}
}

func (a *atoms) raise(id int32) {
	x := &a.list[id]
	if x.score += a.bump; x.score > 1e100 {
		for i := range a.list {
			a.list[i].score *= 1e-100
		}
		a.bump *= 1e-100
	}
	if x.place >= 0 {
		a.up(x.place)
	}
}

// back puts the atoms taken above level on the heap again.
func (a *atoms) back(level int32) {
	n := len(a.out)
	for n > 0 && a.out[n-1].level > level {
		n--
		if id := a.out[n].id; a.list[id].refs > 0 && a.list[id].place < 0 {
			a.push(id)
		}
	}
	a.out = a.out[:n]
}

// take gives the most active atom and notes that it was taken at level; ok is false if there is none.
func (a *atoms) take(level int32) (f fact, ok bool) {
	if len(a.heap) == 0 {
		return fact{}, false
	}
	id := a.heap[0]
	a.remove(id)
	a.out = append(a.out, taken{id, level})
	return a.list[id].fact, true
}

func (a *atoms) push(id int32) {
	a.list[id].place = int32(len(a.heap))
	a.heap = append(a.heap, id)
	a.up(a.list[id].place)
}

func (a *atoms) remove(id int32) {
	p, n := a.list[id].place, int32(len(a.heap)-1)
	last := a.heap[n]
	a.heap = a.heap[:n]
	a.list[id].place = -1
	if p == n {
		return
	}
	a.heap[p] = last
	a.list[last].place = p
	a.up(p)
	a.down(a.list[last].place)
}

func (a *atoms) up(p int32) {
	id := a.heap[p]
	for p > 0 {
		q := (p - 1) / 2
		if a.list[a.heap[q]].score >= a.list[id].score {
			break
		}
		a.heap[p] = a.heap[q]
		a.list[a.heap[p]].place = p
		p = q
	}
	a.heap[p] = id
	a.list[id].place = p
}

func (a *atoms) down(p int32) {
	id, n := a.heap[p], int32(len(a.heap))
	for {
		q := 2*p + 1
		if q >= n {
			break
		}
		if q+1 < n && a.list[a.heap[q+1]].score > a.list[a.heap[q]].score {
			q++
		}
		if a.list[a.heap[q]].score <= a.list[id].score {
			break
		}
		a.heap[p] = a.heap[q]
		a.list[a.heap[p]].place = p
		p = q
	}
	a.heap[p] = id
	a.list[id].place = p
}
