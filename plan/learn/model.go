package learn

import (
	"os"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// model is a problem in the engine's terms.
type model struct {
	*engine
	p      *problem.Problem
	start  []side // by activity
	finish []side
	length []int32 // finish is the value of side finish plus this
	end    side    // the finish of the whole
	lags   []lag   // every lag between two starts
}

// build makes the model; ok is false if the problem contradicts itself at sight.
func build(p *problem.Problem) (*model, bool) {
	m := &model{engine: newEngine(), p: p}
	n := len(p.Acts)
	for i := range p.Acts {
		a := &p.Acts[i]
		d := int32(a.Modes[0].Time.Length())
		latest := int32(min(p.End, a.By))
		if latest-d < int32(a.From) {
			return nil, false
		}
		s := m.variable(int32(a.From), latest-d)
		m.start = append(m.start, s)
		m.finish = append(m.finish, s)
		m.length = append(m.length, d)
	}
	m.end = m.variable(0, int32(p.End))
	for i := range p.Links {
		m.link(&p.Links[i])
	}
	for i := 0; i < n; i++ {
		m.join(m.finish[i], m.end, m.length[i], always)
	}
	if !m.orders() {
		return nil, false
	}
	for k := range p.Res {
		var us []user
		for i := range p.Acts {
			for _, u := range p.Acts[i].Uses {
				if u.Res == k && u.Amount > 0 && m.length[i] > 0 {
					us = append(us, user{m.start[i], m.finish[i], m.length[i], int32(u.Amount)})
				}
			}
		}
		newTimetable(m.engine, int32(p.Res[k].Capacity), us)
	}
	return m, true
}

// lag says that j starts at least lag after i.
type lag struct {
	i, j int
	lag  int32
}

func (m *model) endOf(i int, end tasks.LinkEnd) (side, int32) {
	if end == tasks.Start {
		return m.start[i], 0
	}
	return m.finish[i], m.length[i]
}

func (m *model) link(l *problem.Link) {
	from, a := m.endOf(l.From, l.FromEnd)
	to, b := m.endOf(l.To, l.ToEnd)
	if l.Min > expand.NoMin {
		m.join(from, to, int32(l.Min)+a-b, always)
		m.lags = append(m.lags, lag{l.From, l.To, int32(l.Min) + a - b})
	}
	if l.Max < expand.NoMax {
		m.join(to, from, -int32(l.Max)+b-a, always)
		m.lags = append(m.lags, lag{l.To, l.From, -int32(l.Max) + b - a})
	}
}

// orders finds the pairs that cannot overlap. Those that the links decide become links; each
// other gets a variable that says which goes first.
func (m *model) orders() bool {
	w := newNetwork(len(m.start))
	for _, a := range m.lags {
		w.put(a.i, a.j, a.lag)
	}
	if !w.close() {
		return false
	}
	before := append([]int32(nil), w.lag...)
	pairs := m.apart()
	open, ok := w.force(pairs, m.length)
	if !ok {
		return false
	}
	for _, p := range pairs {
		for _, q := range []pair{p, {p.b, p.a}} {
			if v := w.get(q.a, q.b); v >= m.length[q.a] && before[q.a*w.n+q.b] < m.length[q.a] {
				m.join(m.start[q.a], m.start[q.b], m.length[q.a], always)
			}
		}
	}
	if os.Getenv("NOPAIRS") != "" {
		return true
	}
	for _, p := range open {
		x := m.variable(0, 1)
		m.join(m.start[p.a], m.start[p.b], m.length[p.a], fact{x, 1})
		m.join(m.start[p.b], m.start[p.a], m.length[p.b], fact{x ^ 1, 0})
	}
	return true
}
