package learn

import (
	"math/rand/v2"
	"slices"
	"testing"
)

// plainProfile sums parts up minute by minute: the points where one begins or ends, and what is used from each.
func plainProfile(parts []stretch, users []user) (from, level []int32) {
	for _, p := range parts {
		if p.from < p.to {
			from = append(from, p.from, p.to)
		}
	}
	slices.Sort(from)
	from = slices.Compact(from)
	for _, t := range from {
		sum := int32(0)
		for i, p := range parts {
			if p.from <= t && t < p.to {
				sum += users[i].amount
			}
		}
		level = append(level, sum)
	}
	return from, level
}

// A profile kept up to date part by part is the one that is made anew, and a look that is taken to go as
// the last one did would do so: as many steps, and nothing pushed.
func TestProfileKeptUpToDate(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 9))
	again, looks := 0, 0
	for range 300 {
		e := newEngine()
		var users []user
		for range 2 + r.IntN(8) {
			s := e.variable(0, 30)
			n := 1 + r.Int32N(6)
			users = append(users, user{start: s, finish: s, length: n, amount: 1 + r.Int32N(4), least: n})
		}
		c := newTimetable(e, 6, users)
		for range 60 {
			if e.level() > 0 && r.IntN(4) == 0 {
				e.retreat(r.Int32N(e.level()))
			}
			if x := users[r.IntN(len(users))].start ^ r.Int32N(2); !e.fixed(x) {
				e.decide(fact{x, e.now[x] + 1 + r.Int32N(-e.now[x^1]-e.now[x])})
			}
			if c.build(e) > c.capacity {
				continue
			}
			from, level := plainProfile(c.parts, users)
			if !slices.Equal(c.from, from) || !slices.Equal(c.level, level) {
				t.Fatalf("profile of %v: from %v use %v, not from %v use %v", c.parts, c.from, c.level, from, level)
			}
			for i := range users {
				now, seen, ticks := e.view(&users[i], c.version), &c.seen[i], e.ticks
				looks++
				cost := int64(-1)
				if seen.view != now && c.again(e, seen, now) {
					again++
					cost = e.ticks - ticks
				}
				ticks = e.ticks
				c.read = nothing
				if !c.later(e, int32(i)) || !c.earlier(e, int32(i)) {
					break
				}
				same := e.view(&users[i], c.version) == now
				if cost >= 0 && (!same || e.ticks-ticks != cost) {
					t.Fatalf("user %d of %v looked at again: %d steps, pushed %v; it was taken to need %d", i, c.parts, e.ticks-ticks, !same, cost)
				}
				if same {
					*seen = look{now, c.read, e.ticks - ticks}
				}
			}
		}
	}
	if again < 1000 {
		t.Errorf("%d of %d looks were taken to go as before: too few to tell", again, looks)
	}
}
