// Package export writes a plan for other programs: as an iCalendar file (RFC 5545) and as CSV
// (RFC 4180). Both have one entry for each person's piece of work and each fire watch, or one
// for each task. Text is cleaned; nothing in a CSV field runs as a formula.
package export

import (
	"errors"
	"slices"
	"strings"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Options says what to export. The zero value is every piece of every person in the plan for
// likely hours.
type Options struct {
	Tasks  bool         // one entry for each task in place of each person's pieces
	Person string       // only this person's pieces; "" is everybody
	Maybes bool         // the plan with every maybe
	End    expand.End   // High: the plan at the high end of the hours
	Stamp  hours.Minute // when the file was made (DTSTAMP); 0 is the opening of the window, so that equal input gives equal bytes
}

// ErrNoPlan is given where there is no plan to export.
var ErrNoPlan = errors.New("there is no plan to export: the work was not shown to fit, and no late plan was found either")

// item is one entry of an export.
type item struct {
	hours.Span
	task   *tasks.Task
	step   *expand.Step // nil for a whole task
	person string       // "" for nobody or a whole task
	people []string
	watch  bool
	piece  int
	pieces []hours.Span
}

// items gives the answer asked for and its entries, in order of time, then of the job file.
func items(r *plan.Report, o Options) (*plan.Answer, []item, error) {
	if r == nil || r.Likely == nil {
		return nil, nil, ErrNoPlan
	}
	a := r.Likely
	switch {
	case o.Maybes && r.Maybes != nil:
		a = r.Maybes
	case o.End == expand.High && r.High != nil:
		a = r.High
	}
	if a.Plan == nil {
		return nil, nil, ErrNoPlan
	}
	list := byPerson(a, o.Person)
	if o.Tasks {
		list = byTask(a)
	}
	slices.SortStableFunc(list, func(x, y item) int { return int(x.From - y.From) })
	return a, list, nil
}

func byPerson(a *plan.Answer, only string) []item {
	var out []item
	for _, e := range agenda.Worked(a) {
		who := e.People
		if len(who) == 0 {
			who = []string{""}
		}
		for _, p := range who {
			if only == "" || p == only {
				out = append(out, item{Span: e.Span, task: e.Step.Task, step: e.Step, person: p, people: e.People, watch: e.Watch, piece: e.Piece})
			}
		}
	}
	return out
}

// byTask gives each task that happens from its first start to its last hands-on finish.
func byTask(a *plan.Answer) []item {
	var out []item
	for _, t := range a.Work.Job.Tasks {
		it := item{task: t}
		for i, s := range a.Work.Steps {
			if s.Task != t || s.Absent || i >= len(a.Plan.Steps) {
				continue
			}
			ps := a.Plan.Steps[i]
			if it.From == 0 || ps.Start < it.From {
				it.From = ps.Start
			}
			if s.Class == expand.Hands || t.Kind == tasks.Plain {
				it.To = max(it.To, ps.Finish)
			}
			if s.Class == expand.Hands {
				it.pieces = append(it.pieces, ps.Pieces...)
			}
			for _, who := range append(slices.Clone(ps.People), ps.Relief...) {
				if !slices.Contains(it.people, who) {
					it.people = append(it.people, who)
				}
			}
		}
		if it.Len() > 0 {
			out = append(out, it)
		}
	}
	return out
}

// title is what an entry is called.
func (it item) title(w *expand.Work) string {
	name := agenda.TaskLabel(it.task)
	if it.step != nil {
		name = agenda.StepLabel(w, it.step)
	}
	if it.watch {
		return "fire watch after " + name
	}
	return name
}

// where is the entry's place and workface.
func (it item) where() string {
	s := agenda.PlaceLabel(it.task.Place)
	if it.task.Face != nil {
		s += ", " + clean.Line(it.task.Face.Name)
	}
	return s
}

func (it item) names() string {
	out := make([]string, len(it.people))
	for i, p := range it.people {
		out[i] = clean.Line(p)
	}
	return strings.Join(out, ", ")
}
