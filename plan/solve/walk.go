package solve

import (
	"slices"

	"sailby/plan/problem"
	"sailby/tasks/expand"
)

// climb changes the list and keeps what is better, or not much worse while the walk is warm,
// until a limit or until a long stretch has brought nothing.
func (f *finder) climb() {
	if f.best == nil && !f.scramble() {
		return
	}
	n := len(f.p.Acts)
	if n < 2 {
		return
	}
	w := &walk{f: f, list: slices.Clone(f.list), choice: slices.Clone(f.best.Choice), weight: slices.Clone(f.g.weight), lean: newLeaning(n)}
	w.lean.set(f.leaning)
	f.g.lean.set(w.lean)
	copy(f.g.choice, w.choice)
	if !f.g.run(w.list) {
		return
	}
	w.settle(f.g.score())
	trial := make([]int, n)
	for step, stale := 0, 0; !f.over(); step++ {
		copy(trial, w.list)
		copy(f.g.choice, w.choice)
		w.change(trial)
		before := f.best.Score
		sc, ok := f.try(trial)
		warm := w.heat(step)
		switch {
		case ok && f.energy(sc) <= w.energy+warm:
			copy(w.list, trial)
			copy(w.choice, f.g.choice)
			w.lean.set(f.g.lean)
			w.settle(sc)
		case step%walkLength == walkLength-1: // from the best again, or from somewhere else
			copy(w.list, f.list)
			copy(w.choice, f.best.Choice)
			w.lean.set(f.leaning)
			if f.rng.IntN(2) == 0 {
				copy(w.list, f.biased())
			}
			copy(f.g.choice, w.choice)
			f.g.lean.set(w.lean)
			if f.g.run(w.list) {
				w.settle(f.g.score())
			}
		}
		if stale++; f.best.Score.Compare(before, false) < 0 {
			stale = 0
			if step%3 == 0 {
				f.justify()
			}
		}
		if f.o.Ticks == 0 && f.o.Stop == nil && stale > 50*n {
			return
		}
	}
}

// walkLength is how many changes a walk takes from warm to cold.
const walkLength = 600

// walk is where the search stands.
type walk struct {
	f      *finder
	list   []int
	choice []int
	weight []int
	lean   leaning
	energy float64
	pairs  [][2]int // activities whose order holds the finish back: the first waited for the second
}

// settle takes the schedule in the generator as the one the walk stands on.
func (w *walk) settle(sc Score) {
	w.energy = w.f.energy(sc)
	w.pairs = w.f.g.critical(w.pairs[:0])
}

// heat gives how much worse, in energy, a change may be at a step.
func (w *walk) heat(step int) float64 {
	left := 1 - float64(step%walkLength)/walkLength
	return 90 * left * left * w.f.rng.Float64()
}

// energy is one number for how good a schedule is, in minutes: lateness counts most.
func (f *finder) energy(sc Score) float64 {
	return 20*float64(sc.Late) + float64(sc.Tardy)/8 + float64(sc.Finish) + 0.2*float64(sc.Hand) + 5*float64(sc.Stops) + 0.05*float64(sc.Idle)
}

// change alters a list: half of the time an activity that waited for another on the way to the
// finish goes ahead of it, else at random. Who is wanted elsewhere is weighed anew now and then.
func (w *walk) change(list []int) {
	f := w.f
	f.lean(w.lean)
	if len(w.pairs) > 0 && f.rng.IntN(2) == 0 {
		pair := w.pairs[f.rng.IntN(len(w.pairs))]
		f.ahead(list, pair[0], pair[1])
	} else {
		f.mutate(list)
	}
	for i := range w.weight {
		f.g.weight[i] = w.weight[i]
		if f.rng.IntN(4) == 0 {
			f.g.weight[i] = int(float64(w.weight[i]) * (0.5 + f.rng.Float64()))
		}
	}
}

// ahead moves activity a, with all that must come before it, to just before b in the list.
func (f *finder) ahead(list []int, a, b int) {
	at := slices.Index(list, b)
	need := map[int]bool{}
	f.before(a, need)
	if need[b] {
		return
	}
	out := make([]int, 0, len(list))
	out = append(out, list[:at]...)
	for _, i := range list[at:] {
		if need[i] {
			out = append(out, i)
		}
	}
	for _, i := range list[at:] {
		if !need[i] {
			out = append(out, i)
		}
	}
	copy(list, out)
}

// before collects activity i and all that links make come before it.
func (f *finder) before(i int, into map[int]bool) {
	if into[i] {
		return
	}
	into[i] = true
	for _, k := range f.g.into[i] {
		if l := &f.p.Links[k]; l.From >= 0 && l.Min > expand.NoMin {
			f.before(l.From, into)
		}
	}
}

// critical walks back from the activity that is latest against its deadline, or last of all,
// over what each waited for, and appends the pairs in which it was another's place in the list.
func (g *generator) critical(pairs [][2]int) [][2]int {
	last, worst := -1, -problem.Inf
	for i := range g.p.Acts {
		a := &g.p.Acts[i]
		key := g.finish[i] - g.p.End
		if late := g.finish[i] - a.By; a.By < problem.Inf && late > 0 {
			key = late
		} else if !a.Site {
			continue
		}
		if key > worst {
			last, worst = i, key
		}
	}
	for steps := 0; last >= 0 && steps < 200; steps++ {
		i := last
		last = -1
		at := -1
		for _, k := range g.into[i] {
			if l := &g.p.Links[k]; l.From >= 0 && l.Min > expand.NoMin {
				if t := g.finish[l.From]; t > at {
					last, at = l.From, t
				}
			}
		}
		if b := g.blocker[i]; b >= 0 && b != i && g.placed[b] {
			pairs = append(pairs, [2]int{i, b})
			if g.finish[b] > at && g.start[b] < g.start[i] {
				last = b
			}
		}
	}
	return pairs
}

// scramble looks for a first schedule among random lists.
func (f *finder) scramble() bool {
	n := len(f.p.Acts)
	order := make([]int, n)
	for i := range order {
		order[i] = i
	}
	for tries := 0; tries < 2000 && !f.over(); tries++ {
		f.rng.Shuffle(n, func(a, b int) { order[a], order[b] = order[b], order[a] })
		for o := range f.p.Orders {
			f.g.choice[o] = f.rng.IntN(len(f.p.Orders[o].Choices))
		}
		if _, ok := f.try(order); ok {
			return true
		}
	}
	return f.best != nil
}

// mutate changes a list a little: an activity moves, two change places, or a stretch is shuffled.
func (f *finder) mutate(list []int) {
	n := len(list)
	for k := 1 + f.rng.IntN(3); k > 0; k-- {
		switch f.rng.IntN(4) {
		case 0, 1:
			from, to := f.rng.IntN(n), f.rng.IntN(n)
			v := list[from]
			if from < to {
				copy(list[from:to], list[from+1:to+1])
			} else {
				copy(list[to+1:from+1], list[to:from])
			}
			list[to] = v
		case 2:
			a, b := f.rng.IntN(n), f.rng.IntN(n)
			list[a], list[b] = list[b], list[a]
		default:
			a := f.rng.IntN(n)
			b := min(n, a+2+f.rng.IntN(6))
			f.rng.Shuffle(b-a, func(i, j int) { list[a+i], list[a+j] = list[a+j], list[a+i] })
		}
	}
	if len(f.p.Orders) > 0 && f.rng.IntN(5) == 0 {
		o := f.rng.IntN(len(f.p.Orders))
		f.g.choice[o] = f.rng.IntN(len(f.p.Orders[o].Choices))
	}
}
