package expand

import (
	"fmt"

	"sailby/tasks"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// lift estimates a lift or a move: rig, trial, travel, land, make fast, unhook; for what surely
// hangs on it by then.
func (x *expander) lift(t *tasks.Task) hands {
	r := x.rigging(t)
	h := hands{people: r.crew, rigging: r}
	if t.Lifts == "" && !t.Mass.Pos.Given() {
		h.rigging = nil
		h.fault, h.hint = fmt.Errorf("nothing says what it lifts"), "write lifts: frame, or mass: 410 kg, or hours"
		return h
	}
	linked := func(u *tasks.Task) bool { return x.linkedBefore(u, t) }
	j, err := r.Judge(r.Among(linked, linked))
	if err != nil {
		h.rigging = nil
		h.fault, h.hint = err, "give its parts, or mass: 410 kg on the task"
		if way := quantity.Hint(err); way != "" {
			h.hint = way
		}
		return h
	}
	mass := j.Total.Figure
	mass.Name, mass.Value, mass.Unit = "mass", j.Load.Mass, "kg"
	if t.Lifts != "" {
		mass.Name = "mass of " + t.Lifts
	}
	if len(r.Joins) > 0 && mass.Origin.Kind == origin.Formula {
		mass.Name = j.Total.Figure.Name
	}
	h.est.Facts = append(h.est.Facts, mass)
	if !t.Height.Pos.Given() {
		h.est.Facts = append(h.est.Facts, origin.House("hook travel", 1500, "mm", "not given: 1.5 m"))
	}
	x.liftNotes(t, j, &h)
	e, err := r.Times(j.Load.Mass)
	if err != nil {
		h.fault, h.hint = err, "give hours, or another way to lift"
		return h
	}
	h.minutes = spread(float64(e.HandsOn))
	h.est.Figure = e.Hours
	return h
}

// Times estimates the steps of the lift for a mass in kg. Errors as for lift.Times.
func (r *Rigging) Times(mass float64) (lift.Estimate, error) {
	t := r.Task
	height := t.Height.Value
	if !t.Height.Pos.Given() {
		height = 1500
	}
	m := lift.Move{Mass: mass, Height: height, Travel: t.Travel.Value, By: r.Way, People: r.crew, First: t.Round <= 1, Site: r.site}
	if r.Kit != nil && r.Kit.Speed.Value > 0 {
		m.Speed = r.Kit.Speed.Value * 1000 // m to mm
	}
	return lift.Times(m)
}

// liftNotes says what exceeds a filter, and when to stop pulling at an old part.
func (x *expander) liftNotes(t *tasks.Task, j Judgement, h *hands) {
	for _, c := range j.Checks {
		if c.Filter && !c.Result.OK {
			text := c.Result.Reason
			if c.Result.Nearest != "" {
				text += "; would do: " + c.Result.Nearest
			}
			h.est.Notes = append(h.est.Notes, text)
			h.warnings = append(h.warnings, text)
		}
	}
	if l := t.Lifting; l != nil && l.Proved != nil && j.CutOff.Value > 0 {
		if by := x.byName[l.Proved.Name]; by != nil {
			h.est.Notes = append(h.est.Notes, freeNote(by, j.CutOff))
		}
		h.est.Facts = append(h.est.Facts, j.CutOff)
	}
}

// linkedBefore says whether links, or the trip, put u before t.
func (x *expander) linkedBefore(u, t *tasks.Task) bool {
	if !x.atSite(u) && x.atSite(t) {
		return true
	}
	seen := map[string]bool{}
	var look func(t *tasks.Task) bool
	look = func(t *tasks.Task) bool {
		for _, l := range t.Links {
			if l.To != tasks.Start || seen[l.Task] {
				continue
			}
			seen[l.Task] = true
			if l.Task == u.Name {
				return true
			}
			if next := x.byName[l.Task]; next != nil && look(next) {
				return true
			}
		}
		return false
	}
	return look(t)
}
