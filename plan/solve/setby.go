package solve

import (
	"sailby/plan"
	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"slices"
)

// limit is one thing that may set a start.
type limit struct {
	cause plan.Cause
	links linkSkip
	skip  skipper
	clock bool // leave the calendar out
}

// setBy lists what sets the start of i: each of the things printed is enough, when left out,
// for an earlier start; or, where none alone is, the least set that is, as one cause after another.
func (r *rower) setBy(i int) []plan.Cause {
	a := &r.p.Acts[i]
	if r.s.Start[i] <= 0 {
		return []plan.Cause{{Kind: plan.ByStart, Step: i, Other: -1, Text: "work may begin"}}
	}
	r.g.take(i)
	defer r.g.put(i, r.s.Mode[i], r.s.Start[i])
	limits := r.limits(i)
	met := map[blockKind]map[int]bool{}
	r.meet(i, nil, met)
	opens := len(r.p.Closed(i, r.s.Mode[i], r.s.Start[i]-1)) > 0 // the start is an opening
	var single, clock []plan.Cause
	for k := range limits {
		if !limits[k].met(met) || r.earliest(i, limits[k:k+1]) >= r.s.Start[i] {
			continue
		}
		if limits[k].clock && !opens {
			clock = append(clock, limits[k].cause) // other hours would do, but something else holds it too
		} else {
			single = append(single, limits[k].cause)
		}
	}
	if len(single) > 0 {
		return r.ordered(i, single)
	}
	if group := r.group(i, limits, met); group != nil {
		return group
	}
	if len(clock) > 0 {
		return clock
	}
	if joint := r.joint(i, limits, met); joint != nil {
		return joint
	}
	return []plan.Cause{{Kind: plan.ByStart, Step: i, Other: -1, Text: "work may begin", Pos: a.Pos()}}
}

// group finds one other activity all of whose holds on i, left out together, let it start
// earlier: the last to finish is tried first.
func (r *rower) group(i int, limits []limit, met map[blockKind]map[int]bool) []plan.Cause {
	var waits []limit // what stands in the way where no wait and no date holds i back
	for _, l := range limits {
		if len(l.links.links) > 0 || len(l.links.orders) > 0 || l.links.begin {
			waits = append(waits, l)
		}
	}
	r.meet(i, waits, met)
	byOther := map[int][]limit{}
	var others []int
	for _, l := range limits {
		if o := l.cause.Other; o >= 0 && l.met(met) {
			if byOther[o] == nil {
				others = append(others, o)
			}
			byOther[o] = append(byOther[o], l)
		}
	}
	slices.SortStableFunc(others, func(a, b int) int { return r.s.Finish[b] - r.s.Finish[a] })
	for _, o := range others {
		if r.earliest(i, byOther[o]) < r.s.Start[i] {
			return r.least(i, byOther[o])
		}
	}
	return nil
}

// least leaves out of a set of limits, together enough, each that is not needed.
func (r *rower) least(i int, set []limit) []plan.Cause {
	for k := len(set) - 1; k >= 0; k-- {
		less := append(append([]limit(nil), set[:k]...), set[k+1:]...)
		if len(less) > 0 && r.earliest(i, less) < r.s.Start[i] {
			set = less
		}
	}
	var out []plan.Cause
	for _, l := range set {
		l.cause.Together = len(set) > 1
		out = append(out, l.cause)
	}
	return once(out)
}

// once drops causes that say what another says.
func once(causes []plan.Cause) []plan.Cause {
	said := map[string]bool{}
	return slices.DeleteFunc(causes, func(c plan.Cause) bool {
		double := said[c.Text]
		said[c.Text] = true
		return double
	})
}

// meet notes what stands in the way of starts before the planned one, with limits left out.
// What is not met on the way cannot, left out alone, make a difference.
func (r *rower) meet(i int, limits []limit, met map[blockKind]map[int]bool) int {
	r.g.trace = func(b block) {
		if met[b.kind] == nil {
			met[b.kind] = map[int]bool{}
		}
		met[b.kind][b.who] = true
	}
	defer func() { r.g.trace = nil }()
	return r.earliest(i, limits)
}

// met says whether a limit was met; links, dates and calendars count as met always.
func (l *limit) met(met map[blockKind]map[int]bool) bool {
	for p := range l.skip.persons {
		return met[byPerson][p]
	}
	for p := range l.skip.resources {
		return met[byResource][p]
	}
	for p := range l.skip.pairs {
		return met[byPair][p]
	}
	return true
}

// joint finds a least set of limits that set the start of i together, opening hours only if need be.
func (r *rower) joint(i int, limits []limit, met map[blockKind]map[int]bool) []plan.Cause {
	var set []limit
	for round := 0; ; round++ { // widen until leaving all of it out lets i start earlier
		n := len(set)
		set = set[:0]
		for _, l := range limits {
			if l.met(met) && !(l.clock && round < 8) {
				set = append(set, l)
			}
		}
		if r.meet(i, set, met) < r.s.Start[i] {
			break
		}
		if len(set) == n && round >= 8 {
			return nil
		}
	}
	return r.least(i, set)
}

// ordered puts links and people before opening hours, unless the start is an opening.
func (r *rower) ordered(i int, causes []plan.Cause) []plan.Cause {
	causes = once(causes)
	var other, ours []plan.Cause
	for _, c := range causes {
		if c.Other >= 0 {
			other = append(other, c)
		} else {
			ours = append(ours, c)
		}
	}
	if len(r.p.Closed(i, r.s.Mode[i], r.s.Start[i]-1)) > 0 {
		return append(ours, other...)
	}
	return append(other, ours...)
}

// limits lists all that may hold activity i.
func (r *rower) limits(i int) []limit {
	g, p := r.g, r.p
	a := &p.Acts[i]
	var out []limit
	add := func(l limit, kind plan.CauseKind, other int, name, text string, pos tasks.Pos) {
		l.cause = plan.Cause{Kind: kind, Step: i, Other: other, Name: name, Text: text, Pos: pos}
		out = append(out, l)
	}
	for _, k := range g.into[i] {
		l := &p.Links[k]
		if l.Min <= expand.NoMin {
			continue
		}
		add(limit{links: linkSkip{links: map[int]bool{k: true}}}, plan.ByLink, l.From, "", l.Step.Why, l.Step.Pos)
	}
	for _, k := range g.from[i] {
		if l := &p.Links[k]; (l.Max < expand.NoMax || l.Last != nil) && !ownStanding(p, l) {
			text := "held back for the longest wait to " + p.Acts[l.To].Label()
			if l.Max == 0 {
				text = "goes with " + p.Acts[l.To].Label()
			}
			add(limit{links: linkSkip{links: map[int]bool{k: true}}}, plan.ByMaxWait, l.To, "", text, l.Step.Pos)
		}
	}
	for o, c := range g.choice {
		for _, b := range p.Orders[o].Choices[c] {
			if b.Then == i {
				add(limit{links: linkSkip{orders: map[int]bool{o: true}}}, plan.ByOrder, b.First, "", p.Orders[o].Text, p.Orders[o].Pos)
				break
			}
		}
	}
	if a.From > 0 {
		kind, text, pos := plan.ByNotBefore, "its `not before` in the job file", a.Pos()
		if a.Step != nil && a.Step.Site && a.From == p.Open {
			kind, text, pos = plan.ByStart, "the window opens", p.Work.Window.Pos
		}
		add(limit{links: linkSkip{begin: true}}, kind, -1, "", text, pos)
	}
	md := &a.Modes[r.s.Mode[i]]
	for _, c := range append(append([]int(nil), md.Crew...), md.Relief...) {
		add(limit{skip: skipper{persons: map[int]bool{c: true}}}, plan.ByPerson, r.before(c, i), p.People[c].Name,
			p.People[c].Name+" is busy", p.Work.Job.People[c].Pos)
	}
	for _, u := range a.Uses {
		res := &p.Res[u.Res]
		kind := map[problem.ResourceKind]plan.CauseKind{problem.Kit: plan.ByKit, problem.Room: plan.ByRoom, problem.Power: plan.ByPower}[res.Kind]
		add(limit{skip: skipper{resources: map[int]bool{u.Res: true}}}, kind, r.user(u.Res, i), res.Name, res.Name+" is in use", res.Pos)
	}
	for _, k := range g.pairs[i] {
		pr := &p.Pairs[k]
		other := pr.A + pr.B - i
		add(limit{skip: skipper{pairs: map[int]bool{k: true}}}, plan.ByState, other, "", pr.Why, p.Acts[other].Pos())
	}
	if md.Time.Calendar() != nil {
		cause := plan.Cause{Kind: plan.ByHours, Step: i, Other: -1, Text: "the next opening that is long enough", Pos: a.Pos()}
		if closed := p.Closed(i, r.s.Mode[i], r.s.Start[i]-1); len(closed) > 0 {
			cause = closed[0]
		}
		out = append(out, limit{cause: cause, clock: true})
	}
	return out
}

// ownStanding says whether a link ties a step to standing time of its own task: that never
// holds the step back.
func ownStanding(p *problem.Problem, l *problem.Link) bool {
	return l.From >= 0 && p.Acts[l.From].Step.Task == p.Acts[l.To].Step.Task && l.Max == 0 && len(p.Acts[l.To].Modes[0].Crew) == 0
}

// before gives the activity that person c does last before i starts, -1 if none.
func (r *rower) before(c, i int) int {
	best := -1
	for _, b := range r.g.people[c] {
		if b.from < r.s.Start[i] && b.act != i {
			best = b.act
		}
	}
	return best
}

// user gives the activity using resource res that ends last before i starts, -1 if none.
func (r *rower) user(res, i int) int {
	best := -1
	for j := range r.p.Acts {
		if j == i || r.s.Start[j] >= r.s.Start[i] {
			continue
		}
		for _, u := range r.p.Acts[j].Uses {
			if u.Res == res && (best < 0 || r.s.Finish[j] > r.s.Finish[best]) {
				best = j
			}
		}
	}
	return best
}

// earliest gives the earliest start of i, all else in place, with the limits left out.
func (r *rower) earliest(i int, limits []limit) int {
	links := linkSkip{links: map[int]bool{}, orders: map[int]bool{}}
	for _, k := range r.g.from[i] { // standing time moves along with the step before it
		if ownStanding(r.p, &r.p.Links[k]) {
			links.links[k] = true
		}
	}
	skip := skipper{persons: map[int]bool{}, resources: map[int]bool{}, pairs: map[int]bool{}}
	clock := false
	for _, l := range limits {
		for k := range l.links.links {
			links.links[k] = true
		}
		for k := range l.links.orders {
			links.orders[k] = true
		}
		links.begin = links.begin || l.links.begin
		for k := range l.skip.persons {
			skip.persons[k] = true
		}
		for k := range l.skip.resources {
			skip.resources[k] = true
		}
		for k := range l.skip.pairs {
			skip.pairs[k] = true
		}
		clock = clock || l.clock
	}
	g := r.g
	m := r.s.Mode[i]
	md := &r.p.Acts[i].Modes[m]
	if clock {
		own := md.Time
		md.Time = problem.Fixed(own.Length())
		defer func() { md.Time = own }()
	}
	lo, fin := g.lower(i, &links)
	return g.earliest(i, m, g.first(i, m, max(0, lo), fin), problem.Inf-1, &skip)
}
