package learn

import "slices"

// look is one at a user that found nothing to push.
type look struct {
	view
	read reach // of the profile
	cost int64 // ticks
}

// reach is an interval of time with both its ends.
type reach struct{ from, to int32 }

var nothing = reach{far, -far}

// again says whether a look, which saw the last version of the profile, would go now as it did then: the
// bounds are the same, and what it read of the profile is. It then counts as done again.
func (c *timetable) again(e *engine, seen *look, now view) bool {
	now.version--
	if seen.view != now || c.news.from <= seen.read.to && seen.read.from <= c.news.to {
		return false
	}
	seen.version = c.version
	e.ticks += seen.cost
	return true
}

// replace takes a part out of the profile and puts another in its place; either may be empty.
// O(log segments + those that it touches).
func (c *timetable) replace(was, part stretch, amount int32) {
	switch {
	case was.from == was.to:
		c.edge(part.from)
		c.edge(part.to)
		c.add(part.from, part.to, amount)
	case part.from == part.to:
		c.add(was.from, was.to, -amount)
		c.drop(was.from)
		c.drop(was.to)
	default:
		c.slide(was.from, part.from, -amount)
		c.slide(was.to, part.to, amount)
	}
}

// slide moves the beginning or the end of a part: over what lies after from, amount is added.
func (c *timetable) slide(from, to, amount int32) {
	switch {
	case from < to:
		c.edge(to)
		c.add(from, to, amount)
		c.drop(from)
	case from > to:
		c.edge(to)
		c.add(to, from, -amount)
		c.drop(from)
	}
}

// add uses amount more from one edge to another.
func (c *timetable) add(from, to, amount int32) {
	for k := c.at(from); c.from[k] < to; k++ {
		c.level[k] += amount
	}
}

// edge notes that a part begins or ends at t.
func (c *timetable) edge(t int32) {
	c.news = reach{min(c.news.from, t), max(c.news.to, t)}
	k := c.at(t)
	if k >= 0 && c.from[k] == t {
		c.ends[k]++
		return
	}
	level := int32(0)
	if k >= 0 {
		level = c.level[k]
	}
	c.from = slices.Insert(c.from, k+1, t)
	c.level = slices.Insert(c.level, k+1, level)
	c.ends = slices.Insert(c.ends, k+1, 1)
}

// drop takes one such note back.
func (c *timetable) drop(t int32) {
	c.news = reach{min(c.news.from, t), max(c.news.to, t)}
	k := c.at(t)
	if c.ends[k]--; c.ends[k] > 0 {
		return
	}
	c.from = slices.Delete(c.from, k, k+1)
	c.level = slices.Delete(c.level, k, k+1)
	c.ends = slices.Delete(c.ends, k, k+1)
}

// at gives the segment that holds t, -1 if t is before the first.
func (c *timetable) at(t int32) int {
	if len(c.from) == 0 || c.from[0] > t {
		return -1
	}
	k := 0
	for n := len(c.from); n > 1; {
		half := n / 2
		if c.from[k+half] <= t {
			k += half
		}
		n -= half
	}
	return k
}
