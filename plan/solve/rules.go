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
	noise := span * 0.1 * f.rng.Float64()
	rule := f.rng.IntN(3)
	key := make([]float64, len(f.p.Acts))
	for i := range key {
		switch rule {
		case 0:
			key[i] = float64(f.b.LastStart[i])
		case 1:
			key[i] = -float64(after[i])
		default:
			key[i] = float64(f.b.Start[i])
		}
		key[i] += noise * f.rng.Float64()
		if s := f.p.Acts[i].Step; s != nil {
			name := string(s.Task.Kind) + " " + s.Task.Where()
			if _, ok := lean[name]; !ok {
				lean[name] = span * (f.rng.Float64() - 0.5)
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
