package learn

import "sailby/plan/problem"

// rising is a monotone function with its inverse: at(t) never falls, and until(u) is the last t
// with at(t) <= u, -far if there is none.
type rising struct {
	at, until func(t int32) int32
}

// up is the arc [to >= at(from)], on lower sides.
type up struct{ f rising }

func (c up) at(x int32) int32    { return limit(c.f.at(x)) }
func (c up) least(v int32) int32 { return limit(c.f.until(v-1)) + 1 }

// down is its mirror image, on upper sides: [from <= until(to)].
type down struct{ f rising }

func (c down) at(x int32) int32    { return -limit(c.f.until(-x)) }
func (c down) least(v int32) int32 { return 1 - limit(c.f.at(1-v)) }

func limit(v int32) int32 { return min(max(v, -far), far) }

// bend adds [to + b >= f(from + a)] while on holds, with its mirror image.
func (e *engine) bend(from side, a int32, to side, b int32, f rising, on fact) {
	g := f
	if a != 0 || b != 0 {
		g = rising{
			at:    func(t int32) int32 { return limit(f.at(t+a)) - b },
			until: func(u int32) int32 { return limit(f.until(u+b)) - a },
		}
	}
	e.addArc(arc{from: from, to: to, on: on, how: up{g}})
	e.addArc(arc{from: to ^ 1, to: from ^ 1, on: on, how: down{g}})
}

// byFunc makes a rising function of one that never falls on 0..end; outside it has the values
// of the borders. Its inverse costs log end calls.
func byFunc(f func(t int) int, end int) rising {
	at := func(t int32) int32 { return clip(f(min(max(int(t), 0), end))) }
	return rising{at: at, until: func(u int32) int32 {
		if at(0) > u {
			return -far
		}
		lo, hi := 0, end+1
		for lo+1 < hi {
			if m := (lo + hi) / 2; at(int32(m)) <= u {
				lo = m
			} else {
				hi = m
			}
		}
		if lo == end {
			return far
		}
		return int32(lo)
	}}
}

// clip brings a minute of the problem into the engine's range.
func clip(t int) int32 {
	switch {
	case t >= problem.Inf || t > int(far):
		return far
	case t < -int(far):
		return -far
	}
	return int32(t)
}
