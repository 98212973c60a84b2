package solve

import (
	"cmp"
	"slices"

	"sailby/tasks/expand"
)

// rules tries the priority rules: least latest start, least latest finish, most work after,
// least earliest start, file order; for every order rule each of its choices.
func (f *finder) rules() {
	f.after = f.workAfter()
	after := f.after
	n := len(f.p.Acts)
	keys := []func(i int) int{
		func(i int) int { return f.b.LastStart[i] },
		func(i int) int { return f.b.Last[i] },
		func(i int) int { return -after[i] },
		func(i int) int { return f.b.Start[i] },
		func(i int) int { return i },
	}
	for c := 0; c < f.choices(); c++ {
		f.setChoice(c)
		for _, key := range keys {
			order := make([]int, n)
			for i := range order {
				order[i] = i
			}
			slices.SortStableFunc(order, func(a, b int) int { return key(a) - key(b) })
			f.try(order)
			if f.over() {
				return
			}
		}
	}
	if f.best != nil {
		copy(f.g.choice, f.best.Choice)
		f.loads = f.mostLoaded()
		for k := 0; k < len(f.loads)*len(keys) && !f.over(); k++ { // what is most loaded first
			early, much := f.early(f.loads[k/len(keys)]), f.best.Score.Finish/2
			order := make([]int, n)
			for i := range order {
				order[i] = i
			}
			key := func(i int) int {
				if early[i] {
					return keys[k%len(keys)](i) - much
				}
				return keys[k%len(keys)](i)
			}
			slices.SortStableFunc(order, func(a, b int) int { return key(a) - key(b) })
			f.try(order)
		}
		for k := 0; k < samples && !f.over(); k++ {
			f.try(f.biased())
		}
	}
}

// samples is how many biased lists are tried before the walk begins.
const samples = 40

// biased makes a list from a rule with noise, and with a lean of its own for every kind of task
// at every workface: all hot work of a face early, say, and its coats late.
func (f *finder) biased() []int {
	after := f.after
	lean := map[string]float64{}
	span := float64(max(1, f.best.Score.Finish-f.p.Open))
	noise := span * 0.15 * f.rng.Float64()
	far := span * float64(f.rng.IntN(2))
	rule := f.rng.IntN(3)
	key := make([]float64, len(f.p.Acts))
	f.press(key, span)
	for i := range key {
		switch rule {
		case 0:
			key[i] += float64(f.b.LastStart[i])
		case 1:
			key[i] -= float64(after[i])
		default:
			key[i] += float64(f.b.Start[i])
		}
		key[i] += noise * f.rng.Float64()
		if s := f.p.Acts[i].Step; s != nil && far > 0 {
			name := string(s.Task.Kind) + " " + s.Task.Where()
			if _, ok := lean[name]; !ok {
				lean[name] = far * (f.rng.Float64() - 0.5)
			}
			key[i] += lean[name]
		}
	}
	order := make([]int, len(key))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int { return cmp.Compare(key[a], key[b]) })
	return order
}

// press brings the work of up to two of the most loaded groups, kits or workfaces, and what comes
// before it, to the front of a list.
func (f *finder) press(key []float64, span float64) {
	if len(f.loads) == 0 {
		return
	}
	for range f.rng.IntN(3) {
		early := f.early(f.loads[f.rng.IntN(len(f.loads))])
		much := span * f.rng.Float64()
		for i := range key {
			if early[i] {
				key[i] -= much
			}
		}
	}
}

// early gives the work of a load and what comes before it.
func (f *finder) early(l *Load) map[int]bool {
	out := map[int]bool{}
	for _, i := range l.acts {
		f.before(i, out)
	}
	return out
}

// mostPressed is how many loads are looked at.
const mostPressed = 6

// mostLoaded gives the loads with the least time to spare between the window's opening and the best finish.
func (f *finder) mostLoaded() []*Load {
	type spare struct {
		l    *Load
		left float64
	}
	var all []spare
	for _, l := range Loads(f.p) {
		total := 0
		for _, n := range l.need {
			total += n
		}
		if have := l.have(f.p.Open, f.best.Score.Finish); have > 0 && len(l.acts) > 2 && 2*len(l.acts) < len(f.p.Acts) {
			all = append(all, spare{l, float64(have-total) / float64(have)})
		}
	}
	slices.SortStableFunc(all, func(a, b spare) int { return cmp.Compare(a.left, b.left) })
	out := []*Load{}
	for k := 0; k < len(all) && k < mostPressed; k++ {
		out = append(out, all[k].l)
	}
	return out
}

// choices counts the combinations of order choices that are tried by the rules.
func (f *finder) choices() int {
	n := 1
	for _, o := range f.p.Orders {
		if n *= len(o.Choices); n > 32 {
			return 32
		}
	}
	return n
}

func (f *finder) setChoice(c int) {
	for i, o := range f.p.Orders {
		f.g.choice[i] = c % len(o.Choices)
		c /= len(o.Choices)
	}
}

// workAfter gives the longest chain of working minutes from each activity on.
func (f *finder) workAfter() []int {
	memo := make([]int, len(f.p.Acts))
	for i := range memo {
		memo[i] = -1
	}
	var walk func(i int) int
	walk = func(i int) int {
		if memo[i] >= 0 {
			return memo[i]
		}
		memo[i] = 0
		best := 0
		for _, k := range f.g.from[i] {
			if l := &f.p.Links[k]; l.Min > expand.NoMin {
				best = max(best, walk(l.To)+max(0, l.Min))
			}
		}
		length := 0
		if len(f.p.Acts[i].Modes) > 0 {
			length = f.p.Acts[i].Modes[0].Time.Length()
		}
		memo[i] = best + length
		return memo[i]
	}
	for i := range memo {
		walk(i)
	}
	return memo
}
