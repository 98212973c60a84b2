package sheets

import (
	"slices"
	"strings"

	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// conditions prints what weather and water do in the shift: the weather planned with, when people
// are off before the water, which hours are closed and why, the limits of the paints, and boxes
// for the readings. Nothing where none of it bears on the shift.
func (k *pack) conditions(s *agenda.Shift, steps []*expand.Step, how form) {
	p := k.p
	var lines []string
	if w := agenda.WeatherWords(s.Place, s.Span); w != "" {
		lines = append(lines, "Planned with "+signs(w)+".")
	}
	lines = append(lines, k.wayOff(s, steps)...)
	lines = append(lines, k.closedHours(s, steps)...)
	painted, bare := k.limits(steps)
	lines = append(lines, painted...)
	if len(lines) == 0 {
		return
	}
	if how == loose {
		p.heading("Weather and water", float64(min(len(lines), 4))*lineHeight(body))
	}
	for _, l := range lines {
		p.point("-", l, false)
	}
	// Coats have their later readings in the paint log.
	if row := []field{{label: "Read at"}, {label: "Air °C"}, {label: "Humidity %"}, {label: "Dew point °C"}, {label: "Steel °C"}, {label: "Above dew, K"}}; len(painted) > 0 || bare && how == dense {
		p.fields(6, row...)
	} else if bare {
		p.fields(6, append(row, row...)...)
	}
}

// wayOff says for each workface of the shift when people are off and when the water is there.
func (k *pack) wayOff(s *agenda.Shift, steps []*expand.Step) []string {
	var out []string
	seen := map[*tasks.Workface]bool{}
	for _, st := range steps {
		if f := st.Face; f != nil && !seen[f] {
			seen[f] = true
			if words := agenda.Covers(k.work, f, s.Span); len(words) > 0 {
				out = append(out, upper(paper(f.Name))+": "+strings.Join(words, "; ")+".")
			}
		}
	}
	return out
}

// closedHours says for coats and surface preparation of the shift which hours are open and why
// the others are not.
func (k *pack) closedHours(s *agenda.Shift, steps []*expand.Step) []string {
	var out []string
	for _, place := range placesOf(steps) {
		for _, x := range agenda.Fit(k.work, place, s.Span) {
			same := func(st *expand.Step) bool {
				return st == x.Step || st.Paint != nil && st.Paint == x.Step.Paint && st.Face == x.Step.Face
			}
			if !slices.ContainsFunc(steps, same) {
				continue
			}
			if reasons := agenda.ClosedWords(k.work, place, x); len(reasons) > 0 {
				out = append(out, signs(upper(x.Name)+" closed "+strings.Join(reasons, "; ")+"."))
			} else {
				out = append(out, upper(x.Name)+": weather and water allow it all the shift.")
			}
		}
	}
	return out
}

func placesOf(steps []*expand.Step) []*tasks.Place {
	var out []*tasks.Place
	for _, st := range steps {
		if st.Place != nil && !slices.Contains(out, st.Place) {
			out = append(out, st.Place)
		}
	}
	return out
}

// limits gives the limits of the paints of the shift, and whether steel is prepared in it.
func (k *pack) limits(steps []*expand.Step) (lines []string, bare bool) {
	for _, st := range steps {
		if st.Task.Kind == tasks.Prep {
			bare = true
		}
		if st.Paint == nil {
			continue
		}
		var parts []string
		for _, f := range st.Paint.Limits(st.Method()) {
			parts = append(parts, f.Name+" "+signs(f.Amount()))
		}
		if len(parts) == 0 {
			continue
		}
		line := joined(" by ", paper(st.Paint.Name), paper(st.Method())) + ": " + strings.Join(parts, "; ") + "."
		if !slices.Contains(lines, line) {
			lines = append(lines, line)
		}
	}
	return lines, bare
}

// plannedHour writes the weather of the hour in which a step is planned to start.
func (k *pack) plannedHour(st *expand.Step) string {
	var parts []string
	for _, f := range agenda.Hour(st, k.planned(st).Start) {
		parts = append(parts, f.Name+" "+signs(f.Amount()))
	}
	return strings.Join(parts, "; ")
}
