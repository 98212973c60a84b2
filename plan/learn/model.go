package learn

import (
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
	}
	if l.Max < expand.NoMax {
		m.join(to, from, -int32(l.Max)+b-a, always)
	}
}
