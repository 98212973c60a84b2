package learn

import "sort"

// A side is one bound of a variable: side 2x is the lower bound of x, side 2x+1 the lower bound
// of -x. Every bound change is then a raise, and upper bounds need no code of their own.
type side = int32

// fact says that a side has reached a value: [x >= v] for side 2x, [x <= -v] for side 2x+1.
type fact struct{ s, v int32 }

// not gives the contrary of a fact.
func (f fact) not() fact { return fact{f.s ^ 1, 1 - f.v} }

// far is beyond every value of a variable; values stay small enough that sums cannot overflow.
const far = int32(1) << 29

// The kinds of reason for a raise.
const (
	whyRoot   = uint8(iota) // holds by itself
	whyChoice               // a decision of the search
	whyClause               // a clause: id is where it stands in the store
	whyArc                  // arc id
	whyOff                  // arc id cannot hold, so its condition does not
	whyRule                 // propagator id, with its own note at
	whyLeaf                 // person (id 0) or resource (id 1) who is used too much at minute at by a settled plan
)

// nobody is no reason.
var nobody = why{kind: whyRule, id: -1}

// why is the reason for a raise; the facts behind it are worked out only when they are asked for.
type why struct {
	kind uint8
	id   int32
	at   int32 // a propagator's note: the minute
	who  int32 // and the activity, as it counts them
	upTo int32 // where the note is an interval: its end
}

// raised is an entry of the trail.
type raised struct {
	s, level int32
	why      why
}

// step is the rest of an entry, kept apart as it is what is walked most.
type step struct {
	v    int32 // what the side was raised to
	prev int32 // the entry before it of the same side, -1 if it is the first
}

// trail holds the bounds of all variables and the order in which they were raised. The first
// entries are the first values of the sides, one each.
type trail struct {
	now  []int32 // value of each side
	top  []int32 // its last entry
	list []raised
	step []step  // by entry
	head []int32 // list length at which each level above 0 begins
}

// bounds makes a variable with bounds lo and hi and gives its lower side.
func (t *trail) bounds(lo, hi int32) side {
	s := side(len(t.now))
	for k, v := range [2]int32{lo, -hi} {
		t.now = append(t.now, v)
		t.top = append(t.top, int32(len(t.list)))
		t.list = append(t.list, raised{s: s + side(k)})
		t.step = append(t.step, step{v, -1})
	}
	return s
}

// level gives the number of decisions taken.
func (t *trail) level() int32 { return int32(len(t.head)) }

// holds says whether f is true now, fails whether it is false.
func (t *trail) holds(f fact) bool { return t.now[f.s] >= f.v }
func (t *trail) fails(f fact) bool { return t.now[f.s^1] >= 1-f.v }

// fixed says whether the variable of s has one value.
func (t *trail) fixed(s side) bool { return t.now[s]+t.now[s^1] == 0 }

// entry gives the entry that made f true; f must hold. It costs the number of raises of the
// side since then.
func (t *trail) entry(f fact) int32 { return t.first(f, t.top[f.s]) }

// first gives the entry that made f true; entry i is one of its side at which it held.
func (t *trail) first(f fact, i int32) int32 {
	for {
		p := t.step[i].prev
		if p < 0 || t.step[p].v < f.v {
			return i
		}
		i = p
	}
}

// last gives the last entry of side s before entry idx.
func (t *trail) last(s side, idx int32) int32 {
	i := t.top[s]
	for i >= idx {
		i = t.step[i].prev
	}
	return i
}

// before gives the value that side s had before entry idx.
func (t *trail) before(s side, idx int32) int32 { return t.step[t.last(s, idx)].v }

// reached gives the entry before idx that made f true, -1 if f did not hold then.
func (t *trail) reached(f fact, idx int32) int32 {
	i := t.last(f.s, idx)
	if t.step[i].v < f.v {
		return -1
	}
	return t.first(f, i)
}

// push raises a side; the caller knows that v is above its value and possible.
func (t *trail) push(s side, v int32, w why) {
	t.list = append(t.list, raised{s: s, level: int32(len(t.head)), why: w})
	t.step = append(t.step, step{v, t.top[s]})
	t.top[s] = int32(len(t.list) - 1)
	t.now[s] = v
}

// cut takes back all entries from idx on.
func (t *trail) cut(idx int32) {
	for i := int32(len(t.list)) - 1; i >= idx; i-- {
		s, prev := t.list[i].s, t.step[i].prev
		t.top[s] = prev
		t.now[s] = t.step[prev].v
	}
	t.list, t.step = t.list[:idx], t.step[:idx]
	n := sort.Search(len(t.head), func(k int) bool { return t.head[k] >= idx })
	t.head = t.head[:n]
}
