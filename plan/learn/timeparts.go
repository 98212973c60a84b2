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
		k := c.edge(part.from)
		c.edge(part.to)
		c.add(k, part.to, amount)
	case part.from == part.to:
		k := c.at(was.from)
		c.drop(c.add(k, was.to, -amount))
		c.drop(k)
	default:
		c.slide(was.from, part.from, -amount)
		c.slide(was.to, part.to, amount)
	}
}

// slide moves the beginning or the end of a part: over what lies after from, amount is added.
func (c *timetable) slide(from, to, amount int32) {
	switch {
	case from < to:
		k := c.at(from)
		c.edge(to)
		c.add(k, to, amount)
		c.drop(k)
	case from > to:
		c.drop(c.add(c.edge(to), from, -amount))
	}
}

// add uses amount more from segment k to the one that begins at to, which it gives.
func (c *timetable) add(k int, to, amount int32) int {
	for ; c.from[k] < to; k++ {
		c.level[k] += amount
	}
	return k
}

// edge notes that a part begins or ends at t, and gives the segment that begins there.
func (c *timetable) edge(t int32) int {
	c.differ(t)
	k := c.at(t)
	if k >= 0 && c.from[k] == t {
		c.ends[k]++
		return k
	}
	level := int32(0)
	if k >= 0 {
		level = c.level[k]
	}
	k++
	c.from = slices.Insert(c.from, k, t)
	c.level = slices.Insert(c.level, k, level)
	c.ends = slices.Insert(c.ends, k, 1)
	return k
}

// drop takes back one such note of where segment k begins.
func (c *timetable) drop(k int) {
	c.differ(c.from[k])
	if c.ends[k]--; c.ends[k] > 0 {
		return
	}
	c.from = slices.Delete(c.from, k, k+1)
	c.level = slices.Delete(c.level, k, k+1)
	c.ends = slices.Delete(c.ends, k, k+1)
}

// differ notes that the profile has changed at t.
func (c *timetable) differ(t int32) {
	c.news = reach{min(c.news.from, t), max(c.news.to, t)}
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
