package expand

import (
	"errors"
	"fmt"
	"strings"

	"sailby/tasks"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/weld"
)

// grade gives the steel that a weld joins: that of the first assembly named, else the job's.
func (x *expander) grade(t *tasks.Task) string {
	for _, name := range t.Parts {
		for _, a := range x.w.Job.Assemblies {
			if a.Name == asm(name) && a.Steel != "" {
				return a.Steel
			}
		}
	}
	return x.w.Job.Steel
}

// fittedUp says whether a fit-up task comes before t, so that fitting is not counted twice.
func (x *expander) fittedUp(t *tasks.Task) bool {
	seen := map[string]bool{}
	var look func(name string) bool
	look = func(name string) bool {
		u := x.byName[name]
		if u == nil || seen[name] {
			return false
		}
		seen[name] = true
		if u.Kind == tasks.FitUp {
			return true
		}
		for _, l := range u.Links {
			if look(l.Task) {
				return true
			}
		}
		return false
	}
	for _, l := range t.Links {
		if look(l.Task) {
			return true
		}
	}
	return false
}

// Cutters names the ways to cut that have hours of their own; only a disc among them is noisy
// without being a torch.
func Cutters() []string { return []string{"plasma", "oxy-fuel", "disc", "saw"} }

// What a saw takes (house judgement): mm2 of section a minute, and minutes around each cut.
const (
	sawRate  = 800.0
	sawReady = 5.0
)

// saw estimates cold sawing: section over rate, and making ready.
func (x *expander) saw(t *tasks.Task, h hands) hands {
	area := t.Length.Value * t.Thickness.Value
	total := area/sawRate + sawReady
	h.minutes = spread(total)
	h.est.Figure = origin.Worked("hands-on time", total, "min", "length x thickness over the saw's rate + making ready",
		origin.Written("length", t.Length.Value, "mm", t.Length.Pos.Origin("length")),
		origin.Written("thickness", t.Thickness.Value, "mm", t.Thickness.Pos.Origin("thickness")),
		origin.House("rate", sawRate, "mm2/min", "cold or band saw"),
		origin.House("making ready", sawReady, "min", "mark, clamp, start"))
	return h
}

// nature of a way to cut: whether it throws sparks, and whether it is loud.
func cutNature(by string) (hot, noisy bool) {
	switch by {
	case "saw", "shear", "drill", "water jet", "bevel by machine":
		return false, true
	case "oxy-fuel":
		return true, false
	}
	return true, true
}

// cut estimates a cutting task from its length and thickness.
func (x *expander) cut(t *tasks.Task) hands {
	h := hands{people: 1, least: leastPiece}
	by := t.By
	if by == "" {
		by = "disc"
	}
	h.hot, h.noisy = cutNature(by)
	if t.Hours.Pos.Given() || t.ManHours.Pos.Given() {
		return h
	}
	if weld.IsActivity(by) {
		return x.prepareJob(t, h)
	}
	t, plates := x.plates(t)
	if !plates && (!t.Thickness.Pos.Given() || !t.Length.Pos.Given()) {
		h.fault = fmt.Errorf("it needs length and thickness, or hours")
		h.hint = "write for instance length: 1.9 m, thickness: 16 mm, by: oxy-fuel"
		return h
	}
	if !has(Cutters(), by) {
		h.fault = fmt.Errorf("cutting by %q has no hours of its own", by)
		h.hint = "give hours, or cut by " + strings.Join(Cutters(), ", ")
		return h
	}
	if by == "saw" {
		return x.saw(t, h)
	}
	l, err := weld.Cut{Method: by, Thickness: t.Thickness.Value, Length: t.Length.Value, Site: x.atSite(t),
		Bevel: t.Bevel.Value, Pierces: t.Pierces, Current: t.Current.Value, Speed: t.Speed.Value, Table: ownSpeeds(t), Origin: t.Length.Pos.Origin("")}.Work()
	if err != nil {
		return h.failed(err)
	}
	h.minutes = spread(float64(l.HandsOn))
	h.est.Figure, h.est.Notes = l.Hours, l.Warnings
	h.warnings = l.Warnings
	h.uses(l.Consumables, 1)
	return h
}

// ownSpeeds is the house's table that the cut is timed by, if any.
func ownSpeeds(t *tasks.Task) *weld.CutTable {
	if t.CutBy == nil {
		return nil
	}
	return &t.CutBy.CutTable
}

// plates gives a task that cuts parts and says no length the outline and thickness of the plates
// among them; only plates of one thickness can be told from their parts.
func (x *expander) plates(t *tasks.Task) (*tasks.Task, bool) {
	if t.Length.Pos.Given() || len(t.Parts) == 0 {
		return t, false
	}
	outline, thick := 0.0, 0.0
	for _, name := range t.Parts {
		for _, p := range x.parts(name) {
			if p.Shape.Kind != lift.Plate || thick != 0 && p.Shape.Thick != thick {
				return t, false
			}
			thick = p.Shape.Thick
			outline += 2 * (p.Length + p.Shape.Width) * float64(max(1, p.Count))
		}
	}
	if outline == 0 {
		return t, false
	}
	u := *t
	u.Length = tasks.Amount{Value: outline, Pos: t.Pos}
	if !u.Thickness.Pos.Given() {
		u.Thickness = tasks.Amount{Value: thick, Pos: t.Pos}
	}
	return &u, true
}

// failed puts an error of the weld package, with its way out, on an estimate.
func (h hands) failed(err error) hands {
	h.fault, h.hint = err, "give hours"
	var we *weld.Error
	if errors.As(err, &we) && we.Hint != "" {
		h.hint = we.Hint
	}
	return h
}
