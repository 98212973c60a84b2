package learn

import (
	"sailby/plan/problem"
	"sailby/tasks/expand"
)

// wait makes the arcs of a link: its minimum one way, its maximum the other. Waits in clock time
// are arcs of fixed length, the others curves. It gives false if the link cannot hold.
func (m *model) wait(k int, on fact) bool {
	l := &m.p.Links[k]
	to, b := m.endOf(l.To, l.ToEnd)
	if l.From < 0 {
		return m.fromStart(l, to, b, on)
	}
	from, a := m.endOf(l.From, l.FromEnd)
	whole := m.start[l.From] == m.finish[l.From] && m.start[l.To] == m.finish[l.To]
	switch {
	case l.Min <= expand.NoMin:
	case l.Count != nil && l.Min > 0:
		m.bend(from, a, to, b, byFunc(l.Earliest, m.p.End), on)
	default:
		w := clip(l.Min) + a - b
		m.join(from, to, w, on)
		if whole {
			m.lags = append(m.lags, lag{l.From, l.To, w, k, false})
		}
	}
	switch {
	case l.Last != nil || l.MaxCount != nil && l.Max < expand.NoMax:
		f := byFunc(l.LastAt, m.p.End)
		// [to <= f(from)], so [from >= the first t with f(t) >= to]
		first := rising{
			at:    func(t int32) int32 { return limit(f.until(t-1)) + 1 },
			until: func(u int32) int32 { return f.at(u) },
		}
		m.bend(to, b, from, a, first, on)
	case l.Max < expand.NoMax:
		w := -clip(l.Max) + b - a
		m.join(to, from, w, on)
		if whole {
			m.lags = append(m.lags, lag{l.To, l.From, w, k, true})
		}
	}
	return true
}

// fromStart is a link from minute 0.
func (m *model) fromStart(l *problem.Link, to side, b int32, on fact) bool {
	last := l.LastAt(0)
	if on.s >= 0 {
		if l.Min > expand.NoMin {
			m.join(m.zero, to, clip(l.Earliest(0))-b, on)
		}
		if last < problem.Inf {
			m.join(to, m.zero, b-clip(last), on)
		}
		return true
	}
	if l.Min > expand.NoMin && !m.given(fact{to, clip(l.Earliest(0)) - b}) {
		return false
	}
	return last >= problem.Inf || m.given(fact{to ^ 1, b - clip(last)})
}
