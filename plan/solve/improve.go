package solve

import (
	"cmp"
	"math/rand/v2"
	"slices"

	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// Schedule is a complete schedule: a start, a finish and a mode for every activity.
type Schedule struct {
	Start, Finish, Mode []int
	Watches             [][]Watch // by activity: who keeps its fire watches
	Choice              []int     // by order rule
	Score               Score
}

// Watch is a fire watch kept by person Who.
type Watch struct{ From, To, Who int }

// Options bound a search.
type Options struct {
	Ticks int64       // starts tried before it ends; 0 is no limit
	Stop  func() bool // asked often; true ends the search
	Seed  uint64
	Good  func(Score) bool // true ends the search: nothing better is wanted
}

// Result is what a search found.
type Result struct {
	Best  *Schedule // nil if no schedule was found
	Ticks int64
	Cut   bool // ended by Stop or Ticks, not by Good or by having nothing left to try
}

// Find looks for the best schedule: priority rules first, then forward-backward improvement
// and local search on the list, until a limit. The same seed and ticks give the same schedule.
//
// Source of the methods: serial generation and priority rules after Kolisch (EJOR 1996),
// unscheduling for maximum waits after Franck, Neumann and Schwindt (OR Spektrum 2001),
// forward-backward improvement (justification) after Valls, Ballestin and Quintanilla (EJOR 2005).
func Find(p *problem.Problem, b network.Bounds, o Options) Result {
	f := &finder{g: newGenerator(p), p: p, b: b, o: o, rng: rand.New(rand.NewPCG(o.Seed, 0x5a11b7))}
	f.leaning = newLeaning(len(p.Acts))
	f.holdable, f.calmable = f.g.yielding()
	f.rules()
	if f.best != nil {
		f.justify()
	}
	f.climb()
	return Result{Best: f.best, Ticks: f.g.ticks, Cut: f.cut}
}

type finder struct {
	g                  *generator
	p                  *problem.Problem
	b                  network.Bounds
	o                  Options
	rng                *rand.Rand
	best               *Schedule
	list               []int   // the list that made best
	leaning            leaning // what best was made with beside it
	holdable, calmable []int
	after              []int // by activity: the longest chain of work from it on
	cut                bool
}

// over says whether the search must end.
func (f *finder) over() bool {
	if f.best != nil && f.o.Good != nil && f.o.Good(f.best.Score) {
		return true
	}
	if f.o.Ticks > 0 && f.g.ticks >= f.o.Ticks || f.o.Stop != nil && f.o.Stop() {
		f.cut = true
		return true
	}
	return false
}

// try makes the schedule of a list and keeps it if it is the best so far. It says whether it
// was made, and its score.
func (f *finder) try(order []int) (Score, bool) {
	for k := 0; !f.g.run(order); k++ {
		if k >= squeaks || f.g.stuck < 0 || f.over() {
			return Score{}, false
		}
		f.forward(order, f.g.stuck)
	}
	sc := f.g.score()
	if f.best == nil || sc.Compare(f.best.Score, false) < 0 {
		f.best = f.g.snapshot(sc)
		f.list = append(f.list[:0], order...)
		f.leaning.set(f.g.lean)
	}
	return sc, true
}

// squeaks is how often an activity that finds no place is moved to the front before a list is
// given up: what has few openings (a hired crane in two slots) must go first.
const squeaks = 12

// forward moves activity i and all that comes before it to the front of the list, in their
// order (after "squeaky wheel" optimisation, Joslin and Clements, JAIR 1999).
func (f *finder) forward(order []int, i int) {
	first := map[int]bool{}
	f.before(i, first)
	slices.SortStableFunc(order, func(a, b int) int {
		switch {
		case first[a] == first[b]:
			return 0
		case first[a]:
			return -1
		}
		return 1
	})
}

func (g *generator) snapshot(sc Score) *Schedule {
	watches := make([][]Watch, len(g.watches))
	for i, list := range g.watches {
		for _, w := range list {
			if g.start[i] < g.finish[i] {
				watches[i] = append(watches[i], Watch{w.from, w.to, w.act})
			}
		}
	}
	return &Schedule{Watches: watches, Start: slices.Clone(g.start), Finish: slices.Clone(g.finish), Mode: slices.Clone(g.mode),
		Choice: slices.Clone(g.choice), Score: sc}
}

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

// justify shifts the best schedule right, then makes it again by the starts that gives, as long
// as that helps.
func (f *finder) justify() {
	for round := 0; round < 6 && !f.over(); round++ {
		before := f.best.Score
		order := f.rightList()
		f.try(order)
		if f.best.Score.Compare(before, false) >= 0 {
			return
		}
	}
}

// rightList gives the activities by the start each has when all are pushed as late as the
// finish allows, last first.
func (f *finder) rightList() []int {
	g, p, best := f.g, f.p, f.best
	g.reset()
	byFinish := make([]int, len(p.Acts))
	for i := range byFinish {
		byFinish[i] = i
	}
	slices.SortStableFunc(byFinish, func(a, b int) int {
		if best.Finish[a] != best.Finish[b] {
			return best.Finish[b] - best.Finish[a]
		}
		return best.Start[b] - best.Start[a]
	})
	for _, i := range byFinish {
		at := g.latest(i, best)
		g.put(i, best.Mode[i], at)
	}
	starts := slices.Clone(g.start)
	order := make([]int, len(p.Acts))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int {
		if starts[a] != starts[b] {
			return starts[a] - starts[b]
		}
		return best.Start[a] - best.Start[b]
	})
	return order
}

// latest gives the latest start of i, in its mode of best, with what is placed; its own start
// where no later one is found.
func (g *generator) latest(i int, best *Schedule) int {
	w := g.p.Acts[i].Modes[best.Mode[i]].Time
	hi := best.Score.Finish
	if !g.p.Acts[i].Site {
		hi = max(hi, best.Finish[i])
	}
	for _, k := range g.from[i] {
		l := &g.p.Links[k]
		if !g.placed[l.To] || l.Min <= expand.NoMin || l.Count != nil {
			if g.placed[l.To] && l.Count != nil {
				hi = min(hi, best.Finish[i])
			}
			continue
		}
		t := g.end(l.To, l.ToEnd) - l.Min
		if l.FromEnd == tasks.Start {
			t += max(0, w.Finish(best.Start[i])-best.Start[i])
		}
		hi = min(hi, t)
	}
	for tries := 0; tries < 200 && hi > best.Finish[i]; tries++ {
		s := w.Latest(hi, best.Start[i])
		if s <= best.Start[i] {
			break
		}
		b := g.fits(i, best.Mode[i], s, nil)
		if b.kind == free {
			return s
		}
		hi = min(w.Finish(s)-1, max(b.before, 0))
	}
	return best.Start[i]
}

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
