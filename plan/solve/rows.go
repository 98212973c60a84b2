package solve

import (
	"sailby/plan"
	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// Rows explains every activity of a schedule: what sets its start (R21) and how much leeway it
// has (R20). Beyond plan.LeewaySteps activities the leeway is left out (-1), as it costs O(n^2).
func Rows(p *problem.Problem, s *Schedule, stop func() bool) []plan.Row {
	r := &rower{g: newGenerator(p), p: p, s: s, rows: make([]plan.Row, len(p.Acts))}
	r.g.load(s)
	r.order = r.g.list()
	r.inOrder()
	r.ties()
	for i := 0; i < len(p.Acts); i++ {
		if i%16 == 0 && stop != nil && stop() {
			for ; i < len(p.Acts); i++ {
				r.rows[i] = plan.Row{Leeway: -1, Latest: p.Base + hours.Minute(s.Finish[i])}
			}
			return r.rows
		}
		r.rows[i].SetBy = r.setBy(i)
		r.rows[i].Leeway = -1
		r.rows[i].Latest = p.Base + hours.Minute(s.Finish[i])
	}
	if len(p.Acts) <= plan.LeewaySteps {
		r.stop = stop
		r.g.reset()
		for rank, i := range r.order {
			if r.stopped() {
				break
			}
			front := r.front(rank)
			for k := rank - 1; k >= front; k-- {
				r.g.take(r.order[k])
			}
			r.g.save(&r.prefix)
			r.leeway(front, i)
			r.g.restore(&r.prefix)
			for _, j := range r.order[front : rank+1] {
				r.g.put(j, s.Mode[j], s.Start[j])
			}
		}
	}
	return r.rows
}

func (r *rower) stopped() bool { return r.stop != nil && r.stop() }

type rower struct {
	g     *generator
	p     *problem.Problem
	s     *Schedule
	order []int
	ahead [][]int // by activity: those that come before it in the plan's order, for want of people, kit, room or a clear workface
	tied  [][]int // by activity: those tied to start with it, itself among them; nil where none are
	rows  []plan.Row

	stop   func() bool
	prefix saved // the schedule of the activities before the one whose leeway is looked for
}
