package learn

import "sailby/plan/problem"

// Busy says that there is more work than time: what activities Acts ask of people, or of a resource where there
// are none, lies between minutes From and To, and is more than these have there.
type Busy struct {
	People   []int // indices into Problem.People, rising; nil: a resource
	Res      int   // then the index into Problem.Res
	From, To int
	Acts     []int
}

// Refute writes to o.Log why no plan finishes by a minute (problem.Inf: why there is none), with people named
// or with who does what left out; Infeasible is success. Where busy holds under the bounds that the links and hours give, it is the reason, the
// first of them that does; else the learning search looks for one.
func Refute(p *problem.Problem, finish int, people bool, busy []Busy, o Options) Result {
	log, kind := newRecord(o.Log), relaxed
	if people {
		kind = named
	}
	m, ok := buildFor(p, kind, log)
	if !ok {
		return log.close(none())
	}
	if finish < p.End {
		o.Best = max(finish, 0) + 1
	}
	s := &search{model: m, opt: o, once: true, people: people && !m.plain}
	if s.begin() {
		for _, b := range busy {
			if log != nil && m.tooMuch(b) {
				s.dead = true
				return log.close(s.result())
			}
		}
	}
	if s.dead {
		return log.close(s.result())
	}
	return log.close(s.minimise())
}

// tooMuch writes the lemma of b, if the bounds of level 0 hold all of its work between its minutes.
func (m *model) tooMuch(b Busy) bool {
	var fs []fact
	for _, i := range b.Acts {
		u := m.user(i, 0)
		first, last := fact{u.start, m.now[u.start]}, fact{u.finish ^ 1, m.now[u.finish^1]}
		if int(m.now[u.start]) < b.From || int(m.latestFinish(&u)) > b.To {
			return false
		}
		fs = append(fs, first, last)
	}
	m.log.begin()
	m.clash = fs
	for _, f := range fs {
		m.log.root(f)
	}
	name := "use " + list([]int{b.Res})
	if b.People != nil {
		name = "crew " + list(b.People)
	}
	m.log.lemma(name+" "+list([]int{b.From})+" "+list([]int{b.To}), fs, fact{s: -1})
	m.log.none()
	return true
}
