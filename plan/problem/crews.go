package problem

import (
	"fmt"
	"sort"
	"strconv"
	"strings"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// MaxModes bounds the choices of people kept for one step; they are taken in the order of the
// job file.
const MaxModes = 600

// crewMaker makes the modes of steps.
type crewMaker struct {
	g      *ground
	people []Person
	class  []int // people with the same shifts at every place share a class
	cache  map[string]*Timing
	roster
}

func newCrewMaker(g *ground, people []Person) *crewMaker {
	m := &crewMaker{g: g, people: people, cache: map[string]*Timing{}, roster: newRoster()}
	seen := map[string]int{}
	for i := range people {
		var b strings.Builder
		fmt.Fprint(&b, people[i].Outside)
		for _, place := range g.work.Job.Places {
			fmt.Fprint(&b, place.Name, people[i].Shifts[place])
		}
		if _, ok := seen[b.String()]; !ok {
			seen[b.String()] = len(seen)
		}
		m.class = append(m.class, seen[b.String()])
	}
	return m
}

// slot is one place in a crew: who may fill it.
type slot struct {
	who   []int
	watch bool
	need  *tasks.Need
}

// slots lists the places to fill of a step, and says which need nobody can fill.
func (m *crewMaker) slots(s *expand.Step) (out []slot, hopeless string) {
	for i := range s.Needs {
		n := &s.Needs[i]
		var who []int
		for j, p := range m.g.work.Job.People {
			if CanFill(p, n) && len(m.people[j].Shifts[s.Place]) > 0 {
				who = append(who, j)
			}
		}
		if len(who) < n.Count {
			return nil, fmt.Sprintf("it needs %d x %s at %s and %d can be there", n.Count, NeedName(n), s.Place.Name, len(who))
		}
		for k := 0; k < n.Count; k++ {
			out = append(out, slot{who, n.Watch, n})
		}
	}
	return out, ""
}

// CanFill says whether person p may fill the need.
func CanFill(p *tasks.Person, n *tasks.Need) bool {
	if n.Who != nil {
		if !contains(n.Who, p.Name) {
			return false
		}
		if n.Ticket.Name == "" {
			return true
		}
	}
	return p.Holds(n.Ticket) && p.HoldsAll(n.Also)
}

// NeedName writes a need as the sheets do: "Ines", "weld 136 PF", "anybody".
func NeedName(n *tasks.Need) string {
	if n.Who != nil {
		return strings.Join(n.Who, " or ")
	}
	if n.Ticket.Name == "" {
		return "anybody"
	}
	return n.Ticket.String()
}

// modes gives the choices of people of a hands-on step, and a reason where there is none.
func (m *crewMaker) modes(s *expand.Step, a *Act) ([]Mode, string) {
	slots, hopeless := m.slots(s)
	if hopeless != "" {
		return nil, hopeless
	}
	teams, cut := m.teams(slots)
	if len(teams) == 0 {
		return nil, "its needs are for different people, and there are too few of them"
	}
	access := m.g.access(s)
	base := m.g.face[s.Place].And(access)
	var out []Mode
	room := false
	for _, t := range teams {
		mode := Mode{Crew: t.crew, Watch: t.watch}
		mode.Keepers, mode.Stay = m.keepers(s, t.crew)
		mode.Time = m.timing(s, base, access, &mode)
		room = room || mode.Time.cal != nil && len(mode.Time.cal.spans) > 0
		if mode.Time.Start(0) < Inf {
			out = append(out, mode)
		} else {
			a.Tried = append(a.Tried, mode.Time)
		}
	}
	if s.ChangeHands {
		out = append(out, m.relays(s, a, teams, base, access)...)
	}
	if a.Cut = cut || len(out) >= MaxModes; a.Cut { // anybody may be in it, for all that a bound may say
		a.Times = []*Timing{Worked(m.shift(base), m.shift(base.Joined(Meal, access)), Rules{Work: s.Working, SetUp: s.SetUp,
			Least: s.LeastPiece, Safe: s.SafeStop, InOneGo: s.InOneGo, OverMeals: s.OverMeals})}
	}
	if len(out) == 0 {
		return nil, m.noOpening(s, teams, base, room)
	}
	return out, ""
}

// noOpening says why no start is possible for anybody.
func (m *crewMaker) noOpening(s *expand.Step, teams []team, base hours.Set, room bool) string {
	longest, openings := 0, base
	if s.OverMeals {
		openings = base.Joined(Meal, nil)
	}
	for _, b := range openings {
		longest = max(longest, base.Count(b))
	}
	need := s.Working + s.SetUp
	switch {
	case len(base) == 0:
		return m.g.shutOut(s)
	case s.InOneGo && longest < need:
		return fmt.Sprintf("it goes in one go and needs %d min; the longest opening has %d min", need, longest)
	case s.Lone && m.alone(s, teams, base):
		return "it may not be done alone (R14), and nobody else is on shift there when those who can do it are; have a second person there, or write alone: yes"
	case !room:
		return "nobody who can do it is on shift in its open hours"
	}
	most := 0
	for _, t := range teams {
		most = max(most, m.together(s, t.crew, base).Total())
	}
	if s.Watch > 0 {
		return fmt.Sprintf("its %d min, and %d min of fire watch after every piece, do not fit into the %d min that are open to those who can do it", need, s.Watch, most)
	}
	return fmt.Sprintf("its %d min do not fit into the %d min that are open to those who can do it", need, most)
}

// alone says whether some team could work, but for the want of company.
func (m *crewMaker) alone(s *expand.Step, teams []team, base hours.Set) bool {
	for _, t := range teams {
		set := base
		for _, p := range t.crew {
			set = set.And(m.people[p].Shifts[s.Place])
		}
		if len(set) > 0 && len(m.together(s, t.crew, base)) == 0 {
			return true
		}
	}
	return false
}

type team struct {
	crew  []int
	watch []bool
	key   string
}

// teams lists the distinct ways to fill the slots with different people, at most MaxModes,
// people in the order of the job file first.
func (m *crewMaker) teams(slots []slot) (out []team, cut bool) {
	seen := map[string]bool{}
	crew := make([]int, 0, len(slots))
	watch := make([]bool, len(slots))
	for i := range slots {
		watch[i] = slots[i].watch
	}
	tries := 0
	var fill func(k int)
	fill = func(k int) {
		tries++
		if len(out) >= MaxModes || tries > 200*MaxModes {
			cut = true
			return
		}
		if k == len(slots) {
			t := team{crew: append([]int(nil), crew...), watch: watch}
			t.key = crewKey(t.crew, watch)
			if !seen[t.key] {
				seen[t.key] = true
				out = append(out, t)
			}
			return
		}
		for _, p := range slots[k].who {
			if has(crew, p) {
				continue
			}
			if k > 0 && slots[k].need == slots[k-1].need && p < crew[k-1] {
				continue // the places of one need are alike: rising order only
			}
			crew = append(crew, p)
			fill(k + 1)
			crew = crew[:k]
		}
	}
	fill(0)
	return out, cut
}

func crewKey(crew []int, watch []bool) string {
	tags := make([]string, len(crew))
	for i, c := range crew {
		if tags[i] = strconv.Itoa(c); watch[i] {
			tags[i] += "w"
		}
	}
	sort.Strings(tags)
	return strings.Join(tags, ",")
}

// keepers lists who may keep the fire watch after stops (R13): the step's own people first, those
// who watched during the work ahead of the others, then everybody with the ticket.
func (m *crewMaker) keepers(s *expand.Step, crew []int) (out []int, stay []hours.Set) {
	if s.Watch == 0 {
		return nil, nil
	}
	add := func(p int) {
		if !m.people[p].Outside && !has(out, p) && len(m.people[p].Shifts[s.Place]) > 0 {
			out = append(out, p)
			stay = append(stay, m.canStay(s, p).moved)
		}
	}
	for k := len(crew) - 1; k >= 0; k-- {
		add(crew[k])
	}
	for j, p := range m.g.work.Job.People {
		if s.Watcher != nil && p.Holds(s.Watcher.Ticket) {
			add(j)
		}
	}
	return out, stay
}

// timing gives the timing of a team (with relief, of two that take turns) for a step.
func (m *crewMaker) timing(s *expand.Step, base, access hours.Set, mode *Mode) *Timing {
	key := strconv.Itoa(s.Index) + "|" + m.classes(mode.Crew) + "|" + m.classes(mode.Keepers)
	if mode.Relief == nil {
		if t, ok := m.cache[key]; ok {
			return t
		}
	}
	turn := m.turn(s, base, access, mode)
	mode.First = turn.first
	t := &Timing{cal: turn.cal, length: s.Working, setUp: s.SetUp, least: s.LeastPiece, safe: s.SafeStop, inOneGo: s.InOneGo, overMeals: s.OverMeals}
	t.watch = s.Watch
	if mode.Relief == nil {
		m.cache[key] = t
	}
	return t
}

// together gives the open minutes in which all of the crew are on shift, in company where the
// work may not be done alone.
func (m *crewMaker) together(s *expand.Step, crew []int, base hours.Set) hours.Set {
	set := base
	for _, p := range crew {
		set = set.And(m.people[p].Shifts[s.Place])
	}
	if s.Lone {
		if others := company(m.people, crew, s.Place); others != nil {
			set = set.And(others)
		}
	}
	return set
}

// relays lists the modes in which two teams take turns; they may have members in common.
func (m *crewMaker) relays(s *expand.Step, a *Act, teams []team, base, access hours.Set) []Mode {
	var out []Mode
	alike := make([]string, len(teams))
	for i := range teams {
		alike[i] = m.classes(teams[i].crew)
	}
	for i, first := range teams {
		for j, second := range teams {
			if i == j || len(out) >= MaxModes || alike[i] == alike[j] {
				continue
			}
			mode := Mode{Crew: first.crew, Watch: first.watch, Relief: second.crew}
			mode.Keepers, mode.Stay = m.keepers(s, append(append([]int(nil), first.crew...), second.crew...))
			mode.Time = m.timing(s, base, access, &mode)
			if mode.Time.Start(0) < Inf {
				out = append(out, mode)
			} else {
				a.Tried = append(a.Tried, mode.Time)
			}
		}
	}
	return out
}

// shift moves a set from UTC minutes to minutes from the problem's base.
func (m *crewMaker) shift(set hours.Set) hours.Set { return moved(set, -m.g.span.From) }

func moved(set hours.Set, by hours.Minute) hours.Set {
	out := make(hours.Set, len(set))
	for i, s := range set {
		out[i] = hours.Span{From: s.From + by, To: s.To + by}
	}
	return out
}

func (m *crewMaker) classes(crew []int) string {
	cs := make([]int, len(crew))
	for i, p := range crew {
		cs[i] = m.class[p]
	}
	sort.Ints(cs)
	key := make([]byte, 0, 3*len(cs))
	for _, c := range cs {
		key = append(strconv.AppendInt(key, int64(c), 10), ' ')
	}
	return string(key)
}
