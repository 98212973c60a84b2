package settle

import (
	"fmt"
	"time"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Faults gives the faults of a job that only hours and the choice of a window show: those of
// expand, and work that goes in one go and is longer than any opening of its place, whoever
// does it. Trip "" is the booked one, else the first.
func Faults(job *tasks.Job, b expand.Basis) tasks.Faults {
	w, faults := expand.Expand(job, b)
	if len(faults) > 0 {
		w, _ = expand.Hours(job, b)
	}
	return append(faults, tooLong(w)...).Sorted()
}

// Early gives those faults that the hours of single tasks show, for a job of which not all could be read.
func Early(job *tasks.Job, b expand.Basis) tasks.Faults {
	w, faults := expand.Hours(job, b)
	return append(faults, tooLong(w)...).Sorted()
}

// tooLong reports work that goes in one go and is longer than any opening of its place.
func tooLong(w *expand.Work) (faults tasks.Faults) {
	if w == nil {
		return nil
	}
	for _, s := range w.Steps {
		if s.Absent || !s.InOneGo || s.Class != expand.Hands || s.Working == 0 {
			continue
		}
		if need, have := s.Working+s.SetUp, longestOpening(s); need > have {
			faults = append(faults, tasks.Fault{Pos: s.Task.Pos,
				Text: fmt.Sprintf("task %q: goes in one go and needs %s at %s, where the longest opening has %s (%s too long)",
					s.Task.Name, span(need), s.Place.Name, span(have), span(need-have)),
				Hint: "write in one go: no, longer opening hours, more people, or split the task"})
		}
	}
	return faults
}

// longestOpening gives the most working minutes that a step can have at one go in a week of its
// place's opening hours, or in a slot outside them.
func longestOpening(s *expand.Step) int {
	p := s.Place
	monday, _ := hours.Instant(hours.Date{Year: 2001, Month: time.January, Day: 1}, 0, time.UTC)
	week := p.Open.Spans(time.UTC, hours.Span{From: monday, To: monday + 15*1440}, nil)
	var keep []hours.Span
	for _, o := range week.Joined(problem.Meal, nil) {
		keep = append(keep, hours.Span{From: o.From + hours.Minute(p.OpeningUp.Value), To: o.To - hours.Minute(p.ClearingUp.Value)})
	}
	week = week.And(hours.NewSet(keep...))
	runs := week
	if s.OverMeals {
		runs = week.Joined(problem.Meal, nil)
	}
	best, trim := 0, int(p.OpeningUp.Value+p.ClearingUp.Value)
	for _, r := range runs {
		best = max(best, week.Count(r))
	}
	for _, slot := range p.AlsoOpen {
		from, to := slot.From, slot.To
		if from.Date == to.Date || to.Date == (hours.Date{}) {
			best = max(best, to.Minute-from.Minute-trim)
		} else {
			best = problem.Inf // a slot over days: no opening is too short by itself
		}
	}
	return max(best, 0)
}
