package problem

import (
	"encoding/binary"
	"fmt"
	"sort"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// roster keeps what many steps have in common: hours that are open to a crew at a place, and when
// somebody can stay a fire watch out. Most of a job's steps share a few of each.
type roster struct {
	grounds map[string]int // numbers of the sets of minutes in which all but the shifts is open
	turns   map[string]turn
	stays   map[stayKey]stay
}

// turn is when a crew, or two that take turns, can work.
type turn struct {
	cal   *calendar
	first hours.Set // with a relief: when the first team is at work
}

type stayKey struct {
	place *tasks.Place
	face  *tasks.Workface
	class int
}

// stay is when somebody can keep a watch, in UTC minutes and from the problem's base.
type stay struct{ utc, moved hours.Set }

func newRoster() roster {
	return roster{map[string]int{}, map[string]turn{}, map[stayKey]stay{}}
}

// number gives equal sets the same number.
func (r *roster) number(sets ...hours.Set) int {
	var key []byte
	for _, set := range sets {
		for _, s := range set {
			key = binary.AppendVarint(key, int64(s.From))
			key = binary.AppendVarint(key, int64(s.To))
		}
		key = append(key, '/')
	}
	if _, ok := r.grounds[string(key)]; !ok {
		r.grounds[string(key)] = len(r.grounds)
	}
	return r.grounds[string(key)]
}

// turn gives the hours of the people of a mode for a step.
func (m *crewMaker) turn(s *expand.Step, base, access hours.Set, mode *Mode) turn {
	face := s.Face
	if s.Watch == 0 {
		face = nil
	}
	key := fmt.Sprintf("%d|%p|%p|%d|%v|%s|%s|%s|%v", m.number(base, access), s.Place, face, s.Watch, s.Lone,
		m.classes(mode.Crew), m.classes(mode.Relief), m.classes(mode.Keepers), mode.Relief == nil)
	if t, ok := m.turns[key]; ok {
		return t
	}
	var out turn
	spans := m.together(s, mode.Crew, base)
	if mode.Relief != nil {
		out.first = m.shift(spans)
		spans = spans.Or(m.together(s, mode.Relief, base))
	}
	if s.Watch > 0 {
		spans = m.watched(s, spans, access, mode.Keepers)
	}
	out.cal = newCalendar(m.shift(spans), m.shift(spans.Joined(Meal, access)))
	m.turns[key] = out
	return out
}

// watched takes off each opening the minutes after the last one that the work can stop at with
// somebody to stay the fire watch out: on shift to its end, meals apart, with the workface in
// reach (R13).
func (m *crewMaker) watched(s *expand.Step, spans, access hours.Set, keepers []int) hours.Set {
	var keep []hours.Span
	watch := hours.Minute(s.Watch)
	i := 0
	for _, b := range spans.Joined(Meal, access) {
		for i < len(spans) && spans[i].To <= b.From {
			i++
		}
		last := b.From
		for _, p := range keepers {
			stay := m.canStay(s, p).utc
			for k := sort.Search(len(stay), func(k int) bool { return stay[k].To-watch > b.From }); k < len(stay) && stay[k].From <= b.To; k++ {
				if x := lastStop(spans[i:], min(b.To, stay[k].To-watch)); x >= stay[k].From {
					last = max(last, x)
				}
			}
		}
		keep = append(keep, hours.Span{From: b.From, To: last})
	}
	return spans.And(hours.NewSet(keep...))
}

// lastStop gives the last minute up to limit at which a worked minute of spans ends.
func lastStop(spans hours.Set, limit hours.Minute) hours.Minute {
	last := hours.Never
	for _, s := range spans {
		if s.From >= limit {
			break
		}
		last = min(s.To, limit)
	}
	return last
}

// canStay gives the minutes in which a person can keep a watch at a step's workface: on shift,
// meals included, and in reach.
func (m *crewMaker) canStay(s *expand.Step, p int) stay {
	key := stayKey{s.Place, s.Face, m.class[p]}
	out, ok := m.stays[key]
	if !ok {
		out.utc = m.people[p].Shifts[s.Place].Joined(Meal, nil)
		if r, limited := m.g.reach[s.Face]; limited && s.Face != nil {
			out.utc = out.utc.And(r)
		}
		out.moved = m.shift(out.utc)
		m.stays[key] = out
	}
	return out
}
