package learn

// energy is a resource's work in intervals of time, beside its timetable. An activity that starts by
// b-q and finishes at a+q or later, and takes q at least, has q of its length in the interval [a, b). If
// what all of them have in there, times what they take, is more than the capacity times b-a, there is
// no plan (time-table edge-finding: Vilim 2011; explained: Schutt, Feydy and Stuckey 2013).
//
// Intervals: from the earliest start of a free activity to the latest finish of another. For each
// finish all starts are tried in falling order with a running sum: the work of the profile, and what
// free activities that start in the interval have in it beyond their compulsory parts. The interval
// with the least to spare is then looked at again with all that reaches into it, and used to filter: an
// activity that may have at most m in it, and cannot be over by a+m, starts at b-m or later; and the
// mirror image.
//
// Explanation: [start i <= b-q] and [finish i >= a+q] for every i that has q in the interval. What
// is more than is needed to overfill it is given back, first by those whose facts came last.
//
// Cost of a run: O(f^2) for f activities that are not fixed, and O(n) for each of their latest
// finishes that leaves little to spare. It runs when nothing else has anything to do.
type energy struct {
	*timetable // its profile, which is up to date when all other rules have run
	id         int32
	loads      []load // by user
	byStart    []int32
	byFinish   []int32
	startKey   []int32
	finishKey  []int32
	free       []int32 // those not fixed, from late to early starts
	most       int64   // the most work of one of them
	shares     []share
}

// load is a user's bounds as its work sees them. Lengths that vary are taken at their least.
type load struct {
	est, lst, ect, lct int32
	length             int32
	amount             int64
	free               int64 // work without the compulsory part
	before             int64 // work of the profile before est
}

func newEnergy(e *engine, c *timetable) *energy {
	n := len(c.users)
	g := &energy{timetable: c, id: int32(len(e.rules)), loads: make([]load, n), startKey: make([]int32, n), finishKey: make([]int32, n)}
	for i := range c.users {
		g.byStart = append(g.byStart, int32(i))
		g.byFinish = append(g.byFinish, int32(i))
	}
	e.attachLate(g, c.sides())
	return g
}

// order sorts ids by key; they are nearly in order already.
func order(ids, key []int32) {
	for i := 1; i < len(ids); i++ {
		x := ids[i]
		k := key[x]
		j := i
		for ; j > 0 && key[ids[j-1]] > k; j-- {
			ids[j] = ids[j-1]
		}
		ids[j] = x
	}
}

// look brings the loads up to date and sorts them.
func (g *energy) look(e *engine) {
	for i := range g.users {
		u, x := &g.users[i], &g.loads[i]
		x.lst, x.ect = e.latestStart(u), e.earliestFinish(u)
		x.length = max(u.least, x.ect-x.lst)
		x.est, x.lct = x.ect-x.length, x.lst+x.length
		x.amount = int64(u.amount)
		x.free = x.amount * int64(x.length-max(0, x.ect-x.lst))
		g.startKey[i], g.finishKey[i] = x.est, x.lct
	}
	order(g.byStart, g.startKey)
	order(g.byFinish, g.finishKey)
	g.free, g.most = g.free[:0], 0
	for k := len(g.byStart) - 1; k >= 0; k-- {
		i := g.byStart[k]
		if x := &g.loads[i]; x.free > 0 {
			g.free = append(g.free, i)
			g.most = max(g.most, x.amount*int64(x.length))
		}
	}
	k, sum := 0, int64(0)
	for _, i := range g.byStart {
		if x := &g.loads[i]; x.free > 0 {
			k, sum = g.walk(k, sum, x.est)
			x.before = sum + g.part(k, x.est)
		}
	}
	e.ticks += int64(len(g.users))
}

// walk goes on from segment k, with the work before it, to the one that holds t.
func (g *energy) walk(k int, sum int64, t int32) (int, int64) {
	for k+1 < len(g.from) && g.from[k+1] <= t {
		sum += int64(g.level[k]) * int64(g.from[k+1]-g.from[k])
		k++
	}
	return k, sum
}

// part is the work of segment k before t.
func (g *energy) part(k int, t int32) int64 {
	if k >= len(g.from) || t <= g.from[k] {
		return 0
	}
	return int64(g.level[k]) * int64(t-g.from[k])
}

// run looks for intervals that are overfilled, and pushes activities out of tight ones.
func (g *energy) run(e *engine) bool {
	if !e.energetic || len(g.users) < 2 {
		return true
	}
	g.look(e)
	last, k, sum := int32(-far), 0, int64(0)
	for _, j := range g.byFinish {
		y := &g.loads[j]
		if y.free == 0 || y.lct == last {
			continue
		}
		last = y.lct
		k, sum = g.walk(k, sum, last)
		a, spare := g.tightest(last, sum+g.part(k, last))
		e.ticks += int64(len(g.free))/4 + 1
		if spare < g.most && !g.filter(e, a, last) {
			return false
		}
	}
	return true
}

// tightest gives the start of the interval up to b that has the least to spare, and how much that is.
// before is the work of the profile before b.
func (g *energy) tightest(b int32, before int64) (at int32, least int64) {
	least = int64(far) * int64(far)
	work := int64(0)
	for _, i := range g.free {
		x := &g.loads[i]
		if x.est >= b {
			continue
		}
		if x.lct <= b {
			work += x.free
		} else if q := b - max(x.lst, x.ect); q > 0 {
			work += x.amount * int64(q)
		}
		if spare := int64(g.capacity)*int64(b-x.est) - (before - x.before) - work; spare < least {
			at, least = x.est, spare
		}
	}
	return at, least
}

// in gives how much of its length an activity has in the interval at least.
func (x *load) in(a, b int32) int32 {
	return max(0, min(x.length, b-x.lst, x.ect-a, b-a))
}

// filter has a close look at one interval; false if it is overfilled.
func (g *energy) filter(e *engine, a, b int32) bool {
	spare := int64(g.capacity) * int64(b-a)
	for i := range g.loads {
		x := &g.loads[i]
		spare -= x.amount * int64(x.in(a, b))
	}
	e.ticks += int64(len(g.loads)) / 4
	if spare < 0 {
		e.fell = why{kind: whyRule, id: g.id, at: a, who: -1, upTo: b}
		e.clash = g.behind(e, a, b, -1, int32(len(e.list)), -spare-1, e.clash[:0])
		e.worth++
		return false
	}
	for _, j := range g.free {
		x, u := &g.loads[j], &g.users[j]
		if x.amount*int64(min(x.length, b-a)) <= spare {
			continue
		}
		m := int32((spare + x.amount*int64(x.in(a, b))) / x.amount)
		if m >= min(x.length, b-a) {
			continue
		}
		note := why{kind: whyRule, id: g.id, at: a, who: j, upTo: b}
		if x.ect > a+m && !e.raise(u.start, b-m, note) {
			return false
		}
		if f := u.finishBy(a + m); x.lst < b-m && !e.raise(f.s, f.v, note) {
			return false
		}
	}
	return true
}
