package jobfile

import (
	"fmt"
	"slices"

	"sailby/tasks"
	"sailby/weld"
)

// judgeCrew reports work for which there are not enough people at its place, and welds that no
// ticket covers. Seams whose process is left to its default ask for no process here.
func (r *reader) judgeCrew() {
	if !r.peopleTried && slices.ContainsFunc(r.drafts, func(d *draft) bool { return d.t.Kind != tasks.SignOff && !standingOnly(d.t) }) {
		r.faultAt(r.job.Pos, "add `people: {Ines: {tickets: [{weld: 136}]}, Tom: {tickets: [fitter]}}`", "there is work to do, and nobody to do it")
		return
	}
	if len(r.job.People) == 0 {
		return // reported, or nobody is needed
	}
	for _, d := range r.drafts {
		here := 0
		for _, p := range r.job.People {
			if !p.Outside && mayBe(p, d.t.Place) {
				here++
			}
		}
		if t := d.t; t.Place != nil && t.People > here && d.f.has("people") {
			r.faultAt(d.f.pos("people"), "ask for fewer, or declare more people", "%s%d people asked for, only %d may be at %s", d.f.lead("people"), t.People, here, t.Place.Name)
		}
		if !r.ticketsLost && len(d.t.Needs) == 0 && len(d.t.Who) == 0 && !d.t.Hours.Pos.Given() && !d.t.ManHours.Pos.Given() {
			r.judgeWelders(d)
		}
	}
}

// standingOnly says whether nobody works on the task.
func standingOnly(t *tasks.Task) bool {
	return t.Standing.Pos.Given() && !t.Hours.Pos.Given() && !t.ManHours.Pos.Given() && len(t.Seams) == 0 && len(t.Coats) == 0
}

func mayBe(p *tasks.Person, at *tasks.Place) bool {
	return at == nil || p.Places == nil || slices.Contains(p.Places, at.Name)
}

// judgeWelders reports seams that nobody's ticket covers.
func (r *reader) judgeWelders(d *draft) {
	for i, s := range d.t.Welds() {
		need := tasks.Ticket{Name: tasks.WeldTicket, ThickFrom: s.Joint.Thickness, ThickTo: s.Joint.Thickness, Joints: []string{"butt"}}
		flat := weld.PA
		switch s.Joint.Type {
		case weld.Fillet, weld.Lap, weld.Corner, weld.Plug, weld.Slot:
			need.Joints = []string{"fillet"}
		}
		if s.Joint.Type == weld.Fillet || s.Joint.Type == weld.Lap {
			flat = weld.PB
		}
		pos := s.Position
		if p := s.Seam.Procedure; p != nil {
			if p.Process != 0 {
				need.Process = processNumber(p.Process)
			}
			if pos == 0 {
				pos = p.Position
			}
		}
		if pos == 0 {
			pos = flat
		}
		covers := func(pos weld.Position) bool {
			need.Positions = []string{pos.String()}
			return slices.ContainsFunc(r.job.People, func(p *tasks.Person) bool { return mayBe(p, d.t.Place) && p.Holds(need) })
		}
		// For fillets PE is PD, and PC is PB: a ticket may name either.
		if covers(pos) || need.Joints[0] == "fillet" && (pos == weld.PE && covers(weld.PD) || pos == weld.PC && covers(weld.PB)) {
			continue
		}
		need.Positions = []string{pos.String()}
		size := ""
		if need.ThickFrom > 0 {
			size = fmt.Sprintf(" in %s mm", trim(need.ThickFrom))
		}
		r.faultAt(s.Pos, "give somebody's ticket that process, position, joint and thickness, or say who welds it with `needs`", "%s: joint %d: nobody at %s has a ticket for %s%s",
			d.f.what, i+1, d.t.Where(), need, size)
	}
}
