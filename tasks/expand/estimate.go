package expand

import (
	"fmt"
	"math"

	"sailby/tasks"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// How far computed hours may be off, where nothing better is known: the low and the high end
// of a range as shares of the likely value (R3).
const (
	lowShare  = 0.85
	highShare = 1.25
)

// signOffMinutes is how long a sign-off takes where the job file does not say (house judgement).
const signOffMinutes = 15

// leastPiece is the least hands-on time, in minutes, for which a weld, cut, prep or fit-up is taken up
// again after a stop (house judgement).
const leastPiece = 15

// hands is what is known about the hands-on part of a task before it becomes steps.
type hands struct {
	minutes          quantity.Range // hands-on, elapsed with the people named
	setUp            float64
	safe             float64
	least            float64
	people           int
	welders          int     // of the people of a weld: the metal is shared by them
	power            float64 // kVA, where no kit says
	hot, noisy, grit bool
	est              Estimate
	rigging          *Rigging
	warnings         []string // of the notes, those that tell of something to change
	fault            error
	hint             string
}

// spread gives a computed number of minutes its range.
func spread(likely float64) quantity.Range {
	return quantity.Range{Low: likely * lowShare, Likely: likely, High: likely * highShare}
}

// estimate gives the hands-on minutes of a task: what the job file says, else what its kind
// works out. It is worked out once for all of the task's steps.
func (x *expander) estimate(t *tasks.Task) hands {
	var h hands
	switch t.Kind {
	case tasks.Weld:
		h = x.weld(t)
	case tasks.Cut:
		h = x.cut(t)
	case tasks.Prep:
		h = x.prep(t)
	case tasks.Coat: // one estimate a coat: see coatSteps
		h = hands{people: 1}
	case tasks.Lift, tasks.Move:
		h = x.lift(t)
	case tasks.FitUp:
		h = x.fitUp(t)
	case tasks.Test:
		h = x.test(t)
	case tasks.SignOff:
		f := origin.House("hands-on time", signOffMinutes, "min", "a sign-off without hours: look, ask, sign")
		h = hands{people: 1, minutes: quantity.Sure(signOffMinutes), est: Estimate{Figure: f}}
	default:
		h = hands{people: 1, fault: fmt.Errorf("a %s task needs its hours", t.Kind), hint: "write for instance hours: 2 h, or standing: 2 h where nobody works"}
	}
	if t.People > 0 {
		h.people = t.People
	}
	x.overrule(t, &h)
	return h
}

// overrule puts the hours that the job file gives in place of the computed ones, and applies a
// repeated block's factor.
func (x *expander) overrule(t *tasks.Task, h *hands) {
	computed := h.est.Figure
	if t.Hours.Pos.Given() || t.ManHours.Pos.Given() {
		people := float64(max(h.people, x.crewSize(t)))
		r, what := t.Hours.Range, "hours"
		pos := t.Hours.Pos
		if t.ManHours.Pos.Given() {
			r, what, pos = t.ManHours.Range.Scale(1/people), "man-hours", t.ManHours.Pos
		}
		h.minutes, h.fault = r, nil
		f := origin.Written("hands-on time", r.Likely, "min", pos.Origin(what))
		if what == "man-hours" {
			f = origin.Worked("hands-on time", r.Likely, "min", "man-hours over the people who work",
				origin.Written("man-hours", t.ManHours.Likely/60, "h", pos.Origin("man-hours")),
				origin.Written("people", people, "", pos.Origin("people")))
		}
		if computed.Name != "" && h.fault == nil && computed.Value > 0 {
			h.est.Overruled = true
			h.est.Facts = append(h.est.Facts, computed)
		}
		h.est.Figure = f
	}
	if t.Factor > 0 && t.Factor != 1 {
		h.minutes = h.minutes.Scale(t.Factor)
		h.est.Figure = origin.Worked("hands-on time", h.est.Figure.Value*t.Factor, "min", "time x factor of the round",
			h.est.Figure, origin.Written(fmt.Sprintf("factor of round %d", t.Round), t.Factor, "", t.Pos.Origin("first times")))
	}
	h.est.Range = [3]int{whole(h.minutes.Low), whole(h.minutes.Likely), whole(h.minutes.High)}
	if h.est.Figure.Name != "" {
		h.est.Figure.Name = "hands-on time"
	}
}

func whole(minutes float64) int { return int(math.Ceil(minutes - 1e-6)) }

// value takes the basis's end of the hands-on minutes.
func (x *expander) value(r quantity.Range) int {
	return whole(x.pick(tasks.Range{Range: r}))
}

// atSite says whether the task is at the window's place, where site defaults hold.
func (x *expander) atSite(t *tasks.Task) bool { return t.Place == x.w.Window.Place }

// faceFactor gives the place's face factor: its own, else the default of site or shop.
func (x *expander) faceFactor(p *tasks.Place) origin.Figure {
	if p.FaceFactor.Pos.Given() {
		return origin.Written("face factor", p.FaceFactor.Value, "", p.FaceFactor.Pos.Origin("face factor of "+p.Name))
	}
	if p == x.w.Window.Place {
		return origin.House("face factor", SiteFace, "", "share of the hours at the face on site")
	}
	return origin.House("face factor", ShopFace, "", "share of the hours at the face in the shop")
}

// The face factors where a place does not give its own (house judgement).
const (
	SiteFace = 0.7
	ShopFace = 0.85
)

// crewSize counts the people that the task asks for by needs and by name.
func (x *expander) crewSize(t *tasks.Task) int {
	n := 0
	for _, need := range t.Needs {
		n += need.Count
	}
	return max(n, len(t.Who))
}
