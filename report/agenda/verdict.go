package agenda

import (
	"fmt"
	"slices"
	"strings"

	"sailby/plan"
	"sailby/report/clean"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// BasisWords says on what hours an answer stands: "on likely hours".
func BasisWords(b expand.Basis) string {
	s := "on likely hours"
	switch b.End {
	case expand.High:
		s = "at the high end of the hours"
	case expand.Low:
		s = "at the low end of the hours"
	}
	if b.Maybes {
		if b.End == expand.Likely {
			return "with every maybe"
		}
		return s + " with every maybe"
	}
	return s
}

// Word is an answer's verdict as people read it: "fits", "fits, with a rescue", "fits, but neaped", "cannot fit", "not settled".
func Word(a *plan.Answer) string {
	switch a.Verdict {
	case plan.Fits:
		if slices.ContainsFunc(a.Work.Rescues, func(m expand.Rescue) bool { return m.Mended }) {
			return "fits, with a rescue" + butNeaped(a)
		}
		return "fits" + butNeaped(a)
	case plan.CannotFit:
		return "cannot fit"
	}
	return "not settled"
}

// Sentence says an answer's verdict in one clear sentence; low says that a proof holds at the low
// end of every range too.
func Sentence(a *plan.Answer, low bool) string {
	zone := Zone(a.Work, a.Work.Window.Place)
	basis := BasisWords(a.Work.Basis)
	switch a.Verdict {
	case plan.Fits:
		s := fmt.Sprintf("Fits%s: %s the work at %s is finished by %s, %s before the window closes",
			butNeaped(a), basis, PlaceLabel(a.Work.Window.Place), When(a.Finish, zone), quantity.Hours(a.InHand))
		for _, m := range a.Work.Rescues {
			if m.Mended {
				s += fmt.Sprintf("; the longest wait of %s before %s cannot be kept and costs %s of %s: ask the paint's maker first",
					clean.Line(m.Paint.Name), TaskLabel(m.Task), quantity.Hours(m.Step.HandsOn), m.Name)
			}
		}
		if butNeaped(a) != "" {
			s += "; what came in on the tide stays"
		}
		return s + "."
	case plan.CannotFit:
		if low {
			basis = "even at the low end of every range"
		}
		s := fmt.Sprintf("Cannot fit: proved, %s", basis)
		if p := a.Proof; p != nil {
			if p.Summary != "" {
				s += ": " + strings.TrimSuffix(clean.Line(p.Summary), ".")
			}
			if p.Over > 0 && !strings.Contains(p.Summary, quantity.Hours(p.Over)) {
				s += fmt.Sprintf(" (%s too much)", quantity.Hours(p.Over))
			}
		}
		return s + "."
	}
	return "Not settled: " + basis + " " + unsettled(a) + "."
}

// butNeaped is what a verdict adds where a craft is not shown to get off again (R26): the work fits, the craft stays.
func butNeaped(a *plan.Answer) string {
	if Neaped(a) {
		return ", but neaped"
	}
	return ""
}

func unsettled(a *plan.Answer) string {
	zone := Zone(a.Work, a.Work.Window.Place)
	s := "no plan was found in the time allowed, and nothing shows that there is none"
	if a.Plan != nil {
		s = fmt.Sprintf("the best plan found finishes %s, %s", When(a.Finish, zone), lateness(a))
	}
	if !unknown(a.Bound) {
		s += fmt.Sprintf("; no plan can finish before %s", When(a.Bound, zone))
	}
	return s
}

// lateness says how late a plan is, at the window or at the deadline that it misses most.
func lateness(a *plan.Answer) string {
	if a.InHand < 0 {
		return quantity.Hours(-a.InHand) + " after the window closes"
	}
	worst := -1
	for i, d := range a.Deadlines {
		if d.InHand < 0 && (worst < 0 || d.InHand < a.Deadlines[worst].InHand) {
			worst = i
		}
	}
	if worst >= 0 {
		d := a.Deadlines[worst]
		return fmt.Sprintf("but is %s late for %s", quantity.Hours(-d.InHand), DeadlineName(d))
	}
	return "inside the window"
}

// DeadlineName is what the deadline is for: the task's printed name or the window's close.
func DeadlineName(d plan.DeadlineResult) string {
	switch {
	case d.Task != nil:
		return TaskLabel(d.Task)
	case d.Name != "":
		return clean.Line(d.Name)
	}
	return "the window's close"
}

// InHand writes time in hand, or by how much it is late; "-" where no plan says.
func InHand(a *plan.Answer, minutes int) string {
	switch {
	case a.Plan == nil:
		return "-"
	case minutes < 0:
		return quantity.Hours(-minutes) + " late"
	}
	return quantity.Hours(minutes)
}

// Moment gives a time of the answer, or "-" where it has none.
func Moment(a *plan.Answer, m hours.Minute) string {
	if m == 0 {
		return "-"
	}
	return When(m, Zone(a.Work, a.Work.Window.Place))
}

// Finish gives the plan's site finish, or "-" without a plan.
func Finish(a *plan.Answer) string {
	if a.Plan == nil {
		return "-"
	}
	return Moment(a, a.Finish)
}
