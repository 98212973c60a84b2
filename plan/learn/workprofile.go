package learn

import (
	"cmp"
	"slices"
)

// The profile of a worktable: what the compulsory parts take, minute by minute, kept from one run
// to the next where it has not changed.

// event is a change of use.
type event struct {
	at, by, who int32
	team        int
}

// stretch is a compulsory part; from is to where there is none.
type stretch struct{ from, to int32 }

// view is what a look at a user depends on: its bounds and the profile.
type view struct{ est, lst, ect, lct, version int32 }

func (e *engine) view(u *user, version int32) view {
	return view{e.now[u.start], e.latestStart(u), e.earliestFinish(u), e.latestFinish(u), version}
}

func teamBit(team int) uint64 {
	if team == 0 {
		return 0
	}
	return 1 << min(team, 63)
}

// update finds the compulsory parts that have changed and puts their events in the place of the
// old ones; false if there are none.
func (c *worktable) update(e *engine) bool {
	c.fresh = c.fresh[:0]
	changed := false
	for i := range c.all {
		w := &c.all[i]
		part := stretch{e.latestStart(&w.user), e.earliestFinish(&w.user)}
		if part.from >= part.to || !w.sure(e) {
			part = stretch{}
		}
		if part == c.parts[i] {
			continue
		}
		changed = true
		c.parts[i], c.moved[i] = part, true
		if part.from == part.to {
			continue
		}
		who := int32(i)
		if w.mask == nil {
			c.fresh = append(c.fresh, event{part.from, w.amount, who, w.team}, event{part.to, -w.amount, who, w.team})
			continue
		}
		for k := w.mask.find(part.from); k < len(w.mask) && w.mask[k].from < part.to; k++ {
			c.fresh = append(c.fresh, event{max(part.from, w.mask[k].from), w.amount, who, w.team},
				event{min(part.to, w.mask[k].to), -w.amount, who, w.team})
		}
	}
	e.ticks += int64(len(c.all))
	if !changed {
		return false
	}
	slices.SortFunc(c.fresh, func(a, b event) int { return cmp.Compare(a.at, b.at) })
	kept := c.events[:0]
	for _, ev := range c.events {
		if !c.moved[ev.who] {
			kept = append(kept, ev)
		}
	}
	c.events = mergeEvents(kept, c.fresh)
	clear(c.moved)
	e.ticks += int64(len(c.events))
	c.version++
	return true
}

// mergeEvents puts the events of b among those of a, from behind.
func mergeEvents(a, b []event) []event {
	i, j := len(a)-1, len(b)-1
	a = append(a, b...)
	for k := len(a) - 1; j >= 0; k-- {
		if i >= 0 && a[i].at > b[j].at {
			a[k] = a[i]
			i--
		} else {
			a[k] = b[j]
			j--
		}
	}
	return a
}

// build makes the profile and gives its greatest level.
func (c *worktable) build(e *engine) int32 {
	if !c.update(e) {
		return c.most
	}
	c.from, c.level, c.teams = c.from[:0], c.level[:0], c.teams[:0]
	clear(c.crowd)
	used, most, bits := int32(0), int32(0), uint64(0)
	for i := 0; i < len(c.events); {
		t := c.events[i].at
		for ; i < len(c.events) && c.events[i].at == t; i++ {
			ev := &c.events[i]
			if ev.team == 0 {
				used += ev.by
				continue
			}
			old := c.crowd[ev.team]
			c.crowd[ev.team] += ev.by
			switch {
			case old == 0:
				used++
				bits |= teamBit(ev.team)
			case c.crowd[ev.team] == 0:
				used--
				bits &^= teamBit(ev.team)
			}
		}
		c.from = append(c.from, t)
		c.level = append(c.level, used)
		c.teams = append(c.teams, bits)
		most = max(most, used)
	}
	c.most = most
	return most
}
