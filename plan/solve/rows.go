package solve

import (
	"fmt"
	"slices"

	"sailby/plan"
	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Rows explains every activity of a schedule: what sets its start (R21) and how much leeway it
// has (R20). Beyond leewaySteps activities the leeway is left out (-1), as it costs O(n^2).
func Rows(p *problem.Problem, s *Schedule, stop func() bool) []plan.Row {
	r := &rower{g: newGenerator(p), p: p, s: s, rows: make([]plan.Row, len(p.Acts))}
	r.g.load(s)
	r.order = r.g.list()
	r.inOrder()
	for i := range p.Acts {
		r.rows[i].SetBy = r.setBy(i)
		r.rows[i].Leeway = -1
		r.rows[i].Latest = p.Base + hours.Minute(s.Finish[i])
	}
	if len(p.Acts) <= leewaySteps {
		for rank, i := range r.order {
			if stop != nil && stop() {
				break
			}
			r.leeway(rank, i)
		}
	}
	return r.rows
}

const leewaySteps = 600

type rower struct {
	g     *generator
	p     *problem.Problem
	s     *Schedule
	order []int
	ahead [][]int // by activity: those that come before it in the plan's order, for want of people, kit, room or a clear workface
	rows  []plan.Row
}

// inOrder finds for every activity those that it comes after in the plan because both want the
// same people, more of a resource than there is, or a workface to themselves.
func (r *rower) inOrder() {
	r.ahead = make([][]int, len(r.p.Acts))
	if len(r.p.Acts) > leewaySteps {
		return
	}
	for rank, j := range r.order {
		for _, i := range r.order[:rank] {
			if r.clear(i) <= r.s.Start[j] && r.s.Start[i] < r.s.Finish[i] && r.s.Start[j] < r.s.Finish[j] && r.meetAny(i, j) {
				r.ahead[j] = append(r.ahead[j], i)
			}
		}
	}
}

// clear gives the minute at which activity i and its fire watches are over.
func (r *rower) clear(i int) int { return r.s.end(r.p, i) }

// meetAny says whether two activities could not run side by side.
func (r *rower) meetAny(i, j int) bool {
	a, b := &r.p.Acts[i], &r.p.Acts[j]
	ma, mb := &a.Modes[r.s.Mode[i]], &b.Modes[r.s.Mode[j]]
	for _, p := range append(append([]int(nil), ma.Crew...), ma.Relief...) {
		if hasPerson(mb.Crew, p) || hasPerson(mb.Relief, p) {
			return true
		}
	}
	for _, w := range r.s.Watches[i] {
		if hasPerson(mb.Crew, w.Who) || hasPerson(mb.Relief, w.Who) {
			return true
		}
	}
	for _, ua := range a.Uses {
		for _, ub := range b.Uses {
			if ua.Res == ub.Res && ua.Amount+ub.Amount > r.p.Res[ua.Res].Capacity {
				return true
			}
		}
	}
	for _, k := range r.g.pairs[j] {
		if r.p.Pairs[k].A == i || r.p.Pairs[k].B == i {
			return true
		}
	}
	return false
}

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
	var single []plan.Cause
	for k := range limits {
		if limits[k].met(met) && r.earliest(i, limits[k:k+1]) < r.s.Start[i] {
			single = append(single, limits[k].cause)
		}
	}
	if len(single) > 0 {
		return r.ordered(i, single)
	}
	if joint := r.joint(i, limits, met); joint != nil {
		return joint
	}
	return []plan.Cause{{Kind: plan.ByStart, Step: i, Other: -1, Text: "work may begin", Pos: a.Pos()}}
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

// joint finds things that set the start of i together: all that comes from one other activity,
// if that is enough, else a least set of limits, opening hours only if need be.
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
	byOther := map[int][]limit{}
	for _, l := range set {
		if l.cause.Other >= 0 {
			byOther[l.cause.Other] = append(byOther[l.cause.Other], l)
		}
	}
	for _, l := range set { // in order, so that equal input gives equal output
		if group := byOther[l.cause.Other]; l.cause.Other >= 0 && r.earliest(i, group) < r.s.Start[i] {
			set = group
			break
		}
	}
	for k := len(set) - 1; k >= 0; k-- {
		less := append(append([]limit(nil), set[:k]...), set[k+1:]...)
		if r.earliest(i, less) < r.s.Start[i] {
			set = less
		}
	}
	var out []plan.Cause
	for _, l := range set {
		l.cause.Together = len(set) > 1
		out = append(out, l.cause)
	}
	return out
}

// ordered puts links and people before opening hours, unless the start is an opening.
func (r *rower) ordered(i int, causes []plan.Cause) []plan.Cause {
	said := map[string]bool{}
	causes = slices.DeleteFunc(causes, func(c plan.Cause) bool {
		double := said[c.Text]
		said[c.Text] = true
		return double
	})
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
			add(limit{links: linkSkip{links: map[int]bool{k: true}}}, plan.ByMaxWait, l.To, "",
				"held back for the longest wait to "+p.Acts[l.To].Label(), l.Step.Pos)
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
		kind, text := plan.ByNotBefore, "not before"
		if a.Step != nil && a.Step.Site && a.From == p.Open {
			kind, text = plan.ByStart, "the window opens"
		}
		add(limit{links: linkSkip{begin: true}}, kind, -1, "", text, a.Pos())
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

// leeway finds by how much the finish of activity i can move later (R20).
func (r *rower) leeway(rank, i int) {
	row := &r.rows[i]
	if r.g.standing[i] {
		return // standing time goes with the step before it
	}
	ok := func(l int) bool { _, fine := r.delayed(rank, i, l); return fine }
	hi := 15
	for hi < r.p.End && ok(hi) {
		hi *= 2
	}
	lo := 0
	for hi-lo > 1 {
		mid := (lo + hi) / 2
		if ok(mid) {
			lo = mid
		} else {
			hi = mid
		}
	}
	if r.maxWaits() { // lateness need not grow with the delay: look at the steps between too
		step := max(5, lo/60)
		for l := step; l < lo; l += step {
			if !ok(l) {
				lo = l - step
				for lo+1 < l && ok(lo+1) {
					lo++
				}
				break
			}
		}
	}
	row.Leeway = lo
	row.Latest = r.p.Base + hours.Minute(r.s.Finish[i]+lo)
	if lo > 0 {
		moved, _ := r.delayed(rank, i, lo)
		seen := map[string]bool{r.p.Acts[i].Label(): true}
		for _, j := range moved {
			if name := r.p.Acts[j].Label(); !seen[name] && r.p.Acts[j].Step.Class == expand.Hands {
				seen[name] = true
				row.Shares = append(row.Shares, name)
			}
		}
	}
	r.g.load(r.s)
}

func (r *rower) maxWaits() bool {
	for k := range r.p.Links {
		if l := &r.p.Links[k]; (l.Max < expand.NoMax && l.Max > 0) || l.Last != nil {
			return true
		}
	}
	return false
}

// delayed makes the schedule again in its order with the finish of i at least l later; false
// where that breaks a deadline or a maximum wait. moved are the later activities that moved.
func (r *rower) delayed(rank, i, l int) (moved []int, ok bool) {
	g, s := r.g, r.s
	g.reset()
	copy(g.choice, s.Choice)
	for _, j := range r.order[:rank] {
		g.put(j, s.Mode[j], s.Start[j])
	}
	for _, j := range r.order[rank:] {
		w := r.p.Acts[j].Modes[s.Mode[j]].Time
		lo, fin := s.Start[j], s.Finish[i]+l
		if j != i {
			lo, fin = g.lower(j, nil)
			lo = max(lo, s.Start[j])
			for _, k := range r.ahead[j] {
				lo = max(lo, g.finish[k])
			}
		}
		at := g.earliest(j, s.Mode[j], g.first(j, s.Mode[j], lo, fin), problem.Inf-1, nil)
		if at >= problem.Inf || g.breaksMax(j, s.Mode[j], at) {
			return nil, false
		}
		end := w.Finish(at)
		a := &r.p.Acts[j]
		if end > a.By || a.Site && a.By < problem.Inf && w.Watch() > 0 && at < end && end+w.Watch() > r.p.Close {
			return nil, false
		}
		if j != i && at > s.Start[j] {
			moved = append(moved, j)
		}
		g.put(j, s.Mode[j], at)
	}
	return moved, g.whole()
}

// firstFinishing gives the least start at or after lo with a finish of at least f.
func firstFinishing(w *problem.Timing, f, lo int) int {
	a, b := lo, max(lo, f)
	for a < b {
		mid := (a + b) / 2
		if s := w.Start(mid); s < problem.Inf && w.Finish(s) < f {
			a = mid + 1
		} else {
			b = mid
		}
	}
	return a
}

// Governing follows what sets the site finish back to the beginning of the window or of the
// job, last step first.
func Governing(p *problem.Problem, s *Schedule, rows []plan.Row) []plan.Cause {
	last := -1
	for i := range p.Acts {
		if a := &p.Acts[i]; a.Site && (last < 0 || s.end(p, i) > s.end(p, last) || s.end(p, i) == s.end(p, last) && s.Start[i] > s.Start[last]) {
			last = i
		}
	}
	var out []plan.Cause
	seen := map[int]bool{}
	for i := last; i >= 0 && !seen[i]; {
		seen[i] = true
		next := -1
		for _, c := range rows[i].SetBy {
			if c.Other >= 0 && !seen[c.Other] && (next < 0 || s.Finish[c.Other] > s.Finish[next]) {
				next = c.Other
			}
		}
		kept := false
		said := map[string]bool{}
		for _, c := range rows[i].SetBy {
			if (c.Other < 0 || c.Other == next) && !said[c.Text] {
				said[c.Text] = true
				out = append(out, c)
				kept = true
			}
		}
		if !kept {
			out = append(out, plan.Cause{Kind: plan.ByStart, Step: i, Other: -1, Text: fmt.Sprint("start of ", p.Acts[i].Label())})
		}
		i = next
	}
	return out
}

// end gives the finish of i with its fire watch.
func (s *Schedule) end(p *problem.Problem, i int) int {
	w := p.Acts[i].Modes[s.Mode[i]].Time
	if s.Start[i] < s.Finish[i] {
		return s.Finish[i] + w.Watch()
	}
	return s.Finish[i]
}
