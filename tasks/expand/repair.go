package expand

import (
	"sailby/tasks"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
	"sailby/weld"
)

// repair estimates what testing may find: the expected length welded again with locating,
// gouging and grinding, part of one welder's time where several share it, and the second wait.
func (x *expander) repair(t *tasks.Task, h hands, e weld.Estimate, c weld.Circumstances, part float64) hands {
	r := e.Repair(c, tasks.BadAccess(t.Welds()))
	length := 0.0
	for _, s := range e.Seams {
		length += s.Length * float64(max(1, s.Section.Sides))
	}
	hours := r.Hours
	if part < 1-1e-9 {
		hours = origin.Worked("hands-on time", hours.Value*part, "min", "time of one welder x part of one welder's time",
			renamed(hours, "time of one welder"), origin.Worked("part of one welder's time", part, "", "hands-on time / time of one welder"))
	}
	h.minutes, h.est.Figure = spread(hours.Value), hours
	h.safe *= hours.Value / (float64(e.HandsOn) * part)
	h.est.Facts = []origin.Figure{
		origin.Worked("repair length", r.Length, "mm", "expected length where there is any"),
		origin.House("chance of any repair", r.Chance, "", "at least one repair of usual length, by the repair share"),
		e.Why.SetUp,
	}
	if r.Standing > 0 {
		h.est.Facts = append(h.est.Facts, e.Why.BeforeNDT)
	}
	h.uses(e.Consumables, r.Length/length)
	h.warnings = nil // said of the weld itself
	e.HandsOn = quantity.HandsOn(hours.Value)
	x.welded[t] = e
	return h
}

// repairLength is the expected length of a repair, mm.
func (x *expander) repairLength(t *tasks.Task) float64 {
	c := x.circumstances(t)
	e, err := weld.Work(x.seamsOf(t, ""), c)
	if err != nil {
		return 0
	}
	return e.Repair(c, tasks.BadAccess(t.Welds())).Length
}

// onlyAfterAbsent says whether the welds that a test follows are repairs that do not happen.
func (x *expander) onlyAfterAbsent(t *tasks.Task) bool {
	any := false
	for _, l := range t.Links {
		w := x.byName[l.Task]
		if w == nil || w.Kind != tasks.Weld {
			continue
		}
		if w.Repairs == nil || !x.absent[w] {
			return false
		}
		any = true
	}
	return any
}
