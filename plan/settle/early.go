package settle

import (
	"sailby/plan"
	"sailby/plan/solve"
)

// early tells of a plan as soon as there is one, for whoever does not wait for the answer: of the first, the second, the fourth
// and so on, each checked and marked as cut short. What explains it is left out.
func (a *asked) early(s *solve.Schedule) {
	if a.made++; a.o.early == nil || a.made&(a.made-1) != 0 || a.o.left() {
		return
	}
	c, out := *a, *a.out
	c.out, c.bare = &out, true
	if err := c.keep(s, false); err != nil || out.Plan == nil {
		return // told where the answer is whole
	}
	out.CutShort = true
	c.verdict()
	out.Best = false
	if out.Verdict == plan.CannotFit && out.Proof == nil {
		out.Verdict = plan.Unsettled
	}
	a.o.early(&out)
}
