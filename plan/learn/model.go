package learn

import (
	"sailby/plan/problem"
	"sailby/tasks"
)

// model is a problem in the engine's terms.
type model struct {
	*engine
	p       *problem.Problem
	acts    []act
	start   []side  // by activity
	finish  []side  // by activity
	length  []int32 // the finish is the value of side finish plus this
	end     side    // the finish of the whole
	lags    []lag   // every lag of fixed length between two starts
	forced  []pair  // the pairs whose order the lags decide, in the order decided
	team    []int   // by activity: its workface, for watches that may be shared
	plain   bool    // every activity has one fixed length and one mode
	kept    []Kept  // the fire watches of the last leaf
	guards  []guard // the limits that can be left out, nil if none can
	guarded bool    // limits can be left out
	zero    side    // with guarded: a variable that is 0
	grids   map[*problem.Timing]*grid
	steady  map[*problem.Timing]spans
	stops   map[begun][]int // known stops on the way
}

// act is what the model knows of an activity beside its sides.
type act struct {
	times   []*problem.Timing
	grids   grids
	empty   bool     // it may take no time at all
	sure    spans    // minutes in which it is worked if it runs over them, whoever does it
	watch   int32    // minutes of fire watch that follow at least
	byMode  []*grid  // with people: the timing of each mode
	timed   []side   // with people: a variable for each timing, if there are several
	keepers []keeper // with people: who may keep the watch after it
	modes   []side   // with people: a variable for each mode, if there are several
}

// lag says that j starts at least lag after i.
type lag struct {
	i, j int
	lag  int32
	link int  // which says so
	back bool // by its longest wait
}

// latest is the longest horizon: above it minutes would not leave room for sums.
const latest = int(far) / 4

// kind is what a model is for.
type kind uint8

const (
	// relaxed: who does what is left out and every activity takes the kindest of its timings, so
	// that a bound holds for the job too.
	relaxed kind = iota
	named        // the job as it is, with named people
	guarded      // relaxed, with every limit behind a variable of its own
)

// build makes the model; ok is false if the problem contradicts itself at sight.
func build(p *problem.Problem, kind kind) (*model, bool) { return buildFor(p, kind, nil) }

// buildFor is build with the log told, unless it is nil.
func buildFor(p *problem.Problem, kind kind, log *record) (*model, bool) {
	m := &model{engine: newEngine(), p: p, plain: kind != guarded, guarded: kind == guarded, grids: map[*problem.Timing]*grid{}, steady: map[*problem.Timing]spans{}, stops: map[begun][]int{}}
	if log != nil {
		log.listen(m)
	}
	ok := p.End >= 0 && p.End <= latest && m.fill(kind)
	if !ok && log != nil {
		log.none()
	}
	return m, ok
}

// fill puts everything into the model.
func (m *model) fill(kind kind) bool {
	p := m.p
	if m.guarded {
		m.zero = m.variable(0, 0)
	}
	for i := range p.Acts {
		if !m.activity(i) {
			return false
		}
	}
	m.workfaces()
	m.end = m.variable(0, int32(p.End))
	m.called(m.end, "e")
	for i := range m.acts {
		m.timed(i)
	}
	m.aim()
	for i := range p.Links {
		m.label = label{forLink, i, 0}
		if !m.wait(i, m.guard(ByLink, i)) {
			return false
		}
	}
	if !m.guarded && !m.orders() || !m.apart() || !m.rules() {
		return false
	}
	if kind == named {
		return m.crews() && m.resources()
	}
	if !m.resources() {
		return false
	}
	m.groups()
	return true
}

// activity makes the variables of activity i: its start, and its finish unless that is the
// start and a fixed length.
func (m *model) activity(i int) bool {
	a := &m.p.Acts[i]
	if len(a.Modes) == 0 {
		m.never("shut %d", i)
		return false
	}
	x := act{times: a.Timings()}
	last, fixed := min(m.p.End, a.By), true
	x.watch = int32(latest)
	for _, w := range x.times {
		g := m.grids[w]
		if g == nil {
			g = newGrid(w, m.p.End)
			m.grids[w], m.steady[w] = g, steady(w, g)
		}
		x.grids = append(x.grids, g)
		fixed = fixed && isFixed(w) && w.Length() == x.times[0].Length()
		x.empty = x.empty || w.Length() == 0 && (isFixed(w) || w.Calendar() != nil)
		if x.watch = min(x.watch, int32(w.Watch())); x.empty {
			x.watch = 0
		}
		x.sure = x.sure.and(m.steady[w])
	}
	if a.Site && a.By < problem.Inf {
		last = min(last, m.p.Close-int(x.watch))
	}
	m.acts = append(m.acts, x)
	m.plain = m.plain && fixed && len(a.Modes) == 1
	d := 0
	if fixed {
		d = x.times[0].Length()
	}
	from := a.From
	if m.guarded {
		from, fixed = 0, fixed && isFixed(x.times[0])
	}
	upTo := last
	if m.guarded {
		upTo = m.p.End
	}
	if from+d > upTo || from < 0 {
		return false
	}
	s := m.variable(int32(from), int32(upTo-d))
	m.called(s, "s%d", i)
	m.start, m.finish, m.length = append(m.start, s), append(m.finish, s), append(m.length, int32(d))
	if !fixed {
		m.finish[i] = m.variable(int32(from), int32(upTo))
		m.called(m.finish[i], "f%d", i)
	}
	if m.guarded {
		m.limit(i, last)
	}
	return true
}

// timed ties the finish of activity i to its start, by the kindest of its timings.
func (m *model) timed(i int) {
	if m.start[i] == m.finish[i] {
		return
	}
	on := m.guard(ByHours, i)
	m.label = label{forHours, i, 0}
	m.tie(i, m.acts[i].grids, on)
	if on.s >= 0 { // without its hours it still takes its minutes
		m.join(m.start[i], m.finish[i], m.least(i), always)
	}
}

// least gives the fewest minutes from start to finish of activity i.
func (m *model) least(i int) int32 {
	least := m.acts[i].times[0].Length()
	for _, w := range m.acts[i].times {
		least = min(least, w.Length())
	}
	return int32(least)
}

// tie says that activity i starts where one of gs lets it, and finishes when that leads to.
func (m *model) tie(i int, gs grids, on fact) {
	s, f := m.start[i], m.finish[i]
	m.bend(s, 0, f, 0, rising{gs.finish, gs.latest}, on)
	m.bend(s, 0, s, 0, rising{gs.start, gs.last}, on)
	m.bend(f, 0, s, 0, rising{gs.back, gs.most}, on)
}

// aim ties the finish of the whole to the site activities, to all where none is at the site.
func (m *model) aim() {
	site := false
	for i := range m.p.Acts {
		site = site || m.p.Acts[i].Site
	}
	for i := range m.p.Acts {
		if m.p.Acts[i].Site || !site {
			m.label = label{forEnd, i, 0}
			m.join(m.finish[i], m.end, m.length[i]+m.acts[i].watch, always)
		}
	}
}

// endOf gives the side of an end of activity i, and what to add to it.
func (m *model) endOf(i int, end tasks.LinkEnd) (side, int32) {
	if end == tasks.Start {
		return m.start[i], 0
	}
	return m.finish[i], m.length[i]
}
