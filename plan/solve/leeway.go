package solve

import (
	"slices"

	"sailby/plan"
	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// inOrder finds for every activity those that it comes after in the plan because both want the
// same people, more of a resource than there is, or a workface to themselves.
func (r *rower) inOrder() {
	r.ahead = make([][]int, len(r.p.Acts))
	if len(r.p.Acts) > plan.LeewaySteps {
		return
	}
	for rank, j := range r.order {
		for _, i := range r.order[:rank] {
			if r.s.Start[i] < r.s.Finish[i] && r.s.Start[j] < r.s.Finish[j] && r.gives(i, j) {
				r.ahead[j] = append(r.ahead[j], i)
			}
		}
	}
}

// gives says whether j, later in the plan, begins only after i has given up something that both
// want: somebody, a resource, or the workface.
func (r *rower) gives(i, j int) bool {
	a, b := &r.p.Acts[i], &r.p.Acts[j]
	ma, mb := &a.Modes[r.s.Mode[i]], &b.Modes[r.s.Mode[j]]
	if r.s.Finish[i] > r.s.Start[j] { // a pause may lend somebody out: that is no order
		return false
	}
	for _, w := range r.s.Watches[i] {
		if w.To <= r.s.Start[j] && (hasPerson(mb.Crew, w.Who) || hasPerson(mb.Relief, w.Who)) {
			return true
		}
	}
	for _, p := range append(append([]int(nil), ma.Crew...), ma.Relief...) {
		if hasPerson(mb.Crew, p) || hasPerson(mb.Relief, p) {
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

// leeway finds by how much the finish of activity i can move later (R20); rank is the place in the order of the first that
// is tied to it.
func (r *rower) leeway(rank, i int) {
	row := &r.rows[i]
	if r.g.standing[i] {
		return // standing time goes with the step before it
	}
	ok := func(l int) bool { _, fine := r.delayed(rank, i, l); return fine && !r.stopped() }
	hi := r.most(i) + 1
	lo := 0
	if ok(hi - 1) {
		lo = hi - 1
	}
	for hi-lo > 1 {
		mid := (lo + hi) / 2
		if ok(mid) {
			lo = mid
		} else {
			hi = mid
		}
	}
	moved, _ := r.delayed(rank, i, lo)
	if r.waiting(i, moved) { // lateness need not grow with the delay: look at the steps between too
		step := max(5, lo/max(20, min(400, 4_000_000/(len(r.order)*len(r.order)))))
		for l := step; l < lo; l += step {
			if !ok(l) {
				lo = l - step
				for lo+1 < l && ok(lo+1) {
					lo++
				}
				moved, _ = r.delayed(rank, i, lo)
				break
			}
		}
	}
	if r.stopped() {
		return
	}
	row.Leeway = lo
	row.Latest = r.p.Base + hours.Minute(r.s.Finish[i]+lo)
	if lo > 0 {
		seen := map[string]bool{r.p.Acts[i].Label(): true}
		for _, j := range moved {
			if name := r.p.Acts[j].Label(); !seen[name] && r.p.Acts[j].Step.Class == expand.Hands {
				seen[name] = true
				row.Shares = append(row.Shares, name)
			}
		}
	}
}

// most is more leeway than activity i can have: to its own deadline, or to the end of the time
// planned over.
func (r *rower) most(i int) int {
	a := &r.p.Acts[i]
	end := min(a.By, r.p.End)
	return max(0, end-r.s.Finish[i])
}

// waiting says whether a longest wait holds any of the activities that move with i.
func (r *rower) waiting(i int, moved []int) bool {
	for _, j := range append([]int{i}, moved...) {
		for _, list := range [][]int{r.g.into[j], r.g.from[j]} {
			for _, k := range list {
				if l := &r.p.Links[k]; l.Max < expand.NoMax && l.Max > 0 || l.Last != nil {
					return true
				}
			}
		}
	}
	return false
}

// delayed makes the schedule again, from the activities before rank on, in its order with the finish of i at least l later; false
// where that breaks a deadline or a maximum wait. What is tied to start with another is placed with it. moved are the later
// activities that moved.
func (r *rower) delayed(rank, i, l int) (moved []int, ok bool) {
	g, s := r.g, r.s
	g.restore(&r.prefix)
	for _, first := range r.order[rank:] {
		if g.placed[first] {
			continue
		}
		group := r.tied[first]
		if len(group) == 0 {
			group = []int{first}
		}
		if !r.together(group, i, l) {
			return nil, false
		}
		for _, j := range group {
			a, at, end := &r.p.Acts[j], g.start[j], g.finish[j]
			watch := a.Modes[s.Mode[j]].Time.Watch()
			if end > a.By || a.Site && a.By < problem.Inf && watch > 0 && at < end && end+watch > r.p.Close {
				return nil, false
			}
			if j != i && at > s.Start[j] {
				moved = append(moved, j)
			}
		}
	}
	return moved, g.whole()
}

// together places a group that starts at one minute at the first that suits all of it, i with its finish at least l later; false
// where there is none, or a maximum wait breaks.
func (r *rower) together(group []int, i, l int) bool {
	g, s := r.g, r.s
	for from := -problem.Inf; ; {
		next := from
		placed := 0
		for _, j := range group {
			lo, fin := s.Start[j], s.Finish[i]+l
			if j != i {
				lo, fin = g.lower(j, nil)
				lo = max(lo, s.Start[j])
				for _, k := range r.ahead[j] {
					lo = max(lo, g.finish[k])
				}
			}
			at := g.earliest(j, s.Mode[j], g.first(j, s.Mode[j], max(lo, from), fin), problem.Inf-1, nil)
			if at >= problem.Inf || len(group) == 1 && g.breaksMax(j, s.Mode[j], at) {
				return false
			}
			if at > from && len(group) > 1 {
				next = at
				break
			}
			g.put(j, s.Mode[j], at)
			placed++
		}
		if placed == len(group) {
			return !slices.ContainsFunc(group, func(j int) bool { return g.breaksMax(j, s.Mode[j], g.start[j]) })
		}
		for _, j := range group[:placed] {
			g.take(j)
		}
		from = next
	}
}

// ties finds for every activity those that start at the same minute as it by `starts with`, itself among them, in
// the plan's order; nil where there are none.
func (r *rower) ties() {
	r.tied = make([][]int, len(r.p.Acts))
	root := make([]int, len(r.p.Acts))
	for i := range root {
		root[i] = i
	}
	find := func(i int) int {
		for root[i] != i {
			i = root[i]
		}
		return i
	}
	for k := range r.p.Links {
		l := &r.p.Links[k]
		if l.From >= 0 && l.FromEnd == tasks.Start && l.ToEnd == tasks.Start && l.Min == 0 && l.Max == 0 && l.MaxCount == nil && l.Last == nil {
			root[find(l.To)] = find(l.From)
		}
	}
	groups := map[int][]int{}
	for _, i := range r.order {
		groups[find(i)] = append(groups[find(i)], i)
	}
	for _, group := range groups {
		for _, i := range group {
			if len(group) > 1 {
				r.tied[i] = group
			}
		}
	}
}

// front gives the place in the order of the first of those tied to the activity at a place.
func (r *rower) front(rank int) int {
	group := r.tied[r.order[rank]]
	if len(group) == 0 {
		return rank
	}
	for r.order[rank] != group[0] {
		rank--
	}
	return rank
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
