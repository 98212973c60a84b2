package learn

import "sailby/plan/problem"

// LimitKind is the kind of a limit that a contradiction may need.
type LimitKind uint8

// The kinds of limits, in the order in which they are tried to be left out.
const (
	ByPair     LimitKind = iota // Index in Problem.Pairs
	ByOrder                     // Index in Problem.Orders
	ByResource                  // Index in Problem.Res
	ByPeople                    // People: there are only these for some work
	ByFrom                      // not-before time of activity Index
	ByLink                      // Index in Problem.Links
	ByHours                     // open hours of activity Index and of its people
	ByDeadline                  // latest finish of activity Index, the window's close included
)

// Limit is one limit of a problem.
type Limit struct {
	Kind   LimitKind
	Index  int
	People []int // for ByPeople: indices into Problem.People
	Needed bool  // shown to be needed: the others of its set can hold without it
}

// guard is a limit with the fact behind which it sits.
type guard struct {
	Limit
	on fact
}

// guard gives the condition of a limit: always, unless limits can be left out.
func (m *model) guard(k LimitKind, index int) fact {
	if !m.guarded {
		return always
	}
	on := fact{m.variable(0, 1), 1}
	m.guards = append(m.guards, guard{Limit{Kind: k, Index: index}, on})
	return on
}

// limit puts activity i's first start and last finish behind guards.
func (m *model) limit(i, last int) {
	if a := &m.p.Acts[i]; a.From > 0 {
		m.join(m.zero, m.start[i], int32(a.From), m.guard(ByFrom, i))
	}
	if last < m.p.End {
		m.join(m.finish[i], m.zero, m.length[i]-int32(max(last, 0)), m.guard(ByDeadline, i))
	}
}

// only puts workers behind a guard; it gives whether they still are there always.
func (m *model) only(ws []worker, on fact) bool {
	for i := range ws {
		ws[i].on = on
	}
	return on.s < 0
}

// behind gives the assumptions that keep f from holding, f among them. O(trail).
func (e *engine) behind(f fact) []fact {
	out := []fact{f}
	for i := range e.list {
		e.needAt[e.list[i].s] = -1
	}
	e.asked = e.asked[:0]
	ask := func(g fact) {
		i := e.entry(g)
		if e.list[i].level == 0 || e.needAt[g.s] >= 0 && e.need[g.s] >= g.v {
			return
		}
		if !e.listed[g.s] {
			e.listed[g.s] = true
			e.asked = append(e.asked, g.s)
		}
		e.need[g.s], e.needAt[g.s] = g.v, i
	}
	ask(f.not())
	for i := int32(len(e.list)) - 1; i >= 0; i-- {
		r := e.list[i]
		if e.needAt[r.s] != i {
			continue
		}
		e.needAt[r.s] = -1
		g := fact{r.s, e.need[r.s]}
		if r.why.kind == whyChoice {
			out = append(out, fact{r.s, e.step[i].v})
			continue
		}
		e.scratch = e.reason(g, r.why, i, e.scratch[:0])
		for _, h := range e.scratch {
			ask(h)
		}
	}
	for _, s := range e.asked {
		e.listed[s] = false
	}
	e.asked = e.asked[:0]
	return out
}

// Contradiction gives a set of limits that cannot hold together, with who does what left out, as
// small as was found within the limits of o; nil if none was found, or if all can hold. Each
// member is tried: Needed says that a way was found to keep the others without it. each bounds the conflicts
// of one such trial.
func Contradiction(p *problem.Problem, each int64, o Options) []Limit {
	o.Log = nil
	m, ok := build(p, guarded)
	if !ok {
		return nil
	}
	s := &search{model: m, opt: o, silent: true}
	if !s.begin() {
		return nil
	}
	all := make([]fact, len(m.guards))
	for i, g := range m.guards {
		all[i] = g.on
	}
	if !s.refuse(all, 1<<29) {
		return nil
	}
	return s.shrink(each)
}

// refuse says whether the guards cannot all hold, trying up to so many conflicts; s.core then is
// the set behind that, in the order of the guards.
func (s *search) refuse(on []fact, limit int64) bool {
	from, step := s.conflicts, int64(firstRun)
	for s.conflicts-from <= limit {
		switch s.run(on, min(step, limit), false) {
		case refused:
			in := map[fact]bool{}
			for _, f := range s.core {
				in[f] = true
			}
			s.core = s.core[:0]
			for _, f := range on {
				if in[f] {
					s.core = append(s.core, f)
				}
			}
			return true
		case over:
			s.core = nil
			return true
		case found:
			s.last = found
			return false
		case stopped:
			s.last = stopped
			return false
		}
		step += step / growth
		if int64(len(s.refs)) > s.room {
			s.reduce()
			s.room += keptStep
		}
	}
	s.last = tired
	return false
}

// shrink leaves out the members of the core one by one, those of the first kinds first, while what
// is left still is a contradiction (deletion: Bakker et al. 1993).
func (s *search) shrink(each int64) []Limit {
	byOn := map[fact]int{}
	for i, g := range s.guards {
		byOn[g.on] = i
	}
	core := append([]fact(nil), s.core...)
	needed := map[fact]bool{}
	tried := map[fact]bool{}
	for k := ByPair; k <= ByDeadline; k++ {
		for at := 0; at < len(core); at++ {
			f := core[at]
			if s.guards[byOn[f]].Kind != k || tried[f] {
				continue
			}
			tried[f] = true
			rest := append(append([]fact(nil), core[:at]...), core[at+1:]...)
			if s.refuse(rest, each) {
				core = append([]fact(nil), s.core...)
				at = -1
				continue
			}
			needed[f] = s.last == found
		}
	}
	var out []Limit
	for _, f := range core {
		l := s.guards[byOn[f]].Limit
		l.Needed = needed[f]
		out = append(out, l)
	}
	return out
}
