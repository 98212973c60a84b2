package expand

import (
	"sailby/tasks"
	"sailby/tasks/origin"
)

// power reports steps that draw more than all that is there gives (R7): no plan can hold them.
func (x *expander) power() {
	for _, s := range x.w.Steps {
		if s.Absent || s.Class != Hands || s.HandsOn == 0 {
			continue
		}
		gives, limited := x.supply(s.Place)
		if limited && s.Power > gives+1e-9 {
			x.fault(s.Task.Pos, "take a larger generator, or sets and settings that draw less", "task %q: it draws %s kVA, there are %s kVA at %s",
				s.Task.Name, origin.Trim(s.Power), origin.Trim(gives), s.Place.Name)
		}
	}
}

// supply gives the power there is at a place, and whether anything limits it: its mains where
// the job file states them, and the generators that are there.
func (x *expander) supply(at *tasks.Place) (kVA float64, limited bool) {
	kVA, limited = at.Mains.Value, at.Mains.Pos.Given()
	for _, k := range x.w.Job.Kit {
		if k.Gives > 0 && (k.At == at || k.At == nil && at == x.w.Window.Place) {
			kVA += k.Gives * float64(max(k.Count, 1))
			limited = true
		}
	}
	return kVA, limited
}
