package learn

import (
	"fmt"

	"sailby/tasks/hours"
)

// crews names the people: a variable for each mode of an activity, one for each timing that its
// modes have, one for each person and timing, and one for each person who may keep the fire watch
// after it; a mode brings its timing and its people with it. At least one mode holds. Each person does one
// thing at a time, pauses left out, or keeps watches in one workface.
func (m *model) crews() bool {
	c := &crewer{model: m, byPerson: make([][]worker, len(m.p.People)), stays: map[string]*grid{}}
	for i := range m.p.Acts {
		if !c.crew(i) || !c.watchAfter(i) {
			return false
		}
	}
	for p, ws := range c.byPerson {
		if len(ws) > 1 {
			m.titled("person %d", p)
			newWorktable(m.engine, 1, ws)
		}
	}
	return true
}

// crewer makes the people's variables.
type crewer struct {
	*model
	byPerson [][]worker
	stays    map[string]*grid
	known    map[part]side // of the activity at hand
}

// part is somebody's part in an activity: with which timing, and whether they only watch.
type part struct {
	who, time int
	watch     bool
}

// crew makes the modes of activity i; false if none can hold.
func (c *crewer) crew(i int) bool {
	a, x := &c.p.Acts[i], &c.acts[i]
	if len(a.Modes) == 1 {
		c.hands(i, 0, always)
		return true
	}
	times := make([]side, len(x.times))
	for k := range times {
		times[k] = -1
		if len(x.times) > 1 {
			times[k] = c.variable(0, 1)
			c.told(times[k], "timing %d %d", i, k)
			c.label = label{forHours, i, 0}
			c.tie(i, grids{x.grids[k]}, fact{times[k], 1})
		}
	}
	if len(x.times) > 1 {
		x.timed = times
	}
	c.known = map[part]side{}
	var any []fact
	for k := range a.Modes {
		mode := c.variable(0, 1)
		c.told(mode, "mode %d %d", i, k)
		c.label = label{forModes, i, 0}
		x.modes, x.byMode = append(x.modes, mode), append(x.byMode, c.grids[a.Modes[k].Time])
		any = append(any, fact{mode, 1})
		if t := times[c.timeOf(i, k)]; t >= 0 {
			c.join(mode, t, 0, always)
		}
		c.hands(i, k, fact{mode, 1})
	}
	return c.axiom(any, "modes %d", i)
}

// hands makes the work of the people of mode k, which holds if on does. Modes with the same
// timing share the variable of a person.
func (c *crewer) hands(i, k int, on fact) {
	md := &c.p.Acts[i].Modes[k]
	if c.start[i] == c.finish[i] && c.length[i] == 0 {
		return
	}
	sure := c.steady[md.Time]
	if md.Relief != nil {
		first := toSpans(md.First)
		for n, p := range md.Crew {
			c.work(i, p, watches(md.Watch, n), on, sure.and(first))
		}
		for n, p := range md.Relief {
			c.work(i, p, watches(md.Watch, n), on, sure.less(first))
		}
		return
	}
	for n, p := range md.Crew {
		if on.s < 0 {
			c.work(i, p, watches(md.Watch, n), on, sure)
			continue
		}
		key := part{p, c.timeOf(i, k), watches(md.Watch, n)}
		y, ok := c.known[key]
		if !ok {
			y = c.variable(0, 1)
			c.told(y, "part %d %d %d %d", i, p, key.time, count(key.watch))
			c.known[key] = y
			c.work(i, p, key.watch, fact{y, 1}, sure)
		}
		c.label = label{forModes, i, 0}
		c.join(on.s, y, 0, always)
	}
}

func (c *crewer) work(i, p int, watch bool, on fact, mask spans) {
	w := worker{user: c.user(i, 1), on: on, mask: mask}
	if watch {
		w.team = c.team[i]
	}
	c.byPerson[p] = append(c.byPerson[p], w)
}

// watchAfter lets somebody keep the fire watch after activity i: one of those of its mode who can
// stay it out. False if nobody can.
func (c *crewer) watchAfter(i int) bool {
	a, x := &c.p.Acts[i], &c.acts[i]
	if x.watch == 0 {
		return true
	}
	keep := map[int]side{}
	for k := range a.Modes {
		md := &a.Modes[k]
		if len(md.Keepers) == 0 {
			return true // nothing is known about who keeps it
		}
		var any []fact
		for n, p := range md.Keepers {
			y, ok := keep[p]
			if !ok {
				y = c.variable(0, 1)
				c.told(y, "keep %d %d", i, p)
				c.label = label{forStay, int(y), 0}
				keep[p] = y
				x.keepers = append(x.keepers, keeper{p, y})
				f := c.finish[i]
				g := c.stay(md.Stay[n], x.watch)
				c.bend(f, 0, f, 0, rising{g.start, g.last}, fact{y, 1})
				c.byPerson[p] = append(c.byPerson[p], worker{user: c.afterWatch(i), on: fact{y, 1}, team: c.team[i]})
			}
			any = append(any, fact{y, 1})
		}
		if len(x.modes) > 0 {
			any = append(any, fact{x.modes[k] ^ 1, 0})
		}
		if !c.axiom(any, "keepers %d", i) {
			return false
		}
	}
	return true
}

func count(yes bool) int {
	if yes {
		return 1
	}
	return 0
}

// keeper is somebody who may keep the watch after an activity, with the side that says so.
type keeper struct {
	who int
	on  side
}

// stay gives the minutes from which a watch can be kept to its end within set.
func (c *crewer) stay(set hours.Set, watch int32) *grid {
	key := fmt.Sprint(watch, set)
	if g := c.stays[key]; g != nil {
		return g
	}
	g := &grid{}
	for _, s := range toSpans(set) {
		if s.to-watch >= s.from {
			g.from, g.upto, g.ends = append(g.from, s.from), append(g.upto, s.to-watch), append(g.ends, s.from)
		}
	}
	c.stays[key] = g
	return g
}

// timeOf gives the number of mode k's timing among those of activity i.
func (m *model) timeOf(i, k int) int {
	for t, w := range m.acts[i].times {
		if w == m.p.Acts[i].Modes[k].Time {
			return t
		}
	}
	return 0
}

// chosen gives the mode that holds for activity i, once everything is settled.
func (m *model) chosen(i int) int {
	for k, x := range m.acts[i].modes {
		if m.now[x] == 1 {
			return k
		}
	}
	return 0
}

func toSpans(set hours.Set) spans {
	out := spans{}
	for _, s := range set {
		out = append(out, span{clip(int(s.From)), clip(int(s.To))})
	}
	return out
}

// less gives the minutes of a that are not in b.
func (a spans) less(b spans) spans {
	rest := spans{}
	at := -far
	for _, s := range b {
		if s.from > at {
			rest = append(rest, span{at, s.from})
		}
		at = s.to
	}
	return a.and(append(rest, span{at, far}))
}
