package expand

import (
	"sailby/tasks"
	"sailby/tasks/lift"
)

// SupervisorTicket is asked for on lifts with a crane, and with a hoist at the site, where somebody
// on the job holds it beside another who slings.
const SupervisorTicket = "lift supervisor"

// supervisor gives the need of a lift for somebody who is in charge of it and slings nothing; count 0 where the
// lift wants none, or the crew has nobody to spare for it: then the sheet leaves the line to sign.
func (x *expander) supervisor(t *tasks.Task, h hands) tasks.Need {
	none := tasks.Need{}
	if t.Kind != tasks.Lift || h.rigging == nil || h.rigging.Way == lift.ByHands || h.rigging.Way == lift.ByTrolley {
		return none
	}
	want, slinger := tasks.Ticket{Name: SupervisorTicket}, tasks.Ticket{Name: tasks.SlingerTicket}
	for _, p := range x.w.Job.People {
		for _, q := range x.w.Job.People {
			if p != q && p.Holds(want) && q.Holds(slinger) && comes(p, t.Place) && comes(q, t.Place) {
				return tasks.Need{Ticket: want, Count: 1, Pos: t.Pos}
			}
		}
	}
	return none
}

// comes says whether somebody works at a place as one of the crew.
func comes(p *tasks.Person, at *tasks.Place) bool {
	return !p.Outside && (len(p.Places) == 0 || has(p.Places, at.Name))
}
