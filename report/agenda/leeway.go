package agenda

import (
	"fmt"
	"slices"
	"strings"

	"sailby/plan"
	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// Leeway says how much later step i may finish, what moves with it, and the latest finish; or why that is not
// known. "" for what has no leeway of its own: standing time, and steps without a plan.
func Leeway(a *plan.Answer, i int) string {
	s := a.Work.Steps[i]
	if i >= len(a.Rows) || s.Class != expand.Hands {
		return ""
	}
	row := a.Rows[i]
	if row.Leeway < 0 {
		return NoLeeway(a)
	}
	text := quantity.Hours(row.Leeway)
	if len(row.Shares) > 0 {
		text += ", shared with " + clean.Line(strings.Join(row.Shares, ", "))
	}
	if with := tiedTo(a.Work, s); len(with) > 0 {
		text += "; tied by `starts with` to " + clean.Line(strings.Join(with, ", ")) + ", which moves with it"
	}
	if row.Latest < hours.Far && row.Latest > hours.Never && row.Latest != 0 {
		text += "; latest finish " + When(row.Latest, Zone(a.Work, s.Place))
	}
	if atHome(a, s, row) {
		text += " (at home, counted to the window's close)"
	}
	return text
}

// NoLeeway says why no leeway of a plan is known.
func NoLeeway(a *plan.Answer) string {
	if len(a.Work.Steps) > plan.LeewaySteps {
		return fmt.Sprintf("not worked out: the plan has %d steps, and leeway is worked out for up to %d", len(a.Work.Steps), plan.LeewaySteps)
	}
	return "not worked out for this plan"
}

// LeewayKnown says whether the leeway of any hands-on step of the plan is known.
func LeewayKnown(a *plan.Answer) bool {
	hands := false
	for i, s := range a.Work.Steps {
		if i < len(a.Rows) && s.Class == expand.Hands && !s.Absent {
			if a.Rows[i].Leeway >= 0 {
				return true
			}
			hands = true
		}
	}
	return !hands
}

// atHome says whether a step's leeway is that of home work without a deadline, which goes as far as the window's close (R20).
func atHome(a *plan.Answer, s *expand.Step, row plan.Row) bool {
	if s.Site || a.Late || row.Latest > a.Work.Window.Closes {
		return false
	}
	for _, d := range a.Deadlines {
		if d.Step == s {
			return false
		}
	}
	for _, other := range a.Work.Steps {
		if other.Site && slices.Contains(row.Shares, TaskLabel(other.Task)) {
			return false
		}
	}
	return true
}

// tiedTo names the tasks that start at the same minute as a step by `starts with`, straight or through others.
func tiedTo(w *expand.Work, s *expand.Step) []string {
	in := []*expand.Step{s}
	var names []string
	for k := 0; k < len(in); k++ {
		for _, l := range w.Links {
			if l.From == nil || l.FromEnd != tasks.Start || l.ToEnd != tasks.Start || l.Min != 0 || l.Max != 0 || l.MaxWorking || l.MaxCure != nil {
				continue
			}
			other := l.To
			if other == in[k] {
				other = l.From
			} else if l.From != in[k] {
				continue
			}
			if other.Absent || slices.Contains(in, other) {
				continue
			}
			in = append(in, other)
			if name := TaskLabel(other.Task); !slices.Contains(names, name) {
				names = append(names, name)
			}
		}
	}
	return names
}
