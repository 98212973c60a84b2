package agenda

import (
	"time"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Entry is one piece of a step, or one fire watch, with the people on it.
type Entry struct {
	hours.Span
	Step        *expand.Step
	Planned     plan.Step
	Row         plan.Row
	People      []string
	Watch       bool         // a fire watch after the step's work
	Piece       int          // from 0, watches counted apart
	Last        bool         // the last piece of the step
	Pauses      []hours.Span // breaks inside the span, where a remnant was joined to it (Merged)
	From0, Goes bool         // the step began in an earlier shift; it goes on in a later one
}

// Person is what one person does in a shift, in order of time.
type Person struct {
	Name    string
	On      hours.Span // on shift
	Entries []Entry
}

// Standing is clock time running during a shift.
type Standing struct {
	hours.Span
	Step *expand.Step
}

// Shift is one crew's day or night, at the site or at the home places.
type Shift struct {
	hours.Span
	Site     bool
	Zone     *time.Location
	Place    *tasks.Place // the place, or the home place with most of the work
	Date     hours.Date   // the day on which it begins
	Night    bool
	Entries  []Entry // every piece once, in order of time
	People   []Person
	Standing []Standing
}

// Worked lists every piece and watch of a plan, in the order of the steps.
func Worked(a *plan.Answer) []Entry {
	var out []Entry
	for i, ps := range a.Plan.Steps {
		if i >= len(a.Work.Steps) {
			break
		}
		s := a.Work.Steps[i]
		if s.Absent || s.Class != expand.Hands && len(ps.People) == 0 {
			continue
		}
		var row plan.Row
		if i < len(a.Rows) {
			row = a.Rows[i]
		}
		for k, piece := range ps.Pieces {
			team := ps.People
			if k < len(ps.Shifts) && ps.Shifts[k] == 1 {
				team = ps.Relief
			}
			if piece.Len() == 0 {
				continue
			}
			out = append(out, Entry{Span: piece, Step: s, Planned: ps, Row: row, People: team, Piece: k, Last: k == len(ps.Pieces)-1})
		}
		for k, wt := range ps.Watches {
			out = append(out, Entry{Span: wt.Span, Step: s, Planned: ps, Row: row, People: []string{wt.Person}, Watch: true, Piece: k, Last: true})
		}
	}
	return out
}
