package learn

import "sort"

// share is what a user has of its length in an interval, and the later entry of the facts for it.
type share struct{ user, part, last int32 }

// explain gives the activities that leave the user at most m of its length in the interval, and that
// it cannot be over by a+m (or started by b-m, for the mirror image). Of all m that are enough for f
// and held then, the greatest asks least of the others.
func (g *energy) explain(e *engine, f fact, w why, idx int32, out []fact) []fact {
	a, b, u := w.at, w.upTo, &g.users[w.who]
	spare := int64(g.capacity) * int64(b-a)
	for i := range g.users {
		if int32(i) != w.who {
			v := &g.users[i]
			spare -= int64(v.amount) * int64(e.had(v, a, b, idx))
		}
	}
	m := int32(spare / int64(u.amount)) // what is left for u
	if f.s == u.start {
		m = max(m, min(b-f.v, e.before(u.finish, idx)+u.length-a-1, u.least-1, b-a-1))
		out = append(out, u.finishFrom(a+m+1))
	} else {
		m = max(m, min(u.length-f.v-a, b+e.before(u.start^1, idx)-1, u.least-1, b-a-1))
		out = append(out, u.startBy(b-m-1))
	}
	return g.behind(e, a, b, w.who, idx, int64(m+1)*int64(u.amount)-spare-1, out)
}

// had gives how much of its length a user had in [a, b) at least before entry idx.
func (e *engine) had(u *user, a, b, idx int32) int32 {
	lst, ect := -e.before(u.start^1, idx), e.before(u.finish, idx)+u.length
	return max(0, min(max(u.least, ect-lst), b-lst, ect-a, b-a))
}

// behind adds the facts by which activities other than skip fill the interval [a, b), as things were
// before entry idx; spare is how much of that is not needed.
func (g *energy) behind(e *engine, a, b, skip, idx int32, spare int64, out []fact) []fact {
	g.shares = g.shares[:0]
	for i := range g.users {
		u := &g.users[i]
		if int32(i) == skip || u.amount == 0 {
			continue
		}
		if q := e.had(u, a, b, idx); q > 0 {
			s, f := u.within(a, b, q, -e.before(u.start^1, idx))
			g.shares = append(g.shares, share{int32(i), q, max(e.entry(s), e.entry(f))})
		}
	}
	sort.SliceStable(g.shares, func(i, j int) bool { return g.shares[i].last > g.shares[j].last })
	for _, k := range g.shares {
		u, q := &g.users[k.user], k.part
		if e.list[k.last].level > 0 {
			less := int32(min(int64(q), spare/int64(u.amount)))
			q -= less
			spare -= int64(less) * int64(u.amount)
		}
		if q > 0 {
			s, f := u.within(a, b, q, -e.before(u.start^1, idx))
			out = append(out, s, f)
		}
	}
	return out
}

// within gives the two facts by which u, which starts at lst at the latest, has q of its length in
// [a, b). Beyond its least length it is its compulsory part that counts.
func (u *user) within(a, b, q, lst int32) (start, finish fact) {
	if q <= u.least {
		return u.startBy(b - q), u.finishFrom(a + q)
	}
	from := max(a, lst)
	return u.startBy(from), u.finishFrom(from + q)
}

// witness gives the interval that the facts overfill.
func (g *energy) witness(_ fact, w why, _ []fact) (from, to int32) { return w.at, w.upTo }
