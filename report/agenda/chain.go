package agenda

import (
	"fmt"

	"sailby/plan"
)

// ChainLink is one step of the governing chain with all that sets its start.
type ChainLink struct {
	Head   string // "weld starts Mon 20 Sep 14:57: "; "" where no step is known
	Causes []plan.Cause
}

// Chain gives the governing chain of an answer, one link for each step, the last first.
func Chain(a *plan.Answer) []ChainLink {
	var out []ChainLink
	if a == nil || a.Plan == nil || a.Work == nil {
		return nil
	}
	last := -1
	for _, c := range a.Governing {
		known := c.Step >= 0 && c.Step < len(a.Work.Steps) && c.Step < len(a.Plan.Steps)
		if known && c.Step == last {
			out[len(out)-1].Causes = append(out[len(out)-1].Causes, c)
			continue
		}
		link := ChainLink{Causes: []plan.Cause{c}}
		last = -1
		if known {
			last = c.Step
			st := a.Work.Steps[c.Step]
			link.Head = fmt.Sprintf("%s starts %s: ", StepLabel(a.Work, st), When(a.Plan.Steps[c.Step].Start, Zone(a.Work, st.Place)))
		}
		out = append(out, link)
	}
	return out
}
