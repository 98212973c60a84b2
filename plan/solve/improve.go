package solve

import (
	"math/rand/v2"
	"slices"

	"sailby/plan/network"
	"sailby/plan/problem"
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
	Stop  func() bool // asked often; true ends the search after the schedule that is being made
	Quit  func() bool // asked more often; true ends it in the middle of a schedule
	Seed  uint64
	From  *Schedule        // a schedule of the same problem to begin with; nil for none
	Good  func(Score) bool // true ends the search: nothing better is wanted
	Found func(Score)      // called for each schedule that is better than all before; may be nil
	Made  func(*Schedule)  // the same with the schedule, which is not to be changed; may be nil
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
	f.g.quit = o.Quit
	f.leaning = newLeaning(len(p.Acts))
	f.holdable, f.calmable = f.g.yielding()
	f.g.stop = o.Stop
	if o.From != nil {
		f.take(o.From)
	}
	f.rules()
	if f.best != nil {
		f.justify()
	}
	f.climb()
	return Result{Best: f.best, Ticks: f.g.ticks, Cut: f.cut}
}

// take makes a known schedule the best so far, and its starts the list.
func (f *finder) take(s *Schedule) {
	f.best = s
	f.list = make([]int, len(s.Start))
	for i := range f.list {
		f.list[i] = i
	}
	slices.SortStableFunc(f.list, func(a, b int) int { return s.Start[a] - s.Start[b] })
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
	loads              []*Load // the most loaded, most first
	after              []int   // by activity: the longest chain of work from it on
	cut                bool
}

// over says whether the search must end.
func (f *finder) over() bool {
	if f.best != nil && f.o.Good != nil && f.o.Good(f.best.Score) {
		return true
	}
	if f.o.Ticks > 0 && f.g.ticks >= f.o.Ticks || f.o.Stop != nil && f.o.Stop() || f.g.quits() {
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
		if f.o.Made != nil {
			f.o.Made(f.best)
		}
		if f.o.Found != nil {
			f.o.Found(sc)
		}
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
