package solve

import (
	"sailby/plan"
	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// Rows explains every activity of a schedule: what sets its start (R21) and how much leeway it
// has (R20). Beyond leewaySteps activities the leeway is left out (-1), as it costs O(n^2).
func Rows(p *problem.Problem, s *Schedule, stop func() bool) []plan.Row {
	r := &rower{g: newGenerator(p), p: p, s: s, rows: make([]plan.Row, len(p.Acts))}
	r.g.load(s)
	r.order = r.g.list()
	r.inOrder()
	for i := range p.Acts {
		r.rows[i].SetBy = r.setBy(i)
		r.rows[i].Leeway = -1
		r.rows[i].Latest = p.Base + hours.Minute(s.Finish[i])
	}
	if len(p.Acts) <= leewaySteps {
		for rank, i := range r.order {
			if stop != nil && stop() {
				break
			}
			r.leeway(rank, i)
		}
	}
	return r.rows
}

type rower struct {
	g     *generator
	p     *problem.Problem
	s     *Schedule
	order []int
	ahead [][]int // by activity: those that come before it in the plan's order, for want of people, kit, room or a clear workface
	rows  []plan.Row
}
